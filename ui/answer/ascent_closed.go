package answer

import (
	"context"
	"math"
	"reflect"
	"slices"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/ascent"
	"dropcrest/ui/scenario"
)

// closedForm is what one closed form says.
type closedForm struct {
	ascent.ClosedForm
	none error // why it says nothing
}

var closedMethods = []ascent.Method{ascent.Twomey1959, ascent.AbdulRazzakGhan00, ascent.FountoukisNenes05}

// methodName names a closed form in running text.
func methodName(m ascent.Method) string {
	switch m {
	case ascent.Twomey1959:
		return "Twomey 1959"
	case ascent.AbdulRazzakGhan00:
		return "Abdul-Razzak & Ghan 2000"
	}
	return "Fountoukis & Nenes 2005"
}

// closedForms are those at the updraft of the parcel.
func (of *rising) closedForms(p ascent.Parcel, o ascent.Options) []closedForm {
	var out []closedForm
	p.Population = of.lognorm
	for _, m := range closedMethods {
		f := closedForm{none: of.noForms}
		if f.none == nil {
			f.ClosedForm, f.none = ascent.Closed(m, p, o)
		}
		f.Method = m
		out = append(out, f)
	}
	return out
}

// fittedModes is how many modes stand for measured sizes in closed forms.
const fittedModes = 2

// findModes puts lognormal modes in the place of measured bins.
func (of *rising) findModes(env Env) {
	if of.bins == nil {
		of.lognorm = of.air
		return
	}
	modes, err := env.modesOf(of.bins)
	if err != nil {
		of.noForms = err
		return
	}
	of.lognorm = slices.Clone(of.air)
	for i := range of.lognorm {
		of.lognorm[i].Sizes = modes
	}
	of.notes = append(of.notes, atmos.Note{Code: "closed-forms-of-fitted-modes", Input: "population",
		Text: "The closed forms take two lognormal modes that are fitted to the measured sizes; the ascent takes the sizes as they are."})
}

// modesOf fits modes to bins, kept from before if possible.
func (env Env) modesOf(b *aerosol.Bins) (aerosol.Modes, error) {
	if env.Kept != nil {
		if modes, ok := env.Kept.rising.modesOf(env.Kept, b); ok {
			return modes, nil
		}
	}
	f, err := aerosol.FitModes(b, fittedModes, nil)
	if err != nil {
		f, err = aerosol.FitModes(b, 1, nil)
	}
	if err == nil && env.Kept != nil {
		env.Kept.mu.Lock()
		env.Kept.rising.bins, env.Kept.rising.modes = b, f.Modes
		env.Kept.mu.Unlock()
	}
	return f.Modes, err
}

// keptAscent is what the last ascents have in common with the next one.
type keptAscent struct {
	bins  *aerosol.Bins // that modes are fitted to
	modes aerosol.Modes

	of    scenario.Scenario // without what the curve does not depend on
	curve []curvePoint      // over updrafts; nil: none
}

func (k *keptAscent) modesOf(in *Kept, b *aerosol.Bins) (aerosol.Modes, bool) {
	in.mu.Lock()
	defer in.mu.Unlock()
	return k.modes, k.bins == b && k.modes != nil
}

// curvePoint is the number of droplets at an updraft, 1/m³ of the air at the start.
type curvePoint struct {
	updraft, droplets, peak float64
	fault                   string // why there is none
	forms                   []float64
}

// Updrafts of the curve: weak stratus to deep convection (common practice).
const (
	weakestUpdraft   = 0.03
	strongestUpdraft = 10
	curveUpdrafts    = 13
)

// curveOf is the number of droplets over updrafts. It does not depend on the
// updraft that is asked for, so that it is kept while that changes.
func (env Env) curveOf(ctx context.Context, s scenario.Scenario, of *rising, p ascent.Parcel) ([]curvePoint, error) {
	key := withoutUpdraft(s)
	if env.Kept != nil {
		env.Kept.mu.Lock()
		kept := env.Kept.rising
		env.Kept.mu.Unlock()
		if kept.curve != nil && reflect.DeepEqual(kept.of, key) {
			return kept.curve, nil
		}
	}
	o := quick(ascentOptions(s))
	sweep := ascent.Sweep{X: ascent.Axis{Key: "updraft", Values: spaced(weakestUpdraft, strongestUpdraft, curveUpdrafts)},
		Y: ascent.Axis{Key: "number", Values: []float64{1}}}
	err := sweep.Run(ctx, max(1, env.Workers), func(w, _ float64) (ascent.Parcel, ascent.Options, error) {
		q := p
		q.Updraft = w
		return q, o, nil
	}, func(done, n int) error {
		env.tell(0.6 + 0.3*float64(done)/float64(n))
		return nil
	})
	if err != nil {
		return nil, err
	}
	var out []curvePoint
	for i, w := range sweep.X.Values {
		c, _ := sweep.At(i, 0)
		q := p
		q.Updraft = w
		point := curvePoint{updraft: w, droplets: c.Droplets, peak: c.Peak, fault: c.Fault}
		if c.Fault != "" {
			point.droplets, point.peak = math.NaN(), math.NaN()
		}
		for _, f := range of.closedForms(q, o) {
			n := f.Droplets
			if f.none != nil {
				n = math.NaN()
			}
			point.forms = append(point.forms, n)
		}
		out = append(out, point)
	}
	if env.Kept != nil {
		env.Kept.mu.Lock()
		env.Kept.rising.of, env.Kept.rising.curve = key, out
		env.Kept.mu.Unlock()
	}
	return out, nil
}

// withoutUpdraft blanks what the curve over updrafts does not depend on. All that is
// not named here counts, so that a new quantity is not forgotten.
func withoutUpdraft(s scenario.Scenario) scenario.Scenario {
	s = s.Clone()
	s.Updraft, s.UpdraftSpread, s.UpdraftWeighting, s.Height, s.Follow, s.Sweep, s.Cases = 0, 0, "", 0, nil, "", ""
	s.DryDiameter, s.RelativeHumidity, s.Supersaturations = 0, 0, nil
	return s
}

// withoutAscent blanks all that only an ascent depends on.
func withoutAscent(s scenario.Scenario) scenario.Scenario {
	s.Updraft, s.UpdraftSpread, s.UpdraftWeighting, s.Height, s.Follow, s.Sweep, s.Cases = 0, 0, "", 0, nil, "", ""
	s.Pressure, s.StartHumidity, s.MassAccommodation, s.ThermalAccommodation = 0, 0, 0, 0
	s.Transition, s.MoistHeat, s.AscentBins, s.Tolerance = "", "", 0, 0
	return s
}
