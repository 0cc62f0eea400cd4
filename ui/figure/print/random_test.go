package print

import (
	"bytes"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/ui/figure"
)

// Whatever the numbers are, the file is written and holds numbers only.
func TestRandomFiguresAreDrawn(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	number := func() float64 {
		switch v := (2*r.Float64() - 1) * math.Pow(10, 12*r.Float64()-6); r.IntN(12) {
		case 0:
			return math.NaN()
		case 1:
			return math.Inf(r.IntN(2)*2 - 1)
		case 2:
			return v * 1e300
		default:
			return v
		}
	}
	for range 200 {
		f := figure.Figure{X: figure.Axis{Log: r.IntN(2) == 0}, Y: figure.Axis{Log: r.IntN(2) == 0}}
		f.X.Time = !f.X.Log && r.IntN(2) == 0
		for range r.IntN(9) {
			f.Points = append(f.Points, figure.Point{X: number(), Y: number(), XLow: number(), XHigh: number(), YLow: number(), YHigh: number(),
				Letter: []rune{0, 'A'}[r.IntN(2)]})
		}
		for range r.IntN(9) {
			l := figure.Line{Dash: figure.Dash(r.IntN(4)), Crest: r.IntN(2) == 0, AtEnd: r.IntN(2) == 0, Says: "name"}
			if r.IntN(2) == 0 {
				l.Letter = 'A' + rune(r.IntN(6))
			}
			for range r.IntN(30) {
				l.X, l.Y = append(l.X, number()), append(l.Y, number())
			}
			f.Lines = append(f.Lines, l)
			f.Marks = append(f.Marks, figure.Mark{Kind: figure.MarkKind(r.IntN(3)), X: number(), Y: number(), Letter: l.Letter, Text: "x"})
		}
		fr := figure.Frame{XMin: number(), XMax: number(), YMin: number(), YMax: number(), YStep: number()}
		file := written(t, f, fr, "svg")
		if bytes.Contains(file, []byte("NaN")) || bytes.Contains(file, []byte("Inf")) {
			t.Fatalf("no number in the file of %+v through %+v", f, fr)
		}
	}
}
