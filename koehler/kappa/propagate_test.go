package kappa

import (
	"context"
	"errors"
	"math"
	"reflect"
	"testing"

	"dropcrest/koehler"
)

// at60 is the worked case of the project: 60 nm ± 3 %, 0.40 % ± 5 %, the convention of 25 °C.
func at60() Point {
	return Point{
		Name:            "60 nm",
		Dry:             Measured{60e-9, 1.8e-9, 0},
		Supersaturation: Measured{0.004, 0.0002, 0},
		Temperature:     Measured{Value: 298.15},
		Tension:         Measured{Value: 0.072},
	}
}

func propagate(t testing.TB, points []Point, s Settings) Result {
	t.Helper()
	r, err := Propagate(context.Background(), points, s)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// Computed for the project elsewhere, JCGM 100 against JCGM 101: relative u 0.1345
// (of the classic form) and 0.138 ± 0.002. Its other figures of the exact form (mean
// 0.4014, median 0.3975, 0.307 to 0.520) carry the noise of that Monte Carlo: by
// quadrature of P(κ < k) = ∫ φ(z) P(s > s_c(D(z), k)) dz they are 0.4017, 0.39726,
// 0.30686 and 0.52200. A million trials know the ends to 2e-4.
func TestMonteCarloAgainstLinear(t *testing.T) {
	e := propagate(t, []Point{at60()}, Settings{Trials: 1e6, Seed: 1}).Points[0]
	near(t, "κ", e.Kappa, 0.3965, 1e-4)
	near(t, "classic κ", e.Classic, 0.3981, 1e-4)
	near(t, "linear u", e.Linear.StandardUncertainty/e.Kappa, 0.1345, 2e-3)
	mc := e.MonteCarlo
	near(t, "Monte Carlo u", mc.StandardUncertainty/mc.Mean, 0.138, 2e-3)
	near(t, "mean", mc.Mean, 0.4017, 2e-4)
	near(t, "median", mc.Median, 0.39726, 3e-4)
	near(t, "low", mc.Interval.Low, 0.30686, 5e-4)
	near(t, "high", mc.Interval.High, 0.52200, 8e-4)
	if mc.Interval.High-mc.Median <= mc.Median-mc.Interval.Low {
		t.Errorf("interval %v about %g is not skewed to the right", mc.Interval, mc.Median)
	}
	if !(mc.Shortest.High-mc.Shortest.Low < mc.Interval.High-mc.Interval.Low && mc.Shortest.High < mc.Interval.High) {
		t.Errorf("shortest interval %v, between quantiles %v", mc.Shortest, mc.Interval)
	}
	if mc.Agrees {
		t.Error("the linear interval is said to agree")
	}
}

func TestContributionsAreRanked(t *testing.T) {
	p := at60()
	p.Temperature.Systematic = 1
	l := propagate(t, []Point{p}, Settings{Trials: 100}).Points[0].Linear
	if len(l.Contributions) != 3 {
		t.Fatalf("%d contributions, want 3", len(l.Contributions))
	}
	// κ ∝ s^-2 D^-3 and, with a fixed tension, (T ρ_w)^-3, where ρ_w falls by
	// T^-0.077: u of 10, 9 and 1 %. The exact form is up to 1 % off the powers.
	sum := 0.0
	for i, want := range []struct {
		q        Quantity
		relative float64
	}{{Supersaturation, -2}, {Dry, -3}, {Temperature, -2.77}} {
		c := l.Contributions[i]
		sum += c.Share
		if c.Quantity != want.q {
			t.Errorf("rank %d is %v, want %v", i+1, c.Quantity, want.q)
		}
		near(t, c.Quantity.String(), c.Relative, want.relative, 0.04)
	}
	near(t, "sum of shares", sum, 1, 1e-12)
}

func TestSameOnAnyNumberOfCores(t *testing.T) {
	q := at60()
	q.Dry.Systematic = 1e-9
	points := []Point{at60(), q, at60()}
	for _, s := range []Settings{{Trials: 25000, Seed: 3}, {Digits: 1, Seed: 3}} {
		s.Workers = 1
		one := propagate(t, points, s)
		s.Workers = 5
		five := propagate(t, points, s)
		for i := range points {
			// NaN is not equal to itself
			one.Points[i].MonteCarlo.Tolerance, five.Points[i].MonteCarlo.Tolerance = 0, 0
		}
		one.Mean.MonteCarlo.Tolerance, five.Mean.MonteCarlo.Tolerance = 0, 0
		if !reflect.DeepEqual(one, five) {
			t.Errorf("%+v: one core %+v, five cores %+v", s, one, five)
		}
	}
	other := propagate(t, points[:1], Settings{Trials: 25000, Seed: 4})
	if other.Points[0].MonteCarlo.Mean == propagate(t, points[:1], Settings{Trials: 25000, Seed: 3}).Points[0].MonteCarlo.Mean {
		t.Error("another seed gives the same trials")
	}
}

func TestAdaptiveStopsWhenStable(t *testing.T) {
	coarse := propagate(t, []Point{at60()}, Settings{Digits: 1}).Points[0].MonteCarlo
	fine := propagate(t, []Point{at60()}, Settings{Digits: 2}).Points[0].MonteCarlo
	if !coarse.Stable || !fine.Stable || fine.Trials <= coarse.Trials {
		t.Errorf("one digit: %d trials, stable %v; two digits: %d trials, stable %v", coarse.Trials, coarse.Stable, fine.Trials, fine.Stable)
	}
	// u = 0.055: two digits are 0.001
	near(t, "tolerance", fine.Tolerance, 0.0005, 1e-12)
	near(t, "tolerance of one digit", coarse.Tolerance, 0.005, 1e-12)
	short := propagate(t, []Point{at60()}, Settings{Digits: 2, MaxTrials: 20000}).Points[0].MonteCarlo
	if short.Stable || short.Trials != 20000 {
		t.Errorf("with at most 20000 trials: %d, stable %v", short.Trials, short.Stable)
	}
}

// Errors of size, tension and temperature that calibration and measurement
// share cancel when the particle is of the size of the salt: what is left is
// below a tenth.
func TestSharedErrorsCancel(t *testing.T) {
	alone := at60()
	alone.Dry = Measured{60e-9, 0, 1.8e-9}
	alone.Supersaturation.Independent = 0
	alone.Tension.Systematic = 0.00072
	shared := alone
	shared.Transfer = Transfer{Dry: -1.5, Tension: 1.5}
	r := propagate(t, []Point{alone, shared}, Settings{Trials: 20000})
	a, s := r.Points[0], r.Points[1]
	if !(s.Linear.StandardUncertainty < 0.1*a.Linear.StandardUncertainty) {
		t.Errorf("linear: u %g alone, %g shared", a.Linear.StandardUncertainty, s.Linear.StandardUncertainty)
	}
	if !(s.MonteCarlo.StandardUncertainty < 0.1*a.MonteCarlo.StandardUncertainty) {
		t.Errorf("Monte Carlo: u %g alone, %g shared", a.MonteCarlo.StandardUncertainty, s.MonteCarlo.StandardUncertainty)
	}
}

func TestWeightedMean(t *testing.T) {
	r := propagate(t, []Point{at60(), at60(), at60(), at60()}, Settings{Trials: 50000})
	m := r.Mean
	if m == nil {
		t.Fatal(r.MeanErr)
	}
	near(t, "mean of equals", m.Kappa, r.Points[0].Kappa, 1e-12)
	near(t, "u of four", m.StandardUncertainty, r.Points[0].Linear.StandardUncertainty/2, 1e-12)
	near(t, "χ² of equals", m.ChiSquare, 0, 1e-12)
	near(t, "Monte Carlo u of four", m.MonteCarlo.StandardUncertainty, m.StandardUncertainty, 0.04*m.StandardUncertainty)
	// A systematic part does not average out, in either propagation.
	p := at60()
	p.Supersaturation = Measured{0.004, 0.00002, 0.0002}
	r = propagate(t, []Point{p, p, p, p}, Settings{Trials: 50000})
	near(t, "linear systematic", r.Mean.Systematic, r.Points[0].Linear.Systematic, 1e-12)
	near(t, "Monte Carlo u", r.Mean.MonteCarlo.StandardUncertainty, r.Mean.StandardUncertainty, 0.04*r.Mean.StandardUncertainty)
	// Two points that differ by six times u: χ² = 18 with one degree of freedom.
	e := []Estimate{{Value: Value{Kappa: 0.2}, Linear: Linear{Independent: 0.01}}, {Value: Value{Kappa: 0.26}, Linear: Linear{Independent: 0.01}}}
	mean, err := WeightedMean(e, 0.95)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "χ²", mean.ChiSquare, 18, 1e-9)
	near(t, "probability", mean.Probability, math.Erfc(3), 1e-9) // P(χ²₁ > 18) = erfc(√9)
}

func TestMeansThatAreRefused(t *testing.T) {
	grown := Point{Name: "gf", Method: GrowthRate, Dry: Measured{Value: 1e-7}, Grown: Measured{1.4, 0.02, 0}, Humidity: Measured{0.9, 0.01, 0}, Temperature: Measured{Value: 298.15}}
	bare := at60()
	bare.Dry.Independent, bare.Supersaturation.Independent = 0, 0
	for _, c := range []struct {
		points []Point
		want   error
	}{
		{[]Point{at60()}, ErrFewPoints},
		{[]Point{at60(), grown}, ErrMixed},
		{[]Point{at60(), bare}, ErrNoWeight},
	} {
		r := propagate(t, c.points, Settings{Trials: 100})
		if r.Mean != nil || !errors.Is(r.MeanErr, c.want) {
			t.Errorf("%d points: mean %v, error %v, want %v", len(c.points), r.Mean, r.MeanErr, c.want)
		}
	}
}

func TestAPointWithoutKappaLeavesTheRest(t *testing.T) {
	bad := at60()
	bad.Supersaturation.Value = 0.5
	r := propagate(t, []Point{at60(), bad, at60()}, Settings{Trials: 10000})
	if !errors.Is(r.Points[1].Err, koehler.ErrNoSolution) || r.Points[1].MonteCarlo != nil {
		t.Errorf("bad point: %+v", r.Points[1])
	}
	if r.Points[2].MonteCarlo == nil || r.Mean == nil || r.Mean.Points != 2 || r.Mean.MonteCarlo == nil {
		t.Errorf("the rest: %+v, mean %+v", r.Points[2], r.Mean)
	}
}

// A third of the trials of 0.05 % ± 0.12 % lie below zero and have no κ: the
// median is what it would be, and the count is said.
func TestTrialsWithoutKappaAreCounted(t *testing.T) {
	p := at60()
	p.Dry = Measured{Value: 150e-9}
	p.Supersaturation = Measured{0.0005, 0.0012, 0}
	mc := propagate(t, []Point{p}, Settings{Trials: 100000}).Points[0].MonteCarlo
	near(t, "share above", float64(mc.Above)/1e5, 0.5*math.Erfc(5/12./math.Sqrt2), 0.006)
	if !math.IsInf(mc.Interval.High, 1) {
		t.Errorf("upper end %g, want +Inf", mc.Interval.High)
	}
}

func TestStoppedKeepsWhatThereIs(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	last := int64(0)
	r, err := Propagate(ctx, []Point{at60(), at60()}, Settings{Trials: 2e6, Workers: 2, Progress: func(done, total int64) {
		if done < last || total != 4e6 {
			t.Errorf("progress %d of %d after %d", done, total, last)
		}
		last = done
		if done >= 100000 {
			stop()
		}
	}})
	if !errors.Is(err, context.Canceled) {
		t.Fatalf("error %v", err)
	}
	mc := r.Points[0].MonteCarlo
	if mc == nil || !mc.Stopped || mc.Trials < 100000 || mc.Trials > 200000 || r.Points[1].MonteCarlo != nil {
		t.Errorf("stopped: %+v", mc)
	}
	near(t, "median of the first trials", mc.Median, 0.3973, 2e-3)
}

func TestUnusableSettings(t *testing.T) {
	for _, s := range []Settings{{Coverage: 1}, {Coverage: -1}, {Trials: -1}, {Trials: 7}, {Digits: 3}, {MaxTrials: 5}} {
		if _, err := Propagate(context.Background(), []Point{at60()}, s); !errors.Is(err, koehler.ErrInput) {
			t.Errorf("%+v: error %v", s, err)
		}
	}
	for name, change := range map[string]func(*Point){
		"negative u":   func(p *Point) { p.Dry.Independent = -1 },
		"infinite u":   func(p *Point) { p.Supersaturation.Systematic = math.Inf(1) },
		"no number":    func(p *Point) { p.Dry.Value = math.NaN() },
		"freezing sun": func(p *Point) { p.Temperature.Value = 0 },
		"shape":        func(p *Point) { p.Shape.Value = -1 },
	} {
		p := at60()
		change(&p)
		if e, err := Evaluate(p, 0.95); !errors.Is(err, koehler.ErrInput) || e.Err != err {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// A mobility diameter with a shape factor is a smaller volume, and T moves the
// tension of pure water: κ ∝ (σ/T)³ falls by some 1.6 % a kelvin.
func TestShapeAndTemperature(t *testing.T) {
	p := at60()
	p.Tension = Measured{}
	p.Shape = Measured{1.08, 0.02, 0}
	p.Temperature.Systematic = 1
	e := propagate(t, []Point{p}, Settings{Trials: 20000}).Points[0]
	if plain, _ := Evaluate(at60(), 0.95); !(e.Kappa > 1.05*plain.Kappa) {
		t.Errorf("κ %g with a shape factor of 1.08, %g without", e.Kappa, plain.Kappa)
	}
	for _, c := range e.Linear.Contributions {
		if c.Quantity == Temperature {
			near(t, "d ln κ/dT", c.Sensitivity/e.Kappa, -0.0164, 0.0008)
		}
	}
	near(t, "Monte Carlo against linear", e.MonteCarlo.StandardUncertainty/e.Linear.StandardUncertainty, 1, 0.05)
}
