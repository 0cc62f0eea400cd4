package spectrum

import (
	"errors"
	"math"
	"testing"

	"dropcrest/atmos/fit"
	"gonum.org/v1/gonum/integrate/quad"
	"gonum.org/v1/gonum/mat"
)

// pointsOf reads a form at n supersaturations, equal in ln s from low to high.
func pointsOf(f Form, low, high float64, n int, relative float64) []Point {
	points := make([]Point, n)
	for i := range points {
		s := low * math.Pow(high/low, float64(i)/float64(n-1))
		points[i] = Point{s, f.Count(s), relative * f.Count(s)}
	}
	return points
}

// noise is a deterministic row of nearly Gaussian numbers of variance 1.
type noise uint64

func (n *noise) next() float64 {
	sum := -6.0
	for range 12 {
		*n = *n*6364136223846793005 + 1442695040888963407
		sum += float64(*n>>11) / (1 << 53)
	}
	return sum
}

// dN/dS of Cohard's form by quadrature, on both sides of Mu = K/2.
func TestCohardAgainstQuadrature(t *testing.T) {
	for _, c := range []Cohard{
		{1e9, 1.2, 1.5, 40}, {1e9, 0.6, 0.31, 200}, {1e9, 3, 0.8, 30}, {1e9, 0.5, 2, 1e-3}, {1e9, 2, 0, 5}, {1e9, 2.1, 1.05, 9}, {1e9, 2, 1 + 1e-6, 9}, {1e9, 2, 1 - 1e-6, 9},
	} {
		for _, s := range []float64{1e-5, 0.0005, 0.002, 0.01, 0.05} {
			S := s / Percent
			// in v = S^K the integrand is smooth: C (1 + β v^(2/K))^-μ dv
			want := quad.Fixed(func(y float64) float64 { // v = top y^8 tames v^(2/K) at 0
				v := math.Pow(S, c.K) * math.Pow(y, 8)
				return c.C * math.Pow(1+c.Beta*math.Pow(v, 2/c.K), -c.Mu) * math.Pow(S, c.K) * 8 * math.Pow(y, 7)
			}, 0, 1, 200, quad.Legendre{}, 0)
			near(t, "Cohard", c.Count(s), want, 1e-9)
		}
	}
}

// It goes to the power law as Beta goes to 0, and to its own limit at large s:
// N∞ = C β^(-k/2) Γ(k/2+1) Γ(μ-k/2)/Γ(μ).
func TestCohardAtItsEnds(t *testing.T) {
	for _, beta := range []float64{0, 1e-12, 1e-30} {
		c := Cohard{3e8, 0.7, 1.1, beta}
		for _, s := range supersaturations {
			near(t, "power law", c.Count(s), Power{3e8, 0.7}.Count(s), 1e-11)
		}
	}
	c := Cohard{3e8, 1.4, 1.9, 25}
	want := 3e8 * math.Pow(25, -0.7) * math.Gamma(1.7) * math.Gamma(1.2) / math.Gamma(1.9)
	near(t, "limit", c.Limit(), want, 1e-13)
	near(t, "far out", c.Count(100), want, 1e-8)
	if !math.IsInf(Cohard{3e8, 1.4, 0.7, 25}.Limit(), 1) {
		t.Error("a form of Mu = K/2 has no limit")
	}
}

// Every form is found again from its own values: with and without uncertainties.
func TestFitsFindTheForm(t *testing.T) {
	one := ErrorFunctions{{8e8, 0.004, 0.9}}
	two := ErrorFunctions{{5e8, 0.0016, 0.8}, {9e8, 0.0075, 1.1}}
	for _, c := range []struct {
		name string
		form Form
		n    int
		fit  func([]Point) (Fitted, error)
		tol  float64
	}{
		{"power", Power{6e8, 0.55}, 5, FitPower, 1e-9},
		{"falling power", Power{6e8, -0.2}, 5, FitPower, 1e-9},
		{"Cohard", Cohard{2e10, 2.3, 1.6, 30}, 9, FitCohard, 1e-5},
		{"Cohard without limit", Cohard{2e9, 1.4, 0.5, 10}, 9, FitCohard, 1e-5},
		{"one step", one, 6, func(p []Point) (Fitted, error) { return FitErrorFunctions(p, 1, 0) }, 1e-8},
		{"one step, all known", one, 6, func(p []Point) (Fitted, error) { return FitErrorFunctions(p, 1, 8e8) }, 1e-8},
		{"two steps", two, 12, func(p []Point) (Fitted, error) { return FitErrorFunctions(p, 2, 0) }, 1e-5},
		{"two steps, all known", two, 9, func(p []Point) (Fitted, error) { return FitErrorFunctions(p, 2, 14e8) }, 1e-5},
	} {
		for _, relative := range []float64{0, 0.05} {
			got, err := c.fit(pointsOf(c.form, 0.0005, 0.02, c.n, relative))
			if err != nil {
				t.Errorf("%s: %v", c.name, err)
				continue
			}
			want := c.form.Parameters()
			for i, p := range got.Form.Parameters() {
				near(t, c.name+" "+p.Key, p.Value, want[i].Value, c.tol)
			}
			if got.Deviation > 1e-7 || got.Points != c.n || !got.Extrapolates(0.03) || !got.Extrapolates(0.0004) || got.Extrapolates(0.001) {
				t.Errorf("%s: %+v", c.name, got)
			}
		}
	}
}

// The covariance is true: over many noisy rows of points the parameters lie within
// their uncertainty of the truth as often as they should, whether uncertainties are
// given (68.3 %) or taken from the scatter (Student's t of 5 and 6 degrees of
// freedom: 63.7 and 64.4 %). Of 150 rows that is known to 3.8 %.
func TestFitUncertainties(t *testing.T) {
	const rows, relative = 150, 0.05
	for _, c := range []struct {
		name string
		form Form
		fit  func([]Point) (Fitted, error)
	}{
		{"power", Power{6e8, 0.55}, FitPower},
		{"one step", ErrorFunctions{{8e8, 0.004, 0.9}}, func(p []Point) (Fitted, error) { return FitErrorFunctions(p, 1, 0) }},
	} {
		for weighted, expected := range map[bool]float64{true: 0.683, false: 0.64} {
			truth := c.form.Parameters()
			inside := make([]float64, len(truth))
			n, chi := noise(11), 0.0
			for range rows {
				points := pointsOf(c.form, 0.001, 0.02, 8, relative)
				for i := range points {
					points[i].Count *= 1 + relative*n.next()
					if !weighted {
						points[i].Uncertainty = 0
					}
				}
				f, err := c.fit(points)
				if err != nil {
					t.Fatal(err)
				}
				for i, p := range f.Form.Parameters() {
					if math.Abs(p.Value-truth[i].Value) <= f.Uncertainty(i) {
						inside[i] += 1.0 / rows
					}
				}
				chi += f.ReducedChiSquare / rows
			}
			for i, share := range inside {
				if math.Abs(share-expected) > 3*0.038 {
					t.Errorf("%s, weighted %v, %s: inside its uncertainty in %.1f %% of rows, want %.1f",
						c.name, weighted, truth[i].Key, 100*share, 100*expected)
				}
			}
			if weighted && math.Abs(chi-1) > 0.15 || !weighted && !math.IsNaN(chi) {
				t.Errorf("%s, weighted %v: mean χ² over degrees of freedom %.3f", c.name, weighted, chi)
			}
		}
	}
}

func TestWhatCannotBeFitted(t *testing.T) {
	power := pointsOf(Power{1e8, 0.5}, 0.001, 0.01, 5, 0)
	changed := func(change func(p []Point)) []Point {
		p := append([]Point(nil), power...)
		change(p)
		return p
	}
	for name, points := range map[string][]Point{
		"one point":           power[:1],
		"no supersaturation":  changed(func(p []Point) { p[2].Supersaturation = 0 }),
		"NaN":                 changed(func(p []Point) { p[2].Count = math.NaN() }),
		"negative":            changed(func(p []Point) { p[2].Count = -1 }),
		"zero, no weights":    changed(func(p []Point) { p[2].Count = 0 }),
		"one weight":          changed(func(p []Point) { p[2].Uncertainty = 1 }),
		"one supersaturation": {power[0], power[0], power[0]},
	} {
		var input *InputError
		if _, err := FitPower(points); !errors.As(err, &input) {
			t.Errorf("%s: %v, want an InputError", name, err)
		}
	}
	if _, err := FitErrorFunctions(power, 2, 0); !errors.Is(err, fit.ErrFewPoints) {
		t.Errorf("six parameters through five points: %v", err)
	}
	if _, err := FitErrorFunctions(power, 3, 0); !errors.Is(err, ErrInput) {
		t.Errorf("three steps: %v", err)
	}
	// a power law bends nowhere, so Mu and Beta are not determined
	if f, err := FitCohard(pointsOf(Power{1e8, 0.5}, 0.001, 0.01, 8, 0)); err == nil && f.Uncertainty(3) < f.Form.(Cohard).Beta {
		t.Errorf("a power law has its bend determined: %+v", f)
	}
	// without a degree of freedom there is no scatter to take uncertainties from
	f, err := FitPower(power[:2])
	if err != nil || f.Covariance != nil || !math.IsNaN(f.Uncertainty(0)) {
		t.Errorf("two points: %+v, %v", f, err)
	}
}

// Noisy spectra of two modes determine two steps most of the time, and what is found
// describes the points as well as their noise lets it.
func TestTwoStepsThroughNoise(t *testing.T) {
	var p Population
	for _, m := range invented() {
		p = append(p, Group{m, 1, Kappa{0.3, kelvin}})
	}
	r, failed := noise(9), 0
	const rows = 20
	for range rows {
		points := noisyCounts(t, p, &r, 0.02)
		f, err := FitErrorFunctions(points, 2, 0)
		if err != nil {
			failed++
		} else if f.Deviation > 0.04 {
			t.Errorf("%+v", f)
		}
	}
	if failed > rows/5 {
		t.Errorf("%d of %d not fitted", failed, rows)
	}
}

// noisyCounts are counts of a population at eight supersaturations, each off by that
// share of itself.
func noisyCounts(t *testing.T, p Population, r *noise, share float64) []Point {
	t.Helper()
	var points []Point
	for i := range 8 {
		s := 0.0007 * math.Pow(20, float64(i)/7)
		n, err := p.Count(s)
		if err != nil {
			t.Fatal(err)
		}
		points = append(points, Point{s, n * (1 + share*r.next()), share * n})
	}
	return points
}

// The spectrum of two modes has no best exponent: it is held, and said to be.
func TestCohardOfTwoModes(t *testing.T) {
	var p Population
	for _, m := range invented() {
		p = append(p, Group{m, 1, Kappa{0.3, kelvin}})
	}
	r := noise(9)
	for range 5 {
		points := noisyCounts(t, p, &r, 0.03)
		f, err := FitCohard(points)
		if err != nil {
			t.Fatal(err)
		}
		if k := f.Form.(Cohard).K; k != HeldExponent || len(f.Held) != 1 || !math.IsNaN(f.Uncertainty(1)) || f.DegreesOfFreedom != 5 {
			t.Errorf("%+v", f)
		}
		if !(f.Uncertainty(0) > 0 && f.Uncertainty(2) > 0 && f.Uncertainty(3) > 0) || f.Deviation > 0.08 {
			t.Errorf("%+v", f)
		}
	}
}

// The same points in another order give the same fit to the last digit.
func TestFitsDoNotDependOnOrder(t *testing.T) {
	points := pointsOf(ErrorFunctions{{5e8, 0.0016, 0.8}, {9e8, 0.0075, 1.1}}, 0.0005, 0.02, 9, 0.05)
	n := noise(3)
	for i := range points {
		points[i].Count *= 1 + 0.02*n.next()
	}
	a, err := FitErrorFunctions(points, 2, 0)
	if err != nil {
		t.Fatal(err)
	}
	for i, j := 0, len(points)-1; i < j; i, j = i+1, j-1 {
		points[i], points[j] = points[j], points[i]
	}
	b, err := FitErrorFunctions(points, 2, 0)
	if err != nil {
		t.Fatal(err)
	}
	for i, p := range a.Form.Parameters() {
		if q := b.Form.Parameters()[i]; p != q {
			t.Errorf("%s: %.17g and %.17g", p.Key, p.Value, q.Value)
		}
	}
	if !mat.Equal(a.Covariance, b.Covariance) {
		t.Error("covariances differ")
	}
}

func TestAtStandard(t *testing.T) {
	points := []Point{{0.004, 4e8, 4e6}, {0.001, 1e8, 2e6}, {0.002, 2e8, 0}, {0.008, 0, 1e6}, {0.004, 6e8, 3e6}}
	for _, c := range []struct{ s, want, u float64 }{
		{0.001, 1e8, 2e6}, {0.004, 5e8, 2.5e6}, {math.Sqrt(2) * 0.001, math.Sqrt(2) * 1e8, 0}, {math.Sqrt(32) * 0.001, 2.5e8, math.Hypot(1.25e6, 0.5e6)},
	} {
		got, err := AtStandard(points, c.s)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "number", got.Count, c.want, 1e-12)
		near(t, "uncertainty", got.Uncertainty, c.u, 1e-12)
	}
	// on the straight line of logarithms relative uncertainties go with the weights
	got, err := AtStandard([]Point{{0.001, 1e8, 4e6}, {0.008, 3e8, 6e6}}, 0.002)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "number", got.Count, 1e8*math.Cbrt(3), 1e-14)
	near(t, "uncertainty", got.Uncertainty/got.Count, math.Hypot(0.04*2/3, 0.02/3), 1e-13)
	for _, s := range []float64{0.0009, 0.009, math.NaN()} {
		if _, err := AtStandard(points, s); !errors.Is(err, ErrInput) {
			t.Errorf("at %g: %v", s, err)
		}
	}
	if _, err := AtStandard(nil, 0.001); !errors.Is(err, ErrInput) {
		t.Errorf("no points: %v", err)
	}
}
