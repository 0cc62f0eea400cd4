package scenario

import (
	"fmt"
	"strings"
)

// ValueError says what is wrong with a value and what would be right.
type ValueError struct {
	Path    Path
	Given   string // the text that was given
	Problem string // "no unit \"parsec\" of length"
	Right   string // "1 to 10000 nm, such as 100 nm"
}

func (e *ValueError) Error() string {
	if strings.HasSuffix(e.Right, "?") {
		return e.Problem + ": did you mean " + e.Right
	}
	return e.Problem + ": want " + e.Right
}

// FileError says where in a scenario file something is wrong.
type FileError struct {
	Name         string // of the file
	Line, Column int    // from 1
	Key          string // the key at which it is wrong, or ""
	Err          error
}

func (e *FileError) Error() string {
	key := ""
	if e.Key != "" {
		key = e.Key + ": "
	}
	return fmt.Sprintf("%s:%d:%d: %s%v", e.Name, e.Line, e.Column, key, e.Err)
}

func (e *FileError) Unwrap() error { return e.Err }

// FileErrors is all that is wrong with a file, one problem a line.
type FileErrors []*FileError

func (e FileErrors) Error() string {
	lines := make([]string, len(e))
	for i, f := range e {
		lines[i] = f.Error()
	}
	return strings.Join(lines, "\n")
}

// Unwrap makes errors.As find the first problem.
func (e FileErrors) Unwrap() []error {
	out := make([]error, len(e))
	for i, f := range e {
		out[i] = f
	}
	return out
}
