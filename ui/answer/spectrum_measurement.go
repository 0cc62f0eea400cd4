package answer

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"dropcrest/koehler/spectrum"
)

// measurement is what was counted at a supersaturation, with what it says.
type measurement struct {
	s, count, uncertainty float64 // 1/m³; NaN: not known
	flag                  string  // "" : none
	predicted             float64 // NaN: nothing to compare with
	critical              float64 // m, of the prediction
	kappa                 spectrum.CountKappa
	noKappa               error     // why the count implies no κ
	records               int       // that it is a mean of
	inherits              inherited // from the calibration of the counter
	isBetween             bool      // interpolated between measured ones: compared, but no pair of its own
}

// inPercent is a supersaturation in per cent without the last binary digits: 0.7 and
// not 0.7000000000000001, so that scripts find what was asked for.
func inPercent(s float64) float64 {
	x, err := strconv.ParseFloat(strconv.FormatFloat(100*s, 'g', 14, 64), 64)
	if err != nil {
		return 100 * s
	}
	return x
}

// ratio is predicted over measured, NaN where one is not known.
func (m measurement) ratio() float64 {
	if !(m.count > 0) {
		return math.NaN()
	}
	return m.predicted / m.count
}

// kappaUncertainty is that of κ from the uncertainty of the count, and of the
// supersaturation where a calibration gives it; NaN: not known.
func (m measurement) kappaUncertainty() float64 {
	if m.noKappa != nil || !(m.uncertainty >= 0) {
		return math.NaN()
	}
	return math.Abs(m.kappa.Kappa) * math.Hypot(m.kappa.ByCount*m.uncertainty/m.count, m.kappa.BySupersaturation*m.inherits.uncertainty)
}

// rejection is why measured points are left out, and how many.
type rejection struct {
	Reason string
	Count  int
}

// betweenFlag is the flag of a count that was interpolated.
const betweenFlag = "interpolated"

// interpolate adds counts at supersaturations that were asked for and lie between
// measured ones.
func (a *activated) interpolate() {
	var points []spectrum.Point
	var between []measurement
	for _, p := range a.predicted {
		if slices.ContainsFunc(a.measured, func(m measurement) bool { return sameLevel(m.s, p.s) }) {
			continue
		}
		if points == nil {
			if points, _ = a.measuredPoints(); len(points) < 2 {
				return
			}
		}
		at, err := spectrum.AtStandard(points, p.s)
		if err != nil {
			continue // beyond the measured ones
		}
		m := measurement{s: p.s, count: at.Count, uncertainty: math.NaN(), flag: betweenFlag, isBetween: true}
		if at.Uncertainty > 0 {
			m.uncertainty = at.Uncertainty
		}
		between = append(between, m)
	}
	if len(between) > 0 {
		a.measured = append(a.measured, between...)
		slices.SortStableFunc(a.measured, func(x, y measurement) int { return cmp.Compare(x.s, y.s) })
	}
}
