//go:build unix && !race

package command_test

import (
	"strconv"
	"strings"
	"testing"
)

// The pages that measured data lead to, in the whole program: each says what its
// command says, shows its pictures one after the other and gives the terminal back.
func TestPagesOnScreen(t *testing.T) {
	t.Parallel()
	for name, c := range map[string]struct {
		tabs     int
		says     string   // with the number to compare
		key      []string // where the command has that number
		pictures []string // after the first one
	}{
		"spectrum": {1, `takes ([0-9.]+)\.`, []string{"kappa"}, []string{"dry diameter, nm"}},
		"counter":  {3, `S = \(([0-9.]+) ±`, []string{"line", "slope_percent_per_k"}, []string{"activated fraction against mobility diameter", "scan less line"}},
		"ledger":   {5, `Largest cost: "[^"]+", (-[0-9.]+) %`, []string{"assumptions", "0", "change_in_critical_supersaturation_percent"}, []string{"what each input leaves open"}},
		"ascent":   {4, `peaks at ([0-9.]+) %`, []string{"peak_supersaturation_percent"}, []string{"wet radius", "updraft"}},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			u := newUser(t)
			s := u.run(t, 80, 24)
			s.sees("dry particle")
			s.types(strings.Repeat("\t", c.tabs))
			seen := s.sees(c.says)[1]
			for _, picture := range c.pictures {
				s.types("v")
				s.sees(picture)
			}
			var facts any
			u.facts(t, name, &facts)
			for _, key := range c.key {
				facts = within(t, facts, key)
			}
			x, ok := facts.(float64)
			if !ok {
				t.Fatalf("%v is %v, no number", c.key, facts)
			}
			agrees(t, seen, x)
			s.types("q")
			s.ends(0)
			s.restored()
		})
	}
}

// within is what a key or, of a list, a number leads to.
func within(t *testing.T, facts any, key string) any {
	t.Helper()
	switch of := facts.(type) {
	case map[string]any:
		return of[key]
	case []any:
		if i, err := strconv.Atoi(key); err == nil && i < len(of) {
			return of[i]
		}
	}
	t.Fatalf("no key %s in %v", key, facts)
	return nil
}
