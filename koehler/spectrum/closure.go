package spectrum

import (
	"math"
	"slices"
)

// Closure compares predicted with measured numbers, one pair after the other. The
// zero value is ready. Sums are updated with each pair, so memory grows only with
// the ratios that the quantiles need, see Quantiles.
type Closure struct {
	pairs, refused int
	meanP, meanM   float64 // means of predicted and measured
	spp, smm, spm  float64 // sums of squared and mixed deviations from them
	meanL, sll     float64 // mean of ln ratio and its sum of squared deviations
	absolute, sqL  float64 // Σ|p-m| and Σ ln² ratio
	square         float64 // Σ(p-m)²
	logs           int     // pairs with both above 0
	within         [4]int
	ratios         Quantiles
}

// withinBounds are the bounds of the ratio on both sides that Within10 and so on
// count; for the factor two they are 1/2 and 2.
var withinBounds = [4][2]float64{{0.9, 1.1}, {0.8, 1.2}, {0.7, 1.3}, {0.5, 2}}

// Add takes one pair, 1/m³. It is refused, and counted so, where measured is not
// above 0 or predicted is negative, or either is missing (NaN) or infinite.
func (c *Closure) Add(predicted, measured float64) bool {
	if !(measured > 0 && predicted >= 0) || math.IsInf(measured, 1) || math.IsInf(predicted, 1) {
		c.refused++
		return false
	}
	c.pairs++
	n := float64(c.pairs)
	dp, dm := predicted-c.meanP, measured-c.meanM
	c.meanP += dp / n
	c.meanM += dm / n
	c.spp += dp * (predicted - c.meanP)
	c.smm += dm * (measured - c.meanM)
	c.spm += dp * (measured - c.meanM)
	difference, ratio := predicted-measured, predicted/measured
	c.absolute += math.Abs(difference)
	c.square += difference * difference
	c.ratios.Add(ratio)
	if predicted > 0 {
		c.logs++
		l := math.Log(ratio)
		d := l - c.meanL
		c.meanL += d / float64(c.logs)
		c.sll += d * (l - c.meanL)
		c.sqL += l * l
	}
	for i, b := range withinBounds {
		if ratio >= b[0] && ratio <= b[1] {
			c.within[i]++
		}
	}
	return true
}

// Line is a straight line, predicted = Slope x measured + Intercept (1/m³).
type Line struct{ Slope, Intercept float64 }

// Agreement is what a Closure says. Predicted is the ordinate, measured the
// abscissa. Shares are 0 to 1; what the pairs do not determine is NaN.
type Agreement struct {
	Pairs, Refused int
	// Quantiles of predicted/measured.
	P05, P25, Median, P75, P95 float64
	ExactQuantiles             bool    // false: each within QuantileError of the exact one
	GeometricMean, GSD         float64 // of the ratio, of the pairs with a prediction above 0
	ThroughOrigin              float64 // slope Σpm/Σm²
	Ordinary                   Line    // least squares of the ordinate
	Orthogonal                 Line    // least squares of the distance from the line
	RSquared                   float64 // squared correlation; it hides any bias
	MeanBias                   float64 // Σ(p-m)/Σm
	MeanError                  float64 // Σ|p-m|/Σm
	RootMeanSquare             float64 // of p-m, 1/m³
	LogRootMeanSquare          float64 // of ln ratio
	Within10, Within20         float64 // share of ratios within 10, 20, 30 % of 1
	Within30, WithinFactor2    float64 // and from 1/2 to 2
}

// Agreement returns the statistics of the pairs so far.
func (c *Closure) Agreement() Agreement {
	a := Agreement{Pairs: c.pairs, Refused: c.refused, ExactQuantiles: c.ratios.Exact()}
	n, logs := float64(c.pairs), float64(c.logs)
	q := c.ratios.At(0.05, 0.25, 0.5, 0.75, 0.95)
	a.P05, a.P25, a.Median, a.P75, a.P95 = q[0], q[1], q[2], q[3], q[4]
	a.GeometricMean, a.GSD = math.NaN(), math.NaN()
	if c.logs > 0 {
		a.GeometricMean = math.Exp(c.meanL)
	}
	if c.logs > 1 {
		a.GSD = math.Exp(math.Sqrt(c.sll / (logs - 1)))
	}
	a.ThroughOrigin = (c.spm + n*c.meanP*c.meanM) / (c.smm + n*c.meanM*c.meanM)
	a.Ordinary = c.line(c.spm / c.smm)
	a.Orthogonal = c.line(orthogonalSlope(c.smm, c.spp, c.spm))
	a.RSquared = c.spm / c.smm * c.spm / c.spp
	a.MeanBias = (c.meanP - c.meanM) / c.meanM
	a.MeanError = c.absolute / (n * c.meanM)
	a.RootMeanSquare = math.Sqrt(c.square / n)
	a.LogRootMeanSquare = math.Sqrt(c.sqL / logs)
	a.Within10, a.Within20 = float64(c.within[0])/n, float64(c.within[1])/n
	a.Within30, a.WithinFactor2 = float64(c.within[2])/n, float64(c.within[3])/n
	return a
}

func (c *Closure) line(slope float64) Line {
	return Line{slope, c.meanP - slope*c.meanM}
}

// orthogonalSlope is the slope of the first principal axis. The form without
// cancellation is taken for either sign of syy - sxx.
func orthogonalSlope(sxx, syy, sxy float64) float64 {
	d := syy - sxx
	root := math.Hypot(d, 2*sxy)
	if d > 0 {
		return (d + root) / (2 * sxy)
	}
	return 2 * sxy / (root - d)
}

// Closures is one Closure of everything and one a supersaturation.
type Closures struct {
	All    Closure
	levels map[float64]*Closure
}

// mostLevels bounds the supersaturations that are kept apart; a file whose every
// value differs says little by level.
const mostLevels = 64

// Add takes one pair at the supersaturation s (a fraction) as set. Values that agree
// in three significant digits are one level. Beyond 64 levels a new one counts
// in All only.
func (c *Closures) Add(s, predicted, measured float64) bool {
	if c.levels == nil {
		c.levels = map[float64]*Closure{}
	}
	key := threeDigits(s)
	level, ok := c.levels[key]
	if !ok && len(c.levels) < mostLevels && key > 0 {
		level = &Closure{}
		c.levels[key] = level
	}
	if level != nil {
		level.Add(predicted, measured)
	}
	return c.All.Add(predicted, measured)
}

// Levels returns the supersaturations that are kept apart, ascending.
func (c *Closures) Levels() []float64 {
	all := make([]float64, 0, len(c.levels))
	for s := range c.levels {
		all = append(all, s)
	}
	slices.Sort(all)
	return all
}

// At returns the closure of a level, nil where there is none.
func (c *Closures) At(s float64) *Closure { return c.levels[threeDigits(s)] }

func threeDigits(s float64) float64 {
	if !(s > 0) || math.IsInf(s, 1) {
		return math.NaN()
	}
	scale := math.Pow(10, 2-math.Floor(math.Log10(s)))
	return math.Round(s*scale) / scale
}
