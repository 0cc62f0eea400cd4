package screen

import (
	"fmt"
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"
)

// reader is something to read that may be longer than the window.
type reader struct {
	title  string
	text   []string    // paragraphs, an empty one is a blank line
	opener key.Binding // the key that opened it closes it too
	hang   int         // the column of a line too long that its rest begins in; 0: as it is indented
	scroll scroll
	back   panel // what is open afterwards
}

// newReader shows paragraphs under a title. Lines that fit stand as they are,
// longer ones are wrapped behind their own indent.
func newReader(title string, lines []string) panel { return &reader{title: title, text: lines} }

func (r *reader) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	if hits(k, m.keys.Leave, m.keys.Take, r.opener) {
		return r.back, nil
	}
	r.scroll.press(k, m.keys)
	return r, nil
}

func (r *reader) lines(w, h int, m *model) []string {
	body := laid(r.text, r.hang, w, m)
	first, end := r.scroll.part(len(body), max(h-1, 0))
	return fit(append([]string{heading(r.title, first, end, len(body), "line", w, m)}, body[first:end]...), w, h)
}

// heading is a title, and which part is seen when it is not all.
func heading(title string, first, end, n int, unit string, w int, m *model) string {
	text := " " + m.text(title)
	if end-first == n {
		return m.strong(cut(text, w))
	}
	where := fmt.Sprintf("  (%s %d to %d of %d)", unit, first+1, end, n)
	return m.strong(cut(text, max(w-len(where), 0))) + m.dim(where)
}

// laid is text in lines of at most w columns.
func laid(text []string, hang, w int, m *model) []string {
	var out []string
	for _, t := range text {
		t = m.text(t)
		if ansi.StringWidth(t)+1 <= min(w, textWidth) {
			out = append(out, strings.TrimRight(" "+t, " "))
			continue
		}
		if head := []rune(t); hang > 0 && len(head) > hang && head[hang-1] == ' ' {
			rest := folded(string(head[hang:]), w, strings.Repeat(" ", hang+1))
			rest[0] = " " + string(head[:hang]) + rest[0][hang+1:]
			out = append(out, rest...)
			continue
		}
		indent := " " + t[:len(t)-len(strings.TrimLeft(t, " "))]
		out = append(out, folded(t, w, indent)...)
	}
	return out
}

func (r *reader) keys(k keyMap) []key.Binding {
	return []key.Binding{k.LineUp, k.LineDown, k.PageUp, k.PageDown, k.TopLine, k.BottomLine, k.Leave}
}
