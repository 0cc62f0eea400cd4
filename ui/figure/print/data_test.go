package print

import (
	"bytes"
	"math"
	"strings"
	"testing"
	"time"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/figure"
)

// spectrum is an invented spectrum on logarithmic axes with measured points, a
// held series and two lines named at their ends.
func spectrum() figure.Figure {
	f := figure.Figure{
		Key: "spectrum", Title: "An invented spectrum",
		X: figure.Axis{Says: "supersaturation", Unit: "%", Log: true},
		Y: figure.Axis{Says: "CCN", Unit: "cm⁻³", Log: true},
	}
	power := func(c float64) figure.Line {
		l := figure.Line{}
		for i := range 50 {
			s := 0.05 * math.Pow(20, float64(i)/49)
			l.X, l.Y = append(l.X, s), append(l.Y, c*math.Sqrt(s))
		}
		return l
	}
	own, held := power(500), power(900)
	held.Letter, held.Dash, held.Says = 'A', figure.Dashed, "held A"
	f.Lines = []figure.Line{own, held}
	for _, c := range []float64{50, 5000} {
		l := power(c)
		l.Dash, l.Says, l.AtEnd = figure.Dotted, "C "+figure.TickLabel(c), true
		f.Lines = append(f.Lines, l)
	}
	nan := math.NaN()
	f.Points = []figure.Point{
		{X: 0.1, Y: 170, XLow: 0.09, XHigh: 0.11, YLow: 150, YHigh: 190}, {X: 0.4, Y: 300, XLow: nan, XHigh: nan, YLow: nan, YHigh: nan},
		{X: 0.8, Y: 500, XLow: nan, XHigh: nan, YLow: -10, YHigh: 900}, {Letter: 'A', X: 0.2, Y: 410, XLow: nan, XHigh: nan, YLow: 350, YHigh: 500},
	}
	return f
}

func TestDataSVG(t *testing.T) {
	file := written(t, spectrum(), figure.Frame{}, "svg")
	golden.RequireEqual(t, file)
	for _, want := range []string{"CCN, 1/cm³", ">C 50<", ">C 5000<", ">measured<", ">A  held A<", ">200<", ">500<", ">0.1<"} {
		if n := bytes.Count(file, []byte(want)); n != 1 {
			t.Errorf("%q is there %d times", want, n)
		}
	}
}

// A bar has two halves with a cap each; without uncertainty there is none.
func TestBars(t *testing.T) {
	f := spectrum()
	strokes := func() int { return bytes.Count(written(t, f, figure.Frame{}, "svg"), []byte("stroke-width:0.8")) }
	with := strokes()
	nan := math.NaN()
	for i := range f.Points {
		p := &f.Points[i]
		p.XLow, p.XHigh, p.YLow, p.YHigh = nan, nan, nan, nan
	}
	if without := strokes(); with-without < 2*2*3+1 {
		t.Errorf("%d strokes with bars, %d without", with, without)
	}
}

func TestTimeAxis(t *testing.T) {
	begin := float64(time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC).Unix())
	f := figure.Figure{X: figure.Axis{Says: "time", Unit: "UTC", Time: true}}
	for i := range 48 {
		f.Points = append(f.Points, figure.Point{X: begin + 3600*float64(i), Y: 1, XLow: math.NaN(), XHigh: math.NaN(), YLow: 0.9, YHigh: 1.1})
	}
	file := string(written(t, f, figure.Frame{}, "svg"))
	for _, want := range []string{">14 Mar<", ">15 Mar<", ">06:00<"} {
		if !strings.Contains(file, want) {
			t.Errorf("the file lacks %s", want)
		}
	}
}
