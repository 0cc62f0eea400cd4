package solutes

import (
	"math"
	"testing"
)

// Limited solubility counts where a model joins it, and is said where none does.
func TestDissolveJoined(t *testing.T) {
	part := func(name string, share float64) Part {
		s, ok := Standard().Find(name)
		if !ok {
			t.Fatalf("no substance %q", name)
		}
		return Part{Substance: s, Volume: share}
	}
	for _, c := range []struct {
		name  string
		parts []Part
		rule  SolubilityRule
		kept  bool
		note  string
	}{
		{"κ stands in for ion interaction", []Part{part("adipic acid", 1)}, LimitedSolubility, true, ""},
		{"with a salt", []Part{part("adipic acid", 0.5), part("ammonium sulfate", 0.5)}, LimitedSolubility, false, "solubility-not-limited"},
		{"complete is complete", []Part{part("adipic acid", 1)}, Complete, false, ""},
		{"nothing sparingly soluble", []Part{part("ammonium sulfate", 1)}, LimitedSolubility, false, ""},
	} {
		d, notes, err := DissolveJoined(Recipe{Parts: c.parts, Model: IonInteraction, Kappa: math.NaN(), VantHoffFactor: math.NaN(),
			Solubility: c.rule, Temperature: room})
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if _, kept := d.Solution.(*Limited); kept != c.kept {
			t.Errorf("%s: solution %T", c.name, d.Solution)
		}
		said := ""
		for _, n := range notes {
			if n.Code == "solubility-not-limited" {
				said = n.Code
			}
		}
		if said != c.note {
			t.Errorf("%s: note %q, want %q", c.name, said, c.note)
		}
	}
}
