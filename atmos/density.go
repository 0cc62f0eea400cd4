package atmos

// WaterDensityRange is where WaterDensity is known to hold. Kell (1975) is
// published for 0 to 150 °C; down to -38 °C its extrapolation was compared
// with IAPWS G12-15, and it stays within 0.011 %.
var WaterDensityRange = Range{235.15, 423.15}

// WaterDensity returns the density (kg/m3) of air-free liquid water at the
// temperature T (K) under one standard atmosphere:
//
//	ρ = (999.83952 + 16.945176 t - 7.9870401e-3 t² - 46.170461e-6 t³
//	     + 105.56302e-9 t⁴ - 280.54253e-12 t⁵) / (1 + 16.879850e-3 t),  t = T - 273.15 K
//
// Range: WaterDensityRange. Accuracy: within 0.0034 kg/m3 of the CIPM density
// (Tanaka et al. 2001) at 0 to 40 °C, within 0.11 kg/m3 of IAPWS G12-15 at -38
// to 0 °C. The denominator is often misprinted as 16.897850e-3, which gives
// 996.730 instead of 997.045 kg/m3 at 25 °C.
//
// Source: Kell, J. Chem. Eng. Data 20 (1975) 97.
func WaterDensity(T float64) float64 {
	t := T - ZeroCelsius
	num := 999.83952 + t*(16.945176+t*(-7.9870401e-3+t*(-46.170461e-6+
		t*(105.56302e-9+t*-280.54253e-12))))
	return num / (1 + 16.879850e-3*t)
}

// WaterMolarVolume returns the molar volume (m3/mol) of liquid water at the
// temperature T (K) under one standard atmosphere: WaterMolarMass over
// WaterDensity, whose range and accuracy it has.
func WaterMolarVolume(T float64) float64 { return WaterMolarMass / WaterDensity(T) }
