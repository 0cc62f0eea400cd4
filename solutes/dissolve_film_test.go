package solutes

import (
	"errors"
	"math"
	"testing"
)

// soap is an invented surface-active organic.
func soap(gammaMax float64) Substance {
	given := func(x float64) Datum { return Datum{Value: x, Source: "invented", Evidence: User} }
	return Substance{Key: "soap", Name: "soap", MolarMass: given(0.3), Density: given(1100),
		SurfaceActivity: &SurfaceActivity{GammaMax: given(gammaMax), K: given(20), Floor: given(0.03)}}
}

func filmRecipe(t testing.TB, model Model, organic Substance, share float64, parts ...any) Recipe {
	r := recipe(t, model, parts...)
	r.Parts = append(r.Parts, Part{organic, share})
	r.TensionRule = Szyszkowski
	return r
}

func TestFilm(t *testing.T) {
	d, notes, err := Dissolve(filmRecipe(t, KappaModel, soap(3e-6), .5, "AS", .3, "soot", .2))
	if err != nil || len(notes) != 0 {
		t.Fatal(err, notes)
	}
	f := *d.Film
	if f.Rest != nil || f.GammaMax != 3e-6 || f.K != 20 || f.Floor != 0.03 {
		t.Errorf("%+v", f)
	}
	near(t, "share", f.Share, .5, 1e-15)
	near(t, "density", f.Density, 1100, 1e-14)
	near(t, "molar mass", f.MolarMass, 0.3, 1e-14)
	near(t, "rest", f.RestShare, .5, 1e-15)
	near(t, "κ of the rest", f.RestKappa, .3*0.61/.5, 1e-14)
	organic := 1100 * waterMolarMass / (0.3 * d.WaterDensity)
	near(t, "κ of the whole", float64(d.Solution.(Kappa)), .3*0.61+.5*organic, 1e-14)
	if _, constant := d.Tension.(ConstantTension); !constant {
		t.Errorf("tension %T, want that of water", d.Tension)
	}
}

// By ion interaction the rest is the salt by itself.
func TestFilmOnSalt(t *testing.T) {
	d, _, err := Dissolve(filmRecipe(t, IonInteraction, soap(3e-6), .6, "NaCl", .4))
	if err != nil {
		t.Fatal(err)
	}
	salt, _, err := Dissolve(recipe(t, IonInteraction, "NaCl", 1.))
	if err != nil {
		t.Fatal(err)
	}
	for _, u := range []float64{1, 30, 1e4} {
		want, _ := salt.Solution.LnActivity(u)
		got, _ := d.Film.Rest.LnActivity(u)
		near(t, "ln a_w of the rest", got, want, 1e-13)
	}
}

// Moles and mass of two organics of the same constants are kept.
func TestFilmOfTwoOrganics(t *testing.T) {
	r := recipe(t, KappaModel, "succinic acid", .2, "SOA", .3, "NaCl", .5)
	r.TensionRule = Szyszkowski
	surface := *soap(2e-6).SurfaceActivity
	surface.Floor = Datum{}
	r.Surface = &surface
	d, notes, err := Dissolve(r)
	if err != nil || codes(notes) != "no-tension-floor" {
		t.Fatal(codes(notes), err)
	}
	mass := .2*1572 + .3*1300
	moles := .2*1572/0.11809 + .3*1300/0.2
	near(t, "share", d.Film.Share, .5, 1e-15)
	near(t, "mass", d.Film.Share*d.Film.Density, mass, 1e-14)
	near(t, "moles", d.Film.Share*d.Film.Density/d.Film.MolarMass, moles, 1e-14)
	near(t, "κ of the rest", d.Film.RestKappa, 1.28, 1e-14)
}

// Films and adsorption take volumes as additive, and say so.
func TestFilmsAreAdditive(t *testing.T) {
	film := filmRecipe(t, KappaModel, soap(3e-6), .5, "AS", .5)
	core := coreRecipe(t, KnownAdsorption, KappaModel, "dust", .5, "AS", .5)
	for _, r := range []Recipe{film, core} {
		r.DensityRule = Measured
		d, notes, err := Dissolve(r)
		if err != nil || d.Swelling != nil || codes(notes) != "density-additive" {
			t.Errorf("%v, %q, %v", d.Swelling, codes(notes), err)
		}
	}
}

func TestFilmRefuses(t *testing.T) {
	one := filmRecipe(t, KappaModel, soap(3e-6), .5, "AS", .5)
	for name, change := range map[string]func(*Recipe){
		"limited solubility": func(r *Recipe) { r.Solubility = LimitedSolubility },
		"one κ for all":      func(r *Recipe) { r.Kappa = 0.3 },
		"two films": func(r *Recipe) {
			r.Parts = []Part{{soap(3e-6), .5}, {soap(2e-6), .5}}
		},
		"nothing known": func(r *Recipe) { r.Parts = r.Parts[:1]; r.Parts[0].Volume = 1 },
		"not clear which": func(r *Recipe) {
			r.Surface = soap(3e-6).SurfaceActivity
			r.Parts = []Part{givenPart(.1, -1, .5), givenPart(.2, -1, .5)}
		},
	} {
		r := one
		r.Parts = append([]Part(nil), one.Parts...)
		change(&r)
		var refused *RefusedError
		if _, _, err := Dissolve(r); !errors.As(err, &refused) {
			t.Errorf("%s: %v, want a refusal", name, err)
		}
	}
	gap := one
	gap.Parts = []Part{{find(t, "pinic acid"), 1}}
	gap.Surface = soap(3e-6).SurfaceActivity
	var missing *MissingError
	if _, _, err := Dissolve(gap); !errors.As(err, &missing) || missing.Quantity != "density" {
		t.Errorf("no density: %v", err)
	}
}

func coreRecipe(t testing.TB, rule AdsorptionRule, model Model, parts ...any) Recipe {
	r := recipe(t, model, parts...)
	r.Adsorption, r.AdsorptionA, r.AdsorptionB = rule, 1, 2
	return r
}

func TestCore(t *testing.T) {
	for _, c := range []struct {
		name   string
		recipe Recipe
		want   Core // without its source
		notes  string
	}{
		{"dust", coreRecipe(t, KnownAdsorption, KappaModel, "dust", 1.), Core{A: 2.25, B: 1.2}, ""},
		{"coated dust", coreRecipe(t, KnownAdsorption, KappaModel, "dust", .9, "AS", .1), Core{A: 2.25, B: 1.2, SolubleShare: .1, Kappa: .61}, ""},
		{"two coats", coreRecipe(t, KnownAdsorption, KappaModel, "quartz", .8, "AS", .1, "SOA", .1),
			Core{A: 2.95, B: 1.36, SolubleShare: .2, Kappa: .355}, ""},
		{"ions", coreRecipe(t, KnownAdsorption, IonInteraction, "dust", .9, "AS", .1), Core{A: 2.25, B: 1.2, SolubleShare: .1, Kappa: .61}, "adsorption-kappa"},
		{"chalk has no κ of its own here", coreRecipe(t, KnownAdsorption, KappaModel, "calcite", .9, "AS", .1),
			Core{A: 3, B: 1.3, SolubleShare: .1, Kappa: .61}, ""},
		{"as given", coreRecipe(t, GivenAdsorption, KappaModel, "soot", .5, "dust", .5), Core{A: 1, B: 2}, ""},
	} {
		d, notes, err := Dissolve(c.recipe)
		if err != nil || d.Core == nil || codes(notes) != c.notes {
			t.Errorf("%s: %+v, notes %q, %v", c.name, d.Core, codes(notes), err)
			continue
		}
		got := *d.Core
		if got.A != c.want.A || got.B != c.want.B || math.Abs(got.SolubleShare-c.want.SolubleShare) > 1e-12 || math.Abs(got.Kappa-c.want.Kappa) > 1e-12 {
			t.Errorf("%s: %+v, want %+v", c.name, got, c.want)
		}
	}
	v := coreRecipe(t, KnownAdsorption, VantHoff, "dust", .8, "NaCl", .2)
	d, _, err := Dissolve(v)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "κ by van 't Hoff", d.Core.Kappa, find(t, "NaCl").IdealKappa(d.WaterDensity), 1e-12)
}

func TestCoreRefuses(t *testing.T) {
	for name, r := range map[string]Recipe{
		"soot":          coreRecipe(t, KnownAdsorption, KappaModel, "soot", 1.),
		"two minerals":  coreRecipe(t, KnownAdsorption, KappaModel, "quartz", .5, "illite", .5),
		"nothing solid": coreRecipe(t, KnownAdsorption, KappaModel, "AS", 1.),
		"limited": func() Recipe {
			r := coreRecipe(t, KnownAdsorption, KappaModel, "dust", 1.)
			r.Solubility = LimitedSolubility
			return r
		}(),
		"film": func() Recipe {
			r := filmRecipe(t, KappaModel, soap(3e-6), .5, "dust", .5)
			r.Adsorption = KnownAdsorption
			return r
		}(),
		"κ without coat": func() Recipe { r := coreRecipe(t, KnownAdsorption, KappaModel, "dust", 1.); r.Kappa = 0.1; return r }(),
	} {
		var refused *RefusedError
		if _, _, err := Dissolve(r); !errors.As(err, &refused) {
			t.Errorf("%s: %v, want a refusal", name, err)
		}
	}
	if _, _, err := Dissolve(coreRecipe(t, 9, KappaModel, "dust", 1.)); err == nil {
		t.Error("a rule that does not exist is accepted")
	}
}
