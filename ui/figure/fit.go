package figure

import "math"

// Shares of the frame's height between which the highest crest may wander
// before the frame is fitted anew.
const (
	lowestCrest  = 0.45
	highestCrest = 0.90
)

// Fit returns the frame for f in a picture of h rows: last if it still serves,
// a new one if not. It reports whether the frame was refitted.
//
// A new frame shows all extrema of the lines with Crest set, each of these
// lines from -0.5 times its crest on, a quarter of the height above the highest
// crest, and at least one decade of a logarithmic axis. One row is 1, 2, 2.5 or
// 5 times a power of ten, and zero lies on a row. The height h changes nothing
// but YStep and the rounding of YMin and YMax to it.
//
// A figure without such lines is one of data: its frame shows all lines and
// points, and stays until they leave it or use less than half of it. On a
// logarithmic Y axis a decade is a whole number of rows, or a row of decades, and
// of lines that fall towards zero four decades are shown.
//
// A figure of bars is seen through no frame: its frame is the zero Frame.
func Fit(f Figure, last Frame, h int) (Frame, bool) {
	if len(f.Bars) > 0 {
		return Frame{}, last != Frame{}
	}
	rows := pictureRows(h)
	n := needsOf(f)
	fresh := n.frame(rows)
	if !last.Suits(f) || !n.keepsAcross(last, fresh) {
		return fresh, last != fresh
	}
	if last.rows() != rows { // another height is no reason to shift sideways
		fresh.XMin, fresh.XMax = last.XMin, last.XMax
		return fresh, true
	}
	if !n.keepsUpright(last, fresh) {
		return fresh, true
	}
	return last, false
}

// pictureRows is the number of rows left for the lines in a picture of h rows.
// Two is the least in which a row can have a unit.
func pictureRows(h int) int { return max(h-2, 2) }

// Serves reports whether a picture can be drawn through the frame.
func (fr Frame) Serves() bool {
	return fr.XMin < fr.XMax && fr.YMin < fr.YMax && fr.YStep > 0 && (!fr.YLog || fr.YMin > 0) &&
		usable(fr.XMin) && usable(fr.XMax) && usable(fr.YMin) && usable(fr.YMax)
}

// Suits reports whether a figure can be drawn through the frame: logarithmic axes
// begin above zero. A figure of bars can be drawn through any, as it looks at none.
func (fr Frame) Suits(f Figure) bool {
	if len(f.Bars) > 0 {
		return true
	}
	return fr.Serves() && fr.YLog == f.Y.Log && (!f.X.Log || fr.XMin > 0)
}

// rows is the number of rows the frame was made for.
func (fr Frame) rows() int {
	n := math.Round(fr.row(fr.YMax)) + 1
	if !(n < 1e6) {
		return 0
	}
	return int(n)
}

// row is the row of y, not rounded: 0 for the lowest.
func (fr Frame) row(y float64) float64 {
	if !fr.YLog {
		return (y - fr.YMin) / fr.YStep
	}
	if y <= 0 {
		return math.Inf(-1)
	}
	return math.Log10(y/fr.YMin) / fr.YStep
}

// withRows is the frame for another number of rows: a round unit, zero on a
// row, and nothing of the old frame lost.
func (fr Frame) withRows(rows int) Frame {
	switch {
	case fr.rows() == rows:
	case fr.YLog:
		fr.YMin, fr.YMax, fr.YStep = logRows(fr.YMin, fr.YMax, rows)
	case fr.YMin > 0 || fr.YMax < 0:
		fr.YMin, fr.YMax, fr.YStep = freeRows(fr.YMin, fr.YMax, rows)
	default:
		fr.YMin, fr.YMax, fr.YStep = roundRows(fr.YMin, fr.YMax, rows)
	}
	return fr
}

// needs is what a figure asks of its frame.
type needs struct {
	log, ylog   bool
	free        bool    // zero need not be seen
	crested     bool    // there are lines with Crest set
	low, high   float64 // all extrema, each line from -0.5 times its crest
	deepest     float64 // the lowest that an old frame must still show
	crest       float64 // the highest crest
	entry, left float64 // where the first line comes in; where a new frame begins
	last        float64 // the last extremum
	end         float64 // the end of the lines
}

// needsOf collects what the lines with Crest set need; a figure without such
// lines needs room for everything.
func needsOf(f Figure) needs {
	n := needs{log: f.X.Log}
	found := false
	for _, l := range f.Lines {
		if !l.Crest || f.Y.Log {
			continue
		}
		if s, ok := shapeOf(l, f.X.Log); ok {
			n.add(s, !found)
			found = true
		}
	}
	if !found {
		return needsOfAll(f)
	}
	n.crested = true
	n.left = n.entry
	if !n.log {
		n.left -= 0.05 * (n.last - n.entry)
		return n
	}
	n.left /= 1.3
	for _, m := range f.Marks { // a haze mark near the entry gets its true place
		if x := m.X / 1.15; m.X > 0 && x > n.entry/2.5 {
			n.left = math.Min(n.left, x)
		}
	}
	return n
}

// add widens the needs by one line.
func (n *needs) add(s shape, first bool) {
	if first {
		n.low, n.high, n.deepest, n.crest = s.low, s.crest, s.bottom, s.crest
		n.entry, n.last, n.end = s.entry, s.last, s.end
	}
	n.low = math.Min(n.low, math.Min(s.low, s.bottom))
	n.high = math.Max(n.high, s.crest)
	n.crest = n.high
	n.deepest = math.Min(n.deepest, math.Min(s.bottom, 0.4*s.low))
	n.entry = math.Min(n.entry, s.entry)
	n.last = math.Max(n.last, s.last)
	n.end = math.Max(n.end, s.end)
}

// frame is the new frame of rows rows.
func (n needs) frame(rows int) Frame {
	var fr Frame
	fr.XMin, fr.XMax = n.across()
	if fr.YLog = n.ylog; n.ylog {
		fr.YMin, fr.YMax, fr.YStep = logRows(n.low, n.high, rows)
		return fr
	}
	if n.free {
		fr.YMin, fr.YMax, fr.YStep = freeRows(n.low, n.high, rows)
		return fr
	}
	low, high := math.Min(n.low, 0), math.Max(n.high, 0)
	if high-low < 1e-90 {
		low, high = -0.5, 1
	}
	if n.high > 0 && n.crested {
		high += 0.25 * (high - low)
	}
	fr.YMin, fr.YMax, fr.YStep = roundRows(low, high, rows)
	return fr
}

// across is the width of a new frame: from left to some way behind the last
// extremum, but not beyond the end of the lines.
func (n needs) across() (lo, hi float64) {
	lo = n.left
	if !n.log {
		if hi = n.end; n.crested {
			hi = math.Min(n.end, n.last+1.5*(n.last-n.entry))
		}
		if hi-lo <= 1e-9*math.Max(math.Abs(lo), math.Abs(hi)) {
			room := math.Max(1, math.Abs(lo)) / 2
			return lo - room, lo + room
		}
		return lo, hi
	}
	if hi = n.end; n.crested {
		hi = math.Min(n.end, 5*n.last)
	}
	if short := 10 * lo / hi; short > 1 {
		lo, hi = lo/math.Sqrt(short), hi*math.Sqrt(short)
	}
	return twoDigits(lo, math.Floor), twoDigits(hi, math.Ceil)
}

// keepsUpright reports whether the height of an old frame still serves.
func (n needs) keepsUpright(fr, fresh Frame) bool {
	if fr.YMin == fresh.YMin && fr.YMax == fresh.YMax {
		return true
	}
	if !n.crested {
		return n.keepsData(fr)
	}
	share := (n.crest - fr.YMin) / (fr.YMax - fr.YMin)
	return share >= lowestCrest && share <= highestCrest && n.deepest >= fr.YMin
}

// keepsAcross reports whether the width of an old frame still shows entry and
// tail without being much too wide.
func (n needs) keepsAcross(fr, fresh Frame) bool {
	if fr.XMin == fresh.XMin && fr.XMax == fresh.XMax {
		return true
	}
	if !n.crested {
		return n.keepsDataAcross(fr, fresh)
	}
	if fr.XMin > n.entry || fr.XMax < n.last {
		return false
	}
	if !n.log {
		return fr.XMax-fr.XMin <= 2.5*(fresh.XMax-fresh.XMin)
	}
	return fr.XMin > 0 && fr.XMax >= math.Min(fresh.XMax, 2*n.last) &&
		math.Log(fr.XMax/fr.XMin) <= 1.6*math.Log(fresh.XMax/fresh.XMin)
}
