package snake

import (
	"fmt"
	"iter"
	"math/big"
)

// Set is a set of perfect matchings of one graph or band: all of them, or those
// with given tiles flipped or not and given edges used or not. It is never
// written out: counting, listing, ranking and sampling work on its description.
//
// A Set is immutable and safe for concurrent use. The zero value is the set of
// the single edge's one matching.
type Set struct {
	s     *shape  // nil for the single edge
	side  Side    // the single edge itself, when s is nil
	none  bool    // a restriction has emptied it for good
	allow []uint8 // allow[i−1]: mask of the steps allowed at tile i; nil for all
	end   uint8   // mask of the end states that an open chain may not end in
	table *completions
}

// Set returns the set of all perfect matchings. It returns [ErrTooLong] past
// [MaxTiles] tiles.
func (g Graph) Set() (Set, error) {
	s, err := g.layout("matchings", MaxTiles)
	if err != nil {
		return Set{}, err
	}
	return Set{s: s, side: g.singleSide(), table: new(completions)}, nil
}

// Tiles returns the number of tiles of the graph.
func (t Set) Tiles() int {
	if t.s == nil {
		return 0
	}
	return t.s.n
}

// ends is the mask of allowed end states.
func (t Set) ends() uint8 { return allEnds &^ t.end }

// mask is the mask of allowed steps of a tile.
func (t Set) mask(tile int) uint8 {
	if t.allow == nil {
		return allSteps
	}
	return t.allow[tile-1]
}

// only returns the set with the steps of one tile limited to those that a test
// accepts.
func (t Set) only(tile int, accept func(step) bool) Set {
	allow := make([]uint8, t.s.n)
	for i := range allow {
		allow[i] = t.mask(i + 1)
	}
	for k, st := range t.s.at(tile) {
		if !accept(st) {
			allow[tile-1] &^= 1 << k
		}
	}
	t.allow, t.table = allow, new(completions)
	return t
}

// WithTile returns the matchings of the set in which a tile is flipped, or is
// not flipped. It returns [ErrNoTile] for a tile outside 1 … Tiles().
// Cost: O(tiles).
func (t Set) WithTile(tile int, up bool) (Set, error) {
	if tile < 1 || tile > t.Tiles() {
		return Set{}, fmt.Errorf("snake: matchings by tile %d: tiles are 1 to %d: %w", tile, t.Tiles(), ErrNoTile)
	}
	return t.only(tile, func(st step) bool { return flipped(tile, st.vertical) == up }), nil
}

// WithEdge returns the matchings of the set that use an edge, or do not use
// it. It returns [ErrNoTile] or [ErrNoSide] when the graph has no such edge.
// Cost: O(tiles).
func (t Set) WithEdge(e Side, used bool) (Set, error) {
	if e.Face > West {
		return Set{}, fmt.Errorf("snake: matchings by face %d of tile %d: faces are 0 to 3: %w", e.Face, e.Tile, ErrNoSide)
	}
	if t.s == nil {
		if e.Tile != 0 {
			return Set{}, fmt.Errorf("snake: matchings by edge of tile %d of a single edge: only tile 0 is accepted: %w", e.Tile, ErrNoTile)
		}
		t.none = t.none || !used
		return t, nil
	}
	if e.Tile < 1 || e.Tile > t.s.n {
		return Set{}, fmt.Errorf("snake: matchings by edge of tile %d: tiles are 1 to %d: %w", e.Tile, t.s.n, ErrNoTile)
	}
	e = t.s.side(e.Tile, e.Face)
	switch {
	case e.Face != t.s.dir[e.Tile].exit():
		face := e.Face
		if face == t.s.dir[e.Tile-1].entry() && e.Tile == 1 {
			return t.only(1, func(st step) bool { return st.entry == used }), nil
		}
		return t.only(e.Tile, func(st step) bool { return st.takes(face) == used }), nil
	case e.Tile < t.s.n:
		return t.only(e.Tile+1, func(st step) bool { return st.entry == used }), nil
	case t.s.closed:
		return t.only(1, func(st step) bool { return st.entry == used }), nil
	}
	// The last exit edge is used exactly when its end vertices are still free.
	if used {
		t.end |= 1 << covered
	} else {
		t.end |= 1 << free
	}
	t.table = new(completions)
	return t, nil
}

// takes reports whether a step takes a side other than the entry edge.
func (st step) takes(f Face) bool {
	for _, x := range st.sides[:st.n] {
		if x == f {
			return true
		}
	}
	return false
}

// Count returns the number of matchings in the set, by a balanced product of
// transfer matrices.
func (t Set) Count() *big.Int {
	switch {
	case t.none:
		return new(big.Int)
	case t.s == nil:
		return big.NewInt(1)
	}
	return t.s.count(t.allow, t.ends())
}

// Contains reports whether a matching belongs to the set. Cost: O(tiles).
func (t Set) Contains(m Matching) bool {
	if m.n != t.Tiles() || t.none {
		return false
	}
	if t.s == nil {
		return true
	}
	start := free
	if t.s.closed {
		start = t.s.after(t.s.n, m.Flipped(t.s.n))
	}
	end, ok := t.pass(m, start, nil)
	return ok && (t.s.closed || t.ends()&(1<<end) != 0)
}

// pass follows a matching through the tiles from a start state by allowed
// steps, tells the edges it takes, and returns the state at the end, or false
// when no step fits.
func (t Set) pass(m Matching, at state, take func(Side) bool) (state, bool) {
tiles:
	for i := 1; i <= t.s.n; i++ {
		up, mask := m.Flipped(i), t.mask(i)
		for k, st := range t.s.at(i) {
			if st.from != at || flipped(i, st.vertical) != up || mask&(1<<k) == 0 {
				continue
			}
			if take != nil {
				if st.entry && !take(t.s.side(i, t.s.dir[i-1].entry())) {
					return at, false
				}
				for _, f := range st.sides[:st.n] {
					if !take(t.s.side(i, f)) {
						return at, false
					}
				}
			}
			at = st.to
			continue tiles
		}
		return at, false
	}
	return at, true
}

// edgesOf yields the edges of a matching of the set's graph.
func (t Set) edgesOf(m Matching) iter.Seq[Side] {
	return func(yield func(Side) bool) {
		if t.s == nil {
			yield(t.side)
			return
		}
		start := free
		if t.s.closed {
			start = t.s.after(t.s.n, m.Flipped(t.s.n))
		}
		if end, ok := t.pass(m, start, yield); ok && end == free && !t.s.closed {
			yield(t.s.side(t.s.n, t.s.dir[t.s.n].exit()))
		}
	}
}
