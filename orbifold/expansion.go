package orbifold

import (
	"fmt"
	"iter"
	"math/big"
	"slices"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// MaxExpandedTiles is the largest number of tiles of a snake graph whose
// Laurent expansion is multiplied out; the number of monomials grows like the
// square of it.
const MaxExpandedTiles = 1 << 10

// Expansion is the Laurent expansion of an arc in the lengths x₀, x∞, x₁ of the
// three base arcs, by class. They are the variables 1, 2 and 3 of Sum. It is
// homogeneous of degree 1 with positive coefficients; with x₀ = x∞ = x₁ = 1 it is the
// number. The zero value is that of the slope 0/1, x₀.
type Expansion struct {
	slope farey.Slope
	sum   *snake.Laurent
}

// Laurent returns the Laurent expansion of the arc of slope s: the sum over
// the perfect matchings of Snake(s) of the product of the edge labels, divided by
// the product of all diagonals. It equals the value that exchanging by
// u·u' = v² + k_u·v·w + w² gives from x₀, x∞, x₁.
//
// More than MaxExpandedTiles tiles are ErrTooLarge. Cost: O(tiles) products of
// sums of up to O(tiles²) monomials by a variable. Sources: "Cluster expansion
// formulas and perfect matchings", J. Algebraic Combin. 32 (2010); "Positivity
// for cluster algebras from surfaces", Adv. Math. 227 (2011).
func (f Family) Laurent(s farey.Slope) (Expansion, error) {
	g, err := f.expandable(s, "Laurent expansion")
	if err != nil {
		return Expansion{}, err
	}
	sum, err := snake.Weigh(snake.Laurents{}, g, snake.Weights[snake.Laurent]{
		Edge: func(e snake.Side) snake.Laurent { return monomial(labelled(e.Label)) },
	})
	if err != nil {
		return Expansion{}, fmt.Errorf("orbifold: Laurent expansion of %v: %w", s, err)
	}
	sum = sum.Mul(monomial(diagonals(g)))
	return Expansion{s, &sum}, nil
}

// expandable returns the snake graph of s when it is short enough.
func (f Family) expandable(s farey.Slope, what string) (snake.Graph, error) {
	if n := f.Tiles(s); n.Cmp(big.NewInt(MaxExpandedTiles)) > 0 {
		return snake.Graph{}, fmt.Errorf("orbifold: %s of %v in family %v: %s tiles, at most %d are expanded: %w", what, s, f, contfrac.Abbreviate(n), MaxExpandedTiles, ErrTooLarge)
	}
	return f.Snake(s)
}

// exponents is a monomial in x₀, x∞, x₁.
type exponents [3]int

// labelled returns the variable of an edge label.
func labelled(l snake.Label) (e exponents) {
	if c, ok := ClassOf(l); ok {
		e[c] = 1
	}
	return e
}

// diagonals returns one over the product of all diagonals.
func diagonals(g snake.Graph) (e exponents) {
	for t := range g.AllTiles() {
		if c, ok := ClassOf(t.Diagonal); ok {
			e[c]--
		}
	}
	return e
}

func monomial(e exponents) snake.Laurent {
	m, _ := snake.NewLaurent(unit, e[:]...) // three exponents are never too many
	return m
}

// Slope returns the slope of the arc.
func (x Expansion) Slope() farey.Slope { return x.slope }

// Sum returns the expansion as a Laurent polynomial in the variables 1, 2 and 3
// for x₀, x∞ and x₁.
func (x Expansion) Sum() snake.Laurent {
	if x.sum == nil {
		return monomial(exponents{farey.Zero: 1})
	}
	return *x.sum
}

// Denominator returns the exponents of x₀, x∞, x₁ in the denominator of the
// expansion in lowest terms: the crossings of the arc by class. For the base
// slopes, which cross nothing, it is −1 at their own class.
func (x Expansion) Denominator() [3]int {
	var d [3]int
	for c := range d {
		d[c] = -x.lowest(c)
	}
	return d
}

// lowest returns the least exponent of a variable.
func (x Expansion) lowest(c int) int {
	least, first := 0, true
	for e := range x.Sum().Terms() {
		k := full(e)[c]
		if first || k < least {
			least, first = k, false
		}
	}
	return least
}

// full fills up the exponents of a monomial that ends early.
func full(e []int) (x exponents) {
	copy(x[:], e)
	return x
}

// Eval returns the value at rational lengths, which must not be 0 where they are
// divided by.
func (x Expansion) Eval(zero, infinity, one *big.Rat) (*big.Rat, error) {
	v, err := x.Sum().Eval(zero, infinity, one)
	if err != nil {
		return nil, fmt.Errorf("orbifold: expansion of %v: %w", x.slope, err)
	}
	return v, nil
}

// EvalMod returns the value modulo m, in 0 … m−1, at lengths that are
// invertible modulo m; other lengths and m < 1 are ErrModulus.
func (x Expansion) EvalMod(zero, infinity, one, m *big.Int) (*big.Int, error) {
	if err := checkModulus(m); err != nil {
		return nil, err
	}
	lengths, sum := [3]*big.Int{zero, infinity, one}, new(big.Int)
	var inverse [3]*big.Int
	for c, l := range lengths {
		if l != nil {
			inverse[c] = new(big.Int).ModInverse(l, m)
		}
		if inverse[c] == nil {
			return nil, fmt.Errorf("orbifold: expansion of %v: length %s at class %v has no inverse modulo %s: %w",
				x.slope, brief(l), classes[c], brief(m), ErrModulus)
		}
	}
	for e, coefficient := range x.Sum().Terms() {
		for c, k := range full(e) {
			base := lengths[c]
			if k < 0 {
				base, k = inverse[c], -k
			}
			coefficient.Mul(coefficient, new(big.Int).Exp(base, big.NewInt(int64(k)), m)).Mod(coefficient, m)
		}
		sum.Add(sum, coefficient)
	}
	return sum.Mod(sum, m), nil
}

// Newton returns the vertices of the Newton polygon, the exponents of
// x₀, x∞, x₁ at its corners. All exponents sum to 1, so it lies in a plane; the corners go
// round once, counter-clockwise in the first two coordinates, from the lexicographically least. A
// single monomial has one, a polygon flat to a segment two.
func (x Expansion) Newton() [][3]int {
	var points [][3]int
	for e := range x.Sum().Terms() {
		points = append(points, full(e))
	}
	slices.SortFunc(points, func(a, b [3]int) int { return slices.Compare(a[:], b[:]) })
	// Lower and upper chain of the convex hull of the first two coordinates.
	half := func(points [][3]int) (chain [][3]int) {
		for _, p := range points {
			for len(chain) > 1 && turn(chain[len(chain)-2], chain[len(chain)-1], p) <= 0 {
				chain = chain[:len(chain)-1]
			}
			chain = append(chain, p)
		}
		return chain
	}
	if len(points) < 3 {
		return points
	}
	lower := half(points)
	slices.Reverse(points)
	upper := half(points)
	return append(lower[:len(lower)-1], upper[:len(upper)-1]...)
}

func turn(a, b, c [3]int) int {
	return (b[0]-a[0])*(c[1]-a[1]) - (b[1]-a[1])*(c[0]-a[0])
}

// String writes the expansion with the names x₀, x∞, x₁, largest monomial
// first, for instance "x₀⁻¹·x∞² + x₀⁻¹·x₁²".
func (x Expansion) String() string { return x.Sum().Text(variables[:]...) }

// Format writes the expansion whole for %s, and its first monomials and their
// number for %v when there are many.
func (x Expansion) Format(s fmt.State, verb rune) {
	const many = 12
	sum := x.Sum()
	if verb != 'v' || sum.Len() <= many {
		fmt.Fprint(s, x.String())
		return
	}
	head := snake.Laurent{}
	for e, c := range sum.Terms() {
		if head.Len() == many {
			break
		}
		m, _ := snake.NewLaurent(c, e...) // no more exponents than the sum had
		head = head.Add(m)
	}
	fmt.Fprintf(s, "%s + … (%d monomials)", head.Text(variables[:]...), sum.Len())
}

var variables = [3]string{"x₀", "x∞", "x₁"}

// Monomials yields the perfect matchings of Snake(s), in their order, each with
// the exponents of x₀, x∞, x₁ of its monomial in the Laurent expansion: the
// product of its edge labels divided by that of all diagonals. Limit and error are those
// of Laurent; the listing is lazy and can be run again.
func (f Family) Monomials(s farey.Slope) (iter.Seq2[snake.Matching, [3]int], error) {
	g, err := f.expandable(s, "monomials")
	if err != nil {
		return nil, err
	}
	set, err := g.Set()
	if err != nil {
		return nil, fmt.Errorf("orbifold: monomials of %v: %w", s, err)
	}
	below := diagonals(g)
	return func(yield func(snake.Matching, [3]int) bool) {
		for m := range set.All() {
			e := below
			edges, _ := set.EdgesOf(m) // m belongs to the set
			for _, side := range edges {
				for c, k := range labelled(side.Label) {
					e[c] += k
				}
			}
			if !yield(m, e) {
				return
			}
		}
	}, nil
}
