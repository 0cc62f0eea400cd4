package answer

import (
	"context"
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/ascent"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// rising is a population that can rise. Numbers are in a m³ of the air at the start.
type rising struct {
	*activated
	air     []ascent.Group // as the ascent takes them
	partOf  []int          // of which group of the population each is
	lognorm []ascent.Group // the same in lognormal modes; nil: there are none
	noForms error          // why
	scale   float64        // of numbers, to the air at the start
}

// rising makes the population of a scenario, at the air of its start.
func (env Env) rising(ctx context.Context, s scenario.Scenario) (*rising, error) {
	if s.Updraft == 0 && s.UpdraftSpread == 0 {
		return nil, &InputError{Input: "updraft", Text: "air with an updraft of 0 does not rise: want more than 0 m/s, or a spread of updrafts"}
	}
	start := aerosol.Air{Temperature: s.Temperature, Pressure: s.Pressure}
	scale := aerosol.StandardAir().To(start) // measured numbers are of standard air
	var a *activated
	var err error
	switch s.Population {
	case "modes":
		scale = 1
		a, err = ofModes(env, atStart(s, start))
	case "bins":
		a, err = env.risingBins(ctx, s)
	default:
		a, err = env.risingRecord(ctx, s)
	}
	if err != nil {
		return nil, err
	}
	if a.sizes == nil {
		return nil, &InputError{Input: "data", Text: "nothing can rise: " + a.noSizes}
	}
	of := &rising{activated: a, scale: scale}
	kelvin := make([]float64, len(a.groups))
	for i, g := range a.groups {
		kelvin[i] = g.kelvin
	}
	if of.air, of.partOf, err = of.airOf(a.population, kelvin, s.Temperature); err != nil {
		return nil, of.cannotRise(err)
	}
	of.findModes(env)
	return of, nil
}

// airOf is a population as an ascent takes it, with the Kelvin length of each group at
// the temperature T (K).
func (of *rising) airOf(p spectrum.Population, kelvin []float64, T float64) (air []ascent.Group, partOf []int, err error) {
	if air, partOf, err = ascent.FromSpectrum(unheld(p)); err != nil {
		return nil, nil, err
	}
	for i := range air {
		g := &air[i]
		if g.Share == 0 {
			g.Share = 1
		}
		g.Share *= of.scale
		g.TensionFactor = tensionFactor(kelvin[partOf[i]], T)
	}
	return air, partOf, nil
}

// atStart brings numbers of standard air to that of the start.
func atStart(s scenario.Scenario, start aerosol.Air) scenario.Scenario {
	s = s.Clone()
	for i := range s.Modes {
		if m := &s.Modes[i]; m.Air == "stp" {
			m.Number *= aerosol.StandardAir().To(start)
			m.Air = "start"
		}
	}
	return s
}

// tensionFactor is the surface tension behind a Kelvin length over that of water.
func tensionFactor(kelvin, T float64) float64 {
	f := kelvin / koehler.KelvinLength(atmos.SurfaceTension(T), T)
	const rounding = 1e-12
	if math.Abs(f-1) < rounding || !(f > 0) {
		return 1
	}
	return f
}

func (env Env) risingBins(ctx context.Context, s scenario.Scenario) (*activated, error) {
	bins, notes, err := oneBins(ctx, env, s)
	if err != nil {
		return nil, err
	}
	return ofBins(env, s, bins, notes)
}

func (env Env) risingRecord(ctx context.Context, s scenario.Scenario) (*activated, error) {
	if s.Record.Is("all") {
		return nil, &InputError{Input: "record", Text: "one record rises at a time: give its number; several ascents are for a file of cases"}
	}
	o, facts, err := oneRecord(ctx, env, s, int(s.Record.Number))
	if err != nil {
		return nil, err
	}
	c, err := newComposer(env, s)
	if err != nil {
		return nil, err
	}
	a, err := c.ofRecord(&o)
	if err != nil {
		return nil, err
	}
	a.records = facts.records
	return a, nil
}

// cannotRise says why a population has no counterpart that grows.
func (of *rising) cannotRise(err error) error {
	var g *ascent.GroupError
	if errors.As(err, &g) {
		if _, spread := of.population[g.Group].Of.(spreadMatter); spread {
			return &InputError{Input: "kappa-spread", Text: "a spread of kappa rises with water activity by kappa only: want water-activity kappa, or a kappa-spread of 1"}
		}
		return &InputError{Input: "component", Text: of.groupName(g.Group) + ": " + reason(g.Err)}
	}
	return err
}

// reasonOf says why a group cannot rise, and what would be right where that is known.
func (of *rising) reasonOf(g *ascent.GroupError) string {
	text := strings.TrimPrefix(reason(g.Err), ascent.ErrInput.Error()+": ")
	if m := of.air[g.Group].Matter; m != nil {
		if _, limited := m.Solution.(*solutes.Limited); limited {
			text += ": want solubility complete"
		}
	}
	return text
}

// input is the key of what the particles are of.
func (of *rising) input() string {
	if of.asked.Population == "modes" {
		return "mode"
	}
	return "component"
}

// groupName names a group of the ascent, in words.
func (of *rising) groupName(i int) string {
	if of.asked.Population != "modes" || i >= len(of.partOf) {
		return "the particles"
	}
	return fmt.Sprintf("mode %d", of.partOf[i]+1)
}

// parcel is the air that rises.
func (of *rising) parcel(s scenario.Scenario) ascent.Parcel {
	return ascent.Parcel{Temperature: s.Temperature, Pressure: s.Pressure, Humidity: s.StartHumidity, Updraft: s.Updraft, Population: of.air}
}

func ascentOptions(s scenario.Scenario) ascent.Options {
	o := ascent.Options{Bins: s.AscentBins, Tolerance: s.Tolerance, MassAccommodation: s.MassAccommodation,
		ThermalAccommodation: s.ThermalAccommodation, MoistHeat: s.MoistHeat == "on", Height: s.Height}
	switch s.Transition {
	case "flux-matching":
		o.Transition = ascent.FluxMatching
	case "continuum":
		o.Transition = ascent.Continuum
	}
	return o
}

func updraftsOf(s scenario.Scenario) ascent.Updrafts {
	return ascent.Updrafts{Mean: s.Updraft, Spread: s.UpdraftSpread, ByFlux: s.UpdraftWeighting == "flux"}
}

// tracers put each size into the group that has most particles of it. Sizes that no
// particles have that take up water are left out.
func (of *rising) tracers(sizes []float64) []ascent.Tracer {
	var out []ascent.Tracer
	for _, d := range sizes {
		best, most := -1, 0.0
		for i, g := range of.air {
			takesUp := g.Kappa > 0 || g.KappaBySize != nil || g.Matter != nil
			if n := g.Share * g.Sizes.Density(d); takesUp && n > most {
				best, most = i, n
			}
		}
		if best >= 0 {
			out = append(out, ascent.Tracer{Group: best, DryDiameter: d})
		}
	}
	return out
}

// unheld is a population of the matter itself, whose curve an ascent follows.
func unheld(p spectrum.Population) spectrum.Population {
	out := slices.Clone(p)
	for i := range out {
		out[i].Of = unheldOf(out[i].Of)
	}
	return out
}

func unheldOf(c spectrum.Composition) spectrum.Composition {
	switch c := c.(type) {
	case *held:
		return c.of
	case spectrum.External:
		parts := slices.Clone(c)
		for i := range parts {
			parts[i].Of = unheldOf(parts[i].Of)
		}
		return parts
	}
	return c
}
