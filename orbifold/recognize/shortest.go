package recognize

import (
	"context"
	"math/big"
	"math/bits"
)

// prime arithmetic: a field of word size, for primes p < 2⁶².
type field struct{ p uint64 }

func (f field) add(x, y uint64) uint64 {
	if z := x + y; z < f.p {
		return z
	}
	return x + y - f.p
}

func (f field) sub(x, y uint64) uint64 {
	if x >= y {
		return x - y
	}
	return x + f.p - y
}

func (f field) mul(x, y uint64) uint64 {
	hi, lo := bits.Mul64(x, y)
	_, r := bits.Div64(hi, lo, f.p)
	return r
}

func (f field) inverse(x uint64) uint64 {
	y := uint64(1)
	for e := f.p - 2; e > 0; e >>= 1 {
		if e&1 == 1 {
			y = f.mul(y, x)
		}
		x = f.mul(x, x)
	}
	return y
}

// reduce returns the terms modulo p.
func (f field) reduce(terms []*big.Int) []uint64 {
	p, r := new(big.Int).SetUint64(f.p), new(big.Int)
	a := make([]uint64, len(terms))
	for i, x := range terms {
		a[i] = r.Mod(x, p).Uint64()
	}
	return a
}

// shortest returns the connection polynomial 1 + c₁x + … + c_L·x^L of the
// shortest recurrence aₙ + c₁·aₙ₋₁ + … + c_L·aₙ₋L = 0 (n ≥ L) of the terms modulo p,
// by the Berlekamp–Massey algorithm: O(L) operations a term. It is the only one
// of its length if 2L is at most the number of terms. Source: "Shift-register
// synthesis and BCH decoding", IEEE Trans. Inform. Theory 15 (1969).
func (f field) shortest(ctx context.Context, a []uint64) ([]uint64, error) {
	c, b := []uint64{1}, []uint64{1} // now, and before the last change of length
	length, gap := 0, 1
	last := uint64(1) // the discrepancy at that change
	for n := range a {
		if n%16 == 0 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
		}
		d := a[n]
		for i := 1; i < len(c) && i <= length; i++ {
			d = f.add(d, f.mul(c[i], a[n-i]))
		}
		if d == 0 {
			gap++
			continue
		}
		before := c
		next := make([]uint64, max(len(c), len(b)+gap))
		copy(next, c)
		factor := f.mul(d, f.inverse(last))
		for i, x := range b {
			next[i+gap] = f.sub(next[i+gap], f.mul(factor, x))
		}
		c = next
		if 2*length <= n {
			length, b, last, gap = n+1-length, before, d, 1
		} else {
			gap++
		}
	}
	full := make([]uint64, length+1)
	copy(full, c)
	return full, nil
}

// primes yields primes below 2⁶², downwards.
func primes(yield func(uint64) bool) {
	x := new(big.Int)
	for p := uint64(1)<<62 - 1; ; p -= 2 {
		if x.SetUint64(p).ProbablyPrime(0) && !yield(p) { // exact below 2⁶⁴
			return
		}
	}
}

// rational returns n/d ≡ x modulo m with |n|, d ≤ √(m/2), d > 0; false if there is none.
// There is one at most.
func rational(x, m *big.Int) (*big.Rat, bool) {
	bound := new(big.Int).Rsh(m, 1)
	bound.Sqrt(bound)
	// Euclid's algorithm keeps r ≡ s·x; it is stopped half way.
	r0, r1 := new(big.Int).Set(m), new(big.Int).Set(x)
	s0, s1 := new(big.Int), big.NewInt(1)
	q, t := new(big.Int), new(big.Int)
	for r1.Cmp(bound) > 0 {
		q.QuoRem(r0, r1, t)
		r0, r1, t = r1, t, r0
		s0.Sub(s0, q.Mul(q, s1))
		s0, s1 = s1, s0
	}
	if s1.Sign() == 0 || s1.CmpAbs(bound) > 0 {
		return nil, false
	}
	if t.GCD(nil, nil, new(big.Int).Abs(s1), new(big.Int).Abs(r1)); r1.Sign() != 0 && t.Cmp(big.NewInt(1)) != 0 {
		return nil, false
	}
	return new(big.Rat).SetFrac(r1, s1), true
}
