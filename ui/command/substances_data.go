package command

import (
	"math"
	"strings"

	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/form"
)

// quantity is one value of a substance with its name and unit.
type quantity struct {
	key, says, unit string
	datum           solutes.Datum
}

// quantities are the values of a substance, those of its models included.
func quantities(s solutes.Substance) []quantity {
	out := []quantity{
		{"molar_mass_kg_per_mol", "molar mass", "kg/mol", s.MolarMass},
		{"density_kg_per_m3", "density", "kg/m³", s.Density},
		{"ions", "number of ions", "", s.Ions},
		{"hydration", "crystal water", "mol a formula unit", s.Hydration},
		{"kappa", "κ at activation", "", s.Kappa},
		{"kappa_growth", "κ from growth factors", "", s.KappaGrowth},
		{"solubility_kg_per_kg", "solubility", "kg per kg of water", s.Solubility},
		{"volume_solubility", "solubility by volume", "m³ per m³ of water", s.VolumeSolubility},
		{"deliquescence_humidity_percent", "deliquescence humidity", "%", hundredfold(s.Deliquescence)},
		{"efflorescence_humidity_percent", "efflorescence humidity", "%", hundredfold(s.Efflorescence)},
		{"tension_increment_n_kg_per_m_mol", "surface tension increment", "N/m per mol/kg", s.TensionIncrement},
		{"shape_factor", "dynamic shape factor", "", s.ShapeFactor},
	}
	a, f := s.Adsorption, s.SurfaceActivity
	if a == nil {
		a = &solutes.Adsorption{}
	}
	if f == nil {
		f = &solutes.SurfaceActivity{}
	}
	out = append(out,
		quantity{"adsorption_a", "adsorption, A", "", a.A},
		quantity{"adsorption_b", "adsorption, B", "", a.B},
		quantity{"surface_excess_mol_per_m2", "film, greatest excess", "mol/m²", f.GammaMax},
		quantity{"surface_affinity_m3_per_mol", "film, adsorption constant", "m³/mol", f.K},
		quantity{"surface_tension_floor_n_per_m", "film, lowest tension", "N/m", f.Floor})
	return append(out, ionQuantities(s.Ion)...)
}

func ionQuantities(i *solutes.Ion) []quantity {
	if i == nil {
		i = &solutes.Ion{}
	}
	of := func(x float64) solutes.Datum { return solutes.Datum{Value: x, Source: i.Source, Evidence: i.Evidence} }
	return []quantity{
		{"ion_beta0_kg_per_mol", "ion interaction, β0", "kg/mol", of(i.Beta0)},
		{"ion_beta1_kg_per_mol", "ion interaction, β1", "kg/mol", of(i.Beta1)},
		{"ion_c_phi_kg2_per_mol2", "ion interaction, Cφ", "kg²/mol²", of(i.CPhi)},
		{"ion_max_molality_mol_per_kg", "ion interaction, end", "mol/kg", of(i.MaxMolality)},
	}
}

// hundredfold turns a fraction into per cent.
func hundredfold(d solutes.Datum) solutes.Datum {
	d.Value, d.Low, d.High = 100*d.Value, 100*d.Low, 100*d.High
	return d
}

// ofUser reports whether a substance comes from a file of the user.
func ofUser(s solutes.Substance) bool {
	_, embedded := solutes.Standard().Find(s.Key)
	return !embedded
}

// origin is the word for where a substance comes from.
func origin(s solutes.Substance) string {
	if ofUser(s) {
		return "user"
	}
	return "catalogue"
}

// substancesTable is the catalogue with one line a value. The last lines of a
// substance are texts: its model and what is not known.
func substancesTable(list []solutes.Substance) answer.Table {
	t := answer.Table{Key: "substances"}
	for _, key := range []string{"substance", "name", "formula", "quantity", "value", "low", "high", "source", "seen", "origin"} {
		t.Columns = append(t.Columns, answer.Column{Key: key})
	}
	for _, s := range list {
		row := func(key string, values ...any) {
			t.Rows = append(t.Rows, append(append([]any{s.Key, s.Name, s.Formula, key}, values...), origin(s)))
		}
		for _, q := range quantities(s) {
			if d := q.datum; d.Known() {
				row(q.key, d.Value, bound(d.Low), bound(d.High), d.Source, string(d.Evidence))
			} else {
				row(q.key, nil, nil, nil, nil, nil)
			}
		}
		m := answer.ModelOf(s)
		row("water_activity_model", m.Says, nil, nil, nil, nil)
		row("water_activity_model_end", end(m), nil, nil, nil, nil)
		row("not_known", strings.Join(s.Gaps(), "; "), nil, nil, nil, nil)
	}
	return t
}

// end is the water activity at which a model ends, nil if it does not.
func end(m answer.Model) any {
	if math.IsNaN(m.LeastActivity) {
		return nil
	}
	return m.LeastActivity
}

func bound(x float64) any {
	if x == 0 {
		return nil
	}
	return x
}

// substancesObject is the catalogue as a list, or one substance alone.
func substancesObject(list []solutes.Substance, one bool) any {
	out := make([]form.Object, 0, len(list))
	for _, s := range list {
		m := answer.ModelOf(s)
		o := form.Object{at("key", s.Key), at("name", s.Name), at("formula", s.Formula), at("aliases", listed(s.Aliases)), at("origin", origin(s)),
			at("water_activity_model", m.Says), at("water_activity_model_end", answer.Number(m.LeastActivity))}
		for _, q := range quantities(s) {
			o = append(o, at(q.key, datumObject(q.datum)))
		}
		// Whole models have the keys of a file of substances, in SI units.
		o = append(o, at("ion", s.Ion), at("concentrated", s.Concentrated), at("deliquescence_law", s.DeliquescenceLaw),
			at("not_known", listed(s.Gaps())), at("remarks", listed(s.Remarks)))
		out = append(out, o)
	}
	if one {
		return out[0]
	}
	return out
}

// listed is a list that is written as [] when it is empty.
func listed(list []string) []string { return append([]string{}, list...) }

// at is one key of a JSON object.
func at(key string, value any) form.Member { return form.Member{Key: key, Value: value} }

func datumObject(d solutes.Datum) any {
	if !d.Known() {
		return nil
	}
	return form.Object{at("value", answer.Number(d.Value)), at("low", bound(d.Low)), at("high", bound(d.High)),
		at("source", d.Source), at("seen", string(d.Evidence))}
}
