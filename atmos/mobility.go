package atmos

import "math"

// Mobility returns the electrical mobility (m2/(V s)) of a sphere of diameter
// d (m) that carries a number of elementary charges, in air of temperature T
// (K) and pressure p (Pa):
//
//	Z = n e C(d)/(3 π η d)
//
// with C of SlipCorrection and η of AirViscosity, whose ranges it has. The sign
// is that of the charges. Accuracy: that of the slip correction, about 1 %.
//
// Source: ISO 15900:2020.
func Mobility(d float64, charges int, T, p float64) float64 {
	return mobilityFactor(charges, T) / slipFree(d, MeanFreePath(T, p))
}

// DiameterFromMobility returns the diameter (m) of the sphere that has the
// electrical mobility Z (m2/(V s)) with that number of elementary charges, in
// air of temperature T (K) and pressure p (Pa). It inverts Mobility to full
// precision (a few units in the last place), for any size.
//
// Z and charges must have the same sign and not be zero; else the result is
// NaN.
func DiameterFromMobility(Z float64, charges int, T, p float64) float64 {
	return fromSlipFree(mobilityFactor(charges, T)/Z, MeanFreePath(T, p))
}

// mobilityFactor returns n e/(3 π η), in m3/(V s).
func mobilityFactor(charges int, T float64) float64 {
	return float64(charges) * ElementaryCharge / (3 * math.Pi * AirViscosity(T))
}
