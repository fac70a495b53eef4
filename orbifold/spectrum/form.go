package spectrum

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// corner is the matrix [[y, n], [c, −k−y]] of a slope with its family.
type corner struct {
	y, n, c *big.Int
	k, bigK *big.Int
}

func cornerAt(f orbifold.Family, s farey.Slope) (corner, error) {
	m, err := f.Matrix(s)
	if err != nil {
		return corner{}, err
	}
	return corner{y: m.A(), n: m.B(), c: m.C(), k: weight(f, s), bigK: f.K()}, nil
}

// weight returns the weight of the class of s.
func weight(f orbifold.Family, s farey.Slope) *big.Int { return big.NewInt(f.Weight(s.Class())) }

// trace returns K·n − k.
func trace(bigK, n, k *big.Int) *big.Int {
	t := contfrac.Product(bigK, n)
	return t.Sub(t, k)
}

// last returns K·y + c.
func (m corner) last() *big.Int {
	x := contfrac.Product(m.bigK, m.y)
	return x.Add(x, m.c)
}

// Form returns the form
//
//	F_s = N·X² − (K·N − k − 2y)·XY − (K·y + c)·Y²
//
// of the slope s, with [[y, N], [c, −k−y]] the matrix of the slope. Its discriminant is t² − 4 for
// the trace t = K·N − k, and N = F_s(1, 0) is its least nonzero absolute value. It is not divided
// by its content.
//
// That N is the least value is proved for (0,0,0), in the source named in the package
// documentation; for other weights it is a law found by computing and tested on many slopes, of
// which this library gives no proof.
//
// Cost and errors are those of f.Matrix.
func Form(f orbifold.Family, s farey.Slope) (contfrac.Form, error) {
	m, err := cornerAt(f, s)
	if err != nil {
		return contfrac.Form{}, fmt.Errorf("spectrum: form at %v: %w", s, err)
	}
	b := trace(m.bigK, m.n, m.k)
	b.Sub(b, new(big.Int).Lsh(m.y, 1))
	c := m.last()
	return contfrac.NewForm(m.n, b.Neg(b), c.Neg(c))
}

// Automorph returns the matrix
//
//	[[K·N − k − y, K·y + c], [N, y]],
//
// which is −P⁻¹·M for the matrix M of the slope s, with rows and columns exchanged. Its
// determinant is 1 and its trace t = K·N − k; it keeps the form F_s, F_s.Apply(m) = F_s, and
// attracts to its first root. It is a power of the automorph that the form finds from its period,
// often the first. Cost and errors are those of f.Matrix.
func Automorph(f orbifold.Family, s farey.Slope) (contfrac.Matrix, error) {
	m, err := cornerAt(f, s)
	if err != nil {
		return contfrac.Matrix{}, fmt.Errorf("spectrum: automorph at %v: %w", s, err)
	}
	d := trace(m.bigK, m.n, m.k)
	return contfrac.NewMatrix(d.Sub(d, m.y), m.last(), m.n, m.y), nil
}

// Root returns the y in 0 … N−1 that belongs to the slope s: the upper left entry of its matrix
// modulo its number N, with N | y² + k·y + 1 for the weight k of its class. The other root −k−y
// belongs to slopes too: under each symmetry s ↦ s' of the family that turns the plane over, the
// roots are exchanged. Cost and errors are those of f.Matrix.
func Root(f orbifold.Family, s farey.Slope) (*big.Int, error) {
	m, err := cornerAt(f, s)
	if err != nil {
		return nil, fmt.Errorf("spectrum: root at %v: %w", s, err)
	}
	return m.y.Mod(m.y, m.n), nil
}

// FixedPoint returns the first root of the form F_s, a quadratic irrational with the Lagrange
// value of the slope. Cost and errors are those of Form, and a greatest common divisor.
func FixedPoint(f orbifold.Family, s farey.Slope) (contfrac.Surd, error) {
	form, err := Form(f, s)
	if err != nil {
		return contfrac.Surd{}, err
	}
	x, _ := form.Roots()
	return x, nil
}

// Period returns the period of the continued fraction of FixedPoint, without what comes before it,
// begun anywhere: a purely periodic continued fraction that is equivalent to it. It comes from the
// conjugacy class of Automorph, at the cost of f.Matrix and contfrac.Matrix.Cycle, which is far
// quicker than following the expansion of a large surd term by term. Errors are those of f.Matrix.
func Period(f orbifold.Family, s farey.Slope) (contfrac.Periodic, error) {
	m, err := Automorph(f, s)
	if err != nil {
		return contfrac.Periodic{}, err
	}
	w, _ := m.Cycle() // its trace is at least 3
	return contfrac.NewPeriodic(contfrac.Fraction{}, w.Fraction())
}
