package solutes

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"dropcrest/atmos"
)

func recipe(t testing.TB, model Model, parts ...any) Recipe {
	t.Helper()
	r := Recipe{Model: model, Kappa: math.NaN(), VantHoffFactor: math.NaN(), Temperature: room}
	for i := 0; i < len(parts); i += 2 {
		r.Parts = append(r.Parts, Part{find(t, parts[i].(string)), parts[i+1].(float64)})
	}
	return r
}

func codes(notes []atmos.Note) string {
	var list []string
	for _, n := range notes {
		list = append(list, n.Code)
	}
	return strings.Join(list, " ")
}

func TestDissolve(t *testing.T) {
	for _, c := range []struct {
		name   string
		recipe Recipe
		kind   string // of the solution
		notes  string
	}{
		{"κ of a salt", recipe(t, KappaModel, "(NH4)2SO4", 1.), "solutes.Kappa", ""},
		{"κ mixed", recipe(t, KappaModel, "(NH4)2SO4", .5, "SOA", .5), "solutes.Kappa", ""},
		{"soot", recipe(t, KappaModel, "soot", 1.), "solutes.Kappa", ""},
		{"soot by ions", recipe(t, IonInteraction, "soot", 1.), "solutes.Kappa", ""},
		{"dust", recipe(t, KappaModel, "quartz", 1.), "solutes.Kappa", "adsorption-left-out"},
		{"no κ known", recipe(t, KappaModel, "SRFA", 1.), "solutes.Kappa", "kappa-ideal"},
		{"van 't Hoff", recipe(t, VantHoff, "NaCl", .4, "soot", .6), "solutes.Kappa", ""},
		{"salt", recipe(t, IonInteraction, "NaCl", 1.), "*solutes.Salt", ""},
		{"coated soot", recipe(t, IonInteraction, "NaCl", .4, "soot", .6), "*solutes.Salt", ""},
		{"salt and organics", recipe(t, IonInteraction, "NaCl", .4, "SOA", .6), "*solutes.Mixture", "no-ion-interaction"},
		{"two charge types", recipe(t, IonInteraction, "NaCl", .4, "Na2SO4", .6), "*solutes.Mixture", "zsr-mixed-charge"},
		{"one salt twice", recipe(t, IonInteraction, "NaCl", .4, "NaCl", .6), "*solutes.Salt", ""},
		{"organics by ions", recipe(t, IonInteraction, "SOA", 1.), "solutes.Kappa", "no-ion-interaction"},
		{"sugar", recipe(t, IonInteraction, "sucrose", 1.), "*solutes.OsmoticSolution", "own-model"},
		{"sea salt on soot", recipe(t, IonInteraction, "sea salt", .4, "soot", .6), "*solutes.OsmoticSolution", "own-model sea-salt-dry-state"},
		{"acid", recipe(t, IonInteraction, "H2SO4", 1.), "*solutes.OsmoticSolution", "own-model strong-acid-temperature"},
		{"acid and its salt", recipe(t, IonInteraction, "H2SO4", .5, "AS", .5), "*solutes.Mixture", "own-model strong-acid-temperature zsr-bisulfate"},
		{"letovicite and bisulfate", recipe(t, IonInteraction, "letovicite", .5, "NH4HSO4", .5), "*solutes.Mixture",
			"own-model bisulfate-parameters-borrowed own-model zsr-bisulfate zsr-bisulfate"},
	} {
		d, notes, err := Dissolve(c.recipe)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if kind := fmt.Sprintf("%T", d.Solution); kind != c.kind || codes(notes) != c.notes {
			t.Errorf("%s: %s with notes %q, want %s with %q", c.name, kind, codes(notes), c.kind, c.notes)
		}
		if len(d.Models) == 0 || d.Tension == nil {
			t.Errorf("%s: models %q, tension %v", c.name, d.Models, d.Tension)
		}
		for _, n := range notes {
			if n.Text == "" || n.Input == "" || strings.Contains(n.Text, "\n") || strings.Contains(n.Text, "%!") {
				t.Errorf("%s: note %+v", c.name, n)
			}
		}
	}
}

func TestDissolveEverySubstanceByEveryModel(t *testing.T) {
	for _, s := range Standard().All() {
		for _, model := range []Model{KappaModel, VantHoff, IonInteraction} {
			r := Recipe{Parts: []Part{{s, 1}}, Model: model, Kappa: math.NaN(), VantHoffFactor: math.NaN(),
				DensityRule: Measured, TensionRule: SolutionRule, Temperature: 278.15}
			d, _, err := Dissolve(r)
			var gap *MissingError
			if err != nil {
				if !errors.As(err, &gap) || gap.Substance != s.Name {
					t.Errorf("%s, %v: %v", s.Key, model, err)
				}
				continue
			}
			if l, slope := d.Solution.LnActivity(10); math.IsNaN(l) || l > 0 || slope < 0 {
				t.Errorf("%s, %v: ln a_w %g, slope %g", s.Key, model, l, slope)
			}
		}
	}
}

func TestMissingDensityNamesSubstanceAndRemedy(t *testing.T) {
	_, _, err := Dissolve(recipe(t, IonInteraction, "ammonium methanesulfonate", 1.))
	want := "no density is known for ammonium methanesulfonate: give density= a value"
	if err == nil || err.Error() != want {
		t.Errorf("got %v, want %s", err, want)
	}
}

func TestDissolveRefuses(t *testing.T) {
	for name, spoil := range map[string]func(*Recipe){
		"no parts":          func(r *Recipe) { r.Parts = nil },
		"shares":            func(r *Recipe) { r.Parts[0].Volume = 0.5 },
		"share NaN":         func(r *Recipe) { r.Parts[0].Volume = math.NaN() },
		"negative κ":        func(r *Recipe) { r.Model, r.Kappa = KappaModel, -1 },
		"negative factor":   func(r *Recipe) { r.Model, r.VantHoffFactor = VantHoff, -1 },
		"temperature":       func(r *Recipe) { r.Temperature = 0 },
		"fixed tension 0":   func(r *Recipe) { r.TensionRule = FixedTension },
		"no such model":     func(r *Recipe) { r.Model = 99 },
		"no such tension":   func(r *Recipe) { r.TensionRule = 99 },
		"no such densities": func(r *Recipe) { r.DensityRule = 99 },
	} {
		r := recipe(t, IonInteraction, "NaCl", 1.)
		spoil(&r)
		if _, _, err := Dissolve(r); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}

func TestGivenKappaNeedsNoPart(t *testing.T) {
	d, notes, err := Dissolve(Recipe{Model: KappaModel, Kappa: 0.3, Temperature: room})
	if err != nil || d.Solution != Kappa(0.3) || d.Kappa != 0.3 || len(notes) != 0 || !math.IsNaN(d.MolesPerVolume) {
		t.Errorf("%+v, %v, %v", d, notes, err)
	}
}

func TestTemperatureNotes(t *testing.T) {
	for _, c := range []struct {
		name  string
		parts []any
		T     float64
		want  string
	}{
		{"NaCl has terms of its own", []any{"NaCl", 1.}, 283.15, "concentrated-25c"},
		{"KCl", []any{"KCl", 1.}, 283.15, "ion-parameters-25c"},
		{"NaCl supercooled", []any{"NaCl", 1.}, 263.15, "ion-parameters-held concentrated-25c debye-hueckel-extrapolated"},
		{"citric acid", []any{"citric acid", 1.}, 283.15, "own-model nonelectrolyte-25c acid-undissociated"},
		{"cold acid", []any{"H2SO4", 1.}, 250, "own-model bisulfate-25c debye-hueckel-extrapolated"},
		{"bisulfate", []any{"NH4HSO4", 1.}, 283.15, "own-model bisulfate-25c bisulfate-parameters-borrowed"},
		{"KCl supercooled", []any{"KCl", 1.}, 263.15, "ion-parameters-25c debye-hueckel-extrapolated"},
	} {
		r := recipe(t, IonInteraction, c.parts...)
		r.Temperature = c.T
		if _, notes, err := Dissolve(r); err != nil || codes(notes) != c.want {
			t.Errorf("%s: %q, %v; want %q", c.name, codes(notes), err, c.want)
		}
	}
}

// κ of van 't Hoff's form with i = 2: ν ρ_s M_w/(M ρ_w) = 1.339 for NaCl.
func TestVantHoffIsAKappa(t *testing.T) {
	d, _, err := Dissolve(recipe(t, VantHoff, "NaCl", 1.))
	if err != nil {
		t.Fatal(err)
	}
	near(t, "κ", float64(d.Solution.(Kappa)), 1.339, 5e-4)
	near(t, "κ of the recipe", d.Kappa, 1.339, 5e-4)
	m := d.Molality(10)
	l, _ := d.Solution.LnActivity(10)
	near(t, "a_w", math.Exp(l), 1/(1+2*m*waterMolarMass), 1e-14)
}

func TestSolutionTension(t *testing.T) {
	r := recipe(t, IonInteraction, "NaCl", .5, "SOA", .5)
	r.TensionRule = SolutionRule
	d, notes, err := Dissolve(r)
	if err != nil {
		t.Fatal(err)
	}
	if codes(notes) != "no-ion-interaction tension-not-known" {
		t.Errorf("notes %q", codes(notes))
	}
	sigma, slope := d.Tension.SurfaceTension(5)
	rise := 1.64e-3 * 0.5 * 2165 / (0.058443 * d.WaterDensity) / 5
	near(t, "σ", sigma, atmos.SurfaceTension(room)+rise, 1e-12)
	near(t, "slope", slope, -rise, 1e-12)
}

func TestMeasuredDensity(t *testing.T) {
	for _, parts := range [][]any{
		{"NaCl", 1.}, {"(NH4)2SO4", .5, "NaNO3", .5}, {"Na2SO4", .3, "soot", .7}, {"NaCl", .5, "KCl", .5}, {"NH4NO3", 1.},
	} {
		r := recipe(t, IonInteraction, parts...)
		r.DensityRule = Measured
		d, _, err := Dissolve(r)
		if err != nil {
			t.Fatal(err)
		}
		for i := range 91 {
			u := math.Pow(10, -2+float64(i)/15)
			v, slope := d.Swelling.Swell(u)
			const h = 1e-5
			up, _ := d.Swelling.Swell(u * math.Exp(h))
			down, _ := d.Swelling.Swell(u * math.Exp(-h))
			near(t, fmt.Sprint(parts, " slope at u ", u), slope, (up-down)/(2*h), 1e-6)
			inRange := u >= d.Swelling.(*MeasuredDensity).LeastWater()
			if !(v > 0) || inRange && math.Abs(v/(1+u)-1) > 0.1 {
				t.Errorf("%v at u %g: v %g, additive %g", parts, u, v, 1+u)
			}
		}
	}
}

func TestMeasuredDensityWithoutAPolynomial(t *testing.T) {
	r := recipe(t, IonInteraction, "KCl", 1.)
	r.DensityRule = Measured
	d, notes, err := Dissolve(r)
	if err != nil || d.Swelling != nil || codes(notes) != "density-additive" {
		t.Errorf("%v, %q, %v", d.Swelling, codes(notes), err)
	}
}

// NaNO3 and Na2SO4 end at 98 and 40 % by mass, both in activity and density; KCl
// has no density polynomial, NaCl ends at 48 %.
func TestRangeNotes(t *testing.T) {
	for _, c := range []struct {
		name    string
		percent float64 // of the solution's mass
		want    string
	}{
		{"Na2SO4", 39.9, ""},
		{"Na2SO4", 40.1, "activity-outside-range density-outside-range"},
		{"NaCl", 47.9, ""},
		{"NaCl", 48.1, "activity-outside-range density-outside-range"},
		{"KCl", 26, ""},
		{"KCl", 27, "activity-outside-range"},
		{"sucrose", 90, "activity-outside-range"},
		{"SOA", 99.9, ""},
	} {
		r := recipe(t, IonInteraction, c.name, 1.)
		r.DensityRule = Measured
		d, _, err := Dissolve(r)
		if err != nil {
			t.Fatal(err)
		}
		u := d.DryDensity * (100 - c.percent) / (c.percent * d.WaterDensity)
		if got := codes(d.RangeNotes(u)); got != c.want {
			t.Errorf("%s at %g %%: %q, want %q", c.name, c.percent, got, c.want)
		}
	}
}
