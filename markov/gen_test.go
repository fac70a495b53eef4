package markov_test

import (
	"math/big"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

// must unwraps a result whose error would end the test.
func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}

// slopes draws slopes anywhere in Q ∪ {∞}: base slopes, negative ones, short and
// long paths, long runs. Their numbers stay below some 10⁵ bits.
func slopes() *rapid.Generator[farey.Slope] {
	classes := []farey.Class{farey.Zero, farey.Infinity, farey.One}
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		first := rapid.SampledFrom(classes).Draw(t, "first")
		shape := rapid.IntRange(0, 9).Draw(t, "shape")
		if shape == 0 {
			return first.Slope()
		}
		longest, runs := uint64(3), 6
		if shape > 6 {
			longest, runs = 100, 2
		}
		var moves contfrac.WordBuilder
		for _, n := range rapid.SliceOfN(rapid.Uint64Range(1, longest), 0, runs).Draw(t, "runs") {
			last, _ := moves.Word().Last()
			moves.Append(last.Other(), n)
		}
		s, _ := farey.NewPath(first, moves.Word()).Slope()
		return s
	})
}

// indices draws Frobenius indices: 0/1, 1/1, and those of the slopes drawn by slopes.
func indices() *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		return must(markov.Index(markov.Family().Representative(slopes().Draw(t, "slope"))))(t)
	})
}

// smallIndices draws indices with numbers that are quick to look up.
func smallIndices() *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		q := rapid.Int64Range(1, 40).Draw(t, "q")
		return must(farey.FromInts(rapid.Int64Range(0, q).Draw(t, "p"), q))(t)
	})
}

// integers draws integers of either sign, small and at the edges of machine words.
func integers() *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		n := big.NewInt(rapid.OneOf(rapid.Int64Range(-6, 6), rapid.Int64()).Draw(t, "n"))
		if rapid.IntRange(0, 3).Draw(t, "large") == 0 {
			n.Lsh(n, rapid.SampledFrom([]uint{1, 63, 64, 200}).Draw(t, "shift"))
		}
		return n
	})
}

// assertTriple is the equation, written out on its own, and the order of the
// numbers.
func assertTriple(t require.TestingT, m markov.Triple) {
	a, b, c := m.Numbers()
	left, right := new(big.Int), big.NewInt(3)
	for _, n := range []*big.Int{a, b, c} {
		require.Positive(t, n.Sign())
		left.Add(left, new(big.Int).Mul(n, n))
		right.Mul(right, n)
	}
	require.Equal(t, right.String(), left.String(), "a² + b² + c² = 3abc for %v", m)
	require.LessOrEqual(t, a.Cmp(b), 0)
	require.LessOrEqual(t, b.Cmp(c), 0)
}
