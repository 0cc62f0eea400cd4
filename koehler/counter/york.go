package counter

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// LinePoint is one point of a line with errors in both coordinates.
type LinePoint struct {
	X, Y        float64
	UX, UY      float64 // standard uncertainties, one of them above 0
	Correlation float64 // of the two errors, -1 to 1
}

// Line is a straight line y = Intercept + Slope x.
type Line struct {
	Intercept, Slope     float64
	InterceptUncertainty float64
	SlopeUncertainty     float64
	Covariance           float64 // of intercept and slope
	ChiSquare            float64 // of the residuals, weighted
	Freedom              int     // points less 2; 0: the line goes through them
	Probability          float64 // of a χ² this large or larger by chance; 1 where there is no freedom
	Lowest, Highest      float64 // x of the points
	Scatter              float64 // standard uncertainty of one y about the line, typical for the points
	Residuals            []LineResidual
}

// LineResidual is what a point is off the line.
type LineResidual struct {
	X, Y         float64
	Residual     float64 // y less the line
	Uncertainty  float64 // of it, from both errors: √(u_y² + b² u_x² - 2 b r u_x u_y)
	Standardised float64 // Residual over Uncertainty
	AtX, AtY     float64 // the point of the line that the data point is the image of
}

// yorkDone is the relative change of the slope at which the iteration ends.
const yorkDone = 1e-14

// York returns the best straight line through points with errors in both
// coordinates (York, Evensen, López Martínez and De Basabe Delgado, Am. J. Phys. 72,
// 367, 2004): with weights ω = 1/u² and α² = ω_x ω_y
//
//	W = ω_x ω_y/(ω_x + b² ω_y - 2 b r α)
//	β = W [U/ω_y + b V/ω_x - (b U + V) r/α],  U = x - x̄, V = y - ȳ
//	b = Σ W β V/Σ W β U,  a = ȳ - b x̄
//
// until b stands still. Uncertainties are those of the adjusted points, as stated:
// they are not scaled by χ². The slope must not be infinite. Errors wrap ErrLine.
func York(points []LinePoint) (Line, error) {
	if err := checkLine(points); err != nil {
		return Line{}, err
	}
	b, err := simpleSlope(points)
	if err != nil {
		return Line{}, err
	}
	work := make([]yorkPoint, len(points))
	for range 200 {
		next := yorkStep(points, work, b)
		if math.IsNaN(next) || math.IsInf(next, 0) {
			return Line{}, lineError("the slope is not finite: all points lie at one x")
		}
		done := math.Abs(next-b) <= yorkDone*math.Abs(next)
		b = next
		if done {
			break
		}
	}
	yorkStep(points, work, b)
	return yorkLine(points, work, b), nil
}

type yorkPoint struct{ weight, beta, u, v float64 }

// yorkStep weights the points for a slope and returns the next slope.
func yorkStep(points []LinePoint, work []yorkPoint, b float64) float64 {
	sum, x, y := 0.0, 0.0, 0.0
	for i, p := range points {
		w := 1 / p.variance(b)
		work[i].weight = w
		sum += w
		x += w * p.X
		y += w * p.Y
	}
	x, y = x/sum, y/sum
	above, below := 0.0, 0.0
	for i, p := range points {
		w := &work[i]
		w.u, w.v = p.X-x, p.Y-y
		// U/ω_y + b V/ω_x - (b U + V) r/α, free of infinite weights
		w.beta = w.weight * (w.u*p.UY*p.UY + b*w.v*p.UX*p.UX - (b*w.u+w.v)*p.Correlation*p.UX*p.UY)
		above += w.weight * w.beta * w.v
		below += w.weight * w.beta * w.u
	}
	return above / below
}

// variance is 1/W: that of y - b x.
func (p LinePoint) variance(b float64) float64 {
	return p.UY*p.UY + b*b*p.UX*p.UX - 2*b*p.Correlation*p.UX*p.UY
}

func yorkLine(points []LinePoint, work []yorkPoint, b float64) Line {
	sum, x, y, atX := 0.0, 0.0, 0.0, 0.0
	for i, p := range points {
		sum += work[i].weight
		x += work[i].weight * p.X
		y += work[i].weight * p.Y
	}
	x, y = x/sum, y/sum
	for _, w := range work {
		atX += w.weight * (x + w.beta) / sum
	}
	spread := 0.0
	for _, w := range work {
		d := x + w.beta - atX
		spread += w.weight * d * d
	}
	l := Line{Intercept: y - b*x, Slope: b, Freedom: len(points) - 2, Lowest: math.Inf(1), Highest: math.Inf(-1), Probability: 1}
	l.SlopeUncertainty = 1 / math.Sqrt(spread)
	l.InterceptUncertainty = math.Sqrt(1/sum + atX*atX/spread)
	l.Covariance = -atX / spread
	for i, p := range points {
		r := LineResidual{X: p.X, Y: p.Y, Residual: p.Y - l.At(p.X), Uncertainty: math.Sqrt(p.variance(b)), AtX: x + work[i].beta}
		r.AtY = l.At(r.AtX)
		r.Standardised = r.Residual / r.Uncertainty
		l.ChiSquare += r.Standardised * r.Standardised
		l.Scatter += p.variance(b) / float64(len(points))
		l.Lowest, l.Highest = math.Min(l.Lowest, p.X), math.Max(l.Highest, p.X)
		l.Residuals = append(l.Residuals, r)
	}
	l.Scatter = math.Sqrt(l.Scatter)
	if l.Freedom > 0 {
		l.Probability = distuv.ChiSquared{K: float64(l.Freedom)}.Survival(l.ChiSquare)
	}
	return l
}

func checkLine(points []LinePoint) error {
	if len(points) < 2 {
		return lineError("%d points, at least 2 are needed", len(points))
	}
	for i, p := range points {
		for _, v := range []float64{p.X, p.Y, p.UX, p.UY, p.Correlation} {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				return lineError("point %d is not finite", i+1)
			}
		}
		if p.UX < 0 || p.UY < 0 || p.UX == 0 && p.UY == 0 {
			return lineError("point %d has no uncertainty: one of its two must be above 0", i+1)
		}
		if math.Abs(p.Correlation) > 1 {
			return lineError("point %d has a correlation of %g: must be -1 to 1", i+1, p.Correlation)
		}
	}
	return nil
}

// simpleSlope is the unweighted slope of y on x, to begin with.
func simpleSlope(points []LinePoint) (float64, error) {
	x, y, n := 0.0, 0.0, float64(len(points))
	for _, p := range points {
		x += p.X / n
		y += p.Y / n
	}
	xx, xy := 0.0, 0.0
	for _, p := range points {
		xx += (p.X - x) * (p.X - x)
		xy += (p.X - x) * (p.Y - y)
	}
	if xx == 0 {
		return 0, lineError("all points lie at one x")
	}
	return xy / xx, nil
}

// At returns y of the line.
func (l Line) At(x float64) float64 { return l.Intercept + l.Slope*x }

// Uncertainty returns the standard uncertainty of the line at x, as stated.
func (l Line) Uncertainty(x float64) float64 {
	v := l.InterceptUncertainty*l.InterceptUncertainty + 2*x*l.Covariance + x*x*l.SlopeUncertainty*l.SlopeUncertainty
	return math.Sqrt(math.Max(0, v))
}

// Dispersion returns √(χ²/freedom) where that is above 1, else 1: by how much the
// points scatter more than their uncertainties say.
func (l Line) Dispersion() float64 {
	if l.Freedom < 1 {
		return 1
	}
	return math.Max(1, math.Sqrt(l.ChiSquare/float64(l.Freedom)))
}

// Band holds the half-widths of the bands about the line at one x.
type Band struct {
	Line       float64 // where the line lies
	Prediction float64 // where one more measurement like these would lie
}

// Band returns the bands at x for a coverage such as 0.95. They are scaled by the
// Dispersion, with Student's t where that was taken from the points.
func (l Line) Band(x, coverage float64) Band {
	p, d := (1+coverage)/2, l.Dispersion()
	k := distuv.UnitNormal.Quantile(p)
	if d > 1 {
		k = distuv.StudentsT{Sigma: 1, Nu: float64(l.Freedom)}.Quantile(p)
	}
	u := l.Uncertainty(x)
	return Band{k * d * u, k * d * math.Hypot(u, l.Scatter)}
}
