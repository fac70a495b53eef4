package spectrum

import (
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Approximation is a convergent p/q of a quadratic irrational x. The zero value is 1/1 for the
// golden ratio.
type Approximation struct {
	p, q *big.Int // nil for 1 and 1
	x    contfrac.Surd
}

// Fraction returns numerator and denominator, in lowest terms, q ≥ 1.
func (a Approximation) Fraction() (p, q *big.Int) {
	if a.q == nil {
		return big.NewInt(1), big.NewInt(1)
	}
	return new(big.Int).Set(a.p), new(big.Int).Set(a.q)
}

// Surd returns the irrational that is approximated.
func (a Approximation) Surd() contfrac.Surd { return a.x }

// Constant returns q·|q·x − p|, exact. It is below 1, and the lower limit over the convergents,
// and over all fractions, is Value.Constant of the slope.
func (a Approximation) Constant() contfrac.Surd {
	p, q := a.Fraction()
	c, _ := a.x.ApproximationConstant(p, q) // q ≥ 1
	return c
}

// Approximations yields the convergents of FixedPoint(f, s), in order. The sequence does not end;
// the caller stops. It can be used again. Errors are those of FixedPoint and
// contfrac.Surd.Periodic.
func Approximations(f orbifold.Family, s farey.Slope) (iter.Seq[Approximation], error) {
	x, err := FixedPoint(f, s)
	if err != nil {
		return nil, err
	}
	return Convergents(x)
}

// Convergents yields the convergents of x in order. The sequence does not end; the caller stops.
// It can be used again. Errors are those of contfrac.Surd.Periodic.
func Convergents(x contfrac.Surd) (iter.Seq[Approximation], error) {
	expansion, err := x.Periodic()
	if err != nil {
		return nil, err
	}
	return func(yield func(Approximation) bool) {
		for p, q := range expansion.Convergents() {
			if !yield(Approximation{p: p, q: q, x: x}) {
				return
			}
		}
	}, nil
}
