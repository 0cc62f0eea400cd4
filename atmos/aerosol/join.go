package aerosol

import (
	"fmt"
	"math"
)

// Overlap compares two instruments over the sizes that both have measured.
type Overlap struct {
	Low, High       float64 // m, ends of the common range
	FromLow, FromHi float64 // number there by the instrument of the small and of the large sizes, 1/m³
}

// Ratio returns the number by the instrument of the large sizes over that of the
// small ones.
func (o Overlap) Ratio() float64 { return o.FromHi / o.FromLow }

// OverlapOf returns the common range of the two, low the one of the small sizes.
// ok is false where they have none.
func OverlapOf(low, high *Bins) (o Overlap, ok bool) {
	o.Low, o.High = high.grid.edges[0], low.grid.edges[len(low.counts)]
	if !(o.Low < o.High) {
		return o, false
	}
	o.FromLow = low.Above(o.Low)
	o.FromHi = high.Above(o.Low) - high.Above(o.High)
	return o, true
}

// Join returns one distribution: that of low up to the diameter at (m), that of
// high from there on. A bin that holds at is split log-uniformly. Both must have
// measured at; at = 0 stands for the geometric middle of their overlap. Both must
// use the same kind of diameter (see Resized) and state of the air (see Scaled).
func Join(low, high *Bins, at float64) (*Bins, error) {
	first, last := high.grid.edges[0], low.grid.edges[len(low.counts)]
	if !(first <= last) {
		return nil, &InputError{"first limit of the large sizes", -1, first,
			fmt.Sprintf("up to %.6g m, where the small sizes end: nothing was measured between", last)}
	}
	if at == 0 {
		at = math.Sqrt(first * last)
	}
	if !(at >= first && at <= last && at > low.grid.edges[0] && at < high.grid.edges[len(high.counts)]) {
		return nil, &InputError{"diameter to join at", -1, at, fmt.Sprintf("from %.6g to %.6g m, where both have measured", first, last)}
	}
	var edges, counts []float64
	for i, n := range low.counts {
		lo, hi := low.grid.edges[i], low.grid.edges[i+1]
		if lo >= at {
			break
		}
		if hi > at {
			n *= math.Log(at/lo) / low.grid.WidthLn(i)
		}
		edges, counts = append(edges, lo), append(counts, n)
	}
	edges = append(edges, at)
	for i, n := range high.counts {
		lo, hi := high.grid.edges[i], high.grid.edges[i+1]
		if hi <= at {
			continue
		}
		if lo < at {
			n *= math.Log(hi/at) / high.grid.WidthLn(i)
		}
		edges, counts = append(edges, hi), append(counts, n)
	}
	g, err := NewGrid(edges)
	if err != nil {
		return nil, err
	}
	return NewBins(g, counts, Counts)
}
