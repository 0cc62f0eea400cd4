package solutes

// Model names a water-activity model.
type Model int

const (
	KappaModel     Model = iota // one κ, Petters & Kreidenweis 2007
	VantHoff                    // mole fraction with a fixed factor i
	IonInteraction              // Pitzer & Mayorga 1973, joined to concentrated data
)

// String returns the name of the model in words.
func (m Model) String() string {
	switch m {
	case KappaModel:
		return "kappa"
	case VantHoff:
		return "van 't Hoff"
	case IonInteraction:
		return "ion interaction"
	}
	return "unknown model"
}

// SolubilityRule names how much of a particle dissolves.
type SolubilityRule int

const (
	Complete          SolubilityRule = iota // all that is soluble, at once
	LimitedSolubility                       // Petters & Kreidenweis 2008; of κ models only
)

// String returns the word for the rule.
func (r SolubilityRule) String() string {
	switch r {
	case Complete:
		return "complete"
	case LimitedSolubility:
		return "limited"
	}
	return "unknown solubility rule"
}

// DensityRule names a rule for the volume of the solution.
type DensityRule int

const (
	Additive DensityRule = iota // water and dry particle keep their volumes
	Measured                    // published density polynomials
)

// TensionRule names a rule for the surface tension of the drop.
type TensionRule int

const (
	PureWater    TensionRule = iota // IAPWS R1-76 at the temperature
	SolutionRule                    // pure water and a linear increment per molality
	FixedTension                    // Recipe.Tension
	Szyszkowski                     // lowered by surface-active organics: see Dissolved.Film
)

// AdsorptionRule names what water adsorbed on insoluble particles does.
type AdsorptionRule int

const (
	NoAdsorption    AdsorptionRule = iota // insoluble parts are volume only
	KnownAdsorption                       // by the parameters of the insoluble substance
	GivenAdsorption                       // by Recipe.AdsorptionA and AdsorptionB
)

// Part is one component of a dry particle.
type Part struct {
	Substance Substance
	Volume    float64 // share of the dry volume, > 0; shares add up to 1
}

// Recipe is what a particle is made of and how its solution is to be modelled.
type Recipe struct {
	Parts          []Part
	Model          Model
	Kappa          float64        // KappaModel: one κ for the whole particle; NaN: mixed from the substances
	VantHoffFactor float64        // VantHoff: NaN: each substance's number of ions
	Solubility     SolubilityRule // C is each substance's VolumeSolubility; one of evidence User counts always
	DensityRule    DensityRule
	TensionRule    TensionRule
	Tension        float64          // N/m, FixedTension only
	Surface        *SurfaceActivity // Szyszkowski only: of organics that have none of their own; nil: none
	Adsorption     AdsorptionRule
	AdsorptionA    float64 // GivenAdsorption only
	AdsorptionB    float64
	Temperature    float64 // K
}

// Dissolved is a recipe made ready for one temperature.
type Dissolved struct {
	Solution       Solution
	Swelling       Swelling // nil: additive
	Tension        Tension
	Kappa          float64  // volume-mixed κ of the parts or the given one; NaN: not known
	MolesPerVolume float64  // mol of solute formula units per m³ of dry particle; NaN: not known
	CrystalWater   float64  // volume of crystal water per dry volume, which counts as water of the solution
	WaterDensity   float64  // kg/m³
	DryDensity     float64  // kg/m³; NaN: not known
	Models         []string // the model in use, part by part, in words
	Limits         []Limit  // of sparingly soluble parts, in the order of the parts
	Film           *Film    // Szyszkowski only
	Core           *Core    // with an AdsorptionRule only
}

// Limit is the solubility of one part of a particle.
type Limit struct {
	Substance  string
	Solubility float64 // C, m³ of compound per m³ of water
	Water      float64 // u = ε/C from which on all of the part is dissolved; +Inf: never
	Kept       bool    // the solution follows it; otherwise all is taken as dissolved
}

// Molality returns mol of solute per kg of water at u, crystal water included and
// all taken as dissolved; NaN if not known.
func (d Dissolved) Molality(u float64) float64 {
	return d.MolesPerVolume / ((u + d.CrystalWater) * d.WaterDensity)
}
