package main

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"io"
	"net/http"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"

	"galeward/adapters/slack/slackfake"
)

// built is the folder of the binary, which TestMain clears away.
var built string

// binary builds the real binary, once for all tests.
var binary = sync.OnceValues(func() (path string, err error) {
	if built, err = os.MkdirTemp("", "galeward-test"); err != nil {
		return "", err
	}
	path = filepath.Join(built, "galeward")
	out, err := exec.Command("go", "build", "-o", path, ".").CombinedOutput()
	if err != nil {
		return "", fmt.Errorf("%w: %s", err, out)
	}
	return path, nil
})

// served is a running galeward serve.
type served struct {
	t    testing.TB
	cmd  *exec.Cmd
	base string
	log  *logBuffer
	done chan error
}

// logBuffer keeps what a process logs, and tells when its address is known.
type logBuffer struct {
	mu   sync.Mutex
	text bytes.Buffer
}

func (b *logBuffer) Write(p []byte) (int, error) {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.text.Write(p)
}

func (b *logBuffer) String() string {
	b.mu.Lock()
	defer b.mu.Unlock()
	return b.text.String()
}

// serve starts the binary against a workspace, with more settings. The process
// ends with the test, and its log is searched for what must be in none.
func serve(t testing.TB, f *slackfake.Fake, settings ...string) *served {
	t.Helper()
	path, err := binary()
	if err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	secret := func(name, text string) string {
		file := filepath.Join(dir, name)
		if err := os.WriteFile(file, []byte(text+"\n"), 0o600); err != nil {
			t.Fatal(err)
		}
		return file
	}
	s := &served{t: t, log: &logBuffer{}, done: make(chan error, 1)}
	s.cmd = exec.Command(path, append([]string{
		"serve", "--listen", "127.0.0.1:0", "--slack-api", f.APIURL(),
		"--slack-signing-secret-file", secret("signing", slackfake.Secret),
		"--slack-token-file", secret("token", slackfake.Token),
	}, settings...)...)
	s.cmd.Env = []string{"HOME=" + dir, "PATH=" + os.Getenv("PATH")}
	s.cmd.Stderr = s.log
	if err := s.cmd.Start(); err != nil {
		t.Fatal(err)
	}
	go func() { s.done <- s.cmd.Wait() }()
	t.Cleanup(s.end)
	s.base = "http://" + s.address()
	return s
}

var servingLine = regexp.MustCompile(`"msg":"serving","address":"([^"]+)"`)

func (s *served) address() string {
	s.t.Helper()
	for end := time.Now().Add(10 * time.Second); time.Now().Before(end); time.Sleep(5 * time.Millisecond) {
		if m := servingLine.FindStringSubmatch(s.log.String()); m != nil {
			return m[1]
		}
	}
	s.t.Fatalf("it does not listen; log:\n%s", s.log)
	return ""
}

// end kills what still runs, and looks through the log: no secret, no typed
// values and no identifier may stand in it, whatever the test did.
func (s *served) end() {
	_ = s.cmd.Process.Kill()
	<-s.done
	s.done <- nil
	for _, never := range []string{slackfake.Secret, slackfake.Token, "7.27", "/72/", "0012345", "PaCO2"} {
		if strings.Contains(s.log.String(), never) {
			s.t.Errorf("the log holds %q:\n%s", never, s.log)
		}
	}
	for _, line := range strings.Split(strings.TrimSpace(s.log.String()), "\n") {
		if !json.Valid([]byte(line)) {
			s.t.Errorf("a line of the log is no JSON: %s", line)
		}
	}
}

// terminate sends SIGTERM and gives the exit code and how long it took.
func (s *served) terminate() (code int, took time.Duration) {
	s.t.Helper()
	begun := time.Now()
	if err := s.cmd.Process.Signal(syscall.SIGTERM); err != nil {
		s.t.Fatal(err)
	}
	select {
	case <-s.done:
	case <-time.After(25 * time.Second):
		s.t.Fatalf("it does not end; log:\n%s", s.log)
	}
	s.done <- nil
	return s.cmd.ProcessState.ExitCode(), time.Since(begun)
}

// get reads one of the health end points.
func (s *served) get(path string) (code int, body string) {
	s.t.Helper()
	ctx, cancel := context.WithTimeout(context.Background(), 5*time.Second)
	defer cancel()
	req, _ := http.NewRequestWithContext(ctx, http.MethodGet, s.base+path, nil)
	resp, err := http.DefaultClient.Do(req)
	if err != nil {
		return 0, err.Error()
	}
	defer resp.Body.Close()
	raw, _ := io.ReadAll(resp.Body)
	return resp.StatusCode, string(raw)
}

// ready waits until the process says that it is.
func (s *served) ready() {
	s.t.Helper()
	s.until("readiness", func() bool { code, _ := s.get("/readyz"); return code == http.StatusOK })
}

func (s *served) until(what string, ok func() bool) {
	s.t.Helper()
	for end := time.Now().Add(10 * time.Second); !ok(); time.Sleep(10 * time.Millisecond) {
		if time.Now().After(end) {
			_, body := s.get("/readyz")
			s.t.Fatalf("waited in vain for %s; readyz: %s; log:\n%s", what, body, s.log)
		}
	}
}

// workspace starts a workspace and a served bot for it.
func workspace(t testing.TB, settings ...string) (*slackfake.Fake, *served) {
	t.Helper()
	f := slackfake.Start(t)
	s := serve(t, f, settings...)
	f.Target(s.base)
	s.ready()
	return f, s
}
