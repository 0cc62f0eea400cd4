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

	// Row takes the rows of a table as they are found, so that a campaign of any
	// length streams through; nil: rows are collected in the answer. Columns comes
	// before the first row.
	Columns func(table string, columns []Column) error
	Row     func(table string, row []any) error
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
	Paper   []string // a record on paper that stands below the finding in text, one paragraph an entry
	Facts   any      // the JSON object, without scenario, notes, version
	Figures []figure.Figure
	Others  []figure.Line // lines of the first figure that are shown on demand
	Tables  []Table
	Notes   []atmos.Note

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
