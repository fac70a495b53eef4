package contfrac

import (
	"fmt"
	"math/big"
	"math/bits"
)

// NumeratorMod returns the numerator modulo m, in 0 … m−1, without computing
// it: one multiplication modulo m a term, in constant memory. A modulus that
// fits a machine word takes word arithmetic. A modulus below 1 or nil gives
// ErrTerm.
func (f Fraction) NumeratorMod(m *big.Int) (*big.Int, error) {
	if m == nil || m.Sign() <= 0 {
		return nil, fmt.Errorf("contfrac: numerator modulo %s: a modulus of at least 1 is accepted: %w", Abbreviate(m), ErrTerm)
	}
	if m.IsUint64() {
		return new(big.Int).SetUint64(f.numeratorMod64(m.Uint64())), nil
	}
	a, b := big.NewInt(1), new(big.Int)
	for _, t := range f.All() {
		b.Add(b, t.Mul(t, a))
		a, b = b.Mod(b, m), a
	}
	return a, nil
}

// numeratorMod64 is NumeratorMod for a word modulus of at least 1.
func (f Fraction) numeratorMod64(m uint64) uint64 {
	a, b := 1%m, uint64(0)
	for at := 0; at < len(f.data); {
		end := packedEnd(f.data, at)
		t, ok := packedUint(f.data[at:end])
		if !ok {
			big1 := packedBig(f.data[at:end])
			t = big1.Mod(big1, new(big.Int).SetUint64(m)).Uint64()
		}
		if t %= m; at == 0 && f.neg && t != 0 {
			t = m - t
		}
		hi, lo := bits.Mul64(t, a)
		lo, carry := bits.Add64(lo, b, 0)
		_, next := bits.Div64(hi+carry, lo, m) // t·a + b ≤ m·(m−1), so the upper word is below m
		a, b = next, a
		at = end
	}
	return a
}
