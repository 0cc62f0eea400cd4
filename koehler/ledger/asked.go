package ledger

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/koehler/kappa"
	"dropcrest/solutes"
)

// Asked is a particle as somebody asked for it: its own answer is the plain one,
// which may make any of the assumptions.
type Asked struct {
	Recipe          solutes.Recipe
	DryDiameter     float64             // m
	Mobility        bool                // the diameter is a mobility diameter, else volume-equivalent
	ShapeFactor     float64             // dynamic, of a mobility diameter; 0 counts as 1, a sphere
	SaturationRatio float64             // of the haze drop
	Partitioning    bool                // of a film's organic
	Form            koehler.SolubleForm // of a soluble share on an adsorbing core
	Kelvin          koehler.Kelvin
	TolmanLength    float64 // m
}

// made is a particle with all that the rows take apart.
type made struct {
	asked     Asked
	dissolved solutes.Dissolved
	notes     []atmos.Note
	particle  koehler.Particle
}

func (a Asked) make() (made, error) {
	d, notes, err := solutes.DissolveJoined(a.Recipe)
	if err != nil {
		return made{}, err
	}
	p, err := a.making(a.dry(a.DryDiameter, a.ShapeFactor)).Of(d)
	return made{a, d, notes, p}, err
}

func (a Asked) making(dry float64) koehler.Making {
	return koehler.Making{DryDiameter: dry, Temperature: a.Recipe.Temperature, Partitioning: a.Partitioning,
		Form: a.Form, Kelvin: a.Kelvin, TolmanLength: a.TolmanLength}
}

// dry is the volume-equivalent diameter. A classifier measures at laboratory
// pressure: one standard atmosphere.
func (a Asked) dry(diameter, shape float64) float64 {
	if !a.Mobility || shape == 0 || shape == 1 {
		return diameter
	}
	return atmos.VolumeEquivalent(diameter, shape, a.Recipe.Temperature, atmos.StandardPressure)
}

// convention is the water of most published κ.
var convention = kappa.At25C()

// sameTension is what a given tension (N/m) may differ by from the convention and
// still be taken for it: the rounding of 72.0 mN/m.
const sameTension = 0.5e-4

func (r recipe) takesConvention() bool {
	return r.TensionRule == solutes.FixedTension && math.Abs(r.Tension-convention.Tension) < sameTension
}

// recipe adds to a solutes.Recipe what the ledger asks about it.
type recipe struct{ solutes.Recipe }

// hasOneKappa tells whether one κ is given for the whole particle, so that its
// parts do not count in its water activity.
func (r recipe) hasOneKappa() bool {
	return r.Model == solutes.KappaModel && !math.IsNaN(r.Kappa)
}

// hasDetail tells whether some part has a model of water activity beyond one κ.
func (r recipe) hasDetail() bool {
	for _, p := range r.Parts {
		if p.Substance.Ion != nil || solutes.OwnModelWords(p.Substance) != "" {
			return true
		}
	}
	return false
}

// hasIncrement tells whether some part's effect on the surface tension is known.
func (r recipe) hasIncrement() bool {
	for _, p := range r.Parts {
		if p.Substance.TensionIncrement.Known() && !p.Substance.Insoluble() {
			return true
		}
	}
	return false
}

func (r recipe) isInsoluble() bool {
	for _, p := range r.Parts {
		if !p.Substance.Insoluble() {
			return false
		}
	}
	return len(r.Parts) > 0
}

// shape is the dynamic shape factor of the catalogue for a particle of one
// substance; 0: not known.
func (r recipe) shape() float64 {
	if len(r.Parts) != 1 {
		return 0
	}
	return r.Parts[0].Substance.ShapeFactor.Value
}

// kappa is the κ of the parts mixed by volume, as the κ model takes them.
func (r recipe) kappa(waterDensity float64) float64 {
	if r.hasOneKappa() {
		return r.Recipe.Kappa
	}
	sum := 0.0
	for _, p := range r.Parts {
		sum += p.Volume * partKappa(p.Substance, waterDensity)
	}
	return sum
}

// partKappa is the κ of a substance, that of its ideal solution where no other is
// known.
func partKappa(s solutes.Substance, waterDensity float64) float64 {
	if s.Kappa.Known() {
		return s.Kappa.Value
	}
	return s.IdealKappa(waterDensity)
}
