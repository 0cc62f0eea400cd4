package spectrum

import (
	"math"
	"sort"

	"dropcrest/atmos/aerosol"
)

// Ranges is a composition that differs between ranges of dry size: Of[0] below
// Limits[0], Of[i] from Limits[i-1] up to Limits[i], the last above the last
// limit.
type Ranges struct {
	limits []float64
	of     []Composition
}

// NewRanges makes the composition; limits (m) ascend and are one fewer than the
// compositions.
func NewRanges(limits []float64, of []Composition) (*Ranges, error) {
	if len(of) != len(limits)+1 {
		return nil, unusable("number of compositions", -1, float64(len(of)), "one more than limits")
	}
	if err := aerosol.CheckDiameters("limit", limits); err != nil {
		return nil, err
	}
	return &Ranges{append([]float64(nil), limits...), append([]Composition(nil), of...)}, nil
}

// Critical returns the dry diameter (m) from which on every wider particle
// activates at s. Narrower ones may activate too where a smaller size is more
// hygroscopic.
func (r *Ranges) Critical(s float64) (float64, error) {
	for i := len(r.of) - 1; i >= 0; i-- {
		d, err := r.of[i].Critical(s)
		if err != nil {
			return math.NaN(), err
		}
		lo, hi := r.rangeOf(i)
		switch {
		case d >= hi:
			return hi, nil // nothing here activates
		case d > lo:
			return d, nil
		}
	}
	return 0, nil
}

func (r *Ranges) rangeOf(i int) (lo, hi float64) {
	hi = math.Inf(1)
	if i > 0 {
		lo = r.limits[i-1]
	}
	if i < len(r.limits) {
		hi = r.limits[i]
	}
	return lo, hi
}

// AddCounts implements Composition.
func (r *Ranges) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	for i, c := range r.of {
		lo, hi := r.rangeOf(i)
		if err := c.AddCounts(dst, s, newWindow(sizes, lo, hi), share); err != nil {
			return err
		}
	}
	return nil
}

// window is the particles of some sizes from lo up to hi.
type window struct {
	Sizes
	lo, hi, beyond float64
	breaks         []float64
}

func newWindow(sizes Sizes, lo, hi float64) *window {
	w := &window{Sizes: sizes, lo: lo, hi: hi}
	if !math.IsInf(hi, 1) {
		w.beyond = sizes.Above(hi)
	}
	if lo > 0 {
		w.breaks = append(w.breaks, lo)
	}
	if b, ok := sizes.(broken); ok {
		all := b.Breaks()
		from := sort.SearchFloat64s(all, lo)
		for _, d := range all[from:] {
			if d > lo && d < hi {
				w.breaks = append(w.breaks, d)
			}
		}
	}
	if !math.IsInf(hi, 1) {
		w.breaks = append(w.breaks, hi)
	}
	return w
}

func (w *window) Number() float64 { return w.Above(w.lo) }

func (w *window) Above(d float64) float64 {
	if d >= w.hi {
		return 0
	}
	return w.Sizes.Above(math.Max(d, w.lo)) - w.beyond
}

func (w *window) Density(d float64) float64 {
	if d < w.lo || d >= w.hi {
		return 0
	}
	return w.Sizes.Density(d)
}

func (w *window) Breaks() []float64 { return w.breaks }
