package aerosol

import (
	"fmt"
	"math"
	"sort"

	"dropcrest/atmos/fit"
	"gonum.org/v1/gonum/mat"
)

// ModeFit is modes fitted to bins, in the order of their medians.
type ModeFit struct {
	Modes Modes
	// Covariance of N, Dg and σ_g of the first mode, then of the next, in SI units.
	// Without uncertainties of the bins it is scaled with the scatter about the fit,
	// and nil where no degree of freedom is left to see it.
	Covariance       *mat.SymDense
	ReducedChiSquare float64 // NaN without degrees of freedom
	DegreesOfFreedom int
}

// The uncertainty of a bin that FitModes assumes where none is given: a share of
// its count and a share of the fullest bin (own choice).
const (
	binShare     = 0.05
	fullestShare = 0.002
)

// MostModes bounds the number of modes of a fit.
const MostModes = 8

// FitModes fits n modes, 1 to 8, to the counts of the bins by least squares.
// uncertainties are the standard uncertainties of the counts (1/m³, > 0); nil
// stands for 5 % of each and 0.2 % of the fullest bin. An error wraps ErrInput or
// one of package fit.
func FitModes(b *Bins, n int, uncertainties []float64) (ModeFit, error) {
	if n < 1 || n > MostModes {
		return ModeFit{}, &InputError{"number of modes", -1, float64(n), "1 to 8"}
	}
	weights, err := binWeights(b, uncertainties)
	if err != nil {
		return ModeFit{}, err
	}
	residuals := func(dst, x []float64) {
		modes := modesOf(x)
		for i := range dst {
			dst[i] = (modes.Between(b.grid.edges[i], b.grid.edges[i+1]) - b.counts[i]) * weights[i]
		}
	}
	var best fit.Result
	var failed error
	for _, start := range modeStarts(b, n) {
		r, err := fit.LeastSquares(residuals, len(b.counts), start)
		if err != nil {
			failed = err
		} else if best.X == nil || r.SumOfSquares < best.SumOfSquares {
			best = r
		}
	}
	if best.X == nil {
		return ModeFit{}, fmt.Errorf("%d modes through %d bins: %w", n, len(b.counts), failed)
	}
	return modeFit(best, uncertainties != nil), nil
}

func binWeights(b *Bins, uncertainties []float64) ([]float64, error) {
	fullest := 0.0
	for _, n := range b.counts {
		fullest = math.Max(fullest, n)
	}
	if fullest == 0 {
		return nil, &InputError{"number of particles", -1, 0, "above 0"}
	}
	if uncertainties != nil && len(uncertainties) != len(b.counts) {
		return nil, &InputError{"number of uncertainties", -1, float64(len(uncertainties)), "one a bin"}
	}
	weights := make([]float64, len(b.counts))
	for i, n := range b.counts {
		weights[i] = 1 / (binShare*n + fullestShare*fullest)
		if uncertainties != nil {
			if !(uncertainties[i] > 0) {
				return nil, &InputError{"uncertainty of bin", i, uncertainties[i], "above 0"}
			}
			weights[i] = 1 / uncertainties[i]
		}
	}
	return weights, nil
}

// modesOf reads ln N, ln Dg and ln ln σ_g of each mode, which keep all three
// where they belong.
func modesOf(x []float64) Modes {
	modes := make(Modes, len(x)/3)
	for i := range modes {
		modes[i] = Mode{math.Exp(x[3*i]), math.Exp(x[3*i+1]), math.Exp(math.Exp(x[3*i+2]))}
	}
	return modes
}

// modeStarts are places to start from: modes at equal shares of the number, and
// at equal distances in ln D between the sizes that hold 1 and 99 % of it, narrow
// and wide.
func modeStarts(b *Bins, n int) [][]float64 {
	number := b.Number()
	quantile := func(share float64) float64 {
		d, _, _ := b.WidestAbove(number * share)
		return math.Log(d)
	}
	lo, hi := quantile(0.99), quantile(0.01)
	width := math.Log(math.Max((hi-lo)/(4*float64(n)), 0.05))
	var starts [][]float64
	for _, byNumber := range []bool{true, false} {
		for _, wider := range []float64{0, 0.5} {
			x := make([]float64, 3*n)
			for i := range n {
				at := (float64(i) + 0.5) / float64(n)
				x[3*i], x[3*i+2] = math.Log(number/float64(n)), width+wider
				if x[3*i+1] = lo + at*(hi-lo); byNumber {
					x[3*i+1] = quantile(1 - at)
				}
			}
			starts = append(starts, x)
		}
	}
	return starts
}

func modeFit(r fit.Result, absolute bool) ModeFit {
	// sorted by median, in the parameters too, so that the covariance follows
	n := len(r.X) / 3
	order := make([]int, n)
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(i, j int) bool { return r.X[3*order[i]+1] < r.X[3*order[j]+1] })
	natural := func(dst, x []float64) {
		modes := modesOf(x)
		for i, from := range order {
			dst[3*i], dst[3*i+1], dst[3*i+2] = modes[from].Concentration, modes[from].Median, modes[from].GSD
		}
	}
	f := ModeFit{DegreesOfFreedom: r.DegreesOfFreedom, ReducedChiSquare: math.NaN()}
	modes := modesOf(r.X)
	for _, from := range order {
		f.Modes = append(f.Modes, modes[from])
	}
	if f.DegreesOfFreedom > 0 {
		f.ReducedChiSquare = r.SumOfSquares / float64(f.DegreesOfFreedom)
	}
	f.Covariance = r.Transformed(len(r.X), natural)
	switch {
	case absolute:
	case f.DegreesOfFreedom > 0:
		f.Covariance.ScaleSym(f.ReducedChiSquare, f.Covariance)
	default:
		f.Covariance = nil
	}
	return f
}
