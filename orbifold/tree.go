package orbifold

import (
	"container/heap"
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// Node is a slope of the tree with its number and the triangle in which it
// appears first: the base triangle for 0/1, 1/0 and 1/1, else the one of which
// the slope is the newest vertex.
type Node struct {
	slope  farey.Slope
	number *big.Int
	depth  int
	edge   edge[*big.Int] // the two older vertices and the one behind them
	a, b   farey.Slope    // their slopes; unused for base slopes
}

// Slope returns the slope.
func (n Node) Slope() farey.Slope { return n.slope }

// Number returns the number at the slope.
func (n Node) Number() *big.Int { return new(big.Int).Set(n.value()) }

func (n Node) value() *big.Int {
	if n.number == nil {
		return unit
	}
	return n.number
}

// Depth returns the number of flips from the base triangle: 0 for the base
// slopes, 1 for 1/2, 2/1 and −1/1.
func (n Node) Depth() int { return n.depth }

// Parents returns the two older vertices of the triangle, the Farey parents of
// the slope; false for the base slopes.
func (n Node) Parents() (a, b farey.Slope, ok bool) { return n.a, n.b, n.depth > 0 }

// Triple returns the numbers of the triangle by class.
func (n Node) Triple() Triple {
	if n.depth == 0 {
		return Triple{family: n.edge.x.family}
	}
	t := Triple{family: n.edge.x.family}
	t.numbers[n.edge.a.class] = n.edge.a.number
	t.numbers[n.edge.b.class] = n.edge.b.number
	t.numbers[n.edge.c.class] = n.number
	return t
}

// String returns the slope and its number, "3/7: 169".
func (n Node) String() string { return fmt.Sprintf("%s: %s", n.slope, n.value()) }

// Format writes both whole for %s and shortened for %v.
func (n Node) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprintf(s, "%v: %s", n.slope, contfrac.Abbreviate(n.value()))
		return
	}
	fmt.Fprint(s, n.String())
}

// branch is an edge of the tree and all that lies in front of it.
type branch struct {
	Node
	inside bool // all slopes in front of it belong to the walk
}

// grow returns the two branches in front of the newest vertex of b, towards
// smaller slopes first.
func (b branch) grow() (left, right branch) {
	v := vertex[*big.Int]{b.number, b.edge.c.class}
	l, r := b.edge, b.edge
	l.b, l.c = v, b.edge.b // (A, A⊕B | B)
	r.a, r.c = v, b.edge.a // (A⊕B, B | A)
	return makeBranch(l, b.a, b.slope, b.depth+1, b.inside), makeBranch(r, b.slope, b.b, b.depth+1, b.inside)
}

func makeBranch(e edge[*big.Int], a, b farey.Slope, depth int, inside bool) branch {
	return branch{Node{mediant(a, b), e.front().number, depth, e, a, b}, inside}
}

// mediant returns the slope between the ends of an oriented edge; between 1/0
// and a slope ≤ 0 it goes through the negative slopes.
func mediant(a, b farey.Slope) farey.Slope {
	if a.IsInfinite() {
		// −1/0 as a vector.
		m, _ := farey.New(new(big.Int).Sub(b.Num(), big.NewInt(1)), b.Den())
		return m
	}
	m, _ := farey.Mediant(a, b)
	return m
}

// roots returns the three base slopes and the three branches behind them.
func (f Family) roots() (base [3]Node, first [3]branch) {
	x := f.exact()
	for _, c := range classes {
		base[c] = Node{slope: c.Slope(), edge: edge[*big.Int]{x: x}}
		e := x.start(farey.NewPath(c, contfrac.Word{}))
		first[c] = makeBranch(e, e.a.class.Slope(), e.b.class.Slope(), 1, false)
	}
	return base, first
}

// Tree returns every slope whose triangle is at most depth flips from the base
// triangle, each once: 0/1, 1/0 and 1/1, then the subtrees of 1/2, 2/1 and −1/1 in
// this order, each vertex before the two subtrees behind it, that of the
// smaller slopes first. There are 3·2^depth of them (3 for depth 0, none for a negative one). The
// iterator can be used again; it needs memory for one path.
func (f Family) Tree(depth int) iter.Seq[Node] {
	return f.walk(false, func(n Node) bool { return n.depth <= depth })
}

// Within returns every slope whose number is at most bound, each once, in the
// order of Tree. It is complete, since numbers grow strictly along every path
// from the base. A nil bound or one below 1 gives nothing. The iterator can be
// used again; it needs memory for one path. Their count grows like the square
// of the logarithm of the bound.
func (f Family) Within(bound *big.Int) iter.Seq[Node] {
	return f.walk(false, atMost(bound))
}

// atMost accepts the slopes with numbers up to bound.
func atMost(bound *big.Int) func(Node) bool {
	if bound == nil {
		bound = new(big.Int)
	}
	bound = new(big.Int).Set(bound)
	return func(n Node) bool { return n.value().Cmp(bound) <= 0 }
}

// walk yields the slopes that accept takes, in the order of Tree; behind a
// slope that it refuses it does not look. With domain set it leaves out the
// slopes outside Domain, and the branches without any inside.
func (f Family) walk(domain bool, accept func(Node) bool) iter.Seq[Node] {
	return func(yield func(Node) bool) {
		base, first := f.roots()
		for _, n := range base {
			if (!domain || f.inDomain(n.slope)) && accept(n) && !yield(n) {
				return
			}
		}
		for _, c := range [...]farey.Class{farey.Infinity, farey.Zero, farey.One} {
			stack := []branch{first[c]}
			stack[0].inside = !domain
			for len(stack) > 0 {
				b := stack[len(stack)-1]
				stack = stack[:len(stack)-1]
				if !f.meets(&b) || !accept(b.Node) {
					continue
				}
				if (b.inside || f.inDomain(b.slope)) && !yield(b.Node) {
					return
				}
				left, right := b.grow()
				stack = append(stack, right, left)
			}
		}
	}
}

// Ascending returns the numbers of the family in increasing order, one slope
// of each symmetry class (the representative of Domain; Orbit gives the
// others); inequivalent slopes with the same number come one after the other,
// the smaller slope first. For the classical family these are the Markov
// numbers, each once as far as the uniqueness conjecture holds.
//
// The sequence does not end; the caller stops. The iterator can be used again.
// After n numbers it holds about n candidates, and each step costs O(log n)
// comparisons.
func (f Family) Ascending() iter.Seq[Node] {
	return func(yield func(Node) bool) {
		base, first := f.roots()
		var q queue
		for _, n := range base {
			if f.inDomain(n.slope) {
				q = append(q, branch{Node: n})
			}
		}
		q = append(q, first[:]...)
		heap.Init(&q)
		for {
			b := q[0]
			if (b.inside || f.inDomain(b.slope)) && !yield(b.Node) {
				return
			}
			if b.depth == 0 {
				heap.Pop(&q)
				continue
			}
			// The larger of the two branches takes the place of b.
			var grown []branch
			left, right := b.grow()
			for _, g := range [...]branch{left, right} {
				if f.meets(&g) {
					grown = append(grown, g)
				}
			}
			if len(grown) == 0 {
				heap.Pop(&q)
				continue
			}
			q[0] = grown[0]
			heap.Fix(&q, 0)
			if len(grown) == 2 {
				heap.Push(&q, grown[1])
			}
		}
	}
}

// meets tells whether slopes in front of the edge lie in the domain, and notes
// when all do.
func (f Family) meets(b *branch) bool {
	lo, hi, all := f.Domain()
	if b.inside = b.inside || all; b.inside {
		return true
	}
	// A lower end of 1/0 stands for −1/0, below everything.
	below := b.a.IsInfinite()
	b.inside = !below && lo.Cmp(b.a) <= 0 && b.b.Cmp(hi) <= 0
	return b.b.Cmp(lo) > 0 && (below || b.a.Cmp(hi) < 0)
}

// queue is a heap of branches by number, then slope.
type queue []branch

func (q queue) Len() int { return len(q) }

func (q queue) Less(i, j int) bool {
	if c := q[i].value().Cmp(q[j].value()); c != 0 {
		return c < 0
	}
	return q[i].slope.Cmp(q[j].slope) < 0
}

func (q queue) Swap(i, j int) { q[i], q[j] = q[j], q[i] }

func (q *queue) Push(x any) { *q = append(*q, x.(branch)) }

func (q *queue) Pop() any {
	old := *q
	b := old[len(old)-1]
	*q = old[:len(old)-1]
	return b
}
