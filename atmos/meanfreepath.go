package atmos

// MeanFreePathRange is taken to be that of AirViscosity, with which the mean
// free path shares its temperature dependence.
var MeanFreePathRange = Range{233.15, 323.15}

// MeanFreePath returns the mean free path (m) of air molecules at the
// temperature T (K) and the pressure p (Pa):
//
//	λ = 67.3 nm (T/296.15 K)² (101325 Pa/p) (296.15 K + 110.4 K)/(T + 110.4 K)
//
// The reference pressure is 101.325 kPa. The standard is quoted with 101.3 kPa
// too, which makes λ smaller by 2.5e-4 of its value.
//
// Range: MeanFreePathRange. Accuracy: a convention rather than a measurement;
// Jennings (1988) is 1.6 % lower at 23 °C. It belongs together with
// SlipCorrection, whose constants were found with it.
//
// Source: ISO 15900:2020; Allen and Raabe, Aerosol Sci. Technol. 4 (1985) 269.
func MeanFreePath(T, p float64) float64 {
	x := T / referenceTemperature
	return referenceFreePath * x * x * (StandardPressure / p) *
		(referenceTemperature + sutherlandConstant) / (T + sutherlandConstant)
}
