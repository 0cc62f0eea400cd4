package figure

import (
	"math"
	"slices"
)

// usable leaves out what cannot be drawn: NaN, infinities, and numbers so large
// or small that arithmetic with them would end there.
func usable(v float64) bool { return math.Abs(v) < 1e100 }

func usableX(x float64, log bool) bool { return usable(x) && (!log || x > 1e-100) }

// usableY is narrower on a logarithmic axis, because frames are rounded to decades.
func usableY(y float64, log bool) bool { return usable(y) && (!log || y > 1e-60 && y < 1e60) }

// shape is what the frame needs to know of one line.
type shape struct {
	crest  float64 // highest extremum; the highest point of a line without extrema
	bottom float64 // lowest extremum
	low    float64 // from here on the line is shown
	entry  float64 // where it gets there
	last   float64 // the last extremum
	end    float64 // the last point
}

// shapeOf finds the turning points of a line. A turning point counts only if
// the line moves away from it by 0.2 % of the highest point: rounding noise in a
// flat tail is no extremum. It reports false for a line without usable points.
func shapeOf(l Line, log bool) (shape, bool) {
	var x, y []float64
	top := math.Inf(-1)
	for i := range min(len(l.X), len(l.Y)) {
		if usable(l.Y[i]) && usableX(l.X[i], log) {
			x, y = append(x, l.X[i]), append(y, l.Y[i])
			top = math.Max(top, l.Y[i])
		}
	}
	if len(x) == 0 {
		return shape{}, false
	}
	s := shape{crest: math.Inf(-1), bottom: math.Inf(1), end: x[len(x)-1]}
	first := -1
	for _, i := range l.turns(x, y, 0.002*math.Abs(top)) {
		if first < 0 {
			first = i
		}
		s.crest, s.bottom = math.Max(s.crest, y[i]), math.Min(s.bottom, y[i])
		s.last = x[i]
	}
	if first < 0 {
		for i := range y {
			if y[i] == top {
				first, s.crest, s.bottom, s.last = i, top, top, x[i]
			}
		}
	}
	s.low = -0.5 * s.crest
	if s.crest <= 0 {
		s.low = 1.5 * s.crest
	}
	s.entry = entryOf(x, y, first, s.low)
	return s, true
}

// turns returns the indices of the extrema of a line through x, y.
func (l Line) turns(x, y []float64, least float64) []int {
	var at []int
	for _, e := range l.Extrema {
		if i := slices.Index(x, e); i >= 0 {
			at = append(at, i)
		}
	}
	if len(at) > 0 {
		return at
	}
	return turns(y, least)
}

// entryOf is where the line, followed to the left from its first extremum,
// falls below low.
func entryOf(x, y []float64, first int, low float64) float64 {
	for i := first; i > 0; i-- {
		if y[i-1] < low && y[i] >= low {
			return x[i-1] + (x[i]-x[i-1])*(low-y[i-1])/(y[i]-y[i-1])
		}
	}
	return x[0]
}

// turns returns the indices of the turning points of y from which y moves away
// by more than least on both sides.
func turns(y []float64, least float64) []int {
	var at []int
	lo, hi, dir := 0, 0, 0
	for i, v := range y {
		if v > y[hi] {
			hi = i
		}
		if v < y[lo] {
			lo = i
		}
		switch {
		case dir <= 0 && v > y[lo]+least:
			if dir < 0 {
				at = append(at, lo)
			}
			dir, hi = 1, i
		case dir >= 0 && v < y[hi]-least:
			if dir > 0 {
				at = append(at, hi)
			}
			dir, lo = -1, i
		}
	}
	return at
}
