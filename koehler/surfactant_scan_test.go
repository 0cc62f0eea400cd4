package koehler

import (
	"math"
	"math/rand/v2"
	"os"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// randomSurface makes particles from weak to strong surfactants, with and
// without floor, partitioning and salt, small enough for several maxima.
func randomSurface(t testing.TB, rng *rand.Rand) (s *SurfaceActive, dry float64) {
	salt := 0.3 * rng.Float64() * rng.Float64()
	p := Surfactant{
		Share: (1 - salt) * (1 - 0.5*rng.Float64()*rng.Float64()), Density: 900 + 600*rng.Float64(), MolarMass: 0.1 + 0.4*rng.Float64(),
		GammaMax: 0.5e-6 * math.Exp(2*rng.Float64()), K: 0.05 * math.Exp(8*rng.Float64()), Partitioning: rng.IntN(4) > 0,
	}
	if rng.IntN(2) == 0 {
		p.Floor = 0.025 + 0.04*rng.Float64()
	}
	of := Salt{Share: salt, Kappa: 1.3 * rng.Float64()}
	if rng.IntN(8) == 0 {
		of.Solution = solutes.IdealOsmotic(0.6)
	}
	dry = 15e-9 * math.Exp(3*rng.Float64())
	return mustSurface(t, dry, 273.15+30*rng.Float64(), p, of), dry
}

// Mass is conserved to rounding, the bulk holds between nothing and all, and σ
// stays between its floor and water's.
func TestPartitioningConservesMass(t *testing.T) {
	rng := rand.New(rand.NewPCG(2004, 2107))
	for range 2000 {
		s, dry := randomSurface(t, rng)
		for range 10 {
			u := math.Exp(30*rng.Float64() - 12)
			got := s.At(u)
			d := got.WetDiameter
			volume, area := math.Pi/6*d*d*d, math.Pi*d*d
			n := math.Pi / 6 * dry * dry * dry * s.p.Share * s.p.Density / s.p.MolarMass
			adsorbed := area * got.SurfaceExcess
			if !s.p.Partitioning {
				adsorbed = 0
			}
			if sum := got.Concentration*volume + adsorbed; apart(sum, n) > 1e-13 {
				t.Fatalf("%+v at u = %v: %v mol of %v", s.p, u, sum, n)
			}
			if got.BulkShare <= 0 || got.BulkShare > 1 || got.SurfaceTension < s.p.Floor && s.p.Floor > 0 || got.SurfaceTension > s.pureTension {
				t.Fatalf("%+v at u = %v: %+v", s.p, u, got)
			}
		}
	}
}

// Slopes against central differences, away from the floor's kink.
func TestSurfaceSlopes(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	const h = 1e-5
	for range 2000 {
		s, _ := randomSurface(t, rng)
		y := 24*rng.Float64() - 7
		here, up, down := s.At(math.Exp(y)), s.At(math.Exp(y+h)), s.At(math.Exp(y-h))
		if up.AtFloor != down.AtFloor {
			continue
		}
		for _, v := range []struct {
			name            string
			slope, up, down float64
		}{
			{"ln S", here.Slope, up.LnSaturation, down.LnSaturation},
			{"ln a_w", here.activitySlope, up.LnActivity, down.LnActivity},
			{"σ", here.tensionSlope, up.SurfaceTension, down.SurfaceTension},
		} {
			if fd := (v.up - v.down) / (2 * h); math.Abs(fd-v.slope) > 1e-7*math.Abs(v.slope)+1e-9*math.Abs(v.up)+1e-11 {
				t.Fatalf("%+v %+v, ln u = %v: slope of %s %v, difference %v", s.p, s.salt, y, v.name, v.slope, fd)
			}
		}
	}
}

// scanSurfaces compares all extrema with a fine scan of the curve.
func scanSurfaces(t *testing.T, n int) {
	rng := rand.New(rand.NewPCG(4, 5))
	const points = 6000
	from, to := math.Log(firstSurfaceWater), 3*math.Log(greatestSurfaceGrowth)
	step := (to - from) / points
	several, kinks, pairs := 0, 0, 0
	for range n {
		s, dry := randomSurface(t, rng)
		turns := s.Extrema(nil)
		where, sign := gridTurns(s, from, to, points)
		seen := 0
		for _, turn := range turns {
			if turn.Kind == KinkMinimum {
				kinks++
			}
			if turn.Water > 0 && s.At(turn.Water).SurfaceTension <= 0 {
				t.Errorf("%+v %+v at %v m: an extremum at negative σ: %+v", s.p, s.salt, dry, turn)
			}
			found := false
			for i, y := range where {
				found = found || (turn.Kind == Maximum) == (sign[i] > 0) && math.Abs(math.Log(turn.Water)-y) <= 1.01*step
			}
			switch {
			case found:
				seen++
			case turn.Kind == BoundaryMaximum || math.Log(turn.Water) < from+step || math.Log(turn.Water) > to-step:
			case gap(turns, indexOf(turns, turn)) < 4*step: // a pair the grid cannot see
				pairs++
			default:
				t.Errorf("%+v %+v at %v m: invented %+v", s.p, s.salt, dry, turn)
			}
		}
		if seen != len(where) {
			t.Errorf("%+v %+v at %v m: %d of %d extrema found: %+v, scan %v", s.p, s.salt, dry, seen, len(where), turns, where)
		}
		if len(turns) > 1 {
			several++
		}
		if t.Failed() {
			t.FailNow()
		}
	}
	t.Logf("%d particles, %d with several extrema, %d kinks that turn, %d points in pairs closer than the scan", n, several, kinks, pairs)
	if several < n/20 || kinks < n/50 {
		t.Errorf("%d particles with several extrema, %d kinks: too easy a test", several, kinks)
	}
}

func indexOf(turns []Turn, t Turn) int {
	for i := range turns {
		if turns[i] == t {
			return i
		}
	}
	return -1
}

func TestRandomSurfacesAgainstScan(t *testing.T) { scanSurfaces(t, 200) }

func TestLongRandomSurfacesAgainstScan(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("set DROPCREST_LONG for 5 000 particles")
	}
	scanSurfaces(t, 5000)
}

// At the floor's kink σ meets its floor from above to rounding.
func TestFloorWater(t *testing.T) {
	rng := rand.New(rand.NewPCG(6, 7))
	found := 0
	for range 500 {
		s, _ := randomSurface(t, rng)
		u, ok := s.floorWater()
		if !ok {
			if s.p.Floor > 0 && s.At(1e-9).AtFloor && s.At(1e-3).AtFloor != s.At(1e12).AtFloor {
				t.Errorf("%+v: the floor is left, but not found", s.p)
			}
			continue
		}
		found++
		if s.At(u*(1+1e-9)).AtFloor || !s.At(u*(1-1e-9)).AtFloor || apart(s.At(u).SurfaceTension, s.p.Floor) > 1e-12 {
			t.Errorf("%+v: kink at u = %v: σ %v", s.p, u, s.At(u).SurfaceTension)
		}
	}
	if found < 50 {
		t.Errorf("%d kinks: too easy a test", found)
	}
}

// BenchmarkSurfaceCurve is what a screen asks for: a curve of 400 points and
// the crest, with partitioning. Its goal is 5 ms.
func BenchmarkSurfaceCurve(b *testing.B) {
	for name, salt := range map[string]Salt{"kappa": {Share: 0.02, Kappa: 0.61}, "osmotic": {Share: 0.02, Solution: solutes.IdealOsmotic(0.61)}} {
		b.Run(name, func(b *testing.B) {
			s, err := NewSurfaceActive(45e-9, 298.15, atmos.SurfaceTension(298.15), Surfactant{
				Share: 0.98, Density: 1100, MolarMass: 0.3, GammaMax: 1.5e-6, K: 10, Partitioning: true, Floor: 0.04}, salt)
			if err != nil {
				b.Fatal(err)
			}
			b.ReportAllocs()
			for b.Loop() {
				if _, _, err := s.Crest(); err != nil {
					b.Fatal(err)
				}
				for i := range 400 {
					s.LnSaturation(math.Exp(float64(i) * 0.04))
				}
			}
		})
	}
}

// The scanner against the exact solution of another model: random mixtures of
// limited solubility, their dissolution points as breaks. It takes any particle.
func TestScanAgainstLimited(t *testing.T) {
	rng := rand.New(rand.NewPCG(8, 9))
	extrema := 0
	for range 300 {
		mix := mustMix(t, randomMixture(rng)...)
		dry := 10e-9 * math.Exp(4*rng.Float64())
		p := Particle{DryDiameter: dry, Temperature: 293.15, Solution: mix}
		kelvin := KelvinLength(atmos.SurfaceTension(293.15), 293.15)
		in := scan{from: 1e-6, to: 1e12, points: 600, dryLnS: math.Inf(-1)}
		for i := range mix.Points() {
			in.breaks = append(in.breaks, mix.Point(i))
		}
		if dissolved, saturated := mix.Segment(0); dissolved == 0 {
			in.dryLnS = kelvin/dry - math.Log1p(saturated)
		}
		want := LimitedExtrema(nil, dry, kelvin, mix)
		got := in.extrema(nil, p)
		if len(got) != len(want) {
			t.Fatalf("%v m, %+v: scan %+v, exact %+v", dry, mix, got, want)
		}
		for i, w := range want {
			extrema++
			g := got[i]
			if g.Kind != w.Kind || apart(g.GrowthFactor, w.GrowthFactor) > 1e-9 || math.Abs(g.Supersaturation-w.Supersaturation) > 1e-14 {
				t.Errorf("%v m: scan %+v, exact %+v", dry, g, w)
			}
		}
	}
	if extrema < 500 {
		t.Errorf("only %d extrema compared", extrema)
	}
}

// A pair of extrema far closer than the grid is found, and a curve that comes
// near to turning is not taken for one that turns.
func TestScanFindsClosePairs(t *testing.T) {
	for _, c := range []struct {
		depth float64 // of the slope below zero at the dip
		turns int
	}{{1e-3, 3}, {1e-6, 3}, {1e-9, 3}, {-1e-9, 1}, {-1e-3, 1}} {
		in := scan{from: 1e-4, to: 1e6, points: 100, dryLnS: math.Inf(-1)}
		if got := in.extrema(nil, dipping{c.depth}); len(got) != c.turns {
			t.Errorf("dip of %v: %+v, want %d turns", c.depth, got, c.turns)
		}
	}
}

// dipping rises, comes to a slope of -depth near u = 1, and falls from ln u = 10 on.
type dipping struct{ depth float64 }

func (d dipping) LnSaturation(u float64) (lnS, slope float64) {
	y := math.Log(u) - 0.0123
	weight := u / ((1 + u) * math.Cbrt(1+u))
	return 0, weight * ((y*y - d.depth) * math.Tanh(10-y))
}
