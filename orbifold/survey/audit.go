package survey

import (
	"context"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold"
)

// Audit is the account of a walk over all numbers up to a bound. Each of its
// parts fails when a subtree was missed or visited twice.
//
// Put F(e) = N_c/(K·N_a·N_b) for the edge e = (a, b) of a triangle a, b, c with c on
// the side of the base. By (E) and (X) the triangle in front of e, with its new
// vertex r, splits it exactly:
//
//	F(a, b) = F(a, r) + F(r, b) + k_r/(K·N_r),
//
// so over any walk Σ k_r/(K·N_r) over the slopes visited plus Σ F over the edges where it
// turned back is what F was at its first edges: the finite form of
//
//	Σ_s (1/E_s + k_s/2)/(K·N_s) = 1/2                                    (S)
//
// over all slopes ("Simple geodesics and a series constant over Teichmüller
// space", Invent. Math. 132 (1998); with weights cf. "Generalizations of McShane's
// identity to hyperbolic cone-surfaces", J. Differential Geom. 72 (2006)). Far out
// the terms are smaller than any floating-point number, yet the identity is one of
// fractions, so it is tested modulo the prime 2⁶¹ − 1, where a lost term is as
// large as any other: a faulty walk passes with a chance of 2⁻⁶¹. (Weights past 2⁶¹
// may be congruent to smaller ones, and subtrees may then have equal sums that are
// not equal before the reduction.)
type Audit struct {
	// Turns is the number of edges where the walk turned back: one more than
	// the slopes visited, for each edge where it began.
	Turns uint64 `json:"turns"`

	// Telescope is the left side of the finite form times K, modulo 2⁶¹ − 1, and
	// Base its right side.
	Telescope uint64 `json:"telescope"`
	Base      uint64 `json:"base"`

	// Counted is the number of slopes by Count, which does not walk.
	Counted uint64 `json:"counted"`

	// SumLo and SumHi enclose (S) over the slopes within the bound, orbits of
	// symmetries counted in full. Near the base its terms are added; behind a settled
	// edge they come to F(e) − 1/(K·N_a·E_a) − 1/(K·N_b·E_b) over 2, less what lies past
	// the bound. Remainder bounds what all slopes past the bound can add.
	SumLo     string `json:"sumLo"`
	SumHi     string `json:"sumHi"`
	Remainder string `json:"remainder"`
}

// books keeps the account of one walker.
type books struct {
	w        *walker
	inside   bool // symmetric family: some slopes near the base do not count
	num, den uint64
	turns    uint64
	digest   Digest
	strictly uint64 // slopes in front of an edge inside the domain
}

// keep makes a walker keep books from now on.
func (w *walker) keep() *books {
	_, _, all := w.family.Domain()
	b := &books{w: w, den: 1, inside: !all && len(w.constraints.among) > 0}
	w.cut = b.turn
	return b
}

// add adds x/y to the account.
func (b *books) add(x, y uint64) {
	b.num = fold(mul61(b.num, y) + mul61(x, b.den))
	b.den = mul61(b.den, y)
}

// turn books an edge where the walk turned back.
func (b *books) turn(u, v, o *vertex) {
	if b.inside && near(u.at, 1) && near(v.at, 1) && !(b.w.constraints.has(u.at) && b.w.constraints.has(v.at)) {
		return // an edge of the base triangle that the domain cuts
	}
	b.turns++
	b.add(o.r61, mul61(u.r61, v.r61))
}

// near tells whether both terms of a slope are small.
func near(c coords, n int64) bool { return c.q() <= n && c.p() <= n && c.p() >= -n }

// visit books a slope.
func (b *books) visit(v *Visit) {
	b.digest.Add(v)
	if v.base {
		return
	}
	x := v.vertex()
	if b.inside && near(x.at, 2) && !(b.w.constraints.has(v.frame.u.at) && b.w.constraints.has(v.frame.y[(v.i-1)&3].at)) {
		return
	}
	b.strictly++
	if k := b.w.w61[x.at.class()]; k != 0 {
		b.add(k, x.r61)
	}
}

// Account is what the audit of a part of a walk keeps; accounts of parts add up.
type Account struct {
	// The sum of the terms k_r/N_r and N_c/(N_a·N_b), as a fraction modulo 2⁶¹ − 1.
	Num uint64 `json:"num"`
	Den uint64 `json:"den"`

	Turns    uint64 `json:"turns"`    // edges where the walk turned back
	Strictly uint64 `json:"strictly"` // slopes in front of an edge where it began
	Digest   Digest `json:"digest"`
}

func (b *books) account() Account {
	return Account{b.num, b.den, b.turns, b.strictly, b.digest}
}

func (a *Account) merge(o Account) {
	if a.Den == 0 && a.Turns == 0 && a.Digest.Slopes == 0 {
		a.Den = 1
	}
	if o.Den == 0 && o.Turns == 0 && o.Digest.Slopes == 0 {
		return
	}
	a.Num = fold(mul61(a.Num, o.Den) + mul61(o.Num, a.Den))
	a.Den = mul61(a.Den, o.Den)
	a.Turns += o.Turns
	a.Strictly += o.Strictly
	a.Digest.Merge(o.Digest)
}

// Check walks over all numbers of the family up to bound, one slope for each
// symmetry class, and returns the account, with ErrAudit if it does not balance.
func Check(ctx context.Context, f orbifold.Family, bound *big.Int, o Options) (Audit, Digest, error) {
	if bound == nil {
		return Audit{}, Digest{}, fmt.Errorf("survey: audit up to nothing: want a bound of at least 1: %w", ErrBound)
	}
	r := Up(f, bound)
	w, err := newWalker(r)
	if err != nil {
		return Audit{}, Digest{}, err
	}
	shards, err := w.shards(r, w.chunks())
	if err != nil {
		return Audit{}, Digest{}, err
	}
	part, err := AuditShards(ctx, shards, o)
	if err != nil {
		return Audit{}, Digest{}, err
	}
	return Balance(ctx, part)
}

// accounts is the question of an audit; its visits are made by AuditShards.
func accounts() Question[Account] {
	return Question[Account]{Name: "audit", Merge: func(a *Account, b Account) { a.merge(b) }}
}

// AuditShards walks over some shards of one region and returns their accounts. The
// region has to have a bound and no other constraint, one slope for each symmetry class
// (ErrRegion), as regions of Up.
func AuditShards(ctx context.Context, shards []Shard, o Options) (Part[Account], error) {
	w, err := walkerOf("audit", shards)
	if err != nil {
		return Part[Account]{}, err
	}
	if err := plain(shards[0].region); err != nil {
		return Part[Account]{}, err
	}
	return sweepWith(ctx, w, shards, accounts(), o, func(w *walker, sum *Account) func() {
		b := w.keep()
		w.sink = func(v *Visit) bool { b.visit(v); return true }
		return func() { *sum = b.account() }
	})
}

// plain refuses regions other than those of Up.
func plain(r Region) error {
	if r.Bound == nil || r.All || !newConstraints(r).anything {
		return fmt.Errorf("survey: audit of %v: want a region with a bound alone: %w", r, ErrRegion)
	}
	return nil
}

// Balance balances the accounts of all shards of a region; ErrMismatch when one is missing,
// ErrAudit if they do not balance.
func Balance(ctx context.Context, part Part[Account]) (Audit, Digest, error) {
	total, err := part.Result(accounts())
	if err != nil {
		return Audit{}, Digest{}, err
	}
	if err := plain(part.header.Region); err != nil {
		return Audit{}, Digest{}, err
	}
	w, err := newWalker(part.header.Region)
	if err != nil {
		return Audit{}, Digest{}, err
	}
	audit, err := total.close(ctx, w)
	return audit, total.Digest, err
}

// close balances the account of a whole walk.
func (a Account) close(ctx context.Context, w *walker) (Audit, error) {
	s, err := w.series(ctx)
	if err != nil {
		return Audit{}, err
	}
	counted, err := Count(ctx, w.family, w.bound)
	if err != nil {
		return Audit{}, err
	}
	return a.balance(w, s, counted)
}

// balance compares the account of a whole walk with what is known without it.
func (a Account) balance(w *walker, s series, counted *big.Int) (Audit, error) {
	out := Audit{
		Turns: a.Turns, Counted: counted.Uint64(), Base: s.base,
		Telescope: mul61(a.Num, inv61(a.Den)),
		SumLo:     outward(s.lo, -1), SumHi: outward(s.hi, 1), Remainder: s.remainder.Text('e', 2),
	}
	fail := func(what string) (Audit, error) {
		return out, fmt.Errorf("survey: audit of %v up to %s: %s: %w", w.family, contfrac.Abbreviate(w.bound), what, ErrAudit)
	}
	switch {
	case a.Den == 0:
		return fail("a number divisible by 2^61 − 1 leaves the telescoping sum undefined")
	case !counted.IsUint64() || a.Digest.Slopes != out.Counted:
		return fail(fmt.Sprintf("%d slopes visited, %v counted", a.Digest.Slopes, counted))
	case a.Turns != a.Strictly+s.starts:
		return fail(fmt.Sprintf("%d slopes visited from %d edges, but %d turns", a.Strictly, s.starts, a.Turns))
	case out.Telescope != out.Base:
		return fail("the telescoping sum does not come out")
	case !s.holds():
		return fail(fmt.Sprintf("the sum (S) is in [%s, %s], the remainder at most %s", out.SumLo, out.SumHi, out.Remainder))
	}
	return out, nil
}

// series is what the exact part of the walk says of (S).
type series struct {
	starts    uint64
	base      uint64 // Σ N_c/(N_a·N_b) over the first edges, modulo 2⁶¹ − 1
	lo, hi    *big.Float
	remainder *big.Float
}

// holds tells whether 1/2 lies where (S) says.
func (s series) holds() bool {
	half := big.NewFloat(0.5)
	top := new(big.Float).SetPrec(s.hi.Prec()).SetMode(big.ToPositiveInf).Add(s.hi, s.remainder)
	return s.lo.Cmp(half) <= 0 && half.Cmp(top) <= 0
}

// outward writes x with 30 decimals, moved by more than the rounding.
func outward(x *big.Float, sign float64) string {
	return new(big.Float).Add(x, big.NewFloat(sign*1e-30)).Text('f', 30)
}

// seriesBits is the precision of (S), absolute.
const seriesBits = 256

// series adds up (S) over the exact part of the walk.
func (w *walker) series(ctx context.Context) (series, error) {
	f := w.family
	group := int64(len(f.Symmetries()))
	lo, hi := new(big.Int), new(big.Int) // units of 2^−seriesBits, of twice (S)
	book := func(l, h *big.Int, times int64) {
		m := big.NewInt(times)
		lo.Add(lo, new(big.Int).Mul(l, m))
		hi.Add(hi, new(big.Int).Mul(h, m))
	}
	var s series
	var first books
	first.den = 1
	arcs, stack := w.base()
	edges := stack[:]
	visit := func(a *arc) {
		if w.constraints.has(a.v.at) && !w.beyond(a.n) {
			l, h := w.term(a, true)
			book(l, h, int64(len(f.Orbit(a.v.at.slope()))))
		}
	}
	for _, a := range arcs {
		visit(a)
	}
	inside := func(e edge) bool {
		return w.anything && len(w.constraints.among) == 0 ||
			w.constraints.has(e.a.v.at) && w.constraints.has(e.b.v.at)
	}
	var walk []edge
	for len(edges) > 0 { // down to the first edges
		e := edges[len(edges)-1]
		edges = edges[:len(edges)-1]
		if w.constraints.skip(e.a.v.at, e.b.v.at) {
			continue
		}
		if inside(e) {
			s.starts++
			first.add(e.c.v.r61, mul61(e.a.v.r61, e.b.v.r61))
			walk = append(walk, e)
			continue
		}
		r := w.scale.front(e)
		visit(r)
		if w.beyond(r.n) {
			continue
		}
		left, right := e.behind(r)
		edges = append(edges, left, right)
	}
	s.base = mul61(first.num, inv61(first.den))
	for len(walk) > 0 {
		if err := context.Cause(ctx); err != nil {
			return s, fmt.Errorf("survey: audit: %w", err)
		}
		e := walk[len(walk)-1]
		walk = walk[:len(walk)-1]
		if w.settled(e.a.n, e.b.n, e.c.n) {
			l, h := w.tail(e)
			book(l, h, group)
			continue
		}
		r := w.scale.front(e)
		if w.beyond(r.n) {
			continue
		}
		l, h := w.term(r, true)
		book(l, h, int64(len(f.Orbit(r.v.at.slope()))))
		left, right := e.behind(r)
		walk = append(walk, left, right)
	}
	s.remainder = w.remainder()
	s.lo = fixed(lo, -seriesBits-1, big.ToNegativeInf)
	s.lo.Sub(s.lo, s.remainder)
	s.hi = fixed(hi, -seriesBits-1, big.ToPositiveInf)
	return s, nil
}

func fixed(x *big.Int, exponent int, mode big.RoundingMode) *big.Float {
	f := new(big.Float).SetPrec(2 * seriesBits).SetMode(mode).SetInt(x)
	return f.SetMantExp(f, exponent)
}

// term encloses 2/(K·N·E), or with the weight (2/E + k)/(K·N), in units of
// 2^−seriesBits, for 1/E = (t − √(t²−4))/2.
func (w *walker) term(a *arc, weight bool) (lo, hi *big.Int) {
	k := big.NewInt(w.family.Weight(a.v.at.class()))
	kn := new(big.Int).Mul(w.k, a.n)
	t := new(big.Int).Sub(kn, k)
	root := new(big.Int).Mul(t, t)
	root.Sub(root, big.NewInt(4)).Lsh(root, 2*seriesBits).Sqrt(root) // ≤ √(t²−4)·2^bits < root + 1
	hi = t.Lsh(t, seriesBits)
	if weight {
		hi.Add(hi, k.Lsh(k, seriesBits))
	}
	hi.Sub(hi, root)
	lo = new(big.Int).Sub(hi, big.NewInt(1))
	lo.Div(lo, kn)
	hi.Div(hi, kn)
	return lo, hi.Add(hi, big.NewInt(1))
}

// tail encloses twice (S) over everything in front of the edge,
// F(e) − 1/(K·N_a·E_a) − 1/(K·N_b·E_b), in units of 2^−seriesBits.
func (w *walker) tail(e edge) (lo, hi *big.Int) {
	num := new(big.Int).Lsh(e.c.n, seriesBits)
	den := new(big.Int).Mul(w.k, e.a.n)
	num.Div(num, den.Mul(den, e.b.n))
	lo, hi = new(big.Int).Set(num), num.Add(num, big.NewInt(1))
	for _, a := range [...]*arc{e.a, e.b} {
		l, h := w.term(a, false) // twice what is to be taken off
		lo.Sub(lo, half(h, 1))
		hi.Sub(hi, half(l, 0))
	}
	if lo.Sign() < 0 {
		lo.SetInt64(0) // a sum of positive terms
	}
	return lo, hi
}

// half returns ⌊(x + up)/2⌋.
func half(x *big.Int, up int64) *big.Int {
	h := new(big.Int).Add(x, big.NewInt(up))
	return h.Rsh(h, 1)
}

// remainder bounds (S) over all slopes with numbers past the bound B. Twice a number is
// superadditive (see MaxBoundBits), so behind a base edge the slope m·a + n·b
// has N ≥ max(B, 2^(m+n−1)), and a term is at most (1/E + k/2)/(K·N) ≤ 1/N, as
// 1/E ≤ 1 and 1 + k/2 ≤ K. With j = m + n, fewer than j slopes for each j and L bits
// of B, three edges give at most 3·(L²/B + Σ_{j>L} j·2^(1−j)) ≤ 3·(L² + 4·L + 8)/B,
// since 2^−L < 1/B.
func (w *walker) remainder() *big.Float {
	l := int64(w.bound.BitLen())
	r := new(big.Float).SetPrec(64).SetMode(big.ToPositiveInf).SetInt64(3 * (l*l + 4*l + 8))
	b := new(big.Float).SetPrec(64).SetMode(big.ToNegativeInf).SetInt(w.bound)
	return r.Quo(r, b)
}
