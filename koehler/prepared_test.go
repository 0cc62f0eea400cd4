package koehler

import (
	"errors"
	"math"
	"testing"

	"dropcrest/solutes"
)

// The parts are those of the curve itself.
func TestPreparedTerms(t *testing.T) {
	p := Particle{DryDiameter: 80e-9, Temperature: 285, Solution: solutes.Kappa(0.4), TolmanLength: 1e-10}
	q, err := p.Prepare()
	if err != nil {
		t.Fatal(err)
	}
	for _, u := range []float64{0.3, 5, 1000} {
		lnS, slope := p.LnSaturation(u)
		lnaw, activity := p.Solution.LnActivity(u)
		got := q.Terms(u)
		for name, c := range map[string][2]float64{
			"ln S": {got.LnActivity + got.LnKelvin, lnS}, "slope": {got.ActivitySlope + got.KelvinSlope, slope},
			"ln aw": {got.LnActivity, lnaw}, "aw slope": {got.ActivitySlope, activity},
			"wet": {got.WetDiameter, p.AtWater(u).WetDiameter},
		} {
			if math.Abs(c[0]-c[1]) > 1e-14*math.Abs(c[1]) {
				t.Errorf("%s at u = %g: %.17g, want %.17g", name, u, c[0], c[1])
			}
		}
	}
	p.DryDiameter = 0
	if _, err := p.Prepare(); !errors.Is(err, ErrInput) {
		t.Errorf("a particle without size: %v", err)
	}
}
