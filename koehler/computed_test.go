package koehler

import (
	"math"
	"testing"

	"dropcrest/koehler/internal/computed"
	"dropcrest/solutes"
)

// computedCase is one case of ../testdata/computed: values of a general-purpose
// library in 40 digits, described in the README there.
type computedCase struct {
	ID     string             `json:"id"`
	Family string             `json:"family"`
	Input  map[string]any     `json:"input"`
	Output map[string]float64 `json:"output"`
}

func (c computedCase) in(key string) float64 { x, _ := c.Input[key].(float64); return x }

func checkClose(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if d := math.Abs(got - want); !(d <= tol*math.Abs(want)) {
		t.Errorf("%s = %.17g, want %.17g (relative %.2g, tolerance %.2g)", what, got, want, d/math.Abs(want), tol)
	}
}

// The reference's Kelvin length is given to full precision, so s_c must agree
// to rounding.
func TestSolveKappaAgainstComputed(t *testing.T) {
	for _, c := range computed.Read[computedCase](t, "koehler_kappa.json") {
		dry, kappa, A := c.in("Dd"), c.in("kappa"), c.Output["A"]
		got := SolveKappa(dry, A, kappa)
		checkClose(t, c.ID+" sc", got.Supersaturation, c.Output["sc"], 1e-14)
		checkClose(t, c.ID+" Dc", got.GrowthFactor*dry, c.Output["Dc"], 1e-14)
		checkClose(t, c.ID+" aw", got.WaterActivity, c.Output["aw_c"], 1e-14)
		// R of the reference has ten digits: 1.8e-11
		sigma := c.in("sigma_factor") * atmosTension(c.in("T"))
		checkClose(t, c.ID+" A", KelvinLength(sigma, c.in("T")), A, 1e-10)
		if kappa > 0 {
			classic := KappaClassic(dry, A, kappa)
			checkClose(t, c.ID+" classic sc", classic.Supersaturation, c.Output["sc_classic"], 1e-13)
			checkClose(t, c.ID+" classic Dc", classic.GrowthFactor*dry, c.Output["Dc_classic"], 1e-14)
		}
	}
}

// pitzerSalt is the reference's own salt: Pitzer & Mayorga 1973 at 25 °C with
// the parameters of the README, section 2.
type pitzerSalt struct {
	model        string
	perWater     float64 // molality x u
	nu, z, ionic float64 // ionic: ionic strength per molality
	b0, b1, cphi float64 // factors of the osmotic coefficient, multiplied out
}

func (p pitzerSalt) LnActivity(u float64) (lnaw, slope float64) {
	const Mw = 0.01801528
	m := p.perWater / u
	switch p.model {
	case "raoult_mole_fraction":
		k := p.nu * m * Mw
		return -math.Log1p(k), k / (1 + k)
	case "ideal_osmotic":
		return -p.nu * m * Mw, p.nu * m * Mw
	}
	I := p.ionic * m
	r := math.Sqrt(I)
	e := math.Exp(-2 * r)
	phi := 1 - p.z*0.392*r/(1+1.2*r) + m*(p.b0+p.b1*e) + m*m*p.cphi
	// d φ/d ln m; ln a_w falls with m, and d ln m = -d ln u
	dphi := -p.z*0.392*r/2/((1+1.2*r)*(1+1.2*r)) + m*(p.b0+p.b1*e) - m*p.b1*e*r + 2*m*m*p.cphi
	return -p.nu * m * phi * Mw, p.nu * m * Mw * (phi + dphi)
}

func (p pitzerSalt) LeastWater() float64 { return p.perWater / 6 }

// saltTension is σ of water and a linear increment per molality.
type saltTension struct{ water, perWater, increment float64 }

func (s saltTension) SurfaceTension(u float64) (sigma, slope float64) {
	d := s.increment * s.perWater / u
	return s.water + d, -d
}
func (s saltTension) SeveralMaxima() bool { return false }

func referenceSalt(name, model string, rhoWater float64) (s pitzerSalt, increment float64) {
	s = pitzerSalt{model: model}
	if name == "sodium_chloride" {
		s.perWater = 2165 / (0.0584428 * rhoWater)
		s.nu, s.z, s.ionic = 2, 1, 1
		s.b0, s.b1, s.cphi = 0.0765, 0.2664, 0.00127
		return s, 1.64e-3
	}
	s.perWater = 1769 / (0.1321395 * rhoWater)
	s.nu, s.z, s.ionic = 3, 2, 3
	// tabulated as (4/3)β and (2^5/2/3)C, the very factors of φ
	s.b0, s.b1, s.cphi = 0.0545, 0.878, -0.00219
	return s, 2.17e-3
}

func TestSaltsAgainstComputed(t *testing.T) {
	for _, c := range computed.Read[computedCase](t, "koehler_solutes.json") {
		if c.Input["molality"] != nil {
			continue // osmotic tables: package solutes
		}
		T := c.in("T")
		salt, increment := referenceSalt(c.Input["solute"].(string), c.Input["model"].(string), atmosDensity(T))
		p := Particle{DryDiameter: c.in("Dd"), Temperature: T, Solution: salt}
		if c.Input["sigma_increment"].(bool) {
			p.Tension = saltTension{atmosTension(T), salt.perWater, increment}
		}
		got, err := p.Crest()
		if err != nil {
			t.Errorf("%s: %v", c.ID, err)
			continue
		}
		const tol = 1e-10 // R of the reference has ten digits: 1.8e-11, 1.5 times in s
		checkClose(t, c.ID+" sc", got.Supersaturation, c.Output["sc"], tol)
		checkClose(t, c.ID+" Dc", got.WetDiameter, c.Output["Dc"], tol)
		checkClose(t, c.ID+" aw", got.WaterActivity, c.Output["aw_c"], tol)
		checkClose(t, c.ID+" sigma", got.SurfaceTension, c.Output["sigma_c"], tol)

		dry, err := p.ActivatedDryDiameter(got.Supersaturation)
		if err != nil {
			t.Errorf("%s inverse: %v", c.ID, err)
		}
		checkClose(t, c.ID+" inverse", dry, p.DryDiameter, 1e-11)
	}
}

func TestInversesAgainstComputed(t *testing.T) {
	const R, Mw = 8.314462618, 0.01801528 // the reference's
	for _, c := range computed.Read[computedCase](t, "inverse.json") {
		T := c.in("T")
		A := 4 * c.in("sigma_factor") * atmosTension(T) * Mw / (R * T * atmosDensity(T))
		switch c.Family {
		case "kappa_from_Dd_sc":
			got, err := KappaOf(c.in("Dd"), A, c.in("sc"))
			if err != nil {
				t.Errorf("%s: %v", c.ID, err)
			}
			checkClose(t, c.ID+" kappa", got, c.Output["kappa"], 1e-10)
			checkClose(t, c.ID+" classic", KappaOfClassic(c.in("Dd"), A, c.in("sc")), c.Output["kappa_classic"], 1e-12)
		case "Dd_from_kappa_sc":
			got, err := DryOf(c.in("kappa"), A, c.in("sc"))
			if err != nil {
				t.Errorf("%s: %v", c.ID, err)
			}
			checkClose(t, c.ID+" Dd", got, c.Output["Dd"], 1e-12)
			if want := c.Output["Dd_classic"]; want > 0 {
				checkClose(t, c.ID+" classic", DryOfClassic(c.in("kappa"), A, c.in("sc")), want, 1e-12)
			}
		case "gf_from_kappa_RH":
			if c.in("sigma_factor") != 1 {
				continue // Particle takes a Tension for that; the solver is the same
			}
			p := Particle{DryDiameter: c.in("Dd"), Temperature: T, Solution: solutes.Kappa(c.in("kappa"))}
			got, _, err := p.Haze(c.in("RH"))
			if err != nil {
				t.Errorf("%s: %v", c.ID, err)
			}
			checkClose(t, c.ID+" D", got.WetDiameter, c.Output["D"], 1e-10)
		}
	}
}
