package orbifold

import (
	"context"
	"fmt"

	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// Eval returns the number at the slope s over any commutative semiring r, with
// weights of r in the order k₀, k∞, k₁ and unit lengths. It uses sums and
// products only, so weights may be variables, 2cos(π/n), elements of a finite
// field. Over the integers it equals Family.Number.
//
// It carries (a, b), the lengths from the start of the arc to the left and the
// right end of the edge just crossed: an own corner of weight k nearer to the
// left end adds k·a to b, nearer to the right end k·b to a; a turn about an end
// replaces the other end's length by the sum. Cost: two products and two sums a
// crossing at most, O(|p| + q) in all; more than MaxCrossings crossings is
// ErrTooLarge.
// Source: "Positivity for cluster algebras from surfaces", Adv. Math. 227 (2011).
func Eval[T any](r snake.Semiring[T], weights [3]T, s farey.Slope) (T, error) {
	return EvalContext(context.Background(), r, weights, s)
}

// EvalContext is Eval that stops when ctx ends, with its error; a single
// operation of the semiring is not interrupted.
func EvalContext[T any](ctx context.Context, r snake.Semiring[T], weights [3]T, s farey.Slope) (T, error) {
	ctx = contextOf(ctx)
	if r == nil {
		var zero T
		return zero, fmt.Errorf("orbifold: value at %v: want a semiring: %w", s, ErrNoSemiring)
	}
	a, b := r.One(), r.One()
	if s.IsBase() {
		return a, nil
	}
	crossings, err := corridor(ctx, s)
	if err != nil {
		return r.Zero(), err
	}
	for x := range crossings {
		if x.Nearer == farey.Right {
			a = r.Add(a, r.Mul(weights[x.Class], b))
		} else {
			b = r.Add(b, r.Mul(weights[x.Class], a))
		}
		switch x.Turn {
		case farey.Left:
			b = r.Add(b, a)
		case farey.Right:
			a = r.Add(a, b)
		}
	}
	if err := ctx.Err(); err != nil {
		return r.Zero(), fmt.Errorf("orbifold: value at %v: %w", s, err)
	}
	return r.Add(a, b), nil
}
