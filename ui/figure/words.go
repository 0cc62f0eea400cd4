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

// Words prints the marked and the measured points of f as text, or its bars, one a
// line: what the picture says where there is no room for a picture.
func Words(f Figure) []string {
	if len(f.Bars) > 0 {
		return wordsOfBars(f.Bars)
	}
	var out []string
	for _, m := range f.Marks {
		if !usable(m.X) || !usable(m.Y) {
			continue
		}
		says := f.Says(m)
		if m.Kind != HazeMark {
			says += " at " + f.X.amount(m.X)
		}
		if m.Letter != 0 {
			says = string(m.Letter) + ": " + says
		}
		out = append(out, says)
	}
	for _, p := range f.Points {
		if usable(p.X) && usable(p.Y) {
			out = append(out, f.saysPoint(p))
		}
	}
	return out
}

// wordsOfBars has a line for each bar, so that lines and rows have the same numbers.
func wordsOfBars(bars []Bar) []string {
	out := make([]string, len(bars))
	for i, b := range bars {
		out[i] = strings.TrimSpace(b.Says + " " + b.Text)
	}
	return out
}

// saysPoint is a measured point in words: "measured 312 cm⁻³ (290 to 330) at 0.2 %".
func (f Figure) saysPoint(p Point) string {
	says := "measured " + f.Y.amount(p.Y)
	if usable(p.YLow) && usable(p.YHigh) {
		says += " (" + digits(p.YLow) + " to " + digits(p.YHigh) + ")"
	}
	says += " at " + f.X.amount(p.X)
	if p.Letter != 0 {
		says = string(p.Letter) + ": " + says
	}
	return says
}

// Says is a mark's label with what it marks, for places where its glyph does
// not say it.
func (f Figure) Says(m Mark) string {
	text := m.Text
	if text == "" {
		text = f.Y.amount(m.Y)
		if m.Kind == HazeMark {
			text = "haze " + f.X.amount(m.X)
		}
	}
	if m.Kind == CrestMark && !strings.HasPrefix(text, "crest") {
		text = "crest " + text
	}
	return text
}

// amount is a value of an axis to three digits with its unit.
func (a Axis) amount(v float64) string {
	switch {
	case a.Time:
		return momentText(v)
	case a.Unit == "":
		return digits(v)
	}
	return digits(v) + " " + a.Unit
}

// digits is a number to three digits.
func digits(v float64) string { return short(strconv.FormatFloat(v, 'g', 3, 64)) }
