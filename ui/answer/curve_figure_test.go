package answer

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/figure"
)

// The picture's line contains crest and haze, and runs upwards in the radius.
func TestLineContainsItsMarks(t *testing.T) {
	for name, values := range map[string][]string{
		"default":   nil,
		"small":     {"dry-diameter=5nm"},
		"giant":     {"dry-diameter=9000nm"},
		"dry air":   {"relative-humidity=30%"},
		"above 100": {"relative-humidity=100.05%"},
	} {
		a := asked(t, values...)
		line := a.Figures[0].Lines[0]
		if !slices.IsSorted(line.X) {
			t.Errorf("%s: the line turns back", name)
		}
		for _, m := range a.Figures[0].Marks {
			if strings.HasPrefix(m.Text, "dry at") {
				continue // a crystal is on no line
			}
			i, ok := slices.BinarySearch(line.X, m.X)
			if !ok || math.Abs(line.Y[i]-m.Y) > 1e-6*math.Max(1e-3, math.Abs(m.Y)) {
				t.Errorf("%s: mark %q at %g, %g is not on the line", name, m.Text, m.X, m.Y)
			}
		}
		for _, y := range line.Y {
			if math.IsNaN(y) || math.IsInf(y, 0) {
				t.Fatalf("%s: the line has the value %g", name, y)
			}
		}
	}
}

// Kelvin only and Raoult only multiply to the curve.
func TestOthersMakeTheCurve(t *testing.T) {
	a := asked(t)
	line := a.Figures[0].Lines[0]
	for i := range line.X {
		product := (1 + a.Others[0].Y[i]/100) * (1 + a.Others[1].Y[i]/100)
		if want := 1 + line.Y[i]/100; math.Abs(product-want) > 1e-12 {
			t.Fatalf("at %g µm the product is %.15g, the curve %.15g", line.X[i], product, want)
		}
	}
}

func TestHeldLine(t *testing.T) {
	line, marks := HeldLine('B', asked(t))
	if line.Letter != 'B' || line.Dash != figure.Dashed || !line.Crest || len(line.X) == 0 {
		t.Errorf("held line %q, dash %d, crest %t, %d points", line.Letter, line.Dash, line.Crest, len(line.X))
	}
	if len(marks) != 1 || marks[0].Letter != 'B' {
		t.Errorf("marks %v, want the crest of B", marks)
	}
	if line, marks := HeldLine('C', Answer{}); line.Letter != 'C' || len(marks) != 0 {
		t.Errorf("no answer gives %v %v", line, marks)
	}
}

func TestTableRange(t *testing.T) {
	s := scene(t, "points=7", "from-radius=0.1um", "to-radius=2um")
	a, err := askCurve(context.Background(), Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	rows := facts(t, a).Curve
	if len(rows) != 7 {
		t.Fatalf("%d points, want 7", len(rows))
	}
	if lo, hi := float64(rows[0].WetRadius), float64(rows[6].WetRadius); math.Abs(lo-1e-7) > 1e-16 || math.Abs(hi-2e-6) > 1e-15 {
		t.Errorf("from %g to %g m, want 1e-7 to 2e-6", lo, hi)
	}
	fr, _ := CurveFrame(s, a.Figures[0], figure.Frame{}, 20)
	if math.Abs(fr.XMin-0.1) > 1e-12 || math.Abs(fr.XMax-2) > 1e-12 {
		t.Errorf("the frame runs from %g to %g µm, want 0.1 to 2", fr.XMin, fr.XMax)
	}
}
