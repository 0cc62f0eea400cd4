package figure

import (
	"math"
	"strings"
)

// sign is a mark on its cell.
type sign struct {
	col, row int
	role     Role
	text     []rune
	must     bool // the text may cover lines: it says what lies outside
}

// marks lays marks, letters and their labels over the lines: first all signs,
// so that no label covers one, then the labels.
func (c *canvas) marks(f Figure, paths []path) {
	if c.cols == 0 {
		return
	}
	var signs []sign
	for _, own := range []bool{true, false} { // the current curve's marks first
		for _, m := range f.Marks {
			if (m.Letter == 0) != own || !usable(m.Y) || !usable(m.X) {
				continue
			}
			if s, ok := c.sign(m, f, paths); ok {
				signs = append(signs, s)
			}
		}
	}
	for i, l := range f.Lines {
		if l.Letter != 0 && !c.crestMarked(f.Marks, l.Letter) {
			c.letter(l.Letter, c.top(paths[i]), paths[i])
		}
	}
	for _, s := range signs {
		c.label(s)
	}
}

// crestMarked reports whether a mark writes the letter of a line at its crest.
func (c *canvas) crestMarked(marks []Mark, letter rune) bool {
	for _, m := range marks {
		if m.Kind == CrestMark && m.Letter == letter && usable(m.X) && usable(m.Y) && c.inside(c.col(m.X), c.row(m.Y)) {
			return true
		}
	}
	return false
}

// inside reports whether a place lies in the picture.
func (c *canvas) inside(col, row float64) bool {
	col, row = math.Round(col), math.Round(row)
	return col >= 0 && row >= 0 && col < float64(c.cols) && row < float64(c.rows)
}

// sign puts a mark's glyph on its cell, at the edge for a mark outside.
func (c *canvas) sign(m Mark, f Figure, paths []path) (sign, bool) {
	col, row := math.Round(c.col(m.X)), math.Round(c.row(m.Y))
	glyph, role := c.glyphs.point, CurrentRole
	switch m.Kind {
	case CrestMark:
		glyph, role = c.glyphs.crest, CrestRole
	case HazeMark:
		glyph, role = c.glyphs.haze, HazeRole
	}
	s := sign{role: role, text: c.text(m.Text)}
	switch {
	case row < 0:
		glyph, s.must = c.glyphs.down, true
	case row > float64(c.rows-1):
		glyph, s.must = c.glyphs.up, true
	case col < 0:
		glyph, s.must = c.glyphs.left, true
	case col > float64(c.cols-1):
		glyph, s.must = c.glyphs.right, true
	}
	s.col = int(math.Max(0, math.Min(col, float64(c.cols-1))))
	s.row = int(math.Max(0, math.Min(row, float64(c.rows-1))))
	if s.must {
		s.text = c.text(f.Says(m))
	}
	if m.Letter != 0 {
		if s.role = HeldRole; m.Kind == CrestMark && !s.must {
			return s, c.letter(m.Letter, s.col, pathOf(m.Letter, f.Lines, paths))
		}
		if s.must && m.Kind == CrestMark {
			s.text = append(c.text(string(m.Letter)+" "), s.text...)
		}
	}
	cell := c.at(s.col, s.row)
	if taken(cell) { // a point there already says what this one would
		if m.Kind == PointMark {
			return s, false
		}
		if cell = c.beside(&s); cell == nil {
			return s, false
		}
	}
	*cell = Cell{glyph, s.role}
	return s, true
}

// beside moves a sign whose cell is taken to the nearest free one on its row.
func (c *canvas) beside(s *sign) *Cell {
	for _, d := range []int{1, -1, 2, -2} {
		if cell := c.at(s.col+d, s.row); cell != nil && !taken(cell) {
			s.col += d
			return cell
		}
	}
	return nil
}

func pathOf(letter rune, lines []Line, paths []path) path {
	for i, l := range lines {
		if l.Letter == letter {
			return paths[i]
		}
	}
	return nil
}

// taken reports whether a cell carries a mark, a letter or a label.
func taken(cell *Cell) bool {
	switch cell.Role {
	case CrestRole, HazeRole, PointRole, LabelRole:
		return true
	case CurrentRole, HeldRole:
		return !strings.ContainsRune(lineGlyphs, cell.Rune)
	}
	return false
}

// top is the column of a path's highest row, the middle of a flat top; the last
// column of a path that is highest where it leaves the frame.
func (c *canvas) top(p path) int {
	high, first, last := math.Inf(-1), 0, 0
	for i, r := range p {
		r = math.Round(r)
		switch {
		case r > high:
			high, first, last = r, i, i
		case r == high && last == i-1:
			last = i
		}
	}
	return (first + last) / 2
}

// letter writes a held curve's letter onto its path, as near to col as no other
// mark is. It reports whether there was room.
func (c *canvas) letter(letter rune, col int, p path) bool {
	text := c.text(string(letter))
	if len(text) != 1 {
		return false
	}
	for d := range len(p) {
		for _, at := range []int{col - d, col + d} {
			if at < 0 || at >= len(p) || math.IsNaN(p[at]) {
				continue
			}
			if cell := c.at(at, int(math.Round(p[at]))); cell != nil && !taken(cell) {
				*cell = Cell{text[0], HeldRole}
				return true
			}
		}
	}
	return false
}
