package counter

import (
	"math"
	"testing"
)

// log is an invented log: two temperature differences, three sizes each.
func log() []Row {
	var rows []Row
	for i, dT := range []float64{5, 10} {
		for j, nm := range []float64{30, 50, 80} {
			k := 3*i + j
			rows = append(rows, Row{
				Salt: "ammonium sulfate", TemperatureDifference: dT + 0.01*float64(j), DryDiameter: nm * 1e-9, CN: 100 + float64(k), CCN: float64(10 * k),
				Flow: 8e-6, Pressure: 1e5, Time: 60 * float64(k), Duration: 60, Line: k + 2,
			})
		}
	}
	return rows
}

func TestGather(t *testing.T) {
	rows := log()
	if a := DetectAxis(rows, Tolerances{}); a != OverDiameter {
		t.Errorf("axis %v", a)
	}
	scans, salts := Gather(rows, OverDiameter, Tolerances{})
	if len(scans) != 2 || salts[1] != "ammonium sulfate" {
		t.Fatalf("%d scans of %v", len(scans), salts)
	}
	s := scans[1]
	near(t, "ΔT", s.TemperatureDifference, 10.01, 1e-12)
	near(t, "u(ΔT)", s.DifferenceUncertainty, 0.01/math.Sqrt(3), 1e-12)
	near(t, "pressure", s.Pressure, 1e5, 1e-6)
	if s.Name != "at 10.01 K" || len(s.Points) != 3 || math.Abs(s.Points[2].Setting-80e-9) > 1e-20 || s.Points[2].Line != 7 || s.DryDiameter != 0 {
		t.Errorf("scan %+v", s)
	}
	byDifference, _ := Gather(rows, OverDifference, Tolerances{})
	if len(byDifference) != 3 || math.Abs(byDifference[0].DryDiameter-30e-9) > 1e-20 || byDifference[0].Points[1].Setting != 10 || byDifference[0].DifferenceUncertainty != 0 {
		t.Errorf("over the difference: %+v", byDifference)
	}
	for i := range rows {
		rows[i].DryDiameter, rows[i].TemperatureDifference, rows[i].Flow = 50e-9, 5, 5e-6*(1+0.2*float64(i))
	}
	if a := DetectAxis(rows, Tolerances{}); a != OverFlow {
		t.Errorf("axis of a ramp: %v", a)
	}
	if ramp, _ := Gather(rows, OverFlow, Tolerances{}); len(ramp) != 1 || ramp[0].Name != "at 5 K and 50 nm" || len(ramp[0].Points) != 6 {
		t.Errorf("ramp %+v", ramp)
	}
}

func TestSettle(t *testing.T) {
	got := Settle(log(), 61, Tolerances{})
	for i, r := range got {
		if want := i == 3 || i == 4; (r.Reject != "") != want {
			t.Errorf("row %d: %q", i, r.Reject)
		}
	}
}

func TestDelay(t *testing.T) {
	rows := log()
	got := Delay(rows, 15) // a quarter of a sample
	for i := 1; i < len(rows); i++ {
		near(t, "CN", got[i].CN, 0.25*rows[i-1].CN+0.75*rows[i].CN, 1e-9)
	}
	if got[0].Reject == "" || got[1].Reject != "" {
		t.Errorf("ends: %q, %q", got[0].Reject, got[1].Reject)
	}
	for i, r := range Delay(rows, 0) {
		if r != rows[i] {
			t.Errorf("no delay changes row %d: %+v", i, r)
		}
	}
	near(t, "counts", Counts(4e8, 1e-5/0.6, 60), 4e8*1e-3, 1e-6)
}
