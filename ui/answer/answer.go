// Package answer holds the questions that dropcrest answers, one file each:
// scenario in, answer out. It knows no terminal and no options.
package answer

import (
	"context"

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
}

// Question is one page and one subcommand.
type Question struct {
	Key    string  // "curve"
	Title  string  // "Curve"
	Says   string  // the question in one sentence
	Groups []Group // the inputs that it looks at, in the order of the help
	Live   bool    // answered within a frame, inside Update

	// Statement is the question in prose, one clause a line; {path} stands for
	// the slot of that input, {component} for the composition as a whole.
	Statement func(scenario.Scenario) []string
	Ask       func(context.Context, Env, scenario.Scenario) (Answer, error)
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
