package answer

import (
	"context"
	"testing"
)

// kindsOfParticles are the particles that are no plain salt, each with 400 points.
func kindsOfParticles() map[string][]string {
	const sulfate, organic = "component=ammonium sulfate share=0.2", "component=pinic acid density=1200kg/m3 share=0.8"
	film := "szyszkowski=gamma-max=3e-6mol/m2 k=20m3/mol"
	return map[string][]string{
		"sparing, one":       {"water-activity=kappa", "component=adipic acid"},
		"sparing, three":     {"water-activity=kappa", "component=adipic acid share=0.5", "component=succinic acid share=0.4", "component=ammonium sulfate share=0.1"},
		"crystal":            {"relative-humidity=60%"},
		"salts":              {"component=ammonium sulfate share=0.5", "component=sodium chloride share=0.5"},
		"coated soot":        {"component=black carbon share=0.7", "component=ammonium sulfate share=0.3"},
		"dust":               {"component=illite"},
		"coated dust":        {"component=illite share=0.9", "component=ammonium sulfate share=0.1"},
		"film":               {sulfate, organic, film, "partitioning=off"},
		"film, partitioned":  {sulfate, organic, film},
		"mostly organic":     {"water-activity=kappa", "component=kappa=0.61 share=0.02", "component=density=1100kg/m3 molar-mass=300g/mol ions=1 share=0.98", film},
		"sulfuric acid":      {"component=sulfuric acid"},
		"ammonium bisulfate": {"component=ammonium bisulfate"},
		"sea salt":           {"component=sea salt"},
		"Tolman":             {"tolman=0.1nm"},
	}
}

// Every kind afresh, as the command asks.
func BenchmarkKinds(b *testing.B) {
	for name, values := range kindsOfParticles() {
		s := scene(b, append(values, "points=400")...)
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := askCurve(context.Background(), Env{}, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// Every kind as the screen asks, when a key has changed the dry size.
func BenchmarkKindsNextSize(b *testing.B) {
	for name, values := range kindsOfParticles() {
		s := scene(b, append(values, "points=400")...)
		b.Run(name, func(b *testing.B) {
			env := Env{Kept: &Kept{}}
			b.ReportAllocs()
			for b.Loop() {
				s.DryDiameter *= 1 + 1e-9
				if _, err := askCurve(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
