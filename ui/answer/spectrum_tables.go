package answer

import (
	"math"

	"dropcrest/koehler/spectrum"
)

// tables are the numbers behind picture and finding.
func (a *activated) tables() []Table {
	out := []Table{a.spectrumTable()}
	if len(a.measured) > 0 {
		out = append(out, a.measuredTable())
	}
	if a.closures.All.Agreement().Pairs > 0 {
		out = append(out, a.closureTable())
	}
	if len(a.fits) > 0 {
		out = append(out, a.fitTable())
	}
	if a.sizes != nil {
		out = append(out, a.sizesTable())
	}
	if len(a.rejected) > 0 {
		out = append(out, a.rejectedTable())
	}
	return out
}

func (a *activated) spectrumTable() Table {
	t := Table{Key: "spectrum", Title: "Predicted", Columns: []Column{
		{"supersaturation_percent", "supersaturation, %"},
		{"ccn_per_m3", "CCN, 1/m³"},
		{"critical_dry_diameter_m", "critical dry diameter, m"},
	}}
	for _, p := range a.predicted {
		t.Rows = append(t.Rows, []any{cell(100 * p.s), cell(p.count), cell(p.critical)})
	}
	return t
}

func (a *activated) measuredTable() Table {
	t := Table{Key: "measured", Title: "Measured", Columns: []Column{
		{"supersaturation_percent", "supersaturation, %"},
		{"ccn_per_m3", "CCN, 1/m³"},
		{"uncertainty", "standard uncertainty, 1/m³"},
		{"flag", "flag"},
		{"predicted_ccn_per_m3", "predicted, 1/m³"},
		{"ratio", "predicted over measured"},
		{"kappa", "κ by count"},
		{"kappa_uncertainty", "its standard uncertainty by counting"},
		{"critical_dry_diameter_m", "critical dry diameter by count, m"},
		{"no_kappa", "why there is no κ"},
		{"records", "records"},
	}}
	for _, m := range a.measured {
		row := []any{cell(100 * m.s), cell(m.count), cell(m.uncertainty), word(m.flag), cell(m.predicted), cell(m.ratio())}
		if m.noKappa == nil {
			row = append(row, cell(m.kappa.Kappa), cell(m.kappaUncertainty()), cell(m.kappa.CriticalDiameter), nil)
		} else {
			row = append(row, nil, nil, nil, noKappaKey(m.noKappa))
		}
		t.Rows = append(t.Rows, append(row, float64(m.records)))
	}
	return t
}

// word is a text in a table, nil when it is absent.
func word(text string) any {
	if text == "" {
		return nil
	}
	return text
}

func (a *activated) closureTable() Table {
	t := Table{Key: "closure", Title: "Predicted over measured", Columns: []Column{
		{"supersaturation_percent", "supersaturation, %"}, // none: all together
		{"pairs", "pairs"},
		{"ratio_p05", "5 %"},
		{"ratio_p25", "25 %"},
		{"ratio_median", "median"},
		{"ratio_p75", "75 %"},
		{"ratio_p95", "95 %"},
		{"slope_through_origin", "slope through the origin"},
		{"slope", "slope"},
		{"intercept", "intercept, 1/m³"},
		{"r_squared", "R²"},
		{"normalised_mean_bias", "normalised mean bias"},
		{"root_mean_square_error_per_m3", "root mean square error, 1/m³"},
		{"within_10_percent", "within 10 %"},
		{"within_20_percent", "within 20 %"},
		{"within_30_percent", "within 30 %"},
		{"within_factor_2", "within a factor of 2"},
	}}
	add := func(s float64, g spectrum.Agreement) {
		t.Rows = append(t.Rows, []any{cell(100 * s), float64(g.Pairs), cell(g.P05), cell(g.P25), cell(g.Median), cell(g.P75), cell(g.P95),
			cell(g.ThroughOrigin), cell(g.Ordinary.Slope), cell(g.Ordinary.Intercept), cell(g.RSquared), cell(g.MeanBias),
			cell(g.RootMeanSquare), cell(g.Within10), cell(g.Within20), cell(g.Within30), cell(g.WithinFactor2)})
	}
	for _, s := range a.closures.Levels() {
		add(s, a.closures.At(s).Agreement())
	}
	add(math.NaN(), a.closures.All.Agreement())
	return t
}

func (a *activated) fitTable() Table {
	t := Table{Key: "fits", Title: "Fits", Columns: []Column{
		{"form", "form"},
		{"of", "of"},
		{"parameter", "parameter"},
		{"value", "value"},
		{"uncertainty", "standard uncertainty"},
		{"from_supersaturation_percent", "fitted from, %"},
		{"to_supersaturation_percent", "fitted to, %"},
		{"problem", "why there is none"},
	}}
	for _, f := range a.fits {
		if f.noFit != nil {
			t.Rows = append(t.Rows, []any{f.form, f.of, nil, nil, nil, nil, nil, f.whyNoFit()})
			continue
		}
		for i, p := range f.Form.Parameters() {
			t.Rows = append(t.Rows, []any{f.form, f.of, p.Key, cell(p.Value), cell(f.Uncertainty(i)), cell(100 * f.Low), cell(100 * f.High), nil})
		}
	}
	return t
}

func (a *activated) sizesTable() Table {
	t := Table{Key: "sizes", Title: "Size distribution", Columns: []Column{
		{"dry_diameter_m", "dry diameter, m"},
		{"dn_dlog10_diameter_per_m3", "dN/dlog10 D, 1/m³"},
	}}
	for _, d := range a.diameters() {
		t.Rows = append(t.Rows, []any{cell(d), cell(a.sizes.Density(d) * math.Ln10)})
	}
	return t
}

func (a *activated) rejectedTable() Table {
	t := Table{Key: "rejected", Title: "Left out", Columns: []Column{
		{"reason", "reason"},
		{"count", "counts"},
	}}
	for _, r := range a.rejected {
		t.Rows = append(t.Rows, []any{r.Reason, float64(r.Count)})
	}
	return t
}
