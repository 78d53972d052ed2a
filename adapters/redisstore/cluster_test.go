package redisstore

import (
	"strings"
	"testing"
	"time"

	"galeward/adapters/storetest"
)

// oneNode gives a lone node all slots and waits until it serves them.
func oneNode(t *testing.T, server *storetest.Server) {
	t.Helper()
	if r := server.Raw("CLUSTER ADDSLOTSRANGE 0 16383"); r != "+OK" {
		t.Fatal(r)
	}
	for range 500 {
		if !strings.HasPrefix(server.Raw("GET k"), "-CLUSTERDOWN") {
			return
		}
		time.Sleep(20 * time.Millisecond)
	}
	t.Fatal("the node does not serve its slots")
}
