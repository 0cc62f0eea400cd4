package koehler

import "math"

// before returns the u below high at which c, rising there, has ln S = lnS. It is
// 0 where c does not come down to lnS towards the dry size.
func before(c equilibrium, lnS, high float64) float64 {
	lo := high
	for f := lnS; f >= lnS; f, _ = c.LnSaturation(lo) {
		if lo <= leastWater {
			return 0
		}
		lo *= 0.1
	}
	return waterBetween(c, lnS, lo, high)
}

// beyond returns the u above crest at which c, falling to ln S = 0 there, has
// ln S > 0.
func beyond(c equilibrium, lnS, crest float64) float64 {
	hi := math.Max(crest, 1e-12)
	for f := lnS; f >= lnS && !math.IsInf(hi, 1); f, _ = c.LnSaturation(hi) {
		hi *= 10
	}
	return waterBetween(c, lnS, hi, crest)
}

// waterBetween solves ln S(u) = lnS by Newton's method in ln u inside a bracket;
// the curve is below lnS at low and above it at high, whichever is the larger u.
func waterBetween(c equilibrium, lnS, low, high float64) float64 {
	below, above := math.Log(math.Max(low, leastWater)), math.Log(math.Max(high, leastWater))
	y := below + (above-below)/2
	for range mostRootSteps {
		f, slope := c.LnSaturation(math.Exp(y))
		f -= lnS
		if f < 0 {
			below = y
		} else {
			above = y
		}
		next := y - f/slope
		if math.Abs(next-y) <= rootPrecision*math.Max(1, math.Abs(y)) {
			return math.Exp(next)
		}
		if !(next > math.Min(below, above) && next < math.Max(below, above)) {
			next = below + (above-below)/2
			if next == below || next == above {
				break
			}
		}
		y = next
	}
	return math.Exp(y)
}
