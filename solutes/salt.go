package solutes

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/atmos"
)

const waterMolarMass = atmos.WaterMolarMass

// SaltInput is what a Salt is made of. The zero value of DebyeHueckel stands for
// the one of the temperature, the zero value of Share for 1.
type SaltInput struct {
	Ion          *Ion
	Concentrated *Concentrated // nil or without a join: not used
	MolarMass    float64       // kg/mol
	Density      float64       // kg/m³, dry
	Hydration    float64       // mol of crystal water a formula unit; 0: anhydrous
	WaterDensity float64       // kg/m³
	Temperature  float64       // K
	DebyeHueckel float64       // A_φ, (kg/mol)^½
	Share        float64       // of the dry volume, the rest being insoluble
}

// Salt is the water activity of one salt's solution by ion interaction, joined
// to concentrated data where there are some:
//
//	ln a_w = -ν M_w m φ(m),  m = c/u
//	φ = (1-s) φ_dilute + s φ_concentrated,  s = t² (3 - 2t),  t = (m - m1)/(m2 - m1)
//
// A hydrate brings crystal water, h volumes per volume of dry particle: m = c/(u+h).
//
// Below m1 the concentrated data are not evaluated. Above the end of the range
// the tangent of m φ against m is held, so that the activity stays finite, smooth
// and increasing in u; LeastWater tells where that begins. A Salt is immutable;
// its methods do not allocate.
//
// Sources: Pitzer & Mayorga, J. Phys. Chem. 77, 2300, 1973; those of Concentrated
// and ExtendedFit.
type Salt struct {
	perWater float64 // molality times u + crystal, mol/kg
	crystal  float64 // volume of crystal water per volume of dry particle
	nuMw     float64
	dilute   pitzer

	low, high float64 // join, mol/kg; +Inf: none
	extended  bool    // the concentrated model is fit, not poly
	fit       pitzer
	poly      polynomial

	end, endValue, endSlope float64 // m φ and its slope by m where the range ends
}

// NewSalt makes a Salt. It is an error if there are no ion-interaction parameters
// or if a number is not positive and finite.
func NewSalt(in SaltInput) (*Salt, error) {
	if in.Ion == nil {
		return nil, errors.New("no ion-interaction parameters")
	}
	if !(in.Hydration >= 0) || math.IsInf(in.Hydration, 1) {
		return nil, fmt.Errorf("crystal water of a salt is %g mol: it must be 0 or more and finite", in.Hydration)
	}
	if in.DebyeHueckel == 0 {
		in.DebyeHueckel = DebyeHueckel(in.Temperature)
	}
	if in.Share == 0 {
		in.Share = 1
	}
	for _, q := range []struct {
		name  string
		value float64
	}{
		{"molar mass", in.MolarMass}, {"density", in.Density}, {"density of water", in.WaterDensity},
		{"temperature", in.Temperature}, {"Debye-Hückel slope", in.DebyeHueckel}, {"share", in.Share},
	} {
		if !(q.value > 0) || math.IsInf(q.value, 1) {
			return nil, fmt.Errorf("%s of a salt is %g: it must be positive and finite", q.name, q.value)
		}
	}
	s := &Salt{
		perWater: in.Share * in.Density / (in.MolarMass * in.WaterDensity),
		nuMw:     float64(in.Ion.Number()) * waterMolarMass,
		dilute:   in.Ion.pitzer(in.DebyeHueckel, in.Temperature),
		low:      math.Inf(1), high: math.Inf(1),
		end: in.Ion.MaxMolality,
	}
	s.crystal = s.perWater * in.Hydration * waterMolarMass
	s.join(in)
	phi, slope := s.inRange(s.end)
	s.endValue, s.endSlope = s.end*phi, phi+slope
	return s, nil
}

func (s *Salt) join(in SaltInput) {
	switch e := in.Ion.Extended; {
	case e != nil && e.JoinHigh == 0:
		s.dilute, s.end = in.Ion.extended(in.DebyeHueckel), e.MaxMolality
	case e != nil:
		s.low, s.high, s.end = e.JoinLow, e.JoinHigh, e.MaxMolality
		s.extended, s.fit = true, in.Ion.extended(in.DebyeHueckel)
	case in.Concentrated.Joined():
		c := in.Concentrated
		s.low, s.high, s.end = c.JoinLow, c.JoinHigh, c.MaxMolality(in.MolarMass)
		s.poly = polynomial{molarMass: in.MolarMass, nuMw: s.nuMw, low: c.JoinLow}
		copy(s.poly.c[:], c.Activity)
	}
}

// LnActivity returns ln a_w and its derivative by ln u.
func (s *Salt) LnActivity(u float64) (lnaw, slope float64) {
	water := u + s.crystal
	m := s.perWater / water
	if m > s.end {
		lnaw = -s.nuMw * (s.endValue + s.endSlope*(m-s.end))
		return lnaw, s.nuMw * s.endSlope * m * (u / water)
	}
	phi, dphi := s.inRange(m)
	return -s.nuMw * m * phi, s.nuMw * m * (phi + dphi) * (u / water)
}

// LeastWater returns u at the highest molality of the published range; 0 where the
// crystal water alone keeps the solution inside.
func (s *Salt) LeastWater() float64 { return max(0, s.Water(s.end)) }

// OfShare returns the solution of a particle of which only that share of the dry
// volume, above 0 and at most 1, is this salt as it stands; the rest is insoluble
// and u counts per volume of the whole.
func (s *Salt) OfShare(share float64) *Salt {
	part := *s
	part.perWater *= share
	part.crystal *= share
	return &part
}

// Molality returns mol of salt per kg of water at u.
func (s *Salt) Molality(u float64) float64 { return s.perWater / (u + s.crystal) }

// Water returns u at the molality m (mol/kg), below 0 where that is more
// concentrated than the melted hydrate.
func (s *Salt) Water(m float64) float64 { return s.perWater/m - s.crystal }

// MaxMolality returns the end of the published range in mol/kg.
func (s *Salt) MaxMolality() float64 { return s.end }

// Osmotic returns the osmotic coefficient φ at the molality m (mol/kg).
func (s *Salt) Osmotic(m float64) float64 {
	if m > s.end {
		return (s.endValue + s.endSlope*(m-s.end)) / m
	}
	phi, _ := s.inRange(m)
	return phi
}

// LnGamma returns the logarithm of the salt's mean activity coefficient at the
// molality m (mol/kg). It is known where plain ion interaction is used, below any
// join and within the range; elsewhere it returns NaN.
func (s *Salt) LnGamma(m float64) float64 {
	if m > min(s.low, s.end) {
		return math.NaN()
	}
	return s.dilute.lnGamma(m)
}

// inRange returns φ and dφ/d ln m up to the end of the range.
func (s *Salt) inRange(m float64) (phi, slope float64) {
	if m <= s.low {
		return s.dilute.osmotic(m)
	}
	phiC, slopeC := s.concentrated(m)
	if m >= s.high {
		return phiC, slopeC
	}
	phiD, slopeD := s.dilute.osmotic(m)
	width := s.high - s.low
	t := (m - s.low) / width
	w := t * t * (3 - 2*t)
	phi = phiD + w*(phiC-phiD)
	slope = slopeD + w*(slopeC-slopeD) + (phiC-phiD)*6*t*(1-t)*m/width
	return phi, slope
}

func (s *Salt) concentrated(m float64) (phi, slope float64) {
	if s.extended {
		return s.fit.osmotic(m)
	}
	return s.poly.osmotic(m)
}
