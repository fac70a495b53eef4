package snake

import (
	"fmt"
	"iter"

	"example.com/onecusp/contfrac"
)

// Fence is the poset on the tiles of a graph or band whose order ideals are its
// matchings: neighbouring tiles are comparable, the letter between them says
// which way, and all other relations follow. The fence of a band is closed in a
// ring.
//
// The zero value is the empty poset, which has one ideal.
type Fence struct{ s *shape }

// Fence returns the poset on the tiles. It returns [ErrTooLong] past [MaxTiles]
// tiles.
func (g Graph) Fence() (Fence, error) {
	s, err := g.layout("fence", MaxTiles)
	return Fence{s}, err
}

// Size returns the number of tiles.
func (f Fence) Size() int {
	if f.s == nil {
		return 0
	}
	return f.s.n
}

// neighbours returns the number of pairs of neighbouring tiles.
func (f Fence) neighbours() int {
	switch {
	case f.s == nil:
		return 0
	case f.s.closed:
		return f.s.n
	}
	return f.s.n - 1
}

// relation returns the lower and the upper one of tile i and the tile after it.
func (f Fence) relation(i int) (lower, upper int) {
	next := i%f.s.n + 1
	if f.s.letter(i) == contfrac.R {
		return i, next
	}
	return next, i
}

// Relations yields the pairs (lower, upper) of neighbouring tiles, along the
// chain; these are the cover relations, except in a band where a run of letters
// goes all the way round but for one. It can be run again.
func (f Fence) Relations() iter.Seq2[int, int] {
	return func(yield func(int, int) bool) {
		for i := 1; i <= f.neighbours(); i++ {
			if !yield(f.relation(i)) {
				return
			}
		}
	}
}

// Below reports whether tile a is below tile b or equal to it; false when
// either is no tile. Cost: O(|a − b|) on a chain, O(tiles) on a ring.
func (f Fence) Below(a, b int) bool {
	n := f.Size()
	if a < 1 || b < 1 || a > n || b > n {
		return false
	}
	if a == b {
		return true
	}
	// Climb from a along the chain, in both directions, as long as it goes up.
	for i := a; i <= f.neighbours(); {
		lower, upper := f.relation(i)
		if lower != i {
			break
		}
		if upper == b {
			return true
		}
		i = upper
	}
	for i := a; i > 1 || f.s.closed; {
		before := i - 1
		if before == 0 {
			before = n
		}
		if lower, _ := f.relation(before); lower != i {
			break
		}
		if before == b {
			return true
		}
		i = before
	}
	return false
}

// Matching returns the matching whose flipped tiles are the given ones, in any
// order, repeated or not: the matching that belongs to the order ideal.
// [Matching.FlippedTiles] goes back. It returns [ErrNoTile] for a tile outside
// 1 … Size() and [ErrNotMatching] when the tiles are no order ideal.
func (f Fence) Matching(ideal ...int) (Matching, error) {
	n := f.Size()
	up := make([]bool, n+1)
	for _, i := range ideal {
		if i < 1 || i > n {
			return Matching{}, fmt.Errorf("snake: matching of an ideal with tile %d: tiles are 1 to %d: %w", i, n, ErrNoTile)
		}
		up[i] = true
	}
	for lower, upper := range f.Relations() {
		if up[upper] && !up[lower] {
			return Matching{}, fmt.Errorf("snake: matching of an ideal with tile %d but not with tile %d below it: %w", upper, lower, ErrNotMatching)
		}
	}
	return makeMatching(n, func(i int) bool { return up[i] }), nil
}
