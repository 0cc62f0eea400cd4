package answer

import (
	"fmt"
	"math"
	"slices"

	"dropcrest/koehler"
	"dropcrest/ui/figure"
)

// marks are the marked points of the picture: the barrier, the other maxima, what
// the particle does once it has been dissolved, and the drop at the humidity
// looked at. The barrier comes first.
func (c *curve) marks() []figure.Mark {
	var marks []figure.Mark
	if c.noCrest == nil {
		marks = append(marks, markAt(figure.CrestMark, c.crest.State, percent(c.crest.Supersaturation)))
	}
	for _, e := range c.otherMaxima() {
		marks = append(marks, markAt(figure.PointMark, e.State, percent(e.Supersaturation)))
	}
	if c.hasTwin && !c.isDissolvedAtCrest() {
		marks = append(marks, markAt(figure.CrestMark, c.twinCrest.State, percent(c.twinCrest.Supersaturation)+" dissolved"))
	}
	for i := range c.haze {
		if m, ok := c.hazeMark(i); ok {
			marks = append(marks, m)
		}
	}
	return marks
}

func markAt(kind figure.MarkKind, s koehler.State, text string) figure.Mark {
	return figure.Mark{Kind: kind, X: s.WetDiameter / 2 * micro, Y: 100 * s.Supersaturation, Text: text}
}

// otherMaxima are the maxima that are not the barrier.
func (c *curve) otherMaxima() []koehler.Extremum {
	var out []koehler.Extremum
	for _, e := range c.extrema {
		if (e.Kind == koehler.Maximum || e.Kind == koehler.BoundaryMaximum) && e.WetDiameter != c.crest.WetDiameter {
			out = append(out, e)
		}
	}
	return out
}

// hazeMark marks a state at the humidity looked at; a dry particle only where
// that is what its history makes of it.
func (c *curve) hazeMark(i int) (figure.Mark, bool) {
	h := c.haze[i]
	at := " at " + humidity(c.asked.RelativeHumidity)
	radius := micrometres(h.WetDiameter / 2)
	switch h.branch {
	case "partly_dissolved":
		return figure.Mark{}, false // of no known size
	case "unstable":
		return markAt(figure.PointMark, h.State, "unstable "+radius), true
	case "dissolved":
		return markAt(figure.HazeMark, h.State, "haze "+radius+at+", dissolved"), true
	case "dry":
		return markAt(figure.HazeMark, h.State, "dry"+at), i == 0
	case "metastable":
		if i > 0 {
			return markAt(figure.PointMark, h.State, "supersaturated drop "+radius), true
		}
		return markAt(figure.HazeMark, h.State, "supersaturated drop "+radius+at), true
	}
	return markAt(figure.HazeMark, h.State, "haze "+radius+at), true
}

// isOnLine reports whether a state at the humidity looked at is one of the curve
// of the particle itself: not that of a crystal, nor that of its twin.
func (h hazeState) isOnLine() bool {
	return h.branch != "dissolved" && h.Water > 0 && !math.IsNaN(h.WetDiameter)
}

// lines are the curve and, where solubility is limited, that of the same particle
// once it has been dissolved.
func (c *curve) lines() []figure.Line {
	current := figure.Line{Crest: true}
	current.X, current.Y = coordinates(c.line, func(s koehler.State) float64 { return s.Supersaturation })
	for _, e := range c.extrema {
		current.Extrema = append(current.Extrema, e.WetDiameter/2*micro)
	}
	if !c.hasTwin {
		return []figure.Line{current}
	}
	twin := figure.Line{Says: "already dissolved", Dash: figure.Dotted, Crest: true,
		Extrema: []float64{c.twinCrest.WetDiameter / 2 * micro}}
	twin.X, twin.Y = coordinates(c.twinLine(), func(s koehler.State) float64 { return s.Supersaturation })
	return []figure.Line{current, twin}
}

// twinLine is the dense line of the twin over the same wet sizes.
func (c *curve) twinLine() []koehler.State {
	line := make([]koehler.State, 0, len(c.line)+2)
	for _, s := range c.line {
		if s.Water > 0 {
			line = append(line, c.twin.AtWater(s.Water))
		}
	}
	line = append(line, c.twinCrest.State)
	for _, h := range c.haze {
		if h.branch == "dissolved" {
			line = append(line, h.State)
		}
	}
	slices.SortStableFunc(line, bySize)
	return line
}

// coordinates of a dense line in shown units.
func coordinates(line []koehler.State, of func(koehler.State) float64) (x, y []float64) {
	x, y = make([]float64, len(line)), make([]float64, len(line))
	for i, s := range line {
		x[i], y[i] = s.WetDiameter/2*micro, 100*of(s)
	}
	return x, y
}

// maximaWords count the maxima of a curve in words.
func maximaWords(n int) string {
	words := []string{"no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine"}
	if n < len(words) {
		return words[n] + " maxima"
	}
	return fmt.Sprintf("%d maxima", n)
}
