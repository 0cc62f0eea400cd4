package fit

import (
	"errors"
	"math"
	"testing"

	"gonum.org/v1/gonum/stat"
)

// A straight line has a closed answer, with its covariance. Central differences
// know the gradient to some 1e-11 of the residuals.
func TestLineAgainstItsClosedForm(t *testing.T) {
	x := []float64{0, 1, 2, 3, 4, 5, 6}
	y := []float64{1.1, 2.9, 5.2, 6.8, 9.1, 11.2, 12.7}
	r, err := LeastSquares(func(dst, p []float64) {
		for i := range dst {
			dst[i] = p[0] + p[1]*x[i] - y[i]
		}
	}, len(x), []float64{0, 0})
	if err != nil {
		t.Fatal(err)
	}
	a, b := stat.LinearRegression(x, y, nil, false)
	for i, want := range []float64{a, b} {
		if math.Abs(r.X[i]-want) > 1e-9 {
			t.Errorf("parameter %d = %.17g, want %.17g", i, r.X[i], want)
		}
	}
	// slope: 1/Σ(x-x̄)² = 1/28; intercept: Σx²/(n Σ(x-x̄)²) = 91/(7·28)
	for i, want := range []float64{91.0 / 196, 1.0 / 28} {
		if got := r.Covariance.At(i, i); math.Abs(got-want) > 1e-8*want {
			t.Errorf("variance %d = %.12g, want %.12g", i, got, want)
		}
	}
	sum := 0.0
	for i := range x {
		sum += (a + b*x[i] - y[i]) * (a + b*x[i] - y[i])
	}
	if math.Abs(r.SumOfSquares-sum) > 1e-12 {
		t.Errorf("sum of squares %.15g, want %.15g", r.SumOfSquares, sum)
	}
	if r.DegreesOfFreedom != 5 {
		t.Errorf("degrees of freedom %d, want 5", r.DegreesOfFreedom)
	}
}

// The valley of Rosenbrock's function as two residuals: its minimum is 0 at (1, 1).
func TestBentValley(t *testing.T) {
	for _, start := range [][]float64{{-1.2, 1}, {3, -4}, {1, 1}} {
		r, err := LeastSquares(func(dst, p []float64) {
			dst[0], dst[1] = 10*(p[1]-p[0]*p[0]), 1-p[0]
		}, 2, start)
		if err != nil {
			t.Fatalf("from %v: %v", start, err)
		}
		if math.Abs(r.X[0]-1)+math.Abs(r.X[1]-1) > 1e-9 {
			t.Errorf("from %v: %v, want 1, 1", start, r.X)
		}
	}
}

func TestWhyThereIsNoFit(t *testing.T) {
	for name, c := range map[string]struct {
		n         int
		residuals Residuals
		want      error
	}{
		"few points": {1, func(dst, p []float64) { dst[0] = p[0] + p[1] }, ErrFewPoints},
		"two parameters that do the same": {3, func(dst, p []float64) {
			for i := range dst {
				dst[i] = p[0] + p[1] - float64(i)
			}
		}, ErrUndetermined},
		"a minimum at infinity": {3, func(dst, p []float64) {
			for i := range dst {
				dst[i] = math.Exp(-p[0]*float64(i+1)) + math.Exp(-p[1]*float64(i))
			}
		}, nil},
	} {
		r, err := LeastSquares(c.residuals, c.n, []float64{0.5, 0.5})
		if err == nil || c.want != nil && !errors.Is(err, c.want) {
			t.Errorf("%s: %v, %v; want %v", name, r.X, err, c.want)
		}
	}
}

// A covariance carried over to exp(x): the variance is that of x times exp(2x).
func TestTransformed(t *testing.T) {
	r, err := LeastSquares(func(dst, p []float64) { dst[0], dst[1] = 2*(p[0]-1.5), 0.5*(p[1]+1) }, 2, []float64{0, 0})
	if err != nil {
		t.Fatal(err)
	}
	c := r.Transformed(2, func(dst, x []float64) { dst[0], dst[1] = math.Exp(x[0]), x[0]+x[1] })
	for _, e := range []struct {
		i, j int
		want float64
	}{{0, 0, 0.25 * math.Exp(3)}, {1, 1, 4.25}, {0, 1, 0.25 * math.Exp(1.5)}} {
		if got := c.At(e.i, e.j); math.Abs(got-e.want) > 1e-8*e.want {
			t.Errorf("covariance %d,%d = %.12g, want %.12g", e.i, e.j, got, e.want)
		}
	}
}
