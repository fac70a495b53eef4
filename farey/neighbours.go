package farey

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Det returns the determinant p·q' − p'·q of s = p/q and t = p'/q'. It is negative
// exactly when s < t. Cost: two multiplications.
func Det(s, t Slope) *big.Int {
	p, q := s.terms()
	p2, q2 := t.terms()
	left := contfrac.Product(p, q2)
	return left.Sub(left, contfrac.Product(p2, q))
}

// Neighbours reports whether s and t are Farey neighbours: determinant 1 or −1.
func Neighbours(s, t Slope) bool {
	if p, q, ok := s.Int64s(); ok {
		if p2, q2, ok := t.Int64s(); ok {
			// Modulo 2⁶⁴ first: this settles nearly all pairs without big integers.
			if d := p*q2 - p2*q; d != 1 && d != -1 {
				return false
			}
		}
	}
	return Det(s, t).CmpAbs(big.NewInt(1)) == 0
}

// Mediant returns (p + p')/(q + q') for neighbours s = p/q and t = p'/q'. 1/0 counts
// as −1/0 beside a negative slope, so that the mediant of 1/0 and −1/1 is −2/1: of
// the two slopes that complete s and t to a triangle, the mediant is the one farther
// from the base triangle (of 0/1 and 1/0, it is 1/1). It fails with
// [ErrNotNeighbours] if s and t are not neighbours.
func Mediant(s, t Slope) (Slope, error) {
	if !Neighbours(s, t) {
		return Slope{}, fmt.Errorf("farey: mediant of %v and %v: two slopes of determinant 1 or −1 would be accepted: %w", s, t, ErrNotNeighbours)
	}
	switch {
	case s.IsInfinite() && t.Sign() < 0:
		return addVectors(t, -1, s), nil
	case t.IsInfinite() && s.Sign() < 0:
		return addVectors(s, -1, t), nil
	default:
		return addVectors(s, 1, t), nil
	}
}

// Parents returns the two neighbours whose [Mediant] is s, a below and b above it:
// a < s < b, where 1/0 as a parent of a negative slope counts as −1/0, below. (Those of
// −1/1 are 1/0 and 0/1, although the mediant of these is 1/1.) It fails with
// [ErrBaseSlope] for 0/1, 1/0 and 1/1, which have none. Cost: as [Slope.Path], and as
// [Path.Edge].
func (s Slope) Parents() (a, b Slope, err error) {
	if s.IsBase() {
		return Slope{}, Slope{}, fmt.Errorf("farey: parents of %v: any slope but 0/1, 1/0 and 1/1 would be accepted: %w", s, ErrBaseSlope)
	}
	a, b, _ = s.Path().Edge()
	return a, b, nil
}
