package koehler

import (
	"math"
	"testing"
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

// A drop of a soluble particle: a positive length lowers the crest, by about
// the share 4δ/D of the Kelvin term there.
func TestTolmanLowersTheCrest(t *testing.T) {
	const dry, kelvin, length, kappa = 20e-9, 2.1e-9, 0.1e-9, 0.61
	plain := SolveKappa(dry, kelvin, kappa)
	highest := math.Inf(-1)
	for y := -2.0; y < 8; y += 1e-4 {
		u := math.Exp(y)
		x := math.Cbrt(1 + u)
		sigma, _ := TolmanTension(1, length, dry*x)
		highest = math.Max(highest, kelvin*sigma/(dry*x)-math.Log1p(kappa/u))
	}
	wet := dry * plain.GrowthFactor
	if drop := math.Log1p(plain.Supersaturation) - highest; math.Abs(drop/(4*length*kelvin/(wet*wet))-1) > 0.05 {
		t.Errorf("the crest falls by %v, expected near %v", drop, 4*length*kelvin/(wet*wet))
	}
}
