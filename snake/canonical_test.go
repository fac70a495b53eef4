package snake_test

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// The canonical word is the first of the four words of the graph.
func TestCanonicalIsTheFirstOfFour(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(40).Draw(t, "word")
		first := word
		for w := range plainCanonical(word, false) {
			first = min(first, w)
		}
		got, ok := snake.FromWord(mustWord(word)).Canonical()
		require.True(t, ok)
		require.Equal(t, first, got.String())
		require.Equal(t, snake.FromWord(mustWord(word)).Count(), snake.FromWord(got).Count())
	})
}

// isomorphic searches for a bijection of vertices that keeps adjacency.
func isomorphic(a, b [][]int) bool {
	if len(a) != len(b) {
		return false
	}
	image := make([]int, len(a))
	taken := make([]bool, len(b))
	var place func(v int) bool
	place = func(v int) bool {
		if v == len(a) {
			return true
		}
		for w := range b {
			if taken[w] || len(a[v]) != len(b[w]) {
				continue
			}
			fits := true
			for u := range v {
				fits = fits && slices.Contains(a[v], u) == slices.Contains(b[w], image[u])
			}
			if !fits {
				continue
			}
			image[v], taken[w] = w, true
			if place(v + 1) {
				return true
			}
			taken[w] = false
		}
		return false
	}
	return place(0)
}

// Against a search for an isomorphism of plain graphs, all pairs of up to 6
// tiles.
func TestIsomorphicIsIsomorphismOfGraphs(t *testing.T) {
	graphs := []snake.Graph{snake.Edge()}
	for length := range 6 {
		for _, w := range plainWords(length) {
			graphs = append(graphs, snake.FromWord(mustWord(w)))
		}
	}
	lists := make([][][]int, len(graphs))
	for i, g := range graphs {
		l, err := g.Adjacency()
		require.NoError(t, err)
		lists[i] = l
	}
	for i, g := range graphs {
		for j, h := range graphs {
			require.Equal(t, isomorphic(lists[i], lists[j]), g.Isomorphic(h), "%v and %v", g, h)
		}
	}
}

// The adjacency lists are the edges of the plain graph.
func TestAdjacencyIsThePlainGraph(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(60).Draw(t, "word")
		g := snake.FromWord(mustWord(word))
		vertices, err := g.Vertices()
		require.NoError(t, err)
		lists, err := g.Adjacency()
		require.NoError(t, err)
		require.Len(t, vertices, 2*g.Tiles()+2)
		var edges []latticeEdge
		for i, l := range lists {
			require.True(t, slices.IsSorted(l))
			for _, j := range l {
				a, b := vertices[i], vertices[j]
				if a.X+a.Y < b.X+b.Y {
					edges = append(edges, latticeEdge{a, b})
				} else {
					require.Contains(t, lists[j], i)
				}
			}
		}
		require.Equal(t, sorted(plainEdges(plainTiles(word))), sorted(edges))
	})
}
