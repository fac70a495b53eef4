package farey

import "fmt"

// Triangle is a Farey triangle: three slopes, each a neighbour of the other two, one
// of each class. The zero value is the base triangle {0/1, 1/0, 1/1}.
type Triangle struct {
	// vertices by class; all zero for the base triangle (0/1 is no slope of class
	// Infinity, so nothing else looks like that).
	vertices [3]Slope
}

// NewTriangle returns the triangle with the three slopes as vertices, in any order.
// It fails with [ErrNotNeighbours] unless all three are neighbours of each other.
func NewTriangle(a, b, c Slope) (Triangle, error) {
	if !Neighbours(a, b) || !Neighbours(b, c) || !Neighbours(c, a) {
		return Triangle{}, fmt.Errorf("farey: triangle of %v, %v and %v: three slopes of determinants 1 or −1 would be accepted: %w", a, b, c, ErrNotNeighbours)
	}
	return triangleOf(a, b, c), nil
}

// triangleOf makes a triangle from mutual neighbours.
func triangleOf(a, b, c Slope) Triangle {
	if a.IsBase() && b.IsBase() && c.IsBase() {
		return Triangle{}
	}
	var t Triangle
	for _, s := range []Slope{a, b, c} {
		t.vertices[s.Class()] = s
	}
	return t
}

// IsBase reports whether t is the base triangle.
func (t Triangle) IsBase() bool { return t.vertices[Infinity].Equal(Slope{}) }

// Vertex returns the vertex of class c.
func (t Triangle) Vertex(c Class) Slope {
	if t.IsBase() {
		return c.Slope()
	}
	return t.vertices[c.orZero()]
}

// Flip returns the triangle with the vertex of class c replaced by the other common
// neighbour of the two vertices kept. Flipping twice gives t again.
func (t Triangle) Flip(c Class) Triangle {
	c = c.orZero()
	u, w := t.Vertex((c+1)%3), t.Vertex((c+2)%3)
	// The common neighbours of u and w are u + w and u − w as vectors.
	flipped := addVectors(u, 1, w)
	if flipped.Equal(t.Vertex(c)) {
		flipped = addVectors(u, -1, w)
	}
	return triangleOf(flipped, u, w)
}

// Newest returns the class of the vertex that the shortest path from the base
// triangle created last: the mediant of the other two. For the base triangle ok is
// false and the class Zero.
func (t Triangle) Newest() (c Class, ok bool) {
	if t.IsBase() {
		return Zero, false
	}
	// On each side of 0/1 the sum |p| + q adds up under mediants.
	newest := Zero
	for _, d := range []Class{Infinity, One} {
		if taller(t.vertices[d], t.vertices[newest]) {
			newest = d
		}
	}
	return newest, true
}

// taller reports whether |p| + q is greater for s than for t.
func taller(s, t Slope) bool {
	if s.large == nil && t.large == nil {
		return uint64(abs(s.p))+uint64(s.below+1) > uint64(abs(t.p))+uint64(t.below+1)
	}
	p, q := s.terms()
	p2, q2 := t.terms()
	h := combine(int64(p.Sign()), p, 1, q)
	return h.Cmp(combine(int64(p2.Sign()), p2, 1, q2)) > 0
}

// Equal reports whether t and u have the same vertices.
func (t Triangle) Equal(u Triangle) bool {
	for c := Zero; c <= One; c++ {
		if !t.vertices[c].Equal(u.vertices[c]) {
			return false
		}
	}
	return true
}

// String returns the vertices whole, by class: "{0/1, 1/2, 1/1}".
func (t Triangle) String() string {
	return fmt.Sprintf("{%s, %s, %s}", t.Vertex(Zero), t.Vertex(Infinity), t.Vertex(One))
}

// Format implements [fmt.Formatter]: %s prints the triangle whole, %v with long terms
// shortened as for [Slope.Format].
func (t Triangle) Format(f fmt.State, verb rune) {
	formatText(f, verb, "farey.Triangle", t.String, t.short)
}

// short returns the text of the triangle with long terms shortened.
func (t Triangle) short() string {
	return fmt.Sprintf("{%v, %v, %v}", t.Vertex(Zero), t.Vertex(Infinity), t.Vertex(One))
}
