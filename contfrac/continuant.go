package contfrac

import (
	"math/big"
	"math/bits"
)

// Continuant returns the continuant K of the terms, defined by
//
//	K() = 1, K(a) = a, K(a, …, y, z) = K(a, …, y)·z + K(a, …, x),
//
// which is the numerator of the continued fraction [a; …, y, z] and the upper
// left entry of the product of the matrices [[t, 1], [1, 0]]. The terms may be
// any integers; nil counts as 0. It costs O(M(n) log n) for a result of n bits,
// by a product tree with leaves of word size.
func Continuant(terms []*big.Int) *big.Int {
	var b treeBuilder
	for _, t := range terms {
		if t == nil {
			t = new(big.Int)
		}
		b.push(t)
	}
	return b.tree().corner()
}

// product returns the product tree of the matrices [[t, 1], [1, 0]] of the terms.
func (f Fraction) product() tree {
	var b treeBuilder
	for i, at := 0, 0; at < len(f.data); i++ {
		end := packedEnd(f.data, at)
		n, ok := packedUint(f.data[at:end])
		switch {
		case i == 0 && f.neg:
			t := packedBig(f.data[at:end])
			b.push(t.Neg(t))
		case ok:
			b.pushUint(n)
		default:
			b.push(packedBig(f.data[at:end]))
		}
		at = end
	}
	return b.tree()
}

// tree is a product of 2×2 matrices that has been cut into leaves. A leaf holds as many
// factors as fit in words, or one factor that does not fit, so that the number
// of leaves goes with the size of the product and not with that of the input.
type tree struct {
	leaves []leaf
	weight []int64 // weight[i] is the size in bits, about, of the leaves before i
}

// leaf is the matrix [[a, b], [c, d]], or [[big, 1], [1, 0]] when big is set.
type leaf struct {
	a, b, c, d uint64
	big        *big.Int
}

func (l leaf) matrix() entries {
	if l.big != nil {
		return entries{new(big.Int).Set(l.big), big.NewInt(1), big.NewInt(1), new(big.Int)}
	}
	u := func(n uint64) *big.Int { return new(big.Int).SetUint64(n) }
	return entries{u(l.a), u(l.b), u(l.c), u(l.d)}
}

type treeBuilder struct {
	leaves []leaf
	open   leaf
	opened bool
}

func (b *treeBuilder) push(t *big.Int) {
	if t.IsUint64() {
		b.pushUint(t.Uint64())
		return
	}
	b.flush()
	b.leaves = append(b.leaves, leaf{big: t})
}

func (b *treeBuilder) pushUint(t uint64) {
	if b.opened {
		// [[a, b], [c, d]]·[[t, 1], [1, 0]] = [[at + b, a], [ct + d, c]]
		o := &b.open
		hi, a := bits.Mul64(o.a, t)
		a, ca := bits.Add64(a, o.b, 0)
		hc, c := bits.Mul64(o.c, t)
		c, cc := bits.Add64(c, o.d, 0)
		if hi|hc|ca|cc == 0 {
			*o = leaf{a: a, b: o.a, c: c, d: o.c}
			return
		}
		b.flush()
	}
	b.open, b.opened = leaf{a: t, b: 1, c: 1}, true
}

func (b *treeBuilder) flush() {
	if b.opened {
		b.leaves = append(b.leaves, b.open)
		b.opened = false
	}
}

func (b *treeBuilder) tree() tree {
	b.flush()
	weight := make([]int64, len(b.leaves)+1)
	for i, l := range b.leaves {
		size := bits.Len64(l.a)
		if l.big != nil {
			size = l.big.BitLen()
		}
		weight[i+1] = weight[i] + int64(size) + 1
	}
	return tree{leaves: b.leaves, weight: weight}
}

// split cuts a tree of at least two leaves in two of about equal weight.
func (t tree) split() (left, right tree) {
	n := len(t.leaves)
	middle := t.weight[0] + (t.weight[n]-t.weight[0])/2
	lo, hi := 1, n-1
	for lo < hi {
		m := int(uint(lo+hi) / 2)
		if t.weight[m] < middle {
			lo = m + 1
		} else {
			hi = m
		}
	}
	if lo > 1 && middle-t.weight[lo-1] < t.weight[lo]-middle {
		lo--
	}
	return tree{t.leaves[:lo], t.weight[:lo+1]}, tree{t.leaves[lo:], t.weight[lo:]}
}

// full returns the product; the identity if there are no leaves.
func (t tree) full() entries {
	switch len(t.leaves) {
	case 0:
		return identity()
	case 1:
		return t.leaves[0].matrix()
	}
	left, right := t.split()
	return left.full().mul(right.full())
}

// corner returns the upper left entry of the product.
func (t tree) corner() *big.Int {
	if len(t.leaves) < 2 {
		return t.full().a
	}
	left, right := t.split()
	a, b := left.row()
	c, d := right.column()
	return dot(a, c, b, d)
}

// row returns the upper row of the product.
func (t tree) row() (a, b *big.Int) {
	if len(t.leaves) < 2 {
		m := t.full()
		return m.a, m.b
	}
	left, right := t.split()
	x, y := left.row()
	m := right.full()
	return dot(x, m.a, y, m.c), dot(x, m.b, y, m.d)
}

// column returns the left column of the product.
func (t tree) column() (a, c *big.Int) {
	if len(t.leaves) < 2 {
		m := t.full()
		return m.a, m.c
	}
	left, right := t.split()
	x, y := right.column()
	m := left.full()
	return dot(m.a, x, m.b, y), dot(m.c, x, m.d, y)
}

// dot returns ab + cd.
func dot(a, b, c, d *big.Int) *big.Int {
	s := Product(a, b)
	return s.Add(s, Product(c, d))
}
