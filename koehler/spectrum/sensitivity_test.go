package spectrum

import (
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
)

// Rows of the field's reference on sensitivities, computed for this project (C32 of
// its list of checks, and the sentence after it in its section 3).
func TestSensitivities(t *testing.T) {
	count := func(m aerosol.Mode, kappa, s float64) float64 {
		n, err := Population{{m, 1, Kappa{kappa, kelvin}}}.Count(s)
		if err != nil {
			t.Fatal(err)
		}
		return n
	}
	aitken := aerosol.Mode{Concentration: 1, Median: 70e-9, GSD: 1.7}
	accumulation := aerosol.Mode{Concentration: 1, Median: 130e-9, GSD: 1.6}
	// The second row is given to two digits, and its figures lie up to 0.007 above
	// these; the slow quadrature above agrees with these.
	for _, c := range []struct {
		mode aerosol.Mode
		want [4]float64
		tol  float64
	}{{aitken, [4]float64{1.284, 0.834, 0.453, 0.181}, 0.005}, {accumulation, [4]float64{0.82, 0.38, 0.11, 0.02}, 0.01}} {
		for i, s := range []float64{0.001, 0.002, 0.004, 0.008} {
			got := math.Log(count(c.mode, 0.3*1.001, s)/count(c.mode, 0.3/1.001, s)) / (2 * math.Log(1.001))
			if math.Abs(got-c.want[i]) > c.tol {
				t.Errorf("Dg %g: d ln N/d ln κ at %g = %.4f, want %.3f", c.mode.Median, s, got, c.want[i])
			}
			k, err := Population{{c.mode, 1, Kappa{0.3, kelvin}}}.Slope(s)
			if err != nil {
				t.Fatal(err)
			}
			// s_c goes nearly with κ^-1/2
			if math.Abs(k-2*got) > 0.02 {
				t.Errorf("d ln N/d ln s at %g = %.4f, want about %.4f", s, k, 2*got)
			}
		}
	}
	for _, c := range []struct {
		mode        aerosol.Mode
		wider, more float64 // % by 3 % wider sizes and by 5 % more supersaturation, at 0.1 %
	}{{aitken, 11.9, 13}, {accumulation, 7.4, 8}} {
		wide := c.mode
		wide.Median *= 1.03
		if got := 100 * (count(wide, 0.3, 0.001)/count(c.mode, 0.3, 0.001) - 1); math.Abs(got-c.wider) > 0.1 {
			t.Errorf("3 %% wider: %.2f %% more, want %.1f", got, c.wider)
		}
		if got := 100 * (count(c.mode, 0.3, 0.00105)/count(c.mode, 0.3, 0.001) - 1); math.Abs(got-c.more) > 0.5 {
			t.Errorf("5 %% more supersaturation: %.2f %% more, want %.0f", got, c.more)
		}
	}
}
