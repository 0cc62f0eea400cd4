package ledger

import (
	"math"

	"dropcrest/koehler/internal/chunk"
)

// surface is ln y of each outcome as a polynomial of second degree in the inputs,
// each counted in its standard uncertainties:
//
//	ln y = ln y0 + Σ g_i z_i + ½ Σ h_ij z_i z_j
type surface struct {
	inputs int
	zero   Values
	g      []Values // by input
	h      []Values // ½ h_ii, and h_ij for j > i, row by row
}

// surfaceStep is where the inputs are probed, in standard uncertainties: √3, so
// that the fourth moment of a normal distribution is met.
var surfaceStep = math.Sqrt(3)

// surface fits the polynomial to solved curves: two for each input and one for each
// pair.
func (b *Budget) surface(varied []Input) *surface {
	n, t := len(varied), surfaceStep
	f := &surface{inputs: n, zero: logs(b.Answer.Values), g: make([]Values, n)}
	up, down := make([]Values, n), make([]Values, n)
	z := make([]float64, n)
	for i := range varied {
		z[i] = t
		up[i] = logs(b.solved(varied, z))
		z[i] = -t
		down[i] = logs(b.solved(varied, z))
		z[i] = 0
	}
	for i := range varied {
		var own Values
		for o := range own {
			f.g[i][o] = (up[i][o] - down[i][o]) / (2 * t)
			own[o] = (up[i][o] + down[i][o] - 2*f.zero[o]) / (2 * t * t)
		}
		f.h = append(f.h, own)
		for j := i + 1; j < n; j++ {
			z[i], z[j] = t, t
			both := logs(b.solved(varied, z))
			z[i], z[j] = 0, 0
			var cross Values
			for o := range cross {
				cross[o] = (both[o] - up[i][o] - up[j][o] + f.zero[o]) / (t * t)
			}
			f.h = append(f.h, cross)
		}
	}
	return f
}

func logs(v Values) Values {
	for o := range v {
		v[o] = math.Log(v[o])
	}
	return v
}

// at evaluates the polynomial for the outcomes that are wanted.
func (f *surface) at(z []float64, want []Outcome) (y Values) {
	for _, o := range want {
		sum, k := f.zero[o], 0
		for i := range f.inputs {
			row := f.g[i][o]
			for j := i; j < f.inputs; j++ {
				row += z[j] * f.h[k][o]
				k++
			}
			sum += z[i] * row
		}
		y[o] = math.Exp(sum)
	}
	return y
}

// judge returns the largest difference between polynomial and solved curves over a
// few trials, in percent of the linear standard uncertainty. A wanted outcome that the
// answer does not have counts for nothing; one that a trial loses is too much.
func (b *Budget) judge(f *surface, varied []Input, s Settings) float64 {
	random := chunk.Generator(s.Seed, 0)
	z := make([]float64, len(varied))
	worst := 0.0
	for range compared {
		normal(random, z)
		want, got := b.solved(varied, z), f.at(z, Outcomes())
		for _, o := range s.Only {
			y := b.Answer.Values[o]
			if math.IsNaN(y) || b.Combined[o] == 0 {
				continue
			}
			off := 1e4 * math.Abs(got[o]-want[o]) / (y * b.Combined[o])
			if !(off <= worst) {
				worst = off
			}
			if math.IsNaN(off) {
				return math.Inf(1)
			}
		}
	}
	return worst
}
