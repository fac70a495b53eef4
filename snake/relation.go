package snake

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Relation is an identity between numbers of matchings of snake graphs:
//
//	Product[0] · Product[1] = First[0] · First[1] + Second[0] · Second[1]
//
// where every letter stands for [Graph.Count]. In a cluster algebra these are
// the skein relations of two arcs with the two ways to smooth their crossing.
type Relation struct{ Product, First, Second [2]Graph }

// Sides returns the numbers on both sides of the relation; they are equal in
// every Relation that this package returns.
func (r Relation) Sides() (left, right *big.Int) {
	pair := func(p [2]Graph) *big.Int { return contfrac.Product(p[0].Count(), p[1].Count()) }
	right = pair(r.First)
	return pair(r.Product), right.Add(right, pair(r.Second))
}

// Graft glues the last tile of one graph to the first tile of another, with a
// turn letter between them, and returns the identity
//
//	g · h = (g turn h) · edge + g″ · h″
//
// First[0] is the grafted graph, First[1] the single edge. Second holds what is
// left of g and h when the two tiles at the glue are flipped in the one way
// that the letter forbids. Labels are dropped.
//
// It returns [ErrNoTile] for a single edge, which has no tile to glue.
// Cost: O(runs).
// Source: "Snake graph calculus and cluster algebras from surfaces", J. Algebra
// 382 (2013) (memory).
func Graft(g, h Graph, turn contfrac.Letter) (Relation, error) {
	u, okU := g.Word()
	v, okV := h.Word()
	if !okU || !okV {
		return Relation{}, fmt.Errorf("snake: graft of %v and %v: both need a tile: %w", g, h, ErrNoTile)
	}
	// With the letter R the forbidden flip is h's first tile without g's last
	// one; it forces all of g's tiles over the last one down and all of h's
	// below the first one up. Both runs consist of the other letter.
	var b contfrac.WordBuilder
	b.AppendWord(u)
	b.Append(turn, 1)
	b.AppendWord(v)
	left := forced(u.Reverse(), turn.Other()).turnedRound()
	return Relation{
		Product: [2]Graph{FromWord(u), FromWord(v)},
		First:   [2]Graph{FromWord(b.Word()), Edge()},
		Second:  [2]Graph{left, forced(v, turn.Other())},
	}, nil
}

// Split takes a tile out of a graph and returns the identity
//
//	g · edge = left · right + left′ · right′
//
// First holds what is left on either side of the tile when it is flipped,
// Second when it is not. Labels are dropped. Where the snake goes straight
// through the tile it is the identity of continuants
//
//	K(a, …, b, c, …, d) = K(a, …, b)·K(c, …, d) + K(a, …)·K(…, d)
//
// without b and c in the last product, for the tile between the runs b and c.
//
// It returns [ErrNoTile] for a tile outside 1 … Tiles(). Cost: O(runs).
// Source: "Cluster algebras and continued fractions", Compositio Math. 154
// (2018).
func Split(g Graph, tile int) (Relation, error) {
	if n := g.Tiles(); tile < 1 || tile > n {
		return Relation{}, fmt.Errorf("snake: split of %v at tile %d: tiles are 1 to %d: %w", g, tile, n, ErrNoTile)
	}
	w, _ := g.Word()
	before, behind := divide(w, tile-1)
	r := Relation{Product: [2]Graph{FromWord(w), Edge()}}
	// A neighbour over the tile is held down when the tile is down, one below it
	// held up when the tile is up; otherwise that side is free.
	lower, upper := side(behind)
	r.Second[1], r.First[1] = lower, upper
	lower, upper = side(before.Reverse().Swap())
	r.Second[0], r.First[0] = lower.turnedRound().swapped(), upper.turnedRound().swapped()
	return r, nil
}

// side returns what is left of the tiles behind a tile, whose word starts with
// the letter between: when the tile is down, and when it is up.
func side(w contfrac.Word) (down, up Graph) {
	first, ok := w.First()
	if !ok {
		return Edge(), Edge()
	}
	_, rest := divide(w, 1)
	if first == contfrac.R { // the next tile is over this one
		return forced(rest, contfrac.R), FromWord(rest)
	}
	return FromWord(rest), forced(rest, contfrac.L)
}

// divide cuts a word after some of its letters.
func divide(w contfrac.Word, letters int) (head, tail contfrac.Word) {
	var a, b contfrac.WordBuilder
	left := big.NewInt(int64(letters))
	for l, n := range w.Runs() {
		part := n
		if left.Cmp(n) < 0 {
			part = left
		}
		_ = a.AppendBig(l, part) // neither part is negative
		_ = b.AppendBig(l, new(big.Int).Sub(n, part))
		left = new(big.Int).Sub(left, part)
	}
	return a.Word(), b.Word()
}

// swapped is the graph reflected in a diagonal.
func (g Graph) swapped() Graph {
	w, ok := g.Word()
	if !ok {
		return g
	}
	return FromWord(w.Swap())
}

// forced is what remains of a graph whose first tile is fixed, when a run of
// the given letter at the start of its word hands the flip on: without the run,
// the tiles on it, and the letter behind it, across which nothing is forced.
func forced(w contfrac.Word, handsOn contfrac.Letter) Graph {
	var b contfrac.WordBuilder
	start := true
	for l, n := range w.Runs() {
		if start && l == handsOn {
			continue
		}
		if start {
			n.Sub(n, big.NewInt(1))
			start = false
			_ = b.AppendBig(l, n) // not negative
			continue
		}
		_ = b.AppendBig(l, n)
	}
	if start { // everything is forced
		return Edge()
	}
	return FromWord(b.Word())
}

// turnedRound is the graph with its tiles in the opposite order.
func (g Graph) turnedRound() Graph {
	w, ok := g.Word()
	if !ok {
		return g
	}
	return FromWord(w.Reverse())
}
