package answer

import (
	"context"
	"errors"
	"fmt"

	"dropcrest/atmos"
	"dropcrest/koehler/ascent"
	"dropcrest/ui/scenario"
)

func ascentQuestion() Question {
	return Question{
		Key:       "ascent",
		Title:     "Ascent",
		Says:      "How many droplets form when this air rises at this speed, and at which peak supersaturation?",
		Groups:    ascentGroups,
		Live:      ascentIsLive,
		Frame:     ascentFrame,
		Statement: ascentStatement,
		Ask:       askAscent,
	}
}

// ascentGroups are the inputs of the Ascent question: the particles are those of
// the Spectrum question. The bins of the integration are called otherwise on the
// screen, where bins are those of a file.
var ascentGroups = []Group{
	{"The ascent", []string{"updraft", "updraft-spread", "updraft-weighting", "temperature", "pressure", "start-humidity", "height"}},
	{"The population", []string{"population", "mode", "bins-file=bins", "data", "map", "record", "every", "average"}},
	{"The particles", []string{"component", "shares-by", "composition", "mixing", "kappa-spread", "adsorption"}},
	curveGroups[1],
	{"Growth", []string{"mass-accommodation", "thermal-accommodation", "transition", "moist-heat", "bins=ascent-bins", "refinement", "tolerance"}},
	{"Picture", []string{"follow"}},
	{"Several ascents", []string{"sweep", "cases", "part"}},
}

// risen is an ascent with all that stands beside it, before it is put into words,
// lines and tables.
type risen struct {
	refined *ascent.Refinement // nil: not asked for
	asked   scenario.Scenario
	of      *rising
	parcel  ascent.Parcel
	ascent.Result
	follow []ascent.Tracer

	forms    []closedForm
	curve    []curvePoint
	ofSpread *ascent.MeanDroplets // nil: one updraft
	answers  *ascent.Sensitivity  // nil: not known
	noAnswer error                // why
	sweep    *swept               // nil: none
	notes    []atmos.Note
}

func askAscent(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	if s.Cases != "" {
		part, err := readPart(s.Part)
		if err != nil {
			return Answer{}, err
		}
		return AscentCases(ctx, env, s, part)
	}
	if s.Sweep != "" && env.Kept == nil {
		env.Kept = &Kept{} // cells share their matter and their data
	}
	alone := env
	if s.Sweep != "" {
		alone.Progress = nil // that of the sweep is told
	}
	r, err := alone.rise(ctx, s)
	if err != nil {
		return Answer{}, err
	}
	if s.Sweep != "" {
		if r.sweep, err = env.sweep(ctx, s, r.of); err != nil {
			return Answer{}, err
		}
		r.notes = distinct(append(r.notes, r.sweep.notes()...))
	}
	return r.answer(), nil
}

// rise lets the air of a scenario rise, and looks at what stands beside it.
func (env Env) rise(ctx context.Context, s scenario.Scenario) (*risen, error) {
	of, err := env.rising(ctx, s)
	if err != nil {
		return nil, err
	}
	r := &risen{asked: s, of: of, parcel: of.parcel(s)}
	o := ascentOptions(s)
	workers := max(1, env.Workers)
	if s.UpdraftSpread > 0 {
		mean, err := updraftsOf(s).Droplets(ctx, workers, r.parcel, o)
		if err != nil {
			return nil, of.problem(err)
		}
		r.ofSpread = &mean
		r.parcel.Updraft = shownUpdraft(mean)
	}
	if err := r.run(ctx, env, o); err != nil {
		return nil, of.problem(err)
	}
	r.forms = of.closedForms(r.parcel, o)
	if r.curve, err = env.curveOf(ctx, s, of, r.parcel); err != nil {
		return nil, of.problem(err)
	}
	if err := r.sensitivities(ctx, workers, o); err != nil {
		return nil, of.problem(err)
	}
	if s.Refinement == "on" {
		refined, err := ascent.Refine(ctx, r.parcel, o)
		if err != nil {
			return nil, of.problem(err)
		}
		r.refined = &refined
		r.notes = append(r.notes, atmos.Note{Code: "discretisation", Input: "ascent-bins", Text: fmt.Sprintf(
			"With endless bins the peak would lie %s and the droplets %s from these, as two numbers of bins tell.",
			finePercent(refined.PeakError), finePercent(refined.DropletsError))})
	}
	env.tell(1)
	r.notes = distinct(append(append(r.notes, of.notes...), r.Result.Notes...))
	return r, nil
}

// shownUpdraft is the updraft of a distribution that is looked at closely: the one
// with the mean number of droplets.
func shownUpdraft(m ascent.MeanDroplets) float64 {
	if m.Characteristic > 0 {
		return m.Characteristic
	}
	return m.MeanUpdraft
}

// profileRows are as many heights as make a smooth line.
const profileRows = 151

// run makes the ascent that is looked at closely.
func (r *risen) run(ctx context.Context, env Env, o ascent.Options) error {
	r.follow = r.of.tracers(r.asked.Follow)
	if len(r.follow) < len(r.asked.Follow) {
		r.notes = append(r.notes, atmos.Note{Code: "follow-outside", Input: "follow",
			Text: "Dry sizes at which there are no particles that take up water are not followed."})
	}
	o.ProfileRows, o.Follow = profileRows, r.follow
	o.Progress = func(height, last float64) { env.tell(0.6 * height / last) }
	var err error
	r.Result, err = ascent.Run(ctx, r.parcel, o)
	return err
}

// progressSteps are the steps in which the progress of one ascent is told.
const progressSteps = 1000

// tell tells the share that is done of a single ascent.
func (env Env) tell(share float64) {
	if env.Progress != nil {
		env.Progress(int64(share*progressSteps), progressSteps)
	}
}

// mostQuickBins are as many bins as make side results good to 1e-3 (the convergence
// table of DEVELOPERS.md): the curve over updrafts, and sensitivities.
const mostQuickBins = 40

func quick(o ascent.Options) ascent.Options {
	o.Bins = min(o.Bins, mostQuickBins)
	o.Height = 0 // as far as the peak takes
	return o
}

// Slopes need fewer bins, as the errors of two ascents are much the same, and a
// tolerance below the change that is looked at, some 5 %: both are checked by
// TestQuickSensitivities.
const (
	mostSlopeBins  = 24
	slopeTolerance = 1e-5
)

// sensitivities are of the number of droplets; where there are none it is no error.
func (r *risen) sensitivities(ctx context.Context, workers int, o ascent.Options) error {
	o = quick(o)
	o.Bins = min(o.Bins, mostSlopeBins)
	o.Tolerance = slopeTolerance
	if !r.HasPeak || !(r.Droplets > 0) {
		return nil
	}
	s, err := ascent.Sensitivities(ctx, workers, r.parcel, o)
	if ctx.Err() != nil {
		return err
	}
	if r.noAnswer = err; err == nil {
		r.answers = &s
	}
	return nil
}

func (r *risen) answer() Answer {
	pictures := r.figures()
	for i := range pictures {
		for _, n := range r.notes {
			pictures[i].Notes = append(pictures[i].Notes, n.Text)
		}
	}
	a := Answer{Finding: r.finding(), Why: r.why(), Facts: r.facts(), Figures: pictures, Tables: r.tables(), Notes: r.notes,
		Record: r.of.number, Records: r.of.records}
	if f := r.facts().Sweep; f != nil {
		const width, rows = 78, 24
		a.Account = f.Map(width, rows, false)
	}
	return a
}

// problem names the input that an ascent fails by.
func (of *rising) problem(err error) error {
	var group *ascent.GroupError
	var input *ascent.InputError
	var stopped *ascent.StoppedError
	switch {
	case errors.Is(err, context.Canceled), errors.Is(err, context.DeadlineExceeded):
		return err
	case errors.As(err, &group):
		return &InputError{Input: of.input(), Text: of.groupName(group.Group) + ": " + of.reasonOf(group)}
	case errors.As(err, &stopped):
		return &InputError{Input: "height", Text: "the " + reason(err)}
	case errors.As(err, &input):
		return &InputError{Input: "updraft", Text: reason(err)}
	}
	return err
}

// finePercent is a small relative number in per cent.
func finePercent(x float64) string { return digits(100*x, 2) + " %" }
