package answer

import (
	"context"
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

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
