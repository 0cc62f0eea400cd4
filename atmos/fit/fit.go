package fit

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/diff/fd"
	"gonum.org/v1/gonum/floats"
	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/optimize"
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
	maxSteps    = 200
	polishSteps = 20
)

// converged is the largest undamped step, relative to max(1, |x|), at a minimum.
// Central differences leave the gradient uncertain at about 1e-10.
const converged = 1e-7

// LeastSquares minimises the sum of the squares of n residuals from start: damped
// Gauss-Newton (gonum's Newton method on JᵀJ with a line search), then undamped
// steps by QR while they help. It finds the minimum near start; start from several
// places where there may be more, and compare SumOfSquares.
func LeastSquares(residuals Residuals, n int, start []float64) (Result, error) {
	if n < len(start) {
		return Result{}, ErrFewPoints
	}
	p := problem{residuals: residuals, r: make([]float64, n), jac: mat.NewDense(n, len(start), nil)}
	x := p.search(start)
	step, ok := p.polish(x)
	switch {
	case !ok:
		return Result{}, ErrUndetermined
	case !(step <= converged):
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

func (p *problem) search(start []float64) []float64 {
	scale := p.sum(start)
	if !(scale > 0) || math.IsInf(scale, 1) {
		return append([]float64(nil), start...)
	}
	task := optimize.Problem{
		Func: func(x []float64) float64 { return p.sum(x) / scale },
		Grad: func(grad, x []float64) {
			p.jacobian(x)
			g := mat.NewVecDense(len(grad), grad)
			g.MulVec(p.jac.T(), mat.NewVecDense(len(p.r), p.r))
			g.ScaleVec(2/scale, g)
		},
		Hess: func(hess *mat.SymDense, x []float64) {
			p.jacobian(x)
			hess.SymOuterK(2/scale, p.jac.T())
		},
	}
	settings := &optimize.Settings{
		MajorIterations: maxSteps,
		Converger:       &optimize.FunctionConverge{Relative: 1e-10, Iterations: 5},
	}
	// An error is a line search that found nothing lower: what it has reached is
	// judged by polish.
	found, _ := optimize.Minimize(task, start, settings, &optimize.Newton{})
	if found == nil || !(found.F <= 1) {
		return append([]float64(nil), start...)
	}
	return found.X
}

// polish improves x by undamped steps and returns the size of the last one. ok
// is false where the steps are not determined.
//
// Near the minimum the sum no longer tells x from its neighbours, while the step
// still does: a step that leaves the sum alone is taken as long as steps shrink.
func (p *problem) polish(x []float64) (size float64, ok bool) {
	best, last := p.sum(x), math.Inf(1)
	next := make([]float64, len(x))
	for range polishSteps {
		p.jacobian(x)
		var step mat.VecDense
		if err := step.SolveVec(p.jac, mat.NewVecDense(len(p.r), p.r)); err != nil {
			return size, false
		}
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
	return size, true
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
