package solutes

import (
	"errors"
	"math"
	"testing"
)

var ownKeys = []string{"sulfuric_acid", "ammonium_bisulfate", "letovicite", "sodium_bisulfate",
	"sea_salt", "sucrose", "glucose", "citric_acid"}

func ownModel(t testing.TB, key string, T float64) *OsmoticSolution {
	t.Helper()
	s, known := Standard().Find(key)
	o, says, notes, ok, err := OwnModel(s, T)
	if !known || !ok || err != nil || says == "" || away(T) && len(notes) == 0 {
		t.Fatalf("%s: known %v, has a model %v, %q, notes %v, error %v", key, known, ok, says, notes, err)
	}
	return o
}

// What every model owes: ln a_w below 0 and rising with u over the whole range,
// its joins and the stretch beyond it; a slope that agrees with finite differences;
// the limit of complete dissociation; ln a_w 0 for much water.
func TestOwnModelsShareTheseProperties(t *testing.T) {
	for _, key := range ownKeys {
		for _, T := range []float64{coldest, 233, 273.15, 298.15, hottest} {
			o := ownModel(t, key, T)
			var _ Solution = o
			last := math.Inf(-1)
			for u := 0.2 * o.LeastWater(); u < 1e10; u *= 1.01 {
				l, slope := o.LnActivity(u)
				if !(l < 0) || !(l > last) || !(slope > 0) {
					t.Fatalf("%s at %v K: ln a_w(%v) = %v after %v, slope %v", key, T, u, l, last, slope)
				}
				last = l
				const h = 1e-4
				up, _ := o.LnActivity(u * math.Exp(h))
				down, _ := o.LnActivity(u * math.Exp(-h))
				// second differences of the join's smoothstep jump: an error of h
				if fd := (up - down) / (2 * h); math.Abs(fd/slope-1) > 2e-4 {
					t.Fatalf("%s at %v K: slope(%v) = %v, finite difference %v", key, T, u, slope, fd)
				}
			}
			if phi := o.Osmotic(1e-12); math.Abs(phi-1) > 1e-5 {
				t.Errorf("%s at %v K: φ → %v for much water", key, T, phi)
			}
		}
	}
}

// Where no join is near, the slope agrees much better.
func TestOwnModelSlopes(t *testing.T) {
	for _, key := range ownKeys {
		o := ownModel(t, key, 298.15)
		for _, m := range []float64{1e-8, 0.99e-7, 1.01e-7, 1e-4, 0.0123, 0.1, 0.4} {
			u := o.molality / m
			_, slope := o.LnActivity(u)
			const h = 1e-3
			f := func(k float64) float64 { l, _ := o.LnActivity(u * math.Exp(k*h)); return l }
			fd := (8*(f(1)-f(-1)) - (f(2) - f(-2))) / (12 * h)
			if math.Abs(fd/slope-1) > 1e-6 {
				t.Errorf("%s at %v mol/kg: slope %v, finite difference %v", key, m, slope, fd)
			}
		}
	}
}

// The table against the models it holds, between the nodes: 1e-8 in φ where no
// end of a join is within three steps, 6 %.
func TestOsmoticTableError(t *testing.T) {
	salt, _ := Standard().Find("ammonium_bisulfate")
	b := newBisulfate(1, false, DebyeHueckel(298.15))
	acid := newBisulfate(2, false, DebyeHueckel(298.15))
	cold := newBisulfate(2, false, DebyeHueckel(220))
	sea := SeaSaltBrine(298.15)
	conc := joinedPolynomial{c: salt.Concentrated.Activity, mass: salt.MolarMass.Value}
	cases := []struct {
		name     string
		o        *OsmoticSolution
		phi      func(float64) float64
		from, to float64
	}{
		{"ammonium bisulfate", ownModel(t, "ammonium_bisulfate", 298.15), b.osmotic, 1e-12, 0.94 * 1.5},
		{"its polynomial", ownModel(t, "ammonium_bisulfate", 298.15), conc.polynomial, 1.065 * 2.2, 280},
		{"sulfuric acid", ownModel(t, "sulfuric_acid", 298.15), acid.osmotic, 1e-12, 0.94 * 3.72},
		{"cold acid", ownModel(t, "sulfuric_acid", 220), cold.osmotic, 1e-12, 0.94 * 3.72},
		{"sea salt", ownModel(t, "sea_salt", 298.15), func(m float64) float64 { p, _ := sea.Osmotic(m); return p }, 1e-12, 11.5},
	}
	for _, c := range cases {
		worst, at := 0.0, 0.0
		for m := c.from; m < c.to; m *= 1.0071 {
			if d := math.Abs(c.o.Osmotic(m) - c.phi(m)); d > worst {
				worst, at = d, m
			}
		}
		t.Logf("%s: largest error %.2g at %.3g mol/kg", c.name, worst, at)
		if worst > 1e-8 {
			t.Errorf("%s: table off by %v in φ at %v mol/kg", c.name, worst, at)
		}
	}
}

// Kappa at activation against an independent computation with the same
// parameters (two digits after the point are its precision), 25 °C, 72.0 mN/m.
func TestOwnModelKappa(t *testing.T) {
	for _, c := range []struct {
		key        string
		dry        float64 // m
		kappa, tol float64
		remark     string
	}{
		{"sulfuric_acid", 50e-9, 0.704, 0.001, "far below the 0.90 of Petters & Kreidenweis 2007"},
		{"sulfuric_acid", 100e-9, 0.760, 0.001, ""},
		{"ammonium_bisulfate", 50e-9, 0.614, 0.001, ""},
		{"ammonium_bisulfate", 100e-9, 0.667, 0.001, ""},
		{"letovicite", 50e-9, 0.617, 0.001, ""},
		{"letovicite", 100e-9, 0.667, 0.001, ""},
		{"sea_salt", 50e-9, 1.074, 0.001, ""},
		{"sea_salt", 100e-9, 1.099, 0.001, ""},
		{"sucrose", 100e-9, 0.0834, 0.001, "the ideal κ (ρ_s/M)(M_w/ρ_w); φ adds 0.6 % here"},
		{"glucose", 100e-9, 0.157, 0.001, "ideal"},
	} {
		o := ownModel(t, c.key, 298.15)
		if got := activationKappa(o, c.dry); math.Abs(got-c.kappa) > c.tol {
			t.Errorf("%s, %v nm: κ %v, want %v (%s)", c.key, c.dry*1e9, got, c.kappa, c.remark)
		}
	}
}

// activationKappa is the constant κ that has the same critical saturation,
// searched on a fine grid.
func activationKappa(o Solution, dry float64) float64 {
	const a = 2.099e-9 // Kelvin length at 25 °C, 72.0 mN/m
	crest := func(f func(u float64) float64) float64 {
		best := math.Inf(-1)
		for x := 0.0; x < 12; x += 0.001 {
			u := math.Exp(x)
			best = math.Max(best, a/dry/math.Cbrt(1+u)+f(u))
		}
		return best
	}
	want := crest(func(u float64) float64 { l, _ := o.LnActivity(u); return l })
	low, high := 0.01, 3.0
	for range 40 {
		mid := 0.5 * (low + high)
		if crest(func(u float64) float64 { return -math.Log1p(mid / u) }) > want {
			low = mid
		} else {
			high = mid
		}
	}
	return low
}

func TestOwnModelRefuses(t *testing.T) {
	good, _ := Standard().Find("sulfuric_acid")
	var unusable *UnusableError
	for name, change := range map[string]func(*Substance) float64{
		"no density":  func(s *Substance) float64 { s.Density = Datum{}; return 298.15 },
		"no mass":     func(s *Substance) float64 { s.MolarMass = Datum{}; return 298.15 },
		"density NaN": func(s *Substance) float64 { s.Density.Value = math.NaN(); return 298.15 },
		"mass 0":      func(s *Substance) float64 { s.MolarMass.Value = 0; return 298.15 },
		"too cold":    func(*Substance) float64 { return 100 },
		"NaN K":       func(*Substance) float64 { return math.NaN() },
	} {
		for _, key := range ownKeys {
			s := good
			s.Key = key
			T := change(&s)
			if _, _, _, ok, err := OwnModel(s, T); !ok || !errors.As(err, &unusable) {
				t.Errorf("%s, %s: error %v, want an *UnusableError", key, name, err)
			}
		}
	}
	salt, _ := Standard().Find("sodium_chloride")
	if _, _, _, ok, err := OwnModel(salt, 298.15); ok || err != nil {
		t.Errorf("sodium chloride: %v %v, has no such model", ok, err)
	}
	var none *NoModelError
	for name, make := range map[string]func(Substance, float64) (*OsmoticSolution, error){
		"acid": NewSulfuricAcid, "bisulfate": NewBisulfate, "sea salt": NewSeaSalt, "sugar": NewNonelectrolyte,
	} {
		if _, err := make(salt, 298.15); !errors.As(err, &none) || none.Substance != salt.Name {
			t.Errorf("%s of sodium chloride: error %v, want a *NoModelError", name, err)
		}
	}
}

// The mixture without a table is the same solution.
func TestBrineSolution(t *testing.T) {
	table := ownModel(t, "sea_salt", 298.15)
	o, err := SeaSaltBrine(298.15).Solution(table.molality, table.highest)
	if err != nil {
		t.Fatal(err)
	}
	var _ Solution = o
	for u := 0.3 * table.LeastWater(); u < 1e9; u *= 1.1 {
		l1, s1 := table.LnActivity(u)
		l2, s2 := o.LnActivity(u)
		tol := 1e-8
		if u < table.LeastWater() {
			tol = 1e-6 // the continuation hangs on the last slope
		}
		if math.Abs(l1/l2-1) > tol || math.Abs(s1/s2-1) > 1e-6 {
			t.Errorf("u = %v: table %v %v, direct %v %v", u, l1, s1, l2, s2)
		}
	}
	var unusable *UnusableError
	for _, x := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		if _, err := SeaSaltBrine(298.15).Solution(1, x); !errors.As(err, &unusable) {
			t.Errorf("largest %v: error %v", x, err)
		}
	}
}

// A polynomial that a user broke is refused, not computed.
func TestBisulfateRefusesPolynomials(t *testing.T) {
	good, _ := Standard().Find("ammonium_bisulfate")
	for name, change := range map[string]func(*Concentrated){
		"no range":      func(c *Concentrated) { c.MaxMassPercent = 0 },
		"all acid":      func(c *Concentrated) { c.MaxMassPercent = 100 },
		"short range":   func(c *Concentrated) { c.MaxMassPercent = 15 },
		"below 0":       func(c *Concentrated) { c.Activity = []float64{-0.02} },
		"NaN":           func(c *Concentrated) { c.Activity = []float64{math.NaN()} },
		"NaN range":     func(c *Concentrated) { c.MaxMassPercent = math.NaN() },
		"activity of 1": func(c *Concentrated) { c.Activity = nil },
	} {
		c := *good.Concentrated
		change(&c)
		s := good
		s.Concentrated = &c
		var unusable *UnusableError
		if _, err := NewBisulfate(s, 298.15); !errors.As(err, &unusable) {
			t.Errorf("%s: error %v, want an *UnusableError", name, err)
		}
	}
}

// A share of the dry volume dilutes.
func TestOfShare(t *testing.T) {
	o := ownModel(t, "sea_salt", 298.15)
	half := o.OfShare(0.5)
	l1, s1 := o.LnActivity(8)
	l2, s2 := half.LnActivity(4)
	if l1 != l2 || s1 != s2 || half.LeastWater() != 0.5*o.LeastWater() || half.Molality(1) != 0.5*o.Molality(1) {
		t.Errorf("half: %v %v, whole: %v %v", l2, s2, l1, s1)
	}
	defer func() {
		if recover() == nil {
			t.Error("no panic for a share of 0")
		}
	}()
	o.OfShare(0)
}

func TestOwnModelsDoNotAllocate(t *testing.T) {
	for _, key := range ownKeys {
		o := ownModel(t, key, 298.15)
		var s Solution = o
		if n := testing.AllocsPerRun(100, func() { s.LnActivity(20) }); n != 0 {
			t.Errorf("%s: %v allocations", key, n)
		}
	}
	b, acid := SeaSaltBrine(298.15), newBisulfate(1, false, 0.3915)
	if n := testing.AllocsPerRun(100, func() { b.Osmotic(1); acid.osmotic(1) }); n != 0 {
		t.Errorf("models behind the tables: %v allocations", n)
	}
}

func BenchmarkOwnModels(b *testing.B) {
	for _, key := range ownKeys {
		o := ownModel(b, key, 298.15)
		b.Run(key, func(b *testing.B) {
			b.ReportAllocs()
			u := 10.0
			for b.Loop() {
				_, s := o.LnActivity(u)
				u = 10 + s
			}
		})
	}
}

func BenchmarkNewOwnModels(b *testing.B) {
	for _, key := range ownKeys {
		s, _ := Standard().Find(key)
		b.Run(key, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, _, _, _, err := OwnModel(s, 298.15); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkBrine(b *testing.B) {
	sea, acid := SeaSaltBrine(298.15), newBisulfate(1, false, 0.3915)
	b.Run("sea salt", func(b *testing.B) {
		b.ReportAllocs()
		m := 1.0
		for b.Loop() {
			p, _ := sea.Osmotic(m)
			m = p
		}
	})
	b.Run("bisulfate from nothing", func(b *testing.B) {
		b.ReportAllocs()
		m := 1.0
		for b.Loop() {
			m = 1 + 0.01*acid.associated(m, 0)
		}
	})
}
