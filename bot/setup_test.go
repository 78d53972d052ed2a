package bot_test

import (
	"context"
	"encoding/json"
	"os"
	"strconv"
	"testing"
	"time"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"go.uber.org/goleak"

	"galeward/adapters/memstore"
	"galeward/bot"
	"galeward/bot/memory"
)

func TestMain(m *testing.M) { goleak.VerifyTestMain(m) }

// noon is the clock of the tests.
var noon = time.Date(2026, 3, 2, 12, 0, 0, 0, time.UTC)

// desk is a bot with its own store, asked as one user in one thread.
type desk struct {
	t     testing.TB
	bot   *bot.Bot
	count int
	now   time.Time
	place bot.Place
}

func newDesk(t testing.TB) *desk {
	t.Helper()
	d := &desk{t: t, now: noon, place: bot.Place{Platform: "test", Workspace: "w", Channel: "c", Thread: "t"}}
	clock := func() time.Time { return d.now }
	d.bot = bot.New(bot.Options{Memory: memory.New(memstore.New(clock), memory.Options{Now: clock}), Now: clock})
	return d
}

// event is the next message typed on the desk.
func (d *desk) event(text string) bot.Event {
	d.count++
	id := "m" + strconv.Itoa(d.count)
	return bot.Event{Kind: bot.Typed, Delivery: id, Message: id, Where: d.place, Text: text, At: d.now, Listening: true}
}

// say answers the next message.
func (d *desk) say(text string) bot.Answer {
	return d.bot.Answer(context.Background(), d.event(text))
}

// ask answers one message on a fresh desk.
func ask(t testing.TB, text string) bot.Answer {
	t.Helper()
	return newDesk(t).say(text)
}

var schema = func() *jsonschema.Schema {
	f, err := os.Open("../testdata/contract/answer.schema.json")
	if err != nil {
		panic(err)
	}
	defer f.Close()
	doc, err := jsonschema.UnmarshalJSON(f)
	if err != nil {
		panic(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("answer.json", doc); err != nil {
		panic(err)
	}
	return c.MustCompile("answer.json")
}()

// validate holds an answer's machine form against the contract.
func validate(t testing.TB, a bot.Answer) {
	t.Helper()
	line, err := a.Machine.JSON()
	if err != nil {
		t.Fatal(err)
	}
	var v any
	if err := json.Unmarshal(line, &v); err != nil {
		t.Fatal(err)
	}
	if err := schema.Validate(v); err != nil {
		t.Errorf("the machine form breaks the contract: %v\n%s", err, line)
	}
}
