package answer

import (
	"encoding/json"
	"math"
	"testing"
	"time"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// seasonOf takes n observations, the i-th changed by change.
func seasonOf(t testing.TB, s scenario.Scenario, env Env, n int, change func(i int, o *observation)) *activated {
	t.Helper()
	c, err := newComposer(env, s)
	if err != nil {
		t.Fatal(err)
	}
	rows := newRecordRows(env)
	q := newSeason(c, rows)
	for i := range n {
		o := inventedObservation(t, s, 60, 0.3)
		o.number, o.start = i+1, time.Unix(int64(1800*i), 0)
		o.end = o.start.Add(30 * time.Minute)
		change(i, o)
		a, err := c.ofRecord(o)
		if err != nil {
			t.Fatal(err)
		}
		if err := a.predict(); err != nil {
			t.Fatal(err)
		}
		if err := q.add(a); err != nil {
			t.Fatal(err)
		}
	}
	w, err := q.close()
	if err != nil {
		t.Fatal(err)
	}
	return w
}

// All records say what was put into them: counts 1 % too high, κ 0.3.
func TestSeason(t *testing.T) {
	s := scene(t, "record=all")
	streamed := 0
	env := Env{Row: func(table string, row []any) error {
		if table != "records" || len(row) != 3+len(countColumns)+1 {
			t.Errorf("row of %d cells of %q", len(row), table)
		}
		streamed++
		return nil
	}}
	w := seasonOf(t, s, env, 40, func(i int, o *observation) {
		switch i {
		case 3:
			o.counts, o.rejected = nil, []rejection{{"missing", 5}}
		case 5:
			o.sizes, o.noSizes = nil, "missing"
		case 7:
			o.kappa = math.NaN()
		}
	})
	if want := 40 * 5; streamed != want {
		t.Errorf("%d rows, want %d", streamed, want)
	}
	f := w.facts()
	if f.Closure == nil || f.Closure.Pairs != 38*5 || len(f.Closure.By) != 5 {
		t.Fatalf("closure %+v", f.Closure)
	}
	if got := float64(f.Closure.Ratio.Median); !(math.Abs(got-1/1.01) < 1e-9) {
		t.Errorf("median ratio %g, want %g", got, 1/1.01)
	}
	if got := float64(f.Closure.ThroughOrigin); math.Abs(got-1/1.01) > 0.01 { // one record is of ammonium sulfate
		t.Errorf("slope %g, want about %g", got, 1/1.01)
	}
	for _, m := range f.Measured {
		// d ln κ/d ln N is 3N/(dN/dlnD), up to some 10 here
		if !(math.Abs(float64(m.Kappa)/0.3-1) < 0.1) || m.Records != 38 {
			t.Errorf("at %g %%: κ %g of %d records, want about 0.3 of 38", m.Supersaturation, m.Kappa, m.Records)
		}
	}
	if f.Record == nil || f.Record.Records != 40 || f.Record.Number != nil || f.Record.Start != "1970-01-01T00:00:00Z" {
		t.Errorf("record %+v", f.Record)
	}
	if len(w.times.cells) != 40 || !math.IsNaN(w.times.cells[3].ratio()) || !(math.Abs(w.times.cells[0].ratio()-1/1.01) < 1e-9) {
		t.Errorf("%d times, the first ones %v", len(w.times.cells), w.times.cells[:4])
	}
	figures, err := w.figures()
	if err != nil || len(figures) != 3 {
		t.Errorf("%d figures, %v", len(figures), err)
	}
}

// A timeline of any length stays short and keeps the mean.
func TestTimeline(t *testing.T) {
	var line timeline
	sum, n := 0.0, 0
	for i := range 105000 {
		ratio := math.Exp(math.Sin(float64(i) / 1000))
		line.add(time.Unix(int64(300*i), 0), 5*time.Minute, ratio)
		sum, n = sum+math.Log(ratio), n+1
	}
	got, of := 0.0, 0
	for _, c := range line.cells {
		got, of = got+c.sum, of+c.n
	}
	if len(line.cells) > mostTimes || len(line.cells) < mostTimes/2 || of != n || !(math.Abs(got-sum) < 1e-6*math.Abs(sum)+1e-6) {
		t.Errorf("%d cells of %d ratios with sum %g, want at most %d of %d with %g", len(line.cells), of, got, mostTimes, n, sum)
	}
}

// dN/dlog10 D, dN/dln D and counts of one aerosol give one spectrum, and one κ.
func TestSpectrumOfThreeMeasures(t *testing.T) {
	s := scene(t)
	c, err := newComposer(Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	o := inventedObservation(t, s, 40, 0.3)
	var texts []string
	for _, as := range []aerosol.Measure{aerosol.Counts, aerosol.PerLn, aerosol.PerLog10} {
		again := *o
		if again.sizes, err = aerosol.NewBins(o.sizes.Grid(), o.sizes.Values(nil, as), as); err != nil {
			t.Fatal(err)
		}
		a, err := c.ofRecord(&again)
		if err != nil {
			t.Fatal(err)
		}
		if err := a.solve(); err != nil {
			t.Fatal(err)
		}
		for i := range a.predicted { // to 10 digits: the last ones differ by rounding
			a.predicted[i].count = math.Round(a.predicted[i].count / 10)
		}
		text, err := json.Marshal(a.facts().Spectrum)
		if err != nil {
			t.Fatal(err)
		}
		texts = append(texts, string(text))
	}
	if texts[0] != texts[1] || texts[0] != texts[2] {
		t.Errorf("spectra differ:\n%s", texts)
	}
}

// A count without κ says why.
func TestNoKappaIsSaid(t *testing.T) {
	s := scene(t)
	c, err := newComposer(Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	o := inventedObservation(t, s, 40, 0.3)
	o.counts[4].count = 1e10
	o.counts[3].count = 0
	a, err := c.ofRecord(o)
	if err != nil {
		t.Fatal(err)
	}
	if err := a.solve(); err != nil {
		t.Fatal(err)
	}
	f := a.facts()
	for i, want := range map[int]spectrum.Reason{4: spectrum.MoreThanSized, 3: spectrum.NothingCounted} {
		if m := f.Measured[i]; m.NoKappa == nil || *m.NoKappa != string(want) || m.Kappa == m.Kappa {
			t.Errorf("at %g %%: κ %g and %v, want %s", m.Supersaturation, m.Kappa, m.NoKappa, want)
		}
	}
	if f.Closure.Pairs != 4 {
		t.Errorf("%d pairs, want 4: nothing counted has no ratio", f.Closure.Pairs)
	}
}
