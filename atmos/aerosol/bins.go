package aerosol

import "math"

// Measure says what the values of a row of bins are. Files mix them up, and the
// factor between the first two is 2.303.
type Measure int

const (
	PerLog10 Measure = iota // dN/dlog10 D, 1/m³
	PerLn                   // dN/dln D, 1/m³
	Counts                  // number of particles in the bin, 1/m³
)

// String returns the measure as it is written in words.
func (m Measure) String() string {
	switch m {
	case PerLog10:
		return "dN/dlog10D"
	case PerLn:
		return "dN/dlnD"
	case Counts:
		return "counts"
	}
	return "unknown measure"
}

// width returns what a value of bin i is multiplied by to be a count.
func (m Measure) width(g *Grid, i int) float64 {
	switch m {
	case PerLog10:
		return g.WidthLn(i) / math.Ln10
	case PerLn:
		return g.WidthLn(i)
	}
	return 1
}

// Bins is a measured size distribution. Within a bin dN/dlnD is constant.
type Bins struct {
	grid   *Grid
	counts []float64
	above  []float64 // above[i]: particles wider than edge i, summed from the top
}

// NewBins makes the distribution of these values, one a bin, 0 or more. A missing
// value is NaN: NewBins refuses it, see Fill.
func NewBins(g *Grid, values []float64, as Measure) (*Bins, error) {
	n := g.Len()
	room := make([]float64, 2*n+1)
	b := &Bins{grid: g, counts: room[:n:n], above: room[n:]}
	return b, b.Set(values, as)
}

// Set puts other values into the same bins. After an error the distribution is
// not to be used.
func (b *Bins) Set(values []float64, as Measure) error {
	if len(values) != len(b.counts) {
		return &InputError{"number of values", -1, float64(len(values)), "one a bin"}
	}
	for i, v := range values {
		if !(v >= 0) || v > math.MaxFloat64 {
			return &InputError{as.String() + " of bin", i, v, "0 or more, in 1/m³"}
		}
		b.counts[i] = v * as.width(b.grid, i)
	}
	b.accumulate()
	return nil
}

func (b *Bins) accumulate() {
	total := 0.0
	for i := len(b.counts) - 1; i >= 0; i-- {
		total += b.counts[i]
		b.above[i] = total
	}
}

// Grid returns the sizes of the bins.
func (b *Bins) Grid() *Grid { return b.grid }

// Count returns the number of particles in bin i, 1/m³.
func (b *Bins) Count(i int) float64 { return b.counts[i] }

// Values appends the values of all bins as that measure to dst.
func (b *Bins) Values(dst []float64, as Measure) []float64 {
	for i, n := range b.counts {
		dst = append(dst, n/as.width(b.grid, i))
	}
	return dst
}

// Number returns the number of all particles, 1/m³.
func (b *Bins) Number() float64 { return b.above[0] }

// Above returns the number of particles wider than d (m), 1/m³; the bin that
// holds d counts with log(upper/d)/log(upper/lower) of its particles.
func (b *Bins) Above(d float64) float64 {
	i := b.grid.find(d)
	switch {
	case i < 0:
		return b.above[0]
	case i >= len(b.counts):
		return 0
	}
	return b.above[i+1] + b.counts[i]*(b.grid.ln[i+1]-math.Log(d))/b.grid.WidthLn(i)
}

// Density returns dN/dlnD at d (m), 1/m³; 0 outside the bins.
func (b *Bins) Density(d float64) float64 {
	i := b.grid.find(d)
	if i < 0 || i >= len(b.counts) {
		return 0
	}
	return b.counts[i] / b.grid.WidthLn(i)
}

// Breaks returns the diameters (m) at which Density jumps. They are not to be
// changed.
func (b *Bins) Breaks() []float64 { return b.grid.edges }

// Moment returns ∫ D^k dN in m^k/m³, exact for the constant density within each
// bin.
func (b *Bins) Moment(k float64) float64 {
	total := 0.0
	for i, n := range b.counts {
		total += n * b.meanPower(i, k)
	}
	return total
}

// meanPower is the mean of D^k over ln D in bin i.
func (b *Bins) meanPower(i int, k float64) float64 {
	if k == 0 {
		return 1
	}
	half := k * b.grid.WidthLn(i) / 2
	return math.Pow(b.grid.Midpoint(i), k) * math.Sinh(half) / half
}

// WidestAbove returns the dry diameter (m) above which there are n (1/m³), counted
// from the largest size down and the last bin split log-uniformly, and the bin
// it lies in. It inverts Above. ok is false for n ≤ 0 and for more than there
// are.
func (b *Bins) WidestAbove(n float64) (d float64, bin int, ok bool) {
	if !(n > 0 && n <= b.above[0]) {
		return math.NaN(), -1, false
	}
	lo, hi := 0, len(b.counts) // above[lo] ≥ n > above[hi]
	for hi-lo > 1 {
		if mid := (lo + hi) / 2; b.above[mid] >= n {
			lo = mid
		} else {
			hi = mid
		}
	}
	share := (n - b.above[lo+1]) / b.counts[lo]
	return math.Exp(b.grid.ln[lo+1] - share*b.grid.WidthLn(lo)), lo, true
}

// Scaled returns the distribution with every count multiplied by factor, which
// is not negative: from one state of the air to another, or a dilution taken
// back.
func (b *Bins) Scaled(factor float64) *Bins {
	out := b.empty()
	for i, n := range b.counts {
		out.counts[i] = n * factor
	}
	out.accumulate()
	return out
}

// Resized returns the distribution over another diameter: to(d), in m, must rise
// with d. Each bin keeps its particles. From a mobility to a volume-equivalent
// diameter that is atmos.VolumeEquivalent.
func (b *Bins) Resized(to func(d float64) float64) (*Bins, error) {
	edges := make([]float64, len(b.grid.edges))
	for i, e := range b.grid.edges {
		edges[i] = to(e)
	}
	g, err := NewGrid(edges)
	if err != nil {
		return nil, err
	}
	out := &Bins{g, b.counts, b.above}
	return out, nil
}

func (b *Bins) empty() *Bins {
	return &Bins{b.grid, make([]float64, len(b.counts)), make([]float64, len(b.above))}
}
