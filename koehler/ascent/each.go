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

	type job struct {
		i    int
		done chan T
	}
	jobs := make(chan job)
	queue := make(chan job, 4*workers) // in order; its room bounds who runs ahead
	var group sync.WaitGroup
	for range workers {
		group.Go(func() {
			for j := range jobs {
				j.done <- work(inner, j.i)
			}
		})
	}
	group.Go(func() {
		defer close(jobs)
		defer close(queue)
		for i := first; i < n; i++ {
			j := job{i, make(chan T, 1)}
			select {
			case queue <- j:
			case <-inner.Done():
				return
			}
			select {
			case jobs <- j:
			case <-inner.Done():
				return
			}
		}
	})
	err := takeAll(inner, queue, func(j job) error {
		select {
		case result := <-j.done:
			if err := inner.Err(); err != nil { // the result of a stopped run is none
				return err
			}
			return take(j.i, result)
		case <-inner.Done():
			return inner.Err()
		}
	})
	cancel()
	group.Wait()
	return err
}

func takeAll[J any](ctx context.Context, queue <-chan J, take func(J) error) error {
	for j := range queue {
		if err := take(j); err != nil {
			return err
		}
	}
	return ctx.Err()
}
