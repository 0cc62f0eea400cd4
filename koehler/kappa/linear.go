package kappa

import (
	"math"
	"slices"
	"sort"

	"gonum.org/v1/gonum/stat/distuv"
)

// Interval is a coverage interval.
type Interval struct{ Low, High float64 }

// Contribution is the part of the uncertainty that one input makes.
type Contribution struct {
	Quantity    Quantity
	Systematic  bool
	Sensitivity float64 // ∂κ/∂x, per SI unit of the quantity, through the calibration too where it is systematic
	Relative    float64 // ∂ ln κ/∂ ln x
	Uncertainty float64 // standard uncertainty of the input
	Share       float64 // of the variance of κ
}

// Signed returns the contribution to κ with its sign: sensitivity times
// uncertainty.
func (c Contribution) Signed() float64 { return c.Sensitivity * c.Uncertainty }

// Linear is the law of propagation of uncertainty, JCGM 100:2008, 5.1.2.
type Linear struct {
	StandardUncertainty float64 // of κ, absolute
	Independent         float64 // part of this point alone
	Systematic          float64 // part common to all points
	Interval            Interval
	Contributions       []Contribution // the largest first
}

// derivativeStep is the relative step of the central differences. κ is inverted
// to some 1e-14, so that rounding leaves 1e-9 and the third derivative less.
const derivativeStep = 1e-5

// linear propagates the uncertainties of a point whose κ is known.
func (m *model) linear(kappa, coverage float64) Linear {
	var l Linear
	for q := range quantities {
		u := m.measured[q]
		if u.Independent > 0 {
			l.add(m.contribution(q, false, u.Independent, kappa))
		}
		if u.Systematic > 0 {
			l.add(m.contribution(q, true, u.Systematic, kappa))
		}
	}
	l.StandardUncertainty = math.Hypot(l.Independent, l.Systematic)
	for i := range l.Contributions {
		c := &l.Contributions[i]
		if l.StandardUncertainty > 0 {
			c.Share = c.Signed() * c.Signed() / (l.StandardUncertainty * l.StandardUncertainty)
		}
	}
	sort.SliceStable(l.Contributions, func(i, j int) bool { return l.Contributions[i].Share > l.Contributions[j].Share })
	k := distuv.UnitNormal.Quantile((1 + coverage) / 2)
	l.Interval = Interval{kappa - k*l.StandardUncertainty, kappa + k*l.StandardUncertainty}
	return l
}

func (l *Linear) add(c Contribution) {
	l.Contributions = append(l.Contributions, c)
	if c.Systematic {
		l.Systematic = math.Hypot(l.Systematic, c.Signed())
	} else {
		l.Independent = math.Hypot(l.Independent, c.Signed())
	}
}

// contribution differentiates by central differences, one-sided where a step
// leaves the range of κ.
func (m *model) contribution(q Quantity, systematic bool, u, kappa float64) Contribution {
	h := derivativeStep * math.Abs(m.values[q])
	at := func(step float64) (k, moved float64) {
		x, common := m.values, inputs{}
		x[q] += step
		if systematic {
			common[q] = step
		}
		if k := m.trial(&x, &common); k > 0 && !math.IsInf(k, 1) {
			return k, step
		}
		return kappa, 0
	}
	up, above := at(h)
	down, below := at(-h)
	slope := (up - down) / (above - below)
	return Contribution{
		Quantity: q, Systematic: systematic, Sensitivity: slope, Uncertainty: u,
		Relative: slope * m.values[q] / kappa,
	}
}

// Mean is the weighted mean of several points.
type Mean struct {
	Points              int
	Kappa               float64
	StandardUncertainty float64
	Independent         float64 // part that falls with the number of points
	Systematic          float64 // part that does not
	Interval            Interval
	ChiSquare           float64 // of the points about their mean, by their independent parts
	Freedom             int
	Probability         float64 // of a χ² this large or larger by chance
	MonteCarlo          *Distribution
	weights             []float64
}

// WeightedMean returns the mean of the estimates, weighted by their
// independent parts, and its χ². The systematic parts are common to all points:
// they take no part in weights and χ², and are propagated through the mean with
// their signs, so that they do not average out:
//
//	κ = Σ w_i κ_i,  w_i ∝ 1/u_i²,  u² = Σ w_i² u_i² + Σ_q (Σ w_i c_qi)²
//
// Errors: ErrFewPoints, ErrMixed for points of growth factors and of activation
// together, ErrNoWeight for a point without an independent part. Estimates with
// an error of their own are left out.
func WeightedMean(estimates []Estimate, coverage float64) (Mean, error) {
	good := slices.DeleteFunc(slices.Clone(estimates), func(e Estimate) bool { return e.Err != nil })
	if len(good) < 2 {
		return Mean{}, ErrFewPoints
	}
	mean := Mean{Points: len(good), Freedom: len(good) - 1, weights: make([]float64, len(good))}
	total := 0.0
	for i, e := range good {
		if (e.Method == GrowthRate) != (good[0].Method == GrowthRate) {
			return Mean{}, ErrMixed
		}
		if !(e.Linear.Independent > 0) {
			return Mean{}, &NoWeightError{e.Name}
		}
		mean.weights[i] = 1 / (e.Linear.Independent * e.Linear.Independent)
		total += mean.weights[i]
	}
	common := [quantities]float64{}
	for i, e := range good {
		mean.weights[i] /= total
		w := mean.weights[i]
		mean.Kappa += w * e.Kappa
		mean.Independent = math.Hypot(mean.Independent, w*e.Linear.Independent)
		for _, c := range e.Linear.Contributions {
			if c.Systematic {
				common[c.Quantity] += w * c.Signed()
			}
		}
	}
	for _, c := range common {
		mean.Systematic = math.Hypot(mean.Systematic, c)
	}
	for _, e := range good {
		d := (e.Kappa - mean.Kappa) / e.Linear.Independent
		mean.ChiSquare += d * d
	}
	mean.StandardUncertainty = math.Hypot(mean.Independent, mean.Systematic)
	mean.Probability = distuv.ChiSquared{K: float64(mean.Freedom)}.Survival(mean.ChiSquare)
	k := distuv.UnitNormal.Quantile((1 + coverage) / 2)
	mean.Interval = Interval{mean.Kappa - k*mean.StandardUncertainty, mean.Kappa + k*mean.StandardUncertainty}
	return mean, nil
}
