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

// maxDragSteps bounds the iteration; four are enough for 1e-14 to 1 m.
const maxDragSteps = 50

// lastDragStep is the relative step after which the iteration ends: the error
// left is of the order of its square, below rounding.
const lastDragStep = 1e-8

// fromSlipFree returns the diameter d (m) with d/C(d) = q, to full precision.
// It is NaN unless q and lambda are positive and finite.
//
// C lies between 1 and 1 + 2 λ (a + b)/d, so that the root lies between q and
// the root of a quadratic. d/C(d) rises with d and is convex, so Newton's method
// descends from there without passing the root. The bracket guards against
// rounding.
func fromSlipFree(q, lambda float64) float64 {
	if !(q > 0 && lambda > 0) || math.IsInf(q, 0) || math.IsInf(lambda, 0) {
		return math.NaN()
	}
	high := (q + math.Sqrt(q)*math.Sqrt(q+8*lambda*(slipA+slipB))) / 2
	d := high
	for range maxDragSteps {
		c, slope := slip(2 * lambda / d)
		// The derivative of d/C(d) is (1 + slope)/C.
		next := d - (d-q*c)/(1+slope)
		if math.Abs(next-d) <= lastDragStep*d {
			return next
		}
		d = min(max(next, q), high)
	}
	return d
}
