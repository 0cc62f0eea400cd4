package ascent

// Regime says what limits the number of droplets.
type Regime int

const (
	UpdraftLimited Regime = iota // more particles make few more droplets
	Transitional                 // both count
	AerosolLimited               // nearly all particles activate
)

// String returns the word that scripts see.
func (r Regime) String() string {
	switch r {
	case UpdraftLimited:
		return "updraft-limited"
	case Transitional:
		return "transitional"
	case AerosolLimited:
		return "aerosol-limited"
	}
	return "unknown"
}

// The limits of the regimes in w/N, m/s per 1/m³.
const (
	aerosolLimit = 1e-3 * 1e-6
	updraftLimit = 1e-4 * 1e-6
)

// RegimeOf returns the regime of an updraft (m/s) and a number of particles (1/m³):
//
//	w/N above some 1e-3 m/s cm³: limited by the aerosol (peak above some 0.5 %, more than 90 % activated)
//	below some 1e-4 m/s cm³:     limited by the updraft (peak below some 0.2 %, less than 20 % activated)
//
// Source: Reutter et al., Atmos. Chem. Phys. 9 (2009) 7067; the upper limit is in its
// abstract, the lower one from memory. See RegimeScope.
func RegimeOf(updraft, number float64) Regime {
	switch x := updraft / number; {
	case x > aerosolLimit:
		return AerosolLimited
	case x < updraftLimit:
		return UpdraftLimited
	}
	return Transitional
}

// RegimeScope says for what the regimes were found.
const RegimeScope = "Found for fresh biomass-burning aerosol at cloud base, one accumulation mode near 120 nm with kappa near 0.2, updrafts of 0.25 to 20 m/s and 200 to 100000 particles per cm3 (Reutter et al. 2009, scope from memory); many Aitken particles, sea salt or weak updraft shift the limits."
