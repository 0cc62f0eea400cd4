package answer

import (
	"context"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/kappa"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

func kappaQuestion() Question {
	return Question{
		Key:       "kappa",
		Title:     "Kappa",
		Says:      "Which hygroscopicity do these measurements imply, and how sure is it?",
		Groups:    kappaGroups,
		Live:      kappaIsLive,
		Given:     KappaGiven,
		Follow:    kappaFollows,
		Statement: kappaStatement,
		Ask:       askKappa,
	}
}

// kappaGroups are the inputs of the Kappa question. The options of a measurement
// set the first one.
var kappaGroups = []Group{
	{"The measurements", []string{"dry-diameter=point[0].dry-diameter", "supersaturation=point[0].supersaturation",
		"growth-factor=point[0].growth-factor", "relative-humidity=point[0].relative-humidity", "point", "points=points-file", "growth-factors"}},
	{"The dry particles", []string{"dry-size-is", "shape-factor"}},
	{"The water", []string{"temperature", "surface-tension"}},
	{"The uncertainty", []string{"temperature-uncertainty", "surface-tension-uncertainty", "shape-factor-uncertainty", "trials", "seed", "coverage"}},
	{"A published kappa", []string{"published-kappa", "published-temperature", "published-surface-tension"}},
}

// liveTrials are made in about 40 ms: as many as one point has by default.
const liveTrials = 100000

// kappaIsLive: a file is read, and more trials are made, beside the keys.
func kappaIsLive(s scenario.Scenario) bool {
	return s.PointsFile == "" && mostTrials(s)*len(s.Measurements) <= liveTrials
}

// adaptiveTrials are the most that are made when the figures themselves say how many
// are needed.
const adaptiveTrials = 1000000

// mostTrials is how many trials a point may have.
func mostTrials(s scenario.Scenario) int {
	if s.Trials.Is("adaptive") {
		return adaptiveTrials
	}
	return int(s.Trials.Number)
}

func drawsTrials(s scenario.Scenario) bool { return mostTrials(s) > 0 }

// implied is what measurements say about κ before it is put into words, lines and
// tables. Measurements of growth and of activation are evaluated apart.
type implied struct {
	asked  scenario.Scenario
	points []kappaPoint
	means  []kindMean    // at most one of activation and one of growth
	spread *growthSpread // of κ between particles, by their growth factors; nil: none was measured
	notes  []atmos.Note
}

// kappaPoint is one point, as it was given and with what it says.
type kappaPoint struct {
	scenario.Point
	name     string
	water    kappa.Convention
	measured kappa.Point
	kappa.Estimate
	withoutKelvin float64           // of a growth factor, the Kelvin term left out; NaN: none
	spread        *kappa.Population // of κ between particles; nil: no activation curve was measured
}

// kindMean is what all measurements of one kind say together.
type kindMean struct {
	isGrowth bool
	count    int // of those that have a κ
	mean     *kappa.Mean
	err      error   // why there is none
	classic  float64 // with the weights of the mean
	at25C    float64
	parts    []contribution
}

func askKappa(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	k, err := newImplied(env, s)
	if err != nil {
		return Answer{}, err
	}
	stopped := k.evaluate(ctx, env)
	if stopped != nil && ctx.Err() == nil {
		return Answer{}, stopped
	}
	k.judge(stopped != nil)
	picture := k.figure()
	for _, n := range k.notes {
		picture.Notes = append(picture.Notes, n.Text)
	}
	// what there is when the work is stopped comes with the reason
	return Answer{
		Finding: k.finding(),
		Why:     k.why(),
		Facts:   k.facts(),
		Figures: []figure.Figure{picture},
		Tables:  k.tables(),
		Notes:   k.notes,
	}, stopped
}

// evaluate finds κ of all points, those of activation first. The error is that of
// the context, when it has ended, or what no scenario should lead to.
func (k *implied) evaluate(ctx context.Context, env Env) error {
	done := int64(0)
	var stopped error
	for _, isGrowth := range []bool{false, true} {
		var index []int
		var points []kappa.Point
		for i, p := range k.points {
			if (p.measured.Method == kappa.GrowthRate) == isGrowth {
				index, points = append(index, i), append(points, p.measured)
			}
		}
		if len(points) == 0 {
			continue
		}
		// what is not reached in time still gets its linear propagation
		result, err := propagate(ctx, env, points, k.asked, stopped == nil, func(n int64) {
			env.Progress(done+n, int64(len(k.points)*mostTrials(k.asked)))
		})
		if err != nil {
			if ctx.Err() == nil {
				return err
			}
			stopped = err
		}
		done += int64(len(points) * mostTrials(k.asked))
		for i, e := range result.Points {
			k.points[index[i]].Estimate = e
		}
		k.means = append(k.means, newKindMean(isGrowth, result))
	}
	for i := range k.points {
		k.points[i].fill()
	}
	return stopped
}

// propagate is kappa.Propagate, or its linear part alone.
func propagate(ctx context.Context, env Env, points []kappa.Point, s scenario.Scenario, trials bool, progress func(int64)) (kappa.Result, error) {
	if drawsTrials(s) && trials {
		settings := kappa.Settings{Trials: int(s.Trials.Number), MaxTrials: adaptiveTrials, Coverage: s.Coverage, Seed: uint64(s.Seed), Workers: max(env.Workers, 1)}
		if env.Progress != nil {
			settings.Progress = func(n, _ int64) { progress(n) }
		}
		return kappa.Propagate(ctx, points, settings)
	}
	var r kappa.Result
	for _, p := range points {
		e, _ := kappa.Evaluate(p, s.Coverage) // the estimate has the error
		r.Points = append(r.Points, e)
	}
	mean, err := kappa.WeightedMean(r.Points, s.Coverage)
	if r.MeanErr = err; err == nil {
		r.Mean = &mean
	}
	return r, nil
}

// newKindMean is the mean of the points of one kind, with what the library does
// not average.
func newKindMean(isGrowth bool, r kappa.Result) kindMean {
	good := slices.DeleteFunc(slices.Clone(r.Points), func(e kappa.Estimate) bool { return e.Err != nil })
	m := kindMean{isGrowth: isGrowth, count: len(good), mean: r.Mean, err: r.MeanErr}
	if r.Mean == nil {
		return m
	}
	total := 0.0
	for _, e := range good {
		total += weightOf(e)
	}
	for _, e := range good {
		w := weightOf(e) / total
		m.classic += w * e.Classic
		m.at25C += w * e.At25C
	}
	m.parts = sumOfContributions(good, total)
	return m
}

// weightOf is the weight that kappa.WeightedMean gives a point.
func weightOf(e kappa.Estimate) float64 {
	return 1 / (e.Linear.Independent * e.Linear.Independent)
}
