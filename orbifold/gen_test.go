package orbifold_test

import (
	"math"
	"math/big"

	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// families draws weights: zero, small, partly equal, now and then large.
func families() *rapid.Generator[orbifold.Family] {
	weight := rapid.OneOf(rapid.Just(int64(0)), rapid.Int64Range(0, 3), rapid.Int64Range(0, 9))
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

// bigWeights draws families with weights of up to 62 bits.
func bigWeights() *rapid.Generator[orbifold.Family] {
	weight := rapid.OneOf(rapid.Int64Range(0, 3), rapid.Int64Range(0, 1<<62))
	return rapid.Custom(func(t *rapid.T) orbifold.Family {
		return orbifold.MustNew(weight.Draw(t, "k₀"), weight.Draw(t, "k∞"), weight.Draw(t, "k₁"))
	})
}

// paths draws paths of up to runs runs with run lengths from the list. Half of
// them have the full number of runs: rapid's own slices are mostly short.
func paths(runs int, lengths ...uint64) *rapid.Generator[farey.Path] {
	return rapid.Custom(func(t *rapid.T) farey.Path {
		if rapid.IntRange(0, 19).Draw(t, "stay at the base") == 0 {
			return farey.Path{}
		}
		first := rapid.SampledFrom([]farey.Class{farey.Zero, farey.Infinity, farey.One}).Draw(t, "first")
		letter := rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "letter")
		n := runs
		if rapid.Bool().Draw(t, "short") {
			n = rapid.IntRange(0, runs).Draw(t, "runs")
		}
		var b contfrac.WordBuilder
		for _, length := range rapid.SliceOfN(rapid.SampledFrom(lengths), n, n).Draw(t, "lengths") {
			b.Append(letter, length)
			letter = letter.Other()
		}
		return farey.NewPath(first, b.Word())
	})
}

// from returns the integers from lo to hi.
func from(lo, hi uint64) (list []uint64) {
	for n := lo; n <= hi; n++ {
		list = append(list, n)
	}
	return list
}

// slopes draws slopes whose arcs are short enough for words and snake graphs:
// short and long paths, skewed ones, negative slopes, base slopes.
func slopes() *rapid.Generator[farey.Slope] {
	return slopesOn(
		paths(5, from(1, 4)...),
		paths(9, 1, 2),
		paths(2, from(1, 24)...),
		paths(1, 1, 10, 99, 100, 300),
	)
}

// farSlopes draws slopes whose numbers have up to some 10⁵ bits, with runs of
// up to 4097.
func farSlopes() *rapid.Generator[farey.Slope] {
	return slopesOn(
		paths(5, from(1, 12)...),
		paths(14, 1, 2),
		paths(2, append(from(1, 20), 63, 64, 65, 150)...),
		paths(1, 1_000, 2_047, 2_048, 2_049, 4_097),
	)
}

// hugeSlopes draws slopes with terms of up to some thousand digits: many runs,
// runs of up to 64 bits.
func hugeSlopes() *rapid.Generator[farey.Slope] {
	const top = math.MaxUint64
	return slopesOn(
		paths(1500, from(1, 4)...),
		paths(60, 1, 2, 1_000_003, 1<<32, top-1, top),
		paths(3, 1, top/3, top-1, top),
		paths(6, 1, 2, 3, 999_999, 1_000_000),
	)
}

// steppedSlopes draws slopes far out whose paths can still be stepped flip by
// flip modulo something.
func steppedSlopes() *rapid.Generator[farey.Slope] {
	return slopesOn(paths(4, 1, 2, 3, 4, 5, 6, 7, 8, 15, 16, 17, 100, 2000), paths(100, from(1, 9)...), paths(1, 50_000))
}

// slopesOn draws slopes at the ends of paths; for the base path one of the
// base slopes.
func slopesOn(p ...*rapid.Generator[farey.Path]) *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		if s, ok := rapid.OneOf(p...).Draw(t, "path").Slope(); ok {
			return s
		}
		return rapid.SampledFrom([]farey.Class{farey.Zero, farey.Infinity, farey.One}).Draw(t, "base").Slope()
	})
}

// moduli draws moduli: 1, small, at the edge of a word, above.
func moduli() *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		m := new(big.Int).SetUint64(rapid.OneOf(
			rapid.Uint64Range(1, 100), rapid.Uint64Min(1), rapid.SampledFrom([]uint64{1, 2, 1 << 63, 1<<64 - 1, 1<<61 - 1}),
		).Draw(t, "m"))
		if rapid.Bool().Draw(t, "large") {
			m.Mul(m, m).Mul(m, m).Add(m, big.NewInt(1))
		}
		return m
	})
}
