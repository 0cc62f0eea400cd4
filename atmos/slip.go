package atmos

import "math"

// Constants of the slip correction, Kim et al. (2005).
const (
	slipA = 1.165
	slipB = 0.483
	slipC = 0.997
)

// SlipKnudsenRange is the range of Knudsen numbers (without unit) in which the
// constants of SlipCorrection were measured (Kim et al. 2005, from memory).
// Towards both ends the formula has the right limits.
var SlipKnudsenRange = Range{0.5, 83}

// SlipCorrection returns the Cunningham slip correction (without unit) of a
// sphere of diameter d (m) in air of temperature T (K) and pressure p (Pa):
//
//	C = 1 + Kn (1.165 + 0.483 exp(-0.997/Kn)),  Kn = 2 λ/d
//
// with λ of MeanFreePath. C tends to 1 for large spheres, and to 1.648 Kn for
// small ones.
//
// Range: SlipKnudsenRange (at 23 °C and 101.325 kPa diameters of 1.6 to
// 270 nm). Accuracy: about 1 %; the constants of Allen and Raabe (1985) give
// 2.8 % more at 10 nm, 0.6 % more at 100 nm and 0.3 % less at 1 µm.
//
// Source: Kim, Mulholland, Kukuck and Pui, J. Res. Natl. Inst. Stand. Technol.
// 110 (2005) 31; ISO 15900:2020.
func SlipCorrection(d, T, p float64) float64 {
	c, _ := slip(2 * MeanFreePath(T, p) / d)
	return c
}

// slip returns the slip correction at a Knudsen number and its logarithmic
// slope d ln C/d ln Kn, which lies between 0 and 1.
func slip(kn float64) (c, slope float64) {
	e := slipB * math.Exp(-slipC/kn)
	c = 1 + kn*(slipA+e)
	return c, (kn*(slipA+e) + slipC*e) / c
}
