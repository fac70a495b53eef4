package markov

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Cohn returns the Cohn matrix of the index t in [0, 1] with parameter a, any integer:
//
//	C_{0/1} = [[a, 1], [3a−a²−1, 3−a]],   C_{1/1} = [[2a+1, 2], [−2a²+4a+2, 5−2a]],
//
// and at the mediant of two neighbours the product of their matrices, that of the smaller index
// first. So it is the Christoffel word of the index (Christoffel) with C_{0/1} for x and C_{1/1}
// for y. Its determinant is 1, its upper right entry the Markov number m_t and its trace 3·m_t.
// For a = 2 it is the product of the matrices [[c, 1], [1, 0]] over the terms c of 1, 1 for x and
// 2, 2 for y.
//
// An index outside [0, 1] is ErrIndex. When four times the bits of m_t pass orbifold.DefaultLimit,
// the error is ErrTooLarge. Cost: that of some products of the size of m_t.
func Cohn(index farey.Slope, a int64) (contfrac.Matrix, error) {
	if _, err := boundedBits(index, big.NewInt(4)); err != nil {
		return contfrac.Matrix{}, fmt.Errorf("markov: Cohn matrix at index %v: %w", index, err)
	}
	left, right := cohnBase(a)
	path := index.Path()
	if path.IsBase() {
		if index.Sign() == 0 {
			return left, nil
		}
		return right, nil
	}
	for letter, n := range path.Moves().Runs() {
		// The run is no longer than the number has bits.
		if letter == contfrac.L {
			power, err := left.Pow(n.Int64())
			if err != nil {
				return contfrac.Matrix{}, err
			}
			right = power.Mul(right)
			continue
		}
		power, err := right.Pow(n.Int64())
		if err != nil {
			return contfrac.Matrix{}, err
		}
		left = left.Mul(power)
	}
	return left.Mul(right), nil
}

// cohnBase returns C_{0/1} and C_{1/1}.
func cohnBase(a int64) (zero, one contfrac.Matrix) {
	x := big.NewInt(a)
	n := func(square, linear, constant int64) *big.Int {
		v := new(big.Int).Mul(big.NewInt(square), x)
		v.Add(v, big.NewInt(linear)).Mul(v, x)
		return v.Add(v, big.NewInt(constant))
	}
	return contfrac.NewMatrix(x, big.NewInt(1), n(-1, 3, -1), n(0, -1, 3)),
		contfrac.NewMatrix(n(0, 2, 1), big.NewInt(2), n(-2, 4, 2), n(0, -2, 5))
}

// boundedBits returns an upper bound on the bits of the number at an index; an error if that many
// copies of it pass the limit.
func boundedBits(index farey.Slope, copies *big.Int) (*big.Int, error) {
	lattice, err := FromIndex(index)
	if err != nil {
		return nil, err
	}
	_, bits, err := Family().Bits(lattice)
	if err != nil {
		return nil, err
	}
	if total := new(big.Int).Mul(bits, copies); total.Cmp(big.NewInt(orbifold.DefaultLimit)) > 0 {
		return nil, fmt.Errorf("a result of %s bits: up to %d would be accepted: %w", contfrac.Abbreviate(total), orbifold.DefaultLimit, ErrTooLarge)
	}
	return bits, nil
}
