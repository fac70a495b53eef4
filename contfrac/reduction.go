package contfrac

import (
	"context"
	"fmt"
	"iter"
	"math/big"
)

// IsReduced reports whether f is reduced: |√Δ − 2|a|| < b < √Δ for the discriminant Δ. Then ac <
// 0, and one root lies between −1 and 1 and the other does not.
func (f Form) IsReduced() bool { return f.isReduced(new(big.Int).Sqrt(f.Discriminant())) }

// isReduced is IsReduced, given ⌊√Δ⌋.
func (f Form) isReduced(root *big.Int) bool {
	e := f.parts()
	if e.b.Sign() <= 0 || e.b.Cmp(root) > 0 {
		return false
	}
	// √Δ − b < 2|a| < √Δ + b
	a := new(big.Int).Lsh(e.a, 1)
	t := new(big.Int).Sub(root, e.b)
	return a.CmpAbs(t) > 0 && a.CmpAbs(t.Add(root, e.b)) <= 0
}

// next returns the right neighbour (c, r, …) of f, with r ≡ −b modulo 2c and |c| ≥ r > −|c|, or √Δ
// > r > √Δ − 2|c| when |c| < √Δ. It is f after the matrix [[0, −1], [1, s]], s = (b + r)/2c.
func (f Form) next(root *big.Int) (g Form, s *big.Int) {
	e := f.parts()
	top := new(big.Int).Abs(e.c)
	twice := new(big.Int).Lsh(top, 1)
	if top.Cmp(root) <= 0 {
		top = root
	}
	// r is the greatest up to top that is −b modulo 2|c|.
	r := new(big.Int).Add(top, e.b)
	r.Mod(r, twice)
	r.Sub(top, r)
	s = new(big.Int).Add(e.b, r)
	s.Quo(s, twice)
	if e.c.Sign() < 0 {
		s.Neg(s)
	}
	// The last coefficient is a − bs + cs² = a + s(r − b)/2.
	t := new(big.Int).Sub(r, e.b)
	t = Product(t.Rsh(t, 1), s)
	return Form{e: &form{e.c, r, t.Add(t, e.a)}}, s
}

// Reduced returns a reduced form g properly equivalent to f, and a matrix m of determinant 1 with
// f.Apply(m) equal to g: f itself if it is reduced. It costs up to about a step for each bit of
// the coefficients, of a few operations on integers of their size.
//
// Source: "Disquisitiones Arithmeticae", 1801, art. 183.
func (f Form) Reduced() (g Form, m Matrix) {
	root := new(big.Int).Sqrt(f.Discriminant())
	for !f.isReduced(root) {
		var s *big.Int
		f, s = f.next(root)
		m = m.Mul(Matrix{e: &entries{new(big.Int), big.NewInt(-1), big.NewInt(1), s}})
	}
	return f, m
}

// Cycle yields the reduced forms properly equivalent to f, each once, from Reduced on, each after
// its left neighbour: (a, b, c) before (c, b', c') with b' ≡ −b modulo 2c. Their first
// coefficients alternate in sign. The cycle can have some √Δ members; the iterator holds one at a
// time and can be stopped and run again.
func (f Form) Cycle() iter.Seq[Form] {
	return func(yield func(Form) bool) {
		first, _ := f.Reduced()
		root := new(big.Int).Sqrt(f.Discriminant())
		for g := first; yield(g); {
			if g, _ = g.next(root); g.Equal(first) {
				return
			}
		}
	}
}

// Minimum returns the least |f(x, y)| over integers x and y not both 0. It is the least |a| in the
// cycle and at most √(Δ/5). Cost and errors are those of Surd.Periodic for a root.
//
// Source: "An Introduction to Diophantine Approximation", Cambridge 1957, ch. II.
func (f Form) Minimum() (*big.Int, error) { return f.MinimumContext(context.Background()) }

// MinimumContext is Minimum that stops when ctx ends, with its error.
func (f Form) MinimumContext(ctx context.Context) (*big.Int, error) {
	x, _ := f.Roots()
	e := quotients{discard: true}
	if err := e.run(ctx, x); err != nil {
		return nil, fmt.Errorf("contfrac: minimum of the form %v: %w", f, err)
	}
	// f is to the form Q·X² − 2P·XY − … of its root as its first coefficient is to Q.
	n := Product(e.least, f.parts().a)
	return n.Quo(n, x.parts().q), nil
}

// Automorph returns the matrix m of determinant 1 and least trace above 2 with f.Apply(m) equal to
// f, in the direction in which the first root attracts. All matrices of determinant 1 that keep f
// are the powers of m and their negatives. For the primitive form, of discriminant Δ, it is
//
//	[[(t − bu)/2, −cu], [au, (t + bu)/2]],   t² − Δu² = 4.
//
// Cost and errors are those of Surd.Periodic for a root.
func (f Form) Automorph() (Matrix, error) { return f.AutomorphContext(context.Background()) }

// AutomorphContext is Automorph that stops when ctx ends, with its error.
func (f Form) AutomorphContext(ctx context.Context) (Matrix, error) {
	f = f.Primitive()
	x, _ := f.Roots()
	expansion, err := x.PeriodicContext(ctx)
	if err != nil {
		return Matrix{}, fmt.Errorf("contfrac: automorph of the form %v: %w", f, err)
	}
	// The matrix of the period fixes y = [(b₁, …)], and u is to it what it is to m.
	period := expansion.Period()
	p := period.product().full()
	y := Periodic{period: period}.Surd().Form()
	if period.n%2 == 1 {
		p = p.mul(p)
	}
	u := new(big.Int).Quo(p.c, y.parts().a)
	t := new(big.Int).Add(p.a, p.d)
	e := f.parts()
	bu := Product(e.b, u)
	a, d := new(big.Int).Sub(t, bu), new(big.Int).Add(t, bu)
	c := Product(e.c, u)
	return Matrix{e: &entries{a.Rsh(a, 1), c.Neg(c), Product(e.a, u), d.Rsh(d, 1)}}, nil
}

// Equivalent reports whether f and g are properly equivalent and, if so, returns a matrix m of
// determinant 1 with f.Apply(m) equal to g. Cost and errors are those of Surd.Periodic for roots
// of both.
func (f Form) Equivalent(g Form) (m Matrix, ok bool, err error) {
	return f.EquivalentContext(context.Background(), g)
}

// EquivalentContext is Equivalent that stops when ctx ends, with its error.
func (f Form) EquivalentContext(ctx context.Context, g Form) (m Matrix, ok bool, err error) {
	if f.Discriminant().Cmp(g.Discriminant()) != 0 || f.Content().Cmp(g.Content()) != 0 {
		return Matrix{}, false, nil
	}
	// A form is known by its first root, discriminant and content, so m has to take the first root
	// of g to that of f.
	var tails [2]Periodic
	for i, h := range []Form{f, g} {
		x, _ := h.Roots()
		if tails[i], err = x.PeriodicContext(ctx); err != nil {
			return Matrix{}, false, fmt.Errorf("contfrac: equivalence of the forms %v and %v: %w", f, g, err)
		}
	}
	x, y := tails[0], tails[1]
	n, ok := x.offset(y)
	odd := x.Period().n%2 == 1
	if !ok || (x.pre.n+n-y.pre.n)%2 != 0 && !odd {
		return Matrix{}, false, nil
	}
	period := x.Period()
	to := x.pre.product().full().mul(period.head(n).product().full())
	if (x.pre.n+n-y.pre.n)%2 != 0 {
		// Once more round makes the determinant 1.
		to = x.pre.product().full().mul(period.product().full()).mul(period.head(n).product().full())
	}
	from, err := Matrix{e: ptr(y.pre.product().full())}.inverse()
	if err != nil {
		return Matrix{}, false, err
	}
	return Matrix{e: &to}.Mul(from), true, nil
}

func ptr(e entries) *entries { return &e }

// head returns the first n terms.
func (f Fraction) head(n int) Fraction {
	at := 0
	for range n {
		at = packedEnd(f.data, at)
	}
	return Fraction{n: n, neg: n > 0 && f.neg, data: f.data[:at]}
}
