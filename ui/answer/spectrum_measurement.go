package answer

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"

	"dropcrest/koehler/counter"
	"dropcrest/koehler/spectrum"
)

// measurement is what was counted at a supersaturation, with what it says.
type measurement struct {
	s, count, uncertainty float64             // 1/m³; NaN: not known
	levelUncertainty      float64             // of s, by the counts of the calibration; 0: none is known
	transfer              counter.Sensitivity // of s, by the calibration; zero: none
	flag                  string              // "" : none
	predicted             float64             // NaN: nothing to compare with
	critical              float64             // m, of the prediction
	kappa                 spectrum.CountKappa
	noKappa               error // why the count implies no κ
	records               int   // that it is a mean of
	isBetween             bool  // interpolated between measured ones: compared, but no pair of its own
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

// levelWords is a supersaturation in per cent for a sentence: that of a calibration
// has digits enough to fill a line with them.
func levelWords(s float64) string { return fmt.Sprintf("%.4g", 100*s) }

// ratio is predicted over measured, NaN where one is not known.
func (m measurement) ratio() float64 {
	if !(m.count > 0) {
		return math.NaN()
	}
	return m.predicted / m.count
}

// kappaUncertainty is that of κ from the uncertainty of the count, and of the
// supersaturation by the calibration where there is one; NaN: not known. Errors of
// surface tension, temperature and sizing that the calibration shares with the
// measurement are in neither, so that none is counted twice.
func (m measurement) kappaUncertainty() float64 {
	if m.noKappa != nil || !(m.uncertainty >= 0) {
		return math.NaN()
	}
	return math.Abs(m.kappa.Kappa) * math.Hypot(m.kappa.ByCount*m.uncertainty/m.count, m.kappa.BySupersaturation*m.levelUncertainty/m.s)
}

// rejection is why measured points are left out, and how many.
type rejection struct {
	Reason string
	Count  int
}

// rejections are what is left out, a line for each reason in the order it came up.
type rejections []rejection

// add counts a point that is left out.
func (r *rejections) add(why string) {
	for i := range *r {
		if (*r)[i].Reason == why {
			(*r)[i].Count++
			return
		}
	}
	*r = append(*r, rejection{why, 1})
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
