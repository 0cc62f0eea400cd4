package answer

import (
	"context"
	"math"
	"testing"
	"time"

	"dropcrest/atmos/aerosol"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// Aim: each within a frame of 16 ms.
func BenchmarkSpectrumOfModes(b *testing.B) {
	for name, values := range map[string][]string{
		"ion interaction": nil,
		"kappa":           {"water-activity=kappa", "kappa=0.3"},
		"spread of kappa": {"water-activity=kappa", "kappa=0.3", "kappa-spread=1.5"},
		"dust":            {"component=mineral dust"},
		"sparing":         {"component=succinic acid", "component=sodium chloride"},
		"external":        {"component=ammonium sulfate", "component=sodium chloride", "mixing=external"},
		"fit":             {"water-activity=kappa", "kappa=0.3", "fit=erf2"},
	} {
		b.Run(name, func(b *testing.B) {
			env := Env{Substances: solutes.Standard(), Kept: &Kept{}}
			s := scene(b, append(values, "population=modes")...)
			b.ReportAllocs()
			for b.Loop() {
				if _, err := askSpectrum(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// A year of 5-minute records has 105 000 of these: 100 bins, 8 supersaturations.
// Aim: 30 s with reading, so 0.25 ms each.
func BenchmarkSpectrumRecord(b *testing.B) {
	s := scene(b, "record=all", "supersaturation=0.07, 0.1, 0.2, 0.3, 0.4, 0.6, 0.8, 1")
	c, err := newComposer(Env{}, s)
	if err != nil {
		b.Fatal(err)
	}
	o := inventedObservation(b, s, 100, 0.3)
	q := newSeason(c, newRecordRows(Env{Row: func(string, []any) error { return nil }}))
	b.ReportAllocs()
	for b.Loop() {
		a, err := c.ofRecord(o)
		if err != nil {
			b.Fatal(err)
		}
		if err := a.predict(); err != nil {
			b.Fatal(err)
		}
		if err := q.add(a); err != nil {
			b.Fatal(err)
		}
	}
}

// inventedModes are an invented population.
func inventedModes() aerosol.Modes {
	return aerosol.Modes{{Concentration: 850e6, Median: 45e-9, GSD: 1.6}, {Concentration: 400e6, Median: 150e-9, GSD: 1.6}}
}

// inventedObservation is a record of invented modes in n bins from 8 to 900 nm whose
// particles have that κ, counted with 1 % too many.
func inventedObservation(t testing.TB, s scenario.Scenario, n int, kappa float64) *observation {
	t.Helper()
	grid, err := aerosol.NewGrid(spaced(8e-9, 900e-9, n+1))
	if err != nil {
		t.Fatal(err)
	}
	bins := inventedModes().Bins(grid)
	o := &observation{number: 1, start: time.Unix(0, 0), end: time.Unix(300, 0), sizes: bins, kappa: kappa, kappaFrom: "as invented"}
	c, err := newComposer(Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	a, err := c.ofRecord(o)
	if err != nil {
		t.Fatal(err)
	}
	counts, err := a.counts(s.Supersaturations)
	if err != nil {
		t.Fatal(err)
	}
	for i, x := range s.Supersaturations {
		o.counts = append(o.counts, measurement{s: x, count: 1.01 * counts[i], uncertainty: math.Sqrt(counts[i])})
	}
	return o
}
