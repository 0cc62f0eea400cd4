package answer

import (
	"fmt"
	"math"

	"dropcrest/koehler/counter"
	"dropcrest/ui/figure"
)

// bandSteps is how finely lines of the calibration are drawn.
const bandSteps = 60

// lineFigure is supersaturation against temperature difference with its band.
func (c *calibrated) lineFigure() figure.Figure {
	f := figure.Figure{
		Key: "line", Title: "supersaturation, % against temperature difference, K",
		X: figure.Axis{Says: "temperature difference", Unit: "K"},
		Y: figure.Axis{Says: "supersaturation", Unit: "%"},
	}
	for _, s := range c.Scans {
		if s.Fault != "" {
			continue
		}
		y, u := 100*s.Supersaturation, 100*s.SupersaturationUncertainty
		f.Points = append(f.Points, figure.Point{X: s.TemperatureDifference, Y: y,
			XLow: s.TemperatureDifference - s.DifferenceUncertainty, XHigh: s.TemperatureDifference + s.DifferenceUncertainty, YLow: y - u, YHigh: y + u})
	}
	if c.Line == nil {
		return f
	}
	line := figure.Line{Says: "calibration"}
	low, high := figure.Line{Says: "95 % of further scans lie above", Dash: figure.Dotted}, figure.Line{Says: "95 % of further scans lie below", Dash: figure.Dotted}
	from, to := 0.8*c.Line.Lowest, 1.1*c.Line.Highest
	for i := range bandSteps + 1 {
		x := from + (to-from)*float64(i)/bandSteps
		band := c.Line.Band(x, 0.9) // 5 % beyond either line
		line.X, line.Y = append(line.X, x), append(line.Y, 100*c.Line.At(x))
		low.X, low.Y = append(low.X, x), append(low.Y, 100*(c.Line.At(x)-band.Prediction))
		high.X, high.Y = append(high.X, x), append(high.Y, 100*(c.Line.At(x)+band.Prediction))
	}
	f.Lines = []figure.Line{line, low, high}
	return f
}

// drawn are the places of the scans that have an activation curve over sizes.
func (c *calibrated) drawn() []int {
	var at []int
	for i, s := range c.Scans {
		if s.Fault == "" && s.Over == counter.OverDiameter {
			at = append(at, i)
		}
	}
	return at
}

// curvesFigure is every activation curve with its points, or the one that is asked for.
func (c *calibrated) curvesFigure() figure.Figure {
	f := figure.Figure{
		Key: "curves", Title: "activated fraction against mobility diameter, nm",
		X: figure.Axis{Says: "mobility diameter", Unit: "nm", Log: true},
		Y: figure.Axis{Says: "activated fraction", Unit: ""},
	}
	drawn := c.drawn()
	if n := c.asked.Scan; n.Word == "" && len(drawn) > 0 {
		at := min(int(n.Number), len(drawn)) - 1
		drawn = drawn[at : at+1]
		f.Title += ", " + c.Scans[drawn[0]].Name
	}
	for _, i := range drawn {
		s := c.Scans[i]
		line := figure.Line{Says: digits(s.TemperatureDifference, 3) + " K"}
		for _, p := range s.Points {
			x := p.Setting * 1e9
			line.X, line.Y = append(line.X, x), append(line.Y, p.Curve)
			f.Points = append(f.Points, figure.Point{Letter: letterOf(i), X: x, Y: p.Fraction, XLow: math.NaN(), XHigh: math.NaN(),
				YLow: p.Fraction - p.Uncertainty, YHigh: p.Fraction + p.Uncertainty})
		}
		f.Lines = append(f.Lines, line)
		f.Marks = append(f.Marks, figure.Mark{Kind: figure.PointMark, X: s.MobilityDiameter * 1e9, Y: s.Plateau.Value / 2,
			Text: fmt.Sprintf("%s nm", digits(s.MobilityDiameter*1e9, 4))})
	}
	return f
}

// letterOf tells series apart.
func letterOf(i int) rune { return rune('A' + i%26) }

// residualFigure is how far the scans lie from the line.
func (c *calibrated) residualFigure() figure.Figure {
	f := figure.Figure{
		Key: "residuals", Title: "scan less line, % supersaturation against temperature difference, K",
		X: figure.Axis{Says: "temperature difference", Unit: "K"},
		Y: figure.Axis{Says: "scan less line", Unit: "%"},
	}
	if c.Line == nil {
		return f
	}
	for _, r := range c.Line.Residuals {
		y, u := 100*r.Residual, 100*r.Uncertainty
		f.Points = append(f.Points, figure.Point{X: r.X, Y: y, XLow: math.NaN(), XHigh: math.NaN(), YLow: y - u, YHigh: y + u})
	}
	return f
}

// tables are the scans, the points, and what was left out.
func (c *calibrated) tables() []Table {
	scans := Table{Key: "scans", Title: "Scans", Columns: []Column{{"scan", "scan"}, {"temperature_difference_k", "temperature difference, K"},
		{"d50_m", "D50, m"}, {"d50_standard_uncertainty_m", "u(D50), m"}, {"plateau", "plateau"}, {"doubly_charged_fraction", "doubly charged"},
		{"critical_supersaturation_percent", "supersaturation, %"}, {"critical_supersaturation_standard_uncertainty_percent", "u, %"}, {"fault", "fault"}}}
	points := Table{Key: "points", Title: "Points", Columns: []Column{{"scan", "scan"}, {"setting", "setting, SI"}, {"activated_fraction", "activated fraction"},
		{"standard_uncertainty", "u"}, {"curve", "curve"}, {"deviation", "deviation"}, {"line", "line of the file"}}}
	for _, s := range c.Scans {
		row := []any{s.Name, cell(s.TemperatureDifference), nil, nil, nil, nil, nil, nil, s.Fault}
		if s.Fault == "" {
			row = []any{s.Name, cell(s.TemperatureDifference), cell(s.MobilityDiameter), cell(s.DiameterUncertainty), cell(s.Plateau.Value),
				cell(s.Double.Value), cell(100 * s.Supersaturation), cell(100 * s.SupersaturationUncertainty), nil}
		}
		scans.Rows = append(scans.Rows, row)
		for _, p := range s.Points {
			points.Rows = append(points.Rows, []any{s.Name, cell(p.Setting), cell(p.Fraction), cell(p.Uncertainty), cell(p.Curve), cell(p.Deviation), float64(p.Line)})
		}
	}
	left := Table{Key: "left_out", Title: "Left out", Columns: []Column{{"scan", "scan"}, {"setting", "setting, SI"}, {"line", "line of the file"}, {"why", "why"}}}
	for _, l := range c.LeftOut {
		left.Rows = append(left.Rows, []any{l.Scan, cell(l.Setting), float64(l.Line), l.Why})
	}
	return []Table{scans, points, left}
}
