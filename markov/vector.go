package markov

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// NumberAt returns the number of the lattice point (q, p), 0 ≤ p ≤ q, primitive or not. At a
// primitive point it is the Markov number m with index p/q; at its multiples it goes on by
//
//	m_0 = 0,   m_{n+1} = 3m·m_n − m_{n−1},
//
// so that (0, 0) has 0. Another point, or a nil coordinate, is ErrIndex; a number of more than
// about orbifold.DefaultLimit bits is ErrTooLarge. Cost: that of Frobenius and O(log n) products
// for the n-th multiple.
//
// Source: "On the Markov numbers: fixed numerator, denominator, and sum conjectures", Adv. Appl.
// Math. 130 (2021).
func NumberAt(q, p *big.Int) (*big.Int, error) {
	if q != nil && p != nil && q.Sign() == 0 && p.Sign() == 0 {
		return new(big.Int), nil
	}
	if q == nil || p == nil || p.Sign() < 0 || p.Cmp(q) > 0 {
		return nil, fmt.Errorf("markov: number at the lattice point (%s, %s): points (q, p) with 0 ≤ p ≤ q would be accepted: %w", contfrac.Abbreviate(q), contfrac.Abbreviate(p), ErrIndex)
	}
	n := new(big.Int).GCD(nil, nil, p, q)
	index, err := farey.New(p, q)
	if err != nil {
		return nil, err // not reached: q ≥ 1
	}
	// m_n is below (3m)ⁿ, and m ≥ 1 has a bit.
	if _, err := boundedBits(index, new(big.Int).Mul(n, big.NewInt(3))); err != nil {
		return nil, fmt.Errorf("markov: number at the lattice point (%s, %s): %w", contfrac.Abbreviate(q), contfrac.Abbreviate(p), err)
	}
	m, err := Frobenius(index)
	if err != nil {
		return nil, err
	}
	// m_n/m is the upper left entry of a power of the matrix of the recurrence.
	t := new(big.Int).Mul(m, big.NewInt(3))
	power, err := contfrac.NewMatrix(t, big.NewInt(-1), big.NewInt(1), nil).Pow(n.Int64() - 1)
	if err != nil {
		return nil, err
	}
	return contfrac.Product(m, power.A()), nil
}
