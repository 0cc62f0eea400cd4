package atmos

import (
	"math"
	"testing"
)

// Each slope is that of its function.
func TestSlopes(t *testing.T) {
	const h = 0.01
	for name, c := range map[string]struct {
		of    func(T float64) float64
		slope func(T float64) float64
	}{
		"surface tension":     {func(T float64) float64 { return math.Log(SurfaceTension(T)) }, SurfaceTensionLogSlope},
		"vapour diffusivity":  {func(T float64) float64 { return math.Log(VapourDiffusivity(T, 9e4)) }, VapourDiffusivityLogSlope},
		"air conductivity":    {AirConductivity, func(float64) float64 { return AirConductivitySlope }},
		"linear latent heat":  {LinearLatentHeat, func(float64) float64 { return LinearLatentHeatSlope }},
		"vapour pressure log": {func(T float64) float64 { return math.Log(VapourPressure(T)) }, VapourPressureLogSlope},
	} {
		for _, T := range []float64{245, 273.15, 300} {
			want := (c.of(T+h) - c.of(T-h)) / (2 * h)
			if got := c.slope(T); math.Abs(got-want) > 1e-7*math.Abs(want) {
				t.Errorf("%s at %g K: %.10g, differences give %.10g", name, T, got, want)
			}
		}
	}
}
