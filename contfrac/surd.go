package contfrac

import (
	"fmt"
	"math/big"
)

// Surd is a real quadratic irrational
//
//	x = (P + √D)/Q,   D > 0 not a square, Q ≠ 0 of either sign, Q | D − P².
//
// The three integers are kept in lowest terms, gcd(P, Q, (D − P²)/Q) = 1, in which every quadratic
// irrational is written in exactly one way. Then x is a root of the form Q·X² − 2P·XY − ((D −
// P²)/Q)·Y², and (P − √D)/Q, its conjugate, is written (−P + √D)/(−Q). Surds are immutable;
// compare them with Equal. The zero value is the golden ratio (1 + √5)/2.
type Surd struct {
	e *surd // nil for the golden ratio
}

// surd holds the integers of a Surd; they are never modified.
type surd struct {
	p, d, q *big.Int
	root    *big.Int // ⌊√d⌋
}

var golden = surd{p: big.NewInt(1), d: big.NewInt(5), q: big.NewInt(2), root: big.NewInt(2)}

// NewSurd returns (p + √d)/q in lowest terms; q need not divide d − p². A d that is not positive
// or is a square gives ErrDiscriminant, q = 0 ErrInfinite and nil ErrTerm.
func NewSurd(p, d, q *big.Int) (Surd, error) {
	if p == nil || d == nil || q == nil {
		return Surd{}, fmt.Errorf("contfrac: surd with a nil integer: three integers are accepted: %w", ErrTerm)
	}
	if err := checkDiscriminant(d); err != nil {
		return Surd{}, fmt.Errorf("contfrac: surd (%s + √%s)/%s: %w", Abbreviate(p), Abbreviate(d), Abbreviate(q), err)
	}
	if q.Sign() == 0 {
		return Surd{}, fmt.Errorf("contfrac: surd (%s + √%s)/0: a denominator other than 0 is accepted: %w", Abbreviate(p), Abbreviate(d), ErrInfinite)
	}
	p, d, q = new(big.Int).Set(p), new(big.Int).Set(d), new(big.Int).Set(q)
	c, rest := new(big.Int).QuoRem(normPart(p, d), q, new(big.Int))
	if rest.Sign() != 0 {
		abs := new(big.Int).Abs(q)
		p, d, q = Product(p, abs), Product(d, Product(abs, abs)), Product(q, abs)
		c.Quo(normPart(p, d), q)
	}
	return lowestSurd(p, d, q, c), nil
}

// SurdOf is NewSurd for small integers.
func SurdOf(p, d, q int64) (Surd, error) {
	return NewSurd(big.NewInt(p), big.NewInt(d), big.NewInt(q))
}

// normPart returns d − p².
func normPart(p, d *big.Int) *big.Int {
	n := Product(p, p)
	return n.Sub(d, n)
}

// checkDiscriminant refuses what has no irrational real square root.
func checkDiscriminant(d *big.Int) error {
	if d.Sign() <= 0 {
		return fmt.Errorf("√%s is not real and irrational: positive integers that are no squares are accepted: %w", Abbreviate(d), ErrDiscriminant)
	}
	if isSquare(d) {
		return fmt.Errorf("%s is a square: positive integers that are no squares are accepted: %w", Abbreviate(d), ErrDiscriminant)
	}
	return nil
}

// isSquare reports whether n ≥ 0 is a square.
func isSquare(n *big.Int) bool {
	// Squares end in an even number of zero bits before bits 001.
	z := n.TrailingZeroBits()
	if n.Sign() != 0 && (z%2 == 1 || n.Bit(int(z)+1) == 1 || n.Bit(int(z)+2) == 1) {
		return false
	}
	r := new(big.Int).Sqrt(n)
	return Product(r, r).Cmp(n) == 0
}

// lowestSurd returns the surd of p, d and q with c = (d − p²)/q in lowest terms. It keeps its
// arguments.
func lowestSurd(p, d, q, c *big.Int) Surd {
	g := new(big.Int).GCD(nil, nil, new(big.Int).Abs(p), new(big.Int).Abs(q))
	g.GCD(nil, nil, g, new(big.Int).Abs(c))
	if g.Cmp(oneInt) > 0 {
		p = new(big.Int).Quo(p, g)
		q = new(big.Int).Quo(q, g)
		d = new(big.Int).Quo(d, Product(g, g))
	}
	return Surd{e: &surd{p: p, d: d, q: q, root: new(big.Int).Sqrt(d)}}
}

// parts returns the integers, which must not be modified.
func (x Surd) parts() *surd {
	if x.e == nil {
		return &golden
	}
	return x.e
}

// cofactor returns (D − P²)/Q.
func (e *surd) cofactor() *big.Int {
	c := normPart(e.p, e.d)
	return c.Quo(c, e.q)
}

// P returns the rational part of the numerator.
func (x Surd) P() *big.Int { return new(big.Int).Set(x.parts().p) }

// D returns the integer under the root.
func (x Surd) D() *big.Int { return new(big.Int).Set(x.parts().d) }

// Q returns the denominator, of either sign.
func (x Surd) Q() *big.Int { return new(big.Int).Set(x.parts().q) }

// Conjugate returns the other root of the quadratic equation of x.
func (x Surd) Conjugate() Surd {
	e := x.parts()
	return Surd{e: &surd{p: new(big.Int).Neg(e.p), d: e.d, q: new(big.Int).Neg(e.q), root: e.root}}
}

// Apply returns the image (ax + b)/(cx + d) under the matrix [[a, b], [c, d]]. A determinant 0
// gives ErrDeterminant.
func (x Surd) Apply(m Matrix) (Surd, error) {
	det := m.Det()
	if det.Sign() == 0 {
		return Surd{}, fmt.Errorf("contfrac: image of %v under the matrix %v: a determinant other than 0 is accepted: %w", x, m, ErrDeterminant)
	}
	return x.apply(m.entries(), det), nil
}

// apply is Apply for the determinant det ≠ 0.
func (x Surd) apply(m entries, det *big.Int) Surd {
	// With C = (D − P²)/Q, the image is (P' + det·√D)/Q' for P' = (ad + bc)P + bdQ − acC and Q' =
	// 2cdP + d²Q − c²C, and (det²D − P'²)/Q' = −2abP − b²Q + a²C.
	e := x.parts()
	c0 := e.cofactor()
	ac, bd, cd, ab := Product(m.a, m.c), Product(m.b, m.d), Product(m.c, m.d), Product(m.a, m.b)
	p := dot(m.a, m.d, m.b, m.c)
	p = dot(p, e.p, bd, e.q)
	p.Sub(p, Product(ac, c0))
	value := func(xy, xx, yy *big.Int) *big.Int { // 2xyP + y²Q − x²C
		v := Product(xy, e.p)
		v.Lsh(v, 1)
		v.Add(v, Product(yy, e.q))
		return v.Sub(v, Product(xx, c0))
	}
	q := value(cd, Product(m.c, m.c), Product(m.d, m.d))
	c := value(ab, Product(m.a, m.a), Product(m.b, m.b))
	c.Neg(c)
	if det.Sign() < 0 {
		p.Neg(p)
		q.Neg(q)
		c.Neg(c)
	}
	return lowestSurd(p, Product(e.d, Product(det, det)), q, c)
}

// Equal reports whether x and y are the same number.
func (x Surd) Equal(y Surd) bool {
	e, f := x.parts(), y.parts()
	return e.p.Cmp(f.p) == 0 && e.q.Cmp(f.q) == 0 && e.d.Cmp(f.d) == 0
}

// Sign returns −1 or 1 as x is negative or positive.
func (x Surd) Sign() int {
	e := x.parts()
	return rootSign(e.p, oneInt, e.d) * e.q.Sign()
}

// Cmp returns −1, 0 or 1 as x is less than, equal to or greater than y. It is exact, by a few
// multiplications.
func (x Surd) Cmp(y Surd) int {
	// The difference times |Q·Q'| is a + b√D + c√D'.
	e, f := x.parts(), y.parts()
	s := e.q.Sign() * f.q.Sign()
	a := Product(e.p, f.q)
	a.Sub(a, Product(f.p, e.q))
	b, c := f.q, new(big.Int).Neg(e.q)
	if s < 0 {
		a.Neg(a)
		b = new(big.Int).Neg(b)
		c.Neg(c)
	}
	if e.d.Cmp(f.d) == 0 {
		return rootSign(a, new(big.Int).Add(b, c), e.d)
	}
	u, v := rootSign(a, b, e.d), c.Sign()
	if u == v { // u is not 0, since √D is irrational
		return v
	}
	// Opposite signs: compare (a + b√D)² with c²D'.
	ab := Product(a, b)
	square := dot(a, a, Product(b, b), e.d)
	square.Sub(square, Product(Product(c, c), f.d))
	switch rootSign(square, ab.Lsh(ab, 1), e.d) {
	case 1:
		return u
	case -1:
		return v
	}
	return 0
}

// CmpRat returns −1 or 1 as x is less or greater than the rational number r; a nil r counts as 0.
func (x Surd) CmpRat(r *big.Rat) int {
	if r == nil {
		return x.Sign()
	}
	e := x.parts()
	a := Product(e.p, r.Denom())
	a.Sub(a, Product(r.Num(), e.q))
	return rootSign(a, r.Denom(), e.d) * e.q.Sign()
}

// rootSign returns the sign of a + b√d for d > 0.
func rootSign(a, b, d *big.Int) int {
	s, t := a.Sign(), b.Sign()
	if s == t || t == 0 {
		return s
	}
	if s == 0 {
		return t
	}
	return s * Product(a, a).Cmp(Product(Product(b, b), d))
}

// Floor returns the largest integer below x. It costs one division.
func (x Surd) Floor() *big.Int {
	e := x.parts()
	return floorRoot(e.p, e.q, e.root)
}

// floorRoot returns ⌊(p + √d)/q⌋ for √d irrational, with root = ⌊√d⌋.
func floorRoot(p, q, root *big.Int) *big.Int {
	n := new(big.Int).Add(p, root)
	if q.Sign() > 0 {
		return n.Div(n, q)
	}
	// −(p + √d)/|q|: one less than the negative of that floor.
	n.Div(n, new(big.Int).Neg(q))
	return n.Not(n)
}

// IsReduced reports whether x > 1 and its conjugate lies between −1 and 0: exactly then its
// continued fraction has no pre-period.
func (x Surd) IsReduced() bool { return x.parts().isReduced() }

func (e *surd) isReduced() bool {
	// √D − P < Q < √D + P, which with Q > 0 says all of it.
	if e.q.Sign() <= 0 {
		return false
	}
	t := new(big.Int).Sub(e.root, e.p)
	if e.q.Cmp(t) <= 0 {
		return false
	}
	return e.q.Cmp(t.Add(e.root, e.p)) <= 0 && e.p.Cmp(e.root) <= 0 && e.p.Sign() > 0
}
