package atmos

import "math"

// Reference state of ISO 15900, shared by viscosity and mean free path.
const (
	referenceViscosity   = 1.83245e-5 // Pa s
	referenceFreePath    = 67.3e-9    // m
	referenceTemperature = 296.15     // K
	sutherlandConstant   = 110.4      // K
)

// AirViscosityRange is where AirViscosity was compared with a reference
// equation, -40 to 50 °C.
var AirViscosityRange = Range{233.15, 323.15}

// AirViscosity returns the dynamic viscosity (Pa s) of dry air at the
// temperature T (K), by Sutherland's formula:
//
//	η = 1.83245e-5 (T/296.15 K)^1.5 (296.15 K + 110.4 K)/(T + 110.4 K)
//
// Range: AirViscosityRange. Accuracy: 0.03 % (-40 °C) to 0.25 % (50 °C) below
// Lemmon and Jacobsen (2004).
//
// Source: ISO 15900:2020, after Kim et al., J. Res. Natl. Inst. Stand.
// Technol. 110 (2005) 31.
func AirViscosity(T float64) float64 {
	x := T / referenceTemperature
	return referenceViscosity * x * math.Sqrt(x) *
		(referenceTemperature + sutherlandConstant) / (T + sutherlandConstant)
}
