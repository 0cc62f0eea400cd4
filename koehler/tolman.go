package koehler

import "math"

// TolmanTension returns the surface tension of a drop of wet diameter D (m) by
// the first-order law of Tolman, and its derivative by ln D:
//
//	σ(R) = σ/(1 + 2δ/R),  R = D/2
//
// flat is that of the flat surface (N/m) and length the Tolman length δ (m), which
// counts from the surface of tension; 0 leaves flat as it is. Published lengths
// of water lie between about -0.1 and +0.1 nm and disagree on the sign. The law is
// first order in δ/R: use it for D well above 4|δ|. For D ≤ -4δ it has no meaning
// and both results are NaN. Tolman, J. Chem. Phys. 17, 333, 1949 (from memory).
//
// For the standard Kelvin term it means ln S = A/(D + 4δ).
func TolmanTension(flat, length, wet float64) (sigma, slope float64) {
	if !(wet > 0 && wet+4*length > 0) {
		return math.NaN(), math.NaN()
	}
	q := 4 * length / (wet + 4*length)
	sigma = flat * wet / (wet + 4*length)
	return sigma, sigma * q
}
