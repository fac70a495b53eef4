package farey

import "fmt"

// Point is a point of the lattice Z², also used as a vector; the slope p/q is the
// vector {X: q, Y: p}.
type Point struct{ X, Y int64 }

// Add returns a + b. Sums past an int64 wrap.
func (a Point) Add(b Point) Point { return Point{a.X + b.X, a.Y + b.Y} }

// Sub returns the vector from b to a. Differences past an int64 wrap.
func (a Point) Sub(b Point) Point { return Point{a.X - b.X, a.Y - b.Y} }

// Class returns the class of a primitive vector, by the parity of its coordinates.
// A vector with both even is not primitive and gives Zero.
func (a Point) Class() Class { return classOf(uint(a.Y), uint(a.X)) }

// String returns "(x, y)".
func (a Point) String() string { return fmt.Sprintf("(%d, %d)", a.X, a.Y) }

// Side is a side of an arc walked from its start to its end. The zero value is Middle:
// neither side.
type Side uint8

// The sides.
const (
	Middle Side = iota
	Left
	Right
)

// Opposite returns the other side; Middle is its own opposite.
func (s Side) Opposite() Side {
	switch s {
	case Left:
		return Right
	case Right:
		return Left
	default:
		return s
	}
}

// String returns "middle", "left" or "right"; for what is no side, "Side(7)".
func (s Side) String() string {
	switch s {
	case Middle:
		return "middle"
	case Left:
		return "left"
	case Right:
		return "right"
	default:
		return fmt.Sprintf("Side(%d)", uint8(s))
	}
}
