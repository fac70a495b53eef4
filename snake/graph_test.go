package snake_test

import (
	"fmt"
	"iter"
	"math"
	"math/big"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// Every word of up to 8 letters: tiles, edges and matchings against a search on
// plain vertices and edges.
func TestMatchingsAreThePerfectMatchings(t *testing.T) {
	for length := range 9 {
		for _, word := range plainWords(length) {
			g := snake.FromWord(mustWord(word))
			tiles := plainTiles(word)
			var at []snake.Point
			for tile := range g.AllTiles() {
				at = append(at, tile.At)
			}
			require.Equal(t, tiles, at, word)
			edges := plainEdges(tiles)
			require.Equal(t, sorted(edges), sorted(asLattice(g, slices.Collect(g.Edges()))), word)

			want := map[string]bool{}
			for _, m := range perfectMatchings(edges) {
				want[edgeKey(m)] = true
			}
			var last snake.Matching
			count := 0
			for m := range g.Matchings() {
				sides, err := g.EdgesOf(m)
				require.NoError(t, err, word)
				require.True(t, want[edgeKey(asLattice(g, sides))], "%s %v", word, m)
				if count > 0 {
					require.Equal(t, 1, m.Compare(last), "%s: %v after %v", word, m, last)
				}
				last = m
				count++
			}
			require.Len(t, want, count, word)
			require.Equal(t, int64(count), g.Count().Int64(), word)
			require.Equal(t, int64(count), built(word).Count().Int64(), word)
		}
	}
}

func edgeKey(edges []latticeEdge) string {
	var b []byte
	for _, e := range sorted(edges) {
		b = append(b, []byte(e.from.String()+e.to.String())...)
	}
	return string(b)
}

func TestSingleEdge(t *testing.T) {
	for _, g := range []snake.Graph{{}, snake.Edge()} {
		assert.Equal(t, 0, g.Tiles())
		assert.Equal(t, big.NewInt(1), g.Count())
		assert.Equal(t, []snake.Matching{{}}, slices.Collect(g.Matchings()))
		_, ok := g.Word()
		assert.False(t, ok)
	}
}

// A positive continued fraction gives Σa − 1 tiles and its numerator as the
// count. "Cluster algebras and continued fractions", Compositio Math. 154
// (2018).
func TestCountIsTheNumerator(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		terms := rapid.SliceOfN(rapid.Int64Range(1, 9), 1, 12).Draw(t, "terms")
		f, err := contfrac.FractionOf(terms...)
		require.NoError(t, err)
		g, err := snake.FromFraction(f)
		require.NoError(t, err)
		require.Equal(t, f.Numerator(), g.Count())
		sum := int64(-1)
		for _, a := range terms {
			sum += a
		}
		require.Equal(t, sum, int64(g.Tiles()))
	})
}

func TestFromFractionRefuses(t *testing.T) {
	_, err := snake.FromFraction(contfrac.Fraction{})
	assert.ErrorIs(t, err, snake.ErrNotPositive)
	for _, first := range []int64{0, -3} {
		f, err := contfrac.FractionOf(first, 2, 3)
		require.NoError(t, err)
		_, err = snake.FromFraction(f)
		assert.ErrorIs(t, err, snake.ErrNotPositive)
	}
	one, err := contfrac.FractionOf(1)
	require.NoError(t, err)
	g, err := snake.FromFraction(one)
	require.NoError(t, err)
	assert.True(t, g.Equal(snake.Edge()))
}

// Straight snakes have Fibonacci many matchings (OEIS A000045, F(n+2)), zigzag
// snakes of n tiles n + 1 (common practice).
func TestStraightIsFibonacciAndZigzagIsLinear(t *testing.T) {
	a, b := big.NewInt(1), big.NewInt(2)
	for n := 1; n <= 200; n++ {
		straight := strings.Repeat("LR", n)[:n-1]
		zigzag := strings.Repeat("R", n-1)
		for _, make := range []func(string) snake.Graph{built, func(w string) snake.Graph { return snake.FromWord(mustWord(w)) }} {
			require.Equal(t, b, make(straight).Count())
			require.Equal(t, big.NewInt(int64(n+1)), make(zigzag).Count())
		}
		a, b = b, new(big.Int).Add(a, b)
	}
}

// All words of up to 12 letters: both counting routes and the length of the
// list against a search on plain vertices and edges.
func TestCountIsTheNumberOfPerfectMatchings(t *testing.T) {
	for length := range 13 {
		for _, word := range plainWords(length) {
			g := snake.FromWord(mustWord(word))
			n := int64(0)
			for range g.Matchings() {
				n++
			}
			searched := plainCount(plainEdges(plainTiles(word)))
			if searched != n || g.Count().Int64() != n || built(word).Count().Int64() != n {
				t.Fatalf("%s: %d found, %d listed, %v by word, %v on edges", word, searched, n, g.Count(), built(word).Count())
			}
		}
	}
}

// The word comes back, from run form and from the shape.
func TestWordRoundTrips(t *testing.T) {
	for _, limit := range []int{0, 1 << 12, math.MaxInt} {
		restore := snake.SetLayoutNow(limit)
		rapid.Check(t, func(t *rapid.T) {
			word := words(100).Draw(t, "word")
			g := snake.FromWord(mustWord(word))
			w, ok := g.Word()
			require.True(t, ok)
			require.Equal(t, mustWord(word), w)
			w, ok = built(word).Word()
			require.True(t, ok)
			require.Equal(t, mustWord(word), w)
			require.True(t, g.Equal(built(word)))
			require.Equal(t, g.Count(), built(word).Count())
			require.Equal(t, len(word)+1, g.Tiles())
			require.Len(t, slices.Collect(g.AllTiles()), g.Tiles())
			b, err := snake.BandFromWord(mustWord(word + "LR"))
			require.NoError(t, err)
			require.Len(t, slices.Collect(b.AllTiles()), b.Tiles())
		})
		restore()
	}
}

func TestHugeGraph(t *testing.T) {
	g := hugeGraph()
	assert.Equal(t, min(int64(1)<<40+int64(1)<<62+1, int64(math.MaxInt)), int64(g.Tiles()))
	// Runs a, b between two free letters: [a+1; b+1], numerator (a+1)(b+1) + 1.
	want := new(big.Int).Mul(big.NewInt(1<<40+1), big.NewInt(1<<62+1))
	assert.Equal(t, want.Add(want, big.NewInt(1)), g.Count())
	assert.Empty(t, slices.Collect(g.Matchings()))
	assert.Empty(t, slices.Collect(g.AllTiles()))
	assert.Empty(t, slices.Collect(g.Edges()))
	assert.Empty(t, slices.Collect(g.Hexagons()))
	_, err := g.Side(1, snake.South)
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = g.Vertices()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = g.Adjacency()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = g.AdjacencyText()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	assert.True(t, g.Equal(g))
	w, ok := g.Canonical()
	require.True(t, ok)
	assert.Equal(t, 2, w.NumRuns())
	_, err = snake.Overlaps(g, snake.FromWord(mustWord("R")))
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = snake.Resolve(snake.FromWord(mustWord("R")), g, snake.Overlap{First: 1, Second: 1, Tiles: 1})
	assert.ErrorIs(t, err, snake.ErrTooLong)

	// Longer than any int: still counted.
	var b contfrac.WordBuilder
	b.AppendBig(contfrac.L, new(big.Int).Lsh(big.NewInt(1), 200))
	g = snake.FromWord(b.Word())
	assert.Equal(t, math.MaxInt, g.Tiles())
	assert.Equal(t, 201, g.Count().BitLen())
	_, err = g.Set()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	b.Append(contfrac.R, 1)
	band, err := snake.BandFromWord(b.Word())
	require.NoError(t, err)
	assert.Equal(t, math.MaxInt, band.Tiles())
}

func TestGraphsAreEqualByShapeAndLabels(t *testing.T) {
	label := func(x snake.Label) snake.Graph {
		return snake.NewBuilder(1, 2, 3).Glue(contfrac.R, x, 1).Graph(2, 3)
	}
	assert.True(t, label(3).Equal(label(3)))
	assert.False(t, label(3).Equal(label(4)))
	assert.False(t, label(3).Equal(built("R")))
	assert.False(t, built("R").Equal(label(3)))
	assert.False(t, snake.Edge().Equal(built("")))
	assert.False(t, snake.Edge().Equal(snake.EdgeWithLabel(1)))
	assert.False(t, built("R").Equal(built("L")))
	assert.True(t, built("R").Isomorphic(label(3)))
	own := snake.NewBuilder(1, 2, 3).GlueOwn(contfrac.R).Graph(2, 3)
	assert.False(t, own.Equal(label(1)))
	assert.Equal(t, "tiles 1 and 2", slices.Collect(own.Hexagons())[0].String())
}

// A builder may go on after a graph was taken, and does not change it.
func TestBuilderGraphsAreIndependent(t *testing.T) {
	var b snake.Builder
	assert.Equal(t, 1, b.Tiles())
	one := b.Graph(0, 0)
	assert.True(t, one.Equal(built("")))
	two := b.GlueOwn(contfrac.R).Graph(0, 0)
	three := b.Glue(contfrac.L, 0, 0).Graph(0, 0)
	assert.Equal(t, 3, b.Tiles())
	assert.Equal(t, []int{1, 2, 3}, []int{one.Tiles(), two.Tiles(), three.Tiles()})
	w, _ := two.Word()
	assert.Equal(t, "R", w.String())
	band, err := b.Band(contfrac.L, 1)
	require.NoError(t, err)
	assert.Equal(t, 3, band.Tiles())
	assert.Len(t, slices.Collect(band.Hexagons()), 1)
	assert.Equal(t, 3, three.Tiles())
}

func TestSideRefuses(t *testing.T) {
	g := built("RL")
	for _, tile := range []int{-1, 0, 4} {
		_, err := g.Side(tile, snake.South)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err := g.Side(1, 4)
	assert.ErrorIs(t, err, snake.ErrNoSide)
	e, err := snake.EdgeWithLabel(7).Side(0, snake.North)
	require.NoError(t, err)
	assert.Equal(t, snake.Side{Face: snake.West, Label: 7}, e)
	_, err = snake.Edge().Side(1, snake.South)
	assert.ErrorIs(t, err, snake.ErrNoTile)
}

func TestGraphText(t *testing.T) {
	for want, x := range map[string]fmt.Stringer{
		"snake graph, single edge":  snake.Edge(),
		"snake graph, 1 tile":       built(""),
		"snake graph, 4 tiles: RLL": built("RLL"),
		"band graph, 3 tiles: RLL":  bandBuilt("RLL"),
		"3 north":                   snake.Side{Tile: 3, Face: snake.North},
		"(1, -2)":                   snake.Point{X: 1, Y: -2},
		"right":                     snake.Right,
		"up":                        snake.Up,
		"south":                     snake.South,
	} {
		assert.Equal(t, want, x.String())
		assert.Equal(t, want, fmt.Sprint(x))
		assert.Equal(t, fmt.Sprintf("%q", want), fmt.Sprintf("%q", x))
	}
	assert.Equal(t, "snake graph, 4 tiles: RLL", fmt.Sprintf("%s", built("RLL")))
	long := snake.FromWord(mustWord(strings.Repeat("LRR", 1000)))
	assert.Greater(t, len(long.String()), 3000)
	assert.Less(t, len(fmt.Sprintf("%v", long)), 200)
	band, err := snake.BandFromWord(mustWord(strings.Repeat("LRR", 1000)))
	require.NoError(t, err)
	assert.Greater(t, len(band.String()), 3000)
	assert.Less(t, len(fmt.Sprintf("%v", band)), 200)
}

// Listings can be left at any point, and run again.
func TestIteratorsStopAndRestart(t *testing.T) {
	g := snake.NewBuilder(1, 1, 1).GlueOwn(contfrac.R).Glue(contfrac.R, 1, 1).GlueOwn(contfrac.L).Graph(1, 1)
	set, err := g.Set()
	require.NoError(t, err)
	long, err := snake.FromWord(mustWord("L80 R80")).Set()
	require.NoError(t, err)
	f, err := g.Fence()
	require.NoError(t, err)
	overlaps, err := snake.Overlaps(built("RLR"), built("LLRR"))
	require.NoError(t, err)
	stops(t, g.Matchings())
	stops(t, set.All())
	stops(t, long.All())
	stops(t, g.AllTiles())
	stops(t, g.Edges())
	stops(t, g.Hexagons())
	stops(t, overlaps)
	stops(t, func(yield func([2]int) bool) {
		for a, b := range f.Relations() {
			if !yield([2]int{a, b}) {
				return
			}
		}
	})
	p, err := snake.NewLaurent(big.NewInt(1), 1)
	require.NoError(t, err)
	p = p.Add(snake.Laurents{}.One())
	stops(t, func(yield func(string) bool) {
		for e, c := range p.Terms() {
			if !yield(fmt.Sprint(e, c)) {
				return
			}
		}
	})
}

func stops[T any](t *testing.T, seq iter.Seq[T]) {
	t.Helper()
	all := slices.Collect(seq)
	require.Greater(t, len(all), 1)
	for k := range min(len(all), 5) {
		var some []T
		for x := range seq {
			if some = append(some, x); len(some) == k+1 {
				break
			}
		}
		require.Equal(t, all[:k+1], some)
	}
}
