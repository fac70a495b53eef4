package contfrac

import (
	"math/big"
	"math/bits"
	"sync"
)

// tree is a product of 2×2 matrices [[t, 1], [1, 0]] that has been cut into
// leaves. A leaf holds as many factors as fit in words, or one factor that does
// not fit, so that the number of leaves goes with the size of the product and
// not with that of the input.
type tree struct {
	leaves []leaf
	bigs   []*big.Int
	weight []int64 // weight[i] is the size in bits, about, of the leaves before i
}

// leaf is the matrix [[a, b], [c, d]] with entries up to leafMax, or, with
// a = leafBig, [[bigs[b], 1], [1, 0]]. It holds no pointer, so that the many
// leaves are nothing to the garbage collector.
type leaf struct{ a, b, c, d uint }

// wordBits is the size of a word.
const wordBits = bits.UintSize

// leafMax leaves the top bit of a word free, so that two products and a carry
// fit in two words.
const (
	leafMax = 1<<(wordBits-1) - 1
	leafBig = leafMax + 1
)

type treeBuilder struct {
	leaves []leaf
	bigs   []*big.Int
	open   leaf
	opened bool
}

// push adds a factor of any size; it keeps t.
func (b *treeBuilder) push(t *big.Int) {
	if t.IsUint64() {
		if n := t.Uint64(); n <= leafMax {
			b.pushUint(uint(n))
			return
		}
	}
	b.flush()
	b.leaves = append(b.leaves, leaf{a: leafBig, b: uint(len(b.bigs))})
	b.bigs = append(b.bigs, t)
}

// pushUint adds a factor up to leafMax.
func (b *treeBuilder) pushUint(t uint) {
	if b.opened {
		// [[a, b], [c, d]]·[[t, 1], [1, 0]] = [[at + b, a], [ct + d, c]]
		o := &b.open
		ha, a := bits.Mul(o.a, t)
		hc, c := bits.Mul(o.c, t)
		a += o.b
		c += o.d
		// A sum of two numbers up to leafMax does not wrap, so a product that
		// fits shows an excess in the top bit.
		if ha|hc == 0 && a-o.b <= leafMax && c-o.d <= leafMax && a <= leafMax && c <= leafMax {
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
		size := bits.Len(l.a)
		if l.a == leafBig {
			size = b.bigs[l.b].BitLen()
		}
		weight[i+1] = weight[i] + int64(size) + 1
	}
	return tree{leaves: b.leaves, bigs: b.bigs, weight: weight}
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
	return tree{t.leaves[:lo], t.bigs, t.weight[:lo+1]}, tree{t.leaves[lo:], t.bigs, t.weight[lo:]}
}

// forkBits is the weight from which the halves of a tree are worked out at the
// same time. A half is then a millisecond's work, beside which starting a
// goroutine is nothing.
var forkBits int64 = 1 << 17

// both runs the work on the two halves of t.
func (t tree) both(left, right func()) {
	if t.weight[len(t.leaves)]-t.weight[0] < forkBits {
		left()
		right()
		return
	}
	var done sync.WaitGroup
	done.Go(left)
	right()
	done.Wait()
}

// wordLeaves is the number of leaves up to which a tree is multiplied out from
// left to right by words; see BenchmarkWordLeaves.
var wordLeaves = 16

// full returns the product; the identity if there are no leaves.
func (t tree) full() entries {
	switch {
	case len(t.leaves) == 0:
		return identity()
	case len(t.leaves) == 1:
		l := t.leaves[0]
		if l.a == leafBig {
			return entries{new(big.Int).Set(t.bigs[l.b]), big.NewInt(1), big.NewInt(1), new(big.Int)}
		}
		return wordProduct(t.leaves)
	case len(t.leaves) <= wordLeaves && t.small():
		return wordProduct(t.leaves)
	}
	left, right := t.split()
	var m, n entries
	t.both(func() { m = left.full() }, func() { n = right.full() })
	return m.mul(n)
}

// small reports whether all leaves are of words.
func (t tree) small() bool {
	for i := range t.leaves {
		if t.leaves[i].a == leafBig {
			return false
		}
	}
	return true
}

// wordProduct returns the product of leaves of words, of which there is at
// least one, from left to right.
func wordProduct(leaves []leaf) entries {
	n := len(leaves)
	words := make([]big.Word, 4*n)
	a, b, c, d := words[:n:n], words[n:2*n:2*n], words[2*n:3*n:3*n], words[3*n:]
	l := &leaves[0]
	a[0], b[0], c[0], d[0] = big.Word(l.a), big.Word(l.b), big.Word(l.c), big.Word(l.d)
	for i := 1; i < n; i++ {
		mulRow(a[:i+1], b[:i+1], &leaves[i])
		mulRow(c[:i+1], d[:i+1], &leaves[i])
	}
	set := func(w []big.Word) *big.Int { return new(big.Int).SetBits(w) }
	return entries{set(a), set(b), set(c), set(d)}
}

// corner returns the upper left entry of the product.
func (t tree) corner() *big.Int {
	if len(t.leaves) < 2 {
		return t.full().a
	}
	left, right := t.split()
	var a, b, c, d *big.Int
	t.both(func() { a, b = left.row() }, func() { c, d = right.column() })
	return dot(a, c, b, d)
}

// row returns the upper row of the product.
func (t tree) row() (a, b *big.Int) {
	if len(t.leaves) < 2 {
		m := t.full()
		return m.a, m.b
	}
	left, right := t.split()
	var x, y *big.Int
	var m entries
	t.both(func() { x, y = left.row() }, func() { m = right.full() })
	return dot(x, m.a, y, m.c), dot(x, m.b, y, m.d)
}

// column returns the left column of the product.
func (t tree) column() (a, c *big.Int) {
	if len(t.leaves) < 2 {
		m := t.full()
		return m.a, m.c
	}
	left, right := t.split()
	var x, y *big.Int
	var m entries
	t.both(func() { m = left.full() }, func() { x, y = right.column() })
	return dot(m.a, x, m.b, y), dot(m.c, x, m.d, y)
}
