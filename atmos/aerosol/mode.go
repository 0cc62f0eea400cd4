package aerosol

import "math"

// Mode is a lognormal mode,
//
//	dN/dlnD = N/(√(2π) ln σ_g) exp(-ln²(D/Dg)/(2 ln² σ_g)).
type Mode struct {
	Concentration float64 // N, 1/m³
	Median        float64 // Dg, number median diameter, m
	GSD           float64 // σ_g, geometric standard deviation, > 1
}

// MostGSD bounds σ_g: a wider mode is taken for a mistake (a width given as ln σ_g
// squared, or a diameter in its place). Published fits stay below 4.
const MostGSD = 10

// Check returns nil or an *InputError.
func (m Mode) Check() error {
	switch {
	case !(m.Concentration >= 0) || math.IsInf(m.Concentration, 1):
		return &InputError{"number", -1, m.Concentration, "0 or more, in 1/m³"}
	case !(m.Median > 0) || math.IsInf(m.Median, 1):
		return &InputError{"median diameter", -1, m.Median, "above 0, in m"}
	case !(m.GSD > 1 && m.GSD <= MostGSD):
		return &InputError{"gsd", -1, m.GSD, "above 1 and up to 10 (the geometric standard deviation itself, not its logarithm)"}
	}
	return nil
}

// Number returns N.
func (m Mode) Number() float64 { return m.Concentration }

// Above returns the number of particles wider than d (m), 1/m³. It keeps its
// relative precision far in the upper tail.
func (m Mode) Above(d float64) float64 {
	return m.Concentration / 2 * math.Erfc(math.Log(d/m.Median)/(math.Sqrt2*math.Log(m.GSD)))
}

// Below returns the number of particles up to d (m), 1/m³, precise far in the
// lower tail.
func (m Mode) Below(d float64) float64 {
	return m.Concentration / 2 * math.Erfc(-math.Log(d/m.Median)/(math.Sqrt2*math.Log(m.GSD)))
}

// Between returns the number of particles from lo to hi (m), 1/m³, precise in
// both tails.
func (m Mode) Between(lo, hi float64) float64 {
	if lo > m.Median {
		return m.Above(lo) - m.Above(hi)
	}
	return m.Below(hi) - m.Below(lo)
}

// AddAbove adds share times Above of every diameter (m) to dst, which is as long
// as diameters.
func (m Mode) AddAbove(dst, diameters []float64, share float64) {
	half, width := share*m.Concentration/2, 1/(math.Sqrt2*math.Log(m.GSD))
	for i, d := range diameters {
		dst[i] += half * math.Erfc(math.Log(d/m.Median)*width)
	}
}

// Density returns dN/dlnD at d (m), 1/m³.
func (m Mode) Density(d float64) float64 {
	width := math.Log(m.GSD)
	z := math.Log(d/m.Median) / width
	return m.Concentration / (math.Sqrt(2*math.Pi) * width) * math.Exp(-z*z/2)
}

// Moment returns ∫ D^k dN = N Dg^k exp(k² ln² σ_g/2) in m^k/m³.
func (m Mode) Moment(k float64) float64 {
	width := k * math.Log(m.GSD)
	return m.Concentration * math.Pow(m.Median, k) * math.Exp(width*width/2)
}

// MomentMode returns the mode of the k-th moment's distribution over size: with
// k = 2 that of the surface, with 3 that of the volume, each up to its constant.
// Its median is Dg exp(k ln² σ_g) (Hatch & Choate 1929), its width the same.
func (m Mode) MomentMode(k float64) Mode {
	width := math.Log(m.GSD)
	return Mode{m.Moment(k), m.Median * math.Exp(k*width*width), m.GSD}
}

// Modes is a sum of modes.
type Modes []Mode

// Check returns nil or an *InputError that says which mode is not usable.
func (m Modes) Check() error {
	for i, mode := range m {
		if err, ok := mode.Check().(*InputError); ok {
			err.What, err.Index = err.What+" of mode", i
			return err
		}
	}
	return nil
}

// Number returns the number of all particles, 1/m³.
func (m Modes) Number() float64 { return m.sum(Mode.Number) }

// Above returns the number of particles wider than d (m), 1/m³.
func (m Modes) Above(d float64) float64 {
	return m.sum(func(mode Mode) float64 { return mode.Above(d) })
}

// Density returns dN/dlnD at d (m), 1/m³.
func (m Modes) Density(d float64) float64 {
	return m.sum(func(mode Mode) float64 { return mode.Density(d) })
}

// Moment returns ∫ D^k dN in m^k/m³.
func (m Modes) Moment(k float64) float64 {
	return m.sum(func(mode Mode) float64 { return mode.Moment(k) })
}

// Between returns the number of particles from lo to hi (m), 1/m³.
func (m Modes) Between(lo, hi float64) float64 {
	return m.sum(func(mode Mode) float64 { return mode.Between(lo, hi) })
}

func (m Modes) sum(of func(Mode) float64) (total float64) {
	for _, mode := range m {
		total += of(mode)
	}
	return total
}

// AddAbove adds share times Above of every diameter (m) to dst, which is as long
// as diameters.
func (m Modes) AddAbove(dst, diameters []float64, share float64) {
	for _, mode := range m {
		mode.AddAbove(dst, diameters, share)
	}
}

// Bins returns what an instrument with these bins would count.
func (m Modes) Bins(g *Grid) *Bins {
	b := &Bins{grid: g, counts: make([]float64, g.Len()), above: make([]float64, g.Len()+1)}
	for i := range b.counts {
		b.counts[i] = m.Between(g.edges[i], g.edges[i+1])
	}
	b.accumulate()
	return b
}
