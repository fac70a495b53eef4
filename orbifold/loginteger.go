package orbifold

import (
	"fmt"
	"math/big"
)

// LogInteger returns an enclosure lo ≤ ln n ≤ hi of the natural logarithm of
// n ≥ 1, with hi − lo ≤ 2^(1−bits); both ends are multiples of a power of two,
// so that no further rounding hides in them. An n below 1 is ErrNotPositive;
// bits outside 1 … MaxLogPrecision are ErrPrecision. Cost: that of a few
// products, square roots and quotients of the size of bits, whatever n.
func LogInteger(n *big.Int, bits uint) (lo, hi *big.Float, err error) {
	if n == nil || n.Sign() <= 0 {
		return nil, nil, fmt.Errorf("orbifold: logarithm of %s: %w", brief(n), ErrNotPositive)
	}
	if bits < 1 || bits > MaxLogPrecision {
		return nil, nil, fmt.Errorf("orbifold: logarithm with %d bits: want 1 … %d: %w", bits, MaxLogPrecision, ErrPrecision)
	}
	s := logInt(n, max(bits, 32), fixedPrecision(n, bits))
	return s.lo, s.hi, nil
}

// LogUnit returns an enclosure lo ≤ ln λ ≤ hi for the unit
// λ = (t + √(t²−4))/2 = exp(arccosh(t/2)) of the trace t ≥ 3, with
// hi − lo ≤ 2^(1−bits). For the trace of an arc it is half the length of its closed
// curve, and the arcs of the fan about it grow by the factor λ. A smaller t is
// ErrNotPositive (the unit is 1, or no real number); bits outside
// 1 … MaxLogPrecision are ErrPrecision.
func LogUnit(t *big.Int, bits uint) (lo, hi *big.Float, err error) {
	if t == nil || t.Cmp(big.NewInt(3)) < 0 {
		return nil, nil, fmt.Errorf("orbifold: unit of trace %s: want a trace of at least 3: %w", brief(t), ErrNotPositive)
	}
	if bits < 1 || bits > MaxLogPrecision {
		return nil, nil, fmt.Errorf("orbifold: logarithm with %d bits: want 1 … %d: %w", bits, MaxLogPrecision, ErrPrecision)
	}
	s := logUnit(t, max(bits, 32), fixedPrecision(t, bits))
	return s.lo, s.hi, nil
}

// fixedPrecision is a precision that holds logarithms of n, multiples of
// 2^−(bits+4) or of 2^−36, whole.
func fixedPrecision(n *big.Int, bits uint) uint {
	return max(bits, 32) + 8 + uint(big.NewInt(int64(n.BitLen())).BitLen())
}
