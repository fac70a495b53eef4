package recognize

import (
	"cmp"
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/linear"
)

// FanMatch is a fan that has the terms of a sequence in arithmetic
// progression: term j of the sequence is term j·Step of the fan.
type FanMatch struct {
	// Fan is the fan, through the slope of the first term. Its family has weights
	// k₀ ≥ k∞ ≥ k₁; the families with the same weights in another order have the same
	// numbers. Of the fans that symmetries of the family take to each other it
	// is the one with the centre in Domain, then with the start ≥ 0, then with the
	// least start.
	Fan orbifold.Fan
	// Step is ±1 for consecutive terms, ±d for every d-th; the sign is the
	// direction.
	Step int64
	// FreeWeight tells that the number at the centre is 1: then the weight of the
	// centre's class does not count, and every other one gives the same fan. It is
	// taken equal to the other two weights where those are equal, else as 0.
	FreeWeight bool
	// Rule is the minimal recurrence of the infinite sequence, a theorem about the
	// fan; its first terms were computed at the slopes, and all terms given
	// satisfy it.
	Rule linear.Recurrence
}

// Slope returns the slope of term j.
func (m FanMatch) Slope(j int64) farey.Slope { return m.Fan.Slope(m.index(j)) }

// Term returns term j, for j beyond the terms given too. Errors are those of
// Family.Number.
func (m FanMatch) Term(j int64) (*big.Int, error) { return m.Fan.Term(m.index(j)) }

func (m FanMatch) index(j int64) *big.Int {
	return new(big.Int).Mul(big.NewInt(j), big.NewInt(m.Step))
}

// Check computes every term of the sequence again, at its slope and with the
// fan's own arithmetic only, and returns nil when all agree.
func (m FanMatch) Check(ctx context.Context, s Sequence) error {
	for j, a := range s.terms {
		y, err := m.Fan.TermContext(ctx, m.index(int64(j)))
		if err != nil {
			return err
		}
		if y.Cmp(a) != 0 {
			return fmt.Errorf("recognize: term %d is %s, but %s at slope %v: %w", j, contfrac.Abbreviate(a), contfrac.Abbreviate(y), m.Slope(int64(j)), linear.ErrNotRecurrent)
		}
	}
	return nil
}

// newMatch returns the fan of trace t with the arcs y₀, y₁ one after the other
// and weights w over the centre's number; false if there is none.
func newMatch(ctx context.Context, x section, w [2]*big.Int, y0, y1 *big.Int) (FanMatch, bool, error) {
	// N² = t·y₀·y₁ − y₀² − y₁² − w₀·y₁ − w₁·y₀.
	square := contfrac.Product(x.t, contfrac.Product(y0, y1))
	for _, p := range [...][2]*big.Int{{y0, y0}, {y1, y1}, {w[0], y1}, {w[1], y0}} {
		square.Sub(square, contfrac.Product(p[0], p[1]))
	}
	if square.Sign() <= 0 {
		return FanMatch{}, false, nil
	}
	n := new(big.Int).Sqrt(square)
	if contfrac.Product(n, n).Cmp(square) != 0 {
		return FanMatch{}, false, nil
	}
	c, ok := exact(w[0], n)
	c1, ok1 := exact(w[1], n)
	if !ok || !ok1 {
		return FanMatch{}, false, nil
	}
	// k·(N−1) = t − (3 + c + c')·N.
	rest := new(big.Int).Add(c, c1)
	rest.Add(rest, big.NewInt(3))
	rest.Sub(x.t, rest.Mul(rest, n))
	one := big.NewInt(1)
	free := n.Cmp(one) == 0
	k := new(big.Int)
	if free {
		if rest.Sign() != 0 {
			return FanMatch{}, false, nil
		}
		if c.Cmp(c1) == 0 {
			k.Set(c)
		}
	} else if k, ok = exact(rest, new(big.Int).Sub(n, one)); !ok {
		return FanMatch{}, false, nil
	}
	if !k.IsInt64() || !c.IsInt64() || !c1.IsInt64() {
		return FanMatch{}, false, fmt.Errorf("there is a fan with weights %s at the centre and %s, %s round it; weights up to 2⁶³−1 are accepted: %w", contfrac.Abbreviate(k), contfrac.Abbreviate(c), contfrac.Abbreviate(c1), ErrTooLarge)
	}
	m, err := x.realise(ctx, role{n, k.Int64()}, [2]int64{c.Int64(), c1.Int64()}, w, [2]*big.Int{y0, y1})
	m.FreeWeight = free
	return m, err == nil, err
}

// role is an arc of a triangle with its number and the weight of its class.
type role struct {
	number *big.Int
	weight int64
}

// realise returns the fan at its slopes, from the number and the weight of the
// centre, the weights c of the arcs, w = c·N, and the numbers y of two arcs one
// after the other; all of them solve (E).
//
// The slopes are read off where the fan is narrowest, since the path to a
// triangle far out in a fan is long.
func (x section) realise(ctx context.Context, centre role, c [2]int64, w, y [2]*big.Int) (FanMatch, error) {
	falling := y[1].Cmp(y[0]) < 0
	if falling { // look at the fan in the other direction
		c[0], c[1] = c[1], c[0]
		w[0], w[1] = w[1], w[0]
		y[0], y[1] = y[1], y[0]
	}
	j, low, above := x.narrowest(w, y)
	f, s, err := triangle(ctx, [3]role{centre, {low, c[j&1]}, {above, c[(j+1)&1]}})
	if err != nil {
		return FanMatch{}, err
	}
	fan, err := f.Fan(s[0], s[1])
	if err != nil {
		return FanMatch{}, err
	}
	side, _ := fan.Index(s[2]) // 1 or −1
	s[1] = fan.Slope(new(big.Int).Mul(side, big.NewInt(j)))
	s[2] = fan.Slope(new(big.Int).Mul(side, big.NewInt(j+1)))
	if falling {
		s[1], s[2] = s[2], s[1]
	}
	s = representative(f, s)
	if fan, err = f.Fan(s[0], s[1]); err != nil {
		return FanMatch{}, err
	}
	next, _ := fan.Index(s[2])
	m := FanMatch{Fan: fan, Step: x.d * next.Int64()}
	m.Rule, err = fan.Recurrence(m.Step)
	return m, err
}

// triangle returns the family with the weights of the roles, in falling order,
// and the slopes of the roles, whose numbers solve (E).
func triangle(ctx context.Context, roles [3]role) (f orbifold.Family, s [3]farey.Slope, err error) {
	order := []int{0, 1, 2}
	slices.SortStableFunc(order, func(i, j int) int { return cmp.Compare(roles[j].weight, roles[i].weight) })
	if f, err = orbifold.New(roles[order[0]].weight, roles[order[1]].weight, roles[order[2]].weight); err != nil {
		return f, s, err
	}
	triple, err := f.NewTriple(roles[order[0]].number, roles[order[1]].number, roles[order[2]].number)
	if err != nil {
		return f, s, err
	}
	path, err := triple.PathContext(ctx)
	if err != nil {
		return f, s, err
	}
	t := path.Triangle()
	for class, i := range order {
		s[i] = t.Vertex(farey.Class(class))
	}
	return f, s, nil
}

// representative returns the image of centre, first and next arc under the
// symmetry of the family that FanMatch.Fan names.
func representative(f orbifold.Family, s [3]farey.Slope) [3]farey.Slope {
	centre := f.Representative(s[0])
	best, found := s, false
	for _, g := range f.Symmetries() {
		t := [3]farey.Slope{g.Apply(s[0]), g.Apply(s[1]), g.Apply(s[2])}
		if !t[0].Equal(centre) {
			continue
		}
		better := t[1].Cmp(best[1]) < 0
		if negative := t[1].Sign() < 0; negative != (best[1].Sign() < 0) {
			better = !negative
		}
		if !found || better {
			best, found = t, true
		}
	}
	return best
}
