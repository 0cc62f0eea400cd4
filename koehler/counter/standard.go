package counter

import (
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/koehler/kappa"
	"dropcrest/solutes"
)

// Standard is the salt of a calibration and the Köhler model that says at which
// supersaturation it activates. The choice of the model alone is worth 5 % and
// more of a calibrated supersaturation: see Spread.
type Standard struct {
	Name        string
	Recipe      solutes.Recipe // its Temperature is that of activation, K
	ShapeFactor float64        // dynamic shape factor of the dry particle; 0: 1. About 1.08 for dried sodium chloride
	Air         Classifier     // the air of the classifier
}

// Sensitivity holds the derivatives of the logarithm of a supersaturation by what
// the calibration took for granted. They say how an error there moves it, so that
// the same error in the measured particles can cancel: a kappa.Point takes them as
// they are.
type Sensitivity = kappa.Transfer

// Critical is the activation of a salt particle.
type Critical struct {
	MobilityDiameter float64 // m
	DryDiameter      float64 // volume-equivalent, m
	Supersaturation  float64 // fraction
	Sensitivity      Sensitivity
	Notes            []atmos.Note
}

// bound is a Standard made ready.
type bound struct {
	particle koehler.Particle
	models   []string
	notes    []atmos.Note
	density  float64
	dissolve solutes.Dissolved
}

func (s Standard) bind() (bound, error) {
	d, notes, err := solutes.Dissolve(s.Recipe)
	if err != nil {
		return bound{}, err
	}
	notes = append(notes, atmos.WaterNotes(s.Recipe.Temperature)...)
	p := koehler.Particle{DryDiameter: 1e-7, Temperature: s.Recipe.Temperature, Solution: d.Solution, Swelling: d.Swelling, Tension: d.Tension}
	return bound{p, d.Models, notes, d.WaterDensity, d}, p.Check()
}

func (s Standard) shape() float64 {
	if s.ShapeFactor == 0 {
		return 1
	}
	return s.ShapeFactor
}

// dry returns the volume-equivalent diameter of a mobility diameter.
func (s Standard) dry(mobility, shape float64) float64 {
	T, p := s.Air.air()
	return atmos.VolumeEquivalent(mobility, shape, T, p)
}

// Supersaturation returns the critical supersaturation (a fraction) of a particle
// of this mobility diameter (m). Errors are those of solutes.Dissolve and
// koehler.Particle.Crest, or wrap ErrInput for the shape factor.
func (s Standard) Supersaturation(mobility float64) (float64, error) {
	b, err := s.bind()
	if err != nil {
		return math.NaN(), err
	}
	return s.at(b, mobility, s.shape())
}

func (s Standard) at(b bound, mobility, shape float64) (float64, error) {
	if !(mobility > 0) || math.IsInf(mobility, 1) {
		return math.NaN(), inputError("mobility diameter %g m: must be a positive length", mobility)
	}
	if !(shape > 0.5 && shape < 10) {
		return math.NaN(), inputError("shape factor %g: must be 1 or a little more", shape)
	}
	c, err := b.particle.Sized(s.dry(mobility, shape)).Crest()
	return c.Supersaturation, err
}

// Steps of the central differences: relative, and in K.
const (
	sensitivityStep = 1e-3
	kelvinStep      = 0.1
)

// Critical returns the activation of a particle of this mobility diameter (m) with
// its sensitivities. Errors are those of Supersaturation.
func (s Standard) Critical(mobility float64) (Critical, error) {
	b, err := s.bind()
	if err != nil {
		return Critical{}, err
	}
	shape := s.shape()
	c := Critical{MobilityDiameter: mobility, DryDiameter: s.dry(mobility, shape), Notes: b.notes}
	if c.Supersaturation, err = s.at(b, mobility, shape); err != nil {
		return Critical{}, err
	}
	crest, err := b.particle.Sized(c.DryDiameter).Crest()
	if err != nil {
		return Critical{}, err
	}
	c.Notes = append(c.Notes, b.dissolve.RangeNotes(crest.Water)...)
	up, down := math.Exp(sensitivityStep), math.Exp(-sensitivityStep)
	slope := func(high, low func() (float64, error), width float64) float64 {
		h, errHigh := high()
		l, errLow := low()
		if errHigh != nil || errLow != nil {
			return 0
		}
		return math.Log(h/l) / width
	}
	sized := func(f float64) func() (float64, error) {
		return func() (float64, error) { return s.at(b, mobility*f, shape) }
	}
	shaped := func(f float64) func() (float64, error) {
		return func() (float64, error) { return s.at(b, mobility, shape*f) }
	}
	tense := func(f float64) func() (float64, error) {
		return func() (float64, error) {
			b := b
			b.particle.Tension = scale(b.particle.Tension, f)
			return s.at(b, mobility, shape)
		}
	}
	warm := func(dT float64) func() (float64, error) {
		return func() (float64, error) {
			w := s
			w.Recipe.Temperature += dT
			return w.Supersaturation(mobility)
		}
	}
	c.Sensitivity = Sensitivity{
		Dry:         slope(sized(up), sized(down), 2*sensitivityStep),
		Tension:     slope(tense(up), tense(down), 2*sensitivityStep),
		Temperature: slope(warm(kelvinStep), warm(-kelvinStep), 2*kelvinStep),
		Shape:       slope(shaped(up), shaped(down), 2*sensitivityStep),
	}
	return c, nil
}

// scaled is a surface tension times a factor.
type scaled struct {
	solutes.Tension
	factor float64
}

// SurfaceTension returns that of the tension below times the factor.
func (t scaled) SurfaceTension(u float64) (sigma, slope float64) {
	sigma, slope = t.Tension.SurfaceTension(u)
	return sigma * t.factor, slope * t.factor
}

// SeveralMaxima is that of the tension below.
func (t scaled) SeveralMaxima() bool {
	several, ok := t.Tension.(koehler.SeveralMaxima)
	return !ok || several.SeveralMaxima()
}

func scale(t solutes.Tension, factor float64) solutes.Tension {
	if sigma, ok := t.(solutes.ConstantTension); ok {
		return sigma * solutes.ConstantTension(factor)
	}
	return scaled{t, factor}
}

// Choice is one published model and the supersaturation it gives.
type Choice struct {
	Model           string
	Supersaturation float64 // fraction; 0: Fault says why there is none
	Fault           string
}

// Spread returns what each of the water-activity models makes of the same
// mobility diameter (m): the own one of the Recipe first.
func (s Standard) Spread(mobility float64) []Choice {
	own := s.Recipe.Model
	models := []solutes.Model{own}
	for _, m := range []solutes.Model{solutes.IonInteraction, solutes.KappaModel, solutes.VantHoff} {
		if m != own {
			models = append(models, m)
		}
	}
	choices := make([]Choice, len(models))
	for i, m := range models {
		t := s
		if t.Recipe.Model = m; m != own {
			t.Recipe.Kappa, t.Recipe.VantHoffFactor = math.NaN(), math.NaN()
		}
		choices[i].Model = m.String()
		b, err := t.bind()
		if err == nil {
			choices[i].Model = strings.Join(b.models, ", ")
			choices[i].Supersaturation, err = t.at(b, mobility, t.shape())
		}
		if err != nil {
			choices[i].Supersaturation, choices[i].Fault = 0, err.Error()
		}
	}
	return choices
}
