package answer

import (
	"context"
	"testing"

	"dropcrest/ui/scenario"
)

// benchmarkAscent asks again and again, each time after a change, for populations of
// three kinds.
func benchmarkAscent(b *testing.B, change func(*scenario.Scenario)) {
	kappa := modesOfKappa(b)
	kappa.AscentBins = 200
	for name, s := range map[string]scenario.Scenario{
		"demo":    scenario.Default(),
		"2 modes": kappa,
		"salt":    scene(b, "population=modes"),
	} {
		b.Run(name, func(b *testing.B) {
			env := stationEnv()
			env.Kept, env.Workers = &Kept{}, 2
			b.ReportAllocs()
			for b.Loop() {
				change(&s)
				if _, err := askAscent(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

// The question as the screen asks it at every key: the updraft changes, and what is
// kept is kept. Aim: a frame of 16 ms.
func BenchmarkAscentHeldKey(b *testing.B) {
	benchmarkAscent(b, func(s *scenario.Scenario) {
		if s.Updraft *= 1.1; s.Updraft > 5 {
			s.Updraft = 0.1
		}
	})
}

// Any other key. Aim: some 50 ms.
func BenchmarkAscent(b *testing.B) {
	benchmarkAscent(b, func(s *scenario.Scenario) {
		if s.Temperature += 0.1; s.Temperature > 300 {
			s.Temperature = 280
		}
	})
}

// Aim: 40 by 40 cells of 60 bins a mode in 10 s on two cores, 6 ms a cell.
func BenchmarkAscentSweep(b *testing.B) {
	s := modesOfKappa(b, "sweep=updraft=0.05..5m/s:8:log number=100..10000/cm3:8:log", "ascent-bins=60")
	env := stationEnv()
	env.Workers = 2
	b.ReportAllocs()
	for b.Loop() {
		if _, err := askAscent(context.Background(), env, s); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(b.Elapsed().Seconds()/float64(b.N)*1600/64, "s/map")
}
