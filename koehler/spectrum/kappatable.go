package spectrum

import (
	"math"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

// KappaTable is a κ that depends on dry size: given at some diameters, linear in
// ln D between them and held at its ends.
type KappaTable struct {
	*aerosol.Table
	kelvin float64
}

// NewKappaTable makes the table of kappas (0 to 30) at the diameters (m), which
// ascend, for a Kelvin length in m.
func NewKappaTable(diameters, kappas []float64, kelvin float64) (*KappaTable, error) {
	t, err := aerosol.NewTable(diameters, kappas)
	if err != nil {
		return nil, err
	}
	for i, k := range kappas {
		if k > mostKappa {
			return nil, unusable("kappa", i, k, "0 to 30")
		}
	}
	return &KappaTable{t, kelvin}, nil
}

// Critical returns the dry diameter (m) from which on every wider particle
// activates at s.
func (t *KappaTable) Critical(s float64) (float64, error) {
	x, err := t.crossings(nil, s)
	if err != nil {
		return math.NaN(), err
	}
	return math.Exp(x[len(x)-1]), nil
}

// AddCounts implements Composition. κ that falls faster than D^-3 makes wider
// particles activate later; every range of activated sizes is counted.
func (t *KappaTable) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	var room [8]float64
	for i, x := range s {
		turns, err := t.crossings(room[:0], x)
		if err != nil {
			return err
		}
		// the last range is open; those below it are closed, from the widest down
		for j, sign := len(turns)-1, 1.0; j >= 0; j-- {
			dst[i] += share * sign * sizes.Above(math.Exp(turns[j]))
			sign = -sign
		}
	}
	return nil
}

// tableSteps is how many places between two given diameters are looked at.
const tableSteps = 8

// crossings appends the ln D at which activation at s begins or ends, ascending;
// there is one at least, as the widest particles activate and the smallest do
// not. Two crossings closer than an eighth of the distance between two given
// diameters may be missed.
func (t *KappaTable) crossings(dst []float64, s float64) ([]float64, error) {
	ln := t.Ln()
	last := len(ln) - 1
	low, err := koehler.DryOf(t.AtLn(ln[0]), t.kelvin, s)
	if err != nil {
		return dst, err
	}
	high, err := koehler.DryOf(t.AtLn(ln[last]), t.kelvin, s)
	if err != nil {
		return dst, err
	}
	x0, f0 := ln[0], t.excess(ln[0], s)
	if !(f0 > 0) {
		dst = append(dst, math.Min(math.Log(low), x0))
	}
	for i := 1; i <= last; i++ {
		for k := 1; k <= tableSteps; k++ {
			x1 := ln[i-1] + (ln[i]-ln[i-1])*float64(k)/tableSteps
			f1 := t.excess(x1, s)
			if (f0 > 0) != (f1 > 0) {
				dst = append(dst, t.cross(x0, f0, x1, f1, s))
			}
			x0, f0 = x1, f1
		}
	}
	if f0 > 0 {
		dst = append(dst, math.Max(math.Log(high), x0))
	}
	return dst, nil
}

// excess is ln s_c - ln s at ln D = x: above 0 where the particle stays haze.
func (t *KappaTable) excess(x, s float64) float64 {
	return math.Log(koehler.SolveKappa(math.Exp(x), t.kelvin, t.AtLn(x)).Supersaturation / s)
}

// cross closes in on the crossing between a and b by the regula falsi of
// Illinois, which keeps the bracket.
func (t *KappaTable) cross(a, fa, b, fb, s float64) float64 {
	for range 100 {
		x := b - fb*(b-a)/(fb-fa)
		f := t.excess(x, s)
		if math.Abs(b-a) < 1e-14 || f == 0 {
			return x
		}
		if (f > 0) != (fb > 0) {
			a, fa = b, fb
		} else {
			fa /= 2
		}
		if b, fb = x, f; math.Abs(f) < 1e-14 {
			return x
		}
	}
	return b
}
