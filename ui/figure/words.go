package figure

import (
	"strconv"
	"strings"
)

// Lines is a text picture as lines without trailing blanks.
func Lines(cells [][]Cell) []string {
	out := make([]string, len(cells))
	var b strings.Builder
	for i, row := range cells {
		b.Reset()
		for _, cell := range row {
			b.WriteRune(cell.Rune)
		}
		out[i] = strings.TrimRight(b.String(), " ")
	}
	return out
}

// Words prints the marked points of f as text, one a line: what the picture
// says where there is no room for a picture.
func Words(f Figure) []string {
	var out []string
	for _, m := range f.Marks {
		if !usable(m.X) || !usable(m.Y) {
			continue
		}
		says := f.Says(m)
		if m.Kind != HazeMark {
			says += " at " + amount(m.X, f.X.Unit)
		}
		if m.Letter != 0 {
			says = string(m.Letter) + ": " + says
		}
		out = append(out, says)
	}
	return out
}

// Says is a mark's label with what it marks, for places where its glyph does
// not say it.
func (f Figure) Says(m Mark) string {
	text := m.Text
	if text == "" {
		text = amount(m.Y, f.Y.Unit)
		if m.Kind == HazeMark {
			text = "haze " + amount(m.X, f.X.Unit)
		}
	}
	if m.Kind == CrestMark && !strings.HasPrefix(text, "crest") {
		text = "crest " + text
	}
	return text
}

// amount is a value to three digits with its unit.
func amount(v float64, unit string) string {
	s := short(strconv.FormatFloat(v, 'g', 3, 64))
	if unit == "" {
		return s
	}
	return s + " " + unit
}
