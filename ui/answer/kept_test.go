package answer

import (
	"context"
	"reflect"
	"sync"
	"testing"

	"dropcrest/solutes"
)

// A question answered with what was kept says the same as one answered afresh,
// whatever was asked before.
func TestKeptChangesNoAnswer(t *testing.T) {
	kept := &Kept{}
	acid := []string{"component=sulfuric acid"}
	for _, values := range [][]string{
		acid,
		{"component=sulfuric acid", "dry-diameter=40nm"},
		{"component=sulfuric acid", "relative-humidity=80%", "humidity-history=falling"},
		{"component=sulfuric acid", "temperature=10C"},
		{"component=sulfuric acid", "surface-tension=solution"},
		{"component=sulfuric acid", "water-activity=kappa"},
		{"component=adipic acid", "water-activity=kappa"},
		{"component=adipic acid", "water-activity=kappa", "solubility=complete"},
		{"component=illite"},
		{"component=illite", "dry-diameter=400nm"},
		{"component=sodium chloride share=0.3", "component=ammonium sulfate share=0.7"},
		{"component=sodium chloride share=0.3", "component=ammonium sulfate share=0.7", "shares-by=mass"},
		acid,
	} {
		for range 2 {
			s := scene(t, values...)
			fresh, err := askCurve(context.Background(), Env{}, s)
			if err != nil {
				t.Fatal(err)
			}
			again, err := askCurve(context.Background(), Env{Kept: kept}, s)
			if err != nil {
				t.Fatal(err)
			}
			if !reflect.DeepEqual(fresh.Finding, again.Finding) || !reflect.DeepEqual(fresh.Notes, again.Notes) ||
				!reflect.DeepEqual(fresh.Tables, again.Tables) || !reflect.DeepEqual(fresh.Why, again.Why) {
				t.Errorf("%q: %q, afresh %q", values, again.Finding, fresh.Finding)
			}
		}
	}
	if len(kept.matters) != mostKept {
		t.Errorf("%d are kept, want %d", len(kept.matters), mostKept)
	}
}

// Only what matters makes a difference, and a catalogue of its own does.
func TestKeptIsFound(t *testing.T) {
	kept := &Kept{}
	of := func(values ...string) *matter {
		m, err := Env{Kept: kept}.matter(scene(t, values...))
		if err != nil {
			t.Fatal(err)
		}
		return m
	}
	first := of("component=sulfuric acid")
	if of("component=sulfuric acid", "dry-diameter=40nm", "relative-humidity=80%", "kelvin=compressible", "points=7", "tolman=0.1nm") != first {
		t.Error("it is made anew for another size")
	}
	if of("component=sulfuric acid", "temperature=10C") == first || of("component=sulfuric acid", "solubility=complete") == first {
		t.Error("another particle is taken for it")
	}
	other := *solutes.Standard()
	if m, err := (Env{Kept: kept, Substances: &other}).matter(scene(t, "component=sulfuric acid")); err != nil || m == first {
		t.Errorf("the matter of one catalogue is taken for that of another, %v", err)
	}
}

func TestKeptByMany(t *testing.T) {
	kept := &Kept{}
	var all sync.WaitGroup
	for i := range 8 {
		s := scene(t, "component=sodium chloride", []string{"temperature=10C", "temperature=20C"}[i%2])
		all.Go(func() {
			for range 20 {
				if _, err := askCurve(context.Background(), Env{Kept: kept}, s); err != nil {
					t.Error(err)
				}
			}
		})
	}
	all.Wait()
}
