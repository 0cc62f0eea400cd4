package answer

import (
	"slices"
	"strings"
	"testing"
)

// What a scientist would miss is said, and nothing is said twice or of the wrong
// particle.
func TestWordsOfTheFinding(t *testing.T) {
	for name, c := range map[string]struct {
		values     []string
		code       string // among the notes, "" for none
		says, hush string
	}{
		"growth factor":         {nil, "", "it is haze of 0.102 µm radius (growth factor 2.03)", ""},
		"few molecules":         {[]string{"dry-diameter=1nm"}, "few-molecules", "has about 33 molecules of water", ""},
		"many molecules":        {[]string{"dry-diameter=20nm"}, "", "", "molecules"},
		"drops that freeze":     {[]string{"temperature=-40C"}, "freezes-by-itself", "freeze without an ice nucleus", ""},
		"supercooled":           {[]string{"temperature=-20C"}, "", "", "freeze"},
		"above the crest, once": {[]string{"relative-humidity=101%"}, "humidity-above-crest", "it has no equilibrium size", "is not below the crest"},
		"no molar mass":         {[]string{"component=mineral dust"}, "", "water activity 0.99564, 182 layers of adsorbed water)", "mol/kg"},
		"crystallises at":       {[]string{"relative-humidity=60%", "humidity-history=falling"}, "", "growth factor 1.27), down to 35.7 %;", ""},
		"when is not known":     {[]string{"component=sodium nitrate", "relative-humidity=50%"}, "", "unless it has crystallised: at which humidity is not known", "NaN"},
		"never crystallises":    {[]string{"component=ammonium nitrate", "relative-humidity=50%"}, "", "which is not seen to crystallise", "down to"},
		"no humidity dissolves": {[]string{"component=potassium nitrate", "temperature=-15C", "relative-humidity=50%", "humidity-history=falling"}, "", "it is a supersaturated drop", "NaN"},
		"dry in a cloud":        {[]string{"component=potassium sulfate", "dry-diameter=10nm", "relative-humidity=100.5%"}, "", "At 100.5 % humidity it is dry and takes up water from 105.0 % on (97.3 % over a flat surface); after falling humidity it is a supersaturated drop", "a drop larger than 0.00"},
		"never dissolves":       {[]string{"component=potassium nitrate", "dry-diameter=5nm", "relative-humidity=101%"}, "no-phase-branch", "", ""},
		"dissolved in a cloud":  {[]string{"relative-humidity=100.1%"}, "", "it is haze of", "dry and"},
		"large soot":            {[]string{"component=black carbon", "dry-diameter=2000nm"}, "", "must be wetted", "giant"},
		"large dust":            {[]string{"component=quartz", "dry-diameter=2000nm"}, "", "layers", "kinetics"},
		"crest once dissolved":  {[]string{"component=succinic acid", "water-activity=kappa"}, "", "Already dissolved it activates", "There is no crest in solution"},
	} {
		t.Run(name, func(t *testing.T) {
			a := asked(t, c.values...)
			all := strings.Join(a.Finding, " ")
			if !strings.Contains(all, c.says) || c.hush != "" && strings.Contains(all, c.hush) {
				t.Errorf("finding %q, want %q in it and not %q", all, c.says, c.hush)
			}
			if strings.Contains(all+strings.Join(a.Why, " "), "NaN") {
				t.Errorf("a number that is none in %q, %q", all, a.Why)
			}
			if c.code != "" && !slices.Contains(codes(a), c.code) {
				t.Errorf("notes %q, want %q among them", codes(a), c.code)
			}
		})
	}
}
