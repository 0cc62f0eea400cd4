package koehler

import (
	"fmt"
	"math"
)

// errEndless wraps ErrNoCrest for adsorption that outlasts the Kelvin term.
var errEndless = fmt.Errorf("%w below %g times the dry size, it rises towards saturation", ErrNoCrest, greatestGrowth)

const (
	// greatestGrowth is the largest growth factor at which a crest is looked for.
	greatestGrowth = 1e4
	// adsorptionPoints is the number of points of the scan where the crest may
	// not be the only extremum; the curve is made of three powers of the size.
	adsorptionPoints = 200
)

// adsorptionCurve is the curve with the Kelvin length a per dry diameter.
type adsorptionCurve struct {
	AdsorbedWater
	a float64
}

func (c adsorptionCurve) LnSaturation(u float64) (lnS, slope float64) {
	lnaw, slope := c.LnActivity(u)
	x := 1 + thickness(u)
	return c.a/x + lnaw, slope - c.a*u/(3*x*(1+u))
}

// AdsorptionCrest returns the crest of ln S = A/D + ln a_w for a dry diameter
// and a Kelvin length in m. For B_F ≥ 1 it is the only maximum and there is no
// minimum: times 3x⁴/u the slope is f - a with
//
//	f = 3x⁴ εκ/(u(u+εκ)) + A_F B_F θ^(-B_F) x²/(x-x_c)    x_c = Dc/Dd
//
// and (u+ε)² instead of u(u+εκ) for the Exponential form. Each term falls as x
// grows: the first as in LimitedExtrema (the other form by 4 - 6x³/(u+ε) < 0), the
// second as x² (x-x_c)^(-B_F-1), whose logarithmic slope 2 - (B_F+1) x/(x-x_c) is
// negative for B_F ≥ 1. Where f is below a already at the dry size, the curve
// only falls: a BoundaryMaximum.
//
// For B_F < 1 adsorption outlasts the Kelvin term: the curve may have a minimum
// or never turn. It is scanned then, and the highest maximum returned.
//
// Errors: those of Check, and ErrNoCrest.
func AdsorptionCrest(dry, kelvin float64, p Adsorption) (Turn, error) {
	if err := p.Check(); err != nil {
		return Turn{}, err
	}
	if p.B < 1 {
		turns, err := AdsorptionExtrema(nil, dry, kelvin, p)
		if err != nil {
			return Turn{}, err
		}
		i, place := Barrier(turns)
		if place == NoBarrier {
			return Turn{}, errEndless
		}
		return turns[i], nil
	}
	return adsorptionCurve{p.On(dry), kelvin / dry}.onlyCrest()
}

// AdsorptionExtrema appends all extrema of the curve to dst in the order of
// their wet size. A curve that never turns has none. Errors: those of Check.
func AdsorptionExtrema(dst []Turn, dry, kelvin float64, p Adsorption) ([]Turn, error) {
	if err := p.Check(); err != nil {
		return dst, err
	}
	return adsorptionCurve{p.On(dry), kelvin / dry}.turns(dst), nil
}

func (c adsorptionCurve) turns(dst []Turn) []Turn {
	if c.p.B >= 1 {
		if crest, err := c.onlyCrest(); err == nil {
			dst = append(dst, crest)
		}
		return dst
	}
	s := scan{from: 1e-6, to: turnEnd, points: adsorptionPoints, dryLnS: c.a + c.DryLnActivity()}
	return s.extrema(dst, c)
}

// onlyCrest solves ln f = ln a by Newton's method in ln t, t = x - 1, started
// from the crests of both terms alone and kept in a bracket.
func (c adsorptionCurve) onlyCrest() (Turn, error) {
	if excess, _ := c.excess(0); !(excess > 0) {
		return Turn{BoundaryMaximum, 0, 1, math.Expm1(c.a + c.DryLnActivity())}, nil
	}
	if excess, _ := c.excess(greatestGrowth - 1); excess >= 0 {
		return Turn{}, errEndless
	}
	lo, hi := math.Inf(-1), math.Log(greatestGrowth-1)
	y := math.Log(c.guess())
	for range mostRootSteps {
		excess, slope := c.excess(math.Exp(y))
		if excess >= 0 {
			lo = y
		} else {
			hi = y
		}
		next := y - excess/slope
		if math.Abs(next-y) <= 1e-9 { // the error left is its square
			y = next
			break
		}
		switch {
		case next > lo && next < hi:
		case math.IsInf(lo, -1):
			next = hi - 5
		default:
			next = lo + (hi-lo)/2
		}
		if next == lo || next == hi {
			break
		}
		y = next
	}
	t := math.Exp(y)
	u := t * (3 + t*(3+t))
	lnS, _ := c.LnSaturation(u)
	return Turn{Maximum, u, 1 + t, math.Expm1(lnS)}, nil
}

// guess returns a t near the crest: x² of the adsorption term is left out, which
// gives t = (A_F B_F layers^(-B_F)/a)^(1/(B_F+1)) for a bare particle.
func (c adsorptionCurve) guess() float64 {
	t := 0.0
	if c.osmotic > 0 {
		t = crestStart(3*c.osmotic/c.a, c.osmotic)
	}
	if c.p.A > 0 {
		film := c.p.A * c.p.B * math.Pow(c.layers, -c.p.B) / c.a
		t = math.Max(t, math.Pow(film, 1/(c.p.B+1))-c.gap)
	}
	return math.Min(math.Max(t, 1e-12), greatestGrowth/2)
}

// excess returns ln f - ln a at t and its derivative by ln t.
func (c adsorptionCurve) excess(t float64) (excess, slope float64) {
	x := 1 + t
	cube := x * x * x
	u := t * (3 + t*(3+t))
	f, df := 0.0, 0.0 // f and df/d ln x
	if c.p.A > 0 {
		f = c.adsorbed(t) * c.p.B * x * x / (t + c.gap)
		df = f * (2 - (c.p.B+1)*x/(t+c.gap))
	}
	if c.osmotic > 0 && c.p.Form == Exponential {
		d := u + c.p.SolubleShare
		g := 3 * x * cube * c.osmotic / (d * d)
		f, df = f+g, df+g*(4-6*cube/d)
	} else if c.osmotic > 0 {
		d := u + c.osmotic
		g := 3 * x * cube * c.osmotic / (u * d)
		f, df = f+g, df+g*(4-3*cube/u-3*cube/d)
	}
	return math.Log(f / c.a), df / f * t / x
}
