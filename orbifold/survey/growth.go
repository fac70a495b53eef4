package survey

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/orbifold"
)

// growthShift is the fineness of Growth: edges count as settled when their lengths
// add up to 2^−growthShift.
const growthShift = 112

// Growth returns an enclosure of the constant G of a family, to more than 30
// digits: the number of slopes in Q ∪ {∞} with length f = arccosh(t/2) ≤ X is
// asymptotically G·X². One of each symmetry class makes that G over the order of the symmetry
// group; for the classical family, G/6 is Zagier's constant.
//
// G is (3/π²)·(Σ over the base edges of 1/(f_u·f_w) + Σ over the other triangles of
// (f_u + f_w − f_r)/(f_u·f_w·f_r)) ("On the number of Markoff numbers below a given bound",
// Math. Comp. 39 (1982), for the classical family). A triangle's term is what
// 1/(f_u·f_w) grows by when it is replaced by the sum over the two edges in front, so the
// part of the sum over any finite part of the tree is the sum of 1/(f_u·f_w) over its outer
// edges. At a settled edge (see the comment on the units of a walk) all lengths in front are
// m·f_u + n·f_w up to (m + n)·ε, ε < 2^−110, so counting primitive vectors says that all
// that is in front adds (3/π²)/((f_u ± ε)·(f_w ± ε)) to G: the error bound.
// Cost: some ten thousand edges, about a second at most.
func Growth(ctx context.Context, f orbifold.Family) (lo, hi *big.Float, err error) {
	w, err := newWalker(Up(f, big.NewInt(1)))
	if err != nil {
		return nil, nil, err
	}
	s := &scale{family: f, k: f.K(), shift: growthShift}
	lengths := make(map[*arc]span)
	length := func(a *arc) (span, error) {
		if l, ok := lengths[a]; ok {
			return l, nil
		}
		t := new(big.Int).Mul(s.k, a.n)
		lo, hi, err := orbifold.LogUnit(t.Sub(t, big.NewInt(f.Weight(a.v.at.class()))), growthShift+16)
		if err != nil {
			return span{}, err
		}
		l := span{down().Set(lo), up().Set(hi)}
		lengths[a] = l
		return l, nil
	}
	sum := span{down(), up()}
	epsilon := new(big.Float).SetMantExp(big.NewFloat(1), 2-growthShift)
	_, roots := w.base()
	for _, root := range roots {
		for stack := []edge{root}; len(stack) > 0; {
			if err := context.Cause(ctx); err != nil {
				return nil, nil, fmt.Errorf("survey: growth: %w", err)
			}
			e := stack[len(stack)-1]
			stack = stack[:len(stack)-1]
			if w.constraints.skip(e.a.v.at, e.b.v.at) {
				continue
			}
			if !s.settled(e.a.n, e.b.n, e.c.n) {
				r := &arc{n: s.frontNumber(e), v: vertex{at: e.a.v.at + e.b.v.at}}
				left, right := e.behind(r)
				stack = append(stack, right, left)
				continue
			}
			u, err := length(e.a)
			if err != nil {
				return nil, nil, err
			}
			v, err := length(e.b)
			if err != nil {
				return nil, nil, err
			}
			most := up().Mul(up().Add(u.hi, epsilon), up().Add(v.hi, epsilon))
			least := down().Mul(down().Sub(u.lo, epsilon), down().Sub(v.lo, epsilon))
			one := big.NewFloat(1)
			sum = span{down().Add(sum.lo, down().Quo(one, most)), up().Add(sum.hi, up().Quo(one, least))}
		}
		clear(lengths) // each subtree has arcs of its own beside the base
	}
	p := pi()
	n := big.NewFloat(float64(3 * len(f.Symmetries())))
	lo = down().Quo(down().Mul(sum.lo, n), up().Mul(p.hi, p.hi))
	hi = up().Quo(up().Mul(sum.hi, n), down().Mul(p.lo, p.lo))
	return lo, hi, nil
}

// span is an interval of positive reals, computed with outward rounding.
type span struct{ lo, hi *big.Float }

const growthPrecision = 192

func down() *big.Float {
	return new(big.Float).SetPrec(growthPrecision).SetMode(big.ToNegativeInf)
}
func up() *big.Float { return new(big.Float).SetPrec(growthPrecision).SetMode(big.ToPositiveInf) }

// pi encloses π = 16·arctan(1/5) − 4·arctan(1/239).
func pi() span {
	const bits = growthPrecision
	total := new(big.Int)
	terms := int64(0)
	for _, s := range [...]struct{ c, q int64 }{{16, 5}, {-4, 239}} {
		power := new(big.Int).Lsh(big.NewInt(s.c), bits)
		power.Quo(power, big.NewInt(s.q))
		square := big.NewInt(-s.q * s.q)
		for k := int64(1); power.Sign() != 0; k += 2 {
			total.Add(total, new(big.Int).Quo(power, big.NewInt(k)))
			power.Quo(power, square)
			terms++
		}
	}
	// Quotients are truncated: an error below 2 a term, the tail below 1 a series.
	slack := big.NewInt(2*terms + 2)
	lo := down().SetInt(new(big.Int).Sub(total, slack))
	hi := up().SetInt(new(big.Int).Add(total, slack))
	return span{lo.SetMantExp(lo, -bits), hi.SetMantExp(hi, -bits)}
}
