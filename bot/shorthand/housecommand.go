package shorthand

import "strings"

// noHouse are words that make "house" in front of them a word of the story
// ("house fire 7.38/36/240") and not the command.
var noHouse = map[string]bool{
	"fire": true, "fires": true, "firefighter": true, "fireman": true, "smoke": true, "burn": true, "burned": true,
	"burnt": true, "burning": true, "blaze": true, "explosion": true, "blast": true, "collapse": true, "gas": true,
	"officer": true, "officers": true, "doctor": true, "doc": true, "physician": true, "staff": true, "surgeon": true,
	"call": true, "visit": true, "plants": true, "party": true, "guest": true, "mate": true, "bound": true,
}

// houseCommand gives what follows the literal word house at the head of a
// message. What follows sets or shows a rule and is never read as values, so
// that "house critical ph 7.2-7.6 paco2 70" is no gas.
func houseCommand(typed string) (rest string, ok bool) {
	if !strings.HasPrefix(typed[lead(typed):], "house") {
		return "", false
	}
	intent, rest := command(typed)
	if intent != IntentHouse || rest == "" {
		return "", false
	}
	end := 0
	for end < len(rest) && isLetter(rest[end]) {
		end++
	}
	return rest, end > 0 && !noHouse[rest[:end]]
}

// houseLine is the line of a house command. Where the bot was not meant it is
// chatter like any other.
func (p *parser) houseLine(rest string) Line {
	if !p.h.Addressed && !loose(IntentHouse, rest) {
		return Line{Kind: quietKind(p.h)}
	}
	return Line{Kind: Command, Intent: IntentHouse, Argument: clean(rest)}
}
