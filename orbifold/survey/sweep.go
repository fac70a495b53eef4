package survey

import (
	"context"
	"encoding/json"
	"fmt"
	"sync"
	"time"
)

// Question is what a sweep asks of every slope, with a summary S of the answers.
//
// The zero value of S is the summary of no slopes. Visit adds one slope to it; Merge
// adds another summary. Merge has to be associative and to have the zero value as
// neutral element; then the result is the same for any number of workers
// and shards. S has to survive encoding as JSON for shards and checkpoints.
type Question[S any] struct {
	Name  string // stated in results, which merge under one name only
	Visit func(sum *S, v *Visit)
	Merge func(sum *S, other S)
}

func (q Question[S]) check() error {
	if q.Visit == nil || q.Merge == nil {
		return fmt.Errorf("survey: question %q: want a Visit and a Merge: %w", clip(q.Name), ErrOptions)
	}
	return nil
}

// Sweep asks the question of every slope of a region, in parallel, and merges the
// summaries in the order of the tree. With a checkpoint, a sweep that was
// killed goes on where the file says.
func Sweep[S any](ctx context.Context, r Region, q Question[S], o Options) (S, error) {
	var none S
	part, err := sweep(ctx, r, q, o)
	if err != nil {
		return none, err
	}
	return part.Result(q)
}

// chunks is the number of pieces that a sweep of a region is made in. It depends
// on the region alone, so that a checkpoint fits any machine.
func (w *walker) chunks() int {
	total := 0.0
	for _, p := range w.pieces(4) {
		total += p.load
	}
	return min(max(64, int(min(total/4e6, MaxShards))), 4096)
}

func sweep[S any](ctx context.Context, r Region, q Question[S], o Options) (Part[S], error) {
	w, err := newWalker(r)
	if err != nil {
		return Part[S]{}, err
	}
	shards, err := w.shards(r, w.chunks())
	if err != nil {
		return Part[S]{}, err
	}
	return sweepAll(ctx, w, shards, q, o)
}

// SweepShards asks the question of the slopes of some shards of one region and
// split, and returns their part of the result.
func SweepShards[S any](ctx context.Context, shards []Shard, q Question[S], o Options) (Part[S], error) {
	w, err := walkerOf(q.Name, shards)
	if err != nil {
		return Part[S]{}, err
	}
	return sweepAll(ctx, w, shards, q, o)
}

// walkerOf returns a walker for shards, which have to belong together.
func walkerOf(name string, shards []Shard) (*walker, error) {
	if len(shards) == 0 || shards[0].of == 0 {
		return nil, fmt.Errorf("survey: %s of no shards: want shards of Split: %w", clip(name), ErrOptions)
	}
	want := newHeader(name, shards[0])
	for _, s := range shards {
		if err := want.same(newHeader(name, s)); err != nil {
			return nil, err
		}
	}
	return newWalker(shards[0].region)
}

func sweepAll[S any](ctx context.Context, w *walker, shards []Shard, q Question[S], o Options) (Part[S], error) {
	if err := q.check(); err != nil {
		return Part[S]{}, err
	}
	return sweepWith(ctx, w, shards, q, o, func(w *walker, total *S) func() {
		w.sink = func(v *Visit) bool { q.Visit(total, v); return true }
		return func() {}
	})
}

// sweepWith sweeps shards that begin prepares a walker for; the function that it returns
// completes the summary when the shard is done.
func sweepWith[S any](ctx context.Context, w *walker, shards []Shard, q Question[S], o Options, begin func(*walker, *S) func()) (Part[S], error) {
	o, err := o.normal()
	if err != nil {
		return Part[S]{}, err
	}
	whole := Part[S]{header: newHeader(q.Name, shards[0])}
	store := checkpoint{name: o.Checkpoint}
	if text, err := store.read(); err != nil {
		return Part[S]{}, err
	} else if text != nil {
		var old Part[S]
		if err := json.Unmarshal(text, &old); err != nil {
			return Part[S]{}, fmt.Errorf("survey: checkpoint %s: %w", o.Checkpoint, err)
		}
		if err := whole.header.same(old.header); err != nil {
			return Part[S]{}, fmt.Errorf("survey: checkpoint %s: %w", o.Checkpoint, err)
		}
		whole = old
	}
	var todo []Shard
	var done, total float64
	have := make(map[int]bool, len(whole.sums))
	for _, s := range whole.sums {
		have[s.index] = true
	}
	for _, s := range shards {
		total += s.piece.load
		if have[s.index] {
			done += s.piece.load
		} else {
			todo = append(todo, s)
		}
	}
	defer context.AfterFunc(ctx, func() { w.halt.Store(true) })()
	progress := newMeter(o, "sweep", done, total)
	walkers := make([]*walker, o.Workers)
	for i := range walkers {
		walkers[i] = w.clone()
	}
	var mu sync.Mutex
	saved := time.Now()
	failure := pool(ctx, o.Workers, len(todo), func(worker, job int) error {
		w, s := walkers[worker], todo[job]
		total := new(S)
		end := begin(w, total)
		if !w.run(&s.piece) {
			return context.Cause(ctx)
		}
		end()
		progress.add(s.piece.load)
		mu.Lock()
		defer mu.Unlock()
		one := Part[S]{whole.header, []sum[S]{{Shard: s.String(), index: s.index, Sum: *total}}}
		more, err := whole.Merge(one)
		if err != nil {
			return err
		}
		whole = more
		if store.name == "" || time.Since(saved) < time.Second {
			return nil
		}
		saved = time.Now()
		return store.write(whole)
	})
	if store.name != "" {
		// What was finished is kept even when the sweep was cancelled.
		if err := store.write(whole); failure == nil {
			failure = err
		}
	}
	if failure == nil {
		failure = w.failed()
	}
	if failure != nil {
		return Part[S]{}, fmt.Errorf("survey: sweep: %w", failure)
	}
	progress.end()
	return whole, nil
}
