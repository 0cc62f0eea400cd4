package counter

import (
	"cmp"
	"math"
	"slices"
)

// The parameters of a curve, in this order.
const (
	middle  = iota // ln of the setting at half activation
	spread         // ln of the width in ln of the setting
	plateau        // ln of the efficiency
	double         // share of doubly charged particles, or the lower plateau
	parameters
)

type vector [parameters]float64
type matrix [parameters]vector

// step is one kind of particles: it is active at settings where the middle is
// below ln x + shift. Its share is fixed + perDouble times the double parameter.
type step struct{ shift, fixed, perDouble float64 }

// sample is a point made ready for the likelihood.
type sample struct {
	x      float64 // ln of the setting
	ccn, n float64 // n = CN + CCN
	offset float64 // ln of what ρ has besides plateau and activated fraction
	steps  [maxSteps]step
	kinds  int
}

// everywhere is the shift of particles that are active at any setting.
const everywhere = 1e6

// falseFraction is the activated fraction of a dead particle. It keeps a stray
// count at a small size from forbidding a curve altogether.
const falseFraction = 1e-6

// likelihood is the conditional one of counts in two instruments. CN and CCN are
// independent Poisson counts of means μ and ρμ; given their sum n, CCN is binomial
// with the probability ρ/(1+ρ), in which μ has dropped out:
//
//	ρ = plateau × flow and time ratio / CN efficiency × activated fraction
//
// With η = ln ρ this is a logistic regression, whose score is Σ (CCN - nπ) dη and
// whose information is Σ nπ(1-π) dη dηᵀ.
type likelihood struct {
	samples  []sample
	logistic bool
	free     [parameters]bool
	// narrowest is the least width: below a tenth of the distance of the settings
	// the counts say nothing about it, and the step is somewhere between two of them.
	narrowest float64
}

// hazy is |z| beyond which a step is 0 or 1 to rounding.
const hazy = 38

// step returns the curve at z and its derivative.
func (l *likelihood) step(z float64) (h, slope float64) {
	switch {
	case z > hazy:
		return 1, 0
	case z < -hazy:
		return 0, 0
	case l.logistic:
		h = 1 / (1 + math.Exp(-z))
		return h, h * (1 - h)
	}
	return 0.5 * math.Erfc(-z/math.Sqrt2), math.Exp(-0.5*z*z) / math.Sqrt(2*math.Pi)
}

// logRatio returns η = ln ρ and its derivatives.
func (l *likelihood) logRatio(s *sample, t *vector) (eta float64, d vector) {
	w := math.Exp(-t[spread])
	f := falseFraction
	for i := range s.kinds {
		k := &s.steps[i]
		share := k.fixed + t[double]*k.perDouble
		z := (s.x + k.shift - t[middle]) * w
		h, slope := l.step(z)
		f += share * h
		d[middle] -= share * slope * w
		d[spread] -= share * slope * z
		d[double] += k.perDouble * h
	}
	d[middle] /= f
	d[spread] /= f
	d[double] /= f
	d[plateau] = 1
	return t[plateau] + s.offset + math.Log(f), d
}

// value returns the logarithm of the likelihood less that of the counts themselves,
// so that it is minus half the deviance.
func (l *likelihood) value(t *vector) float64 {
	sum := 0.0
	for i := range l.samples {
		s := &l.samples[i]
		eta, _ := l.logRatio(s, t)
		sum += s.deviance(eta)
	}
	return -sum / 2
}

// deviance of one sample for η.
func (s *sample) deviance(eta float64) float64 {
	share := s.ccn / s.n
	log1p := math.Log1p(math.Exp(-math.Abs(eta)))
	lnp, lnq := -log1p, -eta-log1p // ln π and ln(1-π)
	if eta < 0 {
		lnp, lnq = eta-log1p, -log1p
	}
	d := 0.0
	if share > 0 {
		d += s.ccn * (math.Log(share) - lnp)
	}
	if share < 1 {
		d += (s.n - s.ccn) * (math.Log1p(-share) - lnq)
	}
	return math.Max(0, 2*d)
}

// slope returns value, score and information.
func (l *likelihood) slope(t *vector) (value float64, score vector, info matrix) {
	for i := range l.samples {
		s := &l.samples[i]
		eta, d := l.logRatio(s, t)
		value -= s.deviance(eta) / 2
		p := 1 / (1 + math.Exp(-eta))
		miss, weight := s.ccn-s.n*p, s.n*p*(1-p)
		for a := range d {
			if !l.free[a] {
				continue
			}
			score[a] += miss * d[a]
			for b := range a + 1 {
				if l.free[b] {
					info[a][b] += weight * d[a] * d[b]
				}
			}
		}
	}
	for a := range info {
		for b := range a {
			info[b][a] = info[a][b]
		}
		if !l.free[a] {
			info[a][a] = 1
		}
	}
	return value, score, info
}

// Bounds of the parameters. A width of 0.001 is far below that of any classifier.
const (
	leastWidth = 1e-3
	mostWidth  = 2.0
	leastShare = 1e-5
	mostShare  = 0.45
)

// climbDone is the gain in ln likelihood that the last step promised: a step of
// 0.001 standard deviations gains 5e-7, and what is left after it is its square.
const climbDone = 1e-8

// nearlyDone is the gain at which a climb that creeps along a flat ridge is taken as
// settled all the same: 0.01 standard deviations.
const nearlyDone = 5e-5

// climb maximises the likelihood from a start by Fisher scoring, damped as by
// Levenberg and Marquardt. It reports false where it does not settle.
func (l *likelihood) climb(t vector) (best vector, value float64, info matrix, ok bool) {
	t[spread] = math.Max(t[spread], math.Log(l.narrowest))
	value, score, info := l.slope(&t)
	damping, gain := 1e-6, math.Inf(1)
	for range 100 {
		damped, push := l.pinned(&t, info, score)
		for a := range damped {
			damped[a][a] += damping * (damped[a][a] + 1)
		}
		move, solved := solve(damped, push)
		if !solved {
			if damping = damping*10 + 1e-6; damping > 1e12 {
				return t, value, info, false
			}
			continue
		}
		next := l.bounded(t, move)
		gain = 0
		for a := range score {
			gain += score[a] * (next[a] - t[a])
		}
		if math.Abs(gain) <= climbDone {
			return t, value, info, true
		}
		v, g, f := l.slope(&next)
		if v >= value {
			t, value, score, info = next, v, g, f
			damping = math.Max(damping/10, 1e-9)
			continue
		}
		if damping *= 10; damping > 1e12 {
			return t, value, info, true // no step gains anything: rounding
		}
	}
	return t, value, info, gain <= nearlyDone
}

// pinned holds the parameters that stand at a bound and want to go beyond it, so
// that the others find their best there.
func (l *likelihood) pinned(t *vector, info matrix, score vector) (matrix, vector) {
	pin := func(a int) {
		score[a] = 0
		for b := range info {
			info[a][b], info[b][a] = 0, 0
		}
		info[a][a] = 1
	}
	if t[double] <= leastShare && score[double] < 0 || t[double] >= mostShare && score[double] > 0 {
		pin(double)
	}
	if w := math.Exp(t[spread]); w <= l.narrowest*1.0001 && score[spread] < 0 || w >= mostWidth*0.9999 && score[spread] > 0 {
		pin(spread)
	}
	return info, score
}

// bounded is t moved, at most half a unit in each direction and inside the bounds.
func (l *likelihood) bounded(t, move vector) vector {
	for a := range t {
		t[a] += math.Max(-0.5, math.Min(0.5, move[a]))
	}
	t[spread] = math.Max(math.Log(l.narrowest), math.Min(math.Log(mostWidth), t[spread]))
	t[double] = math.Max(leastShare, math.Min(mostShare, t[double]))
	return t
}

// solve solves a x = b for a positive definite matrix by Cholesky's method.
func solve(a matrix, b vector) (x vector, ok bool) {
	for i := range a {
		for j := range i + 1 {
			sum := a[i][j]
			for k := range j {
				sum -= a[i][k] * a[j][k]
			}
			if i != j {
				a[i][j] = sum / a[j][j]
				continue
			}
			if !(sum > 0) || math.IsInf(sum, 1) {
				return x, false
			}
			a[i][i] = math.Sqrt(sum)
		}
	}
	for i := range b {
		for k := range i {
			b[i] -= a[i][k] * b[k]
		}
		b[i] /= a[i][i]
	}
	for i := parameters - 1; i >= 0; i-- {
		for k := i + 1; k < parameters; k++ {
			b[i] -= a[k][i] * b[k]
		}
		b[i] /= a[i][i]
	}
	return b, true
}

// leastInformation keeps the covariance finite where the counts say nothing about
// a parameter: a standard uncertainty of 1000 in its logarithm.
const leastInformation = 1e-6

// inverse of an information matrix; the rows of fixed parameters are 0.
func (l *likelihood) inverse(info matrix) (cov matrix, ok bool) {
	for a := range info {
		info[a][a] += leastInformation
	}
	for a := range info {
		var unit vector
		unit[a] = 1
		if cov[a], ok = solve(info, unit); !ok {
			return cov, false
		}
		if !l.free[a] {
			cov[a] = vector{}
		}
	}
	return cov, true
}

func sortedPoints(points []Point) []Point {
	sorted := slices.Clone(points)
	slices.SortStableFunc(sorted, func(a, b Point) int { return cmp.Compare(a.Setting, b.Setting) })
	return sorted
}
