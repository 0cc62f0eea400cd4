package koehler

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler/internal/computed"
	"dropcrest/solutes"
)

// additive swells as no Swelling at all does, but is one.
type additive struct{}

func (additive) Swell(u float64) (v, slope float64) { return 1 + u, u }

// The exact solver and the scan between dissolution points agree; other forms
// of the Kelvin term turn at nearly the same places.
func TestTurnsOfLimitedSolubility(t *testing.T) {
	rng := rand.New(rand.NewPCG(10, 11))
	for range 200 {
		p := Particle{DryDiameter: 10e-9 * math.Exp(4*rng.Float64()), Temperature: 285, Solution: mustMix(t, randomMixture(rng)...)}
		exact, err := p.Turns(nil)
		if err != nil {
			t.Fatal(err)
		}
		swelling := p
		swelling.Swelling = additive{}
		scanned, err := swelling.Turns(nil)
		if err != nil || len(scanned) != len(exact) {
			t.Fatalf("%+v: scan %+v %v, exact %+v", p, scanned, err, exact)
		}
		for i, want := range exact {
			if got := scanned[i]; got.Kind != want.Kind || apart(got.GrowthFactor, want.GrowthFactor) > 1e-9 || math.Abs(got.Supersaturation-want.Supersaturation) > 1e-13 {
				t.Errorf("%+v: scan %+v, exact %+v", p, got, want)
			}
			e := p.AtTurn(want)
			lnS, _ := p.LnSaturation(math.Max(want.Water, 1e-30))
			if e.Kind != want.Kind || e.Supersaturation != want.Supersaturation || apart(e.SaturationRatio, math.Exp(lnS)) > 1e-12 ||
				e.WetDiameter != p.DryDiameter*want.GrowthFactor || e.Kind == BoundaryMaximum && e.WetDiameter != p.DryDiameter ||
				apart(e.WaterActivity*e.KelvinFactor, e.SaturationRatio) > 1e-12 {
				t.Errorf("%+v: state %+v at %+v", p, e, want)
			}
		}
		p.Kelvin = Compressible
		compressed, err := p.Turns(nil)
		if err != nil || len(compressed) == 0 {
			t.Fatalf("%+v: %+v %v", p, compressed, err)
		}
		i, _ := Barrier(exact)
		j, _ := Barrier(compressed)
		if compressed[j].Supersaturation > exact[i].Supersaturation {
			t.Errorf("%+v: the compressible barrier %+v is not below %+v", p, compressed[j], exact[i])
		}
	}
}

// The floor of a surface-active particle is a kink that both solvers know.
func TestTurnsOfSurfaceActive(t *testing.T) {
	rng := rand.New(rand.NewPCG(12, 13))
	kinks := 0
	for range 100 {
		s, dry := randomSurface(t, rng)
		const T = 290
		s = mustSurface(t, dry, T, s.p, s.salt)
		p := Particle{DryDiameter: dry, Temperature: T, Solution: s, Tension: s}
		want := s.Extrema(nil)
		c := p.ready()
		got := c.scan(nil)
		if len(got) != len(want) {
			t.Fatalf("%+v: scan of the particle %+v, by itself %+v", s.p, got, want)
		}
		if turns, err := p.Turns(nil); err != nil || !slices.Equal(turns, want) {
			t.Errorf("%+v: turns of the particle %+v %v, by itself %+v", s.p, turns, err, want)
		}
		for i, w := range want {
			if w.Kind == KinkMinimum {
				kinks++
			}
			if got[i].Kind != w.Kind || apart(got[i].GrowthFactor, w.GrowthFactor) > 1e-7 || math.Abs(got[i].Supersaturation-w.Supersaturation) > 1e-13 {
				t.Errorf("%+v: particle %+v, by itself %+v", s.p, got[i], w)
			}
		}
	}
	if kinks == 0 {
		t.Error("no kink among them: too easy a test")
	}
}

func TestTurnsOfOtherParticles(t *testing.T) {
	const dry, T = 80e-9, 293.15
	kelvin := KelvinLength(atmos.SurfaceTension(T), T)
	for _, f := range films {
		want, err := AdsorptionExtrema(nil, dry, kelvin, f.p)
		if err != nil {
			t.Fatal(err)
		}
		p := Particle{DryDiameter: dry, Temperature: T, Solution: f.p.On(dry)}
		c := p.ready()
		got := c.scan(nil)
		if len(got) != len(want) {
			t.Errorf("%s: scan of the particle %+v, by itself %+v", f.name, got, want)
			continue
		}
		if turns, err := p.Turns(nil); err != nil || len(turns) != len(want) || math.Abs(turns[0].Supersaturation-want[0].Supersaturation) > 1e-15 {
			t.Errorf("%s: turns of the particle %+v %v, by itself %+v", f.name, turns, err, want)
		}
		for i := range want {
			if got[i].Kind != want[i].Kind || math.Abs(got[i].Supersaturation-want[i].Supersaturation) > 1e-13 {
				t.Errorf("%s: particle %+v, by itself %+v", f.name, got[i], want[i])
			}
		}
	}
	turns, err := Particle{DryDiameter: dry, Temperature: T, Solution: solutes.Kappa(0.61)}.Turns(nil)
	if kappa := SolveKappa(dry, kelvin, 0.61); err != nil || len(turns) != 1 || apart(turns[0].Supersaturation, kappa.Supersaturation) > 1e-14 {
		t.Errorf("κ: %+v %v, want %+v", turns, err, kappa)
	}
	adipic := mustMix(t, solutes.LimitedPart{Volume: 1, Kappa: 0.096, Solubility: 0.0183})
	raised := Particle{DryDiameter: dry, Temperature: T, Solution: adipic, Tension: solutes.LinearTension{Water: 0.0727, PerDry: 0.01}}
	if _, err := raised.Turns(nil); !errors.Is(err, ErrInput) {
		t.Errorf("a tension of all of the solute with limited solubility: %v, want ErrInput", err)
	}
	if _, err := (Particle{DryDiameter: -1, Temperature: T, Solution: solutes.Kappa(0.61)}).Turns(nil); !errors.Is(err, ErrInput) {
		t.Errorf("negative size: %v, want ErrInput", err)
	}
}

// Every computed case as the particle that a user asks about, and not by the
// solver of its model: made from the tension and the temperature, with our R.
func TestParticlesAgainstComputed(t *testing.T) {
	const tol = 3e-10 // that R has ten digits
	check := func(id string, p Particle, err error, s, wet float64, maxima int) {
		t.Helper()
		if err != nil {
			t.Errorf("%s: %v", id, err)
			return
		}
		got := p.Solve(0.95)
		if got.NoCrest != nil || apart(got.Crest.Supersaturation, s) > tol || apart(got.Crest.WetDiameter, wet) > tol {
			t.Errorf("%s: crest %+v %v, want s %v at %v m", id, got.Crest, got.NoCrest, s, wet)
		}
		n := 0
		for _, e := range got.Extrema {
			if e.Kind == Maximum || e.Kind == BoundaryMaximum {
				n++
			}
		}
		if n != maxima || (got.Crest.Place == Only) != (n == 1) {
			t.Errorf("%s: %d maxima, want %d; the barrier is the %s one", id, n, maxima, got.Crest.Place)
		}
	}
	tension := func(T, factor float64) solutes.Tension {
		return solutes.ConstantTension(factor * atmos.SurfaceTension(T))
	}
	for _, c := range computed.Read[limitedCase](t, "limited_solubility.json") {
		p := Particle{DryDiameter: c.Input.Dd, Temperature: c.Input.T, Solution: c.mix(t), Tension: tension(c.Input.T, c.Input.SigmaFactor)}
		check(c.ID, p, nil, c.Output.Barrier.Small, c.Output.Barrier.D, c.Output.NMaxima)
		if crest, err := p.Crest(); err != nil || crest.Place.String() != c.Output.BarrierIs {
			t.Errorf("%s: the barrier is the %s maximum (%v), want %s", c.ID, crest.Place, err, c.Output.BarrierIs)
		}
	}
	for _, c := range computed.Read[adsorptionCase](t, "adsorption.json") {
		p, err := c.film().Particle(c.Input.Dd, c.Input.T)
		p.Tension = tension(c.Input.T, c.Input.SigmaFactor)
		check(c.ID, p, err, c.Output.Small, c.Output.Dc, c.Output.N)
	}
	for _, c := range computed.Read[surfaceCase](t, "surface_active.json") {
		for _, mode := range []struct {
			partitioning bool
			want         surfaceCrest
		}{{false, c.Output.None}, {true, c.Output.Full}} {
			if c.Input.D > 0 { // a state, no crest
				continue
			}
			s := c.particle(t, mode.partitioning)
			p, err := s.p.Particle(c.Input.Dd, c.Input.T, s.salt)
			check(c.ID, p, err, mode.want.Small, mode.want.Dc, mode.want.N)
		}
	}
}
