package solutes

import (
	"fmt"
	"math"
)

// consistent fails what does not go together in a record whose fields are each
// usable.
func (s *Substance) consistent(in *recordReader) {
	if i := s.Ion; i != nil {
		if i.Cations*i.CationCharge != i.Anions*i.AnionCharge {
			in.fail("ion.anions", fmt.Sprint(i.Anions), fmt.Sprintf("such that charges balance: %d of charge %d against %d of charge %d do not",
				i.Cations, i.CationCharge, i.Anions, i.AnionCharge))
		}
		if i.CationCharge > 1 && i.AnionCharge > 1 {
			in.fail("ion.anion_charge", fmt.Sprint(i.AnionCharge), fmt.Sprintf("1 beside a cation of charge %d: salts of two ions of higher charge pair up and need the third parameter β² and other exponents, which single salts do not have here", i.CationCharge))
		}
		if s.Ions.Value != float64(i.Number()) {
			in.fail("ions", fmt.Sprint(s.Ions.Value), fmt.Sprintf("%d, as the ion parameters say", i.Number()))
		}
		if e := i.Extended; e != nil {
			in.join("ion.extended.", e.JoinLow, e.JoinHigh, e.MaxMolality)
			in.within("ion.extended.", e.JoinHigh, i.MaxMolality)
		}
	}
	if s.Adsorption != nil && !s.Insoluble() {
		in.fail("ions", s.ionsGiven(), "0, insoluble, where adsorption is given")
	}
	if s.Insoluble() && s.VolumeSolubility.Value > 0 && s.Kappa.Value == 0 {
		in.fail("ions", "0", "above 0 where a solubility is given: 0 means insoluble")
	}
	if s.Deliquescence.Known() && s.Efflorescence.Value > s.Deliquescence.Value {
		in.fail("efflorescence", fmt.Sprint(s.Efflorescence.Value), fmt.Sprintf("at most the deliquescence humidity %g", s.Deliquescence.Value))
	}
	if s.DeliquescenceLaw != nil && !s.Deliquescence.Known() {
		in.fail("deliquescence", "nothing", "the humidity at 25 °C that its law starts from")
	}
	if c := s.Concentrated; c != nil && (c.JoinLow != 0 || c.JoinHigh != 0) {
		switch {
		case len(c.Activity) == 0:
			in.fail("concentrated.activity", "nothing", "a list of 1 to 4 numbers where a join is given")
		case !s.MolarMass.Known():
			in.fail("molar_mass", "nothing", "known where concentrated data are joined: 0.001 to 10 kg/mol")
		case s.Ion == nil && !hasOwnModel(*s):
			in.fail("ion", "nothing", "the parameters of the dilute solution that concentrated data are joined to")
		default:
			in.join("concentrated.", c.JoinLow, c.JoinHigh, c.MaxMolality(s.MolarMass.Value))
			if s.Ion != nil {
				in.within("concentrated.", c.JoinHigh, s.Ion.MaxMolality)
			}
		}
	}
	if len(in.errs) == 0 {
		s.physical(in)
	}
}

func (s *Substance) ionsGiven() string {
	if !s.Ions.Known() {
		return "nothing"
	}
	return fmt.Sprint(s.Ions.Value)
}

// join fails a join that is not a window below the end of the data.
func (r *recordReader) join(path string, low, high, end float64) {
	switch {
	case low == 0 && high == 0:
	case !(low > 0 && high > low):
		r.fail(path+"join_high", fmt.Sprint(high), fmt.Sprintf("above join_low, %g mol/kg, which is above 0", low))
	case !(high < end):
		r.fail(path+"join_high", fmt.Sprint(high), fmt.Sprintf("below %.4g mol/kg, where the concentrated data end", end))
	}
}

// within fails a join that reaches beyond the dilute model.
func (r *recordReader) within(path string, high, end float64) {
	if high > end {
		r.fail(path+"join_high", fmt.Sprint(high), fmt.Sprintf("at most %g mol/kg, where the ion parameters end", end))
	}
}

// physical fails models that no solution follows: the water activity must fall
// with concentration over the whole range, and densities stay positive.
func (s *Substance) physical(in *recordReader) {
	if c := s.Concentrated; c != nil && len(c.Density) > 0 && s.Density.Known() {
		p := newDensityPart(*s, 1)
		for x := 0.0; x <= p.end; x += p.end / 200 {
			if v, _ := p.inRange(x); !(v > 0.02 && v < 5) {
				in.fail("concentrated.density", fmt.Sprint(c.Density), fmt.Sprintf("such that the density stays positive: at %.3g %% it does not", x))
				break
			}
		}
	}
	if s.Ion == nil && s.Concentrated != nil && hasOwnModel(*s) {
		s.physicalOwn(in)
	}
	if s.Ion == nil || missing(*s) != nil {
		return
	}
	for _, T := range s.checkedTemperatures() {
		if !s.physicalAt(T, in) {
			return
		}
	}
}

// checkedTemperatures are those (K) at which a record must make sense: all of the
// troposphere, the ends of its own temperature terms, and 25 °C.
func (s *Substance) checkedTemperatures() []float64 {
	temperatures := []float64{referenceTemperature}
	if s.Ion == nil {
		return temperatures
	}
	for T := 233.15; T < 320; T += 10 {
		temperatures = append(temperatures, T)
	}
	if t := s.Ion.Temperature; t != nil {
		temperatures = append(temperatures, t.Low, t.High)
	}
	return temperatures
}

// physicalAt is physical for ion interaction at the temperature T (K).
func (s *Substance) physicalAt(T float64, in *recordReader) bool {
	const rhoWater = 997.05
	salt, err := NewSalt(SaltInput{Ion: s.Ion, Concentrated: s.Concentrated, MolarMass: s.MolarMass.Value,
		Density: s.Density.Value, Hydration: s.Hydration.Value, WaterDensity: rhoWater, Temperature: T})
	if err != nil {
		in.fail("ion", "not usable", err.Error())
		return false
	}
	falls := func(m float64) bool {
		if salt.Water(m) <= 0 {
			return true
		}
		lnaw, slope := salt.LnActivity(salt.Water(m))
		if lnaw < 0 && slope > 0 && !math.IsInf(lnaw, 0) {
			return true
		}
		field := "ion"
		if m > salt.low {
			field = "concentrated"
			if salt.extended {
				field = "ion.extended"
			}
		}
		in.fail(field, fmt.Sprintf("such that the water activity does not fall with concentration at %.3g mol/kg and %.4g K", m, T),
			"checked against its source, or of a shorter range")
		return false
	}
	for m := 1e-6; m < 2*salt.MaxMolality(); m *= 1.02 {
		if !falls(m) {
			return false
		}
	}
	for i := 1; i < joinSteps && salt.high < math.Inf(1); i++ { // however narrow it is
		if !falls(salt.low + (salt.high-salt.low)*float64(i)/joinSteps) {
			return false
		}
	}
	return true
}

// joinSteps is how finely the window between two models is looked at.
const joinSteps = 64

// physicalOwn is physical for data that are joined to a model of the substance's own.
func (s *Substance) physicalOwn(in *recordReader) {
	own, _, _, ok, err := OwnModel(*s, referenceTemperature)
	if !ok || err != nil {
		return
	}
	for u := 1e-3; u < 1e6; u *= 1.05 {
		if lnaw, slope := own.LnActivity(u); !(lnaw < 0 && slope > 0) || math.IsInf(lnaw, 0) {
			in.fail("concentrated", fmt.Sprintf("such that the water activity does not fall with concentration at %.3g volumes of water", u),
				"checked against its source, or left out: "+s.called()+" has a model of its own")
			return
		}
	}
}
