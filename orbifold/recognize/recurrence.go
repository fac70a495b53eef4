package recognize

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/orbifold/linear"
)

// Recurrence is an answer of Sequence.Recurrence.
type Recurrence struct {
	// Verdict is Found or Undecided; no list of finitely many terms is without a
	// recurrence.
	Verdict Verdict
	// Rule is the recurrence with its first terms; order 0 when undecided.
	Rule linear.Recurrence
	// Surplus is the number of terms that confirm it: those past the 2·order that
	// determine it. At least 1 when found.
	Surplus int
}

// Recurrence returns the minimal linear recurrence with constant rational
// coefficients of the terms. It is Found when 2·order is less than the number
// of terms: it holds for all of them exactly, no other recurrence of its order
// or less does, and Surplus terms could have refuted it. Else the answer is
// Undecided. Three terms at least are needed for a sequence that is not zero.
//
// It is found modulo primes of 62 bits by the Berlekamp–Massey algorithm, raised
// by the Chinese remainder theorem and rational reconstruction until it satisfies
// the terms, and checked over the integers. "Undecided" rests on three primes; it
// could be said wrongly only of a recurrence with a denominator divisible by all
// of them. Cost for n terms of b bits: O(n·order) word operations for each prime,
// of which there are as many as the coefficients have words, and O(n·order)
// products of b bits. The only error for a sequence with terms is that of ctx.
func (s Sequence) Recurrence(ctx context.Context) (Recurrence, error) {
	if len(s.terms) == 0 {
		return Recurrence{}, fmt.Errorf("recognize: recurrence of a sequence without terms: %w", ErrEmpty)
	}
	if ctx == nil {
		ctx = context.Background()
	}
	n := len(s.terms)
	bits := 8
	for _, a := range s.terms {
		bits = max(bits, a.BitLen())
	}
	// Modulo a prime the length can be too small, when the prime divides a minor of
	// the Hankel matrix, or too large, when it divides a denominator; nearly
	// always it is right. So the primes are kept apart by length.
	lifted := map[int]*lifting{}
	tried, long := 0, 0
	for p := range primes {
		f := field{p}
		c, err := f.shortest(ctx, f.reduce(s.terms))
		if err != nil {
			return Recurrence{}, fmt.Errorf("recognize: recurrence of %d terms: %w", n, err)
		}
		tried++
		length := len(c) - 1
		if 2*length >= n {
			if long++; long >= 3 && 2*long > tried {
				break
			}
			continue
		}
		l := lifted[length]
		if l == nil {
			l = &lifting{next: 1}
			lifted[length] = l
		}
		l.add(c, p)
		if l.primes < l.next {
			continue
		}
		l.next = l.primes + (l.primes+1)/2
		if rule, ok := l.rule(ctx, s.terms); ok {
			return Recurrence{Found, rule, n - 2*length}, nil
		} else if err := ctx.Err(); err != nil {
			return Recurrence{}, fmt.Errorf("recognize: recurrence of %d terms: %w", n, err)
		}
		// Coefficients are quotients of minors of the Hankel matrix, so this many
		// primes would show them.
		if l.primes > 3+(2*length*(bits+length))/60 {
			break
		}
	}
	return Recurrence{}, nil
}

// lifting is a polynomial modulo a product of primes.
type lifting struct {
	c       []*big.Int
	modulus *big.Int
	primes  int
	next    int // the number of primes at which the rule is tried next
}

// add combines with the polynomial modulo one more prime.
func (l *lifting) add(c []uint64, p uint64) {
	if l.primes++; l.primes == 1 {
		l.modulus = new(big.Int).SetUint64(p)
		for _, x := range c {
			l.c = append(l.c, new(big.Int).SetUint64(x))
		}
		return
	}
	f := field{p}
	here := f.reduce(append(l.c[:len(l.c):len(l.c)], l.modulus))
	inverse := f.inverse(here[len(here)-1])
	t := new(big.Int)
	for i, x := range c {
		t.SetUint64(f.mul(f.sub(x, here[i]), inverse))
		l.c[i].Add(l.c[i], t.Mul(t, l.modulus))
	}
	l.modulus.Mul(l.modulus, t.SetUint64(p))
}

// rule returns the recurrence with the polynomial over Q, if it holds for the
// terms. It is the shortest then: modulo a prime the shortest of twice as many
// terms or more as its length is unique, so the Hankel matrix of that many
// rows is not singular there, nor over Q.
func (l *lifting) rule(ctx context.Context, terms []*big.Int) (linear.Recurrence, bool) {
	d := len(l.c) - 1
	c := make([]*big.Rat, d+1)
	for i, x := range l.c {
		r, ok := rational(x, l.modulus)
		if !ok {
			return linear.Recurrence{}, false
		}
		c[d-i] = r
	}
	rule, err := linear.NewRecurrence(linear.NewPolynomial(c...), terms[:d]...)
	if err != nil || rule.CheckContext(ctx, terms) != nil {
		return linear.Recurrence{}, false
	}
	return rule, true
}
