package spectrum

import (
	"context"
	"errors"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// IdentifyRoot returns the slopes in Q ∪ {∞} with number n and root y modulo n (Root), increasing,
// 1/0 last: at most three, one between each two base slopes; none if there are none. For n = 1
// they are the base slopes. It decides this for all weights, without a search and without
// factoring n; see below.
//
// An n below 1 is ErrNotPositive. If n divides y² + k·y + 1 for no weight k of the family, or y is
// nil, the error is ErrNotRoot. When ctx ends first, it is that of ctx; when matrices on the way
// pass the limit of the family, ErrTooLarge.
//
// Why it is complete: let an arc with matrix [[y, N], [·, −k−y]] take up the interval from −(y +
// k)/N to −y/N. For A·B·C = P the upper right entries of A·D = P·B⁻¹ and D·B = A⁻¹·P, with D =
// B·C·B⁻¹, say that the interval of D begins N_B/(N_A·N_D) after that of A ends and ends
// N_A/(N_B·N_D) before that of B begins. So the intervals lie apart and in the order of the
// slopes, and those between two base slopes between two neighbouring integers. Hence −y/n modulo 1
// leaves one place in each of the three gaps, and at each triangle tells which side the arc lies
// on, until its own interval ends there: the continued fraction of n/y followed down the Farey
// tree.
//
// Cost: O(log p + log q) steps, each a few calls of f.Matrix with numbers up to about n.
func IdentifyRoot(ctx context.Context, f orbifold.Family, n, y *big.Int) ([]farey.Slope, error) {
	if n == nil || n.Sign() <= 0 {
		return nil, fmt.Errorf("spectrum: slopes of the root %s modulo %s: a modulus of at least 1 would be accepted: %w", short(y), short(n), ErrNotPositive)
	}
	if y == nil || !isRoot(f, n, y) {
		return nil, fmt.Errorf("spectrum: slopes of the root %s modulo %s in the family %v: n | y² + k·y + 1 for a weight k would be accepted: %w", short(y), short(n), f, ErrNotRoot)
	}
	var found []farey.Slope
	if n.BitLen() == 1 {
		// Numbers grow along every path, so 1 stands at the base slopes alone.
		return []farey.Slope{farey.Zero.Slope(), farey.One.Slope(), farey.Infinity.Slope()}, nil
	}
	for _, first := range []farey.Class{farey.One, farey.Infinity, farey.Zero} { // increasing
		t := target{f: f, n: n, place: placeOf(f, first, n, y)}
		s, ok, err := t.descend(ctx, first)
		if err != nil {
			return nil, fmt.Errorf("spectrum: slopes of the root %s modulo %s: %w", short(y), short(n), err)
		}
		if ok {
			found = append(found, s)
		}
	}
	return found, nil
}

// weights returns the different weights of the family.
func weights(f orbifold.Family) []int64 {
	all := []int64{f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One)}
	slices.Sort(all)
	return slices.Compact(all)
}

func isRoot(f orbifold.Family, n, y *big.Int) bool {
	for _, k := range weights(f) {
		// y(y + k) + 1
		v := new(big.Int).Add(y, big.NewInt(k))
		v = contfrac.Product(v, y)
		v.Add(v, big.NewInt(1))
		if v.Rem(v, n).Sign() == 0 {
			return true
		}
	}
	return false
}

// placeOf returns −n times the upper left entry that a matrix with number n and root y has between
// the base slopes of the path with the given first flip: n times the end of the interval.
func placeOf(f orbifold.Family, first farey.Class, n, y *big.Int) *big.Int {
	offset := new(big.Int)
	if first != farey.Infinity {
		offset.Add(offset, big.NewInt(1)).Add(offset, big.NewInt(f.Weight(farey.One)))
	}
	if first == farey.One {
		offset.Add(offset, big.NewInt(1)).Add(offset, big.NewInt(f.Weight(farey.Infinity)))
	}
	place := new(big.Int).Neg(y)
	place.Mod(place, n)
	return place.Add(place, offset.Mul(offset, n))
}

// target is what is looked for: the number n whose interval ends at place/n.
type target struct {
	f        orbifold.Family
	n, place *big.Int
}

// verdict says where the target lies, seen from an arc.
type verdict int

const (
	below   verdict = iota // at smaller slopes
	above                  // at greater slopes
	here                   // it is the arc
	nowhere                // neither there nor further down
)

// at compares the target with the arc of slope s.
func (t target) at(ctx context.Context, s farey.Slope) (verdict, error) {
	m, err := t.f.MatrixContext(ctx, s)
	if err != nil {
		// Numbers too large for the family may still be only the first that is larger than n.
		if lo, _, e := t.f.Bits(s); errors.Is(err, ErrTooLarge) && e == nil && lo.Cmp(big.NewInt(int64(t.n.BitLen()))) > 0 {
			return nowhere, nil
		}
		return nowhere, err
	}
	n, y := m.B(), m.A()
	size := n.Cmp(t.n)
	if size > 0 {
		return nowhere, nil
	}
	// place/n against −y/N. Both are in lowest terms, so equal places are equal numbers.
	order := contfrac.Product(t.place, n).Cmp(contfrac.Product(y.Neg(y), t.n))
	switch {
	case order == 0:
		return here, nil
	case size == 0:
		return nowhere, nil
	case order > 0:
		return above, nil
	}
	return below, nil // or within the interval, where no other arc ends
}

// descend looks for the target behind the first flip.
func (t target) descend(ctx context.Context, first farey.Class) (s farey.Slope, ok bool, err error) {
	var moves contfrac.WordBuilder
	after := func(l contfrac.Letter, n uint64) farey.Slope {
		var b contfrac.WordBuilder
		b.AppendWord(moves.Word())
		b.Append(l, n)
		s, _ := farey.NewPath(first, b.Word()).Slope()
		return s
	}
	s = after(contfrac.L, 0)
	v, err := t.at(ctx, s)
	for err == nil && (v == below || v == above) {
		// The run of turns to the same side is as long as the verdict is the same; lengths are
		// doubled, so that no number has much more than twice the bits of n, and then halved.
		l := contfrac.L
		if v == above {
			l = contfrac.R
		}
		side := v
		good, bad := uint64(0), uint64(1)
		for {
			if v, err = t.at(ctx, after(l, bad)); err != nil || v != side {
				break
			}
			good, bad = bad, 2*bad
		}
		for last := v; err == nil && bad-good > 1; {
			mid := good + (bad-good)/2
			if last, err = t.at(ctx, after(l, mid)); last == side {
				good = mid
			} else {
				bad, v = mid, last
			}
		}
		moves.Append(l, bad)
		s = after(l, 0)
	}
	return s, err == nil && v == here, err
}
