package kappa

import (
	"math"

	"dropcrest/koehler"
)

// Value is a κ from activation, exact and by the classic approximation.
type Value struct {
	Kappa   float64
	Classic float64 // 4A³/(27 Dd³ ln² S), Petters & Kreidenweis 2007, eq. 10
}

// ClassicError returns by how much the approximation is off, relative to the
// exact κ: Classic/Kappa - 1. It is positive, 3.5 % at 1.1 % and 43 nm, and
// +Inf for κ = 0.
func (v Value) ClassicError() float64 { return v.Classic/v.Kappa - 1 }

// FromActivation returns the κ of a particle of that dry diameter (m) whose
// crest lies at supersaturation s (a fraction). Errors are those of
// koehler.KappaOf and Convention.Check.
func FromActivation(dry, s float64, c Convention) (Value, error) {
	if err := c.Check(); err != nil {
		return Value{math.NaN(), math.NaN()}, err
	}
	a := c.Kelvin()
	k, err := koehler.KappaOf(dry, a, s)
	if err != nil {
		return Value{math.NaN(), math.NaN()}, err
	}
	return Value{k, koehler.KappaOfClassic(dry, a, s)}, nil
}

// Size is a dry diameter in m, exact and by the classic approximation.
type Size struct {
	Diameter float64
	Classic  float64 // +Inf for κ = 0
}

// ClassicError returns Classic/Diameter - 1.
func (s Size) ClassicError() float64 { return s.Classic/s.Diameter - 1 }

// DryDiameter returns the dry diameter at which a particle of that κ activates
// at supersaturation s (a fraction). Errors are those of koehler.DryOf and
// Convention.Check.
func DryDiameter(kappa, s float64, c Convention) (Size, error) {
	if err := c.Check(); err != nil {
		return Size{math.NaN(), math.NaN()}, err
	}
	a := c.Kelvin()
	d, err := koehler.DryOf(kappa, a, s)
	if err != nil {
		return Size{math.NaN(), math.NaN()}, err
	}
	return Size{d, koehler.DryOfClassic(kappa, a, s)}, nil
}

// Curve is an activation curve of ambient particles at one supersaturation, as
// a fit of activated fraction against dry size gives it.
type Curve struct {
	D50           float64 // m
	Width         float64 // standard deviation in ln D of the curve
	TransferWidth float64 // standard deviation in ln D of the classifier's transfer function; 0: not taken out
	Plateau       float64 // activated fraction at large sizes
}

// Population is what an activation curve says about the particles.
type Population struct {
	Value
	Spread       float64 // standard deviation of ln κ at the size D50
	Unresolved   bool    // the curve is as narrow as the transfer function: Spread is 0
	Insoluble    float64 // share of particles that never activate, 1 - Plateau
	Low, High    float64 // κ one Spread below and above
	WidthOfKappa float64 // width in ln D that the spread of κ alone makes
}

// FromCurve returns the κ at D50 and the spread of κ that the width of the
// curve implies, its transfer width taken out in quadrature.
//
// At a fixed supersaturation the critical dry diameter is a function of κ, so
// that σ(ln κ) = σ(ln D)·|d ln κ/d ln D|, which is 3 in the classic
// approximation and taken from the exact form here. A plateau below 1 is either
// a share of particles without κ, or an efficiency that was not corrected.
func FromCurve(c Curve, s float64, conv Convention) (Population, error) {
	switch {
	case !(c.Width >= 0):
		return Population{}, &koehler.RangeError{What: "width", Value: c.Width, Right: "0 or more"}
	case !(c.TransferWidth >= 0):
		return Population{}, &koehler.RangeError{What: "transfer width", Value: c.TransferWidth, Right: "0 or more"}
	}
	v, err := FromActivation(c.D50, s, conv)
	if err != nil {
		return Population{}, err
	}
	p := Population{Value: v, Insoluble: 1 - c.Plateau}
	left := c.Width*c.Width - c.TransferWidth*c.TransferWidth
	if left <= 0 {
		p.Unresolved = true
		left = 0
	}
	p.WidthOfKappa = math.Sqrt(left)
	p.Spread = p.WidthOfKappa * -sizeSlope(v.Kappa, c.D50, s, conv.Kelvin())
	p.Low, p.High = v.Kappa*math.Exp(-p.Spread), v.Kappa*math.Exp(p.Spread)
	return p, nil
}

// sizeSlope returns d ln κ/d ln D at fixed supersaturation. Where κ is so near
// 0 that a larger size would have no κ, it is the limit of the classic form.
func sizeSlope(kappa, dry, s, kelvin float64) float64 {
	const h = 1e-4
	up, errUp := koehler.KappaOf(dry*math.Exp(h), kelvin, s)
	down, errDown := koehler.KappaOf(dry*math.Exp(-h), kelvin, s)
	if errUp != nil || errDown != nil || !(kappa > 0) {
		return -3
	}
	return math.Log(up/down) / (2 * h)
}
