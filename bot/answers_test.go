package bot_test

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/txtar"

	"galeward/bot"
)

var update = flag.Bool("update", false, "write the answer files anew; read the difference as a clinician would")

// TestAnswers runs the answer files: a message and every expected output. The
// gases are invented; what a file expects was read by eye and, where a number
// is published, is held against its source in the checks and the cases.
func TestAnswers(t *testing.T) {
	files, err := filepath.Glob("../testdata/answers/*.txtar")
	if err != nil || len(files) == 0 {
		t.Fatalf("no answer files: %v", err)
	}
	for _, file := range files {
		t.Run(strings.TrimSuffix(filepath.Base(file), ".txtar"), func(t *testing.T) { runAnswer(t, file) })
	}
}

func runAnswer(t *testing.T, file string) {
	archive, err := txtar.ParseFile(file)
	if err != nil {
		t.Fatal(err)
	}
	d := newDesk(t)
	var a bot.Answer
	for i := range archive.Files {
		f := &archive.Files[i]
		switch f.Name {
		case "earlier": // lines typed before in the thread, or house commands
			for _, line := range strings.Split(strings.TrimSpace(string(f.Data)), "\n") {
				validate(t, d.say(line))
			}
		case "message":
			a = d.say(strings.TrimSuffix(string(f.Data), "\n"))
			validate(t, a)
		case "text":
			same(t, f, a.Text()+"\n")
		case "json":
			same(t, f, machineText(t, a))
		case "slack": // rendered and compared by the adapter's own test
		default:
			t.Fatalf("%s: unknown section %q", file, f.Name)
		}
	}
	if *update {
		if err := os.WriteFile(file, txtar.Format(archive), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

// machineText is the machine form without its text, which stands above it.
func machineText(t *testing.T, a bot.Answer) string {
	m := a.Machine
	m.Text = ""
	line, err := m.JSON()
	if err != nil {
		t.Fatal(err)
	}
	var out bytes.Buffer
	if err := json.Indent(&out, line, "", " "); err != nil {
		t.Fatal(err)
	}
	return out.String() + "\n"
}

func same(t *testing.T, f *txtar.File, got string) {
	t.Helper()
	if *update {
		f.Data = []byte(got)
		return
	}
	if want := string(f.Data); want != got {
		t.Errorf("%s:\ngot:\n%s\nwant:\n%s", f.Name, got, want)
	}
}
