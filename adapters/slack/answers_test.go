package slack

import (
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"

	"github.com/rogpeppe/go-internal/txtar"

	"galeward/adapters/memstore"
	"galeward/bot"
	"galeward/bot/memory"
)

// TestAnswers renders the answer files: the same message that package bot
// answers in text and in the machine form, as Slack shows it.
func TestAnswers(t *testing.T) {
	files, err := filepath.Glob("../../testdata/answers/*.txtar")
	if err != nil || len(files) == 0 {
		t.Fatalf("no answer files: %v", err)
	}
	for _, file := range files {
		t.Run(strings.TrimSuffix(filepath.Base(file), ".txtar"), func(t *testing.T) { renderAnswer(t, file) })
	}
}

func renderAnswer(t *testing.T, file string) {
	archive, err := txtar.ParseFile(file)
	if err != nil {
		t.Fatal(err)
	}
	now := func() time.Time { return time.Date(2026, 3, 2, 12, 0, 0, 0, time.UTC) }
	b := bot.New(bot.Options{Memory: memory.New(memstore.New(now), memory.Options{Now: now}), Now: now})
	count, found := 0, false
	say := func(text string) bot.Answer {
		count++
		id := strconv.Itoa(count)
		return b.Answer(context.Background(), bot.Event{
			Delivery: id, Message: id, Text: text, At: now(), Listening: true,
			Where: bot.Place{Platform: "slack", Workspace: "w", Channel: "c", Thread: "t"},
		})
	}
	var a bot.Answer
	for i := range archive.Files {
		f := &archive.Files[i]
		switch f.Name {
		case "earlier":
			for _, line := range strings.Split(strings.TrimSpace(string(f.Data)), "\n") {
				say(line)
			}
		case "message":
			a = say(strings.TrimSuffix(string(f.Data), "\n"))
		case "slack":
			found = true
			compareSlack(t, f, a)
		}
	}
	if !found {
		t.Fatalf("%s has no slack section", file)
	}
	if *renew {
		if err := os.WriteFile(file, txtar.Format(archive), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func compareSlack(t *testing.T, f *txtar.File, a bot.Answer) {
	t.Helper()
	got := ""
	if !a.Reply.Empty() {
		m := render(a.Reply, "t")
		blocks, err := json.MarshalIndent(m.blocks, "", " ")
		if err != nil {
			t.Fatal(err)
		}
		got = string(blocks) + "\n"
	}
	if *renew {
		f.Data = []byte(got)
		return
	}
	if want := string(f.Data); got != want {
		t.Errorf("slack:\ngot:\n%s\nwant:\n%s", got, want)
	}
}
