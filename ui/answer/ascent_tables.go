package answer

import "math"

// tables are the numbers behind pictures and finding. Of a sweep its cells are the
// main one.
func (r *risen) tables() []Table {
	var out []Table
	if r.sweep != nil {
		out = append(out, r.sweep.table(), r.sweep.mapTable())
	}
	return append(out, r.profileTable(), r.modesTable(), r.closedTable(), r.updraftsTable(), r.followedTable())
}

func (r *risen) profileTable() Table {
	t := Table{Key: "profile", Title: "Profile", Columns: []Column{
		{"height_m", "height, m"},
		{"time_s", "time, s"},
		{"supersaturation_percent", "supersaturation, %"},
		{"temperature_k", "temperature, K"},
		{"pressure_pa", "pressure, Pa"},
		{"liquid_water_kg_per_kg", "liquid water, kg/kg"},
		{"droplets_per_m3", "droplets, 1/m³ at the start"},
		{"mean_radius_m", "mean radius, m"},
		{"standard_deviation_of_radius_m", "standard deviation of radius, m"},
	}}
	for _, f := range r.follow {
		nm := shortest(f.DryDiameter * nano)
		t.Columns = append(t.Columns, Column{"wet_radius_of_" + nm + "nm_m", "wet radius of " + nm + " nm, m"})
	}
	for _, p := range r.Profile {
		mean, spread := cell(p.MeanRadius), cell(p.SpreadRadius)
		if !(p.MeanRadius > 0) {
			mean, spread = nil, nil
		}
		row := []any{cell(p.Height), cell(p.Time), cell(100 * p.Supersaturation), cell(p.Temperature), cell(p.Pressure), cell(p.LiquidWater), cell(p.Droplets), mean, spread}
		for _, x := range p.Followed {
			row = append(row, cell(x))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

func (r *risen) modesTable() Table {
	t := Table{Key: "modes", Title: "Modes", Columns: []Column{
		{"mode", "mode"},
		{"particles_per_m3", "particles, 1/m³"},
		{"droplets_per_m3", "droplets, 1/m³"},
		{"grown_droplets_per_m3", "grown, 1/m³"},
		{"critical_dry_diameter_m", "critical dry diameter, m"},
		{"smallest_grown_dry_diameter_m", "smallest grown dry diameter, m"},
	}}
	for _, m := range r.byMode() {
		t.Rows = append(t.Rows, []any{float64(m.Mode), cell(float64(m.Particles)), cell(float64(m.Droplets)), cell(float64(m.Grown)),
			cell(float64(m.Critical)), cell(float64(m.GrownDry))})
	}
	return t
}

func (r *risen) closedTable() Table {
	t := Table{Key: "closed_forms", Title: "Closed forms", Columns: []Column{
		{"method", "method"},
		{"peak_supersaturation_percent", "peak, %"},
		{"droplets_per_m3", "droplets, 1/m³"},
		{"peak_deviation", "peak over ascent - 1"},
		{"droplets_deviation", "droplets over ascent - 1"},
		{"problem", "why there is none"},
	}}
	for _, c := range r.forms {
		f := r.closedRow(c)
		var problem any
		if f.Problem != nil {
			problem = *f.Problem
		}
		t.Rows = append(t.Rows, []any{f.Method, cell(float64(f.Peak)), cell(float64(f.Droplets)), cell(float64(f.PeakDeviation)), cell(float64(f.DropletsDeviation)), problem})
	}
	return t
}

func (r *risen) updraftsTable() Table {
	t := Table{Key: "updrafts", Title: "Droplets over updraft", Columns: []Column{
		{"updraft_m_per_s", "updraft, m/s"},
		{"droplets_per_m3", "droplets, 1/m³"},
		{"peak_supersaturation_percent", "peak, %"},
		{"twomey_1959_droplets_per_m3", "Twomey 1959, 1/m³"},
		{"abdul_razzak_ghan_2000_droplets_per_m3", "Abdul-Razzak & Ghan 2000, 1/m³"},
		{"fountoukis_nenes_2005_droplets_per_m3", "Fountoukis & Nenes 2005, 1/m³"},
		{"problem", "why there is no ascent"},
	}}
	for _, p := range r.curve {
		row := []any{cell(p.updraft), cell(p.droplets), cell(100 * p.peak)}
		for _, n := range p.forms {
			row = append(row, cell(n))
		}
		t.Rows = append(t.Rows, append(row, word(p.fault)))
	}
	return t
}

func (r *risen) followedTable() Table {
	t := Table{Key: "followed", Title: "Followed dry sizes", Columns: []Column{
		{"dry_diameter_m", "dry diameter, m"},
		{"mode", "mode"},
		{"critical_wet_radius_m", "critical wet radius, m"},
		{"wet_radius_at_end_m", "wet radius at the end, m"},
		{"grown", "grown past it"},
	}}
	for i, f := range r.Tracers {
		critical := f.CriticalRadius
		if math.IsInf(critical, 1) {
			critical = math.NaN()
		}
		t.Rows = append(t.Rows, []any{cell(f.DryDiameter), float64(r.of.partOf[f.Group] + 1), cell(critical), cell(r.wetAtEnd(i)), f.Grown})
	}
	return t
}
