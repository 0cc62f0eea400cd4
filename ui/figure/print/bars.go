package print

import (
	"image/color"
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"dropcrest/ui/figure"
)

// Sizes in a picture of bars.
const (
	barRow     = 0.65 * vg.Centimeter // from bar to bar, about
	barPart    = 0.6                  // of that is the bar
	aroundBars = 1.7 * vg.Centimeter  // title, axis, and its labels
	columnGap  = 0.25 * vg.Centimeter
	leastBar   = vg.Length(1.5) // or it would vanish in the line of zero
	titleGap   = vg.Length(6)
	chosenSign = vg.Length(2.6) // radius
	// widestNames is the share of the width that names and values may take.
	widestNames = 0.6
)

// The greys of bars. The chosen one has a mark before its name as well.
var (
	barColour    = color.Gray{Y: 0x80}
	chosenColour = ink
)

func heightOfBars(n int) vg.Length { return vg.Length(n)*barRow + aroundBars }

// drawBars draws title, names and values at the left, and the bars. The title
// stands over all of it, so that it is not left to the plot.
func (s *sheet) drawBars(picture draw.Canvas) {
	style := textStyle(titleSize)
	if title := clean(s.f.Title); title != "" {
		style.XAlign, style.YAlign = draw.XCenter, draw.YTop
		picture.FillText(style, vg.Point{X: picture.Center().X, Y: picture.Max.Y}, title)
		picture.Max.Y -= style.Rectangle(title).Size().Y + titleGap
	}
	b := newBars(s.f, picture)
	right := draw.Crop(picture, b.value-picture.Min.X+columnGap, 0, 0, 0)
	p := b.plot()
	if l := p.X.Label; l.TextStyle.Width(l.Text) > right.Size().X {
		p.X.Label.Position = draw.PosRight // it goes on to the left, where there is room
	}
	p.Draw(right)
}

// bars draws a figure of bars, the first at the top.
type bars struct {
	f             figure.Figure
	lo, hi        float64
	style         text.Style
	names, values []string
	name          vg.Length // where names begin
	value         vg.Length // where values end
}

func newBars(f figure.Figure, picture draw.Canvas) bars {
	b := bars{f: f, style: textStyle(tickSize)}
	b.lo, b.hi = rangeOf(f.Bars)
	var name, value vg.Length
	most := widestNames * picture.Size().X
	for _, bar := range f.Bars {
		says := cutTo(clean(bar.Text), b.style, most/3)
		b.values = append(b.values, says)
		value = max(value, b.style.Width(says))
	}
	for _, bar := range f.Bars {
		says := cutTo(clean(bar.Says), b.style, most-value)
		b.names = append(b.names, says)
		name = max(name, b.style.Width(says))
	}
	b.name = picture.Min.X + 2*chosenSign + columnGap/2
	b.value = b.name + name + columnGap + value
	return b
}

// rangeOf is what the axis shows: zero, all bars, and some room beyond the
// longest.
func rangeOf(all []figure.Bar) (lo, hi float64) {
	const beyond = 1.05
	for _, bar := range all {
		if bar.Drawable() {
			lo, hi = math.Min(lo, beyond*bar.Value), math.Max(hi, beyond*bar.Value)
		}
	}
	if hi-lo < 1e-90 {
		return 0, 1
	}
	return lo, hi
}

// plot is the picture of the bars with the axis of their values. Bars lie at the
// heights n to 1.
func (b bars) plot() *plot.Plot {
	p := plot.New()
	p.BackgroundColor = nil
	says := b.f.X
	says.Log, says.Time = false, false // bars begin at zero
	axis(&p.X, says, b.lo, b.hi, 8)
	p.HideY()
	p.Y.Padding = 0
	p.Y.Min, p.Y.Max = 0.5, float64(len(b.f.Bars))+0.5
	p.Add(b, frame{})
	return p
}

// Plot implements plot.Plotter. Names and values stand left of the canvas.
func (b bars) Plot(c draw.Canvas, p *plot.Plot) {
	tx, ty := p.Transforms(&c)
	zero := tx(0)
	half := (ty(1) - ty(0)) * barPart / 2
	for i, bar := range b.f.Bars {
		y := ty(float64(len(b.f.Bars) - i))
		b.label(&c, i, y)
		if !bar.Drawable() || bar.Value == 0 {
			continue
		}
		colour := barColour
		if bar.Chosen {
			colour = chosenColour
		}
		end := max(tx(bar.Value), zero+leastBar)
		if bar.Value < 0 {
			end = min(tx(bar.Value), zero-leastBar)
		}
		c.FillPolygon(colour, []vg.Point{{X: zero, Y: y - half}, {X: end, Y: y - half}, {X: end, Y: y + half}, {X: zero, Y: y + half}})
	}
	c.StrokeLine2(draw.LineStyle{Color: ink, Width: vg.Points(0.8)}, zero, c.Min.Y, zero, c.Max.Y)
}

// label writes the name and the value of a bar, and the sign of a chosen one.
func (b bars) label(c *draw.Canvas, i int, y vg.Length) {
	style, base := b.style, y-tickSize*0.35
	c.FillText(style, vg.Point{X: b.name, Y: base}, b.names[i])
	style.XAlign = draw.XRight
	c.FillText(style, vg.Point{X: b.value, Y: base}, b.values[i])
	if b.f.Bars[i].Chosen {
		sign := draw.GlyphStyle{Color: ink, Radius: chosenSign, Shape: triangle(1, 0)}
		c.DrawGlyphNoClip(sign, vg.Point{X: b.name - columnGap/2 - chosenSign, Y: y})
	}
}

// cutTo is a text no wider than width; dots show where some of it is missing.
func cutTo(s string, style text.Style, width vg.Length) string {
	if style.Width(s) <= width {
		return s
	}
	for runes := []rune(s); len(runes) > 0; runes = runes[:len(runes)-1] {
		if cut := string(runes) + "…"; style.Width(cut) <= width {
			return cut
		}
	}
	return "…"
}
