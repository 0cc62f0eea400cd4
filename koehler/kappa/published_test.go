package kappa

import (
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s = %.9g, want %.9g ± %.2g", what, got, want, tol)
	}
}

// pureWater is the convention of the actual temperature with the tension of
// pure water.
func pureWater(T float64) Convention { return Convention{Temperature: T} }

func TestKelvinLengths(t *testing.T) {
	// Petters & Kreidenweis 2007, eq. 6, with ρ_w = 997.05 kg/m³; computed
	near(t, "A of 25 °C and 72.0 mN/m, nm", 1e9*At25C().Kelvin(), 2.099, 0.001)
	// IAPWS R1-76 tension with the density held at 997.05 kg/m³; computed
	for T, want := range map[float64]float64{273.15: 2.407, 283.15: 2.279, 293.15: 2.157, 298.15: 2.098, 303.15: 2.041} {
		near(t, "A with that density, nm", 1e9*pureWater(T).Kelvin()*atmos.WaterDensity(T)/997.05, want, 0.001)
	}
}

func TestPublishedActivation(t *testing.T) {
	for _, c := range []struct {
		name      string
		dry, s    float64
		conv      Convention
		want, tol float64
		classic   float64 // 0: none
	}{
		// Pöhlker M. et al. 2016, Atmos. Chem. Phys. 16, 15709, abstract: 0.14 ± 0.03; three digits computed
		{"Aitken mode", 43e-9, 0.0110, At25C(), 0.139, 0.001, 0},
		// the same by the classic approximation; computed
		{"Aitken mode, classic", 43e-9, 0.0110, At25C(), 0.139, 0.001, 0.144},
		// Pöhlker M. et al. 2016, abstract: 0.22 ± 0.05
		{"accumulation mode", 172e-9, 0.0011, At25C(), 0.222, 0.001, 0},
		// Wang Y. et al. 2022, Atmos. Chem. Phys. 22, 15943, abstract: medians, not paired
		{"accumulation mode at 25 °C", 176e-9, 0.001, pureWater(298.15), 0.25, 0.01, 0},
		{"accumulation mode at 20 °C", 176e-9, 0.001, pureWater(293.15), 0.27, 0.01, 0},
		{"small sizes at 25 °C", 54e-9, 0.007, pureWater(298.15), 0.176, 0.01, 0},
		{"small sizes at 20 °C", 54e-9, 0.007, pureWater(293.15), 0.19, 0.01, 0},
	} {
		v, err := FromActivation(c.dry, c.s, c.conv)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		near(t, c.name, v.Kappa, c.want, c.tol)
		if c.classic != 0 {
			near(t, c.name, v.Classic, c.classic, 0.001)
			near(t, c.name+" error", v.ClassicError(), 0.035, 0.002) // computed: +3.5 %
		}
	}
}

// 111 nm (Sapkal et al. 2025, Atmos. Meas. Tech. 18, 5649, abstract: 111 nm and
// 0.13 %) and the sizes of two salts (computed): s_c in percent, and back to the dry
// diameter within the rounding of s_c.
func TestPublishedCrests(t *testing.T) {
	sizes := []float64{20, 30, 40, 50, 60, 80, 100, 120, 150, 200}
	for _, c := range []struct {
		name  string
		kappa float64
		nm    []float64
		want  []float64
		tol   float64
	}{
		{"111 nm", 0.61, []float64{111}, []float64{0.128}, 5e-4},
		{"ammonium sulfate", 0.61, sizes, []float64{1.6819, 0.9140, 0.5932, 0.4243, 0.3227, 0.2096, 0.1499, 0.1140, 0.0816, 0.0530}, 1e-4},
		{"sodium chloride", 1.28, sizes, []float64{1.1626, 0.6314, 0.4097, 0.2930, 0.2228, 0.1447, 0.1035, 0.0787, 0.0563, 0.0366}, 1e-4},
	} {
		for i, nm := range c.nm {
			near(t, c.name, 100*koehler.SolveKappa(nm*1e-9, At25C().Kelvin(), c.kappa).Supersaturation, c.want[i], c.tol)
			d, err := DryDiameter(c.kappa, c.want[i]/100, At25C())
			if err != nil {
				t.Fatal(err)
			}
			// D ∝ s^(-2/3)
			near(t, c.name+" dry diameter, nm", 1e9*d.Diameter, nm, nm*(2./3*c.tol/c.want[i]+1e-4))
		}
	}
}

// 298.15 to 303.15 K with the tension of IAPWS R1-76 and, as in the Kelvin lengths
// above, a density held at 997.05 kg/m³; computed. The density of the temperature
// takes 0.14 % of A back, and with it 0.4 % of κ.
func TestFiveKelvin(t *testing.T) {
	held := func(T float64) float64 { return pureWater(T).Kelvin() * atmos.WaterDensity(T) / 997.05 }
	const dry = 100e-9
	cold, warm := held(298.15), held(303.15)
	s := koehler.SolveKappa(dry, cold, 0.61).Supersaturation
	near(t, "change of A, %", 100*(warm/cold-1), -2.7, 0.1)
	near(t, "change of s_c, %", 100*(koehler.SolveKappa(dry, warm, 0.61).Supersaturation/s-1), -4.1, 0.1)
	kappa, err := koehler.KappaOf(dry, warm, s)
	if err != nil {
		t.Fatal(err)
	}
	// -8.1 is three times the change of A, to first order; the lengths above have (2.041/2.098)³ = 0.9207
	near(t, "change of κ to first order, %", 300*(warm/cold-1), -8.1, 0.1)
	near(t, "change of κ, %", 100*(kappa/0.61-1), -7.93, 0.15)
	r, err := Recompute(0.61, Given{DryDiameter: dry}, pureWater(298.15), pureWater(303.15))
	if err != nil {
		t.Fatal(err)
	}
	near(t, "change of κ with the density of water, %", 100*(r.Kappa/0.61-1), -7.93+3*0.14, 0.15)
}

// Petters & Kreidenweis 2007, eq. 11; computed.
func TestPublishedGrowth(t *testing.T) {
	for _, c := range []struct{ gf, rh, want float64 }{
		{1.70, 0.90, 0.4888}, {1.40, 0.90, 0.2230}, {1.20, 0.90, 0.0952},
		{1.40, 0.89, 0.2452}, {1.40, 0.91, 0.2014},
	} {
		g, err := FromGrowth(100e-9, c.gf, c.rh, At25C())
		if err != nil {
			t.Fatal(err)
		}
		near(t, "κ of a growth factor", g.Kappa, c.want, 1e-4)
	}
}
