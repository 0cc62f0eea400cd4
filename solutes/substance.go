package solutes

import "math"

// Evidence says how a catalogued value came to be known.
type Evidence string

const (
	Read     Evidence = "read"     // read in a published page
	Memory   Evidence = "memory"   // from memory of the named publication
	Computed Evidence = "computed" // derived from other values here
	User     Evidence = "user"     // given by the user
)

// Datum is one catalogued value and where it comes from. The zero Datum is a
// gap: the value is not known.
type Datum struct {
	Value    float64  `json:"value"`
	Low      float64  `json:"low,omitempty"` // published bounds, 0: none given
	High     float64  `json:"high,omitempty"`
	Source   string   `json:"source"`
	Evidence Evidence `json:"evidence"`
}

// Known reports whether there is a value.
func (d Datum) Known() bool { return d.Evidence != "" }

// Substance is one entry of the catalogue. SI units; a gap is a zero Datum.
type Substance struct {
	Key     string   `json:"key"`     // "ammonium_sulfate"
	Name    string   `json:"name"`    // "ammonium sulfate"
	Formula string   `json:"formula"` // "(NH4)2SO4", "" for mixtures
	Aliases []string `json:"aliases,omitempty"`

	MolarMass        Datum `json:"molar_mass"`         // kg/mol
	Density          Datum `json:"density"`            // kg/m³, dry
	Ions             Datum `json:"ions"`               // formal number of ions ν; 0: insoluble
	Hydration        Datum `json:"hydration,omitzero"` // mol of crystal water a formula unit; counts as water of the solution
	Kappa            Datum `json:"kappa"`              // at activation
	KappaGrowth      Datum `json:"kappa_growth"`       // from growth factors below saturation
	Solubility       Datum `json:"solubility"`         // kg per kg of water, 25 °C
	VolumeSolubility Datum `json:"volume_solubility"`  // C, m³ of solute per m³ of water
	Deliquescence    Datum `json:"deliquescence"`      // relative humidity 0..1, 25 °C; 0: liquid at every humidity
	Efflorescence    Datum `json:"efflorescence"`      // relative humidity 0..1; 0: none seen
	TensionIncrement Datum `json:"tension_increment"`  // N/m per mol/kg
	ShapeFactor      Datum `json:"shape_factor"`       // dynamic shape factor of the dry particle

	DeliquescenceLaw *DeliquescenceLaw `json:"deliquescence_law,omitempty"` // deliquescence with temperature
	Adsorption       *Adsorption       `json:"adsorption,omitempty"`        // FHH parameters of insoluble particles
	SurfaceActivity  *SurfaceActivity  `json:"surface_activity,omitempty"`  // Szyszkowski parameters of organics
	Ion              *Ion              `json:"ion,omitempty"`               // ion-interaction parameters
	Concentrated     *Concentrated     `json:"concentrated,omitempty"`      // published polynomial and its join

	Remarks []string `json:"remarks,omitempty"`
}

// IdealKappa returns ν (ρ_s/M)(M_w/ρ_w), the κ of the ideal solution of all
// ions, for the density rhoWater of water (kg/m³); NaN if molar mass, density or
// number of ions is not known. It is 0 for an insoluble substance, whatever else
// is known.
func (s Substance) IdealKappa(rhoWater float64) float64 {
	if s.Insoluble() {
		return 0
	}
	return s.Ions.Value * s.molality(rhoWater) * waterMolarMass
}

// Insoluble reports whether the substance is known to give no ions or molecules
// to the water.
func (s Substance) Insoluble() bool { return s.Ions.Known() && s.Ions.Value == 0 }

// Adsorption holds the parameters of the Frenkel-Halsey-Hill isotherm
// ln a_w = -A θ^-B, dimensionless.
type Adsorption struct {
	A Datum `json:"a"`
	B Datum `json:"b"`
}

// SurfaceActivity holds the parameters of the Szyszkowski equation, σ falling by
// Γ_max R T ln(1 + K c) with the concentration c. No constants of single organics
// are in the catalogue: published ones are few, and none was at hand.
type SurfaceActivity struct {
	GammaMax Datum `json:"gamma_max"` // greatest surface excess, mol/m²
	K        Datum `json:"k"`         // adsorption constant, m³/mol
	Floor    Datum `json:"floor"`     // σ falls no lower, N/m; a gap: no floor
}

// molality is mol of formula units per kg of water at u = 1; NaN if not known.
func (s Substance) molality(rhoWater float64) float64 {
	if !s.MolarMass.Known() || !s.Density.Known() || !s.Ions.Known() {
		return math.NaN()
	}
	return s.Density.Value / (s.MolarMass.Value * rhoWater)
}
