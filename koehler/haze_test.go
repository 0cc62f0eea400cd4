package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/solutes"
)

// Between two extrema the curve is monotone: every crossing of a fine grid is an
// equilibrium and every equilibrium a crossing.
func TestEquilibriaAgainstGrid(t *testing.T) {
	rng := rand.New(rand.NewPCG(16, 17))
	several, stays := 0, 0
	for range 300 {
		p := Particle{DryDiameter: 10e-9 * math.Exp(4*rng.Float64()), Temperature: 293.15, Solution: mustMix(t, randomMixture(rng)...)}
		crest, err := p.Crest()
		if err != nil {
			t.Fatal(err)
		}
		S := 1 + crest.Supersaturation*(0.02+0.97*rng.Float64())
		if rng.IntN(4) == 0 {
			S = 0.9 + 0.1*rng.Float64()
		}
		got, err := p.Equilibria(nil, S)
		if err != nil {
			t.Fatalf("%+v at S = %v: %v", p, S, err)
		}
		const from, step = -25.0, 0.002
		var where []float64
		c := p.ready()
		before := c.at(math.Exp(from)).lnS
		for y := from + step; y < 35; y += step {
			here := c.at(math.Exp(y)).lnS
			if (before < math.Log(S)) != (here < math.Log(S)) {
				where = append(where, y)
			}
			before = here
		}
		for len(got) > 0 && math.Log(got[0].Water) < from {
			got = got[1:]
		}
		if len(got) != len(where) {
			t.Fatalf("%+v at S = %v: %+v, grid %v", p, S, got, where)
		}
		for i, e := range got {
			_, slope := p.LnSaturation(e.Water)
			if math.Abs(math.Log(e.Water)-where[i]) > 1.1*step || (slope > 0) != e.Stable || math.Abs(e.SaturationRatio-S) > 2e-15 {
				t.Errorf("%+v at S = %v: %+v, slope %v, grid %v", p, S, e, slope, where[i])
			}
		}
		if len(got) > 2 {
			several++
		}
		stable, unstable, err := p.Haze(S)
		switch {
		case len(got) > 0 && got[0].Stable:
			if err != nil || stable != got[0].State {
				t.Errorf("%+v at S = %v: haze %+v %v, want %+v", p, S, stable, err, got[0])
			}
		case !errors.Is(err, ErrNoHaze):
			t.Errorf("%+v at S = %v: haze %+v %v, want none", p, S, stable, err)
		default:
			stays++
		}
		if S > 1 && (len(got) == 0 || unstable != got[len(got)-1].State) || S <= 1 && unstable != (State{}) {
			t.Errorf("%+v at S = %v: unstable %+v of %+v", p, S, unstable, got)
		}
	}
	if several < 10 || stays < 10 {
		t.Errorf("%d with more than two drops, %d that stay dry: too easy a test", several, stays)
	}
}

// Of two maxima a humidity between them and below both meets the first one first.
func TestHazeOfSeveralMaxima(t *testing.T) {
	p := Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: wavy{}}
	turns, err := p.Turns(nil)
	if err != nil || len(turns) != 3 {
		t.Fatalf("%+v %v, want three turns", turns, err)
	}
	low, high := turns[1].Supersaturation, math.Min(turns[0].Supersaturation, turns[2].Supersaturation)
	for _, c := range []struct {
		name  string
		s     float64
		drops int
	}{{"between the minimum and both maxima", (low + high) / 2, 4}, {"below the minimum", low - 0.001, 2}} {
		drops, err := p.Equilibria(nil, 1+c.s)
		if c.s < 0 {
			c.drops--
		}
		if err != nil || len(drops) != c.drops {
			t.Errorf("%s: %+v %v, want %d drops", c.name, drops, err, c.drops)
			continue
		}
		for i, d := range drops {
			if d.Stable != (i%2 == 0) {
				t.Errorf("%s: drop %d stable: %t", c.name, i, d.Stable)
			}
		}
		stable, _, err := p.Haze(1 + c.s)
		if err != nil || !(stable.Water < turns[0].Water) {
			t.Errorf("%s: haze %+v %v, want it below the first maximum", c.name, stable, err)
		}
	}
}

func TestGiant(t *testing.T) {
	for _, c := range []struct {
		dry  float64
		want bool
	}{{50e-9, false}, {1e-6, false}, {1.01e-6, true}, {20e-6, true}} {
		p := Particle{DryDiameter: c.dry, Temperature: 298.15, Solution: solutes.Kappa(0.6)}
		if got := p.Giant(); got != c.want {
			t.Errorf("%v m: giant %t", c.dry, got)
		}
	}
}

// A soluble giant nucleus has its crest where growth does not get in time, an
// insoluble one has it beside its dry size.
func TestSlow(t *testing.T) {
	dust := Adsorption{A: 2.25, B: 1.2}.On(2e-6)
	for _, c := range []struct {
		name     string
		dry      float64
		solution solutes.Solution
		wet, tol float64 // m
		want     bool
	}{
		{"salt of 1 µm", 1e-6, solutes.Kappa(0.6), 29e-6, 1e-6, true}, // √(3κDd³/A), A 2.1 nm
		{"salt of 0.5 µm", 0.5e-6, solutes.Kappa(0.6), 10.3e-6, 0.2e-6, false},
		{"hardly soluble", 1.5e-6, solutes.Kappa(0.005), 5e-6, 0.2e-6, false},
		{"soot", 2e-6, solutes.Kappa(0), 2e-6, 0, false},
		{"dust", 2e-6, dust, 3e-6, 0.5e-6, false},
	} {
		crest, err := Particle{DryDiameter: c.dry, Temperature: 298.15, Solution: c.solution}.Crest()
		if err != nil || crest.Slow() != c.want || math.Abs(crest.WetDiameter-c.wet) > c.tol {
			t.Errorf("%s: crest at %v m, slow %t, %v; want %v m, %t", c.name, crest.WetDiameter, crest.Slow(), err, c.wet, c.want)
		}
	}
}

// short is a salt whose model ends at a given u.
type short struct {
	extended
	least float64
}

func (s short) LeastWater() float64 { return s.least }

// What lies below the model's range says so: crest, extrema and drops.
func TestExtrapolated(t *testing.T) {
	p := particles()["ion interaction"]
	crest, err := p.Crest()
	if err != nil || crest.Extrapolated {
		t.Fatalf("crest %+v %v", crest, err)
	}
	for _, c := range []struct {
		name                    string
		least                   float64
		crestOutside, hazeOutOf bool
	}{
		{"all inside", 0.1, false, false},
		{"haze outside", crest.Water / 2, false, true},
		{"crest outside", crest.Water * 2, true, true},
	} {
		p.Solution = short{ammoniumSulfate(), c.least}
		solved := p.Solve(0.95)
		if solved.NoCrest != nil || solved.NoHaze != nil || len(solved.Extrema) != 1 || len(solved.Drops) != 1 {
			t.Errorf("%s: %+v", c.name, solved)
			continue
		}
		if solved.Crest.Extrapolated != c.crestOutside || solved.Extrema[0].Extrapolated != c.crestOutside || solved.Drops[0].Extrapolated != c.hazeOutOf {
			t.Errorf("%s: crest %t, extremum %t, haze %t", c.name, solved.Crest.Extrapolated, solved.Extrema[0].Extrapolated, solved.Drops[0].Extrapolated)
		}
	}
	p.Solution = solutes.Kappa(0)
	if crest, err := p.Crest(); err != nil || crest.Extrapolated || crest.Kind != BoundaryMaximum || crest.Place != Only {
		t.Errorf("without solute: %+v %v", crest, err)
	}
}
