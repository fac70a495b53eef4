package spectrum_test

import (
	"math/big"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// families draws weights: zero, small, partly equal, now and then large.
func families() *rapid.Generator[orbifold.Family] {
	weight := rapid.OneOf(rapid.Just(int64(0)), rapid.Int64Range(0, 3), rapid.Int64Range(0, 9), rapid.Just(int64(1)<<40))
	return rapid.Custom(func(t *rapid.T) orbifold.Family {
		k := [3]int64{weight.Draw(t, "k₀"), weight.Draw(t, "k∞"), weight.Draw(t, "k₁")}
		switch rapid.IntRange(0, 4).Draw(t, "which are equal") {
		case 0:
			k[1], k[2] = k[0], k[0]
		case 1:
			k[1] = k[0]
		case 2:
			k[2] = k[1]
		}
		return orbifold.MustNew(k[0], k[1], k[2])
	})
}

// slopes draws slopes by their paths, base slopes and negative ones among
// them: up to the number of runs, of up to the given lengths.
func slopes(runs int, longest uint64) *rapid.Generator[farey.Slope] {
	classes := []farey.Class{farey.Zero, farey.Infinity, farey.One}
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		first := rapid.SampledFrom(classes).Draw(t, "first")
		if rapid.IntRange(0, 9).Draw(t, "shape") == 0 {
			return first.Slope()
		}
		var moves contfrac.WordBuilder
		letter := rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "letter")
		n := rapid.IntRange(0, runs).Draw(t, "runs")
		for _, length := range rapid.SliceOfN(rapid.Uint64Range(1, longest), n, n).Draw(t, "lengths") {
			moves.Append(letter, length)
			letter = letter.Other()
		}
		s, _ := farey.NewPath(first, moves.Word()).Slope()
		return s
	})
}

// special draws matrices of determinant 1 with small entries.
func special() *rapid.Generator[contfrac.Matrix] {
	return rapid.Custom(func(t *rapid.T) contfrac.Matrix {
		m := contfrac.Matrix{}
		for range rapid.IntRange(0, 4).Draw(t, "factors") {
			n := big.NewInt(rapid.Int64Range(-5, 5).Draw(t, "n"))
			m = m.Mul(contfrac.NewMatrix(n, big.NewInt(-1), big.NewInt(1), nil))
		}
		return m
	})
}

func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}

func same(t require.TestingT, want, got *big.Int, about ...any) {
	require.Equal(t, want.String(), got.String(), about...)
}

// texts writes slopes for comparison.
func texts(slopes []farey.Slope) []string {
	out := []string{}
	for _, s := range slopes {
		out = append(out, s.String())
	}
	return out
}
