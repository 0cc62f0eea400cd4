package counter

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/atmos"

	"gonum.org/v1/gonum/stat/distuv"
)

// Estimate is a fitted value and its standard uncertainty.
type Estimate struct {
	Value       float64
	Uncertainty float64 // 0: it was given, not fitted
}

// Fit is the activation curve of a scan.
//
//	droplets/particles = Plateau × H((ln x - ln Midpoint)/Width)
//
// with H the cumulative Gaussian, or 1/(1 + exp(-z)) for the sigmoid, and the
// share Double of particles besides, see Curve.
type Fit struct {
	Curve    Curve
	Midpoint Estimate // D50 in m, or what is scanned instead
	Width    Estimate // in ln x; see StandardWidth
	Plateau  Estimate
	Double   Estimate // share of doubly charged particles at the midpoint; Gaussian and Sigmoid: lower over upper plateau
	// Covariance of ln Midpoint, ln Width, ln Plateau and Double, in this order;
	// the rows of what was given are 0.
	Covariance [4][4]float64
	// ChiSquare is Pearson's, of the points whose expected counts reach 1.
	ChiSquare float64
	Freedom   int
	// Dispersion is √(ChiSquare/Freedom) where that is too large for counting
	// alone (by chance in less than 1 %), else 1. It is in the uncertainties.
	Dispersion float64
	Unresolved bool // the step lies between two settings: the width is not known
	Points     []Residual
	LeftOut    []LeftOut
	Notes      []atmos.Note

	like likelihood
	best vector
}

// Residual is a used point beside its curve.
type Residual struct {
	Point
	Fraction    float64 // droplets over particles, flows, times and CN efficiency taken out
	Uncertainty float64 // of it, by counting
	Curve       float64
	Deviation   float64 // signed root of the deviance: standard normal when the curve is right
}

// StandardWidth returns the standard deviation in ln x of the curve: the Width,
// for the sigmoid π/√3 times it.
func (f Fit) StandardWidth() float64 {
	if f.Curve == Sigmoid {
		return f.Width.Value * math.Pi / math.Sqrt(3)
	}
	return f.Width.Value
}

// Exponent returns C of the sigmoid 1/(1 + (x/x50)^C).
func (f Fit) Exponent() float64 { return -1 / f.Width.Value }

// At returns droplets over particles at a setting, as the curve has it. Charges
// at settings that were not measured are those of the nearest one that was.
func (f Fit) At(setting float64) float64 {
	x := math.Log(setting)
	nearest, least := -1, math.Inf(1)
	for i := range f.like.samples {
		if d := math.Abs(f.like.samples[i].x - x); d < least {
			nearest, least = i, d
		}
	}
	if nearest < 0 {
		return math.NaN()
	}
	s := f.like.samples[nearest]
	s.x, s.offset = x, 0
	eta, _ := f.like.logRatio(&s, &f.best)
	return math.Exp(eta)
}

// FitScan fits the activation curve of a scan by the conditional likelihood of its
// counts. Uncertainties are those of counting (times Dispersion): sizing, the
// model of the salt and flows are not among them.
//
// Errors are of type *ScanError and wrap ErrFewPoints, ErrDuplicated,
// ErrNoParticles, ErrAllZero, ErrAllActive, ErrNoStep, ErrDecreasing, ErrNoPlateau or
// ErrNoFit, or they wrap ErrInput for options. The points left out are in the Fit
// even then.
func FitScan(s Scan, o Options) (Fit, error) {
	if err := o.check(); err != nil {
		return Fit{}, err
	}
	f := Fit{Curve: o.Curve, Dispersion: 1}
	used, out := s.sift(o)
	f.LeftOut = out
	if err := s.check(used); err != nil {
		return f, err
	}
	outliers := 0
	for {
		if err := f.fit(s, used, o); err != nil {
			return f, err
		}
		worst := f.outlier(o)
		why := ""
		if below := f.belowDouble(s, used, o); below >= 0 {
			worst, why = below, "not even doubly charged particles activate there, and this curve has one step only"
		} else if worst < 0 || outliers >= max(1, len(s.Points)/10) {
			break
		} else {
			outliers++
			why = fmt.Sprintf("%.1f standard deviations off the curve", f.Points[worst].Deviation)
		}
		p := used[worst]
		f.LeftOut = append(f.LeftOut, LeftOut{s.Name, p.Setting, p.Line, why})
		used = append(append([]Point{}, used[:worst]...), used[worst+1:]...)
		if err := s.check(used); err != nil {
			return f, err
		}
	}
	return f, f.judge(s, o)
}

func (o Options) check() error {
	switch {
	case o.Curve < TwoStep || o.Curve > Sigmoid:
		return inputError("unknown curve %d", o.Curve)
	case !(o.Plateau >= 0) || math.IsInf(o.Plateau, 1):
		return inputError("plateau %g: must be above 0, or 0 to be fitted", o.Plateau)
	case !(o.Charges.Double >= 0 && o.Charges.Double <= mostShare):
		return inputError("share of doubly charged particles %g: must be 0 (fitted) to %g", o.Charges.Double, mostShare)
	case !(o.Charges.Triple >= 0 && o.Charges.Triple <= 1):
		return inputError("triply over doubly charged particles %g: must be 0 to 1", o.Charges.Triple)
	case !(o.LeastCN >= 0):
		return inputError("least CN count %g: must be 0 or more", o.LeastCN)
	}
	return nil
}

// fit does one fit of the used points.
func (f *Fit) fit(s Scan, used []Point, o Options) error {
	if err := f.prepare(s, used, o); err != nil {
		return err
	}
	var info matrix
	value, found := math.Inf(-1), false
	for _, start := range f.like.starts(o.Plateau) {
		best, v, in, ok := f.like.climb(start)
		if ok && v > value+1e-9 {
			f.best, value, info, found = best, v, in, true
		}
	}
	if !found {
		return s.fault(ErrNoFit, "the fit does not settle: look at the counts")
	}
	f.Notes = f.chargeNotes(o)
	return f.take(s, used, info)
}

// take reads the result off the best parameters.
func (f *Fit) take(s Scan, used []Point, info matrix) error {
	cov, ok := f.like.inverse(info)
	if !ok {
		return s.fault(ErrNoFit, "the counts do not fix the curve: too few settings near the step")
	}
	f.residuals(used)
	if v := f.ChiSquare / float64(max(1, f.Freedom)); f.Freedom > 0 && v > 1 {
		if (distuv.ChiSquared{K: float64(f.Freedom)}).Survival(f.ChiSquare) < 0.01 {
			f.Dispersion = math.Sqrt(v)
		}
	}
	t, spot := f.best, f.Dispersion
	for a := range cov {
		for b := range cov {
			f.Covariance[a][b] = cov[a][b] * spot * spot
		}
	}
	u := func(a int) float64 { return math.Sqrt(f.Covariance[a][a]) }
	gap := f.gap()
	if f.Unresolved = gap > 0; f.Unresolved {
		// anywhere between the two settings, which is all that is known
		if v := &f.Covariance[middle][middle]; *v < gap*gap/12 || *v > gap*gap {
			*v = gap * gap / 12
		}
	}
	x50, w, e := math.Exp(t[middle]), math.Exp(t[spread]), math.Exp(t[plateau])
	f.Midpoint = Estimate{x50, x50 * u(middle)}
	f.Width = Estimate{w, w * u(spread)}
	f.Plateau = Estimate{e, e * u(plateau)}
	f.Double = f.doubleShare(u(double))
	return nil
}

// doubleShare is the share of doubly charged particles: the fitted one or that of
// the setting nearest to the midpoint.
func (f *Fit) doubleShare(u float64) Estimate {
	if f.like.free[double] {
		return Estimate{f.best[double], u}
	}
	share, least := 0.0, math.Inf(1)
	for i := range f.like.samples {
		s := &f.like.samples[i]
		if d := math.Abs(s.x - f.best[middle]); d < least && s.kinds > 1 {
			least, share = d, s.steps[1].fixed
		}
	}
	return Estimate{share, 0}
}

// residuals fills Points, ChiSquare and Freedom.
func (f *Fit) residuals(used []Point) {
	f.Points = f.Points[:0]
	f.ChiSquare, f.Freedom = 0, 0
	for _, free := range f.like.free {
		if free {
			f.Freedom--
		}
	}
	for i, p := range used {
		s := &f.like.samples[i]
		eta, _ := f.like.logRatio(s, &f.best)
		pi := 1 / (1 + math.Exp(-eta))
		miss, expected := s.ccn-s.n*pi, s.n*math.Min(pi, 1-pi)
		if expected >= 1 {
			f.ChiSquare += miss * miss / (s.n * pi * (1 - pi))
			f.Freedom++
		}
		scale := p.CN * math.Exp(s.offset)
		r := p.CCN / scale
		f.Points = append(f.Points, Residual{
			Point: p, Fraction: r, Uncertainty: math.Sqrt(p.CCN+r*r*p.CN*math.Exp(2*s.offset)) / scale,
			Curve: math.Exp(eta - s.offset), Deviation: math.Copysign(math.Sqrt(s.deviance(eta)), miss),
		})
	}
}

// errNoSizes is the reason for a size distribution without particles.
var errNoSizes = errors.New("the size distribution has no particles there")
