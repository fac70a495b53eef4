package contfrac

import (
	"fmt"
	"math/big"
	"sort"
)

// Cycle returns the conjugacy class of a hyperbolic matrix in SL(2, Z) as a cyclic word: a word w
// with both letters whose matrix is g⁻¹·m·g for some g in SL(2, Z), so that the trace is kept. Of
// the rotations of w the one of LeastRotation is returned; two matrices are conjugate in SL(2, Z)
// exactly when their cycles are equal. The run lengths are the period of the continued fraction of
// the fixed points, twice if it is odd, and repeated when m is a power.
//
// The determinant must be 1 (ErrDeterminant) and the trace at least 3 (ErrTrace): for a trace of
// at most −3 take the cycle of m.Neg(); other matrices have no such word.
//
// It costs one expansion of a rational number of the size of the entries and O(log r) products of
// the matrices of words of up to r runs, for r runs in the expansion.
func (m Matrix) Cycle() (Word, error) {
	if err := m.checkHyperbolic(); err != nil {
		return Word{}, fmt.Errorf("contfrac: cycle of a matrix: %w", err)
	}
	p, _ := m.positive()
	w, err := p.Factor()
	if err != nil {
		return Word{}, err
	}
	return w.LeastRotation(), nil
}

func (m Matrix) checkHyperbolic() error {
	if det := m.Det(); det.Cmp(oneInt) != 0 {
		return fmt.Errorf("determinant %s: 1 is accepted: %w", Abbreviate(det), ErrDeterminant)
	}
	if t := m.Trace(); t.Cmp(big.NewInt(2)) <= 0 {
		return fmt.Errorf("trace %s: at least 3 is accepted: %w", Abbreviate(t), ErrTrace)
	}
	return nil
}

// positive returns a conjugate p = u⁻¹·m·u of a matrix of determinant 1 and trace above 2, with
// det u = 1 and all entries of p positive.
func (m Matrix) positive() (p, u Matrix) {
	// The fixed points x of m, cx² + (d−a)x − b = 0, are irrational. An attracting one above 0 and
	// a repelling one below 0 are all that it takes: then b, c > 0, hence ad = 1 + bc > 0. So 0
	// has to come between them.
	p = m
	if p.fixedSign() > 0 {
		// They lie on one side of 0, and (a−d)/2c lies between them. Down the Stern–Brocot tree to
		// it, the first run that one of them does not follow to its end parts them; behind it 0
		// comes between them.
		e := m.entries()
		num, den := new(big.Int).Sub(e.a, e.d), new(big.Int).Lsh(e.c, 1)
		if den.Sign() < 0 {
			num.Neg(num)
			den.Neg(den)
		}
		f := euclid(num, den)
		u = rightPower(f.firstTerm())
		if p = m.conjugate(u); p.fixedSign() > 0 {
			w := Word{first: L, runs: f.n - 1, data: f.tail().data}
			ends := w.runEnds()
			i := sort.Search(len(ends)-1, func(i int) bool {
				return !p.conjugate(w.prefix(i+1, ends).Matrix()).fixesPositive()
			})
			v := w.prefix(i+1, ends).Matrix()
			p, u = p.conjugate(v), u.Mul(v)
		}
	}
	if e := p.entries(); e.c.Sign() < 0 {
		turn := matrixOf(0, -1, 1, 0)
		p, u = p.conjugate(turn), u.Mul(turn)
	}
	return p, u
}

// fixedSign returns the sign of the product −b/c of the fixed points.
func (m Matrix) fixedSign() int {
	e := m.entries()
	return -e.b.Sign() * e.c.Sign()
}

// fixesPositive reports whether both fixed points are above 0.
func (m Matrix) fixesPositive() bool {
	e := m.entries()
	return m.fixedSign() > 0 && e.a.Cmp(e.d)*e.c.Sign() > 0
}

// conjugate returns u⁻¹·m·u for det u = 1.
func (m Matrix) conjugate(u Matrix) Matrix {
	e := u.entries()
	inverse := Matrix{e: &entries{e.d, new(big.Int).Neg(e.b), new(big.Int).Neg(e.c), e.a}}
	return inverse.Mul(m.Mul(u))
}

// rightPower returns Rⁿ for any integer n.
func rightPower(n *big.Int) Matrix {
	return Matrix{e: &entries{big.NewInt(1), n, new(big.Int), big.NewInt(1)}}
}

// firstTerm returns the first term of a fraction that has one.
func (f Fraction) firstTerm() *big.Int {
	t := packedBig(f.data[:packedEnd(f.data, 0)])
	if f.neg {
		t.Neg(t)
	}
	return t
}

// runEnds returns the index in the data just past each run.
func (w Word) runEnds() []int {
	ends := make([]int, 0, w.runs)
	for i := 0; i < len(w.data); {
		i = packedEnd(w.data, i)
		ends = append(ends, i)
	}
	return ends
}

// prefix returns the first n ≥ 1 runs of w; ends are its runEnds.
func (w Word) prefix(n int, ends []int) Word {
	return Word{first: w.first, runs: n, data: w.data[:ends[n-1]]}
}
