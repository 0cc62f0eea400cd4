package solutes

import (
	"fmt"
	"math"
)

// MaxLimitedParts is the largest number of parts of a Limited.
const MaxLimitedParts = 8

// LimitedPart is one κ component that may not dissolve at once.
type LimitedPart struct {
	Volume     float64 // share ε of the dry volume, > 0
	Kappa      float64 // κ of the dissolved part, ≥ 0
	Solubility float64 // C, m³ of compound per m³ of water, ≥ 0; +Inf: miscible, 0: insoluble
}

// Limited is a mixture of κ components of limited solubility (Petters and
// Kreidenweis, Atmos. Chem. Phys. 8, 6273, 2008):
//
//	κ(u) = Σ ε_i κ_i min(1, u C_i/ε_i)
//	ln a_w = -log1p(κ(u)/u)
//
// Part i is wholly dissolved from its dissolution point u_i = ε_i/C_i on. Points
// cut the range of u into segments. On a segment κ(u) = K + G u with
//
//	K = Σ ε_i κ_i over the dissolved parts,  G = Σ κ_i C_i over the saturated ones,
//
// so ln a_w has κ form there again, with κ' = K/(1+G), shifted by -log1p(G). It
// is continuous; its slope by ln u jumps up at a point. A Limited is immutable;
// its methods do not allocate.
//
// It is a model for κ components. For salts use the deliquescence humidity:
// κ and C of a salt together would imply a second, wrong one.
type Limited struct {
	points    int
	point     [MaxLimitedParts]float64     // ascending, distinct
	dissolved [MaxLimitedParts + 1]float64 // K of the segment below point i
	saturated [MaxLimitedParts + 1]float64 // G
}

// NewLimited makes the mixture. Shares add up to at most 1; what is missing
// counts as insoluble. Errors are of type *UnusableError.
func NewLimited(parts []LimitedPart) (*Limited, error) {
	if err := checkLimited(parts); err != nil {
		return nil, err
	}
	l := &Limited{}
	for _, p := range parts {
		l.addPoint(p.Volume / p.Solubility)
	}
	for s := 0; s <= l.points; s++ {
		for _, p := range parts {
			if l.isDissolved(p, s) {
				l.dissolved[s] += p.Volume * p.Kappa
			} else {
				l.saturated[s] += p.Kappa * p.Solubility
			}
		}
	}
	return l, nil
}

// isDissolved tells whether all of the part is dissolved on segment s.
func (l *Limited) isDissolved(p LimitedPart, s int) bool {
	at := p.Volume / p.Solubility
	return at == 0 || s > 0 && at <= l.point[s-1]
}

// addPoint keeps the points in order. Parts that dissolve at the same u share
// a point, miscible and insoluble parts have none.
func (l *Limited) addPoint(u float64) {
	if u == 0 || math.IsInf(u, 1) {
		return
	}
	i := l.points
	for i > 0 && l.point[i-1] > u {
		i--
	}
	if i > 0 && l.point[i-1] == u {
		return
	}
	copy(l.point[i+1:], l.point[i:l.points])
	l.point[i] = u
	l.points++
}

// Points returns the number of dissolution points, the parts of κ 0 included.
func (l *Limited) Points() int { return l.points }

// Point returns dissolution point i, 0 ≤ i < Points(), in ascending order, as
// volume of water per volume of dry particle. It panics for other i.
func (l *Limited) Point(i int) float64 {
	if i < 0 || i >= l.points {
		panic("solutes: no such dissolution point")
	}
	return l.point[i]
}

// Segment returns K and G on segment i, 0 ≤ i ≤ Points(): from Point(i-1), or 0
// for i = 0, to Point(i), or ∞ for i = Points(). It panics for other i.
func (l *Limited) Segment(i int) (dissolved, saturated float64) {
	if i < 0 || i > l.points {
		panic("solutes: no such segment")
	}
	return l.dissolved[i], l.saturated[i]
}

// SegmentAt returns the segment that holds u. A dissolution point belongs to
// the segment above it.
func (l *Limited) SegmentAt(u float64) int {
	s := 0
	for s < l.points && u >= l.point[s] {
		s++
	}
	return s
}

// LnActivity returns ln a_w and its derivative by ln u, exact on each segment;
// on a dissolution point it is the one of the upper side. u > 0.
func (l *Limited) LnActivity(u float64) (lnaw, slope float64) {
	s := l.SegmentAt(u)
	k, g := l.dissolved[s]/u, l.saturated[s]
	return -math.Log1p(k + g), k / (1 + k + g)
}

// SeveralMaxima is true: each dissolution point may divide two maxima.
func (l *Limited) SeveralMaxima() bool { return true }

// LeastWater is 0: the κ form has no stated lower limit.
func (l *Limited) LeastWater() float64 { return 0 }

func checkLimited(parts []LimitedPart) error {
	const model = "limited solubility"
	if len(parts) < 1 || len(parts) > MaxLimitedParts {
		return &UnusableError{model, "the number of parts", float64(len(parts)), fmt.Sprintf("1 to %d", MaxLimitedParts)}
	}
	sum := 0.0
	for i, p := range parts {
		of := fmt.Sprintf(" of part %d", i+1)
		switch {
		case !(p.Volume > 0 && p.Volume <= 1+shareTolerance):
			return &UnusableError{model, "the volume share" + of, p.Volume, "above 0 and at most 1"}
		case !(p.Kappa >= 0) || math.IsInf(p.Kappa, 1):
			return &UnusableError{model, "kappa" + of, p.Kappa, "a finite number of at least 0"}
		case !(p.Solubility >= 0):
			return &UnusableError{model, "the solubility" + of, p.Solubility, "at least 0 (volume of compound per volume of water)"}
		}
		sum += p.Volume
	}
	if sum > 1+shareTolerance {
		return &UnusableError{model, "the sum of the volume shares", sum, "at most 1"}
	}
	return nil
}

// shareTolerance is what rounded shares may add up to beyond 1.
const shareTolerance = 1e-9
