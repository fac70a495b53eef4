package orbifold

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// LabelOf returns the label that Snake gives to edges and diagonals of class c:
// 1, 2, 3 for the classes of 0/1, 1/0 and 1/1.
func LabelOf(c farey.Class) snake.Label { return snake.Label(c) + 1 }

// ClassOf returns the class that a label of Snake stands for; false for every
// other label.
func ClassOf(l snake.Label) (farey.Class, bool) {
	if l < 1 || l > 3 {
		return 0, false
	}
	return farey.Class(l - 1), true
}

// Snake returns the snake graph of the arc of slope s: one tile for each
// crossing and k more for each crossing of an edge of weight k. A tile's
// diagonal is the crossed edge; the glue edge of a turn carries the third side
// of the triangle passed, that of an own letter the class of its own edge; all
// labelled by LabelOf. The number of perfect matchings is the number at s. An
// arc that crosses nothing has the single edge as its graph.
//
// The graph is glued tile by tile along the corridor, not made from the word.
// Past snake.MaxTiles tiles or MaxCrossings crossings the error is
// ErrTooLarge. Source: "Positivity for cluster algebras from surfaces", Adv.
// Math. 227 (2011).
func (f Family) Snake(s farey.Slope) (snake.Graph, error) {
	return f.SnakeContext(context.Background(), s)
}

// SnakeContext is Snake that stops when ctx ends, with its error.
func (f Family) SnakeContext(ctx context.Context, s farey.Slope) (snake.Graph, error) {
	ctx = contextOf(ctx)
	if s.IsBase() {
		return snake.EdgeWithLabel(LabelOf(s.Class())), nil
	}
	if n := f.Tiles(s); n.Cmp(big.NewInt(snake.MaxTiles)) > 0 {
		return snake.Graph{}, fmt.Errorf("orbifold: snake graph of %v in family %v: %s tiles, at most %d are glued (Word has the run form): %w",
			s, f, contfrac.Abbreviate(n), snake.MaxTiles, ErrTooLarge)
	}
	crossings, err := corridor(ctx, s)
	if err != nil {
		return snake.Graph{}, err
	}
	var b *snake.Builder
	var last farey.Crossing
	for x := range crossings {
		if b == nil {
			b = snake.NewBuilder(LabelOf(x.Class), LabelOf(x.Left.Class()), LabelOf(x.Right.Class()))
		} else {
			b.Glue(letterOf(last.Turn), LabelOf(last.Class.Third(x.Class)), LabelOf(x.Class))
		}
		for i := range f.weights[x.Class] {
			if i&8191 == 8191 && ctx.Err() != nil {
				break
			}
			b.GlueOwn(letterOf(x.Nearer))
		}
		last = x
	}
	if err := ctx.Err(); err != nil {
		return snake.Graph{}, fmt.Errorf("orbifold: snake graph of %v: %w", s, err)
	}
	p, q, _ := s.Int64s()
	end := farey.Point{X: q, Y: p}
	return b.Graph(LabelOf(end.Sub(last.Left).Class()), LabelOf(end.Sub(last.Right).Class())), nil
}

// Tiles returns the number of tiles of the snake graph of s, without building
// it: Σ (1 + k) over the crossings by class.
func (f Family) Tiles(s farey.Slope) *big.Int {
	n := new(big.Int)
	for c, crossings := range s.CrossingCounts() {
		k := big.NewInt(f.weights[c])
		n.Add(n, k.Mul(k.Add(k, big.NewInt(1)), crossings))
	}
	return n
}
