package koehler

import (
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

func TestTolmanTension(t *testing.T) {
	const flat = 0.072
	cases := []struct {
		name        string
		length, wet float64
		want, tol   float64
	}{
		{"no length", 0, 10e-9, flat, 0},
		{"positive: lower tension", 0.1e-9, 10e-9, flat / 1.04, 1e-15},
		{"negative: higher tension", -0.1e-9, 10e-9, flat / 0.96, 1e-15},
		{"flat surface", 0.1e-9, 1, flat, 1e-9},
		{"radius of two lengths halves it", 1e-9, 4e-9, flat / 2, 1e-15},
	}
	for _, c := range cases {
		got, slope := TolmanTension(flat, c.length, c.wet)
		if apart(got, c.want) > c.tol {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
		const h = 1e-5
		up, _ := TolmanTension(flat, c.length, c.wet*math.Exp(h))
		down, _ := TolmanTension(flat, c.length, c.wet*math.Exp(-h))
		if fd := (up - down) / (2 * h); math.Abs(fd-slope) > 1e-11 {
			t.Errorf("%s: slope %v, difference %v", c.name, slope, fd)
		}
		// A_flat σ/σ_flat/D = A_flat/(D + 4δ)
		if kelvin := 2.1e-9 * got / flat / c.wet; apart(kelvin, 2.1e-9/(c.wet+4*c.length)) > 1e-15 {
			t.Errorf("%s: Kelvin term %v", c.name, kelvin)
		}
	}
}

func TestTolmanTensionOutside(t *testing.T) {
	nan := math.NaN()
	for name, v := range map[string][2]float64{
		"size 0": {0.1e-9, 0}, "size NaN": {0.1e-9, nan}, "length NaN": {nan, 1e-8}, "negative length, small drop": {-1e-9, 3e-9}, "at the pole": {-1e-9, 4e-9},
	} {
		if sigma, slope := TolmanTension(0.072, v[0], v[1]); !math.IsNaN(sigma) || !math.IsNaN(slope) {
			t.Errorf("%s: %v %v, want NaN", name, sigma, slope)
		}
	}
}

// What a simulated length of -0.056 nm does to the tension of water, as the
// project's notes on water state it (two digits; computed from the law itself).
func TestTolmanRaisesTheTension(t *testing.T) {
	for _, c := range []struct{ wet, percent, tol float64 }{{5e-9, 4.7, 0.05}, {20e-9, 1.1, 0.05}, {100e-9, 0.22, 0.005}} {
		if sigma, _ := TolmanTension(1, -0.056e-9, c.wet); math.Abs(100*(sigma-1)-c.percent) > c.tol {
			t.Errorf("%v m: %+.3f %%, want %+.3g %%", c.wet, 100*(sigma-1), c.percent)
		}
	}
}

// The crest with a Tolman length against a search on ln S = A/(D+4δ) + ln a_w
// that knows nothing of tensions and slopes.
func TestTolmanCrest(t *testing.T) {
	const T = 298.15
	kelvin := KelvinLength(atmos.SurfaceTension(T), T)
	for _, c := range []struct {
		name               string
		dry, length, kappa float64
	}{
		{"lower", 20e-9, 0.1e-9, 0.61}, {"higher", 20e-9, -0.056e-9, 0.61}, {"small", 3e-9, -0.1e-9, 1.2},
		{"large", 1e-6, 0.1e-9, 0.3}, {"hardly soluble", 10e-9, 0.05e-9, 1e-3}, {"insoluble", 10e-9, 0.05e-9, 0}, {"insoluble, higher", 4e-9, -0.1e-9, 0},
	} {
		lnS := func(y float64) float64 {
			u := math.Exp(y)
			return kelvin/(c.dry*math.Cbrt(1+u)+4*c.length) - math.Log1p(c.kappa/u)
		}
		want, at := math.Inf(-1), 0.0
		for y := -20.0; y < 12; y += 0.01 {
			if f := lnS(y); f > want {
				want, at = f, y
			}
		}
		for step := 0.01; step > 1e-9; step /= 2 {
			for _, y := range []float64{at - step, at + step} {
				if f := lnS(y); f > want {
					want, at = f, y
				}
			}
		}
		p := Particle{DryDiameter: c.dry, Temperature: T, Solution: solutes.Kappa(c.kappa), TolmanLength: c.length}
		crest, err := p.Crest()
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if c.kappa == 0 { // the limit at the dry size
			want = kelvin / (c.dry + 4*c.length)
			if crest.Kind != BoundaryMaximum {
				t.Errorf("%s: kind %v", c.name, crest.Kind)
			}
		}
		checkClose(t, c.name, math.Log1p(crest.Supersaturation), want, 1e-13)
		p.TolmanLength = 0
		if plain, _ := p.Crest(); (crest.Supersaturation < plain.Supersaturation) != (c.length > 0) {
			t.Errorf("%s: crest %v, flat %v", c.name, crest.Supersaturation, plain.Supersaturation)
		}
	}
}

// A vanishing length changes nothing: the climb and the closed form agree.
func TestTolmanLimit(t *testing.T) {
	p := Particle{DryDiameter: 60e-9, Temperature: 298.15, Solution: solutes.Kappa(0.61)}
	flat, _ := p.Crest()
	p.TolmanLength = 1e-24
	curved, err := p.Crest()
	if err != nil {
		t.Fatal(err)
	}
	checkClose(t, "s_c", curved.Supersaturation, flat.Supersaturation, 1e-13)
	checkClose(t, "D_c", curved.WetDiameter, flat.WetDiameter, 1e-9)
}
