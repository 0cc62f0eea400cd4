package counter

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// Calibration is the record of a calibration: data, result and everything that the
// result rests on. It is plain data, so that it can be written to a file and read
// back: no field is infinite or not a number. SI units, supersaturations as
// fractions.
type Calibration struct {
	Curve     string // of the fits
	Standards []StandardRecord
	Scans     []ScanResult
	LeftOut   []LeftOut
	Notes     []atmos.Note

	Line            *Line // supersaturation (fraction) against temperature difference (K); nil: LineFault says why
	LineFault       string
	LineSensitivity [4]LineShift // sizing, tension, temperature, shape: see Sensitivity
	LineBootstrap   *LineBootstrap

	// What the line belongs to: means of its scans; 0: not known.
	Pressure float64 // Pa
	Flow     float64 // m³/s
	Time     float64 // s

	// PressureExponent and FlowExponent carry the line to another pressure and
	// flow: s ∝ p^PressureExponent Q^FlowExponent, to first order.
	PressureExponent        float64 // 1 is common practice
	FlowExponent            float64 // 0: not known, the calibration holds at its own flow only
	FlowExponentUncertainty float64
}

// StandardRecord says what a Standard was made of.
type StandardRecord struct {
	Name           string
	Models         []string // of water activity
	Temperature    float64  // of activation, K
	SurfaceTension float64  // of the drop at infinite dilution, N/m
	WaterDensity   float64  // kg/m³
	ShapeFactor    float64
	AirTemperature float64 // of the classifier, K
	AirPressure    float64 // Pa
}

// ScanResult is what one scan gave.
type ScanResult struct {
	Name                  string
	Over                  Axis
	Standard              int
	Fault                 string // why there is no curve; "": there is one
	Err                   error  `json:"-"` // the same as an error
	TemperatureDifference float64
	DifferenceUncertainty float64
	MobilityDiameter      float64 // that activates half, m
	DiameterUncertainty   float64 // by counting; of the scan's own where it was not fitted
	DryDiameter           float64 // volume-equivalent, m
	Flow                  float64
	FlowUncertainty       float64
	Pressure              float64
	Time                  float64

	Width, Plateau, Double Estimate
	Covariance             [4][4]float64 // see Fit
	ChiSquare              float64
	Freedom                int
	Dispersion             float64
	Unresolved             bool
	Points                 []Residual
	Bootstrap              *Bootstrap // of the midpoint

	Supersaturation            float64 // critical one of the salt, fraction
	SupersaturationUncertainty float64 // by counting: sizing, model and water are in Sensitivity
	Sensitivity                Sensitivity
	Choices                    []Choice // what other models make of the same size
	InLine                     bool
}

// LineShift is how a relative error (temperature: one in K) moves the line.
type LineShift struct{ Intercept, Slope float64 }

// LineBootstrap is the spread of the line over resampled counts.
type LineBootstrap struct{ Intercept, Slope Bootstrap }

// Site is where a calibration is applied.
type Site struct {
	Pressure float64 // Pa; 0: as at the calibration
	Flow     float64 // total flow of the counter, m³/s; 0: as at the calibration
}

// Applied is the supersaturation that a calibrated counter has.
type Applied struct {
	Supersaturation float64 // fraction
	Uncertainty     float64 // of the line, by the counts of the calibration and their scatter
	// Sensitivity says what else moves it. Where measured particles are sized by
	// the same classifier or compared with the same water, give these to
	// kappa.Point: such errors cancel and must not be counted twice.
	Sensitivity Sensitivity
	Notes       []atmos.Note
}

// Apply returns the supersaturation at a temperature difference (K). Errors wrap
// ErrApply: no line, a supersaturation of 0 or below, another flow where its effect
// is not known, a pressure or flow without one to compare with.
func (c Calibration) Apply(difference float64, at Site) (Applied, error) {
	if c.Line == nil {
		return Applied{}, applyError("it has no line: %s", c.LineFault)
	}
	s, u := c.Line.At(difference), c.Line.Uncertainty(difference)*c.Line.Dispersion()
	if !(s > 0) {
		return Applied{}, applyError("the line is at %.3g %% at %.4g K, and such a supersaturation activates nothing; the lowest calibrated point lies at %.4g K", 100*s, difference, c.Line.Lowest)
	}
	factor, uFactor, err := c.carry(at)
	if err != nil {
		return Applied{}, err
	}
	a := Applied{Supersaturation: s * factor, Uncertainty: s * factor * math.Hypot(u/s, uFactor)}
	shift := func(i int) float64 {
		return (c.LineSensitivity[i].Intercept + c.LineSensitivity[i].Slope*difference) / s
	}
	a.Sensitivity = Sensitivity{Dry: shift(0), Tension: shift(1), Temperature: shift(2), Shape: shift(3)}
	switch {
	case difference < c.Line.Lowest:
		a.Notes = append(a.Notes, atmos.Note{Code: "below-calibration", Input: "temperature difference", Text: fmt.Sprintf(
			"%.4g K lies below the lowest calibrated point, %.4g K: the line is extrapolated, and counters leave it there.", difference, c.Line.Lowest)})
	case difference > c.Line.Highest:
		a.Notes = append(a.Notes, atmos.Note{Code: "above-calibration", Input: "temperature difference", Text: fmt.Sprintf(
			"%.4g K lies above the highest calibrated point, %.4g K: the line is extrapolated.", difference, c.Line.Highest)})
	}
	if factor != 1 {
		a.Notes = append(a.Notes, atmos.Note{Code: "calibration-carried", Input: "pressure", Text: fmt.Sprintf(
			"The calibration was carried to another pressure or flow by a factor of %.4g, to first order.", factor)})
	}
	return a, nil
}

// flowTolerance is how much flows may differ before the difference counts.
const flowTolerance = 0.01

// carry returns the factor to another pressure and flow and its relative
// uncertainty.
func (c Calibration) carry(at Site) (factor, u float64, err error) {
	factor = 1
	if at.Pressure != 0 {
		if !(at.Pressure > 0) || !(c.Pressure > 0) {
			return 0, 0, applyError("a pressure of %.5g Pa needs that of the calibration to compare with, which is %.5g Pa", at.Pressure, c.Pressure)
		}
		factor *= math.Pow(at.Pressure/c.Pressure, c.PressureExponent)
	}
	if at.Flow != 0 {
		if !(at.Flow > 0) || !(c.Flow > 0) {
			return 0, 0, applyError("a flow of %s needs that of the calibration to compare with, which is %s", OverFlow.show(at.Flow), OverFlow.show(c.Flow))
		}
		ratio := at.Flow / c.Flow
		if math.Abs(ratio-1) > flowTolerance && c.FlowExponent == 0 {
			return 0, 0, applyError("the calibration is for %s and not for %s: its flow exponent is not known; give one or add a flow ramp", OverFlow.show(c.Flow), OverFlow.show(at.Flow))
		}
		factor *= math.Pow(ratio, c.FlowExponent)
		u = math.Abs(math.Log(ratio)) * c.FlowExponentUncertainty
	}
	return factor, u, nil
}

func applyError(format string, args ...any) error {
	return fmt.Errorf("%w: %s", ErrApply, fmt.Sprintf(format, args...))
}

// Between returns the calibration at a time between two, by interpolating the line
// in time. Between calibrations a counter may drift back and forth: its path is
// taken as a random walk through both, which adds f(1-f) of the squared difference
// to the covariance, f being the share of the time that has passed. Before the
// first and after the last the nearer line is kept and the whole squared difference
// added, with a note. Data, standards and sensitivities are those of the nearer one.
// Errors wrap ErrApply.
func Between(a, b Calibration, time float64) (Calibration, error) {
	switch {
	case a.Line == nil || b.Line == nil:
		return Calibration{}, applyError("one of the two has no line: %s%s", a.LineFault, b.LineFault)
	case !(a.Time < b.Time):
		return Calibration{}, applyError("the first of the two must be the earlier one")
	case a.Flow > 0 && b.Flow > 0 && math.Abs(a.Flow/b.Flow-1) > flowTolerance:
		return Calibration{}, applyError("the two are for %s and %s", OverFlow.show(a.Flow), OverFlow.show(b.Flow))
	}
	f := math.Max(0, math.Min(1, (time-a.Time)/(b.Time-a.Time)))
	drift := f * (1 - f)
	c := a
	if f > 0.5 {
		c = b
	}
	c.Notes = append([]atmos.Note{}, c.Notes...)
	if time < a.Time || time > b.Time {
		drift = 1
		c.Notes = append(c.Notes, atmos.Note{Code: "outside-calibrations", Text: "The time lies outside the two calibrations: the nearer one is kept, with their difference as uncertainty."})
	}
	if a.Pressure > 0 && b.Pressure > 0 { // the later line at the pressure of the earlier one, and both at the one of c
		b = carried(b, c.Pressure)
		a = carried(a, c.Pressure)
	}
	line := mix(*a.Line, *b.Line, f, drift)
	c.Line, c.Time, c.LineBootstrap = &line, time, nil
	return c, nil
}

// carried is a calibration at another pressure.
func carried(c Calibration, pressure float64) Calibration {
	k := math.Pow(pressure/c.Pressure, c.PressureExponent)
	l := *c.Line
	l.Intercept, l.Slope, l.Scatter = k*l.Intercept, k*l.Slope, k*l.Scatter
	l.InterceptUncertainty, l.SlopeUncertainty = k*l.InterceptUncertainty, k*l.SlopeUncertainty
	l.Covariance *= k * k
	c.Line, c.Pressure = &l, pressure
	return c
}

// mix interpolates between two lines; drift is the share of their squared
// difference that is added to the covariance. Dispersions are put in.
func mix(a, b Line, f, drift float64) Line {
	p, q := (1-f)*a.Dispersion(), f*b.Dispersion()
	di, ds := b.Intercept-a.Intercept, b.Slope-a.Slope
	variance := func(ua, ub, d float64) float64 { return math.Sqrt(p*p*ua*ua + q*q*ub*ub + drift*d*d) }
	return Line{
		Intercept:            (1-f)*a.Intercept + f*b.Intercept,
		Slope:                (1-f)*a.Slope + f*b.Slope,
		InterceptUncertainty: variance(a.InterceptUncertainty, b.InterceptUncertainty, di),
		SlopeUncertainty:     variance(a.SlopeUncertainty, b.SlopeUncertainty, ds),
		Covariance:           p*p*a.Covariance + q*q*b.Covariance + drift*di*ds,
		Probability:          1,
		Lowest:               math.Max(a.Lowest, b.Lowest),
		Highest:              math.Min(a.Highest, b.Highest),
		Scatter:              math.Hypot(p*a.Scatter, q*b.Scatter),
	}
}
