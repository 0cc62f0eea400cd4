package fit

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/diff/fd"
	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/mat"
)

// The reasons why there is no fit.
var (
	ErrFewPoints    = errors.New("fewer points than parameters")
	ErrUndetermined = errors.New("the points do not determine all parameters")
	ErrNotConverged = errors.New("the fit did not converge")
)

// Residuals fills dst with one residual a point, (curve - measured)/uncertainty,
// at the parameters x. Parameters should be of order 1: take logarithms of
// positive ones.
type Residuals func(dst, x []float64)

// Result is a fit.
type Result struct {
	X                []float64
	Covariance       *mat.SymDense // (JᵀJ)⁻¹, for residuals in units of their standard uncertainty
	SumOfSquares     float64       // χ² for such residuals
	DegreesOfFreedom int           // points - parameters
}

// maxSteps bounds the steps of the search and of its last, undamped part.
const (
	maxSteps    = 100
	polishSteps = 20
)

// A minimum is one where the next undamped step is small: relative to max(1, |x|),
// as for points that lie on the curve, or relative to the uncertainty of the
// parameters, which the relative offset of Bates & Watts 1981 (Technometrics 23,
// 179; from memory, with their 0.001) measures. Central differences leave
// the gradient uncertain at about 1e-10 of the residuals.
const (
	smallStep   = 1e-7
	smallOffset = 1e-3
)

// LeastSquares minimises the sum of the squares of n residuals from start: damped
// steps downhill, then undamped ones by QR while they help. It finds the minimum near start; start from several
// places where there may be more, and compare SumOfSquares.
func LeastSquares(residuals Residuals, n int, start []float64) (Result, error) {
	if n < len(start) {
		return Result{}, ErrFewPoints
	}
	p := problem{residuals: residuals, r: make([]float64, n), jac: mat.NewDense(n, len(start), nil)}
	x := p.search(start)
	step, offset, ok := p.polish(x)
	switch {
	case !ok:
		return Result{}, ErrUndetermined
	case !(step <= smallStep || offset <= smallOffset):
		return Result{}, ErrNotConverged
	}
	return p.result(x)
}

type problem struct {
	residuals Residuals
	r         []float64
	jac       *mat.Dense
}

func (p *problem) sum(x []float64) float64 {
	p.residuals(p.r, x)
	s := floats.Dot(p.r, p.r)
	if math.IsNaN(s) {
		return math.Inf(1)
	}
	return s
}

// jacobian leaves the derivatives at x in p.jac and the residuals in p.r.
func (p *problem) jacobian(x []float64) {
	fd.Jacobian(p.jac, p.residuals, x, &fd.JacobianSettings{Formula: fd.Central})
	p.residuals(p.r, x)
}

// The damping of a step: where it starts, how it falls after a step that helped and
// rises after one that did not, and where the search gives up.
const (
	firstDamping = 1e-3
	fallDamping  = 0.1
	riseDamping  = 4
	leastDamping = 1e-12
	mostDamping  = 1e12
)

// searchDone is the relative gain of the sum, or the step, at which the search
// leaves the rest to polish.
const searchDone = 1e-10

// search goes downhill from start by the steps of Levenberg and Marquardt,
//
//	(JᵀJ + λ diag JᵀJ) step = -Jᵀr,
//
// with λ as small as a falling sum allows. gonum's Newton method on JᵀJ with a line
// search found the same minima in ten times as many evaluations.
func (p *problem) search(start []float64) []float64 {
	k := len(start)
	x, next := append([]float64(nil), start...), make([]float64, k)
	best, damping := p.sum(x), firstDamping
	var normal mat.SymDense
	gradient, step := mat.NewVecDense(k, nil), mat.NewVecDense(k, nil)
	for range maxSteps {
		p.jacobian(x)
		normal.Reset()
		normal.SymOuterK(1, p.jac.T())
		gradient.MulVec(p.jac.T(), mat.NewVecDense(len(p.r), p.r))
		gain, size := 0.0, math.Inf(1)
		for ; gain == 0 && damping < mostDamping; damping *= riseDamping {
			if !damped(step, &normal, gradient, damping) {
				continue
			}
			floats.SubTo(next, x, step.RawVector().Data)
			size = floats.Norm(step.RawVector().Data, math.Inf(1))
			if s := p.sum(next); s < best {
				gain, best = 1-s/best, s
			} else if size < searchDone {
				return x
			}
		}
		if gain == 0 {
			return x
		}
		copy(x, next)
		damping = math.Max(damping*fallDamping/riseDamping, leastDamping)
		if best == 0 || gain < searchDone && size < math.Sqrt(searchDone) {
			return x
		}
	}
	return x
}

// damped solves for one step; false where the matrix is not positive definite.
func damped(step *mat.VecDense, normal *mat.SymDense, gradient *mat.VecDense, damping float64) bool {
	k := gradient.Len()
	a := mat.NewSymDense(k, nil)
	a.CopySym(normal)
	for i := range k {
		a.SetSym(i, i, normal.At(i, i)*(1+damping))
	}
	var chol mat.Cholesky
	return chol.Factorize(a) && chol.SolveVecTo(step, gradient) == nil
}

// polish improves x by undamped steps and returns the size of the next one and its
// relative offset. ok is false where the steps are not determined.
//
// Near the minimum the sum no longer tells x from its neighbours, while the step
// still does: a step that leaves the sum alone is taken as long as steps shrink.
func (p *problem) polish(x []float64) (size, offset float64, ok bool) {
	best, last := p.sum(x), math.Inf(1)
	next := make([]float64, len(x))
	for range polishSteps {
		p.jacobian(x)
		var step, move mat.VecDense
		if err := step.SolveVec(p.jac, mat.NewVecDense(len(p.r), p.r)); err != nil {
			return size, offset, false
		}
		move.MulVec(p.jac, &step)
		offset = relativeOffset(mat.Dot(&move, &move), best, len(p.r), len(x))
		size = 0
		for i := range x {
			next[i] = x[i] - step.AtVec(i)
			size = math.Max(size, math.Abs(step.AtVec(i))/math.Max(1, math.Abs(x[i])))
		}
		s := p.sum(next)
		if !(s < best || s <= best*(1+1e-12) && size < last/2) {
			break
		}
		best, last = s, size
		copy(x, next)
	}
	return size, offset, true
}

// relativeOffset compares the part of the sum of squares that a step can still take
// away with what must remain, each a degree of freedom; +Inf without any.
func relativeOffset(away, sum float64, n, k int) float64 {
	if n == k {
		return math.Inf(1)
	}
	return math.Sqrt(away / float64(k) / ((sum - away) / float64(n-k)))
}

func (p *problem) result(x []float64) (Result, error) {
	p.jacobian(x)
	n, k := p.jac.Dims()
	r := Result{X: x, SumOfSquares: floats.Dot(p.r, p.r), DegreesOfFreedom: n - k}
	var normal mat.SymDense
	normal.SymOuterK(1, p.jac.T())
	var chol mat.Cholesky
	if !chol.Factorize(&normal) {
		return r, ErrUndetermined
	}
	r.Covariance = mat.NewSymDense(k, nil)
	if err := chol.InverseTo(r.Covariance); err != nil {
		return r, ErrUndetermined
	}
	return r, nil
}

// Transformed returns the covariance of other quantities than X, y = to(X), to
// first order: G C Gᵀ with G by central differences. to fills dst, which has
// length n.
func (r Result) Transformed(n int, to func(dst, x []float64)) *mat.SymDense {
	g := mat.NewDense(n, len(r.X), nil)
	fd.Jacobian(g, to, r.X, &fd.JacobianSettings{Formula: fd.Central})
	var half mat.Dense
	half.Mul(g, r.Covariance)
	out := mat.NewSymDense(n, nil)
	for i := range n {
		for j := i; j < n; j++ {
			out.SetSym(i, j, mat.Dot(half.RowView(i), g.RowView(j)))
		}
	}
	return out
}
