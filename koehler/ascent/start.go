package ascent

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// probe is a dry size of no number that is integrated along.
type probe struct {
	group int
	dry   float64 // diameter, m
}

// newSystem cuts the population into drops and sets them to their size in
// equilibrium with the start. Probes come last.
func newSystem(p Parcel, o Options, probes []probe) (*system, point, error) {
	vapourPressure := p.Humidity * atmos.VapourPressure(p.Temperature)
	s := &system{
		kin:     kinetics{o.Transition, o.MassAccommodation, o.ThermalAccommodation},
		updraft: p.Updraft,
		rho:     atmos.WaterDensity(p.Temperature),
		dense:   (p.Pressure - vapourPressure) / (dryAirGas * p.Temperature),
		moist:   o.MoistHeat,
		startT:  p.Temperature,
	}
	vapour := massRatio * vapourPressure / (p.Pressure - vapourPressure)
	s.start = climateAt(p.Temperature, p.Pressure, vapour, s.rho, s.kin)
	for i, g := range p.Population {
		c, err := newCohort(g, i, o.Bins, p.Temperature)
		if err != nil {
			return nil, point{}, err
		}
		s.all = append(s.all, c)
	}
	if err := s.fill(probes); err != nil {
		return nil, point{}, err
	}
	q := s.newPoint()
	q.T, q.p = p.Temperature, p.Pressure
	for i := range s.cohorts {
		if err := s.settle(&q, &s.cohorts[i], p.Humidity); err != nil {
			return nil, q, &GroupError{Group: s.cohorts[i].index, Err: err}
		}
	}
	liquid := 0.0
	for i, r := range q.r {
		liquid += s.mass[i] * (r*r*r*s.inverse3[i] - 1)
	}
	s.total = vapour + liquid
	if !s.evaluate(&q) {
		return nil, q, fmt.Errorf("%w: the start is not possible", ErrInput)
	}
	return s, q, nil
}

// fill makes the drops of all cohorts that take up water.
func (s *system) fill(probes []probe) error {
	for i := range s.all {
		c := s.all[i]
		if c.isInert() {
			continue
		}
		c.first = len(s.dry)
		for k := 1; k < len(c.edges); k++ {
			s.add(&c, math.Sqrt(c.edges[k-1]*c.edges[k]), c.between(c.edges[k-1], c.edges[k]))
		}
		c.last = len(s.dry)
		s.all[i].first, s.all[i].last = c.first, c.last
		s.cohorts = append(s.cohorts, c)
	}
	s.bins = len(s.dry)
	for _, pr := range probes { // each a cohort of its own, with the composition of its group
		c := s.all[pr.group]
		c.first = len(s.dry)
		kept := c
		if kept.isInert() {
			return &GroupError{Group: pr.group, Err: unusable("followed dry diameter", -1, pr.dry, "of a group that takes up water")}
		}
		s.add(&c, pr.dry, 0)
		c.last = len(s.dry)
		s.cohorts = append(s.cohorts, c)
	}
	return s.prepare()
}

func (s *system) add(c *cohort, dry, number float64) {
	r := dry / 2
	n := number / s.dense
	s.dry = append(s.dry, r)
	s.inverse3 = append(s.inverse3, 1/(r*r*r))
	s.number = append(s.number, n)
	s.mass = append(s.mass, 4.0/3*math.Pi*s.rho*r*r*r*n)
	s.perCube = append(s.perCube, 4.0/3*math.Pi*s.rho*n)
	s.kappa = append(s.kappa, c.kappaAt(dry))
}

// prepare makes the drops with Matter ready.
func (s *system) prepare() error {
	s.prepared = make([]koehler.Prepared, len(s.dry))
	s.hasTaut = make([]bool, len(s.dry))
	for _, c := range s.cohorts {
		if c.Matter == nil {
			continue
		}
		for i := c.first; i < c.last; i++ {
			p := c.particle(2*s.dry[i], s.startT)
			ready, err := p.Prepare()
			if err != nil {
				return &GroupError{Group: c.index, Err: err}
			}
			s.prepared[i], s.hasTaut[i] = ready, p.Tension != nil
		}
	}
	return nil
}

// settle sets the drops of a cohort to their equilibrium at the saturation ratio.
func (s *system) settle(q *point, c *cohort, humidity float64) error {
	if c.Matter != nil {
		for i := c.first; i < c.last; i++ {
			p := c.particle(2*s.dry[i], s.startT)
			stable, _, err := p.Haze(humidity)
			if err != nil {
				return fmt.Errorf("dry diameter %.4g nm: %w", 2e9*s.dry[i], err)
			}
			q.r[i] = s.dry[i] * math.Cbrt(1+stable.Water)
		}
		return nil
	}
	half := s.start.kelvin * c.TensionFactor
	for i := c.first; i < c.last; i++ {
		u, ok := haze(s.kappa[i], half/s.dry[i], humidity)
		if !ok {
			return fmt.Errorf("dry diameter %.4g nm: %w", 2e9*s.dry[i], koehler.ErrNoHaze)
		}
		q.r[i] = s.dry[i] * math.Cbrt(1+u)
	}
	return nil
}

// haze solves u/(u+κ) exp(a/(1+u)^(1/3)) = S ≤ 1 for u, with a = A/Dd. Newton in ln u from
// the size without curvature, which is above the root: there ln S is concave in ln u,
// so the steps come down from one side after the first.
func haze(kappa, a, S float64) (u float64, ok bool) {
	lnS := math.Log(S)
	u = kappa
	if S < 1 {
		u = kappa / math.Expm1(-lnS)
	}
	for range 100 {
		k := a / math.Cbrt(1+u)
		f := k - math.Log1p(kappa/u) - lnS
		slope := kappa/(u+kappa) - k*u/(3*(1+u))
		step := -f / slope
		if !(slope > 0) {
			step = -1
		}
		step = math.Max(-2, math.Min(2, step))
		u *= math.Exp(step)
		if math.Abs(step) < 1e-13 {
			return u, true
		}
	}
	return u, !math.IsNaN(u)
}

// critical returns the wet radius of drop i at its crest at a temperature, m.
func (s *system) critical(c *cohort, i int, T float64) (float64, error) {
	if c.Matter == nil {
		return s.dry[i] * koehler.SolveKappa(2*s.dry[i], c.kelvinLength(T, s.rho), s.kappa[i]).GrowthFactor, nil
	}
	crest, err := c.particle(2*s.dry[i], T).Crest()
	if errors.Is(err, koehler.ErrNoCrest) {
		return math.Inf(1), nil
	}
	return s.dry[i] * math.Cbrt(1+crest.Water), err
}

// kelvinLength is A for a diameter with the run's density of water, m.
func (c *cohort) kelvinLength(T, rho float64) float64 {
	return 4 * c.tension(T) * atmos.WaterMolarMass / (atmos.GasConstant * T * rho)
}

func (c *cohort) tension(T float64) float64 { return atmos.SurfaceTension(T) * c.TensionFactor }
