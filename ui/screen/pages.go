package screen

import (
	"fmt"

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
	if r := m.reply; r != nil && r.scenario.Equal(m.scenario) {
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
	m.keys.NextRecord.SetEnabled(m.answer.Records > 0)
	m.keys.RecordBefore.SetEnabled(m.answer.Records > 0)
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

// recordPath is the input that says which record is looked at.
const recordPath scenario.Path = "record"

// goToRecord looks at the next record or the one before; from all of them at the
// first or the last one.
func (m *model) goToRecord(by int) {
	last := m.answer.Records
	at := m.scenario.Record
	to := int(at.Number) + by
	switch {
	case at.Word != "" && by > 0:
		to = 1
	case at.Word != "":
		to = last
	case to < 1:
		m.say("this is the first record")
		return
	case to > last:
		m.say(fmt.Sprintf("record %d is the last one", last))
		return
	}
	err := m.change(recordPath, true, func(s *scenario.Scenario) error {
		in, err := find(s, recordPath)
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

// recordWords say which record is looked at, "" without data.
func (m *model) recordWords() string {
	switch n := m.answer.Records; {
	case n == 0:
		return ""
	case m.scenario.Record.Word != "":
		return fmt.Sprintf("all of %d records", n)
	default:
		return fmt.Sprintf("record %.0f of %d", m.scenario.Record.Number, n)
	}
}
