package solutes

import "math"

// Concentrated holds published polynomials in x, the solute in percent of the
// solution's mass, at 25 °C:
//
//	a_w = 1 + Σ C_i x^i          ρ = 997.1 kg/m³ + 1000 Σ A_i x^i
//
// The activity polynomial has a wrong slope at infinite dilution (up to 15 % in
// critical supersaturation), so it is used above JoinLow (mol/kg) only and
// alone from JoinHigh on. Both 0: there is no join, and the activity polynomial is
// not used. Molalities count formula units.
type Concentrated struct {
	Activity       []float64 `json:"activity"` // C_1, C_2, ...
	Density        []float64 `json:"density"`  // A_1, A_2, ...
	MaxMassPercent float64   `json:"max_mass_percent"`
	JoinLow        float64   `json:"join_low"`
	JoinHigh       float64   `json:"join_high"`
	Source         string    `json:"source"`
	Evidence       Evidence  `json:"evidence"`
}

// MaxMolality returns the end of the polynomial's range in mol/kg for a solute of
// that molar mass (kg/mol).
func (c *Concentrated) MaxMolality(molarMass float64) float64 {
	return c.MaxMassPercent / (100 - c.MaxMassPercent) / molarMass
}

// Joined reports whether the activity polynomial has a join to a dilute model.
func (c *Concentrated) Joined() bool { return c != nil && c.JoinHigh > c.JoinLow }

// polynomial is Concentrated made ready: the osmotic coefficient above the join.
type polynomial struct {
	c         [4]float64
	molarMass float64
	nuMw      float64
	low       float64 // mol/kg, the polynomial is wrong below
}

// osmotic returns φ and dφ/d ln m. It panics below the join: there the
// polynomial must never be evaluated.
func (p *polynomial) osmotic(m float64) (phi, slope float64) {
	if m < p.low {
		panic("solutes: concentrated polynomial below its join")
	}
	mass := m * p.molarMass
	x := 100 * mass / (1 + mass)
	c := &p.c
	water := 1 + x*(c[0]+x*(c[1]+x*(c[2]+x*c[3])))
	xSlope := x * (c[0] + x*(2*c[1]+x*(3*c[2]+x*4*c[3]))) // d a_w/d ln x
	scale := 1 / (p.nuMw * m)
	phi = -math.Log(water) * scale
	return phi, -phi - xSlope/(1+mass)/water*scale
}
