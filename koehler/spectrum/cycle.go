package spectrum

import (
	"fmt"
	"math"
	"slices"
	"sort"
)

func rangeWords(low, high float64) string { return fmt.Sprintf("from %g to %g", low, high) }

// steadyAll is the largest relative range of all particles within a cycle that still
// counts as steady air (own choice).
const steadyAll = 0.3

// LookAtCycle applies the rule Monotonic, where the judge has it, to the points of
// one cycle and returns the indices of those that it flags and rejects: they lie
// below a point at a smaller supersaturation by more standard uncertainties of the
// difference than the bound (without uncertainties: at all). Nothing is said where
// the number of all particles is known and changed by more than 30 % within the
// cycle: then the air changed, not the instrument.
func (j *Judge) LookAtCycle(points []Observed) (flagged, rejected []int) {
	var t *Tally
	for i := range j.tallies {
		if j.tallies[i].Rule.Key == Monotonic {
			t = &j.tallies[i]
		}
	}
	if t == nil || !steady(points) {
		return nil, nil
	}
	order := make([]int, 0, len(points))
	for i, p := range points {
		if p.Supersaturation > 0 && !math.IsNaN(p.Activated) {
			order = append(order, i)
		}
	}
	sort.SliceStable(order, func(a, b int) bool {
		return points[order[a]].Supersaturation < points[order[b]].Supersaturation
	})
	for k, i := range order {
		t.Looked++
		worst := 0.0
		for _, below := range order[:k] {
			if points[below].Supersaturation < points[i].Supersaturation {
				worst = math.Max(worst, fall(points[i], points[below]))
			}
		}
		switch {
		case worst > t.Rule.Reject:
			t.Rejected++
			rejected = append(rejected, i)
		case worst > t.Rule.Flag:
			t.Flagged++
			flagged = append(flagged, i)
		}
	}
	return flagged, rejected
}

// fall is by how many standard uncertainties p lies below lower, 0 where it does not.
func fall(p, lower Observed) float64 {
	d := lower.Activated - p.Activated
	if !(d > 0) {
		return 0
	}
	variance := 0.0
	for _, u := range []float64{p.Uncertainty, lower.Uncertainty} {
		if !math.IsNaN(u) {
			variance += u * u
		}
	}
	return d / math.Sqrt(variance)
}

func steady(points []Observed) bool {
	lo, hi := math.Inf(1), 0.0
	for _, p := range points {
		if p.All > 0 {
			lo, hi = math.Min(lo, p.All), math.Max(hi, p.All)
		}
	}
	return !(hi > lo*(1+steadyAll))
}

// LevelMean returns the mean of the values between their 25th and 75th percentile
// (both included), the robust mean of the readings at one supersaturation that a
// harmonised public data set uses. Values that are missing (NaN) are left out; NaN
// where none is left. values is reordered.
func LevelMean(values []float64) float64 {
	values = slices.DeleteFunc(values, math.IsNaN)
	if len(values) == 0 {
		return math.NaN()
	}
	slices.Sort(values)
	lo, hi := quantileOf(values, 0.25), quantileOf(values, 0.75)
	sum, n := 0.0, 0.0
	for _, v := range values {
		if v >= lo && v <= hi {
			sum, n = sum+v, n+1
		}
	}
	return sum / n
}

// CountingUncertainty returns the standard uncertainty 1/√n, relative, of a number
// concentration (1/m³) counted in a flow (m³/s) over a time (s), by Poisson
// statistics; +Inf where nothing was counted.
func CountingUncertainty(count, flow, time float64) float64 {
	return 1 / math.Sqrt(count*flow*time)
}

// CountUncertainty returns the relative standard uncertainty of a number of
// activated particles from those of counting, flow and supersaturation, the last
// carried over with the slope d ln N/d ln s of the spectrum.
func CountUncertainty(counting, flow, supersaturation, slope float64) float64 {
	return math.Sqrt(counting*counting + flow*flow + supersaturation*supersaturation*slope*slope)
}
