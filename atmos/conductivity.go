package atmos

// AirConductivityRange is where AirConductivity was compared with a reference
// equation, -40 to 50 °C.
var AirConductivityRange = Range{233.15, 323.15}

// AirConductivity returns the thermal conductivity (W/(m K)) of dry air at the
// temperature T (K):
//
//	k_a = 4.39e-3 + 7.1e-5 T
//
// Range: AirConductivityRange. Accuracy: 1.3 % (-40 °C) to 2.7 % (50 °C) below
// Lemmon and Jacobsen (2004). Moisture matters less than that.
//
// Source: Seinfeld and Pandis, Atmospheric Chemistry and Physics, whose form
// follows Beard and Pruppacher, J. Atmos. Sci. 28 (1971) 1455, within 0.1 %.
func AirConductivity(T float64) float64 { return 4.39e-3 + AirConductivitySlope*T }

// AirConductivitySlope is dk_a/dT (W/(m K²)) of AirConductivity.
const AirConductivitySlope = 7.1e-5
