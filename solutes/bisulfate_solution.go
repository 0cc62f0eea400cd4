package solutes

import (
	"fmt"
	"math"
)

// SodiumBisulfateNote says how well the model of sodium bisulfate is known.
const SodiumBisulfateNote = "sodium bisulfate: from 1 to 7 mol/kg the ion model and the polynomial of Tang & Munkelwitz 1994 differ by up to 0.032 in water activity; the ion model is used, joined from 7 to 10 mol/kg where the two meet"

// BorrowedBisulfateNote says which parameters stand in for unknown ones.
const BorrowedBisulfateNote = "the ion parameters of ammonium and bisulfate are not known; those of sodium and bisulfate stand in"

// bisulfateSalt is what the model needs to know about one sulfate.
type bisulfateSalt struct {
	acid   float64 // mol of H+ per mol of sulfate
	groups float64 // mol of sulfate per formula unit
	sodium bool
	// Join to the polynomial in mol of sulfate per kg where the catalogue
	// gives none.
	low, high float64
}

// bisulfateSaltOf finds it by the key of the catalogue.
func bisulfateSaltOf(key string) (bisulfateSalt, bool) {
	switch key {
	case "ammonium_bisulfate":
		return bisulfateSalt{acid: 1, groups: 1}, true
	case "letovicite":
		return bisulfateSalt{acid: 0.5, groups: 2}, true
	case "sodium_bisulfate":
		// The curves of the two models cross at 8.7 mol/kg. No published
		// window is known; this one holds the crossing.
		return bisulfateSalt{acid: 1, groups: 1, sodium: true, low: 7, high: 10}, true
	}
	return bisulfateSalt{}, false
}

// bisulfateEnd is how far the ion model reaches without a polynomial, mol of
// sulfate per kg: the largest molality at which H2SO4 was compared.
const bisulfateEnd = 6

// NewBisulfate returns the solution of ammonium bisulfate, letovicite or sodium
// bisulfate (by its Key) at T, 180 to 373.15 K: HSO4- ⇌ H+ + SO4-- is solved
// with ion interaction, joined to the polynomial that the substance carries
// (Tang and Munkelwitz 1994) over
//
//	φ = (1-s) φ_ions + s φ_polynomial,  s = t² (3 - 2t),  t = (m - m1)/(m2 - m1)
//
// The polynomial is not evaluated below m1. Errors are of type *UnusableError
// or say that the substance is none of these.
func NewBisulfate(s Substance, T float64) (*OsmoticSolution, error) {
	salt, ok := bisulfateSaltOf(s.Key)
	if !ok {
		return nil, &NoModelError{s.Name, "ammonium bisulfate, letovicite or sodium bisulfate"}
	}
	one, err := molalityAtOne(s, T)
	if err != nil {
		return nil, err
	}
	ions := newBisulfate(salt.acid, salt.sodium, DebyeHueckel(T))
	phi, top := ions.osmotic, float64(bisulfateEnd)
	if s.Concentrated != nil {
		j := joinedPolynomial{salt: salt, c: s.Concentrated.Activity, mass: s.MolarMass.Value / salt.groups}
		j.low, j.high = salt.low, salt.high
		if s.Concentrated.Joined() {
			j.low, j.high = salt.groups*s.Concentrated.JoinLow, salt.groups*s.Concentrated.JoinHigh
		}
		phi = func(m float64) float64 { return j.osmotic(ions, m) }
		if top, err = j.end(s.Concentrated); err != nil {
			return nil, err
		}
	}
	o := &OsmoticSolution{
		model: newOsmoticTable(sulfateIons, top, phi), ions: sulfateIons * salt.groups,
		molality: one, highest: top / salt.groups,
	}
	if salt.groups != 1 {
		o.model = moleculesOf{o.model, salt.groups}
	}
	return o, nil
}

// joinedPolynomial is a polynomial of the water activity in mass percent and
// its join to the ion model, in mol of sulfate per kg.
type joinedPolynomial struct {
	salt      bisulfateSalt
	c         []float64
	mass      float64 // kg per mol of sulfate
	low, high float64
}

// end returns the largest molality. It refuses a polynomial that ends within
// the join or has no water left at its end.
func (j *joinedPolynomial) end(c *Concentrated) (float64, error) {
	const model = "concentrated bisulfate solution"
	top := c.MaxMolality(j.mass)
	if !(c.MaxMassPercent < 100 && j.high > j.low && top > j.high) {
		return 0, &UnusableError{model, "the largest mass percent", c.MaxMassPercent,
			fmt.Sprintf("above %.4g, where the join ends, and below 100", 100*j.high*j.mass/(1+j.high*j.mass))}
	}
	if beyond := top * math.Exp(4*tableStep); !(j.polynomial(beyond) > 0) || math.IsInf(j.polynomial(beyond), 1) {
		return 0, &UnusableError{model, "the largest mass percent", c.MaxMassPercent, "in the range where the polynomial stays above a water activity of 0"}
	}
	return top, nil
}

func (j *joinedPolynomial) osmotic(ions *bisulfate, m float64) float64 {
	t := min(1, (m-j.low)/(j.high-j.low))
	if t <= 0 {
		return ions.osmotic(m)
	}
	conc := j.polynomial(m)
	if t == 1 {
		return conc
	}
	s := t * t * (3 - 2*t)
	return (1-s)*ions.osmotic(m) + s*conc
}

func (j *joinedPolynomial) polynomial(m float64) float64 {
	x := 100 * m * j.mass / (1 + m*j.mass)
	less := 0.0 // a_w - 1
	for i := len(j.c) - 1; i >= 0; i-- {
		less = (less + j.c[i]) * x
	}
	return -math.Log1p(less) / (sulfateIons * waterMolarMass * m)
}
