package snake_test

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// nonEmpty draws a set, without its restrictions if they leave nothing.
func nonEmpty(t *rapid.T, most int) restricted {
	r := sets(most).Draw(t, "set")
	if r.set.Count().Sign() == 0 {
		r.set, r.ok = r.whole, func(snake.Matching) bool { return true }
	}
	return r
}

// drawn draws n matchings of a set that is not empty.
func drawn(t *rapid.T, set snake.Set, n int) []snake.Matching {
	list := make([]snake.Matching, n)
	for i := range list {
		m, err := set.Sample(source{t})
		require.NoError(t, err)
		list[i] = m
	}
	return list
}

// source is a random source whose bits rapid draws and shrinks.
type source struct{ t *rapid.T }

func (s source) Uint64() uint64 { return rapid.Uint64().Draw(s.t, "bits") }

func meet(t *rapid.T, a, b snake.Matching) snake.Matching {
	m, err := a.Meet(b)
	require.NoError(t, err)
	return m
}

func join(t *rapid.T, a, b snake.Matching) snake.Matching {
	m, err := a.Join(b)
	require.NoError(t, err)
	return m
}

// The laws of a distributive lattice with rank: one helper for snakes, bands
// and restricted sets, short and long.
func TestMatchingsFormADistributiveLattice(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := nonEmpty(t, 90)
		m := drawn(t, r.set, 3)
		a, b, c := m[0], m[1], m[2]
		require.True(t, r.set.Contains(meet(t, a, b)))
		require.True(t, r.set.Contains(join(t, a, b)))
		require.Equal(t, meet(t, a, b), meet(t, b, a))
		require.Equal(t, join(t, a, b), join(t, b, a))
		require.Equal(t, meet(t, a, meet(t, b, c)), meet(t, meet(t, a, b), c))
		require.Equal(t, join(t, a, join(t, b, c)), join(t, join(t, a, b), c))
		require.Equal(t, a, meet(t, a, join(t, a, b)))
		require.Equal(t, a, join(t, a, meet(t, a, b)))
		require.Equal(t, meet(t, a, join(t, b, c)), join(t, meet(t, a, b), meet(t, a, c)))
		require.Equal(t, join(t, a, meet(t, b, c)), meet(t, join(t, a, b), join(t, a, c)))
		require.Equal(t, a.Height()+b.Height(), meet(t, a, b).Height()+join(t, a, b).Height())
		require.Equal(t, meet(t, a, b) == a, a.Below(b))
		require.Equal(t, join(t, a, b) == b, a.Below(b))
		if a.Below(b) && a != b {
			require.Equal(t, -1, a.Compare(b), "the listing extends the lattice order")
		}
	})
}

// A flip keeps to the set, changes two opposite sides of one tile, and is
// undone by itself.
func TestFlipTurnsTwoOppositeSides(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := nonEmpty(t, 80)
		m := drawn(t, r.set, 1)[0]
		flips, err := r.set.Flips(m)
		require.NoError(t, err)
		for i := 1; i <= r.set.Tiles(); i++ {
			n, err := r.set.Flip(m, i)
			if !slices.Contains(flips, i) {
				require.ErrorIs(t, err, snake.ErrNotMatching)
				continue
			}
			require.NoError(t, err)
			require.True(t, r.set.Contains(n))
			require.True(t, r.ok(n))
			require.Equal(t, m.Flipped(i), !n.Flipped(i))
			back, err := r.set.Flip(n, i)
			require.NoError(t, err)
			require.Equal(t, m, back)
			before, err := r.set.EdgesOf(m)
			require.NoError(t, err)
			after, err := r.set.EdgesOf(n)
			require.NoError(t, err)
			left := slices.DeleteFunc(slices.Clone(before), func(e snake.Side) bool { return slices.Contains(after, e) })
			come := slices.DeleteFunc(slices.Clone(after), func(e snake.Side) bool { return slices.Contains(before, e) })
			require.Len(t, left, 2)
			require.Len(t, come, 2)
		}
	})
}

// Flips connect everything; the flip graph is the Hasse diagram: arcs are the
// covers of the order.
func TestHasseDiagram(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := sets(6).Draw(t, "set")
		set := r.whole
		h, err := set.Hasse(int(set.Count().Int64()))
		require.NoError(t, err)
		nodes := h.Nodes()
		require.Equal(t, slices.Collect(set.All()), nodes)
		covers := map[[2]int]bool{}
		for a, m := range nodes {
			for b, n := range nodes {
				if m != n && m.Below(n) && !slices.ContainsFunc(nodes, func(x snake.Matching) bool {
					return x != m && x != n && m.Below(x) && x.Below(n)
				}) {
					covers[[2]int{a, b}] = true
				}
			}
		}
		reached := map[int]bool{0: true}
		for _, a := range h.Arcs() {
			require.True(t, covers[[2]int{a.Lower, a.Upper}])
			delete(covers, [2]int{a.Lower, a.Upper})
			require.True(t, !nodes[a.Lower].Flipped(a.Tile) && nodes[a.Upper].Flipped(a.Tile))
			require.True(t, reached[a.Lower]) // nodes come in an order that extends the lattice's
			reached[a.Upper] = true
		}
		require.Empty(t, covers)
		require.Len(t, reached, len(nodes))

		_, err = set.Hasse(len(nodes) - 1)
		require.ErrorIs(t, err, snake.ErrTooMany)
		var many *snake.TooManyError
		require.ErrorAs(t, err, &many)
		require.Equal(t, set.Count(), many.Count)
		require.Equal(t, len(nodes)-1, many.Limit)
	})
}

func TestHasseRefusesBeforeListing(t *testing.T) {
	set, err := snake.FromWord(mustWord("L50 R50 L50")).Set()
	require.NoError(t, err)
	for _, limit := range []int{-5, 0, 1000} {
		_, err = set.Hasse(limit)
		assert.ErrorIs(t, err, snake.ErrTooMany)
		assert.ErrorContains(t, err, set.Count().String())
	}
}

// The ideals of the fence are the matchings, both ways.
func TestOrderIdealsAreTheMatchings(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(7).Draw(t, "word")
		var set snake.Set
		var f snake.Fence
		closed := rapid.Bool().Draw(t, "closed")
		if closed {
			word += "LR"
			b, err := snake.BandFromWord(mustWord(word))
			require.NoError(t, err)
			f, err = b.Fence()
			require.NoError(t, err)
			set, err = b.Set()
			require.NoError(t, err)
		} else {
			var err error
			g := snake.FromWord(mustWord(word))
			f, err = g.Fence()
			require.NoError(t, err)
			set, err = g.Set()
			require.NoError(t, err)
		}
		n := f.Size()
		require.Equal(t, set.Tiles(), n)
		// The order is the transitive closure of the relations.
		below := make([][]bool, n+1)
		for i := range below {
			below[i] = make([]bool, n+1)
			below[i][i] = i > 0
		}
		relations := 0
		for a, b := range f.Relations() {
			below[a][b] = true
			relations++
			i, next := relations, relations%n+1
			if word[i-1] == 'R' {
				require.Equal(t, [2]int{i, next}, [2]int{a, b})
			} else {
				require.Equal(t, [2]int{next, i}, [2]int{a, b})
			}
		}
		require.Equal(t, len(word), relations)
		for k := 1; k <= n; k++ {
			for i := 1; i <= n; i++ {
				for j := 1; j <= n; j++ {
					below[i][j] = below[i][j] || below[i][k] && below[k][j]
				}
			}
		}
		for i := -1; i <= n+1; i++ {
			for j := -1; j <= n+1; j++ {
				want := i >= 1 && j >= 1 && i <= n && j <= n && below[i][j]
				require.Equal(t, want, f.Below(i, j), "%d %d", i, j)
			}
		}
		count := 0
		for bits := range 1 << n {
			var tiles []int
			for i := 1; i <= n; i++ {
				if bits>>(i-1)&1 == 1 {
					tiles = append(tiles, i)
				}
			}
			ideal := true
			for _, b := range tiles {
				for a := 1; a <= n; a++ {
					ideal = ideal && (!below[a][b] || slices.Contains(tiles, a))
				}
			}
			m, err := f.Matching(tiles...)
			if !ideal {
				require.ErrorIs(t, err, snake.ErrNotMatching)
				continue
			}
			require.NoError(t, err)
			require.True(t, set.Contains(m))
			require.ElementsMatch(t, tiles, m.FlippedTiles())
			count++
		}
		require.Equal(t, set.Count().Int64(), int64(count))
	})
}

func TestFenceRefuses(t *testing.T) {
	f, err := snake.FromWord(mustWord("RL")).Fence()
	require.NoError(t, err)
	for _, tile := range []int{-1, 0, 4} {
		_, err := f.Matching(1, tile)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err = hugeGraph().Fence()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	empty, err := snake.Edge().Fence()
	require.NoError(t, err)
	m, err := empty.Matching()
	require.NoError(t, err)
	assert.Equal(t, snake.Matching{}, m)
	for range empty.Relations() {
		t.Error("the empty fence has no relations")
	}
}

func TestLatticeRefusesOtherMatchings(t *testing.T) {
	m, err := snake.ParseMatching("010")
	require.NoError(t, err)
	o, err := snake.ParseMatching("01")
	require.NoError(t, err)
	_, err = m.Meet(o)
	assert.ErrorIs(t, err, snake.ErrNotMatching)
	_, err = m.Join(o)
	assert.ErrorIs(t, err, snake.ErrNotMatching)
	assert.False(t, m.Below(o))
	assert.False(t, o.Below(m))
	g := snake.FromWord(mustWord("RR")) // a chain: tile 2 may not be flipped before tile 1
	set, err := g.Set()
	require.NoError(t, err)
	for _, bad := range []snake.Matching{m, o} {
		assert.False(t, g.Contains(bad))
		_, err = g.EdgesOf(bad)
		assert.ErrorIs(t, err, snake.ErrNotMatching)
		_, err = set.Flips(bad)
		assert.ErrorIs(t, err, snake.ErrNotMatching)
		_, err = set.Flip(bad, 1)
		assert.ErrorIs(t, err, snake.ErrNotMatching)
	}
	least, err := g.Minimal()
	require.NoError(t, err)
	for _, tile := range []int{0, 4} {
		_, err = set.Flip(least, tile)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err = hugeGraph().Minimal()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = hugeGraph().Maximal()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = hugeGraph().EdgesOf(least)
	assert.ErrorIs(t, err, snake.ErrTooLong)
	assert.False(t, hugeGraph().Contains(least))
}

// Minimal and maximal matching lie on the boundary, and are the ends of the list.
func TestExtremeMatchingsLieOnTheBoundary(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := snake.FromWord(mustWord(words(100).Draw(t, "word")))
		least, err := g.Minimal()
		require.NoError(t, err)
		greatest, err := g.Maximal()
		require.NoError(t, err)
		require.Equal(t, 0, least.Height())
		require.Equal(t, g.Tiles(), greatest.Height())
		for _, m := range []snake.Matching{least, greatest} {
			edges, err := g.EdgesOf(m)
			require.NoError(t, err)
			require.Len(t, edges, g.Tiles()+1)
			for tile := range g.AllTiles() {
				glue := snake.Side{Tile: tile.Index, Face: snake.East}
				if tile.Out == snake.Up {
					glue.Face = snake.North
				}
				if tile.Index < g.Tiles() {
					require.NotContains(t, edges, glue)
				}
			}
			for _, e := range edges {
				require.Equal(t, (e.Tile%2 == 1) == (m == greatest), e.Face.Vertical())
			}
		}
	})
}
