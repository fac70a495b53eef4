package contfrac

import (
	"fmt"
	"math/big"
)

// Form is an indefinite binary quadratic form
//
//	f(X, Y) = a·X² + b·XY + c·Y²
//
// with integers a, b, c whose discriminant b² − 4ac is positive and no square. It need not be
// primitive. Forms are immutable; compare them with Equal. The zero value is X² − XY − Y², whose
// first root is the golden ratio.
type Form struct {
	e *form // nil for X² − XY − Y²
}

// form holds the coefficients of a Form; they are never modified.
type form struct{ a, b, c *big.Int }

var goldenForm = form{big.NewInt(1), big.NewInt(-1), big.NewInt(-1)}

// NewForm returns the form aX² + bXY + cY². A discriminant that is not positive or is a square
// gives ErrDiscriminant, a nil coefficient ErrTerm.
func NewForm(a, b, c *big.Int) (Form, error) {
	if a == nil || b == nil || c == nil {
		return Form{}, fmt.Errorf("contfrac: form with a nil coefficient: three integers are accepted: %w", ErrTerm)
	}
	copied := func(n *big.Int) *big.Int { return new(big.Int).Set(n) }
	f := Form{e: &form{copied(a), copied(b), copied(c)}}
	if err := checkDiscriminant(f.Discriminant()); err != nil {
		return Form{}, fmt.Errorf("contfrac: form %v: the discriminant: %w", f, err)
	}
	return f, nil
}

// FormOf is NewForm for small coefficients.
func FormOf(a, b, c int64) (Form, error) {
	return NewForm(big.NewInt(a), big.NewInt(b), big.NewInt(c))
}

// Form returns the primitive form with x as its first root; its second root is the conjugate of x.
func (x Surd) Form() Form {
	e := x.parts()
	f := &form{a: new(big.Int).Set(e.q), b: new(big.Int).Lsh(e.p, 1), c: e.cofactor()}
	f.b.Neg(f.b)
	f.c.Neg(f.c)
	// gcd(P, Q, C) = 1 leaves a factor of 1 or 2.
	if f.a.Bit(0) == 0 && f.c.Bit(0) == 0 {
		f.a.Rsh(f.a, 1)
		f.b.Rsh(f.b, 1)
		f.c.Rsh(f.c, 1)
	}
	return Form{e: f}
}

// parts returns the coefficients, which must not be modified.
func (f Form) parts() *form {
	if f.e == nil {
		return &goldenForm
	}
	return f.e
}

// A returns the coefficient of X².
func (f Form) A() *big.Int { return new(big.Int).Set(f.parts().a) }

// B returns the coefficient of XY.
func (f Form) B() *big.Int { return new(big.Int).Set(f.parts().b) }

// C returns the coefficient of Y².
func (f Form) C() *big.Int { return new(big.Int).Set(f.parts().c) }

// Discriminant returns b² − 4ac.
func (f Form) Discriminant() *big.Int {
	e := f.parts()
	ac := Product(e.a, e.c)
	b := Product(e.b, e.b)
	return b.Sub(b, ac.Lsh(ac, 2))
}

// Content returns the greatest common divisor of the coefficients, at least 1.
func (f Form) Content() *big.Int {
	e := f.parts()
	abs := func(n *big.Int) *big.Int { return new(big.Int).Abs(n) }
	g := new(big.Int).GCD(nil, nil, abs(e.a), abs(e.c))
	return g.GCD(nil, nil, g, abs(e.b))
}

// Primitive returns the form divided by its content.
func (f Form) Primitive() Form {
	g := f.Content()
	if g.Cmp(oneInt) == 0 {
		return f
	}
	e := f.parts()
	quo := func(n *big.Int) *big.Int { return new(big.Int).Quo(n, g) }
	return Form{e: &form{quo(e.a), quo(e.b), quo(e.c)}}
}

// Neg returns −f, whose roots are those of f in the other order.
func (f Form) Neg() Form {
	e := f.parts()
	neg := func(n *big.Int) *big.Int { return new(big.Int).Neg(n) }
	return Form{e: &form{neg(e.a), neg(e.b), neg(e.c)}}
}

// Equal reports whether f and g have the same coefficients.
func (f Form) Equal(g Form) bool {
	d, e := f.parts(), g.parts()
	return d.a.Cmp(e.a) == 0 && d.b.Cmp(e.b) == 0 && d.c.Cmp(e.c) == 0
}

// Eval returns f(x, y); nil counts as 0. It is 0 only for x = y = 0.
func (f Form) Eval(x, y *big.Int) *big.Int {
	e := f.parts()
	ax := dot(e.a, orZero(x), e.b, orZero(y))
	return dot(ax, orZero(x), Product(e.c, y), orZero(y))
}

func orZero(n *big.Int) *big.Int {
	if n == nil {
		return new(big.Int)
	}
	return n
}

// Apply returns the form f(pX + qY, rX + sY) for the matrix m = [[p, q], [r, s]], so that
// f.Apply(m).Apply(n) is f.Apply(m.Mul(n)); the roots go by the inverse of m. The discriminant is
// multiplied by the square of the determinant, of which 0 gives ErrDeterminant.
func (f Form) Apply(m Matrix) (Form, error) {
	if m.Det().Sign() == 0 {
		return Form{}, fmt.Errorf("contfrac: %v of %v: a determinant other than 0 is accepted: %w", f, m, ErrDeterminant)
	}
	return f.apply(m.entries()), nil
}

// apply is Apply for a determinant other than 0.
func (f Form) apply(m entries) Form {
	e := f.parts()
	// u = (2a, b)·column, v = (b, 2c)·column of m.
	half := func(x, y *big.Int) (u, v *big.Int) {
		u = Product(e.a, x)
		u.Lsh(u, 1)
		u.Add(u, Product(e.b, y))
		v = Product(e.c, y)
		v.Lsh(v, 1)
		return u, v.Add(v, Product(e.b, x))
	}
	u, v := half(m.a, m.c)
	return Form{e: &form{a: f.Eval(m.a, m.c), b: dot(u, m.b, v, m.d), c: f.Eval(m.b, m.d)}}
}

// Roots returns the roots x of f(x, 1) = 0: the first, (−b + √Δ)/2a for the discriminant Δ, and
// the second, (−b − √Δ)/2a.
func (f Form) Roots() (first, second Surd) {
	e := f.parts()
	// (Q, −2P, −C) = (2a, 2b, 2c)
	q, c := new(big.Int).Lsh(e.a, 1), new(big.Int).Lsh(e.c, 1)
	first = lowestSurd(new(big.Int).Neg(e.b), f.Discriminant(), q, c.Neg(c))
	return first, first.Conjugate()
}

// String returns "(a, b, c)".
func (f Form) String() string {
	return f.text(func(n *big.Int) string { return n.String() })
}

func (f Form) text(number func(*big.Int) string) string {
	e := f.parts()
	return "(" + number(e.a) + ", " + number(e.b) + ", " + number(e.c) + ")"
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes the coefficients in full and %v
// writes long ones shortened.
func (f Form) Format(s fmt.State, verb rune) {
	format(s, verb, "contfrac.Form", f.String, func() string { return f.text(Abbreviate) })
}
