package solutes

import (
	"fmt"
	"math"
	"testing"
)

// Wherever the joint steps start, they end at the same activity: from the table
// and from the guess of infinite dilution, within its nodes and far outside.
func TestStartDoesNotMatter(t *testing.T) {
	for name, parts := range map[string][]MixturePart{
		"three salts":       {{0.5, saltOf(t, "(NH4)2SO4", room)}, {0.3, saltOf(t, "NaCl", room)}, {0.2, saltOf(t, "NaNO3", room)}},
		"salt and organics": {{0.05, saltOf(t, "NaCl", room)}, {0.9, Kappa(0.01)}},
		"one salt":          {{1, saltOf(t, "NH4NO3", room)}},
	} {
		x, err := NewMixture(parts)
		if err != nil {
			t.Fatal(err)
		}
		for i := range 401 {
			u := math.Pow(10, -8+float64(i)/20)
			got, gotSlope := x.LnActivity(u)
			var j joint
			for i := range x.count {
				j.w[i] = x.guess[i] + math.Log(u)
			}
			want, wantSlope, settled := x.settle(&j, u, math.Log(u))
			tol := 1e-13
			if !settled { // that guess is too far off there
				want, wantSlope = x.bisect(u)
				tol = 1e-12
			}
			near(t, fmt.Sprintf("%s: ln a_w at u %v", name, u), got, want, tol)
			near(t, fmt.Sprintf("%s: slope at u %v", name, u), gotSlope, wantSlope, 1e-8)
		}
	}
}

// The table is there to save steps: within its nodes three are enough for salts,
// four where one leaves its range or joins.
func TestStartIsNear(t *testing.T) {
	x, err := NewMixture([]MixturePart{{0.5, saltOf(t, "(NH4)2SO4", room)}, {0.3, saltOf(t, "NaCl", room)}, {0.2, saltOf(t, "NaNO3", room)}})
	if err != nil {
		t.Fatal(err)
	}
	for i := range 160 {
		u := math.Pow(10, float64(i)/20)
		var j joint
		x.start(&j.w, math.Log(u))
		begun := j.w
		x.settle(&j, u, math.Log(u))
		for k := range x.count {
			if d := math.Abs(j.w[k] - begun[k]); d > 0.02 {
				t.Errorf("u %v: the water of part %d starts %v off", u, k, d)
			}
		}
	}
}
