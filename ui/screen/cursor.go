package screen

import (
	"slices"
	"strings"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// slots are the places of the cursor: the slots of the statement in their order,
// then the finding.
func (m *model) slots() []scenario.Path { return append(slotsOf(m.question, m.scenario), finding) }

// slotsOf are the slots of the statement of a scenario.
func slotsOf(q answer.Question, s scenario.Scenario) (out []scenario.Path) {
	for _, clause := range q.Statement(s) {
		answer.Fill(clause, func(slot string) string {
			out = append(out, scenario.Path(slot))
			return ""
		})
	}
	return out
}

// place is the cursor's place among the slots, 0 if its slot is gone.
func (m *model) place() int { return max(slices.Index(m.slots(), m.cursor), 0) }

// settle puts the cursor to a place unless its slot is still there.
func (m *model) settle(place int) {
	slots := m.slots()
	if !slices.Contains(slots, m.cursor) {
		m.cursor = slots[min(place, len(slots)-1)]
	}
}

// move moves the cursor by some places, without going round.
func (m *model) move(by int) {
	slots := m.slots()
	m.cursor = slots[min(max(m.place()+by, 0), len(slots)-1)]
}

// jump puts the cursor onto the slot of an input, or onto the list it belongs to.
func (m *model) jump(p scenario.Path) {
	list, _, _ := strings.Cut(string(p), "[")
	for _, slot := range m.slots() {
		if slot == p || string(slot) == list {
			m.cursor = slot
			return
		}
	}
	if m.question.LooksAt(list) && slices.Contains(m.slots(), answer.Further) {
		m.cursor = answer.Further
	}
}
