package boltstore

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"strconv"
	"strings"
	"syscall"
	"testing"
	"time"

	"go.etcd.io/bbolt"

	"galeward/bot/store"
)

// childFile names the file that this binary, run as a child, writes to until
// it is killed; childHolds makes it hold the file only.
const (
	childFile  = "GALEWARD_TEST_BOLT_FILE"
	childHolds = "GALEWARD_TEST_BOLT_HOLDS"
)

// childMain writes pairs and says each that was acknowledged.
func childMain(path string) {
	s, err := Open(path, Options{})
	if err != nil {
		fmt.Println(err)
		os.Exit(1)
	}
	fmt.Println("open")
	if os.Getenv(childHolds) != "" {
		time.Sleep(time.Hour) // the test kills it
	}
	for i := 1; ; i++ {
		n := strconv.Itoa(i)
		if _, err := s.Do(context.Background(), room, put("left/"+n, n, n), put("right", n, n)); err != nil {
			fmt.Println(err)
			os.Exit(1)
		}
		fmt.Println(n)
	}
}

// child starts this binary again, and returns the lines it says.
func child(t *testing.T, path string, more ...string) (*exec.Cmd, *bufio.Scanner) {
	t.Helper()
	cmd := exec.Command(os.Args[0])
	cmd.Env = append(append(os.Environ(), childFile+"="+path), more...)
	out, err := cmd.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := cmd.Start(); err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { cmd.Process.Kill(); cmd.Wait() })
	lines := bufio.NewScanner(out)
	if !lines.Scan() || lines.Text() != "open" {
		t.Fatalf("the child says %q", lines.Text())
	}
	return cmd, lines
}

func TestKilledWhileWriting(t *testing.T) {
	path := newFile(t)
	for round := range 5 {
		cmd, lines := child(t, path)
		acknowledged, kill := 0, time.After(time.Duration(60+30*round)*time.Millisecond)
		go func() {
			<-kill
			cmd.Process.Kill()
		}()
		for lines.Scan() {
			n, err := strconv.Atoi(lines.Text())
			if err != nil {
				t.Fatalf("the child says %q", lines.Text())
			}
			acknowledged = n
		}
		cmd.Wait()
		s := open(t, path, Options{})
		for i := 1; i <= acknowledged; i++ {
			n := strconv.Itoa(i)
			if items := do(t, s, store.Op{Key: "left/" + n}); items[0].Tag != n {
				t.Fatalf("round %d: write %d of %d was acknowledged and is lost", round, i, acknowledged)
			}
		}
		right, _ := strconv.Atoi(do(t, s, store.Op{Key: "right"})[0].Tag)
		if right < acknowledged || do(t, s, store.Op{Key: "left/" + strconv.Itoa(right)})[0].Tag == "" {
			t.Fatalf("round %d: half a call stands: right %d, %d acknowledged", round, right, acknowledged)
		}
		if acknowledged == 0 {
			t.Fatalf("round %d: nothing was written before the kill", round)
		}
		s.Close()
	}
}

// oneSentence holds an error to the form that a person at the start of the
// program reads.
func oneSentence(t *testing.T, err error, words ...string) {
	t.Helper()
	if err == nil {
		t.Fatal("no error")
	}
	if strings.Contains(err.Error(), "\n") || len(err.Error()) > 300 {
		t.Errorf("not one sentence: %q", err)
	}
	for _, word := range words {
		if !strings.Contains(err.Error(), word) {
			t.Errorf("%q does not say %q", err, word)
		}
	}
}

func TestSecondProcessIsToldWhy(t *testing.T) {
	path := newFile(t)
	cmd, _ := child(t, path, childHolds+"=1")
	began := time.Now()
	_, err := Open(path, Options{})
	oneSentence(t, err, "already open in another process", path)
	if !errors.Is(err, ErrInUse) {
		t.Errorf("not ErrInUse: %v", err)
	}
	if d := time.Since(began); d > time.Second {
		t.Errorf("the answer took %v", d)
	}
	cmd.Process.Kill()
	cmd.Wait()
	open(t, path, Options{})
}

func TestSecondOpeningInOneProcess(t *testing.T) {
	path := newFile(t)
	open(t, path, Options{})
	_, err := Open(path, Options{})
	if !errors.Is(err, ErrInUse) {
		t.Fatal(err)
	}
}

// filled makes a file of a few pages and returns its bytes.
func filled(t *testing.T, path string) []byte {
	t.Helper()
	s := open(t, path, Options{})
	for i := range 40 {
		do(t, s, put("k"+strconv.Itoa(i), strings.Repeat("v", 3000), "t"))
	}
	s.Close()
	all, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return all
}

func TestDamagedFilesAreRefused(t *testing.T) {
	page := os.Getpagesize()
	for name, damage := range map[string]func([]byte) []byte{
		"a text file":     func([]byte) []byte { return []byte(strings.Repeat("paco2 58\n", 5000)) },
		"a short file":    func([]byte) []byte { return []byte("x") },
		"zeroes":          func(b []byte) []byte { return make([]byte, len(b)) },
		"cut in the half": func(b []byte) []byte { return b[:len(b)/2/page*page] },
		"cut to 3 pages":  func(b []byte) []byte { return b[:3*page] },
		"cut to its head": func(b []byte) []byte { return b[:2*page] },
		"all but the head overwritten": func(b []byte) []byte {
			for i := 2 * page; i < len(b); i++ {
				b[i] = 0xa5
			}
			return b
		},
	} {
		t.Run(name, func(t *testing.T) {
			path := newFile(t)
			if err := os.WriteFile(path, damage(filled(t, newFile(t))), 0o600); err != nil {
				t.Fatal(err)
			}
			_, err := Open(path, Options{})
			oneSentence(t, err, "damaged", path)
			if !errors.Is(err, ErrDamaged) {
				t.Errorf("not ErrDamaged: %v", err)
			}
		})
	}
}

// TestFileCutWhileOpen: the answers go on without a memory, the bot does not
// fall over.
func TestFileCutWhileOpen(t *testing.T) {
	path := newFile(t)
	filled(t, path)
	s := open(t, path, Options{})
	if err := os.Truncate(path, int64(2*os.Getpagesize())); err != nil {
		t.Fatal(err)
	}
	for _, op := range []store.Op{{Key: "k20"}, put("k20", "v", "u"), {Key: "k21"}} {
		items, err := s.Do(context.Background(), room, op)
		if !errors.Is(err, ErrDamaged) || items != nil {
			t.Errorf("%d items, error %v", len(items), err)
		}
	}
}

// foreign makes a file with the same client but other contents.
func foreign(t *testing.T, fill func(*bbolt.Tx) error) string {
	t.Helper()
	path := newFile(t)
	db, err := bbolt.Open(path, 0o600, nil)
	if err != nil {
		t.Fatal(err)
	}
	if err := db.Update(fill); err != nil {
		t.Fatal(err)
	}
	if err := db.Close(); err != nil {
		t.Fatal(err)
	}
	return path
}

func TestFilesOfOthersAreRefused(t *testing.T) {
	path := foreign(t, func(tx *bbolt.Tx) error {
		_, err := tx.CreateBucket([]byte("somebody's"))
		return err
	})
	_, err := Open(path, Options{})
	oneSentence(t, err, "belongs to another program", path)

	path = foreign(t, func(tx *bbolt.Tx) error {
		if err := layOut(tx); err != nil {
			return err
		}
		return tx.Bucket(aboutBucket).Put(formatKey, []byte("2"))
	})
	_, err = Open(path, Options{})
	oneSentence(t, err, "newer version", path)
	if !errors.Is(err, ErrNewer) {
		t.Errorf("not ErrNewer: %v", err)
	}

	path = foreign(t, func(tx *bbolt.Tx) error {
		if err := layOut(tx); err != nil {
			return err
		}
		return tx.Bucket(itemsBucket).Put([]byte("k"), []byte("no record"))
	})
	_, err = Open(path, Options{})
	oneSentence(t, err, "damaged", path)
}

func TestPlacesThatCantBeOpened(t *testing.T) {
	dir := t.TempDir()
	_, err := Open(dir+"/none/galeward.db", Options{})
	oneSentence(t, err, dir+"/none does not exist")
	_, err = Open(dir, Options{})
	oneSentence(t, err, dir)
}

func TestFullStoreReadsOnAndRecovers(t *testing.T) {
	c := newClock()
	s := open(t, newFile(t), Options{Now: c.now, MaxBytes: 1 << 20})
	do(t, s, put("house", "rules", "t1"))
	var err error
	n := 0
	for ; err == nil && n < 1000; n++ {
		op := claim(n)
		op.Value = []byte(strings.Repeat("x", 20_000))
		_, err = s.Do(context.Background(), room, op)
	}
	if !errors.Is(err, store.ErrFull) {
		t.Fatalf("after %d writes: %v", n, err)
	}
	if items := do(t, s, store.Op{Key: "house"}); string(items[0].Value) != "rules" {
		t.Fatal("a full store does not read on")
	}
	if items := do(t, s, store.Op{Key: claim(n - 1).Key}); items[0].Tag != "" {
		t.Fatal("a refused write stands")
	}
	c.Advance(time.Minute)
	if _, err := s.Sweep(context.Background()); err != nil {
		t.Fatal(err)
	}
	for i := range 10 {
		op := claim(2000 + i)
		op.Value = []byte(strings.Repeat("x", 20_000))
		do(t, s, op)
	}
}

func TestNoRoomHasOneName(t *testing.T) {
	for _, cause := range []error{syscall.ENOSPC, syscall.EDQUOT, syscall.EFBIG} {
		err := plain(&os.PathError{Op: "write", Path: "f", Err: cause})
		if !errors.Is(err, store.ErrFull) || !errors.Is(err, cause) {
			t.Errorf("%v became %v", cause, err)
		}
	}
	if err := plain(&os.PathError{Op: "write", Path: "f", Err: syscall.EIO}); errors.Is(err, store.ErrFull) {
		t.Errorf("a broken disk is called full: %v", err)
	}
}
