package answer

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"time"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// activated is one population, how many of its particles activate, and what was
// counted of them: all that is known before it is put into words, lines and tables.
type activated struct {
	asked      scenario.Scenario
	population spectrum.Population
	sizes      spectrum.Sizes // of all groups; nil: nothing was sized
	bins       *aerosol.Bins  // sizes where they were measured
	groups     []composed     // of the population, one a group
	isAlike    bool           // all groups have the same composition
	noSizes    string         // why there is nothing to predict from

	vary func(scenario.Scenario) (*activated, error) // the same sizes with particles mixed in another way; nil: not known

	kappaFrom  string // what κ follows from, in words; "" where the question gives it
	start, end time.Time
	number     int // of the record, 0: no data
	records    int
	mapping    []string    // what the columns of the data hold, as it was understood
	rows       *recordRows // of all records; nil: of one record

	times  *timeline   // closure over time; nil: of one record
	mean   figure.Line // of the predictions of all records
	meanAt []float64   // its supersaturations

	predicted []prediction // at the supersaturations that were asked for
	measured  []measurement
	closures  spectrum.Closures
	fits      []fitted
	modes     *aerosol.ModeFit // of measured sizes; nil: not fitted
	rejected  rejections
	notes     []atmos.Note
}

// prediction is how many particles activate at a supersaturation (a fraction).
type prediction struct {
	s, count float64
	critical float64 // m, dry diameter; NaN: there is none
}

// ofModes is the population of lognormal modes.
func ofModes(env Env, s scenario.Scenario) (*activated, error) {
	a := &activated{asked: s, isAlike: true}
	all := make(aerosol.Modes, len(s.Modes))
	var common *composed
	for i, m := range s.Modes {
		all[i] = aerosol.Mode{Concentration: m.Number, Median: m.Median, GSD: m.GSD}
		if err := all[i].Check(); err != nil {
			return nil, &InputError{"mode", fmt.Sprintf("mode %d: %s", i+1, reason(err))}
		}
		group, err := env.composeMode(s, m, &common)
		if err != nil {
			return nil, modeError(i, err)
		}
		a.add(all[i], group)
	}
	a.sizes = all
	isStandard := func(m scenario.Mode) bool { return m.Air == "stp" }
	if n := len(slices.DeleteFunc(slices.Clone(s.Modes), isStandard)); n > 0 && n < len(s.Modes) {
		a.notes = append(a.notes, atmos.Note{Code: "modes-of-several-airs", Input: "mode",
			Text: "Some modes give their number in standard air and some do not: counts of both are added as they are."})
	}
	return a, nil
}

// composeMode makes the composition of a mode: its own, or that of the question.
func (env Env) composeMode(s scenario.Scenario, m scenario.Mode, common **composed) (composed, error) {
	switch c := m.Matter; {
	case !needsModel(m):
		return env.composeKappa(s, c.Kappa.Number)
	case hasOwnMatter(m):
		s.Components = []scenario.Component{c}
		if s.Kappa.Word == "" {
			s.Kappa = scenario.Measure{Word: "catalogue"} // the mode's own counts
		}
		return env.composeOne(s)
	}
	if *common == nil {
		made, err := env.compose(s)
		if err != nil {
			return made, err
		}
		*common = &made
	}
	return **common, nil
}

// modeError says which mode cannot be made.
func modeError(i int, err error) error {
	var in *InputError
	if errors.As(err, &in) {
		return &InputError{in.Input, fmt.Sprintf("mode %d: %s", i+1, in.Text)}
	}
	return err
}

// ofBins is the population of measured bins, with the notes on how they were read.
func ofBins(env Env, s scenario.Scenario, bins *aerosol.Bins, notes []atmos.Note) (*activated, error) {
	of, err := env.compose(s)
	if err != nil {
		return nil, err
	}
	a := &activated{asked: s, isAlike: true, sizes: bins, bins: bins}
	a.add(bins, of)
	a.notes = distinct(append(a.notes, notes...))
	return a, nil
}

func (a *activated) add(sizes spectrum.Sizes, of composed) {
	if len(a.groups) > 0 && !sameComposition(a.groups[0].of, of.of) {
		a.isAlike = false
	}
	a.population = append(a.population, spectrum.Group{Sizes: sizes, Share: 1, Of: of.of})
	a.groups = append(a.groups, of)
	a.notes = distinct(append(a.notes, of.notes...))
}

// sameComposition compares what can be compared: an external mixture is the same
// only as itself, which is what modes of the question's composition have.
func sameComposition(a, b spectrum.Composition) bool {
	x, isExternal := a.(spectrum.External)
	y, both := b.(spectrum.External)
	if isExternal || both {
		return isExternal && both && len(x) == len(y) && &x[0] == &y[0]
	}
	return a == b
}

// counts are the numbers that activate at each s, NaN where nothing was sized.
func (a *activated) counts(s []float64) ([]float64, error) {
	if a.sizes == nil {
		out := make([]float64, len(s))
		for i := range out {
			out[i] = math.NaN()
		}
		return out, nil
	}
	n, err := a.population.Counts(make([]float64, 0, len(s)), s)
	if err != nil {
		return nil, &InputError{"component", reason(err)}
	}
	return n, nil
}

// predict counts at the supersaturations that were asked for and at the measured ones.
func (a *activated) predict() error {
	asked := slices.Compact(slices.Sorted(slices.Values(a.asked.Supersaturations)))
	n, err := a.counts(asked)
	if err != nil {
		return err
	}
	for i, s := range asked {
		a.predicted = append(a.predicted, prediction{s, n[i], a.critical(s, n[i])})
	}
	a.interpolate()
	levels := make([]float64, len(a.measured))
	for i, m := range a.measured {
		levels[i] = m.s
	}
	if n, err = a.counts(levels); err != nil {
		return err
	}
	for i := range a.measured {
		m := &a.measured[i]
		m.predicted, m.critical = n[i], a.critical(m.s, n[i])
		m.kappa, m.noKappa = a.kappaOf(*m)
		if !m.isBetween {
			a.closures.Add(m.s, m.predicted, m.count)
		}
	}
	return nil
}

var errNotSized = errors.New("no sizes were measured")

// kappaOf is the κ that a count implies.
func (a *activated) kappaOf(m measurement) (spectrum.CountKappa, error) {
	if a.bins == nil {
		return spectrum.CountKappa{}, errNotSized
	}
	return spectrum.KappaOfCount(a.bins, m.count, m.s, a.kelvin())
}

func (a *activated) kelvin() float64 {
	if len(a.groups) > 0 {
		return a.groups[0].kelvin
	}
	return koehler.KelvinLength(atmos.SurfaceTension(a.asked.Temperature), a.asked.Temperature)
}

// critical is the dry diameter (m) from which on particles activate at s. Where
// that differs among particles of one size or among groups it is the diameter
// above which there are as many particles as activate.
func (a *activated) critical(s, count float64) float64 {
	if a.sizes == nil {
		return math.NaN()
	}
	if a.isAlike && a.groups[0].isOne {
		if d, err := a.groups[0].of.Critical(s); err == nil && d > 0 && !math.IsInf(d, 1) {
			return d
		}
		return math.NaN()
	}
	return widestAbove(a.sizes, count)
}

// widestAbove is the diameter (m) above which there are count particles: by
// bisection in ln D from 0.1 nm to 1 mm; NaN where there is none.
func widestAbove(sizes spectrum.Sizes, count float64) float64 {
	lo, hi := math.Log(1e-10), math.Log(1e-3)
	if !(count > 0 && count < sizes.Number()) {
		return math.NaN()
	}
	for range 60 { // to rounding
		if middle := (lo + hi) / 2; sizes.Above(math.Exp(middle)) > count {
			lo = middle
		} else {
			hi = middle
		}
	}
	return math.Exp((lo + hi) / 2)
}

// kappa is that of all particles, NaN where it is no one number.
func (a *activated) kappa() float64 {
	if len(a.groups) == 0 || !a.isAlike {
		return math.NaN()
	}
	return a.groups[0].kappa
}
