package answer

// tables are the numbers behind picture and finding.
func (c *curve) tables() []Table {
	return []Table{c.curveTable(), c.extremaTable(), c.hazeTable()}
}

func (c *curve) curveTable() Table {
	t := Table{Key: "curve", Title: "Equilibrium curve", Columns: []Column{
		{"wet_radius_m", "wet radius, m"},
		{"saturation_ratio", "saturation ratio"},
		{"water_activity", "water activity"},
		{"kelvin_factor", "Kelvin factor"},
		{"supersaturation_percent", "supersaturation, %"},
	}}
	t.Rows = make([][]any, len(c.table))
	cells := make([]any, 0, len(c.table)*len(t.Columns)) // of all rows
	for i, s := range c.table {
		first := len(cells)
		cells = append(cells, cell(s.WetDiameter/2), cell(s.SaturationRatio),
			cell(s.WaterActivity), cell(s.KelvinFactor), cell(100*s.Supersaturation))
		t.Rows[i] = cells[first:len(cells):len(cells)]
	}
	return t
}

func (c *curve) extremaTable() Table {
	t := Table{Key: "extrema", Title: "Extrema", Columns: []Column{
		{"kind", "kind"},
		{"wet_radius_m", "wet radius, m"},
		{"supersaturation_percent", "supersaturation, %"},
	}}
	for _, e := range c.extrema {
		t.Rows = append(t.Rows, []any{kindWord(e.Kind), cell(e.WetDiameter / 2), cell(100 * e.Supersaturation)})
	}
	return t
}

func (c *curve) hazeTable() Table {
	t := Table{Key: "haze", Title: "Size at the humidity looked at", Columns: []Column{
		{"branch", "branch"},
		{"relative_humidity_percent", "relative humidity, %"},
		{"wet_radius_m", "wet radius, m"},
		{"growth_factor", "growth factor"},
	}}
	for _, h := range c.haze {
		t.Rows = append(t.Rows, []any{h.branch, cell(100 * c.asked.RelativeHumidity), cell(h.WetDiameter / 2), cell(c.growth(h.State))})
	}
	return t
}
