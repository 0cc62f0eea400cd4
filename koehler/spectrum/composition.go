package spectrum

import (
	"errors"
	"math"

	"dropcrest/koehler"
)

// Sizes is a size distribution: an aerosol.Mode, aerosol.Modes or *aerosol.Bins.
type Sizes interface {
	Number() float64           // of all particles, 1/m³
	Above(d float64) float64   // wider than d (m), 1/m³
	Density(d float64) float64 // dN/dlnD at d (m), 1/m³
}

// broken is what Sizes implement whose density jumps.
type broken interface {
	Breaks() []float64 // m, ascending
}

// Composition says which particles of a size distribution activate. It is a
// Kappa, a *Matter, a Spread, an External, a *KappaTable or a *Ranges.
type Composition interface {
	// Critical returns the dry diameter (m) from which on every wider particle
	// activates at s: 0 where all do, +Inf where none does. Of a Spread it is that
	// of the median κ.
	Critical(s float64) (float64, error)
	// AddCounts adds to dst share times the number of particles of these sizes that
	// activate at each s; dst is as long as s.
	AddCounts(dst, s []float64, sizes Sizes, share float64) error
}

// Kappa is a composition of one κ in closed form, the fast path: additive
// volumes, one surface tension, the standard Kelvin term.
type Kappa struct {
	Value        float64 // κ, 0 to 30
	KelvinLength float64 // A, m: koehler.KelvinLength
}

// Critical returns koehler.DryOf.
func (k Kappa) Critical(s float64) (float64, error) {
	return koehler.DryOf(k.Value, k.KelvinLength, s)
}

// AddCounts implements Composition.
func (k Kappa) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	return addSharp(k, dst, s, sizes, share)
}

// Matter is the composition of a particle of any kind; its DryDiameter does not
// matter. A crest is searched for, some 10 to 100 times slower than Kappa: hold
// the answers in Cuts where many records ask for the same supersaturations.
type Matter struct{ Particle koehler.Particle }

// These are the smallest and widest dry particles (m) that are looked at.
const (
	leastMatter = 1e-10
	mostMatter  = 1e-3
)

// Critical returns the ActivatedDryDiameter. Where there is none, all or no
// particles from 0.1 nm to 1 mm activate.
func (m *Matter) Critical(s float64) (float64, error) {
	d, err := m.Particle.ActivatedDryDiameter(s)
	if !errors.Is(err, koehler.ErrNoSolution) {
		return d, err
	}
	if crest, err := m.Particle.Sized(mostMatter).Crest(); err != nil || crest.Supersaturation > s {
		return math.Inf(1), err
	}
	return 0, nil
}

// AddCounts implements Composition.
func (m *Matter) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	return addSharp(m, dst, s, sizes, share)
}

// addSharp counts where all particles wider than one diameter activate.
func addSharp(c Composition, dst, s []float64, sizes Sizes, share float64) error {
	cuts, err := criticals(make([]float64, 0, len(s)), c, s)
	if err != nil {
		return err
	}
	addAbove(dst, cuts, sizes, share)
	return nil
}

func criticals(dst []float64, c Composition, s []float64) ([]float64, error) {
	if k, ok := c.(Kappa); ok { // spares the call through the interface
		for _, x := range s {
			d, err := koehler.DryOf(k.Value, k.KelvinLength, x)
			if err != nil {
				return dst, err
			}
			dst = append(dst, d)
		}
		return dst, nil
	}
	for _, x := range s {
		d, err := c.Critical(x)
		if err != nil {
			return dst, err
		}
		dst = append(dst, d)
	}
	return dst, nil
}

func addAbove(dst, cuts []float64, sizes Sizes, share float64) {
	if a, ok := sizes.(interface {
		AddAbove(dst, diameters []float64, share float64)
	}); ok {
		a.AddAbove(dst, cuts, share)
		return
	}
	for i, d := range cuts {
		dst[i] += share * sizes.Above(d)
	}
}

// Cuts holds the critical dry diameters of one composition at some
// supersaturations, for many size distributions.
type Cuts struct {
	Supersaturations []float64
	Diameters        []float64 // m
}

// NewCuts asks for the critical dry diameter at each s. The composition must be
// sharp: a Kappa or a *Matter.
func NewCuts(c Composition, s []float64) (Cuts, error) {
	if !isSharp(c) {
		return Cuts{}, errNotSharp
	}
	d, err := criticals(nil, c, s)
	return Cuts{append([]float64(nil), s...), d}, err
}

// AddCounts adds to dst share times the number of particles of these sizes that
// activate at each supersaturation of the cuts.
func (c Cuts) AddCounts(dst []float64, sizes Sizes, share float64) {
	addAbove(dst, c.Diameters, sizes, share)
}

func isSharp(c Composition) bool {
	switch c.(type) {
	case Kappa, *Matter:
		return true
	}
	return false
}
