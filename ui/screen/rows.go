package screen

import (
	"slices"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// rows is a list of rows, such as the components of a particle, edited with the
// keys of the page: each value is a slot, the chosen one in <>.
type rows struct {
	back   panel           // what opened it, nil: the page
	list   string          // key of the list; "" when these are settings
	given  []scenario.Path // the settings, one a row
	row    int             // the chosen row; 0 is the line above the rows
	slot   int             // the chosen slot in it
	scroll scroll
	entry  *entry // a value being typed in its slot
	adding bool   // it is the first text of a row to come
	wrong  error  // why the last key was refused
}

// newRows opens a list of rows at the first share, or at the substance where
// that is all there is to say.
func newRows(l scenario.RowList) panel {
	r := &rows{list: l.Key(), row: 1}
	if l.Key() == "component" && l.Len() == 1 {
		r.slot = 1
	}
	return r
}

// newSettings opens the inputs that have no slot in the statement, one a row. They
// stay while the panel is open, though one that is changed gets a slot there.
func newSettings(m *model) panel {
	r := &rows{row: 1}
	for _, in := range answer.FurtherInputs(m.question, &m.scenario) {
		r.given = append(r.given, in.Path())
	}
	for _, l := range answer.FurtherLists(m.question, &m.scenario) {
		r.given = append(r.given, scenario.Path(l.Key()))
	}
	return r
}

func (r *rows) sharesPicture() {}

// settings reports whether the rows are settings and no list.
func (r *rows) settings() bool { return r.list == "" }

// grid is every slot of the panel in the order of the keys: the line above, then
// the rows.
func (r *rows) grid(m *model) (scenario.RowList, [][]scenario.Input) {
	if r.settings() {
		return nil, r.settingsGrid(m)
	}
	l, ok := m.listOf(r.list)
	if !ok {
		return nil, nil
	}
	f := formOf(l)
	var above []scenario.Input
	for _, k := range f.above {
		if in, ok := scenario.Find(&m.scenario, scenario.Path(k)); ok {
			above = append(above, in)
		}
	}
	grid := [][]scenario.Input{above}
	for i := range l.Len() {
		row := l.Row(i)
		grid = append(grid, ordered(row, f.named(l, row)))
	}
	return l, grid
}

func (r *rows) settingsGrid(m *model) [][]scenario.Input {
	grid := [][]scenario.Input{nil}
	for _, p := range r.given {
		if in, ok := scenario.Find(&m.scenario, p); ok {
			grid = append(grid, []scenario.Input{in})
		} else if l, ok := m.listOf(string(p)); ok {
			grid = append(grid, []scenario.Input{listSlot{l}})
		}
	}
	return grid
}

// ordered puts the inputs of those keys first.
func ordered(row []scenario.Input, first []string) []scenario.Input {
	place := func(in scenario.Input) int {
		if i := slices.Index(first, in.Key()); i >= 0 {
			return i
		}
		return len(first)
	}
	slices.SortStableFunc(row, func(a, b scenario.Input) int { return place(a) - place(b) })
	return row
}

// settle brings the choice back to a slot that exists: undo may have taken its
// row away.
func (r *rows) settle(grid [][]scenario.Input) {
	r.row = max(min(r.row, len(grid)-1), 0)
	if r.row == 0 && (len(grid) > 1 && len(grid[0]) == 0) {
		r.row = 1
	}
	r.slot = max(min(r.slot, len(grid[r.row])-1), 0)
}

// chosen is the input under the choice; false when there is none.
func (r *rows) chosen(grid [][]scenario.Input) (scenario.Input, bool) {
	if r.slot >= len(grid[r.row]) {
		return nil, false
	}
	return grid[r.row][r.slot], true
}

// press takes a key: the entry's, then those that choose, then those that change.
func (r *rows) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	l, grid := r.grid(m)
	if grid == nil {
		return nil, nil
	}
	r.settle(grid)
	if r.entry != nil {
		switch next, _ := r.entry.press(k, m); next := next.(type) {
		case *rows:
			r.entry, r.adding = nil, false
		case *entry:
			r.entry = next
		}
		return r, nil
	}
	r.wrong = nil
	if hits(k, m.keys.Leave) {
		return r.back, nil
	}
	if r.choose(k, grid, m) {
		return r, nil
	}
	if in, ok := r.chosen(grid); ok {
		if next, took := r.change(k, in, m); took {
			return next, nil
		}
	}
	r.whole(k, l, m)
	return r, nil
}

// choose takes a key that moves the choice.
func (r *rows) choose(k tea.KeyMsg, grid [][]scenario.Input, m *model) bool {
	switch {
	case hits(k, m.keys.Left):
		r.move(-1, grid)
	case hits(k, m.keys.Right):
		r.move(1, grid)
	case hits(k, m.keys.First):
		r.slot = 0
	case hits(k, m.keys.Last):
		r.slot = len(grid[r.row]) - 1
	case hits(k, m.keys.NextField):
		r.row++
	case hits(k, m.keys.FieldBefore):
		r.row--
	default:
		return false
	}
	r.settle(grid)
	return true
}

// move goes to the slot before or after, from row to row, to the ends.
func (r *rows) move(by int, grid [][]scenario.Input) {
	switch to := r.slot + by; {
	case to >= 0 && to < len(grid[r.row]):
		r.slot = to
	case to < 0 && r.row > 0 && len(grid[r.row-1]) > 0:
		r.row--
		r.slot = len(grid[r.row]) - 1
	case to > 0 && r.row+1 < len(grid):
		r.row, r.slot = r.row+1, 0
	}
}

// change takes a key that changes the chosen slot or opens it.
func (r *rows) change(k tea.KeyMsg, in scenario.Input, m *model) (panel, bool) {
	kept := m.left[in.Path()]
	switch e := m.begun(in, k, r); {
	case e != nil:
		r.entry = e
	case k.Paste:
		m.say(notPasted)
	case hits(k, m.keys.Up):
		r.step(in, 1, false, m)
	case hits(k, m.keys.Down):
		r.step(in, -1, false, m)
	case hits(k, m.keys.BigUp):
		r.step(in, 1, true, m)
	case hits(k, m.keys.BigDown):
		r.step(in, -1, true, m)
	case hits(k, m.keys.Open) && isList(in):
		next := newRows(in.(listSlot).RowList).(*rows)
		next.back = r
		return next, true
	case hits(k, m.keys.Open) && (kept != "" || len(in.Choices()) == 0):
		r.entry = openEntry(in, 0, kept, r)
	case hits(k, m.keys.Open):
		return openList(in, r), true
	case hits(k, m.keys.About):
		return aboutInput(in, r, m), true
	default:
		return r, false
	}
	return r, true
}

// step changes the chosen slot by a step.
func (r *rows) step(in scenario.Input, dir int, big bool, m *model) {
	if isList(in) {
		r.wrong = in.Step(dir, big)
		return
	}
	if err := m.step(in.Path(), dir, big); err != nil {
		m.say(stopped(err))
	}
}

func (r *rows) keys(k keyMap) []key.Binding {
	if r.entry != nil {
		return r.entry.keys(k)
	}
	if r.settings() {
		return []key.Binding{k.NextField, k.FieldBefore, k.Left, k.Right, k.Up, k.Down, k.Type, k.Open,
			k.BigUp, k.BigDown, k.About, k.Undo, k.Redo, k.Leave}
	}
	return []key.Binding{k.Left, k.Right, k.Up, k.Down, k.NextField, k.FieldBefore, k.AddRow, k.DropRow, k.Type, k.Open,
		k.BigUp, k.BigDown, k.First, k.Last, k.About, k.Undo, k.Redo, k.Leave}
}
