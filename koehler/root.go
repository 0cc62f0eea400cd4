package koehler

import "math"

// rootDone is the step in ln u at which a root counts as found. A Newton step
// that small leaves an error below rounding.
const rootDone = 1e-11

// waterAt returns ln u with ln S = lnS inside a bracket whose ends lie on
// different sides of it: Newton, halved where a step leaves the bracket.
func (c *curve) waterAt(lnS, lo, hi float64) float64 {
	rising := c.at(math.Exp(lo)).lnS < lnS
	x := (lo + hi) / 2
	for range 200 {
		t := c.at(math.Exp(x))
		f := t.lnS - lnS
		if (f < 0) == rising {
			lo = x
		} else {
			hi = x
		}
		step := f / t.slope
		if math.Abs(step) <= rootDone {
			return x - step
		}
		x -= step
		if !(x > lo && x < hi) {
			x = (lo + hi) / 2
		}
		if hi-lo <= rootDone {
			return x
		}
	}
	return x
}

// turn returns the ln u in the bracket where the slope changes its sign, and
// whether the slope jumps there.
func (c *curve) turn(lo, hi float64) (x float64, jump bool) {
	flo, fhi := c.at(math.Exp(lo)).slope, c.at(math.Exp(hi)).slope
	first := math.Max(math.Abs(flo), math.Abs(fhi))
	width := hi - lo
	for n := 0; n < 200 && hi-lo > rootDone; n++ {
		x = lo - flo*(hi-lo)/(fhi-flo)
		// every third step halves, so that the bracket shrinks from both sides
		if n%3 == 2 || !(x > lo && x < hi) {
			x = (lo + hi) / 2
		}
		f := c.at(math.Exp(x)).slope
		if f == 0 {
			return x, false
		}
		if (f < 0) == (flo < 0) {
			lo, flo = x, f
		} else {
			hi, fhi = x, f
		}
	}
	// a smooth slope shrinks with the bracket, a jump stays
	return (lo + hi) / 2, math.Abs(fhi-flo) > 1e-3*first*math.Min(1, width)
}
