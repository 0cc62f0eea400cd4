package ascent

import (
	"os"
	"testing"

	"dropcrest/koehler/internal/computed"
)

func needLong(t *testing.T) {
	t.Helper()
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("DROPCREST_LONG is not set")
	}
}

// The base case of the comparison of parcel models by Kreidenweis et al., J. Geophys.
// Res. 108 (2003) 4213. Its inputs and the range of the models, 275 to 358 droplets
// per cm³, are from memory and were not read again; κ of ammonium bisulfate is not
// in the statement of the problem. With an accommodation of 1 every κ from 0.56 to
// 0.9 lies inside the range.
func TestKreidenweis(t *testing.T) {
	inside := 0
	for _, c := range computed.Read[computedCase](t, "kreidenweis2003.json") {
		got := mustRun(t, c.Input.parcel(), c.Input.options(t, 800, 1e-6)) // N_growth_bin_width says 800
		near(t, c.ID+" peak", got.Peak.Supersaturation, c.out("smax"), 2e-5)
		near(t, c.ID+" droplets", got.Droplets, c.out("N_act"), 2e-5)
		near(t, c.ID+" height", got.Peak.Height, c.out("z_smax"), 2e-5)
		near(t, c.ID+" T at the end", got.End.Temperature, c.out("T_end"), 1e-7)
		near(t, c.ID+" liquid", got.End.LiquidWater, c.out("wl_end"), 3e-6)
		near(t, c.ID+" grown", got.Grown, c.out("N_growth"), c.out("N_growth_bin_width")/c.out("N_growth"))
		if c.Input.Mass == 1 {
			inside++
			if n := got.Droplets / 1e6; !(n > 275 && n < 358) {
				t.Errorf("%s: %g droplets per cm3, outside the models' range", c.ID, n)
			}
		}
	}
	if inside != 6 {
		t.Errorf("%d cases with an accommodation of 1, want 6", inside)
	}
}
