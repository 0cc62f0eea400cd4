package kappa

import (
	"context"
	"fmt"
	"math"

	"dropcrest/koehler"
	"dropcrest/koehler/internal/chunk"
)

// Estimate is the κ of one point.
type Estimate struct {
	Name       string
	Method     Method
	Value              // under the actual temperature and tension; Classic is NaN for growth factors
	At25C      float64 // the same measurement under At25C; NaN where that has no κ
	Linear     Linear
	MonteCarlo *Distribution // nil: not asked for
	Err        error         // why there is no κ; the other fields are then NaN or empty
}

// Result is what Propagate returns.
type Result struct {
	Points []Estimate
	Mean   *Mean // nil: MeanErr says why
	// MeanErr is ErrFewPoints, ErrMixed or a NoWeightError.
	MeanErr error
}

// Evaluate returns the κ of a point and its linear propagation. An error, which
// the estimate has too, wraps one of those of package koehler.
func Evaluate(p Point, coverage float64) (Estimate, error) {
	e := Estimate{Name: p.Name, Method: p.Method, Value: Value{math.NaN(), math.NaN()}, At25C: math.NaN()}
	if e.Err = p.Check(); e.Err != nil {
		return e, e.Err
	}
	m := newModel(&p)
	if e.Value, e.Err = m.value(); e.Err != nil {
		return e, e.Err
	}
	var still inputs
	dry, _, s := m.ready(&m.values, &still)
	if at, err := m.under(dry, s, At25C(), At25C().Kelvin()); err == nil {
		e.At25C = at.Kappa
	}
	e.Linear = m.linear(e.Kappa, coverage)
	return e, nil
}

// Propagate returns the κ of the points with their uncertainty by linear
// propagation and by Monte Carlo, and their weighted mean. A point that has no κ
// keeps its error and the others go on.
//
// When the context ends, what was done so far is returned with its error:
// distributions of fewer trials are marked Stopped, and points not reached have
// none. Other errors are those of the settings and wrap koehler.ErrInput.
//
// Linear propagation alone is Evaluate and WeightedMean.
func Propagate(ctx context.Context, points []Point, s Settings) (Result, error) {
	if err := s.check(); err != nil {
		return Result{}, err
	}
	r := Result{Points: make([]Estimate, len(points))}
	for i, p := range points {
		r.Points[i], _ = Evaluate(p, s.coverage())
	}
	mean, meanErr := WeightedMean(r.Points, s.coverage())
	if r.MeanErr = meanErr; meanErr == nil {
		r.Mean = &mean
	}
	err := r.trials(ctx, points, s)
	return r, err
}

func (s Settings) check() error {
	switch c := s.coverage(); {
	case !(c > 0 && c <= 0.99):
		return &koehler.RangeError{What: "coverage", Value: c, Right: "above 0 and at most 0.99"}
	case s.Trials < 0 || s.Trials > 0 && s.Trials < 100:
		return &koehler.RangeError{What: "number of trials", Value: float64(s.Trials), Right: "100 or more, or 0 for as many as are needed"}
	case s.MaxTrials < 0 || s.MaxTrials > 0 && s.MaxTrials < 2*blockTrials:
		return &koehler.RangeError{What: "largest number of trials", Value: float64(s.MaxTrials), Right: fmt.Sprintf("%d or more", 2*blockTrials)}
	case s.digits() < 1 || s.digits() > 2:
		return &koehler.RangeError{What: "number of digits", Value: float64(s.Digits), Right: "1 or 2"}
	}
	return nil
}

// trials adds the distributions, point by point.
func (r *Result) trials(ctx context.Context, points []Point, s Settings) error {
	total := int64(s.mostBlocks()) * int64(len(points))
	var meanTrials [][]float64
	common, used := math.MaxInt, 0 // blocks that all points have; points in the mean so far
	for i := range r.Points {
		e := &r.Points[i]
		if e.Err != nil || len(e.Linear.Contributions) == 0 {
			continue
		}
		run := run{settings: s, index: i, keep: r.Mean != nil, progress: func(blocks int) {
			if s.Progress != nil {
				s.Progress((int64(i)*int64(s.mostBlocks())+int64(blocks))*blockTrials, total*blockTrials)
			}
		}}
		blocks, stable, delta, err := run.blocks(ctx, newModel(&points[i]))
		if len(blocks) > 0 {
			e.MonteCarlo = distribution(blocks, s.coverage())
			e.MonteCarlo.Stable, e.MonteCarlo.Tolerance, e.MonteCarlo.Stopped = stable, delta, err != nil
			e.MonteCarlo.compare(e.Linear)
		}
		if err != nil {
			return err
		}
		if r.Mean != nil {
			meanTrials = addWeighted(meanTrials, blocks, r.Mean.weights[used])
			common = min(common, len(blocks))
			used++
		}
	}
	if r.Mean != nil && used == r.Mean.Points {
		return r.meanTrials(ctx, meanTrials[:common], s)
	}
	return nil
}

// compare fills Agrees.
func (d *Distribution) compare(l Linear) {
	delta := tolerance(d.StandardUncertainty, 2)
	d.Agrees = math.Abs(d.Interval.Low-l.Interval.Low) <= delta && math.Abs(d.Interval.High-l.Interval.High) <= delta
}

// addWeighted adds a point's trials to those of the mean, block by block.
func addWeighted(sum [][]float64, blocks []block, weight float64) [][]float64 {
	if sum == nil {
		sum = make([][]float64, len(blocks))
	}
	for i := range min(len(sum), len(blocks)) {
		if sum[i] == nil {
			sum[i] = make([]float64, len(blocks[i].trials))
		}
		for j, y := range blocks[i].trials {
			sum[i][j] += weight * y
		}
	}
	return sum
}

func (r *Result) meanTrials(ctx context.Context, trials [][]float64, s Settings) error {
	blocks := make([]block, len(trials))
	ran, err := chunk.Run(ctx, len(blocks), s.Workers, func(i int) {
		blocks[i].sorted = trials[i]
		blocks[i].tally.take(trials[i])
	}, nil)
	if ran > 0 {
		r.Mean.MonteCarlo = distribution(blocks[:ran], s.coverage())
		r.Mean.MonteCarlo.compare(Linear{Interval: r.Mean.Interval})
		r.Mean.MonteCarlo.Stopped = err != nil
	}
	return err
}
