package answer

import (
	"context"
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/ascent"
	"dropcrest/koehler/ledger"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// ascentFigures are those of rising air.
func ascentFigures() []figureOf {
	return []figureOf{
		{"droplets", "number of droplets", func(x float64) string { return cubic(x) + " per cm³" }, func(x float64) float64 { return x }},
		{"peak_supersaturation", "peak supersaturation", percent, func(x float64) float64 { return 100 * x }},
	}
}

// ascended is one ascent to its peak, and what it was asked with.
type ascended struct {
	*rising
	parcel  ascent.Parcel
	options ascent.Options
}

// ascentCosts is the ledger of the Ascent question, of one ascent.
func ascentCosts(ctx context.Context, env Env, s scenario.Scenario) (*costs, error) {
	s.Sweep, s.Cases, s.Refinement = "", "", "off"
	if env.Kept == nil {
		env.Kept = &Kept{} // rows share their data
	}
	quiet := env
	quiet.Progress = nil
	of, plain, err := quiet.ascend(ctx, s)
	if err != nil {
		return nil, err
	}
	c := &costs{asked: s, page: "Ascent", figures: ascentFigures(), plain: plain, rough: roughAscents, solved: fewTrials,
		subject: "air that rises at " + shortest(of.parcel.Updraft) + " m/s"}
	m := &many{env: quiet, asked: s.Clone(), rises: true, values: func(env Env, s scenario.Scenario) (ledger.Values, error) {
		_, v, err := env.ascend(ctx, s)
		return v, err
	}}
	m.asked = shaped(env, m.asked)
	m.asked.MoistHeat, m.asked.Updraft, m.asked.UpdraftSpread = "on", of.parcel.Updraft, 0
	if of, m.full, err = m.by("", false).ascend(ctx, m.asked); err != nil {
		return nil, err
	}
	m.kinds = newKinds(ledgersOf(of.activated), s, true)
	c.full, c.models, c.differing = m.full, modelsOf(m.kinds.of), m.kinds.differing
	env.tell(0.1)
	c.rows = append(m.ofParticles(), m.sphere(s), m.mixing(), m.spread())
	env.tell(0.4)
	c.rows = append(c.rows, m.ofGrowth(ctx, of, s)...)
	env.tell(0.6)
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	inputs := slices.Concat(known(append(m.sizeInputs(), m.airInputs()...), s), m.kinds.all)
	if c.budget, err = ledger.Propagate(m.full, inputs, m.dropletModel(ctx, of), slopeOfAscents); err != nil {
		return nil, &InputError{"uncertainty", reason(err)}
	}
	c.notes = distinct(slices.Concat(of.notes, unknownInputs(inputs, s)))
	if s.UpdraftSpread > 0 {
		c.notes = append(c.notes, atmos.Note{Code: "one-updraft", Input: "updraft-spread", Text: fmt.Sprintf(
			"The ledger is of one ascent, at %s m/s: that of the distribution of updrafts with its mean number of droplets.", digits(of.parcel.Updraft, 3))})
	}
	return c, ctx.Err()
}

// ascend lets the air of a scenario rise to its peak. Of a distribution of updrafts it
// takes the one that the Ascent page looks at closely.
func (env Env) ascend(ctx context.Context, s scenario.Scenario) (*ascended, ledger.Values, error) {
	of, err := env.rising(ctx, s)
	if err != nil {
		return nil, noChange(), err
	}
	a := &ascended{of, of.parcel(s), ascentOptions(s)}
	a.options.StopAtPeak = true
	if s.UpdraftSpread > 0 {
		mean, err := updraftsOf(s).Droplets(ctx, max(1, env.Workers), a.parcel, a.options)
		if err != nil {
			return nil, noChange(), of.problem(err)
		}
		a.parcel.Updraft = shownUpdraft(mean)
	}
	v, err := a.run(ctx, a.parcel, a.options)
	return a, v, err
}

// run is the droplets and the peak of a parcel.
func (a *ascended) run(ctx context.Context, p ascent.Parcel, o ascent.Options) (ledger.Values, error) {
	r, err := ascent.Run(ctx, p, o)
	switch {
	case err != nil:
		return noChange(), a.problem(err)
	case !r.HasPeak:
		return noChange(), &InputError{"height", fmt.Sprintf("the supersaturation still rises at %s m: a ledger of the ascent needs its peak, give a greater height", shortest(o.Height))}
	}
	return ledger.Values{r.Droplets, r.Peak.Supersaturation, math.NaN()}, nil
}

// Numbers of the rows and the budget of an ascent.
const (
	otherAccommodation = 0.5 // what a comparison of techniques found it to exceed
	drierStart         = 0.10
	lowerBy            = 500 // m, more than the air needs to come up to where it is asked to start
	roughAscents       = 0.5 // standard uncertainties a single trial may be off by; each takes milliseconds
	slopeOfAscents     = 0.5 // standard uncertainties: what the integration leaves open is small beside it
)

// ofGrowth are the rows of what an ascent assumes beyond its particles.
func (m *many) ofGrowth(ctx context.Context, of *ascended, asked scenario.Scenario) []assumed {
	accommodation := newAssumed(massAccommodation)
	if accommodation.made = asked.MassAccommodation == 1; accommodation.made {
		accommodation = m.iffy(accommodation, "if it is "+shortest(otherAccommodation), func(s *scenario.Scenario) { s.MassAccommodation = otherAccommodation })
		accommodation = accommodation.because("Which accommodation is true is not settled.")
	} else {
		accommodation = m.edited(accommodation, func(s *scenario.Scenario) { s.MassAccommodation = 1 })
	}
	heat := newAssumed(heatCapacity)
	heat.made = asked.MoistHeat != "on"
	heat = m.edited(heat, func(s *scenario.Scenario) { s.MoistHeat = "off" })
	rows := []assumed{accommodation, m.transition(), m.bins(ctx, of), m.start(ctx, of), heat}
	for _, f := range of.closedForms(of.parcel, of.options) {
		rows = append(rows, closedAssumption(f, m.full))
	}
	return rows
}

// transition is the row of growth without a correction for free molecules.
func (m *many) transition() assumed {
	row := newAssumed(transitionForm)
	if m.asked.Transition == "continuum" {
		row.made, row.status, row.reason = true, ledger.NotKnown, "The answer is asked for in the continuum: choose a form of growth to know what that costs."
		return row
	}
	return m.edited(row, func(s *scenario.Scenario) { s.Transition = "continuum" })
}

// bins is the row of the number of bins: as asked, minus endless ones.
func (m *many) bins(ctx context.Context, of *ascended) assumed {
	row := newAssumed(ascentBins)
	row.made = true
	r, err := ascent.Refine(ctx, of.parcel, of.options)
	if err != nil {
		row.fails(err)
		return row
	}
	row.reason = fmt.Sprintf("There are %d bins a mode.", r.Bins)
	row.change = change(m.full, ledger.Values{r.Droplets, r.Peak, math.NaN()})
	return row
}

// start is the row of particles in equilibrium where the air starts to rise: against
// the same air that started lower, drier and warmer.
func (m *many) start(ctx context.Context, of *ascended) assumed {
	row := newAssumed(startHumidity)
	row.made = true
	lower, o := of.parcel, of.options
	drier := lower.Humidity - drierStart
	lower.Temperature, lower.Pressure = lowered(lower, drier)
	lower.Humidity = drier
	dense := lower.Pressure / of.parcel.Pressure * of.parcel.Temperature / lower.Temperature
	lower.Population = slices.Clone(lower.Population)
	for i := range lower.Population {
		lower.Population[i].Share *= dense
	}
	o.Height += lowerBy
	full, err := of.run(ctx, lower, o)
	if err != nil {
		row.fails(err)
		return row
	}
	full[0] /= dense // numbers are of the air at the start
	row.reason = fmt.Sprintf("Here they start at %s instead of %s.", humidity(of.parcel.Humidity), humidity(drier))
	row.change = change(m.full, full)
	return row
}

// lowered is the temperature and the pressure (K, Pa) of the parcel where it had that
// humidity before it rose: potential temperature and mixing ratio are kept.
func lowered(p ascent.Parcel, humidity float64) (T, pressure float64) {
	const ratio = 1005 / 287.05 // heat capacity of dry air over its gas constant
	pressureAt := func(T float64) float64 { return p.Pressure * math.Pow(T/p.Temperature, ratio) }
	low, high := p.Temperature, p.Temperature+20
	for range 60 { // to rounding
		T = (low + high) / 2
		vapour := p.Humidity * atmos.VapourPressure(p.Temperature) * pressureAt(T) / p.Pressure
		if vapour/atmos.VapourPressure(T) > humidity {
			low = T
		} else {
			high = T
		}
	}
	return T, pressureAt(T)
}

// airInputs are the uncertainties of the air, in which the temperature has its own.
func (m *many) airInputs() []ledger.Input {
	const updrafts, pressures = 0.1, 100.
	return []ledger.Input{
		{Quantity: ledger.Updraft, Value: m.asked.Updraft, StandardUncertainty: updrafts * m.asked.Updraft, Source: "common practice: 10 % of a measured updraft"},
		{Quantity: ledger.Pressure, Value: m.asked.Pressure, StandardUncertainty: pressures, Source: "common practice: 1 hPa"},
	}
}

// dropletModel is the ascent as it follows its inputs, with as few bins as slopes
// need; it goes through the answer with all of them.
func (m *many) dropletModel(ctx context.Context, of *ascended) ledger.Model {
	o := of.options
	o.Bins = min(o.Bins, mostSlopeBins)
	cut := of.critical(m.full[1], m.full[0])
	raw := func(x *ledger.Deviation) ledger.Values {
		population, kelvin, err := m.kinds.population(of.population, of.groups, x)
		if err != nil {
			return noChange()
		}
		p := of.parcel
		if p.Population, _, err = of.airOf(population, kelvin, p.Temperature); err != nil {
			return noChange()
		}
		p.Temperature += x[ledger.Temperature]
		p.Pressure += x[ledger.Pressure]
		p.Updraft += x[ledger.Updraft]
		given := m.keepsTension(of.parcel.Temperature, p.Temperature)
		by := sizeFactor(m.asked, cut, x)
		for i := range p.Population {
			g := &p.Population[i]
			var ok bool
			if g.Sizes, ok = spectrum.Scaled(g.Sizes, by); !ok {
				return noChange()
			}
			g.From, g.To = g.From*by, g.To*by
			g.Share *= 1 + x[ledger.Numbers]
			g.TensionFactor *= given
		}
		v, err := of.run(ctx, p, o)
		if err != nil {
			return noChange()
		}
		return v
	}
	scale := noChange()
	for i, y := range raw(&ledger.Deviation{}) {
		scale[i] = m.full[i] / y
	}
	return func(x *ledger.Deviation) ledger.Values {
		y := raw(x)
		for i := range y {
			y[i] *= scale[i]
		}
		return y
	}
}

// keepsTension is the factor by which a tension that was given does not follow that
// of water from one temperature to another (K).
func (m *many) keepsTension(from, to float64) float64 {
	if m.asked.SurfaceTension.Word != "" {
		return 1
	}
	return atmos.SurfaceTension(from) / atmos.SurfaceTension(to)
}
