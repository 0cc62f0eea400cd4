package figure

import (
	"math"
	"testing"
)

// share is where in the height of the frame the crest lies.
func share(fr Frame, crest float64) float64 { return (crest - fr.YMin) / (fr.YMax - fr.YMin) }

func higher(f Figure, by float64) Figure {
	y := make([]float64, len(f.Lines[0].Y))
	for i, v := range f.Lines[0].Y {
		y[i] = v * by
	}
	f.Lines = []Line{{X: f.Lines[0].X, Y: y, Crest: true}}
	f.Marks = nil
	return f
}

func TestFrameStaysStill(t *testing.T) {
	base := crestFigure(100, 0.61)
	_, crest := crestOf(base.Lines[0].X, base.Lines[0].Y)
	for _, h := range []int{9, 11, 14, 24, 40, 60} {
		last, refitted := Fit(base, Frame{}, h)
		if !refitted {
			t.Fatalf("h %d: the first frame is not new", h)
		}
		kept, news := 0, 0
		for i := range 800 { // up to ten times the crest and down to a tenth
			by := math.Pow(10, math.Sin(2*math.Pi*float64(i)/800))
			before := share(last, crest*by)
			fr, refitted := Fit(higher(base, by), last, h)
			if !refitted {
				kept++
				if fr != last {
					t.Fatalf("h %d: another frame, but not called refitted", h)
				}
			} else {
				news++
				if before >= 0.45 && before <= 0.90 {
					t.Fatalf("h %d by %.3f: refitted though the crest was at %.2f of the height", h, by, before)
				}
			}
			if after := share(fr, crest*by); after < 0.35 || after > 0.90 {
				t.Fatalf("h %d by %.3f: crest at %.2f of the height", h, by, after)
			}
			last = fr
		}
		if news > 60 || kept < 740 {
			t.Errorf("h %d: %d new frames, %d kept", h, news, kept)
		}
	}
}

func TestFrameHoldsWhatItMust(t *testing.T) {
	for _, dry := range []float64{3, 10, 30, 100, 300, 1000, 3000, 10000} {
		for _, kappa := range []float64{0.001, 0.1, 0.61, 1.3} {
			f := withHeld(crestFigure(dry, kappa), 'A', dry*0.8, kappa)
			for h := 5; h <= 60; h++ {
				fr, _ := Fit(f, Frame{}, h)
				for _, l := range f.Lines {
					cx, cy := crestOf(l.X, l.Y)
					if cx < fr.XMin || cx > fr.XMax || cy > fr.YMax || -0.5*cy < fr.YMin {
						t.Fatalf("dry %g kappa %g h %d: crest %.3g %% at %.3g µm is not in %+v", dry, kappa, h, cy, cx, fr)
					}
					if entry, _ := shapeOf(l, true); entry.entry < fr.XMin {
						t.Fatalf("dry %g kappa %g h %d: entry %g lies left of %+v", dry, kappa, h, entry.entry, fr)
					}
				}
				if fr.XMax/fr.XMin < 10*(1-1e-9) {
					t.Fatalf("dry %g kappa %g: less than a decade: %+v", dry, kappa, fr)
				}
				if zero := -fr.YMin / fr.YStep; math.Abs(zero-math.Round(zero)) > 1e-9 || fr.YMin > 0 || fr.YMax < 0 {
					t.Fatalf("dry %g kappa %g h %d: zero is on no row of %+v", dry, kappa, h, fr)
				}
				if !isRound(fr.YStep, 1, 2, 2.5, 5) {
					t.Fatalf("a row is %g", fr.YStep)
				}
				if other, _ := Fit(f, Frame{}, 60); other.XMin != fr.XMin || other.XMax != fr.XMax {
					t.Fatalf("the width depends on the height: %+v, %+v", other, fr)
				}
			}
		}
	}
}

// A resized window must not shift the picture sideways, and going back must
// bring the same picture back.
func TestHeightDoesNotShiftSideways(t *testing.T) {
	first := crestFigure(100, 0.61)
	fr, _ := Fit(first, Frame{}, 24)
	f := crestFigure(104, 0.61)
	moved, refitted := Fit(f, fr, 24)
	if fresh, _ := Fit(f, Frame{}, 24); refitted || moved == fresh {
		t.Fatalf("the test needs a kept frame that differs from a new one: %+v, %+v", moved, fresh)
	}
	for _, h := range []int{11, 40, 24} {
		moved, refitted = Fit(f, moved, h)
		if moved.XMin != fr.XMin || moved.XMax != fr.XMax || !refitted || moved.rows() != pictureRows(h) {
			t.Errorf("h %d: %+v, refitted %t; first %+v", h, moved, refitted, fr)
		}
		if again, refitted := Fit(f, moved, h); refitted || again != moved {
			t.Errorf("h %d: not still: %+v after %+v", h, again, moved)
		}
	}
}

func isRound(v float64, digits ...float64) bool {
	for _, d := range digits {
		n := math.Log10(math.Abs(v) / d)
		if math.Abs(n-math.Round(n)) < 1e-9 {
			return true
		}
	}
	return false
}

func TestTicksAreRound(t *testing.T) {
	for _, c := range []struct {
		name   string
		lo, hi float64
		log    bool
		most   int
		want   []float64
	}{
		{"the curve's frame", 0.13, 3.9, true, 9, []float64{0.2, 0.5, 1, 2}},
		{"ends count", 0.1, 1, true, 9, []float64{0.1, 0.2, 0.5, 1}},
		{"many decades", 1e-9, 1e6, true, 8, []float64{1e-8, 1e-6, 1e-4, 1e-2, 1, 100, 1e4, 1e6}},
		{"powers of ten", 0.5, 2e4, true, 6, []float64{1, 10, 100, 1000, 1e4}},
		{"less than a decade", 0.31, 0.39, true, 5, []float64{0.32, 0.34, 0.36, 0.38}},
		{"linear", 0, 1, false, 6, []float64{0, 0.2, 0.4, 0.6, 0.8, 1}},
		{"the end is not dropped", 0, 1, false, 10, []float64{0, 0.2, 0.4, 0.6, 0.8, 1}},
		{"linear below zero", -30, 20, false, 6, []float64{-30, -20, -10, 0, 10, 20}},
		{"upside down", 2, 1, false, 6, nil},
		{"log of zero", 0, 1, true, 6, nil},
		{"not a number", math.NaN(), 1, false, 6, nil},
	} {
		t.Run(c.name, func(t *testing.T) {
			got := Ticks(c.lo, c.hi, c.log, c.most)
			if len(got) != len(c.want) {
				t.Fatalf("got %v, want %v", got, c.want)
			}
			for i := range got {
				if got[i] != c.want[i] {
					t.Errorf("got %v, want %v", got, c.want)
				}
			}
		})
	}
}

func TestTickLabels(t *testing.T) {
	for v, want := range map[float64]string{
		0: "0", 0.2: "0.2", 0.001: "0.001", 0.0005: "0.0005", 0.00005: "5e-5", 1e-9: "1e-9", 50: "50", 10000: "10000", 1e5: "1e5", -0.25: "-0.25",
	} {
		if got := TickLabel(v); got != want {
			t.Errorf("%g: got %s, want %s", v, got, want)
		}
	}
}

func TestTurningPoints(t *testing.T) {
	for name, c := range map[string]struct {
		y    []float64
		want []int
	}{
		"none":            {[]float64{1, 2, 3}, nil},
		"one maximum":     {[]float64{-9, 1, 3, 2}, []int{2}},
		"two and between": {[]float64{-9, 3, 1, 2, 0}, []int{1, 2, 3}},
		"noise":           {[]float64{-9, 3, 1, 1.005, 1, 0}, []int{1}},
		"a minimum":       {[]float64{3, 1, 2}, []int{1}},
		"empty":           {nil, nil},
		"flat":            {[]float64{1, 1, 1}, nil},
	} {
		got := turns(c.y, 0.01)
		if len(got) != len(c.want) {
			t.Errorf("%s: got %v, want %v", name, got, c.want)
			continue
		}
		for i := range got {
			if got[i] != c.want[i] {
				t.Errorf("%s: got %v, want %v", name, got, c.want)
			}
		}
	}
}

// Where the extrema are known, a rise at the end of what a formula can say is none.
func TestFitKnowsExtrema(t *testing.T) {
	l := Line{X: []float64{1, 2, 3, 4, 5, 6}, Y: []float64{20, -100, -1, 0.3, 0.2, 0.1}, Crest: true}
	free, _ := Fit(Figure{Lines: []Line{l}}, Frame{}, 12)
	l.Extrema = []float64{4}
	known, _ := Fit(Figure{Lines: []Line{l}}, Frame{}, 12)
	if free.YMin > -100 || known.YMin < -0.5 || known.YMax < 0.3 || known.XMax < 4 {
		t.Errorf("found %+v, known %+v", free, known)
	}
	l.Extrema = []float64{4.5} // none of the points
	if again, _ := Fit(Figure{Lines: []Line{l}}, Frame{}, 12); again != free {
		t.Errorf("with extrema off the line %+v, want %+v", again, free)
	}
}

func TestFitOfOddFigures(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for name, f := range map[string]Figure{
		"no lines":       {},
		"no lines, log":  {X: Axis{Log: true}},
		"empty line":     {Lines: []Line{{Crest: true}}},
		"one point":      {X: Axis{Log: true}, Lines: []Line{{X: []float64{1}, Y: []float64{2}, Crest: true}}},
		"one point at 0": {Lines: []Line{{X: []float64{0}, Y: []float64{0}, Crest: true}}},
		"all NaN":        {Lines: []Line{{X: []float64{1, 2}, Y: []float64{nan, nan}, Crest: true}}},
		"infinite":       {Lines: []Line{{X: []float64{1, 2, inf}, Y: []float64{inf, -inf, 1}, Crest: true}}},
		"all negative":   {Lines: []Line{{X: []float64{1, 2, 3}, Y: []float64{-3, -1, -2}, Crest: true}}},
		"zero crest":     {Lines: []Line{{X: []float64{1, 2, 3}, Y: []float64{-3, 0, -2}, Crest: true}}},
		"tiny":           {Lines: []Line{{X: []float64{1, 2, 3}, Y: []float64{-3e-9, 1e-9, 0}, Crest: true}}},
		"great":          {Lines: []Line{{X: []float64{1, 2, 3}, Y: []float64{-3e6, 1e6, 0}, Crest: true}}},
		"log below zero": {X: Axis{Log: true}, Lines: []Line{{X: []float64{-1, 0, 3}, Y: []float64{1, 2, 3}, Crest: true}}},
		"only a mark":    {X: Axis{Log: true}, Marks: []Mark{{X: 3, Y: -4}}},
	} {
		for h := range 30 {
			fr, _ := Fit(f, Frame{}, h)
			if !fr.Serves() || fr.rows() != pictureRows(h) || !isRound(fr.YStep, 1, 2, 2.5, 5) {
				t.Errorf("%s, h %d: %+v", name, h, fr)
			}
			if again, refitted := Fit(f, fr, h); refitted || again != fr {
				t.Errorf("%s, h %d: fitted again from %+v to %+v", name, h, fr, again)
			}
		}
	}
}
