// Package farey holds slopes and the combinatorics of arcs between lattice
// points: classes, Farey triangles and flips, paths in the tree of triangles,
// the corridor of edges an arc crosses, Christoffel words, Farey sequences, and
// the six symmetries of the base triangle.
//
// # Notation
//
// A slope is p/q in lowest terms with q ≥ 0; 1/0 (infinity) and negative slopes
// are slopes too. It names the arc from the lattice point (0, 0) to (q, p), so as
// a vector it is written (q, p) in the plane and p/q on the line.
//
// The class of a slope is (p mod 2, q mod 2): [Zero], [Infinity] or [One], after
// the slopes 0/1, 1/0 and 1/1 that have it. Two slopes p/q and p'/q' are
// neighbours when |p·q' − p'·q| = 1; a triangle is three mutual neighbours, one of
// each class; the base triangle is {0/1, 1/0, 1/1}. A flip replaces one vertex of
// a triangle by the only other slope that is a neighbour of both the others, and
// keeps its class. Flips make the triangles a 3-regular tree, so each triangle has
// one shortest [Path] from the base triangle.
//
// # Values
//
// All types are immutable values, safe for concurrent use, exact at any size; zero
// values are the base objects (the slope 0/1, the base triangle, the path that
// stays there, the identity). Slopes whose terms fit an int64 are kept without any
// big integer. Methods return fresh *big.Int values and never modify or keep the
// ones they are given.
package farey
