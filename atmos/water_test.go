package atmos

import (
	"math"
	"testing"

	"gonum.org/v1/gonum/diff/fd"
	"gonum.org/v1/gonum/floats/scalar"
)

// sweep calls f at n evenly spaced points of a range, its ends included.
func sweep(r Range, n int, f func(x float64)) {
	for i := range n {
		f(r.Min + (r.Max-r.Min)*float64(i)/float64(n-1))
	}
}

// checkMonotone fails unless f rises (sign 1) or falls (sign -1) all along.
func checkMonotone(t *testing.T, name string, r Range, sign float64, f func(float64) float64) {
	t.Helper()
	last := math.Inf(-int(sign))
	sweep(r, 400, func(x float64) {
		y := f(x)
		if !(sign*y > sign*last) {
			t.Errorf("%s at %v: %v does not follow %v", name, x, y, last)
		}
		last = y
	})
}

func TestVapourPressureLogSlope(t *testing.T) {
	lnE := func(T float64) float64 { return math.Log(VapourPressure(T)) }
	sweep(VapourPressureRange, 60, func(T float64) {
		want := fd.Derivative(lnE, T, &fd.Settings{Formula: fd.Central, Step: 1e-3})
		// The difference quotient itself is good to about 1e-16*ln e/1e-3.
		if got := VapourPressureLogSlope(T); !scalar.EqualWithinRel(got, want, 1e-8) {
			t.Errorf("at %v K: got %.12g, finite difference %.12g", T, got, want)
		}
	})
}

// TestClapeyron joins three formulas that were found independently. For an
// ideal vapour L = R_v T² d ln e/dT; the vapour's non-ideality and the volume
// of the liquid change that by less than 0.5 % up to 50 °C (second virial
// coefficient -1.3e-3 m3/mol at 20 °C: e B/(R T) = -1.2e-3).
func TestClapeyron(t *testing.T) {
	sweep(LatentHeatRange, 40, func(T float64) {
		ideal := GasConstant / WaterMolarMass * T * T * VapourPressureLogSlope(T)
		if got := LatentHeat(T); !scalar.EqualWithinRel(got, ideal, 5e-3) {
			t.Errorf("at %v K: latent heat %v, Clapeyron %v", T, got, ideal)
		}
	})
}

func TestLatentHeatForms(t *testing.T) {
	// Each form is within 0.07 % of the reference here, so they are within
	// 0.14 % of each other.
	sweep(LinearLatentHeatRange, 40, func(T float64) {
		if a, b := LatentHeat(T), LinearLatentHeat(T); !scalar.EqualWithinRel(a, b, 1.4e-3) {
			t.Errorf("at %v K: %v and %v", T, a, b)
		}
	})
}

func TestWaterDensityMaximum(t *testing.T) {
	// The density of water is greatest at 3.98 °C (Tanaka et al. 2001:
	// 3.983035 °C), within 0.01 K for Kell's formula.
	slope := func(T float64) float64 {
		return fd.Derivative(WaterDensity, T, &fd.Settings{Formula: fd.Central, Step: 1e-2})
	}
	if a, b := slope(277.133-0.01), slope(277.133+0.01); !(a > 0 && b < 0) {
		t.Errorf("slopes around the maximum: %v below, %v above", a, b)
	}
}

// TestWaterDensityMisprint keeps the misprinted denominator out: it gives
// 996.730 kg/m3 at 25 °C, 0.3 kg/m3 too low.
func TestWaterDensityMisprint(t *testing.T) {
	if got := WaterDensity(298.15); math.Abs(got-997.0449) > 5e-5 {
		t.Errorf("density at 25 °C: got %v, want 997.0449 (Kell 1975)", got)
	}
}

func TestWaterMolarVolume(t *testing.T) {
	sweep(WaterDensityRange, 20, func(T float64) {
		if got := WaterMolarVolume(T) * WaterDensity(T); !scalar.EqualWithinRel(got, WaterMolarMass, 1e-15) {
			t.Errorf("at %v K: v ρ = %v", T, got)
		}
	})
}

func TestWaterMonotone(t *testing.T) {
	checkMonotone(t, "vapour pressure", VapourPressureRange, 1, VapourPressure)
	checkMonotone(t, "slope of ln e", VapourPressureRange, -1, VapourPressureLogSlope)
	checkMonotone(t, "surface tension", SurfaceTensionRange, -1, SurfaceTension)
	checkMonotone(t, "latent heat", LatentHeatRange, -1, LatentHeat)
	checkMonotone(t, "density above its maximum", Range{277.2, 423.15}, -1, WaterDensity)
	checkMonotone(t, "density below its maximum", Range{235.15, 277.1}, 1, WaterDensity)
	// Compressibility has its minimum near 46 °C (Kell 1975).
	checkMonotone(t, "compressibility when cold", Range{243.15, 318.15}, -1, Compressibility)
	checkMonotone(t, "compressibility when warm", Range{321.15, 423.15}, 1, Compressibility)
}

func TestSurfaceTensionEnds(t *testing.T) {
	if got := SurfaceTension(CriticalTemperature); got != 0 {
		t.Errorf("at the critical temperature: got %v, want 0", got)
	}
	if got := SurfaceTension(CriticalTemperature + 1); !math.IsNaN(got) {
		t.Errorf("above the critical temperature: got %v, want NaN", got)
	}
}
