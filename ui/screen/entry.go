package screen

import (
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/scenario"
)

// entry is a value being typed, with its unit.
type entry struct {
	path  scenario.Path
	says  string // what is typed: "dry size"
	right string // what would be right: "1 to 10000 nm"
	field field
	wrong error // why the last Enter was refused
	back  panel // what is open afterwards
}

// newEntry starts an entry with the first character typed, or, when that is 0,
// with what Esc left behind earlier.
func newEntry(in scenario.Input, first rune, kept string) panel {
	return openEntry(in, first, kept, nil)
}

func openEntry(in scenario.Input, first rune, kept string, back panel) *entry {
	if first != 0 {
		kept = string(first)
	}
	return &entry{path: in.Path(), says: in.Says(), right: accepts(in), field: newField(kept), back: back}
}

// accepts says what an input takes: its range, and the words that stand for a
// number.
func accepts(in scenario.Input) string {
	right := in.Range()
	if in.Kind() != scenario.Number {
		return right
	}
	for _, c := range in.Choices() {
		if !strings.Contains(right, c.Word) {
			right += ", or " + c.Word
		}
	}
	return right
}

// press edits the text; Enter takes it, Esc leaves it for the next Enter.
func (e *entry) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	switch text := e.field.String(); {
	case hits(k, m.keys.Take) && text == "":
		return e.back, nil
	case hits(k, m.keys.Take):
		if e.wrong = m.set(e.path, text); e.wrong != nil {
			return e, nil
		}
		delete(m.left, e.path)
		return e.back, nil
	case hits(k, m.keys.Leave):
		m.leave(e.path, text, m.keys.Open)
		return e.back, nil
	}
	if e.field.press(k, m.keys) {
		e.wrong = nil
	}
	return e, nil
}

// leave keeps a text that was typed and not taken, for the key that offers it
// again.
func (m *model) leave(p scenario.Path, text string, again key.Binding) {
	if text == "" {
		delete(m.left, p)
		return
	}
	if m.left == nil {
		m.left = map[scenario.Path]string{}
	}
	m.left[p] = text
	m.say(text + " is not taken; " + again.Help().Key + " offers it again")
}

func (e *entry) lines(w, h int, m *model) []string {
	label := " " + m.text(e.says) + ": "
	typed := m.text(e.field.show(w - ansi.StringWidth(label)))
	return fit(append([]string{label + m.marked(typed)}, e.hint(w, m)...), w, h)
}

// hint is what stands below the text: what would be right, or why it is not.
func (e *entry) hint(w int, m *model) []string {
	if e.wrong != nil {
		return m.refused(e.wrong, w)
	}
	return []string{m.dim(" " + m.text(e.right))}
}

func (e *entry) keys(k keyMap) []key.Binding {
	return []key.Binding{k.Take, k.FieldLeft, k.FieldRight, k.EraseBefore, k.EraseUnder, k.Leave}
}
