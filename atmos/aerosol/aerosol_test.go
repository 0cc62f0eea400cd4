package aerosol

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"
)

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if d := math.Abs(got - want); !(d <= tol*math.Abs(want)) && got != want {
		t.Errorf("%s = %.17g, want %.17g (relative %.2g, tolerance %.2g)", what, got, want, d/math.Abs(want), tol)
	}
}

// threeModes is an invented aerosol.
func threeModes() Modes {
	return Modes{{900e6, 32e-9, 1.6}, {650e6, 140e-9, 1.5}, {2e6, 900e-9, 2}}
}

func logGrid(t testing.TB, lo, hi float64, n int) *Grid {
	t.Helper()
	edges := make([]float64, n+1)
	for i := range edges {
		edges[i] = lo * math.Pow(hi/lo, float64(i)/float64(n))
	}
	g, err := NewGrid(edges)
	if err != nil {
		t.Fatal(err)
	}
	return g
}

// Moments, numbers and densities of modes against quadrature of the density.
func TestModesAgainstQuadrature(t *testing.T) {
	modes := threeModes()
	integral := func(lo, hi, k float64) float64 {
		return quad.Fixed(func(x float64) float64 { return modes.Density(math.Exp(x)) * math.Exp(k*x) },
			math.Log(lo), math.Log(hi), 400, quad.Legendre{}, 0)
	}
	for _, k := range []float64{-1, 0, 1, 2, 3} {
		near(t, "moment", modes.Moment(k), integral(1e-11, 1e-3, k), 1e-10)
	}
	near(t, "above 80 nm", modes.Above(80e-9), integral(80e-9, 1e-3, 0), 1e-10)
	near(t, "between", modes.Between(20e-9, 80e-9), integral(20e-9, 80e-9, 0), 1e-10)
	for _, m := range modes {
		volume := m.MomentMode(3)
		near(t, "volume mode", volume.Density(2*m.Median), m.Density(2*m.Median)*math.Pow(2*m.Median, 3), 1e-12)
		near(t, "both sides", m.Above(50e-9)+m.Below(50e-9), m.Number(), 1e-15)
		sum := []float64{1, 2}
		m.AddAbove(sum, []float64{30e-9, 60e-9}, 0.5)
		near(t, "added", sum[1], 2+0.5*m.Above(60e-9), 1e-15)
	}
}

// The far tails keep their precision: asymptotic erfc z = exp(-z²)/(z √π)(1 - 1/(2z²) + 3/(4z⁴)...).
func TestTailsKeepTheirPrecision(t *testing.T) {
	m := Mode{1, 100e-9, math.E}
	z := 12 / math.Sqrt2
	want := math.Exp(-z*z) / (z * math.Sqrt(math.Pi)) / 2 * (1 - 1/(2*z*z) + 3/(4*z*z*z*z) - 15/(8*math.Pow(z, 6)) + 105/(16*math.Pow(z, 8)))
	near(t, "upper", m.Above(100e-9*math.Exp(12)), want, 1e-7)
	near(t, "lower", m.Below(100e-9*math.Exp(-12)), want, 1e-7)
}

// The same aerosol in the three measures is one distribution.
func TestMeasuresAgree(t *testing.T) {
	g := logGrid(t, 10e-9, 800e-9, 40)
	b := threeModes().Bins(g)
	near(t, "number", b.Number(), threeModes().Between(10e-9, 800e-9), 1e-13)
	for _, as := range []Measure{PerLog10, PerLn, Counts} {
		again, err := NewBins(g, b.Values(nil, as), as)
		if err != nil {
			t.Fatal(err)
		}
		for _, d := range []float64{5e-9, 10e-9, 33e-9, 150e-9, 799e-9, 900e-9} {
			near(t, as.String(), again.Above(d), b.Above(d), 1e-14)
		}
	}
	near(t, "log10 against ln", b.Values(nil, PerLog10)[7], b.Values(nil, PerLn)[7]*math.Ln10, 1e-15)
}

func TestBinsInside(t *testing.T) {
	g, err := NewGrid([]float64{10e-9, 20e-9, 40e-9, 160e-9})
	if err != nil {
		t.Fatal(err)
	}
	b, err := NewBins(g, []float64{6, 0, 4}, Counts)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ d, above float64 }{
		{5e-9, 10}, {10e-9, 10}, {math.Sqrt(200) * 1e-9, 7}, {20e-9, 4}, {30e-9, 4}, {40e-9, 4}, {80e-9, 2}, {160e-9, 0}, {1, 0},
	} {
		near(t, "above", b.Above(c.d), c.above, 1e-13)
	}
	for _, c := range []struct {
		n, d float64
		bin  int
	}{{2, 80e-9, 2}, {4, 40e-9, 2}, {7, math.Sqrt(200) * 1e-9, 0}, {10, 10e-9, 0}} {
		d, bin, ok := b.WidestAbove(c.n)
		if near(t, "widest", d, c.d, 1e-13); bin != c.bin || !ok {
			t.Errorf("widest above %g: bin %d %v, want %d", c.n, bin, ok, c.bin)
		}
	}
	for _, n := range []float64{0, -1, 10.001, math.NaN()} {
		if _, _, ok := b.WidestAbove(n); ok {
			t.Errorf("widest above %g: has an answer", n)
		}
	}
	near(t, "density", b.Density(100e-9), 4/math.Log(4), 1e-14)
	near(t, "no density", b.Density(170e-9), 0, 0)
	// ∫ D dlnD over the two bins: (20-10) 6/ln 2 + (160-40) 4/ln 4 nm
	near(t, "first moment", b.Moment(1), (10*6/math.Ln2+120*4/math.Log(4))*1e-9, 1e-14)
}

func TestGridAround(t *testing.T) {
	want := logGrid(t, 10e-9, 640e-9, 24)
	mid := make([]float64, want.Len())
	for i := range mid {
		mid[i] = want.Midpoint(i)
	}
	g, err := GridAround(mid)
	if err != nil {
		t.Fatal(err)
	}
	for i, e := range g.Edges() {
		near(t, "limit", e, want.Edges()[i], 1e-13)
	}
}

func TestWhatIsNotUsable(t *testing.T) {
	g := logGrid(t, 10e-9, 100e-9, 3)
	errOf := func(_ any, err error) error { return err }
	for name, err := range map[string]error{
		"gsd 1":           Mode{1, 1e-7, 1}.Check(),
		"gsd NaN":         Mode{1, 1e-7, math.NaN()}.Check(),
		"negative number": Modes{{1, 1e-7, 2}, {-1, 1e-7, 2}}.Check(),
		"no size":         Mode{1, 0, 2}.Check(),
		"one limit":       errOf(NewGrid([]float64{1e-8})),
		"limits fall":     errOf(NewGrid([]float64{1e-8, 3e-8, 2e-8})),
		"one midpoint":    errOf(GridAround([]float64{1e-8})),
		"midpoint NaN":    errOf(GridAround([]float64{1e-8, math.NaN()})),
		"two values":      errOf(NewBins(g, []float64{1, 2}, Counts)),
		"missing":         errOf(NewBins(g, []float64{1, math.NaN(), 2}, Counts)),
		"infinite":        errOf(NewBins(g, []float64{1, math.Inf(1), 2}, PerLn)),
		"vacuum":          Air{273, 0}.Check(),
		"shares":          errOf(NewTable([]float64{1e-8, 2e-8}, []float64{1})),
		"no modes":        errOf(FitModes(threeModes().Bins(g), 0, nil)),
	} {
		var input *InputError
		if !errors.As(err, &input) || !errors.Is(err, ErrInput) {
			t.Errorf("%s: %v, want an InputError", name, err)
		}
	}
	if got := (Modes{{1, 1e-7, 2}, {1, 1e-7, 0.5}}).Check().Error(); got != "gsd of mode 2, 0.5: must be above 1 and up to 10 (the geometric standard deviation itself, not its logarithm)" {
		t.Error(got)
	}
}

func TestAir(t *testing.T) {
	ambient := Air{293.15, 90000}
	near(t, "to standard", ambient.To(StandardAir()), 101325.0/90000*293.15/273.15, 1e-15)
	near(t, "there and back", ambient.To(StandardAir())*StandardAir().To(ambient), 1, 1e-15)
}

func TestFill(t *testing.T) {
	nan := math.NaN()
	g := logGrid(t, 10e-9, 320e-9, 5)
	for name, c := range map[string]struct {
		in, want        []float64
		filled, trimmed int
		wrong           bool
	}{
		"whole":     {in: []float64{1, 2, 3, 4, 5}, want: []float64{1, 2, 3, 4, 5}},
		"inside":    {in: []float64{1, nan, 3, nan, 7}, want: []float64{1, 2, 3, 5, 7}, filled: 2},
		"ends":      {in: []float64{nan, 2, 3, nan, nan}, want: []float64{0, 2, 3, 0, 0}, trimmed: 3},
		"wide gap":  {in: []float64{1, nan, nan, nan, 5}, wrong: true},
		"nothing":   {in: []float64{nan, nan, nan, nan, nan}, wrong: true},
		"too short": {in: []float64{1}, wrong: true},
	} {
		gaps, err := Fill(g, c.in, 2)
		if (err != nil) != c.wrong {
			t.Errorf("%s: %v", name, err)
		}
		if c.wrong {
			continue
		}
		if len(gaps.Filled) != c.filled || len(gaps.Trimmed) != c.trimmed {
			t.Errorf("%s: %+v", name, gaps)
		}
		for i := range c.want {
			near(t, name, c.in[i], c.want[i], 1e-14)
		}
	}
}

func TestResponses(t *testing.T) {
	table, err := NewTable([]float64{10e-9, 40e-9, 160e-9}, []float64{0.2, 0.8, 1})
	if err != nil {
		t.Fatal(err)
	}
	for d, want := range map[float64]float64{5e-9: 0.2, 10e-9: 0.2, 20e-9: 0.5, 40e-9: 0.8, 80e-9: 0.9, 1e-6: 1} {
		near(t, "table", table.At(d), want, 1e-14)
	}
	chain := Chain{table, Constant(0.5), ResponseFunc(func(d float64) float64 { return d / 40e-9 })}
	near(t, "chain", chain.At(40e-9), 0.4, 1e-15)

	b := threeModes().Bins(logGrid(t, 10e-9, 800e-9, 40))
	for name, r := range map[string]Response{"table": table, "constant": Constant(0.9)} {
		back, err := b.Seen(r).Corrected(r)
		if err != nil {
			t.Fatal(err)
		}
		for _, d := range []float64{15e-9, 60e-9, 300e-9} {
			near(t, name, back.Above(d), b.Above(d), 1e-13)
		}
	}
	if _, err := b.Corrected(Constant(0.01)); !errors.Is(err, ErrInput) {
		t.Errorf("a hundredfold correction: %v", err)
	}
	// a smooth response over one wide bin against quadrature in ln D
	one, _ := NewBins(logGrid(t, 10e-9, 30e-9, 1), []float64{1}, Counts)
	curve := ResponseFunc(func(d float64) float64 { return 1 - math.Exp(-d/8e-9) })
	want := quad.Fixed(func(x float64) float64 { return curve(math.Exp(x)) }, math.Log(10e-9), math.Log(30e-9), 40, quad.Legendre{}, 0) / math.Log(3)
	near(t, "mean", one.Seen(curve).Number(), want, 1e-5)
}

func TestJoin(t *testing.T) {
	modes := threeModes()
	small, large := modes.Bins(logGrid(t, 10e-9, 700e-9, 60)), modes.Bins(logGrid(t, 300e-9, 10e-6, 30))
	o, ok := OverlapOf(small, large)
	if !ok || math.Abs(o.Ratio()-1) > 0.05 {
		t.Errorf("overlap %+v %v", o, ok)
	}
	for _, at := range []float64{0, 300e-9, 500e-9, 700e-9} {
		whole, err := Join(small, large, at)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "number", whole.Number(), modes.Between(10e-9, 10e-6), 2e-4)
		near(t, "small sizes", whole.Number()-whole.Above(100e-9), small.Number()-small.Above(100e-9), 1e-12)
		near(t, "large sizes", whole.Above(2e-6), large.Above(2e-6), 1e-12)
	}
	for name, at := range map[string]float64{"below": 200e-9, "above": 800e-9, "NaN": math.NaN()} {
		if _, err := Join(small, large, at); !errors.Is(err, ErrInput) {
			t.Errorf("join %s the overlap: %v", name, err)
		}
	}
	if _, err := Join(modes.Bins(logGrid(t, 10e-9, 200e-9, 9)), large, 0); !errors.Is(err, ErrInput) {
		t.Errorf("a gap: %v", err)
	}
}

func TestTails(t *testing.T) {
	// dN/dlnD = D^-3 in units of the last limit: beyond it lies 1/3
	g := logGrid(t, 1e-7, 1e-6, 20)
	values := make([]float64, g.Len())
	for i := range values {
		values[i] = math.Pow(g.Midpoint(i)/1e-6, -3)
	}
	b, err := NewBins(g, values, PerLn)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "power law", b.UpperTail().Number, 1.0/3, 1e-12)
	if _, say := b.UpperNote(); say {
		t.Error("a tail of 0.1 % is said")
	}
	if low := b.LowerTail(); low.Falling || !math.IsInf(low.Number, 1) {
		t.Errorf("rising end: %+v", low)
	}
	if note, say := b.LowerNote(); !say || note.Code != "below-first-bin" {
		t.Errorf("rising end: %+v %v", note, say)
	}
	// a mode cut inside: the estimate is too high, but not twice
	mode := Modes{{1, 200e-9, 1.6}}
	cut := mode.Bins(logGrid(t, 20e-9, 500e-9, 40))
	if ratio := cut.UpperTail().Number / mode.Above(500e-9); !(ratio > 1 && ratio < 2) {
		t.Errorf("tail over truth %.3f", ratio)
	}
	if low := cut.LowerTail(); !low.Falling || low.Share > 1e-5 {
		t.Errorf("lower end of a mode: %+v", low)
	}
}

// E.g. from mobility to volume-equivalent diameters: particles stay, sizes move.
func TestResizedAndScaled(t *testing.T) {
	b := threeModes().Bins(logGrid(t, 10e-9, 800e-9, 40))
	moved, err := b.Resized(func(d float64) float64 { return d / 1.08 })
	if err != nil {
		t.Fatal(err)
	}
	near(t, "moved", moved.Above(50e-9), b.Above(54e-9), 1e-12)
	near(t, "scaled", b.Scaled(1.1).Above(50e-9), 1.1*b.Above(50e-9), 1e-14)
	if _, err := b.Resized(func(d float64) float64 { return 1 / d }); !errors.Is(err, ErrInput) {
		t.Errorf("falling: %v", err)
	}
}

func TestFitModesFindsThem(t *testing.T) {
	g := logGrid(t, 8e-9, 1e-6, 60)
	for name, truth := range map[string]Modes{
		"one":   {{500e6, 90e-9, 1.7}},
		"two":   {{900e6, 40e-9, 1.5}, {400e6, 150e-9, 1.55}},
		"three": {{2000e6, 20e-9, 1.4}, {800e6, 60e-9, 1.5}, {300e6, 190e-9, 1.45}},
	} {
		f, err := FitModes(truth.Bins(g), len(truth), nil)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		for i, m := range truth {
			near(t, name+" number", f.Modes[i].Concentration, m.Concentration, 1e-7)
			near(t, name+" median", f.Modes[i].Median, m.Median, 1e-7)
			near(t, name+" gsd", f.Modes[i].GSD, m.GSD, 1e-7)
		}
	}
}

// Counts with noise of a known size: the fit lies within its own uncertainty
// and χ² near its expectation.
func TestFitModesWithNoise(t *testing.T) {
	g := logGrid(t, 10e-9, 800e-9, 50)
	truth := Modes{{900e6, 40e-9, 1.5}, {400e6, 150e-9, 1.55}}
	b := truth.Bins(g)
	values, sigma := b.Values(nil, Counts), make([]float64, g.Len())
	seed := uint64(7)
	for i := range values {
		sigma[i] = 0.02*values[i] + 1e4
		sum := -6.0 // twelve uniform numbers: nearly Gaussian
		for range 12 {
			seed = seed*6364136223846793005 + 1442695040888963407
			sum += float64(seed>>11) / (1 << 53)
		}
		values[i] = math.Max(0, values[i]+sigma[i]*sum)
	}
	noisy, err := NewBins(g, values, Counts)
	if err != nil {
		t.Fatal(err)
	}
	f, err := FitModes(noisy, 2, sigma)
	if err != nil {
		t.Fatal(err)
	}
	for i, m := range truth {
		for k, d := range []float64{f.Modes[i].Concentration - m.Concentration, f.Modes[i].Median - m.Median, f.Modes[i].GSD - m.GSD} {
			if z := d / math.Sqrt(f.Covariance.At(3*i+k, 3*i+k)); math.Abs(z) > 3.5 {
				t.Errorf("mode %d parameter %d: %.2f standard uncertainties off", i, k, z)
			}
		}
	}
	if f.ReducedChiSquare < 0.4 || f.ReducedChiSquare > 1.8 {
		t.Errorf("reduced χ² %.2f for %d degrees of freedom", f.ReducedChiSquare, f.DegreesOfFreedom)
	}
}
