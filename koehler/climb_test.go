package koehler

import (
	"math"
	"strconv"
	"testing"

	"dropcrest/solutes"
)

// The climb ends where the scan of the whole curve ends, over the range of sizes,
// and does not give up on any smooth activity.
func TestClimbAgainstScan(t *testing.T) {
	all := map[string]Particle{}
	for _, name := range []string{"sodium chloride", "ammonium sulfate", "ammonium nitrate", "magnesium chloride"} {
		all[name], _ = crystal(t, name, 1e-7, 298.15)
	}
	for _, kappa := range []float64{1e-6, 1e-3, 0.03, 0.6, 2} {
		p := Particle{Temperature: 298.15, Solution: solutes.IdealOsmotic(kappa)}
		all["ideal "+shortNumber(kappa)] = p
		p.Solution, p.Kelvin = solutes.Kappa(kappa), PureVapour
		all["vapour "+shortNumber(kappa)] = p
		p.Kelvin, p.Swelling = Standard, shrinking{}
		all["swelling "+shortNumber(kappa)] = p
		p.Swelling, p.TolmanLength = nil, 0.05e-9
		all["Tolman "+shortNumber(kappa)] = p
	}
	for name, p := range all {
		for _, dry := range []float64{2e-9, 5e-9, 20e-9, 100e-9, 1e-6, 10e-6} {
			p.DryDiameter = dry
			c := p.ready()
			found, ok := c.climb()
			turns := c.scan(nil)
			i, place := Barrier(turns)
			if !ok || place == NoBarrier {
				t.Errorf("%s of %v m: climbed %t, scan %+v", name, dry, ok, turns)
				continue
			}
			if place != Only { // an extrapolated activity
				t.Logf("%s of %v m: %+v", name, dry, turns)
				continue
			}
			u := found * (3 + found*(3+found))
			lnS, _ := c.LnSaturation(u)
			checkClose(t, name+" s_c", math.Expm1(lnS), turns[i].Supersaturation, 1e-12)
			checkClose(t, name+" size", math.Cbrt(1+u), math.Cbrt(1+turns[i].Water), 1e-10)
		}
	}
}

func shortNumber(x float64) string { return strconv.FormatFloat(x, 'g', 2, 64) }

// A curve that only falls is not climbed.
func TestClimbGivesUp(t *testing.T) {
	p := Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: solutes.Kappa(0), Kelvin: Compressible}
	c := p.ready()
	if u, ok := c.climb(); ok {
		t.Errorf("a wettable sphere has a crest at %v", u)
	}
	crest, err := p.Crest()
	if err != nil || crest.Kind != BoundaryMaximum || crest.WetDiameter != p.DryDiameter {
		t.Errorf("%+v %v", crest, err)
	}
}
