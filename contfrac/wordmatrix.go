package contfrac

import (
	"math/big"
	"math/bits"
)

// wordMatrix is a 2×2 matrix of non-negative integers, held in words and
// multiplied in place. The zero value stands for a matrix that nobody wants.
type wordMatrix struct {
	a, b, c, d []big.Word
	size       int // words in use
}

// newWordMatrix returns the identity, with room for entries of the given
// number of words.
func newWordMatrix(room int) wordMatrix {
	w := make([]big.Word, 4*room)
	m := wordMatrix{w[:room:room], w[room : 2*room : 2*room], w[2*room : 3*room : 3*room], w[3*room:], 1}
	m.a[0], m.d[0] = 1, 1
	return m
}

// mulLeaf multiplies by l from the right. The result must fit.
func (m *wordMatrix) mulLeaf(l *leaf) {
	if m.a == nil {
		return
	}
	n := min(m.size+1, len(m.a))
	mulRow(m.a[:n], m.b[:n], l)
	mulRow(m.c[:n], m.d[:n], l)
	if m.a[n-1] != 0 {
		m.size = n
	}
}

// mulQuotient multiplies by [[q, 1], [1, 0]] from the right. The result must
// fit.
func (m *wordMatrix) mulQuotient(q *big.Int) {
	if m.a == nil {
		return
	}
	row := func(x, y []big.Word) {
		z := dot(new(big.Int).SetBits(x[:m.size]), q, new(big.Int).SetBits(y[:m.size]), oneInt)
		copy(y, x)
		clear(x[copy(x, z.Bits()):])
	}
	row(m.a, m.b)
	row(m.c, m.d)
	m.size = max(1, (bitLen(m.a)+wordBits-1)/wordBits)
}

// entries hands the matrix over.
func (m *wordMatrix) entries() entries {
	n := func(w []big.Word) *big.Int { return new(big.Int).SetBits(w) }
	return entries{n(m.a), n(m.b), n(m.c), n(m.d)}
}

// mulRow replaces the row (x, y), whose top words are 0, by (x, y)·l.
func mulRow(x, y []big.Word, l *leaf) {
	y = y[:len(x)]
	var cx, cy uint
	for i := range x {
		u, v := uint(x[i]), uint(y[i])
		h0, l0 := bits.Mul(u, l.a)
		h1, l1 := bits.Mul(v, l.c)
		s, k := bits.Add(l0, l1, 0)
		h0 += h1 + k
		s, k = bits.Add(s, cx, 0)
		x[i], cx = big.Word(s), h0+k
		h0, l0 = bits.Mul(u, l.b)
		h1, l1 = bits.Mul(v, l.d)
		s, k = bits.Add(l0, l1, 0)
		h0 += h1 + k
		s, k = bits.Add(s, cy, 0)
		y[i], cy = big.Word(s), h0+k
	}
}
