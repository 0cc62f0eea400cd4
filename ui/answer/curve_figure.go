package answer

import (
	"cmp"
	"math"
	"slices"

	"dropcrest/koehler"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

const (
	micro     = 1e6 // µm per m
	frameRows = 24  // any height: the table only takes the frame's width
)

// Shares of the dense line: the part that a frame of its own shows, and the tail
// that the frame of a larger held curve may show.
const (
	nearPoints = 320
	farPoints  = 80
)

// dense is the line of the picture: evenly spaced in the logarithm of u, the
// water per dry volume, because the curve is steep near the dry size in any
// other measure. It contains the extrema and the haze points.
func (c *curve) dense() []koehler.State {
	top := 1.0
	bottom := 1e-2
	if c.noCrest == nil {
		top = math.Max(top, c.crest.Water)
		bottom = math.Min(bottom, c.crest.Water/1e3)
	}
	for _, e := range c.extrema {
		top = math.Max(top, e.Water)
		if e.Water > 0 {
			bottom = math.Min(bottom, e.Water/10)
		}
	}
	for _, h := range c.haze {
		if h.Water > 0 {
			bottom = math.Min(bottom, h.Water/2)
		}
	}
	near, far := 1e3*top, 1e7*top                    // 10 and 200 times the crest's size
	if from := c.asked.FromRadius; from.Word == "" { // the frame may reach a decade beyond
		bottom, far = math.Min(bottom, c.waterAt(from.Number)), math.Max(far, c.waterAt(10*from.Number))
	}
	if to := c.asked.ToRadius; to.Word == "" {
		far = math.Max(far, c.waterAt(to.Number))
	}
	bottom = math.Max(bottom, leastShown)
	line := make([]koehler.State, 0, nearPoints+farPoints+len(c.extrema)+3)
	line = c.between(line, bottom, near, nearPoints)
	line = c.between(line[:nearPoints-1], near, far, farPoints+1)
	for _, e := range c.extrema {
		line = append(line, e.State)
	}
	for _, h := range c.haze {
		if h.isOnLine() {
			line = append(line, h.State)
		}
	}
	slices.SortStableFunc(line, bySize)
	return line
}

// leastShown is the least u of the line: the drop is the dry particle there.
const leastShown = 1e-9

// waterAt is u at a wet radius (m); radii below the dry one have the least that
// is shown.
func (c *curve) waterAt(radius float64) float64 {
	u := c.particle.At(math.Max(2*radius, c.particle.DryDiameter*(1+leastShown))).Water
	if math.IsNaN(u) { // a measured density that shrinks the drop
		return leastShown
	}
	return u
}

func bySize(a, b koehler.State) int { return cmp.Compare(a.WetDiameter, b.WetDiameter) }

// between appends n states from u = lo to u = hi.
func (c *curve) between(line []koehler.State, lo, hi float64, n int) []koehler.State {
	step := math.Pow(hi/lo, 1/float64(n-1))
	u := lo
	for range n {
		line = append(line, c.particle.AtWater(u))
		u *= step
	}
	return line
}

// sample is the curve at n wet radii from lo to hi (m), evenly spaced in their
// logarithm. Radii that are not larger than the dry one are left out.
func (c *curve) sample(lo, hi float64, n int) []koehler.State {
	lo = math.Max(lo, c.particle.DryDiameter/2*(1+1e-9))
	if !(hi > lo) || n < 1 {
		return nil
	}
	out := make([]koehler.State, 0, n)
	for i := range n {
		r := lo
		switch {
		case i == n-1 && n > 1:
			r = hi // to the last digit
		case i > 0:
			r = lo * math.Pow(hi/lo, float64(i)/float64(n-1))
		}
		out = append(out, c.particle.At(2*r))
	}
	return out
}

// figure is the picture: lines and marks.
func (c *curve) figure() figure.Figure {
	f := figure.Figure{
		Key: "curve", Title: "supersaturation, % against wet radius, µm",
		X: figure.Axis{Says: "wet radius", Unit: "µm", Log: true},
		Y: figure.Axis{Says: "supersaturation", Unit: "%"},
	}
	f.Lines = c.lines()
	f.Marks = c.marks()
	return f
}

// others are the two effects alone, along the line.
func (c *curve) others() []figure.Line {
	kelvin := figure.Line{Says: "Kelvin only", Dash: figure.Dotted}
	kelvin.X, kelvin.Y = coordinates(c.line, func(s koehler.State) float64 { return s.KelvinFactor - 1 })
	raoult := figure.Line{Says: "Raoult only", Dash: figure.Dotted, X: kelvin.X}
	_, raoult.Y = coordinates(c.line, func(s koehler.State) float64 { return s.WaterActivity - 1 })
	return []figure.Line{kelvin, raoult}
}

// CurveFrame is the frame for a picture of h rows, with the ends of the wet
// radius that the scenario asks for; figure.Fit says the rest. Where the one end
// that is asked for lies beyond the other, a decade is shown.
func CurveFrame(s scenario.Scenario, f figure.Figure, last figure.Frame, h int) (figure.Frame, bool) {
	fr, refitted := figure.Fit(f, last, h)
	if s.FromRadius.Word == "" {
		fr.XMin = s.FromRadius.Number * micro
	}
	if s.ToRadius.Word == "" {
		fr.XMax = s.ToRadius.Number * micro
	}
	switch {
	case fr.XMin < fr.XMax:
	case s.ToRadius.Word == "":
		fr.XMin = fr.XMax / 10
	default:
		fr.XMax = 10 * fr.XMin
	}
	return fr, refitted
}

// HeldLine is the line of an answer as a held curve, and the mark of its barrier,
// which is the first one.
func HeldLine(letter rune, a Answer) (figure.Line, []figure.Mark) {
	if len(a.Figures) == 0 || len(a.Figures[0].Lines) == 0 {
		return figure.Line{Letter: letter, Dash: figure.Dashed}, nil
	}
	line := a.Figures[0].Lines[0]
	line.Letter, line.Dash, line.Says = letter, figure.Dashed, "held "+string(letter)
	var marks []figure.Mark
	for _, m := range a.Figures[0].Marks {
		if m.Kind == figure.CrestMark {
			m.Letter = letter
			marks = append(marks, m)
			break
		}
	}
	return line, marks
}
