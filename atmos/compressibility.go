package atmos

// CompressibilityRange is where Compressibility is known to hold. Kell (1975) is
// published for 0 to 150 °C; down to -30 °C its extrapolation was compared with
// IAPWS G12-15. Below that, supercooled water softens faster than the formula.
var CompressibilityRange = Range{243.15, 423.15}

// Compressibility returns the isothermal compressibility (1/Pa) of liquid
// water at the temperature T (K) under one standard atmosphere:
//
//	κ_T = 1e-11 (50.88496 + 0.6163813 t + 1.459187e-3 t² + 20.08438e-6 t³
//	      - 58.47727e-9 t⁴ + 410.4110e-12 t⁵) / (1 + 19.67348e-3 t),  t = T - 273.15 K
//
// Range: CompressibilityRange. Accuracy: within 5e-5 (relative) of IAPWS
// SR6-08(2011) at 0 to 50 °C. Against IAPWS G12-15 it is 0.03 % low at -10 °C,
// 0.14 % at -20 °C, 0.53 % at -30 °C and 3.1 % at -38 °C.
//
// Source: Kell, J. Chem. Eng. Data 20 (1975) 97.
func Compressibility(T float64) float64 {
	t := T - ZeroCelsius
	num := 50.88496 + t*(0.6163813+t*(1.459187e-3+t*(20.08438e-6+
		t*(-58.47727e-9+t*410.4110e-12))))
	return 1e-11 * num / (1 + 19.67348e-3*t)
}
