package answer

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"strings"
	"testing"

	"dropcrest/koehler/counter"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// demoCalibration is a file of the calibration by the demo's scans as the Counter
// question writes it, after a change.
func demoCalibration(t testing.TB, change func(*CounterFacts)) string {
	t.Helper()
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if change != nil {
		change(&f)
	}
	text, err := json.Marshal(f)
	if err != nil {
		t.Fatal(err)
	}
	return written(t, "calibration.json", string(text))
}

// What the Counter question writes is read back, and a file that is none is
// refused with its place.
func TestCalibrationFile(t *testing.T) {
	c, err := readCalibration(stationEnv(), "calibration", demoCalibration(t, nil))
	if err != nil {
		t.Fatal(err)
	}
	applied, err := c.Apply(10, counter.Site{})
	got, u := applied.Supersaturation, applied.Uncertainty
	if want := (demoSlope*10 + demoIntercept) / 100; err != nil || math.Abs(got-want) > 3*u || u > 0.01*want {
		t.Errorf("10 K is %v ± %v, %v; the truth is %v", got, u, err, want)
	}
	for text, want := range map[string]string{
		"":                            "line 1, column 1",
		"{}":                          "no key calibration_file",
		"{\n\"calibration_file\": x}": "line 2, column",
		"{\"calibration_file\": {}}":  "has no line",
		"[1]":                         "no calibration",
	} {
		_, err := readCalibration(stationEnv(), "calibration", written(t, "calibration.json", text))
		var in *InputError
		if !errors.As(err, &in) || in.Input != "calibration" || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
}

// Counts of a counter that was calibrated stand at the supersaturations of its
// temperature differences.
func TestCalibratedCounts(t *testing.T) {
	s := ofText(t, "start_time,end_time,temperature difference (K),ccn (cm-3),supersaturation set (%)\n"+
		"2026-03-14T00:00:00Z,2026-03-14T00:05:00Z,10.0,500,0.5\n2026-03-14T00:05:00Z,2026-03-14T00:10:00Z,5.0,200,0.2\n")
	s.Calibration = demoCalibration(t, nil)
	var got []float64
	records, _ := allRecords(t, s)
	for _, o := range records {
		for _, c := range o.counts {
			got = append(got, c.s)
		}
	}
	for i, dt := range []float64{10, 5} {
		want := (demoSlope*dt + demoIntercept) / 100
		if i >= len(got) || math.Abs(got[i]/want-1) > 0.01 {
			t.Errorf("supersaturations %v, want that of %v K, %v, within 1 %%", got, dt, want)
		}
	}
}

// Between two calibrations the supersaturation is interpolated in time.
func TestBetweenCalibrations(t *testing.T) {
	file := func(slope, time float64) string {
		return demoCalibration(t, func(f *CounterFacts) {
			f.File.Line.Slope *= slope
			f.File.Time = time
		})
	}
	const midnight = 1773446400 // 2026-03-14T00:00:00Z
	s := ofText(t, "start_time,end_time,temperature difference (K),ccn (cm-3),supersaturation set (%)\n"+
		"2026-03-14T00:00:00Z,2026-03-14T00:05:00Z,10.0,500,0.5\n")
	s.Calibration, s.CalibrationAfter = file(1, midnight-43200), file(1.1, midnight+43200)
	var got float64
	records, _ := allRecords(t, s)
	for _, o := range records {
		for _, c := range o.counts {
			got = c.s
		}
	}
	if want := (1.05*demoSlope*10 + demoIntercept) / 100; math.Abs(got/want-1) > 0.01 {
		t.Errorf("half way between slopes 1 and 1.1 it is %v, want %v within 1 %%", got, want)
	}
}

// calibratedDemo asks for the demo's counts by the demo's calibration, through the
// line that the counter took.
func calibratedDemo(t *testing.T) scenario.Scenario {
	t.Helper()
	s := scenario.Default()
	s.Calibration = demoCalibration(t, nil)
	s.SetSlope, s.SetIntercept = scenario.Measure{Number: 0.0006}, -0.0004
	return s
}

// Counts at supersaturations as set go through the counter's own line back to
// temperature differences: the demo's counts move by what its calibration says.
func TestCalibrationOfSetCounts(t *testing.T) {
	s := calibratedDemo(t)
	first, _, err := oneRecord(context.Background(), stationEnv(), s, 1)
	if err != nil {
		t.Fatal(err)
	}
	var got []float64
	for _, c := range first.counts {
		got = append(got, c.s)
		if !(c.levelUncertainty > 0 && c.levelUncertainty < 0.02*c.s) {
			t.Errorf("the supersaturation %v is known to %v", c.s, c.levelUncertainty)
		}
	}
	for i, set := range []float64{0.001, 0.002, 0.004, 0.006, 0.01} {
		want := (demoSlope*(set+0.0004)/0.0006 + demoIntercept) / 100
		if i >= len(got) || math.Abs(got[i]/want-1) > 0.01 {
			t.Fatalf("supersaturations %v, want %v for the one set as %v", got, want, set)
		}
	}
}

// What calibration and particles share nearly cancels in the κ of counts: sizes and
// tension alone would each move it by some 3 % per cent.
func TestSharedErrorsCancel(t *testing.T) {
	s := calibratedDemo(t)
	s.Record = scenario.Measure{Number: 1}
	a, err := askSpectrum(context.Background(), stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	calibrated := 0
	for _, row := range a.Facts.(SpectrumFacts).Measured {
		e := row.Calibration
		if e == nil {
			continue // interpolated
		}
		calibrated++
		for name, x := range map[string]Number{"sizes": e.Sizing, "tension": e.Tension, "temperature, per 100 K": 100 * e.Temperature} {
			const most = 0.3 // a tenth of what each does alone
			if !(math.Abs(float64(x)) < most) {
				t.Errorf("at %v %%: %s move κ by %v, want them to cancel", row.Supersaturation, name, x)
			}
		}
		if !(e.Uncertainty > 0) || !(row.KappaUncertainty > 0) {
			t.Errorf("uncertainties %v and %v", e.Uncertainty, row.KappaUncertainty)
		}
	}
	if calibrated != 5 {
		t.Errorf("%d calibrated rows, want 5", calibrated)
	}
	if why := strings.Join(a.Why, " "); !strings.Contains(why, "not counted twice: +1 % of all sizes moves κ at") {
		t.Errorf("it is not said: %s", why)
	}
}

// The uncertainty of κ has a part of the count and one of the supersaturation.
func TestPartsOfKappaUncertainty(t *testing.T) {
	m := measurement{count: 100, uncertainty: 3, s: 0.005, levelUncertainty: 0.02 * 0.005}
	m.kappa = spectrum.CountKappa{Kappa: 0.3, ByCount: 1, BySupersaturation: -2}
	if got, want := m.kappaUncertainty(), 0.3*0.05; math.Abs(got/want-1) > 1e-12 { // 3-4-5
		t.Errorf("%v, want %v", got, want)
	}
}
