package orbifold

import (
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/farey"
)

// Identify returns the slopes in Q ∪ {∞} that carry the number n, one for each
// symmetry class (the representative of Domain), increasing, 1/0 last; none if
// no slope does. An n below 1 is ErrNotPositive.
//
// With a nil error the list is complete, for equal and unequal weights alike:
// numbers grow strictly along every path from the base triangle, and every
// slope with a number up to n is looked at, about G·(ln n)² of them for a
// constant G of the family, with exact arithmetic. When ctx ends first, the result
// is nil and the error that of ctx.
func (f Family) Identify(ctx context.Context, n *big.Int) ([]farey.Slope, error) {
	if n == nil || n.Sign() <= 0 {
		return nil, fmt.Errorf("orbifold: slopes that carry %s: %w", brief(n), ErrNotPositive)
	}
	ctx = contextOf(ctx)
	var found []farey.Slope
	for node := range f.walk(true, atMost(n)) {
		if err := ctx.Err(); err != nil {
			return nil, fmt.Errorf("orbifold: slopes that carry %s: %w", brief(n), err)
		}
		if node.value().Cmp(n) == 0 {
			found = append(found, node.slope)
		}
	}
	slices.SortFunc(found, farey.Slope.Cmp)
	return found, nil
}
