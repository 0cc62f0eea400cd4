package scenario

import "testing"

// An uncertainty of the temperature is a difference: a degree Celsius is a kelvin.
func TestSpreads(t *testing.T) {
	s := Default()
	for _, c := range []struct {
		path, text, shown string
		at                *float64
		want              float64
	}{
		{"temperature-uncertainty", "0.5C", "0.5 K", &s.TemperatureUncertainty, 0.5},
		{"temperature-uncertainty", "1 K", "1.0 K", &s.TemperatureUncertainty, 1},
		{"surface-tension-uncertainty", "0.7mN/m", "0.7 mN/m", &s.TensionUncertainty, 0.7e-3},
		{"shape-factor-uncertainty", "0.02", "0.02", &s.ShapeUncertainty, 0.02},
	} {
		in := at(t, &s, Path(c.path))
		if err := in.SetWithUnit(c.text); err != nil {
			t.Errorf("%s=%s: %v", c.path, c.text, err)
		}
		if *c.at != c.want || in.Show(Style{}) != c.shown {
			t.Errorf("%s=%s: %g, shown as %q, want %g and %q", c.path, c.text, *c.at, in.Show(Style{}), c.want, c.shown)
		}
	}
	if at(t, &s, "shape-factor-uncertainty").Used() {
		t.Error("a volume-equivalent size has a shape factor")
	}
	if back := decoded(t, encoded(t, s)); !back.Equal(s) {
		t.Errorf("written %+v, read %+v", s, back)
	}
}
