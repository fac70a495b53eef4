package snake_test

import (
	"math"
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
