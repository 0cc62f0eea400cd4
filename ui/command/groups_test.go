package command

import (
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// Every input and every list of rows is an option of the questions that look at
// it, some question looks at each, and no place is left for one that does not
// exist.
func TestEveryInputIsAnOption(t *testing.T) {
	s := scenario.Default()
	var want, placed []string
	for _, in := range scenario.Inputs(&s) {
		if string(in.Path()) == in.Key() {
			want = append(want, in.Key())
		}
	}
	for _, l := range scenario.Lists(&s) {
		want = append(want, l.Key())
	}
	root := newRoot(world{env: func(string) string { return "" }})
	for _, q := range answer.Questions() {
		cmd, _, err := root.Find([]string{q.Key})
		if err != nil {
			t.Fatal(err)
		}
		var own []string
		for _, g := range q.Groups {
			for option, path := range g.Options() {
				// the ledger has the options of all its pages, which call bins otherwise
				if slices.Contains(own, string(path)) && option != "bins-file" {
					t.Errorf("%s: %s stands twice", q.Key, path)
				}
				if cmd.Flags().Lookup(option) == nil {
					t.Errorf("dropcrest %s has no --%s", q.Key, option)
				}
				if !strings.Contains(string(path), "[") { // no input of a row
					own = append(own, string(path))
				}
			}
		}
		placed = append(placed, own...)
	}
	slices.Sort(placed)
	slices.Sort(want)
	if placed = slices.Compact(placed); !slices.Equal(placed, want) {
		t.Errorf("options %q, want %q", placed, want)
	}
}
