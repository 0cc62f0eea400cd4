package koehler

import "math"

const (
	// greatestSurfaceGrowth bounds the scan: D < 300 Dd.
	greatestSurfaceGrowth = 300
	// surfacePoints is the number of points of the scan, equal in ln u: features
	// of the isotherm are wider than a factor of 1.1 in the drop's volume.
	surfacePoints = 400
	// firstSurfaceWater is where the scan begins: below it the curve rises from
	// the dry size, or the scan goes on towards it.
	firstSurfaceWater = 1e-4
)

// Extrema appends all extrema of the curve between the dry size and 300 times
// the dry size to dst, in the order of their wet size. Where σ has a floor, the
// drop that leaves it makes a kink: like a dissolution point it is a minimum or
// nothing, because dσ/d ln u jumps up from 0 there.
//
// Without a floor σ may be negative near the dry size, which is outside the
// equation of Szyszkowski. No extremum lies there: with σ ≤ 0 the Kelvin term
// rises, since σ does and D grows, and a_w rises everywhere, since the share f in
// the bulk grows more slowly than the volume, d ln f/d ln V < 1.
func (s *SurfaceActive) Extrema(dst []Turn) []Turn {
	in := scan{
		from: firstSurfaceWater, to: math.Pow(greatestSurfaceGrowth, 3) - 1,
		points: surfacePoints, dryLnS: math.Inf(-1),
	}
	var room [1]float64
	in.breaks = s.Kinks(room[:0])
	if s.isInert() {
		in.dryLnS = s.kelvin * s.At(leastWater).SurfaceTension
	}
	return in.extrema(dst, s)
}

// Kinks appends the u at which σ leaves its floor, if it does.
func (s *SurfaceActive) Kinks(dst []float64) []float64 {
	if u, found := s.floorWater(); found {
		dst = append(dst, u)
	}
	return dst
}

// isInert tells whether nothing lowers the water activity.
func (s *SurfaceActive) isInert() bool {
	salt := s.salt.Share > 0 && (s.salt.Solution != nil || s.salt.Kappa > 0)
	return !salt && s.organic == 0
}

// Crest returns the highest maximum and its place among the maxima. σ is
// positive there, see Extrema. Errors: ErrNoCrest.
func (s *SurfaceActive) Crest() (Turn, Place, error) {
	var room [8]Turn
	turns := s.Extrema(room[:0])
	i, place := Barrier(turns)
	if place == NoBarrier {
		return Turn{}, NoBarrier, ErrNoCrest
	}
	return turns[i], place, nil
}
