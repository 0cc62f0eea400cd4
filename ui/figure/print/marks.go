package print

import (
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"dropcrest/ui/figure"
)

const markRadius = vg.Length(3.2)

// marks draws the marks of a sheet, the letters of its held lines and their
// labels, each label where it covers least.
type marks struct{ *sheet }

// Plot implements plot.Plotter.
func (m marks) Plot(c draw.Canvas, p *plot.Plot) {
	b := board{c: &c}
	for _, l := range m.lines {
		b.cover(c.ClipLinesXY(l.runs(&c, p)...))
	}
	tx, ty := p.Transforms(&c)
	for _, point := range m.f.Points {
		if at, ok := place(m.f, point, tx, ty); ok && c.Contains(at) {
			b.taken = append(b.taken, square{}.around(at))
		}
	}
	var labels []label
	lettered := map[rune]bool{}
	for _, mark := range m.f.Marks {
		if !drawable(m.f, mark.X, mark.Y) {
			continue
		}
		at := vg.Point{X: tx(mark.X), Y: ty(mark.Y)}
		labels = append(labels, b.mark(m.f, mark, at))
		lettered[mark.Letter] = lettered[mark.Letter] || mark.Kind == figure.CrestMark && c.Contains(at)
	}
	for _, l := range m.lines {
		if l.Letter != 0 && !lettered[l.Letter] {
			style := textStyle(labelSize)
			style.Color = l.style.Color
			b.letter(clean(string(l.Letter)), style, c.ClipLinesXY(l.runs(&c, p)...))
		}
	}
	for _, l := range labels {
		b.label(l)
	}
	for _, l := range m.lines {
		if l.AtEnd && l.Says != "" {
			b.nameAtEnd(l, c.ClipLinesXY(l.runs(&c, p)...))
		}
	}
}

// nameAtEnd writes the name of a line beside its last point on the page.
func (b *board) nameAtEnd(l line, runs [][]vg.Point) {
	if len(runs) == 0 {
		return
	}
	run := runs[len(runs)-1]
	style := textStyle(tickSize)
	style.Color = l.style.Color
	b.label(label{run[len(run)-1], l.name, style})
}

// label is a text that belongs to a point.
type label struct {
	at    vg.Point
	text  string
	style text.Style
}

// mark draws one mark, at the edge as an arrow if it lies outside, and returns
// its label.
func (b *board) mark(f figure.Figure, mark figure.Mark, at vg.Point) label {
	c := b.c
	text := f.Says(mark)
	if mark.Kind == figure.PointMark && mark.Text == "" {
		text = "" // many of them are data, their values stand in the table
	}
	if mark.Letter != 0 {
		text = string(mark.Letter) + ": " + text
	}
	in := vg.Point{
		X: vg.Length(math.Max(float64(c.Min.X+markRadius), math.Min(float64(at.X), float64(c.Max.X-markRadius)))),
		Y: vg.Length(math.Max(float64(c.Min.Y+markRadius), math.Min(float64(at.Y), float64(c.Max.Y-markRadius)))),
	}
	style := draw.GlyphStyle{Color: ink, Radius: markRadius, Shape: shapeOf(mark.Kind)}
	if !c.Contains(at) {
		style.Shape = arrow{dx: c.Min.X - at.X, dy: c.Min.Y - at.Y, w: c.Max.X - c.Min.X, h: c.Max.Y - c.Min.Y}
		at = in
	}
	c.DrawGlyphNoClip(style, at)
	b.taken = append(b.taken, style.Rectangle().Add(at))
	return label{at, clean(text), textStyle(tickSize)}
}

func shapeOf(k figure.MarkKind) draw.GlyphDrawer {
	switch k {
	case figure.CrestMark:
		return diamond{}
	case figure.HazeMark:
		return triangle(0, -1)
	}
	return draw.CircleGlyph{}
}

// polygon is a filled shape given by its corners in radii.
type polygon []vg.Point

// DrawGlyph implements draw.GlyphDrawer.
func (g polygon) DrawGlyph(c *draw.Canvas, s draw.GlyphStyle, at vg.Point) {
	var corners []vg.Point
	for _, p := range g {
		corners = append(corners, vg.Point{X: at.X + p.X*s.Radius, Y: at.Y + p.Y*s.Radius})
	}
	c.FillPolygon(s.Color, corners)
}

// triangle points into the direction dx, dy of length one.
func triangle(dx, dy vg.Length) polygon {
	return polygon{{X: dx, Y: dy}, {X: -dx - dy, Y: -dy + dx}, {X: -dx + dy, Y: -dy - dx}}
}

// diamond is the crest's mark.
type diamond struct{}

// DrawGlyph implements draw.GlyphDrawer.
func (diamond) DrawGlyph(c *draw.Canvas, s draw.GlyphStyle, at vg.Point) {
	polygon{{X: 1.2}, {Y: 1.2}, {X: -1.2}, {Y: -1.2}}.DrawGlyph(c, s, at)
}

// arrow points out of the frame. It knows how far left and below of the frame
// the mark is, and how wide and high the frame.
type arrow struct{ dx, dy, w, h vg.Length }

// DrawGlyph implements draw.GlyphDrawer.
func (a arrow) DrawGlyph(c *draw.Canvas, s draw.GlyphStyle, at vg.Point) {
	switch {
	case a.dy > 0:
		triangle(0, -1).DrawGlyph(c, s, at)
	case -a.dy > a.h:
		triangle(0, 1).DrawGlyph(c, s, at)
	case a.dx > 0:
		triangle(-1, 0).DrawGlyph(c, s, at)
	default:
		triangle(1, 0).DrawGlyph(c, s, at)
	}
}
