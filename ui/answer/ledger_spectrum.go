package answer

import (
	"context"
	"fmt"
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
	return []figureOf{{"ccn", "count", func(x float64) string { return cubic(x) + " per cm³" }, same}}
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
	plain, err := countAt(ctx, env, s)
	if err != nil {
		return nil, err
	}
	m := &many{env: env, asked: shaped(env, s), values: func(env Env, s scenario.Scenario) (ledger.Values, error) { return countAt(ctx, env, s) }}
	of, err := newActivated(ctx, m.by("", false), m.asked)
	if err != nil {
		return nil, err
	}
	m.kinds = newKinds(ledgersOf(of), s, false)
	m.full = countsOf(of)
	c := &costs{asked: s, page: "Spectrum", figures: countFigures(), plain: plain, full: m.full, models: modelsOf(m.kinds.of), differing: m.kinds.differing,
		subject: "the particles that activate at " + percent(s.AtSupersaturation)}
	if len(s.Szyszkowski) > 0 {
		c.solved = fewTrials
	}
	c.rows = append(m.ofParticles(), m.sphere(s), m.mixing(), m.spread(), m.binWidth(of), m.sizes(of), m.setting())
	inputs := slices.Concat(known(append(m.sizeInputs(), m.settingInput()), s), m.kinds.all)
	c.budget, err = ledger.Propagate(m.full, inputs, m.countModel(of), 0)
	if err != nil {
		return nil, &InputError{"uncertainty", reason(err)}
	}
	c.notes = distinct(slices.Concat(of.notes, unknownInputs(inputs, s)))
	return c, nil
}

// shaped is the scenario with the shape factor of the catalogue, where sizes are
// mobilities, none is given and the particles are of one substance that has one.
func shaped(env Env, s scenario.Scenario) scenario.Scenario {
	s = s.Clone()
	if s.DrySizeIs != "mobility" || s.Population == "modes" || s.ShapeFactor > 1 || len(s.Components) != 1 || s.Population == "data" && s.Composition == "measured" {
		return s
	}
	if of, ok := env.catalogue().Find(s.Components[0].Substance); ok && of.ShapeFactor.Value > 1 {
		s.ShapeFactor = of.ShapeFactor.Value
	}
	return s
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
	return countsOf(a), nil
}

// leastCount is a number below which nothing is said of it, 1/m³.
const leastCount = 1

// countsOf is the number that activates; NaN where none does.
func countsOf(a *activated) ledger.Values {
	n := noChange()
	if x := a.predicted[0].count; x >= leastCount {
		n[0] = x
	}
	return n
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

// countModel is the count as it follows its inputs.
func (m *many) countModel(of *activated) ledger.Model {
	at := m.asked.AtSupersaturation
	cut := of.critical(at, m.full[0])
	return func(x *ledger.Deviation) ledger.Values {
		out := noChange()
		p, _, err := m.kinds.population(of.population, of.groups, x)
		if err != nil {
			return out
		}
		for i := range p {
			var ok bool
			if p[i].Sizes, ok = spectrum.Scaled(p[i].Sizes, sizeFactor(m.asked, cut, x)); !ok {
				return out
			}
		}
		s := at + x[ledger.Supersaturation]
		if !(s > 0) {
			return out
		}
		if n, err := p.Count(s); err == nil && n >= leastCount {
			out[0] = n * (1 + x[ledger.Numbers])
		}
		return out
	}
}

// sphere is the row of sized particles that are taken for spheres.
func (m *many) sphere(asked scenario.Scenario) assumed {
	a, _ := ledger.Find(ledger.Sphere)
	row := assumed{Assumption: a, change: noChange(), ifChange: noChange()}
	switch {
	case m.asked.Population == "modes":
		row.status, row.reason = ledger.NotApplicable, "The modes are of volume-equivalent diameters, whatever the shape."
		return row
	case !m.isMobility():
		row.status, row.reason = ledger.NotApplicable, "The dry sizes are volume-equivalent diameters, whatever the shape."
		return row
	}
	row.made = asked.ShapeFactor <= 1
	if m.asked.ShapeFactor <= 1 {
		row.status, row.reason = ledger.NotKnown, "No shape factor of the particles is known or given."
		return row
	}
	row.reason = fmt.Sprintf("The shape factor is %.3g.", m.asked.ShapeFactor)
	if row.made {
		row.reason = fmt.Sprintf("The shape factor is %.3g, that of the catalogue.", m.asked.ShapeFactor)
	}
	return m.edited(row, func(s *scenario.Scenario) { s.ShapeFactor = 1 })
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
		row.fails(err)
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

// sizes is the row of sizes that are off.
func (m *many) sizes(of *activated) assumed {
	row := newAssumed(sizeError)
	x := ledger.Deviation{ledger.Sizes: ledger.SizingInput(ledger.Sizes, 1).StandardUncertainty}
	row.change = change(m.countModel(of)(&x), m.full)
	return row
}

// settingError is what a counter repeats its supersaturation within in the field.
const (
	settingError  = 0.05
	settingSource = "repeatability of 5 % in the field, Rose et al. 2008, Atmos. Chem. Phys. 8, 1153 (volume and page from memory)"
)

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
		Source: settingSource}
}
