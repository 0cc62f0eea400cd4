package screen

import (
	"fmt"
	"strings"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
)

// mostHeld is how many curves can be told apart in a picture of characters.
const mostHeld = 6

// held is one curve that stays in the picture.
type held struct {
	letter   rune
	scenario scenario.Scenario
	line     figure.Line
	marks    []figure.Mark
}

// hold keeps the curve of the answer in the picture.
func (m *model) hold() {
	switch {
	case len(m.answer.Figures) == 0:
		m.say("there is no curve to hold")
	case m.work.old:
		m.say("this curve belongs to the question before; it can be held once the answer is there")
	case len(m.held) == mostHeld:
		m.say("six curves are held: x releases the last one")
	default:
		h := newHeld(m.freeLetter(), m.scenario, m.answer)
		m.held = append(m.held, h)
		m.history.EndRun() // undo leads back to what was held
		m.say("held as " + string(h.letter))
		m.redraw()
		m.keep()
	}
}

func newHeld(letter rune, s scenario.Scenario, a answer.Answer) held {
	h := held{letter: letter, scenario: s}
	h.line, h.marks = answer.HeldLine(letter, a)
	return h
}

// freeLetter is the first letter that no held curve has.
func (m *model) freeLetter() rune {
	used := ""
	for _, h := range m.held {
		used += string(h.letter)
	}
	for letter := 'A'; ; letter++ {
		if !strings.ContainsRune(used, letter) {
			return letter
		}
	}
}

// release lets go of the curve that was held last.
func (m *model) release() {
	n := len(m.held)
	if n == 0 {
		m.say("no curve is held: Space holds the one shown")
		return
	}
	m.say("released " + string(m.held[n-1].letter))
	m.held = m.held[: n-1 : n-1]
	m.redraw()
	m.keep()
}

// holdAgain takes up the held curves of a session. What has no answer any more
// is left out.
func (m *model) holdAgain(kept []session.Held) {
	m.held = nil
	for _, k := range kept {
		a, err := m.ask(k.Scenario)
		if err != nil || len(m.held) == mostHeld || len(a.Figures) == 0 {
			continue
		}
		m.held = append(m.held, newHeld(k.Letter, k.Scenario, a))
	}
}

// heldLine names the held curves in at most w columns, with what they are made
// of where there is room.
func (m *model) heldLine(w int) string {
	if len(m.held) == 0 {
		return ""
	}
	for _, long := range []bool{true, false} {
		if line := m.heldWords(len(m.held), long); ansi.StringWidth(line) <= w {
			return line
		}
	}
	for n := len(m.held) - 1; n > 0; n-- { // no number is cut in two
		line := m.heldWords(n, false) + m.text(fmt.Sprintf(", %d more", len(m.held)-n))
		if ansi.StringWidth(line) <= w {
			return line
		}
	}
	return cut(m.heldWords(len(m.held), false), w)
}

// heldWords names the first n held curves.
func (m *model) heldWords(n int, long bool) string {
	var words []string
	for _, h := range m.held[:n] {
		says := []string{string(h.letter)}
		s := h.scenario
		if in, ok := scenario.Find(&s, "dry-diameter"); ok {
			says = append(says, in.Show(m.style()))
		}
		for _, l := range m.question.Lists(&s) {
			if long && l.Len() > 0 {
				says = append(says, l.Show(m.style()))
			}
		}
		for _, mark := range h.marks {
			says = append(says, mark.Text)
		}
		words = append(words, strings.Join(says, " "))
	}
	return m.text("held: " + strings.Join(words, ", "))
}

// cycleOthers shows all other lines, each alone, none.
func (m *model) cycleOthers() {
	n := len(m.answer.Others)
	if n == 0 {
		m.say("there are no other lines here")
		return
	}
	m.others = (m.others + 1) % (n + 2)
	lines := m.shownOthers()
	says := "no other lines"
	for i, l := range lines {
		if i == 0 {
			says = "also: " + l.Says
			continue
		}
		says += ", " + l.Says
	}
	m.say(says)
	m.redraw()
}

// shownOthers are the other lines that are shown: 0 none, 1 all, then each alone.
func (m *model) shownOthers() []figure.Line {
	all := m.answer.Others
	switch i := m.others - 2; {
	case m.others == 0 || i >= len(all):
		return nil
	case m.others == 1:
		return all
	default:
		return all[i : i+1]
	}
}
