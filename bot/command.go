package bot

import "galeward/bot/shorthand"

// command is one row of the command table: what is typed, what it is for, and
// what runs. Help is printed from this table.
type command struct {
	intent   shorthand.Intent
	usage    string
	summary  string
	examples []string
	run      func(t *turn)
}

// commands is the one table of commands. A gas alone needs none.
func commands() []command {
	return []command{
		{shorthand.IntentNow, "now VALUES", "a follow-up in a thread: what is not said is taken over", []string{"now 7.33/49/70 same settings"}, (*turn).reading},
		{shorthand.IntentWhy, "why [WORD]", "formula, inputs, cut-off and source behind the last answer", []string{"why", "why efficiency", "why acute"}, (*turn).why},
		{shorthand.IntentHouse, "house [RULE VALUE]", "this channel's rules: shown, or one set", []string{"house", "house units kPa", "house altitude 1600 m", "house target 88-92"}, (*turn).house},
		{shorthand.IntentForget, "forget", "takes the gases of this thread away", []string{"forget"}, (*turn).forget},
		{shorthand.IntentHelp, "help", "this list", []string{"help"}, (*turn).help},
	}
}

// commandFor finds the command of an intent.
func commandFor(i shorthand.Intent) (command, bool) {
	for _, c := range commands() {
		if c.intent == i {
			return c, true
		}
	}
	return command{}, false
}
