package answer

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"time"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// observation is one record of the data as this question needs it.
type observation struct {
	number     int
	start, end time.Time
	sizes      *aerosol.Bins // nil: none
	noSizes    string        // why there are none
	kappa      float64       // by the composition that was measured, NaN: not known
	kappaFrom  string        // what it follows from, in words
	species    []spectrum.MixedPart
	counts     []measurement // ascending
	rejected   rejections
	notes      []atmos.Note
}

// composer makes the compositions of records: what they share is made once.
type composer struct {
	env     Env
	asked   scenario.Scenario
	given   composed // for records whose composition is not known
	noGiven error    // why there is none
	kappas  composed // of some κ, for those whose κ was measured
	base    koehler.Particle
}

func newComposer(env Env, s scenario.Scenario) (*composer, error) {
	c := &composer{env: env, asked: s}
	c.given, c.noGiven = env.compose(s)
	if s.Composition == "given" {
		return c, c.noGiven
	}
	of := onlyKappa(s, 0.3) // any: each record has its own
	made, err := env.matter(of)
	if err != nil {
		return nil, err
	}
	if c.base, err = newParticle(made.dissolved, of, anySize); err != nil {
		return nil, recipeError(err)
	}
	c.kappas.notes = distinct(slices.Concat(waterNotes(of), made.more))
	c.kappas.models = made.dissolved.Models
	if len(s.Szyszkowski) > 0 || s.Adsorbs() {
		c.kappas.notes = append(c.kappas.notes, atmos.Note{Code: "measured-composition-plain", Input: "composition",
			Text: "Films and adsorption are of given components: particles of a measured composition have neither."})
	}
	return c, nil
}

// of makes the composition of the particles of a record.
func (c *composer) of(o *observation) (composed, error) {
	if c.asked.Composition == "given" || math.IsNaN(o.kappa) {
		return c.given, c.noGiven
	}
	out := c.kappas
	if c.asked.Mixing == "external" && len(o.species) > 1 {
		var mixture spectrum.External
		for _, p := range o.species {
			if p.Share > 0 {
				one, err := c.ofKappa(p.Species.Kappa)
				if err != nil {
					return one, err
				}
				out.ledgers = append(out.ledgers, one.ledgers...)
				mixture = append(mixture, spectrum.Part{Share: p.Share, Of: one.of})
				out.kelvin = one.kelvin
			}
		}
		out.of, out.isOne, out.kappa = mixture, false, math.NaN()
		return out, nil
	}
	return c.ofKappa(o.kappa)
}

// ofKappa makes particles of one κ.
func (c *composer) ofKappa(kappa float64) (composed, error) {
	out, p := c.kappas, c.base
	p.Solution = solutes.Kappa(kappa)
	out.kappa = kappa
	if err := c.env.makeOf(&out, onlyKappa(c.asked, kappa), p); err != nil {
		return out, err
	}
	out.of, out.isOne = spreadOf(out.of, c.asked.KappaSpread, out.kelvin)
	return out, nil
}

// ofRecord is the population of a record and what was counted of it.
func (c *composer) ofRecord(o *observation) (*activated, error) {
	a := &activated{asked: c.asked, isAlike: true, number: o.number, start: o.start, end: o.end,
		measured: slices.Clone(o.counts), rejected: o.rejected, notes: o.notes}
	slices.SortStableFunc(a.measured, func(x, y measurement) int { return cmp.Compare(x.s, y.s) })
	of, err := c.of(o)
	if err != nil {
		return nil, fmt.Errorf("record %d: %w", o.number, err)
	}
	if c.asked.Composition != "given" && !math.IsNaN(o.kappa) {
		a.kappaFrom = o.kappaFrom
	}
	if o.sizes == nil {
		a.noSizes = o.noSizes
		a.groups = []composed{of}
		return a, nil
	}
	a.sizes, a.bins = o.sizes, o.sizes
	a.add(o.sizes, of)
	return a, nil
}
