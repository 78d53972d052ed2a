package transport

import (
	"sync"
	"time"
)

// Seen remembers which deliveries were taken, so that a platform's retries
// are answered once. It is the first, cheap line inside one process; the claim
// in the store decides between processes.
type Seen struct {
	mu    sync.Mutex
	ttl   time.Duration
	limit int
	now   func() time.Time
	until map[string]time.Time
	queue []mark // in order of taking, and so of expiry
}

type mark struct {
	key   string
	until time.Time
}

// NewSeen returns an empty memory that keeps a key for ttl, and at most limit
// keys: beyond that the oldest go first. now is the clock, nil for time.Now.
func NewSeen(ttl time.Duration, limit int, now func() time.Time) *Seen {
	if now == nil {
		now = time.Now
	}
	return &Seen{ttl: ttl, limit: limit, now: now, until: make(map[string]time.Time)}
}

// Take says whether key is new, and remembers it. Of many callers with one
// key exactly one is told true.
func (s *Seen) Take(key string) bool {
	s.mu.Lock()
	defer s.mu.Unlock()
	now := s.now()
	s.expire(now)
	if _, known := s.until[key]; known {
		return false
	}
	until := now.Add(s.ttl)
	s.until[key] = until
	s.queue = append(s.queue, mark{key, until})
	return true
}

// Drop forgets key: its work was not done, and a repeated delivery is welcome.
func (s *Seen) Drop(key string) {
	s.mu.Lock()
	defer s.mu.Unlock()
	delete(s.until, key)
}

// Len is the number of keys remembered.
func (s *Seen) Len() int {
	s.mu.Lock()
	defer s.mu.Unlock()
	return len(s.until)
}

// expire lets go of what is too old, and of the oldest while the memory is
// full. A key dropped and taken again stands twice in the queue: only the mark
// whose time matches the map's may remove it.
func (s *Seen) expire(now time.Time) {
	for len(s.queue) > 0 && (!s.queue[0].until.After(now) || len(s.queue) >= s.limit) {
		m := s.queue[0]
		s.queue = s.queue[1:]
		if s.until[m.key].Equal(m.until) {
			delete(s.until, m.key)
		}
	}
}
