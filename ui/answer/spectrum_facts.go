package answer

import (
	"errors"
	"math"
	"time"

	"dropcrest/koehler/spectrum"
)

// SpectrumFacts is the JSON object of the Spectrum question. Scripts rely on its keys.
type SpectrumFacts struct {
	Record    *RecordFacts  `json:"record"`           // null without data
	Particles Number        `json:"particles_per_m3"` // of all sizes; null where nothing was sized
	Kappa     Number        `json:"kappa"`            // of all particles; null where it is no one number
	Spectrum  []SpectrumRow `json:"spectrum"`
	Measured  []MeasuredRow `json:"measured"`
	Closure   *ClosureFacts `json:"closure"` // null where nothing can be compared
	Fits      []FitRow      `json:"fits"`
	Modes     []ModeRow     `json:"modes"` // fitted to measured sizes beside error functions
	Rejected  []RejectedRow `json:"rejected"`
}

// RecordFacts say which part of the data was looked at. Of several records the
// spectrum and the counts are means.
type RecordFacts struct {
	Number  *int   `json:"number"` // from 1; null: all of them
	Records int    `json:"records"`
	Start   string `json:"start_time"`
	End     string `json:"end_time"`
}

// SpectrumRow is how many particles activate at a supersaturation.
type SpectrumRow struct {
	Supersaturation Number `json:"supersaturation_percent"`
	Count           Number `json:"ccn_per_m3"`
	Critical        Number `json:"critical_dry_diameter_m"`
}

// MeasuredRow is what was counted at a supersaturation, and what it implies.
type MeasuredRow struct {
	Supersaturation  Number  `json:"supersaturation_percent"`
	Count            Number  `json:"ccn_per_m3"`
	Uncertainty      Number  `json:"uncertainty"` // standard uncertainty of ccn_per_m3, in 1/m³
	Flag             *string `json:"flag"`
	Predicted        Number  `json:"predicted_ccn_per_m3"`
	Ratio            Number  `json:"ratio"`             // predicted over measured
	Kappa            Number  `json:"kappa"`             // that the count implies; of several records the median
	KappaUncertainty Number  `json:"kappa_uncertainty"` // from those of the count and of a calibration
	Critical         Number  `json:"critical_dry_diameter_m"`
	NoKappa          *string `json:"no_kappa"` // why the count implies none
	Records          int     `json:"records"`

	Calibration *CalibrationEffect `json:"calibration"` // null where the data give the supersaturation
}

// ClosureFacts are how predicted and measured counts agree.
type ClosureFacts struct {
	AgreementFacts
	By []LevelFacts `json:"by_supersaturation"`
}

// LevelFacts are those of one supersaturation as set.
type LevelFacts struct {
	Supersaturation Number `json:"supersaturation_percent"`
	AgreementFacts
}

// AgreementFacts are the statistics of pairs. Predicted is the ordinate.
type AgreementFacts struct {
	Pairs               int        `json:"pairs"`
	Ratio               RatioFacts `json:"ratio"` // predicted over measured
	GeometricMean       Number     `json:"geometric_mean_ratio"`
	GSD                 Number     `json:"geometric_standard_deviation_of_ratio"`
	ThroughOrigin       Number     `json:"slope_through_origin"`
	Slope               Number     `json:"slope"`     // least squares of the ordinate
	Intercept           Number     `json:"intercept"` // 1/m³
	OrthogonalSlope     Number     `json:"orthogonal_slope"`
	OrthogonalIntercept Number     `json:"orthogonal_intercept"` // 1/m³
	RSquared            Number     `json:"r_squared"`
	MeanBias            Number     `json:"normalised_mean_bias"`
	MeanError           Number     `json:"normalised_mean_error"`
	RootMeanSquare      Number     `json:"root_mean_square_error_per_m3"`
	LogRootMeanSquare   Number     `json:"root_mean_square_error_of_ln_ratio"`
	Within10            Number     `json:"within_10_percent"` // shares, 0 to 1
	Within20            Number     `json:"within_20_percent"`
	Within30            Number     `json:"within_30_percent"`
	WithinFactor2       Number     `json:"within_factor_2"`
}

// RatioFacts are quantiles.
type RatioFacts struct {
	P05    Number `json:"p05"`
	P25    Number `json:"p25"`
	Median Number `json:"median"`
	P75    Number `json:"p75"`
	P95    Number `json:"p95"`
}

// FitRow is a form laid through counts. Outside the range it extrapolates.
type FitRow struct {
	Form             string         `json:"form"`    // power | cohard | erf | erf2
	Of               string         `json:"of"`      // measured | predicted
	Problem          *string        `json:"problem"` // why there is no fit
	Parameters       []ParameterRow `json:"parameters"`
	Covariance       [][]Number     `json:"covariance"` // in the order of the parameters; null: not known
	From             Number         `json:"from_supersaturation_percent"`
	To               Number         `json:"to_supersaturation_percent"`
	Points           int            `json:"points"`
	DegreesOfFreedom int            `json:"degrees_of_freedom"`
	ReducedChiSquare Number         `json:"reduced_chi_square"`
	Deviation        Number         `json:"root_mean_square_deviation_of_ln"`
}

// ParameterRow is one number of a form.
type ParameterRow struct {
	Key         string `json:"key"`
	Value       Number `json:"value"`
	Uncertainty Number `json:"uncertainty"`
	IsHeld      bool   `json:"held"`
}

// ModeRow is a lognormal mode fitted to measured sizes, with standard uncertainties.
type ModeRow struct {
	Count             Number `json:"count_per_m3"`
	CountUncertainty  Number `json:"count_uncertainty_per_m3"`
	Median            Number `json:"median_dry_diameter_m"`
	MedianUncertainty Number `json:"median_dry_diameter_uncertainty_m"`
	GSD               Number `json:"gsd"`
	GSDUncertainty    Number `json:"gsd_uncertainty"`
}

// RejectedRow is how many measured points one rule has left out.
type RejectedRow struct {
	Reason string `json:"reason"`
	Count  int    `json:"count"`
}

func (a *activated) facts() SpectrumFacts {
	f := SpectrumFacts{
		Particles: Number(math.NaN()), Kappa: Number(a.kappa()),
		Spectrum: make([]SpectrumRow, 0, len(a.predicted)), Measured: make([]MeasuredRow, 0, len(a.measured)),
		Fits: make([]FitRow, 0, len(a.fits)), Rejected: make([]RejectedRow, 0, len(a.rejected)),
	}
	if a.sizes != nil {
		f.Particles = Number(a.sizes.Number())
	}
	if a.records > 0 {
		f.Record = &RecordFacts{nil, a.records, clock(a.start), clock(a.end)}
		if a.number > 0 {
			f.Record.Number = &a.number
		}
	}
	for _, p := range a.predicted {
		f.Spectrum = append(f.Spectrum, SpectrumRow{Number(inPercent(p.s)), Number(p.count), Number(p.critical)})
	}
	for _, m := range a.measured {
		f.Measured = append(f.Measured, m.row(a.asked.Temperature))
	}
	f.Closure = a.closureFacts()
	for _, x := range a.fits {
		f.Fits = append(f.Fits, x.row())
	}
	f.Modes = []ModeRow{}
	if a.modes != nil {
		for i, m := range a.modes.Modes {
			u := func(k int) Number { return Number(a.modeUncertainty(i, k)) }
			f.Modes = append(f.Modes, ModeRow{Number(m.Concentration), u(0), Number(m.Median), u(1), Number(m.GSD), u(2)})
		}
	}
	for _, r := range a.rejected {
		f.Rejected = append(f.Rejected, RejectedRow(r))
	}
	return f
}

// clock writes a time as in files.
func clock(t time.Time) string { return t.UTC().Format(time.RFC3339) }

func (m measurement) row(temperature float64) MeasuredRow {
	r := MeasuredRow{Supersaturation: Number(inPercent(m.s)), Count: Number(m.count), Uncertainty: Number(m.uncertainty),
		Predicted: Number(m.predicted), Ratio: Number(m.ratio()), Kappa: Number(math.NaN()), KappaUncertainty: Number(m.kappaUncertainty()),
		Critical: Number(math.NaN()), Records: m.records, Calibration: m.shared(temperature)}
	if m.flag != "" {
		r.Flag = &m.flag
	}
	if m.noKappa == nil {
		r.Kappa, r.Critical = Number(m.kappa.Kappa), Number(m.kappa.CriticalDiameter)
	} else {
		why := noKappaKey(m.noKappa)
		r.NoKappa = &why
	}
	return r
}

// noKappaKey is why a count implies no κ as scripts see it.
func noKappaKey(err error) string {
	var u *spectrum.UnsolvedError
	if errors.As(err, &u) {
		return string(u.Reason)
	}
	return "not-sized"
}

func (a *activated) closureFacts() *ClosureFacts {
	all := a.closures.All.Agreement()
	if all.Pairs == 0 {
		return nil
	}
	f := &ClosureFacts{AgreementFacts: agreementFacts(all), By: []LevelFacts{}}
	for _, s := range a.closures.Levels() {
		f.By = append(f.By, LevelFacts{Number(inPercent(s)), agreementFacts(a.closures.At(s).Agreement())})
	}
	return f
}

func agreementFacts(g spectrum.Agreement) AgreementFacts {
	return AgreementFacts{
		Pairs:         g.Pairs,
		Ratio:         RatioFacts{Number(g.P05), Number(g.P25), Number(g.Median), Number(g.P75), Number(g.P95)},
		GeometricMean: Number(g.GeometricMean), GSD: Number(g.GSD), ThroughOrigin: Number(g.ThroughOrigin),
		Slope: Number(g.Ordinary.Slope), Intercept: Number(g.Ordinary.Intercept),
		OrthogonalSlope: Number(g.Orthogonal.Slope), OrthogonalIntercept: Number(g.Orthogonal.Intercept),
		RSquared: Number(g.RSquared), MeanBias: Number(g.MeanBias), MeanError: Number(g.MeanError),
		RootMeanSquare: Number(g.RootMeanSquare), LogRootMeanSquare: Number(g.LogRootMeanSquare),
		Within10: Number(g.Within10), Within20: Number(g.Within20), Within30: Number(g.Within30), WithinFactor2: Number(g.WithinFactor2),
	}
}

func (f fitted) row() FitRow {
	gap := Number(math.NaN())
	r := FitRow{Form: f.form, Of: f.of, Parameters: []ParameterRow{}, From: gap, To: gap, ReducedChiSquare: gap, Deviation: gap}
	if f.noFit != nil {
		why := f.whyNoFit()
		r.Problem = &why
		return r
	}
	for i, p := range f.Form.Parameters() {
		r.Parameters = append(r.Parameters, ParameterRow{p.Key, Number(p.Value), Number(f.Uncertainty(i)), f.isHeld(i)})
	}
	if c := f.Fitted.Covariance; c != nil {
		n := c.SymmetricDim()
		for i := range n {
			row := make([]Number, n)
			for j := range n {
				row[j] = Number(c.At(i, j))
			}
			r.Covariance = append(r.Covariance, row)
		}
	}
	r.From, r.To, r.Points, r.DegreesOfFreedom = Number(inPercent(f.Low)), Number(inPercent(f.High)), f.Points, f.DegreesOfFreedom
	r.ReducedChiSquare, r.Deviation = Number(f.ReducedChiSquare), Number(f.Deviation)
	return r
}
