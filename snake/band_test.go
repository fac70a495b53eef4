package snake_test

import (
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

// goodMatchings applies the definition: matchings of the cut snake that use a
// copy of the cut edge, one copy removed, then the two copies identified, each
// result counted once.
func goodMatchings(word string) map[string]bool {
	n := len(word)
	tiles := plainTiles(word[:n-1])
	first, last := cutEdges(word)
	good := map[string]bool{}
	glued := func(edges []latticeEdge) string {
		edges = slices.Clone(edges)
		for i, e := range edges {
			if e == last {
				edges[i] = first
			}
		}
		return edgeKey(edges)
	}
	for _, m := range perfectMatchings(plainEdges(tiles)) {
		for _, copy := range []latticeEdge{first, last} {
			if k := slices.Index(m, copy); k >= 0 {
				good[glued(slices.Delete(slices.Clone(m), k, k+1))] = true
			}
		}
	}
	return good
}

// cutEdges are the two copies of the edge where the band is cut: going on with
// the word, tile n + 1 lies where the last letter says and is a copy of tile 1.
func cutEdges(word string) (first, last latticeEdge) {
	n := len(word)
	tiles := plainTiles(word)
	a, b := tiles[n-1], tiles[n]
	lastSides := sidesOf(a)
	last = lastSides[1]
	if b.Y > a.Y {
		last = lastSides[2]
	}
	// Seen from tile n + 1 that is its left or lower side; tile 1 lies as tile
	// n + 1 does if n is even, and reflected if n is odd.
	firstSides := sidesOf(tiles[0])
	first = firstSides[3]
	if (b.Y > a.Y) != (n%2 == 1) {
		first = firstSides[0]
	}
	return first, last
}

func TestBandMatchingsAreTheGoodMatchings(t *testing.T) {
	for length := 2; length <= 8; length++ {
		for _, word := range plainWords(length) {
			w := mustWord(word)
			b, err := snake.BandFromWord(w)
			if w.NumRuns() < 2 {
				require.ErrorIs(t, err, snake.ErrOneLetter, word)
				continue
			}
			require.NoError(t, err)
			want := goodMatchings(word)
			set, err := b.Set()
			require.NoError(t, err)
			tiles := slices.Collect(b.AllTiles())
			first, last := cutEdges(word)
			count := 0
			for m := range b.Matchings() {
				edges, err := set.EdgesOf(m)
				require.NoError(t, err)
				require.Len(t, edges, length)
				plain := make([]latticeEdge, len(edges))
				for i, e := range edges {
					from, to := tiles[e.Tile-1].Ends(e.Face)
					plain[i] = latticeEdge{from, to}
					if plain[i] == last {
						plain[i] = first
					}
				}
				require.True(t, want[edgeKey(plain)], "%s %v", word, m)
				count++
			}
			require.Len(t, want, count, word)
			require.Equal(t, int64(count), b.Count().Int64(), word)
			require.Equal(t, set.Count(), b.Count(), word)
			require.Equal(t, w, b.Word())
			require.Equal(t, length, b.Tiles())
		}
	}
}

// The band of slope 3/7 in the classical case: word and trace from the
// project's mathematics notes, section 5; 507 = 3·169, and 169 is a Markov
// number (OEIS A002559).
func TestBandOfASlopeCountsThreeTimesTheNumber(t *testing.T) {
	b, err := snake.BandFromWord(mustWord("RRLRLLRRLLRRLL"))
	require.NoError(t, err)
	assert.Equal(t, int64(3*169), b.Count().Int64())
}

func bandBuilt(word string) snake.Band {
	b := snake.NewBuilder(1, 2, 3)
	for _, c := range word[:len(word)-1] {
		b.Glue(map[rune]contfrac.Letter{'L': contfrac.L, 'R': contfrac.R}[c], 2, 1)
	}
	band, err := b.Band(map[byte]contfrac.Letter{'L': contfrac.L, 'R': contfrac.R}[word[len(word)-1]], 3)
	if err != nil {
		panic(err)
	}
	return band
}

// The number is the same wherever the band is cut, whichever way it is read,
// and by both routes; the canonical word does not change either.
func TestBandDoesNotDependOnTheCut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(40).Draw(t, "word") + "LR"
		k := rapid.IntRange(0, len(word)-1).Draw(t, "cut")
		b, err := snake.BandFromWord(mustWord(word))
		require.NoError(t, err)
		w := mustWord(word[k:] + word[:k])
		if rapid.Bool().Draw(t, "reverse") {
			w = w.Reverse()
		}
		if rapid.Bool().Draw(t, "swap") {
			w = w.Swap()
		}
		c, err := snake.BandFromWord(w)
		require.NoError(t, err)
		require.Equal(t, b.Count(), c.Count())
		require.Equal(t, b.Count(), bandBuilt(word).Count())
		require.Equal(t, b.Canonical(), c.Canonical())
		require.True(t, b.Isomorphic(c))
		again, err := snake.BandFromWord(b.Canonical())
		require.NoError(t, err)
		require.Equal(t, b.Canonical(), again.Canonical())
	})
}

// plainCanonical tries all rotations, reversals and exchanges of letters.
func plainCanonical(word string, cyclic bool) map[string]bool {
	swap := strings.NewReplacer("L", "R", "R", "L")
	all := map[string]bool{}
	for k := range max(1, len(word)) {
		if k > 0 && !cyclic {
			break
		}
		w := word[k:] + word[:k]
		r := []byte(w)
		slices.Reverse(r)
		for _, x := range []string{w, string(r)} {
			all[x], all[swap.Replace(x)] = true, true
		}
	}
	return all
}

func TestBandsAreIsomorphicUpToRotationReversalAndLetters(t *testing.T) {
	for _, u := range plainWords(6) {
		same := plainCanonical(u, true)
		b, err := snake.BandFromWord(mustWord(u))
		if err != nil {
			continue
		}
		require.True(t, same[b.Canonical().String()], u)
		for _, v := range plainWords(6) {
			if c, err := snake.BandFromWord(mustWord(v)); err == nil {
				require.Equal(t, same[v], b.Isomorphic(c), "%s %s", u, v)
			}
		}
	}
}

func TestBandLabels(t *testing.T) {
	// Tile by tile around: every glue and diagonal label is found again on the
	// right edges.
	b := snake.NewBuilder(1, 9, 9)
	b.Glue(contfrac.R, 11, 2).Glue(contfrac.L, 12, 3)
	band, err := b.Band(contfrac.L, 13)
	require.NoError(t, err)
	count := map[snake.Label]int{}
	for e := range band.Edges() {
		count[e.Label]++
	}
	// Every diagonal labels one free side on either tile beside its own.
	assert.Equal(t, map[snake.Label]int{1: 2, 2: 2, 3: 2, 11: 1, 12: 1, 13: 1}, count)
	_, err = snake.NewBuilder(1, 2, 3).Glue(contfrac.R, 1, 1).Band(contfrac.R, 1)
	assert.ErrorIs(t, err, snake.ErrOneLetter)
	assert.NotContains(t, count, snake.Label(9))
}

func TestZeroBand(t *testing.T) {
	var b snake.Band
	assert.Equal(t, 0, b.Tiles())
	assert.Equal(t, new(big.Int), b.Count())
	assert.Empty(t, slices.Collect(b.Matchings()))
	assert.Empty(t, slices.Collect(b.Edges()))
	assert.Empty(t, slices.Collect(b.AllTiles()))
	assert.True(t, b.Word().IsEmpty())
	assert.True(t, b.Canonical().IsEmpty())
	set, err := b.Set()
	require.NoError(t, err)
	assert.Equal(t, new(big.Int), set.Count())
	assert.False(t, set.Contains(snake.Matching{}))
	w, err := snake.Weigh(snake.Floats{}, b, snake.Weights[float64]{})
	require.NoError(t, err)
	assert.Zero(t, w)
	_, err = b.SVG(snake.Drawing{})
	assert.NoError(t, err)
	_, err = b.Text(snake.Drawing{})
	assert.NoError(t, err)
	assert.Equal(t, "band graph, empty", b.String())
	f, err := b.Fence()
	require.NoError(t, err)
	assert.Equal(t, 0, f.Size())
}

func TestHugeBand(t *testing.T) {
	b := hugeBand()
	assert.Equal(t, min(int64(1)<<40+int64(1)<<62, int64(math.MaxInt)), int64(b.Tiles()))
	// One run of a L's and one of b R's: trace ab + 2.
	want := new(big.Int).Lsh(big.NewInt(1), 102)
	assert.Equal(t, want.Add(want, big.NewInt(2)), b.Count())
	assert.Empty(t, slices.Collect(b.Matchings()))
	assert.Empty(t, slices.Collect(b.AllTiles()))
	assert.Empty(t, slices.Collect(b.Edges()))
	_, err := b.Set()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = b.Fence()
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = b.SVG(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = b.Text(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = b.TikZ(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooLong)
}
