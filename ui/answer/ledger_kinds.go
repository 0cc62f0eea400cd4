package answer

import (
	"math"
	"slices"

	"dropcrest/koehler"
	"dropcrest/koehler/ledger"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// kinds are the kinds of particles of a population with what is uncertain of them.
// An error of an input is one of all kinds, each by its own standard uncertainty.
type kinds struct {
	of        []*ledger.Ledger
	own       [][]ledger.Input // of each
	all       []ledger.Input   // one a quantity
	rises     bool             // air: the liquid is left incompressible, and the temperature is that of the air
	differing map[ledger.Quantity]bool
}

const ofEachKind = "of each kind of particle its own"

// newKinds collects the inputs of ledgers, but for sizes, which are of the population.
func newKinds(ledgers []*ledger.Ledger, s scenario.Scenario, rises bool) *kinds {
	k := &kinds{of: ledgers, rises: rises, differing: map[ledger.Quantity]bool{}}
	for _, l := range ledgers {
		own := slices.DeleteFunc(known(l.Inputs(), s), func(in ledger.Input) bool {
			return in.Quantity == ledger.DryDiameter || in.Quantity == ledger.ShapeFactor
		})
		k.own = append(k.own, own)
		for _, in := range own {
			k.take(in)
		}
	}
	return k
}

// take adds an input to those of all kinds. Where kinds differ it is a factor, as
// uncertain as the most uncertain kind.
func (k *kinds) take(in ledger.Input) {
	at := slices.IndexFunc(k.all, func(have ledger.Input) bool { return have.Quantity == in.Quantity })
	if at < 0 {
		k.all = append(k.all, in)
		return
	}
	have := &k.all[at]
	if *have == in {
		return
	}
	relative := math.Max(have.StandardUncertainty/have.Value, in.StandardUncertainty/in.Value)
	*have = ledger.Input{Quantity: in.Quantity, Value: 1, StandardUncertainty: relative, Source: ofEachKind}
	k.differing[in.Quantity] = true
}

// particles are those of each kind with inputs that are off.
func (k *kinds) particles(x *ledger.Deviation) (map[*ledger.Ledger]koehler.Particle, error) {
	out := map[*ledger.Ledger]koehler.Particle{}
	for i, l := range k.of {
		var off ledger.Deviation
		for _, in := range k.own[i] {
			off[in.Quantity] = k.off(in, x)
		}
		if k.rises {
			off[ledger.Temperature] = 0
		}
		p, err := l.Deviated(k.own[i], &off)
		if err != nil {
			return nil, err
		}
		if k.rises {
			p.Kelvin = koehler.Standard
		}
		out[l] = p
	}
	return out, nil
}

// off is what an input of one kind is off by: as many of its standard uncertainties as
// that of all kinds is.
func (k *kinds) off(in ledger.Input, x *ledger.Deviation) float64 {
	for _, all := range k.all {
		if all.Quantity != in.Quantity {
			continue
		}
		if all.StandardUncertainty > 0 {
			return x[in.Quantity] / all.StandardUncertainty * in.StandardUncertainty
		}
		return x[in.Quantity] / all.Value * in.Value
	}
	return 0
}

// population is that of the groups with inputs of their particles that are off, and
// the Kelvin length of each group.
func (k *kinds) population(groups spectrum.Population, of []composed, x *ledger.Deviation) (spectrum.Population, []float64, error) {
	particles, err := k.particles(x)
	if err != nil {
		return nil, nil, err
	}
	out, kelvin := slices.Clone(groups), make([]float64, len(groups))
	for i := range out {
		out[i].Of, kelvin[i] = of[i].of, of[i].kelvin
		mixture, isMixed := of[i].of.(spectrum.External)
		switch {
		case isMixed && len(of[i].ledgers) == len(mixture):
			parts := slices.Clone(mixture)
			for j := range parts {
				parts[j].Of, kelvin[i] = remade(parts[j].Of, particles[of[i].ledgers[j]])
			}
			out[i].Of = parts
		case len(of[i].ledgers) == 1:
			out[i].Of, kelvin[i] = remade(of[i].of, particles[of[i].ledgers[0]])
		}
	}
	return out, kelvin, nil
}

// remade is the composition of a particle, its κ spread as that of the other one.
func remade(like spectrum.Composition, p koehler.Particle) (spectrum.Composition, float64) {
	of, kelvin := sharp(p)
	gsd := 1.0
	switch c := like.(type) {
	case spectrum.Spread:
		gsd = c.GSD
	case spreadMatter:
		gsd = c.gsd
	}
	of, _ = spreadOf(of, gsd, kelvin)
	return of, kelvin
}

// activates tells whether some kind takes up water by a κ, which can differ among
// its particles.
func (k *kinds) activates() bool {
	return slices.ContainsFunc(k.all, func(in ledger.Input) bool { return in.Quantity == ledger.Hygroscopicity })
}
