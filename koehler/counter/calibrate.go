package counter

import (
	"context"
	"fmt"
	"math"

	"dropcrest/koehler/internal/chunk"
	"dropcrest/solutes"
)

// Request is what Calibrate is asked for.
type Request struct {
	Scans     []Scan
	Standards []Standard // Scan.Standard counts through them
	Options   Options
	Bootstrap int // replicates; 0: none
	Seed      uint64
	Workers   int                     // 0: as many as there are cores. The result is the same for any number
	Progress  func(done, total int64) // fits done; nil: not called
	// Exponents of the pressure and the flow, see Calibration. PressureExponent 0
	// stands for 1, FlowExponent 0 for that of the flow ramps, if there are any.
	PressureExponent, FlowExponent float64
}

// Calibrate fits every scan, turns the sizes into critical supersaturations and
// draws the line. A scan that gives no curve keeps its fault and the others go on.
//
// When the context ends, the bootstrap keeps what there is; the error is that of the
// context, and the calibration lacks the curves that were not reached. Other errors
// are those of a Standard that cannot be used.
func Calibrate(ctx context.Context, r Request) (Calibration, error) {
	c := Calibration{Curve: r.Options.Curve.String(), PressureExponent: r.PressureExponent, FlowExponent: r.FlowExponent}
	if c.PressureExponent == 0 {
		c.PressureExponent = 1
	}
	if err := c.record(r); err != nil {
		return Calibration{}, err
	}
	fits := make([]Fit, len(r.Scans))
	results := make([]ScanResult, len(r.Scans))
	total := int64(len(r.Scans) + r.Bootstrap)
	progress := func(done int) {
		if r.Progress != nil {
			r.Progress(int64(done), total)
		}
	}
	ran, err := chunk.Run(ctx, len(r.Scans), r.Workers, func(i int) {
		results[i] = r.one(i, &fits[i])
	}, progress)
	c.Scans = results[:ran]
	for i := range c.Scans {
		c.LeftOut = append(c.LeftOut, fits[i].LeftOut...)
	}
	c.addNotes(fits[:ran])
	c.drawLine()
	c.fitFlowExponent()
	if err != nil || r.Bootstrap == 0 {
		return c, err
	}
	return c, c.bootstrap(ctx, r, fits, func(done int) { progress(len(r.Scans) + done) })
}

// record notes what the standards are made of.
func (c *Calibration) record(r Request) error {
	if len(r.Standards) == 0 {
		return inputError("no standard: a calibration needs the salt and its model")
	}
	for i, s := range r.Scans {
		if s.Standard < 0 || s.Standard >= len(r.Standards) {
			return inputError("scan %d names standard %d of %d", i+1, s.Standard+1, len(r.Standards))
		}
	}
	for _, s := range r.Standards {
		b, err := s.bind()
		if err != nil {
			return fmt.Errorf("standard %s: %w", s.Name, err)
		}
		T, p := s.Air.air()
		sigma, _ := b.particle.Tension.SurfaceTension(1e9)
		c.Standards = append(c.Standards, StandardRecord{
			Name: s.Name, Models: b.models, Temperature: s.Recipe.Temperature, SurfaceTension: sigma,
			WaterDensity: b.density, ShapeFactor: s.shape(), AirTemperature: T, AirPressure: p,
		})
		c.Notes = append(c.Notes, b.notes...)
	}
	return nil
}

// one fits a scan and finds its supersaturation.
func (r Request) one(i int, f *Fit) ScanResult {
	s := r.Scans[i]
	out := ScanResult{
		Name: s.Name, Over: s.Over, Standard: s.Standard, TemperatureDifference: s.TemperatureDifference,
		DifferenceUncertainty: s.DifferenceUncertainty, MobilityDiameter: s.DryDiameter, DiameterUncertainty: s.DiameterUncertainty,
		Flow: s.Flow, Pressure: s.Pressure, Time: s.Time,
	}
	var err error
	if *f, err = FitScan(s, r.Options); err != nil {
		out.Err, out.Fault = err, err.Error()
		return out
	}
	out.takeFit(f)
	standard := r.Standards[s.Standard]
	critical, err := standard.Critical(out.MobilityDiameter)
	if err != nil {
		out.Err, out.Fault = err, err.Error()
		return out
	}
	out.DryDiameter = critical.DryDiameter
	out.Supersaturation, out.Sensitivity = critical.Supersaturation, critical.Sensitivity
	out.SupersaturationUncertainty = math.Abs(critical.Sensitivity.Dry) * critical.Supersaturation * out.DiameterUncertainty / out.MobilityDiameter
	out.Choices = standard.Spread(out.MobilityDiameter)
	return out
}

// takeFit copies what the fit found to the axis that was scanned.
func (out *ScanResult) takeFit(f *Fit) {
	out.Width, out.Plateau, out.Double, out.Covariance = f.Width, f.Plateau, f.Double, f.Covariance
	out.ChiSquare, out.Freedom, out.Dispersion, out.Unresolved, out.Points = f.ChiSquare, f.Freedom, f.Dispersion, f.Unresolved, f.Points
	switch out.Over {
	case OverDiameter:
		out.MobilityDiameter, out.DiameterUncertainty = f.Midpoint.Value, f.Midpoint.Uncertainty
	case OverDifference:
		out.TemperatureDifference = f.Midpoint.Value
		out.DifferenceUncertainty = math.Hypot(out.DifferenceUncertainty, f.Midpoint.Uncertainty)
	case OverFlow:
		out.Flow, out.FlowUncertainty = f.Midpoint.Value, f.Midpoint.Uncertainty
	}
}

// addNotes takes the notes of the fits over, each once.
func (c *Calibration) addNotes(fits []Fit) {
	seen := map[string]bool{}
	for _, n := range c.Notes {
		seen[n.Code] = true
	}
	for _, f := range fits {
		for _, n := range f.Notes {
			if !seen[n.Code] {
				seen[n.Code] = true
				c.Notes = append(c.Notes, n)
			}
		}
	}
}

// drawLine draws the line through the scans that are not flow ramps.
func (c *Calibration) drawLine() {
	var points []LinePoint
	c.Pressure, c.Flow, c.Time = 0, 0, 0
	pressures, flows := 0, 0
	for i := range c.Scans {
		s := &c.Scans[i]
		if s.InLine = s.Fault == "" && s.Over != OverFlow; !s.InLine {
			continue
		}
		points = append(points, s.linePoint())
		c.Time += s.Time
		if s.Pressure > 0 {
			c.Pressure += s.Pressure
			pressures++
		}
		if s.Flow > 0 {
			c.Flow += s.Flow
			flows++
		}
	}
	if pressures > 0 {
		c.Pressure /= float64(pressures)
	}
	if flows > 0 {
		c.Flow /= float64(flows)
	}
	if len(points) > 0 {
		c.Time /= float64(len(points))
	}
	line, err := York(points)
	if err != nil {
		c.LineFault = err.Error()
		return
	}
	c.Line = &line
	c.LineSensitivity = c.shifts()
}

func (s *ScanResult) linePoint() LinePoint {
	return LinePoint{X: s.TemperatureDifference, Y: s.Supersaturation, UX: s.DifferenceUncertainty, UY: s.SupersaturationUncertainty}
}

// shifts is how errors that all scans share move the line: each point moves by its
// own sensitivity, and intercept and slope follow by the weights of the line.
func (c *Calibration) shifts() (out [4]LineShift) {
	var s, sx, sxx float64
	var sy, sxy [4]float64
	for _, r := range c.Scans {
		if !r.InLine {
			continue
		}
		p := r.linePoint()
		w := 1 / p.variance(c.Line.Slope)
		s, sx, sxx = s+w, sx+w*p.X, sxx+w*p.X*p.X
		for i, d := range [4]float64{r.Sensitivity.Dry, r.Sensitivity.Tension, r.Sensitivity.Temperature, r.Sensitivity.Shape} {
			sy[i] += w * d * p.Y
			sxy[i] += w * d * p.Y * p.X
		}
	}
	delta := s*sxx - sx*sx
	for i := range out {
		out[i] = LineShift{(sxx*sy[i] - sx*sxy[i]) / delta, (s*sxy[i] - sx*sy[i]) / delta}
	}
	return out
}

// fitFlowExponent takes the exponent of the flow from flow ramps, against the line:
// ln s/s_line(ΔT) = FlowExponent ln Q/Q_line, through the origin.
func (c *Calibration) fitFlowExponent() {
	if c.FlowExponent != 0 || c.Line == nil || !(c.Flow > 0) {
		return
	}
	above, below := 0.0, 0.0
	for _, r := range c.Scans {
		if r.Fault != "" || r.Over != OverFlow || !(c.Line.At(r.TemperatureDifference) > 0) {
			continue
		}
		s := c.Line.At(r.TemperatureDifference)
		x, y := math.Log(r.Flow/c.Flow), math.Log(r.Supersaturation/s)
		u := math.Hypot(r.FlowUncertainty/r.Flow, c.Line.Uncertainty(r.TemperatureDifference)*c.Line.Dispersion()/s)
		if math.Abs(x) < flowTolerance || !(u > 0) {
			continue
		}
		above += x * y / (u * u)
		below += x * x / (u * u)
	}
	if below > 0 {
		c.FlowExponent, c.FlowExponentUncertainty = above/below, 1/math.Sqrt(below)
	}
}

// bootstrap resamples the counts of all scans together, replicate by replicate,
// fits curves and line again and keeps the spread.
func (c *Calibration) bootstrap(ctx context.Context, r Request, fits []Fit, progress func(int)) error {
	n := len(c.Scans)
	midpoints := make([]float64, n*r.Bootstrap) // scan by scan
	intercepts, slopes := make([]float64, r.Bootstrap), make([]float64, r.Bootstrap)
	ran, err := chunk.Run(ctx, r.Bootstrap, r.Workers, func(k int) {
		points := make([]LinePoint, 0, n)
		for i := range c.Scans {
			s := c.Scans[i]
			if s.Fault != "" {
				continue
			}
			m := fits[i].resample(r.Seed, i, k)
			midpoints[i*r.Bootstrap+k] = m
			if s.InLine && !math.IsNaN(m) {
				points = append(points, s.moved(m))
			}
		}
		intercepts[k], slopes[k] = math.NaN(), math.NaN()
		if l, err := York(points); err == nil && c.Line != nil {
			intercepts[k], slopes[k] = l.Intercept, l.Slope
		}
	}, progress)
	for i := range c.Scans {
		if c.Scans[i].Fault == "" && ran > 0 {
			b := summarise(midpoints[i*r.Bootstrap : i*r.Bootstrap+ran])
			c.Scans[i].Bootstrap = &b
		}
	}
	if c.Line != nil && ran > 0 {
		c.LineBootstrap = &LineBootstrap{summarise(intercepts[:ran]), summarise(slopes[:ran])}
	}
	return err
}

// moved is the point of the line for another midpoint of the scan. Within the few
// per cent of counting ln s_c is straight against ln D.
func (s *ScanResult) moved(midpoint float64) LinePoint {
	p := s.linePoint()
	if s.Over == OverDifference {
		p.X = midpoint
		return p
	}
	p.Y *= math.Pow(midpoint/s.MobilityDiameter, s.Sensitivity.Dry)
	return p
}

// SaltStandard returns the usual standard of one salt: pure, dry, spherical unless
// the catalogue has a shape factor, with the tension of pure water and additive
// volumes. model names the water activity, temperature that of activation (K).
func SaltStandard(salt solutes.Substance, model solutes.Model, temperature float64, air Classifier) Standard {
	s := Standard{Name: salt.Name, Air: air, Recipe: solutes.Recipe{
		Parts: []solutes.Part{{Substance: salt, Volume: 1}}, Model: model,
		Kappa: math.NaN(), VantHoffFactor: math.NaN(), Temperature: temperature,
	}}
	if salt.ShapeFactor.Known() {
		s.ShapeFactor = salt.ShapeFactor.Value
	}
	return s
}
