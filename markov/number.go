package markov

import (
	"context"
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Family returns the classical family, with weights (0,0,0) and K = 3. All its
// methods take lattice slopes.
func Family() orbifold.Family { return orbifold.Family{} }

// Number returns the Markov number at a lattice slope, any slope in Q ∪ {∞}. It
// is Family().Number: cost, source, and ErrTooLarge for a number of more than
// orbifold.DefaultLimit bits are described there.
func Number(lattice farey.Slope) (*big.Int, error) {
	n, err := Family().Number(lattice)
	if err != nil {
		return nil, fmt.Errorf("markov: number at lattice slope %v: %w", lattice, err)
	}
	return n, nil
}

// Frobenius returns the Markov number m_t at the index t in [0, 1], which is that
// at the lattice slope t/(1+t): m_{0/1} = 1, m_{1/1} = 2, m_{1/2} = 5. An index
// outside [0, 1] is ErrIndex. Cost and other errors are those of Number.
func Frobenius(index farey.Slope) (*big.Int, error) {
	lattice, err := FromIndex(index)
	if err != nil {
		return nil, err
	}
	n, err := Family().Number(lattice)
	if err != nil {
		return nil, fmt.Errorf("markov: number at index %v: %w", index, err)
	}
	return n, nil
}

// Indices returns the indices at which the Markov number is n, increasing; none if
// n is no Markov number. With a nil error the list is complete. That it never has
// two members is the uniqueness conjecture.
//
// It is Family().Identify with slopes as indices: it visits the Markov numbers up
// to √n, some 0.045·(ln n)² of them. An n below 1 is ErrNotPositive. When ctx ends
// first, the result is nil and the error that of ctx.
func Indices(ctx context.Context, n *big.Int) ([]farey.Slope, error) {
	found, err := Family().Identify(ctx, n)
	if err != nil {
		return nil, fmt.Errorf("markov: indices of a number: %w", err)
	}
	for i, lattice := range found {
		if found[i], err = Index(lattice); err != nil {
			return nil, err // not reached: the domain of the family is [0, 1/2]
		}
	}
	return found, nil
}

// IsNumber tells whether n is a Markov number. Integers below 1 are none. With a
// nil error the answer is proved. Cost and the part of ctx are those of Indices; a
// nil n is ErrNotPositive.
func IsNumber(ctx context.Context, n *big.Int) (bool, error) {
	if n != nil && n.Sign() <= 0 {
		return false, nil
	}
	found, err := Indices(ctx, n)
	return len(found) > 0, err
}

// Numbers returns the Markov numbers in increasing order, each with its index. If
// two indices had the same number, they would come one after the other, the smaller
// index first.
//
// The sequence does not end; the caller stops. The iterator can be used again. It
// is Family().Ascending, which states the cost.
func Numbers() iter.Seq2[farey.Slope, *big.Int] {
	return func(yield func(index farey.Slope, n *big.Int) bool) {
		for node := range Family().Ascending() {
			if index, err := Index(node.Slope()); err == nil && !yield(index, node.Number()) {
				return
			}
		}
	}
}
