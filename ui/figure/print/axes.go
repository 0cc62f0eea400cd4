package print

import (
	"image/color"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"

	"dropcrest/ui/figure"
	"dropcrest/ui/plain"
)

var (
	paper = color.Gray{Y: 255}
	ink   = color.Gray{Y: 0}
	faint = color.Gray{Y: 170}
)

// Sizes of letters and lines of text.
const (
	titleSize  = vg.Length(10)
	labelSize  = vg.Length(9)
	tickSize   = vg.Length(8)
	noteSize   = vg.Length(7.5)
	legendLine = vg.Length(12)
	noteLine   = vg.Length(10)

	smallNoteSize = vg.Length(6.5)
	smallNoteLine = vg.Length(8.5)
)

func typeface(size vg.Length) font.Font {
	return font.Font{Typeface: "Liberation", Variant: "Sans", Size: size}
}

func textStyle(size vg.Length) text.Style {
	return text.Style{Color: ink, Font: typeface(size), Handler: plot.DefaultTextHandler}
}

// clean makes text from files safe and gives it one line. The typeface has no
// raised minus sign, so that per cubic centimetre is written with a stroke.
func clean(s string) string { return raised.Replace(plain.Clean(s)) }

var raised = strings.NewReplacer("cm⁻³", "1/cm³", "m⁻³", "1/m³", "⁻", "-")

// axis sets one axis up for the frame, with our own ticks.
func axis(a *plot.Axis, says figure.Axis, lo, hi float64, most int) {
	a.Min, a.Max = lo, hi
	a.Padding = 0
	a.Width = 0 // the frame draws all four sides
	a.Tick.Width = vg.Points(0.6)
	a.Tick.Length = vg.Points(5)
	a.Tick.Label.Font = typeface(tickSize)
	a.Tick.Marker = ticker{axis: says, most: most}
	a.Label.TextStyle.Font = typeface(labelSize)
	a.Label.Padding = vg.Points(3)
	a.Label.Text = clean(says.Says)
	if says.Unit != "" {
		a.Label.Text = strings.TrimPrefix(a.Label.Text+", "+clean(says.Unit), ", ")
	}
	if says.Log {
		a.Scale = plot.LogScale{}
	}
}

// ticker puts round labels on an axis. The one for logarithms that comes with
// the plot package labels powers of ten alone, of which a frame of one and a
// half decades may hold a single one.
type ticker struct {
	axis figure.Axis
	most int
}

// Ticks implements plot.Ticker.
func (t ticker) Ticks(lo, hi float64) []plot.Tick {
	var ticks []plot.Tick
	for _, at := range t.axis.Ticks(lo, hi, t.most) {
		label := at.Label
		if !t.axis.Time {
			label = tickLabel(at.Value)
		}
		ticks = append(ticks, plot.Tick{Value: at.Value, Label: label})
	}
	if t.axis.Log {
		ticks = append(ticks, minor(lo, hi, ticks)...)
	}
	return ticks
}

// minor is the unlabelled multiples of the powers of ten; none where there
// are more than four decades.
func minor(lo, hi float64, major []plot.Tick) []plot.Tick {
	var ticks []plot.Tick
	if !(lo > 0) || hi/lo > 1e4 {
		return nil
	}
	for n := math.Floor(math.Log10(lo)); n <= math.Log10(hi); n++ {
		for d := 1.0; d < 10; d++ {
			v := d * math.Pow(10, n)
			known := false
			for _, m := range major {
				known = known || math.Abs(v/m.Value-1) < 1e-9
			}
			if !known && v >= lo && v <= hi {
				ticks = append(ticks, plot.Tick{Value: v})
			}
		}
	}
	return ticks
}

// tickLabel writes numbers out where a reader can still count the zeros, and
// with a real minus sign.
func tickLabel(v float64) string {
	s := figure.TickLabel(v)
	if a := math.Abs(v); a >= 0.9e-4 && a < 1.1e6 {
		s = strconv.FormatFloat(v, 'f', -1, 64)
	}
	return strings.ReplaceAll(s, "-", "−")
}

// frame closes the picture on all four sides and draws the zero line.
type frame struct{ zero bool }

// Plot implements plot.Plotter.
func (fr frame) Plot(c draw.Canvas, p *plot.Plot) {
	if fr.zero {
		_, y := p.Transforms(&c)
		c.StrokeLine2(draw.LineStyle{Color: faint, Width: vg.Points(0.6)}, c.Min.X, y(0), c.Max.X, y(0))
	}
	side := draw.LineStyle{Color: ink, Width: vg.Points(0.8)}
	c.StrokeLines(side, []vg.Point{c.Min, {X: c.Min.X, Y: c.Max.Y}, c.Max, {X: c.Max.X, Y: c.Min.Y}, c.Min, {X: c.Min.X, Y: c.Max.Y}})
}

// wrap breaks text at blanks into lines no wider than width.
func wrap(s string, style text.Style, width vg.Length) []string {
	var lines []string
	now := ""
	for _, word := range strings.Fields(clean(s)) {
		longer := word
		if now != "" {
			longer = now + " " + word
		}
		if now != "" && style.Width(longer) > width {
			lines = append(lines, now)
			longer = word
		}
		now = longer
	}
	if now != "" {
		lines = append(lines, now)
	}
	return lines
}
