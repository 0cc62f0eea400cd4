package koehler

import "dropcrest/solutes"

// Making is what a dissolved recipe needs besides to be one particle: its size,
// its temperature, and how film and curvature are to be taken.
type Making struct {
	DryDiameter  float64     // m, volume-equivalent
	Temperature  float64     // K
	Partitioning bool        // of a film's organic between surface and bulk, see Surfactant
	Form         SolubleForm // of the soluble share on an adsorbing core
	Kelvin       Kelvin
	TolmanLength float64 // m, see TolmanTension
}

// Of makes the particle: plain, with a surface-active film, or with water
// adsorbed on a core, as the recipe has it. Errors: those of Surfactant.Particle,
// Adsorption.Particle and Particle.Check.
func (m Making) Of(d solutes.Dissolved) (p Particle, err error) {
	switch {
	case d.Film != nil:
		p, err = m.film(*d.Film)
	case d.Core != nil:
		c := d.Core
		p, err = Adsorption{A: c.A, B: c.B, SolubleShare: c.SolubleShare, Kappa: c.Kappa, Form: m.Form}.Particle(m.DryDiameter, m.Temperature)
		p.Tension = d.Tension
	default:
		p = Particle{DryDiameter: m.DryDiameter, Temperature: m.Temperature, Solution: d.Solution, Swelling: d.Swelling, Tension: d.Tension}
	}
	p.Kelvin, p.TolmanLength = m.Kelvin, m.TolmanLength
	if err != nil {
		return p, err
	}
	return p, p.Check()
}

func (m Making) film(f solutes.Film) (Particle, error) {
	salt := Salt{Share: f.RestShare, Solution: f.Rest}
	if f.Rest == nil {
		salt.Kappa = f.RestKappa
	}
	return Surfactant{Share: f.Share, Density: f.Density, MolarMass: f.MolarMass,
		GammaMax: f.GammaMax, K: f.K, Floor: f.Floor, Partitioning: m.Partitioning,
	}.Particle(m.DryDiameter, m.Temperature, salt)
}
