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
	var named []string
	for _, clause := range q.Statement(*s) {
		Fill(clause, func(slot string) string {
			named = append(named, slot)
			return ""
		})
	}
	var out []scenario.Input
	for _, in := range scenario.Inputs(s) {
		own := string(in.Path()) == in.Key()
		if own && in.Used() && !slices.Contains(named, in.Key()) {
			out = append(out, in)
		}
	}
	return out
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
