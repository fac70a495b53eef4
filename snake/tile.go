package snake

import (
	"fmt"
	"iter"
)

// Tile is one square of a snake graph as it lies in the lattice.
type Tile struct {
	Index    int       // 1 … Tiles()
	At       Point     // its south-west corner
	In, Out  Direction // how the chain comes in and goes on; straight on where the chain ends
	Diagonal Label     // label of its diagonal, which runs from north-west to south-east
}

// Corners returns the four corners, counter-clockwise from the south-west one.
func (t Tile) Corners() [4]Point {
	x, y := t.At.X, t.At.Y
	return [4]Point{{x, y}, {x + 1, y}, {x + 1, y + 1}, {x, y + 1}}
}

// Ends returns the end points of the side on a face, the lower or left one first.
func (t Tile) Ends(f Face) (Point, Point) {
	c := t.Corners()
	switch f & 3 {
	case South:
		return c[0], c[1]
	case East:
		return c[1], c[2]
	case North:
		return c[3], c[2]
	default:
		return c[0], c[3]
	}
}

// walk yields the tiles in order.
func (s *shape) walk() iter.Seq[Tile] {
	return func(yield func(Tile) bool) {
		if s == nil {
			return
		}
		at := Point{}
		for i := 1; i <= s.n; i++ {
			if !yield(Tile{i, at, s.dir[i-1], s.dir[i], s.diagonal(i)}) {
				return
			}
			if s.dir[i] == Right {
				at.X++
			} else {
				at.Y++
			}
		}
	}
}

// AllTiles yields the tiles from the first to the last. It can be run again.
// A graph of more than [MaxTiles] tiles yields nothing.
func (g Graph) AllTiles() iter.Seq[Tile] {
	s, _ := g.layout("tiles", MaxTiles)
	return s.walk()
}

// AllTiles yields the tiles from the first to the last, as they lie when the
// band is cut between the last and the first. It can be run again. A band of
// more than [MaxTiles] tiles yields nothing.
func (b Band) AllTiles() iter.Seq[Tile] {
	s, _ := b.layout("tiles", MaxTiles)
	return s.walk()
}

// Edges yields the edges of the graph, each once, tile by tile: of every tile
// those of south, east, north and west that the tile before does not have. It
// can be run again. A graph of more than [MaxTiles] tiles yields nothing.
// A graph of n tiles has 3n + 1 edges and 2n + 2 vertices.
func (g Graph) Edges() iter.Seq[Side] {
	t, err := g.Set()
	if err != nil {
		return func(func(Side) bool) {}
	}
	return t.edges()
}

// Edges yields the edges of the band, 3n for n tiles, each once; the glue
// between the last tile and the first belongs to the last. It can be run again.
// A band of more than [MaxTiles] tiles yields nothing.
func (b Band) Edges() iter.Seq[Side] {
	t, err := b.Set()
	if err != nil {
		return func(func(Side) bool) {}
	}
	return t.edges()
}

// edges yields the edges of the set's graph, each once.
func (t Set) edges() iter.Seq[Side] {
	return func(yield func(Side) bool) {
		if t.s == nil {
			if !t.none {
				yield(t.side)
			}
			return
		}
		for i := 1; i <= t.s.n; i++ {
			for f := South; f <= West; f++ {
				if e := t.s.side(i, f); e.Tile == i && e.Face == f && !yield(e) {
					return
				}
			}
		}
	}
}

// Side returns the edge on a face of a tile, named and labelled as the graph
// does it. Any face of tile 0 names the edge of the single edge graph.
//
// It returns [ErrNoTile] for a tile outside 1 … Tiles(), [ErrNoSide] for an
// unknown face, [ErrTooLong] past [MaxTiles] tiles.
func (g Graph) Side(tile int, f Face) (Side, error) {
	s, err := g.layout("edge", MaxTiles)
	switch {
	case err != nil:
		return Side{}, err
	case f > West:
		return Side{}, fmt.Errorf("snake: face %d of tile %d: faces are 0 to 3: %w", f, tile, ErrNoSide)
	case s == nil && tile == 0:
		return g.singleSide(), nil
	case s == nil:
		return Side{}, fmt.Errorf("snake: edge of tile %d of a single edge: only tile 0 is accepted: %w", tile, ErrNoTile)
	case tile < 1 || tile > s.n:
		return Side{}, fmt.Errorf("snake: edge of tile %d: tiles are 1 to %d: %w", tile, s.n, ErrNoTile)
	}
	return s.side(tile, f), nil
}
