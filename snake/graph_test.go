package snake_test

import (
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"example.com/onecusp/snake"
)

// Every word of up to 8 letters: tiles, edges and matchings against a search on plain vertices and edges.
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
