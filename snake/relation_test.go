package snake_test

import (
	"math"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/snake"
)

// holds checks that the two sides of a relation agree.
func holds(t require.TestingT, r snake.Relation) {
	left, right := r.Sides()
	require.Equal(t, left.String(), right.String(), "%v", r)
}

func TestGraftingIsAnIdentity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g, h := snake.FromWord(mustWord(words(60).Draw(t, "g"))), snake.FromWord(mustWord(words(60).Draw(t, "h")))
		turn := rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "turn")
		r, err := snake.Graft(g, h, turn)
		require.NoError(t, err)
		require.Equal(t, g.Tiles()+h.Tiles(), r.First[0].Tiles())
		require.Equal(t, [2]snake.Graph{g, h}, r.Product)
		holds(t, r)
	})
}

func TestResolvingIsAnIdentity(t *testing.T) {
	resolved := 0
	rapid.Check(t, func(t *rapid.T) {
		g, h := snake.FromWord(mustWord(words(24).Draw(t, "g"))), snake.FromWord(mustWord(words(24).Draw(t, "h")))
		overlaps, err := snake.Overlaps(g, h)
		require.NoError(t, err)
		for o := range overlaps {
			r, err := snake.Resolve(g, h, o)
			require.NoError(t, err)
			require.Equal(t, g.Tiles()+h.Tiles(), r.First[0].Tiles()+r.First[1].Tiles())
			holds(t, r)
			resolved++
		}
	})
	assert.Positive(t, resolved)
}

// All pairs of short words, all pieces: exactly the ones that Overlaps yields
// are resolved.
func TestResolveAcceptsExactlyTheOverlaps(t *testing.T) {
	for _, u := range plainWords(3) {
		for _, v := range append(plainWords(2), plainWords(4)...) {
			g, h := snake.FromWord(mustWord(u)), snake.FromWord(mustWord(v))
			overlaps, err := snake.Overlaps(g, h)
			require.NoError(t, err)
			found := map[snake.Overlap]bool{}
			for o := range overlaps {
				found[o] = true
			}
			for i := 0; i <= 5; i++ {
				for j := 0; j <= 6; j++ {
					for k := 0; k <= 6; k++ {
						o := snake.Overlap{First: i, Second: j, Tiles: k}
						r, err := snake.Resolve(g, h, o)
						require.Equal(t, found[o], err == nil, "%s %s %v: %v", u, v, o, err)
						if err == nil {
							holds(t, r)
						}
					}
				}
			}
		}
	}
}

func TestRelationsRefuse(t *testing.T) {
	g, h := snake.FromWord(mustWord("RLR")), snake.FromWord(mustWord("LLRR"))
	for _, pair := range [][2]snake.Graph{{g, snake.Edge()}, {snake.Edge(), g}} {
		_, err := snake.Graft(pair[0], pair[1], contfrac.L)
		assert.ErrorIs(t, err, snake.ErrNoTile)
		_, err = snake.Resolve(pair[0], pair[1], snake.Overlap{First: 1, Second: 1, Tiles: 1})
		assert.ErrorIs(t, err, snake.ErrNoTile)
		overlaps, err := snake.Overlaps(pair[0], pair[1])
		require.NoError(t, err)
		for o := range overlaps {
			t.Errorf("%v on a single edge", o)
		}
	}
	for _, o := range []snake.Overlap{{}, {First: -1, Second: 1, Tiles: 1}, {First: 1, Second: 1, Tiles: 9}, {First: math.MaxInt, Second: 1, Tiles: 2}, {First: 4, Second: 1, Tiles: 2}} {
		_, err := snake.Resolve(g, h, o)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err := snake.Resolve(g, h, snake.Overlap{First: 1, Second: 1, Tiles: 2})
	assert.ErrorIs(t, err, snake.ErrNotCrossing)
}

// Splitting is an identity, and its two parts are the matchings with the tile
// flipped and not flipped.
func TestSplittingIsAnIdentity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := snake.FromWord(mustWord(words(60).Draw(t, "word")))
		tile := rapid.IntRange(1, g.Tiles()).Draw(t, "tile")
		r, err := snake.Split(g, tile)
		require.NoError(t, err)
		holds(t, r)
		set, err := g.Set()
		require.NoError(t, err)
		for up, pair := range map[bool][2]snake.Graph{true: r.First, false: r.Second} {
			part, err := set.WithTile(tile, up)
			require.NoError(t, err)
			require.Equal(t, part.Count(), contfrac.Product(pair[0].Count(), pair[1].Count()))
		}
		// What is left on either side is a piece of the graph.
		w, _ := g.Word()
		for _, pair := range [][2]snake.Graph{r.First, r.Second} {
			if left, ok := pair[0].Word(); ok {
				require.True(t, strings.HasPrefix(w.String(), left.String()))
			}
			if right, ok := pair[1].Word(); ok {
				require.True(t, strings.HasSuffix(w.String(), right.String()))
			}
		}
	})
}

// At the tile between two runs the parts are the continuants of the identity
// K(a…b, c…d) = K(a…b)·K(c…d) + K(a…)·K(…d). (Common practice.)
func TestSplittingBetweenRunsIsTheContinuantIdentity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		runs := rapid.SliceOfN(rapid.Int64Range(2, 9), 2, 12).Draw(t, "runs")
		k := rapid.IntRange(1, len(runs)-1).Draw(t, "cut")
		terms := make([]*big.Int, len(runs))
		tile := 0
		for i, a := range runs {
			terms[i] = big.NewInt(a)
			if i < k {
				tile += int(a)
			}
		}
		f, err := contfrac.NewFraction(terms...)
		require.NoError(t, err)
		g, err := snake.FromFraction(f)
		require.NoError(t, err)
		r, err := snake.Split(g, tile)
		require.NoError(t, err)
		product := func(p [2]snake.Graph) string { return contfrac.Product(p[0].Count(), p[1].Count()).String() }
		whole := contfrac.Product(contfrac.Continuant(terms[:k]), contfrac.Continuant(terms[k:]))
		short := contfrac.Product(contfrac.Continuant(terms[:k-1]), contfrac.Continuant(terms[k+1:]))
		require.ElementsMatch(t, []string{whole.String(), short.String()}, []string{product(r.First), product(r.Second)})
	})
}

func TestSplitRefuses(t *testing.T) {
	for _, tile := range []int{-1, 0, 4} {
		_, err := snake.Split(built("RL"), tile)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err := snake.Split(snake.Edge(), 0)
	assert.ErrorIs(t, err, snake.ErrNoTile)
	r, err := snake.Split(hugeGraph(), 1<<30)
	require.NoError(t, err)
	holds(t, r)
}
