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
	kind  scenario.Kind
	says  string // what is typed: "dry size"
	right string // what would be right: "1 to 10000 nm"
	field field
	start string                            // what stood there at first, to be edited
	found []string                          // names of files that go on from what is typed
	take  func(m *model, text string) error // nil: set the input
	wrong error                             // why the last Enter was refused
	back  panel                             // what is open afterwards
}

// newEntry starts an entry with the first character typed, or, when that is 0,
// with what Esc left behind earlier.
func newEntry(in scenario.Input, first rune, kept string) panel {
	return openEntry(in, first, kept, nil)
}

func openEntry(in scenario.Input, first rune, kept string, back panel) *entry {
	e := &entry{path: in.Path(), kind: in.Kind(), says: in.Says(), right: accepts(in), back: back}
	switch {
	case first != 0:
		kept = string(first)
	case kept == "":
		kept = editable(in)
		e.start = kept
	}
	e.field = newField(kept)
	return e
}

// begun is an entry of an input with the characters that begin it: one typed, several
// that arrive at once on a slow line, or pasted text. It is nil where they are no
// number for a slot that takes one; a slot for text takes any that is pasted.
func (m *model) begun(in scenario.Input, k tea.KeyMsg, back panel) *entry {
	text := strings.TrimSpace(string(k.Runes))
	first := tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(text)[:min(1, len(text))]}
	takesText := !isList(in) && (in.Kind() == scenario.File || in.Kind() == scenario.Text)
	isPasted, isNumber := k.Paste && text != "", key.Matches(first, m.keys.Type)
	if isPasted && takesText || isNumber && isNumeric(in) {
		return openEntry(in, 0, text, back)
	}
	return nil
}

// editable is the value of an input as a text that is worth changing: a series of
// numbers, a file name. A single number is sooner typed anew.
func editable(in scenario.Input) string {
	switch in.Kind() {
	case scenario.Numbers:
		return in.Show(scenario.Style{ASCII: true})
	case scenario.Text, scenario.File:
		_, value := in.SI()
		text, _ := value.(string)
		return text
	}
	return ""
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
	case hits(k, m.keys.Take) && text == e.start:
		return e.back, nil
	case hits(k, m.keys.Take):
		if e.wrong = e.give(m, text); e.wrong != nil {
			if next := m.lacking(e.wrong, e.back); next != nil {
				return next, nil
			}
			return e, nil
		}
		delete(m.left, e.path)
		return e.back, nil
	case hits(k, m.keys.Leave) && text == e.start:
		delete(m.left, e.path)
		return e.back, nil
	case hits(k, m.keys.Leave):
		m.leave(e.path, text, m.keys.Open)
		return e.back, nil
	case hits(k, m.keys.Complete) && e.kind == scenario.File:
		e.complete()
		return e, nil
	}
	if e.field.press(k, m.keys) {
		e.wrong, e.found = nil, nil
	}
	return e, nil
}

// give hands over what was typed. The name of a file is made whole first.
func (e *entry) give(m *model, text string) error {
	if e.kind == scenario.File {
		name, err := fileName(text)
		if err != nil {
			return err
		}
		text = name
	}
	if e.take != nil {
		return e.take(m, text)
	}
	return m.set(e.path, text)
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

// hint is what stands below the text: what would be right, or why it is not; of
// files those that go on from what is typed.
func (e *entry) hint(w int, m *model) []string {
	switch {
	case e.wrong != nil:
		return m.refused(e.wrong, w)
	case len(e.found) > 0:
		return []string{m.dim(" " + cut(m.text(strings.Join(e.found, "  ")), w-1))}
	}
	return []string{m.dim(" " + m.text(e.right))}
}

func (e *entry) keys(k keyMap) []key.Binding {
	if e.kind == scenario.File {
		return append([]key.Binding{k.Complete}, typing(k)...)
	}
	return []key.Binding{k.Take, k.FieldLeft, k.FieldRight, k.EraseBefore, k.EraseUnder, k.Leave}
}
