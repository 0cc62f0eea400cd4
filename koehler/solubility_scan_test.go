package koehler

import (
	"math"
	"math/rand/v2"
	"os"
	"testing"

	"dropcrest/solutes"
)

// limitedByDefinition is ln S straight from the definition, without segments.
type limitedByDefinition struct {
	a     float64
	parts []solutes.LimitedPart
}

func (d limitedByDefinition) lnS(u float64) float64 {
	kappa := 0.0
	for _, p := range d.parts {
		kappa += p.Volume * p.Kappa * math.Min(1, u*p.Solubility/p.Volume)
	}
	return d.a/math.Cbrt(1+u) - math.Log1p(kappa/u)
}

// randomMixture makes mixtures that have several extrema more often than
// ambient ones: traces of miscible salt, solubilities over four decades, parts
// without κ, parts that dissolve at the same size.
func randomMixture(rng *rand.Rand) []solutes.LimitedPart {
	n := 1 + rng.IntN(5)
	parts := make([]solutes.LimitedPart, n)
	sum := 0.0
	for i := range parts {
		parts[i] = solutes.LimitedPart{
			Volume:     math.Exp(-4 * rng.Float64()),
			Kappa:      0.01 * math.Exp(5*rng.Float64()),
			Solubility: 1e-4 * math.Exp(9*rng.Float64()),
		}
		sum += parts[i].Volume
	}
	for i := range parts {
		parts[i].Volume *= (1 - 1e-12) / sum
		switch rng.IntN(8) {
		case 0:
			parts[i].Solubility = math.Inf(1)
			parts[i].Kappa *= 0.02
		case 1:
			parts[i].Kappa = 0
		case 2:
			parts[i].Solubility = 0
		case 3:
			if i > 0 && parts[i-1].Solubility > 0 && !math.IsInf(parts[i-1].Solubility, 1) {
				parts[i].Solubility = parts[i].Volume / parts[i-1].Volume * parts[i-1].Solubility
			}
		}
	}
	return parts
}

const (
	gridFrom   = -18.0 // ln u
	gridTo     = 24.0
	gridPoints = 6000
)

// fineScan returns the ln u of grid points higher (+1) or lower (-1) than both
// neighbours.
func (d limitedByDefinition) fineScan() (where []float64, sign []int) {
	step := (gridTo - gridFrom) / gridPoints
	before, rising := d.lnS(math.Exp(gridFrom)), 0
	for i := 1; i <= gridPoints; i++ {
		here := d.lnS(math.Exp(gridFrom + float64(i)*step))
		now := 1
		if here < before {
			now = -1
		}
		if rising != 0 && now != rising {
			where = append(where, gridFrom+float64(i-1)*step)
			sign = append(sign, rising)
		}
		before, rising = here, now
	}
	return where, sign
}

// standsOut tells whether the curve at t is an extremum of its kind against
// both sides at distance h in ln u.
func (d limitedByDefinition) standsOut(t Turn, h float64) bool {
	up, here, down := d.lnS(t.Water*math.Exp(h)), d.lnS(t.Water), d.lnS(t.Water*math.Exp(-h))
	if t.Kind == Maximum {
		return here > up && here > down
	}
	return here < up && here < down
}

// checkMixture compares all extrema with the scan: each of the scan is one of
// ours, each of ours that the scan can see is one of the scan, and a pair closer
// than its step stands out when looked at closely. It returns how many pairs
// were too close for that (their heights differ by rounding only).
func checkMixture(t *testing.T, parts []solutes.LimitedPart, dry, kelvin float64) (turns []Turn, unseen int) {
	t.Helper()
	turns = LimitedExtrema(nil, dry, kelvin, mustMix(t, parts...))
	d := limitedByDefinition{kelvin / dry, parts}
	step := (gridTo - gridFrom) / gridPoints
	where, sign := d.fineScan()
	seen := make([]bool, len(turns))
	for i, y := range where {
		found := false
		for j, turn := range turns {
			if turn.Kind != BoundaryMaximum && (turn.Kind == Maximum) == (sign[i] > 0) && math.Abs(math.Log(turn.Water)-y) <= 1.01*step {
				found, seen[j] = true, true
			}
		}
		if !found {
			t.Errorf("%v m, %+v: missed an extremum (%+d) at ln u = %v; have %+v", dry, parts, sign[i], y, turns)
		}
	}
	for j, turn := range turns {
		if turn.Kind == BoundaryMaximum || seen[j] {
			continue
		}
		h := gap(turns, j) / 4
		if h > 2*step {
			t.Errorf("%v m, %+v: invented %+v", dry, parts, turn)
		} else if h < 1e-6 {
			unseen++
		} else if !d.standsOut(turn, h) {
			t.Errorf("%v m, %+v: %+v does not stand out at ±%v", dry, parts, turn, h)
		}
	}
	return turns, unseen
}

// gap is the distance in ln u from turn j to its nearest neighbour.
func gap(turns []Turn, j int) float64 {
	nearest := math.Inf(1)
	for _, i := range []int{j - 1, j + 1} {
		if i >= 0 && i < len(turns) && turns[i].Water > 0 {
			nearest = math.Min(nearest, math.Abs(math.Log(turns[i].Water/turns[j].Water)))
		}
	}
	return nearest
}

// checkKinds asserts what the model implies: maxima and minima alternate, minima
// are kinks, the boundary comes first if at all, and the curve ends falling.
func checkKinds(t *testing.T, turns []Turn) {
	t.Helper()
	for i, turn := range turns {
		maximum := turn.Kind == Maximum || turn.Kind == BoundaryMaximum
		switch {
		case maximum != (i%2 == 0),
			turn.Kind == Minimum,
			turn.Kind == BoundaryMaximum && i > 0,
			i > 0 && turn.Water < turns[i-1].Water, // a pair may agree to rounding
			i == len(turns)-1 && !maximum:
			t.Fatalf("impossible turns %+v", turns)
		}
	}
}

func scanMixtures(t *testing.T, n int) {
	rng := rand.New(rand.NewPCG(20080815, 6273))
	several, kinks, unseen := 0, 0, 0
	for range n {
		parts := randomMixture(rng)
		dry := 10e-9 * math.Exp(4*rng.Float64())
		turns, close := checkMixture(t, parts, dry, 1.2e-9+1.2e-9*rng.Float64())
		checkKinds(t, turns)
		unseen += close
		if len(turns) > 1 {
			several++
		}
		if len(turns) > 4 {
			kinks++
		}
		if t.Failed() {
			t.FailNow()
		}
	}
	t.Logf("%d mixtures, %d with several extrema, %d with three maxima, %d points in pairs too close to see", n, several, kinks, unseen)
	if several < n/5 || kinks < n/200 || unseen > n/500 {
		t.Errorf("of %d mixtures %d have several extrema, %d three maxima, %d are unseen: too easy a test", n, several, kinks, unseen)
	}
}

func TestRandomMixturesAgainstScan(t *testing.T) { scanMixtures(t, 300) }

func TestLongRandomMixturesAgainstScan(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("set DROPCREST_LONG for 10 000 mixtures")
	}
	scanMixtures(t, 10000)
}

// Towards the dry size at which a maximum and a kink merge, below or above the
// kink, both are there on one side, closer and closer, and neither on the other.
func TestNearlyDegeneratePair(t *testing.T) {
	mix := mustMix(t, solutes.LimitedPart{Volume: 0.98, Kappa: 0.15, Solubility: 0.01},
		solutes.LimitedPart{Volume: 0.02, Kappa: 1.28, Solubility: math.Inf(1)})
	cases := []struct {
		name      string
		slope     func(Kink) float64 // 0 where the pair merges
		pair      [2]int             // the turns that do
		sign      float64            // of the change of dry size that separates them
		remaining int
	}{
		{"falls into the kink at small sizes", func(k Kink) float64 { return k.Below }, [2]int{0, 1}, -1, 1},
		{"rises out of the kink at large sizes", func(k Kink) float64 { return k.Above }, [2]int{1, 2}, 1, 1},
	}
	const (
		kelvin   = 2.1e-9
		rounding = 1e-17 // of s where |s| is about 1e-3
	)
	for _, c := range cases {
		slopeAtKink := func(dry float64) float64 { return c.slope(LimitedKinks(nil, dry, kelvin, mix)[0]) }
		lo, hi := 5e-9, 5000e-9
		if slopeAtKink(lo) >= 0 || slopeAtKink(hi) <= 0 {
			t.Fatal("the merging size is not between the bounds")
		}
		for hi-lo > 1e-15*hi {
			if mid := lo + (hi-lo)/2; slopeAtKink(mid) < 0 {
				lo = mid
			} else {
				hi = mid
			}
		}
		for _, relative := range []float64{1e-2, 1e-4, 1e-6, 1e-8, 1e-10, 1e-12, 1e-14} {
			turns := LimitedExtrema(nil, lo*(1+c.sign*relative), kelvin, mix)
			checkKinds(t, turns)
			if len(turns) != 3 {
				t.Errorf("%s, %v apart: %+v, want maximum, kink, maximum", c.name, relative, turns)
				continue
			}
			low, high := turns[c.pair[0]], turns[c.pair[1]]
			kink, top := low, high
			if c.pair[0] == 0 {
				kink, top = high, low
			}
			if kink.Kind != KinkMinimum || top.Supersaturation < kink.Supersaturation-rounding || high.Water/low.Water-1 > 20*relative {
				t.Errorf("%s, %v apart: kink %+v, maximum %+v", c.name, relative, kink, top)
			}
			turns = LimitedExtrema(nil, hi*(1-c.sign*relative), kelvin, mix)
			if checkKinds(t, turns); len(turns) != c.remaining {
				t.Errorf("%s, %v beyond: %+v, want %d", c.name, relative, turns, c.remaining)
			}
		}
	}
}
