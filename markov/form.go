package markov

import (
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold/spectrum"
)

// Root returns the root u of the index: the integer 0 ≤ u ≤ m/2 with m | u² + 1 that belongs to
// the Markov number m there. (Other roots of −1 modulo m may exist; they belong to no index, or,
// if the uniqueness conjecture fails, to another one.) An index outside [0, 1] is ErrIndex; cost
// and other errors are those of spectrum.Root.
func Root(index farey.Slope) (*big.Int, error) {
	_, u, err := numberAndRoot(index)
	return u, err
}

func numberAndRoot(index farey.Slope) (m, u *big.Int, err error) {
	lattice, err := FromIndex(index)
	if err != nil {
		return nil, nil, err
	}
	matrix, err := Family().Matrix(lattice)
	if err != nil {
		return nil, nil, fmt.Errorf("markov: root at index %v: %w", index, err)
	}
	m = matrix.B()
	u = matrix.A()
	u.Mod(u, m)
	if other := new(big.Int).Sub(m, u); other.Cmp(u) < 0 {
		u = other
	}
	return m, u, nil
}

// Form returns the Markov form of the index,
//
//	f = m·X² + (3m − 2u)·XY + (b − 3u)·Y²,   b = (u² + 1)/m,
//
// with m the Markov number and u the Root. Its discriminant is 9m² − 4 and its least nonzero
// absolute value m. Up to a sign of Y and proper equivalence it is the form of spectrum.Form.
// Errors are those of Root.
//
// Source: "An Introduction to Diophantine Approximation", Cambridge 1957, ch. II.
func Form(index farey.Slope) (contfrac.Form, error) {
	m, u, err := numberAndRoot(index)
	if err != nil {
		return contfrac.Form{}, err
	}
	b := contfrac.Product(u, u)
	b.Add(b, big.NewInt(1)).Quo(b, m)
	b.Sub(b, new(big.Int).Mul(u, big.NewInt(3)))
	middle := new(big.Int).Mul(m, big.NewInt(3))
	middle.Sub(middle, u.Lsh(u, 1))
	return contfrac.NewForm(m, middle, b)
}

// LagrangeValue returns √(9 − 4/m²) for the Markov number m at the index, as √(9m² − 4)/m: a point
// of the Lagrange and Markov spectra below 3. An index outside [0, 1] is ErrIndex; cost and other
// errors are those of spectrum.LagrangeValue.
func LagrangeValue(index farey.Slope) (spectrum.Value, error) {
	lattice, err := FromIndex(index)
	if err != nil {
		return spectrum.Value{}, err
	}
	return spectrum.LagrangeValue(Family(), lattice)
}

// Spectrum returns the Lagrange and Markov spectra below 3, which are the same there, in
// increasing order: √5, √8, √221/5, …, each value with its index. If two indices had the same
// Markov number, their values, equal, would come one after the other.
//
// The sequence does not end; the caller stops. It can be used again. Cost is that of Numbers.
func Spectrum() iter.Seq2[farey.Slope, spectrum.Value] {
	return func(yield func(farey.Slope, spectrum.Value) bool) {
		for index := range Numbers() {
			v, err := LagrangeValue(index)
			if err != nil || !yield(index, v) {
				return // numbers too large to hold are never reached
			}
		}
	}
}

// Approximations yields the convergents of the first root of the Markov form of the index, in
// order, each with its constant q·|q·x − p|, whose lower limit is m/√(9m² − 4) (LagrangeValue has
// it as Constant). The sequence does not end; the caller stops. It can be used again. Errors are
// those of Form and contfrac.Surd.Periodic.
func Approximations(index farey.Slope) (iter.Seq[spectrum.Approximation], error) {
	f, err := Form(index)
	if err != nil {
		return nil, err
	}
	x, _ := f.Roots()
	return spectrum.Convergents(x)
}
