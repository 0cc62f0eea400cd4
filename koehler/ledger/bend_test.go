package ledger

import (
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// A bent particle is the one that is made with the other κ and the other tension,
// whatever its size.
func TestBend(t *testing.T) {
	water := atmos.SurfaceTension(298.15)
	for name, c := range map[string]struct{ of, want koehler.Particle }{
		"water": {
			koehler.Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: solutes.Kappa(0.3)},
			koehler.Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: solutes.Kappa(0.36), Tension: solutes.ConstantTension(1.1 * water)},
		},
		"linear tension": {
			koehler.Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: solutes.Kappa(0.3), Tension: solutes.LinearTension{Water: water, PerDry: 0.03}},
			koehler.Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: solutes.Kappa(0.36), Tension: solutes.LinearTension{Water: 1.1 * water, PerDry: 0.033}},
		},
	} {
		for _, dry := range []float64{30e-9, 200e-9} {
			within(t, name, crest(t, Bend(c.of, 1.2, 1.1).Sized(dry)), crest(t, c.want.Sized(dry)), 1e-12)
		}
	}
	// A salt of half the solute is that of half the share.
	salt := ledgerOf(t, asked(t, "sodium chloride", 80e-9)).full.particle
	half := salt
	half.Solution = salt.Solution.(*solutes.Salt).OfShare(0.5)
	within(t, "half a salt", crest(t, Bend(salt, 0.5, 1)), crest(t, half), 1e-12)
}

// The tension of a film goes along to another dry size, and its solute stays.
func TestBendFilm(t *testing.T) {
	film := ledgerOf(t, filmOf(t, 0.5)).full.particle
	if CanBend(film) {
		t.Error("the solute of a film cannot be bent")
	}
	bent := Bend(film, 2, 1.05)
	for _, dry := range []float64{40e-9, 120e-9} {
		want := film.Sized(dry)
		want.Tension = scaledTension{want.Tension, 1.05}
		if got := crest(t, bent.Sized(dry)); math.Abs(got/crest(t, want)-1) > 1e-9 {
			t.Errorf("%g m: %v, want %v", dry, got, crest(t, want))
		}
	}
}

// Particles are those whose answers the row compares.
func TestParticlesOfARow(t *testing.T) {
	for _, name := range []string{"ammonium sulfate", "adipic acid"} {
		for _, r := range ledgerOf(t, asked(t, name, 80e-9)).Rows {
			simple, full, ok := r.Particles()
			if want := r.Status == Known && r.Key != TextbookCubic; ok != want {
				t.Errorf("%s, %s: particles %t, want %t", name, r.Key, ok, want)
			}
			if ok {
				within(t, string(r.Key), crest(t, simple), r.Simplified.Values[CriticalSupersaturation], 0)
				within(t, string(r.Key)+", full", crest(t, full), r.Full.Values[CriticalSupersaturation], 0)
			}
		}
	}
}
