package contfrac

import "math/big"

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
		case ok && n <= leafMax:
			b.pushUint(uint(n))
		default:
			b.push(packedBig(f.data[at:end]))
		}
		at = end
	}
	return b.tree()
}
