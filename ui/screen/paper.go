package screen

import (
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"
)

// What panels have in common: keys that hit, text in lines, lines that scroll.

// hits reports whether a key is one of the bindings. Several characters at once
// are pasted text and no key, even if they spell the name of one.
func hits(k tea.KeyMsg, bindings ...key.Binding) bool {
	if k.Type == tea.KeyRunes && (k.Paste || len(k.Runes) > 1) {
		return false
	}
	return key.Matches(k, bindings...)
}

// folded breaks text into lines of at most w columns, each after the indent.
func folded(text string, w int, indent string) []string {
	lines := wrap(text, max(min(w, textWidth)-len(indent), 1))
	for i, l := range lines {
		lines[i] = indent + l
	}
	return lines
}

// refusal is an error in words.
func refusal(err error) string { return "error: " + err.Error() }

// refused is an error in lines. It may quote what was typed.
func (m *model) refused(err error, w int) []string {
	lines := folded(m.text(refusal(err)), w, " ")
	for i, l := range lines {
		lines[i] = m.bad(l)
	}
	return lines
}

// scroll is the part of a list that is seen. Drawing tells it how many lines
// there are and how many fit, because only then is it known; keys ask for a place
// and the next drawing brings it within the list.
type scroll struct {
	first int // the first line seen
	rows  int // how many were seen last
}

// press takes a key that scrolls and reports whether it was one.
func (s *scroll) press(k tea.KeyMsg, keys keyMap) bool {
	switch {
	case hits(k, keys.LineUp):
		s.first--
	case hits(k, keys.LineDown):
		s.first++
	case hits(k, keys.PageUp):
		s.first -= max(s.rows-1, 1) // one line stays, to read on from
	case hits(k, keys.PageDown):
		s.first += max(s.rows-1, 1)
	case hits(k, keys.TopLine):
		s.first = 0
	case hits(k, keys.BottomLine):
		s.first = farDown
	default:
		return false
	}
	return true
}

// farDown is more lines than any text has.
const farDown = 1 << 30

// part is the range of n lines that is seen in h rows.
func (s *scroll) part(n, h int) (first, end int) {
	s.rows = max(min(n, h), 0)
	s.first = max(min(s.first, n-s.rows), 0)
	return s.first, s.first + s.rows
}

// reveal scrolls no further than it has to so that line at is seen in h rows.
func (s *scroll) reveal(at, h int) {
	s.first = max(min(s.first, at), at-h+1)
}

// padded fills text up with blanks to w columns.
func padded(text string, w int) string {
	return text + strings.Repeat(" ", max(w-ansi.StringWidth(text), 0))
}
