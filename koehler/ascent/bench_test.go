package ascent

import (
	"context"
	"fmt"
	"testing"
)

// Aim: 4 ms for 200 bins in two modes to 300 m at a tolerance of 1e-5.
func BenchmarkAscent(b *testing.B) {
	for _, bins := range []int{30, 100, 200, 500, 2000} {
		b.Run(fmt.Sprintf("%dbins", 2*bins), func(b *testing.B) {
			p, o := continental(), Options{Bins: bins}
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Run(context.Background(), p, o); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
