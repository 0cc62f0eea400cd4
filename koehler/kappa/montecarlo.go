package kappa

import (
	"context"
	"math"

	"dropcrest/koehler/internal/chunk"
)

// Settings of a propagation. The zero value is adaptive with two digits and a
// coverage of 0.95.
type Settings struct {
	Trials    int     // 0: adaptive, JCGM 101:2008, 7.9
	MaxTrials int     // adaptive only; 0: one million
	Digits    int     // adaptive only: meaningful decimal digits of u(κ), 1 or 2; 0: 2
	Coverage  float64 // of the intervals, above 0 and up to 0.99; 0: 0.95
	Seed      uint64
	Workers   int                     // 0: as many as there are cores. The result is the same for any number
	Progress  func(done, total int64) // trials of all points; total is an upper bound when adaptive; nil: not called
}

// blockTrials is the number of trials of a block, JCGM 101:2008, 7.9.4: at
// least 10000 and at least 100/(1 - coverage). It is the unit of work too.
const blockTrials = 10000

// roundBlocks is how many blocks are run before the adaptive procedure looks at
// them. It must not depend on the number of cores.
const roundBlocks = 8

func (s Settings) coverage() float64 {
	if s.Coverage == 0 {
		return 0.95
	}
	return s.Coverage
}

func (s Settings) digits() int {
	if s.Digits == 0 {
		return 2
	}
	return s.Digits
}

func (s Settings) mostBlocks() int {
	n := s.Trials
	if n == 0 {
		n = s.MaxTrials
	}
	if n == 0 {
		n = 1e6
	}
	return (n + blockTrials - 1) / blockTrials
}

// block is what one block of trials gave.
type block struct {
	trials []float64 // in the order of drawing; kept only where a mean needs them
	sorted []float64
	tally
}

// draw runs one block. Numbers for the systematic parts depend on the block
// alone, so that they are common to all points.
func (m *model) draw(dst *block, seed uint64, point, number, n int, keep bool) {
	own := chunk.Generator(seed, 1, uint64(point), uint64(number))
	all := chunk.Generator(seed, 0, uint64(number))
	var varied, shared [quantities]Quantity
	varies, shares := varied[:0], shared[:0]
	for q := range quantities {
		if m.measured[q].Independent > 0 {
			varies = append(varies, q)
		}
		if m.measured[q].Systematic > 0 {
			shares = append(shares, q)
		}
	}
	// All systematic deviates are drawn, used or not, so that a trial means the
	// same at every point; none where this point has no systematic part.
	dst.sorted = make([]float64, n)
	for i := range dst.sorted {
		x := m.values
		var common inputs
		if len(shares) > 0 {
			var z inputs
			for q := range z {
				z[q] = all.NormFloat64()
			}
			for _, q := range shares {
				common[q] = m.measured[q].Systematic * z[q]
				x[q] += common[q]
			}
		}
		for _, q := range varies {
			x[q] += m.measured[q].Independent * own.NormFloat64()
		}
		dst.sorted[i] = m.trial(&x, &common)
	}
	if keep {
		dst.trials = append(dst.trials, dst.sorted...)
	}
	dst.tally.take(dst.sorted)
}

// run is the Monte Carlo of one point.
type run struct {
	settings Settings
	index    int // of the point
	keep     bool
	progress func(blocks int)
}

// blocks runs blocks until the fixed number is done, the figures are stable or
// the context ends. The error is that of the context.
func (r run) blocks(ctx context.Context, m *model) (done []block, stable bool, tolerance float64, err error) {
	most := r.settings.mostBlocks()
	all := make([]block, most)
	round := most
	if r.settings.Trials == 0 {
		round = roundBlocks
	}
	last := blockTrials
	if r.settings.Trials > 0 {
		last = r.settings.Trials - (most-1)*blockTrials
	}
	for from := 0; from < most; from += round {
		n := min(round, most-from)
		ran, err := chunk.Run(ctx, n, r.settings.Workers, func(i int) {
			trials := blockTrials
			if from+i == most-1 {
				trials = last
			}
			m.draw(&all[from+i], r.settings.Seed, r.index, from+i, trials, r.keep)
		}, func(done int) { r.progress(from + done) })
		if err != nil {
			return all[:from+ran], false, math.NaN(), err
		}
		if r.settings.Trials > 0 {
			continue
		}
		for h := max(2, from+1); h <= from+n; h++ {
			if ok, delta := isStable(all[:h], r.settings.coverage(), r.settings.digits()); ok {
				return all[:h], true, delta, nil
			}
		}
	}
	if r.settings.Trials > 0 {
		return all, false, math.NaN(), nil
	}
	_, delta := isStable(all, r.settings.coverage(), r.settings.digits())
	return all, false, delta, nil
}

// isStable tells whether mean, standard uncertainty and both ends of the
// interval are known to the tolerance of the digits: twice the standard
// deviation of each figure's average over the blocks must be below it (JCGM
// 101:2008, 7.9.4).
func isStable(blocks []block, coverage float64, digits int) (bool, float64) {
	h := float64(len(blocks))
	var sum, square [4]float64
	var whole tally
	for i := range blocks {
		b := &blocks[i]
		whole.merge(b.tally)
		low, high := ends(b.sorted, coverage)
		for j, y := range [4]float64{b.mean, b.deviation(), low, high} {
			sum[j] += y
			square[j] += y * y
		}
	}
	delta := tolerance(whole.deviation(), digits)
	for j := range sum {
		v := (square[j] - sum[j]*sum[j]/h) / (h - 1) / h
		if !(2*math.Sqrt(math.Max(0, v)) <= delta) {
			return false, delta
		}
	}
	return true, delta
}

// tolerance is half a unit of the last of the meaningful digits of u (JCGM
// 101:2008, 7.9.2).
func tolerance(u float64, digits int) float64 {
	if !(u > 0) {
		return 0
	}
	exponent := math.Floor(math.Log10(u)) - float64(digits) + 1
	return 0.5 * math.Pow(10, exponent)
}
