package answer

import (
	"context"
	"fmt"
	"math"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// typedScan is an invented scan: 1000 particles of each size, and of the droplets the
// share of a cumulative normal distribution about d50 (nm).
func typedScan(difference, d50 float64) []string {
	var rows []string
	for d := d50 / 2; d < 2.2*d50; d *= 1.12 {
		share := 0.5 * math.Erfc(-math.Log(d/d50)/(math.Sqrt2*0.06))
		rows = append(rows, fmt.Sprintf("dT=%gK diameter=%.3gnm cn=1000 ccn=%.0f", difference, d, 1000*share))
	}
	return rows
}

// Rows that are typed make scans as a file does, and the line through them.
func TestTypedScans(t *testing.T) {
	s := scene(t, "activation-curve=gaussian", "bootstrap=0")
	rows := append(append(typedScan(4, 80), typedScan(8, 50)...), typedScan(12, 38)...)
	s = withRows(t, s, "counted", rows...)
	a, err := askCounter(context.Background(), stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if len(f.Scans) != 3 || f.Line == nil || a.Records != 3 || a.Record != 0 {
		t.Fatalf("%d scans, line %v, record %d of %d", len(f.Scans), f.Line, a.Record, a.Records)
	}
	for i, want := range []float64{80e-9, 50e-9, 38e-9} {
		// sizes are typed with three digits
		within(t, "D50", f.Scans[i].D50, want, 0.004*want)
	}
	if lines := counterStatement(s); !strings.Contains(lines[0], "{counted}") {
		t.Errorf("the statement is %q", lines)
	}
	if q, _ := Find("counter"); q.Heeds(s, "scans") || !q.Heeds(scenario.Default(), "scans") {
		t.Error("rows that are typed take the place of files, and only they")
	}
}

// A counter that counts nothing, and one row alone, are said and not a fault.
func TestTypedScansThatSayNothing(t *testing.T) {
	for name, rows := range map[string][]string{
		"one row":     {"dT=5K diameter=50nm cn=1000 ccn=500"},
		"CN of zero":  {"dT=5K diameter=40nm cn=0 ccn=0", "dT=5K diameter=50nm cn=0 ccn=10", "dT=5K diameter=60nm cn=0 ccn=20"},
		"no droplets": {"dT=5K diameter=40nm cn=900 ccn=0", "dT=5K diameter=50nm cn=900 ccn=0", "dT=5K diameter=60nm cn=900 ccn=0", "dT=5K diameter=70nm cn=900 ccn=0"},
	} {
		s := withRows(t, scene(t, "bootstrap=0"), "counted", rows...)
		a, err := askCounter(context.Background(), stationEnv(), s)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		if says := strings.Join(a.Finding, " "); !strings.Contains(says, "No scan gives an activation curve") || len(a.Finding) < 2 {
			t.Errorf("%s: %s", name, says)
		}
	}
}

// One activation curve at a time is drawn, and going from one to the next makes no
// calibration anew.
func TestOneScanAtATime(t *testing.T) {
	env := stationEnv()
	env.Kept = &Kept{}
	s := scene(t, "bootstrap=0")
	all, err := askCounter(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	first := env.Kept.calibration.kept
	for n := range all.Records {
		s.Scan = scenario.Measure{Number: float64(n + 1)}
		one, err := askCounter(context.Background(), env, s)
		if err != nil {
			t.Fatal(err)
		}
		curves := one.Figures[1]
		if len(curves.Lines) != 1 || curves.Lines[0].Says != all.Figures[1].Lines[n].Says || len(curves.Marks) != 1 || one.Record != n+1 {
			t.Errorf("scan %d: %d lines, %d marks, record %d", n+1, len(curves.Lines), len(curves.Marks), one.Record)
		}
	}
	if env.Kept.calibration.kept != first {
		t.Error("the calibration was made again")
	}
	s.Scan.Number = 99
	if last, err := askCounter(context.Background(), env, s); err != nil || last.Record != last.Records {
		t.Errorf("beyond the last one: scan %d, %v", last.Record, err)
	}
	s.Temperature++
	if _, err := askCounter(context.Background(), env, s); err != nil || env.Kept.calibration.kept == first {
		t.Errorf("at another temperature: %v", err)
	}
}
