package print

import (
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"dropcrest/ui/figure"
)

// Sizes of measured points and of the caps of their bars.
const (
	pointRadius = vg.Length(2.6)
	capRadius   = vg.Length(2.4)
)

// points draws the measured points of a sheet with their error bars.
type points struct{ *sheet }

// Plot implements plot.Plotter. A point outside the frame is not drawn; its bars
// are, as far as they reach into it.
func (s points) Plot(c draw.Canvas, p *plot.Plot) {
	tx, ty := p.Transforms(&c)
	for _, point := range s.f.Points {
		at, ok := place(s.f, point, tx, ty)
		if !ok {
			continue
		}
		style := draw.GlyphStyle{Color: ink, Radius: pointRadius, Shape: square{}}
		if point.Letter != 0 {
			style.Shape = square{hollow: true}
			for _, l := range s.lines {
				if l.Letter == point.Letter {
					style.Color = l.style.Color
				}
			}
		}
		bar := draw.LineStyle{Color: style.Color, Width: vg.Points(0.8)}
		low, high := end(s.f.Y, point.YLow, ty, at.Y, c.Min.Y), end(s.f.Y, point.YHigh, ty, at.Y, c.Max.Y)
		stroke(&c, bar, at, vg.Point{X: at.X, Y: low}, capRadius, 0)
		stroke(&c, bar, at, vg.Point{X: at.X, Y: high}, capRadius, 0)
		low, high = end(s.f.X, point.XLow, tx, at.X, c.Min.X), end(s.f.X, point.XHigh, tx, at.X, c.Max.X)
		stroke(&c, bar, at, vg.Point{X: low, Y: at.Y}, 0, capRadius)
		stroke(&c, bar, at, vg.Point{X: high, Y: at.Y}, 0, capRadius)
		if c.Contains(at) {
			c.DrawGlyphNoClip(style, at)
		}
	}
}

// place is where a point lies on the page; false if nowhere.
func place(f figure.Figure, p figure.Point, tx, ty func(float64) vg.Length) (vg.Point, bool) {
	if !drawable(f, p.X, p.Y) {
		return vg.Point{}, false
	}
	return vg.Point{X: tx(p.X), Y: ty(p.Y)}, true
}

// end is where a bar ends: at its point if there is no uncertainty, at the edge
// where it reaches to what the axis cannot show.
func end(a figure.Axis, v float64, t func(float64) vg.Length, at, edge vg.Length) vg.Length {
	switch {
	case math.IsNaN(v):
		return at
	case !placed(a, v):
		return edge
	}
	return t(v)
}

// stroke draws one half of a bar with its cap. What lies outside is cut off.
func stroke(c *draw.Canvas, style draw.LineStyle, from, to vg.Point, across, up vg.Length) {
	if from == to {
		return
	}
	away := vg.Point{X: across, Y: up}
	c.StrokeLines(style, c.ClipLinesXY([]vg.Point{from, to}, []vg.Point{to.Sub(away), to.Add(away)})...)
}

// square is the sign of a measured point: filled, or hollow for a held series.
type square struct{ hollow bool }

// DrawGlyph implements draw.GlyphDrawer.
func (q square) DrawGlyph(c *draw.Canvas, s draw.GlyphStyle, at vg.Point) {
	corners := polygon{{X: 1, Y: 1}, {X: -1, Y: 1}, {X: -1, Y: -1}, {X: 1, Y: -1}}
	corners.DrawGlyph(c, s, at)
	if q.hollow {
		corners.DrawGlyph(c, draw.GlyphStyle{Color: paper, Radius: 0.6 * s.Radius}, at)
	}
}

// around is the room that a point takes.
func (square) around(at vg.Point) vg.Rectangle {
	half := vg.Point{X: pointRadius, Y: pointRadius}
	return vg.Rectangle{Min: at.Sub(half), Max: at.Add(half)}
}

// measured is the line of the legend for measured points.
type measured struct{}

func (measured) inLegend(c *draw.Canvas, at vg.Point) {
	const middle, text = vg.Length(17), vg.Length(40)
	sign := draw.GlyphStyle{Color: ink, Radius: pointRadius, Shape: square{}}
	c.DrawGlyphNoClip(sign, vg.Point{X: at.X + middle, Y: at.Y + tickSize*0.35})
	c.FillText(textStyle(tickSize), vg.Point{X: at.X + text, Y: at.Y}, "measured")
}

// hasOwn reports whether there are points of the current series.
func hasOwn(all []figure.Point) bool {
	for _, p := range all {
		if p.Letter == 0 && math.Abs(p.X) < 1e100 && math.Abs(p.Y) < 1e100 {
			return true
		}
	}
	return false
}
