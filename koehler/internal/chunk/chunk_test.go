package chunk

import (
	"context"
	"errors"
	"math"
	"testing"
)

func TestEveryPieceRunsOnce(t *testing.T) {
	for _, workers := range []int{0, 1, 2, 7} {
		ran := make([]int, 50)
		last := 0
		n, err := Run(context.Background(), len(ran), workers, func(i int) { ran[i]++ }, func(done int) {
			if done != last+1 {
				t.Errorf("%d workers: %d done after %d", workers, done, last)
			}
			last = done
		})
		if n != len(ran) || err != nil || last != len(ran) {
			t.Errorf("%d workers: ran %d, last %d, error %v", workers, n, last, err)
		}
		for i, k := range ran {
			if k != 1 {
				t.Errorf("%d workers: piece %d ran %d times", workers, i, k)
			}
		}
	}
}

func TestNoGapWhenStopped(t *testing.T) {
	for _, workers := range []int{1, 4} {
		ctx, stop := context.WithCancel(context.Background())
		ran := make([]bool, 100)
		n, err := Run(ctx, len(ran), workers, func(i int) {
			ran[i] = true
			if i == 9 {
				stop()
			}
		}, nil)
		if !errors.Is(err, context.Canceled) || n < 10 || n > 10+workers {
			t.Errorf("%d workers: ran %d with error %v, want about 10 and the context's", workers, n, err)
		}
		for i := range ran {
			if ran[i] != (i < n) {
				t.Errorf("%d workers: piece %d of %d: ran is %v", workers, i, n, ran[i])
			}
		}
	}
}

// Neighbouring names must give unrelated numbers: the correlation of 10000
// pairs of normal deviates has a standard deviation of 0.01.
func TestGeneratorsAreUnrelated(t *testing.T) {
	const n = 10000
	for _, other := range [][]uint64{{1, 3, 5}, {1, 2, 6}, {1, 2}, {2, 1, 5}} {
		a, b := Generator(7, 1, 2, 5), Generator(7, other...)
		sum := 0.0
		for range n {
			sum += a.NormFloat64() * b.NormFloat64()
		}
		if r := sum / n; math.Abs(r) > 0.05 {
			t.Errorf("names 1 2 5 and %v: correlation %.3f, want 0", other, r)
		}
	}
	if a, b := Generator(7, 1), Generator(7, 1); a.Uint64() != b.Uint64() {
		t.Error("the same name gives other numbers")
	}
}
