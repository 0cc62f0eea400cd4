package spectrum

import (
	"fmt"
	"math"
	"sort"
)

// AtStandard returns the number at supersaturation s between measured points, on
// the straight line of ln N against ln s between the two neighbours (of N against
// ln s where one of them counted nothing). Points at the same s are averaged.
// Nothing is extrapolated: s outside the points is an *InputError. The uncertainty
// is carried along as for independent points, 0 where one is not known.
func AtStandard(points []Point, s float64) (Point, error) {
	p := append([]Point(nil), points...)
	sort.SliceStable(p, func(i, j int) bool { return p[i].Supersaturation < p[j].Supersaturation })
	p = averaged(p)
	if n := len(p); n == 0 || !(s >= p[0].Supersaturation && s <= p[n-1].Supersaturation) {
		right := "inside the measured points: there are none"
		if n > 0 {
			right = fmt.Sprintf("inside the measured %.6g to %.6g", p[0].Supersaturation, p[n-1].Supersaturation)
		}
		return Point{}, unusable("supersaturation", -1, s, right)
	}
	i := sort.Search(len(p), func(i int) bool { return p[i].Supersaturation >= s })
	if p[i].Supersaturation == s {
		return p[i], nil
	}
	a, b := p[i-1], p[i]
	w := math.Log(s/a.Supersaturation) / math.Log(b.Supersaturation/a.Supersaturation)
	out := Point{Supersaturation: s}
	byA, byB := 1-w, w // of N on those of a and b
	if a.Count > 0 && b.Count > 0 {
		out.Count = a.Count * math.Pow(b.Count/a.Count, w)
		byA, byB = byA*out.Count/a.Count, byB*out.Count/b.Count
	} else {
		out.Count = a.Count + w*(b.Count-a.Count)
	}
	if out.Uncertainty = math.Hypot(byA*a.Uncertainty, byB*b.Uncertainty); a.Uncertainty == 0 || b.Uncertainty == 0 {
		out.Uncertainty = 0
	}
	return out, nil
}

// averaged merges points of one supersaturation, in place.
func averaged(p []Point) []Point {
	out := p[:0]
	for i := 0; i < len(p); {
		sum, n := p[i], 1.0
		known := p[i].Uncertainty > 0
		variance := p[i].Uncertainty * p[i].Uncertainty
		for i++; i < len(p) && p[i].Supersaturation == sum.Supersaturation; i++ {
			sum.Count += p[i].Count
			variance += p[i].Uncertainty * p[i].Uncertainty
			known = known && p[i].Uncertainty > 0
			n++
		}
		sum.Count /= n
		if sum.Uncertainty = math.Sqrt(variance) / n; !known {
			sum.Uncertainty = 0
		}
		out = append(out, sum)
	}
	return out
}
