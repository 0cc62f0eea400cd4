package counter

import (
	"math"

	"dropcrest/atmos"
)

// wiedensohler holds the coefficients a_0 to a_5 of charge -2 to +2
// (Wiedensohler, J. Aerosol Sci. 19, 387, 1988, Table 1; from memory), with the two
// entries that were corrected later: a_4(+1) = -0.1553 and a_5(+2) = 0.5049.
var wiedensohler = [5][6]float64{
	{-26.3328, 35.9044, -21.4608, 7.0867, -1.3088, 0.1051},
	{-2.3197, 0.6175, 0.6201, -0.1105, -0.1260, 0.0297},
	{-0.0003, -0.1014, 0.3073, -0.3372, 0.1023, -0.0105},
	{-2.3484, 0.6044, 0.4800, 0.0013, -0.1553, 0.0320},
	{-44.4756, 79.3772, -62.8900, 26.4492, -5.7480, 0.5049},
}

// leastDouble is the size from which the fit of two charges holds, m.
const leastDouble = 20e-9

// ionMobilityRatio is that of positive to negative ions that Wiedensohler (1988)
// took: 1.4e-4 over 1.6e-4 m²/(V s).
const ionMobilityRatio = 0.875

// ChargeFraction returns the share of particles of diameter d (m) that carry n
// elementary charges in bipolar charge equilibrium in air of temperature T (K).
//
//	|n| ≤ 2:  f = 10^Σ a_i (log10 d/nm)^i                    (Wiedensohler 1988)
//	|n| ≥ 3:  f = (2πq)^-½ exp(-(n - q ln 0.875)²/(2q)),  q = 2π ε0 d k T/e²
//	                                                        (Gunn & Woessner 1956)
//
// Range: 1 nm to 1 µm; with |n| = 2 from 20 nm on, below which the share is taken
// as 0 (it is 2e-4 at 20 nm). Above 1 µm all n follow the second formula. The fit
// is that of air at room temperature and does not depend on T. The shares add up
// to 0.98 to 1.007. Sizes that are not positive give NaN.
func ChargeFraction(d float64, n int, T float64) float64 {
	switch {
	case !(d > 0):
		return math.NaN()
	case n < -2 || n > 2 || d > 1e-6:
		q := 2 * math.Pi * atmos.VacuumPermittivity * d * atmos.Boltzmann * T / (atmos.ElementaryCharge * atmos.ElementaryCharge)
		off := float64(n) - q*math.Log(ionMobilityRatio)
		return math.Exp(-off*off/(2*q)) / math.Sqrt(2*math.Pi*q)
	case (n == 2 || n == -2) && d < leastDouble:
		return 0
	}
	x := math.Log10(d * 1e9)
	a := &wiedensohler[n+2]
	return math.Pow(10, a[0]+x*(a[1]+x*(a[2]+x*(a[3]+x*(a[4]+x*a[5])))))
}

// EqualMobility returns the diameter (m) of the particle that with n charges has
// the mobility of a singly charged one of diameter d (m), in air of temperature T
// (K) and pressure p (Pa).
func EqualMobility(d float64, n int, T, p float64) float64 {
	if n == 1 {
		return d
	}
	return atmos.DiameterFromMobility(atmos.Mobility(d, 1, T, p), n, T, p)
}
