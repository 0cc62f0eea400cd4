package solutes

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// A recipe of one substance gets the very model of OwnModel, and says so.
func TestDissolveUsesOwnModels(t *testing.T) {
	for _, key := range ownKeys {
		r := recipe(t, IonInteraction, key, 1.)
		d, notes, err := Dissolve(r)
		if err != nil {
			t.Fatal(err)
		}
		own := ownModel(t, key, room)
		for _, u := range []float64{0.7, 8, 300, 1e6} {
			got, gotSlope := d.Solution.LnActivity(u)
			want, slope := own.LnActivity(u)
			if got != want || gotSlope != slope {
				t.Errorf("%s: ln a_w(%g) = %g with slope %g, want %g with %g", key, u, got, gotSlope, want, slope)
			}
		}
		_, says, _, _, _ := OwnModel(r.Parts[0].Substance, room)
		if len(d.Models) != 1 || !strings.Contains(d.Models[0], says) {
			t.Errorf("%s: models %q, want %q in it", key, d.Models, says)
		}
		if notes[0].Code != "own-model" || !strings.Contains(notes[0].Text, says) {
			t.Errorf("%s: first note %+v", key, notes[0])
		}
	}
}

// A share on an insoluble core is the solute alone with u counted otherwise.
func TestShareOfASolute(t *testing.T) {
	for _, name := range []string{"NaCl", "H2SO4"} {
		whole, _, err := Dissolve(recipe(t, IonInteraction, name, 1.))
		if err != nil {
			t.Fatal(err)
		}
		coat, _, err := Dissolve(recipe(t, IonInteraction, name, .3, "soot", .7))
		if err != nil {
			t.Fatal(err)
		}
		want, _ := whole.Solution.LnActivity(10)
		got, _ := coat.Solution.LnActivity(3)
		near(t, name, got, want, 1e-14)
		near(t, name+" range", coat.Solution.LeastWater(), 0.3*whole.Solution.LeastWater(), 1e-14)
	}
}

// What the note on mixtures says: sulfuric acid with as many mol of ammonium
// sulfate is ammonium bisulfate to the ions, but by water contents it comes out 1
// to 6 % high from 0.01 to 2 mol/kg.
func TestMixedBisulfateNote(t *testing.T) {
	acid, sulfate, both := ownModel(t, "sulfuric_acid", room), saltOf(t, "AS", room), newBisulfate(1, false, DebyeHueckel(room))
	worst, least := 0.0, math.Inf(1)
	for _, m := range []float64{0.01, 0.03, 0.1, 0.3, 1, 2} {
		lnaw := -sulfateIons * waterMolarMass * m * both.osmotic(m)
		water := 0.5*inverse(acid, lnaw)/acid.molality + 0.5*inverse(sulfate, lnaw)/sulfate.perWater // kg per mol
		worst, least = math.Max(worst, m*water-1), math.Min(least, m*water-1)
	}
	if least < 0.01 || worst > 0.06 || worst < 0.05 {
		t.Errorf("%.4f to %.4f high, the note says 0.01 to 0.06", least, worst)
	}
}

// Mixtures with the models of their own keep what a mixture owes.
func TestMixturesOfOwnModels(t *testing.T) {
	for _, parts := range [][]any{
		{"H2SO4", .5, "AS", .5}, {"sea salt", .6, "SOA", .4}, {"sucrose", .2, "NaCl", .8}, {"letovicite", .3, "NH4HSO4", .3, "soot", .4},
	} {
		d, _, err := Dissolve(recipe(t, IonInteraction, parts...))
		if err != nil {
			t.Fatal(err)
		}
		last := math.Inf(-1)
		for i := range 121 {
			u := math.Pow(10, -1+float64(i)/15)
			l, slope := d.Solution.LnActivity(u)
			if !(l < 0 && l > last && slope > 0) {
				t.Fatalf("%v: ln a_w(%g) = %g after %g, slope %g", parts, u, l, last, slope)
			}
			last = l
			const h = 1e-4
			up, _ := d.Solution.LnActivity(u * math.Exp(h))
			down, _ := d.Solution.LnActivity(u * math.Exp(-h))
			near(t, fmt.Sprint(parts, " slope at u ", u), slope, (up-down)/(2*h), 1e-4)
		}
	}
}

func BenchmarkDissolve(b *testing.B) {
	for _, name := range []string{"NaCl", "sucrose", "sea salt", "H2SO4"} {
		r := recipe(b, IonInteraction, name, 1.)
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, _, err := Dissolve(r); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
