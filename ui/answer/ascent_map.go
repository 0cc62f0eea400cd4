package answer

import (
	"math"
	"strings"
	"unicode/utf8"

	"dropcrest/ui/plain"
)

// SweepFacts is a sweep in JSON: across and down, and its cells row by row. Numbers of
// cells are absent where problem says why.
type SweepFacts struct {
	X     SweepAxisRow   `json:"x"`
	Y     SweepAxisRow   `json:"y"`
	Cells []SweepCellRow `json:"cells"`

	of *swept
}

// SweepAxisRow is one of the two quantities.
type SweepAxisRow struct {
	Key    string   `json:"key"` // with its unit: "updraft_m_per_s"
	Values []Number `json:"values"`
}

// SweepCellRow is one ascent.
type SweepCellRow struct {
	Droplets Number  `json:"droplets_per_m3"`
	Peak     Number  `json:"peak_supersaturation_percent"`
	Height   Number  `json:"height_of_peak_m"`
	Problem  *string `json:"problem"`
}

func (w *swept) facts() *SweepFacts {
	f := &SweepFacts{Cells: make([]SweepCellRow, 0, len(w.Cells)), of: w}
	for i, to := range []*SweepAxisRow{&f.X, &f.Y} {
		to.Key = w.axes[i].Key()
		for _, v := range w.axes[i].Values {
			to.Values = append(to.Values, Number(w.axes[i].SI(v)))
		}
	}
	gap := Number(math.NaN())
	for _, c := range w.Cells {
		row := SweepCellRow{gap, gap, gap, textOrNull(c.Fault)}
		if c.Fault == "" {
			row.Droplets, row.Peak, row.Height = Number(c.Droplets), percentNumber(c.Peak), Number(c.Height)
		}
		f.Cells = append(f.Cells, row)
	}
	return f
}

// Shades from few to many, and what stands for a cell without a result. Those of
// ASCII are denser from one to the next as well.
var (
	shades      = []rune(" ░▒▓█")
	asciiShades = []rune(" .:+#")
)

const faultGlyph = '!'

// Map is the droplets of a sweep as lines of text: numbers per cm³, each with a shade
// for those who look from afar, across the first quantity and up the second. Of more
// values than fit some are left out, the ends never. Nothing is said by colour.
func (f *SweepFacts) Map(width, rows int, ascii bool) []string {
	w := f.of
	glyphs := shades
	if ascii {
		glyphs = asciiShades
	}
	lead := utf8.RuneCountInString(w.axes[1].Says)
	for _, v := range w.Y.Values {
		lead = max(lead, utf8.RuneCountInString(w.show(1, v)))
	}
	const cellWidth = 7 // a blank, five digits, a shade
	across := some(len(w.X.Values), (width-lead)/cellWidth)
	down := some(len(w.Y.Values), rows-3)
	low, high := w.reach()
	out := []string{"droplets per cm³, " + w.axes[1].Says + " up, " + w.axes[0].Says + " across"}
	for k := len(down) - 1; k >= 0; k-- {
		line := padded(w.show(1, w.Y.Values[down[k]]), lead)
		for _, x := range across {
			c, _ := w.At(x, down[k])
			if c.Fault != "" {
				line += padded("none", cellWidth-1) + string(faultGlyph)
				continue
			}
			line += padded(cubic(c.Droplets), cellWidth-1) + string(shadeOf(glyphs, c.Droplets, low, high))
		}
		out = append(out, line)
	}
	foot := strings.Repeat(" ", lead)
	for _, x := range across {
		foot += padded(digits(w.axes[0].Shown(w.X.Values[x]), 2), cellWidth-1) + " "
	}
	out = append(out, strings.TrimRight(foot, " ")+" "+w.axes[0].Unit)
	if n, first := w.faults(); n > 0 {
		out = append(out, plain.Clean("none: "+first))
	}
	if ascii {
		for i := range out {
			out[i] = plain.ASCII(out[i])
		}
	}
	return out
}

// some are at most n of count places, evenly spread, with both ends.
func some(count, n int) []int {
	n = max(1, min(n, count))
	out := make([]int, 0, n)
	for i := range n {
		out = append(out, int(math.Round(float64(i)*float64(count-1)/math.Max(1, float64(n-1)))))
	}
	return out
}

// padded puts text at the right of a column.
func padded(text string, width int) string {
	return strings.Repeat(" ", max(0, width-utf8.RuneCountInString(text))) + text
}

// reach are the fewest and the most droplets.
func (w *swept) reach() (low, high float64) {
	low, high = math.Inf(1), 0
	for _, c := range w.Cells {
		if c.Fault == "" {
			low, high = math.Min(low, c.Droplets), math.Max(high, c.Droplets)
		}
	}
	return low, high
}

// shadeOf is the shade of a number, even steps of its logarithm.
func shadeOf(glyphs []rune, n, low, high float64) rune {
	share := math.Log(n/low) / math.Log(high/low)
	if !(share >= 0) { // all are alike, or there are none at all
		share = 0
	}
	return glyphs[min(int(share*float64(len(glyphs))), len(glyphs)-1)]
}

// mapTable is the map with all its cells, number and shade.
func (w *swept) mapTable() Table {
	t := Table{Key: "map", Title: "Map of droplets per cm³", Columns: []Column{{"up", w.axes[1].Says}}}
	for _, v := range w.X.Values {
		at := w.show(0, v)
		t.Columns = append(t.Columns, Column{w.axes[0].Key() + "_" + digits(w.axes[0].SI(v), 4), at})
	}
	low, high := w.reach()
	for y := len(w.Y.Values) - 1; y >= 0; y-- {
		row := []any{w.show(1, w.Y.Values[y])}
		for x := range w.X.Values {
			c, _ := w.At(x, y)
			if c.Fault != "" {
				row = append(row, "none "+string(faultGlyph))
				continue
			}
			row = append(row, strings.TrimRight(cubic(c.Droplets)+" "+string(shadeOf(asciiShades, c.Droplets, low, high)), " "))
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}
