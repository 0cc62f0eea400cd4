package spectrum

import (
	"math"

	"gonum.org/v1/gonum/mathext"
)

// Percent is the supersaturation of 1 %, in which the coefficients of the power
// law and of Cohard's form are measured everywhere.
const Percent = 0.01

// Form is an analytic spectrum: a Power, a Cohard or an ErrorFunctions.
type Form interface {
	Count(s float64) float64 // 1/m³ at a supersaturation (a fraction)
	Parameters() []Parameter
}

// Parameter is one number of a form.
type Parameter struct {
	Key   string // for scripts, with the unit: "count_at_one_percent_per_m3"
	Value float64
}

// Power is the spectrum of Twomey 1959 (Geofis. Pura Appl. 43, 243; from memory),
//
//	N = C (s/1 %)^K,
//
// which has no bound at high s.
type Power struct {
	C float64 // 1/m³ at 1 %
	K float64
}

// Count returns N at s.
func (p Power) Count(s float64) float64 { return p.C * math.Pow(s/Percent, p.K) }

// Parameters returns C and K.
func (p Power) Parameters() []Parameter {
	return []Parameter{{"count_at_one_percent_per_m3", p.C}, {"exponent", p.K}}
}

// Cohard is the spectrum of Cohard, Pinty & Bedos 1998 (J. Atmos. Sci. 55, 3348;
// from memory), with S = s/1 %:
//
//	dN/dS = C K S^(K-1) (1 + Beta S²)^(-Mu)
//	N     = C S^K 2F1(Mu, K/2; K/2+1; -Beta S²)
//
// Beta → 0 is the power law. For Mu > K/2 it is bounded, see Limit. The relative
// error is some 1e-13, and 1e-16/|Mu - K/2| where that is larger.
type Cohard struct {
	C    float64 // 1/m³
	K    float64 // > 0
	Mu   float64 // ≥ 0
	Beta float64 // per square percent, ≥ 0
}

// Count returns N at s.
func (c Cohard) Count(s float64) float64 {
	S, b := s/Percent, c.K/2
	z := c.Beta * S * S
	switch {
	case z < 1e-9: // the first term of the series, the next is below rounding
		return c.C * math.Pow(S, c.K) * (1 - c.Mu*b/(b+1)*z)
	case c.Mu > b: // through the incomplete beta function, which has no cancellation
		return c.Limit() * mathext.RegIncBeta(b, c.Mu-b, z/(1+z))
	}
	return c.C * math.Pow(S, c.K) * mathext.Hypergeo(c.Mu, b, b+1, -z)
}

// Limit returns the number at high supersaturation in 1/m³,
//
//	C Beta^(-K/2) Γ(K/2+1) Γ(Mu-K/2)/Γ(Mu),
//
// +Inf for Mu ≤ K/2.
func (c Cohard) Limit() float64 {
	b := c.K / 2
	if !(c.Mu > b && c.Beta > 0) {
		return math.Inf(1)
	}
	return c.C * math.Exp(lnGamma(b+1)+lnGamma(c.Mu-b)-lnGamma(c.Mu)-b*math.Log(c.Beta))
}

func lnGamma(x float64) float64 {
	y, _ := math.Lgamma(x)
	return y
}

// Parameters returns C, K, Mu and Beta.
func (c Cohard) Parameters() []Parameter {
	return []Parameter{{"coefficient_per_m3", c.C}, {"exponent", c.K}, {"mu", c.Mu}, {"beta_per_square_percent", c.Beta}}
}

// ErrorFunction is one step of a spectrum, centred at a supersaturation:
//
//	N(s) = Number/2 [1 + erf(ln(s/Centre)/Width)]
type ErrorFunction struct {
	Number float64 // 1/m³
	Centre float64 // S1, a fraction
	Width  float64 // w, in ln s
}

// ErrorFunctions is a sum of one or two steps, the form of Pöhlker et al. 2016 (Atmos.
// Chem. Phys. 16, 15709) for activated fractions, here for numbers.
type ErrorFunctions []ErrorFunction

// Count returns N at s, precise far in the lower tail.
func (e ErrorFunctions) Count(s float64) float64 {
	total := 0.0
	for _, f := range e {
		total += f.Number / 2 * math.Erfc(math.Log(f.Centre/s)/f.Width)
	}
	return total
}

// Parameters returns number, centre and width of each step.
func (e ErrorFunctions) Parameters() []Parameter {
	var all []Parameter
	for i, f := range e {
		name := func(key string) string { return "step_" + string(rune('1'+i)) + "_" + key }
		all = append(all, Parameter{name("count_per_m3"), f.Number},
			Parameter{name("centre_percent"), f.Centre / Percent}, Parameter{name("width"), f.Width})
	}
	return all
}
