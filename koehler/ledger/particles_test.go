package ledger

import (
	"errors"
	"testing"

	"dropcrest/koehler"
	"dropcrest/solutes"
)

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

// A particle that is off by an input is the one that was asked for with the other
// value: size, tension that was given, κ.
func TestDeviated(t *testing.T) {
	a := oneKappa(0.3, 50e-9, 298.15)
	a.Recipe.TensionRule, a.Recipe.Tension = solutes.FixedTension, 0.06
	l := ledgerOf(t, a)
	inputs := l.Inputs()
	for q, c := range map[Quantity]struct {
		off  float64
		asks func(*Asked)
	}{
		DryDiameter:    {10e-9, func(a *Asked) { a.DryDiameter = 60e-9 }},
		SurfaceTension: {0.003, func(a *Asked) { a.Recipe.Tension = 0.063 }},
		Hygroscopicity: {0.06, func(a *Asked) { a.Recipe.Kappa = 0.36 }},
		Temperature:    {2, func(a *Asked) { a.Recipe.Temperature = 300.15 }},
	} {
		other := a
		c.asks(&other)
		var x Deviation
		x[q] = c.off
		p, err := l.Deviated(inputs, &x)
		if err != nil {
			t.Fatal(err)
		}
		want := ledgerOf(t, other)
		within(t, q.String(), crest(t, p)/crest(t, want.Particle()), 1, 1e-9)
	}
	for _, q := range []Quantity{Hygroscopicity, SurfaceTension} {
		var x Deviation
		x[q] = -1
		if _, err := l.Deviated(inputs, &x); !errors.Is(err, koehler.ErrInput) {
			t.Errorf("%s is off by more than its value: %v", q, err)
		}
	}
}
