package kappa

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// Method says what a κ was measured by. κ of growth factors and of activation
// are never merged: they are known to disagree.
type Method int

const (
	Activation Method = iota // dry diameter and critical supersaturation
	Counts                   // the same with the critical dry diameter of a count
	GrowthRate               // dry diameter, growth factor and humidity
)

// String returns the word that scripts see.
func (m Method) String() string {
	switch m {
	case Activation:
		return "activation"
	case Counts:
		return "counts"
	case GrowthRate:
		return "growth factor"
	}
	return "unknown method"
}

// Quantity names one of the inputs of a Point.
type Quantity int

const (
	Dry             Quantity = iota // dry diameter, m
	Supersaturation                 // fraction
	Grown                           // growth factor
	Humidity                        // saturation ratio
	Temperature                     // K
	Tension                         // surface tension, N/m
	Shape                           // dynamic shape factor
	quantities
)

// String returns the quantity in words.
func (q Quantity) String() string {
	return [quantities]string{"dry diameter", "supersaturation", "growth factor", "relative humidity",
		"temperature", "surface tension", "shape factor"}[q]
}

// Measured is a value with its standard uncertainties, all in the same unit.
// The independent part belongs to this point alone, such as counting. The
// systematic part is common to all points: when it is one standard deviation
// off at one of them it is so at each, such as a calibration. Both are normal.
type Measured struct {
	Value       float64
	Independent float64
	Systematic  float64
}

// Transfer is what a supersaturation inherits from a calibration with a salt
// that was made with the same classifier and the same water: derivatives of its
// logarithm. Where the systematic parts of size, tension and temperature move
// the point they move the calibration too, and largely cancel: the calibrated
// supersaturation is that of the salt, κ ≈ κ_salt (D_salt/D)³. The zero value
// is a supersaturation that depends on none of them.
type Transfer struct {
	Dry         float64 // d ln s/d ln D, about -1.5
	Tension     float64 // d ln s/d ln σ, about 1.5
	Temperature float64 // d ln s/dT, 1/K, about -0.008 with the tension of water
	Shape       float64 // d ln s/d ln χ
}

// Point is one measurement.
type Point struct {
	Name   string
	Method Method

	Dry             Measured // m; volume-equivalent, or mobility diameter where there is a Shape
	Supersaturation Measured // fraction: Activation and Counts
	Grown           Measured // growth factor: GrowthRate
	Humidity        Measured // saturation ratio: GrowthRate
	Temperature     Measured // K
	Tension         Measured // N/m; Value 0: that of pure water, which follows the temperature
	Shape           Measured // dynamic shape factor; Value 0: Dry is volume-equivalent

	// The air of the classifier, where there is a Shape.
	SizingTemperature float64 // K; 0: 296.15
	SizingPressure    float64 // Pa; 0: one standard atmosphere

	Transfer Transfer
}

// inputs are the values of one trial.
type inputs [quantities]float64

func (p *Point) measured() [quantities]Measured {
	m := [quantities]Measured{p.Dry, p.Supersaturation, p.Grown, p.Humidity, p.Temperature, p.Tension, p.Shape}
	unused := []Quantity{Supersaturation}
	if p.Method != GrowthRate {
		unused = []Quantity{Grown, Humidity}
	}
	if p.Shape.Value == 0 {
		unused = append(unused, Shape)
	}
	for _, q := range unused {
		m[q] = Measured{}
	}
	return m
}

// Check returns an error that says which input is out of its range. It wraps
// koehler.ErrInput.
func (p *Point) Check() error {
	for q, m := range p.measured() {
		if err := checkMeasured(Quantity(q), m); err != nil {
			return err
		}
	}
	if err := (Convention{p.Temperature.Value, p.Tension.Value}).Check(); err != nil {
		return err
	}
	if !(p.Shape.Value >= 0) {
		return &koehler.RangeError{What: "shape factor", Value: p.Shape.Value, Right: "1 or a little more"}
	}
	return nil
}

func checkMeasured(q Quantity, m Measured) error {
	switch {
	case math.IsNaN(m.Value) || math.IsInf(m.Value, 0):
		return &koehler.RangeError{What: q.String(), Value: m.Value, Right: "a finite number"}
	case !(m.Independent >= 0) || math.IsInf(m.Independent, 1):
		return &koehler.RangeError{What: "standard uncertainty of the " + q.String(), Value: m.Independent, Right: "0 or more"}
	case !(m.Systematic >= 0) || math.IsInf(m.Systematic, 1):
		return &koehler.RangeError{What: "systematic uncertainty of the " + q.String(), Value: m.Systematic, Right: "0 or more"}
	}
	return nil
}

// model is a point made ready to be evaluated again and again.
type model struct {
	point    *Point
	measured [quantities]Measured
	values   inputs
	kelvin   float64 // m, where neither temperature nor tension vary
	moves    bool    // the Kelvin length varies
	inherits bool    // the calibration is moved by systematic parts
	isShaped bool
	isGrowth bool
}

func newModel(p *Point) *model {
	m := &model{point: p, measured: p.measured(), isShaped: p.Shape.Value != 0, isGrowth: p.Method == GrowthRate}
	varies := func(q Quantity) bool { return m.measured[q].Independent > 0 || m.measured[q].Systematic > 0 }
	for q := range m.measured {
		m.values[q] = m.measured[q].Value
	}
	if p.Tension.Value == 0 {
		m.values[Tension] = atmos.SurfaceTension(p.Temperature.Value)
	}
	m.kelvin = koehler.KelvinLength(m.values[Tension], p.Temperature.Value)
	m.moves = varies(Temperature) || varies(Tension)
	m.inherits = !m.isGrowth && p.Transfer != Transfer{}
	return m
}

// ready turns the values of a trial into what the inverses want. common holds
// by how much the systematic parts move the values: it reaches the
// supersaturation through the calibration.
func (m *model) ready(x, common *inputs) (dry, kelvin, s float64) {
	dry, kelvin, s = x[Dry], m.kelvin, x[Supersaturation]
	if m.moves || x[Temperature] != m.values[Temperature] || x[Tension] != m.values[Tension] {
		sigma := x[Tension]
		if m.point.Tension.Value == 0 { // what it is off, on top of that of pure water
			sigma += atmos.SurfaceTension(x[Temperature]) - m.values[Tension]
		}
		kelvin = koehler.KelvinLength(sigma, x[Temperature])
	}
	if m.isShaped {
		dry = atmos.VolumeEquivalent(dry, x[Shape], m.sizingTemperature(), m.sizingPressure())
	}
	if m.inherits {
		s *= math.Exp(m.inherited(common))
	}
	return dry, kelvin, s
}

// inherited is by how much the systematic parts move ln s.
func (m *model) inherited(common *inputs) float64 {
	t, v := m.point.Transfer, &m.values
	shift := t.Dry*math.Log1p(common[Dry]/v[Dry]) + t.Tension*math.Log1p(common[Tension]/v[Tension]) + t.Temperature*common[Temperature]
	if m.isShaped {
		shift += t.Shape * math.Log1p(common[Shape]/v[Shape])
	}
	return shift
}

func (m *model) sizingTemperature() float64 {
	if m.point.SizingTemperature == 0 {
		return 296.15
	}
	return m.point.SizingTemperature
}

func (m *model) sizingPressure() float64 {
	if m.point.SizingPressure == 0 {
		return atmos.StandardPressure
	}
	return m.point.SizingPressure
}

// value is the κ of the point as measured.
func (m *model) value() (Value, error) {
	var still inputs
	dry, kelvin, s := m.ready(&m.values, &still)
	return m.under(dry, s, Convention{m.values[Temperature], m.values[Tension]}, kelvin)
}

// under is the κ under a convention, kelvin being its Kelvin length.
func (m *model) under(dry, s float64, c Convention, kelvin float64) (Value, error) {
	if m.isGrowth {
		g, err := FromGrowth(dry, m.values[Grown], m.values[Humidity], c)
		return Value{g.Kappa, math.NaN()}, err
	}
	k, err := koehler.KappaOf(dry, kelvin, s)
	if err != nil {
		return Value{math.NaN(), math.NaN()}, err
	}
	return Value{k, koehler.KappaOfClassic(dry, kelvin, s)}, nil
}

// trial is the κ of one trial. Where the values have no κ it is 0 or +Inf,
// whichever end they lie beyond, so that quantiles stay what they are.
func (m *model) trial(x, common *inputs) float64 {
	dry, kelvin, s := m.ready(x, common)
	if !(dry > 0) {
		return math.Inf(1)
	}
	if !(kelvin > 0) {
		return 0
	}
	if m.isGrowth {
		gf, humidity := x[Grown], x[Humidity]
		if !(humidity > 0) {
			return math.Inf(1)
		}
		if !(gf > 0) {
			return 0
		}
		return math.Max(0, growthKappa(gf, humidity/math.Exp(kelvin/(gf*dry))))
	}
	if !(s > 0) {
		return math.Inf(1)
	}
	if s >= kelvin/dry && math.Log1p(s) >= kelvin/dry { // s ≥ ln(1+s)
		return 0
	}
	k, err := koehler.KappaOf(dry, kelvin, s)
	if err != nil {
		return math.NaN()
	}
	return k
}
