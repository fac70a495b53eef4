package contfrac

import "math/big"

// expansion collects the quotients of a Euclidean algorithm. While it runs,
// the numbers x > y ≥ 0 still to be expanded and the matrix M of the quotients found
// satisfy (x₀, y₀) = M·(x, y), M = ∏ [[q, 1], [1, 0]].
//
// Quotients may be found from the leading bits of x and y alone, in any way: as
// x₀/y₀ = [q₁; …, qₖ, x/y] and expansions are unique, they are right if the
// numbers (x, y) = M⁻¹·(x₀, y₀) satisfy x > y > 0. That is checked on the whole
// numbers, and quotients are taken back from the end until it holds. (With y = 0
// they would be right too unless the last is 1; it is simpler to take the last
// one back and leave it to a division.) Source of the halving: "Schnelle Berechnung von Kettenbruchentwicklungen", Acta
// Informatica 1 (1971).
type expansion struct{ termBuilder }

// lehmerBits is the size in bits up to which numbers are expanded by
// expansion.lehmer; BenchmarkLehmer calibrates it.
var lehmerBits = 8000

// halfway expands x > y ≥ 0 until y has at most s bits while x has more, and returns what is left and,
// if wanted, the matrix of the quotients.
func (e *expansion) halfway(x, y *big.Int, s int, want bool) (_, _ *big.Int, m entries) {
	if x.BitLen() <= lehmerBits {
		return e.lehmer(x, y, s, want)
	}
	m = identity()
	if x.Cmp(y) <= 0 {
		return x, y, m
	}
	for first := true; y.BitLen() > s; first = false {
		n := x.BitLen()
		d := n - s
		if first {
			d /= 2
		}
		before := e.n
		// The leading 2d bits decide what leads to a matrix of d bits.
		if k := max(n-2*d, 0); d >= halfwayLeast {
			var p entries
			if x, y, p = e.leading(x, y, k, n-d-k); e.n > before && want {
				m = m.mul(p)
			}
		}
		if e.n == before || first && y.BitLen() > s {
			var q *big.Int
			if x, y, q = e.divide(x, y); want {
				m = entries{dot(m.a, q, m.b, oneInt), m.a, dot(m.c, q, m.d, oneInt), m.c}
			}
		}
	}
	return x, y, m
}

// halfwayLeast is the number of bits below which a division is no dearer than
// the way through the leading bits.
const halfwayLeast = 64

// leading expands x > y ≥ 0 as far as the numbers without their last k bits
// do until the lesser of these has at most s bits.
func (e *expansion) leading(x, y *big.Int, k, s int) (_, _ *big.Int, m entries) {
	before := e.n
	u, v, m := e.halfway(new(big.Int).Rsh(x, uint(k)), new(big.Int).Rsh(y, uint(k)), s, true)
	if e.n == before {
		return x, y, m
	}
	if k == 0 {
		return u, v, m
	}
	// With ε = det M, M⁻¹ = ε·[[d, −b], [−c, a]]; on the leading bits this has
	// been done.
	mask := new(big.Int).Lsh(oneInt, uint(k))
	mask.Sub(mask, oneInt)
	xl, yl := new(big.Int).And(x, mask), new(big.Int).And(y, mask)
	du, dv := Product(m.d, xl), Product(m.a, yl)
	du.Sub(du, Product(m.b, yl))
	dv.Sub(dv, Product(m.c, xl))
	if (e.n-before)%2 == 1 {
		du.Neg(du)
		dv.Neg(dv)
	}
	u = du.Add(du, u.Lsh(u, uint(k)))
	v = dv.Add(dv, v.Lsh(v, uint(k)))
	for v.Sign() <= 0 || u.Cmp(v) <= 0 {
		q := e.pop()
		u, v = v.Add(v, Product(q, u)), u
		m = entries{m.b, m.a.Sub(m.a, Product(q, m.b)), m.d, m.c.Sub(m.c, Product(q, m.d))}
	}
	return u, v, m
}

// divide takes one quotient of x and y > 0 by division.
func (e *expansion) divide(x, y *big.Int) (_, _, q *big.Int) {
	q, r := new(big.Int), new(big.Int)
	q.QuoRem(x, y, r)
	e.push(q)
	return y, r, q
}
