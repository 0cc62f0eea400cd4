package answer

import (
	"context"
	"math"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// A mobility diameter with a shape factor above 1 stands for a smaller sphere.
func TestMobilitySize(t *testing.T) {
	sphere := facts(t, asked(t, "dry-size-is=mobility", "shape-factor=1"))
	cube := facts(t, asked(t, "dry-size-is=mobility", "shape-factor=1.08"))
	plain := facts(t, asked(t))
	if sphere.CriticalSupersaturation != plain.CriticalSupersaturation {
		t.Errorf("a sphere's mobility diameter changes the crest from %v to %v", plain.CriticalSupersaturation, sphere.CriticalSupersaturation)
	}
	if !(cube.CriticalSupersaturation > sphere.CriticalSupersaturation) {
		t.Errorf("the cube's crest %v is not above the sphere's %v", cube.CriticalSupersaturation, sphere.CriticalSupersaturation)
	}
}

// Shares by mass are turned into shares by volume with the densities.
func TestSharesByMass(t *testing.T) {
	s := scene(t, "component=density=1000kg/m3 kappa=0.2 share=0.5", "component=density=3000kg/m3 kappa=0.6 share=0.5",
		"shares-by=mass", "water-activity=kappa")
	r, notes, err := newRecipe(Env{}, s)
	if err != nil || len(notes) > 0 {
		t.Fatal(notes, err)
	}
	if v := r.Parts[0].Volume; math.Abs(v-0.75) > 1e-15 {
		t.Errorf("volume share %g, want 0.75", v)
	}
}

func TestRefusedParticles(t *testing.T) {
	for name, c := range map[string]struct {
		change func(*scenario.Scenario)
		input  string
		says   string
	}{
		"unknown substance": {func(s *scenario.Scenario) { s.Components[0].Substance = "amonium sulfat" }, "component", "did you mean ammonium sulfate"},
		"nothing at all":    {func(s *scenario.Scenario) { s.Components = nil }, "component", "name a substance"},
		"mass without density": {func(s *scenario.Scenario) {
			s.SharesBy = "mass"
			s.Components = append(s.Components, scenario.Component{Share: 1, Kappa: scenario.Measure{Number: 0.1},
				Density: scenario.Measure{Word: "catalogue"}, MolarMass: scenario.Measure{Word: "catalogue"}, Ions: scenario.Measure{Word: "catalogue"}})
		}, "component", "give density="},
		"no share": {func(s *scenario.Scenario) { s.Components[0].Share = 0 }, "component", "greater than 0"},
	} {
		t.Run(name, func(t *testing.T) {
			s := scenario.Default()
			c.change(&s)
			_, err := askCurve(context.Background(), Env{}, s)
			in, ok := err.(*InputError)
			if !ok {
				t.Fatalf("error %v, want an *InputError", err)
			}
			if in.Input != c.input || !strings.Contains(in.Text, c.says) {
				t.Errorf("%s: %q, want %s with %q", in.Input, in.Text, c.input, c.says)
			}
		})
	}
}
