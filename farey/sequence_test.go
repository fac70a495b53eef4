package farey_test

import (
	"iter"
	"math"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// texts lists at most most slopes as text.
func texts(seq iter.Seq[farey.Slope], most int) []string {
	list := []string{}
	for s := range seq {
		if len(list) == most {
			break
		}
		list = append(list, s.String())
	}
	return list
}

func sequence(t require.TestingT, n int64) iter.Seq[farey.Slope] {
	seq, err := farey.Sequence(n)
	require.NoError(t, err)
	return seq
}

func box(t require.TestingT, maxNum, maxDen int64) iter.Seq[farey.Slope] {
	seq, err := farey.Box(maxNum, maxDen)
	require.NoError(t, err)
	return seq
}

// slowBox sorts all quotients within the bounds.
func slowBox(minNum, maxNum, maxDen int64) []string {
	var list []farey.Slope
	for p := minNum; p <= maxNum; p++ {
		for q := range maxDen + 1 {
			if s, err := farey.FromInts(p, q); err == nil {
				list = append(list, s)
			}
		}
	}
	slices.SortFunc(list, farey.Slope.Cmp)
	list = slices.CompactFunc(list, farey.Slope.Equal)
	out := []string{}
	for _, s := range list {
		out = append(out, s.String())
	}
	return out
}

func TestSequenceLengths(t *testing.T) {
	// OEIS A005728 from n = 1.
	for i, want := range []int{2, 3, 5, 7, 11, 13, 19, 23, 29, 33, 43} {
		require.Len(t, texts(sequence(t, int64(i+1)), math.MaxInt), want)
	}
}

func TestSequenceIsTheBoxOfTheUnitInterval(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.Int64Range(1, 25).Draw(t, "n")
		want := slowBox(0, n, n)
		want = want[:slices.Index(want, "1/1")+1]
		seq := sequence(t, n)
		require.Equal(t, want, texts(seq, math.MaxInt))
		require.Equal(t, want[:2], texts(seq, 2), "again, and stopped")
	})
}

func TestConsecutiveSlopesAreNeighbours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		seq := rapid.OneOf(
			rapid.Map(rapid.Int64Range(1, 60), func(n int64) iter.Seq[farey.Slope] { return sequence(t, n) }),
			rapid.Custom(func(r *rapid.T) iter.Seq[farey.Slope] {
				return box(t, rapid.Int64Range(1, 40).Draw(r, "num"), rapid.Int64Range(1, 40).Draw(r, "den"))
			}),
			rapid.Map(rapid.Int64Range(1, math.MaxInt64), func(n int64) iter.Seq[farey.Slope] { return sequence(t, n) }),
			rapid.Custom(func(r *rapid.T) iter.Seq[farey.Slope] {
				return box(t, rapid.Int64Range(1, math.MaxInt64).Draw(r, "num"), rapid.Int64Range(1, math.MaxInt64).Draw(r, "den"))
			}),
		).Draw(t, "seq")
		var last farey.Slope
		count := 0
		for s := range seq {
			if count > 0 {
				require.True(t, farey.Neighbours(last, s))
				require.Equal(t, -1, last.Cmp(s))
			}
			if last = s; count == 300 {
				break
			}
			count++
		}
	})
}

func TestBoxIsAllQuotients(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, n := rapid.Int64Range(0, 12).Draw(t, "num"), rapid.Int64Range(0, 12).Draw(t, "den")
		want := slowBox(-m, m, n)
		seq := box(t, m, n)
		require.Equal(t, want, texts(seq, math.MaxInt))
		stop := rapid.IntRange(0, len(want)).Draw(t, "stop")
		require.Equal(t, want[:stop], texts(seq, stop), "again, and stopped")
	})
}

func TestSequencesWithHugeBounds(t *testing.T) {
	require.Equal(t, []string{"0/1", "1/9223372036854775807", "1/9223372036854775806"}, texts(sequence(t, math.MaxInt64), 3))
	require.Equal(t, []string{"-9223372036854775807/1", "-9223372036854775806/1"}, texts(box(t, math.MaxInt64, math.MaxInt64), 2))
	require.Equal(t, []string{"-1/1", "-1/2", "-1/3"}, texts(box(t, 1, math.MaxInt64), 3))
	require.Equal(t, []string{"-9223372036854775807/1", "-9223372036854775806/1"}, texts(box(t, math.MaxInt64, 1), 2))
}

func TestSequenceRefusals(t *testing.T) {
	for _, n := range []int64{0, -1, math.MinInt64} {
		_, err := farey.Sequence(n)
		require.ErrorIs(t, err, farey.ErrBound)
	}
	for _, bounds := range [][2]int64{{-1, 3}, {3, -1}, {math.MinInt64, math.MinInt64}} {
		_, err := farey.Box(bounds[0], bounds[1])
		require.ErrorIs(t, err, farey.ErrBound)
	}
}
