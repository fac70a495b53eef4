package spectrum

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// IdentifyForm returns the slopes s in Q ∪ {∞} whose form F_s (Form) is properly equivalent to a
// positive multiple of g, increasing, 1/0 last; none if there are none.
//
// The least value of g and its discriminant leave at most one number N for each weight. Every way
// in which the form takes the value N, up to automorphs, is a member of its cycle, with a root y
// modulo N, and IdentifyRoot has the slopes. So each slope returned is proved, and the list is
// complete if N is the least value of F_s: see Form on how far that is proved.
//
// Cost: that of going once round the cycle of g, and of IdentifyRoot. A cycle of more than
// contfrac.MaxPeriod forms is ErrTooLarge; the other errors are those of ctx and IdentifyRoot.
func IdentifyForm(ctx context.Context, f orbifold.Family, g contfrac.Form) ([]farey.Slope, error) {
	found, err := identifyForms(ctx, f, g)
	if err != nil {
		return nil, fmt.Errorf("spectrum: slopes of the form %v: %w", g, err)
	}
	return found, nil
}

// IdentifySurd returns the slopes s in Q ∪ {∞} for which x is equivalent to a root of the form
// F_s: their continued fractions agree from some places on. They are increasing, 1/0 last; none if
// there are none.
//
// They are the slopes of IdentifyForm for x.Form(), its negative, and the mirror images of both
// under Y ↦ −Y. What is proved, cost and errors are those of IdentifyForm. For weights (0,0,0)
// BelowThree is quicker.
func IdentifySurd(ctx context.Context, f orbifold.Family, x contfrac.Surd) ([]farey.Slope, error) {
	g := x.Form()
	h, err := contfrac.NewForm(g.A(), new(big.Int).Neg(g.B()), g.C())
	if err != nil {
		return nil, err
	}
	found, err := identifyForms(ctx, f, g, g.Neg(), h, h.Neg())
	if err != nil {
		return nil, fmt.Errorf("spectrum: slopes of the surd %v: %w", x, err)
	}
	return found, nil
}

func identifyForms(ctx context.Context, f orbifold.Family, forms ...contfrac.Form) ([]farey.Slope, error) {
	var found slopeSet
	for _, g := range forms {
		g = g.Primitive()
		least, middles, err := minima(ctx, g)
		if err != nil {
			return nil, err
		}
		for _, k := range weights(f) {
			scale, ok := scaleOf(f, k, g.Discriminant(), least)
			if !ok {
				continue
			}
			n := contfrac.Product(scale, least)
			t := trace(f.K(), n, big.NewInt(k))
			for _, b := range middles {
				// b of F_s is −(t − 2y).
				y := contfrac.Product(scale, b)
				y.Add(y, t)
				slopes, err := IdentifyRoot(ctx, f, n, y.Mod(y.Rsh(y, 1), n))
				if err != nil {
					return nil, err
				}
				for _, s := range slopes {
					if f.Weight(s.Class()) == k {
						found.add(s)
					}
				}
			}
		}
	}
	return found.sorted(), nil
}

// minima returns the least absolute value of a primitive form, and the middle coefficients b of
// the members (a, b, c) of its cycle with that value as a.
func minima(ctx context.Context, g contfrac.Form) (least *big.Int, middles []*big.Int, err error) {
	n := 0
	for h := range g.Cycle() {
		if err := ctxErr(ctx); err != nil {
			return nil, nil, err
		}
		if n++; n > cycleLimit {
			return nil, nil, fmt.Errorf("a cycle of more than %d forms: %w", cycleLimit, ErrTooLarge)
		}
		a := h.A()
		if least == nil || a.CmpAbs(least) < 0 {
			least, middles = new(big.Int).Abs(a), nil
		}
		if a.Cmp(least) == 0 {
			middles = append(middles, h.B())
		}
	}
	return least, middles, nil
}

// cycleLimit is contfrac.MaxPeriod, except in tests.
var cycleLimit = contfrac.MaxPeriod

func ctxErr(ctx context.Context) error {
	if ctx == nil {
		return nil
	}
	return ctx.Err()
}

// scaleOf returns the integer g ≥ 1 by which a primitive form of discriminant d and least value m
// is multiplied to be F_s for a slope of weight k, if there is one: g²d = (K·g·m − k)² − 4.
func scaleOf(f orbifold.Family, k int64, d, m *big.Int) (g *big.Int, ok bool) {
	// With a = K²m² − d, a·g² − 2Kmk·g + k² − 4 = 0. As N = g·m has d·g² < (K·N)², a > 0, and as
	// a·g − Kmk = (K·N·k − k² + 4)/g > 0, g is the greater root.
	km := contfrac.Product(f.K(), m)
	a := contfrac.Product(km, km)
	a.Sub(a, d)
	if a.Sign() <= 0 {
		return nil, false
	}
	weight := big.NewInt(k)
	b := contfrac.Product(km, weight)
	c := new(big.Int).Mul(weight, weight)
	c.Sub(c, big.NewInt(4))
	square := contfrac.Product(b, b)
	square.Sub(square, contfrac.Product(a, c))
	if square.Sign() < 0 {
		return nil, false
	}
	root := new(big.Int).Sqrt(square)
	if contfrac.Product(root, root).Cmp(square) != 0 {
		return nil, false
	}
	g, rest := b.QuoRem(b.Add(b, root), a, new(big.Int))
	return g, rest.Sign() == 0 && g.Sign() > 0
}
