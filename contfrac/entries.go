package contfrac

import (
	"math/big"
	"sync"
)

// entries is the matrix [[a, b], [c, d]]; the integers are shared between
// matrices and never modified.
type entries struct{ a, b, c, d *big.Int }

func identity() entries {
	return entries{big.NewInt(1), new(big.Int), new(big.Int), big.NewInt(1)}
}

// sevenThreshold is the size in words of the smaller of two matrices from
// which they are multiplied with seven multiplications; BenchmarkMatrixMul
// calibrates it.
var sevenThreshold = 24

// mul returns the product mn.
func (m entries) mul(n entries) entries {
	if min(m.words(), n.words()) >= sevenThreshold {
		return m.mulSeven(n)
	}
	return entries{
		dot(m.a, n.a, m.b, n.c), dot(m.a, n.b, m.b, n.d),
		dot(m.c, n.a, m.d, n.c), dot(m.c, n.b, m.d, n.d),
	}
}

// words returns the length of the largest entry.
func (m entries) words() int {
	return max(len(m.a.Bits()), len(m.b.Bits()), len(m.c.Bits()), len(m.d.Bits()))
}

// mulSeven is mul with seven multiplications and fifteen additions ("On
// multiplication of 2 × 2 matrices", Linear Algebra and its Applications 4
// (1971)).
func (m entries) mulSeven(n entries) entries {
	w := work.Get().(*workspace)
	s, t, p1, p6, p7 := &w[0], &w[1], &w[2], &w[3], &w[4]
	s.Add(m.c, m.d)
	t.Sub(n.b, n.a)
	p5 := Product(s, t) // (c + d)(b' − a')
	s.Sub(s, m.a)
	t.Sub(n.d, t)
	mulTo(p6, s, t) // (c + d − a)(d' − b' + a')
	s.Sub(m.b, s)
	t.Sub(t, n.c)
	p3 := Product(s, n.d) // (a + b − c − d)d'
	p4 := Product(m.d, t) // d(a' − b' − c' + d')
	s.Sub(m.a, m.c)
	t.Sub(n.d, n.b)
	mulTo(p7, s, t) // (a − c)(d' − b')
	mulTo(p1, m.a, n.a)
	p2 := Product(m.b, n.c)
	p6.Add(p6, p1)
	p7.Add(p7, p6)
	p6.Add(p6, p5)
	r := entries{p2.Add(p2, p1), p3.Add(p3, p6), p4.Sub(p7, p4), p5.Add(p5, p7)}
	work.Put(w)
	return r
}

// dot returns ab + cd.
func dot(a, b, c, d *big.Int) *big.Int {
	s := Product(a, b)
	if c.Sign() == 0 || d.Sign() == 0 {
		return s
	}
	w := work.Get().(*workspace)
	mulTo(&w[0], c, d)
	s.Add(s, &w[0])
	work.Put(w)
	return s
}

// mulTo sets z, which must be neither x nor y, to Product(x, y), in the memory of z if
// math/big does the work.
func mulTo(z, x, y *big.Int) {
	if transforms(x, y) {
		*z = *transformProduct(x, y)
		return
	}
	z.Mul(x, y)
}

// workspace is room for intermediate results.
type workspace [5]big.Int

var work = sync.Pool{New: func() any { return new(workspace) }}
