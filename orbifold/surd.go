package orbifold

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Surd is a real number a + b·√d with rational a, b and an integer d ≥ 0: an
// element of a quadratic field. The radicand is kept as it arises, square
// factors and all; for a fan of trace t it is t² − 4. It is immutable; the
// zero value is 0.
type Surd struct {
	a, b *big.Rat
	d    *big.Int
}

// Parts returns a, b and d of a + b·√d.
func (s Surd) Parts() (a, b *big.Rat, d *big.Int) {
	a, b, d = new(big.Rat), new(big.Rat), new(big.Int)
	if s.d != nil {
		a.Set(s.a)
		b.Set(s.b)
		d.Set(s.d)
	}
	return a, b, d
}

// Conjugate returns a − b·√d.
func (s Surd) Conjugate() Surd {
	a, b, d := s.Parts()
	return Surd{a, b.Neg(b), d}
}

// Enclosure returns lo ≤ s ≤ hi, at most two units in the last place apart,
// with ends of the precision prec, 1 … MaxLogPrecision bits; other precisions
// are ErrPrecision. A value that is rational and fits is met exactly.
func (s Surd) Enclosure(prec uint) (lo, hi *big.Float, err error) {
	if prec < 1 || prec > MaxLogPrecision {
		return nil, nil, fmt.Errorf("orbifold: enclosure of %v with %d bits: want 1 … %d: %w", s, prec, MaxLogPrecision, ErrPrecision)
	}
	a, b, d := s.Parts()
	if root, ok := integerRoot(d); ok {
		v := a.Add(a, b.Mul(b, new(big.Rat).SetInt(root)))
		return down(prec).SetRat(v), up(prec).SetRat(v), nil
	}
	if b.Sign() == 0 {
		return down(prec).SetRat(a), up(prec).SetRat(a), nil
	}
	// √d lies in [r, r+1]/2^g; a and b·√d may nearly cancel, so g grows until
	// the ends are close beside the value, which is not 0.
	for g := prec + 16; ; g *= 2 {
		r := new(big.Int).Lsh(d, 2*g)
		r.Sqrt(r)
		scale := new(big.Int).Lsh(unit, g)
		below := new(big.Rat).SetFrac(r, scale)
		above := new(big.Rat).SetFrac(r.Add(r, unit), scale)
		if b.Sign() < 0 {
			below, above = above, below
		}
		below.Add(below.Mul(below, b), a)
		above.Add(above.Mul(above, b), a)
		lo, hi = down(prec).SetRat(below), up(prec).SetRat(above)
		if lo.Sign()*hi.Sign() <= 0 {
			continue
		}
		w := up(64).Sub(hi, lo)
		least := lo
		if lo.Sign() < 0 {
			least = new(big.Float).Neg(hi)
		}
		if w.SetMantExp(w, int(prec)-2).Cmp(least) <= 0 {
			return lo, hi, nil
		}
	}
}

// String writes "3/2 + 1/2·√5".
func (s Surd) String() string { return s.text((*big.Int).String) }

// Format writes the surd whole for %s, and with long integers shortened for
// %v.
func (s Surd) Format(f fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(f, s.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(f, s.String())
}

func (s Surd) text(integer func(*big.Int) string) string {
	a, b, d := s.Parts()
	var sum sumText
	sum.add(a, integer, "")
	root := "√" + integer(d)
	if b.IsInt() && b.Num().CmpAbs(unit) != 0 {
		root = "·" + root
	}
	sum.add(b, integer, root)
	return sum.String()
}
