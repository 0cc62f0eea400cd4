package screen

import (
	"fmt"
	"slices"
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/scenario"
)

// list is the words that an input accepts, narrowed by typing.
type list struct {
	path   scenario.Path
	says   string
	kind   scenario.Kind
	all    []scenario.Option
	now    string // the word that stands there, "" for a number
	typed  field
	at     int // the chosen one of the words shown
	scroll scroll
	wrong  error
	back   panel // what is open afterwards
}

// aNumber is the item of a list that leads to an entry.
const aNumber = "a value ..."

// newList opens the words of an input at the one that stands there.
func newList(in scenario.Input) panel { return openList(in, nil) }

func openList(in scenario.Input, back panel) *list {
	l := &list{path: in.Path(), says: in.Says(), kind: in.Kind(), all: in.Choices(), back: back}
	_, value := in.SI()
	l.now, _ = value.(string)
	l.at = len(l.all) // a number stands behind the words
	for i, o := range l.all {
		if o.Word == l.now {
			l.at = i
		}
	}
	l.at = min(l.at, len(l.items())-1)
	return l
}

// items are the words that hold every piece of what is typed, those that begin
// with it first. The way to a number is always among them.
func (l *list) items() []scenario.Option {
	typed := strings.ToLower(l.typed.String())
	var out []scenario.Option
	for _, o := range l.all {
		if holds(o, typed) {
			out = append(out, o)
		}
	}
	if typed != "" {
		slices.SortStableFunc(out, func(a, b scenario.Option) int { return rank(a, typed) - rank(b, typed) })
	}
	if l.kind == scenario.Number {
		out = append(out, scenario.Option{Word: aNumber})
	}
	return out
}

func holds(o scenario.Option, typed string) bool {
	text := strings.ToLower(o.Word + " " + o.Says)
	for _, piece := range strings.Fields(typed) {
		if !strings.Contains(text, piece) {
			return false
		}
	}
	return true
}

func rank(o scenario.Option, typed string) int {
	switch word := strings.ToLower(o.Word); {
	case strings.HasPrefix(word, typed):
		return 0
	case strings.Contains(" "+word, " "+typed):
		return 1
	}
	return 2
}

// press moves, narrows and takes.
func (l *list) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	n := len(l.items())
	switch {
	case hits(k, m.keys.Leave):
		return l.back, nil
	case hits(k, m.keys.Take):
		return l.take(m), nil
	case hits(k, m.keys.LineUp):
		l.at--
	case hits(k, m.keys.LineDown):
		l.at++
	case hits(k, m.keys.PageUp):
		l.at -= max(l.scroll.rows-1, 1)
	case hits(k, m.keys.PageDown):
		l.at += max(l.scroll.rows-1, 1)
	case hits(k, m.keys.TopLine):
		l.at = 0
	case hits(k, m.keys.BottomLine):
		l.at = n - 1
	case l.kind == scenario.Number && l.typed.String() == "" && hits(k, m.keys.Type):
		return l.number(k.Runes[0], m), nil
	default:
		before := l.typed.String()
		l.typed.press(k, m.keys)
		if l.typed.String() != before {
			l.at, l.wrong = 0, nil
		}
		return l, nil
	}
	l.at = max(min(l.at, n-1), 0)
	return l, nil
}

// take sets the chosen word. A name that no item holds is tried as it was typed:
// formulas and other names of a substance are not in the list.
func (l *list) take(m *model) panel {
	items := l.items()
	word := l.typed.String()
	switch {
	case l.at < len(items) && items[l.at].Word == aNumber:
		return l.number(0, m)
	case l.at < len(items):
		word = items[l.at].Word
	case l.kind != scenario.Name || word == "":
		l.wrong = fmt.Errorf("no item holds %q: Backspace widens the list again", word)
		return l
	}
	if l.wrong = m.set(l.path, word); l.wrong != nil {
		if e := m.lacking(l.wrong, l.back); e != nil {
			return e
		}
		return l
	}
	return l.back
}

// nothing says what can be done when no word holds what is typed.
func (l *list) nothing() string {
	if l.kind == scenario.Name {
		return "none of the list; Enter looks it up as a formula or another name"
	}
	return "none of the list; Backspace widens it again"
}

// number opens an entry in place of the list.
func (l *list) number(first rune, m *model) panel {
	in, ok := scenario.Find(&m.scenario, l.path)
	if !ok {
		return l.back
	}
	e := openEntry(in, first, m.left[l.path], l.back)
	if r, ok := l.back.(*rows); ok {
		r.entry = e // rows show an entry in its place
		return r
	}
	return e
}

func (l *list) lines(w, h int, m *model) []string {
	head := " " + m.text(l.says) + ": "
	head += m.marked(m.text(l.typed.show(w - ansi.StringWidth(head))))
	var wrong []string
	if l.wrong != nil {
		wrong = m.refused(l.wrong, w)
	}
	items := l.items()
	room := max(h-1-len(wrong), 1)
	l.scroll.reveal(l.at, room)
	first, end := l.scroll.part(len(items), room)
	out := append([]string{head}, wrong...)
	wide := 0
	for _, o := range items {
		wide = max(wide, ansi.StringWidth(m.text(o.Word)))
	}
	if len(items) == 0 && l.wrong == nil {
		out = append(out, m.dim(" "+m.text(l.nothing())))
	}
	for i := first; i < end; i++ {
		out = append(out, l.line(items[i], i == l.at, min(wide, w/2), m))
	}
	return fit(out, w, h)
}

// line is one item: its word, and what it says where that is more.
func (l *list) line(o scenario.Option, chosen bool, wide int, m *model) string {
	word := m.text(o.Word)
	says := strings.TrimPrefix(m.text(o.Says), word+", ") // "ammonium sulfate, (NH4)2SO4"
	if says == word {
		says = ""
	}
	if says != "" {
		says = m.dim("  " + says)
		word = padded(word, wide)
	}
	if o.Word == l.now {
		says += m.dim("  (now)")
	}
	if chosen {
		return " > " + m.marked(word) + says
	}
	return "   " + word + says
}

func (l *list) keys(k keyMap) []key.Binding {
	return []key.Binding{k.LineUp, k.LineDown, k.PageUp, k.PageDown, k.EraseBefore, k.Take, k.Leave}
}
