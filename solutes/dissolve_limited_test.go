package solutes

import (
	"errors"
	"fmt"
	"math"
	"testing"
)

func limitedRecipe(t testing.TB, parts ...any) Recipe {
	r := recipe(t, KappaModel, parts...)
	r.Solubility = LimitedSolubility
	return r
}

// givenPart is a component without a catalogue name, as a user gives it.
func givenPart(kappa, solubility, share float64) Part {
	s := Substance{Name: "component", Kappa: Datum{Value: kappa, Evidence: User}}
	if solubility >= 0 {
		s.VolumeSolubility = Datum{Value: solubility, Evidence: User}
	}
	return Part{s, share}
}

func TestLimitedRecipes(t *testing.T) {
	salt := find(t, "NaCl")
	salt.VolumeSolubility = Datum{Value: 0.1658, Evidence: User}
	chalk := find(t, "calcite")
	chalk.VolumeSolubility = Datum{Value: 1e-5, Evidence: User}
	for _, c := range []struct {
		name   string
		recipe Recipe
		parts  []LimitedPart // nil: the plain κ
		notes  string
	}{
		{"adipic acid", limitedRecipe(t, "adipic acid", 1.), []LimitedPart{{1, 0.096, 0.0183}}, ""},
		{"twice", limitedRecipe(t, "adipic acid", .5, "adipic acid", .5), []LimitedPart{{1, 0.096, 0.0183}}, ""},
		{"acid and salt", limitedRecipe(t, "succinic acid", .6, "AS", .4),
			[]LimitedPart{{.6, 0.231, 0.0526}, {.4, 0.61, math.Inf(1)}}, ""},
		{"acid, SOA and salt", limitedRecipe(t, "succinic acid", .6, "AS", .2, "SOA", .2),
			[]LimitedPart{{.6, 0.231, 0.0526}, {.4, (0.2*0.61 + 0.2*0.1) / 0.4, math.Inf(1)}}, ""},
		{"acid on soot", limitedRecipe(t, "gypsum", .3, "soot", .7), []LimitedPart{{.3, 0.02, 0.0011}}, ""},
		{"acid on chalk", limitedRecipe(t, "oxalic acid", .3, "calcite", .7), []LimitedPart{{.3, 0.67, 0.0619}}, "insoluble-kappa-left-out"},
		{"chalk as given", Recipe{Parts: []Part{{chalk, 1}}, Kappa: math.NaN(), Solubility: LimitedSolubility, Temperature: room},
			[]LimitedPart{{1, 0.002, 1e-5}}, ""},
		{"salt", limitedRecipe(t, "NaCl", 1.), nil, "no-solubility-limit"},
		{"salt as given", Recipe{Parts: []Part{{salt, 1}}, Kappa: math.NaN(), Solubility: LimitedSolubility, Temperature: room},
			[]LimitedPart{{1, 1.28, 0.1658}}, "solubility-of-salt"},
		{"components as given", Recipe{Parts: []Part{givenPart(.1, .0183, .4), givenPart(.6, -1, .5), givenPart(0, 0, .1)},
			Kappa: math.NaN(), Solubility: LimitedSolubility, Temperature: room},
			[]LimitedPart{{.4, .1, .0183}, {.5, .6, math.Inf(1)}, {.1, 0, 0}}, ""},
		{"one κ given", Recipe{Parts: []Part{{find(t, "adipic acid"), 1}}, Kappa: 0.2, Solubility: LimitedSolubility, Temperature: room},
			[]LimitedPart{{1, 0.2, 0.0183}}, ""},
		{"one κ for two", Recipe{Parts: []Part{{find(t, "adipic acid"), .5}, {find(t, "AS"), .5}}, Kappa: 0.2,
			Solubility: LimitedSolubility, Temperature: room}, nil, "solubility-unused"},
	} {
		d, notes, err := Dissolve(c.recipe)
		if err != nil || codes(notes) != c.notes {
			t.Errorf("%s: notes %q, want %q, error %v", c.name, codes(notes), c.notes, err)
			continue
		}
		got, limited := d.Solution.(*Limited)
		if c.parts == nil || !limited {
			if limited || c.parts != nil {
				t.Errorf("%s: solution %T", c.name, d.Solution)
			}
			continue
		}
		want, err := NewLimited(c.parts)
		if err != nil {
			t.Fatal(err)
		}
		for u := 1e-4; u < 1e4; u *= 1.3 {
			a, _ := got.LnActivity(u)
			b, _ := want.LnActivity(u)
			near(t, fmt.Sprint(c.name, " at u ", u), a, b, 1e-13)
		}
		all, _ := want.Segment(want.Points())
		near(t, c.name+": κ of all", d.Kappa, all, 1e-13)
	}
}

// Adipic acid of 100 nm, started dry, 25 °C, 72 mN/m: the barrier is at the dry
// size, exp(A/Dd)/(1+κC) - 1 = 1.942 % with a Kelvin length of 2.099 nm (computed
// with a general-purpose library).
func TestAdipicAcidStartedDry(t *testing.T) {
	d, _, err := Dissolve(limitedRecipe(t, "adipic acid", 1.))
	if err != nil {
		t.Fatal(err)
	}
	l, _ := d.Solution.LnActivity(1e-9)
	near(t, "supersaturation at the dry size", 100*math.Expm1(2.0991/100+l), 1.942, 5e-4)
}

// Beyond its solubility a part taken as dissolved gets a note; one that follows
// its solubility does not, nor do salts, whose deliquescence rules.
func TestBeyondSolubility(t *testing.T) {
	complete, _, err := Dissolve(recipe(t, KappaModel, "adipic acid", .5, "NaCl", .5))
	if err != nil {
		t.Fatal(err)
	}
	point := 0.5 / 0.0183
	want := Limit{"adipic acid", 0.0183, point, false}
	if len(complete.Limits) != 1 || complete.Limits[0] != want {
		t.Fatalf("limits %+v, want %+v", complete.Limits, want)
	}
	for _, c := range []struct {
		u    float64
		want string
	}{{0.99 * point, "beyond-solubility"}, {1.01 * point, ""}} {
		if got := codes(complete.RangeNotes(c.u)); got != c.want {
			t.Errorf("at u %g: %q, want %q", c.u, got, c.want)
		}
	}
	kept, _, err := Dissolve(limitedRecipe(t, "adipic acid", .5, "NaCl", .5))
	if err != nil || len(kept.RangeNotes(1)) != 0 || !kept.Limits[0].Kept {
		t.Errorf("%v, %+v, %v", kept.RangeNotes(1), kept.Limits, err)
	}
}

func TestLimitedSolubilityIsRefusedWithIons(t *testing.T) {
	r := recipe(t, IonInteraction, "adipic acid", 1.)
	r.Solubility = LimitedSolubility
	_, _, err := Dissolve(r)
	var refused *RefusedError
	if !errors.As(err, &refused) || refused.Input != "solubility" {
		t.Errorf("got %v, want a refusal", err)
	}
	r.Solubility = 9
	if _, _, err := Dissolve(r); err == nil {
		t.Error("a rule that does not exist is accepted")
	}
}

// Too many sparingly soluble parts are an error, however many miscible ones are not.
func TestManyParts(t *testing.T) {
	r := Recipe{Kappa: math.NaN(), Solubility: LimitedSolubility, Temperature: room}
	for range 9 {
		r.Parts = append(r.Parts, givenPart(0.1, 0.01, 1./9))
	}
	var unusable *UnusableError
	if _, _, err := Dissolve(r); !errors.As(err, &unusable) {
		t.Errorf("nine limits: %v", err)
	}
	for i := 1; i < 9; i++ {
		r.Parts[i] = givenPart(0.1+float64(i)/100, -1, 1./9)
	}
	if _, _, err := Dissolve(r); err != nil {
		t.Errorf("one limit of nine parts: %v", err)
	}
}
