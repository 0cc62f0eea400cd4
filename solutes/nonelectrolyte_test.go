package solutes

import (
	"math"
	"testing"
)

// Sucrose at 25 °C (Robinson & Stokes 1959, App. 8.6; from memory). The quartic
// of 1961 is a later fit: up to 0.0053 apart.
func TestSucroseOsmotic(t *testing.T) {
	s, _ := Standard().Find("sucrose")
	o, err := NewNonelectrolyte(s, 298.15)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ m, phi float64 }{
		{0.1, 1.008}, {0.2, 1.017}, {0.5, 1.041}, {1, 1.088}, {1.6, 1.150}, {2, 1.189}, {2.5, 1.240},
		{3, 1.288}, {4, 1.375}, {5, 1.450},
	} {
		if got := o.Osmotic(c.m); math.Abs(got-c.phi) > 0.0055 {
			t.Errorf("φ(%v) = %v, want %v", c.m, got, c.phi)
		}
	}
	// In the blend Norrish, 0.008 high at 6 mol/kg, comes in.
	if got := o.Osmotic(6); math.Abs(got-1.511) > 0.0085 {
		t.Errorf("φ(6) = %v, want 1.511", got)
	}
}

// Saturated solutions at 25 °C: water activity from humidity fixed points and
// solubilities of the catalogue (both from memory).
func TestNorrishAtSaturation(t *testing.T) {
	for _, c := range []struct {
		key     string
		aw, tol float64
	}{
		{"sucrose", 0.850, 0.002}, {"glucose", 0.905, 0.005}, {"citric_acid", 0.785, 0.006},
	} {
		s, _ := Standard().Find(c.key)
		o, err := NewNonelectrolyte(s, 298.15)
		if err != nil {
			t.Fatal(err)
		}
		m := s.Solubility.Value / s.MolarMass.Value
		l, _ := o.model.lnActivity(m)
		if got := math.Exp(l); math.Abs(got-c.aw) > c.tol {
			t.Errorf("%s: a_w %v at saturation (%v mol/kg), want %v", c.key, got, m, c.aw)
		}
	}
}

// The ideal part is a_w = x_w; the windows are where they are said to be.
func TestNonelectrolyteWindow(t *testing.T) {
	for _, key := range []string{"glucose", "citric_acid"} {
		n, least, ok := nonelectrolyteOf(key)
		if !ok || least != 0.3 {
			t.Fatalf("%s: %v %v", key, least, ok)
		}
		l, _ := n.lnActivity(n.low)
		if math.Abs(math.Exp(l)-0.97) > 1e-12 {
			t.Errorf("%s: a_w %v at the start of the window", key, math.Exp(l))
		}
		if l, _ := n.dilute(n.high); math.Abs(math.Exp(l)-0.95) > 1e-12 {
			t.Errorf("%s: ideal a_w %v at its end", key, math.Exp(l))
		}
		x := 1 / (1 + waterMolarMass*20.) // mole fraction of water at 20 mol/kg
		want := x * math.Exp(-n.norrish*(1-x)*(1-x))
		if l, _ := n.lnActivity(20); math.Abs(math.Exp(l)-want) > 1e-14 {
			t.Errorf("%s: a_w %v at 20 mol/kg, Norrish %v", key, math.Exp(l), want)
		}
	}
}
