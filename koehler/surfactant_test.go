package koehler

import (
	"errors"
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler/internal/computed"
	"dropcrest/solutes"
)

type surfaceState struct {
	C     float64 `json:"c_bulk"`
	Sigma float64
	Share float64 `json:"bulk_fraction"`
	Kappa float64 `json:"kappa_eff"`
	Aw    float64
	S     float64
}

type surfaceCrest struct {
	Dc      float64
	Small   float64 `json:"sc"`
	Sc      float64
	Sigma   float64 `json:"sigma_c"`
	C       float64 `json:"c_bulk_c"`
	Share   float64 `json:"bulk_fraction_c"`
	Kappa   float64 `json:"kappa_eff_c"`
	Aw      float64 `json:"aw_c"`
	N       int     `json:"n_maxima"`
	Extrema []struct {
		Kind string
		D    float64
		S    float64
	}
	surfaceState
}

type surfaceCase struct {
	ID, Family string
	Input      struct {
		Dd, T     float64
		EpsSalt   float64 `json:"eps_salt"`
		KappaSalt float64 `json:"kappa_salt"`
		EpsOrg    float64 `json:"eps_org"`
		RhoOrg    float64 `json:"rho_org"`
		MOrg      float64 `json:"M_org"`
		GammaMax  float64 `json:"Gamma_max"`
		K         float64
		D         float64
	}
	Output struct {
		None  surfaceCrest `json:"no_partitioning"`
		Full  surfaceCrest `json:"full_partitioning"`
		Water struct {
			Dc float64
			S  float64 `json:"sc"`
		} `json:"water_surface_tension"`
	}
}

func (c surfaceCase) particle(t testing.TB, partitioning bool) *SurfaceActive {
	t.Helper()
	in := c.Input
	return mustSurface(t, in.Dd, in.T, Surfactant{
		Share: in.EpsOrg, Density: in.RhoOrg, MolarMass: in.MOrg, GammaMax: in.GammaMax, K: in.K, Partitioning: partitioning,
	}, Salt{Share: in.EpsSalt, Kappa: in.KappaSalt})
}

func mustSurface(t testing.TB, dry, T float64, p Surfactant, salt Salt) *SurfaceActive {
	t.Helper()
	s, err := NewSurfaceActive(dry, T, atmos.SurfaceTension(T), p, salt)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// The reference's R has ten digits, 1.8e-11 apart from ours; it enters Γ_max R T
// and the Kelvin term. In c, where nearly all of the organic is at the surface,
// nothing of it appears; D and s feel it at first order.
const surfaceTolerance = 2e-10

func TestSurfaceActiveAgainstComputed(t *testing.T) {
	for _, c := range computed.Read[surfaceCase](t, "surface_active.json") {
		t.Run(c.ID, func(t *testing.T) {
			for _, mode := range []struct {
				name         string
				partitioning bool
				want         surfaceCrest
			}{{"bulk", false, c.Output.None}, {"partitioned", true, c.Output.Full}} {
				s := c.particle(t, mode.partitioning)
				if c.Input.D > 0 {
					x := c.Input.D / c.Input.Dd
					checkSurfaceState(t, mode.name, s.At(x*x*x-1), mode.want.surfaceState)
				} else {
					checkSurfaceCrest(t, mode.name, s, mode.want)
				}
			}
		})
	}
}

func checkSurfaceState(t *testing.T, mode string, got SurfaceState, want surfaceState) {
	t.Helper()
	for _, v := range []struct {
		name      string
		got, want float64
	}{
		{"c", got.Concentration, want.C}, {"σ", got.SurfaceTension, want.Sigma}, {"f", got.BulkShare, want.Share},
		{"κ", got.Kappa, want.Kappa}, {"a_w", math.Exp(got.LnActivity), want.Aw}, {"s", math.Expm1(got.LnSaturation), want.S},
	} {
		if !(apart(v.got, v.want) <= surfaceTolerance) {
			t.Errorf("%s: %s = %.17g, want %.17g (%.2g apart)", mode, v.name, v.got, v.want, apart(v.got, v.want))
		}
	}
}

func checkSurfaceCrest(t *testing.T, mode string, s *SurfaceActive, want surfaceCrest) {
	t.Helper()
	crest, place, err := s.Crest()
	if err != nil {
		t.Fatalf("%s: %v", mode, err)
	}
	if (place == Only) != (want.N == 1) || crest.Kind != Maximum {
		t.Errorf("%s: place %v, %d maxima", mode, place, want.N)
	}
	state := s.At(crest.Water)
	checkSurfaceState(t, mode, state, surfaceState{want.C, want.Sigma, want.Share, want.Kappa, want.Aw, want.Small})
	if apart(state.WetDiameter, want.Dc) > surfaceTolerance || apart(math.Exp(state.LnSaturation), want.Sc) > surfaceTolerance {
		t.Errorf("%s: D = %.17g, want %.17g", mode, state.WetDiameter, want.Dc)
	}
	turns := s.Extrema(nil)
	if len(turns) != len(want.Extrema) {
		t.Fatalf("%s: extrema %+v, want %+v", mode, turns, want.Extrema)
	}
	for i, w := range want.Extrema {
		d := s.At(turns[i].Water).WetDiameter
		if kindWords[turns[i].Kind] != w.Kind || apart(d, w.D) > surfaceTolerance || apart(turns[i].Supersaturation, w.S) > surfaceTolerance {
			t.Errorf("%s: extremum %d: %+v at %v, want %+v", mode, i, turns[i], d, w)
		}
	}
}

// strong is a strong surfactant with some salt.
var strong = Surfactant{Share: 0.5, Density: 1100, MolarMass: 0.3, GammaMax: 3e-6, K: 20, Partitioning: true}

// Without surface activity, and in the limit, the particle is a plain κ mixture.
func TestSurfaceActiveBecomesKappa(t *testing.T) {
	const dry, T = 80e-9, 293.15
	salt := Salt{Share: 0.5, Kappa: 0.61}
	organic := 0.5 * 1100 / 0.3 * atmos.WaterMolarVolume(T)
	want := SolveKappa(dry, lengthAt(T, 1), 0.5*0.61+organic)
	cases := []struct {
		name string
		edit func(*Surfactant)
		tol  float64
	}{
		{"Γ_max 0", func(p *Surfactant) { p.GammaMax = 0 }, 1e-12},
		{"K 0", func(p *Surfactant) { p.K = 0 }, 1e-12},
		{"Γ_max small", func(p *Surfactant) { p.GammaMax = 1e-18 }, 1e-8},
		{"K small", func(p *Surfactant) { p.K = 1e-12 }, 1e-8},
		{"Γ_max small, all in the bulk", func(p *Surfactant) { p.GammaMax, p.Partitioning = 1e-18, false }, 1e-8},
		{"floor at water's tension, all in the bulk", func(p *Surfactant) { p.Floor, p.Partitioning = atmos.SurfaceTension(T), false }, 1e-12},
	}
	for _, c := range cases {
		p := strong
		c.edit(&p)
		crest, place, err := mustSurface(t, dry, T, p, salt).Crest()
		if err != nil || place != Only || apart(crest.Supersaturation, want.Supersaturation) > c.tol || apart(crest.GrowthFactor, want.GrowthFactor) > 100*c.tol {
			t.Errorf("%s: %+v %v %v, want %+v", c.name, crest, place, err, want)
		}
	}
	p := strong
	p.Share = 0
	crest, _, err := mustSurface(t, dry, T, p, salt).Crest()
	alone := SolveKappa(dry, lengthAt(T, 1), 0.5*0.61)
	if err != nil || apart(crest.Supersaturation, alone.Supersaturation) > 1e-12 {
		t.Errorf("no organic: %+v %v, want %+v", crest, err, alone)
	}
	p = Surfactant{Density: 1000, MolarMass: 0.1}
	crest, place, err := mustSurface(t, dry, T, p, Salt{}).Crest()
	if err != nil || place != Only || crest.Kind != BoundaryMaximum || apart(crest.Supersaturation, math.Expm1(lengthAt(T, 1)/dry)) > 1e-14 {
		t.Errorf("nothing soluble: %+v %v %v", crest, place, err)
	}
}

// A salt given by its activity obeys the mixing rule: a κ given as a solution is
// the κ form, and an ideal osmotic salt with an organic that is not surface-active
// is the mixture of package solutes.
func TestSurfaceActiveWithAnySalt(t *testing.T) {
	const dry, T = 80e-9, 293.15
	closed := mustSurface(t, dry, T, strong, Salt{Share: 0.3, Kappa: 0.61})
	solved := mustSurface(t, dry, T, strong, Salt{Share: 0.3, Solution: solutes.Kappa(0.61)})
	inert := strong
	inert.GammaMax = 0
	organic := solutes.Kappa(strong.Density / strong.MolarMass * atmos.WaterMolarVolume(T))
	mixture, err := solutes.NewMixture([]solutes.MixturePart{{Volume: 0.3, Solution: solutes.IdealOsmotic(0.6)}, {Volume: 0.5, Solution: organic}})
	if err != nil {
		t.Fatal(err)
	}
	mixed := mustSurface(t, dry, T, inert, Salt{Share: 0.3, Solution: solutes.IdealOsmotic(0.6)})
	for y := -7.0; y < 17; y += 0.5 {
		u := math.Exp(y)
		want, wantSlope := closed.LnSaturation(u)
		if got, slope := solved.LnSaturation(u); math.Abs(got-want) > 1e-13*(1+math.Abs(want)) || math.Abs(slope-wantSlope) > 1e-12 {
			t.Errorf("κ as a solution at u = %v: %v %v, want %v %v", u, got, slope, want, wantSlope)
		}
		want, wantSlope = mixture.LnActivity(u)
		if got, slope := mixed.LnActivity(u); apart(got, want) > 1e-12 || apart(slope, wantSlope) > 1e-9 {
			t.Errorf("mixture at u = %v: %v %v, want %v %v", u, got, slope, want, wantSlope)
		}
	}
}

// As a Solution and a Tension of a particle it has the same crest.
func TestSurfaceActiveInAParticle(t *testing.T) {
	s := mustSurface(t, 45e-9, 298.15, Surfactant{
		Share: 0.98, Density: 1100, MolarMass: 0.3, GammaMax: 1.5e-6, K: 10, Partitioning: true,
	}, Salt{Share: 0.02, Kappa: 0.61})
	want, _, err := s.Crest()
	if err != nil {
		t.Fatal(err)
	}
	// additive volumes by a Swelling: scanned, not solved by itself
	crest, err := Particle{DryDiameter: 45e-9, Temperature: 298.15, Solution: s, Tension: s, Swelling: additive{}}.Crest()
	if err != nil || apart(crest.Supersaturation, want.Supersaturation) > 1e-12 || apart(crest.Water, want.Water) > 1e-7 {
		t.Errorf("%+v %v, want %+v", crest, err, want)
	}
}

func TestSurfaceActiveRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	salt := Salt{Share: 0.5, Kappa: 0.61}
	for name, edit := range map[string]func(p *Surfactant, s *Salt, dry, T *float64){
		"share":              func(p *Surfactant, s *Salt, dry, T *float64) { p.Share = 1.5 },
		"share NaN":          func(p *Surfactant, s *Salt, dry, T *float64) { p.Share = nan },
		"density":            func(p *Surfactant, s *Salt, dry, T *float64) { p.Density = 0 },
		"molar mass":         func(p *Surfactant, s *Salt, dry, T *float64) { p.MolarMass = inf },
		"gamma":              func(p *Surfactant, s *Salt, dry, T *float64) { p.GammaMax = -1 },
		"K":                  func(p *Surfactant, s *Salt, dry, T *float64) { p.K = nan },
		"floor":              func(p *Surfactant, s *Salt, dry, T *float64) { p.Floor = -0.01 },
		"floor above water":  func(p *Surfactant, s *Salt, dry, T *float64) { p.Floor = 0.08 },
		"shares beyond 1":    func(p *Surfactant, s *Salt, dry, T *float64) { s.Share = 0.6 },
		"salt's share":       func(p *Surfactant, s *Salt, dry, T *float64) { s.Share = -0.1 },
		"salt's κ":           func(p *Surfactant, s *Salt, dry, T *float64) { s.Kappa = nan },
		"dry size":           func(p *Surfactant, s *Salt, dry, T *float64) { *dry = 0 },
		"temperature":        func(p *Surfactant, s *Salt, dry, T *float64) { *T = -1 },
		"temperature is NaN": func(p *Surfactant, s *Salt, dry, T *float64) { *T = nan },
	} {
		p, s, dry, T := strong, salt, 80e-9, 293.15
		edit(&p, &s, &dry, &T)
		var unusable *solutes.UnusableError
		if _, err := NewSurfaceActive(dry, T, 0.0727, p, s); !errors.As(err, &unusable) || unusable.Want == "" {
			t.Errorf("%s: error %v, want a *solutes.UnusableError", name, err)
		}
	}
}
