package screen

import (
	"context"
	"fmt"
	"slices"
	"strings"

	tea "github.com/charmbracelet/bubbletea"
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
	parts    map[string]part // by the key of the figure
	says     string          // its barrier
}

// part is what a held curve is in one figure.
type part struct {
	line  figure.Line
	marks []figure.Mark
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
	h := held{letter: letter, scenario: s, parts: map[string]part{}}
	for i, f := range a.Figures {
		line, marks := answer.HeldLine(letter, answer.Answer{Figures: []figure.Figure{f}})
		if len(line.X) > 0 {
			h.parts[f.Key] = part{line, marks}
		}
		if i == 0 && len(marks) > 0 {
			h.says = marks[0].Text
		}
	}
	return h
}

// freeLetter is the first letter that no held curve has.
func (m *model) freeLetter() rune {
	used := ""
	for _, h := range m.held {
		used += string(h.letter)
	}
	for _, h := range m.waiting[m.question.Key] {
		used += string(h.Letter)
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

// holdAgain takes up the held curves that a session has for the page. What has no
// answer any more is left out; what takes its time is asked for beside the keys.
func (m *model) holdAgain() {
	kept := m.waiting[m.question.Key]
	delete(m.waiting, m.question.Key)
	for _, k := range kept {
		if !m.question.IsLive(k.Scenario) {
			m.waiting[m.question.Key] = append(m.waiting[m.question.Key], k)
			m.holdLater(k)
			continue
		}
		if a, err := m.ask(k.Scenario); err == nil {
			m.addHeld(k, a)
		}
	}
}

// holdLater asks for a held curve of a session outside of Update.
func (m *model) holdLater(k session.Held) {
	env, ask := m.env, m.question.Ask
	m.do(safely(func() tea.Msg {
		a, err := ask(context.Background(), env, k.Scenario)
		return report(func(m *model) {
			if m.question.Key != k.Page {
				return // it waits until the page is opened again
			}
			m.waiting[k.Page] = slices.DeleteFunc(slices.Clone(m.waiting[k.Page]), func(h session.Held) bool { return h.Letter == k.Letter })
			if err == nil {
				m.addHeld(k, a)
			}
		})
	}))
}

// addHeld adds a held curve of a session.
func (m *model) addHeld(k session.Held, a answer.Answer) {
	if len(a.Figures) > 0 && len(m.held) < mostHeld {
		m.held = append(m.held, newHeld(k.Letter, k.Scenario, a))
		m.redraw()
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
		says := append([]string{string(h.letter)}, m.heldValues(h, long)...)
		if h.says != "" {
			says = append(says, h.says)
		}
		words = append(words, strings.Join(says, " "))
	}
	return m.text("held: " + strings.Join(words, ", "))
}

// heldValues are the size and, where there is room, the matter of a held curve; of
// a population what sets it apart.
func (m *model) heldValues(h held, long bool) (values []string) {
	s := h.scenario
	if !m.question.LooksAt("dry-diameter") {
		return m.heldDifferences(h, long)
	}
	if in, ok := scenario.Find(&s, "dry-diameter"); ok {
		values = append(values, in.Show(m.style()))
	}
	for _, l := range m.question.Lists(&s) {
		if long && l.Len() > 0 {
			values = append(values, l.Show(m.style()))
		}
	}
	return values
}

// heldDifferences are the slots of the statement in which a held scenario differs
// from the present one or from another held one; the first of them where there is
// little room.
func (m *model) heldDifferences(h held, long bool) (values []string) {
	s := h.scenario
	for _, slot := range slotsOf(m.question, s) {
		own, _ := shownAt(&s, slot, m.style())
		differs := false
		for _, other := range append([]held{{scenario: m.scenario}}, m.held...) {
			text, there := shownAt(&other.scenario, slot, m.style())
			differs = differs || there && text != own
		}
		if !differs {
			continue
		}
		if in, ok := scenario.Find(&s, slot); ok && in.Kind() == scenario.Number {
			own = in.Says() + " " + own
		}
		if values = append(values, own); !long {
			return values
		}
	}
	return values
}

// shownAt is the value of a slot.
func shownAt(s *scenario.Scenario, slot scenario.Path, st scenario.Style) (string, bool) {
	if in, ok := scenario.Find(s, slot); ok {
		return in.Show(st), true
	}
	for _, l := range scenario.Lists(s) {
		if l.Key() == string(slot) {
			return l.Show(st), true
		}
	}
	return "", false
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
