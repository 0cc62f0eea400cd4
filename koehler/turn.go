package koehler

// Turn is one extremum of an equilibrium curve as the solvers of this package
// find it, before the rest of the drop's state is worked out.
type Turn struct {
	Kind            Kind
	Water           float64 // u, volume of water per volume of dry particle
	GrowthFactor    float64 // wet over dry diameter
	Supersaturation float64 // S - 1, free of cancellation
}

// Place says which of the maxima of a curve, in the order of their wet size,
// is the barrier. The boundary at the dry size counts as a maximum.
type Place int

const (
	NoBarrier Place = iota // the curve has no maximum
	Only                   // the one maximum
	First                  // the one of the smallest wet size, of several
	Middle                 // neither the first nor the last
	Last                   // the one of the largest wet size, of several
)

// String returns the word that scripts see: "only", "first", "middle", "last",
// or "none".
func (p Place) String() string {
	switch p {
	case Only:
		return "only"
	case First:
		return "first"
	case Middle:
		return "middle"
	case Last:
		return "last"
	}
	return "none"
}

// Barrier returns the index of the highest maximum among turns, which must be in
// the order of their wet size, and its place among the maxima. Of equally high
// ones the first is the barrier: it is met first. Without a maximum the index
// is -1.
func Barrier(turns []Turn) (index int, place Place) {
	index = -1
	maxima, rank := 0, 0
	for i, t := range turns {
		if t.Kind != Maximum && t.Kind != BoundaryMaximum {
			continue
		}
		maxima++
		if index < 0 || t.Supersaturation > turns[index].Supersaturation {
			index, rank = i, maxima
		}
	}
	switch {
	case maxima == 0:
		return -1, NoBarrier
	case maxima == 1:
		return index, Only
	case rank == 1:
		return index, First
	case rank == maxima:
		return index, Last
	}
	return index, Middle
}
