package koehler

import (
	"testing"

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

func BenchmarkCrest(b *testing.B) {
	for name, s := range map[string]solutes.Solution{"kappa": solutes.Kappa(0.61), "ion interaction": ammoniumSulfate()} {
		b.Run(name, func(b *testing.B) {
			p := Particle{DryDiameter: 100e-9, Temperature: 298.15, Solution: s}
			b.ReportAllocs()
			for b.Loop() {
				p.Crest()
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
