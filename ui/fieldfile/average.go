package fieldfile

import (
	"cmp"
	"math"
	"slices"
)

// Averaging is how the values of one window become one.
type Averaging int

// The ways to average. Only values count; where a window has none, the limit
// that most of its cells report stays.
const (
	Mean         Averaging = iota // weighted by the time shared with the window
	Median                        // weighted likewise
	QuartileMean                  // mean of the values between the 25th and 75th percentile
)

func (a Averaging) String() string {
	return [...]string{"mean", "median", "mean between the quartiles"}[a]
}

type weighted struct{ x, w float64 }

// pool gathers the cells of one window.
type pool struct {
	values       []weighted
	below, above weighted // the limits: x is the weighted sum
}

func (p *pool) reset() { *p = pool{values: p.values[:0]} }

func (p *pool) add(c Cell, w float64) {
	switch c.State {
	case Value:
		p.values = append(p.values, weighted{c.X, w})
	case Below:
		p.below.x += c.X * w
		p.below.w += w
	case Above:
		p.above.x += c.X * w
		p.above.w += w
	}
}

func (p *pool) cell(a Averaging) Cell {
	switch {
	case len(p.values) > 0:
		return Cell{p.average(a), Value}
	case p.below.w > 0 && p.below.w >= p.above.w:
		return Cell{p.below.x / p.below.w, Below}
	case p.above.w > 0:
		return Cell{p.above.x / p.above.w, Above}
	}
	return Cell{}
}

func (p *pool) average(a Averaging) float64 {
	if a == Mean || len(p.values) == 1 {
		return mean(p.values)
	}
	slices.SortFunc(p.values, func(a, b weighted) int { return cmp.Compare(a.x, b.x) })
	if a == Median {
		return quantile(p.values, 0.5)
	}
	low, high := quantile(p.values, 0.25), quantile(p.values, 0.75)
	from, to := 0, len(p.values)
	for p.values[from].x < low {
		from++
	}
	for p.values[to-1].x > high {
		to--
	}
	if from >= to { // both quartiles lie between the same two values
		return (low + high) / 2
	}
	return mean(p.values[from:to])
}

func mean(values []weighted) float64 {
	sum, weight := 0.0, 0.0
	for _, v := range values {
		sum += v.x * v.w
		weight += v.w
	}
	return sum / weight
}

// quantile interpolates between sorted values, each sitting in the middle of its
// weight; with equal weights the median of four is the mean of the inner two.
func quantile(sorted []weighted, q float64) float64 {
	total := 0.0
	for _, v := range sorted {
		total += v.w
	}
	target, before := q*total, 0.0
	for i, v := range sorted {
		middle := before + v.w/2
		if middle >= target {
			if i == 0 {
				return v.x
			}
			last := sorted[i-1]
			from := before - last.w/2
			return last.x + (v.x-last.x)*(target-from)/(middle-from)
		}
		before += v.w
	}
	return sorted[len(sorted)-1].x
}

// combined is the standard uncertainty of the mean, for a pool that holds the
// uncertainties of independent values.
func (p *pool) combined() Cell {
	if len(p.values) == 0 {
		return Cell{}
	}
	sum, weight := 0.0, 0.0
	for _, v := range p.values {
		sum += v.x * v.x * v.w * v.w
		weight += v.w
	}
	return Cell{math.Sqrt(sum) / weight, Value}
}

// total is the sum of counts, for a pool whose weights are the shares of each
// count that fall into the window.
func (p *pool) total() Cell {
	if len(p.values) == 0 {
		return Cell{}
	}
	sum := 0.0
	for _, v := range p.values {
		sum += v.x * v.w
	}
	return Cell{sum, Value}
}
