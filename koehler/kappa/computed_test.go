package kappa

import (
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler/internal/computed"
)

// inverse.json of testdata/computed: 40 digits by another library, README there,
// section 6. Its R has ten digits, which leaves 2e-11 in A, 6e-11 in κ, and more
// near κ = 0 where κ is a small difference.
func TestComputedInverses(t *testing.T) {
	type inverseCase struct {
		ID, Family string
		Input      map[string]float64
		Output     map[string]*float64
	}
	checked := map[string]int{}
	for _, c := range computed.Read[inverseCase](t, "inverse.json") {
		in := c.Input
		w := Convention{in["T"], in["sigma_factor"] * atmos.SurfaceTension(in["T"])}
		check := func(key string, got float64) {
			t.Helper()
			want := c.Output[key]
			if want == nil {
				return
			}
			if !(math.Abs(got / *want - 1) <= 2e-9) {
				t.Errorf("%s %s = %.15g, want %.15g", c.ID, key, got, *want)
			}
			checked[c.Family]++
		}
		switch c.Family {
		case "kappa_from_Dd_sc":
			v, err := FromActivation(in["Dd"], in["sc"], w)
			if err != nil {
				t.Error(c.ID, err)
			}
			check("kappa", v.Kappa)
			check("kappa_classic", v.Classic)
		case "Dd_from_kappa_sc":
			d, err := DryDiameter(in["kappa"], in["sc"], w)
			if err != nil {
				t.Error(c.ID, err)
			}
			check("Dd", d.Diameter)
			check("Dd_classic", d.Classic)
		case "kappa_from_gf":
			g, err := FromGrowth(in["Dd"], in["gf"], in["RH"], w)
			if err != nil {
				t.Error(c.ID, err)
			}
			check("kappa", g.Kappa)
			check("aw", g.WaterActivity)
			check("kelvin", g.KelvinFactor)
			check("kappa_no_kelvin", g.WithoutKelvin)
		case "gf_from_kappa_RH":
			gf, err := GrowthFactor(in["Dd"], in["kappa"], in["RH"], w)
			if err != nil {
				t.Error(c.ID, err)
			}
			check("gf", gf)
		}
	}
	for _, family := range []string{"kappa_from_Dd_sc", "Dd_from_kappa_sc", "kappa_from_gf", "gf_from_kappa_RH"} {
		if checked[family] < 10 {
			t.Errorf("only %d values of %s were checked", checked[family], family)
		}
	}
}
