package koehler

import "math"

// equilibrium is an equilibrium curve: ln S and its derivative by ln u, where u
// is the volume of water per volume of dry particle. It is continuous.
type equilibrium interface {
	LnSaturation(u float64) (lnS, slope float64)
}

// scan says where and how closely to look for the extrema of a curve.
type scan struct {
	from, to float64   // u
	points   int       // over the whole range, equal in ln u
	breaks   []float64 // u where the slope jumps, ascending
	dryLnS   float64   // limit of ln S at the dry size; -Inf: the curve starts from below
}

const (
	// besideBreak is how far beside a break, relative to u, its two slopes are taken.
	besideBreak = 1e-12
	// rootPrecision is the step in ln u after which an extremum is taken as found.
	rootPrecision = 1e-14
	// mostRootSteps bounds the refinement; halving alone needs about 45.
	mostRootSteps = 120
	// mostDipSteps bounds the search for a pair of extrema between grid points.
	mostDipSteps = 60
	// leastWater is the smallest u at which a curve is looked at.
	leastWater = 1e-30
)

// extrema appends the turns of c to dst in the order of their wet size.
//
// The slope times x⁴/u is looked at on a grid equal in ln u: the Kelvin term
// alone gives a constant then, so that what is left are the features of the
// activity. Where it changes sign between neighbours there is an extremum. Where
// it comes nearer to zero than at both neighbours it is followed to its nearest
// point, which finds a maximum and a minimum that lie between two grid points.
// Where the slope jumps, both sides are looked at.
func (s scan) extrema(dst []Turn, c equilibrium) []Turn {
	from := s.from
	for slopeAt(c, math.Log(from)) <= 0 && from > leastWater && math.IsInf(s.dryLnS, -1) {
		from *= 1e-3 // the first maximum is nearer to the dry size
	}
	if slopeAt(c, math.Log(from)) < 0 && !math.IsInf(s.dryLnS, -1) {
		dst = append(dst, Turn{BoundaryMaximum, 0, 1, math.Expm1(s.dryLnS)})
	}
	lo, start := from, from
	for _, at := range s.breaks {
		if at <= lo*(1+2*besideBreak) || at >= s.to { // breaks that differ by rounding are one
			continue
		}
		below, above := at*(1-besideBreak), at*(1+besideBreak)
		dst = s.smooth(dst, c, math.Log(start), math.Log(below))
		left, right := slopeAt(c, math.Log(below)), slopeAt(c, math.Log(above))
		if left < 0 && right > 0 {
			dst = append(dst, turnAt(c, KinkMinimum, math.Log(at)))
		} else if left > 0 && right < 0 {
			dst = append(dst, turnAt(c, Maximum, math.Log(at)))
		}
		lo, start = at, above
	}
	return s.smooth(dst, c, math.Log(start), math.Log(s.to))
}

// smooth appends the turns between two ln u without a break between them.
func (s scan) smooth(dst []Turn, c equilibrium, from, to float64) []Turn {
	n := max(8, int(float64(s.points)*(to-from)/math.Log(s.to/s.from)))
	step := (to - from) / float64(n)
	before, here := math.NaN(), slopeAt(c, from)
	for i := range n {
		y := from + float64(i)*step
		next := from + float64(i+1)*step
		if i == n-1 {
			next = to
		}
		after := slopeAt(c, next)
		switch {
		case here > 0 && after <= 0 || here < 0 && after >= 0:
			dst = append(dst, refined(c, y, next, here, after))
		case i > 0 && math.Abs(here) < math.Abs(before) && math.Abs(here) <= math.Abs(after) && here*before > 0:
			if dip, found := crossing(c, y-step, next, here); found {
				value := slopeAt(c, dip)
				dst = append(dst, refined(c, y-step, dip, before, value), refined(c, dip, next, value, after))
			}
		}
		before, here = here, after
	}
	return dst
}

// crossing looks for a point between two ln u at which the slope has the other
// sign than sign, by golden section on its distance from zero.
func crossing(c equilibrium, lo, hi, sign float64) (y float64, found bool) {
	const golden = 0.6180339887498949
	a, b := hi-golden*(hi-lo), lo+golden*(hi-lo)
	fa, fb := slopeAt(c, a), slopeAt(c, b)
	for range mostDipSteps {
		switch {
		case fa*sign < 0:
			return a, true
		case fb*sign < 0:
			return b, true
		case hi-lo < 1e-9:
			return 0, false
		}
		if math.Abs(fa) < math.Abs(fb) {
			hi, b, fb = b, a, fa
			a = hi - golden*(hi-lo)
			fa = slopeAt(c, a)
		} else {
			lo, a, fa = a, b, fb
			b = lo + golden*(hi-lo)
			fb = slopeAt(c, b)
		}
	}
	return 0, false
}

// refined narrows a change of sign of the slope down to one ln u: regula falsi
// with the Illinois rule, and halving where that is slow.
func refined(c equilibrium, lo, hi, flo, fhi float64) Turn {
	kind := Maximum
	if flo < 0 {
		kind = Minimum
	}
	y, side, width := hi, 0, hi-lo
	for step := 1; step < mostRootSteps && fhi != 0; step++ {
		last := y
		y = hi - fhi*(hi-lo)/(fhi-flo)
		if step%4 == 0 {
			if hi-lo > width/8 {
				y = lo + (hi-lo)/2
			}
			width = hi - lo
		}
		if y <= lo || y >= hi || math.Abs(y-last) <= rootPrecision*math.Max(1, math.Abs(y)) {
			break
		}
		f := slopeAt(c, y)
		if f == 0 {
			break
		}
		if f*flo > 0 {
			lo, flo = y, f
			if side < 0 {
				fhi /= 2
			}
			side = -1
		} else {
			hi, fhi = y, f
			if side > 0 {
				flo /= 2
			}
			side = 1
		}
	}
	return turnAt(c, kind, math.Min(math.Max(y, lo), hi))
}

func turnAt(c equilibrium, kind Kind, y float64) Turn {
	u := math.Exp(y)
	lnS, _ := c.LnSaturation(u)
	return Turn{kind, u, math.Cbrt(1 + u), math.Expm1(lnS)}
}

// slopeAt returns d ln S/d ln u times x⁴/u at ln u = y.
func slopeAt(c equilibrium, y float64) float64 {
	u := math.Exp(y)
	_, slope := c.LnSaturation(u)
	return slope * (1 + u) / u * math.Cbrt(1+u)
}
