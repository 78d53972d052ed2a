package redisstore

import (
	"bytes"
	"net"
	"sync"
	"sync/atomic"
	"testing"
	"time"
)

// proxy stands between a store and its server, and loses things.
type proxy struct {
	server string
	listen net.Listener
	all    sync.WaitGroup

	loseReplies  atomic.Int32 // cut so many times after a script went to the server
	loseRequests atomic.Int32 // cut so many times before a script goes to the server
	scripts      atomic.Int32 // scripts that went to the server
	delay        atomic.Int64 // before each script goes to the server

	mu    sync.Mutex
	conns map[net.Conn]bool
}

func newProxy(t testing.TB, server string) *proxy {
	t.Helper()
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	p := &proxy{server: server, listen: l, conns: make(map[net.Conn]bool)}
	p.all.Go(p.accept)
	t.Cleanup(p.close)
	return p
}

func (p *proxy) addr() string { return p.listen.Addr().String() }

func (p *proxy) close() {
	p.listen.Close()
	p.mu.Lock()
	for c := range p.conns {
		c.Close()
	}
	p.mu.Unlock()
	p.all.Wait()
}

func (p *proxy) accept() {
	for {
		c, err := p.listen.Accept()
		if err != nil {
			return
		}
		s, err := net.Dial("tcp", p.server)
		if err != nil {
			c.Close()
			continue
		}
		p.mu.Lock()
		p.conns[c], p.conns[s] = true, true
		p.mu.Unlock()
		var lose atomic.Bool
		p.all.Go(func() { p.requests(c, s, &lose) })
		p.all.Go(func() { p.replies(c, s, &lose) })
	}
}

// drop closes a pair; the other direction ends with it.
func (p *proxy) drop(c, s net.Conn) {
	c.Close()
	s.Close()
	p.mu.Lock()
	delete(p.conns, c)
	delete(p.conns, s)
	p.mu.Unlock()
}

func (p *proxy) requests(c, s net.Conn, lose *atomic.Bool) {
	defer p.drop(c, s)
	buf := make([]byte, 1<<20) // a test's request is one read
	for {
		n, err := c.Read(buf)
		if err != nil {
			return
		}
		if bytes.Contains(buf[:n], []byte("\r\neval")) {
			if take(&p.loseRequests) {
				return
			}
			lose.Store(take(&p.loseReplies))
			p.scripts.Add(1)
			time.Sleep(time.Duration(p.delay.Load()))
		}
		if _, err := s.Write(buf[:n]); err != nil {
			return
		}
	}
}

func (p *proxy) replies(c, s net.Conn, lose *atomic.Bool) {
	defer p.drop(c, s)
	buf := make([]byte, 1<<20)
	for {
		n, err := s.Read(buf)
		if err != nil || lose.Load() { // the reply came, so the server did it
			return
		}
		if _, err := c.Write(buf[:n]); err != nil {
			return
		}
	}
}

func take(n *atomic.Int32) bool {
	for {
		v := n.Load()
		if v == 0 {
			return false
		}
		if n.CompareAndSwap(v, v-1) {
			return true
		}
	}
}
