package screen

import (
	"strings"

	"dropcrest/ui/scenario"
)

// rowForm is how a list of rows reads. Slots that its row does not name stand
// below the chosen row.
type rowForm struct {
	head   string   // the line above; {key} is an input of the scenario
	above  []string // the inputs in head
	row    string   // {key} is an input of the row
	first  []string // the inputs in row
	shares bool     // the rows are parts of a particle, with their kappa and sums
	typed  bool     // a new row is nothing before its first text is typed
}

// forms are the sentences of the lists that have one.
var forms = map[string]rowForm{
	"component": {head: "The particle is made of:", row: "{share} of {substance}", first: []string{"share", "substance"}, shares: true},
	"mode":      {head: "The modes of the population:", row: "{N} with median {Dg}, gsd {gsd}", first: []string{"N", "Dg", "gsd"}},
	"data":      {head: "Measured files, merged on time:", row: "{file}, clock offset {offset}", first: []string{"file", "offset"}, typed: true},
	"map":       {head: "What columns hold, where the guess is wrong, as column=quantity:", row: "{column}", first: []string{"column"}, typed: true},
}

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
