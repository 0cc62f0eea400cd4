package command

import (
	"slices"
	"testing"

	"dropcrest/ui/scenario"
)

// Every input and every list of rows has its place among the options, and no
// place is left for one that does not exist.
func TestEveryInputIsAnOption(t *testing.T) {
	var placed []string
	for _, g := range inputGroups() {
		for _, key := range g.keys {
			if slices.Contains(placed, key) {
				t.Errorf("%s stands twice", key)
			}
			placed = append(placed, key)
		}
	}
	s := scenario.Default()
	var want []string
	for _, in := range scenario.Inputs(&s) {
		if string(in.Path()) == in.Key() {
			want = append(want, in.Key())
		}
	}
	for _, l := range scenario.Lists(&s) {
		want = append(want, l.Key())
	}
	slices.Sort(placed)
	slices.Sort(want)
	if !slices.Equal(placed, want) {
		t.Errorf("options %q, want %q", placed, want)
	}
	root := newRoot(world{env: func(string) string { return "" }})
	curve, _, err := root.Find([]string{"curve"})
	if err != nil {
		t.Fatal(err)
	}
	for _, key := range want {
		if curve.Flags().Lookup(key) == nil {
			t.Errorf("dropcrest curve has no --%s", key)
		}
	}
}
