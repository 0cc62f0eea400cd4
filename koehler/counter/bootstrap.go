package counter

import (
	"context"
	"math"
	"slices"

	"dropcrest/koehler/internal/chunk"

	"gonum.org/v1/gonum/stat/distuv"
)

// resample returns the midpoint of the curve fitted to counts that are drawn anew
// from the curve itself (parametric bootstrap of the conditional likelihood: n is
// kept, CCN is binomial). Numbers depend on seed, scan and replicate alone. It is
// NaN where that fit does not settle.
func (f *Fit) resample(seed uint64, scan, replicate int) float64 {
	source := chunk.Source(seed, uint64(scan), uint64(replicate))
	like := f.like
	like.samples = slices.Clone(f.like.samples)
	for i := range like.samples {
		s := &like.samples[i]
		eta, _ := f.like.logRatio(s, &f.best)
		s.ccn = distuv.Binomial{N: math.Round(s.n), P: 1 / (1 + math.Exp(-eta)), Src: source}.Rand()
		s.n = math.Round(s.n)
	}
	best, _, _, ok := like.climb(f.best)
	if !ok {
		return math.NaN()
	}
	return math.Exp(best[middle])
}

// Bootstrap is the spread of a figure over resampled counts.
type Bootstrap struct {
	Replicates int // that settled
	Mean       float64
	Deviation  float64 // standard deviation
	Low, High  float64 // quantiles of 0.025 and 0.975
}

// summarise describes the finite values; it sorts them.
func summarise(values []float64) Bootstrap {
	good := slices.DeleteFunc(slices.Clone(values), math.IsNaN)
	slices.Sort(good)
	b := Bootstrap{Replicates: len(good)}
	if len(good) < 2 {
		return b
	}
	for _, v := range good {
		b.Mean += v / float64(len(good))
	}
	for _, v := range good {
		b.Deviation += (v - b.Mean) * (v - b.Mean) / float64(len(good)-1)
	}
	b.Deviation = math.Sqrt(b.Deviation)
	at := func(p float64) float64 { return good[min(len(good)-1, int(p*float64(len(good))))] }
	b.Low, b.High = at(0.025), at(0.975)
	return b
}

// Bootstrap resamples the counts of the scan from its curve and fits them again.
// It is a check of the Covariance, free of its linearisation. When the context ends
// it returns what is done, with the error of the context.
func (f *Fit) Bootstrap(ctx context.Context, replicates int, seed uint64, workers int) (Bootstrap, error) {
	values := make([]float64, replicates)
	ran, err := chunk.Run(ctx, replicates, workers, func(i int) { values[i] = f.resample(seed, 0, i) }, nil)
	return summarise(values[:ran]), err
}
