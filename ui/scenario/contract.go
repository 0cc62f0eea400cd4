package scenario

import "io"

// Default returns the scenario a new user meets: 100 nm of ammonium sulfate by
// ion interaction in air of 25 °C, looked at at 95 % humidity.
func Default() Scenario { panic("not written yet") }

// Clone returns a copy that shares nothing with s.
func (s Scenario) Clone() Scenario { panic("not written yet") }

// Inputs returns every input of the scenario, those of its rows included, in
// the order of the statement.
func Inputs(s *Scenario) []Input { panic("not written yet") }

// Find returns the input at a path.
func Find(s *Scenario, p Path) (Input, bool) { panic("not written yet") }

// RowList is a list of rows in a scenario, such as the components of a particle.
type RowList interface {
	Key() string  // "component"
	Says() string // "composition"
	Help() string
	Len() int
	Row(i int) []Input // the inputs of row i
	Add() error        // a new row with defaults at the end
	Drop(i int) error  // the last row cannot be dropped
	Show(Style) string // "ammonium sulfate", "ammonium sulfate 0.60, black carbon 0.40", "5 components"
}

// Lists returns the row lists of the scenario.
func Lists(s *Scenario) []RowList { panic("not written yet") }

// SetRow reads the command-line form of one row, "ammonium sulfate share=0.6",
// as a new row of the list of that key; the first call replaces the default rows
// if fresh is true.
func SetRow(s *Scenario, list string, text string, fresh bool) error { panic("not written yet") }

// Changes says in words how b differs from a: "kappa 0.65 → 0.61".
func Changes(a, b Scenario) []string { panic("not written yet") }

// Decode reads a scenario file. Errors are *FileError with file, line, column.
// Keys that are absent keep their defaults.
func Decode(name string, r io.Reader) (Scenario, error) { panic("not written yet") }

// Encode writes a scenario file that Decode reads back without loss.
func Encode(w io.Writer, s Scenario) error { panic("not written yet") }

// History is the undo list of a scenario. A run of steps on one input is one
// entry. The zero History is empty; it is a plain value that can be saved.
type History struct {
	Past   []Entry
	Future []Entry
}

// Entry is one change.
type Entry struct {
	Path   Path // the input that was changed, "" for several
	Says   string
	Before Scenario
	After  Scenario
}
