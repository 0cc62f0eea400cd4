package ledger

import (
	"fmt"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// deviating makes the particle of the fullest model with inputs that are off. The
// water activity stays that of the temperature asked for: by itself it moves the
// crest of a salt by less than 0.02 % for a kelvin, beside 0.8 % by tension and
// temperature of the Kelvin term.
type deviating struct {
	full   made
	values Deviation // of the inputs
	water  float64   // tension of water, N/m
}

func (l *Ledger) deviating(inputs []Input) *deviating {
	v := &deviating{full: l.full, water: atmos.SurfaceTension(l.full.particle.Temperature)}
	for _, in := range inputs {
		v.values[in.Quantity] = in.Value
	}
	return v
}

// factor is a quantity over its value.
func (v *deviating) factor(x *Deviation, q Quantity) float64 {
	if v.values[q] == 0 {
		return 1
	}
	return 1 + x[q]/v.values[q]
}

// errNothingLeft is what a particle gets whose inputs are off by all that they are.
var errNothingLeft = fmt.Errorf("%w: an input is off by all of its value", koehler.ErrInput)

// Deviated returns the particle of the fullest model with inputs that are off, of the
// dry diameter asked for. Errors are those of koehler.Making.Of; an input that is off
// by all of its value is one too.
func (l *Ledger) Deviated(inputs []Input, x *Deviation) (koehler.Particle, error) {
	return l.deviating(inputs).particle(x)
}

func (v *deviating) answer(x *Deviation) Answer {
	p, err := v.particle(x)
	if err != nil {
		return Answer{Values: none(), NoCrest: err, NoHaze: err}
	}
	return answer(p, v.full.asked.SaturationRatio)
}

func (v *deviating) particle(x *Deviation) (koehler.Particle, error) {
	a, d := v.full.asked, v.full.dissolved
	dry := a.DryDiameter + x[DryDiameter]
	if a.Mobility {
		dry = a.dry(dry, a.ShapeFactor+x[ShapeFactor])
	}
	a.Recipe.Temperature += x[Temperature]
	making := a.making(dry)
	solute := v.factor(x, Hygroscopicity) * v.factor(x, Shares)
	if !(solute > 0) || !(v.factor(x, SurfaceTension) > 0) || !(v.factor(x, Solubility) > 0) {
		return koehler.Particle{}, errNothingLeft
	}
	if d.Film != nil {
		return v.film(making, *d.Film, x, solute)
	}
	d.Tension = v.tension(d.Tension, x)
	if t, ok := d.Tension.(solutes.LinearTension); ok { // less solute adds less
		d.Tension = solutes.LinearTension{Water: t.Water, PerDry: t.PerDry * solute}
	}
	if d.Core != nil {
		c := *d.Core
		c.A, c.B, c.Kappa = c.A+x[AdsorptionA], c.B+x[AdsorptionB], c.Kappa*solute
		d.Core = &c
		return making.Of(d)
	}
	if isKept(d) {
		limited, _, err := solutes.DissolveJoined(v.limited(solute, v.factor(x, Solubility)))
		if err != nil {
			return koehler.Particle{}, err
		}
		d.Solution = limited.Solution
		return making.Of(d)
	}
	d.Solution = withSolute(d.Solution, solute)
	return making.Of(d)
}

// tension scales a tension and lets that of water follow the temperature.
func (v *deviating) tension(t solutes.Tension, x *Deviation) solutes.Tension {
	factor, water := v.factor(x, SurfaceTension), v.water
	if x[Temperature] != 0 {
		water = atmos.SurfaceTension(v.full.particle.Temperature + x[Temperature])
	}
	switch t := t.(type) {
	case solutes.LinearTension:
		return solutes.LinearTension{Water: factor * water, PerDry: factor * t.PerDry}
	case solutes.ConstantTension:
		if v.full.asked.Recipe.TensionRule == solutes.FixedTension {
			return solutes.ConstantTension(factor) * t
		}
	}
	return solutes.ConstantTension(factor * water)
}

func (v *deviating) film(m koehler.Making, f solutes.Film, x *Deviation, solute float64) (koehler.Particle, error) {
	f.GammaMax, f.K = f.GammaMax+x[FilmExcess], f.K+x[FilmConstant]
	f.RestKappa *= solute
	if f.Rest != nil {
		f.Rest = withSolute(f.Rest, solute)
	}
	p, err := m.Of(solutes.Dissolved{Film: &f})
	if factor := v.factor(x, SurfaceTension); err == nil && factor != 1 {
		p.Tension = scaledTension{p.Tension, factor}
	}
	return p, err
}

// limited is the recipe with the κ and the solubility of every part scaled.
func (v *deviating) limited(solute, solubility float64) solutes.Recipe {
	r := v.full.asked.Recipe
	density := v.full.dissolved.WaterDensity
	r.Kappa *= solute // NaN stays
	r.VantHoffFactor *= solute
	parts := make([]solutes.Part, len(r.Parts))
	for i, p := range r.Parts {
		s := &p.Substance
		s.Kappa = solutes.Datum{Value: solute * partKappa(*s, density), Source: s.Kappa.Source, Evidence: solutes.Computed}
		s.Ions.Value *= solute
		s.VolumeSolubility.Value *= solubility
		parts[i] = p
	}
	r.Parts = parts
	return r
}

// withSolute is a solution of that factor times the solute a dry volume.
func withSolute(s solutes.Solution, factor float64) solutes.Solution {
	if factor == 1 {
		return s
	}
	if k, ok := s.(solutes.Kappa); ok {
		return k * solutes.Kappa(factor)
	}
	return stronger{s, factor}
}

// stronger holds factor times the solute of its solution.
type stronger struct {
	solutes.Solution
	factor float64
}

func (s stronger) LnActivity(u float64) (lnaw, slope float64) {
	return s.Solution.LnActivity(u / s.factor)
}

func (s stronger) LeastWater() float64 { return s.factor * s.Solution.LeastWater() }

// scaledTension is a tension that is off by a factor.
type scaledTension struct {
	solutes.Tension
	factor float64
}

func (t scaledTension) SurfaceTension(u float64) (sigma, slope float64) {
	sigma, slope = t.Tension.SurfaceTension(u)
	return t.factor * sigma, t.factor * slope
}

// SeveralMaxima is that of the tension itself.
func (t scaledTension) SeveralMaxima() bool {
	s, ok := t.Tension.(koehler.SeveralMaxima)
	return !ok || s.SeveralMaxima()
}

// Kinks are those of the tension itself.
func (t scaledTension) Kinks(dst []float64) []float64 {
	if k, ok := t.Tension.(koehler.Kinked); ok {
		return k.Kinks(dst)
	}
	return dst
}
