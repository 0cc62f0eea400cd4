package ascent

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// system is an ascent as equations for the temperature, the pressure and the radius
// of each of n drops. Each drop is coupled to the air only, and back.
type system struct {
	kin     kinetics
	updraft float64
	rho     float64 // liquid water, kg/m³
	total   float64 // vapour and liquid, kg per kg of dry air
	dense   float64 // dry air at the start, kg/m³
	moist   bool
	all     []cohort // one a group of the population
	cohorts []cohort // those that grow, and the probes
	bins    int      // drops that are no probes

	dry      []float64 // dry radius, m
	inverse3 []float64 // 1/dry³
	perCube  []float64 // mass/dry³, kg per kg of dry air and m³
	number   []float64 // per kg of dry air
	mass     []float64 // water per unit u, kg per kg of dry air
	kappa    []float64
	prepared []koehler.Prepared // of drops with Matter; others are empty
	hasTaut  []bool             // whether that Matter has a tension of its own
	start    climate
	startT   float64 // K
}

// point is the state at one time with everything that follows from it.
type point struct {
	T, p           float64
	r, u, eq, rate []float64 // m; water over dry volume; S_eq; dr/dt, m/s
	vapour, liquid float64
	dT, dp, dl     float64 // d/dt
	climate
}

func (s *system) newPoint() point {
	n := len(s.dry)
	room := make([]float64, 4*n)
	cut := func(i int) []float64 { return room[i*n : (i+1)*n : (i+1)*n] }
	return point{r: cut(0), u: cut(1), eq: cut(2), rate: cut(3)}
}

// evaluate works out everything from T, p and r, and reports whether the state is
// possible at all.
func (s *system) evaluate(q *point) bool {
	n := len(q.r)
	r, u, inverse3, mass := q.r, q.u[:n], s.inverse3[:n], s.mass[:n]
	liquid, isWet := 0.0, true
	for i, ri := range r {
		ui := ri*ri*ri*inverse3[i] - 1
		u[i] = ui
		liquid += mass[i] * ui
		if !(ui > 0) {
			isWet = false
		}
	}
	q.liquid, q.vapour = liquid, s.total-liquid
	if !isWet || !(q.vapour > 0) || !(q.T > coldest/2 && q.T < 2*warmest) || !(q.p > 0) {
		return false
	}
	q.climate = climateAt(q.T, q.p, q.vapour, s.rho, s.kin)
	for i := range s.cohorts {
		s.equilibrate(q, &s.cohorts[i])
	}
	s.grow(q)
	q.dp = -atmos.Gravity * q.p * s.updraft / (dryAirGas * virtual(q.T, q.vapour))
	q.dT = (q.latent*q.dl - atmos.Gravity*s.updraft*s.weight(q)) / s.heat(q)
	return !math.IsNaN(q.dT)
}

func virtual(T, vapour float64) float64 { return T * (1 + vapour/massRatio) / (1 + vapour) }

// heat is the heat capacity of the parcel, J per K and kg of dry air.
func (s *system) heat(q *point) float64 {
	if !s.moist {
		return dryAirHeat
	}
	return dryAirHeat + vapourHeat*q.vapour + liquidHeat*q.liquid
}

// weight is what hangs on a kg of dry air, as a share of it, without condensate.
func (s *system) weight(q *point) float64 {
	if !s.moist {
		return 1
	}
	return 1 + q.vapour
}

// equilibrate fills the saturation ratios over the drops of one cohort.
func (s *system) equilibrate(q *point, c *cohort) {
	if c.Matter != nil {
		for i := c.first; i < c.last; i++ {
			q.eq[i], _, _ = s.overMatter(q, i)
		}
		return
	}
	half := q.kelvin * c.TensionFactor
	r, u, eq, kappa := q.r[c.first:c.last], q.u[c.first:c.last], q.eq[c.first:c.last], s.kappa[c.first:c.last]
	u, eq, kappa = u[:len(r)], eq[:len(r)], kappa[:len(r)]
	for i, ri := range r {
		w := u[i] + kappa[i]
		inverse := 1 / (ri * w)
		factor, curved := 0.0, half*w*inverse
		if curved < mostSmall {
			factor = expSmall(curved / 4)
		} else {
			factor = math.Exp(curved)
		}
		eq[i] = u[i] * ri * inverse * factor
	}
}

// overMatter returns S_eq of a drop with Matter and its derivatives by r and T.
// The Kelvin term was made ready at the start; it goes with σ/T.
func (s *system) overMatter(q *point, i int) (eq, byR, byT float64) {
	u := q.u[i]
	t := s.prepared[i].Terms(u)
	scale, slope := q.kelvin/s.start.kelvin, q.kelvinSlope
	if s.hasTaut[i] {
		scale, slope = s.startT/q.T, -1/q.T
	}
	eq = math.Exp(t.LnActivity + scale*t.LnKelvin)
	return eq, eq * (t.ActivitySlope + scale*t.KelvinSlope) * 3 * (u + 1) / (u * q.r[i]), eq * scale * t.LnKelvin * slope
}

// grow fills the rates of the radii and adds up the growth of the liquid.
func (s *system) grow(q *point) {
	n := len(q.r)
	r, eq, rate, perCube := q.r, q.eq[:n], q.rate[:n], s.perCube[:n]
	S, diffusion, conduction, v, k := q.S, q.diffusion, q.conduction, q.diffuse, q.warm
	sum := 0.0
	for i, ri := range r {
		rv, rk := ri+v.l, ri+k.l
		below := diffusion*(ri*(ri+v.c1)+v.c2)*rk + conduction*(ri*(ri+k.c1)+k.c2)*rv
		f := (S - eq[i]) * rv * rk / below
		rate[i] = f
		sum += perCube[i] * ri * ri * f
	}
	q.dl = 3 * sum
}
