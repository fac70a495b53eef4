package contfrac

import (
	"context"
	"fmt"
	"math/big"
)

// MaxPeriod bounds the number of terms, those before the period included, up to which the
// expansion of a Surd is followed. The period of √D can have some √D terms.
const MaxPeriod = 1 << 24

// periodLimit is MaxPeriod, and packedLimit the bytes of the terms of an expansion, except in
// tests.
var (
	periodLimit = MaxPeriod
	packedLimit = MaxBits / 8
)

// wordRootBits is the size of ⌊√D⌋ up to which a period is followed in machine words.
// BenchmarkPeriod shows what that saves.
var wordRootBits = 61

// Periodic returns the continued fraction of x. An expansion of more than MaxPeriod terms before
// it repeats, or of terms of more than MaxBits bits in all, gives ErrTooLarge. It costs a few
// operations on integers of the size of D for each term, and for D up to 122 bits some nanoseconds
// for each term of the period.
func (x Surd) Periodic() (Periodic, error) { return x.PeriodicContext(context.Background()) }

// PeriodicContext is Periodic that stops when ctx ends, with its error.
func (x Surd) PeriodicContext(ctx context.Context) (Periodic, error) {
	var e quotients
	if err := e.run(ctx, x); err != nil {
		return Periodic{}, fmt.Errorf("contfrac: continued fraction of %v: %w", x, err)
	}
	pre, period := e.pre.fraction(), e.period.fraction()
	if pre.n == 0 && period == goldenPeriod {
		period = Fraction{}
	}
	return Periodic{pre: pre, period: period}, nil
}

// Lagrange returns the Lagrange value of x, the upper limit of 1/(q·|qx − p|) over all fractions
// p/q, which depends on the period alone:
//
//	L = max over i of [bᵢ; bᵢ₊₁, …] + [0; bᵢ₋₁, bᵢ₋₂, …] = 2√D / min Q,
//
// the minimum over the complete quotients (P + √D)/Q in the period. It is exact; Decimal and
// Enclosure have its value to any precision. Cost and errors are those of Periodic. Source: "An
// Introduction to Diophantine Approximation", Cambridge 1957.
func (x Surd) Lagrange() (Surd, error) { return x.LagrangeContext(context.Background()) }

// LagrangeContext is Lagrange that stops when ctx ends, with its error.
func (x Surd) LagrangeContext(ctx context.Context) (Surd, error) {
	e := quotients{discard: true}
	if err := e.run(ctx, x); err != nil {
		return Surd{}, fmt.Errorf("contfrac: Lagrange value of %v: %w", x, err)
	}
	return NewSurd(new(big.Int), new(big.Int).Lsh(x.parts().d, 2), e.least)
}

// quotients follows the complete quotients (P + √D)/Q of an expansion.
type quotients struct {
	discard     bool // of the terms
	terms       int
	pre, period termBuilder
	least       *big.Int // Q in the period
}

// run expands x until it repeats. A complete quotient is the first of the period when it is
// reduced.
func (e *quotients) run(ctx context.Context, x Surd) error {
	s := x.parts()
	now := surd{p: new(big.Int).Set(s.p), d: s.d, q: new(big.Int).Set(s.q), root: s.root}
	before := now.cofactor() // Q of the quotient before, up to which Q·Q' = D − P'²
	a := new(big.Int)
	for ; !now.isReduced(); e.terms++ {
		if err := e.check(ctx); err != nil {
			return err
		}
		now.step(before, a)
		if !e.discard {
			e.pre.push(a)
		}
	}
	if now.root.BitLen() <= wordRootBits {
		return e.runWords(ctx, now.p.Int64(), now.q.Int64(), now.root.Int64(), before.Int64())
	}
	e.least = new(big.Int).Set(now.q)
	for p, q := new(big.Int).Set(now.p), new(big.Int).Set(now.q); ; {
		if err := e.check(ctx); err != nil {
			return err
		}
		now.step(before, a)
		e.terms++
		if !e.discard {
			e.period.push(a)
		}
		if now.q.Cmp(e.least) < 0 {
			e.least.Set(now.q)
		}
		if now.p.Cmp(p) == 0 && now.q.Cmp(q) == 0 {
			return nil
		}
	}
}

// step sets a to the next term and s to the next complete quotient, by P' = aQ − P and Q' = Q₋ +
// a(P − P') with Q₋ the denominator before. It overwrites the integers of s and before.
func (s *surd) step(before, a *big.Int) {
	a.Set(floorRoot(s.p, s.q, s.root))
	next := Product(a, s.q)
	next.Sub(next, s.p)
	s.p.Sub(s.p, next)
	before.Add(before, Product(a, s.p))
	s.p.Set(next)
	*before, *s.q = *s.q, *before
}

// runWords is run for reduced quotients in machine words: 0 < P ≤ root and 0 < Q ≤ 2·root, so that
// nothing overflows.
func (e *quotients) runWords(ctx context.Context, p, q, root, before int64) error {
	p0, q0, least := p, q, q
	for {
		if e.terms&0xffff == 0 || e.terms >= periodLimit {
			if err := e.check(ctx); err != nil {
				return err
			}
		}
		a := (p + root) / q
		next := a*q - p
		before, q = q, before+a*(p-next)
		p = next
		e.terms++
		if !e.discard {
			e.period.pushUint(uint64(a))
		}
		least = min(least, q)
		if p == p0 && q == q0 {
			e.least = big.NewInt(least)
			return nil
		}
	}
}

// check refuses to go on at a limit or at the end of ctx.
func (e *quotients) check(ctx context.Context) error {
	if e.terms >= periodLimit {
		return fmt.Errorf("it does not repeat within %d terms: %w", periodLimit, ErrTooLarge)
	}
	if n := len(e.pre.buf) + len(e.period.buf); n > packedLimit {
		return fmt.Errorf("terms of more than %d bits: %w", int64(packedLimit)*8, ErrTooLarge)
	}
	if ctx == nil {
		return nil
	}
	return ctx.Err()
}
