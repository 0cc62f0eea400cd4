package screen

import (
	"fmt"

	"github.com/charmbracelet/bubbles/key"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// Pages, pictures of a page, and records of the data.

func newLeaf() leaf { return leaf{frames: map[string]figure.Frame{}} }

// turn goes to another page; the scenario is one for all of them. A page that
// was left comes back with its cursor, its picture and what was held on it.
func (m *model) turn(by int) {
	n := len(m.questions)
	for i, q := range m.questions {
		if q.Key == m.question.Key {
			m.openPage(m.questions[(i+by+n)%n])
			return
		}
	}
}

// openPage shows another question. Its answer is asked for again only if the
// scenario has changed since the page was left.
func (m *model) openPage(q answer.Question) {
	m.stopWork()
	m.putAside()
	known := false
	m.question = q
	if m.leaf, known = m.leaves[q.Key]; !known {
		m.leaf = newLeaf()
	}
	m.answer, m.unsolved, m.work.old = answer.Answer{}, "", false
	if r := m.reply; r != nil && sameFor(q, r.scenario, m.scenario) {
		m.accept(r.answer)
	} else {
		m.answerFirst()
	}
	m.reply = nil
	m.holdAgain()
	m.settle(0)
	m.history.EndRun()
}

// putAside keeps the leaf of the open page.
func (m *model) putAside() {
	m.reply = nil
	if m.unsolved == "" && !m.work.old && len(m.answer.Finding) > 0 {
		m.reply = &reply{m.scenario, m.answer}
	}
	m.leaves[m.question.Key] = m.leaf
}

// offerKeys makes the keys act that the answer has a use for.
func (m *model) offerKeys() {
	m.keys.Picture.SetEnabled(len(m.answer.Figures) > 1)
	m.keys.Hold.SetEnabled(m.hasCurve())
	m.keys.NextRecord.SetEnabled(m.answer.Records > 0)
	m.keys.RecordBefore.SetEnabled(m.answer.Records > 0)
	for _, b := range []*key.Binding{&m.keys.NextRecord, &m.keys.RecordBefore} {
		b.SetHelp(b.Help().Key, m.question.Through().Says)
	}
	m.keys.Ledger.SetHelp(m.keys.Ledger.Help().Key, ledgerHelp(m.question.Key))
}

// hasCurve tells whether the answer has a line that can be held; bars have none.
func (m *model) hasCurve() bool {
	return len(m.answer.Figures) == 0 || len(m.answer.Figures[0].Bars) == 0
}

// nextPicture shows the next figure of the answer.
func (m *model) nextPicture() {
	n := len(m.answer.Figures)
	m.shown = (m.shownFigure() + 1) % n
	m.say(fmt.Sprintf("picture %d of %d", m.shown+1, n))
	m.redraw()
}

// shownFigure is the place of the figure that is shown: an answer may have fewer
// than the one before.
func (m *model) shownFigure() int {
	if m.shown < len(m.answer.Figures) {
		return m.shown
	}
	return 0
}

// goToRecord looks at the next record of data, or row of a ledger, or the one before;
// from all of them at the first or the last one.
func (m *model) goToRecord(by int) {
	last := m.answer.Records
	of := m.question.Through()
	at, isNumber := m.turnedTo(of)
	to := at + by
	switch {
	case !isNumber && by > 0:
		to = 1
	case !isNumber:
		to = last
	case to < 1:
		m.say("this is the first " + of.Says)
		return
	case to > last:
		m.say(fmt.Sprintf("%s %d is the last one", of.Says, last))
		return
	}
	err := m.change(of.Path, true, func(s *scenario.Scenario) error {
		in, err := find(s, of.Path)
		if err != nil {
			return err
		}
		return in.Set(fmt.Sprint(to))
	})
	if err != nil {
		m.say(stopped(err))
		return
	}
	m.say("")
}

// turnedTo is the record or row that is asked for; false where all are.
func (m *model) turnedTo(of answer.Turns) (n int, isNumber bool) {
	in, ok := scenario.Find(&m.scenario, of.Path)
	if !ok {
		return 0, false
	}
	_, value := in.SI()
	x, isNumber := value.(float64)
	return min(int(x), m.answer.Records), isNumber
}

// recordWords say which record is looked at, "" without data.
func (m *model) recordWords() string {
	of := m.question.Through()
	at, isNumber := m.turnedTo(of)
	switch n := m.answer.Records; {
	case n == 0:
		return ""
	case !isNumber:
		return fmt.Sprintf("all of %d %ss", n, of.Says)
	default:
		return fmt.Sprintf("%s %d of %d", of.Says, at, n)
	}
}
