package markov

import (
	"context"
	"fmt"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Triple is a Markov triple: a solution of a² + b² + c² = 3abc in positive integers,
// in increasing order a ≤ b ≤ c. The zero value is (1, 1, 1).
type Triple struct {
	// By class, in any order: the equation is symmetric.
	solution orbifold.Triple
}

// NewTriple returns the Markov triple of three integers, given in any order. It is
// ErrNotPositive if one of them is nil or below 1, and ErrNotSolution, with both
// sides of the equation, if they do not solve it. Cost: a few multiplications.
func NewTriple(a, b, c *big.Int) (Triple, error) {
	solution, err := Family().NewTriple(a, b, c)
	if err != nil {
		return Triple{}, fmt.Errorf("markov: triple (%s, %s, %s): positive integers with a² + b² + c² = 3abc would be accepted: %w",
			contfrac.Abbreviate(a), contfrac.Abbreviate(b), contfrac.Abbreviate(c), err)
	}
	return Triple{solution}, nil
}

// TripleAt returns the Markov triple of an index in [0, 1]: its largest number is
// the one at the index, the other two are those at the Farey parents of the index.
// 0/1 has (1, 1, 1), 1/1 has (1, 1, 2), 1/2 has (1, 2, 5). Each triple is that of
// exactly one index. An index outside [0, 1] is ErrIndex; numbers with too many bits
// are ErrTooLarge. Cost: that of Frobenius.
func TripleAt(index farey.Slope) (Triple, error) {
	lattice, err := FromIndex(index)
	if err != nil {
		return Triple{}, err
	}
	solution, err := Family().Triple(lattice.Path().Triangle())
	if err != nil {
		return Triple{}, fmt.Errorf("markov: triple at index %v: %w", index, err)
	}
	return Triple{solution}, nil
}

// Numbers returns the three numbers, a ≤ b ≤ c.
func (t Triple) Numbers() (a, b, c *big.Int) {
	n := t.solution.Sorted()
	return n[0], n[1], n[2]
}

// Neighbours returns the triples one Vieta jump away: those with a, b and c, in
// this order, exchanged for the other root of the equation. The jump at c gives the
// parent, the other two give triples with a larger c. Two neighbours of (1, 1, 2)
// are equal, (1, 2, 5), and all three of (1, 1, 1), which has no parent: (1, 1, 2).
// Cost: a few multiplications.
func (t Triple) Neighbours() [3]Triple {
	var jumps [3]Triple
	for i, class := range t.order() {
		jumps[i] = Triple{t.solution.Flip(class)}
	}
	return jumps
}

// order returns the classes of a, b and c.
func (t Triple) order() [3]farey.Class {
	order := [3]farey.Class{farey.Zero, farey.Infinity, farey.One}
	slices.SortStableFunc(order[:], func(c, d farey.Class) int { return t.solution.At(c).Cmp(t.solution.At(d)) })
	return order
}

// Parent returns the triple one step nearer to the root of the Markov tree, by the
// Vieta jump at the largest number; false for the root (1, 1, 1).
func (t Triple) Parent() (parent Triple, ok bool) {
	solution, ok := t.solution.Parent()
	return Triple{solution}, ok
}

// Index returns the index of the largest number, as a member of this triple:
// TripleAt(t.Index()) is t. It is found by descent from parent to parent, at the
// cost of a multiplication for each step to (1, 1, 1); IndexContext can be stopped.
func (t Triple) Index() farey.Slope {
	index, _ := t.IndexContext(context.Background())
	return index
}

// IndexContext is Index that stops when ctx ends, with its error.
func (t Triple) IndexContext(ctx context.Context) (farey.Slope, error) {
	path, err := t.solution.PathContext(ctx)
	if err != nil {
		return farey.Slope{}, fmt.Errorf("markov: index of a triple: %w", err)
	}
	newest, _ := path.Slope() // 0/1 for (1, 1, 1)
	return Index(Family().Representative(newest))
}

// Equal tells whether two triples have the same numbers.
func (t Triple) Equal(u Triple) bool {
	return slices.EqualFunc(t.sorted(), u.sorted(), func(x, y *big.Int) bool { return x.Cmp(y) == 0 })
}

func (t Triple) sorted() []*big.Int {
	n := t.solution.Sorted()
	return n[:]
}

// String returns the numbers in increasing order, "(1, 2, 5)".
func (t Triple) String() string {
	a, b, c := t.Numbers()
	return fmt.Sprintf("(%s, %s, %s)", a, b, c)
}

// Format writes the numbers whole for %s and shortened for %v.
func (t Triple) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		a, b, c := t.Numbers()
		fmt.Fprintf(s, "(%s, %s, %s)", contfrac.Abbreviate(a), contfrac.Abbreviate(b), contfrac.Abbreviate(c))
		return
	}
	fmt.Fprint(s, t.String())
}
