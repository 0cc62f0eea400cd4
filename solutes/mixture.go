package solutes

import (
	"fmt"
	"math"
)

// MaxMixtureParts is the largest number of parts of a Mixture.
const MaxMixtureParts = 16

// MixturePart is one part of a Mixture: its share ε of the dry volume and the
// water activity of its own solution.
type MixturePart struct {
	Volume   float64
	Solution Solution
}

// Mixture is the water activity of a mixed particle by the rule of Zdanovskii,
// Stokes and Robinson (ZSR; Stokes & Robinson, J. Phys. Chem. 70, 2126, 1966):
// at a common a_w each part holds the water u_i that it would hold alone,
//
//	Σ ε_i u_i(a_w) = u
//
// Shares may add up to less than 1; the rest is insoluble. With constant κ in
// every part the result is the volume-weighted κ, exactly. For salts of mixed
// charge type the rule is 0.4 to 1 % low in water at 0.03 to 0.3 osmol/kg.
//
// The common activity is found by Newton's method in ln(-ln a_w) against ln u_i,
// where every part is nearly a straight line, to about 1e-14. A Mixture is
// immutable; its methods do not allocate.
type Mixture struct {
	count  int
	parts  [MaxMixtureParts]MixturePart
	guess  [MaxMixtureParts]float64 // ln of u_i per u at infinite dilution
	leastU float64
	table  []mixtureStart // where the joint steps start
}

// NewMixture makes a mixture of parts whose solutions increase strictly in u. It
// is an error if there are none or too many, if a share is not positive, or if the
// shares add up to more than 1.
func NewMixture(parts []MixturePart) (*Mixture, error) {
	if len(parts) == 0 || len(parts) > MaxMixtureParts {
		return nil, fmt.Errorf("a mixture has %d soluble parts: 1 to %d are possible", len(parts), MaxMixtureParts)
	}
	x := &Mixture{count: len(parts)}
	sum, strength := 0.0, 0.0
	const dilute = 1e9
	for i, p := range parts {
		if !(p.Volume > 0) {
			return nil, fmt.Errorf("part %d of a mixture has the share %g: it must be positive", i+1, p.Volume)
		}
		lnaw, _ := p.Solution.LnActivity(dilute)
		if !(lnaw < 0) {
			return nil, fmt.Errorf("part %d of a mixture holds no water: count it as insoluble", i+1)
		}
		x.parts[i] = p
		x.guess[i] = -lnaw * dilute
		sum += p.Volume
		strength += p.Volume * x.guess[i]
	}
	if sum > 1+1e-9 {
		return nil, fmt.Errorf("the shares of a mixture add up to %g: at most 1 is possible", sum)
	}
	for i := range parts {
		x.guess[i] = math.Log(x.guess[i] / strength)
	}
	x.table = x.startTable()
	x.leastU = x.waterAtLimit()
	return x, nil
}

// LeastWater returns u at the activity where the first of the parts leaves its
// range.
func (x *Mixture) LeastWater() float64 { return x.leastU }

// Iteration of LnActivity: the largest number of joint steps before bisection
// takes over, the largest step in ln u_i, where a hydrate is left with its crystal
// water (then it takes no part), and the residual that ends it: the step
// just taken squares it, so that ln a_w is exact and its slope good to 1e-8.
const (
	jointSteps    = 40
	longestStep   = 3
	noWater       = 32 // ln of u per u_i where a part holds none: below rounding
	jointResidual = 1e-8
)

// LnActivity returns ln a_w and its derivative by ln u.
func (x *Mixture) LnActivity(u float64) (lnaw, slope float64) {
	var j joint
	lnU := math.Log(u)
	x.start(&j.w, lnU)
	if lnaw, slope, settled := x.settle(&j, u, lnU); settled {
		return lnaw, slope
	}
	return x.bisect(u)
}

// joint is the state of the joint steps: of each part ln u_i, ln(-ln a_w) and
// the derivative of this by that.
type joint struct {
	w, y, q [MaxMixtureParts]float64
	empty   [MaxMixtureParts]bool // a hydrate that holds its crystal water only
}

// settle takes joint steps until all parts have one activity.
func (x *Mixture) settle(j *joint, u, lnU float64) (lnaw, slope float64, settled bool) {
	for range jointSteps {
		water, gain, pull := 0.0, 0.0, 0.0
		for i := range x.count {
			ui := math.Exp(j.w[i])
			l, s := x.parts[i].Solution.LnActivity(ui)
			j.y[i], j.q[i] = math.Log(-l), s/l
			if j.empty[i] {
				continue
			}
			held := x.parts[i].Volume * ui
			water += held
			gain += held / j.q[i]
			pull += held * j.y[i] / j.q[i]
		}
		common := (u - water + pull) / gain
		worst := math.Abs(u-water) / u
		for i := range x.count {
			if j.empty[i] && j.y[i] <= common {
				continue
			}
			step := (common - j.y[i]) / j.q[i]
			worst = max(worst, math.Abs(step))
			j.w[i] += min(max(step, -longestStep), longestStep)
			j.empty[i] = j.w[i] < lnU-noWater
			j.w[i] = max(j.w[i], lnU-noWater)
		}
		if worst <= jointResidual {
			lnaw = -math.Exp(common)
			return lnaw, lnaw * u / gain, true
		}
	}
	return 0, 0, false
}

// bisect solves the same equations without derivatives, for parts on which the
// joint steps do not settle.
func (x *Mixture) bisect(u float64) (lnaw, slope float64) {
	low, high := math.Log(1e-300), math.Log(1e12)
	for range 200 {
		mid := (low + high) / 2
		if water, _ := x.waterAt(-math.Exp(mid)); water > u {
			low = mid
		} else {
			high = mid
		}
	}
	lnaw = -math.Exp((low + high) / 2)
	_, gain := x.waterAt(lnaw)
	return lnaw, u / gain
}

// emptied is the u below which bisection has found no water but a hydrate's own.
const emptied = 1e-290

// waterAt returns Σ ε_i u_i at an activity and its derivative by ln a_w.
func (x *Mixture) waterAt(lnaw float64) (water, gain float64) {
	for i := range x.count {
		u := inverse(x.parts[i].Solution, lnaw)
		if u < emptied {
			continue
		}
		_, s := x.parts[i].Solution.LnActivity(u)
		water += x.parts[i].Volume * u
		gain += x.parts[i].Volume * u / s
	}
	return water, gain
}

func (x *Mixture) waterAtLimit() float64 {
	limit := math.Inf(-1)
	for i := range x.count {
		if least := x.parts[i].Solution.LeastWater(); least > 0 {
			l, _ := x.parts[i].Solution.LnActivity(least)
			limit = max(limit, l)
		}
	}
	if math.IsInf(limit, -1) {
		return 0
	}
	water, _ := x.waterAt(limit)
	return water
}

// inverse returns u at which a solution has that ln a_w < 0: Newton's method in
// ln(-ln a_w) against ln u, and bisection where that does not settle.
func inverse(s Solution, lnaw float64) float64 {
	x, y := 0.0, math.Log(-lnaw)
	for range 20 {
		l, slope := s.LnActivity(math.Exp(x))
		step := (y - math.Log(-l)) * l / slope
		x += min(max(step, -longestStep), longestStep)
		if math.Abs(step) <= 1e-13 {
			return math.Exp(x)
		}
	}
	low, high := -700.0, 700.0
	for range 120 {
		mid := (low + high) / 2
		if l, _ := s.LnActivity(math.Exp(mid)); l < lnaw {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Exp((low + high) / 2)
}
