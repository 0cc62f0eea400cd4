package answer

import (
	"context"
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/koehler/ascent"
	"dropcrest/ui/scenario"
)

// Clauses fit a line, and their slots are inputs that count.
func TestAscentStatement(t *testing.T) {
	q := ascentQuestion()
	for name, s := range map[string]scenario.Scenario{
		"default": scenario.Default(),
		"modes":   modesOfKappa(t),
		"salt":    scene(t, "population=modes"),
		"bins":    scene(t, "population=bins"),
		"spread":  modesOfKappa(t, "updraft-spread=0.3m/s"),
		"sweep":   scene(t, "sweep=updraft=0.05..5m/s:20:log number=100..10000/cm3:20:log"),
		"cases":   scene(t, "cases=cases.csv"),
	} {
		clausesServe(t, name, q, s, usualBudget+2) // within 80 all the same
	}
}

// The pictures hold what they are for.
func TestAscentFigures(t *testing.T) {
	a, f := rises(t, modesOfKappa(t))
	if len(a.Figures) != 3 {
		t.Fatalf("%d figures", len(a.Figures))
	}
	peak := a.Figures[0]
	x, y := peak.Lines[0].X, peak.Lines[0].Y
	if top := slices.Max(y); top != float64(f.Peak) || peak.Marks[0].X != float64(f.HeightOfPeak) || peak.Marks[0].Y != top {
		t.Errorf("the line rises to %g, the mark stands at %g, %g; want %g at %g", top, peak.Marks[0].X, peak.Marks[0].Y, f.Peak, f.HeightOfPeak)
	}
	if !slices.IsSorted(x) || x[0] != 0 || x[len(x)-1] != 300 {
		t.Errorf("heights from %g to %g", x[0], x[len(x)-1])
	}
	radii, crossing := a.Figures[1], 0
	for i, row := range f.Followed {
		line := radii.Lines[i]
		if row.Grown != !strings.Contains(line.Says, "haze") || line.Y[len(line.Y)-1] != float64(row.AtEnd)*1e6 {
			t.Errorf("%s is at %g at the end: %+v", line.Says, line.Y[len(line.Y)-1], row)
		}
		if row.Grown {
			crossing++
		}
		// A size crosses when its crest lies below the peak, where growth keeps up.
		if critical := float64(f.ByMode[row.Mode-1].Critical); row.Grown != (float64(row.Dry) > critical) {
			t.Errorf("%g m grown %v, the critical size is %g m", row.Dry, row.Grown, critical)
		}
	}
	if crossing == 0 || crossing == len(f.Followed) {
		t.Errorf("%d of %d sizes cross", crossing, len(f.Followed))
	}
	over := a.Figures[2]
	if len(over.Lines) != 4 || over.Marks[0].X != 0.5 {
		t.Errorf("%d lines over updraft, mark %+v", len(over.Lines), over.Marks)
	}
	for _, l := range over.Lines {
		if !slices.IsSorted(l.Y) {
			t.Errorf("%s: the droplets do not rise with updraft: %v", l.Says, l.Y)
		}
	}
	// The line of quick ascents passes by the ascent itself.
	i := slices.IndexFunc(f.Updrafts, func(u UpdraftRow) bool { return u.Updraft > 0.5 })
	lo, hi := f.Updrafts[i-1], f.Updrafts[i]
	if !(f.Droplets > lo.Droplets && f.Droplets < hi.Droplets) {
		t.Errorf("%g droplets, between %g and %g beside it", f.Droplets, lo.Droplets, hi.Droplets)
	}
}

// All tables fit their columns.
func TestAscentTables(t *testing.T) {
	a, _ := rises(t, modesOfKappa(t, "sweep=updraft=0.1..1m/s:2:log number=100..1000/cm3:3:log"))
	var keys []string
	for _, table := range a.Tables {
		keys = append(keys, table.Key)
		for _, row := range table.Rows {
			if len(row) != len(table.Columns) {
				t.Errorf("%s has a row of %d cells in %d columns", table.Key, len(row), len(table.Columns))
			}
		}
	}
	if want := []string{"sweep", "map", "profile", "modes", "closed_forms", "updrafts", "followed"}; !slices.Equal(keys, want) {
		t.Errorf("tables %q, want %q", keys, want)
	}
}

// The same to the last digit on any number of workers, and from what was kept.
func TestAscentIsTheSameAgain(t *testing.T) {
	s := modesOfKappa(t)
	env := stationEnv()
	env.Kept = &Kept{}
	var first Answer
	for i, workers := range []int{0, 1, 3, 3} {
		env.Workers = workers
		a, err := askAscent(context.Background(), env, s)
		if err != nil {
			t.Fatal(err)
		}
		if i == 0 {
			first = a
		} else if texts(t, a.Facts) != texts(t, first.Facts) {
			t.Errorf("%d workers give another answer", workers)
		}
		if i == 2 {
			env.Kept = nil
		}
	}
}

func texts(t *testing.T, facts any) string {
	t.Helper()
	text, err := json.Marshal(facts)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// The curve over updrafts is kept while the updraft changes, and no longer.
func TestAscentKeepsItsCurve(t *testing.T) {
	env := stationEnv()
	env.Kept = &Kept{}
	curve := func(s scenario.Scenario) *curvePoint {
		if _, err := askAscent(context.Background(), env, s); err != nil {
			t.Fatal(err)
		}
		return &env.Kept.rising.curve[0]
	}
	first := curve(modesOfKappa(t))
	if curve(modesOfKappa(t, "updraft=1m/s", "height=200m")) != first {
		t.Error("another updraft makes the curve anew")
	}
	for _, value := range []string{"temperature=10C", "pressure=800hPa", "mass-accommodation=0.1", "ascent-bins=30", "kappa=0.4"} {
		if before := curve(modesOfKappa(t)); curve(modesOfKappa(t, value)) == before {
			t.Errorf("%s leaves the curve as it was", value)
		}
	}
	s := modesOfKappa(t)
	s.Modes[0].Number *= 2
	if before := curve(modesOfKappa(t)); curve(s) == before {
		t.Error("twice the particles leave the curve as it was")
	}
}

func TestAscentIsLive(t *testing.T) {
	q := ascentQuestion()
	for name, c := range map[string]struct {
		s    scenario.Scenario
		want bool
	}{
		"demo":      {scenario.Default(), true},
		"kappa":     {scene(t, "population=modes", "water-activity=kappa"), true},
		"salt":      {scene(t, "population=modes"), false},
		"few bins":  {scene(t, "population=modes", "ascent-bins=10"), false},
		"own kappa": {modesOfKappa(t), true},
		"given":     {scene(t, "composition=given"), false},
		"Tolman":    {scene(t, "population=modes", "water-activity=kappa", "tolman=0.1nm"), false},
		"bins":      {scene(t, "population=modes", "water-activity=kappa", "ascent-bins=2000"), false},
		"spread":    {scene(t, "population=modes", "water-activity=kappa", "kappa-spread=2"), false},
		"updrafts":  {scene(t, "updraft-spread=0.3m/s"), false},
		"sweep":     {scene(t, "sweep=updraft=1..2m/s:2 number=1..2/cm3:2"), false},
		"cases":     {scene(t, "cases=x.csv"), false},
		"file":      {withRows(t, scenario.Default(), "data", "x.csv"), false},
	} {
		if got := q.IsLive(c.s); got != c.want {
			t.Errorf("%s: live %v, want %v", name, got, c.want)
		}
	}
}

// Progress goes up to its end.
func TestAscentProgress(t *testing.T) {
	env := stationEnv()
	last, end := int64(-1), int64(0)
	env.Progress = func(done, total int64) {
		if done < last {
			t.Errorf("from %d back to %d", last, done)
		}
		last, end = done, total
	}
	if _, err := askAscent(context.Background(), env, modesOfKappa(t)); err != nil {
		t.Fatal(err)
	}
	if last != end || end == 0 {
		t.Errorf("it ends at %d of %d", last, end)
	}
}

// The quick sensitivities are those of many bins and a sharp tolerance.
func TestQuickSensitivities(t *testing.T) {
	s := modesOfKappa(t, "ascent-bins=200")
	_, f := rises(t, s)
	of, err := stationEnv().rising(context.Background(), s)
	if err != nil {
		t.Fatal(err)
	}
	want, err := ascent.Sensitivities(context.Background(), 2, of.parcel(s), ascent.Options{Bins: 150, Tolerance: 1e-7})
	if err != nil {
		t.Fatal(err)
	}
	got := f.Sensitivities
	for what, pair := range map[string][2]float64{"number": {float64(got.Number), want.Number}, "updraft": {float64(got.Updraft), want.Updraft},
		"kappa": {float64(got.Kappa), want.Kappa}, "size": {float64(got.Size), want.Size}, "temperature": {float64(got.Temperature), want.Temperature}} {
		if !(math.Abs(pair[0]-pair[1]) < 0.01) { // finding shows the first decimal of 10 % of it
			t.Errorf("%s %g, want %g", what, pair[0], pair[1])
		}
	}
}
