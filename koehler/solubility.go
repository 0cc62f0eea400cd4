package koehler

import (
	"math"

	"dropcrest/solutes"
)

// GreatestLimitedKappa is the κ up to which every segment of a limited
// solubility has at most one smooth extremum, 18 + 12√2: see LimitedExtrema.
const GreatestLimitedKappa = 34.97056274847714

// LimitedExtrema appends to dst all extrema of the equilibrium curve of a
// particle of limited solubility (Petters and Kreidenweis, Atmos. Chem. Phys. 8,
// 6273, 2008) in the order of their wet size. dry is the dry diameter and kelvin
// the Kelvin length A, both in m; S = a_w exp(A/D). It does not allocate when
// dst has room for twice the dissolution points and two more. Both lengths must
// be positive: otherwise the one turn has NaN in every field. κ of every part
// must lie below GreatestLimitedKappa (no substance has more than about 1.5); above
// it a segment may hold further extrema, which are not found.
//
// The extrema are exact; nothing is scanned. With x = D/Dd, u = x³ - 1, a = A/Dd
// a segment between dissolution points has κ(u) = K + G u, K of the dissolved
// and G of the saturated parts, so that
//
//	S = u/(u + K + G u) exp(a/x) = 1/(1+G) · u/(u + κ') · exp(a/x),  κ' = K/(1+G)
//
// which is the κ form again but for a factor. There
//
//	d ln S/dx = 3 x² κ'/(u (u+κ')) - a/x² > 0  ⇔  h(x) = u (u+κ')/x⁴ < 3 κ'/a
//
// and d ln h/d ln x = 3(u+1)(1/u + 1/(u+κ')) - 4 is positive where
// 2u² + (6-κ')u + 3κ' is. For κ' ≤ 6 all its terms are; beyond that its
// discriminant κ'² - 36κ' + 36 is negative below 18 + 12√2. So h grows from 0 to
// ∞ and meets 3κ'/a once: within a segment the curve rises, then falls. It has
// at most one maximum and never a smooth minimum; with K = 0 it only falls.
//
// At a dissolution point d ln S/d ln u = K/(u+κ(u)) - a u/(3x⁴) jumps up, because
// K does and the rest is continuous. So a kink is a minimum, where the slope
// turns from negative to positive, or no extremum at all. Both slopes have the
// sign of K - a u (u+κ(u))/(3x⁴), which is all that has to be looked at.
//
// Where nothing is miscible, K = 0 on the first segment, S starts at the dry size
// with exp(a)/(1+G), and falls: a BoundaryMaximum.
func LimitedExtrema(dst []Turn, dry, kelvin float64, mix *solutes.Limited) []Turn {
	a := kelvin / dry
	if !(dry > 0 && kelvin > 0) {
		return append(dst, Turn{Maximum, math.NaN(), math.NaN(), math.NaN()})
	}
	dissolved, saturated := mix.Segment(0)
	if dissolved == 0 {
		dst = append(dst, limitedTurn(BoundaryMaximum, a, 0, 0, dissolved, saturated))
	}
	from, rising := 0.0, dissolved > 0 // t = x - 1 at the segment's lower end, and the slope there
	for i := range mix.Points() {
		u := mix.Point(i)
		t := thickness(u)
		nextDissolved, nextSaturated := mix.Segment(i + 1)
		level := kinkLevel(a, u, t, nextDissolved+u*nextSaturated)
		fallingInto, risingOutOf := dissolved < level, nextDissolved > level
		if rising && fallingInto {
			dst = append(dst, segmentMaximum(a, dissolved, saturated, from, t))
		}
		if fallingInto && risingOutOf {
			dst = append(dst, limitedTurn(KinkMinimum, a, u, t, nextDissolved, nextSaturated))
		}
		from, rising = t, risingOutOf
		dissolved, saturated = nextDissolved, nextSaturated
	}
	if rising {
		dst = append(dst, segmentMaximum(a, dissolved, saturated, from, math.Inf(1)))
	}
	return dst
}

// Kink is a dissolution point of the curve. It is a minimum when Below < 0 <
// Above, otherwise the curve only bends there.
type Kink struct {
	Water           float64 // u
	GrowthFactor    float64
	Supersaturation float64
	Below, Above    float64 // d ln S/d ln u on both sides; Above ≥ Below
}

// LimitedKinks appends to dst all points where the curve of LimitedExtrema has a
// kink, whether it turns there or not. Where parts of κ 0 dissolve there is none.
func LimitedKinks(dst []Kink, dry, kelvin float64, mix *solutes.Limited) []Kink {
	a := kelvin / dry
	below, _ := mix.Segment(0)
	for i := range mix.Points() {
		u := mix.Point(i)
		above, saturated := mix.Segment(i + 1)
		if above == below {
			continue
		}
		t := thickness(u)
		wet := u + above + u*saturated
		level := kinkLevel(a, u, t, above+u*saturated)
		turn := limitedTurn(KinkMinimum, a, u, t, above, saturated)
		dst = append(dst, Kink{u, turn.GrowthFactor, turn.Supersaturation, (below - level) / wet, (above - level) / wet})
		below = above
	}
	return dst
}

// LimitedDissolved returns the crest of the same particle when all of it that
// can dissolve is dissolved already and stays so: a haze drop that came from
// higher humidity. Parts of solubility 0 stay insoluble.
func LimitedDissolved(dry, kelvin float64, mix *solutes.Limited) Turn {
	a := kelvin / dry
	dissolved, saturated := mix.Segment(mix.Points())
	if dissolved == 0 {
		return limitedTurn(BoundaryMaximum, a, 0, 0, dissolved, saturated)
	}
	return segmentMaximum(a, dissolved, saturated, 0, math.Inf(1))
}

// kinkLevel returns a u (u+κ)/(3x⁴), the K of which a segment's slope is 0 at u.
func kinkLevel(a, u, t, kappa float64) float64 {
	x := 1 + t
	return a * u * (u + kappa) / (3 * x * (1 + u)) // x³ = 1 + u
}

// thickness returns x - 1 = cbrt(1+u) - 1 without cancellation.
func thickness(u float64) float64 {
	x := math.Cbrt(1 + u)
	return u / (1 + x*(1+x))
}

// segmentMaximum is the one maximum between from and to (x - 1), known to be there.
func segmentMaximum(a, dissolved, saturated, from, to float64) Turn {
	kappa := dissolved / (1 + saturated)
	t, ok := halley(3*kappa/a, kappa)
	if !ok {
		t = bisect(3*kappa/a, kappa)
	}
	t = math.Min(math.Max(t, from), to) // rounding only: a maximum beside its kink
	return limitedTurn(Maximum, a, t*(3+t*(3+t)), t, dissolved, saturated)
}

// limitedTurn works out the supersaturation as (u (e^(a/x) - 1) - κ)/(u + κ), and
// as (e^a - 1 - G)/(1 + G) at u = 0.
func limitedTurn(kind Kind, a, u, t, dissolved, saturated float64) Turn {
	x := 1 + t
	factor := math.Expm1(a / x)
	if u == 0 {
		return Turn{kind, 0, 1, (factor - saturated) / (1 + saturated)}
	}
	kappa := dissolved + u*saturated
	return Turn{kind, u, x, (u*factor - kappa) / (u + kappa)}
}
