package spectrum

import (
	"math"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

// CrossCheck finds out which supersaturation a counter really has: over many records
// at one setting it looks for the dry diameter above which there are, on the whole,
// as many particles as activated (slope through the origin 1). A plausible κ turns
// it into a supersaturation (Schmale et al. 2017, Sci. Data 4, 170003, as a check).
// Memory is constant.
type CrossCheck struct {
	ln       []float64
	xx, xy   []float64 // ΣN(>D)² and ΣN(>D) activated
	accepted int
}

// NewCrossCheck looks at n diameters (2 or more), equal in ln D, from low to high (m).
func NewCrossCheck(low, high float64, n int) (*CrossCheck, error) {
	if !(low > 0 && high > low) || math.IsInf(high, 1) {
		return nil, unusable("range of diameters", -1, low, "above 0 and below its upper end, in m")
	}
	if n < 2 {
		return nil, unusable("number of diameters", -1, float64(n), "2 or more")
	}
	c := &CrossCheck{ln: make([]float64, n), xx: make([]float64, n), xy: make([]float64, n)}
	for i := range c.ln {
		c.ln[i] = math.Log(low) + math.Log(high/low)*float64(i)/float64(n-1)
	}
	return c, nil
}

// Add takes one record: its sizes and the number activated (1/m³). A number that is
// missing, infinite or negative is left out.
func (c *CrossCheck) Add(sizes *aerosol.Bins, activated float64) {
	if !(activated >= 0) || math.IsInf(activated, 1) {
		return
	}
	c.accepted++
	for i, x := range c.ln {
		n := sizes.Above(math.Exp(x))
		c.xx[i] += n * n
		c.xy[i] += n * activated
	}
}

// Diameter returns the dry diameter (m) of slope 1, linear in ln D between the
// diameters looked at. ok is false where none of them fits, or nothing was added.
func (c *CrossCheck) Diameter() (d float64, ok bool) {
	// the slope Σxy/Σxx rises with D, as fewer particles are above it
	last := math.NaN()
	for i := range c.ln {
		slope := math.Log(c.xy[i] / c.xx[i])
		if last <= 0 && slope >= 0 {
			w := -last / (slope - last)
			if slope == last {
				w = 0
			}
			return math.Exp(c.ln[i-1] + w*(c.ln[i]-c.ln[i-1])), true
		}
		last = slope
	}
	return math.NaN(), false
}

// Supersaturation returns the supersaturation at which particles of this κ and of
// Diameter activate, for the Kelvin length in m.
func (c *CrossCheck) Supersaturation(kappa, kelvin float64) (s float64, ok bool) {
	d, ok := c.Diameter()
	if !ok {
		return math.NaN(), false
	}
	return koehler.SolveKappa(d, kelvin, kappa).Supersaturation, true
}
