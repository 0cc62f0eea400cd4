package koehler

import (
	"fmt"

	"dropcrest/solutes"
)

// SizeDependent is what a Solution or Tension implements that belongs to
// particles of one dry size: the water of an adsorbed film, the activity and the
// tension of a drop whose surface takes a share of its organic.
type SizeDependent interface {
	DryDiameter() float64 // m
	// Sized returns the same matter on particles of another dry diameter in m:
	// its solution and its tension, nil where it has none of its own.
	Sized(dry float64) (solutes.Solution, solutes.Tension)
}

// Sized returns the particle of the same matter with another dry diameter in m.
// Setting DryDiameter is not enough where the matter is SizeDependent.
func (p Particle) Sized(dry float64) Particle {
	p.DryDiameter = dry
	if m, ok := p.Solution.(SizeDependent); ok {
		p.Solution, _ = m.Sized(dry)
	}
	if m, ok := p.Tension.(SizeDependent); ok {
		_, p.Tension = m.Sized(dry)
	}
	return p
}

// checkSize finds matter that belongs to another dry size.
func (p Particle) checkSize() error {
	for _, part := range [...]any{p.Solution, p.Tension} {
		if m, ok := part.(SizeDependent); ok && m.DryDiameter() != p.DryDiameter {
			return &RangeError{"dry diameter", p.DryDiameter,
				fmt.Sprintf("%.6g, that of its size-dependent solution or tension", m.DryDiameter())}
		}
	}
	return nil
}
