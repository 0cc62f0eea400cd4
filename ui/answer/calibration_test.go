package answer

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"dropcrest/koehler/counter"
	"dropcrest/ui/scenario"
)

// calibrationOfDemo writes the calibration of the demo into a file, changed.
func calibrationOfDemo(t *testing.T, change func(*counter.Calibration)) string {
	t.Helper()
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if change != nil {
		change(&f.File)
	}
	text, err := json.Marshal(f)
	if err != nil {
		t.Fatal(err)
	}
	name := filepath.Join(t.TempDir(), "calibration.json")
	if err := os.WriteFile(name, text, 0o644); err != nil {
		t.Fatal(err)
	}
	return name
}

// lines is the calibration with another intercept, at a time.
func lines(t *testing.T, intercept float64, day string) string {
	return calibrationOfDemo(t, func(c *counter.Calibration) {
		at, err := time.Parse(time.DateOnly, day)
		if err != nil {
			t.Fatal(err)
		}
		c.Time, c.Line.Intercept = float64(at.Unix()), intercept
	})
}

// measuredAt are counts at 10 K with sizes, one record at noon of a day.
func measuredAt(t *testing.T, day, more, value string) string {
	t.Helper()
	header, row := "start_time,end_time,temperature difference (K),ccn at STP (cm-3),supersaturation set (%)"+more, fmt.Sprintf("%sT12:00:00Z,%sT12:10:00Z,10,500,0.5%s", day, day, value)
	for d := 20.0; d < 400; d *= 1.1 {
		header += fmt.Sprintf(",dN/dlogD at STP %.1f nm (cm-3)", d)
		row += ",1000"
	}
	name := filepath.Join(t.TempDir(), "ccn.csv")
	if err := os.WriteFile(name, []byte(header+"\n"+row+"\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	return name
}

func askCalibrated(t *testing.T, data, first, second string) (Answer, SpectrumFacts) {
	t.Helper()
	s := scenario.Default()
	s.Data, s.Calibration, s.SecondCalibration = []scenario.DataFile{{Name: data}}, first, second
	a, err := askSpectrum(context.Background(), counterEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	f, ok := a.Facts.(SpectrumFacts)
	if !ok {
		t.Fatalf("facts are %T", a.Facts)
	}
	return a, f
}

// Errors of sizes, tension and temperature cancel in the κ of counts of a counter that
// was calibrated: each alone would move it by some 3 %.
func TestSharedErrorsCancel(t *testing.T) {
	a, f := askCalibrated(t, measuredAt(t, "2026-03-14", ",ccn uncertainty at STP (cm-3)", ",5"), calibrationOfDemo(t, nil), "")
	var found *MeasuredRow
	for i := range f.Measured {
		if f.Measured[i].Calibration != nil {
			found = &f.Measured[i]
		}
	}
	if found == nil {
		t.Fatal("no count with a calibration")
	}
	e := found.Calibration
	for name, x := range map[string]Number{"sizes": e.Sizing, "tension": e.Tension, "temperature": 100 * e.Temperature} {
		const most = 0.45 // of some 3: what is left is between ion interaction of the salt and κ of the particles
		if !(math.Abs(float64(x)) < most) {
			t.Errorf("%s move κ by %v, want them to cancel", name, x)
		}
	}
	if !(float64(e.Uncertainty) > 0) || !(found.KappaUncertainty > 0) {
		t.Errorf("uncertainties %v and %v", e.Uncertainty, found.KappaUncertainty)
	}
	if why := strings.Join(a.Why, " "); !strings.Contains(why, "are not counted twice: +1 % of all sizes moves κ at 0.58") {
		t.Errorf("it is not said: %s", why)
	}
	if want := demoSlope*10 + demoIntercept; math.Abs(float64(found.Supersaturation)/want-1) > 0.01 {
		t.Errorf("%v %%, want %v", found.Supersaturation, want)
	}
}

// The uncertainty of κ has a part of the count and one of the supersaturation.
func TestKappaUncertaintyParts(t *testing.T) {
	m := measurement{count: 100, uncertainty: 3, s: 0.005}
	m.kappa.Kappa, m.kappa.ByCount, m.kappa.BySupersaturation = 0.3, 1, -2
	m.inherits.uncertainty = 0.02
	if got, want := m.kappaUncertainty(), 0.3*0.05; math.Abs(got/want-1) > 1e-12 { // 3-4-5
		t.Errorf("%v, want %v", got, want)
	}
}

// Between two calibrations the line is interpolated in time, whichever comes first;
// beyond them it is said.
func TestBetweenCalibrations(t *testing.T) {
	early, late := lines(t, -0.0006, "2026-03-10"), lines(t, -0.0002, "2026-03-18")
	for name, c := range map[string]struct {
		day, first, second string
		intercept          float64
		says               string
	}{
		"half-way":      {"2026-03-14", early, late, -0.0006 + 0.0004*4.5034722/8, "interpolated in time"},
		"other order":   {"2026-03-14", late, early, -0.0006 + 0.0004*4.5034722/8, "interpolated in time"},
		"after both":    {"2026-03-22", early, late, -0.0002, "outside the two calibrations"},
		"only a second": {"2026-03-14", "", late, -0.0002, ""},
	} {
		t.Run(name, func(t *testing.T) {
			a, f := askCalibrated(t, measuredAt(t, c.day, "", ""), c.first, c.second)
			slope := float64(counterFactsOfDemo(t).Line.Slope) / 100
			want := 100 * (10*slope + c.intercept)
			ok := false
			for _, m := range f.Measured {
				ok = ok || m.Calibration != nil && math.Abs(float64(m.Supersaturation)/want-1) < 1e-6
			}
			if !ok || !strings.Contains(strings.Join(a.Why, " "), c.says) {
				t.Errorf("want %.6f %% and %q; measured %+v, why %s", want, c.says, f.Measured, a.Why)
			}
		})
	}
	s := scenario.Default()
	s.Calibration, s.SecondCalibration = early, early
	_, err := readCalibrations(counterEnv(), s)
	var in *InputError
	if !errors.As(err, &in) || in.Input != "second-calibration" || !strings.Contains(err.Error(), "nothing between") {
		t.Errorf("the same twice: %v", err)
	}
}

func counterFactsOfDemo(t *testing.T) CounterFacts {
	t.Helper()
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	return counterFacts(t, a)
}

// A calibration at another pressure is carried to that of the measurement, and one
// without a pressure says that it was not.
func TestCalibrationPressure(t *testing.T) {
	at := calibrationOfDemo(t, func(c *counter.Calibration) { c.Pressure = 100000 })
	_, same := askCalibrated(t, measuredAt(t, "2026-03-14", "", ""), at, "")
	carried, f := askCalibrated(t, measuredAt(t, "2026-03-14", ",pressure (hPa)", ",900"), at, "")
	level := func(f SpectrumFacts) float64 {
		for _, m := range f.Measured {
			if m.Calibration != nil {
				return float64(m.Supersaturation)
			}
		}
		return math.NaN()
	}
	if ratio := level(f) / level(same); !(math.Abs(ratio-0.9) < 1e-9) {
		t.Errorf("a factor of %v, want 0.9", ratio)
	}
	if why := strings.Join(carried.Why, " "); !strings.Contains(why, "carried to another pressure or flow by a factor of 0.9") {
		t.Errorf("it is not said: %s", why)
	}
	silent, _ := askCalibrated(t, measuredAt(t, "2026-03-14", ",pressure (hPa)", ",900"), calibrationOfDemo(t, nil), "")
	if why := strings.Join(silent.Why, " "); !strings.Contains(why, "The calibration has no pressure") {
		t.Errorf("it is not said: %s", why)
	}
}
