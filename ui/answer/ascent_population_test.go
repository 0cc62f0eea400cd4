package answer

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"
)

// Particles that differ among one another rise, and their parts add up.
func TestAscentOfMixtures(t *testing.T) {
	both := []string{"population=modes", "ascent-bins=30", "water-activity=kappa", "solubility=complete", "component=ammonium sulfate share=0.5", "component=succinic acid share=0.5"}
	_, internal := rises(t, scene(t, both...))
	_, external := rises(t, scene(t, append(both, "mixing=external")...))
	_, spread := rises(t, scene(t, append(both, "kappa-spread=1.5")...))
	for name, f := range map[string]AscentFacts{"external": external, "spread": spread} {
		if !(math.Abs(float64(f.Particles/internal.Particles)-1) < 1e-6) {
			t.Errorf("%s: %g particles, want %g", name, f.Particles, internal.Particles)
		}
		if f.Droplets == internal.Droplets {
			t.Errorf("%s: as many droplets as internally mixed", name)
		}
		if len(f.ByMode) != 2 || !math.IsNaN(float64(f.ByMode[0].Critical)) {
			t.Errorf("%s: modes %+v", name, f.ByMode)
		}
		if sum := f.ByMode[0].Droplets + f.ByMode[1].Droplets; !(math.Abs(float64(sum/f.Droplets)-1) < 1e-12) {
			t.Errorf("%s: modes add up to %g, want %g", name, sum, f.Droplets)
		}
	}
}

// Salt by ion interaction activates much like its κ.
func TestAscentOfSalt(t *testing.T) {
	values := []string{"population=modes", "ascent-bins=30"}
	_, salt := rises(t, scene(t, values...))
	_, kappa := rises(t, scene(t, append(values, "water-activity=kappa")...))
	if !(math.Abs(float64(salt.Droplets/kappa.Droplets)-1) < 0.02) {
		t.Errorf("%g droplets by ion interaction, %g by kappa", salt.Droplets, kappa.Droplets)
	}
	if !math.IsNaN(float64(salt.Sensitivities.Kappa)) || math.IsNaN(float64(kappa.Sensitivities.Kappa)) {
		t.Errorf("answers to kappa: %g and %g", salt.Sensitivities.Kappa, kappa.Sensitivities.Kappa)
	}
}

// Particles that take up no water are counted; nothing grows on them.
func TestAscentOfDryParticles(t *testing.T) {
	s := withRows(t, modesOfKappa(t, "follow=80nm"), "mode", "N=850/cm3 Dg=45nm gsd=1.6 kappa=0", "N=1/cm3 Dg=150nm gsd=1.6 kappa=0")
	a, f := rises(t, s)
	if len(f.Followed) != 0 || !slices.Contains(codes(a), "follow-outside") || !slices.Contains(codes(a), "stays-dry") {
		t.Errorf("%d sizes are followed, notes %q", len(f.Followed), codes(a))
	}
	for _, c := range f.ClosedForms {
		if c.Problem == nil || !math.IsNaN(float64(c.Droplets)) {
			t.Errorf("%s says %g", c.Method, c.Droplets)
		}
	}
	if says := strings.Join(a.Finding, " "); !strings.Contains(says, "The closed forms say nothing") {
		t.Errorf("finding %q", says)
	}
	texts(t, a.Facts)
}

// Counts of modes of several airs cannot be added, and that is said.
func TestModesOfSeveralAirs(t *testing.T) {
	for air, want := range map[string]bool{"start": false, "stp": true} {
		s := modesOfKappa(t)
		s.Modes[0].Air = air
		a, err := askSpectrum(context.Background(), Env{}, s)
		if err != nil {
			t.Fatal(err)
		}
		if got := slices.Contains(codes(a), "modes-of-several-airs"); got != want {
			t.Errorf("%s: notes %q", air, codes(a))
		}
		if b, _ := rises(t, s); slices.Contains(codes(b), "modes-of-several-airs") {
			t.Error("the ascent brings them to one air and says that it does not")
		}
	}
}
