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
	Rule orbifold.Recurrence
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
			return fmt.Errorf("recognize: term %d is %s, but %s at slope %v: %w", j, brief(a), brief(y), m.Slope(int64(j)), orbifold.ErrNotRecurrent)
		}
	}
	return nil
}

// Fans is an answer of Sequence.Fans.
type Fans struct {
	// Verdict is Found or None for complete answers, Undecided for too few terms.
	Verdict Verdict
	// Matches lists the fans, short steps and small weights first. When undecided,
	// these are only fans with weights up to Options.Weight that have the terms one
	// after the other; others may be there.
	Matches []FanMatch
	// Reason says in words why the verdict is None or Undecided; it is empty when Found.
	Reason string
}

// FewTerms is the number of terms past which a sequence is decided: five
// terms determine the fans that contain them, or six when the second and the
// fourth are equal.
const FewTerms = 4

// Fans returns the fans, of all families with whatever weights, that have the
// terms in arithmetic progression: every d-th arc of the fan, in either direction, d ≥ 1.
// One of each class under symmetry is reported.
//
// From five terms on the answer is complete; see FewTerms. Why nothing is
// missed: every d-th term of a fan of trace t satisfies
// a_{j+1} + a_{j−1} = T·a_j − E_j with T = V_d(t) and E_j ≥ 0 of period two, so
// b_j = a_{j+2} − a_j satisfies b_{j+1} + b_{j−1} = T·b_j, which gives T. The d and t ≥ 3 with
// V_d(t) = T are finitely many. E determines the weights of the arcs times the
// centre's number N: uniquely for odd d, up to two cases for even d. By (E), y₀² + y₁² + N² + N·(c₀·y₁ + c₁·y₀) = t·y₀·y₁, which gives N, and
// t = K·N − k gives the centre's weight, unless N = 1. What comes out is a solution of (E)
// in positive integers, and each of those is a triple of the family at known
// slopes ("Generalization of Markov Diophantine equation via generalized
// cluster algebra", Electron. J. Combin. 30 (2023)).
//
// Terms below 1 are ErrNotPositive, three and more equal ones ErrConstant, and
// weights that pass int64 ErrTooLarge. Options count for undecided sequences
// only. Cost: for terms of b bits that lie n arcs from the least of the fan, O(n) products of b bits by
// short numbers to find the slopes; ctx stops that, with its error.
func (s Sequence) Fans(ctx context.Context, o Options) (Fans, error) {
	bound, err := o.weight()
	if err != nil {
		return Fans{}, err
	}
	if ctx == nil {
		ctx = context.Background()
	}
	if len(s.terms) == 0 {
		return Fans{}, fmt.Errorf("recognize: fans of a sequence without terms: %w", ErrEmpty)
	}
	for j, a := range s.terms {
		if a.Sign() <= 0 {
			return Fans{}, fmt.Errorf("recognize: fans with term %d equal to %s: the numbers of fans are integers ≥ 1: %w", j, brief(a), ErrNotPositive)
		}
	}
	if s.constant() {
		return Fans{}, fmt.Errorf("recognize: fans with %d terms %s: a fan has no value more than twice: %w", len(s.terms), brief(s.terms[0]), ErrConstant)
	}
	trace, reason := s.trace()
	if reason != "" {
		return Fans{Verdict: None, Reason: reason}, nil
	}
	var found []FanMatch
	var answer Fans
	if trace == nil {
		answer = Fans{Verdict: Undecided, Reason: fmt.Sprintf("%d terms do not determine a fan; five do, or six if the second and the fourth are equal", len(s.terms))}
		found, err = s.candidates(ctx, bound)
	} else {
		found, err = s.decided(ctx, trace)
		if len(found) > 0 {
			answer = Fans{Verdict: Found}
		} else {
			answer = Fans{Verdict: None, Reason: fmt.Sprintf("the terms satisfy a recurrence of trace %s, but no solution of (E) belongs to it", contfrac.Abbreviate(trace))}
		}
	}
	if err != nil {
		return Fans{}, fmt.Errorf("recognize: fans of %d terms: %w", len(s.terms), err)
	}
	slices.SortStableFunc(found, func(x, y FanMatch) int {
		return cmp.Or(cmp.Compare(max(x.Step, -x.Step), max(y.Step, -y.Step)), compareFamilies(x.Fan.Family(), y.Fan.Family()),
			x.Fan.Centre().Cmp(y.Fan.Centre()), x.Slope(0).Cmp(y.Slope(0)))
	})
	answer.Matches = found
	return answer, nil
}

// compareFamilies orders families by the sum of their weights, then the
// weights.
func compareFamilies(f, g orbifold.Family) int {
	order := f.K().Cmp(g.K())
	for c := farey.Zero; c <= farey.One && order == 0; c++ {
		order = cmp.Compare(f.Weight(c), g.Weight(c))
	}
	return order
}

// trace returns the T with b_{j+1} + b_{j−1} = T·b_j for the differences
// b_j = a_{j+2} − a_j, nil when the terms leave it open; or the reason for which
// no fan has the terms.
func (s Sequence) trace() (t *big.Int, reason string) {
	a := s.terms
	sum := new(big.Int)
	for j := 1; j+1 < len(a); j++ {
		if sum.Add(a[j-1], a[j+1]).Cmp(new(big.Int).Lsh(a[j], 1)) <= 0 {
			return nil, fmt.Sprintf("the terms are not strictly convex about term %d, as all fans are", j)
		}
	}
	if len(a) <= FewTerms {
		return nil, ""
	}
	b := make([]*big.Int, len(a)-2)
	for j := range b {
		b[j] = new(big.Int).Sub(a[j+2], a[j])
	}
	for j := 1; j+1 < len(b) && t == nil; j++ {
		if b[j].Sign() == 0 {
			continue // not twice in a row, by convexity
		}
		q, r := new(big.Int).QuoRem(sum.Add(b[j-1], b[j+1]), b[j], new(big.Int))
		if r.Sign() != 0 || q.Cmp(big.NewInt(3)) < 0 {
			return nil, fmt.Sprintf("the terms about term %d satisfy no recurrence of an integer trace ≥ 3", j+1)
		}
		t = q
	}
	if t == nil {
		if sum.Add(b[0], b[2]).Sign() != 0 { // five terms, the second equal to the fourth
			return nil, "the terms are not symmetric about their least, as the second and the fourth are"
		}
		return nil, ""
	}
	for j := 1; j+1 < len(b); j++ {
		if sum.Add(b[j-1], b[j+1]).Cmp(contfrac.Product(t, b[j])) != 0 {
			return nil, fmt.Sprintf("the recurrence of trace %s that other terms satisfy fails at term %d", contfrac.Abbreviate(t), j+3)
		}
	}
	return t, ""
}

// decided returns all fans with the terms, for a trace T that they satisfy.
func (s Sequence) decided(ctx context.Context, trace *big.Int) ([]FanMatch, error) {
	all, err := sections(ctx, trace)
	if err != nil {
		return nil, err
	}
	a := s.terms
	// E_j = T·a_j − a_{j+1} − a_{j−1} has period two.
	drift := func(j int) *big.Int {
		e := contfrac.Product(trace, a[j])
		return e.Sub(e, a[j+1]).Sub(e, a[j-1])
	}
	odd, even := drift(1), drift(2)
	var found []FanMatch
	for _, x := range all {
		weights, err := x.weights(even, odd)
		if err != nil {
			return nil, err
		}
		for _, w := range weights {
			y1, ok := x.next(a[0], a[1], w)
			if !ok {
				continue
			}
			m, ok, err := newMatch(ctx, x, w, a[0], y1)
			if err != nil {
				return nil, err
			}
			if ok && m.Rule.Check(a) == nil {
				found = append(found, m)
			}
		}
	}
	return found, nil
}

// weights returns the possible values of (c·N, c'·N) for the weights c, c' of
// the arcs of even and odd index of a fan of trace t, from the E_j of every
// d-th term:
//
//	E = N·(G·(t·c_m + 2·c_{m+1}) + [d odd]·c_m),  G = U_⌊d/2⌋·U_⌈d/2⌉
//
// at the arc m of the fan.
func (x section) weights(even, odd *big.Int) ([][2]*big.Int, error) {
	if x.d == 1 {
		if even.Sign() < 0 || odd.Sign() < 0 {
			return nil, nil
		}
		return [][2]*big.Int{{even, odd}}, nil
	}
	u, _, err := orbifold.Lucas(uint64(x.d/2), x.t)
	if err != nil {
		return nil, err
	}
	u1, _, err := orbifold.Lucas(uint64(x.d-x.d/2), x.t)
	if err != nil {
		return nil, err
	}
	g := contfrac.Product(u, u1)
	if x.d%2 == 1 {
		// p·c + q·c' = even, q·c + p·c' = odd, with p > q.
		p := contfrac.Product(g, x.t)
		p.Add(p, big.NewInt(1))
		q := new(big.Int).Lsh(g, 1)
		det := contfrac.Product(p, p)
		det.Sub(det, contfrac.Product(q, q))
		solve := func(e, f *big.Int) (*big.Int, bool) {
			n := contfrac.Product(p, e)
			return exact(n.Sub(n, contfrac.Product(q, f)), det)
		}
		c, ok1 := solve(even, odd)
		c1, ok2 := solve(odd, even)
		if !ok1 || !ok2 {
			return nil, nil
		}
		return [][2]*big.Int{{c, c1}}, nil
	}
	if even.Cmp(odd) != 0 {
		return nil, nil
	}
	b, ok := exact(even, g)
	if !ok {
		return nil, nil
	}
	// t·u + 2·v = b for u = c·N and v = c'·N < K·N − k = t.
	var pairs [][2]*big.Int
	most := new(big.Int).Quo(b, x.t)
	for i := range int64(2) {
		c := new(big.Int).Sub(most, big.NewInt(i))
		rest := contfrac.Product(x.t, c)
		rest.Sub(b, rest)
		if c.Sign() >= 0 && rest.Bit(0) == 0 {
			pairs = append(pairs, [2]*big.Int{c, rest.Rsh(rest, 1)})
		}
	}
	return pairs, nil
}

// exact returns n/d ≥ 0 for d > 0, if it is an integer.
func exact(n, d *big.Int) (*big.Int, bool) {
	if n.Sign() < 0 {
		return nil, false
	}
	q, r := new(big.Int).QuoRem(n, d, new(big.Int))
	return q, r.Sign() == 0
}

// next returns the arc y₁ of the fan from y₀ and y_d, by the closed form:
// z_n = y_n − e_n is z_d = U_d·z₁ − U_{d−1}·z₀, where e_n has period two and
// (t²−4)·e_n = t·w_n + 2·w_{n+1} for the weights w times N.
func (x section) next(y0, yd *big.Int, w [2]*big.Int) (*big.Int, bool) {
	if x.d == 1 {
		return yd, true
	}
	u, v, err := orbifold.Lucas(uint64(x.d), x.t)
	if err != nil {
		return nil, false
	}
	before := contfrac.Product(x.t, u) // 2·U_{d−1} = t·U_d − V_d
	before.Sub(before, v).Rsh(before, 1)
	// All times D = t² − 4.
	d := contfrac.Product(x.t, x.t)
	d.Sub(d, big.NewInt(4))
	resting := func(n int64) *big.Int {
		e := contfrac.Product(x.t, w[n&1])
		return e.Add(e, new(big.Int).Lsh(w[(n+1)&1], 1))
	}
	z0 := contfrac.Product(d, y0)
	z0.Sub(z0, resting(0))
	zd := contfrac.Product(d, yd)
	zd.Sub(zd, resting(x.d)).Add(zd, contfrac.Product(before, z0))
	z1, r := zd.QuoRem(zd, u, new(big.Int))
	if r.Sign() != 0 {
		return nil, false
	}
	y1, ok := exact(z1.Add(z1, resting(1)), d)
	return y1, ok && y1.Sign() > 0
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
		return FanMatch{}, false, fmt.Errorf("there is a fan with weights %s at the centre and %s, %s round it; weights up to 2⁶³−1 are accepted: %w", brief(k), brief(c), brief(c1), ErrTooLarge)
	}
	m, err := realise(ctx, x.d, [3]role{{n, k.Int64()}, {y0, c.Int64()}, {y1, c1.Int64()}})
	m.FreeWeight = free
	return m, err == nil, err
}

// role is an arc of a triangle with its number and the weight of its class:
// the centre, the first arc of a fan or the next one.
type role struct {
	number *big.Int
	weight int64
}

// realise returns the fan whose centre, first and next arc have these numbers,
// a solution of (E), at its slopes.
func realise(ctx context.Context, d int64, roles [3]role) (FanMatch, error) {
	// The classes in the order of falling weights.
	order := []int{0, 1, 2}
	slices.SortStableFunc(order, func(i, j int) int { return cmp.Compare(roles[j].weight, roles[i].weight) })
	f, err := orbifold.New(roles[order[0]].weight, roles[order[1]].weight, roles[order[2]].weight)
	if err != nil {
		return FanMatch{}, err
	}
	triple, err := f.NewTriple(roles[order[0]].number, roles[order[1]].number, roles[order[2]].number)
	if err != nil {
		return FanMatch{}, err
	}
	path, err := triple.PathContext(ctx)
	if err != nil {
		return FanMatch{}, err
	}
	triangle := path.Triangle()
	var s [3]farey.Slope // by role
	for class, i := range order {
		s[i] = triangle.Vertex(farey.Class(class))
	}
	s = representative(f, s)
	fan, err := f.Fan(s[0], s[1])
	if err != nil {
		return FanMatch{}, err
	}
	next, _ := fan.Index(s[2]) // 1 or −1
	m := FanMatch{Fan: fan, Step: d * next.Int64()}
	m.Rule, err = fan.Recurrence(m.Step)
	return m, err
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
