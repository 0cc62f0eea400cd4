package spectrum

import (
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
)

// Modes and error functions: exact there and back; the counts agree to 1 % of the
// mode's number in the low tail, better at the centre.
func TestModesAndErrorFunctions(t *testing.T) {
	for _, m := range []aerosol.Mode{{Concentration: 5e8, Median: 45e-9, GSD: 1.6}, {Concentration: 2e9, Median: 130e-9, GSD: 1.45}, {Concentration: 1, Median: 20e-9, GSD: 2.2}} {
		for _, kappa := range []float64{0.05, 0.3, 1.28} {
			f, err := StepOfMode(m, kappa, kelvin)
			if err != nil {
				t.Fatal(err)
			}
			back, err := ModeOfStep(f, kappa, kelvin)
			if err != nil {
				t.Fatal(err)
			}
			near(t, "number", back.Concentration, m.Concentration, 1e-15)
			near(t, "median", back.Median, m.Median, 1e-12)
			near(t, "gsd", back.GSD, m.GSD, 1e-14)
			p := Population{{m, 1, Kappa{kappa, kelvin}}}
			for _, z := range []float64{-1.5, -0.7, 0, 0.7, 1.5} {
				s := f.Centre * math.Exp(z*f.Width)
				want, err := p.Count(s)
				if err != nil {
					t.Fatal(err)
				}
				tol := 0.01 // "up to 1 %" of κ ≥ 0.3; less soluble particles bend s_c more
				if kappa < 0.1 {
					tol = 0.06
				}
				if got := (ErrorFunctions{f}).Count(s); math.Abs(got-want) > tol*m.Concentration {
					t.Errorf("κ %g at z %g: %.5f, the mode %.5f of its number", kappa, z, got/m.Concentration, want/m.Concentration)
				}
			}
		}
	}
	for name, err := range map[string]error{
		"gsd": func() error {
			_, err := StepOfMode(aerosol.Mode{Concentration: 1, Median: 1e-7, GSD: 1}, 0.3, kelvin)
			return err
		}(),
		"no kappa": func() error { _, err := StepOfMode(invented()[0], 0, kelvin); return err }(),
		"width":    func() error { _, err := ModeOfStep(ErrorFunction{1, 0.01, 0}, 0.3, kelvin); return err }(),
		"kappa":    func() error { _, err := ModeOfStep(ErrorFunction{1, 0.01, 1}, 31, kelvin); return err }(),
		"centre":   func() error { _, err := ModeOfStep(ErrorFunction{1, 0, 1}, 0.3, kelvin); return err }(),
	} {
		if err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}

// Modes are found back from the spectrum of a two-mode population.
func TestModesFromASpectrum(t *testing.T) {
	var p Population
	for _, m := range invented() {
		p = append(p, Group{m, 1, Kappa{0.3, kelvin}})
	}
	var points []Point
	for i := range 14 {
		s := 0.0006 * math.Pow(30, float64(i)/13)
		n, err := p.Count(s)
		if err != nil {
			t.Fatal(err)
		}
		points = append(points, Point{Supersaturation: s, Count: n, Uncertainty: 0.02 * n})
	}
	f, err := FitErrorFunctions(points, 2, 0)
	if err != nil {
		t.Fatal(err)
	}
	steps := f.Form.(ErrorFunctions)
	for i, want := range []aerosol.Mode{invented()[1], invented()[0]} { // the wide mode activates first
		got, err := ModeOfStep(steps[i], 0.3, kelvin)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "number", got.Concentration, want.Concentration, 0.05)
		near(t, "median", got.Median, want.Median, 0.03)
		near(t, "gsd", got.GSD, want.GSD, 0.03)
	}
}
