package ledger

import (
	"context"
	"math"
	"math/rand/v2"
	"slices"

	"dropcrest/koehler"
	"dropcrest/koehler/internal/chunk"
)

// Settings of the Monte Carlo propagation.
type Settings struct {
	Trials   int     // 0: 100000
	Coverage float64 // of the intervals, above 0 and up to 0.999; 0: 0.95
	Seed     uint64
	Workers  int // 0: as many as there are cores. The result is the same for any number
	// Rough is what the polynomial of MonteCarlo may be off by, in standard
	// uncertainties, before each trial is solved by itself; 0: 0.05.
	Rough float64
	// Only are the outcomes that are wanted, which takes less time than all; nil: all.
	Only []Outcome
	// Solved is the largest number of trials that are solved one by one; 0: 4000.
	Solved int
}

// Distribution is what the trials say about one outcome.
type Distribution struct {
	Mean, Median        float64
	StandardUncertainty float64
	Percent             float64 // StandardUncertainty in percent of the fullest answer
	Low, High           float64 // as much left out below as above
	Lost                int     // trials without the outcome
}

// MonteCarlo is the result of a propagation by trials, JCGM 101:2008.
type MonteCarlo struct {
	Outcomes [outcomes]Distribution // NaN where the answer has none, or it is not wanted
	Trials   int
	Coverage float64
	// Direct: every trial solved its own curve. Otherwise the logarithm of each
	// outcome is taken as a polynomial of second degree in the inputs, which was
	// compared with solved curves: Deviation is the largest difference, percent of
	// the outcome's standard uncertainty.
	Direct    bool
	Deviation float64
}

const (
	usualTrials = 100000
	// directTrials is the largest number of trials that are usually solved one by one.
	directTrials = 4000
	// pieceTrials is the unit of work. It must not depend on the number of cores.
	pieceTrials = 4000
	// compared is the number of trials by which the polynomial is judged, and
	// largestDeviation what it usually may be off by there, of a standard uncertainty.
	compared         = 32
	largestDeviation = 0.05
)

// MonteCarlo propagates the inputs of the budget by trials, all inputs normal. When
// the context ends, its error is returned. Other errors are those of the settings
// and wrap koehler.ErrInput.
func (b *Budget) MonteCarlo(ctx context.Context, s Settings) (MonteCarlo, error) {
	s, err := s.completed()
	if err != nil {
		return MonteCarlo{}, err
	}
	varied := slices.DeleteFunc(slices.Clone(b.inputs), func(in Input) bool { return in.StandardUncertainty == 0 })
	m := MonteCarlo{Trials: s.Trials, Coverage: s.Coverage}
	f := b.surface(varied)
	m.Deviation = b.judge(f, varied, s)
	trial := func(z []float64) Values { return f.at(z, s.Only) }
	if !(m.Deviation <= 100*s.Rough) {
		m.Direct, m.Trials, m.Deviation = true, min(s.Trials, s.Solved), 0
		trial = func(z []float64) Values { return b.solved(varied, z) }
	}
	all, err := draw(ctx, s, m.Trials, len(varied), trial)
	if err != nil {
		return MonteCarlo{}, err
	}
	for o := range m.Outcomes {
		m.Outcomes[o] = nothing(0)
	}
	_, err = chunk.Run(ctx, len(s.Only), s.Workers, func(i int) {
		o := s.Only[i]
		m.Outcomes[o] = describe(all[o], s.Coverage, b.Answer.Values[o])
	}, nil)
	return m, err
}

// completed returns the settings with their defaults, or what is wrong with them.
func (s Settings) completed() (Settings, error) {
	if s.Trials == 0 {
		s.Trials = usualTrials
	}
	if s.Coverage == 0 {
		s.Coverage = 0.95
	}
	if s.Rough == 0 {
		s.Rough = largestDeviation
	}
	if s.Only == nil {
		s.Only = Outcomes()
	}
	if s.Solved == 0 {
		s.Solved = directTrials
	}
	switch {
	case slices.ContainsFunc(s.Only, func(o Outcome) bool { return o < 0 || o >= outcomes }):
		return s, &koehler.RangeError{What: "outcome", Value: float64(slices.Max(s.Only)), Right: "one of Outcomes"}
	case s.Solved < 100:
		return s, &koehler.RangeError{What: "number of solved trials", Value: float64(s.Solved), Right: "100 or more, or 0 for 4000"}
	case !(s.Rough > 0):
		return s, &koehler.RangeError{What: "roughness", Value: s.Rough, Right: "above 0 standard uncertainties, or 0 for 0.05"}
	case s.Trials < 100:
		return s, &koehler.RangeError{What: "number of trials", Value: float64(s.Trials), Right: "100 or more, or 0 for 100000"}
	case !(s.Coverage > 0 && s.Coverage <= 0.999):
		return s, &koehler.RangeError{What: "coverage", Value: s.Coverage, Right: "above 0 and at most 0.999"}
	}
	return s, nil
}

// draw runs the trials in pieces, each with its own generator.
func draw(ctx context.Context, s Settings, trials, inputs int, trial func(z []float64) Values) (all [outcomes][]float64, err error) {
	for _, o := range s.Only {
		all[o] = make([]float64, trials)
	}
	pieces := (trials + pieceTrials - 1) / pieceTrials
	_, err = chunk.Run(ctx, pieces, s.Workers, func(piece int) {
		random := chunk.Generator(s.Seed, 1, uint64(piece))
		z := make([]float64, inputs)
		for i := piece * pieceTrials; i < min(trials, (piece+1)*pieceTrials); i++ {
			y := trial(normal(random, z))
			for _, o := range s.Only {
				all[o][i] = y[o]
			}
		}
	}, nil)
	return all, err
}

func normal(random *rand.Rand, z []float64) []float64 {
	for i := range z {
		z[i] = random.NormFloat64()
	}
	return z
}

// solved solves the curve of one trial, inputs off by z standard uncertainties.
func (b *Budget) solved(varied []Input, z []float64) Values {
	var x Deviation
	for i, in := range varied {
		x[in.Quantity] = z[i] * in.StandardUncertainty
	}
	return b.model(&x)
}

// nothing is the distribution of an outcome that there is not.
func nothing(lost int) Distribution {
	nan := math.NaN()
	return Distribution{Mean: nan, Median: nan, StandardUncertainty: nan, Percent: nan, Low: nan, High: nan, Lost: lost}
}

// describe sums up the trials of one outcome, whose order it changes.
func describe(y []float64, coverage, value float64) Distribution {
	n := len(y)
	y = slices.DeleteFunc(y, math.IsNaN)
	d := Distribution{Lost: n - len(y)}
	if len(y) < 2 || math.IsNaN(value) {
		return nothing(d.Lost)
	}
	sum, square := 0.0, 0.0
	for _, v := range y { // about the value: narrow distributions keep their digits
		sum += v - value
		square += (v - value) * (v - value)
	}
	k := float64(len(y))
	d.Mean = value + sum/k
	d.StandardUncertainty = math.Sqrt(math.Max(0, square-sum*sum/k) / (k - 1))
	d.Percent = 100 * d.StandardUncertainty / value
	rank := func(p float64) int { return int(p*(k-1) + 0.5) }
	low, middle, high := rank((1-coverage)/2), rank(0.5), rank((1+coverage)/2)
	d.Low = ranked(y, low)
	d.Median = ranked(y[low:], middle-low)
	d.High = ranked(y[middle:], high-middle)
	return d
}

// ranked returns the value that would stand at k if y were sorted, and leaves y
// with no larger value before it and no smaller one after it (Hoare, Comm. ACM 4,
// 321, 1961), which is less work than sorting.
func ranked(y []float64, k int) float64 {
	for low, high := 0, len(y)-1; low < high; {
		pivot := y[low+(high-low)/2]
		i, j := low, high
		for i <= j {
			for y[i] < pivot {
				i++
			}
			for pivot < y[j] {
				j--
			}
			if i <= j {
				y[i], y[j] = y[j], y[i]
				i++
				j--
			}
		}
		switch {
		case k <= j:
			high = j
		case k >= i:
			low = i
		default:
			return y[k]
		}
	}
	return y[k]
}
