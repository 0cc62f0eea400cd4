package print

import (
	"bytes"
	"image"
	"image/png"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/charmbracelet/x/exp/golden"
	"gonum.org/v1/plot/vg"

	"dropcrest/ui/figure"
)

// ledgerFigure has invented bars of both signs, a chosen one, and one without value.
func ledgerFigure() figure.Figure {
	return figure.Figure{
		Key: "ledger", Title: "What each assumption costs",
		X: figure.Axis{Says: "change of the critical supersaturation", Unit: "%"},
		Bars: []figure.Bar{
			{Says: "one κ at every dilution", Value: -7.2, Text: "-7.2 %"},
			{Says: "surface tension of pure water, whatever else is dissolved in it", Value: 3.1, Text: "+3.1 %", Chosen: true},
			{Says: "no Kelvin term", Value: -0.002, Text: "-0.002 %"},
			{Says: "a sphere", Value: 0, Text: "0 %"},
			{Says: "density of the dry salt", Value: math.NaN(), Text: "not known"},
		},
		Notes: []string{"All of it is invented."},
		// A figure of bars draws nothing else.
		Lines:  []figure.Line{{X: []float64{1, 2}, Y: []float64{1, 2}, Says: "a line"}},
		Points: []figure.Point{{X: 1, Y: 1}},
	}
}

func TestBarsSVG(t *testing.T) {
	file := written(t, ledgerFigure(), figure.Frame{}, "svg")
	golden.RequireEqual(t, file)
	at := -1
	for _, want := range []string{"What each assumption costs", "change of the critical supersaturation, %", ">one κ at every dilution<", ">-7.2 %<",
		">surface tension of pure water", ">+3.1 %<", ">no Kelvin term<", ">a sphere<", ">density of the dry salt<", ">not known<", "All of it is invented."} {
		next := bytes.Index(file, []byte(want))
		if next < at || bytes.Count(file, []byte(want)) != 1 {
			t.Errorf("%q is missing, twice there, or out of order", want)
		}
		at = next
	}
	if bytes.Contains(file, []byte("a line")) || bytes.Contains(file, []byte("measured")) {
		t.Error("lines or points are in a figure of bars")
	}
	if other := written(t, ledgerFigure(), figure.Frame{XMin: 1, XMax: 2, YMin: 3, YMax: 4, YStep: 1}, "svg"); !bytes.Equal(file, other) {
		t.Error("the frame changes the bars")
	}
}

// The bars have their lengths on paper: a long one, the chosen one in black, and
// the smallest so that it can be seen.
func TestBarsPNG(t *testing.T) {
	img, err := png.Decode(bytes.NewReader(written(t, ledgerFigure(), figure.Frame{}, "png")))
	if err != nil {
		t.Fatal(err)
	}
	grey, black := map[int]int{}, map[int]int{} // rows of the picture by their longest run of dots
	for y := range img.Bounds().Dy() {
		grey[longestRun(img, y, 0x80)]++
		black[longestRun(img, y, 0)]++
	}
	const scale = 651 / (1.05 * (7.2 + 3.1)) // dots a per cent, the inner width read off the picture
	high := int(barPart * barRow.Dots(dotsPerInch))
	for name, c := range map[string]struct {
		rows map[int]int
		want float64 // dots
	}{"-7.2": {grey, 7.2 * scale}, "+3.1": {black, 3.1 * scale}, "-0.002": {grey, leastBar.Dots(dotsPerInch)}} {
		n := 0
		for run, rows := range c.rows {
			if math.Abs(float64(run)-c.want) <= 0.03*c.want+3 {
				n += rows
			}
		}
		if n < high-3 || n > high+3 {
			t.Errorf("%s: %d rows of about %.0f dots, want %d; grey %v, black %v", name, n, c.want, high, grey, black)
		}
	}
}

// longestRun is the longest run of dots of that grey in a row of a picture.
func longestRun(img image.Image, y int, want uint8) int {
	longest, run := 0, 0
	for x := range img.Bounds().Dx() {
		run++
		if r, g, b, _ := img.At(x, y).RGBA(); r>>8 != uint32(want) || g != r || b != r {
			run = 0
		}
		longest = max(longest, run)
	}
	return longest
}

func TestSameBarsTwice(t *testing.T) {
	for _, format := range Formats() {
		if !bytes.Equal(written(t, ledgerFigure(), figure.Frame{}, format), written(t, ledgerFigure(), figure.Frame{}, format)) {
			t.Errorf("%s: two runs, two files", format)
		}
	}
}

// The page grows with the bars, and names are cut where they would leave no room.
func TestRoomForBars(t *testing.T) {
	f := ledgerFigure()
	few := newSheet(f, figure.Frame{}).height()
	for range 10 {
		f.Bars = append(f.Bars, figure.Bar{Says: strings.Repeat("a long name ", 20), Value: 1, Text: strings.Repeat("9", 100)})
	}
	if more := newSheet(f, figure.Frame{}).height(); more <= few+9*barRow {
		t.Errorf("a page of %v for 5 bars, of %v for 15", few, more)
	}
	style := textStyle(tickSize)
	name := f.Bars[5].Says
	for _, width := range []vg.Length{0, 10, 50, 1e4} {
		says := cutTo(name, style, width)
		if whole := says == name; whole != (width == 1e4) || !whole && !strings.HasSuffix(says, "…") {
			t.Errorf("%g: %q", width, says)
		}
		if says != "…" && style.Width(says) > width {
			t.Errorf("%g: %q is wider", width, says)
		}
	}
}

func TestRandomBarsAreDrawn(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	odd := []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, math.MaxFloat64, 5e-324, -1e99}
	for range 200 {
		f := figure.Figure{X: figure.Axis{Log: r.IntN(2) == 0, Time: r.IntN(2) == 0}, Title: []string{"", "title"}[r.IntN(2)]}
		for range 1 + r.IntN(12) {
			v := (2*r.Float64() - 1) * math.Pow(10, 20*r.Float64()-10)
			if k := r.IntN(20); k < len(odd) {
				v = odd[k]
			}
			f.Bars = append(f.Bars, figure.Bar{Says: []string{"", "a\x1b[2J", strings.Repeat("long ", 40)}[r.IntN(3)], Value: v,
				Text: []string{"", "x"}[r.IntN(2)], Chosen: r.IntN(4) == 0})
		}
		file := written(t, f, figure.Frame{XMin: 1, XMax: math.NaN()}, "svg")
		if bytes.Contains(file, []byte("NaN")) || bytes.Contains(file, []byte("Inf")) || bytes.ContainsRune(file, '\x1b') {
			t.Fatalf("a number or sign that is none is in the file of %+v", f)
		}
	}
}
