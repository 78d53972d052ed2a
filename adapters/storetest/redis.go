//go:build unix

package storetest

import (
	"bufio"
	"fmt"
	"io"
	"net"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"
)

// Server is a Redis server of a test's own, with its data in a folder of the
// test. It ends with the test.
type Server struct {
	t    testing.TB
	args []string
	dir  string
	port string

	mu   sync.Mutex
	cmd  *exec.Cmd
	ends chan struct{} // closed when cmd has ended
}

// Redis starts redis-server with further arguments of its command line. The
// append-only file is on, so that Restart finds what was acknowledged.
func Redis(t testing.TB, args ...string) *Server {
	t.Helper()
	if _, err := exec.LookPath("redis-server"); err != nil {
		t.Fatal("this test needs redis-server in the PATH; on Debian: apt-get install -y --no-install-recommends redis-server")
	}
	s := &Server{t: t, dir: t.TempDir()}
	s.args = append([]string{"--bind", "127.0.0.1", "--dir", s.dir, "--save", "", "--appendonly", "yes",
		"--repl-diskless-sync-delay", "0"}, args...)
	return s.first()
}

// Sentinel starts a sentinel with a configuration file, which it rewrites.
func Sentinel(t testing.TB, conf string) *Server {
	t.Helper()
	s := &Server{t: t, dir: t.TempDir(), args: []string{conf, "--sentinel", "--bind", "127.0.0.1"}}
	return s.first()
}

// first starts a server on a port that is free.
func (s *Server) first() *Server {
	s.t.Helper()
	s.t.Cleanup(s.Kill)
	var err error
	for range 5 { // another program may take the port that was free
		s.port = FreePort(s.t)
		if err = s.start(); err == nil {
			return s
		}
	}
	s.t.Fatal(err)
	return nil
}

// Addr is the host and port.
func (s *Server) Addr() string { return net.JoinHostPort("127.0.0.1", s.port) }

// Port is the port alone, for the command line of a replica or a sentinel.
func (s *Server) Port() string { return s.port }

// Kill ends the server as a crash would, without a word to its clients.
func (s *Server) Kill() {
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.cmd == nil {
		return
	}
	_ = s.cmd.Process.Kill() // an ended one can't be killed, and need not
	<-s.ends
	s.cmd = nil
}

// Stop makes the server hang: it keeps its connections and answers nothing.
func (s *Server) Stop() { s.signal(syscall.SIGSTOP) }

// Cont lets a stopped server go on.
func (s *Server) Cont() { s.signal(syscall.SIGCONT) }

// Restart starts a killed server on the same port with the same data.
func (s *Server) Restart() {
	s.t.Helper()
	s.Kill()
	if err := s.start(); err != nil {
		s.t.Fatal(err)
	}
}

// Raw sends one command, its words separated by spaces, on a connection of its
// own and returns the first line of the reply as the protocol has it.
func (s *Server) Raw(command string) string {
	s.t.Helper()
	line, _, err := ask(s.Addr(), command)
	if err != nil {
		s.t.Fatalf("redis-server: %v", err)
	}
	return line
}

// Ask is Raw for a command whose reply is one text, which it returns.
func (s *Server) Ask(command string) string {
	s.t.Helper()
	line, text, err := ask(s.Addr(), command)
	if err != nil || !strings.HasPrefix(line, "$") {
		s.t.Fatalf("redis-server: %s, error %v", line, err)
	}
	return text
}

// Obstruct puts a folder where the server would write a file of that name in
// its data folder.
func (s *Server) Obstruct(name string) {
	s.t.Helper()
	if err := os.MkdirAll(filepath.Join(s.dir, name, "full"), 0o700); err != nil {
		s.t.Fatal(err)
	}
}

func (s *Server) signal(sig syscall.Signal) {
	s.t.Helper()
	s.mu.Lock()
	defer s.mu.Unlock()
	if err := s.cmd.Process.Signal(sig); err != nil {
		s.t.Fatalf("redis-server: %v", err)
	}
}

func (s *Server) start() error {
	args := append(slices.Clone(s.args), "--port", s.port, "--logfile", filepath.Join(s.dir, "log"))
	cmd := exec.Command("redis-server", args...)
	if err := cmd.Start(); err != nil {
		return err
	}
	ends := make(chan struct{})
	go func() { _ = cmd.Wait(); close(ends) }() // how it ended is in its log
	s.mu.Lock()
	s.cmd, s.ends = cmd, ends
	s.mu.Unlock()
	return s.ready(ends)
}

// ready waits until the server answers; one that wants a password answers too.
func (s *Server) ready(ends <-chan struct{}) error {
	for deadline := time.Now().Add(10 * time.Second); time.Now().Before(deadline); {
		line, _, err := ask(s.Addr(), "PING")
		if err == nil && !strings.HasPrefix(line, "-LOADING") {
			return nil
		}
		select {
		case <-ends:
			log, _ := os.ReadFile(filepath.Join(s.dir, "log"))
			return fmt.Errorf("redis-server ended at its start: %s", log)
		case <-time.After(10 * time.Millisecond):
		}
	}
	return fmt.Errorf("redis-server on port %s does not answer", s.port)
}

// ask sends a command and reads the first line of the reply, and the text that
// follows where the line announces one.
func ask(addr, command string) (line, text string, err error) {
	c, err := net.DialTimeout("tcp", addr, time.Second)
	if err != nil {
		return "", "", err
	}
	defer c.Close()
	if err := c.SetDeadline(time.Now().Add(2 * time.Second)); err != nil {
		return "", "", err
	}
	if _, err := fmt.Fprintf(c, "%s\r\n", command); err != nil {
		return "", "", err
	}
	r := bufio.NewReader(c)
	if line, err = r.ReadString('\n'); err != nil {
		return "", "", err
	}
	line = strings.TrimSpace(line)
	if n, err := strconv.Atoi(strings.TrimPrefix(line, "$")); err == nil && n > 0 && line[0] == '$' {
		b := make([]byte, n)
		if _, err := io.ReadFull(r, b); err != nil {
			return "", "", err
		}
		text = string(b)
	}
	return line, text, nil
}

// FreePort is a port of this machine that nothing listens on.
func FreePort(t testing.TB) string {
	t.Helper()
	l, err := net.Listen("tcp", "127.0.0.1:0")
	if err != nil {
		t.Fatal(err)
	}
	defer l.Close()
	_, port, err := net.SplitHostPort(l.Addr().String())
	if err != nil {
		t.Fatal(err)
	}
	return port
}
