package spectrum

import (
	"math"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"gonum.org/v1/gonum/integrate/quad"
)

// Spread is a κ that differs from particle to particle, whatever its size:
// lognormal about a median, so that a population goes over from an internal to
// an external mixture as GSD grows.
type Spread struct {
	Median       float64 // κ, above 0
	GSD          float64 // geometric standard deviation of κ, above 1 (1 itself: Kappa)
	KelvinLength float64 // m
}

// mostKappa is where koehler.DryOf ends; the part of a wide spread beyond is
// counted with it.
const mostKappa = 30

// Critical returns the critical dry diameter of the median κ.
func (k Spread) Critical(s float64) (float64, error) {
	return koehler.DryOf(k.Median, k.KelvinLength, s)
}

func (k Spread) check() error {
	switch {
	case !(k.Median > 0 && k.Median <= mostKappa):
		return unusable("median kappa", -1, k.Median, "above 0 and up to 30")
	case !(k.GSD > 1 && k.GSD <= aerosol.MostGSD):
		return unusable("spread of kappa", -1, k.GSD, "above 1 and up to 10 (a geometric standard deviation; without spread use one kappa)")
	}
	return nil
}

// cut is the critical dry diameter z standard deviations from the median.
func (k Spread) cut(z, lnGSD, s float64) float64 {
	d, _ := koehler.DryOf(math.Min(k.Median*math.Exp(z*lnGSD), mostKappa), k.KelvinLength, s)
	return d
}

// AddCounts implements Composition:
//
//	N(s) = ∫ φ(z) N(>D*(κ_g σ_κ^z, s)) dz
//
// over z from -9 to 9. For a smooth size distribution that is the trapezoidal rule,
// whose error falls exponentially with the step; where the density jumps, Gauss
// quadrature between the jumps.
func (k Spread) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	if err := k.check(); err != nil {
		return err
	}
	lnGSD := math.Log(k.GSD)
	jumps, isBroken := sizes.(broken)
	step := trapezoidStep(sizes, lnGSD)
	for i, x := range s {
		if _, err := k.Critical(x); err != nil {
			return err
		}
		if isBroken {
			dst[i] += share * k.pieces(x, lnGSD, sizes, jumps.Breaks())
		} else {
			dst[i] += share * k.trapezoid(x, lnGSD, sizes, step)
		}
	}
	return nil
}

// spreadReach is how many standard deviations of ln κ are counted; beyond lie
// 2e-19 of the particles.
const spreadReach = 9

// trapezoidStep is the step in z. With a step h ≤ 1/4 the rule is exact to
// rounding for the Gaussian itself (error exp(-2π²/h²)); the edge of a mode, as
// seen over z, must not be steeper than that either.
func trapezoidStep(sizes Sizes, lnGSD float64) float64 {
	narrowest := 0.2
	switch m := sizes.(type) {
	case aerosol.Mode:
		narrowest = math.Log(m.GSD)
	case aerosol.Modes:
		for i, mode := range m {
			if w := math.Log(mode.GSD); i == 0 || w < narrowest {
				narrowest = w
			}
		}
	}
	return math.Min(0.25, 0.75*narrowest/lnGSD)
}

func (k Spread) trapezoid(s, lnGSD float64, sizes Sizes, step float64) float64 {
	n := int(math.Ceil(spreadReach / step))
	sum := 0.0
	for i := -n; i <= n; i++ {
		z := float64(i) * step
		sum += math.Exp(-z*z/2) * sizes.Above(k.cut(z, lnGSD, s))
	}
	return sum * step / math.Sqrt(2*math.Pi)
}

// The pieces of pieces: at most so wide in z, with so many points.
const (
	pieceWidth  = 0.75
	piecePoints = 4
)

func (k Spread) pieces(s, lnGSD float64, sizes Sizes, jumps []float64) float64 {
	limit := k.KelvinLength / math.Log1p(s) // wider particles activate without any κ
	var nodes, weights [piecePoints]float64
	quad.Legendre{}.FixedLocations(nodes[:], weights[:], -1, 1)
	sum, hi := 0.0, float64(spreadReach)
	piece := func(lo, hi float64) {
		n := math.Ceil((hi - lo) / pieceWidth)
		half := (hi - lo) / (2 * n)
		for j := range int(n) {
			middle := lo + (2*float64(j)+1)*half
			for i, x := range nodes {
				z := middle + half*x
				sum += half * weights[i] * math.Exp(-z*z/2) * sizes.Above(k.cut(z, lnGSD, s))
			}
		}
	}
	for _, d := range jumps { // ascending diameters are falling z
		if d >= limit || hi <= -spreadReach {
			break
		}
		kappa, err := koehler.KappaOf(d, k.KelvinLength, s)
		if err != nil || !(kappa > 0) {
			break
		}
		z := math.Log(kappa/k.Median) / lnGSD
		if z < hi {
			lo := math.Max(z, -spreadReach)
			piece(lo, hi)
			hi = lo
		}
	}
	if hi > -spreadReach {
		piece(-spreadReach, hi)
	}
	return sum / math.Sqrt(2*math.Pi)
}
