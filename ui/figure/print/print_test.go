package print

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"image/color"
	"image/png"
	"io"
	"math"
	"strings"
	"testing"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/figure"
)

// kappaAt is the supersaturation in % over a droplet of wet diameter d on a dry
// particle, both in nm: Petters and Kreidenweis 2007, equation 6; Kelvin length
// 2.153 nm from a surface tension of 0.0728 N/m at 20 °C (from memory).
func kappaAt(d, dry, kappa float64) float64 {
	dry3, d3 := dry*dry*dry, d*d*d
	return 100 * ((d3-dry3)/(d3-dry3*(1-kappa))*math.Exp(2.153/d) - 1)
}

func kappaLine(dry, kappa float64) figure.Line {
	l := figure.Line{Crest: true}
	for i := range 300 {
		d := dry * math.Pow(10, 0.001+1.999*float64(i)/299)
		l.X, l.Y = append(l.X, d/2000), append(l.Y, kappaAt(d, dry, kappa))
	}
	return l
}

func crestOf(l figure.Line) (x, y float64) {
	y = math.Inf(-1)
	for i := range l.Y {
		if l.Y[i] > y {
			x, y = l.X[i], l.Y[i]
		}
	}
	return x, y
}

// curve is a Curve figure with two held curves, the two other lines and notes.
func curve() figure.Figure {
	f := figure.Figure{
		Key: "curve", Title: "Equilibrium of an ammonium sulfate particle",
		X:     figure.Axis{Says: "wet radius", Unit: "µm", Log: true},
		Y:     figure.Axis{Says: "supersaturation", Unit: "%"},
		Notes: []string{"A note with <angles> & signs: κ = 0.61 ± 0.01, long enough to be broken into lines because the page is only sixteen centimetres wide, and nothing is cut off.", "Giant nucleus."},
	}
	own := kappaLine(140, 0.61)
	x, y := crestOf(own)
	a, b := kappaLine(100, 0.61), kappaLine(140, 0.1)
	a.Letter, a.Dash, a.Says = 'A', figure.Dashed, "100 nm ammonium sulfate, 0.156 %"
	b.Letter, b.Dash, b.Says = 'B', figure.Dashed, "140 nm, kappa 0.10"
	kelvin := figure.Line{Says: "Kelvin only", Dash: figure.Dotted, X: own.X}
	raoult := figure.Line{Says: "Raoult only", Dash: figure.Dotted, X: own.X}
	for _, r := range own.X {
		k := math.Exp(2.153 / (2000 * r))
		kelvin.Y = append(kelvin.Y, 100*(k-1))
		raoult.Y = append(raoult.Y, (100+kappaAt(2000*r, 140, 0.61))/k-100)
	}
	f.Lines = []figure.Line{own, a, b, kelvin, raoult}
	f.Marks = []figure.Mark{
		{Kind: figure.CrestMark, X: x, Y: y, Text: fmt.Sprintf("%.3f %%", y)},
		{Kind: figure.HazeMark, X: 0.157, Y: -5, Text: "haze 0.157 µm at 95.0 %"},
	}
	return f
}

func written(t *testing.T, f figure.Figure, fr figure.Frame, format string) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(&b, f, fr, format); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestSVG(t *testing.T) {
	fr, _ := figure.Fit(curve(), figure.Frame{}, 24)
	file := written(t, curve(), fr, "svg")
	golden.RequireEqual(t, file)
	for _, want := range []string{"wet radius, µm", "supersaturation, %", "crest 0.094 %", "haze 0.157 µm at 95.0 %", ">A<", ">B<",
		"Kelvin only", "Raoult only", "&lt;angles&gt; &amp; signs: κ", ">0.2<", ">0.5<", ">−0.1<"} {
		if !bytes.Contains(file, []byte(want)) {
			t.Errorf("the SVG lacks %q", want)
		}
	}
	d := xml.NewDecoder(bytes.NewReader(file))
	for {
		if _, err := d.Token(); errors.Is(err, io.EOF) {
			break
		} else if err != nil {
			t.Fatal(err)
		}
	}
}

func TestPNG(t *testing.T) {
	f := curve()
	s := newSheet(f, figure.Frame{})
	img, err := png.Decode(bytes.NewReader(written(t, f, figure.Frame{}, "png")))
	if err != nil {
		t.Fatal(err)
	}
	want := [2]int{int(math.Round(pageWidth.Dots(dotsPerInch))), int(math.Round(s.height().Dots(dotsPerInch)))}
	if size := img.Bounds().Size(); size.X != want[0] || size.Y != want[1] {
		t.Errorf("%v dots, want %v", size, want)
	}
	ink := map[bool]int{}
	for y := range want[1] {
		for x := range want[0] {
			r, g, b, _ := img.At(x, y).RGBA()
			ink[r+g+b < 3*0x8000]++
		}
	}
	if ink[true] < 5000 || ink[true] > ink[false]/5 {
		t.Errorf("%d dark dots, %d light ones", ink[true], ink[false])
	}
}

func TestPDF(t *testing.T) {
	file := written(t, curve(), figure.Frame{}, "pdf")
	if !bytes.HasPrefix(file, []byte("%PDF-")) || !bytes.Contains(file, []byte("%%EOF")) {
		t.Error("not a PDF file")
	}
	if n := bytes.Count(file, []byte("(D:20000101000000)")); n != 2 || bytes.Count(file, []byte("(D:")) != 2 {
		t.Errorf("%d blank dates, want 2 and no others", n)
	}
}

func TestSameBytesTwice(t *testing.T) {
	for _, format := range Formats() {
		first := written(t, curve(), figure.Frame{}, format)
		for range 2 {
			if !bytes.Equal(first, written(t, curve(), figure.Frame{}, format)) {
				t.Errorf("%s: two runs, two files", format)
				break
			}
		}
	}
}

func TestUnknownFormat(t *testing.T) {
	err := Write(io.Discard, curve(), figure.Frame{}, "jpeg")
	if err == nil || !strings.Contains(err.Error(), `"jpeg"`) || !strings.Contains(err.Error(), "svg, png or pdf") {
		t.Errorf("got %v", err)
	}
}

func TestPanicsBecomeErrors(t *testing.T) {
	err := Write(panicking{}, curve(), figure.Frame{}, "svg")
	if err == nil || !strings.Contains(err.Error(), "cannot be drawn as svg") {
		t.Errorf("got %v", err)
	}
}

type panicking struct{}

func (panicking) Write([]byte) (int, error) { panic("out of ink") }

func TestOddFiguresAreDrawn(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	odd := []float64{nan, -1, 0, inf, 1, 2, nan, 3, -inf, 1e300, 5e-324}
	for name, f := range map[string]figure.Figure{
		"empty":      {},
		"empty, log": {X: figure.Axis{Log: true}},
		"one point":  {X: figure.Axis{Log: true}, Lines: []figure.Line{{X: []float64{1}, Y: []float64{1}}}},
		"odd points": {X: figure.Axis{Log: true}, Lines: []figure.Line{{X: odd, Y: odd, Crest: true, Dash: 7, Letter: 'A'}}},
		"odd marks": {Marks: []figure.Mark{{X: nan}, {Y: inf}, {X: 1e300}, {X: -5, Y: 9, Text: "a\x1b[2Jb"},
			{Kind: figure.CrestMark, X: 5, Y: 9, Letter: 'B'}, {Kind: 9}}},
		"tiny":  {X: figure.Axis{Log: true}, Lines: []figure.Line{{X: []float64{1e-9, 2e-9, 1e-8}, Y: []float64{0, 1e-9, 0}, Crest: true}}},
		"great": {Lines: []figure.Line{{X: []float64{1e6, 2e6, 3e6}, Y: []float64{-1e6, 5e6, 0}, Crest: true}}},
	} {
		for _, fr := range []figure.Frame{{}, {XMin: -1, XMax: 2, YMin: -1, YMax: 1, YStep: 0.5}, {XMin: nan, XMax: 1}} {
			file := written(t, f, fr, "svg")
			if bytes.Contains(file, []byte("NaN")) || bytes.Contains(file, []byte("Inf")) || bytes.ContainsRune(file, '\x1b') {
				t.Errorf("%s: a number or sign that is none is in the file", name)
			}
		}
	}
}

func TestSameFrameAsTheScreen(t *testing.T) {
	f := curve()
	s := newSheet(f, figure.Frame{XMin: 0.2, XMax: 5, YMin: -0.1, YMax: 0.4, YStep: 0.05})
	p := s.plot()
	if p.X.Min != 0.2 || p.X.Max != 5 || p.Y.Min != -0.1 || p.Y.Max != 0.4 {
		t.Errorf("x %g to %g, y %g to %g", p.X.Min, p.X.Max, p.Y.Min, p.Y.Max)
	}
}

func TestTicksOfALogarithmicAxis(t *testing.T) {
	var major []string
	small := 0
	for _, tick := range (ticker{axis: figure.Axis{Log: true}, most: 12}).Ticks(0.06, 6) {
		if tick.Label == "" {
			small++
		} else {
			major = append(major, tick.Label)
		}
	}
	if got := strings.Join(major, " "); got != "0.1 0.2 0.5 1 2 5" || small != 13 {
		t.Errorf("labels %s and %d small ticks", got, small)
	}
}

func TestLinesDifferWithoutColour(t *testing.T) {
	f := curve()
	for _, letter := range "CDEF" {
		l := kappaLine(100, 0.61)
		l.Letter, l.Dash = letter, figure.Dashed
		f.Lines = append(f.Lines, l)
	}
	seen := map[string]string{}
	for _, l := range linesOf(f) {
		key := fmt.Sprint(l.style.Dashes)
		if other, ok := seen[key]; ok {
			t.Errorf("%q and %q have the same dashes", other, l.name)
		}
		seen[key] = l.name
	}
}

// The colours on white must reach the 3 to 1 of WCAG 2, criterion 1.4.11, by
// its definition of relative luminance (both from memory).
func TestColoursCanBeSeen(t *testing.T) {
	linear := func(v uint8) float64 {
		c := float64(v) / 255
		if c <= 0.04045 {
			return c / 12.92
		}
		return math.Pow((c+0.055)/1.055, 2.4)
	}
	for _, c := range append(heldColours[:], color.RGBAModel.Convert(barColour).(color.RGBA)) {
		contrast := 1.05 / (0.2126*linear(c.R) + 0.7152*linear(c.G) + 0.0722*linear(c.B) + 0.05)
		if contrast < 3 {
			t.Errorf("%v: contrast %.2f", c, contrast)
		}
	}
}

func BenchmarkWrite(b *testing.B) {
	for _, format := range Formats() {
		b.Run(format, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if err := Write(io.Discard, curve(), figure.Frame{}, format); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
