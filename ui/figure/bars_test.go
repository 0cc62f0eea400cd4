package figure

import (
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"
)

// ledgerBars are invented rows of both signs, sorted by size, with values that
// are tiny, zero, and not known.
func ledgerBars() []Bar {
	return []Bar{
		{Says: "one κ at every dilution", Value: -7.2, Text: "-7.2 %"},
		{Says: "surface tension of pure water, whatever is dissolved", Value: 3.1, Text: "+3.1 %"},
		{Says: "volumes add", Value: -1.4, Text: "-1.4 %"},
		{Says: "water of 25 °C", Value: 0.9, Text: "+0.9 %"},
		{Says: "no Kelvin term", Value: -0.002, Text: "-0.002 %"},
		{Says: "a sphere", Value: 0, Text: "0 %"},
		{Says: "density of the dry salt", Value: math.NaN(), Text: "not known"},
	}
}

// barsOf have these values in turn and are named a, b, c.
func barsOf(values ...float64) []Bar {
	var bars []Bar
	for i, v := range values {
		bars = append(bars, Bar{Says: string('a' + rune(i)), Value: v, Text: digits(v)})
	}
	return bars
}

// choosing is the bars with one of them chosen.
func choosing(bars []Bar, i int) []Bar {
	bars = slices.Clone(bars)
	bars[i].Chosen = true
	return bars
}

func TestBarRows(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name  string
		bars  []Bar
		w, h  int
		style Style
		want  string
	}{
		{"mixed, 79 columns", choosing(ledgerBars(), 0), 79, 8, Style{}, `
▸ 1  one κ at every dilution                            -7.2 %  █████████│
  2  surface tension of pure water, whatever is di…     +3.1 %           │████
  3  volumes add                                        -1.4 %         ▐█│
  4  water of 25 °C                                     +0.9 %           │█
  5  no Kelvin term                                   -0.002 %          ▐│
  6  a sphere                                              0 %           │
  7  density of the dry salt                         not known           │
`},
		{"mixed, 60 columns, ascii", choosing(ledgerBars(), 3), 60, 7, Style{ASCII: true}, `
  1  one kappa at every dilution        -7.2 %  #######|
  2  surface tension of pure wat...     +3.1 %         |###
  3  volumes add                        -1.4 %       -#|
> 4  water of 25 C                      +0.9 %         |#
  5  no Kelvin term                   -0.002 %        -|
  6  a sphere                              0 %         |
  7  density of the dry salt         not known         |`},
		{"all negative: zero at the right edge", barsOf(-4, -2, -0.5), 30, 3, Style{}, `
  1  a    -4  ███████████████│
  2  b    -2         ▐███████│
  3  c  -0.5               ██│`},
		{"all positive: zero at the left edge", choosing(barsOf(4, 2.1, 0.5), 1), 30, 3, Style{}, `
  1  a    4  │████████████████
▸ 2  b  2.1  │████████▌
  3  c  0.5  │██`},
		{"the same size on both sides", barsOf(1, -1), 30, 2, Style{}, `
  1  a   1           │████████
  2  b  -1   ████████│`},
		{"no bar at all", barsOf(nan, 0, math.Inf(-1)), 30, 4, Style{}, `
  1  a   NaN  │
  2  b     0  │
  3  c  -Inf  │
`},
		{"without words", []Bar{{Value: 1}, {Value: -3, Chosen: true}}, 20, 2, Style{ASCII: true}, `
  1             |##-
> 2      #######|`},
		{"evil and wide text", []Bar{{Says: "a\x1b[2J\tb\nc広\uf58e\u2003d", Text: "1\u009b31m", Value: 1}}, 40, 1, Style{}, `
  1  a[2J b c?? d  131m  │██████████████`},
	} {
		t.Run(c.name, func(t *testing.T) {
			cells := Text(Figure{Bars: c.bars}, Frame{}, c.w, c.h, c.style)
			checkCells(t, cells, c.w, c.h, c.style)
			if got := "\n" + strings.Join(Lines(cells), "\n"); got != c.want {
				t.Errorf("got%s\nwant%s", got, c.want)
			}
		})
	}
}

// What does not fit into the rows is counted, and the chosen bar is in sight.
func TestWindowOfBars(t *testing.T) {
	for _, c := range []struct {
		name         string
		n, chosen, h int
		want         string
	}{
		{"all fit", 5, 4, 5, "1|2|3|4|>5"},
		{"rows to spare", 2, 0, 4, ">1|2||"},
		{"at the start", 9, 0, 5, ">1|2|3|4|5 more below"},
		{"the last of the first part", 9, 3, 5, "1|2|3|>4|5 more below"},
		{"in the middle", 9, 5, 5, "3 more above|4|5|>6|3 more below"},
		{"one from the end", 9, 7, 5, "5 more above|6|7|>8|9"},
		{"at the end", 9, 8, 5, "5 more above|6|7|8|>9"},
		{"three rows", 9, 4, 3, "4 more above|>5|4 more below"},
		{"two rows are bars", 9, 8, 2, "8|>9"},
		{"one row", 9, 4, 1, ">5"},
	} {
		bars := choosing(barsOf(make([]float64, c.n)...), c.chosen)
		for i := range bars {
			bars[i].Says, bars[i].Text = "", ""
		}
		var got []string
		for _, line := range Lines(Text(Figure{Bars: bars}, Frame{}, 40, c.h, Style{ASCII: true})) {
			got = append(got, strings.TrimSpace(strings.ReplaceAll(strings.TrimRight(line, "| "), "> ", ">")))
		}
		if strings.Join(got, "|") != c.want {
			t.Errorf("%s: %s, want %s", c.name, strings.Join(got, "|"), c.want)
		}
	}
}

// Every choice is in sight at every height, no window hides one bar alone, and the
// window stands still while the choice is in its first part.
func TestChosenBarIsInSight(t *testing.T) {
	for n := 1; n <= 20; n++ {
		for h := 1; h <= n+2; h++ {
			for chosen := range n {
				from, to := barWindow(n, chosen, h)
				shown := to - from
				hidden := 0
				if from > 0 {
					hidden++
				}
				if to < n {
					hidden++
				}
				switch {
				case from < 0 || to > n || chosen < from || chosen >= to:
					t.Fatalf("%d of %d in %d rows: %d to %d", chosen, n, h, from, to)
				case h >= fewestRows && n > h && shown+hidden != h, h < fewestRows && shown != min(n, h):
					t.Fatalf("%d of %d in %d rows: %d to %d leaves rows", chosen, n, h, from, to)
				case h >= fewestRows && (from == 1 || to == n-1):
					t.Fatalf("%d of %d in %d rows: %d to %d hides one bar", chosen, n, h, from, to)
				case h >= fewestRows && chosen < h-1 && from != 0:
					t.Fatalf("%d of %d in %d rows: the window moved to %d", chosen, n, h, from)
				}
			}
		}
	}
}

// Bars are as long as their values to half a cell, the longest fills its side, none
// leaves it, and none but that of zero vanishes.
func TestBarScale(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 14))
	for range 5000 {
		unit := math.Pow(10, 180*r.Float64()-90)
		var values []float64
		for range 1 + r.IntN(8) {
			values = append(values, unit*(2*r.Float64()-1)*math.Pow(10, -4*r.Float64()))
		}
		n := 3 + r.IntN(60)
		s := newBarScale(barsOf(values...), n)
		if s.left+1+s.right != n || s.left < 0 || s.right < 0 {
			t.Fatalf("%g in %d cells: %+v", values, n, s)
		}
		if lo, hi := slices.Min(values), slices.Max(values); lo > 0 && s.left != 0 || hi < 0 && s.right != 0 {
			t.Fatalf("%g: zero is not at the edge in %+v", values, s)
		}
		for _, v := range values {
			side := s.right
			if v < 0 {
				side = s.left
			}
			halves := s.halves(v)
			want := 2 * float64(s.longest) * math.Abs(v) / s.largest
			switch {
			case halves < 1 || halves > 2*side:
				t.Fatalf("%g of %g: %d halves of a side of %d", v, values, halves, side)
			case math.Abs(v) == s.largest && halves != 2*side:
				t.Fatalf("%g of %g: the longest has %d halves of a side of %d", v, values, halves, side)
			case halves > 1 && math.Abs(float64(halves)-want) > 0.5+1e-9:
				t.Fatalf("%g of %g: %d halves, want %g", v, values, halves, want)
			}
		}
	}
}

// anyBars are random rows, some of them broken.
func anyBars(r *rand.Rand) []Bar {
	bars := make([]Bar, 1+r.IntN(40))
	for i := range bars {
		v := (2*r.Float64() - 1) * math.Pow(10, 20*r.Float64()-10)
		odd := []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, math.MaxFloat64, 5e-324}
		if k := r.IntN(20); k < len(odd) {
			v = odd[k]
		}
		bars[i] = Bar{
			Says:   []string{"", "a name", strings.Repeat("long ", 30), "\x1b[31m広い\tκ", "\n"}[r.IntN(5)],
			Text:   []string{"", "-7.2 %", "not known", strings.Repeat("9", 40), "\x00…"}[r.IntN(5)],
			Value:  v,
			Chosen: r.IntN(20) == 0,
		}
	}
	return bars
}

// A figure of bars fills its cells at every size, shows its first chosen bar, and
// looks neither at the frame nor at the lines.
func TestEveryFigureOfBarsAtEverySize(t *testing.T) {
	r := rand.New(rand.NewPCG(15, 16))
	for range 2000 {
		f := anyFigure(r)
		f.Bars = anyBars(r)
		w, h := 1+r.IntN(120), 1+r.IntN(50)
		st := Style{ASCII: r.IntN(2) == 0}
		cells := Text(f, Frame{}, w, h, st)
		checkCells(t, cells, w, h, st)
		marked := 0
		for _, row := range cells {
			if row[0].Rune == glyphsOf(st).chosen {
				marked++
			}
		}
		if some := slices.ContainsFunc(f.Bars, func(b Bar) bool { return b.Chosen }); some != (marked > 0) {
			t.Fatalf("%d bars in %d rows: %d marks, chosen %t", len(f.Bars), h, marked, some)
		}
		last := Frame{XMin: r.Float64(), XMax: 1 + r.Float64(), YMin: math.NaN(), YMax: 1, YStep: 0.1, YLog: true}
		if !slices.EqualFunc(cells, Text(Figure{Bars: f.Bars}, last, w, h, st), slices.Equal) {
			t.Fatal("frame or lines changed the bars")
		}
		if n := len(Words(f)); n != len(f.Bars) {
			t.Fatalf("%d lines for %d bars", n, len(f.Bars))
		}
	}
}

func TestFrameOfBars(t *testing.T) {
	f := crestFigure(100, 0.61)
	old, _ := Fit(f, Frame{}, 20)
	f.Bars = ledgerBars()
	if fr, refitted := Fit(f, old, 20); fr != (Frame{}) || !refitted {
		t.Errorf("%+v, refitted %t, after a curve", fr, refitted)
	}
	if fr, refitted := Fit(f, Frame{}, 20); fr != (Frame{}) || refitted {
		t.Errorf("%+v, refitted %t, after bars", fr, refitted)
	}
	if !(Frame{}).Suits(f) || !old.Suits(f) {
		t.Error("a figure of bars does not suit every frame")
	}
}

func TestWordsOfBars(t *testing.T) {
	f := Figure{Bars: append(ledgerBars()[:2:2], Bar{Text: "not known"}, Bar{Says: "a sphere"})}
	want := "one κ at every dilution -7.2 %|surface tension of pure water, whatever is dissolved +3.1 %|not known|a sphere"
	if got := strings.Join(Words(f), "|"); got != want {
		t.Errorf("%s, want %s", got, want)
	}
}

// Names, bars and numbers have roles of their own, and the chosen bar is told from
// the others by its mark, not by its role alone.
func TestRolesOfBars(t *testing.T) {
	cells := Text(Figure{Bars: choosing(barsOf(2, -2), 1)}, Frame{}, 30, 2, Style{})
	roles := func(row []Cell) map[Role]string {
		out := map[Role]string{}
		for _, c := range row {
			if c.Role != Blank {
				out[c.Role] += string(c.Rune)
			}
		}
		return out
	}
	first, second := roles(cells[0]), roles(cells[1])
	if first[CurrentRole] == "" || first[CrestRole] != "" || first[TickRole] != "1" || first[LabelRole] != "a2" || first[AxisRole] != "│" {
		t.Errorf("%q", first)
	}
	if second[CurrentRole] != "" || !strings.HasPrefix(second[CrestRole], "▸█") {
		t.Errorf("%q", second)
	}
}

func FuzzBars(f *testing.F) {
	f.Add("one κ at every dilution", "-7.2 %", -7.2, 3.1, 0.0, 80, 24, uint8(3))
	f.Add("private \uf58e", "no\u00a0break", 0.0, 0.0, 0.0, 60, 5, uint8(1))
	f.Add("\x1b[2J", "\x9b", math.NaN(), math.Inf(1), 5e-324, 1, 2, uint8(200))
	f.Fuzz(func(t *testing.T, says, text string, a, b, c float64, w, h int, n uint8) {
		w, h = 1+int(uint(w)%200), 1+int(uint(h)%60)
		var bars []Bar
		for i := range int(n) + 1 {
			bars = append(bars, Bar{Says: says, Text: text, Value: []float64{a, b, c}[i%3], Chosen: i == int(n)/2})
		}
		for _, st := range []Style{{}, {ASCII: true}} {
			checkCells(t, Text(Figure{Bars: bars}, Frame{}, w, h, st), w, h, st)
		}
	})
}
