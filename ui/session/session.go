// Package session keeps what a person had on the screen, so that nothing is
// lost by q, ctrl+c, a dropped line, a crash or kill -9.
package session

import (
	"time"

	"dropcrest/ui/scenario"
)

// State is what the screen needs to go on where it stopped.
type State struct {
	Page     string
	Cursor   scenario.Path
	Scenario scenario.Scenario
	Held     []Held
	History  scenario.History
	Saved    time.Time
}

// Held is one held curve.
type Held struct {
	Letter   rune
	Scenario scenario.Scenario
}

// Store is the session folder. Only one running program owns it.
type Store struct{}

// Open opens the session folder and reads the last session. found is false when
// there is none. When another program owns the folder, Owned is false and Save
// does nothing.
func Open(dir string) (st *Store, last State, found bool, err error) { panic("not written yet") }

// Owned reports whether this program owns the session.
func (s *Store) Owned() bool { panic("not written yet") }

// Save writes the state whole or not at all.
func (s *Store) Save(State) error { panic("not written yet") }

// Close lets go of the session.
func (s *Store) Close() error { panic("not written yet") }
