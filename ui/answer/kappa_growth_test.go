package answer

import (
	"context"
	"errors"
	"strings"
	"testing"

	"dropcrest/koehler/kappa"
	"dropcrest/ui/fieldfile"
)

// A distribution with all particles in one narrow bin has the κ of that growth
// factor, and shares are kept whatever they add up to.
func TestGrowthFactors(t *testing.T) {
	s := points(t, []string{"dry-diameter=100nm growth-factor=1.4 relative-humidity=90%"}, "growth-factors=g.csv", "trials=0")
	for name, text := range map[string]string{
		"limits":  "growth_factor_low,growth_factor_high,share\n1.4999,1.5001,40\n1.5001,1.6,0\n",
		"middles": "growth_factor,share\n1.4998,0\n1.5,7\n1.5002,0\n",
	} {
		a, err := askKappa(context.Background(), opening(text), s)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		f := a.Facts.(KappaFacts)
		want, err := kappa.FromGrowth(100e-9, 1.5, 0.9, conventionOf(s))
		if err != nil {
			t.Fatal(err)
		}
		within(t, name+": mean", f.Growth.Mean, want.Kappa, 1e-4)
		within(t, name+": κ of the mean growth factor", f.Kappa, want.Kappa, 1e-9)
		if last := a.Finding[len(a.Finding)-1]; !strings.Contains(last, "Over the particles κ is") {
			t.Errorf("%s: %q", name, last)
		}
		total := 0.0
		for _, table := range a.Tables {
			if table.Key != "growth" {
				continue
			}
			for _, row := range table.Rows {
				total += row[2].(float64)
			}
		}
		within(t, name+": shares", Number(total), 1, 1e-12)
	}
}

func TestGrowthFactorsRefused(t *testing.T) {
	growth := "dry-diameter=100nm growth-factor=1.4 relative-humidity=90%"
	for name, c := range map[string]struct{ row, text, why string }{
		"activation": {"dry-diameter=100nm supersaturation=0.2%", "growth_factor,share\n1.4,1\n1.5,1\n", "one of activation"},
		"header":     {growth, "size,share\n1,1\n", "g.csv:1: no growth factors and shares"},
		"word":       {growth, "growth_factor,share\n1.4,1\n1.5,much\n", "g.csv:3:5: \"much\" is no number"},
		"falls":      {growth, "growth_factor,share\n1.5,1\n1.4,1\n", "do not rise"},
		"one":        {growth, "growth_factor,share\n1.5,1\n", "fewer than two"},
		"nothing":    {growth, "growth_factor_low,growth_factor_high,share\n", ""},
		"no shares":  {growth, "growth_factor,share\n1.4,0\n1.5,0\n", ""},
		"overlap":    {growth, "growth_factor_low,growth_factor_high,share\n1.4,1.6,1\n1.5,1.7,1\n", ""},
	} {
		_, err := askKappa(context.Background(), opening(c.text), points(t, []string{c.row}, "growth-factors=g.csv", "trials=0"))
		var input *InputError
		var content *fieldfile.Error
		if !errors.As(err, &input) && !errors.As(err, &content) || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%s: %v, want %q", name, err, c.why)
		}
	}
}
