package counter

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"reflect"
	"strings"
	"testing"

	"dropcrest/solutes"
)

// sizeFor returns the mobility diameter that activates at s.
func sizeFor(t testing.TB, w Standard, s float64) float64 {
	t.Helper()
	lo, hi := 10e-9, 400e-9
	for range 60 {
		mid := math.Sqrt(lo * hi)
		at, err := w.Supersaturation(mid)
		if err != nil {
			t.Fatal(err)
		}
		if at > s {
			lo = mid
		} else {
			hi = mid
		}
	}
	return math.Sqrt(lo * hi)
}

// The invented counter: s = 0.035 % per K of temperature difference less 0.02 %, at
// 1000 hPa and 0.5 L/min, with s ∝ Q.
const (
	trueSlope     = 0.00035
	trueIntercept = -0.0002
	trueFlow      = 0.5 / 6e4
)

func campaign(t testing.TB, scans int, sizes int, seed uint64) []Scan {
	var out []Scan
	for i, dT := range logSpaced(4, 20, scans) {
		w := usual(sizeFor(t, sulfate(t), trueIntercept+trueSlope*dT), 0.05)
		w.settings = logSpaced(w.d50/2, w.d50*2, sizes)
		s := w.scan(seed, uint64(i))
		s.TemperatureDifference, s.DifferenceUncertainty = dT, 0.02
		s.Pressure, s.Flow, s.Time = 1e5, trueFlow, 1000
		out = append(out, s)
	}
	return out
}

func calibrate(t testing.TB, r Request) Calibration {
	t.Helper()
	c, err := Calibrate(context.Background(), r)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

func TestCalibrationFindsTheLine(t *testing.T) {
	c := calibrate(t, Request{Scans: campaign(t, 8, 25, 3), Standards: []Standard{sulfate(t)}, Bootstrap: 60, Seed: 1})
	l := c.Line
	if l == nil {
		t.Fatal(c.LineFault)
	}
	near(t, "slope", l.Slope, trueSlope, 3*l.SlopeUncertainty)
	near(t, "intercept", l.Intercept, trueIntercept, 3*l.InterceptUncertainty)
	if l.SlopeUncertainty > 0.02*trueSlope || l.Probability < 0.001 {
		t.Errorf("slope %g ± %g, probability %g", l.Slope, l.SlopeUncertainty, l.Probability)
	}
	if len(c.Standards) != 1 || c.Standards[0].SurfaceTension < 0.07 || len(c.Standards[0].Models) == 0 || c.Standards[0].ShapeFactor < 1 {
		t.Errorf("the record lacks its constants: %+v", c.Standards)
	}
	near(t, "bootstrap of the slope", c.LineBootstrap.Slope.Mean, l.Slope, l.SlopeUncertainty)
	for _, s := range c.Scans {
		if !s.InLine || s.Bootstrap == nil || len(s.Choices) != 3 || s.SupersaturationUncertainty <= 0 {
			t.Errorf("scan %s: %+v", s.Name, s)
		}
	}
}

func TestApply(t *testing.T) {
	c := calibrate(t, Request{Scans: campaign(t, 6, 25, 3), Standards: []Standard{sulfate(t)}})
	a, err := c.Apply(10, Site{})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "s at 10 K, %", 100*a.Supersaturation, 0.33, 0.005)
	near(t, "sizing", a.Sensitivity.Dry, -1.5, 0.08)
	near(t, "tension", a.Sensitivity.Tension, 1.5, 0.08)
	near(t, "temperature", a.Sensitivity.Temperature, -0.0081, 0.001)
	if len(a.Notes) != 0 {
		t.Errorf("notes inside the range: %v", a.Notes)
	}
	// An instrument carried to 700 hPa has 0.7 times the supersaturation, to first order.
	high, err := c.Apply(10, Site{Pressure: 7e4})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "s at 700 hPa over that at 1000 hPa", high.Supersaturation/a.Supersaturation, 0.7, 1e-12)
	for _, w := range []struct {
		difference float64
		code       string
	}{{3, "below-calibration"}, {25, "above-calibration"}} {
		a, err := c.Apply(w.difference, Site{})
		if err != nil || len(a.Notes) != 1 || a.Notes[0].Code != w.code {
			t.Errorf("%g K: %v, %v", w.difference, a.Notes, err)
		}
	}
	for name, ask := range map[string]func() error{
		"negative s":   func() error { _, err := c.Apply(0.3, Site{}); return err },
		"another flow": func() error { _, err := c.Apply(10, Site{Flow: 2 * trueFlow}); return err },
		"no line":      func() error { _, err := Calibration{LineFault: "none"}.Apply(10, Site{}); return err },
		"no pressure":  func() error { c := c; c.Pressure = 0; _, err := c.Apply(10, Site{Pressure: 1e5}); return err },
	} {
		if err := ask(); !errors.Is(err, ErrApply) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// A shared error moves every point, the line and what is applied alike: the
// sensitivities of the record are those of a calibration made with that error.
func TestSensitivitiesOfTheRecord(t *testing.T) {
	scans := campaign(t, 6, 25, 3)
	c := calibrate(t, Request{Scans: scans, Standards: []Standard{sulfate(t)}})
	a, err := c.Apply(7, Site{})
	if err != nil {
		t.Fatal(err)
	}
	warm := sulfate(t)
	warm.Recipe.Temperature += 0.1
	moved, err := calibrate(t, Request{Scans: scans, Standards: []Standard{warm}}).Apply(7, Site{})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "temperature", math.Log(moved.Supersaturation/a.Supersaturation)/0.1, a.Sensitivity.Temperature, 2e-5)
	larger := campaign(t, 6, 25, 3)
	for i := range larger {
		for j := range larger[i].Points {
			larger[i].Points[j].Setting *= 1.001
		}
	}
	moved, err = calibrate(t, Request{Scans: larger, Standards: []Standard{sulfate(t)}}).Apply(7, Site{})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "sizing", math.Log(moved.Supersaturation/a.Supersaturation)/math.Log(1.001), a.Sensitivity.Dry, 0.02)
}

func TestTheRecordSurvivesAFile(t *testing.T) {
	scans := campaign(t, 4, 20, 3)
	scans[2].Points = scans[2].Points[:1]
	c := calibrate(t, Request{Scans: scans, Standards: []Standard{sulfate(t)}, Bootstrap: 5})
	text, err := json.Marshal(c)
	if err != nil {
		t.Fatal(err)
	}
	var back Calibration
	if err := json.Unmarshal(text, &back); err != nil {
		t.Fatal(err)
	}
	c.Scans[2].Err = nil // an error has no form in a file: Fault is its sentence
	if !reflect.DeepEqual(c, back) {
		t.Errorf("read back: %+v, written: %+v", back, c)
	}
}

func TestABadScanKeepsTheRest(t *testing.T) {
	scans := campaign(t, 5, 25, 3)
	scans[1].Points = scans[1].Points[:10]
	c := calibrate(t, Request{Scans: scans, Standards: []Standard{sulfate(t)}, Bootstrap: 5})
	bad := c.Scans[1]
	if bad.Fault == "" || !errors.As(bad.Err, new(*ScanError)) || bad.InLine || bad.Bootstrap != nil {
		t.Errorf("bad scan: %+v", bad)
	}
	if c.Line == nil || len(c.Line.Residuals) != 4 {
		t.Errorf("line %+v: %s", c.Line, c.LineFault)
	}
	c = calibrate(t, Request{Scans: scans[1:3], Standards: []Standard{sulfate(t)}})
	if c.Line != nil || !strings.Contains(c.LineFault, "at least 2") {
		t.Errorf("a line through one point: %+v, %q", c.Line, c.LineFault)
	}
}

func TestRequestsThatCannotBeUsed(t *testing.T) {
	scans := campaign(t, 2, 20, 3)
	if _, err := Calibrate(context.Background(), Request{Scans: scans}); !errors.Is(err, ErrInput) {
		t.Errorf("no standard: %v", err)
	}
	scans[0].Standard = 3
	if _, err := Calibrate(context.Background(), Request{Scans: scans, Standards: []Standard{sulfate(t)}}); !errors.Is(err, ErrInput) {
		t.Errorf("a standard too far: %v", err)
	}
	nothing := SaltStandard(solutes.Substance{Name: "nothing"}, solutes.IonInteraction, 298.15, Classifier{})
	if _, err := Calibrate(context.Background(), Request{Standards: []Standard{nothing}}); err == nil {
		t.Error("a salt without data calibrates")
	}
}

func TestSameOnAnyNumberOfCores(t *testing.T) {
	r := Request{Scans: campaign(t, 4, 20, 3), Standards: []Standard{sulfate(t)}, Bootstrap: 40, Seed: 9, Workers: 1}
	one := calibrate(t, r)
	r.Workers = 5
	if five := calibrate(t, r); !reflect.DeepEqual(one, five) {
		t.Errorf("one core: %+v, five: %+v", one.LineBootstrap, five.LineBootstrap)
	}
}

func TestStoppedBootstrapKeepsWhatThereIs(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	last := int64(0)
	c, err := Calibrate(ctx, Request{Scans: campaign(t, 4, 20, 3), Standards: []Standard{sulfate(t)}, Bootstrap: 5000, Progress: func(done, total int64) {
		if done <= last || total != 5004 {
			t.Errorf("progress %d of %d after %d", done, total, last)
		}
		if last = done; done == 104 {
			stop()
		}
	}})
	if !errors.Is(err, context.Canceled) || c.Line == nil || c.LineBootstrap == nil || c.LineBootstrap.Slope.Replicates < 90 || c.LineBootstrap.Slope.Replicates > 200 {
		t.Errorf("error %v, bootstrap %+v", err, c.LineBootstrap)
	}
}

// A flow ramp at one temperature difference and size, with s ∝ Q, gives the
// exponent that carries the calibration to another flow.
func TestFlowRamp(t *testing.T) {
	scans := campaign(t, 6, 25, 3)
	// at 10 K the line is at 0.33 %; a particle of 0.495 % needs 1.5 times the flow
	size := sizeFor(t, sulfate(t), 1.5*(trueIntercept+trueSlope*10))
	ramp := Scan{Name: "ramp", Over: OverFlow, DryDiameter: size, TemperatureDifference: 10, Pressure: 1e5}
	for _, q := range logSpaced(0.7*trueFlow, 3*trueFlow, 25) {
		f := 0.5 * math.Erfc(-math.Log(q/(1.5*trueFlow))/0.08/math.Sqrt2)
		ramp.Points = append(ramp.Points, Point{Setting: q, CN: 3000, CCN: 3000 * f})
	}
	c := calibrate(t, Request{Scans: append(scans, ramp), Standards: []Standard{sulfate(t)}})
	if c.Scans[6].Fault != "" || c.Scans[6].InLine {
		t.Fatalf("ramp: %+v", c.Scans[6])
	}
	near(t, "exponent", c.FlowExponent, 1, 4*c.FlowExponentUncertainty+0.01)
	a, err := c.Apply(10, Site{Flow: 2 * trueFlow})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "s at twice the flow, %", 100*a.Supersaturation, 0.66, 0.03)
}

func TestScansOverDifferenceJoinTheLine(t *testing.T) {
	var scans []Scan
	for _, dT := range []float64{5, 8, 12} {
		s := Scan{Over: OverDifference, DryDiameter: sizeFor(t, sulfate(t), trueIntercept+trueSlope*dT)}
		for _, x := range logSpaced(dT/2, dT*2, 25) {
			s.Points = append(s.Points, Point{Setting: x, CN: 1000, CCN: 1000 * 0.5 * math.Erfc(-math.Log(x/dT)/0.06/math.Sqrt2)})
		}
		scans = append(scans, s)
	}
	c := calibrate(t, Request{Scans: scans, Standards: []Standard{sulfate(t)}})
	if c.Line == nil {
		t.Fatal(c.LineFault)
	}
	near(t, "slope", c.Line.Slope, trueSlope, 1e-3*trueSlope)
}

func TestBetweenTwoCalibrations(t *testing.T) {
	a := calibrate(t, Request{Scans: campaign(t, 5, 25, 3), Standards: []Standard{sulfate(t)}})
	b := a
	shifted := *a.Line
	shifted.Slope *= 1.1
	b.Line, b.Time = &shifted, 3000
	at := func(c Calibration) Applied {
		x, err := c.Apply(10, Site{})
		if err != nil {
			t.Fatal(err)
		}
		return x
	}
	first, last := at(a), at(b)
	for _, c := range []struct {
		time, share, drift float64
		notes              int
	}{{1000, 0, 0, 0}, {2000, 0.5, 0.25, 0}, {3000, 1, 0, 0}, {4000, 1, 1, 1}, {0, 0, 1, 1}} {
		m, err := Between(a, b, c.time)
		if err != nil {
			t.Fatal(err)
		}
		got := at(m)
		near(t, "s", got.Supersaturation, first.Supersaturation+c.share*(last.Supersaturation-first.Supersaturation), 1e-12)
		d := last.Supersaturation - first.Supersaturation
		f, l := (1-c.share)*first.Uncertainty, c.share*last.Uncertainty
		near(t, "u", got.Uncertainty, math.Sqrt(f*f+l*l+c.drift*d*d), 1e-9)
		if extra := len(m.Notes) - len(a.Notes); extra != c.notes {
			t.Errorf("at %g s: %d notes more, want %d", c.time, extra, c.notes)
		}
	}
	// The same instrument calibrated at another pressure is the same instrument.
	low := carried(a, 7e4)
	low.Time = 3000
	m, err := Between(a, low, 1500)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "s between two pressures", at(m).Supersaturation, first.Supersaturation, 1e-12)
	if _, err := Between(b, a, 2000); !errors.Is(err, ErrApply) {
		t.Errorf("the later one first: %v", err)
	}
	if _, err := Between(a, Calibration{Time: 5000}, 2000); !errors.Is(err, ErrApply) {
		t.Errorf("one without a line: %v", err)
	}
	c := b
	c.Flow *= 2
	if _, err := Between(a, c, 2000); !errors.Is(err, ErrApply) {
		t.Errorf("another flow: %v", err)
	}
}
