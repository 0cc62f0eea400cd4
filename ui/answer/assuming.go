package answer

import (
	"math"
	"reflect"
	"slices"

	"dropcrest/koehler"
	"dropcrest/koehler/ascent"
	"dropcrest/koehler/ledger"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// assuming makes the particles of populations by the fullest model at hand, or with
// one assumption, so that a ledger can ask the same question twice.
type assuming struct {
	key     ledger.Key // the assumption that is made; "": none
	against bool       // what that assumption is compared with, instead
	known   *[]knownLedger

	// noSqueeze leaves the liquid incompressible in all but the row about that: the
	// ascent of particles of a κ is ten times faster then, and a κ can be spread.
	noSqueeze bool
}

// knownLedger is the ledger of one kind of particles, made once for all rows.
type knownLedger struct {
	of scenario.Scenario // blank where it does not matter
	*ledger.Ledger
}

// ledgerFor is the ledger of the particles of a scenario. It is that of anySize:
// what its rows hand out is asked of other sizes.
func (m *assuming) ledgerFor(env Env, s scenario.Scenario) (*ledger.Ledger, error) {
	of := onlyMatter(s)
	of.Partitioning, of.TolmanLength, of.Kelvin = s.Partitioning, s.TolmanLength, s.Kelvin
	for _, k := range *m.known {
		if reflect.DeepEqual(k.of, of) {
			return k.Ledger, nil
		}
	}
	a, err := askedOf(env, s)
	if err != nil {
		return nil, err
	}
	a.DryDiameter, a.Mobility = anySize, false
	l, err := ledger.Make(a)
	if err != nil {
		return nil, recipeError(err)
	}
	*m.known = append(*m.known, knownLedger{of, &l})
	return &l, nil
}

// particle is the one that makes the assumption; where the particles of the scenario
// cannot make it, that of the fullest model.
func (m *assuming) particle(l *ledger.Ledger) (p koehler.Particle, isCubic bool) {
	p = l.Particle()
	if m.noSqueeze && m.key != ledger.IncompressibleLiquid {
		defer func() { p.Kelvin = koehler.Standard }()
	}
	for _, r := range l.Rows {
		if r.Key != m.key || r.Status != ledger.Known {
			continue
		}
		if r.Key == ledger.TextbookCubic {
			return p, !m.against
		}
		if simple, whole, ok := r.Particles(); ok && m.against {
			return whole, false
		} else if ok {
			return simple, false
		}
	}
	return p, false
}

// makeOf sets which sizes of particles activate, and how that is known; those of the
// particle itself, or of what is assumed of it.
func (env Env) makeOf(out *composed, s scenario.Scenario, p koehler.Particle) error {
	out.of, out.kelvin = sharp(p)
	if env.assuming == nil {
		return nil
	}
	l, err := env.assuming.ledgerFor(env, s)
	if err != nil {
		return err
	}
	out.ledgers = append(out.ledgers, l)
	p, isCubic := env.assuming.particle(l)
	out.of, out.kelvin = sharp(p)
	if isCubic {
		crest, err := p.Textbook()
		if err != nil {
			return recipeError(err)
		}
		out.of = cubicForm{crest.Supersaturation}
	}
	return nil
}

// cubicForm is particles that activate as the textbook's closed crest says: the
// supersaturation falls with the power 1.5 of the size.
type cubicForm struct {
	crest float64 // of particles of anySize
}

// Critical implements spectrum.Composition.
func (c cubicForm) Critical(s float64) (float64, error) {
	return anySize * math.Pow(c.crest/s, 2./3), nil
}

// AddCounts implements spectrum.Composition.
func (c cubicForm) AddCounts(dst, s []float64, sizes spectrum.Sizes, share float64) error {
	for i, x := range s {
		d, err := c.Critical(x)
		if err != nil {
			return err
		}
		dst[i] += share * sizes.Above(d)
	}
	return nil
}

// bent is a composition with solute times the solute and curvature times the Kelvin
// length, as ledger.Bend makes it of a particle.
func bent(of spectrum.Composition, solute, curvature float64) spectrum.Composition {
	switch c := of.(type) {
	case spectrum.Kappa:
		return spectrum.Kappa{Value: c.Value * solute, KelvinLength: c.KelvinLength * curvature}
	case spectrum.Spread:
		c.Median, c.KelvinLength = c.Median*solute, c.KelvinLength*curvature
		return c
	case *held:
		return bent(c.of, solute, curvature)
	case *spectrum.Matter:
		return &spectrum.Matter{Particle: ledger.Bend(c.Particle, solute, curvature)}
	case spreadMatter:
		return spreadMatter{bent(c.of, solute, curvature), c.gsd, c.kelvin * curvature}
	case spectrum.External:
		mixture := make(spectrum.External, len(c))
		for i, part := range c {
			mixture[i] = spectrum.Part{Share: part.Share, Of: bent(part.Of, solute, curvature)}
		}
		return mixture
	}
	return of
}

// bentGroups are the groups of an ascent with other sizes, numbers, solute and Kelvin
// length, each by a factor. ok is false where sizes cannot be scaled.
func bentGroups(groups []ascent.Group, size, number, solute, curvature float64) (out []ascent.Group, ok bool) {
	out = slices.Clone(groups)
	for i := range out {
		g := &out[i]
		if g.Sizes, ok = spectrum.Scaled(g.Sizes, size); !ok {
			return nil, false
		}
		g.From, g.To = g.From*size, g.To*size
		g.Share = orOne(g.Share) * number
		g.Kappa *= solute
		g.TensionFactor = orOne(g.TensionFactor) * curvature
		if g.Matter != nil {
			p := ledger.Bend(*g.Matter, solute, curvature)
			g.Matter = &p
		}
	}
	return out, true
}

// orOne is x, or 1 where 0 stands for that.
func orOne(x float64) float64 {
	if x == 0 {
		return 1
	}
	return x
}

// canBend tells whether the solute of a composition can be changed.
func canBend(of spectrum.Composition) bool {
	switch c := of.(type) {
	case spectrum.Kappa:
		return c.Value > 0
	case spectrum.Spread:
		return true
	case *held:
		return canBend(c.of)
	case *spectrum.Matter:
		kappa, isKappa := c.Particle.Solution.(solutes.Kappa)
		return ledger.CanBend(c.Particle) && (!isKappa || kappa > 0)
	case spreadMatter:
		return canBend(c.of)
	case spectrum.External:
		for _, part := range c {
			if canBend(part.Of) {
				return true
			}
		}
	}
	return false
}
