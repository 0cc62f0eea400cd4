package solutes

import "math"

// NonelectrolyteNote says what the models of sugars and citric acid leave out.
const NonelectrolyteNote = "water activity of sugars and citric acid: values of 25 °C at all temperatures"

// CitricAcidNote says what the model of citric acid leaves out besides.
const CitricAcidNote = "the dissociation of citric acid is left out: with it κ at activation is 0.166 to 0.172 and not 0.157"

// nonelectrolyte is a solute of one molecule: a dilute law, blended over a
// window of molality with Norrish's equation (R. S. Norrish, J. Food Technol. 1,
// 25, 1966; from memory)
//
//	a_w = x_w exp(-k x_s²)
//
// where x are mole fractions.
type nonelectrolyte struct {
	norrish   float64 // k
	quartic   bool    // dilute law of sucrose; else the ideal solution a_w = x_w
	low, high float64 // window, mol/kg
}

// Blend windows. Sucrose: where the quartic ends. Glucose and citric acid: at
// ideal water activities from 0.97 down to 0.95.
const (
	sucroseLow, sucroseHigh = 5, 6
	idealUpper, idealLower  = 0.97, 0.95
)

// nonelectrolyteOf finds the model and the least water activity by the key of
// the catalogue; k from Chirife et al., J. Food Technol. 15, 59, 1980 (from
// memory).
//
// Sucrose ends at saturation, where Norrish's equation gives 0.850 and the
// quartic 0.849; for the others 0.3 is the end of the data behind k.
func nonelectrolyteOf(key string) (model nonelectrolyte, least float64, ok bool) {
	low, high := (1/idealUpper-1)/waterMolarMass, (1/idealLower-1)/waterMolarMass
	switch key {
	case "sucrose":
		return nonelectrolyte{6.47, true, sucroseLow, sucroseHigh}, 0.85, true
	case "glucose":
		return nonelectrolyte{2.25, false, low, high}, 0.3, true
	case "citric_acid":
		return nonelectrolyte{6.17, false, low, high}, 0.3, true
	}
	return nonelectrolyte{}, 0, false
}

// NewNonelectrolyte returns the solution of sucrose, glucose or citric acid (by
// its Key) at T, 180 to 373.15 K. Errors are of type *UnusableError or
// *NoModelError.
func NewNonelectrolyte(s Substance, T float64) (*OsmoticSolution, error) {
	model, least, ok := nonelectrolyteOf(s.Key)
	if !ok {
		return nil, &NoModelError{s.Name, "sucrose, glucose or citric acid"}
	}
	one, err := molalityAtOne(s, T)
	if err != nil {
		return nil, err
	}
	return &OsmoticSolution{model: model, ions: 1, molality: one, highest: model.molalityAt(least)}, nil
}

func (n nonelectrolyte) lnActivity(m float64) (lnaw, slope float64) {
	switch {
	case m <= n.low:
		return n.dilute(m)
	case m >= n.high:
		return n.concentrated(m)
	}
	l1, d1 := n.dilute(m)
	l2, d2 := n.concentrated(m)
	t := (m - n.low) / (n.high - n.low)
	s, ds := t*t*(3-2*t), 6*t*(1-t)*m/(n.high-n.low)
	return l1 + s*(l2-l1), d1 + s*(d2-d1) + ds*(l2-l1)
}

// dilute is Robinson and Stokes' quartic for sucrose (J. Phys. Chem. 65, 1954,
// 1961; from memory), or the ideal solution.
func (n nonelectrolyte) dilute(m float64) (lnaw, slope float64) {
	if !n.quartic {
		return -math.Log1p(waterMolarMass * m), -waterMolarMass * m / (1 + waterMolarMass*m)
	}
	const c1, c2, c3, c4 = 0.07028, 0.01847, -0.004045, 0.000228
	phi := 1 + m*(c1+m*(c2+m*(c3+m*c4)))
	d := m * (c1 + m*(2*c2+m*(3*c3+m*4*c4)))
	return -waterMolarMass * m * phi, -waterMolarMass * m * (phi + d)
}

func (n nonelectrolyte) concentrated(m float64) (lnaw, slope float64) {
	w := waterMolarMass * m
	x := w / (1 + w) // mole fraction of the solute; d ln x/d ln m = 1 - x
	return -math.Log1p(w) - n.norrish*x*x, -x - 2*n.norrish*x*x*(1-x)
}

// molalityAt returns the molality of a water activity, by halving in ln m.
func (n nonelectrolyte) molalityAt(aw float64) float64 {
	low, high := math.Log(1e-3), math.Log(1e3)
	for range 60 {
		mid := 0.5 * (low + high)
		if l, _ := n.lnActivity(math.Exp(mid)); l > math.Log(aw) {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Exp(low)
}
