package orbifold

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// Number returns the number of the family at the slope s: 1 at 0/1, 1/0 and
// 1/1, and by the exchange rule (X) everywhere else.
//
// The rule is followed along the Stern–Brocot runs of the slope. A run of n
// flips about one vertex is jumped with O(log n) multiplications, so that the
// whole costs a small multiple of one multiplication of two numbers whose
// sizes add up to the size of the result, and a small multiple of its memory.
// A number with more bits than f.Limit() is ErrTooLarge, before it is computed;
// one of just f.Limit() bits may be, as the bound on the bits can be one too many.
//
// Source: "Generalization of Markov Diophantine equation via generalized
// cluster algebra", Electron. J. Combin. 30 (2023).
func (f Family) Number(s farey.Slope) (*big.Int, error) {
	return f.NumberContext(context.Background(), s)
}

// NumberContext is Number that stops when ctx ends, with its error; a single
// multiplication is not interrupted.
func (f Family) NumberContext(ctx context.Context, s farey.Slope) (*big.Int, error) {
	ctx = contextOf(ctx)
	if err := f.fits(ctx, s, 1); err != nil {
		return nil, err
	}
	n := f.exact().newest(s.Path(), running(ctx))
	if err := ctx.Err(); err != nil {
		return nil, fmt.Errorf("orbifold: number at %v: %w", s, err)
	}
	return new(big.Int).Set(n.number), nil
}

// Trace returns t = K·N − k at the slope s, where N is its number and k the
// weight of its class: the trace of −P·M⁻¹ for the matrix M of the slope and
// the number of good matchings of the closed curve round the arc. Cost and
// errors are those of Number.
func (f Family) Trace(s farey.Slope) (*big.Int, error) {
	n, err := f.Number(s)
	if err != nil {
		return nil, err
	}
	return f.exact().trace(vertex[*big.Int]{n, s.Class()}), nil
}

// NumberMod returns the number at the slope s modulo m, in 0 … m−1, for slopes
// of any size: it costs O(log p + log q) operations modulo m. A modulus that
// fits a machine word takes word arithmetic. A modulus below 1 is ErrModulus.
func (f Family) NumberMod(s farey.Slope, m *big.Int) (*big.Int, error) {
	if err := checkModulus(m); err != nil {
		return nil, err
	}
	if m.IsUint64() {
		return new(big.Int).SetUint64(f.numberMod64(s.Path(), m.Uint64())), nil
	}
	r := ring[*big.Int](newResidues(m))
	return newRule(f, r, residueJumps).newest(s.Path(), always).number, nil
}

// numberMod64 is NumberMod for the newest arc of a path and a word modulus ≥ 1.
func (f Family) numberMod64(p farey.Path, m uint64) uint64 {
	return newRule(f, ring[uint64](wordResidues{m}), residueJumps).newest(p, always).number
}

func checkModulus(m *big.Int) error {
	if m == nil || m.Sign() <= 0 {
		return fmt.Errorf("orbifold: modulus %s: %w", brief(m), ErrModulus)
	}
	return nil
}

// exact returns the exchange rule over the integers.
func (f Family) exact() rule[*big.Int] { return newRule(f, ring[*big.Int](integers{}), exactJumps) }

func always() bool { return true }

// contextOf returns ctx, or the background context for nil.
func contextOf(ctx context.Context) context.Context {
	if ctx == nil {
		return context.Background()
	}
	return ctx
}

// running returns a function that tells whether ctx still runs.
func running(ctx context.Context) func() bool { return func() bool { return ctx.Err() == nil } }

// edge is a state of the descent: the oriented edge (a, b) with c behind it.
// The arc in front of it is the newest of a path's triangle.
type edge[T any] struct {
	x       rule[T]
	a, b, c vertex[T]
}

// start returns the edge of the base triangle that the path p crosses first.
// The base path crosses none and gets the edge behind the base vertex 0/1.
func (x rule[T]) start(p farey.Path) edge[T] {
	v := x.base()
	first := farey.Zero
	if !p.IsBase() {
		first = p.First()
	}
	a, b := firstEdge(first)
	return edge[T]{x: x, a: v[a], b: v[b], c: v[first]}
}

// firstEdge returns the classes of the base edge (A, B) opposite to the base
// vertex of class c, oriented as the paths of package farey have it:
// (0/1, 1/1), (1/1, 1/0), (1/0, 0/1).
func firstEdge(c farey.Class) (a, b farey.Class) {
	switch c {
	case farey.Infinity:
		return farey.Zero, farey.One
	case farey.Zero:
		return farey.One, farey.Infinity
	}
	return farey.Infinity, farey.Zero
}

// descend follows the path p run by run to its last edge. When step returns
// false the result means nothing; the same holds for newest.
func (x rule[T]) descend(p farey.Path, step func() bool) edge[T] {
	e := x.start(p)
	for letter, n := range p.Moves().Runs() {
		if !step() {
			break
		}
		e = e.run(letter, n, step)
	}
	return e
}

// newest returns the arc that the path p makes last. It differs from descend
// in the last run, of which it computes that arc alone.
func (x rule[T]) newest(p farey.Path, step func() bool) vertex[T] {
	e := x.start(p)
	if p.IsBase() {
		return e.c
	}
	moves := p.Moves()
	left := moves.NumRuns()
	for letter, n := range moves.Runs() {
		if !step() {
			break
		}
		if left--; left == 0 {
			return e.fan(letter, step).term(new(big.Int).Add(n, big.NewInt(2)))
		}
		e = e.run(letter, n, step)
	}
	return e.front()
}

// front returns the arc in front of the edge.
func (e edge[T]) front() vertex[T] { return e.x.flip(e.a, e.b, e.c) }

// fan returns the fan round the vertex that the move letter keeps, with arc 0
// behind the edge and arc 1 its other end.
func (e edge[T]) fan(letter contfrac.Letter, step func() bool) fan[T] {
	if letter == contfrac.L {
		return e.x.fan(e.a, e.b, e.c, step)
	}
	return e.x.fan(e.b, e.a, e.c, step)
}

// run makes the same move n times.
func (e edge[T]) run(letter contfrac.Letter, n *big.Int, step func() bool) edge[T] {
	lo, hi := e.fan(letter, step).pair(n)
	if letter == contfrac.L {
		return edge[T]{x: e.x, a: e.a, b: hi, c: lo}
	}
	return edge[T]{x: e.x, a: hi, b: e.b, c: lo}
}
