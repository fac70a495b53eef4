package markov

import (
	"iter"
	"math/big"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Tree returns the Markov triples at most depth Vieta jumps from (1, 1, 1), each
// once, with the index of its largest number: (1, 1, 1), (1, 1, 2), (1, 2, 5), and
// then each triple before the two subtrees behind it, that of the smaller indices
// first. From (1, 2, 5) on the tree is binary: there are 1 + 2^(depth−1) triples for
// depth ≥ 1, one for depth 0, none for a negative depth.
//
// The iterator can be used again and stopped anywhere; it needs memory for one
// path. It is Family().Tree, one slope of each symmetry class.
func Tree(depth int) iter.Seq2[farey.Slope, Triple] { return indexed(Family().Tree(depth)) }

// Within returns the Markov triples with largest number at most bound, each once,
// with the index of that number, in the order of Tree. A nil bound or one below 1
// gives nothing. There are some 0.181·(ln 3·bound)² of them.
//
// The iterator can be used again and stopped anywhere; it needs memory for one
// path, unlike Numbers, which sorts.
func Within(bound *big.Int) iter.Seq2[farey.Slope, Triple] { return indexed(Family().Within(bound)) }

// indexed yields the nodes of a walk in the order of orbifold's Tree whose lattice
// slopes have an index.
func indexed(walk iter.Seq[orbifold.Node]) iter.Seq2[farey.Slope, Triple] {
	return func(yield func(index farey.Slope, t Triple) bool) {
		for node := range walk {
			index, err := Index(node.Slope())
			if err == nil && !yield(index, Triple{node.Triple()}) {
				return
			}
			// Smaller slopes come first and those above 1/2 are symmetric copies: behind
			// the first of them, base slopes apart, the walk has nothing new.
			if err != nil && node.Depth() > 0 {
				return
			}
		}
	}
}
