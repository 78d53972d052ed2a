package bot

import (
	"errors"
	"fmt"
	"slices"
	"strings"
	"unicode"

	"galeward/bot/memory"
)

// editorsKey is the key of the rule that says who may change the rules.
const editorsKey = "editors"

// editorsTyped gives what stands behind the name of the rule, in the capitals
// in which the platform writes user ids, with the asker's id for "me".
func editorsTyped(e Event, names []string) string {
	text, at := strings.Join(strings.Fields(e.Text), " "), -1
	for _, name := range names {
		if i := strings.Index(asciiLower(text), name); i >= 0 && i+len(name) > at {
			at = i + len(name)
		}
	}
	if at < 0 {
		return ""
	}
	words := strings.FieldsFunc(text[at:], func(r rune) bool { return strings.ContainsRune(" ,;<>", r) })
	words = slices.DeleteFunc(words, func(w string) bool { return editorFillers[strings.ToLower(strings.Trim(w, ":.!"))] })
	for i, w := range words {
		words[i] = strings.Trim(w, ":.!")
		if strings.EqualFold(words[i], "me") {
			words[i] = "@" + e.User
		}
	}
	return strings.Join(words, " ")
}

// editorFillers are words between the ids.
var editorFillers = map[string]bool{"": true, "is": true, "are": true, "=": true, "to": true, "and": true, "channel": true, "the": true, "only": true}

// asciiLower is in lower case and as long as s.
func asciiLower(s string) string {
	return strings.Map(func(r rune) rune {
		if r >= 'A' && r <= 'Z' {
			return r + 'a' - 'A'
		}
		return r
	}, s)
}

// parseEditors reads "everyone", "managers", and user ids as the platform
// writes them. A name is no id: it would let nobody in.
func parseEditors(value string) (any, error) {
	words := strings.Fields(value)
	if len(words) == 0 {
		return nil, errors.New("who may change the rules? Example: house editors me managers")
	}
	var out []string
	for _, w := range words {
		id := strings.TrimLeft(w, "@")
		switch low := strings.ToLower(w); {
		case off(low), low == "everyone", low == "all", low == "anyone":
			if len(words) > 1 {
				return nil, errors.New("everyone stands alone. Example: house editors everyone")
			}
			return nil, nil
		case low == memory.Managers, low == "manager":
			id = memory.Managers
		case w == "@":
			return nil, errors.New("who you are is not known here. Example: house editors everyone")
		case w[0] != '@' && !strings.ContainsFunc(w, unicode.IsDigit), !userID(id):
			return nil, errors.New("everyone, managers, me or user ids are expected. Example: house editors me managers")
		}
		if !slices.Contains(out, id) {
			out = append(out, id)
		}
	}
	return out, nil
}

// userID says that the rules can hold an id, and that it can not be taken for
// one of the words.
func userID(id string) bool {
	return id != "" && id != memory.Managers && memory.House{Editors: []string{id}}.Validate() == nil
}

// editorWords says who may change the rules: users are counted, never named.
func editorWords(editors []string) string {
	var parts []string
	users := 0
	for _, id := range editors {
		if id != memory.Managers {
			users++
		} else if parts == nil {
			parts = append(parts, "channel managers")
		}
	}
	if users > 0 {
		parts = append(parts, fmt.Sprintf("named users (%d)", users))
	}
	if parts == nil {
		return "everyone"
	}
	return strings.Join(parts, " and ")
}

func showEditors(h memory.House) string {
	return "Rules may be changed by: " + editorWords(h.Editors) + "."
}
