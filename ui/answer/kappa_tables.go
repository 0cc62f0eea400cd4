package answer

import "dropcrest/koehler/kappa"

// tables are the numbers behind picture and finding.
func (k *implied) tables() []Table {
	out := []Table{k.pointsTable(), k.contributionsTable(), k.conventionsTable()}
	if len(k.points) > 1 {
		out = append(out, k.meansTable())
	}
	if k.spread != nil {
		out = append(out, k.spread.table())
	}
	if k.isCompared() {
		out = append(out, k.publishedTable())
	}
	return out
}

func (k *implied) pointsTable() Table {
	t := Table{Key: "points", Title: "Measurements and their κ", Columns: []Column{
		{"name", "name"},
		{"method", "method"},
		{"dry_diameter_m", "dry diameter, m"},
		{"volume_equivalent_diameter_m", "volume-equivalent diameter, m"},
		{"supersaturation_percent", "supersaturation, %"},
		{"growth_factor", "growth factor"},
		{"relative_humidity_percent", "relative humidity, %"},
		{"kappa", "κ"},
		{"kappa_classic", "classic κ"},
		{"kappa_without_kelvin_term", "κ without the Kelvin term"},
		{"kappa_at_25c_convention", "κ at 298.15 K, 72.0 mN/m"},
		{"relative_standard_uncertainty", "relative standard uncertainty"},
		{"interval_low", "interval from"},
		{"interval_high", "interval to"},
		{"linear_relative_standard_uncertainty", "linear relative standard uncertainty"},
		{"standard_deviation_of_ln_kappa", "spread of ln κ between particles"},
		{"inactive_share", "share that never activates"},
		{"problem", "problem"},
	}}
	for i := range k.points {
		r := k.points[i].row()
		low, high := endCells(r.Interval)
		var spread, inactive any
		if r.Spread != nil {
			spread, inactive = cell(float64(r.Spread.LnKappa)), cell(float64(r.Spread.Inactive))
		}
		t.Rows = append(t.Rows, []any{r.Name, r.Method, cell(float64(r.Dry)), cell(float64(r.Volume)), cell(float64(r.Supersaturation)), cell(float64(r.Growth)), cell(float64(r.Humidity)),
			cell(float64(r.Kappa)), cell(float64(r.Classic)), cell(float64(r.WithoutKelvin)), cell(float64(r.Under25C)), cell(float64(r.Relative)), low, high,
			cell(float64(r.Linear.Relative)), spread, inactive, textCell(r.Problem)})
	}
	return t
}

// contributionsTable ranks the inputs of the one point, or of the mean of several.
func (k *implied) contributionsTable() Table {
	t := Table{Key: "contributions", Title: "What the uncertainty is made of", Columns: []Column{
		{"method", "method"},
		{"quantity", "quantity"},
		{"common", "common to all points"},
		{"relative_sensitivity", "relative sensitivity of κ"},
		{"contribution_to_kappa", "contribution to κ"},
		{"share_of_variance", "share of the variance"},
	}}
	add := func(method string, parts []contribution) {
		for _, c := range parts {
			t.Rows = append(t.Rows, []any{method, c.quantity.String(), c.systematic, cell(c.relative), cell(c.signed), cell(c.share)})
		}
	}
	if len(k.points) == 1 {
		m := &k.points[0]
		add(m.measured.Method.String(), contributionsOf(m.Estimate))
		return t
	}
	for i := range k.means {
		add(k.means[i].method(), k.means[i].parts)
	}
	return t
}

// conventionsTable is the same κ under both conventions.
func (k *implied) conventionsTable() Table {
	t := Table{Key: "conventions", Title: "κ under both conventions", Columns: []Column{
		{"name", "of"},
		{"kappa", "κ"},
		{"temperature_k", "temperature, K"},
		{"surface_tension_n_per_m", "surface tension, N/m"},
		{"kappa_at_25c_convention", "κ at 298.15 K, 72.0 mN/m"},
		{"ratio", "ratio"},
	}}
	for _, m := range k.points {
		if m.Err == nil {
			t.Rows = append(t.Rows, conventionRow(m.name, m.Kappa, m.water, m.At25C))
		}
	}
	for i := range k.means {
		if m := &k.means[i]; m.mean != nil {
			row := conventionRow("mean of "+m.method(), m.mean.Kappa, conventionOf(k.asked), m.at25C)
			if k.hasOwnWater() {
				row[2], row[3] = nil, nil
			}
			t.Rows = append(t.Rows, row)
		}
	}
	return t
}

func conventionRow(name string, value float64, c kappa.Convention, at25C float64) []any {
	return []any{name, cell(value), cell(c.Temperature), cell(c.SurfaceTension()), cell(at25C), cell(at25C / value)}
}

func (k *implied) meansTable() Table {
	t := Table{Key: "means", Title: "Weighted means", Columns: []Column{
		{"method", "method"},
		{"points", "points"},
		{"kappa", "κ"},
		{"kappa_at_25c_convention", "κ at 298.15 K, 72.0 mN/m"},
		{"relative_standard_uncertainty", "relative standard uncertainty"},
		{"interval_low", "interval from"},
		{"interval_high", "interval to"},
		{"chi_square", "χ²"},
		{"degrees_of_freedom", "degrees of freedom"},
		{"chi_square_probability", "probability of χ²"},
		{"problem", "problem"},
	}}
	for i := range k.means {
		r := k.means[i].row()
		low, high := endCells(r.Interval)
		t.Rows = append(t.Rows, []any{r.Method, float64(r.Points), cell(float64(r.Kappa)), cell(float64(r.Under25C)), cell(float64(r.Relative)), low, high,
			cell(float64(r.ChiSquare)), float64(r.Freedom), cell(float64(r.Probability)), textCell(r.Problem)})
	}
	return t
}

func endCells(i *[2]Number) (low, high any) {
	if i == nil {
		return nil, nil
	}
	return cell(float64(i[0])), cell(float64(i[1]))
}

func textCell(text *string) any {
	if text == nil {
		return nil
	}
	return *text
}
