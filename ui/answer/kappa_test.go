package answer

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"reflect"
	"regexp"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// points are scenarios of measurements: the rows, then other values.
func points(t testing.TB, rows []string, values ...string) scenario.Scenario {
	t.Helper()
	s := scene(t, values...)
	for i, r := range rows {
		if err := scenario.SetRow(&s, "point", r, i == 0); err != nil {
			t.Fatalf("%s: %v", r, err)
		}
	}
	return s
}

func implies(t testing.TB, s scenario.Scenario) (Answer, KappaFacts) {
	t.Helper()
	a, err := askKappa(context.Background(), Env{Workers: 2}, s)
	if err != nil {
		t.Fatal(err)
	}
	return a, a.Facts.(KappaFacts)
}

// at25C is the common convention.
var at25C = []string{"temperature=298.15K", "surface-tension=72mN/m"}

func within(t testing.TB, what string, got Number, want, tol float64) {
	t.Helper()
	if !(math.Abs(float64(got)-want) <= tol) {
		t.Errorf("%s %.6g, want %.6g ± %.2g", what, float64(got), want, tol)
	}
}

// Computed for the project elsewhere (field_checks C30): 60 nm ± 3 %, 0.40 % ± 5 %,
// relative u 0.1345 linear of the classic form and 0.138 by Monte Carlo, both ± 0.002.
// The ends of the interval are those of a quadrature of the exact form, 0.30686 and
// 0.52200 (see the test of the library); 100 000 trials know them to 7e-4 and 1.6e-3.
func TestKappaUncertainty(t *testing.T) {
	row := []string{"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel"}
	a, f := implies(t, points(t, row, at25C...))
	within(t, "κ", f.Kappa, 0.3965, 1e-4)
	within(t, "classic κ", f.Classic, 0.3981, 1e-4)
	within(t, "κ at 25 °C", f.Under25C, float64(f.Kappa), 1e-12)
	within(t, "relative u", f.Relative, 0.138, 0.002)
	within(t, "linear u", f.Linear.Relative, 0.1345, 0.002)
	within(t, "low", f.Interval95[0], 0.30686, 2*7e-4)
	within(t, "high", f.Interval95[1], 0.52200, 2*1.6e-3)
	if len(f.Contributions) != 2 || f.Contributions[0].Quantity != "supersaturation" || f.Contributions[0].Share <= f.Contributions[1].Share {
		t.Errorf("contributions %+v, want supersaturation before dry diameter", f.Contributions)
	}
	if !slices.Contains(codes(a), "linear-differs") {
		t.Errorf("notes %q do not say that the distribution is skewed", codes(a))
	}
	_, linear := implies(t, points(t, row, append(at25C, "trials=0")...))
	within(t, "u without trials", linear.Relative, 0.1345, 0.002)
	if linear.MonteCarlo != nil || linear.Interval95 == nil || *linear.Interval95 != *linear.Linear.Interval {
		t.Errorf("without trials: %+v", linear.KappaRow)
	}
}

// Pairs of supersaturation and dry size, growth factors, each as computed for the
// project by the exact form under 298.15 K and 72.0 mN/m (field_checks C02, C04, C28,
// C29), the former from abstracts of Pöhlker et al. 2016 (0.14 ± 0.03, 0.22 ± 0.05).
func TestKappaOfMeasurements(t *testing.T) {
	for row, c := range map[string]struct{ want, tol float64 }{
		"dry-diameter=43nm supersaturation=1.10%":                        {0.139, 1e-3},
		"dry-diameter=172nm supersaturation=0.11%":                       {0.222, 1e-3},
		"dry-diameter=54nm supersaturation=0.7%":                         {0.176, 1e-3}, // C06, Wang et al. 2022
		"dry-diameter=100nm growth-factor=1.70 relative-humidity=90%":    {0.4888, 1e-4},
		"dry-diameter=100nm growth-factor=1.40 relative-humidity=90%":    {0.2230, 1e-4},
		"dry-diameter=100nm growth-factor=1.20 relative-humidity=90%":    {0.0952, 1e-4},
		"dry-diameter=100nm growth-factor=1.40 relative-humidity=89%":    {0.2452, 1e-4},
		"dry-diameter=0.1um growth-factor=1.40 relative-humidity=91.00%": {0.2014, 1e-4},
	} {
		a, f := implies(t, points(t, []string{row}, at25C...))
		within(t, row, f.Kappa, c.want, c.tol)
		if f.Interval95 != nil || !math.IsNaN(float64(f.Relative)) || !strings.Contains(a.Finding[0], "no uncertainty was given") {
			t.Errorf("%s: an uncertainty from nowhere: %v, %q", row, f.Relative, a.Finding[0])
		}
	}
}

// The same measurement in colder water: κ goes with the Kelvin length cubed, the one
// of the common convention stays.
func TestKappaUnderBothConventions(t *testing.T) {
	row := []string{"dry-diameter=100nm supersaturation=0.2%"}
	_, warm := implies(t, points(t, row, at25C...))
	a, cold := implies(t, points(t, row, "temperature=20C"))
	within(t, "κ at 25 °C", cold.Under25C, float64(warm.Kappa), 1e-12)
	// (72.736/72.0 · 298.15/293.15 · 997.047/998.206)³ = 1.0809: tension of pure water
	// at 20 °C by IAPWS R1-76, densities at 25 and 20 °C from memory
	within(t, "ratio", cold.Kappa/warm.Kappa, 1.0809, 1e-3)
	for _, table := range a.Tables {
		if table.Key == "conventions" && (len(table.Rows) != 1 || table.Rows[0][1] != float64(cold.Kappa) || table.Rows[0][4] != float64(cold.Under25C)) {
			t.Errorf("conventions: %v", table.Rows)
		}
	}
}

// Mobility with a shape factor is the volume-equivalent size of the Curve page.
func TestKappaOfMobility(t *testing.T) {
	row := []string{"dry-diameter=100nm±3%rel supersaturation=0.2%±5%rel"}
	_, f := implies(t, points(t, row, "dry-size-is=mobility", "shape-factor=1.08"))
	s := scene(t, "dry-diameter=100nm", "dry-size-is=mobility", "shape-factor=1.08", "water-activity=kappa")
	s.Kappa = scenario.Measure{Number: float64(f.Kappa)}
	c, err := curveQuestion().Ask(context.Background(), Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	within(t, "crest of that κ", facts(t, c).CriticalSupersaturation, 0.2, 1e-9)
	if p := f.Points[0]; !(p.Volume < 0.97*p.Dry) {
		t.Errorf("volume-equivalent diameter %g of mobility diameter %g", p.Volume, p.Dry)
	}
}

// What has no κ is said, and the others go on.
func TestKappaLimitsAreSaid(t *testing.T) {
	const good = "dry-diameter=80nm±3%rel supersaturation=0.27%±5%rel"
	for name, c := range map[string]struct {
		rows          []string
		values        []string
		code, finding string
	}{
		"too high": {[]string{"dry-diameter=60nm supersaturation=4.4%"}, nil, "no-kappa",
			"This measurement has no κ: a wettable particle of 60 nm without any solute already activates at 3.55"},
		"one of two":      {[]string{good, "dry-diameter=60nm supersaturation=4.4%"}, nil, "no-kappa", "1 of 2 measurements have no κ."},
		"none of two":     {[]string{"dry-diameter=60nm supersaturation=4.5%", "dry-diameter=60nm supersaturation=4.4%"}, nil, "no-kappa", "None of the 2 measurements has a κ"},
		"no weight":       {[]string{good, "dry-diameter=60nm supersaturation=0.4%"}, nil, "no-weight", "there is no mean of the 2 points"},
		"scatter":         {[]string{good, "dry-diameter=80nm±3%rel supersaturation=0.4%±5%rel"}, nil, "points-scatter", "scatter more than their own uncertainties say"},
		"beyond any κ":    {[]string{"dry-diameter=80nm±3%rel supersaturation=0.05%±0.03%abs"}, nil, "trials-without-kappa", "κ is"},
		"of the solution": {[]string{good}, []string{"surface-tension=solution"}, "tension-of-solution", "κ is"},
		"plateau above 1": {[]string{good + " plateau=1.1"}, nil, "plateau-above-one", "κ is"},
		"width of growth": {[]string{"dry-diameter=100nm growth-factor=1.4 relative-humidity=90% width=0.1"}, nil, "curve-unused", "κ is"},
		"very cold":       {[]string{good}, []string{"temperature=-30C"}, "surface-tension-extrapolated", "κ is"},
	} {
		t.Run(name, func(t *testing.T) {
			a, _ := implies(t, points(t, c.rows, append(c.values, "trials=5000")...))
			if !slices.Contains(codes(a), c.code) {
				t.Errorf("notes %q, want %q among them", codes(a), c.code)
			}
			if all := strings.Join(a.Finding, " "); !strings.Contains(all, c.finding) {
				t.Errorf("finding %q, want %q in it", all, c.finding)
			}
			explained(t, a)
		})
	}
}

func TestKappaRefuses(t *testing.T) {
	for name, c := range map[string]struct {
		change     func(*scenario.Scenario)
		input, why string
	}{
		"neither":      {func(s *scenario.Scenario) { s.Measurements[0].Supersaturation = scenario.Uncertain{} }, "point[0].dry-diameter", "neither"},
		"both":         {func(s *scenario.Scenario) { s.Measurements[0].Growth.Value = 1.4 }, "point[0].dry-diameter", "one of them"},
		"few trials":   {func(s *scenario.Scenario) { s.Trials.Number = 7 }, "trials", "100 or more"},
		"far coverage": {func(s *scenario.Scenario) { s.Coverage = 0.999 }, "coverage", "99 % or less"},
		"no file":      {func(s *scenario.Scenario) { s.PointsFile = "x.csv" }, "points-file", "files cannot be opened here"},
	} {
		s := scenario.Default()
		c.change(&s)
		_, err := askKappa(context.Background(), Env{}, s)
		var input *InputError
		if !errors.As(err, &input) || input.Input != c.input || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%s: %v, want %q of input %s", name, err, c.why, c.input)
		}
	}
}

// An option of one kind takes the place of the other kind.
func TestKappaGiven(t *testing.T) {
	known := scenario.Uncertain{Value: 1.4}
	for name, c := range map[string]struct {
		options            []string
		activation, growth bool
	}{
		"none":       {nil, true, true},
		"growth":     {[]string{"growth-factor", "relative-humidity"}, false, true},
		"activation": {[]string{"supersaturation"}, true, false},
		"both":       {[]string{"supersaturation", "growth-factor"}, true, true}, // refused later
	} {
		s := scenario.Default()
		s.Measurements[0].Growth, s.Measurements[0].Humidity = known, known
		KappaGiven(&s, func(option string) bool { return slices.Contains(c.options, option) })
		if p := s.Measurements[0]; p.Supersaturation.Known() != c.activation || p.Growth.Known() != c.growth || p.Humidity.Known() != c.growth {
			t.Errorf("%s: %+v", name, p)
		}
	}
}

// Stopped work gives what there is, and says so; before it began there is nothing.
func TestKappaStopped(t *testing.T) {
	s := points(t, []string{
		"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel",
		"dry-diameter=100nm±3%rel growth-factor=1.4±0.02 relative-humidity=90%±1%abs",
	}, "trials=1000000")
	ctx, stop := context.WithCancel(context.Background())
	last := int64(0)
	env := Env{Progress: func(done, total int64) {
		if total != 2000000 || done < last {
			t.Errorf("progress %d of %d after %d", done, total, last)
		}
		last = done
		if done > 100000 {
			stop()
		}
	}}
	a, err := askKappa(ctx, env, s)
	if !errors.Is(err, context.Canceled) {
		t.Fatalf("error %v, want that of the context", err)
	}
	f := a.Facts.(KappaFacts)
	if !f.Stopped || len(a.Finding) == 0 || !slices.Contains(codes(a), "trials-stopped") {
		t.Errorf("stopped %v, finding %q, notes %q", f.Stopped, a.Finding, codes(a))
	}
	if mc := f.Points[0].MonteCarlo; mc == nil || mc.Trials >= 1000000 {
		t.Errorf("first point: %+v, want some trials", mc)
	}
	if f.Points[1].MonteCarlo != nil || f.Points[1].Interval == nil {
		t.Errorf("second point: %+v, want its linear propagation", f.Points[1].KappaRow)
	}
	if a, err := askKappa(ctx, Env{}, s); err == nil || a.Facts != nil {
		t.Error("a question is answered after its end")
	}
}

func TestKappaIsTheSameOnAnyNumberOfCores(t *testing.T) {
	s := points(t, []string{"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel", "dry-diameter=70nm±3%rel supersaturation=0.40%±5%rel"}, "trials=20000")
	one, err := askKappa(context.Background(), Env{Workers: 1}, s)
	if err != nil {
		t.Fatal(err)
	}
	three, err := askKappa(context.Background(), Env{Workers: 3}, s)
	if err != nil {
		t.Fatal(err)
	}
	a, _ := json.Marshal(one.Facts)
	b, _ := json.Marshal(three.Facts)
	if string(a) != string(b) || !reflect.DeepEqual(one.Finding, three.Finding) {
		t.Errorf("one core %s\nthree cores %s", a, b)
	}
}

// Scripts rely on these keys, present also where there is no κ.
func TestKappaKeys(t *testing.T) {
	for name, rows := range map[string][]string{
		"one":    {"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel"},
		"none":   {"dry-diameter=60nm supersaturation=4.4%"},
		"growth": {"dry-diameter=100nm growth-factor=1.4 relative-humidity=90%", "dry-diameter=90nm supersaturation=0.2%"},
	} {
		a, _ := implies(t, points(t, rows, "trials=1000"))
		text, err := json.Marshal(a.Facts)
		if err != nil {
			t.Fatal(err)
		}
		var top map[string]any
		if err := json.Unmarshal(text, &top); err != nil {
			t.Fatal(err)
		}
		for _, key := range []string{"kappa", "kappa_classic", "kappa_interval_95", "relative_standard_uncertainty", "contributions", "kappa_at_25c_convention", "points", "mean"} {
			if _, ok := top[key]; !ok {
				t.Errorf("%s: no key %s", name, key)
			}
		}
		for _, m := range regexp.MustCompile(`"[^"]*"`).FindAllString(string(text), -1) {
			if strings.ContainsAny(m, "ABCDEFGHIJKLMNOPQRSTUVWXYZ") && strings.Contains(m, "_") {
				t.Errorf("%s: key %s", name, m)
			}
		}
	}
}
