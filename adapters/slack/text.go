package slack

import (
	"strings"
	"unicode/utf16"
	"unicode/utf8"
)

// entities are the three characters that Slack escapes in what it sends and
// wants escaped in what it gets.
var (
	unescaper = strings.NewReplacer("&lt;", "<", "&gt;", ">", "&amp;", "&")
	escaper   = strings.NewReplacer("&", "&amp;", "<", "&lt;", ">", "&gt;",
		// Formatting marks become look-alikes: in a notification or in a
		// message without blocks they could strike a value through.
		"*", "∗", "~", "∼", "_", "＿", "`", "ˋ")
)

// escape makes text harmless where Slack reads markup: no mention, no link,
// no formatting.
func escape(text string) string { return escaper.Replace(text) }

// plain turns Slack's markup into what the person typed: links and channel
// names become their label, the bot's own mention goes, entities are resolved.
func plain(text string, self func(user string) bool) string {
	var b strings.Builder
	for text != "" {
		open := strings.IndexByte(text, '<')
		if open < 0 {
			break
		}
		length := strings.IndexByte(text[open:], '>')
		if length < 0 {
			break
		}
		b.WriteString(unescaper.Replace(text[:open]))
		b.WriteString(unescaper.Replace(label(text[open+1:open+length], self)))
		text = text[open+length+1:]
	}
	b.WriteString(unescaper.Replace(text))
	return strings.TrimSpace(b.String())
}

// label is what a person sees of the markup between < and >.
func label(inner string, self func(user string) bool) string {
	target, shown, named := strings.Cut(inner, "|")
	if user, ok := strings.CutPrefix(target, "@"); ok && self(user) {
		return " "
	}
	if named && !strings.HasPrefix(target, "@") {
		if strings.HasPrefix(target, "#") {
			return "#" + shown
		}
		return shown
	}
	return target
}

// mentions says whether text addresses the bot.
func mentions(text string, self func(user string) bool) bool {
	for {
		_, rest, found := strings.Cut(text, "<@")
		if !found {
			return false
		}
		if end := strings.IndexAny(rest, "|>"); end >= 0 && self(rest[:end]) {
			return true
		}
		text = rest
	}
}

// width counts text as Slack does, in UTF-16 units.
func width(text string) int {
	n := 0
	for _, r := range text {
		n += utf16.RuneLen(r)
	}
	return n
}

// escapedWidth is the width of escape(text), without making it.
func escapedWidth(text string) int {
	return width(text) + 4*strings.Count(text, "&") + 3*strings.Count(text, "<") + 3*strings.Count(text, ">")
}

// chop cuts text into pieces of at most limit, at a space or a line's end
// where there is one in the second half of a piece.
func chop(text string, limit int) []string {
	var pieces []string
	for width(text) > limit {
		end, space, n := 0, 0, 0
		for i, r := range text {
			if n += utf16.RuneLen(r); n > limit {
				end = i
				break
			}
			if r == ' ' || r == '\n' {
				space = i
			}
		}
		if space >= end/2 && space > 0 {
			end = space
		}
		pieces = append(pieces, strings.TrimRight(text[:end], " \n"))
		text = strings.TrimLeft(text[end:], " \n")
	}
	if text != "" || len(pieces) == 0 {
		pieces = append(pieces, text)
	}
	return pieces
}

// clip shortens a label that Slack would refuse.
func clip(text string, limit int) string {
	if utf8.RuneCountInString(text) <= limit {
		return text
	}
	return string([]rune(text)[:limit-1]) + "…"
}
