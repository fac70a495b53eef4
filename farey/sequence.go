package farey

import (
	"fmt"
	"iter"
)

// Sequence returns the Farey sequence of order n: the slopes from 0/1 to 1/1 with
// denominator at most n, increasing. It has 1 + Σ φ(k), k ≤ n, slopes, about
// 0.304·n².
//
// The iterator can be used again and stopped anywhere; it needs constant memory and
// one division for each slope. It fails with [ErrBound] unless n ≥ 1.
func Sequence(n int64) (iter.Seq[Slope], error) {
	if n < 1 {
		return nil, fmt.Errorf("farey: Farey sequence of order %d: an order of at least 1 would be accepted: %w", n, ErrBound)
	}
	return func(yield func(Slope) bool) {
		climb(n, n, func(p, q int64) bool {
			return p <= q && yield(fromCoprimeInts(p, q))
		})
	}, nil
}

// Box returns all slopes p/q with |p| ≤ maxNum and q ≤ maxDen, increasing, with 1/0
// last (if maxNum ≥ 1). There are about 1.216·maxNum·maxDen of them.
//
// The iterator can be used again and stopped anywhere; it needs constant memory and
// two divisions for each slope. It fails with [ErrBound] for a negative bound.
func Box(maxNum, maxDen int64) (iter.Seq[Slope], error) {
	if maxNum < 0 || maxDen < 0 {
		return nil, fmt.Errorf("farey: slopes with numerators up to %d and denominators up to %d: bounds of at least 0 would be accepted: %w", maxNum, maxDen, ErrBound)
	}
	return func(yield func(Slope) bool) {
		// Turned upside down, q/p climbs from 0 while p/q falls from infinity: that is
		// the negative half, increasing.
		more := true
		climb(maxDen, maxNum, func(q, p int64) bool {
			if p > 0 && q > 0 {
				more = yield(fromCoprimeInts(-p, q))
			}
			return more
		})
		if more {
			climb(maxNum, maxDen, func(p, q int64) bool { return yield(fromCoprimeInts(p, q)) })
		}
	}, nil
}

// climb yields p, q for all slopes p/q ≥ 0 with p ≤ m and q ≤ n, increasing, until
// yield returns false.
//
// Both bounds only grow from parent to child in the tree of mediants, so consecutive
// slopes of the box are neighbours; as vectors, the next after a, b is k·b − a with
// the greatest k that stays within the bounds.
func climb(m, n int64, yield func(p, q int64) bool) {
	a, b := [2]uint64{0, 1}, [2]uint64{1, uint64(n)}
	if n > 0 && !yield(0, 1) || m == 0 {
		return
	}
	for yield(int64(b[0]), int64(b[1])) && b[1] > 0 {
		k := (uint64(n) + a[1]) / b[1]
		if kp := (uint64(m) + a[0]) / b[0]; kp < k {
			k = kp
		}
		a, b = b, [2]uint64{k*b[0] - a[0], k*b[1] - a[1]}
	}
}
