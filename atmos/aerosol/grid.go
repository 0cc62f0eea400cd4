package aerosol

import (
	"math"
	"sort"
)

// Grid is the sizes of a row of bins. It is made once and shared by all records
// of an instrument.
type Grid struct {
	edges, ln []float64
}

// NewGrid makes the grid of n bins from their n+1 limits (m), ascending.
func NewGrid(edges []float64) (*Grid, error) {
	if len(edges) < 2 {
		return nil, &InputError{"number of bin limits", -1, float64(len(edges)), "2 or more"}
	}
	if err := CheckDiameters("bin limit", edges); err != nil {
		return nil, err
	}
	g := &Grid{edges: append([]float64(nil), edges...), ln: make([]float64, len(edges))}
	for i, e := range edges {
		g.ln[i] = math.Log(e)
	}
	return g, nil
}

// GridAround makes the grid whose bins have these midpoints (m), two or more,
// ascending: a limit is the geometric mean of the midpoints beside it, and the two
// outermost limits lie as far from their midpoint, in ln D, as the inner limit of
// that bin does.
func GridAround(midpoints []float64) (*Grid, error) {
	n := len(midpoints)
	if n < 2 {
		return nil, &InputError{"number of bin midpoints", -1, float64(n), "2 or more: one midpoint has no width"}
	}
	if err := CheckDiameters("bin midpoint", midpoints); err != nil {
		return nil, err
	}
	edges := make([]float64, n+1)
	for i := 1; i < n; i++ {
		edges[i] = math.Sqrt(midpoints[i-1] * midpoints[i])
	}
	edges[0] = midpoints[0] * midpoints[0] / edges[1]
	edges[n] = midpoints[n-1] * midpoints[n-1] / edges[n-1]
	return NewGrid(edges)
}

// Len returns the number of bins.
func (g *Grid) Len() int { return len(g.edges) - 1 }

// Edges returns the limits of the bins in m. They are not to be changed.
func (g *Grid) Edges() []float64 { return g.edges }

// Midpoint returns the geometric middle of bin i in m.
func (g *Grid) Midpoint(i int) float64 { return math.Sqrt(g.edges[i] * g.edges[i+1]) }

// WidthLn returns the width of bin i in ln D.
func (g *Grid) WidthLn(i int) float64 { return g.ln[i+1] - g.ln[i] }

// find returns the bin that holds d, a limit counting to the bin above it; -1
// below the first and Len from the last limit on.
func (g *Grid) find(d float64) int {
	return sort.Search(len(g.edges), func(i int) bool { return g.edges[i] > d }) - 1
}
