package counter

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// The score and the derivatives of η are those of finite differences, for every
// curve and parameter.
func TestDerivativesOfTheLikelihood(t *testing.T) {
	for _, o := range []Options{
		{}, {Curve: Gaussian}, {Curve: Sigmoid},
		{Charges: Charges{Triple: 0.1}}, {Charges: Charges{Sizes: aerosol}},
	} {
		var f Fit
		s := usual(60e-9, 0.05).scan(4, 1)
		if err := f.prepare(s, s.Points, o); err != nil {
			t.Fatal(err)
		}
		at := vector{math.Log(62e-9), math.Log(0.06), math.Log(0.9), 0.07}
		_, score, info := f.like.slope(&at)
		for a := range at {
			if !f.like.free[a] {
				continue
			}
			const h = 1e-6
			up, down := at, at
			up[a] += h
			down[a] -= h
			want := (f.like.value(&up) - f.like.value(&down)) / (2 * h)
			near(t, fmt.Sprintf("%v parameter %d", o.Curve, a), score[a], want, 1e-6*math.Abs(want)+2e-4)
			if info[a][a] <= 0 {
				t.Errorf("%v parameter %d has no information", o.Curve, a)
			}
		}
	}
}

func TestSolve(t *testing.T) {
	a := matrix{{4, 1, 0, 0.5}, {1, 3, 0.2, 0}, {0, 0.2, 2, 0.1}, {0.5, 0, 0.1, 1}}
	want := vector{1, -2, 3, 0.5}
	var b vector
	for i := range a {
		for j := range a {
			b[i] += a[i][j] * want[j]
		}
	}
	got, ok := solve(a, b)
	for i := range got {
		if near(t, "x", got[i], want[i], 1e-14); !ok {
			t.Error("not solved")
		}
	}
	if _, ok := solve(matrix{}, b); ok {
		t.Error("a matrix of zeros is solved")
	}
}

// Whatever is counted, a fit gives finite figures or says what is wrong.
func TestAnyCountsGiveAnAnswerOrASentence(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	curves := 0
	for i := range 200 {
		s := Scan{Name: fmt.Sprint(i), Over: Axis(i % 3), DryDiameter: 60e-9}
		scale := math.Pow(10, 4*random.Float64())
		for range random.IntN(40) {
			p := Point{Setting: 60e-9 * math.Exp(random.NormFloat64()), CN: math.Floor(scale * random.ExpFloat64()), CCN: math.Floor(scale * random.ExpFloat64())}
			if i%2 == 0 && p.Setting < 60e-9 {
				p.CCN = math.Floor(p.CCN / 100)
			}
			s.Points = append(s.Points, p)
		}
		o := Options{Curve: Curve(random.IntN(3)), LeastPlateau: -1}
		if i%5 == 0 {
			o.Charges.Sizes = aerosol
		}
		f, err := FitScan(s, o)
		if err != nil {
			if len(err.Error()) < 10 {
				t.Errorf("scan %d: %q", i, err)
			}
			continue
		}
		curves++
		for _, e := range []Estimate{f.Midpoint, f.Width, f.Plateau} {
			if !(e.Value > 0) || math.IsInf(e.Value, 0) || math.IsNaN(e.Uncertainty) || math.IsInf(e.Uncertainty, 0) {
				t.Errorf("scan %d: %+v", i, f.Midpoint)
			}
		}
	}
	if curves < 10 || curves == 200 {
		t.Errorf("%d of 200 scans gave a curve: the test does not see both", curves)
	}
}
