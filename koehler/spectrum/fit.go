package spectrum

import (
	"math"
	"slices"

	"gonum.org/v1/gonum/mat"
)

// Point is one measured number of activated particles.
type Point struct {
	Supersaturation float64 // fraction
	Count           float64 // 1/m³
	Uncertainty     float64 // standard uncertainty of Count, 1/m³; 0: not known
}

// Fitted is a form laid through measured points.
type Fitted struct {
	Form Form
	// Covariance of the values of Form.Parameters(), in their order. With
	// uncertainties of the points it is what these make of it; without, it is scaled
	// with the scatter about the fit, and nil where no degree of freedom is left.
	Covariance       *mat.SymDense
	Low, High        float64 // the supersaturations that were fitted, fractions: outside, the form extrapolates
	Points           int
	DegreesOfFreedom int
	ReducedChiSquare float64 // NaN without uncertainties or degrees of freedom
	Deviation        float64 // root mean square of ln(form/measured) of the counts above 0
	Held             []int   // parameters that were held, not fitted: they have no uncertainty
}

// Uncertainty returns the standard uncertainty of parameter i, NaN where there is no
// covariance or the parameter was held.
func (f Fitted) Uncertainty(i int) float64 {
	if f.Covariance == nil || slices.Contains(f.Held, i) {
		return math.NaN()
	}
	return math.Sqrt(f.Covariance.At(i, i))
}

// Extrapolates tells whether s lies outside the fitted range.
func (f Fitted) Extrapolates(s float64) bool { return !(s >= f.Low && s <= f.High) }

// model is a form as the search sees it: x of order 1, all of them free.
type model struct {
	of     func(x []float64) Form
	starts [][]float64
	held   []int // parameters of the form that do not move
}

// FitPower fits a power law. At least two points; see Fitted. With uncertainties
// the numbers are fitted, without them their logarithms, and then all must be
// above 0. Errors of the three fits wrap ErrInput or one of package fit.
func FitPower(points []Point) (Fitted, error) {
	d, err := newData(points)
	if err != nil {
		return Fitted{}, err
	}
	c, k := d.line()
	return d.fit(model{
		of:     func(x []float64) Form { return Power{math.Exp(x[0]), x[1]} },
		starts: [][]float64{{c, k}},
	})
}

// HeldExponent is the K at which FitCohard holds a spectrum that would drive it to
// infinity. Published fits lie at 0.3 to 4.2 or so (from memory).
const HeldExponent = 4

// FitCohard fits the form of Cohard, Pinty & Bedos. At least four points; they must
// bend, or Mu and Beta are not determined and a power law is the answer. A spectrum
// of two modes has no best K: it fits the better the larger K is, C with it. Then K is
// held at HeldExponent and the other three are fitted, which Fitted.Held says.
func FitCohard(points []Point) (Fitted, error) {
	d, err := newData(points)
	if err != nil {
		return Fitted{}, err
	}
	_, slope := d.line()
	free := model{of: func(x []float64) Form {
		return Cohard{math.Exp(x[0]), math.Exp(x[3]), math.Exp(x[1]), math.Exp(x[2])}
	}}
	for _, k := range []float64{math.Max(slope, 0.1) + 0.3, 1.5, 3} {
		free.starts = append(free.starts, append(d.cohardStart(k, 0.5), math.Log(k)))
	}
	f, err := d.fit(free)
	if err == nil || len(points) < 4 {
		return f, err
	}
	held := model{held: []int{1}, of: func(x []float64) Form {
		return Cohard{math.Exp(x[0]), HeldExponent, math.Exp(x[1]), math.Exp(x[2])}
	}}
	for _, bend := range []float64{0.3, 0.7} {
		held.starts = append(held.starts, d.cohardStart(HeldExponent, bend))
	}
	if f, heldErr := d.fit(held); heldErr == nil {
		return f, nil
	}
	return Fitted{}, err
}

// cohardStart is ln C, ln Mu and ln Beta of a form whose power law K ends at this
// share of the range of ln s, where it meets half of the largest number.
func (d *data) cohardStart(k, bend float64) []float64 {
	S := math.Pow(d.low, 1-bend) * math.Pow(d.high, bend) / Percent
	return []float64{math.Log(d.most/2) - k*math.Log(S), math.Log(k/2 + 0.3), -2 * math.Log(S)}
}

// FitErrorFunctions fits one or two steps. total is the number of all particles
// (1/m³), which then is the sum of the steps; 0: not known, fitted. It needs at
// least as many points as parameters: 3 or 6, one fewer where total is known.
func FitErrorFunctions(points []Point, steps int, total float64) (Fitted, error) {
	d, err := newData(points)
	if err != nil {
		return Fitted{}, err
	}
	switch {
	case steps != 1 && steps != 2:
		return Fitted{}, unusable("number of error functions", -1, float64(steps), "1 or 2")
	case !(total >= 0) || math.IsInf(total, 1):
		return Fitted{}, unusable("number of all particles", -1, total, "above 0, or 0 where it is not known")
	}
	if steps == 1 {
		return d.fit(d.oneStep(total))
	}
	return d.fit(d.twoSteps(total))
}

func (d *data) oneStep(total float64) model {
	of := func(x []float64) Form {
		n := total
		if n == 0 {
			n = math.Exp(x[2])
		}
		return ErrorFunctions{{n, math.Exp(x[0]), math.Exp(x[1])}}
	}
	m := model{of: of}
	for _, at := range []float64{0, 0.5, 1} {
		for _, width := range []float64{0, 0.5} {
			x := []float64{math.Log(d.low) + at*math.Log(d.high/d.low), width}
			if total == 0 {
				x = append(x, math.Log(1.2*d.most))
			}
			m.starts = append(m.starts, x)
		}
	}
	return m
}

// twoSteps has the lower centre first: the second is the first times 1 + exp(x).
func (d *data) twoSteps(total float64) model {
	of := func(x []float64) Form {
		n := total
		if n == 0 {
			n = math.Exp(x[5])
		}
		first := 1 / (1 + math.Exp(-x[4]))
		centre := math.Exp(x[0])
		return ErrorFunctions{
			{n * first, centre, math.Exp(x[1])},
			{n * (1 - first), centre * (1 + math.Exp(x[2])), math.Exp(x[3])},
		}
	}
	m := model{of: of}
	span := math.Log(d.high / d.low)
	for _, at := range [][2]float64{{0.1, 0.6}, {0.3, 0.9}, {0.2, 1.2}, {-0.2, 0.4}} {
		for _, width := range []float64{-0.4, 0.1} {
			for _, share := range []float64{-1, 1} {
				x := []float64{math.Log(d.low) + at[0]*span, width, math.Log(math.Expm1((at[1] - at[0]) * span)), width, share}
				if total == 0 {
					x = append(x, math.Log(1.3*d.most))
				}
				m.starts = append(m.starts, x)
			}
		}
	}
	return m
}
