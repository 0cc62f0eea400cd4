package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// gridTurns counts maxima and minima of any curve on a fine grid of ln u.
func gridTurns(c equilibrium, from, to float64, points int) (where []float64, sign []int) {
	step := (to - from) / float64(points)
	before, _ := c.LnSaturation(math.Exp(from))
	rising := 0
	for i := 1; i <= points; i++ {
		here, _ := c.LnSaturation(math.Exp(from + float64(i)*step))
		now := 1
		if here < before {
			now = -1
		}
		if rising != 0 && now != rising {
			where, sign = append(where, from+float64(i-1)*step), append(sign, rising)
		}
		before, rising = here, now
	}
	return where, sign
}

// Films of any B, B_F < 1 included, against a fine scan: no extremum missed or
// invented.
func TestRandomFilmsAgainstScan(t *testing.T) {
	rng := rand.New(rand.NewPCG(2007, 6175))
	minima, none := 0, 0
	for range 400 {
		p := Adsorption{A: 0.1 * math.Exp(3.5*rng.Float64()), B: 0.5 + 1.2*rng.Float64(), Form: SolubleForm(rng.IntN(2))}
		if rng.IntN(2) == 0 {
			p.SolubleShare, p.Kappa = 0.6*rng.Float64(), rng.Float64()
		}
		dry := 20e-9 * math.Exp(4*rng.Float64())
		turns, err := AdsorptionExtrema(nil, dry, 2.1e-9, p)
		if err != nil {
			t.Fatal(err)
		}
		crest, err := AdsorptionCrest(dry, 2.1e-9, p)
		if i, place := Barrier(turns); place == NoBarrier {
			if none++; !errors.Is(err, ErrNoCrest) {
				t.Errorf("%+v at %v m: crest %+v, error %v, but no maximum", p, dry, crest, err)
			}
		} else if err != nil || crest != turns[i] {
			t.Errorf("%+v at %v m: crest %+v, error %v, want %+v", p, dry, crest, err, turns[i])
		}
		end := 3 * math.Log(greatestGrowth)
		const from, points = -12.0, 6000
		where, sign := gridTurns(adsorptionCurve{p.On(dry), 2.1e-9 / dry}, from, end, points)
		if len(turns) > 0 && turns[0].Kind == BoundaryMaximum {
			turns = turns[1:]
		}
		if len(turns) != len(where) {
			t.Fatalf("%+v at %v m: %d extrema, the scan has %d: %+v, %v", p, dry, len(turns), len(where), turns, where)
		}
		for i, turn := range turns {
			if (turn.Kind == Maximum) != (sign[i] > 0) || math.Abs(math.Log(turn.Water)-where[i]) > 1.01*(end-from)/points {
				t.Errorf("%+v at %v m: %+v, scan %v %+d", p, dry, turn, where[i], sign[i])
			}
			if turn.Kind == Minimum {
				minima++
			}
		}
	}
	t.Logf("%d minima, %d films without a crest", minima, none)
	if minima < 10 || none < 10 {
		t.Errorf("%d minima and %d films without a crest: too easy a test", minima, none)
	}
}

// Haze sizes solve the curve on both sides of the crest.
func TestAdsorptionHaze(t *testing.T) {
	const dry, T = 80e-9, 293.15
	kelvin := KelvinLength(atmos.SurfaceTension(T), T)
	for _, f := range films {
		crest, err := AdsorptionCrest(dry, kelvin, f.p)
		if err != nil {
			t.Fatalf("%s: %v", f.name, err)
		}
		particle, err := f.p.Particle(dry, T)
		if err != nil {
			t.Fatalf("%s: %v", f.name, err)
		}
		curve := adsorptionCurve{f.p.On(dry), kelvin / dry}
		for _, S := range []float64{0.7, 0.95, 0.999, 1, 1 + crest.Supersaturation/2, 1 + crest.Supersaturation*(1-1e-9)} {
			stable, unstable, err := particle.Haze(S)
			if S < math.Exp(curve.a+curve.DryLnActivity()) {
				if !errors.Is(err, ErrNoHaze) {
					t.Errorf("%s: S = %v lies below the dry end: %v %v", f.name, S, stable, err)
				}
				continue
			}
			if err != nil {
				t.Errorf("%s: S = %v: %v", f.name, S, err)
				continue
			}
			if got, slope := curve.LnSaturation(stable.Water); math.Abs(got-math.Log(S)) > 1e-13 || slope < 0 || stable.Water > crest.Water {
				t.Errorf("%s: S = %v: stable %v has ln S %v, slope %v", f.name, S, stable, got, slope)
			}
			if S <= 1 {
				if unstable != (State{}) {
					t.Errorf("%s: S = %v: unstable %v, want none", f.name, S, unstable)
				}
			} else if got, slope := curve.LnSaturation(unstable.Water); math.Abs(got-math.Log(S)) > 1e-13 || slope > 0 || unstable.Water < crest.Water {
				t.Errorf("%s: S = %v: unstable %v has ln S %v, slope %v", f.name, S, unstable, got, slope)
			}
		}
		if _, _, err := particle.Haze(1.001 + crest.Supersaturation); !errors.Is(err, ErrAboveCrest) {
			t.Errorf("%s: above the crest: error %v", f.name, err)
		}
	}
	endless := Adsorption{A: 0.82, B: 0.79}
	if _, err := AdsorptionCrest(500e-9, kelvin, endless); !errors.Is(err, ErrNoCrest) {
		t.Fatalf("this film should have no crest: %v", err)
	}
	particle, err := endless.Particle(500e-9, T)
	if err != nil {
		t.Fatal(err)
	}
	stable, _, err := particle.Haze(0.99)
	if got, _ := (adsorptionCurve{endless.On(500e-9), kelvin / 500e-9}).LnSaturation(stable.Water); err != nil || math.Abs(got-math.Log(0.99)) > 1e-13 {
		t.Errorf("film without a crest: %v %v", stable, err)
	}
}

func TestAdsorptionRefuses(t *testing.T) {
	nan := math.NaN()
	for name, p := range map[string]Adsorption{
		"A below 0": {A: -1, B: 1.2}, "A NaN": {A: nan, B: 1}, "B 0": {A: 1}, "B NaN": {A: 1, B: nan}, "layer below 0": {A: 1, B: 1, Layer: -1},
		"share 1": {A: 1, B: 1, SolubleShare: 1}, "share NaN": {A: 1, B: 1, SolubleShare: nan}, "κ below 0": {A: 1, B: 1, Kappa: -1}, "κ 40": {A: 1, B: 1, Kappa: 40},
	} {
		var unusable *solutes.UnusableError
		if _, err := AdsorptionCrest(80e-9, 2.1e-9, p); !errors.As(err, &unusable) || unusable.Want == "" {
			t.Errorf("%s: error %v, want a *solutes.UnusableError", name, err)
		}
		if turns, err := AdsorptionExtrema(nil, 80e-9, 2.1e-9, p); err == nil || turns != nil {
			t.Errorf("%s: extrema %v, error %v", name, turns, err)
		}
		if _, err := p.Particle(80e-9, 293.15); !errors.As(err, &unusable) {
			t.Errorf("%s: particle without an error", name)
		}
	}
}

func BenchmarkAdsorptionCrest(b *testing.B) {
	for _, f := range films {
		b.Run(f.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := AdsorptionCrest(80e-9, 2.1e-9, f.p); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
