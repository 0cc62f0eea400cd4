package session

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"sync"
	"time"
)

// Names of the files in the folder.
const (
	scenarioFile = "scenario.toml"
	sessionFile  = "session.json"
	lockFile     = "lock"

	scenarioBefore = "scenario-before.toml" // of the session that was declined
	sessionBefore  = "session-before.json"
)

// errBusy is what a lock says when another process holds it.
var errBusy = errors.New("another program holds the lock")

// Store is the session folder. Only one running program owns it. Its methods may
// be called from several goroutines, and on a nil Store, which owns nothing.
type Store struct {
	dir string

	mu       sync.Mutex
	lock     *os.File  // nil: not owned
	question []byte    // scenario.toml as it stands on the disk, nil: unknown
	saved    time.Time // of the newest state on the disk
}

// Open opens the session folder, makes it if need be, and reads the last
// session. found is false when there is none. When another program owns the
// folder, Owned is false and Save does nothing; its session is read all the same.
//
// The store is never nil, and err is never a reason to stop: it is a note for the
// person, such as that the folder cannot be written (then nothing is kept), or
// that a damaged file was put aside.
func Open(dir string) (st *Store, last State, found bool, err error) {
	st = &Store{dir: dir}
	var notes []error
	if err := st.own(); err != nil && !errors.Is(err, errBusy) {
		notes = append(notes, &note{"this session cannot be kept", err})
	}
	last, found, err = st.read()
	return st, last, found, errors.Join(append(notes, err)...)
}

// own takes the lock of the folder.
func (s *Store) own() error {
	if err := os.MkdirAll(s.dir, 0o700); err != nil {
		return err
	}
	f, err := os.OpenFile(filepath.Join(s.dir, lockFile), os.O_RDWR|os.O_CREATE, 0o600)
	if err != nil {
		return err
	}
	if err := takeLock(f); err != nil {
		_ = f.Close()
		return err
	}
	s.lock = f
	return nil
}

// Owned reports whether this program owns the session.
func (s *Store) Owned() bool {
	if s == nil {
		return false
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	return s.lock != nil
}

// Save writes the state, each file whole or not at all. It does nothing, and
// returns nil, when this program does not own the session, and when a newer state
// was saved already: savers may overtake each other. After an error the files are
// what they were, or scenario.toml alone is new.
func (s *Store) Save(state State) error {
	if s == nil {
		return nil
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.lock == nil {
		return nil
	}
	if state.Saved.IsZero() {
		state.Saved = time.Now()
	}
	if state.Saved.Before(s.saved) {
		return nil
	}
	question, around, err := encode(state)
	if err != nil {
		return &note{"this session cannot be saved", err}
	}
	if err := s.write(question, around); err != nil {
		return &note{"this session cannot be saved", err}
	}
	s.saved = state.Saved
	return nil
}

// write writes the two files, the question first; the package comment says why.
func (s *Store) write(question, around []byte) error {
	if string(question) != string(s.question) {
		s.question = nil
		if err := replace(filepath.Join(s.dir, scenarioFile), question); err != nil {
			return err
		}
		s.question = question
	}
	return replace(filepath.Join(s.dir, sessionFile), around)
}

// Decline puts the last session aside: it becomes scenario-before.toml and
// session-before.json, in place of one that was declined earlier. To be called
// when a person does not take up the session that Open has found, before the
// first Save, which would overwrite it.
func (s *Store) Decline() error {
	if s == nil {
		return nil
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.lock == nil {
		return nil
	}
	s.question, s.saved = nil, time.Time{}
	err := errors.Join(s.move(scenarioFile, scenarioBefore), s.move(sessionFile, sessionBefore))
	if err != nil {
		return &note{"the session before cannot be put aside", err}
	}
	return nil
}

// move renames a file of the folder. Without that file it removes the target,
// so that the two files put aside always belong together.
func (s *Store) move(from, to string) error {
	target := filepath.Join(s.dir, to)
	err := os.Rename(filepath.Join(s.dir, from), target)
	if !errors.Is(err, fs.ErrNotExist) {
		return err
	}
	if err := os.Remove(target); err != nil && !errors.Is(err, fs.ErrNotExist) {
		return err
	}
	return nil
}

// Close lets go of the session. Save does nothing afterwards.
func (s *Store) Close() error {
	if s == nil {
		return nil
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.lock == nil {
		return nil
	}
	err := s.lock.Close() // and the lock with it
	s.lock = nil
	return err
}

// note is an error in words for a person, on one line, with its cause.
type note struct {
	says string
	err  error
}

func (n *note) Error() string { return oneLine(fmt.Sprintf("%s: %v", n.says, n.err)) }
func (n *note) Unwrap() error { return n.err }
