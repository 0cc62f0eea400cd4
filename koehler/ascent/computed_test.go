package ascent

import (
	"math"
	"strings"
	"testing"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/internal/computed"
)

// computedCase is one case of ../../testdata/computed, described in the README
// there.
type computedCase struct {
	ID, Family string
	Input      computedInput
	Output     map[string]any
	Error      map[string]map[string]float64
	AtFixed    map[string]map[string]float64 `json:"at_fixed_bins"`
	Kinetics   map[string]map[string]float64 `json:"other_kinetics_400_bins"`
	Profile    []map[string]float64          `json:"profile_400_bins"`
	Timing     []struct {
		Bins      int `json:"bins_per_mode"`
		Method    string
		Tolerance float64 `json:"rtol"`
		CPU       float64 `json:"cpu_user_s"`
	}
}

type computedInput struct {
	Modes []struct {
		N, Dg, Sg, Kappa float64
		Lo               float64 `json:"d_lo"`
		Hi               float64 `json:"d_hi"`
	}
	W, T0, P0, RH0 float64
	T, P, S, Rd, R float64 // growth
	Kappa, C, K    float64
	RhoW           float64 `json:"rho_w"`
	Mass           float64 `json:"alpha_c"`
	Thermal        float64 `json:"alpha_T"`
	End            float64 `json:"z_end"`
	Kinetics       string
}

func (c computedCase) out(key string) float64 { x, _ := c.Output[key].(float64); return x }

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if d := math.Abs(got - want); !(d <= tol*math.Abs(want)) && got != want {
		t.Errorf("%s = %.12g, want %.12g (relative %.2g, tolerance %.2g)", what, got, want, d/math.Abs(want), tol)
	}
}

func transitionOf(t testing.TB, name string) Transition {
	for _, f := range []Transition{FuchsSutugin, FluxMatching, Continuum} {
		if f.String() == strings.ReplaceAll(name, "_", "-") {
			return f
		}
	}
	t.Fatalf("no transition form %q", name)
	return 0
}

func (in computedInput) parcel() Parcel {
	p := Parcel{Temperature: in.T0, Pressure: in.P0, Humidity: in.RH0, Updraft: in.W}
	for _, m := range in.Modes {
		p.Population = append(p.Population, Group{
			Sizes: aerosol.Mode{Concentration: m.N, Median: m.Dg, GSD: m.Sg}, Kappa: m.Kappa, From: m.Lo, To: m.Hi,
		})
	}
	return p
}

func (in computedInput) options(t testing.TB, bins int, tol float64) Options {
	return Options{Bins: bins, Tolerance: tol, MassAccommodation: in.Mass, ThermalAccommodation: in.Thermal,
		Transition: transitionOf(t, in.Kinetics), Height: in.End}
}

// R of the reference has ten digits; its tables are in full precision.
const referenceR = 1e-10

func TestGrowthAgainstComputed(t *testing.T) {
	n := 0
	for _, c := range computed.Read[computedCase](t, "growth.json") {
		if c.Family == "parcel_start_200_bins" {
			continue
		}
		n++
		in := c.Input
		k := kinetics{transitionOf(t, in.Kinetics), in.Mass, 0.96}
		saturation := atmos.VapourPressure(in.T)
		e := in.S * saturation
		q := climateAt(in.T, in.P, massRatio*e/(in.P-e), in.RhoW, k)
		near(t, c.ID+" es", saturation, c.out("es"), 1e-12)
		near(t, c.ID+" L", q.latent, c.out("L"), 1e-14)
		near(t, c.ID+" F", q.diffusion, in.RhoW*8.314462618*in.T/(c.out("es")*c.out("Dv")*atmos.WaterMolarMass), referenceR)
		qv, _ := q.diffuse.at(in.R)
		qk, _ := q.warm.at(in.R)
		near(t, c.ID+" Dv_eff", c.out("Dv")*in.R/qv, c.out("Dv_eff"), referenceR)
		near(t, c.ID+" ka_eff", c.out("ka")*in.R/qk, c.out("ka_eff"), referenceR)
		near(t, c.ID+" A", 2*q.kelvin, c.out("A"), referenceR)
		s := &system{dry: []float64{in.Rd}, inverse3: []float64{1 / (in.Rd * in.Rd * in.Rd)},
			mass: []float64{0}, perCube: []float64{0}, kappa: []float64{in.Kappa}, rho: in.RhoW, kin: k, total: massRatio * e / (in.P - e)}
		s.cohorts = []cohort{{Group: Group{Kappa: in.Kappa, TensionFactor: 1}, last: 1}}
		pt := s.newPoint()
		pt.T, pt.p, pt.r[0] = in.T, in.P, in.R
		if !s.evaluate(&pt) {
			t.Errorf("%s: cannot be evaluated", c.ID)
		}
		near(t, c.ID+" S_eq", pt.eq[0], c.out("S_eq"), 1e-11)
		// the difference S - S_eq amplifies the rounding of both, hence the absolute part
		got, want := pt.rate[0], c.out("drdt")
		if tol := 3e-10*math.Abs(want) + 1e-11*pt.conductance(in.R); !(math.Abs(got-want) <= tol) {
			t.Errorf("%s dr/dt = %.12g, want %.12g", c.ID, got, want)
		}
	}
	if n < 30 {
		t.Errorf("%d growth cases, want 30 or more", n)
	}
}

func TestStartsAgainstComputed(t *testing.T) {
	n := 0
	for _, c := range computed.Read[computedCase](t, "growth.json") {
		if c.Family != "parcel_start_200_bins" {
			continue
		}
		n++
		p, o, err := completed(c.Input.parcel(), c.Input.options(t, 200, 1e-6))
		if err != nil {
			t.Fatal(err)
		}
		s, q, err := newSystem(p, o, nil)
		if err != nil {
			t.Fatal(err)
		}
		near(t, c.ID+" rho_w", s.rho, c.out("rho_w"), 1e-14)
		near(t, c.ID+" wv0", q.vapour, c.out("wv0"), 1e-11)
		near(t, c.ID+" rho_d0", s.dense, c.out("rho_d0"), referenceR)
		near(t, c.ID+" wtot", s.total, c.out("wtot"), 1e-11)
		for _, b := range c.Output["mode_0_bins"].([]any) {
			bin := b.(map[string]any)
			i := int(bin["bin"].(float64))
			near(t, c.ID+" rd", s.dry[i], bin["rd"].(float64), 1e-13)
			near(t, c.ID+" n", s.number[i], bin["n_per_kg"].(float64), 1e-9)
			near(t, c.ID+" r0", q.r[i], bin["r0"].(float64), 1e-10)
		}
	}
	if n != 10 {
		t.Errorf("%d start states, want 10", n)
	}
}

// The Jacobian against differences of the right side, drop by drop.
func TestJacobian(t *testing.T) {
	for _, moist := range []bool{false, true} {
		for _, form := range []Transition{FuchsSutugin, FluxMatching, Continuum} {
			testJacobian(t, moist, form)
		}
	}
}

func testJacobian(t *testing.T, moist bool, form Transition) {
	p, o, err := completed(continental(), Options{Bins: 7, MoistHeat: moist, Transition: form})
	if err != nil {
		t.Fatal(err)
	}
	s, q, err := newSystem(p, o, nil)
	if err != nil {
		t.Fatal(err)
	}
	moved := s.newPoint()
	moved.copy(&q)
	for i := range q.r { // away from equilibrium
		moved.r[i] *= 1 + 0.05*float64(1+i%5)
	}
	if !s.evaluate(&moved) {
		t.Fatal("cannot be evaluated")
	}
	q = moved
	st := newStepper(s)
	st.from.copy(&q)
	st.differentiate(s, &st.from)
	const shift = 37.0
	if !st.factor(s, &st.from, shift) {
		t.Fatal("singular")
	}
	// (shift - J) k must be the right side: J k by a difference along k
	right := make([]float64, len(q.r))
	for i := range right {
		right[i] = q.r[i] * math.Sin(float64(1+3*i))
	}
	st.solve(&st.from, right, 0.3, -20, 0)
	const h = 1e-3 // the stages are small: rounding counts, curvature does not
	at := func(sign float64) point {
		z := s.newPoint()
		z.copy(&q)
		for i := range z.r {
			z.r[i] += sign * h * st.k[0][i]
		}
		z.T += sign * h * st.kT[0]
		z.p += sign * h * st.kP[0]
		if !s.evaluate(&z) {
			t.Fatal("cannot be evaluated")
		}
		return z
	}
	a, b := at(1), at(-1)
	for i := range right {
		got := shift*st.k[0][i] - (a.rate[i]-b.rate[i])/(2*h)
		if tol := 1e-5*math.Abs(right[i]) + 3e-15*st.byS[i]/h; !(math.Abs(got-right[i]) <= tol) {
			t.Errorf("moist %v, %v: row of drop %d = %.10g, want %.10g within %.1g", moist, form, i, got, right[i], tol)
		}
	}
	near(t, "row of T", shift*st.kT[0]-(a.dT-b.dT)/(2*h), 0.3, 1e-5)
	near(t, "row of p", shift*st.kP[0]-(a.dp-b.dp)/(2*h), -20, 1e-5)
	near(t, "change of S", st.errS, (a.S-b.S)/(2*h), 1e-6)
}

// continental is an invented population in air of 10 °C.
func continental() Parcel {
	return Parcel{Temperature: 283.15, Pressure: 90000, Humidity: 0.95, Updraft: 0.5, Population: []Group{
		{Sizes: aerosol.Mode{Concentration: 1000e6, Median: 30e-9, GSD: 1.7}, Kappa: 0.2},
		{Sizes: aerosol.Mode{Concentration: 500e6, Median: 130e-9, GSD: 1.6}, Kappa: 0.45},
	}}
}
