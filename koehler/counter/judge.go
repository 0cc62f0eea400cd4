package counter

import (
	"math"
)

// gap is the distance in ln x of the two settings about the step when none lies
// on it, else 0.
func (f *Fit) gap() float64 {
	below, above := math.Inf(-1), math.Inf(1)
	for i := range f.like.samples {
		x := f.like.samples[i].x
		h, _ := f.like.step((x - f.best[middle]) * math.Exp(-f.best[spread]))
		switch {
		case h > 0.02 && h < 0.98:
			return 0
		case h <= 0.02:
			below = math.Max(below, x)
		default:
			above = math.Min(above, x)
		}
	}
	if math.IsInf(below, 0) || math.IsInf(above, 0) {
		return 0
	}
	return above - below
}

// outlier returns the index of the point farthest off, -1 when none is too far.
func (f *Fit) outlier(o Options) int {
	limit := o.Outlier
	if limit == 0 {
		limit = 6
	}
	if limit < 0 {
		return -1
	}
	worst := -1
	for i, p := range f.Points {
		if d := math.Abs(p.Deviation); d > limit {
			worst, limit = i, d
		}
	}
	return worst
}

// belowDouble returns the index of a point of a curve of one step where doubly
// charged particles are below the midpoint too, -1 when there is none. Such points
// lie on neither of its plateaus.
func (f *Fit) belowDouble(s Scan, used []Point, o Options) int {
	if o.Curve == TwoStep {
		return -1
	}
	T, p := o.Charges.Classifier.air()
	for i, q := range used {
		dry := s.DryDiameter
		if s.Over == OverDiameter {
			dry = q.Setting
		}
		if math.Log(q.Setting)+s.Over.shift(EqualMobility(dry, 2, T, p)/dry) < f.best[middle] {
			return i
		}
	}
	return -1
}

// judge says whether the scan reaches from below the step to the plateau.
func (f *Fit) judge(s Scan, o Options) error {
	onPlateau, lowest, highest := 0, 1.0, 0.0
	least, most := math.Inf(1), 0.0
	for i := range f.like.samples {
		x := f.like.samples[i].x
		h, _ := f.like.step((x - f.best[middle]) * math.Exp(-f.best[spread]))
		lowest, highest = math.Min(lowest, h), math.Max(highest, h)
		least, most = math.Min(least, math.Exp(x)), math.Max(most, math.Exp(x))
		if h >= 0.9 {
			onPlateau++
		}
	}
	switch {
	case f.like.free[plateau] && onPlateau < 2 || highest < 0.9:
		return s.fault(ErrNoPlateau, "no upper plateau: at %s, the largest setting, the curve reaches %.0f %% of it; scan further up or give the plateau",
			s.Over.show(most), 100*highest)
	case f.like.free[plateau] && f.Plateau.Value < o.leastPlateau():
		return s.fault(ErrNoPlateau, "no upper plateau: up to %s, the largest setting, only %.1f %% of the particles activate, which may be the multiply charged ones; scan further up or allow so low a plateau",
			s.Over.show(most), 100*f.Plateau.Value)
	case lowest > 0.5:
		return s.fault(ErrAllActive, "more than half is active at %s already, the smallest setting: scan further down", s.Over.show(least))
	}
	return nil
}

func (o Options) leastPlateau() float64 {
	if o.LeastPlateau == 0 {
		return 0.5
	}
	return o.LeastPlateau
}
