package kappa

import (
	"context"
	"testing"
)

func BenchmarkMonteCarlo100000(b *testing.B) {
	all := at60()
	all.Temperature.Systematic = 1
	all.Tension = Measured{0, 0, 0.0007}
	for name, p := range map[string]Point{"size and supersaturation": at60(), "temperature and tension too": all} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				propagate(b, []Point{p}, Settings{Trials: 100000})
			}
		})
	}
}

func BenchmarkEvaluate(b *testing.B) {
	p := at60()
	b.ReportAllocs()
	for b.Loop() {
		Evaluate(p, 0.95)
	}
}

func BenchmarkAdaptive(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		Propagate(context.Background(), []Point{at60()}, Settings{})
	}
}
