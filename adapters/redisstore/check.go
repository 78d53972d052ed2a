package redisstore

import (
	"context"
	"fmt"
	"slices"
	"strconv"
	"strings"
	"sync"

	"github.com/redis/go-redis/v9"
)

// Check looks at the server's settings and returns a sentence for each that
// would lose what was stored, or that keeps it from being stored. None means
// that all is well. It says so too when the server can't be asked.
func (s *Store) Check(ctx context.Context) []string {
	cluster, ok := s.client.(*redis.ClusterClient)
	if !ok {
		return s.checkServer(ctx, s.client)
	}
	var mu sync.Mutex
	var all []string
	err := cluster.ForEachMaster(ctx, func(ctx context.Context, node *redis.Client) error {
		found := s.checkServer(ctx, node)
		mu.Lock()
		defer mu.Unlock()
		all = append(all, found...)
		return nil
	})
	if err != nil {
		all = append(all, unasked(ctx, err))
	}
	slices.Sort(all)
	return slices.Compact(all) // a setting that is wrong on all nodes is said once
}

func (s *Store) checkServer(ctx context.Context, server redis.Cmdable) (warnings []string) {
	text, err := server.Info(ctx).Result()
	if err != nil {
		return []string{unasked(ctx, err)}
	}
	info := readInfo(text)
	if policy := info["maxmemory_policy"]; policy != "noeviction" {
		warnings = append(warnings, fmt.Sprintf("the server may drop house rules when its memory is full: "+
			"maxmemory-policy is %q and has to be noeviction", policy))
	}
	if info["aof_enabled"] != "1" {
		warnings = append(warnings, "the server forgets acknowledged changes when it crashes: appendonly has to be yes")
	}
	if info["role"] == "slave" {
		warnings = append(warnings, "the server is a replica and takes no writes")
	}
	if n, _ := strconv.Atoi(info["connected_slaves"]); n < s.o.Replicas {
		warnings = append(warnings, fmt.Sprintf("the server has %d replicas and %d are asked for: "+
			"durable changes will be called not replicated", n, s.o.Replicas))
	}
	return warnings
}

func unasked(ctx context.Context, err error) string {
	return "the settings of the server could not be looked at: " + fault(ctx, err).Error()
}

// readInfo reads the lines "name:value" of the server's own report.
func readInfo(text string) map[string]string {
	info := make(map[string]string)
	for line := range strings.Lines(text) {
		if name, value, ok := strings.Cut(strings.TrimSpace(line), ":"); ok {
			info[name] = value
		}
	}
	return info
}
