package contfrac

import (
	"fmt"
	"math/big"
)

// FromRat returns the regular continued fraction of r, with the last term at
// least 2 unless it is the only one. A nil r counts as 0.
func FromRat(r *big.Rat) Fraction {
	if r == nil {
		r = new(big.Rat)
	}
	return euclid(r.Num(), r.Denom())
}

// FromRatio returns the regular continued fraction of p/q, which need not be
// in lowest terms, with the last term at least 2 unless it is the only one;
// that of p/0 is the empty fraction for p ≠ 0. 0/0 gives ErrInfinite; nil
// counts as 0. It saves the greatest common divisor that making a big.Rat costs.
func FromRatio(p, q *big.Int) (Fraction, error) {
	if p == nil {
		p = new(big.Int)
	}
	if q == nil {
		q = new(big.Int)
	}
	if q.Sign() == 0 && p.Sign() == 0 {
		return Fraction{}, fmt.Errorf("contfrac: fraction of 0/0: numerator and denominator not both 0 are accepted: %w", ErrInfinite)
	}
	if q.Sign() < 0 {
		p, q = new(big.Int).Neg(p), new(big.Int).Neg(q)
	}
	return euclid(p, q), nil
}

// euclid returns the quotients of the Euclidean algorithm on p and q ≥ 0.
func euclid(p, q *big.Int) Fraction {
	var e expansion
	if q.Sign() == 0 {
		return Fraction{}
	}
	x, y := q, new(big.Int)
	t := new(big.Int)
	t.DivMod(p, q, y)
	e.push(t)
	for y.Sign() != 0 {
		n := x.BitLen()
		if n <= lehmerBits {
			e.lehmer(x, y, 0, false)
			break
		}
		before := e.n
		if d := n - y.BitLen(); d < longQuotient || n > divideUpTo && d < n/8 {
			x, y, _ = e.halfway(x, y, n/2, false)
		}
		if e.n == before {
			x, y, _ = e.divide(x, y)
		}
	}
	return e.fraction()
}

// A division costs as much for each bit of its quotient as the numbers have
// words, whatever the quotient, and is far quicker at it than the halving.
// From a quotient of longQuotient bits it is therefore preferred, up to numbers
// of divideUpTo bits, and beyond these for quotients of an eighth of the numbers;
// BenchmarkLongQuotient calibrates them.
var (
	longQuotient = 256
	divideUpTo   = 1 << 21
)
