package snake_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// A walk along the arc of slope p/q through the triangles of the plane, for
// tests of labels only: it knows nothing of graphs. Classes are labels 1, 2, 3
// for 0/1, 1/0 and 1/1.

type vector struct{ x, y int }

func (a vector) minus(b vector) vector { return vector{a.x - b.x, a.y - b.y} }

// class of a primitive vector by parity.
func (a vector) class() snake.Label {
	switch {
	case a.y%2 == 0:
		return 1
	case a.x%2 == 0:
		return 2
	}
	return 3
}

// corridor reports to its callbacks what lies along the arc.
type corridor struct {
	start func(edge, left, right snake.Label)
	own   func(own contfrac.Letter, edge snake.Label)               // once for each crossing
	turn  func(turn contfrac.Letter, third, edge, kept snake.Label) // kept: the side of the triangle at the kept end
	end   func(left, right snake.Label)
}

// walk follows the arc for p, q ≥ 1, coprime, not both 1.
func (c corridor) walk(p, q int) {
	height := func(v vector) int { return q*v.y - p*v.x }
	abs := func(x int) int { return max(x, -x) }
	o, l, r := vector{}, vector{1, 1}, vector{1, 0}
	if p > q {
		l, r = vector{0, 1}, vector{1, 1}
	}
	c.start(l.minus(r).class(), l.minus(o).class(), r.minus(o).class())
	for {
		letter := contfrac.L
		if abs(height(r)) < abs(height(l)) {
			letter = contfrac.R
		}
		c.own(letter, l.minus(r).class())
		n := vector{l.x + r.x - o.x, l.y + r.y - o.y}
		switch h := height(n); {
		case h == 0:
			c.end(n.minus(l).class(), n.minus(r).class())
			return
		case h > 0:
			c.turn(contfrac.R, n.minus(l).class(), n.minus(r).class(), l.minus(r).class())
			o, l = l, n
		default:
			c.turn(contfrac.L, n.minus(r).class(), n.minus(l).class(), l.minus(r).class())
			o, r = r, n
		}
	}
}

// arcGraph glues the graph of an arc with weights by class.
func arcGraph(p, q int, weights [3]int) snake.Graph {
	var b *snake.Builder
	var g snake.Graph
	corridor{
		start: func(edge, left, right snake.Label) { b = snake.NewBuilder(edge, left, right) },
		own: func(own contfrac.Letter, edge snake.Label) {
			for range weights[edge-1] {
				b.GlueOwn(own)
			}
		},
		turn: func(turn contfrac.Letter, third, edge, _ snake.Label) { b.Glue(turn, third, edge) },
		end:  func(left, right snake.Label) { g = b.Graph(left, right) },
	}.walk(p, q)
	return g
}

// arcLength carries the lengths from the start point to the two ends of the
// crossed edge along (mathematics: lengths in a triangle by Ptolemy's relation).
func arcLength(p, q int, weights [3]int, x [3]*big.Rat) *big.Rat {
	length := func(l snake.Label) *big.Rat { return x[l-1] }
	mul := func(a, b *big.Rat) *big.Rat { return new(big.Rat).Mul(a, b) }
	var a, b, result *big.Rat
	var crossed snake.Label
	corridor{
		start: func(edge, left, right snake.Label) {
			a, b, crossed = length(left), length(right), edge
		},
		own: func(own contfrac.Letter, edge snake.Label) {
			k := big.NewRat(int64(weights[edge-1]), 1)
			if own == contfrac.L {
				b = new(big.Rat).Add(b, mul(k, a))
			} else {
				a = new(big.Rat).Add(a, mul(k, b))
			}
		},
		turn: func(turn contfrac.Letter, third, edge, old snake.Label) {
			if turn == contfrac.L { // the left end stays
				b = new(big.Rat).Add(mul(b, length(edge)), mul(a, length(third)))
				b.Quo(b, length(old))
			} else {
				a = new(big.Rat).Add(mul(a, length(edge)), mul(b, length(third)))
				a.Quo(a, length(old))
			}
			crossed = edge
		},
		end: func(left, right snake.Label) {
			result = new(big.Rat).Add(mul(a, length(right)), mul(b, length(left)))
			result.Quo(result, length(crossed))
		},
	}.walk(p, q)
	return result
}

// rationals is the field of rational numbers, a caller's own semiring.
type rationals struct{}

func (rationals) Zero() *big.Rat             { return new(big.Rat) }
func (rationals) One() *big.Rat              { return big.NewRat(1, 1) }
func (rationals) Add(a, b *big.Rat) *big.Rat { return new(big.Rat).Add(a, b) }
func (rationals) Mul(a, b *big.Rat) *big.Rat { return new(big.Rat).Mul(a, b) }

func gcd(a, b int) int {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}

// slopes draws p, q ≥ 1 coprime and not both 1.
func slopes(most int) *rapid.Generator[[2]int] {
	return rapid.Custom(func(t *rapid.T) [2]int {
		return [2]int{rapid.IntRange(1, most).Draw(t, "p"), rapid.IntRange(1, most).Draw(t, "q")}
	}).Filter(func(s [2]int) bool { return gcd(s[0], s[1]) == 1 && s != [2]int{1, 1} })
}

// The Laurent expansion of an arc is the sum over the matchings of the products
// of edge labels over the product of all diagonals. "Cluster expansion formulas
// and perfect matchings", J. Algebraic Combin. 32 (2010).
func TestLabelsGiveTheLaurentExpansion(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes(15).Draw(t, "slope")
		var weights [3]int
		var x [3]*big.Rat
		for i := range 3 {
			weights[i] = rapid.IntRange(0, 3).Draw(t, "weight")
			x[i] = big.NewRat(rapid.Int64Range(1, 9).Draw(t, "numerator"), rapid.Int64Range(1, 9).Draw(t, "denominator"))
		}
		g := arcGraph(s[0], s[1], weights)
		sum, err := snake.Weigh(rationals{}, g, snake.Weights[*big.Rat]{Edge: func(e snake.Side) *big.Rat { return x[e.Label-1] }})
		require.NoError(t, err)
		for tile := range g.AllTiles() {
			sum.Quo(sum, x[tile.Diagonal-1])
		}
		require.Equal(t, arcLength(s[0], s[1], weights, x).RatString(), sum.RatString())
	})
}

// Numbers at slopes. Source: the project's table of values computed from plain
// definitions by an independent slow model.
func TestCountsAreTheNumbersAtSlopes(t *testing.T) {
	slopes := [][2]int{{1, 2}, {1, 3}, {2, 3}, {3, 7}, {3, 8}, {5, 7}, {5, 2}}
	for weights, numbers := range map[[3]int][]int64{
		{0, 0, 0}: {2, 5, 5, 169, 433, 194, 29},
		{1, 1, 1}: {3, 13, 13, 3673, 16693, 4683, 217},
		{2, 2, 2}: {4, 25, 25, 28561, 187489, 37636, 841},
		{2, 0, 1}: {2, 7, 9, 961, 3305, 2131, 457},
	} {
		for i, s := range slopes {
			require.Equal(t, numbers[i], arcGraph(s[0], s[1], weights).Count().Int64(), "%v at %v", weights, s)
		}
	}
}

// The two tiles of a crossing of weight 1 form a hexagon; of other weights none
// does.
func TestHexagonsAreTheCrossingsOfWeightOne(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes(12).Draw(t, "slope")
		weights := [3]int{rapid.IntRange(0, 2).Draw(t, "k0"), rapid.IntRange(0, 2).Draw(t, "k∞"), rapid.IntRange(0, 2).Draw(t, "k1")}
		g := arcGraph(s[0], s[1], weights)
		plain := arcGraph(s[0], s[1], [3]int{})
		want := map[snake.Label]int{}
		for tile := range plain.AllTiles() {
			if weights[tile.Diagonal-1] == 1 {
				want[tile.Diagonal]++
			}
		}
		found := map[snake.Label]int{}
		for h := range g.Hexagons() {
			require.Equal(t, h.Label, h.Chord.Label)
			found[h.Label]++
		}
		require.Equal(t, want, found)
		// Without the chords the number changes, by exactly the matchings that
		// use one; so they stay.
		set, err := g.Set()
		require.NoError(t, err)
		for h := range g.Hexagons() {
			set, err = set.WithEdge(h.Chord, false)
			require.NoError(t, err)
		}
		require.Equal(t, len(want) > 0, set.Count().Cmp(g.Count()) < 0)
	})
}
