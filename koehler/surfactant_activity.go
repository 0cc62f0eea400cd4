package koehler

import "math"

// activity returns ln a_w at u and its derivative by ln u, when the organic in
// the bulk has κ per volume of dry particle, with the derivative dOrganic by ln u.
//
// For a salt of any activity model the mixture obeys the rule that at equal a_w
// the water contents add up:
//
//	u = ε_salt w + κ_org a_w/(1 - a_w),   a_w = a_w,salt(w)
//
// w is the salt's water per volume of salt; both terms rise with w, so there is
// one root. It is found by Newton's method in ln w. Far on the dry side the
// organic's term vanishes and a step may lead back to where it came from: every
// fourth step halves the bracket instead. Where the salt is of κ form this is the
// sum of the κ.
func (s *SurfaceActive) activity(u, organic, dOrganic float64) (lnaw, slope float64) {
	if s.salt.Solution == nil || s.salt.Share == 0 {
		kappa := organic
		if s.salt.Solution == nil {
			kappa += s.salt.Share * s.salt.Kappa
		}
		return -math.Log1p(kappa / u), (kappa - dOrganic) / (u + kappa)
	}
	lo, hi := math.Inf(-1), math.Log(u/s.salt.Share)
	y := hi
	for step := range mostRootSteps {
		w := math.Exp(y)
		l, dl := s.salt.Solution.LnActivity(w)
		q := 1 / math.Expm1(-l) // a_w/(1 - a_w)
		water := s.salt.Share*w + organic*q
		dWater := s.salt.Share*w + organic*q*(1+q)*dl
		if water > u {
			hi = y
		} else {
			lo = y
		}
		next := y - math.Log(water/u)*water/dWater
		if math.Abs(next-y) <= 1e-14*math.Max(1, math.Abs(y)) {
			return l + dl*(next-y), dl * (u - dOrganic*q) / dWater
		}
		if !(next > lo && next < hi) || step%4 == 3 {
			if next = lo + (hi-lo)/2; math.IsInf(lo, -1) {
				next = hi - 1
			}
		}
		y = next
	}
	l, dl := s.salt.Solution.LnActivity(math.Exp(y)) // rounding keeps the last digits moving
	q := 1 / math.Expm1(-l)
	return l, dl * (u - dOrganic*q) / (s.salt.Share*math.Exp(y) + organic*q*(1+q)*dl)
}
