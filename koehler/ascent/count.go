package ascent

import (
	"context"
	"errors"
	"math"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

const gravity = atmos.Gravity

// result works the counts out of the finished run.
func (r *run) result(p Parcel) (Result, error) {
	end := r.state(&r.from, r.time)
	out := Result{
		Peak: r.peak, HasPeak: r.hasPeak, End: end,
		Profile: r.profile.rows,
		Stats:   r.stats,
	}
	out.Bins = len(r.dry)
	out.WaterResidual = (r.from.vapour + r.from.liquid - r.total) / r.total
	out.EnergyResidual = r.energy / (gravity * end.Height)
	out.LiquidContent = end.LiquidWater * dryDensity(end)
	for i := range r.all {
		g, err := r.group(&r.all[i])
		if err != nil {
			return out, &GroupError{Group: i, Err: err}
		}
		out.ByGroup = append(out.ByGroup, g)
		out.Number += g.Number
		out.Droplets += g.Droplets
		out.Grown += g.Grown
		out.GrownError += g.GrownError
	}
	out.DropletsAtPeak = out.Droplets * dryDensity(r.peak) / r.system.dense
	out.DropletsSTP = out.Droplets * aerosol.Air{Temperature: p.Temperature, Pressure: p.Pressure}.To(aerosol.StandardAir())
	var err error
	if r.opt.Sizes {
		if out.Drops, err = r.drops(); err != nil {
			return out, err
		}
	}
	if out.Tracers, err = r.tracers(); err != nil {
		return out, err
	}
	out.Notes = r.notes(p)
	return out, nil
}

func (r *run) tracers() (out []TracerResult, err error) {
	for k, t := range r.opt.Follow {
		wet, err := r.system.critical(&r.all[t.Group], r.bins+k, r.from.T)
		if err != nil {
			return nil, &GroupError{Group: t.Group, Err: err}
		}
		out = append(out, TracerResult{t, wet, r.from.r[r.bins+k] > wet})
	}
	return out, nil
}

// dryDensity is the density of dry air, kg/m³.
func dryDensity(s State) float64 {
	vapourPressure := s.Vapour * s.Pressure / (massRatio + s.Vapour)
	return (s.Pressure - vapourPressure) / (dryAirGas * s.Temperature)
}

// group counts one group: by the crests at the peak, and by the sizes at the end.
func (r *run) group(c *cohort) (GroupResult, error) {
	g := GroupResult{Number: c.above(0), GrownDry: math.Inf(1)}
	var err error
	if g.CriticalDry, g.Droplets, err = r.activated(c); err != nil || c.isInert() {
		return g, err
	}
	for i := c.first; i < c.last; i++ {
		wet, err := r.system.critical(c, i, r.from.T)
		if err != nil {
			return g, err
		}
		if r.from.r[i] > wet {
			k := i - c.first
			g.GrownDry = c.edges[k]
			g.Grown = c.above(g.GrownDry)
			g.GrownError = c.between(c.edges[max(0, k-1)], c.edges[k+1]) / 2
			break
		}
	}
	return g, nil
}

// activated returns the smallest dry diameter whose crest lies at the peak or below and
// the number of particles with such crests.
func (r *run) activated(c *cohort) (dry, number float64, err error) {
	s, T := r.peak.Supersaturation, r.peak.Temperature
	if !(s > 0) {
		return math.Inf(1), 0, nil
	}
	switch {
	case c.Matter != nil:
		dry, err = c.particle(1e-7, T).ActivatedDryDiameter(s)
		if errors.Is(err, koehler.ErrNoSolution) {
			return math.Inf(1), 0, nil
		}
	case c.KappaBySize != nil:
		return r.activatedBySize(c, s, T)
	default:
		dry, err = koehler.DryOf(c.Kappa, c.kelvinLength(T, r.rho), s)
	}
	return dry, c.above(dry), err
}

// activatedBySize adds up every range of sizes whose crest lies at s or below: κ may
// fall so steeply that wider particles activate later. Between two edges the
// logarithm of the crest goes linearly with that of the size.
func (r *run) activatedBySize(c *cohort, s, T float64) (dry, number float64, err error) {
	excess := func(d float64) float64 {
		return math.Log(koehler.SolveKappa(d, c.kelvinLength(T, r.rho), c.kappaAt(d)).Supersaturation / s)
	}
	dry = math.Inf(1)
	before := excess(c.edges[0])
	for k := 1; k < len(c.edges); k++ {
		lo, hi := c.edges[k-1], c.edges[k]
		here := excess(hi)
		turn := lo * math.Pow(hi/lo, before/(before-here))
		switch {
		case before <= 0 && here <= 0:
			turn = lo
			number += c.between(lo, hi)
		case before <= 0:
			number += c.between(lo, turn)
			turn = lo
		case here <= 0:
			number += c.between(turn, hi)
		default:
			turn = math.Inf(1)
		}
		dry = math.Min(dry, turn)
		before = here
	}
	return dry, number, nil
}

func (r *run) drops() ([]Drop, error) {
	out := make([]Drop, 0, r.bins)
	for ci := range r.cohorts {
		c := &r.cohorts[ci]
		for i := c.first; i < c.last && i < r.bins; i++ {
			wet, err := r.system.critical(c, i, r.from.T)
			if err != nil {
				return nil, &GroupError{Group: c.index, Err: err}
			}
			out = append(out, Drop{c.index, 2 * r.dry[i], 2 * r.from.r[i], 2 * wet, r.number[i] * r.system.dense})
		}
	}
	return out, nil
}

// sharpened runs once more with probes between the smallest size that has grown and
// the next smaller one, and narrows the counts down.
func (r *run) sharpened(ctx context.Context, p Parcel, o Options, out Result) (Result, error) {
	var probes []probe
	brackets := make([][2]float64, len(out.ByGroup))
	for gi, g := range out.ByGroup {
		c := &r.all[gi]
		if math.IsInf(g.GrownDry, 1) || c.isInert() || g.GrownDry <= c.from {
			continue
		}
		k := 0
		for c.edges[k] < g.GrownDry {
			k++
		}
		lo, hi := math.Sqrt(c.edges[k-1]*c.edges[k]), math.Sqrt(c.edges[k]*c.edges[k+1])
		brackets[gi] = [2]float64{lo, hi}
		for i := range o.Probes {
			probes = append(probes, probe{gi, lo * math.Pow(hi/lo, float64(i+1)/float64(o.Probes+1))})
		}
	}
	if len(probes) == 0 {
		return out, nil
	}
	o.Follow, o.ProfileRows, o.Progress = nil, 0, nil
	second, err := rise(ctx, p, o, probes)
	if err != nil {
		return out, err
	}
	out.Grown, out.GrownError = 0, 0
	for gi := range out.ByGroup {
		if err := second.narrow(&out.ByGroup[gi], gi, brackets[gi], probes); err != nil {
			return out, err
		}
		out.Grown += out.ByGroup[gi].Grown
		out.GrownError += out.ByGroup[gi].GrownError
	}
	return out, nil
}

// narrow puts the grown size of a group between two of its probes.
func (r *run) narrow(g *GroupResult, group int, bracket [2]float64, probes []probe) error {
	lo, hi := bracket[0], bracket[1]
	if hi == 0 {
		return nil
	}
	c := &r.all[group]
	for k, pr := range probes {
		if pr.group != group {
			continue
		}
		wet, err := r.system.critical(c, r.bins+k, r.from.T)
		if err != nil {
			return &GroupError{Group: group, Err: err}
		}
		if r.from.r[r.bins+k] > wet {
			hi = pr.dry
			break
		}
		lo = pr.dry
	}
	g.GrownDry = math.Sqrt(lo * hi)
	g.Grown = c.above(g.GrownDry)
	g.GrownError = c.between(lo, hi) / 2
	return nil
}
