// Package scenario is what is asked: every quantity declared once. From that one
// declaration come the slot on the screen, the option of the command line, the
// key of the scenario file, the help text and the position of an error.
package scenario

// Path names one input of a scenario: "dry-diameter", "component[0].share".
type Path string

// Kind says how an input is edited.
type Kind int

const (
	Number  Kind = iota // a number with a unit; may also accept the words of Choices
	Choice              // one of Choices
	Text                // free text
	Name                // a name of the catalogue, which Choices offers
	File                // the name of a file
	Numbers             // several numbers of one quantity, with commas between them
	Switch              // on or off
)

// Option is one word that an input accepts.
type Option struct {
	Word string // "volume-equivalent", as in options and files
	Says string // "volume-equivalent diameter", as in running text
}

// Style says how a value is written.
type Style struct {
	ASCII bool
}

// Input is one quantity of one scenario: all that slot, option, file key and
// help need to see of it. Set and Step change the scenario it was taken from.
type Input interface {
	Path() Path
	Key() string    // option and file key: "dry-diameter"
	Says() string   // short name in words: "dry size"
	Help() string   // one to three sentences: what it is
	Origin() string // where its default comes from: source, or "common practice"
	Kind() Kind
	Range() string // "1 to 10000 nm", or the words it accepts
	Choices() []Option
	Show(Style) string // "140 nm"
	// Set reads a value as a person types it on the screen: without a unit it is
	// in the unit that is shown. *ValueError says what is wrong and what would be
	// right.
	Set(text string) error
	// SetWithUnit reads a value as options and files give it: what has a unit needs it.
	SetWithUnit(text string) error
	// Step changes a number by its natural step (dir > 0: upwards) and a word to
	// the item above (dir > 0) or below; at the end it returns a *ValueError.
	Step(dir int, big bool) error
	IsDefault() bool
	Used() bool                  // false: the scenario as it stands does not look at it
	SI() (key string, value any) // "dry_diameter_m", 1.4e-07; words as strings; nil: absent
}
