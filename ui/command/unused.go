package command

import (
	"dropcrest/atmos"
	"dropcrest/ui/scenario"
)

// unused are notes on options that were given and do not count.
func (o *options) unused(s *scenario.Scenario) []atmos.Note {
	var notes []atmos.Note
	said := map[string]bool{}
	for _, g := range o.given {
		p := o.pathOf(g)
		in, ok := scenario.Find(s, p)
		if said[g.key] || o.question.Heeds(*s, p) && (ok && o.question.Uses(in) || !ok && countsIn(string(p), s)) {
			continue
		}
		said[g.key] = true
		notes = append(notes, unusedNote(scenario.Path(g.key), "The option --"+g.key))
	}
	if o.fromFile == "" {
		return notes
	}
	for _, in := range o.question.Inputs(s) {
		if o.question.Heeds(*s, in.Path()) && !o.question.Uses(in) && !in.IsDefault() && !said[string(in.Path())] {
			notes = append(notes, unusedNote(in.Path(), "The value of "+string(in.Path())+" in the scenario file"))
		}
	}
	for _, l := range o.question.Lists(s) {
		if o.question.Heeds(*s, scenario.Path(l.Key())) && !countsIn(l.Key(), s) && !said[l.Key()] && !hasDefaultRows(l) {
			notes = append(notes, unusedNote(scenario.Path(l.Key()), "What the scenario file says of "+l.Key()))
		}
	}
	return notes
}

func unusedNote(at scenario.Path, what string) atmos.Note {
	return atmos.Note{Code: "input-unused", Input: string(at),
		Text: what + " is not used: with the other values as they are, nothing depends on it."}
}
