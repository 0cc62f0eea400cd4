package screen

import (
	"fmt"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/form"
)

// table shows the tables of the answer, one at a time.
type table struct {
	which  int
	scroll scroll
}

// newTable opens the first table of the answer.
func newTable(m *model) panel {
	if len(m.answer.Tables) == 0 {
		return newReader("Table", []string{"This answer has no table."})
	}
	return &table{}
}

func (t *table) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	which := t.which
	switch {
	case hits(k, m.keys.Leave, m.keys.Take, m.keys.Table):
		return nil, nil
	case hits(k, m.keys.FieldLeft):
		which = max(which-1, 0)
	case hits(k, m.keys.FieldRight):
		which = min(which+1, len(m.answer.Tables)-1)
	default:
		t.scroll.press(k, m.keys)
	}
	if which != t.which {
		t.which, t.scroll = which, scroll{}
	}
	return t, nil
}

// lines keeps title and column heads in place while the rows scroll.
func (t *table) lines(w, h int, m *model) []string {
	n := len(m.answer.Tables)
	if n == 0 {
		return fit([]string{" This answer has no table."}, w, h)
	}
	of := m.answer.Tables[min(t.which, n-1)]
	heads, body := form.Tabulate(of, w-1, m.text)
	first, end := t.scroll.part(len(body), max(h-1-len(heads), 0))
	title := of.Title
	if n > 1 {
		title = fmt.Sprintf("%s (table %d of %d)", title, min(t.which, n-1)+1, n)
	}
	out := []string{heading(title, first, end, len(body), "row", w, m)}
	for _, l := range heads {
		out = append(out, m.dim(" "+l))
	}
	for _, l := range body[first:end] {
		out = append(out, " "+l)
	}
	if len(body) == 0 {
		out = append(out, m.dim(" no rows"))
	}
	return fit(out, w, h)
}

func (t *table) keys(k keyMap) []key.Binding {
	return []key.Binding{k.LineUp, k.LineDown, k.PageUp, k.PageDown, k.TopLine, k.BottomLine, k.FieldLeft, k.FieldRight, k.Leave}
}
