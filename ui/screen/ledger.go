package screen

import (
	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// ledgerPage is the key of the question that takes answers apart.
const ledgerPage = "ledger"

// turnToLedger opens the ledger of the answer on the page, and leads back from it to
// the page that it was opened from.
func (m *model) turnToLedger() {
	if m.question.Key == ledgerPage {
		m.leaveLedger()
		return
	}
	q, ok := m.questionOf(ledgerPage)
	if !ok {
		return
	}
	from := m.question
	m.backTo = from.Key
	isOf := answer.HasLedger(from.Key)
	isAnother := isOf && m.scenario.LedgerOf != from.Key
	m.stopWork()
	if isAnother {
		before := m.scenario
		m.scenario = before.Clone()
		m.scenario.LedgerOf, m.scenario.LedgerRow = from.Key, 1
		m.history.Add("of", before, m.scenario, false)
		m.keep()
	}
	m.openPage(q)
	if isAnother {
		m.shown = 0
		m.redraw()
	}
	if !isOf {
		m.say(from.Title + " has no ledger of its own: this is that of " + m.titleOf(m.scenario.LedgerOf))
	}
}

// leaveLedger goes back to where the ledger was opened, or to the page that it is of.
func (m *model) leaveLedger() {
	to := m.backTo
	if to == "" {
		to = m.scenario.LedgerOf
	}
	if q, ok := m.questionOf(to); ok {
		m.openPage(q)
	}
}

func (m *model) questionOf(key string) (answer.Question, bool) {
	for _, q := range m.questions {
		if q.Key == key {
			return q, true
		}
	}
	return answer.Question{}, false
}

func (m *model) titleOf(key string) string {
	q, _ := m.questionOf(key)
	return q.Title
}

// sameFor reports whether both scenarios ask the same of a question: what only a
// ledger looks at does not count elsewhere.
func sameFor(q answer.Question, a, b scenario.Scenario) bool {
	if !q.LooksAt("of") {
		a, b = scenario.WithoutLedger(a), scenario.WithoutLedger(b)
	}
	return a.Equal(b)
}

// ledgerHelp is what the key does on a page.
func ledgerHelp(page string) string {
	if page == ledgerPage {
		return "back"
	}
	return "ledger"
}
