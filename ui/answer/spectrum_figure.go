package answer

import (
	"math"
	"slices"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/figure"
)

const (
	nano     = 1e9  // nm per m
	perCubic = 1e-6 // 1/cm³ per 1/m³
	// linePoints make a smooth line at any width of a terminal or a page.
	linePoints = 120
	// sizePoints are those of a size distribution of modes.
	sizePoints = 240
)

// figures are the spectrum, the size distribution and, of several records, the
// closure over time.
func (a *activated) figures() ([]figure.Figure, error) {
	counts, err := a.countsFigure()
	if err != nil {
		return nil, err
	}
	out := []figure.Figure{counts}
	if a.sizes != nil {
		out = append(out, a.sizesFigure())
	}
	if a.times != nil {
		out = append(out, a.timesFigure())
	}
	return out, nil
}

// countsFigure is CCN against supersaturation: the prediction first, then the fit,
// and what was measured.
func (a *activated) countsFigure() (figure.Figure, error) {
	log := a.asked.Axes == "log"
	f := figure.Figure{
		Key: "spectrum", Title: "CCN, 1/cm³ against supersaturation, %",
		X: figure.Axis{Says: "supersaturation", Unit: "%", Log: log},
		Y: figure.Axis{Says: "CCN", Unit: "1/cm³", Log: log},
	}
	low, high := a.reach()
	n := linePoints
	if a.isSlow() {
		n = otherPoints
	}
	s := spaced(low, high, n)
	switch {
	case a.mean.X != nil:
		f.Lines = append(f.Lines, a.mean)
	case a.population != nil:
		line, err := a.line(s, a.population)
		if err != nil {
			return f, err
		}
		f.Lines = append(f.Lines, line)
	}
	for _, x := range a.fits {
		if x.noFit == nil {
			f.Lines = append(f.Lines, x.line(low, high))
		}
	}
	for _, m := range a.measured {
		if m.count >= 0 && !m.isBetween {
			f.Points = append(f.Points, m.point())
		}
	}
	return f, nil
}

// isSlow reports whether each count takes long: an integral over κ, or a film.
func (a *activated) isSlow() bool {
	return len(a.asked.Szyszkowski) > 0 || a.asked.KappaSpread > 1 && slices.ContainsFunc(a.groups, func(g composed) bool { return !g.isOne })
}

// reach is what is shown of the supersaturations: all that were asked for or
// measured, and a little more.
func (a *activated) reach() (low, high float64) {
	low, high = math.Inf(1), 0
	for _, p := range a.predicted {
		low, high = math.Min(low, p.s), math.Max(high, p.s)
	}
	for _, m := range a.measured {
		low, high = math.Min(low, m.s), math.Max(high, m.s)
	}
	const more = 1.5
	return low / more, high * more
}

// spaced are n numbers from lo to hi, evenly spaced in their logarithm.
func spaced(lo, hi float64, n int) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = lo * math.Pow(hi/lo, float64(i)/float64(n-1))
	}
	return out
}

func (a *activated) line(s []float64, p spectrum.Population) (figure.Line, error) {
	n, err := p.Counts(make([]float64, 0, len(s)), s)
	line := figure.Line{X: make([]float64, len(s)), Y: n}
	for i := range s {
		line.X[i] = 100 * s[i]
		if line.Y[i] *= perCubic; !(line.Y[i] > 0) {
			line.Y[i] = math.NaN() // nothing activates there
		}
	}
	return line, err
}

// line of a fit, where it was fitted.
func (f fitted) line(low, high float64) figure.Line {
	line := figure.Line{Says: formWords(f.form), Dash: figure.Dotted}
	for _, s := range spaced(math.Max(low, f.Low), math.Min(high, f.High), linePoints) {
		line.X, line.Y = append(line.X, 100*s), append(line.Y, f.Form.Count(s)*perCubic)
	}
	return line
}

func (m measurement) point() figure.Point {
	gap := math.NaN()
	p := figure.Point{X: 100 * m.s, Y: m.count * perCubic, XLow: gap, XHigh: gap, YLow: gap, YHigh: gap}
	if m.uncertainty > 0 {
		p.YLow, p.YHigh = (m.count-m.uncertainty)*perCubic, (m.count+m.uncertainty)*perCubic
	}
	return p
}

// sizesFigure is the size distribution with the critical diameters.
func (a *activated) sizesFigure() figure.Figure {
	f := figure.Figure{
		Key: "sizes", Title: "dN/dlog D, 1/cm³ against dry diameter, nm",
		X: figure.Axis{Says: "dry diameter", Unit: "nm", Log: true},
		Y: figure.Axis{Says: "dN/dlog D", Unit: "1/cm³"},
	}
	line := figure.Line{}
	for _, d := range a.diameters() {
		line.X, line.Y = append(line.X, d*nano), append(line.Y, a.density(d))
	}
	f.Lines = []figure.Line{line}
	for _, p := range a.predicted {
		if !math.IsNaN(p.critical) {
			f.Marks = append(f.Marks, figure.Mark{Kind: figure.PointMark, X: p.critical * nano, Y: a.density(p.critical),
				Text: levelWords(p.s) + " %"})
		}
	}
	return f
}

// density is dN/dlog10 D at d (m) in 1/cm³.
func (a *activated) density(d float64) float64 { return a.sizes.Density(d) * math.Ln10 * perCubic }

// diameters (m) of the line: midpoints of bins, or all that modes reach.
func (a *activated) diameters() []float64 {
	if a.bins != nil {
		grid := a.bins.Grid()
		out := make([]float64, grid.Len())
		for i := range out {
			out[i] = grid.Midpoint(i)
		}
		return out
	}
	lo, hi := math.Inf(1), 0.0
	var out []float64
	for _, m := range a.asked.Modes {
		const widths = 3 // of a mode: 0.3 % of it lies beyond
		w := math.Pow(m.GSD, widths)
		lo, hi = math.Min(lo, m.Median/w), math.Max(hi, m.Median*w)
		out = append(out, m.Median)
	}
	out = append(out, spaced(lo, hi, sizePoints)...)
	slices.Sort(out)
	return out
}
