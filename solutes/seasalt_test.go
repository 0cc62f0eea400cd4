package solutes

import (
	"math"
	"testing"
)

// Sea water of practical salinity 35: 35.165 g of salt per kg of sea water.
func TestSeaWater(t *testing.T) {
	const salt = 35.165e-3
	m := salt / (1 - salt) / 0.0314038
	if math.Abs(m-1.1606) > 1e-4 { // Millero et al. 2008: 1.1606 mol/kg (from memory)
		t.Errorf("molality of sea water %v", m)
	}
	b := SeaSaltBrine(298.15)
	phi, _ := b.Osmotic(m)
	// 0.9045 is an independent computation with the same parameters; minor ions
	// are lumped in another way, which is worth 1.2e-4.
	if math.Abs(phi-0.9045) > 2e-4 {
		t.Errorf("φ = %v, want 0.9045", phi)
	}
	// Gibbs function of sea water, about 0.9015 (from memory, low precision)
	if math.Abs(phi-0.9015) > 0.004 {
		t.Errorf("φ = %v, want 0.9015 ± 0.004", phi)
	}
	// Robinson 1954 (from memory)
	if aw := math.Exp(-waterMolarMass * m * phi); math.Abs(aw-0.98123) > 1e-4 {
		t.Errorf("a_w = %v, Robinson 1954 0.98123", aw)
	}
}

// The reference composition as remembered is neutral and adds up to one mol,
// and its salt weighs 31.4038 g/mol with the lumped ions too (to 0.3 %).
func TestSeaSaltComposition(t *testing.T) {
	charge, sum, mass := 0.0, 0.0, 0.0
	molar := map[string]float64{"Na+": 22.98977, "Mg++": 24.305, "Ca++": 40.078, "K+": 39.0983,
		"Cl-": 35.453, "SO4--": 96.0626, "neutral": 61.83}
	for _, ion := range seaSaltIons() {
		charge += float64(ion.Charge) * ion.Amount
		sum += ion.Amount
		mass += molar[ion.Name] * ion.Amount
	}
	if math.Abs(charge) > 1e-15 || math.Abs(sum-1) > 1e-15 {
		t.Errorf("charge %v, sum %v", charge, sum)
	}
	if math.Abs(mass/31.4038-1) > 0.003 {
		t.Errorf("%v g/mol, want 31.4038", mass)
	}
}

// The range ends at a water activity of 0.75.
func TestSeaSaltEnds(t *testing.T) {
	s, _ := Standard().Find("sea_salt")
	o, err := NewSeaSalt(s, 298.15)
	if err != nil {
		t.Fatal(err)
	}
	if l, _ := o.LnActivity(o.LeastWater()); math.Abs(math.Exp(l)-0.75) > 1e-8 {
		t.Errorf("a_w %v at the least water", math.Exp(l))
	}
	// 25 °C, dry density 2017: κ 1.30 at a_w 0.90 (an independent computation)
	u := o.waterAt(0.9)
	if kappa := u * (1/0.9 - 1); math.Abs(kappa-1.30) > 0.005 {
		t.Errorf("κ at a_w 0.90 is %v, want 1.30", kappa)
	}
}

// waterAt returns u at a water activity, by halving.
func (o *OsmoticSolution) waterAt(aw float64) float64 {
	low, high := math.Log(o.LeastWater()), 20.0
	for range 80 {
		mid := 0.5 * (low + high)
		if l, _ := o.LnActivity(math.Exp(mid)); l < math.Log(aw) {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Exp(low)
}
