package counter

import (
	"math"

	"dropcrest/atmos"
)

// Polarity is the sign of the particles that a classifier lets through.
type Polarity int

const (
	Positive Polarity = iota // the rod is negative
	Negative                 // the rod is positive; some 30 % more doubly charged particles
)

// maxSteps is the largest number of charges that are looked at.
const maxSteps = 4

// Classifier selects charged particles by their electrical mobility.
type Classifier struct {
	Polarity    Polarity
	Temperature float64 // of the air, K; 0: 296.15
	Pressure    float64 // Pa; 0: one standard atmosphere
	Charges     int     // the most that are counted, 1 to 4; 0: 4
}

func (c Classifier) air() (T, p float64) {
	T, p = c.Temperature, c.Pressure
	if T == 0 {
		T = 296.15
	}
	if p == 0 {
		p = atmos.StandardPressure
	}
	return T, p
}

func (c Classifier) most() int {
	if c.Charges <= 0 || c.Charges > maxSteps {
		return maxSteps
	}
	return c.Charges
}

// Multiple is one kind among the particles of equal mobility.
type Multiple struct {
	Charges  int
	Diameter float64 // m
	Share    float64 // of all selected particles
}

// Multiples appends to dst the particles that leave the classifier when it is set
// to the diameter d (m) of singly charged ones, by number of charges. sizes is
// dN/dln D of the aerosol before the charger, in any unit.
//
// The classifier passes a band of a constant relative width of mobility, so that
// the number of each kind goes with f_n(D_n) dN/dln D(D_n) |dln D/dln Z|. The
// shares add up to 1. Where no particles are there at all they are NaN.
func (c Classifier) Multiples(dst []Multiple, d float64, sizes func(d float64) float64) []Multiple {
	T, p := c.air()
	start, sum := len(dst), 0.0
	for n := 1; n <= c.most(); n++ {
		sign := n
		if c.Polarity == Negative {
			sign = -n
		}
		D := EqualMobility(d, n, T, p)
		number := ChargeFraction(D, sign, T) * sizes(D) * mobilityWidth(D, T, p)
		dst = append(dst, Multiple{n, D, number})
		sum += number
	}
	for i := range dst[start:] {
		dst[start+i].Share /= sum
	}
	return dst
}

// mobilityWidth returns |d ln D/d ln Z| at a diameter: 0.5 for small particles, 1
// for large ones.
func mobilityWidth(d, T, p float64) float64 {
	const h = 1e-4
	return 2 * h / math.Log(atmos.Mobility(d*math.Exp(-h), 1, T, p)/atmos.Mobility(d*math.Exp(h), 1, T, p))
}

// TransferWidth returns the standard deviation in ln D of the particles that a
// classifier passes at the diameter d (m), for a ratio of aerosol to sheath flow
// (0.1: 1 to 10). Its transfer function is a triangle of that relative half-width
// in mobility, without diffusion, whose standard deviation is the ratio over √6
// (Knutson and Whitby, J. Aerosol Sci. 6, 443, 1975; from memory). Diffusion makes
// it wider below some 50 nm.
func (c Classifier) TransferWidth(d, ratio float64) float64 {
	T, p := c.air()
	return ratio / math.Sqrt(6) * mobilityWidth(d, T, p)
}

// CutOff is the counting efficiency of a particle counter near its smallest sizes,
//
//	Plateau/(1 + exp((Half - d)/Scale))
//
// a common form of its published efficiency curves (common practice).
type CutOff struct {
	Half    float64 // m, where it counts half of its plateau
	Scale   float64 // m, above 0
	Plateau float64 // 0: 1
}

// Efficiency returns the share of particles of diameter d (m) that are counted, for
// Options.CNEfficiency.
func (c CutOff) Efficiency(d float64) float64 {
	top := c.Plateau
	if top == 0 {
		top = 1
	}
	return top / (1 + math.Exp((c.Half-d)/c.Scale))
}
