package snake

import (
	"fmt"
)

// Minimal returns the least matching of the lattice: no tile flipped, boundary
// edges only.
func (g Graph) Minimal() (Matching, error) { return g.extreme(false) }

// Maximal returns the greatest matching of the lattice: every tile flipped, the
// other boundary edges.
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
		return nil, fmt.Errorf("snake: edges of the matching %s on %s: %w", shorten(m.String()), tileCount(t.Tiles()), ErrNotMatching)
	}
	edges := make([]Side, 0, t.Tiles()+1)
	for e := range t.edgesOf(m) {
		edges = append(edges, e)
	}
	return edges, nil
}
