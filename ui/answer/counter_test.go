package answer

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"regexp"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// calibrate asks the Counter question without bootstrap, for spherical particles.
func calibrate(t testing.TB, change func(*scenario.Scenario)) (Answer, error) {
	t.Helper()
	s := scenario.Default()
	s.Bootstrap = 0
	if change != nil {
		change(&s)
	}
	return askCounter(context.Background(), stationEnv(), s)
}

func counterFacts(t testing.TB, a Answer) CounterFacts {
	t.Helper()
	f, ok := a.Facts.(CounterFacts)
	if !ok {
		t.Fatalf("facts are a %T", a.Facts)
	}
	return f
}

func TestCounterFactsKeys(t *testing.T) {
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(a.Facts)
	if err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"scans", "temperature_difference_k", "d50_m", "d50_standard_uncertainty_m", "plateau", "doubly_charged_fraction",
		"critical_supersaturation_percent", "line", "slope_percent_per_k", "intercept_percent", "covariance", "left_out"} {
		if !strings.Contains(string(text), `"`+key+`":`) {
			t.Errorf("no key %s", key)
		}
	}
}

// Bad files and bad scans: each says what is wrong, and the rest is kept.
func TestBadScans(t *testing.T) {
	good := string(demoLog(t))
	lines := strings.SplitAfter(good, "\n")
	zero := strings.Join(lines[:23], "") + regexp.MustCompile(`,\d+\n`).ReplaceAllString(strings.Join(lines[23:45], ""), ",0\n") + strings.Join(lines[45:], "")
	for name, c := range map[string]struct {
		text string
		want string // in the error, or in the finding
	}{
		"nothing activates": {zero, "no droplets at any dry diameter"},
		"no temperature":    {strings.Replace(good, "temperature difference (K)", "remark", 1), "temperature_difference"},
		"empty":             {"", "empty"},
		"unknown salt":      {strings.ReplaceAll(good, "ammonium sulfate", "amonium sulfat"), "did you mean ammonium sulfate"},
		"damaged number":    {strings.Replace(good, lines[5], "2026-03-13T09:02:00Z,ammonium sulfate,3.0,3o,1500,2\n", 1), ":6:"},
	} {
		t.Run(name, func(t *testing.T) {
			file := written(t, "scans.csv", c.text)
			a, err := calibrate(t, func(s *scenario.Scenario) { s.Scans = []scenario.DataFile{{Name: file}} })
			said := strings.Join(a.Finding, " ")
			if err != nil {
				var in *InputError
				if !errors.As(err, &in) {
					t.Fatalf("error %v, want an *InputError", err)
				}
				said = err.Error()
			}
			if !strings.Contains(said, c.want) {
				t.Errorf("it says %q, want %q", said, c.want)
			}
		})
	}
}

// What a log needs before it is fitted: rows while the column settles left out, small
// particles that are not counted corrected for, charges by the size distribution.
func TestCounterPreparation(t *testing.T) {
	var b strings.Builder
	b.WriteString("diameter (nm),dN/dlog10D (cm-3)\n")
	for d := 8.0; d < 900; d *= 1.12 {
		x := math.Log(d/60) / math.Log(1.7)
		fmt.Fprintf(&b, "%.2f,%.3f\n", d, 2000*math.Exp(-x*x/2))
	}
	sizes := written(t, "sizes.csv", b.String())
	plain, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	want := counterFacts(t, plain)
	for name, c := range map[string]struct {
		change  func(*scenario.Scenario)
		leftOut int // at least
		moves   float64
	}{
		"settling": {func(s *scenario.Scenario) { s.Settling = 100 }, 10, 0.02},
		"cut-off":  {func(s *scenario.Scenario) { s.CNCutOff = scenario.Measure{Number: 5e-9} }, 0, 0.02},
		"sizes":    {func(s *scenario.Scenario) { s.Bins = sizes }, 0, 0.02},
	} {
		a, err := calibrate(t, c.change)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		f := counterFacts(t, a)
		if f.Line == nil || math.Abs(float64(f.Line.Slope/want.Line.Slope)-1) > c.moves {
			t.Errorf("%s: line %+v, want about %v", name, f.Line, want.Line.Slope)
		}
		if len(f.LeftOut) < c.leftOut {
			t.Errorf("%s: %d points left out, want %d or more", name, len(f.LeftOut), c.leftOut)
		}
		constant := strings.Contains(strings.Join(codes(a), " "), "constant") || strings.Contains(strings.Join(a.Why, " "), "for want of a size distribution")
		if (name == "sizes") == constant {
			t.Errorf("%s: notes %q", name, codes(a))
		}
	}
}

// A delay moves counts between samples, so their lengths must be known.
func TestDelayNeedsDurations(t *testing.T) {
	_, err := calibrate(t, func(s *scenario.Scenario) { s.CNDelay = 3 })
	var in *InputError
	if !errors.As(err, &in) || in.Input != "cn-delay" || !strings.Contains(err.Error(), "sampling time") {
		t.Errorf("error %v", err)
	}
}
