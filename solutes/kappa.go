package solutes

import "math"

// Kappa is the water activity of a particle with one hygroscopicity κ (Petters
// & Kreidenweis, Atmos. Chem. Phys. 7, 1961, 2007), κ ≥ 0:
//
//	a_w = u/(u + κ)
//
// It has no range of molality; that κ is one number is the approximation.
type Kappa float64

// LnActivity returns ln a_w = -log1p(κ/u) and its derivative by ln u.
func (k Kappa) LnActivity(u float64) (lnaw, slope float64) {
	return -math.Log1p(float64(k) / u), float64(k) / (u + float64(k))
}

// LeastWater returns 0.
func (k Kappa) LeastWater() float64 { return 0 }

// VantHoffKappa returns the κ = i ρ_s M_w/(M ρ_w) that van 't Hoff's factor i
// stands for in the mole-fraction form a_w = 1/(1 + i m M_w), for the molar mass M
// (kg/mol), dry density ρ_s and water density ρ_w (kg/m³). The two forms are the
// same function of u.
func VantHoffKappa(factor, molarMass, density, waterDensity float64) Kappa {
	return Kappa(factor * density * waterMolarMass / (molarMass * waterDensity))
}

// IdealOsmotic is the water activity with an osmotic coefficient of 1,
// a_w = exp(-ν m M_w) = exp(-κ/u); its value is κ = ν ρ_s M_w/(M ρ_w).
type IdealOsmotic float64

// LnActivity returns ln a_w = -κ/u and its derivative by ln u.
func (k IdealOsmotic) LnActivity(u float64) (lnaw, slope float64) {
	return -float64(k) / u, float64(k) / u
}

// LeastWater returns 0.
func (k IdealOsmotic) LeastWater() float64 { return 0 }
