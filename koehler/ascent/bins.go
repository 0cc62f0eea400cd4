package ascent

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
)

// cohort is a group cut into bins: particles first to last-1 of the system.
type cohort struct {
	Group
	from, to    float64 // m, of the dry diameter
	first, last int
	edges       []float64 // m, one more than its bins
	index       int       // in the population
}

// binReach is how far the bins of a mode reach, in geometric standard deviations,
// and reachShare what lies beyond it on one side.
const (
	binReach      = 4.5
	reachShare    = 3.4e-6
	leastReach    = 2e-9
	mostReach     = 2e-5
	quantileSteps = 60
)

func newCohort(g Group, index, bins int, T float64) (cohort, error) {
	c := cohort{Group: ofWater(g, T), index: index}
	orDefault(&c.Share, 1)
	orDefault(&c.TensionFactor, 1)
	if err := c.check(); err != nil {
		return c, &GroupError{Group: index, Err: err}
	}
	c.from, c.to = c.reach()
	if !(c.from < c.to) {
		return c, &GroupError{Group: index, Err: unusable("lower limit of the bins", -1, c.from, fmt.Sprintf("below the upper one, %.6g", c.to))}
	}
	c.cut(bins)
	return c, nil
}

// ofWater takes a constant tension that is that of water at the start for what it
// means: one that goes with the temperature.
func ofWater(g Group, T float64) Group {
	if g.Matter == nil {
		return g
	}
	if sigma, ok := g.Matter.Tension.(solutes.ConstantTension); ok && float64(sigma) == atmos.SurfaceTension(T) {
		p := *g.Matter
		p.Tension = nil
		g.Matter = &p
	}
	return g
}

func (c *cohort) check() error {
	type checker interface{ Check() error }
	switch {
	case c.Sizes == nil:
		return fmt.Errorf("%w: no size distribution", ErrInput)
	case !(c.Share > 0) || math.IsInf(c.Share, 1):
		return unusable("share", -1, c.Share, "above 0")
	case !(c.TensionFactor > 0) || math.IsInf(c.TensionFactor, 1):
		return unusable("factor of the surface tension", -1, c.TensionFactor, "above 0")
	case !(c.Kappa >= 0 && c.Kappa <= 30):
		return unusable("kappa", -1, c.Kappa, "0 to 30")
	case !(c.From >= 0) || !(c.To >= 0) || math.IsInf(c.To, 1):
		return unusable("limits of the bins", -1, c.From, "diameters in m")
	}
	if s, ok := c.Sizes.(checker); ok {
		if err := s.Check(); err != nil {
			return err
		}
	}
	if c.KappaBySize != nil {
		for x := range 33 {
			if k := c.kappaAt(math.Exp(math.Log(1e-9) + float64(x)*0.3)); !(k > 0 && k <= 30) {
				return unusable("kappa by size", -1, k, "above 0 and up to 30")
			}
		}
	}
	return c.checkMatter()
}

// errNotSmooth is what a particle with kinks gets.
var errNotSmooth = fmt.Errorf("%w: the particle must have a smooth equilibrium curve; limited solubility and other kinks cannot rise", ErrInput)

func (c *cohort) checkMatter() error {
	if c.Matter == nil {
		return nil
	}
	if _, ok := c.Matter.Solution.(*solutes.Limited); ok {
		return errNotSmooth
	}
	for _, part := range [...]any{c.Matter.Solution, c.Matter.Tension} {
		if k, ok := part.(koehler.Kinked); ok && len(k.Kinks(nil)) > 0 {
			return errNotSmooth
		}
	}
	if c.Matter.Kelvin == koehler.PureVapour {
		return fmt.Errorf("%w: the Kelvin term of a pure vapour is not that of a drop in air", ErrInput)
	}
	return nil
}

func (c *cohort) kappaAt(dry float64) float64 {
	if c.KappaBySize != nil {
		return c.KappaBySize.At(dry)
	}
	return c.Kappa
}

// isInert tells whether the particles take up no water at all below their crest.
func (c *cohort) isInert() bool { return c.Matter == nil && c.KappaBySize == nil && c.Kappa == 0 }

// reach returns the dry diameters between which the bins lie.
func (c *cohort) reach() (from, to float64) {
	switch s := c.Sizes.(type) {
	case aerosol.Mode:
		from, to = modeReach(s)
	case aerosol.Modes:
		for i, m := range s {
			lo, hi := modeReach(m)
			if i == 0 {
				from, to = lo, hi
			}
			from, to = math.Min(from, lo), math.Max(to, hi)
		}
	case *aerosol.Bins:
		e := s.Grid().Edges()
		from, to = e[0], e[len(e)-1]
	default:
		from, to = quantile(s, 1-reachShare), quantile(s, reachShare)
	}
	if c.From > 0 {
		from = c.From
	}
	if c.To > 0 {
		to = c.To
	}
	return from, to
}

func modeReach(m aerosol.Mode) (from, to float64) {
	wide := math.Pow(m.GSD, binReach)
	return math.Max(m.Median/wide, math.Min(leastReach, m.Median/2)), math.Min(m.Median*wide, math.Max(mostReach, m.Median*2))
}

// quantile is the diameter above which the share of the particles lies.
func quantile(s spectrum.Sizes, share float64) float64 {
	lo, hi, want := math.Log(leastReach), math.Log(mostReach), share*s.Number()
	for range quantileSteps {
		mid := (lo + hi) / 2
		if s.Above(math.Exp(mid)) > want {
			lo = mid
		} else {
			hi = mid
		}
	}
	return math.Exp(hi)
}

// cut makes the edges: equal in ln D; where the density jumps, each piece has its
// share of the bins, one at least.
func (c *cohort) cut(bins int) {
	pieces := []float64{c.from}
	if b, ok := c.Sizes.(interface{ Breaks() []float64 }); ok {
		for _, d := range b.Breaks() {
			if d > c.from && d < c.to {
				pieces = append(pieces, d)
			}
		}
	}
	pieces = append(pieces, c.to)
	width := math.Log(c.to/c.from) / float64(bins)
	c.edges = append(make([]float64, 0, bins+len(pieces)), c.from)
	for i := 1; i < len(pieces); i++ {
		lo, hi := pieces[i-1], pieces[i]
		n := max(1, int(math.Round(math.Log(hi/lo)/width)))
		for k := 1; k < n; k++ {
			c.edges = append(c.edges, lo*math.Exp(math.Log(hi/lo)*float64(k)/float64(n)))
		}
		c.edges = append(c.edges, hi)
	}
}

// between returns the number of particles from lo to hi (m), 1/m³.
func (c *cohort) between(lo, hi float64) float64 {
	if !(hi > lo) {
		return 0
	}
	if b, ok := c.Sizes.(interface{ Between(lo, hi float64) float64 }); ok {
		return c.Share * b.Between(lo, hi)
	}
	return c.Share * (c.Sizes.Above(lo) - c.Sizes.Above(hi))
}

// above returns the number of the cohort's particles wider than d, 1/m³.
func (c *cohort) above(d float64) float64 { return c.between(math.Max(d, c.from), c.to) }

// particle is the matter of one dry size at a temperature.
func (c *cohort) particle(dry, T float64) koehler.Particle {
	if c.Matter != nil {
		p := *c.Matter
		p.Temperature = T
		return p.Sized(dry)
	}
	p := koehler.Particle{DryDiameter: dry, Temperature: T, Solution: solutes.Kappa(c.kappaAt(dry))}
	if c.TensionFactor != 1 {
		p.Tension = solutes.ConstantTension(c.tension(T))
	}
	return p
}
