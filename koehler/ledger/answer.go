package ledger

import (
	"math"

	"dropcrest/koehler"
)

// Outcome names one of the figures that an answer has.
type Outcome int

const (
	CriticalSupersaturation Outcome = iota // fraction
	CriticalWetSize                        // m, a diameter
	HazeSize                               // m, a diameter
	outcomes
)

// String returns the outcome in words.
func (o Outcome) String() string {
	return [outcomes]string{"critical supersaturation", "critical wet size", "haze size"}[o]
}

// Outcomes returns all outcomes in their order.
func Outcomes() []Outcome { return []Outcome{CriticalSupersaturation, CriticalWetSize, HazeSize} }

// Values holds one number for each outcome. NaN: there is none.
type Values [outcomes]float64

// Answer is what one model says of the particle.
type Answer struct {
	Values
	Crest   koehler.Crest
	NoCrest error // nil: there is a crest
	NoHaze  error // nil: there is a haze drop
}

func none() Values { return Values{math.NaN(), math.NaN(), math.NaN()} }

// answer asks a particle for its crest and its haze drop at the saturation ratio S.
func answer(p koehler.Particle, S float64) Answer {
	a := Answer{Values: none()}
	s := p.Solve(S)
	a.NoCrest, a.NoHaze = s.NoCrest, s.NoHaze
	if s.NoCrest == nil {
		a.Crest = s.Crest
		a.Values[CriticalSupersaturation], a.Values[CriticalWetSize] = s.Crest.Supersaturation, s.Crest.WetDiameter
	}
	if s.NoHaze == nil {
		a.Values[HazeSize] = s.Stable.WetDiameter
	}
	return a
}

// change returns simplified minus full in percent of full.
func change(simplified, full Values) (c Values) {
	for o := range c {
		c[o] = 100 * (simplified[o] - full[o]) / full[o]
	}
	return c
}

// textbook is the answer of the cubic form s = A/D - B/D³ with its closed crest.
// With y = D_c/D the haze drop solves y³ - 3y + 2s/s_c = 0, of which y ≥ 1 is the
// stable branch: y = 2 cos(arccos(-s/s_c)/3), cosh where s < -s_c.
func textbook(p koehler.Particle, S float64) (Answer, error) {
	crest, err := p.Textbook()
	if err != nil {
		return Answer{Values: none()}, err
	}
	a := Answer{Values: none(), Crest: crest}
	a.Values[CriticalSupersaturation], a.Values[CriticalWetSize] = crest.Supersaturation, crest.WetDiameter
	q := (1 - S) / crest.Supersaturation
	y := math.NaN() // above the crest
	switch {
	case q > 1:
		y = 2 * math.Cosh(math.Acosh(q)/3)
	case q >= -1:
		y = 2 * math.Cos(math.Acos(q)/3)
	}
	wet := crest.WetDiameter / y
	if !(wet > p.DryDiameter) { // the form knows no dry particle
		a.NoHaze = koehler.ErrNoHaze
		return a, nil
	}
	a.Values[HazeSize] = wet
	return a, nil
}
