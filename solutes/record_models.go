package solutes

import (
	"fmt"
	"math"
)

// readModels reads the tables of a record.
func (s *Substance) readModels(top *recordTable) {
	if t := top.sub("adsorption"); t != nil {
		s.Adsorption = &Adsorption{A: t.datum("a", 0, 100, ""), B: t.datum("b", 0.01, 100, "")}
		t.need("a", s.Adsorption.A)
		t.need("b", s.Adsorption.B)
		t.finish()
	}
	if t := top.sub("surface_activity"); t != nil {
		s.SurfaceActivity = &SurfaceActivity{
			GammaMax: t.datum("gamma_max", 0, 1e-4, "mol/m²"),
			K:        t.datum("k", 0, 1e9, "m³/mol"),
			Floor:    t.datum("floor", 0, 0.0757, "N/m"),
		}
		t.need("gamma_max", s.SurfaceActivity.GammaMax)
		t.need("k", s.SurfaceActivity.K)
		t.finish()
	}
	if t := top.sub("ion"); t != nil {
		s.Ion = t.ion()
	}
	if t := top.sub("concentrated"); t != nil {
		s.Concentrated = &Concentrated{
			Activity: t.numbers("activity", 1, 4), Density: t.numbers("density", 1, 4),
			MaxMassPercent: t.number("max_mass_percent", 0.1, 99.9, "%"),
			JoinLow:        t.optional("join_low", 0, 100, "mol/kg"), JoinHigh: t.optional("join_high", 0, 100, "mol/kg"),
			Source: t.sourceText(), Evidence: User,
		}
		t.finish()
	}
	if t := top.sub("deliquescence_law"); t != nil {
		s.DeliquescenceLaw = t.law()
	}
}

// need fails a value of a table that is not there.
func (t *recordTable) need(key string, d Datum) {
	if !d.Known() && len(t.errs) == 0 {
		t.fail(t.path+key, "nothing", "a number")
	}
}

func (t *recordTable) ion() *Ion {
	ion := &Ion{
		CationCharge: t.whole("cation_charge", 1, 3), AnionCharge: t.whole("anion_charge", 1, 3),
		Cations: t.whole("cations", 1, 4), Anions: t.whole("anions", 1, 4),
		Beta0: t.number("beta0", -10, 100, "kg/mol"), Beta1: t.number("beta1", -100, 1000, "kg/mol"),
		CPhi:        t.number("c_phi", -10, 10, "kg²/mol²"),
		MaxMolality: t.number("max_molality", 1e-3, 100, "mol/kg"),
		Source:      t.sourceText(), Evidence: User,
	}
	if in := t.sub("temperature"); in != nil {
		x := &IonTemperature{Low: in.number("low", 180, 373.15, "K"), High: in.number("high", 180, 373.15, "K"),
			Source: in.sourceText(), Evidence: User}
		copy(x.Beta0[:], in.numbers("beta0", 4, 4))
		copy(x.Beta1[:], in.numbers("beta1", 4, 4))
		copy(x.CPhi[:], in.numbers("c_phi", 4, 4))
		in.ordered("high", x.Low, x.High)
		in.finish()
		ion.Temperature = x
	}
	if in := t.sub("per_kelvin"); in != nil {
		ion.PerKelvin = &IonDerivative{Beta0: in.number("beta0", -1, 1, "kg/(mol K)"), Beta1: in.number("beta1", -10, 10, "kg/(mol K)"),
			CPhi: in.number("c_phi", -1, 1, "kg²/(mol² K)"), Source: in.sourceText(), Evidence: User}
		in.finish()
	}
	if in := t.sub("extended"); in != nil {
		inf := math.Inf(1)
		ion.Extended = &ExtendedFit{
			Beta0: in.number("beta0", -inf, inf, ""), Beta1: in.number("beta1", -inf, inf, ""),
			C0: in.number("c0", -inf, inf, ""), C1: in.number("c1", -inf, inf, ""), D: in.number("d", -inf, inf, ""),
			MaxMolality: in.number("max_molality", 1e-3, 100, "mol/kg"),
			JoinLow:     in.optional("join_low", 0, 100, "mol/kg"), JoinHigh: in.optional("join_high", 0, 100, "mol/kg"),
			Source: in.sourceText(), Evidence: User,
		}
		in.finish()
	}
	t.finish()
	return ion
}

func (t *recordTable) law() *DeliquescenceLaw {
	inf := math.Inf(1)
	law := &DeliquescenceLaw{
		Heat: t.optional("heat", -1e6, 1e6, "J/mol"), Exponent: t.optional("exponent", -inf, inf, "K"),
		Low: t.number("low", 180, 373.15, "K"), High: t.number("high", 180, 373.15, "K"),
		Source: t.sourceText(), Evidence: User,
	}
	solubility := t.numbers("solubility", 3, 3)
	copy(law.Solubility[:], solubility)
	t.ordered("high", law.Low, law.High)
	if (law.Heat != 0) != (solubility != nil) {
		t.fail(t.path+"solubility", shown(solubility), "a list of 3 numbers together with heat, and only then")
	}
	if law.Heat != 0 && law.Exponent != 0 {
		t.fail(t.path+"exponent", fmt.Sprint(law.Exponent), "left out where heat is given")
	}
	t.finish()
	return law
}

// ordered fails a range whose end is not above its start.
func (t *recordTable) ordered(key string, low, high float64) {
	if len(t.errs) == 0 && !(high > low) {
		t.wrong(key, high, fmt.Sprintf("above %g", low))
	}
}
