package recognize

import (
	"context"
	"math/big"

	"example.com/onecusp/contfrac"
)

// candidates returns the fans with weights up to bound that have the terms,
// two or more, one after the other.
func (s Sequence) candidates(ctx context.Context, bound int64) ([]FanMatch, error) {
	if len(s.terms) < 2 {
		return nil, nil
	}
	y0, y1 := s.terms[0], s.terms[1]
	product := contfrac.Product(y0, y1)
	squares := contfrac.Product(y0, y0)
	squares.Add(squares, contfrac.Product(y1, y1))
	var found []FanMatch
	for k := range bound + 1 {
		for c := range bound + 1 {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			for c1 := range bound + 1 {
				// N² − 2h·N + q = 0 with 2h = K·y₀·y₁ − c·y₁ − c'·y₀ and
				// q = y₀² + y₁² + k·y₀·y₁.
				h := new(big.Int).Mul(product, big.NewInt(3+k+c+c1))
				h.Sub(h, new(big.Int).Mul(y1, big.NewInt(c)))
				h.Sub(h, new(big.Int).Mul(y0, big.NewInt(c1)))
				q := new(big.Int).Mul(product, big.NewInt(k))
				for _, n := range roots(h, q.Add(q, squares)) {
					m, ok, err := s.candidate(ctx, n, k, c, c1)
					if err != nil {
						return nil, err
					}
					if ok {
						found = append(found, m)
					}
				}
			}
		}
	}
	return found, nil
}

// roots returns the integers n ≥ 1 with n² − b·n + q = 0, for q > 0.
func roots(b, q *big.Int) []*big.Int {
	d := contfrac.Product(b, b)
	d.Sub(d, new(big.Int).Lsh(q, 2))
	if d.Sign() < 0 || b.Sign() <= 0 {
		return nil
	}
	r := new(big.Int).Sqrt(d)
	if contfrac.Product(r, r).Cmp(d) != 0 {
		return nil
	}
	// b and r have the same parity.
	lo, hi := new(big.Int).Sub(b, r), new(big.Int).Add(b, r)
	if r.Sign() == 0 {
		return []*big.Int{lo.Rsh(lo, 1)}
	}
	return []*big.Int{lo.Rsh(lo, 1), hi.Rsh(hi, 1)}
}

// candidate returns the fan about the number n with these weights, if the
// terms go on as it does.
func (s Sequence) candidate(ctx context.Context, n *big.Int, k, c, c1 int64) (FanMatch, bool, error) {
	// t = K·N − k, and w = c·N, c'·N.
	t := new(big.Int).Mul(n, big.NewInt(3+k+c+c1))
	t.Sub(t, big.NewInt(k))
	w := [2]*big.Int{new(big.Int).Mul(n, big.NewInt(c)), new(big.Int).Mul(n, big.NewInt(c1))}
	for j := 1; j+1 < len(s.terms); j++ {
		y := contfrac.Product(t, s.terms[j])
		if y.Sub(y, w[j&1]).Sub(y, s.terms[j-1]).Cmp(s.terms[j+1]) != 0 {
			return FanMatch{}, false, nil
		}
	}
	if n.Cmp(big.NewInt(1)) == 0 && k != 0 {
		return FanMatch{}, false, nil // once is enough: the weight k is free
	}
	return newMatch(ctx, section{1, t}, w, s.terms[0], s.terms[1])
}
