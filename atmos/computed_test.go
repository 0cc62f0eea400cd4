package atmos

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"strconv"
	"testing"

	"gonum.org/v1/gonum/floats/scalar"
)

// readComputed reads a file of values that general-purpose libraries computed
// from the same formulas (see testdata/computed/README.md).
func readComputed(t *testing.T, name string, into any) {
	t.Helper()
	data, err := os.ReadFile("../testdata/computed/" + name)
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(data, into); err != nil {
		t.Fatalf("%s: %v", name, err)
	}
}

// formulaTol allows for another order of the same additions: the reference
// values carry all digits.
const formulaTol = 1e-12

func TestComputedPropertyTable(t *testing.T) {
	var file struct {
		Table []struct {
			T            float64
			Sigma        float64
			RhoW         float64 `json:"rho_w"`
			Esat         float64
			Latent       float64
			Diffusivity  float64 `json:"diffusivity_1013hPa"`
			Conductivity float64
		} `json:"property_table"`
	}
	readComputed(t, "constants.json", &file)
	if len(file.Table) < 9 {
		t.Fatalf("property table has %d rows, want at least 9", len(file.Table))
	}
	for _, row := range file.Table {
		for _, c := range []struct {
			name      string
			got, want float64
		}{
			{"density", WaterDensity(row.T), row.RhoW},
			{"surface tension", SurfaceTension(row.T), row.Sigma},
			{"vapour pressure", VapourPressure(row.T), row.Esat},
			{"linear latent heat", LinearLatentHeat(row.T), row.Latent},
			{"diffusivity", VapourDiffusivity(row.T, 101325), row.Diffusivity},
			{"conductivity", AirConductivity(row.T), row.Conductivity},
		} {
			if !scalar.EqualWithinRel(c.got, c.want, formulaTol) {
				t.Errorf("%s at %v K: got %.17g, want %.17g", c.name, row.T, c.got, c.want)
			}
		}
	}
}

func TestComputedConstants(t *testing.T) {
	var file map[string]any
	readComputed(t, "constants.json", &file)
	for _, c := range []struct {
		key string
		got float64
		tol float64
	}{
		{"R", GasConstant, 2e-11}, // the file has the ten digits 8.314462618
		{"Mw", WaterMolarMass, 0},
		{"Md", DryAirMolarMass, 0},
		{"g", Gravity, 0},
		{"p_ref", StandardPressure, 0},
		{"e", ElementaryCharge, 0},
		{"kB", Boltzmann, 0},
		{"eps0", VacuumPermittivity, 0},
	} {
		want, ok := file[c.key].(float64)
		if !ok || math.Abs(c.got-want) > c.tol*want {
			t.Errorf("%s: got %.17g, want %v", c.key, c.got, file[c.key])
		}
	}
}

// dmaCase is one case of testdata/computed/dma.json. Its charge fractions are
// not looked at here.
type dmaCase struct {
	ID     string
	Family string
	Input  struct {
		D, Z, T, P float64
		N          int
	}
	Output struct {
		D            float64
		Viscosity    float64
		MeanFreePath float64 `json:"mean_free_path"`
		Slip         float64
		Z            map[string]float64
		SameZ        map[string]float64 `json:"d_same_Z"`
	}
}

// inversionTol is for diameters found by a root search in the reference.
const inversionTol = 1e-10

func TestComputedMobility(t *testing.T) {
	var file struct{ Cases []dmaCase }
	readComputed(t, "dma.json", &file)
	seen := map[string]int{}
	check := func(c dmaCase, name string, got, want, tol float64) {
		t.Helper()
		if want == 0 || !scalar.EqualWithinRel(got, want, tol) {
			t.Errorf("%s %s: got %.17g, want %.17g", c.ID, name, got, want)
		}
	}
	for _, c := range file.Cases {
		in, out := c.Input, c.Output
		seen[c.Family]++
		switch c.Family {
		case "mobility_and_charge":
			check(c, "viscosity", AirViscosity(in.T), out.Viscosity, formulaTol)
			check(c, "mean free path", MeanFreePath(in.T, in.P), out.MeanFreePath, formulaTol)
			check(c, "slip", SlipCorrection(in.D, in.T, in.P), out.Slip, formulaTol)
			for n, want := range out.Z {
				check(c, "Z of "+n, Mobility(in.D, charges(t, n), in.T, in.P), want, formulaTol)
			}
			for n, want := range out.SameZ {
				got := DiameterFromMobility(Mobility(in.D, 1, in.T, in.P), charges(t, n), in.T, in.P)
				check(c, "diameter with charges "+n, got, want, inversionTol)
			}
		case "diameter_from_mobility":
			check(c, "diameter", DiameterFromMobility(in.Z, in.N, in.T, in.P), out.D, inversionTol)
		default:
			t.Errorf("%s: unknown family %q", c.ID, c.Family)
		}
	}
	if seen["mobility_and_charge"] < 7 || seen["diameter_from_mobility"] < 8 {
		t.Errorf("cases by family: %v, want at least 7 and 8", seen)
	}
}

func charges(t *testing.T, text string) int {
	t.Helper()
	n, err := strconv.Atoi(text)
	if err != nil {
		t.Fatal(err)
	}
	return n
}

// TestComputedFormulas compares with values computed with 30 digits from the
// coefficients of the sources.
func TestComputedFormulas(t *testing.T) {
	vapour := func(celsius float64) float64 { return VapourPressure(273.15 + celsius) }
	tension := func(celsius float64) float64 { return SurfaceTension(273.15 + celsius) }
	latent := func(celsius float64) float64 { return LatentHeat(273.15+celsius) / 1e3 }
	slip := func(nm float64) float64 { return SlipCorrection(nm*1e-9, 296.15, 101325) }
	for _, c := range []struct {
		name string
		f    func(float64) float64
		x    float64
		want float64
		tol  float64 // half a unit of the last digit, relative
	}{
		{"vapour pressure", vapour, -40, 18.9121494301, 5e-12},
		{"vapour pressure", vapour, -38, 23.2388456229, 5e-12},
		{"vapour pressure", vapour, -20, 125.504169355, 5e-12},
		{"vapour pressure", vapour, 0, 611.212697827, 1e-12},
		{"vapour pressure", vapour, 25, 3169.93670673, 2e-12},
		{"vapour pressure", vapour, 50, 12351.9829961, 5e-12},
		{"surface tension", tension, -40, 0.0807488288171, 1e-12},
		{"surface tension", tension, -25, 0.0789517720932, 1e-12},
		{"surface tension", tension, 0, 0.0756476682299, 1e-12},
		{"surface tension", tension, 50, 0.0679439059449, 1e-12},
		{"latent heat", latent, -40, 2608.84, 2e-6},
		{"latent heat", latent, -10, 2524.48, 2e-6},
		{"latent heat", latent, 40, 2406.86, 2e-6},
		{"slip", slip, 2, 111.43240, 5e-8},
		{"slip", slip, 10, 22.717931, 3e-8},
		{"slip", slip, 20, 11.643460, 5e-8},
		{"slip", slip, 50, 5.0339774, 1e-8},
		{"slip", slip, 100, 2.8780492, 2e-8},
		{"slip", slip, 200, 1.8579352, 3e-8},
		{"slip", slip, 500, 1.3168212, 4e-8},
		{"slip", slip, 1000, 1.1568485, 5e-8},
		{"slip", slip, 10000, 1.0156809, 5e-8},
	} {
		t.Run(fmt.Sprint(c.name, " ", c.x), func(t *testing.T) {
			if got := c.f(c.x); !scalar.EqualWithinRel(got, c.want, c.tol) {
				t.Errorf("got %.13g, want %.13g within %g", got, c.want, c.tol)
			}
		})
	}
}
