package snake

import (
	"fmt"
	"iter"
)

// Hexagon is a pair of tiles that come from one crossing of a loop of weight 1:
// the crossing's own letter glued them ([Builder.GlueOwn]), and there is
// exactly one such letter. They can be drawn as one hexagon; its chord, the
// glue edge of the two, stays an edge of the graph: without it the number of
// matchings changes.
type Hexagon struct {
	First int   // index of its first tile; the second is the next one
	Chord Side  // the edge inside
	Label Label // label of the crossed loop
}

// Hexagons yields the hexagons of the graph in order. Graphs made from a word
// have none, since a word does not say which letters belong to one crossing.
// It can be run again.
func (g Graph) Hexagons() iter.Seq[Hexagon] { return g.s.hexagons() }

// Hexagons yields the hexagons of the band in order. It can be run again.
func (b Band) Hexagons() iter.Seq[Hexagon] { return b.s.hexagons() }

func (s *shape) hexagons() iter.Seq[Hexagon] {
	return func(yield func(Hexagon) bool) {
		if s == nil || s.lab == nil {
			return
		}
		own := func(i int) bool { return i >= 1 && i < s.n && s.lab.own[i-1] }
		for i := 1; i < s.n; i++ {
			if !own(i) || own(i-1) || own(i+1) {
				continue
			}
			if !yield(Hexagon{i, s.side(i, s.dir[i].exit()), s.diagonal(i)}) {
				return
			}
		}
	}
}

// String returns a form such as "tiles 3 and 4".
func (h Hexagon) String() string { return fmt.Sprintf("tiles %d and %d", h.First, h.First+1) }
