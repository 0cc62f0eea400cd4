package scenario

import (
	"math"
	"strings"
	"testing"
)

func TestUncertain(t *testing.T) {
	for text, want := range map[string]Uncertain{
		"dry-diameter=80nm±3%rel supersaturation=0.25%±5%rel":                                       {80e-9, 0.03 * 80e-9, 0},
		"dry-diameter=80nm+-2nm supersaturation=0.25%±0.01%abs":                                     {80e-9, 2e-9, 0},
		"dry-diameter=80nm±3% supersaturation=0.25%±5%rel":                                          {80e-9, 0.03 * 80e-9, 0},
		"dry-diameter=80 nm ± 1 nm ± 2 % common growth-factor=1.4±0.02 relative-humidity=90%±1%abs": {80e-9, 1e-9, 0.02 * 80e-9},
		"dry-diameter=80nm supersaturation=0.25%":                                                   {80e-9, 0, 0},
	} {
		s := Default()
		if err := SetRow(&s, "point", text, true); err != nil {
			t.Errorf("%q: %v", text, err)
			continue
		}
		got := s.Measurements[0].Dry
		for _, d := range []float64{got.Value - want.Value, got.Own - want.Own, got.Common - want.Common} {
			if math.Abs(d) > 1e-22 {
				t.Errorf("%q: %+v, want %+v", text, got, want)
			}
		}
		if back := decoded(t, encoded(t, s)); !back.Equal(s) {
			t.Errorf("%q: written %+v, read %+v", text, s.Measurements, back.Measurements)
		}
	}
	for text, want := range map[string]string{
		"dry-diameter=80nm supersaturation=0.25%±5%":    "relative or absolute",
		"dry-diameter=80nm±3 supersaturation=0.25%":     "no unit",
		"dry-diameter=80nm±x supersaturation=0.25%":     "no number",
		"dry-diameter=80nm±-3%rel supersaturation=0.2%": "no uncertainty",
		"dry-diameter=80nm±3K supersaturation=0.2%":     "no unit",
		"supersaturation=0.2%":                          "no dry-diameter",
	} {
		s := Default()
		if err := SetRow(&s, "point", text, true); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
	s := Default()
	if err := SetRow(&s, "point", "dry-diameter=80nm growth-factor=1.4", true); err != nil {
		t.Fatal(err)
	}
	if problems := Check(&s); len(problems) != 1 || !strings.Contains(problems[0].Error(), "without its humidity") {
		t.Errorf("problems %v", problems)
	}
}

// A step keeps the relative uncertainty.
func TestUncertainStep(t *testing.T) {
	s := Default()
	in := at(t, &s, "point[0].dry-diameter")
	if got := in.Show(Style{}); got != "80 nm ± 3 %" {
		t.Errorf("shown as %q", got)
	}
	if err := in.Step(1, true); err != nil {
		t.Fatal(err)
	}
	if got := in.Show(Style{}); got != "100 nm ± 3 %" {
		t.Errorf("a big step leads to %q", got)
	}
}
