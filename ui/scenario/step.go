package scenario

import "math"

// stepper is how a key press changes a number, in the unit that is shown. Steps
// lead to round numbers, so that a step up and a step down meet again.
type stepper struct {
	ladder     bool    // steps by ratio: rungs in every decade
	small, big float64 // steps by difference, when ladder is false
	decimals   int     // decimals that are always shown
}

// Rungs of one decade. The fine ladder takes about 10 % at a time below 2, 7 %
// above: 35 steps lead through a decade.
var (
	fineRungs   = append(append(rungs(10, 20, 1), rungs(20, 50, 2)...), rungs(50, 100, 5)...)
	coarseRungs = []float64{10, 20, 50}
)

func rungs(from, to, step float64) []float64 {
	var out []float64
	for x := from; x < to; x += step {
		out = append(out, x)
	}
	return out
}

// next is the next round number above x (up) or below it.
func (s stepper) next(x float64, up, big bool) float64 {
	if s.ladder {
		rungs := fineRungs
		if big {
			rungs = coarseRungs
		}
		return nextRung(x, up, rungs)
	}
	step := s.small
	if big {
		step = s.big
	}
	n := x / step
	const noise = 1e-9 // of a step: what conversion between units leaves
	if up {
		return tidy((math.Floor(n+noise) + 1) * step)
	}
	return tidy((math.Ceil(n-noise) - 1) * step)
}

// nextRung climbs the ladder of a positive number; 0 has no rung above it but
// the smallest number that is shown.
func nextRung(x float64, up bool, rungs []float64) float64 {
	if !(x > 0) {
		return 0
	}
	const noise = 1e-9
	decade := math.Floor(math.Log10(x*(1+noise))) - 1
	for d := decade - 1; d <= decade+1; d++ {
		for i, r := range rungs {
			rung := scaled(r, d)
			if up && rung > x*(1+noise) {
				return rung
			}
			above := scaled(rungs[0], d+1)
			if i+1 < len(rungs) {
				above = scaled(rungs[i+1], d)
			}
			if !up && rung < x*(1-noise) && above >= x*(1-noise) {
				return rung
			}
		}
	}
	return x
}

// scaled is r·10^d, correctly rounded for the decades in use.
func scaled(r, d float64) float64 {
	if d < 0 {
		return tidy(r / math.Pow10(int(-d)))
	}
	return tidy(r * math.Pow10(int(d)))
}

// tidy takes away what binary fractions add: 0.30000000000000004 is 0.3.
func tidy(x float64) float64 {
	const scale = 1e9
	if y := math.Round(x*scale) / scale; math.Abs(x) > 1e-3 {
		return y
	}
	return x
}
