package screen

import (
	"errors"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// lacks says that a change needs the name of a file to have an answer: bins are
// nothing without the file that holds them.
type lacks struct {
	error
	path   scenario.Path
	change func(*scenario.Scenario) error
}

func (e lacks) Unwrap() error { return e.error }

// lackOf turns an error of an answer into lacks when it names an input for a file
// that has none.
func lackOf(err error, next scenario.Scenario, change func(*scenario.Scenario) error) error {
	var input *answer.InputError
	if !errors.As(err, &input) {
		return err
	}
	in, ok := scenario.Find(&next, scenario.Path(input.Input))
	if !ok || in.Kind() != scenario.File {
		return err
	}
	if _, value := in.SI(); value != nil {
		return err
	}
	return lacks{err, in.Path(), change}
}

// lacking is an entry for the file that a refused change lacks, which makes the
// change once it is there; nil for any other error.
func (m *model) lacking(err error, back panel) panel {
	var l lacks
	if !errors.As(err, &l) {
		return nil
	}
	next := m.scenario.Clone()
	in, ok := scenario.Find(&next, l.path)
	if !ok {
		return nil
	}
	e := openEntry(in, 0, m.left[l.path], back)
	e.take = func(m *model, text string) error {
		return m.edit(l.path, func(s *scenario.Scenario) error {
			if err := l.change(s); err != nil {
				return err
			}
			in, err := find(s, l.path)
			if err != nil {
				return err
			}
			return in.Set(text)
		})
	}
	return e
}
