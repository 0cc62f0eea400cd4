package solutes

import "math"

// The table of a mixture's first guesses: nodes equally spaced in ln u over the
// drops that are looked at, from a hundredth of the dry volume in water to some
// hundred times the dry size.
const (
	startFrom  = -4.5
	startStep  = 0.75
	startNodes = 26
)

// mixtureStart is the water that each part holds at a node: ln(u_i/u), and its
// derivative by ln u times the step.
type mixtureStart struct{ w, rise [MaxMixtureParts]float64 }

// startTable solves the mixture at the nodes, from the most dilute one on, where
// the guess is good. A node that does not settle takes over its neighbour.
func (x *Mixture) startTable() []mixtureStart {
	table := make([]mixtureStart, startNodes)
	next := mixtureStart{w: x.guess}
	for k := startNodes - 1; k >= 0; k-- {
		lnU := startFrom + float64(k)*startStep
		var j joint
		for i := range x.count {
			j.w[i] = lnU + next.w[i] - next.rise[i]
		}
		if lnaw, slope, settled := x.settle(&j, math.Exp(lnU), lnU); settled {
			for i := range x.count {
				next.w[i] = j.w[i] - lnU
				next.rise[i] = (slope/lnaw/j.q[i] - 1) * startStep
				if j.empty[i] {
					next.rise[i] = 0
				}
			}
		} else {
			clear(next.rise[:])
		}
		table[k] = next
	}
	return table
}

// start fills in ln u_i to begin with: between the nodes by the cubic through
// both and their slopes; beyond the last one with the deviation from the guess of
// infinite dilution falling as √m, as the limiting law has it.
func (x *Mixture) start(w *[MaxMixtureParts]float64, lnU float64) {
	at := (lnU - startFrom) / startStep
	k := int(at)
	switch {
	case math.IsNaN(at):
		for i := range x.count {
			w[i] = at
		}
	case at <= 0:
		for i := range x.count {
			w[i] = lnU + x.table[0].w[i] + max(at, -4)*x.table[0].rise[i]
		}
	case k >= startNodes-1:
		decay := math.Exp(-0.5 * startStep * (at - (startNodes - 1)))
		last := &x.table[startNodes-1]
		for i := range x.count {
			w[i] = lnU + x.guess[i] + decay*(last.w[i]-x.guess[i])
		}
	default:
		t := at - float64(k)
		a, b := &x.table[k], &x.table[k+1]
		h := t * t * (3 - 2*t)
		ra, rb := t*(1-t)*(1-t), t*t*(t-1)
		for i := range x.count {
			w[i] = lnU + a.w[i] + h*(b.w[i]-a.w[i]) + ra*a.rise[i] + rb*b.rise[i]
		}
	}
}
