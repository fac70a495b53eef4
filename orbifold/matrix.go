package orbifold

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// Matrix returns the matrix of the slope s at its first appearance in the
// descent by the product law A·B·C = P = [[−1, 0], [K, −1]] over the oriented
// edge (A, B) with C behind it: the arc between A and B gets B·C·B⁻¹. It starts
// from M(y, k) = [[y, 1], [−y²−ky−1, −k−y]] with y = 0 at 0/1, y = −1−k₁ at 1/1
// and y = −2−k₁−k∞ at 1/0.
//
// The matrix has determinant 1, trace −k for the weight k of the class of s,
// and the number N of s as its upper right entry. So N divides y² + k·y + 1
// with y its upper left entry.
//
// Runs are taken by powers, O(log n) products of matrices for a run of n. The
// limit of the family is tested against four times the bits of N. For equal weights
// the matrices are known: "SL(2,Z)-matrixizations of generalized Markov
// numbers", arXiv 2407.08203.
func (f Family) Matrix(s farey.Slope) (contfrac.Matrix, error) {
	return f.MatrixContext(context.Background(), s)
}

// MatrixContext is Matrix that stops when ctx ends, with its error.
func (f Family) MatrixContext(ctx context.Context, s farey.Slope) (contfrac.Matrix, error) {
	ctx = contextOf(ctx)
	if err := f.fits(ctx, s, 4); err != nil {
		return contfrac.Matrix{}, err
	}
	m := matrices{}.at(f, s, running(ctx))
	if err := ctx.Err(); err != nil {
		return contfrac.Matrix{}, fmt.Errorf("orbifold: matrix at %v: %w", s, err)
	}
	return m, nil
}

// RootMod returns the number N of the slope s and the upper left entry y of
// its matrix, both modulo m and in 0 … m−1, for slopes of any size. Before
// the reduction N divides y² + k·y + 1, k the weight of the class of s. Cost:
// O(log p + log q) operations modulo m. A modulus below 1 is ErrModulus.
func (f Family) RootMod(s farey.Slope, m *big.Int) (n, y *big.Int, err error) {
	if err := checkModulus(m); err != nil {
		return nil, nil, err
	}
	e := matrices{new(big.Int).Set(m)}.at(f, s, always)
	return e.B(), e.A(), nil
}

// matrices does the arithmetic of 2×2 matrices of determinant 1, over the
// integers or, when mod is set, modulo mod.
type matrices struct{ mod *big.Int }

func (r matrices) reduce(m contfrac.Matrix) contfrac.Matrix {
	if r.mod == nil {
		return m
	}
	a, b, c, d := m.A(), m.B(), m.C(), m.D()
	return contfrac.NewMatrix(a.Mod(a, r.mod), b.Mod(b, r.mod), c.Mod(c, r.mod), d.Mod(d, r.mod))
}

func (r matrices) mul(m, n contfrac.Matrix) contfrac.Matrix { return r.reduce(m.Mul(n)) }

// inverse returns m⁻¹ for determinant 1.
func (r matrices) inverse(m contfrac.Matrix) contfrac.Matrix {
	b, c := m.B(), m.C()
	return r.reduce(contfrac.NewMatrix(m.D(), b.Neg(b), c.Neg(c), m.A()))
}

// conjugate returns q·m·q⁻¹.
func (r matrices) conjugate(m, q contfrac.Matrix) contfrac.Matrix {
	return r.mul(r.mul(q, m), r.inverse(q))
}

func (r matrices) power(m contfrac.Matrix, n *big.Int, step func() bool) contfrac.Matrix {
	var p contfrac.Matrix
	for b := n.BitLen() - 1; b >= 0 && step(); b-- {
		p = r.mul(p, p)
		if n.Bit(b) == 1 {
			p = r.mul(p, m)
		}
	}
	return p
}

// corner returns M(y, k).
func (r matrices) corner(y *big.Int, k int64) contfrac.Matrix {
	d := new(big.Int).Neg(new(big.Int).Add(y, big.NewInt(k)))
	c := new(big.Int).Mul(y, d)
	return r.reduce(contfrac.NewMatrix(y, big.NewInt(1), c.Sub(c, big.NewInt(1)), d))
}

// at returns the matrix of the slope s in the family f.
func (r matrices) at(f Family, s farey.Slope, step func() bool) contfrac.Matrix {
	zero, infinity, one := f.weights[farey.Zero], f.weights[farey.Infinity], f.weights[farey.One]
	y := new(big.Int)
	x := r.corner(y, zero)
	y.Sub(y, big.NewInt(1)).Sub(y, big.NewInt(one))
	yy := r.corner(y, one)
	y.Sub(y, big.NewInt(1)).Sub(y, big.NewInt(infinity))
	z := r.corner(y, infinity)
	p := r.reduce(contfrac.NewMatrix(big.NewInt(-1), new(big.Int), f.K(), big.NewInt(-1)))
	back := r.inverse(p)

	path := s.Path()
	if path.IsBase() {
		return [3]contfrac.Matrix{farey.Zero: x, farey.Infinity: z, farey.One: yy}[s.Class()]
	}
	// The edge (a, b) and c behind it, a·b·c = p.
	a, b, c := x, yy, z
	switch path.First() {
	case farey.Zero:
		a, b, c = yy, z, r.conjugate(x, back)
	case farey.One:
		a, b, c = z, r.conjugate(x, back), r.conjugate(yy, back)
	}
	for letter, n := range path.Moves().Runs() {
		if !step() {
			break
		}
		if letter == contfrac.L {
			// Round a each matrix times the one before is q = b·c, so two
			// flips conjugate by q.
			q := r.mul(b, c)
			c = r.alternate(c, b, q, n, step)
			b = r.mul(q, r.inverse(c))
			continue
		}
		// Round b each matrix times the next is q = p·b⁻¹, so two flips
		// conjugate by q⁻¹; the matrix behind is seen from beyond p.
		q := r.mul(p, r.inverse(b))
		last := r.alternate(r.conjugate(c, p), a, r.inverse(q), n, step)
		a, c = r.mul(r.inverse(last), q), r.conjugate(last, back)
	}
	return r.conjugate(c, b)
}

// alternate returns term n of the sequence m₀, m₁, … in which every second
// term is the conjugate by q of the one two before.
func (r matrices) alternate(m0, m1, q contfrac.Matrix, n *big.Int, step func() bool) contfrac.Matrix {
	m := m0
	if n.Bit(0) == 1 {
		m = m1
	}
	return r.conjugate(m, r.power(q, new(big.Int).Rsh(n, 1), step))
}
