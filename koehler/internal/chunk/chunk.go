// Package chunk runs work that is cut into numbered pieces on several cores, so
// that what comes out does not depend on how many there are.
package chunk

import (
	"context"
	"math/rand/v2"
	"runtime"
	"sync"
)

// Run calls work for the pieces 0 to n-1, at most workers at a time (0: as many
// as there are cores), and finished after each piece with the number of pieces
// that are done; calls of finished do not overlap. nil: not called.
//
// Pieces are begun in order. When the context ends no further piece is begun,
// those under way are finished, and ran is the number of pieces that were run:
// the first ran of them, without a gap. The error is then that of the context.
func Run(ctx context.Context, n, workers int, work func(piece int), finished func(done int)) (ran int, err error) {
	if workers <= 0 {
		workers = runtime.GOMAXPROCS(0)
	}
	var taking, telling sync.Mutex
	begun, done := 0, 0
	take := func() (piece int, ok bool) {
		taking.Lock()
		defer taking.Unlock()
		if ctx.Err() != nil || begun >= n {
			return 0, false
		}
		begun++
		return begun - 1, true
	}
	tell := func() {
		telling.Lock()
		defer telling.Unlock()
		done++
		if finished != nil {
			finished(done)
		}
	}
	var wait sync.WaitGroup
	for range min(workers, n) {
		wait.Go(func() {
			for {
				piece, ok := take()
				if !ok {
					return
				}
				work(piece)
				tell()
			}
		})
	}
	wait.Wait()
	if done < n {
		return done, ctx.Err()
	}
	return done, nil
}

// Generator returns the random numbers of one piece: they depend on the seed
// and on the numbers that name the piece, and on nothing else.
func Generator(seed uint64, name ...uint64) *rand.Rand {
	return rand.New(Source(seed, name...))
}

// Source is what Generator draws from.
func Source(seed uint64, name ...uint64) *rand.PCG {
	a, b := mix(seed), mix(seed+1)
	for _, n := range name {
		a, b = mix(a^mix(n)), mix(b+mix(n+1))
	}
	return rand.NewPCG(a, b)
}

// mix spreads every bit of x over all bits (the finaliser of SplitMix64; Steele,
// Lea and Flood, OOPSLA 2014; from memory).
func mix(x uint64) uint64 {
	x += 0x9e3779b97f4a7c15
	x = (x ^ x>>30) * 0xbf58476d1ce4e5b9
	x = (x ^ x>>27) * 0x94d049bb133111eb
	return x ^ x>>31
}
