package markov

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// FromIndex returns the lattice slope that the index p/q in [0, 1] stands for:
// p/(p+q), in [0, 1/2]. It increases with the index. An index outside [0, 1] is
// ErrIndex. Cost: one greatest common divisor.
func FromIndex(index farey.Slope) (lattice farey.Slope, err error) {
	if err := checkIndex(index); err != nil {
		return farey.Slope{}, err
	}
	q := index.Den()
	return farey.New(index.Num(), q.Add(q, index.Num()))
}

// Index returns the index of the lattice slope p/q in [0, 1/2]: p/(q−p), in [0, 1].
// It undoes FromIndex.
//
// Any other lattice slope is ErrNoIndex. Its number stands at a lattice slope in
// [0, 1/2] too: Index(Family().Representative(lattice)) is the index for every
// lattice slope. Cost: one greatest common divisor.
func Index(lattice farey.Slope) (index farey.Slope, err error) {
	if lo, hi, _ := Family().Domain(); lattice.Cmp(lo) < 0 || lattice.Cmp(hi) > 0 {
		return farey.Slope{}, fmt.Errorf("markov: index of lattice slope %v: its number has the lattice slope %v too, which would be accepted: %w",
			lattice, Family().Representative(lattice), ErrNoIndex)
	}
	q := lattice.Den()
	return farey.New(lattice.Num(), q.Sub(q, lattice.Num()))
}

// Point returns the lattice point (q, p) of the index p/q in [0, 1]: a primitive
// point with 0 ≤ p ≤ q. An index outside [0, 1] is ErrIndex.
func Point(index farey.Slope) (q, p *big.Int, err error) {
	if err := checkIndex(index); err != nil {
		return nil, nil, err
	}
	return index.Den(), index.Num(), nil
}

// IndexAt returns the index p/q of the primitive lattice point (q, p) with
// 0 ≤ p ≤ q. It undoes Point. Another primitive point, or a nil coordinate, is ErrIndex;
// a point that is not primitive, (0, 0) included, is ErrNotPrimitive.
func IndexAt(q, p *big.Int) (index farey.Slope, err error) {
	refuse := func(err error) (farey.Slope, error) {
		return farey.Slope{}, fmt.Errorf("markov: index of the lattice point (%s, %s): coprime q and p with 0 ≤ p ≤ q would be accepted: %w",
			contfrac.Abbreviate(q), contfrac.Abbreviate(p), err)
	}
	if q == nil || p == nil {
		return refuse(ErrIndex)
	}
	if q.Sign() == 0 && p.Sign() == 0 {
		return refuse(ErrNotPrimitive)
	}
	index, err = farey.New(p, q)
	if err != nil {
		return refuse(err) // not reached: neither nil nor 0/0
	}
	if index.Num().CmpAbs(p) != 0 || index.Den().CmpAbs(q) != 0 {
		return refuse(ErrNotPrimitive)
	}
	// Of the primitive points on one line, (q, p) and (−q, −p), q > 0 has the index.
	if q.Sign() <= 0 || checkIndex(index) != nil {
		return refuse(ErrIndex)
	}
	return index, nil
}

func checkIndex(index farey.Slope) error {
	if index.Sign() < 0 || index.Cmp(farey.One.Slope()) > 0 {
		return fmt.Errorf("markov: index %v: a slope from 0/1 to 1/1 would be accepted: %w", index, ErrIndex)
	}
	return nil
}
