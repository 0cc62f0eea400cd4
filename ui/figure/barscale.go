package figure

import "math"

// barScale is how many cells the values of bars take left and right of the one
// cell that stands for zero. Both sides have the same scale.
type barScale struct {
	cells       int // of both sides and zero
	left, right int
	largest     float64 // the size that fills its side
	longest     int     // cells of that side
}

// newBarScale divides n cells between the signs. The largest size fills its side,
// and the other side has at least the cells that it needs on that scale.
func newBarScale(bars []Bar, n int) barScale {
	low, high := 0.0, 0.0 // the largest sizes below and above zero
	for _, b := range bars {
		if b.Drawable() {
			low, high = math.Max(low, -b.Value), math.Max(high, b.Value)
		}
	}
	s := barScale{cells: max(n, 0), largest: math.Max(low, high)}
	room := max(n-1, 0)
	s.longest = room
	if smaller := math.Min(low, high); smaller > 0 {
		share := 1 / (1 + smaller/s.largest) // no sum of both sizes, which may be tiny
		s.longest = max(min(int(share*float64(room)), room-1), 0)
	}
	s.left, s.right = room-s.longest, s.longest
	if low > high {
		s.left, s.right = s.right, s.left
	}
	return s
}

// halves is the length of the bar of v in half cells. A value that is not zero has
// at least one, or it would look like zero.
func (s barScale) halves(v float64) int {
	if v == 0 {
		return 0
	}
	side := s.right
	if v < 0 {
		side = s.left
	}
	n := int(math.Round(2 * float64(s.longest) * (math.Abs(v) / s.largest)))
	return min(max(n, 1), 2*side)
}
