package memory

import (
	"container/list"
	"sync"
)

// lru keeps the values that were used last, up to a number of them.
type lru[V any] struct {
	mu    sync.Mutex
	most  int
	order *list.List // of *lruEntry[V], the last used in front
	at    map[string]*list.Element
}

type lruEntry[V any] struct {
	key   string
	value V
}

func newLRU[V any](most int) *lru[V] {
	return &lru[V]{most: most, order: list.New(), at: make(map[string]*list.Element)}
}

func (c *lru[V]) get(key string) (V, bool) {
	c.mu.Lock()
	defer c.mu.Unlock()
	e, ok := c.at[key]
	if !ok {
		var none V
		return none, false
	}
	c.order.MoveToFront(e)
	return e.Value.(*lruEntry[V]).value, true
}

func (c *lru[V]) put(key string, v V) { c.putIf(key, v, func(V) bool { return true }) }

// putIf puts a value in place of one that may go; the zero V stands for none.
func (c *lru[V]) putIf(key string, v V, may func(old V) bool) {
	c.mu.Lock()
	defer c.mu.Unlock()
	e, ok := c.at[key]
	var old V
	if ok {
		old = e.Value.(*lruEntry[V]).value
	}
	if !may(old) {
		return
	}
	if ok {
		e.Value.(*lruEntry[V]).value = v
		c.order.MoveToFront(e)
		return
	}
	c.at[key] = c.order.PushFront(&lruEntry[V]{key, v})
	if c.order.Len() > c.most {
		last := c.order.Back()
		c.order.Remove(last)
		delete(c.at, last.Value.(*lruEntry[V]).key)
	}
}

func (c *lru[V]) drop(key string) {
	c.mu.Lock()
	defer c.mu.Unlock()
	if e, ok := c.at[key]; ok {
		c.order.Remove(e)
		delete(c.at, key)
	}
}
