package atmos

import "math"

// Drag and mobility of a sphere depend on its diameter through d/C(d) alone.
// Here that length is called the slip-free diameter: the diameter of the
// sphere that would feel the same drag in a gas without slip.

// slipFree returns d/C(d), in m, for the mean free path lambda (m).
func slipFree(d, lambda float64) float64 {
	c, _ := slip(2 * lambda / d)
	return d / c
}

// maxDragSteps bounds the iteration; five steps are enough from 1e-12 to 1 m.
const maxDragSteps = 50

// lastDragStep is the relative step after which the iteration ends: the error
// left is of the order of its square, below rounding.
const lastDragStep = 1e-8

// fromSlipFree returns the diameter d (m) with d/C(d) = q, to full precision.
// It is NaN unless q and lambda are positive and finite.
//
// ln(d/C) rises with ln d at a slope between 1 and 2 everywhere, so Newton's
// method in ln d converges from anywhere. The root is bracketed from the start:
// C > 1 puts it above q, C < 1 + 2 λ (a + b)/d below the root of the quadratic.
func fromSlipFree(q, lambda float64) float64 {
	if !(q > 0 && lambda > 0) || math.IsInf(q, 0) || math.IsInf(lambda, 0) {
		return math.NaN()
	}
	low := q
	high := (q + math.Sqrt(q)*math.Sqrt(q+8*lambda*(slipA+slipB))) / 2
	d := high
	for range maxDragSteps {
		c, slope := slip(2 * lambda / d)
		off := (d/c - q) / q
		if off > 0 {
			high = d
		} else {
			low = d
		}
		next := d * math.Exp(-math.Log1p(off)/(1+slope))
		if math.Abs(next-d) <= lastDragStep*d {
			return next
		}
		if next < low || next > high {
			next = math.Sqrt(low) * math.Sqrt(high)
		}
		d = next
	}
	return d
}
