package koehler

import (
	"math"
	"testing"
)

// The series is the function to rounding, up to where it ends and beyond.
func TestLog1p(t *testing.T) {
	for x := 1e-12; x < 0.01; x *= 1.01 {
		for _, x := range []float64{x, -x} {
			if got, want := log1p(x), math.Log1p(x); math.Abs(got-want) > 4e-16*math.Abs(want) {
				t.Fatalf("log1p(%g) = %.17g, want %.17g", x, got, want)
			}
		}
	}
	if log1p(0) != 0 {
		t.Error("log1p(0) is not 0")
	}
}
