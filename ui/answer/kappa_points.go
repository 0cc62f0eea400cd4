package answer

import (
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/kappa"
	"dropcrest/ui/scenario"
)

// fewestTrials is the least of which quantiles mean anything.
const fewestTrials = 100

// newImplied takes the points of a scenario, one by one or from a file.
func newImplied(env Env, s scenario.Scenario) (*implied, error) {
	switch {
	case drawsTrials(s) && mostTrials(s) < fewestTrials:
		return nil, &InputError{"trials", fmt.Sprintf("%d trials make no interval: want %d or more, or 0 for linear propagation alone", mostTrials(s), fewestTrials)}
	case s.Coverage > 0.99 && drawsTrials(s):
		return nil, &InputError{"coverage", "the ends of so wide an interval rest on a handful of trials: want 99 % or less, or 0 trials for linear propagation alone"}
	}
	k := &implied{asked: s}
	if s.PointsFile != "" {
		points, notes, err := readPoints(env, s)
		if err != nil {
			return nil, err
		}
		k.points, k.notes = points, append(k.notes, notes...)
	} else {
		for i, p := range s.Measurements {
			if err := checkMeasurement(p); err != nil {
				return nil, &InputError{string(pathInPoint(i, err.Path)), err.Error()}
			}
			k.points = append(k.points, kappaPoint{Point: p, name: defaultName(i), water: conventionOf(s)})
		}
	}
	if err := k.readGrowthFactors(env); err != nil {
		return nil, err
	}
	for i := range k.points {
		p := &k.points[i]
		p.measured = p.asMeasured(s)
		s.Temperature = p.water.Temperature
		k.notes = distinct(append(k.notes, waterNotes(s)...))
	}
	s = k.asked
	if k.hasOwnWater() {
		k.note("water-of-points", "temperature", "Temperature and surface tension are those of the file, each measurement its own; the lines of the picture are for those of the question.")
	}
	if s.SurfaceTension.Is("solution") {
		k.notes = append(k.notes, atmos.Note{Code: "tension-of-solution", Input: "surface-tension",
			Text: "The tension of the solution is not known of particles that are only measured: κ is that of the tension of pure water."})
	}
	return k, nil
}

// hasOwnWater reports whether the water of a point is not that of the question.
func (k *implied) hasOwnWater() bool {
	asked := conventionOf(k.asked)
	return slices.ContainsFunc(k.points, func(m kappaPoint) bool { return m.water != asked })
}

// KappaGiven takes away what the first measurement has by default, or of a file, when
// an option gives it the other kind: a growth factor takes the place of a
// supersaturation, and the other way round. given reports which options were given.
func KappaGiven(s *scenario.Scenario, given func(option string) bool) {
	if len(s.Measurements) == 0 {
		return
	}
	p := &s.Measurements[0]
	switch activation, growth := given("supersaturation"), given("growth-factor"); {
	case given("growth-factors") && !activation && !growth && !p.Growth.Known():
		p.Supersaturation, p.Growth = scenario.Uncertain{}, exampleGrowth // the file has it
	case growth && !activation:
		p.Supersaturation = scenario.Uncertain{}
	case activation && !growth:
		p.Growth, p.Humidity = scenario.Uncertain{}, scenario.Uncertain{}
	}
}

// kappaFollows lets a growth factor take the place of a supersaturation, and the
// other way round, when a person gives or takes away one of them in a measurement.
func kappaFollows(s *scenario.Scenario, changed scenario.Path) {
	for i := range s.Measurements {
		p := &s.Measurements[i]
		switch changed {
		case "growth-factors":
			if i == 0 && s.GrowthFactors != "" && !p.Growth.Known() {
				p.Supersaturation, p.Growth, p.Humidity = scenario.Uncertain{}, exampleGrowth, exampleHumidity
			}
		case pathInPoint(i, "point[0].supersaturation"):
			if p.Supersaturation.Known() {
				p.Growth, p.Humidity = scenario.Uncertain{}, scenario.Uncertain{}
			} else {
				p.Growth, p.Humidity = exampleGrowth, exampleHumidity
			}
		case pathInPoint(i, "point[0].growth-factor"):
			switch {
			case !p.Growth.Known():
				p.Supersaturation, p.Humidity = scenario.Default().Measurements[0].Supersaturation, scenario.Uncertain{}
			case !p.Humidity.Known():
				p.Supersaturation, p.Humidity = scenario.Uncertain{}, exampleHumidity
			}
		}
	}
}

// The measurement of growth that a person starts from, invented.
var (
	exampleGrowth   = scenario.Uncertain{Value: 1.4, Own: 0.02}
	exampleHumidity = scenario.Uncertain{Value: 0.9, Own: 0.01}
)

// checkMeasurement says what a measurement lacks.
func checkMeasurement(p scenario.Point) *scenario.ValueError {
	s := scenario.Default()
	s.Measurements = []scenario.Point{p}
	if wrong := scenario.Check(&s); len(wrong) > 0 {
		return wrong[0]
	}
	return nil
}

// pathInPoint is a path in the first point as one in point i.
func pathInPoint(i int, first scenario.Path) scenario.Path {
	const head = "point[0]."
	if len(first) < len(head) {
		return first
	}
	return scenario.Path(fmt.Sprintf("point[%d].%s", i, first[len(head):]))
}

// defaultName is the name of a point without one.
func defaultName(i int) string { return fmt.Sprintf("%d", i+1) }

// conventionOf is the actual water of a scenario.
func conventionOf(s scenario.Scenario) kappa.Convention {
	c := kappa.Convention{Temperature: s.Temperature}
	if s.SurfaceTension.Word == "" {
		c.Tension = s.SurfaceTension.Number
	}
	return c
}

// asMeasured is the point as the library takes it. The classifier's air is that of
// the Curve page: the temperature of the particle and one standard atmosphere.
func (m *kappaPoint) asMeasured(s scenario.Scenario) kappa.Point {
	p := kappa.Point{
		Name: m.name, Dry: measured(m.Dry),
		Temperature: kappa.Measured{Value: m.water.Temperature, Systematic: s.TemperatureUncertainty},
		Tension:     kappa.Measured{Value: m.water.Tension, Systematic: s.TensionUncertainty},
	}
	if m.Growth.Known() {
		p.Method, p.Grown, p.Humidity = kappa.GrowthRate, measured(m.Growth), measured(m.Humidity)
	} else {
		p.Supersaturation = measured(m.Supersaturation)
	}
	if s.DrySizeIs == "mobility" {
		p.Shape = kappa.Measured{Value: s.ShapeFactor, Systematic: s.ShapeUncertainty}
		p.SizingTemperature = m.water.Temperature
	}
	return p
}

func measured(u scenario.Uncertain) kappa.Measured {
	return kappa.Measured{Value: u.Value, Independent: u.Own, Systematic: u.Common}
}

// isGrowth reports whether κ is from a growth factor.
func (m *kappaPoint) isGrowth() bool { return m.measured.Method == kappa.GrowthRate }

// volumeDiameter is the volume-equivalent dry diameter in m.
func (m *kappaPoint) volumeDiameter() float64 {
	p := m.measured
	if p.Shape.Value == 0 {
		return p.Dry.Value
	}
	return atmos.VolumeEquivalent(p.Dry.Value, p.Shape.Value, p.SizingTemperature, atmos.StandardPressure)
}

// fill adds what stands beside κ.
func (m *kappaPoint) fill() {
	m.withoutKelvin = math.NaN()
	if m.Err != nil {
		return
	}
	if !m.isGrowth() {
		m.fillSpread()
		return
	}
	if g, err := kappa.FromGrowth(m.volumeDiameter(), m.Growth.Value, m.Humidity.Value, m.water); err == nil {
		m.withoutKelvin = g.WithoutKelvin
	}
}

// fillSpread adds what the width and the plateau of an activation curve say.
func (m *kappaPoint) fillSpread() {
	if m.Width == 0 && m.Plateau == 1 {
		return
	}
	c := kappa.Curve{D50: m.volumeDiameter(), Width: m.Width, TransferWidth: m.TransferWidth, Plateau: m.Plateau}
	if p, err := kappa.FromCurve(c, m.Supersaturation.Value, m.water); err == nil {
		m.spread = &p
	}
}

// contribution is the part of the uncertainty of κ that one input makes.
type contribution struct {
	quantity   kappa.Quantity
	systematic bool
	relative   float64 // ∂ ln κ/∂ ln x; NaN for several points
	signed     float64 // contribution to κ with its sign; of several points without
	share      float64 // of the variance
}

func contributionsOf(e kappa.Estimate) []contribution {
	var out []contribution
	for _, c := range e.Linear.Contributions {
		out = append(out, contribution{c.Quantity, c.Systematic, c.Relative, c.Signed(), c.Share})
	}
	return out
}

// sumOfContributions ranks what the inputs of several points contribute to their
// mean: independent parts in quadrature, common ones with their signs.
func sumOfContributions(good []kappa.Estimate, total float64) []contribution {
	var out []contribution
	variance := 0.0
	for _, systematic := range []bool{false, true} {
		for q := kappa.Dry; q <= kappa.Shape; q++ {
			sum, any := 0.0, false
			for _, e := range good {
				w := weightOf(e) / total
				for _, c := range e.Linear.Contributions {
					switch {
					case c.Quantity != q || c.Systematic != systematic:
						continue
					case systematic:
						sum += w * c.Signed()
					default:
						sum = math.Hypot(sum, w*c.Signed())
					}
					any = true
				}
			}
			if any {
				out = append(out, contribution{q, systematic, math.NaN(), sum, sum * sum})
				variance += sum * sum
			}
		}
	}
	for i := range out {
		if variance > 0 {
			out[i].share /= variance
		}
	}
	slices.SortStableFunc(out, func(a, b contribution) int {
		switch {
		case a.share > b.share:
			return -1
		case a.share < b.share:
			return 1
		}
		return 0
	})
	return out
}
