package shorthand

import "galeward/physio"

// Units says in which unit a channel types and reads gas pressures.
type Units string

// The two units of gas pressure.
const (
	MmHg Units = "mmHg"
	KPa  Units = "kPa"
)

// Habits are what a channel and a thread add to a line: they decide how an
// unlabelled number is read. The zero Habits is the default channel.
type Habits struct {
	// Units is the channel's pressure unit, "" for mmHg.
	Units Units
	// Order is the order of unlabelled values, nil for
	// pH, PaCO2, PaO2, HCO3, SaO2.
	Order []physio.Quantity
	// Words are the channel's own abbreviations, in lower case, each with the
	// text it stands for; never able to override a possible range.
	Words map[string]string
	// Setting is the house's population, pressure and altitude.
	Setting physio.Setting
	// Addressed is true when the message was meant for the bot: command,
	// mention, direct message, or a reply in a thread the bot answers in.
	Addressed bool
	// Earlier is the last gas of the thread, nil when there is none. A line
	// that holds only some values then completes, corrects or follows it.
	Earlier *physio.Sample
	// Pending is the question that the thread still has open, nil when none.
	Pending *Question
}

// Kind is what sort of message a line is.
type Kind uint8

// The kinds of line.
const (
	Silence  Kind = iota // chatter: no answer is due
	Reading              // at least one gas or set of bedside values was read
	Unclear              // meant for the bot, but nothing was read
	Refusal              // holds something that is not processed at all
	Command              // a command without values of its own
	Released             // the one-word answer to the pending question
)

// Intent is the job that the words around the values ask for.
type Intent string

// The intents. A gas alone has none.
const (
	IntentNone    Intent = ""
	IntentNow     Intent = "now"
	IntentAim     Intent = "aim"
	IntentSuppose Intent = "suppose"
	IntentCheck   Intent = "check"
	IntentTrend   Intent = "trend"
	IntentBeds    Intent = "beds"
	IntentRecord  Intent = "record"
	IntentHouse   Intent = "house"
	IntentWhy     Intent = "why"
	IntentForget  Intent = "forget"
	IntentHelp    Intent = "help"
)

// Follow says how a gas relates to the earlier gas of its thread.
type Follow uint8

// The relations.
const (
	FollowNone       Follow = iota // a gas of its own
	FollowNow                      // a later gas: what was not said is inherited
	FollowAddition                 // adds values to the last gas
	FollowCorrection               // replaces values of the last gas, which is void
)

// Refused is a kind of content that is not processed, or of request that is
// not answered.
type Refused string

// The refusals. An identifier or a picture refuses the whole message; the
// others are declined beside the reading of the gas.
const (
	RefusedNone       Refused = ""
	RefusedIdentifier Refused = "identifier"
	RefusedPicture    Refused = "picture"
	DeclinedDose      Refused = "dose"
	DeclinedOrder     Refused = "order"
	DeclinedDiagnosis Refused = "diagnosis"
	DeclinedPrognosis Refused = "prognosis"
	DeclinedPEEP      Refused = "peep_prediction"
	DeclinedOverride  Refused = "override" // an instruction to leave the rules
)

// Line is what one typed message was read as. It never holds the typed text,
// only numbers, table words and a bed label.
type Line struct {
	Kind   Kind
	Intent Intent
	// Argument holds the words behind a command (house, why, help, forget),
	// in lower case, cleaned of control and markup characters.
	Argument string
	// Sentence is true when a house rule was said in a sentence, not set with
	// the command's own words: it is read back before anything changes.
	Sentence bool
	// Gases holds one entry for a usual line, several for a series or a list.
	Gases []Gas
	// List is true when the gases are of several beds, false for a series.
	List bool
	// Target and Change are the numbers of an aim and of a suppose.
	Target, Change physio.Values
	// Refused is set when Kind is Refusal.
	Refused Refused
	// Declined are requests that are not answered although the gas is.
	Declined []Refused
	// Picked is the choice that answered the pending question (Kind Released).
	Picked *Choice
	// TakesBack is true when nothing was read, yet the line takes back a value
	// that the gas before holds.
	TakesBack bool
}

// Gas is one gas, or one set of bedside values, as it was read.
type Gas struct {
	Sample physio.Sample
	Follow Follow
	Bed    string // a bed or case label, never more
	Time   string // "06:00", or a weekday word, as said
	// Target is a saturation target said in the line.
	Target *physio.Target
	// UsualPaCO2 is the patient's own usual PaCO2 in mmHg, 0 when not said. It
	// is no value of this gas.
	UsualPaCO2 float64
	// Typed is the pressure unit the gas was read in.
	Typed Units
	// Notes are readings that were not plain and are said.
	Notes []Note
	// Questions are open doubts, most important first; only the first is asked.
	Questions []Question
}

// NoteCode names a reading that is said. The sentence stands in package bot.
type NoteCode string

// Note is a reading that was not plain: used, and said.
type Note struct {
	Code     NoteCode
	Quantity physio.Quantity
	// Typed is the token as typed, digits and signs only.
	Typed string
	// Value is what it was read as, in the canonical unit.
	Value float64
}

// QuestionCode names a doubt. The sentence stands in package bot.
type QuestionCode string

// Question is one doubt with the readings that it has to choose between.
type Question struct {
	Code     QuestionCode    `json:"code"`
	Quantity physio.Quantity `json:"quantity"`
	// Typed is the token as typed, digits and signs only.
	Typed string `json:"typed,omitempty"`
	// Value is a number that the question names, such as the value that would
	// fit, in the canonical unit.
	Value   float64  `json:"value,omitempty"`
	Choices []Choice `json:"choices,omitempty"`
}

// Choice is one answer to a question: the word that picks it and what it
// changes in the gas.
type Choice struct {
	// Word is the answer in one word or number, such as "venous" or "40 %".
	Word string `json:"word"`
	// Set holds the values that the choice gives.
	Set physio.Values `json:"set"`
	// Drop lists quantities that the choice takes away.
	Drop []physio.Quantity `json:"drop,omitempty"`
	// Blood and Device are set when the choice names them.
	Blood  physio.Blood  `json:"blood,omitempty"`
	Device physio.Device `json:"device,omitempty"`
	// Sex and Circumstance are set when the choice names them.
	Sex          physio.Sex          `json:"sex,omitempty"`
	Circumstance physio.Circumstance `json:"circumstance,omitempty"`
}
