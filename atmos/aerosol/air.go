package aerosol

import (
	"math"

	"dropcrest/atmos"
)

// Air is the state of the air that a concentration refers to.
type Air struct {
	Temperature float64 // K
	Pressure    float64 // Pa
}

// StandardAir is the state that "STP" means in atmospheric data: 0 °C and 1013.25
// hPa (EBAS/GAW and the CF conventions; other trades mean other states).
func StandardAir() Air { return Air{atmos.ZeroCelsius, atmos.StandardPressure} }

// Check returns nil or an *InputError.
func (a Air) Check() error {
	switch {
	case !(a.Temperature > 0) || math.IsInf(a.Temperature, 1):
		return &InputError{"temperature", -1, a.Temperature, "above 0 K"}
	case !(a.Pressure > 0) || math.IsInf(a.Pressure, 1):
		return &InputError{"pressure", -1, a.Pressure, "above 0 Pa"}
	}
	return nil
}

// To returns the factor by which a concentration stated at a is multiplied to be
// stated at b: p_b T_a/(p_a T_b), the ideal gas.
func (a Air) To(b Air) float64 {
	return b.Pressure * a.Temperature / (a.Pressure * b.Temperature)
}
