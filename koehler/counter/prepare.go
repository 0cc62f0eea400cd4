package counter

import (
	"math"
	"slices"

	"dropcrest/atmos"
)

// prepare makes the likelihood of the used points.
func (f *Fit) prepare(s Scan, used []Point, o Options) error {
	l := likelihood{logistic: o.Curve == Sigmoid, samples: make([]sample, len(used))}
	l.free = [parameters]bool{true, true, o.Plateau == 0, o.fitsDouble()}
	for i, p := range used {
		dry := s.DryDiameter
		if s.Over == OverDiameter {
			dry = p.Setting
		}
		m := sample{x: math.Log(p.Setting), ccn: p.CCN, n: p.CN + p.CCN, offset: math.Log(p.ratio())}
		if o.CNEfficiency != nil {
			e := o.CNEfficiency(dry)
			if !(e > 0) {
				return s.fault(ErrInput, "the efficiency of the particle counter is %g at %.4g nm: it must be above 0", e, dry*1e9)
			}
			m.offset -= math.Log(e)
		}
		if err := m.kindsOf(s, dry, o); err != nil {
			return s.fault(ErrInput, "%v: %.4g nm", err, dry*1e9)
		}
		l.samples[i] = m
	}
	l.narrowest = l.tenthOfDistance()
	f.like = l
	return nil
}

// tenthOfDistance is a tenth of the mean distance in ln x of different settings.
func (l *likelihood) tenthOfDistance() float64 {
	x := make([]float64, len(l.samples))
	for i := range l.samples {
		x[i] = l.samples[i].x
	}
	slices.Sort(x)
	x = slices.Compact(x)
	return math.Max(leastWidth, (x[len(x)-1]-x[0])/float64(10*(len(x)-1)))
}

func (o Options) fitsDouble() bool {
	return o.Curve != TwoStep || o.Charges.Sizes == nil && o.Charges.Double == 0
}

// kindsOf fills the kinds of particles at a setting.
func (m *sample) kindsOf(s Scan, dry float64, o Options) error {
	if o.Curve != TwoStep {
		m.kinds = 2
		m.steps[0] = step{0, 1, -1}
		m.steps[1] = step{everywhere, 0, 1}
		return nil
	}
	shift := func(D float64) float64 { return s.Over.shift(D / dry) }
	c := o.Charges
	if c.Sizes == nil {
		T, p := c.Classifier.air()
		d, t := c.Double, c.Triple
		m.kinds = 3
		m.steps[0] = step{0, 1 - d - d*t, -1 - t}
		m.steps[1] = step{shift(EqualMobility(dry, 2, T, p)), d, 1}
		m.steps[2] = step{shift(EqualMobility(dry, 3, T, p)), d * t, t}
		if d > 0 { // given: nothing to fit
			for i := range m.steps {
				m.steps[i].perDouble = 0
			}
		}
		if t == 0 {
			m.kinds = 2
		}
		return nil
	}
	var room [maxSteps]Multiple
	for _, k := range c.Classifier.Multiples(room[:0], dry, c.Sizes) {
		if math.IsNaN(k.Share) {
			return errNoSizes
		}
		m.steps[m.kinds] = step{shift(k.Diameter), k.Share, 0}
		m.kinds++
	}
	return nil
}

// shift is by how much the step of particles of another size comes earlier in the
// logarithm of the setting: by their size, or by their supersaturation, which goes
// with D^-3/2 and with the setting.
func (a Axis) shift(ratio float64) float64 {
	if a == OverDiameter {
		return math.Log(ratio)
	}
	return 1.5 * math.Log(ratio)
}

// starts are parameters to begin a fit from: for some widths the middle, on a grid
// over the settings, that is best.
func (l *likelihood) starts(given float64) []vector {
	var starts []vector
	least, most := math.Inf(1), math.Inf(-1)
	for _, s := range l.samples {
		least, most = math.Min(least, s.x), math.Max(most, s.x)
	}
	const grid = 24
	for _, width := range []float64{0.05, 0.2} {
		best, value := vector{}, math.Inf(-1)
		for i := range grid {
			t := vector{least + (most-least)*(float64(i)+0.5)/grid, math.Log(width), 0, 0.03}
			t[plateau] = l.plateauAbove(t[middle])
			if given > 0 {
				t[plateau] = math.Log(given)
			}
			if v := l.value(&t); v > value {
				best, value = t, v
			}
		}
		starts = append(starts, best)
	}
	return starts
}

// plateauAbove is the ln of droplets over particles at settings above a middle.
func (l *likelihood) plateauAbove(middle float64) float64 {
	ccn, cn := 0.5, 0.5
	for _, s := range l.samples {
		if s.x >= middle {
			ccn += s.ccn
			cn += (s.n - s.ccn) * math.Exp(s.offset)
		}
	}
	return math.Log(ccn / cn)
}

// chargeNotes says where the share of multiply charged particles comes from.
func (f *Fit) chargeNotes(o Options) []atmos.Note {
	switch {
	case o.Curve != TwoStep:
		return []atmos.Note{{Code: "charges-as-plateau", Input: "activation curve",
			Text: "The curve takes multiply charged particles as active at every setting; the two-step curve knows their size."}}
	case o.Charges.Sizes != nil:
		return nil
	case o.Charges.Double > 0:
		return []atmos.Note{{Code: "charges-constant", Input: "doubly charged",
			Text: "The share of doubly charged particles is one given number, for want of a size distribution; it falls with size."}}
	}
	return []atmos.Note{{Code: "charges-fitted", Input: "doubly charged",
		Text: "The share of doubly charged particles is fitted as one number, for want of a size distribution; it falls with size."}}
}
