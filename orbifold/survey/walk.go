package survey

import (
	"context"
	"fmt"
)

// Walk calls visit for every slope of the region, once each, in an order that
// depends on the region alone: the base slopes, then the tree, near edges one by
// one and far ones fan by fan. It stops when visit returns false, with a nil
// error, and when ctx ends, with its error.
//
// It is complete because numbers grow strictly along every path from the base.
// Arcs are kept in machine words (residues, logarithms, slopes), so a visit costs
// some nanoseconds and nothing is allocated; the few cases at the bound that
// logarithms leave open are decided exactly. Memory does not depend on the region.
func Walk(ctx context.Context, r Region, visit func(*Visit) bool) error {
	if visit == nil {
		return fmt.Errorf("survey: walk without a function to call: %w", ErrOptions)
	}
	w, err := newWalker(r)
	if err != nil {
		return err
	}
	defer context.AfterFunc(ctx, func() { w.halt.Store(true) })()
	w.sink = visit
	if w.start() {
		_, edges := w.base()
		for _, e := range edges {
			if !w.tree(e) {
				break
			}
		}
	}
	if w.halt.Load() {
		return fmt.Errorf("survey: walk: %w", context.Cause(ctx))
	}
	return w.failed()
}

// failed returns the error of a decision at the bound that could not be made.
func (w *walker) failed() error {
	if w.exact == nil {
		return nil
	}
	w.exact.mu.Lock()
	defer w.exact.mu.Unlock()
	return w.exact.err
}
