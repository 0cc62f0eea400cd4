package ascent

import (
	"math"

	"dropcrest/atmos"
)

// arrow is the matrix 1/(h γ) - J of a step and its factors. With the change of
// the saturation ratio as a further unknown,
//
//	δS = S_T δT + S_p δp - S_w Σ m_i δr_i
//
// every drop is coupled to (δS, δT, δp) alone, so the drops are eliminated one by one
// and three equations are left: time and memory go with the number of drops.
type arrow struct {
	own, byS, byT, byP          []float64 // the derivatives of dr/dt: by r, S, T, p
	water, growth               []float64 // d w_l/dr_i; d(dw_l/dt)/dr_i at fixed air
	inverse                     []float64 // 1/(1/(hγ) - own)
	wideS, wideT, wideP         []float64 // byS, byT, byP times inverse
	sumS, sumT, sumP            float64   // d(dw_l/dt) by S, T, p at fixed drops
	warming, warmingT, warmingW float64   // dT/dt by dw_l/dt, by T and by w_v, at fixed drops
	presT, presP, presW         float64   // dp/dt by T, p, w_v
	small                       [3][3]float64
	order                       [3]int
}

func newArrow(n int) (a arrow) {
	room := make([]float64, 10*n)
	for i, v := range [...]*[]float64{&a.own, &a.byS, &a.byT, &a.byP, &a.water, &a.growth, &a.inverse, &a.wideS, &a.wideT, &a.wideP} {
		*v = room[i*n : (i+1)*n : (i+1)*n]
	}
	return a
}

// differentiate fills the Jacobian at an evaluated point.
func (a *arrow) differentiate(s *system, q *point) {
	a.sumS, a.sumT, a.sumP = 0, 0, 0
	for i := range s.cohorts {
		a.differentiateCohort(s, q, &s.cohorts[i])
	}
	a.differentiateAir(s, q)
}

func (a *arrow) differentiateCohort(s *system, q *point, c *cohort) {
	v, k := q.diffuse, q.warm
	half, plain := q.kelvin*c.TensionFactor, c.Matter == nil
	for i := c.first; i < c.last; i++ {
		r, u, f := q.r[i], q.u[i], q.rate[i]
		eqR, eqT := 0.0, 0.0
		if plain {
			eqR = q.eq[i] / r * (3*s.kappa[i]*(u+1)/(u*(u+s.kappa[i])) - half/r)
			eqT = q.eq[i] * half / r * q.kelvinSlope
		} else {
			_, eqR, eqT = s.overMatter(q, i)
		}
		qv, qvR := v.at(r)
		qk, qkR := k.at(r)
		g := 1 / (q.diffusion*qv + q.conduction*qk)
		pathV, pathK := q.diffusion*v.byPath(r, qv), q.conduction*k.byPath(r, qk)
		relR := (q.diffusion*qvR + q.conduction*qkR) * g
		relT := (q.diffusionT*qv + q.conductionT*qk + pathV*v.lnT + pathK*k.lnT) * g
		relP := (q.diffusionP*qv + pathV*v.lnP + pathK*k.lnP) * g
		a.own[i] = -g*eqR - f*relR
		a.byS[i] = g
		a.byT[i] = -g*eqT - f*relT
		a.byP[i] = -f * relP
		m := 3 * s.perCube[i] * r * r
		a.water[i] = m
		a.growth[i] = m * (2*f/r + a.own[i])
		a.sumS += m * g
		a.sumT += m * a.byT[i]
		a.sumP += m * a.byP[i]
	}
}

// differentiateAir fills the derivatives of dT/dt and dp/dt at fixed drops.
func (a *arrow) differentiateAir(s *system, q *point) {
	heat := s.heat(q)
	a.warming = q.latent / heat
	a.warmingT = atmos.LinearLatentHeatSlope * q.dl / heat
	a.warmingW = 0
	if s.moist {
		a.warmingW = -(q.dT*(vapourHeat-liquidHeat) + atmos.Gravity*s.updraft) / heat
	}
	a.presT, a.presP = -q.dp/q.T, q.dp/q.p
	a.presW = -q.dp * (1/(massRatio+q.vapour) - 1/(1+q.vapour))
}

// factor makes the matrix ready for a step, where shift is 1/(h γ). It reports
// false for a singular one.
func (a *arrow) factor(_ *system, q *point, shift float64) bool {
	n := len(a.own)
	own, byS, byT, byP := a.own, a.byS[:n], a.byT[:n], a.byP[:n]
	water, growth := a.water[:n], a.growth[:n]
	inverse, wideS, wideT, wideP := a.inverse[:n], a.wideS[:n], a.wideT[:n], a.wideP[:n]
	var w, g [3]float64 // sums of water and growth times the wide ones
	for i, d := range own {
		inv := 1 / (shift - d)
		sS, sT, sP := byS[i]*inv, byT[i]*inv, byP[i]*inv
		inverse[i], wideS[i], wideT[i], wideP[i] = inv, sS, sT, sP
		w[0] += water[i] * sS
		w[1] += water[i] * sT
		w[2] += water[i] * sP
		g[0] += growth[i] * sS
		g[1] += growth[i] * sT
		g[2] += growth[i] * sP
	}
	g[0] += a.sumS
	g[1] += a.sumT
	g[2] += a.sumP
	a.small = [3][3]float64{
		{1 + q.byVapour*w[0], -q.byT + q.byVapour*w[1], -q.byP + q.byVapour*w[2]},
		{a.warmingW*w[0] - a.warming*g[0], shift - a.warmingT + a.warmingW*w[1] - a.warming*g[1], a.warmingW*w[2] - a.warming*g[2]},
		{a.presW * w[0], -a.presT + a.presW*w[1], shift - a.presP + a.presW*w[2]},
	}
	return a.eliminate()
}

// eliminate factors the small matrix with row exchanges.
func (a *arrow) eliminate() bool {
	m := &a.small
	a.order = [3]int{0, 1, 2}
	for c := range 3 {
		best := c
		for r := c + 1; r < 3; r++ {
			if math.Abs(m[r][c]) > math.Abs(m[best][c]) {
				best = r
			}
		}
		m[c], m[best] = m[best], m[c]
		a.order[c], a.order[best] = a.order[best], a.order[c]
		if m[c][c] == 0 || math.IsNaN(m[c][c]) {
			return false
		}
		for r := c + 1; r < 3; r++ {
			m[r][c] /= m[c][c]
			for k := c + 1; k < 3; k++ {
				m[r][k] -= m[r][c] * m[c][k]
			}
		}
	}
	return true
}

// solve solves for stage i with a right side; x may lie in the stage's own place.
func (st *stepper) solve(q *point, x []float64, T, p float64, i int) {
	a := &st.arrow
	n := len(x)
	k := st.k[i][:n]
	inverse, water, growth := a.inverse[:n], a.water[:n], a.growth[:n]
	var w, g float64
	for j, right := range x {
		right *= inverse[j]
		k[j] = right
		w += water[j] * right
		g += growth[j] * right
	}
	b := a.back([3]float64{-q.byVapour * w, T + a.warming*g - a.warmingW*w, p - a.presW*w})
	wideS, wideT, wideP := a.wideS[:n], a.wideT[:n], a.wideP[:n]
	for j := range k {
		k[j] += wideS[j]*b[0] + wideT[j]*b[1] + wideP[j]*b[2]
	}
	st.kT[i], st.kP[i] = b[1], b[2]
	st.errS = b[0]
}

// back solves with the factors of the small matrix.
func (a *arrow) back(b [3]float64) [3]float64 {
	m := &a.small
	y := [3]float64{b[a.order[0]], b[a.order[1]], b[a.order[2]]}
	y[1] -= m[1][0] * y[0]
	y[2] -= m[2][0]*y[0] + m[2][1]*y[1]
	y[2] /= m[2][2]
	y[1] = (y[1] - m[1][2]*y[2]) / m[1][1]
	y[0] = (y[0] - m[0][1]*y[1] - m[0][2]*y[2]) / m[0][0]
	return y
}
