package answer

import (
	"context"
	"math"
	"slices"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/ledger"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// countFigures is the one figure of a count.
func countFigures() []figureOf {
	same := func(x float64) float64 { return x }
	return []figureOf{{"ccn", "count", "per_m3", func(x float64) string { return cubic(x) + " per cm³" }, same}}
}

// spectrumCosts is the ledger of the Spectrum question, at one supersaturation.
func spectrumCosts(ctx context.Context, env Env, s scenario.Scenario) (*costs, error) {
	if s.Record.Is("all") && s.Population == "data" {
		return nil, &InputError{"record", "a ledger is of one record: give its number"}
	}
	s.Supersaturations, s.Fit = []float64{s.AtSupersaturation}, "none"
	if env.Kept == nil {
		env.Kept = &Kept{} // rows share their data
	}
	m := &many{env: env, asked: s, values: func(env Env, s scenario.Scenario) (ledger.Values, error) { return countAt(ctx, env, s) }}
	plain, err := countAt(ctx, env, s)
	if err != nil {
		return nil, err
	}
	of, err := newActivated(ctx, m.by("", false), s)
	if err != nil {
		return nil, err
	}
	m.ledgers = ledgersOf(of)
	m.full = ledger.Values{of.predicted[0].count, math.NaN(), math.NaN()}
	c := &costs{asked: s, page: "Spectrum", figures: countFigures(), plain: plain, full: m.full, models: modelsOf(m.ledgers),
		subject: "the particles that activate at " + percent(s.AtSupersaturation)}
	c.rows = append(m.ofParticles(), m.sphere(), m.mixing(), m.spread(), m.binWidth(of), m.sizes(of), m.setting())
	inputs := known(append(m.uncertain(canBendAny(of)), m.settingInput()), s)
	c.budget, err = ledger.Propagate(m.full, inputs, countModel(of, inputs, s), 0)
	if err != nil {
		return nil, &InputError{"uncertainty", reason(err)}
	}
	c.notes = distinct(slices.Concat(of.notes, unknownInputs(inputs, s)))
	return c, nil
}

// countAt is the number that activates at the supersaturation of the ledger.
func countAt(ctx context.Context, env Env, s scenario.Scenario) (ledger.Values, error) {
	a, err := newActivated(ctx, env, s)
	if err != nil {
		return noChange(), err
	}
	if a.sizes == nil {
		return noChange(), &InputError{"data", "nothing can be counted: " + a.noSizes}
	}
	return ledger.Values{a.predicted[0].count, math.NaN(), math.NaN()}, nil
}

// ledgersOf are the ledgers of the particles of a population.
func ledgersOf(a *activated) []*ledger.Ledger {
	var out []*ledger.Ledger
	for _, g := range a.groups {
		for _, l := range g.ledgers {
			if !slices.Contains(out, l) {
				out = append(out, l)
			}
		}
	}
	return out
}

func modelsOf(ledgers []*ledger.Ledger) []string {
	var out []string
	for _, l := range ledgers {
		for _, m := range l.Models {
			if !slices.Contains(out, m) {
				out = append(out, m)
			}
		}
	}
	return out
}

func canBendAny(a *activated) bool {
	return slices.ContainsFunc(a.population, func(g spectrum.Group) bool { return canBend(g.Of) })
}

// countModel is the count as it follows its inputs.
func countModel(of *activated, inputs []ledger.Input, s scenario.Scenario) ledger.Model {
	fixed := givenTension(s)
	return func(x *ledger.Deviation) ledger.Values {
		solute, curvature := factors(inputs, x, fixed)
		p := slices.Clone(of.population)
		for i := range p {
			sizes, ok := spectrum.Scaled(p[i].Sizes, 1+x[ledger.Sizes])
			if !ok {
				return noChange()
			}
			p[i].Sizes, p[i].Of = sizes, bent(p[i].Of, solute, curvature)
		}
		n, err := p.Count(s.AtSupersaturation + x[ledger.Supersaturation])
		if err != nil {
			return noChange()
		}
		return ledger.Values{n * (1 + x[ledger.Numbers]), math.NaN(), math.NaN()}
	}
}

// sphere is the row of sized particles that are taken for spheres.
func (m *many) sphere() assumed {
	var row assumed
	for _, a := range ledger.Assumptions() {
		if a.Key == ledger.Sphere {
			row = assumed{Assumption: a, change: noChange(), ifChange: noChange()}
		}
	}
	switch {
	case m.asked.Population == "modes":
		row.status, row.reason = ledger.NotApplicable, "The modes are of volume-equivalent diameters, whatever the shape."
	case m.asked.DrySizeIs != "mobility":
		row.status, row.reason = ledger.NotApplicable, "The dry sizes are volume-equivalent diameters, whatever the shape."
	case m.asked.ShapeFactor <= 1:
		row.status, row.reason, row.made = ledger.NotKnown, "No shape factor of the particles is given.", true
	default:
		return m.edited(row, func(s *scenario.Scenario) { s.ShapeFactor = 1 })
	}
	return row
}

// binWidth is the row of bins that count whole.
func (m *many) binWidth(of *activated) assumed {
	row := newAssumed(binWidth)
	if of.bins == nil {
		row.status, row.reason = ledger.NotApplicable, "Lognormal modes have no bins."
		return row
	}
	whole := slices.Clone(of.population)
	for i := range whole {
		whole[i].Sizes = wholeBins{of.bins}
	}
	n, err := whole.Count(m.asked.AtSupersaturation)
	if err != nil {
		row.status, row.reason = ledger.NotKnown, "It cannot be worked out: "+reason(err)+"."
		return row
	}
	row.change = change(ledger.Values{n, math.NaN(), math.NaN()}, m.full)
	return row
}

// wholeBins are sizes whose bins lie above a diameter as a whole or not at all.
type wholeBins struct{ *aerosol.Bins }

// Above counts the bins whose geometric middle is wider than d.
func (b wholeBins) Above(d float64) float64 {
	edges := b.Grid().Edges()
	for i := range len(edges) - 1 {
		if math.Sqrt(edges[i]*edges[i+1]) > d {
			return b.Bins.Above(edges[i])
		}
	}
	return 0
}

// AddAbove is Above of many diameters, so that that of the bins is not taken.
func (b wholeBins) AddAbove(dst, diameters []float64, share float64) {
	for i, d := range diameters {
		dst[i] += share * b.Above(d)
	}
}

const sizingError = 0.03

// sizes is the row of sizes that are off.
func (m *many) sizes(of *activated) assumed {
	row := newAssumed(sizeError)
	x := ledger.Deviation{ledger.Sizes: sizingError}
	row.change = change(countModel(of, nil, m.asked)(&x), m.full)
	return row
}

// settingError is what a counter repeats its supersaturation within in the field.
const settingError = 0.05

// setting is the row of a counter whose supersaturation is off.
func (m *many) setting() assumed {
	row := newAssumed(calibration)
	return m.edited(row, func(s *scenario.Scenario) {
		s.AtSupersaturation *= 1 + settingError
		s.Supersaturations = []float64{s.AtSupersaturation}
	})
}

func (m *many) settingInput() ledger.Input {
	return ledger.Input{Quantity: ledger.Supersaturation, Value: m.asked.AtSupersaturation, StandardUncertainty: settingError * m.asked.AtSupersaturation,
		Source: "repeatability in the field, Rose et al. 2008, Atmos. Chem. Phys. 8, 1153 (volume and page from memory)"}
}
