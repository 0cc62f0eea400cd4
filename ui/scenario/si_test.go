package scenario

import (
	"strings"
	"testing"
)

func TestSI(t *testing.T) {
	for _, c := range []struct {
		unit, text string
		want       float64
	}{
		{"kg/m³", "1.4 g/cm3", 1400},
		{"kg/m³", "1400kg/m3", 1400},
		{"kg/mol", "150 g/mol", 0.15},
		{"N/m", "36 mN/m", 0.036},
		{"mol/m²", "3e-6 mol/m2", 3e-6},
		{"m³/mol", "20 m3/mol", 20},
		{"K", "25 C", 298.15},
		{Fraction, "79.9 %", 0.799},
		{"", "0.5", 0.5},
	} {
		if got, err := SI(c.unit, c.text); err != nil || got != c.want {
			t.Errorf("%s as %q: %v, %v, want %v", c.text, c.unit, got, err, c.want)
		}
	}
}

func TestSIRefuses(t *testing.T) {
	for _, c := range []struct{ unit, text, right string }{
		{"kg/m³", "1400", "1400 has no unit: want a unit, such as 1.4"},
		{"kg/m³", "1.4 parsec", "kg/m³ without quotes"},
		{"kg/m³", "heavy", "\"heavy\" is no number"},
		{"kg/m³", "", "no value"},
		{"kg/m³", "NaN kg/m3", "no number"},
		{"", "0.5 %", "want a number"},
		{Fraction, "0.8", "80 %"},
		{"N/m per mol/kg", "1 mN/m", "want a number in N/m per mol/kg"},
	} {
		if x, err := SI(c.unit, c.text); err == nil || !strings.Contains(err.Error(), c.right) {
			t.Errorf("%q as %q: %v, %v, want an error with %q", c.text, c.unit, x, err, c.right)
		}
	}
}

// A list without an item stands nowhere in the text; the error is at its key.
func TestEmptyListIsPlaced(t *testing.T) {
	_, err := Decode("f.toml", strings.NewReader("\n\nkappa = []\n"))
	if err == nil || !strings.HasPrefix(err.Error(), "f.toml:3:1: kappa: ") {
		t.Errorf("%v", err)
	}
}
