package screen

import (
	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/scenario"
)

// whole takes a key that concerns the rows as a whole.
func (r *rows) whole(k tea.KeyMsg, l scenario.RowList, m *model) {
	switch {
	case r.settings() && (hits(k, m.keys.AddRow) || hits(k, m.keys.DropRow)):
	case hits(k, m.keys.AddRow):
		r.add(l, m)
	case hits(k, m.keys.DropRow) && r.row > 0:
		r.wrong = r.edit(m, func(l scenario.RowList) error { return l.Drop(r.row - 1) })
	case hits(k, m.keys.Undo):
		m.undo()
	case hits(k, m.keys.Redo):
		m.redo()
	}
}

// add adds a row and chooses it. One that is nothing without its text, such as
// the name of a file, is there once that is typed.
func (r *rows) add(l scenario.RowList, m *model) {
	form := formOf(l)
	if form.typed {
		r.entry = r.typed(l, m)
		r.adding = r.entry != nil
		return
	}
	if r.wrong = r.edit(m, scenario.RowList.Add); r.wrong == nil {
		r.row, r.slot = l.Len()+1, 0
		if form.shares {
			r.slot = 1
		}
	}
}

// typed is an entry for the first text of a new row.
func (r *rows) typed(l scenario.RowList, m *model) *entry {
	next := m.scenario.Clone()
	first := scenario.Path("")
	blank := func(s *scenario.Scenario) (scenario.Input, error) {
		for _, of := range scenario.Lists(s) {
			if of.Key() != l.Key() {
				continue
			}
			if err := of.Add(); err != nil {
				return nil, err
			}
			return of.Row(of.Len() - 1)[0], nil
		}
		return nil, nil
	}
	in, err := blank(&next)
	if err != nil || in == nil {
		r.wrong = err
		return nil
	}
	first = in.Path()
	e := openEntry(in, 0, m.left[first], r)
	e.take = func(m *model, text string) error {
		err := m.edit(scenario.Path(r.list), func(s *scenario.Scenario) error {
			in, err := blank(s)
			if err != nil {
				return err
			}
			return in.Set(text)
		})
		if err == nil {
			r.row, r.slot = l.Len()+1, 0
		}
		return err
	}
	return e
}

// edit changes the rows of the next scenario.
func (r *rows) edit(m *model, f func(scenario.RowList) error) error {
	return m.edit(scenario.Path(r.list), func(s *scenario.Scenario) error {
		for _, l := range scenario.Lists(s) {
			if l.Key() == r.list {
				return f(l)
			}
		}
		return nil
	})
}
