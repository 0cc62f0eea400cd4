package answer

import (
	"math"

	"dropcrest/koehler/ascent"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// figures are the supersaturation, the wet radii of single sizes, the droplets over
// updraft and, of a sweep, some of its rows.
func (r *risen) figures() []figure.Figure {
	out := []figure.Figure{r.peakFigure(), r.radiiFigure(), r.updraftFigure()}
	if r.sweep != nil {
		out = append(out, r.sweep.figure())
	}
	return out
}

// peakFigure is the supersaturation against height. The peak is a point of the line.
func (r *risen) peakFigure() figure.Figure {
	f := figure.Figure{
		Key: "supersaturation", Title: "supersaturation, % against height, m",
		X: figure.Axis{Says: "height", Unit: "m"},
		Y: figure.Axis{Says: "supersaturation", Unit: "%"},
	}
	line := figure.Line{Crest: true}
	add := func(s ascent.State) {
		line.X, line.Y = append(line.X, s.Height), append(line.Y, 100*s.Supersaturation)
	}
	before := true
	for _, p := range r.Profile {
		if before && p.Height >= r.Peak.Height {
			if p.Height > r.Peak.Height {
				add(r.Peak)
			}
			before = false
		}
		add(p.State)
	}
	line.Extrema = []float64{r.Peak.Height}
	f.Lines = []figure.Line{line}
	text := percent(r.Peak.Supersaturation) + " at " + digits(r.Peak.Height, 3) + " m"
	if !r.HasPeak {
		text += ", still rising"
	}
	f.Marks = []figure.Mark{{Kind: figure.CrestMark, X: r.Peak.Height, Y: 100 * r.Peak.Supersaturation, Text: text}}
	return f
}

// radiiFigure is the wet radius of single dry sizes against height: those that cross
// their critical radius with a mark where they do, the others dotted.
func (r *risen) radiiFigure() figure.Figure {
	f := figure.Figure{
		Key: "radii", Title: "wet radius, µm against height, m",
		X: figure.Axis{Says: "height", Unit: "m"},
		Y: figure.Axis{Says: "wet radius", Unit: "µm", Log: true},
	}
	for i, t := range r.Tracers {
		line := figure.Line{Says: shortest(t.DryDiameter*nano) + " nm", AtEnd: true}
		if !t.Grown {
			line.Says, line.Dash = line.Says+" haze", figure.Dotted
		}
		crossed := false
		for _, p := range r.Profile {
			y := p.Followed[i]
			line.X, line.Y = append(line.X, p.Height), append(line.Y, y*micro)
			if !crossed && y > t.CriticalRadius {
				crossed = true
				f.Marks = append(f.Marks, figure.Mark{Kind: figure.PointMark, X: p.Height, Y: y * micro, Text: shortest(t.DryDiameter*nano) + " nm crosses"})
			}
		}
		f.Lines = append(f.Lines, line)
	}
	return f
}

// updraftFigure is the number of droplets against updraft, with the closed forms.
func (r *risen) updraftFigure() figure.Figure {
	f := figure.Figure{
		Key: "updrafts", Title: "droplets, 1/cm³ against updraft, m/s",
		X: figure.Axis{Says: "updraft", Unit: "m/s", Log: true},
		Y: figure.Axis{Says: "droplets", Unit: "1/cm³"},
	}
	own := figure.Line{Says: "ascent"}
	forms := make([]figure.Line, len(r.forms))
	for i, c := range r.forms {
		forms[i] = figure.Line{Letter: letterOf(i), Says: methodName(c.Method), Dash: figure.Dashed}
	}
	for _, p := range r.curve {
		own.X, own.Y = append(own.X, p.updraft), append(own.Y, p.droplets*perCubic)
		for i, n := range p.forms {
			forms[i].X, forms[i].Y = append(forms[i].X, p.updraft), append(forms[i].Y, n*perCubic)
		}
	}
	f.Lines = []figure.Line{own}
	for i, c := range r.forms {
		if c.none == nil {
			f.Lines = append(f.Lines, forms[i])
		}
	}
	if n := r.Droplets * perCubic; !math.IsNaN(n) {
		f.Marks = []figure.Mark{{Kind: figure.PointMark, X: r.parcel.Updraft, Y: n, Text: cubic(r.Droplets) + " at " + r.updraftWords()}}
	}
	return f
}

// ascentFrame shows the whole ascent: the usual frame would end soon after the peak,
// because that of a curve has a long tail.
func ascentFrame(s scenario.Scenario, f figure.Figure, last figure.Frame, h int) (figure.Frame, bool) {
	fr, refitted := figure.Fit(f, last, h)
	if f.Key == "supersaturation" && s.Height > 0 {
		fr.XMin, fr.XMax = 0, s.Height
	}
	return fr, refitted
}
