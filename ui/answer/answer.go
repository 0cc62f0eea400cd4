// Package answer holds the questions that dropcrest answers, one file each:
// scenario in, answer out. It knows no terminal and no options.
package answer

import (
	"context"
	"io"
	"io/fs"
	"slices"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// Env is what an answer may use.
type Env struct {
	Substances *solutes.Catalogue
	Version    string
	Workers    int                     // 0: one
	Kept       *Kept                   // nil: nothing is kept from one question to the next
	Progress   func(done, total int64) // nil: nobody listens

	Open func(name string) (io.ReadCloser, error) // measured files; nil: there are none
	Demo fs.FS                                    // files of the invented station; nil: none

	// Load and Save keep what takes long to be made under a key, from one session to the
	// next; nil: nothing is kept. Load returns nil where there is nothing.
	Load func(key string) []byte
	Save func(key string, data []byte) error

	// Row takes the rows of a table as they are found, so that a campaign of any
	// length streams through; nil: rows are collected in the answer. Columns comes
	// before the first row.
	Columns func(table string, columns []Column) error
	Row     func(table string, row []any) error

	assuming *assuming // particles by the models that a ledger compares; nil: as asked
}

// Question is one page and one subcommand.
type Question struct {
	Key    string  // "curve"
	Title  string  // "Curve"
	Says   string  // the question in one sentence
	Groups []Group // the inputs that it looks at, in the order of the help

	// Live reports whether the question is answered within a frame, so that it can
	// be asked at every key; else it is a job that can be stopped. nil: always.
	Live func(scenario.Scenario) bool

	// Statement is the question in prose, one clause a line; {path} stands for
	// the slot of that input, {component} for the composition as a whole.
	Statement func(scenario.Scenario) []string
	Ask       func(context.Context, Env, scenario.Scenario) (Answer, error)

	// Frame is the frame of a figure in h rows, as like the last one as may be; nil:
	// figure.Fit.
	Frame func(s scenario.Scenario, f figure.Figure, last figure.Frame, h int) (figure.Frame, bool)
	// Always are keys of inputs that the question looks at whatever the other values
	// are, though others do so only then.
	Always []string
	// Given settles what follows from which options were given; nil: nothing.
	Given func(s *scenario.Scenario, given func(option string) bool)
	// Follow settles what follows from a change of one input on the screen, as Given
	// does for options; nil: nothing.
	Follow func(s *scenario.Scenario, changed scenario.Path)
	// Formats are the forms besides text, csv, json and figure files.
	Formats []string
	// Tabled are the keys of the tables that the text form shows; nil: none.
	Tabled func(Answer) []string
	// Turns is the input that the keys of records go through; nil: the record of data.
	Turns *Turns
	// Counts tells whether an input or a list of rows counts with the other values as
	// they are, beyond what Input.Used says; nil: all do.
	Counts func(s scenario.Scenario, path scenario.Path) bool
	// Means is the input that an option means with that value, where it is not the one
	// of its group; nil: it always is.
	Means func(option, text string) (scenario.Path, bool)
}

// Turns is a whole number that a page is gone through by.
type Turns struct {
	Path scenario.Path
	Says string // "row"
}

// records is how the pages of data are gone through.
var records = Turns{"record", "record"}

// Through is what the keys of records go through.
func (q Question) Through() Turns {
	if q.Turns != nil {
		return *q.Turns
	}
	return records
}

// Heeds reports whether an input or list of rows that the question looks at counts
// with the other values as they are.
func (q Question) Heeds(s scenario.Scenario, path scenario.Path) bool {
	return q.Counts == nil || q.Counts(s, path)
}

// IsLive reports whether the question is answered at once for that scenario.
func (q Question) IsLive(s scenario.Scenario) bool { return q.Live == nil || q.Live(s) }

// Uses reports whether the question looks at the input with the other values as
// they are.
func (q Question) Uses(in scenario.Input) bool {
	return in.Used() || slices.Contains(q.Always, in.Key())
}

// FrameOf is the frame of a figure of the question's answer.
func (q Question) FrameOf(s scenario.Scenario, f figure.Figure, last figure.Frame, h int) (figure.Frame, bool) {
	if q.Frame != nil {
		return q.Frame(s, f, last, h)
	}
	return figure.Fit(f, last, h)
}

// Answer is what a question returns. Sentences and labels use the program's own
// symbols (µ, κ, °); whoever shows them in ASCII sends them through plain.ASCII.
type Answer struct {
	Finding []string // one to three sentences, the most important first
	Why     []string // for `i` on the finding: formulas, constants, sources
	Facts   any      // the JSON object, without scenario, notes, version
	Figures []figure.Figure
	Others  []figure.Line // lines of the first figure that are shown on demand
	Tables  []Table
	Notes   []atmos.Note
	Account []string // paragraphs that a written answer needs to stand alone; text and figure files print them

	// Record is the record that was looked at, of Records in the data; 0 without data.
	Record, Records int
}

// Table is a table of an answer. Columns carry their unit in the key.
type Table struct {
	Key     string // "curve"
	Title   string
	Columns []Column
	Rows    [][]any // float64, string, bool, or nil where a value is absent
}

// Column is one column of a table.
type Column struct {
	Key  string // "wet_radius_m"
	Says string // "wet radius, m"
}
