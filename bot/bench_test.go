package bot_test

import (
	"context"
	"strconv"
	"testing"
)

// BenchmarkAnswer answers a usual line, four values and oxygen, in a thread of
// its own.
func BenchmarkAnswer(b *testing.B) {
	d := newDesk(b)
	b.ReportAllocs()
	for b.Loop() {
		e := d.event("7.27/72/54/32 fio2 40")
		e.Delivery, e.Message = strconv.Itoa(d.count), strconv.Itoa(d.count)
		e.Where.Thread = e.Delivery
		if a := d.bot.Answer(context.Background(), e); a.Machine.Kind != "reading" {
			b.Fatal(a.Machine.Kind)
		}
	}
}
