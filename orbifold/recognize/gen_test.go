package recognize_test

import (
	"fmt"
	"math/big"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

// must unwraps a result whose error would end the test.
func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}

func assertEqualInt(t assert.TestingT, want, got *big.Int, what ...any) {
	if want.Cmp(got) != 0 {
		assert.Fail(t, fmt.Sprintf("want %s, got %s", contfrac.Abbreviate(want), contfrac.Abbreviate(got)), what...)
	}
}

// families draws weights: zero, small, partly equal, now and then large.
func families() *rapid.Generator[orbifold.Family] {
	weight := rapid.OneOf(rapid.Just(int64(0)), rapid.Int64Range(0, 3), rapid.Int64Range(0, 50))
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

// slopes draws slopes with short paths, base slopes and negative ones among
// them.
func slopes(runs int) *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		first := rapid.SampledFrom([]farey.Class{farey.Zero, farey.Infinity, farey.One}).Draw(t, "first")
		if rapid.IntRange(0, 5).Draw(t, "base") == 0 {
			return first.Slope()
		}
		var b contfrac.WordBuilder
		letter := rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "letter")
		for _, n := range rapid.SliceOfN(rapid.Uint64Range(1, 4), 0, runs).Draw(t, "runs") {
			b.Append(letter, n)
			letter = letter.Other()
		}
		s, _ := farey.NewPath(first, b.Word()).Slope()
		return s
	})
}

// progression is a piece of a fan: terms at start, start + step, ….
type progression struct {
	fan  orbifold.Fan
	step int64
}

// progressions draws progressions with steps up to most.
func progressions(most int64) *rapid.Generator[progression] {
	return rapid.Custom(func(t *rapid.T) progression {
		f := families().Draw(t, "family")
		centre := slopes(3).Draw(t, "centre")
		through := farey.Class((centre.Class() + 1) % 3).Slope()
		if !centre.IsBase() {
			through, _, _ = centre.Parents()
		}
		fan := must(f.Fan(centre, through))(t)
		start := fan.Slope(big.NewInt(rapid.Int64Range(-8, 8).Draw(t, "start")))
		step := rapid.OneOf(rapid.Just(int64(1)), rapid.Int64Range(1, most)).Draw(t, "step")
		if rapid.Bool().Draw(t, "backwards") {
			step = -step
		}
		return progression{must(f.Fan(centre, start))(t), step}
	})
}

// terms returns the first n terms.
func (p progression) terms(t require.TestingT, n int) []*big.Int {
	a := make([]*big.Int, n)
	for j := range a {
		a[j] = must(p.fan.Term(big.NewInt(int64(j) * p.step)))(t)
	}
	return a
}

// sequenceOf makes a sequence of machine integers.
func sequenceOf(t require.TestingT, terms ...int64) recognize.Sequence {
	a := make([]*big.Int, len(terms))
	for i, x := range terms {
		a[i] = big.NewInt(x)
	}
	return must(recognize.NewSequence(a...))(t)
}
