package answer

import (
	"math"
	"time"

	"dropcrest/ui/figure"
)

// mostTimes is how many points a closure over time has at most: more than columns
// of a terminal or millimetres of a page.
const mostTimes = 512

// timeline is the closure ratio over time in constant memory: windows of equal
// length that double where there would be too many of them.
type timeline struct {
	start time.Time
	width time.Duration
	cells []timeCell
}

// timeCell is one window: ln of predicted over measured.
type timeCell struct {
	sum float64
	n   int
}

// add takes the ratio of one point. Records come in the order of time.
func (t *timeline) add(at time.Time, length time.Duration, ratio float64) {
	if !(ratio > 0) || math.IsInf(ratio, 1) {
		return
	}
	if t.cells == nil {
		t.start, t.width = at, max(length, time.Second)
	}
	i := int(at.Sub(t.start) / t.width)
	if i < 0 {
		return // out of order
	}
	for ; i >= mostTimes; i = int(at.Sub(t.start) / t.width) {
		t.halve()
	}
	for len(t.cells) <= i {
		t.cells = append(t.cells, timeCell{})
	}
	t.cells[i].sum += math.Log(ratio)
	t.cells[i].n++
}

// halve puts two windows into one.
func (t *timeline) halve() {
	t.width *= 2
	half := t.cells[:0]
	for i := 0; i < len(t.cells); i += 2 {
		c := t.cells[i]
		if i+1 < len(t.cells) {
			c.sum += t.cells[i+1].sum
			c.n += t.cells[i+1].n
		}
		half = append(half, c)
	}
	t.cells = half
}

// ratio is the geometric mean of a window, NaN where nothing was compared.
func (c timeCell) ratio() float64 {
	if c.n == 0 {
		return math.NaN()
	}
	return math.Exp(c.sum / float64(c.n))
}

// middle is the middle of window i in seconds since 1970.
func (t *timeline) middle(i int) float64 {
	return float64(t.start.Unix()) + (float64(i)+0.5)*t.width.Seconds()
}

// timesFigure is predicted over measured against time.
func (a *activated) timesFigure() figure.Figure {
	t := a.times
	f := figure.Figure{
		Key: "closure", Title: "predicted over measured against time, UTC",
		X: figure.Axis{Says: "time", Unit: "UTC", Time: true},
		Y: figure.Axis{Says: "predicted over measured", Free: true},
	}
	line, one := figure.Line{}, figure.Line{Says: "1", Dash: figure.Dotted}
	for i, c := range t.cells {
		x := t.middle(i)
		line.X, line.Y = append(line.X, x), append(line.Y, c.ratio())
		one.X, one.Y = append(one.X, x), append(one.Y, 1)
	}
	f.Lines = []figure.Line{line, one}
	return f
}
