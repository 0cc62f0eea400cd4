package solutes

import "math"

// osmoticTable holds an osmotic coefficient on a fine grid of ln m.
//
// The bisulfate equilibrium costs 2 to 4 µs at each molality, the table 50 ns,
// and a curve or a mixture asks thousands of times; building it takes 1 to 2 ms.
// Between nodes it is the cubic Hermite polynomial, so φ and its slope are
// continuous. Node slopes are central differences of fourth order over the
// neighbouring nodes. The error in φ is below 1e-8, and below 6e-5 within three
// steps of an end of a join, where the table rounds a corner of the second
// derivative (both tested). The nodes start where all solutions are dilute;
// below them
//
//	1 - φ = a √m + b m
//
// joins with value and slope: the limiting law and one term for association.
// Above the last node ln a_w is continued as a power of m (out of range).
type osmoticTable struct {
	nodes []osmoticNode
	ionic float64 // ν: mol of ions per mol of solute, fixes what φ = 1 means
	a, b  float64 // of the dilute limit
	top   float64 // last molality
}

type osmoticNode struct{ phi, slope float64 } // slope: dφ/d(ln m) times the step

const (
	tableStep   = 0.02
	tableBottom = 1e-7 // mol/kg
)

// newOsmoticTable tabulates phi from 1e-7 mol/kg to top. phi is called with
// ascending molalities from two steps below to four steps above that.
func newOsmoticTable(ionic, top float64, phi func(m float64) float64) *osmoticTable {
	t := &osmoticTable{ionic: ionic, top: top}
	n := int(math.Ceil(math.Log(top/tableBottom)/tableStep)) + 1
	y := make([]float64, n+4)
	for i := range y {
		y[i] = phi(tableBottom * math.Exp(float64(i-2)*tableStep))
	}
	t.nodes = make([]osmoticNode, n)
	for i := range t.nodes {
		t.nodes[i] = osmoticNode{y[i+2], (8*(y[i+3]-y[i+1]) - (y[i+4] - y[i])) / 12}
	}
	gap, fall := 1-t.nodes[0].phi, -t.nodes[0].slope/tableStep
	t.a = 2 * (gap - fall) / math.Sqrt(tableBottom)
	t.b = (2*fall - gap) / tableBottom
	return t
}

// at returns φ and its derivative by ln m.
func (t *osmoticTable) at(m float64) (phi, slope float64) {
	const perStep = 1 / tableStep
	x := math.Log(m*(1/tableBottom)) * perStep
	if x < 0 {
		s := math.Sqrt(m)
		return 1 - t.a*s - t.b*m, -0.5*t.a*s - t.b*m
	}
	i := min(int(x), len(t.nodes)-2)
	f := x - float64(i)
	p, q := &t.nodes[i], &t.nodes[i+1]
	d := q.phi - p.phi
	c2, c3 := 3*d-2*p.slope-q.slope, p.slope+q.slope-2*d
	return p.phi + f*(p.slope+f*(c2+f*c3)), (p.slope + f*(2*c2+3*f*c3)) * perStep
}

// lnActivity returns ln a_w and its derivative by ln m.
func (t *osmoticTable) lnActivity(m float64) (lnaw, slope float64) {
	at := min(m, t.top)
	phi, d := t.at(at)
	w := -t.ionic * waterMolarMass * at
	return powerBeyond(w*phi, w*(phi+d), m/at)
}
