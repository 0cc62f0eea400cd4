package ledger

import (
	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// CanBend tells whether the solute of a particle can be changed by Bend: not where
// its solution belongs to one dry size, or follows a solubility.
func CanBend(p koehler.Particle) bool {
	if _, limited := p.Solution.(*solutes.Limited); limited {
		return false
	}
	_, sized := p.Solution.(koehler.SizeDependent)
	return !sized && p.Solution != nil
}

// Bend returns the particle with solute times the solute in each dry volume, where
// CanBend says so, and with curvature times the surface tension, both above 0. Since
// the Kelvin term follows the tension over the temperature, an error of the
// temperature is one of curvature. A budget of many sizes moves its particles in
// this way, whatever their models are.
func Bend(p koehler.Particle, solute, curvature float64) koehler.Particle {
	if CanBend(p) {
		p.Solution = withSolute(p.Solution, solute)
	}
	if curvature == 1 {
		return p
	}
	t := p.Tension
	if t == nil {
		t = solutes.ConstantTension(atmos.SurfaceTension(p.Temperature))
	}
	switch t := t.(type) {
	case solutes.ConstantTension:
		p.Tension = t * solutes.ConstantTension(curvature)
	case solutes.LinearTension:
		p.Tension = solutes.LinearTension{Water: curvature * t.Water, PerDry: curvature * t.PerDry}
	case koehler.SizeDependent:
		p.Tension = sizedTension{scaledTension{p.Tension, curvature}, t}
	default:
		p.Tension = scaledTension{p.Tension, curvature}
	}
	return p
}

// sizedTension is a scaledTension that belongs to one dry size.
type sizedTension struct {
	scaledTension
	of koehler.SizeDependent
}

// DryDiameter is that of the tension itself.
func (t sizedTension) DryDiameter() float64 { return t.of.DryDiameter() }

// Sized returns the tension of another dry size, scaled alike.
func (t sizedTension) Sized(dry float64) (solutes.Solution, solutes.Tension) {
	solution, tension := t.of.Sized(dry)
	next := scaledTension{tension, t.factor}
	if of, ok := tension.(koehler.SizeDependent); ok {
		return solution, sizedTension{next, of}
	}
	return solution, next
}
