package spectrum

import (
	"math"
	"slices"
)

// exactRatios is how many values Quantiles keeps: 1 MB. One supersaturation every
// five minutes of a year is 105 120 values; a campaign has one of these a supersaturation.
const exactRatios = 1 << 17

// QuantileError is the largest relative error of a quantile once it is no longer
// exact, for values from 1e-6 to 1e6.
const QuantileError = 0.0005

// Quantiles collects positive values. Up to 131 072 of them all are kept and a
// quantile is exact: linear between the two order statistics around 1 + (n-1) p
// (Hyndman & Fan 1996, type 7). Beyond that they are counted in bins of 0.1 % from
// 1e-6 to 1e6, memory stays constant, and a quantile is the geometric middle of its
// bin. The zero value is ready.
type Quantiles struct {
	values []float64
	sorted bool
	bins   []int
	n      int
}

var (
	quantileBase = math.Log(1e-6)
	quantileStep = 2 * math.Log1p(QuantileError)
)

// Add takes one value.
func (q *Quantiles) Add(x float64) {
	q.n++
	if q.bins != nil {
		q.bins[quantileBin(x)]++
		return
	}
	q.values, q.sorted = append(q.values, x), false
	if len(q.values) <= exactRatios {
		return
	}
	q.bins = make([]int, 1+int(math.Ceil(-2*quantileBase/quantileStep)))
	for _, v := range q.values {
		q.bins[quantileBin(v)]++
	}
	q.values = nil
}

func quantileBin(x float64) int {
	i := int((math.Log(math.Max(x, 1e-6)) - quantileBase) / quantileStep)
	return min(i, int(math.Ceil(-2*quantileBase/quantileStep)))
}

// Exact tells whether all values are kept.
func (q *Quantiles) Exact() bool { return q.bins == nil }

// At returns the quantiles at the shares p, each 0 to 1; NaN without values.
func (q *Quantiles) At(p ...float64) []float64 {
	out := make([]float64, len(p))
	if q.bins == nil && !q.sorted {
		slices.Sort(q.values)
		q.sorted = true
	}
	for i, share := range p {
		switch {
		case q.n == 0:
			out[i] = math.NaN()
		case q.bins == nil:
			out[i] = quantileOf(q.values, share)
		default:
			out[i] = q.binned(share)
		}
	}
	return out
}

// quantileOf is the quantile of sorted values.
func quantileOf(sorted []float64, share float64) float64 {
	at := share * float64(len(sorted)-1)
	i := int(at)
	if i >= len(sorted)-1 {
		return sorted[len(sorted)-1]
	}
	return sorted[i] + (at-float64(i))*(sorted[i+1]-sorted[i])
}

func (q *Quantiles) binned(share float64) float64 {
	want, seen := share*float64(q.n-1), 0
	for i, n := range q.bins {
		if seen += n; float64(seen) > want {
			return math.Exp(quantileBase + (float64(i)+0.5)*quantileStep)
		}
	}
	return math.NaN()
}
