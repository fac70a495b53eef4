package orbifold

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
)

// Compare compares the numbers at the slopes s and t, of any size: −1, 0 or +1
// as the number at s is less than, equal to or greater than that at t. The
// answer is certain. The numbers themselves are not computed unless they agree
// modulo several primes at inequivalent slopes.
//
// Equivalent slopes carry equal numbers. Else enclosures of the logarithms are
// made narrower until they are apart; when they overlap at first, residues
// modulo the three primes of Primes tell whether the numbers can be equal at
// all. ErrTooLarge means that they agree there and are too large to be computed
// within the limit of the family, or that their logarithms agree to
// MaxLogPrecision bits.
func (f Family) Compare(s, t farey.Slope) (int, error) {
	return f.CompareContext(context.Background(), s, t)
}

// CompareContext is Compare that stops when ctx ends, with its error.
func (f Family) CompareContext(ctx context.Context, s, t farey.Slope) (int, error) {
	ctx = contextOf(ctx)
	if f.Equivalent(s, t) {
		return 0, nil
	}
	for prec := uint(64); prec <= MaxLogPrecision; prec *= 4 {
		a, err := f.logSpan(ctx, s, prec)
		if err != nil {
			return 0, err
		}
		b, err := f.logSpan(ctx, t, prec)
		if err != nil {
			return 0, err
		}
		if c := a.apart(b); c != 0 {
			return c, nil
		}
		if prec == 64 && f.agree(s, t) {
			return f.compareExact(ctx, s, t)
		}
	}
	return 0, fmt.Errorf("orbifold: numbers at %v and %v: logarithms agree to %d bits: %w", s, t, MaxLogPrecision, ErrTooLarge)
}

// agree tells whether the numbers at s and t agree modulo all of Primes.
func (f Family) agree(s, t farey.Slope) bool {
	p, q := s.Path(), t.Path()
	for _, m := range Primes() {
		if f.numberMod64(p, m) != f.numberMod64(q, m) {
			return false
		}
	}
	return true
}

func (f Family) compareExact(ctx context.Context, s, t farey.Slope) (int, error) {
	var n [2]*big.Int
	for i, slope := range [2]farey.Slope{s, t} {
		var err error
		if n[i], err = f.NumberContext(ctx, slope); err != nil {
			return 0, err
		}
	}
	return n[0].Cmp(n[1]), nil
}

// Primes returns the three primes 2⁶¹ − 1, 2⁶³ − 25 and 2⁶⁴ − 59, modulo which
// long results are checked.
func Primes() [3]uint64 { return [3]uint64{1<<61 - 1, 1<<63 - 25, 1<<64 - 59} }
