package solutes

import (
	"errors"
	"math"
	"strings"
	"testing"
)

func mustBrine(t testing.TB, ions []BrineIon, pairs []BrinePair, thetas []BrineTheta) *Brine {
	t.Helper()
	b, err := NewBrine(ions, pairs, thetas, 0.3915)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

func sodiumChlorideBrine(t testing.TB) *Brine {
	return mustBrine(t, []BrineIon{{"Na+", 1, 1}, {"Cl-", -1, 1}},
		[]BrinePair{{"Na+", "Cl-", 0.0765, 0.2664, 0, 0.00127}}, nil)
}

// allBrines are solutions with every kind of term.
func allBrines(t testing.TB) map[string]*Brine {
	acid := newBisulfate(1, false, 0.3915).ions
	acid.amount = [MaxBrineIons]float64{0.6, 0.4, 0.6, 1} // partly associated
	acid.total = 2.6
	return map[string]*Brine{
		"sodium chloride": sodiumChlorideBrine(t),
		"magnesium sulfate": mustBrine(t, []BrineIon{{"Mg++", 2, 1}, {"SO4--", -2, 1}},
			[]BrinePair{{"Mg++", "SO4--", 0.2210, 3.343, -37.23, 0.0250}}, nil),
		"sodium sulfate": mustBrine(t, []BrineIon{{"SO4--", -2, 1}, {"Na+", 1, 2}},
			[]BrinePair{{"Na+", "SO4--", 0.01958, 1.113, 0, 0.00497}}, nil),
		"sea salt":         SeaSaltBrine(298.15),
		"mixed bisulfates": acid,
	}
}

// One salt in the mixture form is the single-salt form.
func TestBrineOfOneSalt(t *testing.T) {
	cases := []struct {
		name    string
		key     string
		b       *Brine
		formula float64
	}{
		{"1-1", "sodium_chloride", allBrines(t)["sodium chloride"], 1},
		{"2-1", "sodium_sulfate", allBrines(t)["sodium sulfate"], 1},
	}
	for _, c := range cases {
		s, ok := Standard().Find(c.key)
		if !ok || s.Ion == nil {
			t.Fatalf("%s: no parameters in the catalogue", c.name)
		}
		for _, m := range []float64{1e-6, 0.01, 0.1, 1, 2} {
			p := s.Ion.pitzer(0.3915, 298.15)
			want, _ := p.osmotic(m)
			if got, _ := c.b.Osmotic(m); math.Abs(got-want) > 1e-13 {
				t.Errorf("%s: φ(%v) = %v, single salt %v", c.name, m, got, want)
			}
		}
	}
}

// Dilute, φ - 1 is -A_φ Σ m z² √I / Σ m.
func TestBrineLimitingLaw(t *testing.T) {
	for name, b := range allBrines(t) {
		const m = 1e-9
		mol := b.at(m)
		s := b.strength(&mol)
		want := -2 * 0.3915 * s.ionic * s.root / s.total
		phi, slope := b.Osmotic(m)
		if got := phi - 1; math.Abs(got/want-1) > 2e-3 || math.Abs(slope/want-0.5) > 2e-3 {
			t.Errorf("%s: φ-1 = %v, slope %v, limiting law %v and half of it", name, got, slope, want)
		}
		var g [MaxBrineIons]float64
		b.LnGamma(g[:b.n], m)
		for i := range b.n {
			z := b.charge[i]
			if lim := -3 * 0.3915 * z * z * s.root; math.Abs(g[i]-lim) > 2e-3*math.Abs(lim)+1e-12 {
				t.Errorf("%s: ln γ of ion %d = %v, limiting law %v", name, i, g[i], lim)
			}
		}
	}
}

// Gibbs-Duhem: Σ m_i d ln γ_i = d(Σ m (φ-1)) along any path; here along the
// dilution, and at fixed water along each ion alone (the potentials of the
// species must come from one energy: ∂ ln γ_i/∂ m_j = ∂ ln γ_j/∂ m_i).
func TestBrineGibbsDuhem(t *testing.T) {
	for name, b := range allBrines(t) {
		for _, m := range []float64{1e-4, 0.01, 0.3, 2, 5} {
			const h = 1e-4
			up, down := b.at(m*math.Exp(h)), b.at(m*math.Exp(-h))
			gu, gd := b.lnGamma(&up), b.lnGamma(&down)
			sum := 0.0
			for i := range b.n {
				sum += b.amount[i] * (gu[i] - gd[i]) / (2 * h)
			}
			sum /= b.total
			phi, slope := b.Osmotic(m)
			if want := phi - 1 + slope; math.Abs(sum-want) > 1e-7*(1+math.Abs(want)) {
				t.Errorf("%s at %v: Σ m d ln γ = %v, from φ %v", name, m, sum, want)
			}
			symmetric(t, name, b, m)
		}
	}
}

func symmetric(t *testing.T, name string, b *Brine, m float64) {
	t.Helper()
	change := func(j int) molalities { // ∂ ln γ/∂ m_j
		h := 1e-4 * m
		up, down := b.at(m), b.at(m)
		up[j] += h
		down[j] = math.Max(0, down[j]-h)
		gu, gd := b.lnGamma(&up), b.lnGamma(&down)
		for i := range gu {
			gu[i] = (gu[i] - gd[i]) / (up[j] - down[j])
		}
		return gu
	}
	for i := range b.n {
		for j := range i {
			if b.amount[i] < 0.1 || b.amount[j] < 0.1 {
				continue // the difference would be rounding
			}
			ij, ji := change(j)[i], change(i)[j]
			if math.Abs(ij-ji) > 1e-5*(math.Abs(ij)+math.Abs(ji))+1e-6 {
				t.Errorf("%s at %v: ∂ ln γ_%d/∂ m_%d = %v, the other way %v", name, m, i, j, ij, ji)
			}
		}
	}
}

func TestBrineSlope(t *testing.T) {
	for name, b := range allBrines(t) {
		for _, m := range []float64{1e-6, 1e-3, 0.1, 1, 6} {
			const h = 1e-4
			up, _ := b.Osmotic(m * math.Exp(h))
			down, _ := b.Osmotic(m * math.Exp(-h))
			if _, slope := b.Osmotic(m); math.Abs((up-down)/(2*h)-slope) > 1e-8*(1+math.Abs(slope)) {
				t.Errorf("%s: slope(%v) = %v, finite difference %v", name, m, slope, (up-down)/(2*h))
			}
		}
	}
}

func TestPitzerJ(t *testing.T) {
	for _, x := range []float64{1e-5, 1e-3, 0.1, 1, 10, 200} {
		const h = 1e-4
		j, slope, curve := pitzerJ(x)
		if want := x / (4 + 4.581*math.Pow(x, -0.7237)*math.Exp(-0.0120*math.Pow(x, 0.528))); math.Abs(j/want-1) > 1e-13 {
			t.Errorf("J(%v) = %v, want %v", x, j, want)
		}
		up, su, _ := pitzerJ(x * math.Exp(h))
		down, sd, _ := pitzerJ(x * math.Exp(-h))
		if fd := (up - down) / (2 * h); math.Abs(fd/slope-1) > 1e-7 {
			t.Errorf("x J'(%v) = %v, finite difference %v", x, slope, fd)
		}
		if fd := (su - sd) / (2 * h); math.Abs(fd/curve-1) > 1e-7 {
			t.Errorf("d(x J')/d ln x at %v = %v, finite difference %v", x, curve, fd)
		}
	}
}

// The integral that J approximates (Pitzer 1975, from memory):
//
//	J(x) = x/4 - 1 + (1/x) ∫_0^∞ [1 - exp(-(x/y) e^-y)] y² dy
//
// The published form is good to about 1 % from x = 0.1.
func TestPitzerJAgainstItsIntegral(t *testing.T) {
	for _, x := range []float64{0.3, 1, 3, 10, 40} {
		sum := 0.0
		const n, end = 40000, 40.0
		for i := range n {
			y := (float64(i) + 0.5) * end / n
			sum += -math.Expm1(-x/y*math.Exp(-y)) * y * y * end / n
		}
		want := x/4 - 1 + sum/x
		if got, _, _ := pitzerJ(x); math.Abs(got/want-1) > 0.015 {
			t.Errorf("J(%v) = %v, the integral is %v", x, got, want)
		}
	}
}

// Both branches of g meet, and so do their errors.
func TestBrineG(t *testing.T) {
	g1, h1 := brineG(math.Nextafter(0.02, 0))
	g2, h2 := brineG(0.02)
	if math.Abs(g1-g2) > 1e-11 || math.Abs(h1-h2) > 1e-11 {
		t.Errorf("series %v %v, closed form %v %v", g1, h1, g2, h2)
	}
	if g, h := brineG(0); g != 1 || h != 0 {
		t.Errorf("g(0) = %v, %v, want 1, 0", g, h)
	}
}

func TestNewBrineRefuses(t *testing.T) {
	salt := []BrineIon{{"Na+", 1, 1}, {"Cl-", -1, 1}}
	pair := []BrinePair{{Cation: "Na+", Anion: "Cl-"}}
	cases := []struct {
		name   string
		ions   []BrineIon
		pairs  []BrinePair
		thetas []BrineTheta
		debye  float64
		says   string
	}{
		{"no ions", nil, nil, nil, 0.39, "number of ions"},
		{"too many", make([]BrineIon, 9), nil, nil, 0.39, "number of ions"},
		{"charge 3", []BrineIon{{"Al", 3, 1}, {"PO4", -3, 1}}, nil, nil, 0.39, "charge of Al"},
		{"amount NaN", []BrineIon{{"Na+", 1, math.NaN()}}, nil, nil, 0.39, "amount of Na+"},
		{"amount below 0", []BrineIon{{"Na+", 1, -1}, {"Cl-", -1, -1}}, nil, nil, 0.39, "amount of Na+"},
		{"nothing", []BrineIon{{"Na+", 1, 0}}, nil, nil, 0.39, "amount of all"},
		{"not neutral", []BrineIon{{"Na+", 1, 1}, {"Cl-", -1, 0.99}}, nil, nil, 0.39, "charge of all"},
		{"no slope", salt, pair, nil, 0, "Debye"},
		{"unknown ion", salt, []BrinePair{{Cation: "K+", Anion: "Cl-"}}, nil, 0.39, "K+"},
		{"pair of like signs", []BrineIon{{"Na+", 1, 1}, {"K+", 1, 1}, {"Cl-", -1, 2}}, []BrinePair{{Cation: "Na+", Anion: "K+"}}, nil, 0.39, "unlike"},
		{"theta of unlike signs", salt, nil, []BrineTheta{{"Na+", "Cl-", 0.1}}, 0.39, "unlike"},
	}
	for _, c := range cases {
		_, err := NewBrine(c.ions, c.pairs, c.thetas, c.debye)
		if err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: error %v, should say %q", c.name, err, c.says)
		}
	}
	var unusable *UnusableError
	if _, err := NewBrine(salt, nil, nil, -1); !errors.As(err, &unusable) || unusable.Value != -1 {
		t.Errorf("error %v, want an *UnusableError with the value", err)
	}
}

func TestLnGammaPanics(t *testing.T) {
	defer func() {
		if recover() == nil {
			t.Error("no panic for a short dst")
		}
	}()
	sodiumChlorideBrine(t).LnGamma(make([]float64, 1), 1)
}
