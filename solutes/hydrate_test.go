package solutes

import (
	"math"
	"testing"
)

// hydratePairs are the hydrates of the catalogue and their anhydrous salts.
var hydratePairs = map[string]string{"MgCl2.6H2O": "MgCl2", "CaCl2.2H2O": "CaCl2", "Ca(NO3)2.4H2O": "Ca(NO3)2", "C2H2O4.2H2O": "C2H2O4"}

// The molar mass of a hydrate is that of the salt and its crystal water.
func TestMolarMassOfHydrates(t *testing.T) {
	found := 0
	for _, s := range Standard().All() {
		if !s.Hydration.Known() {
			continue
		}
		found++
		dry := find(t, hydratePairs[s.Formula])
		near(t, s.Name, s.MolarMass.Value, dry.MolarMass.Value+s.Hydration.Value*waterMolarMass, 1e-4)
		if s.Ion != nil && (s.Ion.Beta0 != dry.Ion.Beta0 || s.Ion.Beta1 != dry.Ion.Beta1 || s.Ion.CPhi != dry.Ion.CPhi) {
			t.Errorf("%s has other ion parameters than %s", s.Name, dry.Name)
		}
	}
	if found != len(hydratePairs) {
		t.Errorf("%d hydrates, want %d", found, len(hydratePairs))
	}
}

// The ideal κ of the volume of the tetra-, di- and hexahydrate: 0.42, 0.68, 0.42 (of
// the anhydrous values in the reference table, by molar mass and density).
func TestIdealKappaOfHydrates(t *testing.T) {
	for name, want := range map[string]float64{"Ca(NO3)2.4H2O": 0.42, "CaCl2.2H2O": 0.68, "MgCl2.6H2O": 0.42} {
		near(t, name, find(t, name).IdealKappa(roomWater), want, 0.01)
	}
}

// A hydrate with so much water is the anhydrous salt with that and the crystal
// water: the same molality, the same activity.
func TestHydrateIsTheSaltWithItsWater(t *testing.T) {
	for hydrate, dry := range hydratePairs {
		if find(t, dry).Ion == nil {
			continue
		}
		wet, salt := saltOf(t, hydrate, room), saltOf(t, dry, room)
		h := find(t, hydrate)
		for _, m := range []float64{0.01, 0.5, 1.9} { // mol of salt per kg of all water
			all := 1/m - h.Hydration.Value*waterMolarMass // kg of added water per mol
			u := all * h.Density.Value / h.MolarMass.Value / roomWater
			got, _ := wet.LnActivity(u)
			want, _ := salt.LnActivity(salt.Water(m))
			near(t, hydrate, got, want, 1e-12)
			near(t, hydrate+" u", wet.Water(m), u, 1e-12)
			near(t, hydrate+" m", wet.Molality(u), m, 1e-12)
		}
	}
}

func TestDissolvedHydrate(t *testing.T) {
	d, _, err := Dissolve(recipe(t, IonInteraction, "MgCl2.6H2O", .5, "soot", .5))
	if err != nil {
		t.Fatal(err)
	}
	salt := d.Solution.(*Salt)
	near(t, "crystal water", d.CrystalWater, 0.5*6*waterMolarMass*1569/(0.203303*d.WaterDensity), 1e-12)
	near(t, "molality", d.Molality(2), salt.Molality(2), 1e-12)
}

// The surface tension of a hydrate's solution is that of the salt at the same
// molality: the crystal water is water of the solution.
func TestTensionOfHydrates(t *testing.T) {
	for _, c := range []struct{ hydrate, dry string }{{"MgCl2.6H2O", "MgCl2"}, {"CaCl2.2H2O", "CaCl2"}} {
		made := func(name string) Dissolved {
			r := recipe(t, IonInteraction, name, 1.)
			r.TensionRule = SolutionRule
			d, _, err := Dissolve(r)
			if err != nil {
				t.Fatal(err)
			}
			return d
		}
		wet, salt := made(c.hydrate), made(c.dry)
		for _, u := range []float64{0.1, 1, 2, 10, 1e4} {
			got, slope := wet.Tension.SurfaceTension(u)
			want, _ := salt.Tension.SurfaceTension(salt.Solution.(*Salt).Water(wet.Molality(u)))
			near(t, c.hydrate+" σ", got, want, 1e-13)
			const h = 1e-5
			up, _ := wet.Tension.SurfaceTension(u * math.Exp(h))
			down, _ := wet.Tension.SurfaceTension(u * math.Exp(-h))
			near(t, c.hydrate+" slope", slope, (up-down)/(2*h), 1e-6)
		}
	}
}

// With anhydrous parts, a mixture holds a hydrate's water down to where that is
// used up.
func TestMixtureWithAHydrate(t *testing.T) {
	d, _, err := Dissolve(recipe(t, IonInteraction, "CaCl2.2H2O", .5, "NaCl", .5))
	if err != nil {
		t.Fatal(err)
	}
	last := math.Inf(-1)
	for u := 0.05; u < 1e5; u *= 1.2 {
		l, slope := d.Solution.LnActivity(u)
		const h = 1e-4
		up, _ := d.Solution.LnActivity(u * math.Exp(h))
		down, _ := d.Solution.LnActivity(u * math.Exp(-h))
		if !(l > last && slope > 0) || math.Abs(slope/((up-down)/(2*h))-1) > 1e-4 {
			t.Errorf("u %g: ln a_w %g after %g, slope %g, finite difference %g", u, l, last, slope, (up-down)/(2*h))
		}
		last = l
	}
}
