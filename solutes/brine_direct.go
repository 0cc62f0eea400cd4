package solutes

import "math"

// Solution returns the water activity of a particle of the mixture: molality is
// that at u = 1 (dry density over molar mass over density of water), largest the
// end of the range, both mol of solute per kg of water. It evaluates the model at
// each call, some 0.5 µs. Errors are of type *UnusableError.
func (b *Brine) Solution(molality, largest float64) (*OsmoticSolution, error) {
	const model, want = "ion mixture", "above 0 and finite (mol/kg)"
	if !(molality > 0) || math.IsInf(molality, 1) {
		return nil, &UnusableError{model, "the molality at u = 1", molality, want}
	}
	if !(largest > 0) || math.IsInf(largest, 1) {
		return nil, &UnusableError{model, "the largest molality", largest, want}
	}
	return &OsmoticSolution{model: directBrine{b, largest}, ions: b.total, molality: molality, highest: largest}, nil
}

// directBrine is the model without a table.
type directBrine struct {
	*Brine
	top float64
}

func (d directBrine) lnActivity(m float64) (lnaw, slope float64) {
	at := min(m, d.top)
	phi, change := d.Osmotic(at)
	w := -d.total * waterMolarMass * at
	return powerBeyond(w*phi, w*(phi+change), m/at)
}

// powerBeyond continues ln a_w and its slope by ln m from the end of a range to
// ratio times its molality, ratio ≥ 1, as a power: finite and monotone.
func powerBeyond(lnaw, slope, ratio float64) (float64, float64) {
	if ratio == 1 {
		return lnaw, slope
	}
	lnaw, power := lnaw*math.Pow(ratio, slope/lnaw), slope/lnaw
	return lnaw, lnaw * power
}
