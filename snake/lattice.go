package snake

import (
	"fmt"
)

// Meet returns the greatest matching below both: the tiles flipped in both. It
// returns [ErrNotMatching] when they have different numbers of tiles.
func (m Matching) Meet(o Matching) (Matching, error) {
	if m.n != o.n {
		return Matching{}, unlike(m, o)
	}
	return m.combine(o, func(a, b byte) byte { return a & b }, m.head&o.head), nil
}

// Join returns the least matching above both: the tiles flipped in either. It
// returns [ErrNotMatching] when they have different numbers of tiles.
func (m Matching) Join(o Matching) (Matching, error) {
	if m.n != o.n {
		return Matching{}, unlike(m, o)
	}
	return m.combine(o, func(a, b byte) byte { return a | b }, m.head|o.head), nil
}

func (m Matching) combine(o Matching, f func(a, b byte) byte, head uint64) Matching {
	r := Matching{n: m.n, head: head}
	if m.rest != "" {
		rest := make([]byte, len(m.rest))
		for i := range rest {
			rest[i] = f(m.rest[i], o.rest[i])
		}
		r.rest = string(rest)
	}
	return r
}

func unlike(m, o Matching) error {
	return fmt.Errorf("snake: meet or join of matchings of %s and of %s: they must be of one graph: %w", tileCount(m.n), tileCount(o.n), ErrNotMatching)
}

// Below reports whether m ≤ o in the lattice: every tile flipped in m is
// flipped in o. It is false when they have different numbers of tiles.
func (m Matching) Below(o Matching) bool {
	if m.n != o.n || m.head&^o.head != 0 {
		return false
	}
	for i := range len(m.rest) {
		if m.rest[i]&^o.rest[i] != 0 {
			return false
		}
	}
	return true
}

// FlippedTiles returns the flipped tiles in increasing order: the order ideal
// of the fence that belongs to the matching. [Fence.Matching] goes back.
func (m Matching) FlippedTiles() []int {
	tiles := make([]int, 0, m.Height())
	for i := 1; i <= m.n; i++ {
		if m.Flipped(i) {
			tiles = append(tiles, i)
		}
	}
	return tiles
}

// with returns the matching with one tile set.
func (m Matching) with(tile int, up bool) Matching {
	if tile <= headTiles {
		m.head &^= headBit(tile)
		if up {
			m.head |= headBit(tile)
		}
		return m
	}
	rest := []byte(m.rest)
	k := tile - headTiles - 1
	rest[k/8] &^= 0x80 >> (k % 8)
	if up {
		rest[k/8] |= 0x80 >> (k % 8)
	}
	m.rest = string(rest)
	return m
}

// Minimal returns the least matching of the lattice: no tile flipped, boundary
// edges only. It returns [ErrTooLong] past [MaxTiles] tiles.
func (g Graph) Minimal() (Matching, error) { return g.extreme(false) }

// Maximal returns the greatest matching of the lattice: every tile flipped, the
// other boundary edges. It returns [ErrTooLong] past [MaxTiles] tiles.
func (g Graph) Maximal() (Matching, error) { return g.extreme(true) }

func (g Graph) extreme(up bool) (Matching, error) {
	n := g.Tiles()
	if n > MaxTiles {
		return Matching{}, fmt.Errorf("snake: matching of %s: at most %d are accepted: %w", tileCount(n), MaxTiles, ErrTooLong)
	}
	return makeMatching(n, func(int) bool { return up }), nil
}

// Contains reports whether m is a perfect matching of the graph: it has one
// digit for each tile, and its flipped tiles are an order ideal of the fence.
func (g Graph) Contains(m Matching) bool {
	t, err := g.Set()
	return err == nil && t.Contains(m)
}

// EdgesOf returns the edges of a matching, n + 1 for n tiles, in the order of
// the chain. It returns [ErrNotMatching] when m is no matching of the graph.
func (g Graph) EdgesOf(m Matching) ([]Side, error) {
	t, err := g.Set()
	if err != nil {
		return nil, err
	}
	return t.EdgesOf(m)
}

// EdgesOf returns the edges of a matching of the set, in the order of the
// chain. It returns [ErrNotMatching] when m does not belong to the set.
func (t Set) EdgesOf(m Matching) ([]Side, error) {
	if !t.Contains(m) {
		return nil, notIn("edges", m, t)
	}
	edges := make([]Side, 0, t.Tiles()+1)
	for e := range t.edgesOf(m) {
		edges = append(edges, e)
	}
	return edges, nil
}

// Flips returns the tiles of a matching that have two opposite edges in it and
// can be flipped within the set, in increasing order: those that are not
// flipped go up, the others down. It returns [ErrNotMatching] when m does not
// belong to the set. Cost: O(tiles) for all of them together.
func (t Set) Flips(m Matching) ([]int, error) {
	if !t.Contains(m) {
		return nil, notIn("flips", m, t)
	}
	var tiles []int
	for i := 1; i <= t.Tiles(); i++ {
		if t.mayFlip(m, i) {
			tiles = append(tiles, i)
		}
	}
	return tiles, nil
}

// Flip returns the matching with one tile flipped, up or down. It returns
// [ErrNoTile] for a tile outside 1 … Tiles(), and [ErrNotMatching] when m does
// not belong to the set or the result does not.
func (t Set) Flip(m Matching, tile int) (Matching, error) {
	if tile < 1 || tile > t.Tiles() {
		return Matching{}, fmt.Errorf("snake: flip of tile %d: tiles are 1 to %d: %w", tile, t.Tiles(), ErrNoTile)
	}
	if !t.Contains(m) {
		return Matching{}, notIn("flip", m, t)
	}
	if !t.mayFlip(m, tile) {
		return Matching{}, fmt.Errorf("snake: flip of tile %d in %s: it leads out of the set: %w", tile, shorten(m.String()), ErrNotMatching)
	}
	return m.with(tile, !m.Flipped(tile)), nil
}

// mayFlip reports whether a matching of the set stays in it when one tile is
// flipped. Only the steps at that tile and at the next one change.
func (t Set) mayFlip(m Matching, tile int) bool {
	s, up := t.s, !m.Flipped(tile)
	before := free
	switch {
	case tile > 1:
		before = s.after(tile-1, m.Flipped(tile-1))
	case s.closed:
		before = s.after(s.n, m.Flipped(s.n))
	}
	if !t.allows(tile, before, up) {
		return false
	}
	after := s.after(tile, up)
	switch {
	case tile < s.n:
		return t.allows(tile+1, after, m.Flipped(tile+1))
	case s.closed:
		return t.allows(1, after, m.Flipped(1))
	}
	return t.ends()&(1<<after) != 0
}

// allows reports whether the set has a step at a tile from a state with a flip.
func (t Set) allows(tile int, from state, up bool) bool {
	for k, st := range t.s.at(tile) {
		if st.from == from && flipped(tile, st.vertical) == up {
			return t.mask(tile)&(1<<k) != 0
		}
	}
	return false
}

// Minimal returns the least matching of the set, the first that [Set.All]
// yields: what [Set.WithTile] and [Set.WithEdge] leave over is closed under
// meet and join. It returns [ErrIndex] when the set is empty.
func (t Set) Minimal() (Matching, error) { return t.extreme(false) }

// Maximal returns the greatest matching of the set, the last that [Set.All]
// yields. It returns [ErrIndex] when the set is empty.
func (t Set) Maximal() (Matching, error) { return t.extreme(true) }

func (t Set) extreme(up bool) (Matching, error) {
	if count := t.small(); count != nil {
		if count.Sign() == 0 {
			return Matching{}, fmt.Errorf("snake: extreme matching of an empty set: %w", ErrIndex)
		}
		return Matching{}, nil
	}
	for _, first := range [2]bool{up, !up} {
		l := t.linksFor(first)
		if !l.possible {
			continue
		}
		at := first
		return makeMatching(t.s.n, func(i int) bool {
			if i > 1 {
				can := l.can[i-1] >> (2 * bit(at))
				at = can&(1<<bit(up)) != 0 == up
			}
			return at
		}), nil
	}
	return Matching{}, fmt.Errorf("snake: extreme matching of an empty set: %w", ErrIndex)
}
