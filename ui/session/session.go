// Package session keeps what a person had on the screen, so that nothing is
// lost by q, ctrl+c, a dropped line, a crash or kill -9.
//
// # The two files
//
// A session is two files in one folder: scenario.toml is the question, in the
// form that --from reads; session.json is what lies around it, which is page,
// chosen slot, held curves and undo list. Each is written whole or not at all (a
// temporary file, synced, then renamed over the old one), scenario.toml first.
//
// A program can be killed between the two renames, so either file must do without
// the other. Therefore session.json carries a copy of the question as well. When
// the two differ, scenario.toml is the newer one and decides, and the step from
// the copy to it becomes one entry of the undo list. The same happens when a
// person has edited scenario.toml by hand.
//
// A file that cannot be read is kept beside with ".damaged" at the end of its
// name, and the other one goes on alone.
//
// # One owner
//
// The first program that opens the folder owns the session, by a lock of the
// operating system that ends with the process, however it ends. Another one can
// read the session and keeps nothing.
package session

import (
	"time"

	"dropcrest/ui/scenario"
)

// State is what the screen needs to go on where it stopped. Page and Cursor are
// empty when only the question has survived.
type State struct {
	Page     string
	Cursor   scenario.Path
	Scenario scenario.Scenario
	Held     []Held
	History  scenario.History
	Saved    time.Time // zero in Save: now
}

// Held is one held curve.
type Held struct {
	Page     string // key of the question; "" for the one on the screen
	Letter   rune   // 'A' to 'Z', once a page
	Scenario scenario.Scenario
}
