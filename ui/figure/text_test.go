package figure

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"
	"unicode"

	"github.com/charmbracelet/x/ansi"
	"github.com/charmbracelet/x/exp/golden"
)

// twoMaxima is a line with two narrow maxima, each between two of its columns.
func twoMaxima() Figure {
	f := Figure{X: Axis{Unit: "µm", Log: true}, Y: Axis{Unit: "%"}}
	l := Line{Crest: true}
	for i := range 2001 {
		x := 0.05 * math.Pow(10, float64(i)/1000)
		narrow := func(at, high float64) float64 { return high * math.Exp(-math.Pow(math.Log(x/at)/0.004, 2)) }
		l.X = append(l.X, x)
		l.Y = append(l.Y, 0.1-0.02/x+narrow(0.3, 0.4)+narrow(1.2, 0.3))
	}
	f.Lines = []Line{l}
	return f
}

func pictures() map[string]Figure {
	plainCurve := withHaze(crestFigure(100, 0.61), 95)
	held := withHeld(withHeld(withHaze(crestFigure(140, 0.61), 95), 'A', 100, 0.61), 'B', 100, 0.3)
	crowded := held
	for i, d := range []float64{60, 100, 140, 200} {
		crowded = withHeld(crowded, 'C'+rune(i), d, 0.61)
	}
	edges := crestFigure(100, 0.61)
	edges.Marks = append(edges.Marks,
		Mark{Kind: HazeMark, X: 0.3, Y: -7, Text: "haze 0.3 µm"},
		Mark{Kind: CrestMark, Letter: 'A', X: 0.4, Y: 9, Text: "9 %"},
		Mark{Kind: PointMark, X: 1e-3, Y: 0.05, Text: "1 nm"},
		Mark{Kind: PointMark, X: 1e3, Y: 0.02},
		Mark{Kind: PointMark, X: 1, Y: 0.2, Text: "seen"})
	linear := Figure{X: Axis{Says: "supersaturation", Unit: "%"}, Y: Axis{Says: "activated"}}
	linear.Lines = []Line{{}}
	for i := range 101 {
		s := float64(i) / 100
		linear.Lines[0].X = append(linear.Lines[0].X, s)
		linear.Lines[0].Y = append(linear.Lines[0].Y, 1/(1+math.Pow(0.3/math.Max(s, 1e-9), 4)))
	}
	return map[string]Figure{
		"curve": plainCurve, "held": held, "crowded": crowded, "others": withOthers(held, 140, 0.61),
		"edges": edges, "two maxima": twoMaxima(), "linear": linear, "empty": {X: Axis{Unit: "µm"}},
		"small crest": crestFigure(4000, 0.9), "great crest": crestFigure(6, 0.01),
	}
}

func TestPictures(t *testing.T) { compare(t, pictures()) }

// compare holds pictures against those that were looked at, in three sizes.
func compare(t *testing.T, pictures map[string]Figure) {
	t.Helper()
	for name, f := range pictures {
		for _, s := range []struct {
			name  string
			w, h  int
			style Style
		}{{"79x11", 79, 11, Style{}}, {"79x11 ascii", 79, 11, Style{ASCII: true}}, {"100x26", 100, 26, Style{}}} {
			t.Run(name+" "+s.name, func(t *testing.T) {
				fr, _ := Fit(f, Frame{}, s.h)
				golden.RequireEqual(t, strings.Join(Lines(Text(f, fr, s.w, s.h, s.style)), "\n")+"\n")
			})
		}
	}
}

// checkCells is what holds for every text picture.
func checkCells(t *testing.T, cells [][]Cell, w, h int, st Style) {
	t.Helper()
	if len(cells) != h {
		t.Fatalf("%d rows, want %d", len(cells), h)
	}
	for i, row := range cells {
		if len(row) != w {
			t.Fatalf("row %d has %d cells, want %d", i, len(row), w)
		}
		for j, c := range row {
			if !unicode.IsPrint(c.Rune) || st.ASCII && c.Rune > unicode.MaxASCII {
				t.Fatalf("row %d cell %d: %q is not to be shown", i, j, c.Rune)
			}
			if c.Rune > unicode.MaxASCII && ansi.StringWidth(string(c.Rune)) != 1 {
				t.Fatalf("row %d cell %d: %q is not one cell wide", i, j, c.Rune)
			}
			if c.Role == Blank && c.Rune != ' ' {
				t.Fatalf("row %d cell %d: %q has no role", i, j, c.Rune)
			}
		}
	}
}

// anyFigure is a figure of random lines, some of them broken.
func anyFigure(r *rand.Rand) Figure {
	f := Figure{X: Axis{Unit: "µm", Log: r.IntN(2) == 0}, Y: Axis{Unit: "%"}}
	scale := math.Pow(10, -9+15*r.Float64())
	odd := func(v float64) float64 {
		switch r.IntN(40) {
		case 0:
			return math.NaN()
		case 1:
			return math.Inf(1 - 2*r.IntN(2))
		case 2:
			return 0
		case 3:
			return v * 1e200 * 1e150
		}
		return v
	}
	for range r.IntN(5) {
		l := Line{Crest: r.IntN(2) == 0, Dash: Dash(r.IntN(4)), Says: []string{"", "Kelvin only", "\x1b[31m広い"}[r.IntN(3)]}
		if r.IntN(2) == 0 {
			l.Letter = 'A' + rune(r.IntN(6))
		}
		x := scale * math.Pow(10, -2*r.Float64())
		for range r.IntN(60) {
			x *= 1 + 0.3*r.Float64()
			l.X = append(l.X, odd(x))
			l.Y = append(l.Y, odd(scale*(2*r.Float64()-1)))
		}
		if r.IntN(8) == 0 && len(l.X) > 0 {
			l.X = l.X[1:]
		}
		f.Lines = append(f.Lines, l)
	}
	for range r.IntN(6) {
		m := Mark{Kind: MarkKind(r.IntN(4)), X: odd(scale * r.Float64()), Y: odd(scale * (2*r.Float64() - 1)), Text: []string{"", "0.1 %", "a\tb\x1b[2Jé広"}[r.IntN(3)]}
		if r.IntN(2) == 0 {
			m.Letter = 'A' + rune(r.IntN(6))
		}
		f.Marks = append(f.Marks, m)
	}
	return f
}

func TestEveryFigureAtEverySize(t *testing.T) {
	r := rand.New(rand.NewPCG(1, 2))
	var last Frame
	for range 800 {
		f := anyFigure(r)
		w, h := 10+r.IntN(191), 3+r.IntN(58)
		st := Style{ASCII: r.IntN(2) == 0}
		fr, _ := Fit(f, last, h)
		if !fr.Serves() || fr.rows() != pictureRows(h) {
			t.Fatalf("h %d: frame %+v cannot be drawn", h, fr)
		}
		cells := Text(f, fr, w, h, st)
		checkCells(t, cells, w, h, st)
		if again := Text(f, fr, w, h, st); !slices.EqualFunc(again, cells, slices.Equal) {
			t.Fatal("the same figure gave other cells")
		}
		checkCells(t, Text(f, fr, w, h+7, st), w, h+7, st) // a frame of another height
		last = fr
	}
}

func TestTinySizes(t *testing.T) {
	for _, f := range []Figure{pictures()["others"], {Bars: ledgerBars()}} {
		for h := range 8 {
			for w := range 14 {
				cells := Text(f, Frame{}, w, h, Style{})
				if w == 0 || h == 0 {
					if cells != nil {
						t.Errorf("%d x %d: cells from nothing", w, h)
					}
					continue
				}
				checkCells(t, cells, w, h, Style{})
			}
		}
	}
}

func TestCrestIsMarked(t *testing.T) {
	for _, dry := range []float64{5, 20, 100, 300, 2000, 9000} {
		f := withHeld(withHaze(crestFigure(dry, 0.61), 90), 'A', dry, 0.61)
		f = withOthers(f, dry, 0.61)
		for h := 4; h <= 60; h += 3 {
			for w := 20; w <= 200; w += 9 {
				fr, _ := Fit(f, Frame{}, h)
				found := 0
				for _, row := range Text(f, fr, w, h, Style{}) {
					for _, c := range row {
						if c.Role == CrestRole && c.Rune == '◆' {
							found++
						}
					}
				}
				if found != 1 {
					t.Fatalf("dry %g nm at %dx%d: %d crest marks", dry, w, h, found)
				}
			}
		}
	}
}

// A maximum far narrower than a column must reach its row.
func TestNarrowMaximumStays(t *testing.T) {
	f := twoMaxima()
	for w := 20; w <= 200; w++ {
		const h = 24
		fr, _ := Fit(f, Frame{}, h)
		c := newCanvas(w, h-2, 8, Style{})
		c.place(fr, true)
		p := c.sample(f.Lines[0])
		maxima := 0
		for _, i := range turns(f.Lines[0].Y, 0.1) {
			x, y := f.Lines[0].X[i], f.Lines[0].Y[i]
			if y < 0.3 {
				continue // the minimum between
			}
			maxima++
			if at := int(math.Round(c.col(x))); p[at] != c.row(y) {
				t.Errorf("w %d: column %d is at row %.2f, the crest at %.2f", w, at, p[at], c.row(y))
			}
		}
		if maxima != 2 {
			t.Fatalf("w %d: %d maxima", w, maxima)
		}
	}
}

func TestOnlyItsOwnCellsChange(t *testing.T) {
	f := crestFigure(100, 0.61)
	fr, _ := Fit(f, Frame{}, 24)
	a := Text(f, fr, 79, 24, Style{})
	b := Text(crestFigure(102, 0.61), fr, 79, 24, Style{})
	for i := range a {
		for j := range a[i] {
			changed := a[i][j] != b[i][j]
			if role := a[i][j].Role; changed && (role == AxisRole || role == TickRole) {
				t.Fatalf("row %d cell %d of the axes changed", i, j)
			}
		}
	}
	if !slices.Equal(a[0], b[0]) {
		t.Error("a row without a curve changed")
	}
}

func TestWords(t *testing.T) {
	f := withHaze(crestFigure(140, 0.61), 95)
	f.Marks = append(f.Marks, Mark{Kind: CrestMark, Letter: 'A', X: 0.461, Y: 0.156}, Mark{Kind: HazeMark, X: 2e-6, Y: 1},
		Mark{Kind: PointMark, X: math.NaN()})
	got := strings.Join(Words(f), "\n")
	want := "crest 0.094 % at 0.764 µm\nhaze 0.157 µm at 95.0 %\nA: crest 0.156 % at 0.461 µm\nhaze 2e-6 µm"
	if got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

func FuzzText(f *testing.F) {
	f.Add(0.1, 0.2, 0.3, -1.0, 0.2, 0.1, 80, 24, true)
	f.Add(math.NaN(), 1e300, -1e-300, 1.0, math.Inf(1), 5e-324, 10, 3, false)
	f.Fuzz(func(t *testing.T, x0, x1, x2, y0, y1, y2 float64, w, h int, log bool) {
		w, h = 1+int(uint(w)%200), 1+int(uint(h)%60)
		fig := Figure{X: Axis{Log: log}, Lines: []Line{
			{X: []float64{x0, x1, x2}, Y: []float64{y0, y1, y2}, Crest: true},
			{X: []float64{x2, x0, x1}, Y: []float64{y1, y0, y2}, Dash: Dotted, Says: "other"},
		}, Marks: []Mark{{X: x1, Y: y1, Text: "m"}, {Kind: HazeMark, X: x0, Y: y2}}}
		fr, _ := Fit(fig, Frame{XMin: x0, XMax: x1, YMin: y0, YMax: y1, YStep: y2}, h)
		checkCells(t, Text(fig, fr, w, h, Style{}), w, h, Style{})
		wild := Frame{XMin: x0, XMax: x2, YMin: y0, YMax: y2, YStep: x1}
		checkCells(t, Text(fig, wild, w, h, Style{ASCII: true}), w, h, Style{ASCII: true})
	})
}

func BenchmarkText(b *testing.B) {
	f := withOthers(withHeld(crestFigure(140, 0.61), 'A', 100, 0.61), 140, 0.61)
	f.Lines = f.Lines[:3]
	for _, s := range []struct{ w, h int }{{79, 13}, {120, 40}} {
		fr, _ := Fit(f, Frame{}, s.h)
		b.Run(fmt.Sprintf("3 lines at %dx%d", s.w, s.h), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				Text(f, fr, s.w, s.h, Style{})
			}
		})
	}
}

func BenchmarkFit(b *testing.B) {
	f := withHeld(crestFigure(140, 0.61), 'A', 100, 0.61)
	fr, _ := Fit(f, Frame{}, 24)
	b.ReportAllocs()
	for b.Loop() {
		Fit(f, fr, 24)
	}
}
