package answer

import (
	"math"

	"dropcrest/koehler"
	"dropcrest/ui/figure"
)

// isolines are the κ of the lines: insoluble to salt, two a decade.
var isolines = []float64{0.01, 0.03, 0.1, 0.3, 1}

// growthLetter marks the points of growth factors.
const growthLetter = 'G'

const (
	isolinePoints = 60
	besidePoints  = 1.6 // times the largest dry size is shown, and the smallest over it
	mostLabels    = 6   // points that get a label of their own
)

// figure is the plane of critical supersaturation against dry size with lines of
// equal κ under the actual water. A growth factor stands at the supersaturation
// that its κ implies.
func (k *implied) figure() figure.Figure {
	f := figure.Figure{
		Key: "kappa", Title: "critical supersaturation, % against dry diameter, nm",
		X: figure.Axis{Says: "dry diameter", Unit: "nm", Log: true},
		Y: figure.Axis{Says: "critical supersaturation", Unit: "%", Log: true},
	}
	lo, hi := k.sizes()
	kelvin := conventionOf(k.asked).Kelvin()
	for _, value := range isolines {
		f.Lines = append(f.Lines, isoline(value, kelvin, lo, hi))
	}
	if k.isCompared() {
		f.Lines = append(f.Lines, k.publishedLine(lo, hi))
	}
	for i := range k.points {
		if p, ok := k.points[i].plotted(); ok {
			f.Points = append(f.Points, p)
			if len(k.points) <= mostLabels && k.points[i].Err == nil {
				f.Marks = append(f.Marks, figure.Mark{Kind: figure.PointMark, Letter: p.Letter, X: p.X, Y: p.Y,
					Text: "κ " + digits(k.points[i].Kappa, 3)})
			}
		}
	}
	return f
}

// isoline is the line of one κ for a Kelvin length, from one dry diameter to
// another, in m.
func isoline(value, kelvin, lo, hi float64) figure.Line {
	line := figure.Line{Says: "κ " + shortest(value), Dash: figure.Dotted, AtEnd: true}
	for i := range isolinePoints {
		dry := lo * math.Pow(hi/lo, float64(i)/(isolinePoints-1))
		line.X = append(line.X, dry*1e9)
		line.Y = append(line.Y, 100*koehler.SolveKappa(dry, kelvin, value).Supersaturation)
	}
	return line
}

// sizes are the ends of the lines in m: beside the points, but a factor of 5 at least.
func (k *implied) sizes() (lo, hi float64) {
	lo, hi = math.Inf(1), 0
	for i := range k.points {
		if dry := k.points[i].volumeDiameter(); dry > 0 {
			lo, hi = math.Min(lo, dry), math.Max(hi, dry)
		}
	}
	if !(lo <= hi) {
		lo, hi = 100e-9, 100e-9
	}
	beside := math.Max(besidePoints, math.Sqrt(5*lo/hi))
	return lo / beside, hi * beside
}

// plotted is the point in the plane, with one standard uncertainty to both sides.
func (m *kappaPoint) plotted() (figure.Point, bool) {
	dry := m.volumeDiameter()
	toVolume := dry / m.Dry.Value
	p := figure.Point{X: 1e9 * dry}
	p.XLow, p.XHigh = bar(p.X, 1e9*toVolume*math.Hypot(m.Dry.Own, m.Dry.Common))
	if !m.isGrowth() {
		p.Y = 100 * m.Supersaturation.Value
		p.YLow, p.YHigh = bar(p.Y, 100*math.Hypot(m.Supersaturation.Own, m.Supersaturation.Common))
		return p, dry > 0
	}
	p.Letter = growthLetter
	if m.Err != nil || !(m.Kappa > 0) {
		return p, false
	}
	crest := func(kappa float64) float64 {
		return 100 * koehler.SolveKappa(dry, m.water.Kelvin(), kappa).Supersaturation
	}
	p.Y, p.YLow, p.YHigh = crest(m.Kappa), math.NaN(), math.NaN()
	if low, high := bar(m.Kappa, m.Linear.StandardUncertainty); !math.IsNaN(low) {
		p.YLow, p.YHigh = crest(high), crest(low)
	}
	return p, true
}

// bar is x with u to both sides, NaN without u; on a logarithmic axis it ends above
// zero.
func bar(x, u float64) (low, high float64) {
	if !(u > 0) {
		return math.NaN(), math.NaN()
	}
	const least = 1e-3
	return math.Max(x-u, least*x), x + u
}
