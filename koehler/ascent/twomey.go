package ascent

import "math"

// TwomeyPower returns the peak supersaturation of Twomey (1959) for a spectrum
// N(s) = c s^k, with s a fraction and c in 1/m³, in air of temperature T (K) and
// pressure p (Pa) that rises with w (m/s):
//
//	s^(k+2) = (α w)^(3/2)/(2π ρ_w γ G^(3/2) c k B(k/2, 3/2))
//
// with Euler's beta function B; k above 0. It bounds the ascent from above when the
// growth coefficient is the same and nothing delays growth, if the spectrum truly is
// that power law.
func TwomeyPower(c, k, T, p, w float64) float64 {
	a := closedAirAt(T, p)
	return math.Pow(a.twomeySide(w)/(c*kBeta(k)), 1/(k+2))
}

// twomeySide is (α w)^(3/2)/(2π ρ_w γ G^(3/2)), 1/m³.
func (a closedAir) twomeySide(w float64) float64 {
	return math.Pow(a.cooling*w/a.growth, 1.5) / (2 * math.Pi * a.rho * a.depletion)
}

// kBeta is k B(k/2, 3/2).
func kBeta(k float64) float64 {
	x, _ := math.Lgamma(k / 2)
	y, _ := math.Lgamma(k/2 + 1.5)
	return k * math.Exp(x-y) * math.Sqrt(math.Pi) / 2
}

// tangent returns c and k of the power law that touches the spectrum of the modes
// at s.
func tangent(modes []closedMode, s float64) (c, k float64) {
	n, slope := 0.0, 0.0
	for _, m := range modes {
		width := 3 * math.Sqrt2 * math.Log(m.GSD) / 2
		u := math.Log(m.crest/s) / width
		n += m.activated(s)
		slope += m.Concentration / math.Sqrt(math.Pi) * math.Exp(-u*u) / width
	}
	k = slope / n
	return n / math.Pow(s, k), k
}

// leastPeak and mostPeak are the supersaturations between which the closed forms
// look for the peak.
const leastPeak, mostPeak = 1e-8, 10

// twomeyOf is the peak at which the power law that touches the spectrum there gives
// that same peak: N(s) s² k B(k/2, 3/2) rises with s.
func twomeyOf(modes []closedMode, a closedAir, w float64) float64 {
	side := a.twomeySide(w)
	return risingRoot(leastPeak, mostPeak, func(s float64) float64 {
		c, k := tangent(modes, s)
		if !(k > 0) { // all are activated, or none that a number can say
			if math.IsNaN(k) {
				return -1
			}
			k = 1e-12
		}
		return c*math.Pow(s, k+2)*kBeta(k) - side
	})
}
