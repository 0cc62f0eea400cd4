package spectrum

import (
	"errors"
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/solutes"
	"gonum.org/v1/gonum/integrate/quad"
)

// kelvin is the A of the checks C01 of the field's reference: 2.099 nm.
const kelvin = 2.099e-9

var supersaturations = []float64{0.0007, 0.001, 0.002, 0.004, 0.008, 0.015}

func invented() aerosol.Modes {
	return aerosol.Modes{{Concentration: 900e6, Median: 38e-9, GSD: 1.6}, {Concentration: 500e6, Median: 130e-9, GSD: 1.5}}
}

func inventedBins(t testing.TB, n int) *aerosol.Bins {
	t.Helper()
	edges := make([]float64, n+1)
	for i := range edges {
		edges[i] = 10e-9 * math.Pow(80, float64(i)/float64(n))
	}
	g, err := aerosol.NewGrid(edges)
	if err != nil {
		t.Fatal(err)
	}
	return invented().Bins(g)
}

// slow counts by looking at every dry size: the sum over small steps of dN of all
// whose own crest lies at or below s, its share given by active.
func slow(sizes Sizes, active func(d float64) float64) float64 {
	const n = 80000
	lo, hi := math.Log(1e-9), math.Log(2e-5)
	h := (hi - lo) / n
	sum := 0.0
	for i := range n {
		d := math.Exp(lo + (float64(i)+0.5)*h)
		if a := active(d); a > 0 {
			sum += sizes.Density(d) * a
		}
	}
	return sum * h
}

func isActive(d, kappa, s float64) float64 {
	if koehler.SolveKappa(d, kelvin, kappa).Supersaturation <= s {
		return 1
	}
	return 0
}

// shareOfSpread is the share of particles of size d that activate when ln κ is
// normal.
func shareOfSpread(k Spread, d, s float64) float64 {
	kappa, err := koehler.KappaOf(d, k.KelvinLength, s)
	if err != nil {
		return 1
	}
	return math.Erfc(math.Log(kappa/k.Median)/(math.Sqrt2*math.Log(k.GSD))) / 2
}

// An independent slow quadrature agrees: forward through each particle's crest.
func TestAgainstSlowQuadrature(t *testing.T) {
	table, err := NewKappaTable([]float64{30e-9, 60e-9, 100e-9, 200e-9}, []float64{0.1, 0.05, 0.5, 0.3}, kelvin)
	if err != nil {
		t.Fatal(err)
	}
	// κ that falls so fast that wider particles activate later
	steep, err := NewKappaTable([]float64{40e-9, 50e-9, 120e-9}, []float64{1.2, 0.01, 0.4}, kelvin)
	if err != nil {
		t.Fatal(err)
	}
	spread := Spread{0.3, 1.5, kelvin}
	ranges, err := NewRanges([]float64{60e-9, 150e-9}, []Composition{Kappa{0.1, kelvin}, Kappa{0.5, kelvin}, Kappa{0.02, kelvin}})
	if err != nil {
		t.Fatal(err)
	}
	rangesKappa := func(d float64) float64 {
		switch {
		case d < 60e-9:
			return 0.1
		case d < 150e-9:
			return 0.5
		}
		return 0.02
	}
	bins := inventedBins(t, 40)
	for _, c := range []struct {
		name   string
		of     Composition
		active func(d, s float64) float64
	}{
		{"kappa", Kappa{0.3, kelvin}, func(d, s float64) float64 { return isActive(d, 0.3, s) }},
		{"insoluble", Kappa{0, kelvin}, func(d, s float64) float64 { return isActive(d, 0, s) }},
		{"table", table, func(d, s float64) float64 { return isActive(d, table.At(d), s) }},
		{"steep table", steep, func(d, s float64) float64 { return isActive(d, steep.At(d), s) }},
		{"ranges", ranges, func(d, s float64) float64 { return isActive(d, rangesKappa(d), s) }},
		{"spread", spread, func(d, s float64) float64 { return shareOfSpread(spread, d, s) }},
	} {
		for sizesName, sizes := range map[string]Sizes{"modes": invented(), "bins": bins} {
			for _, s := range []float64{0.001, 0.004, 0.012} {
				got, err := Population{{sizes, 1, c.of}}.Count(s)
				if err != nil {
					t.Fatal(err)
				}
				want := slow(sizes, func(d float64) float64 { return c.active(d, s) })
				if math.Abs(got-want) > 1e-4*sizes.Number() { // a step of the sum holds so much at the edge
					t.Errorf("%s, %s, %g: %.9g, by slow quadrature %.9g", c.name, sizesName, s, got, want)
				}
			}
		}
	}
}

// The spread by Gauss quadrature over size, far more precise than the sum above.
func TestSpreadAgainstQuadratureOverSize(t *testing.T) {
	bins := inventedBins(t, 30)
	for _, k := range []Spread{{0.3, 1.05, kelvin}, {0.3, 1.3, kelvin}, {0.1, 2.5, kelvin}, {0.02, 1.8, kelvin}} {
		for _, s := range supersaturations {
			var want [2]float64
			edges := bins.Breaks()
			for i := 1; i < len(edges); i++ {
				lo, hi := math.Log(edges[i-1]), math.Log(edges[i])
				want[0] += quad.Fixed(func(x float64) float64 {
					d := math.Exp(x)
					return bins.Density(d) * shareOfSpread(k, d, s)
				}, lo, hi, 600, quad.Legendre{}, 0)
			}
			// pieces of a fifth of the width of the activation edge
			step := math.Log(k.GSD) / 15
			for x := math.Log(5e-10); x < math.Log(5e-5); x += step {
				want[1] += quad.Fixed(func(x float64) float64 {
					d := math.Exp(x)
					return invented().Density(d) * shareOfSpread(k, d, s)
				}, x, x+step, 6, quad.Legendre{}, 0)
			}
			for i, sizes := range []Sizes{bins, invented()} {
				got, err := Population{{sizes, 1, k}}.Count(s)
				if err != nil {
					t.Fatal(err)
				}
				near(t, "spread", got, want[i], 1e-7)
			}
		}
	}
}

// ln²σ_total = ln²σ_g + (ln σ_κ/3)² for one mode, where s_c goes with D^-3/2 κ^-1/2:
// to 4e-4 below 0.3 %.
func TestSumOfVariances(t *testing.T) {
	mode := aerosol.Mode{Concentration: 1, Median: 100e-9, GSD: 1.5}
	for gsd, tol := range map[float64]float64{
		1.1: 4e-4, 1.5: 4e-4,
		2: 6e-4, // reaches so far down in κ that s_c no longer goes with κ^-1/2
	} {
		total := math.Exp(math.Hypot(math.Log(1.5), math.Log(gsd)/3))
		wide := aerosol.Mode{Concentration: 1, Median: 100e-9, GSD: total}
		for _, s := range []float64{0.0008, 0.0015, 0.003} {
			a, err := Population{{mode, 1, Spread{0.3, gsd, kelvin}}}.Count(s)
			if err != nil {
				t.Fatal(err)
			}
			b, _ := Population{{wide, 1, Kappa{0.3, kelvin}}}.Count(s)
			if math.Abs(a-b) > tol {
				t.Errorf("spread %g at %g: %.6f, sum of variances %.6f", gsd, s, a, b)
			}
		}
	}
	// and a spread that goes to 1 goes to one κ
	a, _ := Population{{mode, 1, Spread{0.3, 1 + 1e-7, kelvin}}}.Count(0.002)
	b, _ := Population{{mode, 1, Kappa{0.3, kelvin}}}.Count(0.002)
	near(t, "no spread", a, b, 1e-6)
}

// The three measures of one aerosol give one spectrum.
func TestMeasuresGiveOneSpectrum(t *testing.T) {
	b := inventedBins(t, 60)
	want, _ := Population{{b, 1, Kappa{0.3, kelvin}}}.Counts(nil, supersaturations)
	for _, as := range []aerosol.Measure{aerosol.PerLog10, aerosol.PerLn, aerosol.Counts} {
		again, err := aerosol.NewBins(b.Grid(), b.Values(nil, as), as)
		if err != nil {
			t.Fatal(err)
		}
		got, _ := Population{{again, 1, Kappa{0.3, kelvin}}}.Counts(nil, supersaturations)
		for i := range want {
			near(t, as.String(), got[i], want[i], 1e-13)
		}
	}
}

// Mixing: shares of an external mixture add up, equal parts make the internal one,
// and a range that is cut in two of the same composition is the whole.
func TestMixing(t *testing.T) {
	k, other := Kappa{0.3, kelvin}, Kappa{0.05, kelvin}
	whole, _ := Population{{invented(), 1, k}}.Counts(nil, supersaturations)
	same, err := Population{{invented(), 1, External{{0.4, k}, {0.6, k}}}}.Counts(nil, supersaturations)
	if err != nil {
		t.Fatal(err)
	}
	second, _ := Population{{invented(), 1, other}}.Counts(nil, supersaturations)
	mixed, _ := Population{{invented(), 1, External{{0.4, k}, {0.6, other}}}}.Counts(nil, supersaturations)
	cut, _ := NewRanges([]float64{70e-9}, []Composition{k, k})
	halves, _ := Population{{invented(), 1, cut}}.Counts(nil, supersaturations)
	flat, _ := NewKappaTable([]float64{50e-9, 90e-9}, []float64{0.3, 0.3}, kelvin)
	table, _ := Population{{invented(), 1, flat}}.Counts(nil, supersaturations)
	wide := Spread{0.3, 1.4, kelvin}
	cutWide, _ := NewRanges([]float64{70e-9}, []Composition{wide, wide})
	spreadWhole, _ := Population{{invented(), 1, wide}}.Counts(nil, supersaturations)
	spreadHalves, _ := Population{{invented(), 1, cutWide}}.Counts(nil, supersaturations)
	cuts, err := NewCuts(k, supersaturations)
	if err != nil {
		t.Fatal(err)
	}
	held := make([]float64, len(supersaturations))
	cuts.AddCounts(held, invented(), 1)
	for i := range whole {
		near(t, "equal parts", same[i], whole[i], 1e-14)
		near(t, "shares", mixed[i], 0.4*whole[i]+0.6*second[i], 1e-14)
		near(t, "halves", halves[i], whole[i], 1e-12)
		near(t, "flat table", table[i], whole[i], 1e-11)
		near(t, "spread in halves", spreadHalves[i], spreadWhole[i], 1e-7)
		near(t, "cuts", held[i], whole[i], 1e-14)
	}
}

// Any particle of package koehler can be the composition. A κ that must be searched
// for (the compressible liquid at hand changes little) agrees with the closed form,
// and each critical diameter activates exactly at s.
func TestMatter(t *testing.T) {
	const T = 298.15
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	dissolved, _, err := solutes.Dissolve(solutes.Recipe{Parts: []solutes.Part{{Substance: salt, Volume: 1}},
		Model: solutes.IonInteraction, Temperature: T, Kappa: math.NaN(), VantHoffFactor: math.NaN()})
	if err != nil {
		t.Fatal(err)
	}
	dust, err := koehler.Adsorption{A: 2.25, B: 1.2}.Particle(100e-9, T)
	if err != nil {
		t.Fatal(err)
	}
	for name, p := range map[string]koehler.Particle{
		"ion interaction": {DryDiameter: 1e-7, Temperature: T, Solution: dissolved.Solution},
		"adsorption":      dust,
		"kappa":           {DryDiameter: 1e-7, Temperature: T, Solution: solutes.Kappa(0.61)},
	} {
		m := &Matter{p}
		n, err := Population{{invented()[0], 1, m}, {invented()[1], 1, m}}.Counts(nil, supersaturations)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		for i, s := range supersaturations {
			d, err := m.Critical(s)
			if err != nil {
				t.Fatal(err)
			}
			crest, err := p.Sized(d).Crest()
			if err != nil {
				t.Fatal(err)
			}
			near(t, name+" crest", crest.Supersaturation, s, 1e-9)
			near(t, name+" number", n[i], invented().Above(d), 1e-12)
		}
	}
	// where nothing from 0.1 nm to 1 mm activates, and where everything does
	m := &Matter{koehler.Particle{DryDiameter: 1e-7, Temperature: T, Solution: dissolved.Solution}}
	if d, err := m.Critical(1e-12); err != nil || !math.IsInf(d, 1) {
		t.Errorf("almost at saturation: %g, %v", d, err)
	}
	if d, err := m.Critical(1e9); err != nil || d != 0 {
		t.Errorf("far above: %g, %v", d, err)
	}
}

func TestCritical(t *testing.T) {
	steep, _ := NewKappaTable([]float64{40e-9, 50e-9, 120e-9}, []float64{1.2, 0.01, 0.4}, kelvin)
	ranges, _ := NewRanges([]float64{60e-9}, []Composition{Kappa{0.5, kelvin}, Kappa{0.001, kelvin}})
	all, _ := NewRanges([]float64{60e-9}, []Composition{Kappa{0.5, kelvin}, Kappa{0.5, kelvin}})
	for name, c := range map[string]Composition{"steep": steep, "ranges": ranges, "one": all,
		"external": External{{0.5, Kappa{0.5, kelvin}}, {0.5, Kappa{0.05, kelvin}}}} {
		for _, s := range supersaturations {
			d, err := c.Critical(s)
			if err != nil {
				t.Fatal(err)
			}
			// above it the count is that of all sizes above it
			above := newWindow(invented(), d*(1+1e-9), math.Inf(1))
			n, err := Population{{above, 1, c}}.Count(s)
			if err != nil {
				t.Fatal(err)
			}
			near(t, name, n, above.Number(), 1e-9)
			if name == "external" {
				continue // half of the particles below activate
			}
			below, _ := Population{{newWindow(invented(), d*0.98, d*(1-1e-9)), 1, c}}.Count(s)
			if want := newWindow(invented(), d*0.98, d).Number(); below > 0.01*want {
				t.Errorf("%s at %g: particles just below %g m activate too", name, s, d)
			}
		}
	}
}

func TestWhatCannotBeCounted(t *testing.T) {
	k := Kappa{0.3, kelvin}
	errOf := func(_ any, err error) error { return err }
	for name, p := range map[string]Population{
		"share":       {{invented(), 1, k}, {invented(), 0, k}},
		"share 2":     {{invented(), 1, k}, {invented(), 2, k}},
		"kappa":       {{invented(), 1, k}, {invented(), 1, Kappa{-1, kelvin}}},
		"kelvin":      {{invented(), 1, k}, {invented(), 1, Kappa{1, 0}}},
		"spread":      {{invented(), 1, k}, {invented(), 1, Spread{0.3, 1, kelvin}}},
		"spread of 0": {{invented(), 1, k}, {invented(), 1, Spread{0, 2, kelvin}}},
		"shares":      {{invented(), 1, k}, {invented(), 1, External{{0.4, k}, {0.5, k}}}},
		"a share":     {{invented(), 1, k}, {invented(), 1, External{{1.4, k}, {-0.4, k}}}},
		"a part":      {{invented(), 1, k}, {invented(), 1, External{{0.4, k}, {0.6, Kappa{-1, kelvin}}}}},
		"matter":      {{invented(), 1, k}, {invented(), 1, &Matter{}}},
	} {
		_, err := p.Counts(nil, []float64{0.002})
		var group *GroupError
		if !errors.As(err, &group) || group.Group != 1 {
			t.Errorf("%s: %v, want an error of group 2", name, err)
		}
	}
	for name, err := range map[string]error{
		"no supersaturation": errOf(Population{{invented(), 1, k}}.Count(0)),
		"table":              errOf(NewKappaTable([]float64{2e-8, 1e-8}, []float64{1, 1}, kelvin)),
		"table kappa":        errOf(NewKappaTable([]float64{1e-8}, []float64{-1}, kelvin)),
		"ranges":             errOf(NewRanges([]float64{1e-8}, []Composition{k})),
		"range limits":       errOf(NewRanges([]float64{2e-8, 1e-8}, []Composition{k, k, k})),
		"cuts":               errOf(NewCuts(Spread{0.3, 2, kelvin}, []float64{0.01})),
	} {
		if err == nil {
			t.Errorf("%s: no error", name)
		}
	}
	if n, err := (Population{{invented(), 1, k}}).Counts(nil, nil); err != nil || len(n) != 0 {
		t.Errorf("no supersaturations: %v, %v", n, err)
	}
}
