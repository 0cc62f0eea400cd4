package fieldfile

import (
	"io"
	"math"
	"strings"
	"testing"
	"time"
)

func samples(t *testing.T, f *File) []Sample {
	t.Helper()
	var out []Sample
	for s := f.Samples(); ; {
		var one Sample
		err := s.Next(&one)
		if err == io.EOF {
			return out
		}
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, one)
	}
}

// The same two spectra, wide and long, are the same samples.
func TestWideAndLongSizes(t *testing.T) {
	wide := samples(t, open(t, "time,n @100nm (cm-3),n @50nm (cm-3)\n2026-03-14,2,1\n2026-03-15,,3\n",
		"n @100nm (cm-3)=dN/dlog10D @100nm", "n @50nm (cm-3)=dN/dlog10D @50nm"))
	long := samples(t, open(t, "time,diameter (nm),dN/dlogDp (cm-3)\n2026-03-14,100,2\n2026-03-14,50,1\n2026-03-15,50,3\n2026-03-15,100,\n"))
	if len(wide) != 2 || len(long) != 2 {
		t.Fatalf("%d and %d samples, want 2", len(wide), len(long))
	}
	for i := range wide {
		if !wide[i].Start.Equal(long[i].Start) || !sameBins(wide[i].Bins, long[i].Bins) {
			t.Errorf("sample %d: %v and %v", i, wide[i].Bins, long[i].Bins)
		}
		for j, want := range [][]Cell{{{1e6, Value}, {2e6, Value}}, {{3e6, Value}, {}}}[i] {
			if !sameCell(wide[i].Sizes[j], want) || !sameCell(long[i].Sizes[j], want) {
				t.Errorf("sample %d, size %d: %v and %v, want %v", i, j, wide[i].Sizes[j], long[i].Sizes[j], want)
			}
		}
	}
}

func TestWideAndLongCounts(t *testing.T) {
	wide := samples(t, open(t, "time,ccn 0.5% (cm-3),ccn 0.1% (cm-3),ccn uncertainty 0.1% (cm-3)\n2026-03-14,500,100,3\n"))
	if len(wide) != 1 || len(wide[0].Counts) != 2 || wide[0].Counts[0].At() != 0.001 || wide[0].Counts[0].N.X != 1e8 ||
		wide[0].Counts[0].Uncertainty.X != 3e6 || wide[0].Counts[1].N.X != 5e8 || wide[0].Counts[1].Uncertainty.OK() {
		t.Errorf("wide %+v", wide)
	}
	long := samples(t, open(t, "time,supersaturation_set (%),supersaturation (%),ccn (cm-3)\n2026-03-14,0.1,0.105,100\n2026-03-15,0.5,,500\n"))
	if len(long) != 2 || long[0].Counts[0].At() != 0.00105 || long[0].Counts[0].Set.X != 0.001 || long[1].Counts[0].At() != 0.005 {
		t.Errorf("long %+v", long)
	}
}

func TestIntervals(t *testing.T) {
	half := 30 * time.Minute
	lines := icarttFile()
	lines[7], lines[8], lines[12] = "3600", "Time_Mid, seconds, Time_Mid", "Other, K"
	rec := all(t, open(t, byLines(lines)))[4]
	mid := time.Date(2026, 3, 15, 0, 0, 0, 0, time.UTC)
	if !rec.Start.Equal(mid.Add(-half)) || !rec.End.Equal(mid.Add(half)) {
		t.Errorf("middle: %v to %v", rec.Start, rec.End)
	}
	lines[8] = "UTC, seconds"
	rec = all(t, open(t, byLines(lines)))[4]
	if !rec.Start.Equal(mid) || !rec.End.Equal(mid.Add(2*half)) {
		t.Errorf("start and interval: %v to %v", rec.Start, rec.End)
	}
	rec = all(t, open(t, "end_time\n2026-03-14\n"))[0]
	if !rec.Start.Equal(rec.End) {
		t.Errorf("end only: %v to %v", rec.Start, rec.End)
	}
}

func merged(t *testing.T, how Merging, sources ...Source) []Sample {
	t.Helper()
	var out []Sample
	for m := Merge(how, sources...); ; {
		var s Sample
		err := m.Next(&s)
		if err == io.EOF {
			return out
		}
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, s)
	}
}

func asSource(t *testing.T, text string, offset time.Duration, use ...string) Source {
	return Source{Samples: open(t, text, use...).Samples(), Offset: offset}
}

func TestMergeOnTheFirstFile(t *testing.T) {
	sizes := "start_time,end_time,n @50nm (cm-3)\n" +
		"2026-03-14T00:00:00Z,2026-03-14T00:10:00Z,1\n2026-03-14T00:10:00Z,2026-03-14T00:20:00Z,2\n2026-03-14T01:00:00Z,2026-03-14T01:10:00Z,3\n"
	air := "start_time,end_time,kappa,cn (cm-3)\n2026-03-14T00:00:00Z,2026-03-14T00:15:00Z,0.1,100\n2026-03-14T00:15:00Z,2026-03-14T00:30:00Z,0.2,<50\n"
	use := "n @50nm (cm-3)=dN/dlog10D @50nm"
	got := merged(t, Merging{}, asSource(t, sizes, 0, use), asSource(t, air, 0))
	if len(got) != 3 {
		t.Fatalf("%d windows, want 3", len(got))
	}
	for i, want := range []struct{ size, kappa, cn Cell }{
		{Cell{1e6, Value}, Cell{0.1, Value}, Cell{1e8, Value}},
		{Cell{2e6, Value}, Cell{0.15, Value}, Cell{1e8, Value}}, // 5 minutes of each; a limit is no value
		{Cell{3e6, Value}, Cell{}, Cell{}},
	} {
		k := got[i].Values[Kappa]
		if !sameCell(got[i].Sizes[0], want.size) || k.State != want.kappa.State || math.Abs(k.X-want.kappa.X) > 1e-12 || !sameCell(got[i].Values[CN], want.cn) {
			t.Errorf("window %d: %v %v %v, want %v", i, got[i].Sizes[0], k, got[i].Values[CN], want)
		}
	}
	// with its clock 15 minutes slow, the second file's second record is the first's
	got = merged(t, Merging{}, asSource(t, sizes, 0, use), asSource(t, air, -15*time.Minute))
	if got[0].Values[Kappa].X != 0.2 || got[0].Values[CN].State != Below || got[0].Values[CN].X != 5e7 {
		t.Errorf("with an offset: %v %v", got[0].Values[Kappa], got[0].Values[CN])
	}
}

// Instants make windows that reach to the next record, and over a gap as far as
// usual.
func TestMergeOnInstants(t *testing.T) {
	counts := "time,ccn 0.3% (cm-3)\n2026-03-14T00:00:00Z,1\n2026-03-14T00:10:00Z,2\n2026-03-14T00:20:00Z,3\n2026-03-14T05:00:00Z,4\n"
	air := "time,kappa\n"
	for minute := 0; minute < 600; minute += 5 {
		air += time.Date(2026, 3, 14, 0, minute, 0, 0, time.UTC).Format(time.RFC3339) + "," + itoa(minute) + "\n"
	}
	got := merged(t, Merging{}, asSource(t, counts, 0), asSource(t, air, 0))
	if len(got) != 4 {
		t.Fatalf("%d windows, want 4", len(got))
	}
	for i, want := range []float64{2.5, 12.5, 22.5, 302.5} {
		if got[i].Values[Kappa].X != want || got[i].Counts[0].N.X != float64(i+1)*1e6 || got[i].End.Sub(got[i].Start) != 10*time.Minute {
			t.Errorf("window %d: %v to %v: %v, want %v", i, got[i].Start, got[i].End, got[i].Values[Kappa], want)
		}
	}
}

func TestMergeOnAGrid(t *testing.T) {
	long := "time,supersaturation_set (%),supersaturation (%),ccn (cm-3),ccn_uncertainty (cm-3),ccn_counted\n" +
		"2026-03-14T00:05:00Z,0.1,0.102,100,3,50\n2026-03-14T00:10:00Z,0.2,0.2,200,4,60\n2026-03-14T00:35:00Z,0.1,0.104,120,4,70\n2026-03-14T05:00:00Z,0.5,0.5,1,1,1\n"
	got := merged(t, Merging{Every: time.Hour}, asSource(t, long, 0))
	if len(got) != 2 || len(got[0].Counts) != 2 || !got[0].Start.Equal(time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)) || got[1].Start.Hour() != 5 {
		t.Fatalf("got %+v", got)
	}
	c := got[0].Counts[0]
	if math.Abs(c.N.X-1.1e8) > 1 || math.Abs(c.Supersaturation.X-0.00103) > 1e-12 || c.Set.X != 0.001 || c.Counted.X != 120 || math.Abs(c.Uncertainty.X-2.5e6) > 1 {
		t.Errorf("level 0.1 %%: %+v", c)
	}
}

func TestMergeJoinsFiles(t *testing.T) {
	a := "time,n @50nm (cm-3),temperature (K)\n2026-03-14T00:00:00Z,1,280\n2026-03-14T00:01:00Z,3,282\n"
	b := "time,n @500nm (cm-3),temperature (K)\n2026-03-14T00:00:30Z,7,300\n"
	second := asSource(t, b, 0, "n @500nm (cm-3)=dN/dlog10D @500nm")
	got := merged(t, Merging{Every: time.Hour}, asSource(t, a, 0, "n @50nm (cm-3)=dN/dlog10D @50nm"), second)
	if len(got) != 1 || len(got[0].Bins) != 2 || got[0].Sizes[0].X != 2e6 || got[0].Sizes[1].X != 7e6 || got[0].Values[Temperature].X != 281 {
		t.Errorf("got %+v", got)
	}
	if !noted(second.Samples.f, "ownedtemperature") {
		t.Error("nothing said on the second temperature")
	}
}

// Whoever looks at a sample sees it at its right time, and what is taken out there is
// in no average.
func TestMergeLooks(t *testing.T) {
	s := asSource(t, "time,ccn 0.3% (cm-3)\n2026-03-14T00:00:00Z,1\n2026-03-14T00:10:00Z,2\n2026-03-14T00:20:00Z,3\n", time.Hour)
	s.Look = func(s *Sample) {
		if s.Start.Minute() == 20 && s.Start.Hour() == 1 {
			s.Counts = s.Counts[:0]
		}
	}
	got := merged(t, Merging{Every: time.Hour}, s)
	if len(got) != 1 || len(got[0].Counts) != 1 || !sameCell(got[0].Counts[0].N, Cell{1.5e6, Value}) {
		t.Errorf("got %v, want the mean of the first two", got)
	}
}

func TestMergeRefusesTimeThatRunsBack(t *testing.T) {
	m := Merge(Merging{}, asSource(t, "time,kappa\n2026-03-14,1\n2026-03-13,1\n", 0))
	var s Sample
	err := m.Next(&s)
	if err == nil {
		err = m.Next(&s)
	}
	says(t, err, 3, 0, "time runs backwards")
	says(t, m.Next(&s), 3, 0, "time runs backwards") // and it stays so
	says(t, Merge(Merging{}, asSource(t, "kappa\n1\n", 0)).Next(&s), 2, 0, "no time in the record")
}

func TestAverages(t *testing.T) {
	cells := func(xs ...float64) *pool {
		p := &pool{}
		for _, x := range xs {
			p.add(Measured(x), 1)
		}
		return p
	}
	for _, c := range []struct {
		how  Averaging
		p    *pool
		want float64
	}{
		{Mean, cells(1, 2, 3, 10), 4},
		{Median, cells(10, 1, 3, 2), 2.5},
		{Median, cells(10, 1, 3), 3},
		{QuartileMean, cells(1, 2, 3, 4, 5, 6, 7, 100), 4.5}, // 3, 4, 5, 6
		{QuartileMean, cells(5, 1), 3},
		{QuartileMean, cells(5), 5},
		{Mean, &pool{values: []weighted{{1, 3}, {5, 1}}}, 2},
		{Median, &pool{values: []weighted{{1, 1}, {2, 1}, {9, 100}}}, 2 + 7*(51-1.5)/(52-1.5)}, // 51 of 102 lies between the middles of 2 and 9
	} {
		if got := c.p.cell(c.how); !got.OK() || math.Abs(got.X-c.want) > 1e-12 {
			t.Errorf("%v of %v: got %v, want %v", c.how, c.p.values, got, c.want)
		}
	}
	p := cells()
	if p.cell(Mean).State != Missing {
		t.Error("the mean of nothing is something")
	}
	p.add(Cell{2, Below}, 1)
	p.add(Cell{4, Below}, 1)
	p.add(Cell{9, Above}, 1)
	if got := p.cell(Median); got != (Cell{3, Below}) {
		t.Errorf("limits: %v", got)
	}
}

func TestAtStandard(t *testing.T) {
	power := func(s float64) float64 { return 1e9 * math.Pow(s/0.01, 0.6) }
	var counts []Count
	for _, s := range []float64{0.005, 0.001, 0.002} { // unsorted
		counts = append(counts, Count{Supersaturation: Measured(s), N: Measured(power(s)), Uncertainty: Measured(0.1 * power(s))})
	}
	counts = append(counts, Count{Supersaturation: Measured(0.003), N: Cell{}})
	asked := []float64{0.0005, 0.001, 0.0015, 0.004, 0.005, 0.01}
	got := AtStandard(counts, asked)
	for i, s := range asked {
		inside := s >= 0.001 && s <= 0.005
		if got[i].N.OK() != inside || inside && math.Abs(got[i].N.X/power(s)-1) > 1e-12 {
			t.Errorf("at %v: %v, want %v", s, got[i].N, power(s))
		}
		if inside && (got[i].Uncertainty.X > 0.1001*got[i].N.X || got[i].Uncertainty.X < 0.07*got[i].N.X) {
			t.Errorf("at %v: uncertainty %v", s, got[i].Uncertainty.X/got[i].N.X)
		}
	}
	if AtStandard(nil, []float64{0.01})[0].N.OK() {
		t.Error("something of nothing")
	}
}

// The demo's truth is found again in its merged files, within its counting noise.
func TestTheDemoHoldsItsTruth(t *testing.T) {
	var files []*File
	var sources []Source
	for _, name := range []string{demoCCN, demoSizes, demoAir} {
		f := openDemo(t, name)
		for _, n := range f.Notes() {
			t.Errorf("%s: %v", name, n)
		}
		files, sources = append(files, f), append(sources, Source{Samples: f.Samples()})
	}
	chi, counts, sizes, missing := 0.0, 0, 0.0, 0
	all := merged(t, Merging{}, sources...)
	for _, s := range all {
		tr := truthAt(s.Start.Add(s.End.Sub(s.Start) / 2))
		for i, c := range s.Counts {
			if !c.N.OK() {
				missing++
				continue
			}
			counts++
			chi += math.Pow((c.N.X/1e6-tr.ccn(demoLevels[i]))/(c.Uncertainty.X/1e6), 2)
		}
		if s.Sizes[0].OK() {
			sum := 0.0
			for _, c := range s.Sizes {
				sum += c.X * math.Log10(demoHigh/demoLow) / demoBins / 1e6
			}
			sizes = math.Max(sizes, math.Abs(sum/(tr.above(demoLow)-tr.above(demoHigh))-1))
		}
		if cn := s.Values[CN].X / 1e6; math.Abs(cn/(tr.n[0]+tr.n[1])-1) > 0.02 {
			t.Errorf("%v: %v particles, want %v", s.Start, cn, tr.n[0]+tr.n[1])
		}
	}
	if len(all) != 96 || missing != 11 || counts != 96*5-11 {
		t.Errorf("%d windows with %d counts and %d missing ones, want 96, 469, 11", len(all), counts, missing)
	}
	// chi-squared over its degrees of freedom is 1 ± √(2/469); five of those
	if q := chi / float64(counts); math.Abs(q-1) > 0.33 {
		t.Errorf("counts: reduced chi-squared %v", q)
	}
	if sizes > 0.03 { // 24 cm³ counted of some 1000 cm⁻³ is 0.6 %; the largest of 90
		t.Errorf("sizes: the sum is off by up to %v", sizes)
	}
	if d := files[1].Dropped(); d[460] != 4*demoBins || d[999] != 0 || len(d) != 1 {
		t.Errorf("dropped %v, want 160 for contamination", d)
	}
}

func openDemo(t testing.TB, name string) *File {
	t.Helper()
	data := readDemo(t, name)
	f, err := Open(name, strings.NewReader(data), Options{})
	if err != nil {
		t.Fatal(err)
	}
	return f
}
