package answer

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"regexp"
	"strings"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"

	"dropcrest/koehler/counter"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// The salt scans of the demo station are invented. The truth behind them: the
// supersaturation of the counter, its width, its efficiency, and the share of
// doubly charged particles.
const (
	demoSlope     = 0.064 // % per K
	demoIntercept = -0.052
	demoWidth     = 0.05 // standard deviation in ln D
	demoPlateau   = 0.97
	demoDouble    = 0.06
	demoCounts    = 1500 // particles at each size
)

var demoDifferences = []float64{3, 5, 8, 12, 17}

// demoLog writes the invented log: ammonium sulfate, 22 sizes around the one that
// activates half, counts with the noise of Poisson.
func demoLog(t testing.TB) []byte {
	t.Helper()
	rng := rand.New(rand.NewPCG(2026, 314))
	salt, ok := solutes.Standard().Find("ammonium sulfate")
	if !ok {
		t.Fatal("no ammonium sulfate")
	}
	standard := counter.SaltStandard(salt, solutes.IonInteraction, 298.15, counter.Classifier{})
	standard.ShapeFactor = 1
	var b bytes.Buffer
	b.WriteString("time,salt,temperature difference (K),dry diameter (nm),cn counted,ccn counted\n")
	second := 0
	for _, dt := range demoDifferences {
		d50 := demoSize(t, standard, (demoSlope*dt+demoIntercept)/100)
		for i := range 22 {
			d := d50 * math.Exp(-0.62+1.1*float64(i)/21)
			half := counter.EqualMobility(d, 2, 296.15, 101325)
			step := func(d float64) float64 { return 0.5 * math.Erfc(-math.Log(d/d50)/demoWidth/math.Sqrt2) }
			fraction := demoPlateau * ((1-demoDouble)*step(d) + demoDouble*step(half))
			cn := distuv.Poisson{Lambda: demoCounts, Src: rng}.Rand()
			ccn := distuv.Poisson{Lambda: demoCounts * fraction, Src: rng}.Rand()
			noise := 0.01 * distuv.Normal{Sigma: 1, Src: rng}.Rand()
			fmt.Fprintf(&b, "2026-03-13T%02d:%02d:%02dZ,ammonium sulfate,%.3f,%.2f,%.0f,%.0f\n",
				9+second/3600, second/60%60, second%60, dt+noise, d*1e9, cn, ccn)
			second += 30
		}
		second += 300 // the column settles
	}
	return b.Bytes()
}

// demoSize is the mobility diameter that activates at a supersaturation.
func demoSize(t testing.TB, s counter.Standard, want float64) float64 {
	low, high := 10e-9, 400e-9
	for range 60 {
		mid := math.Sqrt(low * high)
		got, err := s.Supersaturation(mid)
		if err != nil {
			t.Fatal(err)
		}
		if got > want {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Sqrt(low * high)
}

// The file of the demo is what the program above writes. To write it anew:
// DROPCREST_WRITE_DEMO=1 go test -run TestDemoScans ./ui/answer
func TestDemoScans(t *testing.T) { isInDemo(t, demoScans, demoLog(t)) }

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

// The truth behind the demo is recovered within its noise.
func TestDemoCalibration(t *testing.T) {
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if f.Line == nil || len(f.Scans) != len(demoDifferences) {
		t.Fatalf("line %v, %d scans", f.Line, len(f.Scans))
	}
	us := math.Sqrt(float64(f.Line.Covariance[1][1]))
	ui := math.Sqrt(float64(f.Line.Covariance[0][0]))
	const sigmas = 3
	if d := float64(f.Line.Slope) - demoSlope; math.Abs(d) > sigmas*us {
		t.Errorf("slope %v ± %.2g, the truth is %v", f.Line.Slope, us, demoSlope)
	}
	if d := float64(f.Line.Intercept) - demoIntercept; math.Abs(d) > sigmas*ui {
		t.Errorf("intercept %v ± %.2g, the truth is %v", f.Line.Intercept, ui, demoIntercept)
	}
	if us > 0.01*demoSlope {
		t.Errorf("the slope is known to %.2g of %.2g only: the check says nothing", us, demoSlope)
	}
	for i, s := range f.Scans {
		if math.Abs(float64(s.Plateau)-demoPlateau) > 0.05 || math.Abs(float64(s.DoublyCharged)-demoDouble) > 0.03 {
			t.Errorf("scan %d: plateau %v, doubly charged %v; the truth is %v and %v", i, s.Plateau, s.DoublyCharged, demoPlateau, demoDouble)
		}
		if len(s.Choices) < 2 {
			t.Errorf("scan %d: no other models", i)
		}
	}
	all := strings.Join(a.Finding, " ")
	if !regexp.MustCompile(`S = \(0\.06[34]\d* ± `).MatchString(all) || !strings.Contains(all, "water-activity model is worth") {
		t.Errorf("finding %q", all)
	}
}

// Every form of the curve finds about the same line; the two-step one lies closest.
func TestActivationCurves(t *testing.T) {
	for _, curve := range []string{"two-step", "gaussian", "sigmoid"} {
		a, err := calibrate(t, func(s *scenario.Scenario) { s.Activation = curve })
		if err != nil {
			t.Fatal(err)
		}
		f := counterFacts(t, a)
		if f.Line == nil {
			t.Fatalf("%s: no line: %v", curve, *f.Fault)
		}
		at10 := float64(f.Line.Slope)*10 + float64(f.Line.Intercept)
		if want := demoSlope*10 + demoIntercept; math.Abs(at10/want-1) > 0.015 {
			t.Errorf("%s: %v %% at 10 K, want %v", curve, at10, want)
		}
	}
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
