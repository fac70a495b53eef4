package orbifold

import (
	"math"
	"math/big"
)

// span is an interval of real numbers ≥ 0 with ends of a fixed precision. Every
// operation rounds its lower end down and its upper end up, so an enclosure
// stays one.
type span struct{ lo, hi *big.Float }

func down(prec uint) *big.Float { return new(big.Float).SetPrec(prec).SetMode(big.ToNegativeInf) }
func up(prec uint) *big.Float   { return new(big.Float).SetPrec(prec).SetMode(big.ToPositiveInf) }

func (s span) add(t span) span {
	p := s.lo.Prec()
	return span{down(p).Add(s.lo, t.lo), up(p).Add(s.hi, t.hi)}
}

// times returns n·s for n ≥ 0.
func (s span) times(n *big.Int) span {
	p := s.lo.Prec()
	return span{down(p).Mul(s.lo, down(p).SetInt(n)), up(p).Mul(s.hi, up(p).SetInt(n))}
}

// wider moves both ends outward by 2^−bits.
func (s span) wider(bits uint) span {
	p := s.lo.Prec()
	d := new(big.Float).SetMantExp(big.NewFloat(1), -int(bits))
	return span{down(p).Sub(s.lo, d), up(p).Add(s.hi, d)}
}

// apart returns −1 or +1 when all of s is below or above all of t, else 0.
func (s span) apart(t span) int {
	switch {
	case s.hi.Cmp(t.lo) < 0:
		return -1
	case s.lo.Cmp(t.hi) > 0:
		return 1
	}
	return 0
}

// round returns the smallest interval with ends of precision prec around s.
func (s span) round(prec uint) span { return span{down(prec).Set(s.lo), up(prec).Set(s.hi)} }

// relative tells whether the width is at most 2^−bits of the lower end.
func (s span) relative(bits uint) bool {
	w := up(64).Sub(s.hi, s.lo)
	return w.SetMantExp(w, int(bits)).Cmp(s.lo) <= 0
}

// fixedSpan returns [v − below, v + above] / 2^w, rounded outward.
func fixedSpan(v *big.Int, below, above int64, w, prec uint) span {
	lo := down(prec).SetInt(new(big.Int).Sub(v, big.NewInt(below)))
	hi := up(prec).SetInt(new(big.Int).Add(v, big.NewInt(above)))
	return span{lo.SetMantExp(lo, -int(w)), hi.SetMantExp(hi, -int(w))}
}

// logInt encloses the natural logarithm of x ≥ 1 with an absolute error below
// 2^−w, w ≥ 32.
func logInt(x *big.Int, w, prec uint) span {
	if x.IsInt64() && x.Int64() == 1 {
		return span{down(prec), up(prec)}
	}
	return fixedSpan(fixedLog(x, w+2), 1, 1, w+2, prec)
}

// logUnit encloses the natural logarithm of λ = (t + √(t²−4))/2, t ≥ 3: the
// factor by which the arcs of a fan of trace t grow. Absolute error as logInt.
func logUnit(t *big.Int, w, prec uint) span {
	// v ≤ 2^(w+4)·2λ < v + 1, and 2λ > 2.
	g := w + 4
	v := new(big.Int).Mul(t, t)
	v.Sub(v, big.NewInt(4)).Lsh(v, 2*g).Sqrt(v)
	v.Add(v, new(big.Int).Lsh(t, g))
	l := fixedLog(v, g)
	l.Sub(l, ln2Times(int(g)+1, g))
	return fixedSpan(l, 2, 3, g, prec)
}

// fixedLog returns an integer within 1 of 2^w·ln x, for x ≥ 1.
//
// x = m·2^e with 1 ≤ m < 2; m is made small by r square roots, and
// ln m = 2^(r+1)·artanh((m′−1)/(m′+1)) with m′ = m^(1/2^r) by the power series.
// In units of 2^−v each rounding of m and of a root is below 1 and halved by the
// roots after it (sum below 2), the quotient adds 1, each of the n terms at
// most 2: below 2^(r+1)·(2n + 4) in all, less than 1/4 of 2^−w. That of e·ln 2 is less
// than 1/8 of it, and rounding the sum adds 1/2.
func fixedLog(x *big.Int, w uint) *big.Int {
	e := x.BitLen() - 1
	r := uint(math.Sqrt(float64(w))) / 2
	n := (w+r+64)/(2*r+2) + 2
	v := w + r + 3 + uint(big.NewInt(int64(2*n+4)).BitLen())
	m := new(big.Int)
	if uint(e) <= v {
		m.Lsh(x, v-uint(e))
	} else {
		m.Rsh(x, uint(e)-v)
	}
	for range r {
		m.Lsh(m, v).Sqrt(m)
	}
	one := new(big.Int).Lsh(big.NewInt(1), v)
	num := new(big.Int).Sub(m, one)
	z := num.Lsh(num, v)
	z.Quo(z, m.Add(m, one))
	z2 := new(big.Int).Mul(z, z)
	z2.Rsh(z2, v)
	sum, q := new(big.Int).Set(z), new(big.Int)
	for k := int64(3); z.Sign() > 0; k += 2 {
		z.Mul(z, z2).Rsh(z, v)
		sum.Add(sum, q.Quo(z, big.NewInt(k)))
	}
	g := v - r - 1
	sum.Add(sum, ln2Times(e, g))
	return roundShift(sum, g-w)
}

// roundShift returns x/2^n rounded to the nearest integer, n ≥ 1. It overwrites
// x.
func roundShift(x *big.Int, n uint) *big.Int {
	return x.Add(x, new(big.Int).Lsh(unit, n-1)).Rsh(x, n)
}

// ln2Times returns an integer within 1 of 2^w·e·ln 2, by
// ln 2 = 18·artanh(1/26) − 2·artanh(1/4801) + 8·artanh(1/8749).
func ln2Times(e int, w uint) *big.Int {
	// Each series is off by less than 1 a term, fewer than v terms: below
	// 28·v units of 2^−v, times e.
	v := w + 16 + uint(big.NewInt(int64(e)+1).BitLen())
	v += uint(big.NewInt(int64(v)).BitLen())
	sum := new(big.Int)
	for _, s := range [...]struct{ c, q int64 }{{18, 26}, {-2, 4801}, {8, 8749}} {
		term := new(big.Int).Lsh(big.NewInt(1), v)
		term.Quo(term, big.NewInt(s.q))
		square, part, q := big.NewInt(s.q*s.q), new(big.Int), new(big.Int)
		for k := int64(1); term.Sign() > 0; k += 2 {
			part.Add(part, q.Quo(term, big.NewInt(k)))
			term.Quo(term, square)
		}
		sum.Add(sum, part.Mul(part, big.NewInt(s.c)))
	}
	sum.Mul(sum, big.NewInt(int64(e)))
	return roundShift(sum, v-w)
}
