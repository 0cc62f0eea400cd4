package atmos

import "math"

// VapourDiffusivityRange is where VapourDiffusivity was published, -40 to
// 40 °C.
var VapourDiffusivityRange = Range{233.15, 313.15}

// VapourDiffusivity returns the diffusivity (m2/s) of water vapour in air at
// the temperature T (K) and the pressure p (Pa):
//
//	D_v = 2.11e-5 (T/273.15 K)^1.94 (101325 Pa/p)
//
// Range: VapourDiffusivityRange. Accuracy: references differ by 2 to 5 %;
// Marrero and Mason (1972) lie within 0.5 % at 10 to 25 °C and 0.8 % higher at
// 40 °C.
//
// Source: Hall and Pruppacher, J. Atmos. Sci. 33 (1976) 1995.
func VapourDiffusivity(T, p float64) float64 {
	return 2.11e-5 * math.Pow(T/ZeroCelsius, diffusivityExponent) * (StandardPressure / p)
}

const diffusivityExponent = 1.94

// VapourDiffusivityLogSlope returns d ln D_v/dT (1/K) of VapourDiffusivity at the
// temperature T (K).
func VapourDiffusivityLogSlope(T float64) float64 { return diffusivityExponent / T }
