package koehler

import (
	"errors"
	"math"
	"reflect"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// solvedParticles are particles of every way to a crest: closed, climbed,
// scanned, none.
func solvedParticles(t *testing.T) map[string]Particle {
	t.Helper()
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	made, err := solutes.NewSalt(solutes.SaltInput{
		Ion: salt.Ion, Concentrated: salt.Concentrated, MolarMass: salt.MolarMass.Value,
		Density: salt.Density.Value, WaterDensity: atmos.WaterDensity(298.15), Temperature: 298.15,
	})
	if err != nil {
		t.Fatal(err)
	}
	water := atmos.SurfaceTension(298.15)
	out := map[string]Particle{
		"closed":         {Solution: solutes.Kappa(0.61)},
		"wettable":       {Solution: solutes.Kappa(0)},
		"climbed":        {Solution: made},
		"other form":     {Solution: solutes.Kappa(0.61), Kelvin: Compressible},
		"scanned":        {Solution: made, Tension: solutes.LinearTension{Water: water, PerDry: 0.02}},
		"kappa too high": {Solution: solutes.Kappa(31)},
	}
	for name, p := range out {
		p.DryDiameter, p.Temperature = 60e-9, 298.15
		out[name] = p
	}
	return out
}

// One search gives what the three questions give one by one.
func TestSolve(t *testing.T) {
	for name, p := range solvedParticles(t) {
		for _, S := range []float64{0.9, 1.0005, 1.2, -1, math.NaN()} {
			got := p.Solve(S)
			var want Solved
			want.Crest, want.NoCrest = p.Crest()
			want.Extrema, _ = p.Extrema()
			want.Stable, want.Unstable, want.NoHaze = p.Haze(S)
			sameError := func(a, b error) bool { return (a == nil) == (b == nil) && (a == nil || a.Error() == b.Error()) }
			if got.Crest != want.Crest || got.Stable != want.Stable || got.Unstable != want.Unstable ||
				!reflect.DeepEqual(got.Extrema, want.Extrema) || !sameError(got.NoCrest, want.NoCrest) {
				t.Errorf("%s at S = %v: %+v, one by one %+v", name, S, got, want)
			}
			if want.NoCrest == nil && !sameError(got.NoHaze, want.NoHaze) || got.NoHaze == nil && want.NoHaze != nil {
				t.Errorf("%s at S = %v: haze error %v, alone %v", name, S, got.NoHaze, want.NoHaze)
			}
		}
	}
	if s := (Particle{}).Solve(0.9); !errors.Is(s.NoCrest, ErrInput) || !errors.Is(s.NoHaze, ErrInput) {
		t.Errorf("a particle of nothing: %v, %v", s.NoCrest, s.NoHaze)
	}
}

// A tension that is told as a constant takes the way of pure water's tension and
// ends where the scan of the whole curve ends.
func TestConstantTensionIsClimbed(t *testing.T) {
	for name, p := range solvedParticles(t) {
		if p.Tension != nil {
			continue
		}
		water := p
		p.Tension = solutes.ConstantTension(atmos.SurfaceTension(p.Temperature))
		if got, want := p.Solve(0.95), water.Solve(0.95); got.Crest != want.Crest ||
			got.Stable != want.Stable || !reflect.DeepEqual(got.Extrema, want.Extrema) {
			t.Errorf("%s: %+v, by water's own tension %+v", name, got, want)
		}
		for _, sigma := range []float64{0.03, 0.072, 0.08} {
			p.Tension = solutes.ConstantTension(sigma)
			fast, err := p.Crest()
			p.Tension = told{sigma}
			slow, also := p.Crest()
			if (err == nil) != (also == nil) {
				t.Errorf("%s, %v N/m: error %v, scanned %v", name, sigma, err, also)
				continue
			}
			if d := math.Abs(fast.Supersaturation - slow.Supersaturation); d > 1e-14 {
				t.Errorf("%s, %v N/m: crest at %v, scanned %v", name, sigma, fast.Supersaturation, slow.Supersaturation)
			}
			if d := math.Abs(fast.WetDiameter/slow.WetDiameter - 1); d > 1e-9 {
				t.Errorf("%s, %v N/m: crest at %v m, scanned %v m", name, sigma, fast.WetDiameter, slow.WetDiameter)
			}
		}
	}
	// what is no tension of water is refused
	p := Particle{DryDiameter: 60e-9, Temperature: 298.15, Solution: solutes.Kappa(0.6), Tension: solutes.ConstantTension(-0.07)}
	if crest, err := p.Crest(); err == nil {
		t.Errorf("a negative tension has a crest: %+v", crest)
	}
}

// told is a constant tension that does not say so.
type told struct{ sigma float64 }

func (t told) SurfaceTension(float64) (sigma, slope float64) { return t.sigma, 0 }
