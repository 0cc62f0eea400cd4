package atmos

import "math"

// VapourPressureRange is where VapourPressure was published. Above it the
// formula soon fails (+0.6 % at 100 °C).
var VapourPressureRange = Range{123, 332}

// VapourPressure returns the saturation vapour pressure (Pa) over flat liquid
// water, supercooled water included, at the temperature T (K). It is that of
// the pure vapour: air above the water raises it by some 0.4 % at 1000 hPa.
//
//	ln e = 54.842763 - 6763.22/T - 4.210 ln T + 0.000367 T
//	       + tanh(0.0415 (T - 218.8)) (53.878 - 1331.22/T - 9.44523 ln T + 0.014025 T)
//
// Range: VapourPressureRange. Accuracy: within 0.0086 % of IAPWS-95 at 2 to
// 50 °C; against an integration of the Gibbs energies of IAPWS G12-15 it is
// 0.03 % high at -20 °C, 0.10 % at -30 °C and 0.18 % at -40 °C.
//
// Source: Murphy and Koop, Q. J. R. Meteorol. Soc. 131 (2005) 1539, eq. 10.
func VapourPressure(T float64) float64 {
	ln := math.Log(T)
	return math.Exp(54.842763 - 6763.22/T - 4.210*ln + 0.000367*T +
		math.Tanh(0.0415*(T-218.8))*(53.878-1331.22/T-9.44523*ln+0.014025*T))
}

// VapourPressureLogSlope returns d ln e/dT (1/K) of VapourPressure at the
// temperature T (K), by differentiating its formula.
func VapourPressureLogSlope(T float64) float64 {
	ln := math.Log(T)
	th := math.Tanh(0.0415 * (T - 218.8))
	cold := 53.878 - 1331.22/T - 9.44523*ln + 0.014025*T
	return 6763.22/(T*T) - 4.210/T + 0.000367 +
		0.0415*(1-th*th)*cold +
		th*(1331.22/(T*T)-9.44523/T+0.014025)
}
