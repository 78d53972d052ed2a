package boltstore

import (
	"errors"
	"strings"
	"testing"
)

// What the client says when it gives up may quote the file: the error tells
// only its type and its place, in one line.
func TestGivingUpQuotesNothing(t *testing.T) {
	for name, c := range map[string]struct {
		work        func() error
		kind, place string
	}{
		"a text":             {func() error { panic("key 7.28/58 of page 5") }, "string at ", "TestGivingUpQuotesNothing"},
		"an error":           {func() error { panic(errors.New("key 7.28/58")) }, "*errors.errorString at ", "TestGivingUpQuotesNothing"},
		"one of the runtime": {func() error { return []error{}[len(t.Name())] }, "runtime.boundsError at ", "TestGivingUpQuotesNothing"},
	} {
		err := guard(c.work)
		if !errors.Is(err, ErrDamaged) || !strings.Contains(err.Error(), c.kind) || !strings.Contains(err.Error(), c.place) {
			t.Errorf("%s: %v", name, err)
		}
		if strings.Contains(err.Error(), "7.28") || strings.Contains(err.Error(), "\n") {
			t.Errorf("%s is quoted: %v", name, err)
		}
	}
}
