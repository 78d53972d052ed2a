package redisstore

import (
	"context"
	"errors"
	"os"
	"strconv"
	"strings"
	"testing"
	"time"

	"galeward/adapters/storetest"
	"galeward/bot/store"
)

func TestKilledAndBack(t *testing.T) {
	server := storetest.Redis(t)
	s := open(t, on(server))
	for round := range 3 {
		n := strconv.Itoa(round)
		must(t, s, put("house", "rules "+n, n))
		server.Kill()
		for range 5 {
			within(t, 300*time.Millisecond, func() {
				items, err := s.Do(context.Background(), room, put("house", "x", "x"), store.Op{Key: "k"})
				if !errors.Is(err, ErrNoAnswer) || items != nil {
					t.Errorf("items %v, error %v", items, err)
				}
			})
		}
		server.Restart()
		recovers(t, s)
		holds(t, s, "house", "rules "+n, n)
	}
}

func TestDownAtTheStart(t *testing.T) {
	server := storetest.Redis(t)
	server.Kill()
	s := open(t, on(server))
	if _, err := s.Do(context.Background(), room, store.Op{Key: "k"}); !errors.Is(err, ErrNoAnswer) {
		t.Fatal(err)
	}
	server.Restart()
	recovers(t, s)
}

// TestHangingServer: a call returns by its caller's deadline, even if the
// store was set to be more patient, and by the store's own where the caller has
// none.
func TestHangingServer(t *testing.T) {
	server := storetest.Redis(t)
	o := on(server)
	s := open(t, o)
	o.Timeout = 3 * time.Second
	patient := open(t, o)
	must(t, s, put("house", "rules", "t1"))
	must(t, patient, store.Op{Key: "house"})
	server.Stop()
	ctx, cancel := context.WithTimeout(context.Background(), 300*time.Millisecond)
	defer cancel()
	within(t, 600*time.Millisecond, func() {
		if _, err := patient.Do(ctx, room, put("house", "x", "x")); !errors.Is(err, ErrNoAnswer) {
			t.Errorf("with a deadline of 300 ms: %v", err)
		}
	})
	within(t, time.Second, func() { // two tries of 300 ms
		if _, err := s.Do(context.Background(), room, store.Op{Key: "house"}); !errors.Is(err, ErrNoAnswer) {
			t.Errorf("without a deadline: %v", err)
		}
	})
	server.Cont()
	recovers(t, s)
	recovers(t, patient)
}

// secretive holds an error to what a log may have: no password, no value.
func secretive(t *testing.T, err error) {
	t.Helper()
	for _, word := range []string{"hush", "paco2"} {
		if err != nil && strings.Contains(err.Error(), word) {
			t.Errorf("the error tells %q: %v", word, err)
		}
	}
}

func TestWrongPassword(t *testing.T) {
	server := storetest.Redis(t, "--requirepass", "hush-right")
	for name, o := range map[string]Options{
		"wrong":      {Password: "hush-wrong"},
		"none":       {},
		"wrong user": {Username: "hush-user", Password: "hush-right"},
	} {
		o.Addrs = []string{server.Addr()}
		s := open(t, o)
		within(t, 500*time.Millisecond, func() {
			_, err := s.Do(context.Background(), room, put("house", "paco2 72", "t1"))
			if !errors.Is(err, ErrRefused) {
				t.Errorf("%s: %v", name, err)
			}
			secretive(t, err)
		})
		if w := s.Check(context.Background()); len(w) != 1 || !strings.Contains(w[0], "refused") {
			t.Errorf("%s: %q", name, w)
		}
	}
}

func TestPasswordFileIsReadAgain(t *testing.T) {
	server := storetest.Redis(t, "--requirepass", "hush-new")
	file := t.TempDir() + "/password"
	write := func(text string) {
		if err := os.WriteFile(file, []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	write("hush-old\n")
	o := on(server)
	o.PasswordFile = file
	s := open(t, o)
	if _, err := s.Do(context.Background(), room, store.Op{Key: "k"}); !errors.Is(err, ErrRefused) {
		t.Fatal(err)
	}
	write("hush-new\n")
	recovers(t, s)
	write("")
	server.Restart()
	_, err := s.Do(context.Background(), room, store.Op{Key: "k"})
	if err == nil || !strings.Contains(err.Error(), "password is empty") {
		t.Fatal(err)
	}
	write("hush-new\r\n")
	recovers(t, s)
}

func TestFullServer(t *testing.T) {
	server := storetest.Redis(t, "--maxmemory", "3mb", "--maxmemory-policy", "noeviction")
	s := open(t, on(server))
	must(t, s, put("house", "rules", "t1"))
	var err error
	n := 0
	for ; err == nil && n < 100; n++ {
		_, err = s.Do(context.Background(), room, put("k"+strconv.Itoa(n), strings.Repeat("paco2", 20_000), "t"))
	}
	if !errors.Is(err, store.ErrFull) {
		t.Fatalf("after %d writes: %v", n, err)
	}
	secretive(t, err)
	holds(t, s, "house", "rules", "t1")
	holds(t, s, "k"+strconv.Itoa(n-1), "", "")
	for i := range n - 1 {
		must(t, s, store.Op{Key: "k" + strconv.Itoa(i), Delete: true})
	}
	must(t, s, put("house", "new rules", "t2"))
}

// TestServerThatCannotSave makes the server's snapshot fail: a folder stands
// where the file should go.
func TestServerThatCannotSave(t *testing.T) {
	server := storetest.Redis(t, "--save", "3600 1", "--appendonly", "no", "--dbfilename", "folder")
	server.Obstruct("folder")
	s := open(t, on(server))
	must(t, s, put("house", "rules", "t1"))
	server.Raw("BGSAVE")
	var err error
	for range 200 {
		if _, err = s.Do(context.Background(), room, put("bed", "paco2", "t2")); err != nil {
			break
		}
		time.Sleep(20 * time.Millisecond)
	}
	if !errors.Is(err, store.ErrFull) || !strings.Contains(err.Error(), "MISCONF") {
		t.Fatal(err)
	}
	secretive(t, err)
	holds(t, s, "house", "rules", "t1")
}

// TestServerErrorsKeepSecrets has a server that does not know the command: it
// repeats in its answer what it was sent.
func TestServerErrorsKeepSecrets(t *testing.T) {
	server := storetest.Redis(t, "--rename-command", "EVALSHA", "")
	s := open(t, on(server))
	_, err := s.Do(context.Background(), room, put("house", "paco2 72", "t1"))
	if err == nil || err.Error() != "redisstore: the server answered ERR" {
		t.Fatalf("%v", err)
	}
	secretive(t, err)
}

func TestClosedStore(t *testing.T) {
	s := open(t, on(storetest.Redis(t)))
	must(t, s, put("house", "rules", "t1"))
	if err := s.Close(); err != nil {
		t.Fatal(err)
	}
	if _, err := s.Do(context.Background(), room, store.Op{Key: "house"}); err == nil {
		t.Fatal("a closed store answers")
	}
}

func TestServerCodes(t *testing.T) {
	for text, want := range map[string]string{ // the first form is Redis 7's, the second Redis 6's, both from memory
		"OOM command not allowed when used memory > 'maxmemory'. script: ab, on @user_script:3.":                                "OOM",
		"ERR Error running script (call to f_ab): @user_script:3: @user_script: 3: -OOM command not allowed when used memory":   "OOM",
		"ERR Error running script (call to f_ab): @user_script:3: @user_script: 3: -READONLY You can't write against a replica": "READONLY",
		"WRONGPASS invalid username-password pair or user is disabled.":                                                         "WRONGPASS",
		"ERR unknown command 'evalsha', with args beginning with: 'paco2 -OOM 72'":                                              "ERR",
		"what was this": "ERR",
	} {
		if got := serverCode(answer(text)); got != want {
			t.Errorf("%q has the code %q, want %q", text, got, want)
		}
	}
	if got := serverCode(errors.New("OOM elsewhere")); got != "" {
		t.Errorf("an error that is no answer has the code %q", got)
	}
}

// answer is an error as the client makes it of a server's answer.
type answer string

func (a answer) Error() string { return string(a) }
func (answer) RedisError()     {}
