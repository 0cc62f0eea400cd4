package spectrum

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// Ions is what an aerosol mass spectrometer or monitor reports, kg/m³ of air.
type Ions struct {
	Organic, Sulfate, Nitrate, Ammonium, Chloride float64
	BlackCarbon                                   float64 // from another instrument
}

// Molar masses of the ions in kg/mol (standard atomic weights).
const (
	sulfateMass  = 0.09606
	nitrateMass  = 0.0620049
	ammoniumMass = 0.0180385
	chlorideMass = 0.035453
)

// Check returns nil or an *InputError.
func (m Ions) Check() error {
	for _, x := range []struct {
		what string
		mass float64
	}{{"organic", m.Organic}, {"sulfate", m.Sulfate}, {"nitrate", m.Nitrate}, {"ammonium", m.Ammonium},
		{"chloride", m.Chloride}, {"black carbon", m.BlackCarbon}} {
		if !(x.mass >= 0) || math.IsInf(x.mass, 1) {
			return unusable("mass of "+x.what, -1, x.mass, "0 or more, in kg/m³ (a negative value below the detection limit counts as 0)")
		}
	}
	return nil
}

// Salts is ions paired to salts, mol/m³ of air, and what found no partner.
type Salts struct {
	AmmoniumNitrate, SulfuricAcid, AmmoniumBisulfate, AmmoniumSulfate, AmmoniumChloride float64
	SpareAmmonium, SpareNitrate, SpareChloride                                          float64
}

// Pair pairs the ions. Where ammonium and sulfate are enough that is the scheme of
// Gysel et al. 2007 (Atmos. Chem. Phys. 7, 6131; from memory): nitrate takes
// ammonium first, then sulfate takes
//
//	none:        sulfuric acid
//	up to 1 : 1  sulfuric acid and bisulfate
//	up to 2 : 1  bisulfate and sulfate
//	more:        sulfate
//
// and here chloride takes what is left. As written, the scheme gives negative
// amounts where ammonium is short of nitrate or exceeds two a sulfate; here nothing
// is taken that is not there, so every ion is conserved and what found no partner
// is told.
func Pair(m Ions) Salts {
	sulfate, nitrate := m.Sulfate/sulfateMass, m.Nitrate/nitrateMass
	left, chloride := m.Ammonium/ammoniumMass, m.Chloride/chlorideMass
	var s Salts
	s.AmmoniumNitrate = math.Min(left, nitrate)
	s.SpareNitrate = nitrate - s.AmmoniumNitrate
	left -= s.AmmoniumNitrate
	switch {
	case left >= 2*sulfate:
		s.AmmoniumSulfate = sulfate
	case left >= sulfate:
		s.AmmoniumSulfate = left - sulfate
		s.AmmoniumBisulfate = 2*sulfate - left
	default:
		s.AmmoniumBisulfate = left
		s.SulfuricAcid = sulfate - left
	}
	left = math.Max(0, left-2*s.AmmoniumSulfate-s.AmmoniumBisulfate)
	s.AmmoniumChloride = math.Min(left, chloride)
	s.SpareChloride = chloride - s.AmmoniumChloride
	s.SpareAmmonium = left - s.AmmoniumChloride
	return s
}

// Species is one species of a mixture of known masses.
type Species struct {
	Key       string  // for scripts: "ammonium_sulfate"
	MolarMass float64 // kg/mol; 0 for organic and black carbon
	Density   float64 // kg/m³
	Kappa     float64
}

// SpeciesTable is the species that Mix reckons with, in the order in which it
// returns them.
type SpeciesTable struct {
	AmmoniumNitrate, SulfuricAcid, AmmoniumBisulfate, AmmoniumSulfate, AmmoniumChloride Species
	Organic, BlackCarbon                                                                Species
}

// CommonSpecies returns the densities and κ that closure studies commonly use (κ of
// salts at activation by Petters & Kreidenweis 2007, Table 1, organics 0.1; common
// practice, all from memory), and for ammonium chloride, which they leave out,
// those of the catalogue of package solutes.
func CommonSpecies() SpeciesTable {
	return SpeciesTable{
		AmmoniumNitrate:   Species{"ammonium_nitrate", 0.080043, 1720, 0.67},
		SulfuricAcid:      Species{"sulfuric_acid", 0.098079, 1830, 0.92},
		AmmoniumBisulfate: Species{"ammonium_bisulfate", 0.11511, 1780, 0.61},
		AmmoniumSulfate:   Species{"ammonium_sulfate", 0.13214, 1769, 0.61},
		AmmoniumChloride:  Species{"ammonium_chloride", 0.053491, 1519, 0.984},
		Organic:           Species{"organic", 0, 1400, 0.1},
		BlackCarbon:       Species{"black_carbon", 0, 1700, 0},
	}
}

// MixedPart is one species of a Mixed.
type MixedPart struct {
	Species Species
	Mass    float64 // kg/m³ of air
	Share   float64 // of the volume
}

// Mixed is an internal mixture of known masses.
type Mixed struct {
	Parts   []MixedPart
	Kappa   float64 // Σ share x κ, by volume (Petters & Kreidenweis 2007, eq. 7)
	Density float64 // kg/m³
	Volume  float64 // m³ per m³ of air
	Salts   Salts
	Notes   []atmos.Note
}

// spareWorthSaying is the share of the mass without a partner from which on a
// result says so (own choice).
const spareWorthSaying = 0.01

// Mix pairs the ions and mixes the species by volume. An error is an *InputError:
// a mass that is not usable, or no mass at all.
func Mix(m Ions, t SpeciesTable) (Mixed, error) {
	if err := m.Check(); err != nil {
		return Mixed{}, err
	}
	s := Pair(m)
	out := Mixed{Salts: s}
	mass := 0.0
	for _, x := range []struct {
		sp   Species
		mass float64
	}{
		{t.AmmoniumNitrate, s.AmmoniumNitrate * t.AmmoniumNitrate.MolarMass},
		{t.SulfuricAcid, s.SulfuricAcid * t.SulfuricAcid.MolarMass},
		{t.AmmoniumBisulfate, s.AmmoniumBisulfate * t.AmmoniumBisulfate.MolarMass},
		{t.AmmoniumSulfate, s.AmmoniumSulfate * t.AmmoniumSulfate.MolarMass},
		{t.AmmoniumChloride, s.AmmoniumChloride * t.AmmoniumChloride.MolarMass},
		{t.Organic, m.Organic}, {t.BlackCarbon, m.BlackCarbon},
	} {
		if x.mass > 0 {
			out.Parts = append(out.Parts, MixedPart{Species: x.sp, Mass: x.mass})
			mass += x.mass
			out.Volume += x.mass / x.sp.Density
		}
	}
	if mass == 0 {
		return Mixed{}, unusable("mass of all species", -1, 0, "above 0")
	}
	for i := range out.Parts {
		p := &out.Parts[i]
		p.Share = p.Mass / p.Species.Density / out.Volume
		out.Kappa += p.Share * p.Species.Kappa
	}
	out.Density = mass / out.Volume
	spare := s.SpareAmmonium*ammoniumMass + s.SpareNitrate*nitrateMass + s.SpareChloride*chlorideMass
	if share := spare / (spare + mass); share >= spareWorthSaying {
		out.Notes = append(out.Notes, atmos.Note{Code: "ions-without-partner",
			Text: fmt.Sprintf("Ions of %.2g %% of the mass found no partner and are left out of kappa: the measured ions are not balanced.", 100*share)})
	}
	return out, nil
}

// κ of organics and of inorganic ions where shares are of mass, not of volume:
// Pöhlker et al. 2023, Nat. Commun. 14, 6139, abstract, ±0.02 and ±0.01.
const (
	massKappaOrganic   = 0.12
	massKappaInorganic = 0.63
)

// KappaOfMassShares returns the κ of an aerosol with this share of organics in its
// mass (0 to 1), the rest inorganic ions, by the convention of Pöhlker et al. 2023.
// Its κ belong to shares of mass: never mix them with those of Mix, which belong to
// shares of volume.
func KappaOfMassShares(organic float64) float64 {
	return massKappaOrganic*organic + massKappaInorganic*(1-organic)
}
