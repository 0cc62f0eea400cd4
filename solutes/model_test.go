package solutes

import (
	"fmt"
	"math"
	"testing"
)

type named struct {
	name string
	Solution
}

// models are all solutions that share the property checks.
func models(t testing.TB) []named {
	list := []named{{"κ 0.61", Kappa(0.61)}, {"κ 1e-6", Kappa(1e-6)}, {"ideal osmotic", IdealOsmotic(1.3)}}
	for _, name := range salts() {
		list = append(list, named{name, saltOf(t, name, room)}, named{name + " cold", saltOf(t, name, 263.15)})
	}
	for _, m := range [][]MixturePart{
		{{0.5, Kappa(0.1)}, {0.5, saltOf(t, "NaCl", room)}},
		{{0.3, saltOf(t, "NaCl", room)}, {0.3, saltOf(t, "(NH4)2SO4", room)}, {0.2, Kappa(0.1)}},
		{{0.01, saltOf(t, "NH4NO3", room)}, {0.99, saltOf(t, "CaCl2", room)}},
		{{0.5, saltOf(t, "Ca(NO3)2", room)}, {0.001, Kappa(1e-4)}},
	} {
		x, err := NewMixture(m)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, named{fmt.Sprint("mixture ", len(list)), x})
	}
	return list
}

func TestSolutionsShareTheseProperties(t *testing.T) {
	for _, s := range models(t) {
		t.Run(s.name, func(t *testing.T) {
			last := math.Inf(-1)
			for i := range 721 {
				u := math.Pow(10, -3+float64(i)/60)
				l, slope := s.LnActivity(u)
				if !(l < 0) || math.IsInf(l, 0) || !(slope > 0) || math.IsInf(slope, 0) || l <= last {
					t.Fatalf("u %g: ln a_w %g after %g, slope %g; want finite, negative, increasing", u, l, last, slope)
				}
				last = l
				const h = 1e-5
				up, _ := s.LnActivity(u * math.Exp(h))
				down, _ := s.LnActivity(u * math.Exp(-h))
				if got := (up - down) / (2 * h); math.Abs(got-slope) > 2e-6*math.Max(slope, math.Abs(l)) {
					t.Fatalf("u %g: slope %.12g, finite difference %.12g", u, slope, got)
				}
			}
			if last < -1e-6 {
				t.Errorf("ln a_w at u = 1e9 is %g, want 0", last)
			}
		})
	}
}

// Slopes are continuous where models join and where ranges end.
func TestNoKink(t *testing.T) {
	for _, name := range salts() {
		salt := saltOf(t, name, room)
		for _, m := range []float64{salt.low, salt.high, salt.end} {
			if math.IsInf(m, 1) {
				continue
			}
			const h = 1e-9
			_, below := salt.LnActivity(salt.Water(m * (1 - h)))
			_, above := salt.LnActivity(salt.Water(m * (1 + h)))
			near(t, fmt.Sprintf("%s slope at %g mol/kg", name, m), above, below, 1e-6)
		}
	}
}

func TestLeastWater(t *testing.T) {
	salt := saltOf(t, "NaCl", room)
	x, err := NewMixture([]MixturePart{{0.5, salt}, {0.5, Kappa(0.1)}})
	if err != nil {
		t.Fatal(err)
	}
	want, _ := salt.LnActivity(salt.LeastWater())
	got, _ := x.LnActivity(x.LeastWater())
	near(t, "activity at the mixture's end", got, want, 1e-10)
}

// With constant κ in every part the rule is κ mixing.
func TestMixtureOfKappas(t *testing.T) {
	x, err := NewMixture([]MixturePart{{0.2, Kappa(1.2)}, {0.5, Kappa(0.1)}, {0.1, Kappa(0.01)}})
	if err != nil {
		t.Fatal(err)
	}
	k := Kappa(0.2*1.2 + 0.5*0.1 + 0.1*0.01)
	for i := range 121 {
		u := math.Pow(10, -4+float64(i)/10)
		got, gotSlope := x.LnActivity(u)
		want, wantSlope := k.LnActivity(u)
		near(t, fmt.Sprint("ln a_w at u ", u), got, want, 1e-13)
		near(t, fmt.Sprint("slope at u ", u), gotSlope, wantSlope, 1e-9)
	}
}

// A salt split in two is the same salt.
func TestMixtureOfOneSalt(t *testing.T) {
	salt := saltOf(t, "(NH4)2SO4", room)
	x, err := NewMixture([]MixturePart{{0.25, salt}, {0.75, salt}})
	if err != nil {
		t.Fatal(err)
	}
	for _, u := range []float64{0.01, 0.3, 1, 4, 10, 1e3, 1e6} {
		got, _ := x.LnActivity(u)
		want, _ := salt.LnActivity(u)
		near(t, fmt.Sprint("ln a_w at u ", u), got, want, 1e-13)
	}
}

// Joint steps and bisection are two ways to one answer.
func TestBisectionAgrees(t *testing.T) {
	x, err := NewMixture([]MixturePart{{0.4, saltOf(t, "NaCl", room)}, {0.4, saltOf(t, "NH4NO3", room)}, {0.1, Kappa(0.2)}})
	if err != nil {
		t.Fatal(err)
	}
	for _, u := range []float64{0.05, 1, 20, 1e4} {
		a, da := x.LnActivity(u)
		b, db := x.bisect(u)
		near(t, fmt.Sprint("ln a_w at u ", u), a, b, 1e-12)
		near(t, fmt.Sprint("slope at u ", u), da, db, 1e-8)
	}
}

func TestModelsDoNotAllocate(t *testing.T) {
	for _, s := range models(t) {
		if n := testing.AllocsPerRun(10, func() { s.LnActivity(3) }); n != 0 {
			t.Errorf("%s: %g allocations", s.name, n)
		}
	}
}

func BenchmarkMixture(b *testing.B) {
	x, err := NewMixture([]MixturePart{{0.4, saltOf(b, "NaCl", room)}, {0.4, saltOf(b, "NH4NO3", room)}, {0.1, Kappa(0.2)}})
	if err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		x.LnActivity(100)
	}
}
