package farey

import (
	"bytes"
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Path is a shortest path in the tree of triangles, from the base triangle. The zero
// value stays there. Paths are comparable with ==.
//
// The first flip replaces the base vertex of class First. It crosses a base edge,
// taken as the ordered pair (A, B): (0/1, 1/1) for First = Infinity, (1/1, 1/0) for
// First = Zero and, through the negative slopes, (1/0, 0/1) for First = One, where A
// is −1/0 as a vector. The flip creates the mediant of A and B. From there on the
// state is an oriented edge (A, B) with a vertex C behind it, and each letter of Moves
// flips once more:
//
//	L: (A, B | C) becomes (A, A⊕B | B)
//	R: (A, B | C) becomes (A⊕B, B | A)
//
// so that L leads to smaller slopes and R to greater ones. The triangle of the path
// is {A, B, A⊕B} at its end, A⊕B the newest vertex.
type Path struct {
	// leaves tells that the path leaves the base triangle; else first and moves are
	// zero.
	leaves bool
	first  Class
	moves  contfrac.Word
}

// NewPath returns the path that flips the base vertex of class first and goes on by
// the moves.
func NewPath(first Class, moves contfrac.Word) Path {
	return Path{leaves: true, first: first.orZero(), moves: moves}
}

// Path returns the shortest path to a triangle that has the slope as a vertex; the
// slope is its newest vertex then. For the base slopes that is the path that stays.
//
// The runs of its moves are partial quotients of the slope, so that runs of any
// length are no more work than a division. Cost: one continued fraction expansion.
func (s Slope) Path() Path {
	if s.IsBase() {
		return Path{}
	}
	// In the base edge's coordinates s = a·A + b·B; the moves bring (a, b) to (1, 1) by
	// subtracting the lesser from the greater: L while a > b, R while a < b.
	if p, q, ok := s.Int64s(); ok {
		switch {
		case p < 0:
			return Path{true, One, euclid(uint64(-p), uint64(q))}
		case p < q:
			return Path{true, Infinity, euclid(uint64(q-p), uint64(p))}
		default:
			return Path{true, Zero, euclid(uint64(q), uint64(p-q))}
		}
	}
	p, q := s.terms()
	switch {
	case p.Sign() < 0:
		return Path{true, One, euclidBig(new(big.Int).Neg(p), q)}
	case p.Cmp(q) < 0:
		return Path{true, Infinity, euclidBig(new(big.Int).Sub(q, p), p)}
	default:
		return Path{true, Zero, euclidBig(q, new(big.Int).Sub(p, q))}
	}
}

// euclid returns the moves that take coprime positive (a, b) to (1, 1).
func euclid(a, b uint64) contfrac.Word {
	var moves contfrac.WordBuilder
	for letter := contfrac.L; ; letter = letter.Other() {
		quotient, rest := a/b, a%b
		if rest == 0 { // b = 1: the last quotient counts the step from (1, 1) to (0, 1) too
			moves.Append(letter, quotient-1)
			return moves.Word()
		}
		moves.Append(letter, quotient)
		a, b = b, rest
	}
}

// euclidBig is euclid for big integers, by way of the continued fraction of a/b.
func euclidBig(a, b *big.Int) contfrac.Word {
	fraction, _ := contfrac.FromRatio(a, b) // fails for 0/0 only
	quotients := fraction.Terms()
	last := quotients[len(quotients)-1]
	last.Sub(last, big.NewInt(1))
	var moves contfrac.WordBuilder
	letter := contfrac.L
	for _, quotient := range quotients {
		_ = moves.AppendBig(letter, quotient) // fails for negative lengths only
		letter = letter.Other()
	}
	return moves.Word()
}

// Path returns the shortest path from the base triangle to t.
func (t Triangle) Path() Path {
	newest, ok := t.Newest()
	if !ok {
		return Path{}
	}
	return t.vertices[newest].Path()
}

// IsBase reports whether the path stays at the base triangle.
func (p Path) IsBase() bool { return !p.leaves }

// First returns the class of the base vertex that the first flip replaces; Zero for
// the path that stays at the base triangle.
func (p Path) First() Class { return p.first }

// Moves returns the letters after the first flip; none for the path that stays at the
// base triangle.
func (p Path) Moves() contfrac.Word { return p.moves }

// Flips returns the classes of the vertices that the path flips, in order: First,
// then one for each letter of the moves. Flipping the base triangle by them leads to
// the path's triangle. The iterator can be used again and stopped anywhere; it takes
// constant time for each flip.
func (p Path) Flips() iter.Seq[Class] {
	return func(yield func(Class) bool) {
		if !p.leaves || !yield(p.first) {
			return
		}
		// Classes of the edge (a, b); the newest vertex, about to be kept, has the third.
		// First = Infinity starts from (Zero, One), Zero from (One, Infinity), One from
		// (Infinity, Zero).
		a, b := (p.first+2)%3, (p.first+1)%3
		for letter := range p.moves.Letters() {
			newest := a.Third(b)
			flipped := b
			if letter == contfrac.L {
				b = newest
			} else {
				flipped, a = a, newest
			}
			if !yield(flipped) {
				return
			}
		}
	}
}

// Edge returns the oriented edge (a, b) and the vertex c behind it at the end of the
// path: the triangle crossed last is {a, b, c}, and the path's triangle has the
// mediant of a and b in place of c. The path that stays at the base triangle has no such edge
// and gives 0/1, 1/1, 1/0.
//
// Cost: one product of as many matrices as the moves have runs, by a product tree.
func (p Path) Edge() (a, b, c Slope) {
	if !p.leaves {
		return Zero.Slope(), One.Slope(), Infinity.Slope()
	}
	va, vb := p.vectors()
	// One of A and B is the sum of the other and C.
	return va.slope(), vb.slope(), vb.minus(va).slope()
}

// Slope returns the newest vertex at the end of the path. For the path that stays at
// the base triangle ok is false and the slope 0/1. Cost: as [Path.Edge].
func (p Path) Slope() (s Slope, ok bool) {
	if !p.leaves {
		return Slope{}, false
	}
	a, b := p.vectors()
	return a.plus(b).slope(), true
}

// Triangle returns the triangle at the end of the path. Cost: as [Path.Edge].
func (p Path) Triangle() Triangle {
	if !p.leaves {
		return Triangle{}
	}
	a, b := p.vectors()
	return triangleOf(a.slope(), b.slope(), a.plus(b).slope())
}

// vector is p/q as a vector with its sign, where −1/0 differs from 1/0.
type vector struct{ p, q *big.Int }

func (v vector) plus(w vector) vector {
	return vector{new(big.Int).Add(v.p, w.p), new(big.Int).Add(v.q, w.q)}
}

func (v vector) minus(w vector) vector {
	return vector{new(big.Int).Sub(v.p, w.p), new(big.Int).Sub(v.q, w.q)}
}

// slope returns the slope of a primitive vector; it keeps v's numbers.
func (v vector) slope() Slope { return fromCoprime(v.p, v.q) }

// vectors returns A and B at the end of a path that leaves the base triangle.
func (p Path) vectors() (a, b vector) {
	// With A and B as columns, L multiplies by [[1, 1], [0, 1]] from the right and R by
	// its transpose: the matrices of the opposite letters.
	m := p.moves.Swap().Matrix()
	top, bottom := vector{m.A(), m.C()}, vector{m.B(), m.D()} // columns, in base coordinates
	change := func(v vector) vector {                         // v.p·A + v.q·B for the base edge
		switch p.first {
		case Infinity: // A = 0/1, B = 1/1
			return vector{v.q, new(big.Int).Add(v.p, v.q)}
		case Zero: // A = 1/1, B = 1/0
			return vector{new(big.Int).Add(v.p, v.q), v.p}
		default: // A = −1/0, B = 0/1
			return vector{new(big.Int).Neg(v.p), v.q}
		}
	}
	return change(top), change(bottom)
}

// basePathText is the text of the path that stays at the base triangle.
const basePathText = "base"

// String returns the path whole: "base", or the class of the vertex flipped first and
// the moves by runs, as "infinity: L2 R3" or "one:".
func (p Path) String() string { return p.text(p.moves.Compact()) }

// text puts the text of the moves into that of the path.
func (p Path) text(moves string) string {
	switch {
	case !p.leaves:
		return basePathText
	case moves == "":
		return p.first.String() + ":"
	default:
		return p.first.String() + ": " + moves
	}
}

// Format implements [fmt.Formatter]: %s prints the path whole, %v with moves of many
// runs or digits shortened; what is shortened is no text for [Path.UnmarshalText].
func (p Path) Format(f fmt.State, verb rune) {
	formatText(f, verb, "farey.Path", p.String, p.short)
}

// short returns the text of the path, with the moves shortened if long.
func (p Path) short() string {
	const manyRuns, manyBits = 16, 128
	if p.moves.NumRuns() <= manyRuns && p.moves.Len().BitLen() <= manyBits {
		return p.String()
	}
	return p.text(fmt.Sprintf("%v", p.moves))
}

// MarshalText returns the text of [Path.String].
func (p Path) MarshalText() ([]byte, error) { return []byte(p.String()), nil }

// UnmarshalText accepts exactly what [Path.String] prints, with moves within the
// limits of [contfrac.Word.UnmarshalText]. Otherwise it fails with [ErrSyntax] or
// [ErrTooLarge] and leaves p alone.
func (p *Path) UnmarshalText(text []byte) error {
	if string(text) == basePathText {
		*p = Path{}
		return nil
	}
	head, moves, ok := bytes.Cut(text, []byte(":"))
	if ok && len(moves) > 0 {
		moves, ok = bytes.CutPrefix(moves, []byte(" "))
		ok = ok && len(moves) > 0
	}
	var first Class
	if !ok || first.UnmarshalText(head) != nil {
		return fmt.Errorf(`farey: path %s: "base", or a class and moves like "infinity: L2 R3", would be accepted: %w`, quote(string(text)), ErrSyntax)
	}
	var word contfrac.Word
	if err := word.UnmarshalText(moves); err != nil {
		return fmt.Errorf("farey: moves of path %s: %w", quote(string(text)), err)
	}
	*p = NewPath(first, word)
	return nil
}
