package bot_test

import (
	"bufio"
	"encoding/json"
	"os"
	"regexp"
	"strings"
	"testing"

	"galeward/bot"
)

// avoided are words that an answer never uses: directives, verdict traps,
// overreach and blame (users' wording rules).
var avoided = regexp.MustCompile(`(?i)\b(increase|decrease|give|start|stop|wean|intubate|extubate|should|must|recommend(ed)?|` +
	`normal|fine|safe|good|ok|okay|stable|ards|sepsis|hypoxia|wrong|failed|you forgot|unsafe)\b|[|→↑↓]`)

// allowed are the few places where such a word stands in another sense.
var allowed = strings.NewReplacer(
	"a good saturation on added oxygen hides hypoventilation", "",
	"pH and PaCO2 (they give about", "", "(they give about", "",
)

type message struct {
	ID, Text, Kind string
	MustAsk        *string `json:"must_ask"`
}

func messages(t testing.TB) []message {
	t.Helper()
	f, err := os.Open("../testdata/messages/messages.jsonl")
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var all []message
	s := bufio.NewScanner(f)
	s.Buffer(nil, 1<<20)
	for s.Scan() {
		var m message
		if err := json.Unmarshal(s.Bytes(), &m); err != nil {
			t.Fatal(err)
		}
		all = append(all, m)
	}
	if len(all) == 0 {
		t.Fatal("no messages")
	}
	return all
}

// TestEveryAnswer holds the answers to all messages against the form: the
// contract's schema, the length, the first line, and the words to avoid.
func TestEveryAnswer(t *testing.T) {
	for _, m := range messages(t) {
		a := ask(t, m.Text)
		validate(t, a)
		checkForm(t, m.ID, a)
	}
}

func checkForm(t *testing.T, id string, a bot.Answer) {
	t.Helper()
	text := a.Text()
	if hit := avoided.FindString(allowed.Replace(text)); hit != "" {
		t.Errorf("%s uses %q:\n%s", id, hit, text)
	}
	if a.Machine.Kind != "reading" {
		return
	}
	first, _, _ := strings.Cut(text, "\n")
	if n := len([]rune(first)); n > 40 {
		t.Errorf("%s: the first line has %d characters: %s", id, n, first)
	}
	if n := len([]rune(text)); n > 900 {
		t.Errorf("%s: %d characters:\n%s", id, n, text)
	}
	if lines := strings.Count(text, "\n") + 1; lines > 9 {
		t.Errorf("%s: %d lines:\n%s", id, lines, text)
	}
}
