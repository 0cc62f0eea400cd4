package screen

import (
	"strings"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// rowForm is how a list of rows reads. Slots that its row does not name stand
// below the chosen row.
type rowForm struct {
	head   string   // the line above; {key} is an input of the scenario
	above  []string // the inputs in head
	row    string   // {key} is an input of the row; where it is too long it goes on below at a line break
	first  []string // the inputs in row
	shares bool     // the rows are parts of a particle, with their kappa and sums
	typed  bool     // a new row is nothing before its first text is typed
}

// forms are the sentences of the lists that have one.
var forms = map[string]rowForm{
	"component": {head: "The particle is made of:", row: "{share} of {substance}", first: []string{"share", "substance"}, shares: true},
	"mode":      {head: "The modes of the population:", row: "{N} with median {Dg}, gsd {gsd}", first: []string{"N", "Dg", "gsd"}},
	"data":      {head: "Measured files, merged on time:", row: "{file}, clock offset {offset}", first: []string{"file", "offset"}, typed: true},
	"scans":     {head: "Files of salt scans, one after the other:", row: "{file}", first: []string{"file"}, typed: true},
	"scans-map": {head: "What columns of the scans hold, where the guess is wrong, as column=quantity:", row: "{column}", first: []string{"column"}, typed: true},
	"point":     {head: "The measurements, with their standard uncertainties:", row: "{dry-diameter}\nactivates at {supersaturation}", first: []string{"dry-diameter", "supersaturation"}},
	"map":       {head: "What columns hold, where the guess is wrong, as column=quantity:", row: "{column}", first: []string{"column"}, typed: true},
}

// sentence is how one row reads: a measurement by what was measured.
func (f rowForm) sentence(l scenario.RowList, row []scenario.Input) string {
	if l == nil || l.Key() != "point" {
		return f.row
	}
	if in := ofKey(row, "growth-factor"); in != nil && isMeasured(in) {
		return "{dry-diameter}\ngrew {growth-factor} times\nat {relative-humidity}"
	}
	return f.row
}

// named are the inputs that come first in one row.
func (f rowForm) named(l scenario.RowList, row []scenario.Input) (keys []string) {
	answer.Fill(f.sentence(l, row), func(key string) string {
		keys = append(keys, key)
		return ""
	})
	return keys
}

// ofKey is the input of a row with that key, nil if there is none.
func ofKey(row []scenario.Input, key string) scenario.Input {
	for _, in := range row {
		if in.Key() == key {
			return in
		}
	}
	return nil
}

// isMeasured reports whether an input has a value at all.
func isMeasured(in scenario.Input) bool { return in.Show(scenario.Style{}) != scenario.NotMeasured }

// formOf is the form of a list. One that has no sentence of its own names its
// first inputs.
func formOf(l scenario.RowList) rowForm {
	if l == nil {
		return rowForm{head: "All else in this question:"}
	}
	f, ok := forms[l.Key()]
	switch {
	case !ok:
		f.head = "Rows of " + l.Says() + ":"
		if l.Len() > 0 {
			for _, in := range l.Row(0)[:min(len(l.Row(0)), 2)] {
				f.first = append(f.first, in.Key())
			}
			f.row = "{" + strings.Join(f.first, "}, {") + "}"
		}
	case f.shares && l.Len() > 1: // of one component the share means nothing
		f.head, f.above = "The particle is made of, by {shares-by}:", []string{"shares-by"}
	}
	return f
}
