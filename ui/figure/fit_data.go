package figure

import "math"

// What a picture of data asks of its frame.

// leastUse is the share of an old frame that data must use for it to stay.
const leastUse = 0.5

// fallen is how far below the highest value a line is still shown on a
// logarithmic axis: an error function falls through any number of decades.
const fallen = 1e-4

// extent is the smallest interval that holds some numbers.
type extent struct {
	lo, hi float64
	some   bool
}

func (e *extent) add(v float64) {
	if !e.some {
		*e = extent{v, v, true}
	}
	e.lo, e.hi = math.Min(e.lo, v), math.Max(e.hi, v)
}

// needsOfAll is the room for every usable point of the lines and every measured
// one with its uncertainty; for the marks where there is nothing else.
func needsOfAll(f Figure) needs {
	var x, lines, points extent
	line := func(px, py float64) {
		if usableX(px, f.X.Log) && usableY(py, f.Y.Log) {
			x.add(px)
			lines.add(py)
		}
	}
	for _, l := range f.Lines {
		for i := range min(len(l.X), len(l.Y)) {
			line(l.X[i], l.Y[i])
		}
	}
	for _, p := range f.Points {
		if !usableX(p.X, f.X.Log) || !usableY(p.Y, f.Y.Log) {
			continue
		}
		for _, v := range []float64{p.X, p.XLow, p.XHigh} {
			if usableX(v, f.X.Log) {
				x.add(v)
			}
		}
		for _, v := range []float64{p.Y, p.YLow, p.YHigh} {
			tooLow := f.Y.Log && v < p.Y/10 // a bar that reaches zero would take all the room
			if usableY(v, f.Y.Log) && !tooLow {
				points.add(v)
			}
		}
	}
	if !x.some {
		for _, m := range f.Marks {
			line(m.X, m.Y)
		}
	}
	return dataNeeds(f, x, lines, points)
}

// dataNeeds makes needs of the extents of lines and points.
func dataNeeds(f Figure, x, lines, points extent) needs {
	n := needs{log: f.X.Log, ylog: f.Y.Log, free: f.Y.Free && !f.Y.Log}
	switch {
	case !x.some && f.X.Time:
		x = extent{0, hour, true}
	case !x.some:
		x = extent{0.1, 1, true}
	}
	if lines.some && n.ylog {
		top := lines.hi
		if points.some {
			top = math.Max(top, points.hi)
		}
		lines.lo = math.Min(math.Max(lines.lo, fallen*top), lines.hi)
	}
	y := lines
	if points.some {
		y.add(points.lo)
		y.add(points.hi)
	}
	if !y.some {
		y = extent{0, 1, true}
		if n.ylog {
			y.lo = 0.1
		}
	}
	n.left, n.end, n.low, n.high = x.lo, x.hi, y.lo, y.hi
	n.crest, n.deepest, n.entry, n.last = n.high, n.low, n.left, n.end
	return n
}

// keepsData reports whether the height of an old frame still serves data.
func (n needs) keepsData(fr Frame) bool {
	const least = 1e-9 // rounding
	if n.ylog {
		used := math.Max(math.Log10(n.high/n.low), 1)
		return n.low >= fr.YMin*(1-least) && n.high <= fr.YMax*(1+least) && used >= leastUse*math.Log10(fr.YMax/fr.YMin)-least
	}
	used := math.Max(n.high, 0) - math.Min(n.low, 0)
	if n.free {
		used = n.high - n.low
	}
	return n.low >= fr.YMin && n.high <= fr.YMax && used >= leastUse*(fr.YMax-fr.YMin)*(1-least)
}

// keepsDataAcross reports whether the width of an old frame still serves data.
func (n needs) keepsDataAcross(fr, fresh Frame) bool {
	if fr.XMin > n.left || fr.XMax < n.end {
		return false
	}
	if n.log {
		return fr.XMin > 0 && math.Log(fresh.XMax/fresh.XMin) >= leastUse*math.Log(fr.XMax/fr.XMin)
	}
	return fresh.XMax-fresh.XMin >= leastUse*(fr.XMax-fr.XMin)
}

// logRows lays rows rows over low..high of a logarithmic axis: a decade is a
// whole number of rows or a row a whole number of decades, the powers of ten lie
// on rows, and there is at least one decade.
func logRows(low, high float64, rows int) (lo, hi, step float64) {
	if !(low > 0) || !(high >= low) {
		low, high = 0.1, 1
	}
	if short := 10 * low / high; short > 1 {
		low, high = low/math.Sqrt(short), high*math.Sqrt(short)
	}
	steps := float64(rows - 1)
	from, to := math.Log10(low), math.Log10(high)
	try := func(step float64) bool {
		first := math.Floor(from/step + 1e-9)
		lo, hi = tenTo(first*step), tenTo((first+steps)*step)
		return (first+steps)*step >= to-1e-9
	}
	for n := math.Floor(steps/(to-from) + 1e-9); n >= 1; n-- {
		if try(1 / n) {
			return lo, hi, 1 / n
		}
	}
	for n := 1.0; n < mostDecades; n++ {
		if try(n) {
			return lo, hi, n
		}
	}
	return low, high, (to - from) / steps // two rows, and one on each side of 1
}

// mostDecades is more than any two numbers that can be shown lie apart.
const mostDecades = 150

// tenTo is ten to the power of v, exactly where v is whole.
func tenTo(v float64) float64 {
	if n := math.Round(v); math.Abs(v-n) < 1e-9 {
		return math.Pow10(int(n))
	}
	return math.Pow(10, v)
}
