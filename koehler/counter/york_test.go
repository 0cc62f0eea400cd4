package counter

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"
)

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s = %.10g, want %.10g ± %.2g", what, got, want, tol)
	}
}

// pearson is Pearson's data (1901) with York's weights (1966), as in York et al.
// 2004, Am. J. Phys. 72, 367, Table II; from memory.
func pearson() []LinePoint {
	x := []float64{0, 0.9, 1.8, 2.6, 3.3, 4.4, 5.2, 6.1, 6.5, 7.4}
	y := []float64{5.9, 5.4, 4.4, 4.6, 3.5, 3.7, 2.8, 2.8, 2.4, 1.5}
	wx := []float64{1000, 1000, 500, 800, 200, 80, 60, 20, 1.8, 1}
	wy := []float64{1, 1.8, 4, 8, 20, 20, 70, 70, 100, 500}
	points := make([]LinePoint, len(x))
	for i := range x {
		points[i] = LinePoint{X: x[i], Y: y[i], UX: 1 / math.Sqrt(wx[i]), UY: 1 / math.Sqrt(wy[i])}
	}
	return points
}

// The worked example; its figures from memory, recomputed by another routine.
func TestYorkWorkedExample(t *testing.T) {
	l, err := York(pearson())
	if err != nil {
		t.Fatal(err)
	}
	near(t, "intercept", l.Intercept, 5.479910, 1e-6)
	near(t, "slope", l.Slope, -0.480533, 1e-6)
	near(t, "u(intercept)", l.InterceptUncertainty, 0.294971, 1e-6)
	near(t, "u(slope)", l.SlopeUncertainty, 0.057985, 1e-6)
	near(t, "χ²/8", l.ChiSquare/8, 1.48329, 1e-5)
	if l.Freedom != 8 {
		t.Errorf("freedom %d, want 8", l.Freedom)
	}
}

// With x and y exchanged the line is the same one.
func TestYorkIsSymmetric(t *testing.T) {
	points := pearson()
	a, err := York(points)
	if err != nil {
		t.Fatal(err)
	}
	for i, p := range points {
		points[i] = LinePoint{X: p.Y, Y: p.X, UX: p.UY, UY: p.UX}
	}
	b, err := York(points)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "slope", b.Slope, 1/a.Slope, 1e-9)
	near(t, "intercept", b.Intercept, -a.Intercept/a.Slope, 1e-8)
	near(t, "χ²", b.ChiSquare, a.ChiSquare, 1e-9)
}

// With errors in y alone it is weighted least squares: known by formula.
func TestYorkWithErrorsInOneCoordinate(t *testing.T) {
	points := []LinePoint{{X: 1, Y: 2.1, UY: 0.1}, {X: 2, Y: 3.9, UY: 0.2}, {X: 4, Y: 8.3, UY: 0.1}}
	l, err := York(points)
	if err != nil {
		t.Fatal(err)
	}
	var s, sx, sy, sxx, sxy float64
	for _, p := range points {
		w := 1 / (p.UY * p.UY)
		s, sx, sy, sxx, sxy = s+w, sx+w*p.X, sy+w*p.Y, sxx+w*p.X*p.X, sxy+w*p.X*p.Y
	}
	delta := s*sxx - sx*sx
	near(t, "slope", l.Slope, (s*sxy-sx*sy)/delta, 1e-12)
	near(t, "u(slope)", l.SlopeUncertainty, math.Sqrt(s/delta), 1e-12)
	near(t, "u(intercept)", l.InterceptUncertainty, math.Sqrt(sxx/delta), 1e-12)
	near(t, "covariance", l.Covariance, -sx/delta, 1e-12)
	if got := l.Band(2, 0.95); !(got.Prediction > got.Line && got.Line > 0) {
		t.Errorf("bands %+v", got)
	}
}

// Lines through points drawn about a known one, with correlated errors: the stated
// covariance is that of the results, within the 5 % that 2000 lines know it to.
func TestYorkCovarianceBySimulation(t *testing.T) {
	const n, ux, uy, r = 2000, 0.1, 0.003, 0.5
	random := rand.New(rand.NewPCG(1, 2))
	var slopes, intercepts, product, at3 float64
	var last Line
	for range n {
		var points []LinePoint
		for _, x := range []float64{2, 3, 5, 8, 12, 17} {
			z, w := random.NormFloat64(), random.NormFloat64()
			points = append(points, LinePoint{X: x + ux*z, Y: 0.01 + 0.03*x + uy*(r*z+math.Sqrt(1-r*r)*w), UX: ux, UY: uy, Correlation: r})
		}
		l, err := York(points)
		if err != nil {
			t.Fatal(err)
		}
		a, b := l.Intercept-0.01, l.Slope-0.03
		slopes, intercepts, product = slopes+b*b, intercepts+a*a, product+a*b
		at3 += (l.At(3) - 0.1) * (l.At(3) - 0.1)
		last = l
	}
	near(t, "u(slope)", last.SlopeUncertainty/math.Sqrt(slopes/n), 1, 0.06)
	near(t, "u(intercept)", last.InterceptUncertainty/math.Sqrt(intercepts/n), 1, 0.06)
	near(t, "covariance", last.Covariance/(product/n), 1, 0.12)
	near(t, "u at 3", last.Uncertainty(3)/math.Sqrt(at3/n), 1, 0.06)
}

func TestPointsWithoutALine(t *testing.T) {
	good := LinePoint{X: 1, Y: 1, UY: 1}
	for name, points := range map[string][]LinePoint{
		"none":           nil,
		"one":            {good},
		"one x":          {good, {X: 1, Y: 2, UY: 1}},
		"no uncertainty": {good, {X: 2, Y: 2}},
		"not a number":   {good, {X: math.NaN(), UY: 1}},
		"correlation":    {good, {X: 2, Y: 2, UY: 1, Correlation: 2}},
	} {
		if _, err := York(points); !errors.Is(err, ErrLine) {
			t.Errorf("%s: error %v", name, err)
		}
	}
}
