package answer

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

func takesApart(t testing.TB, s scenario.Scenario) (Answer, LedgerFacts) {
	t.Helper()
	env := stationEnv()
	env.Workers = 2
	a, err := askLedger(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	return a, a.Facts.(LedgerFacts)
}

func rowOf(t testing.TB, f LedgerFacts, key ledger.Key) AssumptionRow {
	t.Helper()
	for _, r := range f.Assumptions {
		if r.Key == string(key) {
			return r
		}
	}
	t.Fatalf("no row %s", key)
	return AssumptionRow{}
}

// ledgerScenes are the answers that are taken apart in the tests, one kind each.
func ledgerScenes(t testing.TB) map[string]scenario.Scenario {
	modes := func(values ...string) scenario.Scenario {
		return withRows(t, scene(t, append(values, "population=modes")...), "mode", "N=850/cm3 Dg=45nm gsd=1.6", "N=400/cm3 Dg=150nm gsd=1.6")
	}
	return map[string]scenario.Scenario{
		"10 nm":           scene(t, "dry-diameter=10nm"),
		"50 nm":           scene(t, "dry-diameter=50nm"),
		"200 nm":          scene(t, "dry-diameter=200nm"),
		"sea salt":        scene(t, "component=sea salt"),
		"adipic acid":     scene(t, "component=adipic acid"),
		"dust":            scene(t, "component=mineral dust"),
		"demo counts":     scene(t, "of=spectrum"),
		"counts of modes": modes("of=spectrum"),
		"counts of kappa": ofKappas(t, "of=spectrum"),
		"demo ascent":     scene(t, "of=ascent"),
		"ascent of modes": modes("of=ascent", "ascent-bins=40"),
		"ascent of kappa": modesOfKappa(t, "of=ascent"),
	}
}

// Every row of every ledger says what it means in two sentences, and where that is from.
func TestRowsAreExplained(t *testing.T) {
	for name, s := range ledgerScenes(t) {
		t.Run(name, func(t *testing.T) {
			s.Trials.Number = 1000
			a, f := takesApart(t, s)
			for i, r := range f.Assumptions {
				if n := strings.Count(r.Explains+" ", ". "); n < 2 || n > 3 || r.Says == "" || r.Source == "" {
					t.Errorf("%s: %q in %d sentences, %q", r.Key, r.Explains, n, r.Source)
				}
				if known := r.Status == "known"; known != r.Known || !known && r.Reason == nil {
					t.Errorf("%s: %s, known %t, reason %v", r.Key, r.Status, r.Known, r.Reason)
				}
				s.LedgerRow = i + 1
				one, _ := takesApart(t, s)
				if says := strings.Join(one.Finding, " "); !strings.Contains(says, r.Explains) || !strings.Contains(says, r.Source) || one.Record != i+1 {
					t.Errorf("row %d is not explained: %s", i+1, says)
				}
				if s.LedgerOf == scenario.LedgerOfAscent {
					break // one is enough of what takes long
				}
			}
			for _, b := range f.Budget {
				if b.Source == "" || !(b.StandardUncertainty > 0) {
					t.Errorf("%+v", b)
				}
			}
			if len(a.Figures) != 2 || len(a.Figures[0].Bars) != len(f.Assumptions) || len(a.Figures[1].Bars) != len(f.Budget) {
				t.Errorf("%d figures", len(a.Figures))
			}
			if _, err := json.Marshal(f); err != nil {
				t.Error(err)
			}
		})
	}
}

// Rows and inputs stand in the order of their size, and the contributions add up to
// the whole.
func TestRowsAreRanked(t *testing.T) {
	for name, s := range ledgerScenes(t) {
		a, f := takesApart(t, s)
		last := math.Inf(1)
		for _, b := range a.Figures[0].Bars {
			size := math.Abs(b.Value)
			if math.IsNaN(size) {
				size = -1
			}
			if size > last {
				t.Errorf("%s: %s stands after %g", name, b.Says, last)
			}
			last = size
		}
		sum, share := 0.0, 0.0
		for _, b := range f.Budget {
			sum = math.Hypot(sum, float64(b.Contribution))
			share += float64(b.Share)
			if got := float64(b.Sensitivity * b.StandardUncertainty * 100); math.Abs(got-float64(b.Contribution)) > 1e-9 {
				t.Errorf("%s, %s: %g of %g", name, b.Input, got, b.Contribution)
			}
		}
		if !(math.Abs(sum-float64(f.CombinedLinear)) < 1e-9) || !(math.Abs(share-100) < 1e-6) {
			t.Errorf("%s: %g of %g %%, shares %g", name, sum, f.CombinedLinear, share)
		}
		if ratio := float64(f.CombinedMonteCarlo / f.CombinedLinear); !(ratio > 0.9 && ratio < 1.2) {
			t.Errorf("%s: %g %% by trials, %g linear", name, f.CombinedMonteCarlo, f.CombinedLinear)
		}
	}
}

// The answer that is taken apart is the one of its page.
func TestLedgerOfThePage(t *testing.T) {
	for _, values := range [][]string{
		nil, {"dry-diameter=20nm", "temperature=5C"}, {"component=adipic acid"}, {"component=mineral dust"},
		{"component=sodium chloride", "dry-size-is=mobility", "shape-factor=1.08"},
		{"water-activity=kappa", "kappa=0.3", "surface-tension=60mN/m"}, {"kelvin=compressible", "solution-density=measured", "surface-tension=solution"},
		{"water-activity=vant-hoff"}, {"tolman=0.05nm"},
	} {
		page := facts(t, asked(t, values...))
		_, f := takesApart(t, scene(t, values...))
		within(t, "critical supersaturation", f.Answer.CriticalSupersaturation, float64(page.CriticalSupersaturation), 1e-12)
		within(t, "critical wet radius", f.Answer.CriticalWetRadius, float64(page.CriticalWetRadius), 1e-18)
		// of a haze drop the page says which branch it is on; where the drop is one, they agree
		if len(page.Haze) > 0 && page.Haze[0].Branch == "stable" {
			within(t, "haze radius", f.Answer.HazeRadius, float64(page.Haze[0].WetRadius), 1e-18)
		}
	}
	s := scene(t, "of=spectrum", "at-supersaturation=0.2%")
	_, f := takesApart(t, s)
	s.Supersaturations = []float64{0.002}
	page, err := askSpectrum(context.Background(), stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "count", f.Answer.CCN, float64(page.Facts.(SpectrumFacts).Spectrum[0].Count), 1e-6)

	s = scene(t, "of=ascent", "updraft=1m/s")
	_, f = takesApart(t, s)
	risen, err := askAscent(context.Background(), stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	up := risen.Facts.(AscentFacts)
	within(t, "droplets, relative", f.Answer.Droplets/up.Droplets, 1, 1e-6)
	within(t, "peak, relative", f.Answer.PeakSupersaturation/up.Peak, 1, 1e-6)
}

// What the question leaves open keeps the costs: the row, the figure, what to reach.
func TestLedgerIsKept(t *testing.T) {
	env := stationEnv()
	env.Kept = &Kept{}
	s := scene(t, "of=ascent")
	if _, err := askLedger(context.Background(), env, s); err != nil {
		t.Fatal(err)
	}
	first := env.Kept.costs.kept.budget.Contributions
	s.LedgerRow, s.AscentOutcome, s.Reach = 3, "peak-supersaturation", scenario.Measure{Number: 0.01}
	a, err := askLedger(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	if &env.Kept.costs.kept.budget.Contributions[0] != &first[0] {
		t.Error("the ascents were made again")
	}
	f := a.Facts.(LedgerFacts)
	if f.Outcome != "peak_supersaturation" || f.Reach != 1 || a.Record != 3 || !(f.CombinedMonteCarlo > 0) {
		t.Errorf("%s, to reach %g %%, row %d", f.Outcome, f.Reach, a.Record)
	}
	s.Updraft *= 2
	if _, err := askLedger(context.Background(), env, s); err != nil || &env.Kept.costs.kept.budget.Contributions[0] == &first[0] {
		t.Errorf("another updraft: %v", err)
	}
}

// What a person knows better counts instead of the usual.
func TestKnownUncertainties(t *testing.T) {
	s := withRows(t, scene(t, "temperature-uncertainty=2K", "reach=1%"), "uncertainty", "dry-diameter relative=1%", "hygroscopicity relative=0%", "updraft relative=5%")
	a, f := takesApart(t, s)
	for _, b := range f.Budget {
		want := map[string]float64{"dry_diameter": 1e-9, "hygroscopicity": 0, "temperature": 2, "surface_tension": float64(b.StandardUncertainty)}[b.Input]
		within(t, b.Input, b.StandardUncertainty, want, 1e-15)
	}
	if !slices.Contains(codes(a), "uncertainty-unused") {
		t.Errorf("nothing is said of the updraft: %v", a.Notes)
	}
	if len(f.Needs) == 0 || f.Reach != 1 {
		t.Errorf("to reach %g %%: %v", f.Reach, f.Needs)
	}
}

func TestLedgerErrors(t *testing.T) {
	for name, c := range map[string]struct {
		s     scenario.Scenario
		input string
	}{
		"all records": {scene(t, "of=spectrum", "record=all"), "record"},
		"all rise":    {scene(t, "of=ascent", "record=all"), "record"},
		"no record":   {scene(t, "of=spectrum", "record=100000"), "record"},
		"no peak":     {modesOfKappa(t, "of=ascent", "height=10m"), "height"},
		"few trials":  {scene(t, "trials=50"), "trials"},
	} {
		_, err := askLedger(context.Background(), stationEnv(), c.s)
		var in *InputError
		if !errors.As(err, &in) || in.Input != c.input {
			t.Errorf("%s: %v", name, err)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := askLedger(ctx, stationEnv(), scene(t)); !errors.Is(err, context.Canceled) {
		t.Errorf("stopped: %v", err)
	}
}
