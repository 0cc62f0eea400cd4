package answer

import (
	"math"

	"dropcrest/koehler/spectrum"
)

// tables are the numbers behind picture and finding.
func (a *activated) tables() []Table {
	var out []Table
	if a.rows != nil && a.rows.env.Row == nil {
		out = append(out, a.rows.kept)
	}
	out = append(out, a.spectrumTable())
	if a.closures.All.Agreement().Pairs > 0 {
		out = append(out, a.closureTable())
	}
	if len(a.fits) > 0 {
		out = append(out, a.fitTable())
	}
	if a.modes != nil {
		out = append(out, a.modeTable())
	}
	if a.sizes != nil {
		out = append(out, a.sizesTable())
	}
	if len(a.rejected) > 0 {
		out = append(out, a.rejectedTable())
	}
	if len(a.mapping) > 0 {
		out = append(out, a.mappingTable())
	}
	return out
}

// mappingTable is what the columns of the data hold, as it was understood.
func (a *activated) mappingTable() Table {
	t := Table{Key: "columns", Title: "Columns of the data", Columns: []Column{{"column", "file: column=quantity"}}}
	for _, line := range a.mapping {
		t.Rows = append(t.Rows, []any{line})
	}
	return t
}

// countColumns are those of predicted and measured counts.
var countColumns = []Column{
	{"supersaturation_percent", "supersaturation, %"},
	{"ccn_per_m3", "predicted CCN, 1/m³"},
	{"critical_dry_diameter_m", "critical dry diameter, m"},
	{"measured_ccn_per_m3", "measured CCN, 1/m³"},
	{"uncertainty", "its standard uncertainty, 1/m³"},
	{"flag", "flag"},
	{"ratio", "predicted over measured"},
	{"kappa", "κ of the particles"},
	{"kappa_by_count", "κ by count"},
	{"kappa_by_count_uncertainty", "its standard uncertainty by counting"},
	{"critical_dry_diameter_by_count_m", "critical dry diameter by count, m"},
	{"no_kappa", "why there is no κ by count"},
}

func (a *activated) spectrumTable() Table {
	t := Table{Key: "spectrum", Title: "Predicted and measured", Columns: countColumns}
	a.countRows(func(row []any) error {
		t.Rows = append(t.Rows, row)
		return nil
	})
	return t
}

// countRows are the rows of the table of counts: at the supersaturations that were
// asked for and at those where something was measured, ascending.
func (a *activated) countRows(each func(row []any) error, lead ...any) error {
	i, j := 0, 0
	for i < len(a.predicted) || j < len(a.measured) {
		var row []any
		switch {
		case j == len(a.measured) || i < len(a.predicted) && a.predicted[i].s < a.measured[j].s && !sameLevel(a.predicted[i].s, a.measured[j].s):
			row = a.countRow(lead, a.predicted[i], nil)
			i++
		default:
			m := &a.measured[j]
			if i < len(a.predicted) && sameLevel(a.predicted[i].s, m.s) && (j+1 == len(a.measured) || !sameLevel(a.predicted[i].s, a.measured[j+1].s)) {
				i++
			}
			row = a.countRow(lead, prediction{m.s, m.predicted, m.critical}, m)
			j++
		}
		if err := each(row); err != nil {
			return err
		}
	}
	return nil
}

// sameLevel tells whether two supersaturations are the same set point: they agree
// within half a per mille.
func sameLevel(a, b float64) bool { return math.Abs(a-b) <= 5e-4*math.Max(a, b) }

func (a *activated) countRow(lead []any, p prediction, m *measurement) []any {
	row := append(make([]any, 0, len(lead)+len(countColumns)), lead...)
	row = append(row, cell(inPercent(p.s)), cell(p.count), cell(p.critical))
	if m == nil {
		return append(row, nil, nil, nil, nil, cell(a.kappa()), nil, nil, nil, nil)
	}
	row = append(row, cell(m.count), cell(m.uncertainty), word(m.flag), cell(m.ratio()), cell(a.kappa()))
	if m.noKappa != nil {
		return append(row, nil, nil, nil, noKappaKey(m.noKappa))
	}
	return append(row, cell(m.kappa.Kappa), cell(m.kappaUncertainty()), cell(m.kappa.CriticalDiameter), nil)
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
		t.Rows = append(t.Rows, []any{cell(inPercent(s)), float64(g.Pairs), cell(g.P05), cell(g.P25), cell(g.Median), cell(g.P75), cell(g.P95),
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
			t.Rows = append(t.Rows, []any{f.form, f.of, p.Key, cell(p.Value), cell(f.Uncertainty(i)), cell(inPercent(f.Low)), cell(inPercent(f.High)), nil})
		}
	}
	return t
}

func (a *activated) modeTable() Table {
	t := Table{Key: "modes", Title: "Modes of the sizes", Columns: []Column{
		{"count_per_m3", "number, 1/m³"},
		{"count_uncertainty_per_m3", "its standard uncertainty, 1/m³"},
		{"median_dry_diameter_m", "median dry diameter, m"},
		{"median_dry_diameter_uncertainty_m", "its standard uncertainty, m"},
		{"gsd", "geometric standard deviation"},
		{"gsd_uncertainty", "its standard uncertainty"},
	}}
	for i, m := range a.modes.Modes {
		u := func(k int) any { return cell(a.modeUncertainty(i, k)) }
		t.Rows = append(t.Rows, []any{cell(m.Concentration), u(0), cell(m.Median), u(1), cell(m.GSD), u(2)})
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
