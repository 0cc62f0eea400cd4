package ascent

import (
	"context"
	"runtime"
	"sync"
)

// Each does work(i) for i from first to n-1 on so many workers (0: as many as there
// are cores) and hands the results to take in the order of i, one at a time. At most a
// few results a worker wait for an earlier one. The first error of take, or that of
// the context, ends it and is returned; what has been taken until then is in order and
// without gaps. work must not depend on what other calls of it do: then nothing
// depends on the number of workers.
func Each[T any](ctx context.Context, first, n, workers int, work func(ctx context.Context, i int) T, take func(i int, result T) error) error {
	if n <= first {
		return ctx.Err()
	}
	if workers <= 0 {
		workers = runtime.GOMAXPROCS(0)
	}
	workers = min(workers, n-first)
	inner, cancel := context.WithCancel(ctx)
	defer cancel()
	jobs := make(chan job[T])
	queue := make(chan job[T], 4*workers) // in order; its room bounds who runs ahead
	var group sync.WaitGroup
	for range workers {
		group.Go(func() {
			for j := range jobs {
				j.done <- work(inner, j.i)
			}
		})
	}
	group.Go(func() { hand(inner, first, n, queue, jobs) })
	err := takeAll(inner, queue, take)
	cancel()
	group.Wait()
	return err
}

type job[T any] struct {
	i    int
	done chan T
}

// hand gives the jobs out in order until the context ends.
func hand[T any](ctx context.Context, first, n int, to ...chan<- job[T]) {
	for _, c := range to {
		defer close(c)
	}
	for i := first; i < n; i++ {
		j := job[T]{i, make(chan T, 1)}
		for _, c := range to {
			select {
			case c <- j:
			case <-ctx.Done():
				return
			}
		}
	}
}

// takeAll hands the results on as they come in order. The result of a stopped run
// is none.
func takeAll[T any](ctx context.Context, queue <-chan job[T], take func(int, T) error) error {
	for j := range queue {
		select {
		case result := <-j.done:
			if err := ctx.Err(); err != nil {
				return err
			}
			if err := take(j.i, result); err != nil {
				return err
			}
		case <-ctx.Done():
			return ctx.Err()
		}
	}
	return ctx.Err()
}
