package contfrac

import (
	"math/big"
	"math/bits"
)

// lehmer is expansion.halfway by words: quotients are found from the two
// leading words of both numbers, as many as these words prove, and carried
// out on all the words at once. Source: "Euclid's algorithm for large
// numbers", American Mathematical Monthly 45 (1938).
func (e *expansion) lehmer(x, y *big.Int, s int, want bool) (_, _ *big.Int, m entries) {
	if y.BitLen() <= s || x.Cmp(y) <= 0 {
		return x, y, identity()
	}
	var w wordMatrix
	if want {
		w = newWordMatrix((x.BitLen()-s)/wordBits + 1)
	}
	u, v := make([]big.Word, len(x.Bits())), make([]big.Word, len(x.Bits()))
	copy(u, x.Bits())
	copy(v, y.Bits())
	for bitLen(v) > s {
		u = u[:(bitLen(u)+wordBits-1)/wordBits]
		v = v[:len(u)]
		if s == 0 && !want && len(u) == 1 {
			e.finish(uint(u[0]), uint(v[0]))
			v[0] = 0
			break
		}
		// As x < (a + b)·x' for the x' that is left, this bound on the
		// matrix entries leaves x' more than s bits.
		before := e.n
		l := e.window(u, v, bitLen(u)-s-2)
		if e.n == before {
			q := e.divideWords(u, v)
			u, v = v, u
			if !q.IsUint64() || q.Uint64() > leafMax {
				w.mulQuotient(q)
				continue
			}
			l = leaf{a: uint(q.Uint64()), b: 1, c: 1}
		} else {
			l.unapply(u, v, (e.n-before)%2 == 1)
		}
		w.mulLeaf(&l)
	}
	return new(big.Int).SetBits(u), new(big.Int).SetBits(v), w.entries()
}

// finish expands numbers of one word to the end.
func (e *expansion) finish(x, y uint) {
	for y != 0 {
		q := x / y
		e.pushUint(uint64(q))
		x, y = y, x-q*y
	}
}

// divideWords takes one quotient of u and v by division and puts the remainder
// in the place of u.
func (e *expansion) divideWords(u, v []big.Word) *big.Int {
	_, r, q := e.divide(new(big.Int).SetBits(u), new(big.Int).SetBits(v))
	clear(u[copy(u, r.Bits()):])
	return q
}

// window takes the quotients of u > v that their two leading words prove and that
// keep the matrix entries under 2ʲ and up to leafMax, and returns the matrix.
func (e *expansion) window(u, v []big.Word, j int) leaf {
	const half = wordBits/2 - 1
	before := e.n
	if j < 1 {
		return leaf{a: 1, d: 1}
	}
	n := len(u)
	shift := bits.LeadingZeros(uint(u[n-1]))
	x, y := leadingTwo(u, shift), leadingTwo(v, shift)
	m := e.proven(x.hi, y.hi, 1<<min(j, half))
	l := m
	j -= bits.Len(m.a) + 1
	if j < 1 {
		return l
	}
	x, y = m.unapplyTwo(x, y, (e.n-before)%2 == 1)
	shift = bits.LeadingZeros(x.hi)
	middle := e.n
	m = e.proven(x.shiftHigh(shift), y.shiftHigh(shift), 1<<min(j, half))
	if e.n == middle {
		return l
	}
	x, y = m.unapplyTwo(x, y, (e.n-middle)%2 == 1)
	l = leaf{l.a*m.a + l.b*m.c, l.a*m.b + l.b*m.d, l.c*m.a + l.d*m.c, l.c*m.b + l.d*m.d}
	// Both halves are proven, but only for the two words; the same condition
	// must hold for the whole with respect to the words below.
	for e.n > before && !(!y.less(two{lo: l.a}) && !x.sub(y).less(two{lo: l.a + l.b})) {
		q, _ := packedUint(e.buf[packedStart(e.buf, len(e.buf)):])
		e.drop()
		l = leaf{l.b, l.a - uint(q)*l.b, l.d, l.c - uint(q)*l.d}
		x, y = x.mul(uint(q)).add(y), x
	}
	return l
}

// proven takes quotients of x ≥ y as long as they are those of (x + ξ)/(y + η) for
// all ξ and η in [0, 1) that keep x + ξ > y + η, and the matrix entries stay under
// the limit.
func (e *expansion) proven(x, y uint, limit uint) leaf {
	// M⁻¹·(x + ξ, y + η) differs from the (x', y') kept by less than a in the
	// second component, and by less than a + b in the difference of both,
	// because M = [[a, b], [c, d]] has a ≥ c and b ≥ d.
	m := leaf{a: 1, d: 1}
	for y != 0 {
		q := x / y
		r := x - q*y
		a := m.a*q + m.b // at most x, so it does not wrap
		if a >= limit || r < a || y-r < a+m.a {
			break
		}
		e.pushUint(uint64(q))
		m = leaf{a, m.a, m.c*q + m.d, m.c}
		x, y = y, r
	}
	return m
}

// unapply replaces (u, v) by l⁻¹·(u, v), which must not be negative; odd tells
// that the determinant of l is −1.
func (l *leaf) unapply(u, v []big.Word, odd bool) {
	// l⁻¹ = ±[[d, −b], [−c, a]]
	p, q, r, s := l.d, l.b, l.a, l.c
	x, y := u, v
	if odd {
		p, q, r, s = l.b, l.d, l.c, l.a
		x, y = v, u
	}
	x, y, v = x[:len(u)], y[:len(u)], v[:len(u)]
	var cp, cq, cr, cs, b1, b2 uint
	for i := range u {
		f, g := uint(x[i]), uint(y[i])
		var hi, lo, lo2, k uint
		hi, lo = bits.Mul(p, f)
		lo, k = bits.Add(lo, cp, 0)
		cp = hi + k
		hi, lo2 = bits.Mul(q, g)
		lo2, k = bits.Add(lo2, cq, 0)
		cq = hi + k
		lo, b1 = bits.Sub(lo, lo2, b1)
		u[i] = big.Word(lo)
		hi, lo = bits.Mul(r, g)
		lo, k = bits.Add(lo, cr, 0)
		cr = hi + k
		hi, lo2 = bits.Mul(s, f)
		lo2, k = bits.Add(lo2, cs, 0)
		cs = hi + k
		lo, b2 = bits.Sub(lo, lo2, b2)
		v[i] = big.Word(lo)
	}
}

// unapplyTwo is unapply for numbers of two words.
func (l *leaf) unapplyTwo(x, y two, odd bool) (two, two) {
	u := x.mul(l.d).sub(y.mul(l.b))
	v := y.mul(l.a).sub(x.mul(l.c))
	if odd {
		return two{}.sub(u), two{}.sub(v)
	}
	return u, v
}

// bitLen returns the bit length of the number in w, lowest word first.
func bitLen(w []big.Word) int {
	for i := len(w) - 1; i >= 0; i-- {
		if w[i] != 0 {
			return i*wordBits + bits.Len(uint(w[i]))
		}
	}
	return 0
}
