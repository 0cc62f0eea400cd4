package answer

import (
	"math"
	"reflect"

	"dropcrest/koehler"
	"dropcrest/koehler/kappa"
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

	// rises: the particles are in rising air. It leaves the liquid incompressible in all
	// but the row about that: the ascent of particles of a κ is ten times faster then,
	// and a κ can be spread.
	rises bool
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
	if m.rises {
		switch m.key {
		case ledger.IncompressibleLiquid:
		case ledger.Convention25C: // the air keeps its temperature
			p.Kelvin, p.Tension = koehler.Standard, solutes.ConstantTension(kappa.At25C().Tension)
			return p, false
		default:
			defer func() { p.Kelvin = koehler.Standard }()
		}
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
	return addWider(c, dst, s, sizes, share)
}
