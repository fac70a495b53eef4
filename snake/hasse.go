package snake

import (
	"fmt"
	"slices"
	"strings"
)

// Hasse is the graph of single flips between the matchings of a set, written
// out. For all matchings of a graph or band it is the Hasse diagram of their
// distributive lattice. It is immutable.
type Hasse struct {
	set   Set
	nodes []Matching
	arcs  []Arc
}

// Arc is a flip of one tile, from the matching with number Lower up to the one
// with number Upper.
type Arc struct{ Lower, Upper, Tile int }

// Hasse writes the flip graph of the set out. It returns a [*TooManyError] with
// the exact count when there are more than limit matchings, before any is
// listed. Cost: O(tiles) a matching.
func (t Set) Hasse(limit int) (Hasse, error) {
	count, err := t.within(limit)
	if err != nil {
		return Hasse{}, err
	}
	h := Hasse{set: t, nodes: make([]Matching, 0, count)}
	number := make(map[Matching]int, count)
	for m := range t.All() {
		number[m] = len(h.nodes)
		h.nodes = append(h.nodes, m)
	}
	for k, m := range h.nodes {
		for i := 1; i <= t.Tiles(); i++ {
			if !m.Flipped(i) && t.mayFlip(m, i) {
				h.arcs = append(h.arcs, Arc{k, number[m.with(i, true)], i})
			}
		}
	}
	return h, nil
}

// Nodes returns the matchings, numbered from 0 in the order of [Set.All].
func (h Hasse) Nodes() []Matching { return slices.Clone(h.nodes) }

// Arcs returns the flips by lower matching, then by tile.
func (h Hasse) Arcs() []Arc { return slices.Clone(h.arcs) }

// DOT returns the diagram in the DOT graph language, growing upwards: a node
// for each matching, named m0, m1, …, with its 0/1 string as label, and an edge
// for each flip, labelled with its tile.
func (h Hasse) DOT() string {
	var b strings.Builder
	b.WriteString("digraph matchings {\n  rankdir=BT;\n  node [shape=box, fontname=\"monospace\"];\n  edge [dir=none];\n")
	for k, m := range h.nodes {
		fmt.Fprintf(&b, "  m%d [label=\"%s\"];\n", k, m)
	}
	for _, a := range h.arcs {
		fmt.Fprintf(&b, "  m%d -> m%d [label=\"%d\"];\n", a.Lower, a.Upper, a.Tile)
	}
	for _, level := range h.levels() {
		b.WriteString("  { rank=same;")
		for _, k := range level {
			fmt.Fprintf(&b, " m%d;", k)
		}
		b.WriteString(" }\n")
	}
	b.WriteString("}\n")
	return b.String()
}

// levels groups the numbers of the matchings by height, lowest first.
func (h Hasse) levels() [][]int {
	if len(h.nodes) == 0 {
		return nil
	}
	levels := make([][]int, h.set.Tiles()+1)
	for k, m := range h.nodes {
		levels[m.Height()] = append(levels[m.Height()], k)
	}
	return slices.DeleteFunc(levels, func(l []int) bool { return len(l) == 0 })
}
