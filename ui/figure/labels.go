package figure

import "math"

// room says how free a stretch of cells is.
type room int

const (
	full  room = iota // a mark, a letter or a label is there, or the edge
	lined             // lines only
	faint             // at most the zero line
	clean
)

// room looks at n cells from col on. The neighbours must not be labels, or two
// numbers would run together.
func (c *canvas) room(col, row, n int) room {
	if n == 0 || col < 0 || col+n > c.cols {
		return full
	}
	for _, side := range []int{col - 1, col + n} {
		if cell := c.at(side, row); cell != nil && cell.Role == LabelRole {
			return full
		}
	}
	best := clean
	for i := range n {
		cell := c.at(col+i, row)
		switch {
		case cell == nil || taken(cell):
			return full
		case cell.Role == ZeroRole:
			best = min(best, faint)
		case cell.Role != Blank:
			best = lined
		}
	}
	return best
}

// label writes a sign's text where it collides with nothing: right of the sign,
// left of it, then above and below. A text that must be read may cover lines.
func (c *canvas) label(s sign) {
	n := len(s.text)
	right, left := s.col+2, s.col-1-n
	if s.must {
		for _, least := range []room{faint, lined} {
			for _, col := range []int{right, left} {
				if c.room(col, s.row, n) >= least {
					c.put(col, s.row, s.text)
					return
				}
			}
		}
		return
	}
	for _, least := range []room{clean, faint} {
		for _, d := range []int{0, 1, 2, 3, -1, -2} {
			cols := []int{right, left}
			if d != 0 {
				cols = []int{s.col + 1, s.col - n/2, s.col - n, s.col + 2, s.col - n - 1}
			}
			for _, col := range cols {
				if c.room(col, s.row+d, n) >= least {
					c.put(col, s.row+d, s.text)
					return
				}
			}
		}
	}
}

func (c *canvas) put(col, row int, text []rune) {
	for i, r := range text {
		*c.at(col+i, row) = Cell{r, LabelRole}
	}
}

// names writes the names of the lines for which no letter stands, the current
// one left out, in words near their end: above the line, below it, or on it.
func (c *canvas) names(lines []Line, paths []path) {
	for i, l := range lines {
		text := c.text(l.Says)
		if kindOf(l) == Solid || l.Letter != 0 || len(text) == 0 || paths[i] == nil {
			continue
		}
		if !c.name(text, paths[i], 1, faint) && !c.name(text, paths[i], -1, faint) {
			c.name(text, paths[i], 0, lined)
		}
	}
}

// name writes text along a path as near to its end as there is room, off rows
// above it.
func (c *canvas) name(text []rune, p path, off int, least room) bool {
	n := len(text)
	for end := len(p) - 1; end >= n-1; end-- {
		mid := p[end-n/2]
		if math.IsNaN(mid) || math.IsNaN(p[end]) {
			continue
		}
		col, row := end-n+1, int(math.Round(mid))+off
		if c.room(col, row, n) >= least {
			c.put(col, row, text)
			return true
		}
	}
	return false
}
