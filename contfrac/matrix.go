package contfrac

import (
	"fmt"
	"math/big"
)

// Matrix is a 2×2 matrix [[A, B], [C, D]] of integers of any size. Matrices
// are immutable; compare them with Equal. The zero value is the identity.
type Matrix struct {
	e *entries // nil for the identity
}

func matrixOf(a, b, c, d int64) Matrix {
	return Matrix{e: &entries{big.NewInt(a), big.NewInt(b), big.NewInt(c), big.NewInt(d)}}
}

// NewMatrix returns [[a, b], [c, d]]; nil counts as 0.
func NewMatrix(a, b, c, d *big.Int) Matrix {
	copied := func(n *big.Int) *big.Int {
		if n == nil {
			return new(big.Int)
		}
		return new(big.Int).Set(n)
	}
	return Matrix{e: &entries{copied(a), copied(b), copied(c), copied(d)}}
}

// entries returns the entries, which must not be modified.
func (m Matrix) entries() entries {
	if m.e == nil {
		return identity()
	}
	return *m.e
}

// A returns the upper left entry.
func (m Matrix) A() *big.Int { return new(big.Int).Set(m.entries().a) }

// B returns the upper right entry.
func (m Matrix) B() *big.Int { return new(big.Int).Set(m.entries().b) }

// C returns the lower left entry.
func (m Matrix) C() *big.Int { return new(big.Int).Set(m.entries().c) }

// D returns the lower right entry.
func (m Matrix) D() *big.Int { return new(big.Int).Set(m.entries().d) }

// Mul returns the matrix product m·n.
func (m Matrix) Mul(n Matrix) Matrix {
	if m.e == nil {
		return n
	}
	if n.e == nil {
		return m
	}
	p := m.e.mul(*n.e)
	return Matrix{e: &p}
}

// Trace returns A + D.
func (m Matrix) Trace() *big.Int {
	e := m.entries()
	return new(big.Int).Add(e.a, e.d)
}

// Det returns the determinant AD − BC.
func (m Matrix) Det() *big.Int {
	e := m.entries()
	s := Product(e.a, e.d)
	return s.Sub(s, Product(e.b, e.c))
}

// Neg returns −m.
func (m Matrix) Neg() Matrix {
	e := m.entries()
	n := func(x *big.Int) *big.Int { return new(big.Int).Neg(x) }
	return Matrix{e: &entries{n(e.a), n(e.b), n(e.c), n(e.d)}}
}

// Transpose returns [[A, C], [B, D]].
func (m Matrix) Transpose() Matrix {
	e := m.entries()
	return Matrix{e: &entries{e.a, e.c, e.b, e.d}}
}

// Inverse returns the inverse of a matrix of determinant 1 or −1; every other
// determinant gives ErrDeterminant.
func (m Matrix) Inverse() (Matrix, error) {
	inverse, err := m.inverse()
	if err != nil {
		return Matrix{}, fmt.Errorf("contfrac: %w", err)
	}
	return inverse, nil
}

func (m Matrix) inverse() (Matrix, error) {
	det := m.Det()
	if det.CmpAbs(oneInt) != 0 {
		return Matrix{}, fmt.Errorf("inverse of a matrix of determinant %s: determinant 1 or -1 is accepted: %w", Abbreviate(det), ErrDeterminant)
	}
	e := m.entries()
	n := func(x *big.Int) *big.Int { return new(big.Int).Neg(x) }
	if det.Sign() < 0 {
		return Matrix{e: &entries{n(e.d), e.b, e.c, n(e.a)}}, nil
	}
	return Matrix{e: &entries{e.d, n(e.b), n(e.c), e.a}}, nil
}

// Pow returns the n-th power; for n < 0 that of the inverse, so that the
// determinant must then be 1 or −1 (ErrDeterminant). A power with entries of
// more than MaxBits bits gives ErrTooLarge before it is made: almost always
// at once, by a bound from the trace, and otherwise by the size of the factors of the
// next product. It costs about two squarings of the result.
func (m Matrix) Pow(n int64) (Matrix, error) {
	k := uint64(n)
	if n < 0 {
		k = -k
		var err error
		if m, err = m.inverse(); err != nil {
			return Matrix{}, fmt.Errorf("contfrac: power %d: %w", n, err)
		}
	}
	var power Matrix
	for square := m; ; {
		// The spectral radius ρ of the square has |trace| ≤ 2ρ, and the largest
		// entry of its k-th power is at least ρᵏ/2.
		if t := square.Trace().BitLen() - 2; t > 0 && k > uint64(powerBits+1)/uint64(t) {
			return Matrix{}, fmt.Errorf("contfrac: power %d of a matrix: entries of at most %d bits are accepted: %w", n, powerBits, ErrTooLarge)
		}
		var err error
		if k&1 == 1 {
			if power, err = power.mulBounded(square); err != nil {
				return Matrix{}, fmt.Errorf("contfrac: power %d: %w", n, err)
			}
		}
		if k >>= 1; k == 0 {
			return power, nil
		}
		if square, err = square.mulBounded(square); err != nil {
			return Matrix{}, fmt.Errorf("contfrac: power %d: %w", n, err)
		}
	}
}

// powerBits is MaxBits, except in tests.
var powerBits int64 = MaxBits

// mulBounded is Mul, refused when the result may pass powerBits.
func (m Matrix) mulBounded(n Matrix) (Matrix, error) {
	if size := m.bits() + n.bits() + 1; size > powerBits {
		return Matrix{}, fmt.Errorf("entries of about %d bits: at most %d are accepted: %w", size, powerBits, ErrTooLarge)
	}
	return m.Mul(n), nil
}

// bits returns the bit length of the largest entry.
func (m Matrix) bits() int64 {
	e := m.entries()
	return int64(max(e.a.BitLen(), e.b.BitLen(), e.c.BitLen(), e.d.BitLen()))
}

// Equal reports whether m and n have the same entries.
func (m Matrix) Equal(n Matrix) bool {
	x, y := m.entries(), n.entries()
	return x.a.Cmp(y.a) == 0 && x.b.Cmp(y.b) == 0 && x.c.Cmp(y.c) == 0 && x.d.Cmp(y.d) == 0
}

// Factor returns the one word w with w.Matrix() equal to m. It exists
// exactly when no entry is negative (else ErrNegativeEntry) and the determinant is 1
// (else ErrDeterminant). It costs as much as FromRatio of numbers as large as
// the entries.
func (m Matrix) Factor() (Word, error) {
	e := m.entries()
	for _, x := range []*big.Int{e.a, e.b, e.c, e.d} {
		if x.Sign() < 0 {
			return Word{}, fmt.Errorf("contfrac: factors L and R of a matrix with the entry %s: entries of at least 0 are accepted: %w", Abbreviate(x), ErrNegativeEntry)
		}
	}
	if det := m.Det(); det.Cmp(oneInt) != 0 {
		return Word{}, fmt.Errorf("contfrac: factors L and R of a matrix of determinant %s: determinant 1 is accepted: %w", Abbreviate(det), ErrDeterminant)
	}
	// The word leads down the Stern–Brocot tree to the sum of the columns,
	// x/y = [a₀; a₁, …, aₙ], aₙ ≥ 2 or n = 0, and the way there is
	// R^a₀ L^a₁ R^a₂ … with one letter less in the last run.
	f := euclid(new(big.Int).Add(e.a, e.b), new(big.Int).Add(e.c, e.d))
	b := f.builder(f.n)
	if last := b.pop(); last.Cmp(oneInt) > 0 {
		b.push(last.Sub(last, oneInt))
	}
	f = b.fraction()
	switch {
	case f.n == 0:
		return Word{}, nil
	case f.data[0] == 0:
		f = f.tail()
		return Word{first: L, runs: f.n, data: f.data}, nil
	}
	return Word{first: R, runs: f.n, data: f.data}, nil
}
