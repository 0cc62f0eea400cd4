package ascent

// The coefficients of RODAS4, a Rosenbrock method of order 4 with six stages, stiffly
// accurate, with an embedded method of order 3 and a dense output of order 3, in
// the form that needs no product with the Jacobian. Source: Hairer & Wanner, Solving
// Ordinary Differential Equations II (1996), section IV.7 and their program; from
// memory, and held by the tests of the order of all three.
const rodasGamma = 0.25

// rodasA[i] are the weights of the stages before in the point of stage i+1, where
// the last two points add the whole stage before them.
var rodasA = [...][5]float64{
	{1.544},
	{0.9466785280815826, 0.2557011698983284},
	{3.314825187068521, 2.896124015972201, 0.9986419139977817},
	{1.221224509226641, 6.019134481288629, 12.53708332932087, -0.6878860361058950},
}

// rodasC[i] are the weights of the stages before in the right side of stage i+1,
// over the step.
var rodasC = [...][5]float64{
	{-5.6688},
	{-2.430093356833875, -0.2063599157091915},
	{-0.1073529058151375, -9.594562251023355, -20.47028614809616},
	{7.496443313967647, -10.24680431464352, -33.99990352819905, 11.70890893206160},
	{8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054},
}

// rodasD are the weights of the first five stages in the two coefficients of the
// dense output y(θ) = (1-θ) y₀ + θ (y₁ + (1-θ) (e₁ + θ e₂)).
var rodasD = [2][5]float64{
	{10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662},
	{-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872},
}

const rodasStages = 6

// stepper makes steps of the system. Its slices are made once.
type stepper struct {
	*system
	from, to point // the ends of the step
	arrow
	k      [rodasStages][]float64 // the stages of r
	kT, kP [rodasStages]float64
	errS   float64 // what the stage before last lacks in S
}

func newStepper(s *system) *stepper {
	st := &stepper{system: s, from: s.newPoint(), to: s.newPoint(), arrow: newArrow(len(s.dry))}
	n := len(s.dry)
	room := make([]float64, rodasStages*n)
	for i := range st.k {
		st.k[i] = room[i*n : (i+1)*n : (i+1)*n]
	}
	return st
}

// try makes a step of h seconds from st.from, whose Jacobian has been filled, to
// st.to, which is evaluated. It reports false where a stage is impossible.
func (st *stepper) try(h float64) bool {
	if !st.factor(st.system, &st.from, 1/(h*rodasGamma)) {
		return false
	}
	st.solve(&st.from, st.from.rate, st.from.dT, st.from.dp, 0)
	for i := 1; i < rodasStages; i++ {
		st.place(i)
		if !st.evaluate(&st.to) {
			return false
		}
		st.right(i, 1/h)
		st.solve(&st.from, st.k[i], st.kT[i], st.kP[i], i)
	}
	last := rodasStages - 1
	r, k := st.to.r, st.k[last]
	for i := range r {
		r[i] += k[i]
	}
	st.to.T += st.kT[last]
	st.to.p += st.kP[last]
	return st.evaluate(&st.to)
}

// place puts st.to at the point of stage i.
func (st *stepper) place(i int) {
	to, from, n := st.to.r, st.from.r, len(st.to.r)
	if i == rodasStages-1 {
		k := st.k[i-1][:n]
		for j := range to {
			to[j] += k[j]
		}
		st.to.T += st.kT[i-1]
		st.to.p += st.kP[i-1]
		return
	}
	a := rodasA[i-1]
	st.to.T, st.to.p = st.from.T, st.from.p
	for s := range i {
		st.to.T += a[s] * st.kT[s]
		st.to.p += a[s] * st.kP[s]
	}
	weigh(to, from, i, &a, &st.k)
}

// right makes the right side of stage i in its own place.
func (st *stepper) right(i int, perStep float64) {
	var c [5]float64
	st.kT[i], st.kP[i] = st.to.dT, st.to.dp
	for s := range i {
		c[s] = rodasC[i-1][s] * perStep
		st.kT[i] += c[s] * st.kT[s]
		st.kP[i] += c[s] * st.kP[s]
	}
	weigh(st.k[i], st.to.rate, i, &c, &st.k)
}

// weigh makes dst the sum of base and the first n stages, each with its weight.
func weigh(dst, base []float64, n int, w *[5]float64, k *[rodasStages][]float64) {
	m := len(dst)
	base = base[:m]
	k0, k1, k2, k3, k4 := k[0][:m], k[1][:m], k[2][:m], k[3][:m], k[4][:m]
	w0, w1, w2, w3, w4 := w[0], w[1], w[2], w[3], w[4]
	switch n {
	case 1:
		for j := range dst {
			dst[j] = base[j] + w0*k0[j]
		}
	case 2:
		for j := range dst {
			dst[j] = base[j] + w0*k0[j] + w1*k1[j]
		}
	case 3:
		for j := range dst {
			dst[j] = base[j] + w0*k0[j] + w1*k1[j] + w2*k2[j]
		}
	case 4:
		for j := range dst {
			dst[j] = base[j] + w0*k0[j] + w1*k1[j] + w2*k2[j] + w3*k3[j]
		}
	case 5:
		for j := range dst {
			dst[j] = base[j] + w0*k0[j] + w1*k1[j] + w2*k2[j] + w3*k3[j] + w4*k4[j]
		}
	}
}

// dense puts q at the share theta of the step, with all that the profile needs: r,
// T and p. It uses the stages of the last try.
func (st *stepper) dense(q *point, theta float64) {
	var d [5]float64
	rest := 1 - theta
	for s := range d {
		d[s] = theta * rest * (rodasD[0][s] + theta*rodasD[1][s])
	}
	weigh(q.r, st.from.r, 5, &d, &st.k)
	for i := range q.r {
		q.r[i] += theta * (st.to.r[i] - st.from.r[i])
	}
	q.T = st.from.T + theta*(st.to.T-st.from.T)
	q.p = st.from.p + theta*(st.to.p-st.from.p)
	for s := range d {
		q.T += d[s] * st.kT[s]
		q.p += d[s] * st.kP[s]
	}
}
