package atmos

import "math"

// LatentHeatRange is where LatentHeat is known to hold. Murphy and Koop give
// their eq. 9 for 236 to 273.16 K; up to 50 °C it was compared with IAPWS-95.
var LatentHeatRange = Range{236, 323.15}

// LatentHeat returns the latent heat of vaporisation (J/kg) of liquid water at
// the temperature T (K):
//
//	L = (56579 - 42.212 T + exp(0.1149 (281.6 - T))) J/mol / 0.01801528 kg/mol
//
// Range: LatentHeatRange. Accuracy: -0.07 % at -30 °C, -0.04 % at -20 °C and
// -0.01 % at 0 °C against Clapeyron's equation on IAPWS G12-15; +0.04 % at
// 40 °C and +0.06 % at 50 °C against IAPWS-95.
//
// Source: Murphy and Koop, Q. J. R. Meteorol. Soc. 131 (2005) 1539, eq. 9.
func LatentHeat(T float64) float64 {
	return (56579 - 42.212*T + math.Exp(0.1149*(281.6-T))) / WaterMolarMass
}

// LinearLatentHeatRange is where LinearLatentHeat stays within 0.07 % of
// reference values, -20 to 50 °C.
var LinearLatentHeatRange = Range{253.15, 323.15}

// LinearLatentHeat returns the latent heat of vaporisation (J/kg) at the
// temperature T (K) in the linear form that parcel models use:
//
//	L = 2.501e6 - 2370 t,  t = T - 273.15 K
//
// Range: LinearLatentHeatRange. Accuracy: within 0.011 % of IAPWS-95 at 0 to
// 40 °C, -0.06 % at -20 °C, but -0.2 % at -30 °C and -0.7 % at -40 °C.
//
// Source: common practice; Bolton, Mon. Weather Rev. 108 (1980) 1046, has the
// same numbers.
func LinearLatentHeat(T float64) float64 { return 2.501e6 + LinearLatentHeatSlope*(T-ZeroCelsius) }

// LinearLatentHeatSlope is dL/dT (J/(kg K)) of LinearLatentHeat: by Kirchhoff's law
// the heat capacity of vapour less that of the liquid.
const LinearLatentHeatSlope = -2370.0
