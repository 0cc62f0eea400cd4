package spectrum

import (
	"fmt"
	"math"
	"sort"

	"dropcrest/atmos/fit"
)

// data is points made ready to be fitted, in the order of s.
type data struct {
	points          []Point
	weighted        bool
	low, high, most float64
}

func newData(points []Point) (*data, error) {
	if len(points) < 2 {
		return nil, unusable("number of points", -1, float64(len(points)), "2 or more")
	}
	d := &data{points: append([]Point(nil), points...)}
	for i, p := range points {
		if p.Uncertainty != 0 {
			d.weighted = true
		}
		switch {
		case !(p.Supersaturation > 0) || math.IsInf(p.Supersaturation, 1):
			return nil, unusable("supersaturation of point", i, p.Supersaturation, "above 0")
		case !(p.Count >= 0) || math.IsInf(p.Count, 1):
			return nil, unusable("number at point", i, p.Count, "0 or more")
		}
		d.most = math.Max(d.most, p.Count)
	}
	for i, p := range points {
		switch {
		case d.weighted && !(p.Uncertainty > 0 && p.Uncertainty < math.MaxFloat64):
			return nil, unusable("uncertainty of point", i, p.Uncertainty, "above 0, as other points have one")
		case !d.weighted && p.Count == 0:
			return nil, unusable("number at point", i, 0, "above 0: without uncertainties the logarithms are fitted")
		}
	}
	if d.most == 0 {
		return nil, unusable("largest number", -1, 0, "above 0")
	}
	sort.SliceStable(d.points, func(i, j int) bool { return d.points[i].Supersaturation < d.points[j].Supersaturation })
	d.low, d.high = d.points[0].Supersaturation, d.points[len(points)-1].Supersaturation
	if d.low == d.high {
		return nil, unusable("supersaturations", -1, d.low, "at least two different ones")
	}
	return d, nil
}

// line is ln C and K of the straight line through the logarithms.
func (d *data) line() (c, k float64) {
	var n, sx, sy, sxx, sxy float64
	for _, p := range d.points {
		if p.Count > 0 {
			x, y := math.Log(p.Supersaturation/Percent), math.Log(p.Count)
			n, sx, sy, sxx, sxy = n+1, sx+x, sy+y, sxx+x*x, sxy+x*y
		}
	}
	if det := n*sxx - sx*sx; det > 1e-12*n*sxx {
		k = (n*sxy - sx*sy) / det
	}
	return (sy - k*sx) / n, k
}

func (d *data) residuals(dst []float64, f Form) {
	for i, p := range d.points {
		n := f.Count(p.Supersaturation)
		if d.weighted {
			dst[i] = (n - p.Count) / p.Uncertainty
		} else {
			dst[i] = math.Log(n / p.Count)
		}
	}
}

// enough is how many starts must lead to the best minimum so far before the rest
// of them is spared.
const enough = 3

func (d *data) fit(m model) (Fitted, error) {
	var best fit.Result
	var failed error
	found := 0
	residuals := func(dst, x []float64) { d.residuals(dst, m.of(x)) }
	for _, start := range m.starts {
		r, err := fit.LeastSquares(residuals, len(d.points), start)
		if err != nil {
			failed = err
			continue
		}
		better := best.SumOfSquares - r.SumOfSquares
		switch {
		case best.X != nil && math.Abs(better) <= 1e-6*r.SumOfSquares+1e-12:
			found++
		case best.X == nil || better > 0:
			best, found = r, 1
		}
		if found == enough {
			break
		}
	}
	if best.X == nil {
		return Fitted{}, fmt.Errorf("%d parameters through %d points: %w", len(m.starts[0]), len(d.points), failed)
	}
	return d.fitted(m, best), nil
}

func (d *data) fitted(m model, r fit.Result) Fitted {
	f := Fitted{Form: m.of(r.X), Low: d.low, High: d.high, Points: len(d.points),
		DegreesOfFreedom: r.DegreesOfFreedom, ReducedChiSquare: math.NaN(), Deviation: d.deviation(m.of(r.X)), Held: m.held}
	parameters := func(dst, x []float64) {
		for i, p := range m.of(x).Parameters() {
			dst[i] = p.Value
		}
	}
	reduced := r.SumOfSquares / float64(r.DegreesOfFreedom)
	if d.weighted || r.DegreesOfFreedom > 0 {
		f.Covariance = r.Transformed(len(f.Form.Parameters()), parameters)
	}
	switch {
	case d.weighted && r.DegreesOfFreedom > 0:
		f.ReducedChiSquare = reduced
	case f.Covariance != nil && !d.weighted:
		f.Covariance.ScaleSym(reduced, f.Covariance)
	}
	return f
}

func (d *data) deviation(f Form) float64 {
	sum, n := 0.0, 0.0
	for _, p := range d.points {
		if p.Count > 0 {
			e := math.Log(f.Count(p.Supersaturation) / p.Count)
			sum, n = sum+e*e, n+1
		}
	}
	return math.Sqrt(sum / n)
}
