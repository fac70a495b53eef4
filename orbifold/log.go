package orbifold

import (
	"context"
	"fmt"
	"math"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// MaxLogPrecision is the largest precision, in bits, of LogBig.
const MaxLogPrecision = 1 << 16

// Log returns an enclosure lo ≤ ln N ≤ hi of the natural logarithm of the
// number at the slope s, without computing the number. The ends are at most a
// few units of the last place apart. Past float64, where s has some 308 digits,
// the error is ErrTooLarge; LogBig goes on.
func (f Family) Log(s farey.Slope) (lo, hi float64, err error) {
	l, err := f.logSpan(context.Background(), s, 64)
	if err != nil {
		return 0, 0, err
	}
	lo, below := l.lo.Float64()
	if below == big.Above {
		lo = math.Nextafter(lo, 0)
	}
	hi, above := l.hi.Float64()
	if above == big.Below {
		hi = math.Nextafter(hi, math.Inf(1))
	}
	if math.IsInf(hi, 1) {
		return 0, 0, fmt.Errorf("orbifold: logarithm at %v: about %.6g, past float64; LogBig has it: %w", s, l.hi, ErrTooLarge)
	}
	return lo, hi, nil
}

// LogBig returns an enclosure lo ≤ ln N ≤ hi of the natural logarithm of the
// number at the slope s, with hi − lo ≤ 2^(1−prec)·lo, for slopes of any size.
// The ends have the precision prec, 1 … MaxLogPrecision bits; else the error is
// ErrPrecision.
//
// Small numbers of the descent are exact. From the first triangle on whose
// numbers pass the working precision, the logarithms alone are carried on:
// ln N_r = ln K + ln N_u + ln N_w + ln(1 − k_u/(K·N_u) − k_w/(K·N_w) − N_o/(K·N_u·N_w)),
// wherein the last term is then below the precision, and a long run about a
// small number grows by the unit λ of its trace at each flip, up to an error
// that (E) bounds. All terms are positive and each is rounded outward, so the
// relative error is at most the number of Stern–Brocot runs times that of one
// operation. Cost: O(runs) operations on numbers of the precision asked for.
func (f Family) LogBig(s farey.Slope, prec uint) (lo, hi *big.Float, err error) {
	return f.LogBigContext(context.Background(), s, prec)
}

// LogBigContext is LogBig that stops when ctx ends, with its error.
func (f Family) LogBigContext(ctx context.Context, s farey.Slope, prec uint) (lo, hi *big.Float, err error) {
	l, err := f.logSpan(contextOf(ctx), s, prec)
	if err != nil {
		return nil, nil, err
	}
	return l.lo, l.hi, nil
}

// Bits returns bounds on the bit length of the number at the slope s, without
// computing it: lo ≤ bits ≤ hi. They are at most one apart up to 2⁵⁰ bits or
// so, and to 15 digits the same after that. A cheap call, meant to be made
// before Number.
func (f Family) Bits(s farey.Slope) (lo, hi *big.Int, err error) {
	l, err := f.logSpan(context.Background(), s, 64)
	if err != nil {
		return nil, nil, err
	}
	lo, hi = l.bits()
	return lo, hi, nil
}

// bits turns an enclosure of ln N, N ≥ 1, into bounds on the bit length
// ⌊ln N/ln 2⌋ + 1.
func (s span) bits() (lo, hi *big.Int) {
	ln2 := fixedSpan(ln2Times(1, 96), 1, 1, 96, 80)
	one := big.NewInt(1)
	lo, _ = down(80).Quo(s.lo, ln2.hi).Int(nil)
	hi, _ = up(80).Quo(s.hi, ln2.lo).Int(nil)
	return lo.Add(lo, one), hi.Add(hi, one)
}

// fits returns ErrTooLarge when a result of copies times the bits of the
// number at s passes the limit. The bound is computed, never the number.
func (f Family) fits(ctx context.Context, s farey.Slope, copies int64) error {
	limit := big.NewInt(f.Limit())
	// By (X) K·N is submultiplicative along the descent: N ≤ K^(a+b−1) where the
	// slope is a·A + b·B over the base edge (A, B); a + b ≤ |p| + q.
	p, q := s.Num(), s.Den()
	bound := p.Add(p.Abs(p), q)
	bound.Mul(bound, big.NewInt(int64(f.K().BitLen())*copies))
	if bound.Cmp(limit) <= 0 {
		return nil
	}
	l, err := f.logSpan(ctx, s, 64)
	if err != nil {
		return err
	}
	_, bits := l.bits()
	if total := new(big.Int).Mul(bits, big.NewInt(copies)); total.Cmp(limit) <= 0 {
		return nil
	}
	what := "the result"
	if copies > 1 {
		what = fmt.Sprintf("a result of %d such numbers", copies)
	}
	return fmt.Errorf("orbifold: number at %v in family %v: about %s bits; %s may have %d bits (WithLimit sets it): %w",
		s, f, contfrac.Abbreviate(bits), what, f.Limit(), ErrTooLarge)
}

// logSpan encloses the logarithm of the number at s.
func (f Family) logSpan(ctx context.Context, s farey.Slope, prec uint) (span, error) {
	if prec < 1 || prec > MaxLogPrecision {
		return span{}, fmt.Errorf("orbifold: logarithm with %d bits: want 1 … %d: %w", prec, MaxLogPrecision, ErrPrecision)
	}
	p := s.Path()
	for guard := uint(40 + 2*big.NewInt(int64(p.Moves().NumRuns())).BitLen()); ; guard *= 2 {
		l := newLogDescent(f, prec+guard).path(p, running(ctx))
		if err := ctx.Err(); err != nil {
			return span{}, fmt.Errorf("orbifold: logarithm at %v: %w", s, err)
		}
		if l.hi.IsInf() {
			return span{}, fmt.Errorf("orbifold: logarithm at %v: past the exponents of big.Float: %w", s, ErrTooLarge)
		}
		if l.relative(prec + 1) {
			return l.round(prec), nil
		}
	}
}

// logDescent carries logarithms along a path.
type logDescent struct {
	x    rule[*big.Int]
	w    uint // working precision; absolute errors of single logarithms are below 2^−w
	logK span
}

func newLogDescent(f Family, w uint) logDescent {
	return logDescent{f.exact(), w, logInt(f.K(), w, w)}
}

func (d logDescent) log(x *big.Int) span { return logInt(x, d.w, d.w) }

// path returns the logarithm of the number of the newest arc.
func (d logDescent) path(p farey.Path, step func() bool) span {
	e := d.x.start(p)
	if p.IsBase() {
		return d.log(e.c.number)
	}
	one := big.NewInt(1)
	exact := true
	var a, b span   // logarithms of the ends of the edge, once exact is false
	var front *span // that of the arc in front of it, when it is known
	for letter, n := range p.Moves().Runs() {
		if !step() {
			break
		}
		n = new(big.Int).Set(n)
		if front != nil { // the first move of this run makes that arc
			if letter == contfrac.L {
				b = *front
			} else {
				a = *front
			}
			front = nil
			n.Sub(n, one)
		}
		for exact && n.Sign() > 0 {
			fan := e.fan(letter, step)
			switch {
			case d.large(e.a.number) && d.large(e.b.number):
				a, b, exact = d.log(e.a.number), d.log(e.b.number), false
				continue
			case d.settled(fan):
				end, tip := d.glide(fan, n)
				if letter == contfrac.L {
					b = end
				} else {
					a = end
				}
				front, exact = &tip, false
				n.SetInt64(0)
				continue
			}
			e = e.run(letter, one, step)
			n.Sub(n, one)
		}
		switch {
		case n.Sign() == 0:
		case letter == contfrac.L:
			b = b.add(d.grow(a).times(n))
		default:
			a = a.add(d.grow(b).times(n))
		}
	}
	switch {
	case front != nil:
		return *front
	case exact:
		return d.log(e.front().number)
	}
	return d.grow(a).add(b)
}

// large tells whether the last term of the sum of LogBig lies in (−2^−w, 0]
// when both numbers of the edge are at least n. The number behind an edge is
// at most the larger of them, and 1 − 3/n < exp(term).
func (d logDescent) large(n *big.Int) bool { return n.BitLen() > int(d.w)+8 }

// grow returns what one flip about a large arc adds to the logarithm of the
// other end of the edge, when that is large too.
func (d logDescent) grow(a span) span {
	s := a.add(d.logK)
	return span{s.wider(d.w).lo, s.hi}
}

// settled tells whether the arcs of a fan grow by the unit λ of its trace from
// here on, so closely that the logarithms of all later ones are off by less
// than 2^−w in all.
//
// With r_i = y_{i+1}/y_i the step of the fan says
// |r_i − λ| ≤ c_i·N/y_i + |r_{i−1} − λ|/(λ·r_{i−1}), so that with r ≥ 2 and
// y_{i+1} ≥ 2·y_i all |ln(r_i/λ)| from i = 1 on sum up to less than
// |r_0 − λ| + 3·c·N/y₁; and (E) says
// |r_0 − λ| ≤ (N² + N·(c₀·y₁ + c₁·y₀))/y₀². Both are small when y₀ is much
// larger than (K·N)².
func (d logDescent) settled(f fan[*big.Int]) bool {
	return f.y[0].number.BitLen() >= 2*(f.pivot.number.BitLen()+d.x.k.BitLen())+int(d.w)+8
}

// glide returns the logarithms of the arcs n+1 and n+2 of a settled fan.
func (d logDescent) glide(f fan[*big.Int], n *big.Int) (end, front span) {
	lambda := logUnit(f.t, d.w, d.w)
	start := d.log(f.y[1].number)
	end = start.add(lambda.times(n)).wider(d.w)
	return end, start.add(lambda.times(new(big.Int).Add(n, big.NewInt(1)))).wider(d.w)
}
