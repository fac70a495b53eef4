package snake

import "fmt"

// Label marks an edge or a diagonal with a class of the caller's own; the zero
// value [NoLabel] marks nothing.
type Label uint8

// NoLabel is the label of an edge or a diagonal that has none.
const NoLabel Label = 0

// Point is a lattice point.
type Point struct{ X, Y int }

// String returns "(x, y)".
func (p Point) String() string { return fmt.Sprintf("(%d, %d)", p.X, p.Y) }

// Direction is the way from one tile to the next.
type Direction uint8

// The two directions of a glue.
const (
	Right Direction = iota
	Up
)

// String returns "right" or "up".
func (d Direction) String() string {
	if d == Right {
		return "right"
	}
	return "up"
}

// entry is the face of a tile by which a glue in direction d comes in.
func (d Direction) entry() Face {
	if d == Right {
		return West
	}
	return South
}

// exit is the face of a tile by which a glue in direction d goes out.
func (d Direction) exit() Face {
	if d == Right {
		return East
	}
	return North
}

// Face names one of the four sides of a tile.
type Face uint8

// The four faces, counter-clockwise from the bottom.
const (
	South Face = iota
	East
	North
	West
)

// String returns "south", "east", "north" or "west".
func (f Face) String() string {
	return [4]string{"south", "east", "north", "west"}[f&3]
}

// Vertical reports whether the side runs up (east and west faces).
func (f Face) Vertical() bool { return f&1 == 1 }

// Side is an edge of a snake graph, named by a tile that has it. A glue edge
// belongs to two tiles; the graph itself names it by the earlier one, as that
// tile's east or north face, and accepts either name. The edge of the graph
// without tiles is the west face of tile 0.
type Side struct {
	Tile  int   // 1 … Tiles()
	Face  Face  // which side of that tile
	Label Label // its label; not part of the name, ignored where a Side is an argument
}

// String returns a form such as "3 north".
func (s Side) String() string { return fmt.Sprintf("%d %v", s.Tile, s.Face) }
