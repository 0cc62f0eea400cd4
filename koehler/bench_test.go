package koehler

import (
	"testing"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

func BenchmarkSolveKappa(b *testing.B) {
	for name, r := range map[string]struct{ dry, kappa []float64 }{
		"30-230nm": {[]float64{30e-9, 70e-9, 120e-9, 230e-9}, []float64{0.1, 0.3, 0.6, 1.1}},
		"all":      {[]float64{1e-9, 20e-9, 5e-7, 1e-5}, []float64{1e-6, 1e-3, 0.1, 2}},
	} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			i := 0
			for b.Loop() {
				SolveKappa(r.dry[i&3], 2.1e-9, r.kappa[i>>2&3])
				i++
			}
		})
	}
}

func BenchmarkKappaOf(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		KappaOf(60e-9, 2.1e-9, 0.004)
	}
}

func BenchmarkDryOf(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		DryOf(0.3, 2.1e-9, 0.004)
	}
}

// The crest of a particle of a catalogued salt, sizes from 30 to 230 nm. The goal
// for ion interaction is 0.8 µs without an allocation.
func BenchmarkCrest(b *testing.B) {
	sodium, _ := crystal(b, "sodium chloride", 1e-7, 298.15)
	sulfate, _ := crystal(b, "ammonium sulfate", 1e-7, 298.15)
	water := solutes.ConstantTension(atmos.SurfaceTension(298.15)) // as solutes.Dissolve gives it
	sodium.Tension, sulfate.Tension = water, water
	raised := sulfate
	raised.Tension = solutes.LinearTension{Water: 0.072, PerDry: 0.05}
	curved := sulfate
	curved.TolmanLength = 0.05e-9
	for _, c := range []struct {
		name string
		p    Particle
	}{
		{"kappa", Particle{Temperature: 298.15, Solution: solutes.Kappa(0.61), Tension: water}},
		{"sodium chloride", sodium}, {"ammonium sulfate", sulfate}, {"solution tension", raised}, {"Tolman", curved},
	} {
		b.Run(c.name, func(b *testing.B) {
			dry := [4]float64{30e-9, 70e-9, 120e-9, 230e-9}
			b.ReportAllocs()
			i := 0
			for b.Loop() {
				c.p.DryDiameter = dry[i&3]
				if _, err := c.p.Crest(); err != nil {
					b.Fatal(err)
				}
				i++
			}
		})
	}
}

func BenchmarkSample400(b *testing.B) {
	p := Particle{DryDiameter: 100e-9, Temperature: 298.15, Solution: ammoniumSulfate()}
	var dst []State
	b.ReportAllocs()
	for b.Loop() {
		dst = p.Sample(dst, 110e-9, 1e-5, 400)
	}
}
