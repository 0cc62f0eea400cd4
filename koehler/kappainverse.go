package koehler

import (
	"fmt"
	"math"
)

// inverseDone is the relative step at which the Newton steps of the inverses
// end: their error falls with the square, so the next step is below rounding.
const inverseDone = 1e-9

// KappaOf returns the κ of a particle of dry diameter dry (m) whose crest lies
// at supersaturation s (a fraction), for the Kelvin length in m. It inverts
// SolveKappa exactly.
//
// κ is eliminated between the curve and its zero slope, which leaves one
// equation in w = Dd/D, with a = A/Dd:
//
//	ln(1+s) = a w + log1p(-(a/3) w (1-w³))
//
// s ≥ expm1(A/Dd) is a NoSolutionError: even an insoluble wettable particle of
// that size activates lower. s = expm1(A/Dd) itself gives κ = 0.
func KappaOf(dry, kelvin, s float64) (float64, error) {
	if err := checkInverse("dry diameter", dry, kelvin, s); err != nil {
		return math.NaN(), err
	}
	a, lnS := kelvin/dry, log1p(s)
	rest := a - lnS
	if rest < 0 {
		// expm1 and log1p may leave the last digit of κ = 0
		if -rest <= 4e-16*a {
			return 0, nil
		}
		return math.NaN(), &NoSolutionError{s, math.Expm1(a), fmt.Sprintf(
			"a wettable particle of %.6g nm without any solute already activates at %.6g %%", dry*1e9, 100*math.Expm1(a))}
	}
	w := 1.5 * lnS / a // the dilute limit
	if w < 0.5 {
		return kappaFromWide(a, lnS, w-w*w*w*w/2), nil // and the next order of w
	}
	return kappaFromNarrow(a, rest), nil
}

// kappaFromWide solves in w = Dd/D, precise for drops much larger than the
// dry particle.
func kappaFromWide(a, lnS, w float64) float64 {
	for range 30 {
		w3 := w * w * w
		z := a / 3 * w * (1 - w3)
		step := (a*w + log1p(-z) - lnS) / (a - a/3*(1-4*w3)/(1-z))
		w -= step
		if math.Abs(step) <= inverseDone*w {
			break
		}
	}
	y := 1 - w*w*w
	return a * y * y / (w * w * (3 - a*w*y))
}

// log1p is math.Log1p, which takes most of the time of an inverse, by its series
// where six terms leave an error below 1e-16 of the value.
func log1p(x float64) float64 {
	if math.Abs(x) > 0.003 {
		return math.Log1p(x)
	}
	return x * (1 - x*(1./2-x*(1./3-x*(1./4-x*(1./5-x/6)))))
}

// kappaFromNarrow solves in y = 1 - Dd/D, precise for drops hardly larger than
// the dry particle, from rest = a - ln S.
func kappaFromNarrow(a, rest float64) float64 {
	value := func(y float64) (f, slope float64) {
		q := y * (3 + y*(y-3)) // 1 - w³
		w := 1 - y
		z := a / 3 * w * q
		return a*y - math.Log1p(-z) - rest, a + a/3*(w*3*w*w-q)/(1-z)
	}
	y := rest / (2 * a)
	lo, hi := 0.0, 1.0
	for range 60 {
		f, slope := value(y)
		if f > 0 {
			hi = y
		} else {
			lo = y
		}
		step := f / slope
		next := y - step
		if math.Abs(step) <= inverseDone*y {
			y = next
			break
		}
		if !(next > lo && next < hi) {
			next = (lo + hi) / 2
		}
		y = next
	}
	w, q := 1-y, y*(3+y*(y-3))
	return a * q * q / (w * w * (3 - a*w*q))
}

// DryOf returns the dry diameter in m at which a particle of that κ activates
// at supersaturation s (a fraction), for the Kelvin length in m. It inverts
// SolveKappa exactly: with q = κ/u the Kelvin length drops out,
//
//	ln(1+s) = 3q (1 + q/κ)/(1+q) - log1p(q), A/Dd = 3q x (1 + q/κ)/(1+q).
//
// κ = 0 gives A/ln(1+s).
func DryOf(kappa, kelvin, s float64) (float64, error) {
	if !(kappa >= 0 && kappa <= maxKappa) {
		return math.NaN(), &RangeError{"kappa", kappa, "0 to 30"}
	}
	if err := checkInverse("Kelvin length", kelvin, kelvin, s); err != nil {
		return math.NaN(), err
	}
	lnS := math.Log1p(s)
	if kappa == 0 {
		return kelvin / lnS, nil
	}
	q := lnS / (1 + math.Sqrt(1+math.Max(-0.5, (3/kappa-2.5)*lnS))) // to second order in q
	for range 30 {
		p := q / kappa
		step := (3*q*(1+p)/(1+q) - math.Log1p(q) - lnS) * (1 + q) * (1 + q) / (2 - q + 6*p + 3*p*q)
		next := q - step
		if next <= 0 {
			next = q / 4
		}
		q = next
		if math.Abs(step) <= inverseDone*q {
			break
		}
	}
	p := q / kappa
	return kelvin * (1 + q) / (3 * q * (1 + p) * math.Cbrt(1+1/p)), nil
}

// maxKappa bounds κ where the closed form has one crest only.
const maxKappa = 30

// KappaOfClassic returns κ = 4A³/(27 Dd³ ln²(1+s)), the approximation of
// KappaOf for D ≫ Dd (Petters & Kreidenweis 2007, eq. 10). It is too high: 3.5 %
// at 1.1 % and 43 nm.
func KappaOfClassic(dry, kelvin, s float64) float64 {
	a, lnS := kelvin/dry, math.Log1p(s)
	return 4 * a * a * a / (27 * lnS * lnS)
}

// DryOfClassic returns the dry diameter that KappaOfClassic inverts, in m.
func DryOfClassic(kappa, kelvin, s float64) float64 {
	lnS := math.Log1p(s)
	return kelvin * math.Cbrt(4/(27*kappa*lnS*lnS))
}

func checkInverse(what string, size, kelvin, s float64) error {
	switch {
	case !(size > 0) || math.IsInf(size, 0):
		return &RangeError{what, size, "a positive length in m"}
	case !(kelvin > 0) || math.IsInf(kelvin, 0):
		return &RangeError{"Kelvin length", kelvin, "a positive length in m"}
	case !(s > 0) || math.IsInf(s, 0):
		return &RangeError{"supersaturation", s, "above 0: at or below saturation no particle has its crest"}
	}
	return nil
}
