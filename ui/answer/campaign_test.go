package answer

import (
	"bytes"
	"context"
	"encoding/csv"
	"errors"
	"io"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

const stationFolder = "../../testdata/demo"

func stationEnv() Env {
	return Env{Demo: os.DirFS(stationFolder), Version: "test", Open: func(name string) (io.ReadCloser, error) { return os.Open(name) }}
}

// isInDemo fails unless a file of the demo is, byte for byte, what its program writes.
// With DROPCREST_WRITE_DEMO in the environment it is written anew.
func isInDemo(t *testing.T, file string, want []byte) {
	t.Helper()
	name := filepath.Join(stationFolder, file)
	if os.Getenv("DROPCREST_WRITE_DEMO") != "" {
		if err := os.WriteFile(name, want, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	got, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s is not what its program writes", file)
	}
}

// truthRow is what is behind the demo in half an hour.
type truthRow struct {
	start, end time.Time
	number     float64 // 1/m³
	modes      aerosol.Modes
	kappa      float64
	ccn        []float64 // 1/m³, at 0.1, 0.2, 0.4, 0.6, 1.0 %
}

func truthOfDemo(t *testing.T) []truthRow {
	t.Helper()
	f, err := os.Open(filepath.Join(stationFolder, "truth.csv"))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	number := func(text string) float64 {
		x, err := strconv.ParseFloat(text, 64)
		if err != nil {
			t.Fatal(err)
		}
		return x
	}
	var out []truthRow
	for _, l := range lines[1:] {
		var r truthRow
		if r.start, err = time.Parse(time.RFC3339, l[0]); err != nil {
			t.Fatal(err)
		}
		if r.end, err = time.Parse(time.RFC3339, l[1]); err != nil {
			t.Fatal(err)
		}
		r.number, r.kappa = (number(l[2])+number(l[5]))*1e6, number(l[8])
		for i := 2; i < 8; i += 3 {
			r.modes = append(r.modes, aerosol.Mode{Concentration: number(l[i]) * 1e6, Median: number(l[i+1]) * 1e-9, GSD: number(l[i+2])})
		}
		for _, x := range l[9:14] {
			r.ccn = append(r.ccn, number(x)*1e6)
		}
		out = append(out, r)
	}
	return out
}

// The records of the demo are what its truth says, within the noise of counting.
func TestCampaignOfDemo(t *testing.T) {
	truth := truthOfDemo(t)
	s := scenario.Default()
	s.Every = scenario.Measure{Number: 1800}
	chi, counts, sized, composed := 0.0, 0, 0, 0
	facts, err := campaign(context.Background(), stationEnv(), s, func(o *observation) error {
		for _, w := range truth {
			if !w.start.Equal(o.start) {
				continue
			}
			if o.sizes != nil {
				sized++
				if ratio := o.sizes.Number() / w.number; math.Abs(ratio-1) > 0.06 && !strings.HasPrefix(w.start.Format(time.RFC3339), "2026-03-15T10") {
					t.Errorf("%v: %.4g particles, the truth is %.4g", o.start, o.sizes.Number(), w.number)
				}
			}
			if !math.IsNaN(o.kappa) {
				composed++
				if math.Abs(o.kappa-w.kappa) > 0.03 {
					t.Errorf("%v: kappa %.3f, the truth is %.3f", o.start, o.kappa, w.kappa)
				}
			}
			for _, c := range o.counts {
				for i, level := range []float64{0.001, 0.002, 0.004, 0.006, 0.01} {
					if math.Abs(c.s/level-1) < 0.01 && c.uncertainty > 0 {
						counts++
						chi += math.Pow((c.count-w.ccn[i])/c.uncertainty, 2)
					}
				}
			}
		}
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if facts.records != 96 || sized < 90 || composed < 90 || counts < 440 {
		t.Errorf("%d records, %d sized, %d composed, %d counts", facts.records, sized, composed, counts)
	}
	if reduced := chi / float64(counts); reduced < 0.7 || reduced > 1.4 {
		t.Errorf("reduced χ² of the counts against the truth is %.2f", reduced)
	}
	if len(facts.mapping) < 20 {
		t.Errorf("the mapping has %d lines", len(facts.mapping))
	}
}

// A record by its number is the one that streaming hands out, and is kept.
func TestOneRecord(t *testing.T) {
	env := stationEnv()
	env.Kept = &Kept{}
	s := scenario.Default()
	var tenth observation
	if _, err := campaign(context.Background(), env, s, func(o *observation) error {
		if o.number == 10 {
			tenth = *o
		}
		return nil
	}); err != nil {
		t.Fatal(err)
	}
	for range 2 {
		o, facts, err := oneRecord(context.Background(), env, s, 10)
		if err != nil {
			t.Fatal(err)
		}
		if !o.start.Equal(tenth.start) || o.sizes.Number() != tenth.sizes.Number() || facts.records != 96 {
			t.Errorf("record 10 begins %v of %d records, want %v", o.start, facts.records, tenth.start)
		}
	}
	_, _, err := oneRecord(context.Background(), env, s, 100000)
	var in *InputError
	if !errors.As(err, &in) || in.Input != "record" {
		t.Errorf("a record that is not there: %v", err)
	}
}

// Files that cannot be read say which, where, and what would be right.
func TestDataErrors(t *testing.T) {
	for name, c := range map[string]struct {
		file  string
		line  string
		input string
		says  string
	}{
		"missing": {filepath.Join(t.TempDir(), "none.csv"), "", "data", "no such file"},
		"empty":   {written(t, "empty.csv", ""), "", "data", "empty"},
		"no name": {"", "", "data", "no name"},
		"map":     {written(t, "a.csv", "time,ccn (cm-3)\n2026-03-14T00:00:00Z,5\n"), "none=ccn @0.3%", "map", "none"},
		"comma":   {written(t, "b.csv", "time;ccn at 0.3% (cm-3)\n2026-03-14T00:00:00Z;5,5\n"), "", "data", "b.csv"},
	} {
		t.Run(name, func(t *testing.T) {
			s := scenario.Default()
			s.Data = []scenario.DataFile{{Name: c.file}}
			if c.line != "" {
				s.Map = []scenario.MapLine{{Text: c.line}}
			}
			_, err := campaign(context.Background(), stationEnv(), s, func(*observation) error { return nil })
			var in *InputError
			if !errors.As(err, &in) || in.Input != c.input || !strings.Contains(err.Error(), c.says) {
				t.Errorf("error %v, want one on %s that says %q", err, c.input, c.says)
			}
		})
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := campaign(ctx, stationEnv(), scenario.Default(), func(*observation) error { return nil }); !errors.Is(err, context.Canceled) {
		t.Errorf("stopped: %v", err)
	}
}

// Losses are divided out, mobility sizes become smaller volumes, and a rule with
// another bound leaves other points out.
func TestSizingAndRules(t *testing.T) {
	first := func(change func(*scenario.Scenario)) (observation, campaignFacts) {
		t.Helper()
		s := scenario.Default()
		change(&s)
		o, facts, err := oneRecord(context.Background(), stationEnv(), s, 3)
		if err != nil {
			t.Fatal(err)
		}
		return o, facts
	}
	plainOne, facts := first(func(*scenario.Scenario) {})
	half, _ := first(func(s *scenario.Scenario) { s.Penetration = "0.5" })
	if ratio := half.sizes.Number() / plainOne.sizes.Number(); math.Abs(ratio-2) > 1e-12 {
		t.Errorf("half of the particles counted: %v times as many in the air", ratio)
	}
	file := filepath.Join(t.TempDir(), "losses.csv")
	if err := os.WriteFile(file, []byte("diameter (nm),share\n5,0.25\n2000,0.25\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	quarter, _ := first(func(s *scenario.Scenario) { s.Penetration = file })
	if ratio := quarter.sizes.Number() / plainOne.sizes.Number(); math.Abs(ratio-4) > 1e-9 {
		t.Errorf("a quarter of the particles counted: %v times as many in the air", ratio)
	}
	cubes, _ := first(func(s *scenario.Scenario) { s.DrySizeIs, s.ShapeFactor = "mobility", 1.1 })
	if cubes.sizes.Above(100e-9) >= plainOne.sizes.Above(100e-9) || math.Abs(cubes.sizes.Number()/plainOne.sizes.Number()-1) > 1e-12 {
		t.Error("particles with a shape factor above 1 have no smaller volume, or another number")
	}
	strict, strictFacts := first(func(s *scenario.Scenario) {
		s.Rules = []scenario.Rule{{Key: spectrum.Fraction, Flag: scenario.Measure{Word: "usual"}, Reject: scenario.Measure{Number: 0.5}}}
	})
	if len(strict.counts) >= len(plainOne.counts) || len(strictFacts.rejected) <= len(facts.rejected) {
		t.Errorf("%d counts are left by a strict rule, %d by the usual one; rejected %v", len(strict.counts), len(plainOne.counts), strictFacts.rejected)
	}
	s := scenario.Default()
	s.Rules = []scenario.Rule{{Key: spectrum.Fraction, Flag: scenario.Measure{Word: "never"}, Reject: scenario.Measure{Number: 50}}}
	_, _, err := oneRecord(context.Background(), stationEnv(), s, 1)
	var in *InputError
	if !errors.As(err, &in) || in.Input != "rule" {
		t.Errorf("a bound that makes no sense: %v", err)
	}
	for text, want := range map[string]string{"1.5": "at most 1", "missing.csv": "no such file"} {
		s := scenario.Default()
		s.Penetration = text
		if _, _, err := oneRecord(context.Background(), stationEnv(), s, 1); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("penetration %s: %v, want %q", text, err, want)
		}
	}
}
