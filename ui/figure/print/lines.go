package print

import (
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"dropcrest/ui/figure"
)

// Colours of Okabe and Ito (2002, jfly.uni-koeln.de/color) that reach a
// contrast of 3 to 1 on white: blue, vermillion, bluish green, reddish purple,
// and black. Orange, sky blue and yellow do not, so the fifth and sixth held
// line are black again; every line has its own dashes and its letter anyway.
var heldColours = [...]color.RGBA{
	{0x00, 0x72, 0xB2, 0xFF}, {0xD5, 0x5E, 0x00, 0xFF}, {0x00, 0x9E, 0x73, 0xFF},
	{0xCC, 0x79, 0xA7, 0xFF}, {0x00, 0x00, 0x00, 0xFF}, {0x00, 0x00, 0x00, 0xFF},
}

var otherColour = color.Gray{Y: 0x66}

// Dashes in points, on and off.
var (
	heldDashes  = [...][]vg.Length{{7, 3}, {4, 2.5}, {9, 2.5, 2, 2.5}, {2.5, 2.5}, {9, 2.5, 2, 2.5, 2, 2.5}, {12, 4}}
	otherDashes = [...][]vg.Length{{1, 2}, {1, 2, 4, 2}, {1, 4}}
)

// line is a figure's line with what tells it from the others.
type line struct {
	figure.Line
	x, y  figure.Axis
	style draw.LineStyle
	name  string
}

// linesOf gives every line its style: the current one first, as it stands in
// the legend.
func linesOf(f figure.Figure) []line {
	var lines []line
	held, other := 0, 0
	for _, dash := range []figure.Dash{figure.Solid, figure.Dashed, figure.Dotted} {
		for _, l := range f.Lines {
			if kindOf(l) != dash {
				continue
			}
			out := line{Line: l, x: f.X, y: f.Y, name: clean(l.Says)}
			switch dash {
			case figure.Solid:
				out.style = draw.LineStyle{Color: ink, Width: vg.Points(1.4)}
				if out.name == "" {
					out.name = "current"
				}
			case figure.Dashed:
				out.style = draw.LineStyle{Color: heldColours[held%6], Width: vg.Points(1.1), Dashes: heldDashes[held%6]}
				held++
			default:
				out.style = draw.LineStyle{Color: otherColour, Width: vg.Points(1), Dashes: otherDashes[other%3]}
				if out.name != "" { // without one it belongs to the next, as the two sides of a band
					other++
				}
			}
			if l.Letter != 0 {
				out.name = clean(string(l.Letter) + "  " + l.Says)
			}
			lines = append(lines, out)
		}
	}
	return lines
}

func kindOf(l figure.Line) figure.Dash {
	if l.Dash < figure.Solid || l.Dash > figure.Dotted {
		return figure.Dotted
	}
	return l.Dash
}

// drawable reports whether a point has a place on the page.
func drawable(f figure.Figure, x, y float64) bool { return placed(f.X, x) && placed(f.Y, y) }

// placed reports whether a value has a place on its axis. A logarithmic one ends
// above zero.
func placed(a figure.Axis, v float64) bool { return math.Abs(v) < 1e100 && (!a.Log || v > 1e-100) }

// runs is the line as pieces without gaps, in page coordinates. They may lie
// outside of the canvas.
func (l line) runs(c *draw.Canvas, p *plot.Plot) [][]vg.Point {
	var runs [][]vg.Point
	var run []vg.Point
	tx, ty := p.Transforms(c)
	for i := range min(len(l.X), len(l.Y)) {
		if !placed(l.x, l.X[i]) || !placed(l.y, l.Y[i]) {
			runs, run = keep(runs, run), nil
			continue
		}
		run = append(run, vg.Point{X: tx(l.X[i]), Y: ty(l.Y[i])})
	}
	return keep(runs, run)
}

func keep(runs [][]vg.Point, run []vg.Point) [][]vg.Point {
	if len(run) < 2 {
		return runs
	}
	return append(runs, run)
}

// Plot implements plot.Plotter.
func (l line) Plot(c draw.Canvas, p *plot.Plot) {
	c.StrokeLines(l.style, c.ClipLinesXY(l.runs(&c, p)...)...)
}

// inLegend draws a piece of the line and its name, from at on.
func (l line) inLegend(c *draw.Canvas, at vg.Point) {
	const piece = vg.Length(34)
	mid := at.Y + tickSize*0.35
	c.StrokeLine2(l.style, at.X, mid, at.X+piece, mid)
	c.FillText(textStyle(tickSize), vg.Point{X: at.X + piece + 6, Y: at.Y}, l.name)
}
