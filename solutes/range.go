package solutes

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// RangeNotes says which models are used outside their published range in a drop
// that holds u volumes of water per dry volume, and which parts are taken as
// dissolved beyond their solubility; nil: none. The density polynomials and the
// water activity models end at different concentrations.
func (d Dissolved) RangeNotes(u float64) []atmos.Note {
	var notes []atmos.Note
	if least := d.Solution.LeastWater(); u < least {
		lnaw, _ := d.Solution.LnActivity(least)
		notes = append(notes, atmos.Note{Code: "activity-outside-range", Input: inputActivity, Text: fmt.Sprintf(
			"The solution is more concentrated than its water activity model covers: it is extrapolated below a water activity of %.3f.", math.Exp(lnaw))})
	}
	if m, ok := d.Swelling.(*MeasuredDensity); ok && u < m.LeastWater() {
		notes = append(notes, atmos.Note{Code: "density-outside-range", Input: inputDensity, Text: fmt.Sprintf(
			"The solution is more concentrated than its measured density covers: it is extrapolated above %.3g %% of solute by mass.", m.MostMassPercent())})
	}
	for _, l := range d.Limits {
		if !l.Kept && u < l.Water {
			notes = append(notes, l.note())
		}
	}
	return notes
}

func (l Limit) note() atmos.Note {
	n := atmos.Note{Code: "beyond-solubility", Input: inputSolubility}
	if math.IsInf(l.Water, 1) {
		n.Text = fmt.Sprintf("%s is taken as dissolved, but its solubility is given as 0.", l.Substance)
		return n
	}
	n.Text = fmt.Sprintf("%s is taken as wholly dissolved; its solubility allows that only from %.4g times the dry diameter on. "+
		"Limited solubility with water activity by kappa shows the barrier of a particle that starts dry.", l.Substance, math.Cbrt(1+l.Water))
	return n
}
