package atmos

import "math"

// CriticalTemperature of water (K), as IAPWS R1-76(2014) takes it.
const CriticalTemperature = 647.096

// SurfaceTensionRange is where SurfaceTension may be used. The release covers
// the triple point to the critical point and calls the extrapolation to at
// least -25 °C reasonable.
var SurfaceTensionRange = Range{248.15, CriticalTemperature}

// SurfaceTension returns the surface tension (N/m) of pure water against its
// vapour, or against air, at the temperature T (K):
//
//	σ = 0.2358 τ^1.256 (1 - 0.625 τ),  τ = 1 - T/647.096 K
//
// Range: SurfaceTensionRange. Accuracy: about 0.5 % near room temperature, as
// the release states. Below -25 °C measurements to -32 °C depart from the
// extrapolation. Above the critical temperature the result is NaN.
//
// Source: IAPWS R1-76(2014); Vargaftik, Volkov and Voljak, J. Phys. Chem. Ref.
// Data 12 (1983) 817.
func SurfaceTension(T float64) float64 {
	tau := 1 - T/CriticalTemperature
	return 0.2358 * math.Pow(tau, 1.256) * (1 - 0.625*tau)
}

// SurfaceTensionLogSlope returns d ln σ/dT (1/K) of SurfaceTension at the
// temperature T (K), by differentiating its formula.
func SurfaceTensionLogSlope(T float64) float64 {
	tau := 1 - T/CriticalTemperature
	return -(1.256/tau - 0.625/(1-0.625*tau)) / CriticalTemperature
}
