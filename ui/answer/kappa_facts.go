package answer

import (
	"math"

	"dropcrest/koehler/kappa"
)

// KappaFacts is the JSON object of the Kappa question. Scripts rely on its keys.
// At the top stands the κ of one point, or the weighted mean of several of one
// kind; both kinds are never merged, and all of the top is null then.
type KappaFacts struct {
	KappaRow
	Interval95 *[2]Number `json:"kappa_interval_95"` // null when the coverage is another
	Coverage   Number     `json:"coverage_percent"`
	Trials     int        `json:"trials"` // of Monte Carlo, the most that a point has; 0: linear propagation alone
	Adaptive   bool       `json:"adaptive"`
	Stopped    bool       `json:"stopped"`
	Actual     WaterRow   `json:"actual_convention"`
	At25C      WaterRow   `json:"convention_25c"`

	Growth    *GrowthSpreadRow `json:"growth_distribution"` // null unless growth factors were measured as a distribution
	Published *PublishedRow    `json:"published"`           // null unless a kappa is compared with
	Points    []PointRow       `json:"points"`
	Mean      *MeanRow         `json:"mean"`  // null unless there are several points of one kind
	Means     []MeanRow        `json:"means"` // of activation, of growth factors
}

// KappaRow is a κ with its uncertainty: that of Monte Carlo, or linear propagation
// where there are no trials.
type KappaRow struct {
	Kappa         Number            `json:"kappa"`
	Classic       Number            `json:"kappa_classic"` // null of growth factors
	ClassicError  Number            `json:"classic_error_percent"`
	Under25C      Number            `json:"kappa_at_25c_convention"`
	Relative      Number            `json:"relative_standard_uncertainty"` // standard_uncertainty over kappa
	Standard      Number            `json:"standard_uncertainty"`
	Interval      *[2]Number        `json:"kappa_interval"` // of the coverage
	Linear        LinearRow         `json:"linear"`
	MonteCarlo    *MonteCarloRow    `json:"monte_carlo"`
	Contributions []ContributionRow `json:"contributions"`
}

// LinearRow is the law of propagation of uncertainty, JCGM 100.
type LinearRow struct {
	Standard    Number     `json:"standard_uncertainty"`
	Relative    Number     `json:"relative_standard_uncertainty"`
	Independent Number     `json:"independent"`
	Common      Number     `json:"common"`
	Interval    *[2]Number `json:"interval"`
}

// MonteCarloRow is the distribution of κ, JCGM 101.
type MonteCarloRow struct {
	Trials   int        `json:"trials"`
	Mean     Number     `json:"mean"`
	Median   Number     `json:"median"`
	Standard Number     `json:"standard_uncertainty"`
	Relative Number     `json:"relative_standard_uncertainty"` // of kappa
	Interval *[2]Number `json:"interval"`
	Shortest *[2]Number `json:"shortest_interval"`
	Agrees   bool       `json:"linear_agrees"`
	Stable   *bool      `json:"stable"`    // null unless adaptive
	Within   Number     `json:"tolerance"` // of kappa, to which adaptive trials make the figures stable; else null
	Above    int        `json:"trials_beyond_any_kappa"`
	Below    int        `json:"trials_below_zero"`
}

// ContributionRow is what one input contributes, the largest first.
type ContributionRow struct {
	Quantity    string `json:"quantity"`
	Common      bool   `json:"common"` // to all points
	Sensitivity Number `json:"relative_sensitivity"`
	Signed      Number `json:"contribution_to_kappa"`
	Share       Number `json:"share_of_variance"`
}

// WaterRow is the water that a κ is computed with.
type WaterRow struct {
	Temperature Number `json:"temperature_k"`
	Tension     Number `json:"surface_tension_n_per_m"`
}

// PointRow is one measurement and its κ.
type PointRow struct {
	Name            string  `json:"name"`
	Method          string  `json:"method"` // activation | growth factor
	Dry             Number  `json:"dry_diameter_m"`
	Volume          Number  `json:"volume_equivalent_diameter_m"`
	Supersaturation Number  `json:"supersaturation_percent"`
	Growth          Number  `json:"growth_factor"`
	Humidity        Number  `json:"relative_humidity_percent"`
	Problem         *string `json:"problem"` // why there is no κ
	WaterRow
	KappaRow
	WithoutKelvin Number     `json:"kappa_without_kelvin_term"`
	Spread        *SpreadRow `json:"spread"` // null without an activation curve
}

// SpreadRow is what the width and the plateau of an activation curve say about the
// particles: how far κ spreads between them, and how many never activate.
type SpreadRow struct {
	LnKappa    Number     `json:"standard_deviation_of_ln_kappa"` // null without a width
	OneSigma   *[2]Number `json:"kappa_one_standard_deviation"`
	Width      Number     `json:"width_of_kappa_in_ln_d"` // that of the classifier taken out
	Unresolved bool       `json:"unresolved"`             // as narrow as the classifier's
	Inactive   Number     `json:"inactive_share"`         // null for a plateau above 1
}

// MeanRow is the weighted mean of the points of one kind.
type MeanRow struct {
	Method string `json:"method"`
	Points int    `json:"points"`
	KappaRow
	ChiSquare   Number  `json:"chi_square"`
	Freedom     int     `json:"degrees_of_freedom"`
	Probability Number  `json:"chi_square_probability"`
	Problem     *string `json:"problem"` // why there is none
}

func (k *implied) facts() KappaFacts {
	actual := conventionOf(k.asked)
	f := KappaFacts{
		KappaRow: noKappa(), Coverage: percentNumber(k.asked.Coverage), Trials: mostTrials(k.asked), Adaptive: k.asked.Trials.Is("adaptive"),
		Actual: waterRow(actual), At25C: waterRow(kappa.At25C()),
		Points: make([]PointRow, 0, len(k.points)), Means: make([]MeanRow, 0, len(k.means)),
	}
	for i := range k.points {
		m := &k.points[i]
		f.Points = append(f.Points, m.row())
		f.Stopped = f.Stopped || m.wasStopped(drawsTrials(k.asked))
	}
	if f.Adaptive {
		f.Trials = k.mostMade()
	}
	if len(k.points) > 1 {
		for i := range k.means {
			f.Means = append(f.Means, k.means[i].row())
		}
	}
	switch {
	case len(k.points) == 1:
		f.KappaRow = f.Points[0].KappaRow
	case len(k.means) == 1:
		f.Mean = &f.Means[0]
		f.KappaRow = f.Mean.KappaRow
	}
	f.Published, f.Growth = k.publishedRow(), k.spread.row()
	if k.asked.Coverage == 0.95 {
		f.Interval95 = f.Interval
	}
	return f
}

func waterRow(c kappa.Convention) WaterRow {
	return WaterRow{Number(c.Temperature), Number(c.SurfaceTension())}
}

// noKappa is the row of what has none.
func noKappa() KappaRow {
	gap := Number(math.NaN())
	return KappaRow{gap, gap, gap, gap, gap, gap, nil, LinearRow{gap, gap, gap, gap, nil}, nil, []ContributionRow{}}
}

// wasStopped reports whether the work ended before all trials of the point.
func (m *kappaPoint) wasStopped(draws bool) bool {
	if !draws || m.Err != nil || len(m.Linear.Contributions) == 0 {
		return false
	}
	return m.MonteCarlo == nil || m.MonteCarlo.Stopped
}

func (m *kappaPoint) row() PointRow {
	gap := Number(math.NaN())
	r := PointRow{Name: m.name, Method: m.measured.Method.String(), Dry: Number(m.Dry.Value), Volume: Number(m.volumeDiameter()),
		Supersaturation: gap, Growth: gap, Humidity: gap, WaterRow: waterRow(m.water), KappaRow: noKappa(), WithoutKelvin: Number(m.withoutKelvin)}
	if m.isGrowth() {
		r.Growth, r.Humidity = Number(m.Growth.Value), percentNumber(m.Humidity.Value)
	} else {
		r.Supersaturation = percentNumber(m.Supersaturation.Value)
	}
	if m.Err != nil {
		problem := m.problem()
		r.Problem = &problem
		return r
	}
	r.Spread = m.spreadRow()
	r.KappaRow = kappaRow(m.Value, m.At25C, m.Linear, m.MonteCarlo, contributionsOf(m.Estimate))
	return r
}

func (m *kappaPoint) spreadRow() *SpreadRow {
	p := m.spread
	if p == nil {
		return nil
	}
	r := &SpreadRow{Number(math.NaN()), nil, Number(math.NaN()), m.Width > 0 && p.Unresolved, Number(p.Insoluble)}
	if p.Insoluble < 0 { // an efficiency that was not corrected
		r.Inactive = Number(math.NaN())
	}
	if m.Width > 0 {
		r.LnKappa, r.Width, r.OneSigma = Number(p.Spread), Number(p.WidthOfKappa), &[2]Number{Number(p.Low), Number(p.High)}
	}
	return r
}

func (m *kindMean) row() MeanRow {
	r := MeanRow{Method: m.method(), Points: m.count, KappaRow: noKappa(), ChiSquare: Number(math.NaN()), Probability: Number(math.NaN())}
	if m.mean == nil {
		problem := m.err.Error()
		r.Problem = &problem
		return r
	}
	x := m.mean
	linear := kappa.Linear{StandardUncertainty: x.StandardUncertainty, Independent: x.Independent, Systematic: x.Systematic, Interval: x.Interval}
	r.KappaRow = kappaRow(kappa.Value{Kappa: x.Kappa, Classic: m.classic}, m.at25C, linear, x.MonteCarlo, m.parts)
	r.ChiSquare, r.Freedom, r.Probability = Number(x.ChiSquare), x.Freedom, Number(x.Probability)
	return r
}

func (m *kindMean) method() string {
	if m.isGrowth {
		return kappa.GrowthRate.String()
	}
	return kappa.Activation.String()
}

func kappaRow(v kappa.Value, at25C float64, l kappa.Linear, d *kappa.Distribution, parts []contribution) KappaRow {
	r := noKappa()
	r.Kappa, r.Classic, r.ClassicError, r.Under25C = Number(v.Kappa), Number(v.Classic), percentNumber(v.ClassicError()), Number(at25C)
	if l.StandardUncertainty > 0 {
		r.Linear = LinearRow{Number(l.StandardUncertainty), Number(l.StandardUncertainty / v.Kappa), Number(l.Independent), Number(l.Systematic), ends(l.Interval)}
		r.Standard, r.Relative, r.Interval = r.Linear.Standard, r.Linear.Relative, r.Linear.Interval
	}
	if d != nil {
		r.MonteCarlo = &MonteCarloRow{d.Trials, Number(d.Mean), Number(d.Median), Number(d.StandardUncertainty), Number(d.StandardUncertainty / v.Kappa),
			ends(d.Interval), ends(d.Shortest), d.Agrees, nil, Number(d.Tolerance), d.Above, d.Below}
		if !math.IsNaN(d.Tolerance) {
			r.MonteCarlo.Stable = &d.Stable
		}
		r.Standard, r.Relative, r.Interval = r.MonteCarlo.Standard, r.MonteCarlo.Relative, r.MonteCarlo.Interval
	}
	for _, c := range parts {
		r.Contributions = append(r.Contributions, ContributionRow{c.quantity.String(), c.systematic, Number(c.relative), Number(c.signed), Number(c.share)})
	}
	return r
}

func ends(i kappa.Interval) *[2]Number { return &[2]Number{Number(i.Low), Number(i.High)} }
