package answer

import (
	"context"
	"testing"
)

// BenchmarkLedger asks as the screen does at every key. Aims: one particle within a
// frame, its rows and budget in 5 ms and its trials in 50 ms; an ascent in 0.5 s.
func BenchmarkLedger(b *testing.B) {
	for name, s := range ledgerScenes(b) {
		b.Run(name, func(b *testing.B) {
			env := stationEnv()
			env.Kept, env.Workers = &Kept{}, 2
			b.ReportAllocs()
			for b.Loop() {
				env.Kept.costs.kept = nil
				if _, err := askLedger(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
