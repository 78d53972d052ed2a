package slack

import (
	"encoding/json"
	"flag"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"galeward/adapters/adaptertest"
	"galeward/bot"
	"galeward/bot/reply"

	slackapi "github.com/slack-go/slack"
)

var renew = flag.Bool("update", false, "rewrite the golden files")

// question is a reply that asks something and offers the answers.
func question(bot.Event) reply.Reply {
	r := critical()
	return r
}

// The wordings below are examples; the real ones are the bot's.
func critical() (r reply.Reply) {
	r.Add(reply.Critical, "CRITICAL pH 7.05, PaCO2 95, PaO2 40")
	r.Add(reply.Critical, "Outside the critical limits of this channel: the patient and the critical-result call come before this text.")
	r.Add(reply.Echo, "Read: pH 7.05, PaCO2 95, PaO2 40 mmHg, reservoir mask (FiO2 about 60-90 %); HCO3 26 mmol/L calculated, no cross-check.")
	r.Add(reply.Ventilation, "Ventilation: inadequate, acute pattern. Efficiency: can't say.")
	r.Add(reply.Oxygenation, "Oxygenation: critically low if arterial, SaO2 about 50 %.")
	r.Add(reply.Major, "Caution: PO2 40 also fits venous blood; the pH stays alarming.")
	r.Add(reply.Question, "Arterial or venous?")
	r.Buttons = []reply.Button{{Label: "arterial", Token: "token-arterial"}, {Label: "venous", Token: "token-venous"}}
	return r
}

func everyday() (r reply.Reply) {
	r.Add(reply.Headline, "CO2 in range; O2 adequate, transfer poor")
	r.Add(reply.Echo, "Read: pH 7.40, PaCO2 40, PaO2 95 mmHg, HCO3 24 mmol/L (fits), FiO2 60 %.")
	r.Add(reply.Oxygenation, "Oxygenation: level adequate (SaO2 > 96 %) only on 60 %. P/F 158 mmHg: poor.")
	r.Add(reply.Next, "Next: on 40 %, PaO2 about 59-77 mmHg, all else equal.")
	r.Add(reply.Minor, "FiO2 < 60 % on the slip & 60 % typed.")
	r.Add(reply.Standing, "An aid for trained staff; check against the print-out.")
	return r
}

func beds() (r reply.Reply) {
	r.Add(reply.Headline, "3 beds: 1 ventilation, 2 neither")
	r.Add(reply.Item, "Bed 9, NIV 14/6 on 40 %: CO2 high, falling (68, 60, 52). Gas 06:00.")
	r.Add(reply.Item, "Bed 4, air: neither. Gas 05:10.")
	r.Add(reply.Item, "Bed *7* <!channel> _x_: neither. Gas 05:40.")
	r.Add(reply.Standing, "An aid for trained staff.")
	return r
}

func trouble() (r reply.Reply) {
	r.Add(reply.Notice, "Something of ours went wrong (id 3f2a); nothing was stored.")
	return r
}

func TestGoldenRenderings(t *testing.T) {
	for name, r := range map[string]reply.Reply{"critical": critical(), "everyday": everyday(), "beds": beds(), "trouble": trouble()} {
		m := render(r, "1733058000.000100")
		got, err := json.MarshalIndent(struct {
			Text   string `json:"text"`
			Blocks any    `json:"blocks"`
		}{m.text, m.blocks}, "", "  ")
		if err != nil {
			t.Fatal(err)
		}
		got = append(got, '\n')
		file := filepath.Join("testdata", name+".golden.json")
		if *renew {
			if err := os.WriteFile(file, got, 0o644); err != nil {
				t.Fatal(err)
			}
		}
		want, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		if string(got) != string(want) {
			t.Errorf("%s differs from %s (renew with -update, then read it):\n%s", name, file, got)
		}
	}
}

// words makes text of about n characters, some of which Slack escapes.
func words(rng *rand.Rand, n int) string {
	var b strings.Builder
	letters := []rune("abc7.2/&<>*_~`é🫁")
	for b.Len() < n {
		for range 1 + rng.IntN(12) {
			b.WriteRune(letters[rng.IntN(len(letters))])
		}
		b.WriteByte(' ')
	}
	return strings.TrimSpace(b.String())
}

func arbitrary(rng *rand.Rand) (r reply.Reply) {
	for range rng.IntN(90) {
		r.Add(reply.Kind(rng.IntN(int(reply.Standing)+1)), words(rng, 1+rng.IntN([]int{40, 200, 400, 4000}[rng.IntN(4)])))
	}
	for range rng.IntN(30) {
		r.Buttons = append(r.Buttons, reply.Button{Label: words(rng, 1+rng.IntN(90)), Token: words(rng, 1+rng.IntN(30))})
	}
	return r
}

// shed are the kinds that a reply may lose.
func shed(k reply.Kind) bool { return k == reply.Standing || k == reply.Next || k == reply.Minor }

// TestArbitraryReplies: whatever the bot says, it arrives whole, in order and
// within the limits; the fake's limits are tested in TestLimitsHold.
func TestArbitraryReplies(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for range 60 {
		r := arbitrary(rng)
		var want, got strings.Builder
		for _, b := range r.Blocks {
			if !shed(b.Kind) {
				want.WriteString(b.Text + " ")
			}
		}
		for _, part := range parts(r, maxMessage) {
			m := render(part, "1.2")
			if size(part)-1 < width(m.text) {
				t.Fatalf("counted %d for %d characters", size(part), width(m.text))
			}
			if len(m.blocks) > maxBlocks || width(m.text) > 40000 {
				t.Fatalf("%d blocks, %d characters of text", len(m.blocks), width(m.text))
			}
			for _, b := range part.Blocks {
				if !shed(b.Kind) {
					got.WriteString(b.Text + " ")
				}
			}
		}
		if strings.Join(strings.Fields(got.String()), " ") != strings.Join(strings.Fields(want.String()), " ") {
			t.Fatalf("lost text:\n got %s\nwant %s", got.String(), want.String())
		}
	}
}

func TestNothingIsShedWithoutNeed(t *testing.T) {
	p := parts(everyday(), maxMessage)
	if len(p) != 1 || len(p[0].Blocks) != len(everyday().Blocks) {
		t.Errorf("%d parts, %+v", len(p), p)
	}
}

// TestShedding: what may go goes before a second message is made, the last
// first, and no more than needed.
func TestShedding(t *testing.T) {
	var r reply.Reply
	r.Add(reply.Echo, strings.Repeat("e ", 1400))
	for range 20 {
		r.Add(reply.Next, strings.Repeat("n ", 500))
	}
	r.Add(reply.Major, "Caution: kept.")
	p := parts(r, maxMessage)
	if len(p) != 1 || p[0].Blocks[0].Kind != reply.Echo || len(p[0].Blocks) < 8 || p[0].Blocks[len(p[0].Blocks)-1].Text != "Caution: kept." {
		t.Errorf("%d parts, the first with %d blocks", len(p), len(p[0].Blocks))
	}
}

func TestManyBlocks(t *testing.T) {
	r := reply.Reply{Buttons: critical().Buttons}
	for range 98 {
		r.Add(reply.Major, "Caution.")
	}
	n := 0
	for _, part := range parts(r, maxMessage) {
		m := render(part, "")
		if n += len(part.Blocks); len(m.blocks) > maxBlocks {
			t.Errorf("%d blocks in a message", len(m.blocks))
		}
	}
	if n != 98 {
		t.Errorf("%d of 98 blocks", n)
	}
}

func TestButtonLimits(t *testing.T) {
	r := adaptertest.Echo("which?")
	for range 30 {
		r.Buttons = append(r.Buttons, reply.Button{Label: strings.Repeat("é", 80), Token: "t"})
	}
	r.Buttons[0].Token = strings.Repeat("t", maxValue+1)
	row := render(r, "").blocks[1].(*slackapi.ActionBlock).Elements.ElementSet
	if len(row) != maxButtons {
		t.Errorf("%d buttons", len(row))
	}
	for _, e := range row {
		b := e.(*slackapi.ButtonBlockElement)
		if width(b.Text.Text) != maxLabel || !strings.HasPrefix(b.Text.Text, "éé") || b.Value != "t" {
			t.Errorf("label %q, value of %d", b.Text.Text, len(b.Value))
		}
	}
}

func TestChop(t *testing.T) {
	for _, test := range []struct {
		text  string
		limit int
		want  string
	}{
		{"", 5, ""},
		{"12345", 5, "12345"},
		{"123456", 5, "12345|6"},
		{"one two three", 8, "one two|three"},
		{"a 23456789", 5, "a 234|56789"},
		{"🫁🫁🫁", 4, "🫁🫁|🫁"},
		{"ab\ncdef", 4, "ab|cdef"},
	} {
		if got := strings.Join(chop(test.text, test.limit), "|"); got != test.want {
			t.Errorf("chop(%q, %d) = %q, want %q", test.text, test.limit, got, test.want)
		}
	}
}

func TestNoColour(t *testing.T) {
	raw, err := json.Marshal(render(critical(), "").blocks)
	if err != nil {
		t.Fatal(err)
	}
	for _, word := range []string{`"style"`, `"color"`, "mrkdwn"} {
		if strings.Contains(string(raw), word) {
			t.Errorf("%s in %s", word, raw)
		}
	}
}
