package memory

import (
	"fmt"
	"io"
	"net/http"
	"net/http/httptest"
	"testing"

	"galeward/adapters/memstore"
)

// BenchmarkReading is both round trips of a reading on the store in memory,
// with a full thread, beside one loopback HTTP round trip as the reference.
func BenchmarkReading(b *testing.B) {
	s := memstore.New(nil)
	known, foreign := New(s, Options{}), New(s, Options{})
	if _, _, err := known.ChangeHouse(ctx, ward, "U1", func(House) (House, error) { return whole(), nil }); err != nil {
		b.Fatal(err)
	}
	for name, pair := range map[string][2]*Memory{"OneProcess": {known, known}, "OtherProcessWroteLast": {known, foreign}} {
		b.Run(name, func(b *testing.B) {
			n := 0
			for b.Loop() {
				c := call(fmt.Sprintf("%s%d", name, n))
				m := pair[n%2]
				n++
				v, err := m.Load(ctx, c)
				if err != nil {
					b.Fatal(err)
				}
				v.Put(gas(c.Message, 50))
				if err := m.Save(ctx, v); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkLoopbackHTTP(b *testing.B) {
	srv := httptest.NewServer(http.HandlerFunc(func(w http.ResponseWriter, _ *http.Request) { _, _ = io.WriteString(w, "ok") }))
	defer srv.Close()
	for b.Loop() {
		resp, err := http.Get(srv.URL)
		if err != nil {
			b.Fatal(err)
		}
		_, _ = io.Copy(io.Discard, resp.Body)
		_ = resp.Body.Close()
	}
}
