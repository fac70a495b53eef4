package farey

import (
	"fmt"
	"iter"
	"math/big"
)

// Crossing is one edge met by an arc in the triangulation of the plane by all lattice
// segments of slopes 0/1, 1/0 and 1/1.
type Crossing struct {
	// Class is the class of the crossed edge: Zero for a horizontal one, Infinity for
	// a vertical one, One for a diagonal.
	Class Class
	// Left and Right are the end points of the crossed edge on the two sides of the
	// arc, seen walking from (0, 0) to (q, p).
	Left, Right Point
	// Nearer is the side whose end point is nearer to the crossing; Middle for the
	// crossing half way along the arc, and for no other.
	Nearer Side
	// Turn is the side of the end point that this edge shares with the next one
	// crossed; Middle for the last crossing.
	Turn Side
}

// MaxCorridorTerm is the greatest |p| and q of a slope that [Slope.Crossings] follows.
// The points met have coordinates of at most that size, and offsets of at most twice
// it, so everything stays within an int64.
const MaxCorridorTerm int64 = 1<<62 - 1

// Crossings returns the edges crossed by the arc from (0, 0) to (q, p), in order: the
// corridor of the slope. There are |p| − 1 horizontal, q − 1 vertical and |q − p| − 1
// diagonal ones, an odd total; the base slopes cross nothing. The half turn about the
// middle of the arc takes crossing i of n to crossing n+1−i, and left to right.
//
// The iterator can be used again and stopped anywhere; it needs constant memory and a
// few additions for each crossing, no division. It fails with [ErrTooLarge] if |p| or
// q is past [MaxCorridorTerm].
func (s Slope) Crossings() (iter.Seq[Crossing], error) {
	p, q, ok := s.Int64s()
	if !ok || abs(p) > MaxCorridorTerm || q > MaxCorridorTerm {
		return nil, fmt.Errorf("farey: crossings of the arc of slope %v: terms up to %d would be accepted: %w", s, MaxCorridorTerm, ErrTooLarge)
	}
	return func(yield func(Crossing) bool) {
		if s.IsBase() {
			return
		}
		walk(p, q, yield)
	}, nil
}

// walk passes from triangle to triangle along the arc to (q, p), not a base slope.
func walk(p, q int64, yield func(Crossing) bool) {
	var behind, left, right Point
	switch {
	case p < 0:
		left, right = Point{1, 0}, Point{0, -1}
	case p < q:
		left, right = Point{1, 1}, Point{1, 0}
	default:
		left, right = Point{0, 1}, Point{1, 1}
	}
	// offset(v) = q·y − p·x is positive to the left of the arc, and proportional to the
	// distance from its line. It is linear, so it is carried along, and bounded by the
	// offset |p|, q or |q − p| of an edge.
	offset := func(v Point) int64 { return q*v.Y - p*v.X }
	var offBehind int64
	offLeft, offRight := offset(left), offset(right)
	for {
		crossing := Crossing{Class: left.Sub(right).Class(), Left: left, Right: right}
		switch sum := offLeft + offRight; { // of opposite signs
		case sum < 0:
			crossing.Nearer = Left
		case sum > 0:
			crossing.Nearer = Right
		}
		// The triangle ahead is the one behind, turned half round about the middle of
		// the edge.
		apex := left.Add(right).Sub(behind)
		offApex := offLeft + offRight - offBehind
		switch {
		case offApex > 0: // the next edge is from apex to right
			crossing.Turn = Right
			behind, offBehind = left, offLeft
			left, offLeft = apex, offApex
		case offApex < 0:
			crossing.Turn = Left
			behind, offBehind = right, offRight
			right, offRight = apex, offApex
		default: // the end point
			yield(crossing)
			return
		}
		if !yield(crossing) {
			return
		}
	}
}

// CrossingCounts returns how many edges of each class the arc of the slope crosses:
// |p| − 1 of class Zero, q − 1 of class Infinity and |q − p| − 1 of class One; none
// for the base slopes. Slopes of any size.
func (s Slope) CrossingCounts() [3]*big.Int {
	counts := [3]*big.Int{new(big.Int), new(big.Int), new(big.Int)}
	if s.IsBase() {
		return counts
	}
	p, q := s.terms()
	one := big.NewInt(1)
	counts[Zero].Sub(counts[Zero].Abs(p), one)
	counts[Infinity].Sub(q, one)
	counts[One].Sub(counts[One].Abs(counts[One].Sub(q, p)), one)
	return counts
}
