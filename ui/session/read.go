package session

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"reflect"
	"strings"

	"dropcrest/ui/scenario"
)

// largest is the size in bytes above which a file is not read: a hundred times
// what a long session needs.
const largest = 16 << 20

// read reads the last session. The error is a note: what could be read counts.
func (s *Store) read() (last State, found bool, err error) {
	var notes []error
	around, aroundFound, err := load(s, sessionFile, decode)
	notes = append(notes, err)
	question, questionFound, err := load(s, scenarioFile, decodeQuestion)
	notes = append(notes, err)
	err = errors.Join(notes...)
	switch {
	case aroundFound && questionFound:
		return reconciled(around, question), true, err
	case aroundFound:
		return around, true, err
	case questionFound:
		return State{Scenario: question}, true, err
	}
	return State{}, false, err
}

// decodeQuestion reads scenario.toml.
func decodeQuestion(data []byte) (scenario.Scenario, error) {
	q, err := scenario.DecodeUsing(nil, scenarioFile, bytes.NewReader(data))
	return cleaned(q), err
}

// reconciled is the state with the question of scenario.toml. Where that differs
// from the copy it is the newer one, and the step to it can be undone.
func reconciled(state State, question scenario.Scenario) State {
	if reflect.DeepEqual(state.Scenario, question) {
		return state
	}
	says := strings.Join(scenario.Changes(state.Scenario, question), ", ")
	if says == "" {
		return state
	}
	state.History.Past = append(state.History.Past,
		scenario.Entry{Says: says, Before: state.Scenario, After: question.Clone()})
	state.History.Future = nil
	state.Scenario = question
	return state
}

// load reads one file of the folder. A file that makes no sense is put aside.
func load[T any](s *Store, name string, decode func([]byte) (T, error)) (value T, found bool, err error) {
	var none T
	path := filepath.Join(s.dir, name)
	data, err := readSmall(path)
	if errors.Is(err, fs.ErrNotExist) {
		return none, false, nil
	}
	if err == nil {
		if value, err = decode(data); err == nil {
			return value, true, nil
		}
	}
	says := "the file " + path + " of the last session cannot be read"
	if kept := s.putAside(path); kept != "" {
		says += " and was kept as " + filepath.Base(kept)
	}
	return none, false, &note{says, err}
}

// readSmall reads an ordinary file of bounded size.
func readSmall(path string) ([]byte, error) {
	// A named pipe would make Open wait for ever.
	switch info, err := os.Stat(path); {
	case err != nil:
		return nil, err
	case !info.Mode().IsRegular():
		return nil, errors.New("it is not an ordinary file")
	case info.Size() > largest:
		return nil, fmt.Errorf("it is larger than %d MB", largest>>20)
	}
	f, err := os.Open(path)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	return io.ReadAll(io.LimitReader(f, largest))
}

// putAside renames a damaged file, so that it is neither overwritten nor read
// again, and returns its new name. Only the owner does so.
func (s *Store) putAside(path string) string {
	if s.lock == nil {
		return ""
	}
	kept := path + ".damaged"
	for n := 2; n < 100; n++ {
		if _, err := os.Lstat(kept); errors.Is(err, fs.ErrNotExist) {
			break
		}
		kept = fmt.Sprintf("%s.damaged-%d", path, n)
	}
	if err := os.Rename(path, kept); err != nil {
		return ""
	}
	return kept
}
