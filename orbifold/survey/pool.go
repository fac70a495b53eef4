package survey

import (
	"context"
	"sync"
	"sync/atomic"
)

// pool does the jobs 0 … n−1 by a number of workers, in this order as far as
// they begin, and returns the first error. It waits for all workers.
func pool(ctx context.Context, workers, n int, do func(worker, job int) error) error {
	var (
		next  atomic.Int64
		group sync.WaitGroup
		once  sync.Once
		first error
		quit  atomic.Bool
	)
	for worker := range min(workers, n) {
		group.Go(func() {
			for !quit.Load() {
				job := int(next.Add(1)) - 1
				if job >= n {
					return
				}
				err := context.Cause(ctx)
				if err == nil {
					err = do(worker, job)
				}
				if err != nil {
					once.Do(func() { first = err })
					quit.Store(true)
				}
			}
		})
	}
	group.Wait()
	return first
}
