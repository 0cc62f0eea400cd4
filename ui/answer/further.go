package answer

import (
	"slices"

	"dropcrest/ui/scenario"
)

// Further is the slot of a statement behind which everything lies that the
// sentence does not name: what is at its usual value, and what only concerns
// tables and pictures.
const Further scenario.Path = "further"

// FurtherInputs are the inputs that a question looks at and that have no slot of
// their own in its statement; those of rows stand with their rows.
func FurtherInputs(q Question, s *scenario.Scenario) []scenario.Input {
	named := slots(q, *s)
	var out []scenario.Input
	for _, in := range q.Inputs(s) {
		if in.Used() && q.Heeds(*s, in.Path()) && !slices.Contains(named, in.Key()) {
			out = append(out, in)
		}
	}
	return out
}

// FurtherLists are the lists of rows without a slot of their own.
func FurtherLists(q Question, s *scenario.Scenario) []scenario.RowList {
	named := slots(q, *s)
	return slices.DeleteFunc(q.Lists(s), func(l scenario.RowList) bool {
		return slices.Contains(named, l.Key()) || !q.Heeds(*s, scenario.Path(l.Key()))
	})
}

// slots are the names of the slots of a statement in their order.
func slots(q Question, s scenario.Scenario) []string {
	var named []string
	for _, clause := range q.Statement(s) {
		Fill(clause, func(slot string) string {
			named = append(named, slot)
			return ""
		})
	}
	return named
}

// FurtherWords stand in the slot Further.
func FurtherWords(q Question, s scenario.Scenario) string {
	for _, in := range FurtherInputs(q, &s) {
		if !in.IsDefault() {
			return "as set"
		}
	}
	return "as usual"
}
