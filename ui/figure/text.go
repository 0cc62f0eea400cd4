package figure

import (
	"math"
	"unicode"
	"unicode/utf8"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/plain"
)

// Text draws f through the frame as h rows of w cells: the picture's rows with
// the vertical axis at their left, then the horizontal axis and its labels. A
// frame made for another height is relaid, the zero Frame is fitted here. The
// same figure, frame, size and style give the same cells. A figure of bars has a
// bar in each row and neither axes nor a frame.
func Text(f Figure, fr Frame, w, h int, st Style) [][]Cell {
	if w < 1 || h < 1 {
		return nil
	}
	if len(f.Bars) > 0 {
		return barRows(f.Bars, w, h, st)
	}
	rows := pictureRows(h)
	if !fr.Suits(f) {
		fr, _ = Fit(f, Frame{}, h)
	}
	fr = fr.withRows(rows)
	labels, widest := rowLabels(fr, rows)
	c := newCanvas(w, rows, max(6, widest)+2, st)
	c.place(fr, f.X.Log)
	c.axes(labels)
	c.xAxis(f.X)
	paths := c.lines(f.Lines)
	c.points(f.Points)
	c.marks(f, paths)
	c.names(f.Lines, paths)
	return c.cells[:min(h, len(c.cells))]
}

// canvas is the picture while it is drawn. Rows count from the bottom of the
// picture, columns from its left edge; the axes lie outside of both.
type canvas struct {
	cells  [][]Cell // from the top, the two rows of the horizontal axis last
	rows   int
	cols   int
	gutter int // cells left of the picture
	glyphs glyphSet
	ascii  bool

	fr    Frame
	log   bool
	left  float64 // position of column 0
	scale float64 // columns per unit of position
}

func newCanvas(w, rows, gutter int, st Style) *canvas {
	return &canvas{
		cells: blankCells(w, rows+2), rows: rows, cols: max(w-gutter, 0), gutter: gutter, ascii: st.ASCII, glyphs: glyphsOf(st),
	}
}

// blankCells are h rows of w blank cells.
func blankCells(w, h int) [][]Cell {
	all := make([]Cell, w*h)
	for i := range all {
		all[i].Rune = ' '
	}
	rows := make([][]Cell, h)
	for i := range rows {
		rows[i] = all[i*w : (i+1)*w : (i+1)*w]
	}
	return rows
}

// place sets which part of the plane the columns and rows show.
func (c *canvas) place(fr Frame, log bool) {
	c.fr, c.log, c.left, c.scale = fr, log, fr.XMin, 0
	right := fr.XMax
	if log {
		c.left, right = math.Log10(fr.XMin), math.Log10(fr.XMax)
	}
	if c.cols > 1 {
		c.scale = float64(c.cols-1) / (right - c.left)
	}
}

// col is the column of x, not rounded and not clipped.
func (c *canvas) col(x float64) float64 {
	if c.log {
		if x <= 0 {
			return math.Inf(-1)
		}
		x = math.Log10(x)
	}
	return (x - c.left) * c.scale
}

// row is the row of y, not rounded and not clipped.
func (c *canvas) row(y float64) float64 { return c.fr.row(y) }

// drawable reports whether a point of a line has a place.
func (c *canvas) drawable(x, y float64) bool { return usableX(x, c.log) && usableY(y, c.fr.YLog) }

// at is the cell of a column and row of the picture, nil outside.
func (c *canvas) at(col, row int) *Cell {
	if col < 0 || col >= c.cols || row < 0 || row >= c.rows {
		return nil
	}
	return &c.cells[c.rows-1-row][c.gutter+col]
}

// write puts text into one row of cells, cut at both ends.
func write(row []Cell, from int, text []rune, role Role) {
	for i, r := range text {
		if at := from + i; at >= 0 && at < len(row) {
			row[at] = Cell{r, role}
		}
	}
}

// axes draws the vertical axis, its labels and the zero line.
func (c *canvas) axes(labels []string) {
	for i, label := range labels {
		row := c.cells[c.rows-1-i]
		bar := c.glyphs.bar
		if label != "" {
			bar = c.glyphs.barLabelled
			write(row, c.gutter-2-len(label), []rune(label), TickRole)
		}
		write(row, c.gutter-1, []rune{bar}, AxisRole)
	}
	if c.fr.YLog {
		return // there is no zero
	}
	zero := int(math.Round(-c.fr.YMin / c.fr.YStep))
	for col := 0; col < c.cols; col += 4 {
		if cell := c.at(col, zero); cell != nil {
			*cell = Cell{c.glyphs.zero, ZeroRole}
		}
	}
}

// xAxis draws the horizontal axis and below it the unit and the tick labels.
func (c *canvas) xAxis(x Axis) {
	line, below := c.cells[c.rows], c.cells[c.rows+1]
	write(line, c.gutter-1, []rune{c.glyphs.corner}, AxisRole)
	for col := range c.cols {
		write(line, c.gutter+col, []rune{c.glyphs.floor}, AxisRole)
	}
	unit := c.text(x.Unit)
	if len(unit) > c.gutter-2 {
		unit = unit[:c.gutter-2]
	}
	write(below, c.gutter-2-len(unit), unit, LabelRole)
	free := c.gutter
	each := 7 // columns
	if x.Time {
		each = 9
	}
	for _, tick := range x.Ticks(c.fr.XMin, c.fr.XMax, max(c.cols/each, 1)) {
		at := int(math.Round(c.col(tick.Value)))
		if at < 0 || at >= c.cols {
			continue
		}
		label := []rune(tick.Label)
		from := min(c.gutter+at-len(label)/2, len(below)-len(label))
		if from < free {
			continue
		}
		write(line, c.gutter+at, []rune{c.glyphs.tick}, AxisRole)
		write(below, from, label, TickRole)
		free = from + len(label) + 1
	}
}

func (c *canvas) text(s string) []rune { return cellText(s, c.ascii) }

// cellText is s as runes of one cell each. Whatever could drive or shift a terminal
// is taken out; a wide character, or one that nobody knows how to show, becomes a
// question mark.
func cellText(s string, ascii bool) []rune {
	if ascii {
		s = plain.ASCII(s)
	}
	s = plain.Clean(s)
	var out []rune
	for _, r := range s {
		if r >= utf8.RuneSelf {
			switch n := ansi.StringWidth(string(r)); {
			case n == 0:
				continue
			case unicode.IsSpace(r):
				r = ' '
			case n > 1 || !unicode.IsPrint(r):
				r = '?'
			}
		}
		out = append(out, r)
	}
	return out
}
