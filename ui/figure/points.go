package figure

import "math"

// points draws measured points over the lines: all bars first, so that none
// crosses out a point, and the current series last.
func (c *canvas) points(points []Point) {
	if c.cols == 0 {
		return
	}
	var own, others []Point
	for _, p := range points {
		switch {
		case !usable(p.X) || !usable(p.Y):
		case p.Letter == 0:
			own = append(own, p)
		default:
			others = append(others, p)
		}
	}
	for _, series := range [][]Point{others, own} {
		for _, p := range series {
			c.bars(p)
		}
	}
	for _, series := range [][]Point{others, own} {
		for _, p := range series {
			c.point(p)
		}
	}
}

// bars draws the uncertainty of a point as far as it is in the picture.
func (c *canvas) bars(p Point) {
	col, row := math.Round(c.col(p.X)), math.Round(c.row(p.Y))
	from, to := c.ends(c.row(p.YLow), c.row(p.YHigh), row, c.rows)
	for i := from; i <= to; i++ {
		c.bar(col, float64(i), c.glyphs.upright)
	}
	from, to = c.ends(c.col(p.XLow), c.col(p.XHigh), col, c.cols)
	for i := from; i <= to; i++ {
		c.bar(float64(i), row, c.glyphs.across)
	}
}

// ends are the first and the last cell of a bar, none for one that has no end
// beyond the cell of its point.
func (c *canvas) ends(low, high, at float64, n int) (from, to int) {
	if math.IsNaN(low) {
		low = at
	}
	if math.IsNaN(high) {
		high = at
	}
	low, high = math.Round(math.Min(low, at)), math.Round(math.Max(high, at))
	if low == high {
		return 0, -1
	}
	last := float64(n - 1)
	return int(math.Max(0, math.Min(low, last+1))), int(math.Min(last, math.Max(high, -1)))
}

func (c *canvas) bar(col, row float64, glyph rune) {
	if c.inside(col, row) {
		*c.at(int(col), int(row)) = Cell{glyph, BarRole}
	}
}

// point draws the point itself: its own sign, or the letter of the held series it
// belongs to. One outside the frame becomes an arrow at the edge.
func (c *canvas) point(p Point) {
	col, row := math.Round(c.col(p.X)), math.Round(c.row(p.Y))
	glyph := c.glyphs.measured
	if letter := c.text(string(p.Letter)); p.Letter != 0 && len(letter) == 1 {
		glyph = letter[0]
	}
	switch {
	case row < 0:
		glyph = c.glyphs.down
	case row > float64(c.rows-1):
		glyph = c.glyphs.up
	case col < 0:
		glyph = c.glyphs.left
	case col > float64(c.cols-1):
		glyph = c.glyphs.right
	}
	col = math.Max(0, math.Min(col, float64(c.cols-1)))
	row = math.Max(0, math.Min(row, float64(c.rows-1)))
	*c.at(int(col), int(row)) = Cell{glyph, PointRole}
}
