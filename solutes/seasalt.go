package solutes

import "math"

// SeaSaltNote says what the model of sea salt leaves out.
const SeaSaltNote = "sea salt is a solution of ions down to a water activity of 0.75, with parameters of 25 °C; a dry particle keeps water of hydration, so measured growth is 8 to 15 % below (Zieger et al. 2017)"

// seaSaltLeast is the water activity at which the range ends: sea salt starts
// to crystallise there, and the parameters of sodium chloride end.
const seaSaltLeast = 0.75

// seaSaltIons are the mole fractions of the reference composition (Millero,
// Feistel, Wright and McDougall, Deep-Sea Res. I 55, 50, 2008; from memory).
// Ions for which no parameters are at hand count as the ion of their charge that
// is most alike: Sr as Ca; Br, HCO3, F, B(OH)4 and OH as Cl; CO3 as SO4. B(OH)3
// and CO2 are neutral. 31.4038 g of salt hold one mol of all these.
func seaSaltIons() []BrineIon {
	return []BrineIon{
		{"Na+", 1, 0.4188071},
		{"Mg++", 2, 0.0471678},
		{"Ca++", 2, 0.0091823 + 0.0000810},
		{"K+", 1, 0.0091159},
		{"Cl-", -1, 0.4874839 + 0.0007520 + 0.0015340 + 0.0000610 + 0.0000900 + 0.0000071},
		{"SO4--", -2, 0.0252152 + 0.0002134},
		{"neutral", 0, 0.0002807 + 0.0000086},
	}
}

// seaSaltPairs: Pitzer and Mayorga 1973 (chlorides, alkali sulfates), Pitzer
// and Mayorga, J. Solution Chem. 3, 539, 1974 (MgSO4), Harvie, Moller and Weare
// 1984 (CaSO4); all from memory.
func seaSaltPairs() []BrinePair {
	return []BrinePair{
		{"Na+", "Cl-", 0.0765, 0.2664, 0, 0.00127},
		{"K+", "Cl-", 0.04835, 0.2122, 0, -0.00084},
		{"Mg++", "Cl-", 0.35235, 1.6815, 0, 0.00519},
		{"Ca++", "Cl-", 0.3159, 1.614, 0, -0.00034},
		{"Na+", "SO4--", 0.01958, 1.113, 0, 0.00497},
		{"K+", "SO4--", 0.04995, 0.7793, 0, 0},
		{"Mg++", "SO4--", 0.2210, 3.343, -37.23, 0.0250},
		{"Ca++", "SO4--", 0.20, 3.1973, -54.24, 0},
	}
}

// seaSaltThetas: Harvie, Moller and Weare 1984, from memory.
func seaSaltThetas() []BrineTheta {
	return []BrineTheta{
		{"Na+", "K+", -0.012}, {"Na+", "Mg++", 0.07}, {"Na+", "Ca++", 0.07},
		{"K+", "Ca++", 0.032}, {"Mg++", "Ca++", 0.007}, {"Cl-", "SO4--", 0.02},
	}
}

// SeaSaltBrine returns the ion mixture of inorganic sea salt at T (K), one mol
// of solute being one mol of ions (31.4038 g).
func SeaSaltBrine(T float64) *Brine {
	b, err := NewBrine(seaSaltIons(), seaSaltPairs(), seaSaltThetas(), DebyeHueckel(T))
	if err != nil {
		panic(err) // T is checked by the callers and the rest stands above
	}
	return b
}

// NewSeaSalt returns the solution of inorganic sea salt at T, 180 to 373.15 K,
// down to a water activity of 0.75. The molar mass of the substance is per mol
// of ions. Errors are of type *UnusableError or *NoModelError.
func NewSeaSalt(s Substance, T float64) (*OsmoticSolution, error) {
	if s.Key != "sea_salt" {
		return nil, &NoModelError{s.Name, "sea salt"}
	}
	one, err := molalityAtOne(s, T)
	if err != nil {
		return nil, err
	}
	b := SeaSaltBrine(T)
	top := b.molalityAt(seaSaltLeast, 1, 20)
	phi := func(m float64) float64 { p, _ := b.Osmotic(m); return p }
	return &OsmoticSolution{
		model: newOsmoticTable(b.total, top, phi), ions: b.total, molality: one, highest: top,
	}, nil
}

// molalityAt returns the molality between low and high that has the water
// activity aw, by halving.
func (b *Brine) molalityAt(aw, low, high float64) float64 {
	for range 60 {
		mid := 0.5 * (low + high)
		if phi, _ := b.Osmotic(mid); b.total*waterMolarMass*mid*phi < -math.Log(aw) {
			low = mid
		} else {
			high = mid
		}
	}
	return low
}
