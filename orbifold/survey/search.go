package survey

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"sync/atomic"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Hit is a slope that a search found.
type Hit struct {
	Slope farey.Slope `json:"slope"`

	// Certificate states its number for readers without this library; the zero
	// value when the number has more than orbifold.MaxCertificateBits bits.
	Certificate orbifold.Certificate `json:"certificate"`
}

// Search returns the slopes of the region for which the predicate is true, in
// increasing order, 1/0 last, with their certificates. The predicate is called from
// several goroutines; it may ask the visit for the number itself, which costs what
// Family.Number does.
//
// The walk does not enter subtrees in which the constraints of the region leave nothing.
// A checkpoint belongs to the region and takes the predicate on trust. More than
// o.Results hits are ErrTooMany.
func Search(ctx context.Context, r Region, predicate func(*Visit) bool, o Options) ([]Hit, error) {
	if predicate == nil {
		return nil, fmt.Errorf("survey: search without a predicate: %w", ErrOptions)
	}
	o, err := o.normal()
	if err != nil {
		return nil, err
	}
	ctx, cancel := context.WithCancelCause(ctx)
	defer cancel(nil)
	var found atomic.Int64
	slopes, err := Sweep(ctx, r, Question[[]farey.Slope]{
		Name: "search",
		Visit: func(list *[]farey.Slope, v *Visit) {
			if !predicate(v) {
				return
			}
			if found.Add(1) > int64(o.Results) {
				cancel(fmt.Errorf("more than %d hits: %w", o.Results, ErrTooMany))
				return
			}
			*list = append(*list, v.Slope())
		},
		Merge: func(list *[]farey.Slope, other []farey.Slope) { *list = append(*list, other...) },
	}, o)
	if err != nil {
		return nil, err
	}
	if len(slopes) > o.Results { // of a checkpoint
		return nil, fmt.Errorf("survey: search: more than %d hits: %w", o.Results, ErrTooMany)
	}
	slices.SortFunc(slopes, farey.Slope.Cmp)
	hits := make([]Hit, len(slopes))
	err = pool(ctx, o.Workers, len(hits), func(_, job int) error {
		hits[job].Slope = slopes[job]
		c, err := r.Family.CertifyContext(ctx, slopes[job])
		if errors.Is(err, ErrTooLarge) {
			return nil
		}
		hits[job].Certificate = c
		return err
	})
	if err != nil {
		return nil, fmt.Errorf("survey: search: %w", err)
	}
	return hits, nil
}
