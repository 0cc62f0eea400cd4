package figure

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"
	"time"
)

// invented is a CCN spectrum of an error function in ln s with points that lie
// around it by known shares; all of it is invented.
func invented(total float64, points bool) Figure {
	f := Figure{
		Key: "spectrum", X: Axis{Says: "supersaturation", Unit: "%", Log: true}, Y: Axis{Says: "CCN", Unit: "cm⁻³", Log: true},
	}
	at := func(s float64) float64 { return total * (1 + math.Erf(math.Log(s/0.3))) / 2 }
	l := Line{}
	for i := range 200 {
		s := 0.05 * math.Pow(40, float64(i)/199)
		l.X, l.Y = append(l.X, s), append(l.Y, at(s))
	}
	f.Lines = []Line{l}
	if points {
		for i, s := range []float64{0.1, 0.2, 0.4, 0.7, 1} {
			y := at(s) * []float64{1.5, 0.8, 1.1, 0.95, 1}[i]
			f.Points = append(f.Points, Point{X: s, Y: y, XLow: s * 0.9, XHigh: s * 1.1, YLow: y * 0.8, YHigh: y * 1.25})
		}
	}
	return f
}

// isolines are lines of critical supersaturation against dry diameter in the
// classic approximation of kappa theory (Petters and Kreidenweis 2007, equation
// 10, Kelvin length 2.1 nm from memory), named at their ends.
func isolines() Figure {
	f := Figure{X: Axis{Says: "dry diameter", Unit: "nm", Log: true}, Y: Axis{Says: "critical supersaturation", Unit: "%", Log: true}}
	for _, kappa := range []float64{0.01, 0.03, 0.1, 0.3, 1} {
		l := Line{Dash: Dotted, Says: "κ " + TickLabel(kappa), AtEnd: true}
		for i := range 60 {
			d := 20 * math.Pow(15, float64(i)/59)
			if s := 100 * math.Sqrt(4*2.1*2.1*2.1/(27*kappa*d*d*d)); s < 3 {
				l.X, l.Y = append(l.X, d), append(l.Y, s)
			}
		}
		f.Lines = append(f.Lines, l)
	}
	nan := math.NaN()
	f.Points = []Point{{X: 50, Y: 0.9, XLow: 46, XHigh: 54, YLow: nan, YHigh: nan}, {X: 90, Y: 0.3, YLow: 0.25, YHigh: 0.36, XLow: nan, XHigh: nan}}
	return f
}

// closure is an invented ratio over two days, with gaps.
func closure() Figure {
	f := Figure{X: Axis{Says: "time", Unit: "UTC", Time: true}, Y: Axis{Says: "predicted over measured"}}
	begin := float64(time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC).Unix())
	nan := math.NaN()
	for i := range 96 {
		if i%17 == 5 {
			continue
		}
		f.Points = append(f.Points, Point{X: begin + 1800*float64(i), Y: 1 + 0.2*math.Sin(float64(i)/9), XLow: nan, XHigh: nan, YLow: nan, YHigh: nan})
	}
	f.Lines = []Line{{Says: "1", AtEnd: true, X: []float64{begin, begin + 2*day}, Y: []float64{1, 1}}}
	return f
}

// free is a figure that need not show zero.
func free(f Figure) Figure {
	f.Y.Free = true
	return f
}

func dataPictures() map[string]Figure {
	held := invented(400, true)
	other := invented(900, true)
	other.Lines[0].Letter, other.Lines[0].Dash = 'A', Dashed
	held.Lines = append(held.Lines, other.Lines[0])
	for _, p := range other.Points {
		p.Letter = 'A'
		held.Points = append(held.Points, p)
	}
	linear := invented(400, true)
	linear.X.Log, linear.Y.Log = false, false
	return map[string]Figure{
		"spectrum": invented(400, true), "spectrum linear": linear, "spectrum held": held, "isolines": isolines(), "closure": closure(),
		"closure free": free(closure()),
		"decades":      {Y: Axis{Log: true}, Points: []Point{{X: 1, Y: 1e-5, XLow: 1, XHigh: 1}, {X: 2, Y: 1e12, XLow: 2, XHigh: 2, YLow: -1, YHigh: 1e13}}},
	}
}

func TestDataPictures(t *testing.T) { compare(t, dataPictures()) }

// Points and bars are told from lines and marks in both sets of characters.
func TestPointsHaveTheirOwnGlyphs(t *testing.T) {
	for _, set := range []glyphSet{boxGlyphs, asciiGlyphs} {
		own := []rune{set.measured, set.upright, set.across}
		others := lineGlyphs + string([]rune{set.bar, set.barLabelled, set.corner, set.floor, set.tick, set.zero, set.crest, set.haze,
			set.point, set.up, set.down, set.left, set.right}) + "ABCDEF"
		for _, r := range own {
			if strings.ContainsRune(others, r) {
				t.Errorf("%q means something else as well", r)
			}
		}
	}
}

// Every point of data lies in a new frame, and its sign on its row and column.
func TestDataLiesInItsFrame(t *testing.T) {
	for name, f := range dataPictures() {
		for h := 4; h <= 60; h++ {
			fr, _ := Fit(f, Frame{}, h)
			if !fr.Suits(f) || fr.rows() != pictureRows(h) {
				t.Fatalf("%s, h %d: %+v", name, h, fr)
			}
			c := newCanvas(79, pictureRows(h), 8, Style{})
			c.place(fr, f.X.Log)
			for _, p := range f.Points {
				if !c.inside(c.col(p.X), c.row(p.Y)) {
					t.Fatalf("%s, h %d: %+v is not in %+v", name, h, p, fr)
				}
			}
			if again, refitted := Fit(f, fr, h); refitted || again != fr {
				t.Fatalf("%s, h %d: fitted again from %+v to %+v", name, h, fr, again)
			}
		}
	}
}

// The frame of data stays while the data are in it and use half of it.
func TestDataFrameStaysStill(t *testing.T) {
	for _, log := range []bool{true, false} {
		f := func(total float64) Figure {
			f := invented(total, false)
			f.Y.Log = log
			return f
		}
		const h = 24
		last, _ := Fit(f(300), Frame{}, h)
		kept := 0
		for i := range 400 { // up to thirty times as many and back
			total := 300 * math.Pow(10, 1.5*math.Sin(2*math.Pi*float64(i)/400))
			n := needsOf(f(total))
			fr, refitted := Fit(f(total), last, h)
			inside := n.low >= last.YMin && n.high <= last.YMax
			used := n.high / last.YMax
			if log {
				used = math.Log(n.high/n.low) / math.Log(last.YMax/last.YMin)
			}
			fresh, _ := Fit(f(total), Frame{}, h)
			switch {
			case refitted && inside && used > 0.501:
				t.Errorf("log %t, %.0f: refitted from %+v to %+v", log, total, last, fr)
			case !refitted && (!inside || used < 0.499) && fr != fresh:
				t.Errorf("log %t, %.0f: stayed at %+v, use %.2f", log, total, last, used)
			case !refitted:
				kept++
			}
			last = fr
		}
		if kept < 350 {
			t.Errorf("log %t: kept %d times of 400", log, kept)
		}
	}
}

// Data that need not show zero fill the height, and zero may still be among them.
func TestFreeRows(t *testing.T) {
	r := rand.New(rand.NewPCG(11, 12))
	for range 5000 {
		at := (2*r.Float64() - 1) * math.Pow(10, 12*r.Float64()-6)
		width := math.Abs(at) * math.Pow(10, 6*r.Float64()-5)
		rows := 2 + r.IntN(60)
		lo, hi, step := freeRows(at, at+width, rows)
		fr := Frame{XMax: 1, YMin: lo, YMax: hi, YStep: step}
		if fr.rows() != rows || lo > at+1e-6*step || hi < at+width-1e-6*step || !isRound(step, 1, 2, 2.5, 5) {
			t.Fatalf("%g and %g more in %d rows: %+v", at, width, rows, fr)
		}
		if rows > 6 && hi-lo > 4*width {
			t.Fatalf("%g and %g more in %d rows use a part of %+v only", at, width, rows, fr)
		}
	}
	for _, v := range []float64{1, 0, -3, 1e9} {
		if lo, hi, step := freeRows(v, v, 10); !(lo <= v && v <= hi && lo < hi && step > 0) {
			t.Errorf("%g alone: %g to %g by %g", v, lo, hi, step)
		}
	}
}

// A change between logarithmic and linear rows needs another frame.
func TestFrameOfAnotherAxis(t *testing.T) {
	f := invented(400, true)
	fr, _ := Fit(f, Frame{}, 20)
	f.Y.Log = false
	to, refitted := Fit(f, fr, 20)
	if !refitted || to.YLog || to.YMin != 0 {
		t.Errorf("%+v", to)
	}
	checkCells(t, Text(f, fr, 79, 20, Style{}), 79, 20, Style{})
}

// Powers of ten lie on rows, labels on the row nearest to their value.
func TestLogRows(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 6))
	for range 3000 {
		low := math.Pow(10, 80*r.Float64()-50)
		high := low * math.Pow(10, 25*r.Float64()*r.Float64())
		rows := 2 + r.IntN(60)
		lo, hi, step := logRows(low, high, rows)
		fr := Frame{XMax: 1, YMin: lo, YMax: hi, YStep: step, YLog: true}
		if !fr.Serves() || fr.rows() != rows || lo > low*(1+1e-6) || hi < high*(1-1e-6) {
			t.Fatalf("%g to %g in %d rows: %+v with %d rows", low, high, rows, fr, fr.rows())
		}
		if n := 1 / step; step < 1 && math.Abs(n-math.Round(n)) > 1e-9 {
			t.Fatalf("%g to %g in %d rows: %g rows a decade", low, high, rows, n)
		}
		labels, _ := rowLabels(fr, rows)
		some := 0
		for _, l := range labels {
			if l != "" {
				some++
			}
		}
		if some < 1 && rows > 2 || some < 2 && rows > 8 {
			t.Fatalf("%g to %g in %d rows: labels %q", low, high, rows, labels)
		}
	}
	fr := Frame{XMax: 1, YLog: true}
	fr.YMin, fr.YMax, fr.YStep = logRows(10, 100, 11)
	labels, _ := rowLabels(fr, 11)
	if got := strings.Join(labels, "|"); got != "10|||20||||50|||100" {
		t.Errorf("one decade in 11 rows: %s", got)
	}
}

func TestTimeTicks(t *testing.T) {
	at := func(text string) float64 {
		v, err := time.Parse("2006-01-02 15:04:05", text)
		if err != nil {
			t.Fatal(err)
		}
		return float64(v.Unix())
	}
	for _, c := range []struct {
		name, from, to string
		most           int
		want           string
	}{
		{"seconds", "2026-03-14 06:00:07", "2026-03-14 06:01:02", 7, "14 Mar 06:00:10|06:00:20|06:00:30|06:00:40|06:00:50|06:01:00"},
		{"an hour", "2026-03-14 06:10:00", "2026-03-14 07:10:00", 8, "14 Mar 06:10|06:20|06:30|06:40|06:50|07:00|07:10"},
		{"two days", "2026-03-14 00:00:00", "2026-03-15 23:55:00", 8, "14 Mar|06:00|12:00|18:00|15 Mar|06:00|12:00|18:00"},
		{"a week", "2026-03-14 05:00:00", "2026-03-21 05:00:00", 9, "15 Mar|16 Mar|17 Mar|18 Mar|19 Mar|20 Mar|21 Mar"},
		{"two months", "2026-02-03 00:00:00", "2026-04-02 00:00:00", 8, "11 Feb|21 Feb|1 Mar|11 Mar|21 Mar|1 Apr"},
		{"a year", "2025-11-20 00:00:00", "2026-11-20 00:00:00", 8, "Jan 2026|Mar 2026|May 2026|Jul 2026|Sep 2026|Nov 2026"},
		{"a life", "1950-05-05 00:00:00", "2026-01-01 00:00:00", 9, "1960|1970|1980|1990|2000|2010|2020"},
	} {
		var got []string
		for _, tick := range (Axis{Time: true}).Ticks(at(c.from), at(c.to), c.most) {
			got = append(got, tick.Label)
			if tick.Value < at(c.from) || tick.Value > at(c.to) {
				t.Errorf("%s: %s lies outside", c.name, tick.Label)
			}
		}
		if strings.Join(got, "|") != c.want {
			t.Errorf("%s: %s, want %s", c.name, strings.Join(got, "|"), c.want)
		}
	}
	r := rand.New(rand.NewPCG(7, 8))
	for range 3000 {
		from := (2*r.Float64() - 1) * 4e9
		to := from + math.Pow(10, 11*r.Float64())
		most := 1 + r.IntN(12)
		ticks := (Axis{Time: true}).Ticks(from, to, most)
		if len(ticks) > most {
			t.Fatalf("%g to %g: %d ticks, at most %d", from, to, len(ticks), most)
		}
		for i := 1; i < len(ticks); i++ {
			if ticks[i].Value <= ticks[i-1].Value {
				t.Fatalf("%g to %g: ticks %v", from, to, ticks)
			}
		}
	}
	if ticks := (Axis{Time: true}).Ticks(math.NaN(), 1e300, 5); ticks != nil {
		t.Errorf("no time has ticks %v", ticks)
	}
}

func TestWordsOfPoints(t *testing.T) {
	f := invented(400, false)
	nan := math.NaN()
	f.Points = []Point{{X: 0.2, Y: 112, YLow: 101, YHigh: 123}, {X: 0.4, Y: 250, YLow: nan, YHigh: nan, Letter: 'A'}, {X: nan}}
	if got, want := strings.Join(Words(f), "|"), "measured 112 cm⁻³ (101 to 123) at 0.2 %|A: measured 250 cm⁻³ at 0.4 %"; got != want {
		t.Errorf("%s, want %s", got, want)
	}
	c := closure()
	c.Points = c.Points[3:4]
	if got := Words(c)[0]; got != "measured 1.07 at 14 Mar 2026 01:30" {
		t.Error(got)
	}
}

// Figures of data with all kinds of broken numbers fill their cells.
func TestEveryDataFigureAtEverySize(t *testing.T) {
	r := rand.New(rand.NewPCG(9, 10))
	var last Frame
	number := func() float64 {
		switch v := math.Pow(10, 9*r.Float64()-3); r.IntN(12) {
		case 0:
			return math.NaN()
		case 1:
			return math.Inf(1 - 2*r.IntN(2))
		case 2:
			return -v
		case 3:
			return v * 1e120
		default:
			return v
		}
	}
	for range 800 {
		f := anyFigure(r)
		f.X.Time = !f.X.Log && r.IntN(2) == 0
		f.Y.Log, f.Y.Free = r.IntN(2) == 0, r.IntN(2) == 0
		for range r.IntN(20) {
			p := Point{X: number(), Y: number(), XLow: number(), XHigh: number(), YLow: number(), YHigh: number()}
			if r.IntN(3) == 0 {
				p.Letter = []rune{'A', 'F', '\x1b', '広'}[r.IntN(4)]
			}
			f.Points = append(f.Points, p)
		}
		for i := range f.Lines {
			f.Lines[i].AtEnd = r.IntN(2) == 0
		}
		w, h := 10+r.IntN(191), 3+r.IntN(58)
		st := Style{ASCII: r.IntN(2) == 0}
		fr, _ := Fit(f, last, h)
		if !fr.Suits(f) || fr.rows() != pictureRows(h) {
			t.Fatalf("h %d: frame %+v cannot be drawn", h, fr)
		}
		checkCells(t, Text(f, fr, w, h, st), w, h, st)
		checkCells(t, Text(f, last, w, h, st), w, h, st)
		Words(f)
		last = fr
	}
}
