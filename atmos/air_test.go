package atmos

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/diff/fd"
	"gonum.org/v1/gonum/floats/scalar"
)

func TestAirMonotone(t *testing.T) {
	const p = 9e4
	all := Range{233.15, 323.15}
	checkMonotone(t, "diffusivity", all, 1, func(T float64) float64 { return VapourDiffusivity(T, p) })
	checkMonotone(t, "conductivity", all, 1, AirConductivity)
	checkMonotone(t, "viscosity", all, 1, AirViscosity)
	checkMonotone(t, "mean free path", all, 1, func(T float64) float64 { return MeanFreePath(T, p) })
}

func TestPressureScaling(t *testing.T) {
	for _, T := range []float64{233.15, 273.15, 313.15} {
		for _, p := range []float64{2e4, 7e4, 1.1e5} {
			if got := VapourDiffusivity(T, p) * p; !scalar.EqualWithinRel(got, VapourDiffusivity(T, 1e5)*1e5, 1e-15) {
				t.Errorf("diffusivity times pressure at %v K, %v Pa: %v", T, p, got)
			}
			if got := MeanFreePath(T, p) * p; !scalar.EqualWithinRel(got, MeanFreePath(T, 1e5)*1e5, 1e-15) {
				t.Errorf("mean free path times pressure at %v K, %v Pa: %v", T, p, got)
			}
		}
	}
}

func TestReferenceState(t *testing.T) {
	if got := MeanFreePath(296.15, 101325); !scalar.EqualWithinRel(got, 67.3e-9, 1e-15) {
		t.Errorf("mean free path at its reference: %v", got)
	}
	if got := AirViscosity(296.15); !scalar.EqualWithinRel(got, 1.83245e-5, 1e-15) {
		t.Errorf("viscosity at its reference: %v", got)
	}
}

func TestSlipLimits(t *testing.T) {
	last := math.Inf(1)
	for d := 1e-10; d < 1e-1; d *= 1.5 {
		c := SlipCorrection(d, 296.15, 101325)
		if !(c < last) || !(c > 1) {
			t.Errorf("slip at %v m: %v after %v, should fall and stay above 1", d, c, last)
		}
		last = c
	}
	// Continuum: C - 1 → 1.165 Kn. Free molecules: C/Kn → 1.648.
	kn := 2 * 67.3e-9 / 1e-2
	if got := (SlipCorrection(1e-2, 296.15, 101325) - 1) / kn; !scalar.EqualWithinRel(got, 1.165, 1e-10) {
		t.Errorf("continuum limit: got %v, want 1.165", got)
	}
	kn = 2 * 67.3e-9 / 1e-14
	if got := SlipCorrection(1e-14, 296.15, 101325) / kn; !scalar.EqualWithinRel(got, 1.648, 1e-6) {
		t.Errorf("free-molecule limit: got %v, want 1.648", got)
	}
}

func TestSlipSlope(t *testing.T) {
	lnC := func(lnKn float64) float64 { c, _ := slip(math.Exp(lnKn)); return math.Log(c) }
	sweep(Range{math.Log(1e-3), math.Log(1e3)}, 50, func(x float64) {
		want := fd.Derivative(lnC, x, &fd.Settings{Formula: fd.Central, Step: 1e-4})
		_, got := slip(math.Exp(x))
		if !scalar.EqualWithinAbsOrRel(got, want, 1e-9, 1e-7) {
			t.Errorf("at Kn %v: slope %v, finite difference %v", math.Exp(x), got, want)
		}
		if !(got > 0 && got < 1) {
			t.Errorf("at Kn %v: slope %v, should lie between 0 and 1", math.Exp(x), got)
		}
	})
}

// states are the airs in which inversions are tried.
func states(f func(T, p float64)) {
	for _, T := range []float64{233.15, 273.15, 296.15, 313.15} {
		for _, p := range []float64{2e4, 8.5e4, 101325} {
			f(T, p)
		}
	}
}

// inverseTol is a few units in the last place: an error of one unit in the
// given mobility is at most one unit in the diameter.
const inverseTol = 1e-15

func TestMobilityInverse(t *testing.T) {
	states(func(T, p float64) {
		for d := 1e-10; d < 1e-3; d *= 1.37 {
			for _, n := range []int{1, 2, 6, -1, -3} {
				Z := Mobility(d, n, T, p)
				if got := DiameterFromMobility(Z, n, T, p); !scalar.EqualWithinRel(got, d, inverseTol) {
					t.Errorf("d %v m, %d charges, %v K, %v Pa: back to %v (%.3g)", d, n, T, p, got, got/d-1)
				}
			}
		}
	})
}

func TestShapeInverse(t *testing.T) {
	states(func(T, p float64) {
		for d := 1e-9; d < 1e-4; d *= 1.61 {
			for _, chi := range []float64{1, 1 + 1e-12, 1.02, 1.08, 1.5, 3} {
				m := MobilityDiameter(d, chi, T, p)
				if got := VolumeEquivalent(m, chi, T, p); !scalar.EqualWithinRel(got, d, inverseTol) {
					t.Errorf("d %v m, χ %v, %v K, %v Pa: back to %v (%.3g)", d, chi, T, p, got, got/d-1)
				}
				if chi > 1.01 && !(m > d) {
					t.Errorf("d %v m, χ %v: mobility diameter %v is not larger", d, chi, m)
				}
			}
		}
	})
}

// TestShapeLimits: in the continuum D_m/D_ve → χ, for free molecules → √χ,
// since C is then proportional to 1/D.
func TestShapeLimits(t *testing.T) {
	for _, chi := range []float64{1.08, 1.5} {
		if got := MobilityDiameter(1, chi, 296.15, 101325); !scalar.EqualWithinRel(got, chi, 1e-6) {
			t.Errorf("continuum, χ %v: ratio %v", chi, got)
		}
		if got := MobilityDiameter(1e-14, chi, 296.15, 101325) / 1e-14; !scalar.EqualWithinRel(got, math.Sqrt(chi), 1e-6) {
			t.Errorf("free molecules, χ %v: ratio %v, want %v", chi, got, math.Sqrt(chi))
		}
	}
}

func TestSphereKeepsItsDiameter(t *testing.T) {
	const d = 1.23456789e-7
	if a, b := VolumeEquivalent(d, 1, 293.15, 9e4), MobilityDiameter(d, 1, 293.15, 9e4); a != d || b != d {
		t.Errorf("sphere of %v m: volume equivalent %v, mobility %v", d, a, b)
	}
}

func TestInversionOfNonsense(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		name string
		got  float64
	}{
		{"Z = 0", DiameterFromMobility(0, 1, 293.15, 101325)},
		{"no charge", DiameterFromMobility(1e-8, 0, 293.15, 101325)},
		{"opposite signs", DiameterFromMobility(1e-8, -1, 293.15, 101325)},
		{"Z = NaN", DiameterFromMobility(nan, 1, 293.15, 101325)},
		{"p = 0", DiameterFromMobility(1e-8, 1, 293.15, 0)},
		{"T < 0", DiameterFromMobility(1e-8, 1, -1, 101325)},
		{"diameter 0", VolumeEquivalent(0, 1.1, 293.15, 101325)},
		{"sphere of diameter -1", VolumeEquivalent(-1, 1, 293.15, 101325)},
		{"infinite diameter", MobilityDiameter(inf, 1.1, 293.15, 101325)},
		{"shape factor 0", VolumeEquivalent(1e-7, 0, 293.15, 101325)},
		{"shape factor -1", MobilityDiameter(1e-7, -1, 293.15, 101325)},
	} {
		if !math.IsNaN(c.got) {
			t.Errorf("%s: got %v, want NaN", c.name, c.got)
		}
	}
}

// TestSlipFreeIsConvex proves what the inversion rests on: the derivative of
// d/C(d), which is (1 + slope)/C, rises with d from 0 to 1.
func TestSlipFreeIsConvex(t *testing.T) {
	last := 0.0
	for kn := 1e6; kn > 1e-6; kn /= 1.05 {
		c, slope := slip(kn)
		derivative := (1 + slope) / c
		if !(derivative > last && derivative < 1) {
			t.Errorf("at Kn %v: derivative %v after %v", kn, derivative, last)
		}
		last = derivative
	}
}

func TestDragStepsEnough(t *testing.T) {
	// The bracket closes and the result is a root over 24 decades.
	for _, lambda := range []float64{1e-9, 6.73e-8, 1e-3} {
		for q := 1e-18; q < 1e6; q *= 7 {
			d := fromSlipFree(q, lambda)
			if back := slipFree(d, lambda); !scalar.EqualWithinRel(back, q, 2e-15) {
				t.Errorf("%s: d %v gives %v", fmt.Sprint(q, " ", lambda), d, back)
			}
		}
	}
}
