package figure

import (
	"math"
	"unicode/utf8"

	"github.com/guptarohit/asciigraph"
)

// path is one line in columns: the row in each column, NaN where the line is
// not in the frame.
type path []float64

// lines draws all lines, the other ones first, the current one last and so on
// top, and returns their paths.
func (c *canvas) lines(lines []Line) []path {
	paths := make([]path, len(lines))
	if c.cols == 0 {
		return paths
	}
	layer := make([]rune, c.cols*c.rows)
	for _, dash := range []Dash{Dotted, Dashed, Solid} {
		for i, l := range lines {
			if kindOf(l) != dash {
				continue
			}
			if p := c.sample(l); c.clip(p) {
				c.draw(p, dash, layer)
				paths[i] = p
			}
		}
	}
	return paths
}

// kindOf is the line's dash, or dotted for one nobody knows.
func kindOf(l Line) Dash {
	if l.Dash < Solid || l.Dash > Dotted {
		return Dotted
	}
	return l.Dash
}

// roleOf is the role of a line's cells.
func roleOf(d Dash) Role {
	return [3]Role{Solid: CurrentRole, Dashed: HeldRole, Dotted: OtherRole}[d]
}

// sample brings a line to one row position a column. Columns are read at their
// middle, but one with a maximum in it shows the maximum, else its minimum, so
// that the narrowest crest is on the picture. Gaps are NaN.
func (c *canvas) sample(l Line) path {
	p := make(path, c.cols)
	for i := range p {
		p[i] = math.NaN()
	}
	n := min(len(l.X), len(l.Y))
	var u0, r0 float64 // the point before
	joined := false    // is there one
	for i := range n {
		if !c.drawable(l.X[i], l.Y[i]) {
			joined = false
			continue
		}
		u, r := c.col(l.X[i]), c.row(l.Y[i])
		if joined {
			p.join(u0, r0, u, r)
		}
		if last := i+1 == n || !usableY(l.Y[i+1], c.fr.YLog); !joined || last {
			p.end(u, r)
		}
		u0, r0, joined = u, r, true
	}
	c.peaks(p, l, n)
	return p
}

// join fills the columns between two points.
func (p path) join(u0, r0, u1, r1 float64) {
	if u1 < u0 {
		u0, r0, u1, r1 = u1, r1, u0, r0
	}
	if u1 < 0 || u0 > float64(len(p)) {
		return
	}
	from, to := int(math.Ceil(math.Max(u0, 0))), int(math.Min(math.Floor(u1), float64(len(p)-1)))
	for i := from; i <= to; i++ {
		if u1 == u0 {
			p[i] = r1
			continue
		}
		p[i] = r0 + (r1-r0)*(float64(i)-u0)/(u1-u0)
	}
}

// end shows a line's first or last point in its column.
func (p path) end(u, r float64) {
	if i := math.Round(u); i >= 0 && i < float64(len(p)) && math.IsNaN(p[int(i)]) {
		p[int(i)] = r
	}
}

// peaks puts extrema over what the middle of their column showed.
func (c *canvas) peaks(p path, l Line, n int) {
	const none, low, high = 0, 1, 2
	var kept []uint8
	for i := 1; i+1 < n; i++ {
		a, y, b := l.Y[i-1], l.Y[i], l.Y[i+1]
		kind := uint8(none)
		switch {
		case y > a && y >= b:
			kind = high
		case y < a && y <= b:
			kind = low
		}
		if kind == none || !c.drawable(l.X[i], a) || !c.drawable(l.X[i], y) || !c.drawable(l.X[i], b) {
			continue
		}
		u := math.Round(c.col(l.X[i]))
		if !(u >= 0 && u < float64(len(p))) {
			continue
		}
		if kept == nil {
			kept = make([]uint8, len(p))
		}
		col, r := int(u), c.row(y)
		further := kind == high && r > p[col] || kind == low && r < p[col]
		if kind > kept[col] || kind == kept[col] && further {
			p[col], kept[col] = r, kind
		}
	}
}

// clip rounds the path to rows and takes out what lies outside. Where a line
// crosses the edge between two columns it is led to the edge. It reports whether
// anything is left.
func (c *canvas) clip(p path) bool {
	const inside = 0
	side := func(r float64) int {
		switch r = math.Round(r); {
		case r < 0:
			return -1
		case r > float64(c.rows-1):
			return 1
		}
		return inside
	}
	left := false
	before, was := 0, false // side of the column before, and whether it had a point
	for i, r := range p {
		if math.IsNaN(r) {
			was = false
			continue
		}
		s := side(r)
		after := s
		if i+1 < len(p) && !math.IsNaN(p[i+1]) {
			after = side(p[i+1])
		}
		switch {
		case s == inside:
			p[i], left = math.Round(r), true
		case was && before != s || after != s:
			p[i], left = c.edge(s), true
		default:
			p[i] = math.NaN()
		}
		before, was = s, true
	}
	return left
}

// edgeBit marks an edge row that stands for a point beyond the edge.
const edgeBit = 0.25

func (c *canvas) edge(side int) float64 {
	if side < 0 {
		return edgeBit
	}
	return float64(c.rows-1) - edgeBit
}

// draw lets asciigraph draw one clipped path and merges its cells. The column
// after the last is a copy of it, because asciigraph's columns join two points.
func (c *canvas) draw(p path, dash Dash, layer []rune) {
	series := make([]float64, len(p)+1)
	for i, r := range p {
		series[i] = math.Round(r)
	}
	series[len(p)] = series[len(p)-1]
	picture := asciigraph.Plot(series, asciigraph.Height(c.rows-1), asciigraph.Offset(1),
		asciigraph.LowerBound(0), asciigraph.UpperBound(float64(c.rows-1)),
		asciigraph.SeriesChars(c.glyphs.lines[dash]),
		asciigraph.YAxisValueFormatter(func(float64) string { return "" }))
	clear(layer)
	row, col := c.rows-1, -1
	for _, r := range picture {
		switch {
		case r == '\n':
			row, col = row-1, -1
			continue
		case r != ' ' && col >= 0 && col < c.cols && row >= 0:
			layer[row*c.cols+col] = r
		}
		col++
	}
	c.openEdges(p, dash, layer)
	role := roleOf(dash)
	for i, r := range layer {
		if r != 0 {
			*c.at(i%c.cols, i/c.cols) = Cell{r, role}
		}
	}
}

// openEdges turns the corners at the upper and lower edge into straight pieces:
// the line goes on beyond, it does not run along the edge.
func (c *canvas) openEdges(p path, dash Dash, layer []rune) {
	vertical, _ := utf8.DecodeRuneInString(c.glyphs.lines[dash].VerticalLine)
	flat, _ := utf8.DecodeRuneInString(c.glyphs.lines[dash].Horizontal)
	for i, r := range p {
		if r == math.Trunc(r) || math.IsNaN(r) {
			continue
		}
		edge := int(math.Round(r))
		enters := i+1 < len(p) && !math.IsNaN(p[i+1])
		leaves := i > 0 && !math.IsNaN(p[i-1])
		if leaves && math.Round(p[i-1]) != float64(edge) {
			layer[edge*c.cols+i-1] = vertical
		}
		layer[edge*c.cols+i] = 0
		switch next := edge*c.cols + i + 1; {
		case enters && math.Round(p[i+1]) != float64(edge):
			layer[next-1] = vertical
		case enters && layer[next] != flat:
			layer[next] = vertical
		}
	}
}
