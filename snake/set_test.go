package snake_test

import (
	"iter"
	"math"
	"math/big"
	"math/rand/v2"
	"slices"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// sets draws the set of a graph or a band, with up to three restrictions, and
// a predicate that says the same of one matching.
func sets(most int) *rapid.Generator[restricted] {
	return rapid.Custom(func(t *rapid.T) restricted {
		word := words(most).Draw(t, "word")
		var set snake.Set
		var edges []snake.Side
		var err error
		switch kind := rapid.IntRange(0, 4).Draw(t, "kind"); {
		case kind < 3:
			g := snake.FromWord(mustWord(word))
			set, err = g.Set()
			edges = slices.Collect(g.Edges())
		default:
			var b snake.Band
			b, err = snake.BandFromWord(mustWord(word + "RL"))
			require.NoError(t, err)
			set, err = b.Set()
			edges = slices.Collect(b.Edges())
		}
		require.NoError(t, err)
		r := restricted{whole: set, set: set, edges: slices.Values(edges), ok: func(snake.Matching) bool { return true }}
		for range rapid.IntRange(0, 3).Draw(t, "restrictions") {
			before, want := r.ok, rapid.Bool().Draw(t, "want")
			if rapid.Bool().Draw(t, "by tile") {
				i := rapid.IntRange(1, set.Tiles()).Draw(t, "tile")
				r.set, err = r.set.WithTile(i, want)
				r.ok = func(m snake.Matching) bool { return before(m) && m.Flipped(i) == want }
			} else {
				e := rapid.SampledFrom(edges).Draw(t, "edge")
				r.set, err = r.set.WithEdge(e, want)
				r.ok = func(m snake.Matching) bool {
					used, err := set.EdgesOf(m)
					return err == nil && before(m) && slices.Contains(used, e) == want
				}
			}
			require.NoError(t, err)
		}
		return r
	})
}

type restricted struct {
	whole, set snake.Set
	edges      iter.Seq[snake.Side]
	ok         func(snake.Matching) bool
}

func filtered(r restricted) []snake.Matching {
	var list []snake.Matching
	for m := range r.whole.All() {
		if r.ok(m) {
			list = append(list, m)
		}
	}
	return list
}

// Restriction is filtering: of the list, of the count, of membership, and of
// the first and the last.
func TestRestrictionIsFiltering(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := sets(10).Draw(t, "set")
		want := filtered(r)
		require.Equal(t, want, slices.Collect(r.set.All()))
		require.Equal(t, int64(len(want)), r.set.Count().Int64())
		for m := range r.whole.All() {
			require.Equal(t, r.ok(m), r.set.Contains(m))
		}
		least, err := r.set.Minimal()
		greatest, err2 := r.set.Maximal()
		if len(want) == 0 {
			require.ErrorIs(t, err, snake.ErrIndex)
			require.ErrorIs(t, err2, snake.ErrIndex)
			return
		}
		require.Equal(t, want[0], least)
		require.Equal(t, want[len(want)-1], greatest)
		for _, m := range want {
			require.True(t, least.Below(m) && m.Below(greatest))
		}
	})
}

// Rank numbers the list, and unrank goes back.
func TestRankIsThePositionInTheList(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := sets(9).Draw(t, "set")
		k := int64(0)
		for m := range r.set.All() {
			rank, err := r.set.Rank(m)
			require.NoError(t, err)
			require.Equal(t, k, rank.Int64())
			back, err := r.set.Unrank(rank)
			require.NoError(t, err)
			require.Equal(t, m, back)
			k++
		}
		for _, bad := range []int64{-1, k} {
			_, err := r.set.Unrank(big.NewInt(bad))
			require.ErrorIs(t, err, snake.ErrIndex)
		}
		for m := range r.whole.All() {
			if !r.ok(m) {
				_, err := r.set.Rank(m)
				require.ErrorIs(t, err, snake.ErrNotMatching)
			}
		}
	})
}

// The same on chains far too long to list.
func TestUnrankOfRankOnLongChains(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := sets(300).Draw(t, "set")
		count := r.set.Count()
		if count.Sign() == 0 {
			_, err := r.set.Sample(rand.NewPCG(1, 2))
			require.ErrorIs(t, err, snake.ErrIndex)
			return
		}
		m, err := r.set.Sample(rand.NewPCG(rapid.Uint64().Draw(t, "seed"), 7))
		require.NoError(t, err)
		require.True(t, r.set.Contains(m))
		require.True(t, r.ok(m))
		rank, err := r.set.Rank(m)
		require.NoError(t, err)
		require.True(t, rank.Sign() >= 0 && rank.Cmp(count) < 0)
		back, err := r.set.Unrank(rank)
		require.NoError(t, err)
		require.Equal(t, m, back)
		last, err := r.set.Unrank(count.Sub(count, big.NewInt(1)))
		require.NoError(t, err)
		greatest, err := r.set.Maximal()
		require.NoError(t, err)
		require.Equal(t, greatest, last)
		require.LessOrEqual(t, m.Compare(last), 0)
	})
}

// A listing of a long chain starts at the least and goes up one rank a step.
func TestLongListingGoesUpByOne(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		r := sets(150).Draw(t, "set")
		k := int64(0)
		for m := range r.set.All() {
			rank, err := r.set.Rank(m)
			require.NoError(t, err)
			require.Equal(t, k, rank.Int64())
			if k++; k == 40 {
				break
			}
		}
		if k < 40 {
			require.Equal(t, k, r.set.Count().Int64())
		}
	})
}

// Chi-squared test with a fixed seed, on a snake and on a restricted band: the
// statistic of n equally likely matchings exceeds n − 1 + 4·√(2(n − 1)) with
// probability below 0.001 (common practice).
func TestSamplingIsUniform(t *testing.T) {
	whole, err := snake.FromWord(mustWord("RLLR")).Set()
	require.NoError(t, err)
	band, err := snake.BandFromWord(mustWord("RRLRLL"))
	require.NoError(t, err)
	part, err := band.Set()
	require.NoError(t, err)
	part, err = part.WithTile(2, true)
	require.NoError(t, err)
	for _, set := range []snake.Set{whole, part} {
		n := int(set.Count().Int64())
		require.Greater(t, n, 5)
		source := rand.New(rand.NewPCG(20, 26))
		const each = 2000
		hits := map[snake.Matching]int{}
		for range n * each {
			m, err := set.Sample(source)
			require.NoError(t, err)
			hits[m]++
		}
		require.Len(t, hits, n)
		chi := 0.0
		for _, h := range hits {
			d := float64(h - each)
			chi += d * d / each
		}
		assert.Less(t, chi, float64(n-1)+4*math.Sqrt(2*float64(n-1)))
	}
}

func TestSetOfTheSingleEdge(t *testing.T) {
	g := snake.EdgeWithLabel(5)
	set, err := g.Set()
	require.NoError(t, err)
	for _, s := range []snake.Set{set, {}} {
		assert.Equal(t, 0, s.Tiles())
		assert.Equal(t, big.NewInt(1), s.Count())
		rank, err := s.Rank(snake.Matching{})
		require.NoError(t, err)
		assert.Zero(t, rank.Sign())
		m, err := s.Unrank(nil)
		require.NoError(t, err)
		assert.Equal(t, snake.Matching{}, m)
		_, err = s.Unrank(big.NewInt(1))
		assert.ErrorIs(t, err, snake.ErrIndex)
		_, err = s.Sample(rand.NewPCG(1, 1))
		assert.NoError(t, err)
		_, err = s.Sample(nil)
		assert.ErrorIs(t, err, snake.ErrNoSource)
		_, err = s.Minimal()
		assert.NoError(t, err)
	}
	edges, err := set.EdgesOf(snake.Matching{})
	require.NoError(t, err)
	assert.Equal(t, []snake.Side{{Tile: 0, Face: snake.West, Label: 5}}, edges)
	used, err := set.WithEdge(snake.Side{}, true)
	require.NoError(t, err)
	assert.Equal(t, big.NewInt(1), used.Count())
	none, err := set.WithEdge(snake.Side{}, false)
	require.NoError(t, err)
	assert.Zero(t, none.Count().Sign())
	assert.Empty(t, slices.Collect(none.All()))
	_, err = none.Unrank(nil)
	assert.ErrorIs(t, err, snake.ErrIndex)
	_, err = none.Sample(rand.NewPCG(1, 1))
	assert.ErrorIs(t, err, snake.ErrIndex)
	_, err = none.Maximal()
	assert.ErrorIs(t, err, snake.ErrIndex)
	_, err = set.WithEdge(snake.Side{Tile: 1}, true)
	assert.ErrorIs(t, err, snake.ErrNoTile)
}

func TestRestrictionsRefuseWhatIsNotThere(t *testing.T) {
	set, err := snake.FromWord(mustWord("RL")).Set()
	require.NoError(t, err)
	for _, tile := range []int{-1, 0, 4} {
		_, err = set.WithTile(tile, true)
		assert.ErrorIs(t, err, snake.ErrNoTile)
		_, err = set.WithEdge(snake.Side{Tile: tile}, true)
		assert.ErrorIs(t, err, snake.ErrNoTile)
	}
	_, err = set.WithEdge(snake.Side{Tile: 1, Face: 4}, true)
	assert.ErrorIs(t, err, snake.ErrNoSide)
}

// Either name of a glue edge restricts alike.
func TestGlueEdgeHasTwoNames(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := snake.FromWord(mustWord(words(12).Draw(t, "word")))
		set, err := g.Set()
		require.NoError(t, err)
		for tile := range g.AllTiles() {
			if tile.Index == 1 {
				continue
			}
			in, out := snake.Side{Tile: tile.Index, Face: snake.West}, snake.Side{Tile: tile.Index - 1, Face: snake.East}
			if tile.In == snake.Up {
				in.Face, out.Face = snake.South, snake.North
			}
			a, err := set.WithEdge(in, true)
			require.NoError(t, err)
			b, err := set.WithEdge(out, true)
			require.NoError(t, err)
			require.Equal(t, a.Count(), b.Count())
			named, err := g.Side(in.Tile, in.Face)
			require.NoError(t, err)
			require.Equal(t, out, named)
		}
	})
}

func TestRankRefusesLongGraphs(t *testing.T) {
	set, err := snake.FromWord(mustWord("L" + "R20000")).Set()
	require.NoError(t, err)
	m, err := set.Minimal()
	require.NoError(t, err)
	_, err = set.Rank(m)
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = set.Unrank(nil)
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = set.Sample(rand.NewPCG(1, 1))
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = hugeGraph().Set()
	assert.ErrorIs(t, err, snake.ErrTooLong)
}

// One set may be used from many goroutines; the table behind ranks is made once.
func TestSetsAreSafeForConcurrentUse(t *testing.T) {
	set, err := snake.FromWord(mustWord(mixed(200))).Set()
	require.NoError(t, err)
	var group sync.WaitGroup
	for k := range 8 {
		group.Go(func() {
			m, err := set.Sample(rand.NewPCG(uint64(k), 1))
			if err != nil || !set.Contains(m) {
				t.Errorf("sample %v: %v", m, err)
			}
		})
	}
	group.Wait()
}
