package snake_test

import (
	"encoding/json"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// digits draws 0/1 strings around the lengths at which the storage changes.
func digits() *rapid.Generator[string] {
	return rapid.Custom(func(t *rapid.T) string {
		n := rapid.OneOf(rapid.IntRange(0, 8), rapid.IntRange(60, 75), rapid.IntRange(120, 140)).Draw(t, "length")
		return rapid.StringOfN(rapid.SampledFrom([]rune("01")), n, n, -1).Draw(t, "digits")
	})
}

func TestMatchingTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := digits().Draw(t, "text")
		m, err := snake.ParseMatching(s)
		require.NoError(t, err)
		require.Equal(t, s, m.String())
		require.Equal(t, len(s), m.Tiles())
		require.Equal(t, strings.Count(s, "1"), m.Height())
		require.Len(t, m.FlippedTiles(), m.Height())
		for i := -1; i <= len(s)+2; i++ {
			require.Equal(t, i >= 1 && i <= len(s) && s[i-1] == '1', m.Flipped(i))
		}
		text, err := json.Marshal(m)
		require.NoError(t, err)
		require.Equal(t, `"`+s+`"`, string(text))
		var back snake.Matching
		require.NoError(t, json.Unmarshal(text, &back))
		require.Equal(t, m, back)
		require.True(t, m == back)
	})
}

func TestMatchingsCompareAsStrings(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := digits().Draw(t, "a"), digits().Draw(t, "b")
		switch rapid.IntRange(0, 3).Draw(t, "kin") {
		case 0:
			b = a + b
		case 1:
			b = a
		case 2:
			b = a + strings.Repeat("0", rapid.IntRange(0, 5).Draw(t, "zeros"))
		}
		m, err := snake.ParseMatching(a)
		require.NoError(t, err)
		n, err := snake.ParseMatching(b)
		require.NoError(t, err)
		require.Equal(t, strings.Compare(a, b), m.Compare(n), "%s\n%s", a, b)
		require.Equal(t, a == b, m == n)
	})
}

// The places where the storage ends: inside the word, at its end, in the bytes behind.
func TestShorterMatchingsComeFirst(t *testing.T) {
	for _, n := range []int{0, 1, 63, 64, 65, 72, 73, 200} {
		short, err := snake.ParseMatching(strings.Repeat("0", n))
		require.NoError(t, err)
		long, err := snake.ParseMatching(strings.Repeat("0", n+1))
		require.NoError(t, err)
		assert.Equal(t, -1, short.Compare(long))
		assert.Equal(t, 1, long.Compare(short))
		assert.Equal(t, 0, long.Compare(long))
	}
}

func TestParseMatchingRefuses(t *testing.T) {
	for _, s := range []string{"2", "01x", " 01", "0é1", strings.Repeat("0", 200) + "-"} {
		_, err := snake.ParseMatching(s)
		assert.ErrorIs(t, err, snake.ErrNotMatching)
		assert.Less(t, len(err.Error()), 200)
		var m snake.Matching
		assert.ErrorIs(t, m.UnmarshalText([]byte(s)), snake.ErrNotMatching)
	}
	long := strings.Repeat("0", snake.MaxTiles+1)
	_, err := snake.ParseMatching(long)
	assert.ErrorIs(t, err, snake.ErrTooLong)
	var m snake.Matching
	assert.ErrorIs(t, m.UnmarshalText([]byte(long)), snake.ErrTooLong)
}

func FuzzParseMatching(f *testing.F) {
	for _, s := range []string{"", "0", "01", "2", strings.Repeat("01", 70)} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		m, err := snake.ParseMatching(s)
		if err != nil {
			return
		}
		require.Equal(t, s, m.String())
	})
}

func TestListingAllocatesNothingPerMatching(t *testing.T) {
	small := snake.FromWord(mustWord("RL"))
	large := snake.FromWord(mustWord("RLLRLRRLRLLRLRRLRL"))
	list := func(g snake.Graph) float64 {
		return testing.AllocsPerRun(10, func() {
			for m := range g.Matchings() {
				sink = m
			}
		})
	}
	require.Greater(t, large.Count().Int64(), int64(200))
	assert.Equal(t, list(small), list(large))
}
