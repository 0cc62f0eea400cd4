package figure

import "strconv"

// Widths of the columns of a figure of bars, in cells.
const (
	widestName  = 46
	widestValue = 16
	leastScale  = 12 // names are cut rather than bars be shorter
	columnGap   = 2
)

// fewestRows are needed to say in rows of their own how many bars are hidden.
const fewestRows = 3

// barRows draws a figure of bars as h rows of w cells: the mark of the chosen bar,
// the number of the bar, its name, its value, and the bar itself. What is hidden
// for want of rows is counted in the first and the last row.
func barRows(bars []Bar, w, h int, st Style) [][]Cell {
	t := newBarTable(bars, w, h, st)
	from, to := barWindow(len(bars), chosenOf(bars), h)
	counted := to-from < h
	row := 0
	if above := from; above > 0 && counted {
		t.more(row, above, "above")
		row++
	}
	for i := from; i < to; i++ {
		t.bar(row, i, bars[i])
		row++
	}
	if below := len(bars) - to; below > 0 && counted {
		t.more(row, below, "below")
	}
	return t.cells
}

// chosenOf is the index of the first chosen bar, 0 if there is none.
func chosenOf(bars []Bar) int {
	for i, b := range bars {
		if b.Chosen {
			return i
		}
	}
	return 0
}

// barWindow is which of n bars are seen in h rows: the chosen one, and as far up as
// that allows, so that the window stays still while the choice moves in its first
// part. One hidden bar is never counted: its row has room for the bar itself.
func barWindow(n, chosen, h int) (from, to int) {
	switch {
	case n <= h:
		return 0, n
	case h < fewestRows:
		from = min(chosen, n-h)
		return from, from + h
	case chosen < h-1:
		return 0, h - 1
	case chosen < n-2:
		return chosen - (h - fewestRows), chosen + 1
	}
	return n - (h - 1), n
}

// barTable is a figure of bars while it is drawn. Its columns are as wide as all
// bars need, seen or not, so that nothing moves when the window does.
type barTable struct {
	cells  [][]Cell
	glyphs glyphSet
	ascii  bool

	number            int // the column behind the number
	name, nameWidth   int
	value, valueWidth int // the column behind the value
	zero              int // the column of zero
	scale             barScale
}

func newBarTable(bars []Bar, w, h int, st Style) *barTable {
	t := &barTable{cells: blankCells(w, h), glyphs: glyphsOf(st), ascii: st.ASCII}
	for _, b := range bars {
		t.nameWidth = max(t.nameWidth, len(cellText(b.Says, t.ascii)))
		t.valueWidth = max(t.valueWidth, len(cellText(b.Text, t.ascii)))
	}
	if len(bars) > h {
		t.nameWidth = max(t.nameWidth, len(moreText(len(bars), "below")))
	}
	const mark = 2
	t.number = mark + len(strconv.Itoa(len(bars)))
	t.name = t.number + columnGap
	room := max(w-t.name-2*columnGap, 0)
	t.valueWidth = min(t.valueWidth, widestValue, room)
	t.nameWidth = min(t.nameWidth, widestName, max(room-t.valueWidth-leastScale, 0))
	t.value = t.name + t.nameWidth + columnGap + t.valueWidth
	t.scale = newBarScale(bars, room-t.nameWidth-t.valueWidth)
	t.zero = t.value + columnGap + t.scale.left
	return t
}

// bar draws the bar of index i.
func (t *barTable) bar(row, i int, b Bar) {
	cells, role := t.cells[row], CurrentRole
	if b.Chosen {
		role = CrestRole
		write(cells, 0, []rune{t.glyphs.chosen}, role)
	}
	number := []rune(strconv.Itoa(i + 1))
	write(cells, t.number-len(number), number, TickRole)
	write(cells, t.name, t.cut(b.Says, t.nameWidth), LabelRole)
	value := t.cut(b.Text, t.valueWidth)
	write(cells, t.value-len(value), value, LabelRole)
	t.axis(row)
	if !b.Drawable() {
		return
	}
	away, end := 1, t.glyphs.halfRight
	if b.Value < 0 {
		away, end = -1, t.glyphs.halfLeft
	}
	halves := t.scale.halves(b.Value)
	for k := range halves / 2 {
		write(cells, t.zero+away*(k+1), []rune{t.glyphs.full}, role)
	}
	if halves%2 == 1 {
		write(cells, t.zero+away*(halves/2+1), []rune{end}, role)
	}
}

// more says how many bars are hidden above or below.
func (t *barTable) more(row, n int, where string) {
	write(t.cells[row], t.name, t.cut(moreText(n, where), t.value-t.name), LabelRole)
	t.axis(row)
}

func moreText(n int, where string) string { return strconv.Itoa(n) + " more " + where }

func (t *barTable) axis(row int) {
	if t.scale.cells > 0 {
		write(t.cells[row], t.zero, []rune{t.glyphs.bar}, AxisRole)
	}
}

// cut is a text in at most n cells; dots show where some of it is missing.
func (t *barTable) cut(s string, n int) []rune {
	text := cellText(s, t.ascii)
	if len(text) <= n {
		return text
	}
	dots := cellText("…", t.ascii)
	if n < len(dots) {
		return dots[:n]
	}
	return append(text[:n-len(dots)], dots...)
}
