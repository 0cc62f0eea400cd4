package spectrum

import (
	"errors"
	"math"
	"testing"
)

const microgram = 1e-9 // kg

// C26 of the field's reference: the scheme of Gysel et al. 2007, from memory; the
// amounts computed for this project. Mass closes to 9.807 against 9.8 µg/m³.
var workedCase = Ions{Organic: 4 * microgram, Sulfate: 3 * microgram, Nitrate: 1 * microgram,
	Ammonium: 1.3 * microgram, BlackCarbon: 0.5 * microgram}

func TestPairingOfTheWorkedCase(t *testing.T) {
	s := Pair(workedCase)
	for _, c := range []struct {
		what      string
		got, want float64 // µmol/m³
	}{
		{"ammonium nitrate", s.AmmoniumNitrate, 0.01613}, {"sulfuric acid", s.SulfuricAcid, 0},
		{"bisulfate", s.AmmoniumBisulfate, 0.00652}, {"sulfate", s.AmmoniumSulfate, 0.02471},
	} {
		if math.Abs(c.got*1e6-c.want) > 1e-5 {
			t.Errorf("%s %.6f µmol/m³, want %.5f", c.what, c.got*1e6, c.want)
		}
	}
	mixed, err := Mix(workedCase, CommonSpecies())
	if err != nil {
		t.Fatal(err)
	}
	if math.Abs(mixed.Kappa-0.352) > 0.001 { // C27, volume mixing of Petters & Kreidenweis 2007, eq. 7
		t.Errorf("kappa %.4f, want 0.352", mixed.Kappa)
	}
	mass, share := 0.0, 0.0
	for _, p := range mixed.Parts {
		mass += p.Mass
		share += p.Share
	}
	if math.Abs(mass/microgram-9.807) > 0.001 {
		t.Errorf("mass of salts and the rest %.4f µg/m³, want 9.807", mass/microgram)
	}
	near(t, "shares", share, 1, 1e-14)
	near(t, "density", mixed.Density*mixed.Volume, mass, 1e-14)
	if len(mixed.Notes) != 0 {
		t.Errorf("notes of a balanced case: %v", mixed.Notes)
	}
}

// Over all proportions: nothing is negative, every ion is conserved, and where the
// published formulas stay positive they give the same.
func TestPairingConserves(t *testing.T) {
	grid := []float64{0, 0.1, 0.5, 0.99, 1, 1.01, 1.5, 2, 3, 7}
	branches := map[string]bool{}
	for _, so4 := range grid {
		for _, no3 := range grid {
			for _, nh4 := range grid {
				for _, cl := range []float64{0, 0.3, 4} {
					s := Pair(Ions{Sulfate: so4 * sulfateMass, Nitrate: no3 * nitrateMass, Ammonium: nh4 * ammoniumMass, Chloride: cl * chlorideMass})
					for _, n := range []float64{s.AmmoniumNitrate, s.SulfuricAcid, s.AmmoniumBisulfate, s.AmmoniumSulfate, s.AmmoniumChloride, s.SpareAmmonium, s.SpareNitrate, s.SpareChloride} {
						if n < 0 {
							t.Errorf("%g %g %g %g: a negative amount in %+v", so4, no3, nh4, cl, s)
						}
					}
					for what, d := range map[string]float64{
						"sulfate":  s.SulfuricAcid + s.AmmoniumBisulfate + s.AmmoniumSulfate - so4,
						"nitrate":  s.AmmoniumNitrate + s.SpareNitrate - no3,
						"ammonium": s.AmmoniumNitrate + s.AmmoniumBisulfate + 2*s.AmmoniumSulfate + s.AmmoniumChloride + s.SpareAmmonium - nh4,
						"chloride": s.AmmoniumChloride + s.SpareChloride - cl,
					} {
						if math.Abs(d) > 1e-14 {
							t.Errorf("%g %g %g %g: %s off by %g", so4, no3, nh4, cl, what, d)
						}
					}
					// Gysel et al. 2007 as written, where no amount is negative
					abs := math.Min(2*so4-nh4+no3, nh4-no3)
					if nh4 >= no3 && abs >= 0 {
						branches["as written"] = true
						if d := math.Abs(s.AmmoniumBisulfate-abs) + math.Abs(s.SulfuricAcid-math.Max(0, so4-nh4+no3)) +
							math.Abs(s.AmmoniumSulfate-math.Max(nh4-no3-so4, 0)); d > 1e-14 {
							t.Errorf("%g %g %g: %+v differs from the published scheme by %g", so4, no3, nh4, s, d)
						}
					} else {
						branches["clamped"] = true
					}
				}
			}
		}
	}
	if len(branches) != 2 {
		t.Errorf("only %v were tried", branches)
	}
}

func TestMix(t *testing.T) {
	// pure species keep their κ
	common := CommonSpecies()
	for name, c := range map[string]struct {
		ions Ions
		want float64
	}{
		"organic": {Ions{Organic: 1}, common.Organic.Kappa},
		"black":   {Ions{BlackCarbon: 1}, 0},
		"acid":    {Ions{Sulfate: 1}, common.SulfuricAcid.Kappa},
		"sulfate": {Ions{Sulfate: sulfateMass, Ammonium: 2 * ammoniumMass}, common.AmmoniumSulfate.Kappa},
	} {
		m, err := Mix(c.ions, common)
		if err != nil {
			t.Fatal(err)
		}
		near(t, name, m.Kappa, c.want, 1e-14)
	}
	m, err := Mix(Ions{Organic: 1, Nitrate: 1}, common)
	if err != nil || len(m.Notes) != 1 || m.Notes[0].Code != "ions-without-partner" {
		t.Errorf("nitrate without ammonium: %v, %v", m.Notes, err)
	}
	for name, ions := range map[string]Ions{"nothing": {}, "negative": {Organic: 1, Sulfate: -1}, "NaN": {Organic: math.NaN()}} {
		if _, err := Mix(ions, common); !errors.Is(err, ErrInput) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// C25: 0.43 organic, 0.57 inorganic by mass give 0.411 (Pöhlker et al. 2023).
func TestMassShares(t *testing.T) {
	if got := KappaOfMassShares(0.43); math.Abs(got-0.411) > 0.001 {
		t.Errorf("kappa %.4f, want 0.411", got)
	}
}
