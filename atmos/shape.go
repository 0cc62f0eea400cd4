package atmos

// VolumeEquivalent returns the diameter (m) of the sphere that has the volume
// of a compact particle of this mobility diameter (m) and dynamic shape factor
// χ, in air of temperature T (K) and pressure p (Pa). It solves
//
//	D_m/C(D_m) = χ D_ve/C(D_ve)
//
// with C of SlipCorrection, to full precision (a few units in the last place).
// χ is 1 for a sphere, about 1.08 for a cube such as dry sodium chloride.
//
// Range: that of SlipCorrection. χ is taken as one number; that of a real
// particle changes by a few per cent between the free-molecule and the
// continuum regime. Arguments that are not positive give NaN.
//
// Source: DeCarlo et al., Aerosol Sci. Technol. 38 (2004) 1185.
func VolumeEquivalent(mobilityDiameter, shapeFactor, T, p float64) float64 {
	if shapeFactor == 1 && mobilityDiameter > 0 {
		return mobilityDiameter // a sphere, to the last digit
	}
	lambda := MeanFreePath(T, p)
	return fromSlipFree(slipFree(mobilityDiameter, lambda)/shapeFactor, lambda)
}

// MobilityDiameter returns the mobility diameter (m) of a compact particle of
// this volume-equivalent diameter (m) and dynamic shape factor. It is the
// inverse of VolumeEquivalent and says the rest.
func MobilityDiameter(volumeEquivalent, shapeFactor, T, p float64) float64 {
	if shapeFactor == 1 && volumeEquivalent > 0 {
		return volumeEquivalent
	}
	lambda := MeanFreePath(T, p)
	return fromSlipFree(shapeFactor*slipFree(volumeEquivalent, lambda), lambda)
}
