package solutes

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// DeliquescenceLaw is how a deliquescence humidity (DRH) follows the temperature,
// in one of two forms. That of Tang & Munkelwitz 1993, Atmos. Environ. 27A, 467,
// about 298 K, is used where Heat is not 0:
//
//	ln(DRH/DRH298) = (ΔH/R) [A (1/T - 1/298) - B ln(T/298) - C (T - 298)]
//
// The other is that of the CRC Handbook, about 298.15 K:
//
//	ln(DRH/DRH25) = B (1/T - 1/298.15)
type DeliquescenceLaw struct {
	Heat       float64    `json:"heat,omitempty"`      // ΔH, enthalpy of solution, J/mol
	Solubility [3]float64 `json:"solubility,omitzero"` // A, B, C: n = A + B T + C T², mol per mol of water
	Exponent   float64    `json:"exponent,omitempty"`  // B of the other form, K
	Low        float64    `json:"low"`                 // K, from here
	High       float64    `json:"high"`                // to here it was compared with measurements
	Source     string     `json:"source"`
	Evidence   Evidence   `json:"evidence"`
}

// ratio returns the DRH at T over that at 25 °C (298 K in the first form).
func (l *DeliquescenceLaw) ratio(T float64) float64 {
	if l.Heat == 0 {
		return math.Exp(l.Exponent * (1/T - 1/referenceTemperature))
	}
	const T0 = 298.0
	a, b, c := l.Solubility[0], l.Solubility[1], l.Solubility[2]
	return math.Exp(l.Heat / atmos.GasConstant * (a*(1/T-1/T0) - b*math.Log(T/T0) - c*(T-T0)))
}

// DeliquescenceHumidity returns the relative humidity (0 to 1) from which a
// large dry particle takes up water and dissolves, at the temperature T (K); ok is
// false if it is not known. 0 stands for what is liquid at every humidity.
//
// It belongs to a flat surface: the water activity of a drop compares with it, not
// the humidity over the drop. Where no law of temperature is known it is the value
// of 25 °C; PhaseNotes says so, and where a law is extrapolated. Compared with
// Greenspan 1977 from 0 to 40 °C the laws are within 0.4 % humidity for NaCl, 0.5 %
// for K2SO4, 0.7 % for KCl, 1 % for NaNO3, 1.1 % for MgCl2 and for (NH4)2SO4, where
// the references disagree by as much at 25 °C already. That of KNO3 is 1.1 % below
// at 25 °C and 2.8 % above at 0 °C: what the CRC Handbook gives is steeper.
func (s Substance) DeliquescenceHumidity(T float64) (humidity float64, ok bool) {
	if !s.Deliquescence.Known() || !(T > 0) {
		return math.NaN(), false
	}
	if s.DeliquescenceLaw == nil {
		return s.Deliquescence.Value, true
	}
	return math.Min(1, s.Deliquescence.Value*s.DeliquescenceLaw.ratio(T)), true
}

// EfflorescenceHumidity returns the relative humidity (0 to 1) at which a
// supersaturated drop crystallises when it is dried; ok is false if it is not
// known. 0 stands for what was not seen to crystallise. Published values are those
// of room temperature and of pure drops: the temperature T (K) is not used, solid
// inclusions crystallise earlier. PhaseNotes says so.
func (s Substance) EfflorescenceHumidity(T float64) (humidity float64, ok bool) {
	if !s.Efflorescence.Known() || !(T > 0) {
		return math.NaN(), false
	}
	return s.Efflorescence.Value, true
}

// disputed is the spread of published deliquescence humidities that needs a note.
const disputed = 0.01

// PhaseNotes says what stands behind the two humidities at the temperature T (K):
// values of 25 °C, laws beyond their range, references that disagree.
func (s Substance) PhaseNotes(T float64) []atmos.Note {
	var notes []atmos.Note
	note := func(code, input, format string, args ...any) {
		notes = append(notes, atmos.Note{Code: code, Input: input, Text: fmt.Sprintf(format, args...)})
	}
	d := s.Deliquescence
	if d.Known() && d.Value > 0 {
		switch law := s.DeliquescenceLaw; {
		case law == nil && away(T):
			note("deliquescence-25c", inputTemperature,
				"The deliquescence humidity of %s is that of 25 °C: no law of temperature is known here.", s.called())
		case law != nil && !(T >= law.Low && T <= law.High):
			note("deliquescence-extrapolated", inputTemperature,
				"The deliquescence humidity of %s is extrapolated: its law is known from %.4g to %.4g °C.",
				s.called(), law.Low-atmos.ZeroCelsius, law.High-atmos.ZeroCelsius)
		}
		if d.High-d.Low > disputed && d.Low > 0 {
			note("deliquescence-disputed", inputComponent,
				"Published deliquescence humidities of %s at 25 °C range from %.4g to %.4g %%; %.4g %% is used.",
				s.called(), 100*d.Low, 100*d.High, 100*d.Value)
		}
	}
	if s.Efflorescence.Known() && s.Efflorescence.Value > 0 && away(T) {
		note("efflorescence-25c", inputTemperature,
			"The efflorescence humidity of %s is that of room temperature.", s.called())
	}
	return notes
}
