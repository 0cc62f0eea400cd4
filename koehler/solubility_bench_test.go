package koehler

import (
	"math"
	"testing"

	"dropcrest/solutes"
)

func threeParts(t testing.TB) *solutes.Limited {
	return mustMix(t,
		solutes.LimitedPart{Volume: 0.5, Kappa: 0.2, Solubility: 0.003},
		solutes.LimitedPart{Volume: 0.47, Kappa: 0.3, Solubility: 0.05},
		solutes.LimitedPart{Volume: 0.03, Kappa: 0.61, Solubility: math.Inf(1)})
}

func BenchmarkLimitedExtremaThreeParts(b *testing.B) {
	mix := threeParts(b)
	turns := make([]Turn, 0, 8)
	b.ReportAllocs()
	for b.Loop() {
		turns = LimitedExtrema(turns[:0], 120e-9, 2.1e-9, mix)
	}
}

func BenchmarkLimitedExtremaOnePart(b *testing.B) {
	mix := mustMix(b, solutes.LimitedPart{Volume: 1, Kappa: 0.096, Solubility: 0.0183})
	turns := make([]Turn, 0, 4)
	b.ReportAllocs()
	for b.Loop() {
		turns = LimitedExtrema(turns[:0], 100e-9, 2.1e-9, mix)
	}
}

func TestLimitedExtremaDoesNotAllocate(t *testing.T) {
	mix := threeParts(t)
	turns := make([]Turn, 0, 8)
	if n := testing.AllocsPerRun(100, func() { turns = LimitedExtrema(turns[:0], 120e-9, 2.1e-9, mix) }); n != 0 {
		t.Errorf("%v allocations, want none", n)
	}
}

func BenchmarkTurns(b *testing.B) {
	turns := make([]Turn, 0, 8)
	for _, bench := range []struct {
		name string
		p    Particle
	}{
		{"limited", Particle{DryDiameter: 120e-9, Temperature: 293.15, Solution: threeParts(b)}},
		{"limited, compressible", Particle{DryDiameter: 120e-9, Temperature: 293.15, Solution: threeParts(b), Kelvin: Compressible}},
	} {
		b.Run(bench.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				turns, _ = bench.p.Turns(turns[:0])
			}
		})
	}
}
