package spectrum

import (
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
)

// As many scaled particles lie above a scaled diameter as did above the diameter.
func TestScaled(t *testing.T) {
	mode := aerosol.Mode{Concentration: 1e9, Median: 80e-9, GSD: 1.7}
	grid, err := aerosol.NewGrid([]float64{20e-9, 50e-9, 100e-9, 300e-9})
	if err != nil {
		t.Fatal(err)
	}
	bins, err := aerosol.NewBins(grid, []float64{1e8, 4e8, 2e8}, aerosol.Counts)
	if err != nil {
		t.Fatal(err)
	}
	for name, sizes := range map[string]Sizes{"mode": mode, "modes": aerosol.Modes{mode, mode}, "bins": bins} {
		for _, by := range []float64{0.97, 1, 1.2} {
			scaled, ok := Scaled(sizes, by)
			if !ok || scaled.Number() != sizes.Number() {
				t.Fatalf("%s by %g: %v, %v of %v", name, by, ok, scaled.Number(), sizes.Number())
			}
			for _, d := range []float64{30e-9, 60e-9, 200e-9} {
				if got, want := scaled.Above(d*by), sizes.Above(d); math.Abs(got-want) > 1e-9*want {
					t.Errorf("%s by %g above %g: %g, want %g", name, by, d, got, want)
				}
			}
		}
	}
	if _, ok := Scaled(nil, 1); ok {
		t.Error("no sizes were scaled")
	}
}
