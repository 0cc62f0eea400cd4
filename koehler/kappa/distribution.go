package kappa

import (
	"math"
	"slices"
)

// Distribution is the result of a Monte Carlo propagation, JCGM 101:2008.
type Distribution struct {
	Trials              int
	Mean                float64
	StandardUncertainty float64
	Median              float64
	Coverage            float64
	Interval            Interval // between quantiles, as much left out below as above
	Shortest            Interval // the shortest with that coverage
	// Trials whose values have no κ: so active that κ is beyond any limit, or so
	// inactive that it is below 0. Quantiles count them as +Inf and 0, mean and
	// standard uncertainty leave out the former and take the latter as 0.
	Above, Below int
	Stable       bool    // adaptive, and stable within Tolerance
	Tolerance    float64 // of κ, adaptive only; else NaN
	Stopped      bool    // fewer trials than asked for
	// Agrees: both ends of the linear interval lie within the tolerance of two
	// digits of the quantiles, so that JCGM 100 would have done (JCGM 101:2008, 8).
	Agrees bool
}

// tally sums a sample up, precise for narrow ones too.
type tally struct {
	n, above, below int
	mean, m2        float64
}

// take sums up trials and sorts them.
func (t *tally) take(trials []float64) {
	slices.Sort(trials)
	for _, y := range trials {
		if math.IsInf(y, 1) {
			t.above++
			continue
		}
		if y == 0 {
			t.below++
		}
		t.n++
		d := y - t.mean
		t.mean += d / float64(t.n)
		t.m2 += d * (y - t.mean)
	}
}

// merge adds another tally (Chan, Golub and LeVeque, Am. Stat. 37, 242, 1983;
// from memory).
func (t *tally) merge(o tally) {
	t.above += o.above
	t.below += o.below
	if o.n == 0 {
		return
	}
	n := t.n + o.n
	d := o.mean - t.mean
	t.m2 += o.m2 + d*d*float64(t.n)*float64(o.n)/float64(n)
	t.mean += d * float64(o.n) / float64(n)
	t.n = n
}

func (t *tally) deviation() float64 { return math.Sqrt(t.m2 / float64(t.n-1)) }

// distribution puts blocks together.
func distribution(blocks []block, coverage float64) *Distribution {
	d := &Distribution{Coverage: coverage, Tolerance: math.NaN()}
	var t tally
	parts := make([][]float64, len(blocks))
	for i := range blocks {
		t.merge(blocks[i].tally)
		parts[i] = blocks[i].sorted
	}
	sorted := mergeSorted(parts)
	d.Trials = len(sorted)
	d.Mean, d.StandardUncertainty, d.Above, d.Below = t.mean, t.deviation(), t.above, t.below
	d.Median = median(sorted)
	d.Interval.Low, d.Interval.High = ends(sorted, coverage)
	d.Shortest = shortest(sorted, coverage)
	return d
}

func median(sorted []float64) float64 {
	n := len(sorted)
	if n%2 == 1 || sorted[n/2] == sorted[n/2-1] {
		return sorted[n/2]
	}
	return (sorted[n/2-1] + sorted[n/2]) / 2
}

// covered is the number of steps between the ends of an interval, JCGM
// 101:2008, 7.7.1.
func covered(n int, coverage float64) int { return int(coverage*float64(n) + 0.5) }

// ends returns the probabilistically symmetric interval, JCGM 101:2008, 7.7.2.
func ends(sorted []float64, coverage float64) (low, high float64) {
	n := len(sorted)
	q := covered(n, coverage)
	r := (n - q + 1) / 2
	return sorted[max(r-1, 0)], sorted[min(max(r-1, 0)+q, n-1)]
}

// shortest returns the shortest interval, JCGM 101:2008, 7.7.4.
func shortest(sorted []float64, coverage float64) Interval {
	n := len(sorted)
	q := min(covered(n, coverage), n-1)
	best := Interval{sorted[0], sorted[q]}
	for r := 1; r+q < n; r++ {
		if sorted[r+q]-sorted[r] < best.High-best.Low {
			best = Interval{sorted[r], sorted[r+q]}
		}
	}
	return best
}

// mergeSorted merges sorted slices pairwise.
func mergeSorted(parts [][]float64) []float64 {
	if len(parts) == 0 {
		return nil
	}
	for len(parts) > 1 {
		var next [][]float64
		for i := 0; i+1 < len(parts); i += 2 {
			next = append(next, mergeTwo(parts[i], parts[i+1]))
		}
		if len(parts)%2 == 1 {
			next = append(next, parts[len(parts)-1])
		}
		parts = next
	}
	return parts[0]
}

func mergeTwo(a, b []float64) []float64 {
	out := make([]float64, 0, len(a)+len(b))
	for len(a) > 0 && len(b) > 0 {
		if a[0] <= b[0] {
			out, a = append(out, a[0]), a[1:]
		} else {
			out, b = append(out, b[0]), b[1:]
		}
	}
	return append(append(out, a...), b...)
}
