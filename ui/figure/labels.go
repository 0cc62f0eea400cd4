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

// names writes the names of the lines for which no letter stands, in words near
// their end: above the line, below it, or on it. The current line has none unless
// it asks for it; lines that do come first.
func (c *canvas) names(lines []Line, paths []path) {
	for _, atEnd := range []bool{true, false} {
		for i, l := range lines {
			text, role := c.text(l.Says), roleOf(kindOf(l))
			unnamed := kindOf(l) == Solid && !l.AtEnd || l.Letter != 0 || len(text) == 0
			if l.AtEnd != atEnd || unnamed || paths[i] == nil {
				continue
			}
			if !c.nameBeside(text, paths[i], role) {
				c.nameOn(text, paths[i], role)
			}
		}
	}
}

// nameBeside writes text beside the last piece of a path that is not under
// another line: right of it, above or below.
func (c *canvas) nameBeside(text []rune, p path, role Role) bool {
	n := len(text)
	for col := len(p) - 1; col >= 0; col-- {
		if math.IsNaN(p[col]) {
			continue
		}
		row := int(math.Round(p[col]))
		if c.at(col, row).Role != role {
			continue
		}
		for _, at := range [][2]int{{col + 2, row}, {col, row + 1}, {col - n/2, row + 1}, {col - n + 1, row + 1}, {col - n + 1, row - 1}} {
			if c.room(at[0], at[1], n) >= faint {
				c.put(at[0], at[1], text)
				return true
			}
		}
	}
	return false
}

// nameOn writes text onto the path itself, as near to its end as the text
// covers nothing but this path.
func (c *canvas) nameOn(text []rune, p path, role Role) {
	n := len(text)
	for end := len(p) - 1; end >= n-1; end-- {
		mid := p[end-n/2]
		if math.IsNaN(mid) {
			continue
		}
		col, row := end-n+1, int(math.Round(mid))
		own := c.room(col, row, n) >= lined
		for i := range n {
			cell := c.at(col+i, row)
			own = own && (cell.Role == role || cell.Role == Blank || cell.Role == ZeroRole)
		}
		if own {
			c.put(col, row, text)
			return
		}
	}
}
