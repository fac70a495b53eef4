package snake_test

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// weightsFor draws small integer weights for the edges and tiles of a graph.
func weightsFor(t *rapid.T, edges func(func(snake.Side) bool), tiles int) (map[snake.Side]int64, []int64) {
	edge := map[snake.Side]int64{}
	for e := range edges {
		edge[e] = rapid.Int64Range(0, 5).Draw(t, "edge")
	}
	tile := make([]int64, tiles+1)
	for i := range tile {
		tile[i] = rapid.Int64Range(0, 5).Draw(t, "tile")
	}
	return edge, tile
}

// weightOf is the weight of one matching, edge by edge.
func weightOf[T any](r snake.Semiring[T], set snake.Set, m snake.Matching, edge func(snake.Side) T, tile func(int) T) T {
	edges, err := set.EdgesOf(m)
	if err != nil {
		panic(err)
	}
	w := r.One()
	for _, e := range edges {
		w = r.Mul(w, edge(e))
	}
	for _, i := range m.FlippedTiles() {
		w = r.Mul(w, tile(i))
	}
	return w
}

// checkWeight compares a transfer over a semiring with the sum over the list.
func checkWeight[T any](t *rapid.T, r snake.Semiring[T], g snake.Matched, edge func(snake.Side) T, tile func(int) T, equal func(a, b T) bool) {
	set, err := g.Set()
	require.NoError(t, err)
	sum := r.Zero()
	for m := range set.All() {
		sum = r.Add(sum, weightOf(r, set, m, edge, tile))
	}
	w, err := snake.Weigh(r, g, snake.Weights[T]{Edge: edge, Tile: tile})
	require.NoError(t, err)
	require.True(t, equal(sum, w), "%v, by listing %v", w, sum)
}

func sameInt(a, b *big.Int) bool { return a.Cmp(b) == 0 }

// In every semiring, on snakes, bands and restricted sets, the weight is the
// sum over the list.
func TestWeightIsTheSumOverMatchings(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(9).Draw(t, "word")
		g := snake.FromWord(mustWord(word))
		if word == "" && rapid.Bool().Draw(t, "edge") {
			g = snake.EdgeWithLabel(3)
		}
		edges, tiles := weightsFor(t, g.Edges(), g.Tiles())
		checkAll(t, edges, tiles, g)

		b, err := snake.BandFromWord(mustWord("LR" + word))
		require.NoError(t, err)
		edges, tiles = weightsFor(t, b.Edges(), b.Tiles())
		checkAll(t, edges, tiles, b)

		r := sets(8).Draw(t, "set")
		edges, tiles = weightsFor(t, r.edges, r.set.Tiles())
		checkAll(t, edges, tiles, r.set)
	})
}

func checkAll(t *rapid.T, edges map[snake.Side]int64, tiles []int64, g snake.Matched) {
	integer := func(x int64) *big.Int { return big.NewInt(x) }
	checkWeight(t, snake.Integers{}, g,
		func(e snake.Side) *big.Int { return integer(edges[e]) }, func(i int) *big.Int { return integer(tiles[i]) }, sameInt)
	mod, err := snake.NewModular(big.NewInt(12))
	require.NoError(t, err)
	checkWeight(t, mod, g,
		func(e snake.Side) *big.Int { return integer(edges[e]) }, func(i int) *big.Int { return integer(tiles[i]) }, sameInt)
	checkWeight(t, snake.Floats{}, g,
		func(e snake.Side) float64 { return float64(edges[e]) }, func(i int) float64 { return float64(tiles[i]) },
		func(a, b float64) bool { return math.Abs(a-b) <= 1e-9*math.Abs(a) })
	checkWeight(t, snake.MaxPlus{}, g,
		func(e snake.Side) float64 { return float64(edges[e] - 2) }, func(i int) float64 { return float64(tiles[i] - 2) },
		func(a, b float64) bool { return a == b })
	checkWeight(t, snake.Booleans{}, g,
		func(e snake.Side) bool { return edges[e] > 1 }, func(i int) bool { return tiles[i] > 0 },
		func(a, b bool) bool { return a == b })
	checkWeight(t, snake.Polynomials{}, g,
		func(e snake.Side) snake.Polynomial { return snake.NewPolynomial(integer(edges[e]), integer(1)) },
		func(i int) snake.Polynomial { return snake.NewPolynomial(integer(tiles[i]-2), nil, integer(3)) },
		snake.Polynomial.Equal)
	checkWeight(t, snake.Laurents{}, g,
		func(e snake.Side) snake.Laurent { return monomial(t, edges[e], e.Tile, -1) },
		func(i int) snake.Laurent { return monomial(t, tiles[i]-2, -i) },
		snake.Laurent.Equal)
}

func monomial(t *rapid.T, c int64, e ...int) snake.Laurent {
	p, err := snake.NewLaurent(big.NewInt(c), e...)
	require.NoError(t, err)
	return p
}

// Without functions every weight is One, so the weight is the count.
func TestWeightOneIsTheCount(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(80).Draw(t, "word")
		g := snake.FromWord(mustWord(word))
		n, err := snake.Weigh(snake.Integers{}, g, snake.Weights[*big.Int]{})
		require.NoError(t, err)
		require.Equal(t, g.Count(), n)
		b, err := snake.BandFromWord(mustWord("RL" + word))
		require.NoError(t, err)
		n, err = snake.Weigh(snake.Integers{}, b, snake.Weights[*big.Int]{})
		require.NoError(t, err)
		require.Equal(t, b.Count(), n)
	})
}

func TestWeightOfTheSingleEdge(t *testing.T) {
	g := snake.EdgeWithLabel(3)
	w, err := snake.Weigh(snake.Floats{}, g, snake.Weights[float64]{})
	require.NoError(t, err)
	assert.Equal(t, 1.0, w)
	w, err = snake.Weigh(snake.Floats{}, g, snake.Weights[float64]{Edge: func(e snake.Side) float64 { return float64(e.Label) / 2 }})
	require.NoError(t, err)
	assert.Equal(t, 1.5, w)
}

func TestWeighRefusesLongGraphs(t *testing.T) {
	g, b := hugeGraph(), hugeBand()
	_, err := snake.Weigh(snake.Booleans{}, g, snake.Weights[bool]{})
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = snake.Weigh(snake.Booleans{}, b, snake.Weights[bool]{})
	assert.ErrorIs(t, err, snake.ErrTooLong)
}

// hugeGraph has more tiles than any shape; hugeBand likewise.
func hugeGraph() snake.Graph {
	var b contfrac.WordBuilder
	b.Append(contfrac.L, 1<<40)
	b.Append(contfrac.R, 1<<62)
	return snake.FromWord(b.Word())
}

func hugeBand() snake.Band {
	w, _ := hugeGraph().Word()
	b, err := snake.BandFromWord(w)
	if err != nil {
		panic(err)
	}
	return b
}

// The rank polynomial at 1 is the count, and its coefficients count heights.
func TestRankPolynomialCountsHeights(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(12).Draw(t, "word")
		g := snake.FromWord(mustWord(word))
		p, err := g.RankPolynomial()
		require.NoError(t, err)
		require.Equal(t, g.Count(), p.Eval(big.NewInt(1)))
		require.Equal(t, g.Tiles(), p.Degree())
		heights := make([]*big.Int, g.Tiles()+1)
		for i := range heights {
			heights[i] = new(big.Int)
		}
		for m := range g.Matchings() {
			heights[m.Height()].Add(heights[m.Height()], big.NewInt(1))
		}
		require.True(t, snake.NewPolynomial(heights...).Equal(p))

		set, err := g.Set()
		require.NoError(t, err)
		up, err := set.WithTile(1, true)
		require.NoError(t, err)
		down, err := set.WithTile(1, false)
		require.NoError(t, err)
		pUp, err := up.RankPolynomial()
		require.NoError(t, err)
		pDown, err := down.RankPolynomial()
		require.NoError(t, err)
		require.True(t, pUp.Add(pDown).Equal(p))

		b, err := snake.BandFromWord(mustWord(word + "LR"))
		require.NoError(t, err)
		p, err = b.RankPolynomial()
		require.NoError(t, err)
		require.Equal(t, b.Count(), p.Eval(big.NewInt(1)))
	})
	_, err := hugeGraph().RankPolynomial()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = hugeBand().RankPolynomial()
	assert.ErrorIs(t, err, snake.ErrTooLong)
}
