package farey_test

import (
	"math"
	"math/big"

	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// corners are the machine integers at which representations and overflow change.
var corners = []int64{
	0, 1, -1, 2, -2, 3, 5, -8, 1<<31 - 1, 1 << 31, 1 << 32, -1 << 32,
	1<<61 - 1, 1<<62 - 1, 1 << 62, 1<<62 + 1, -1 << 62, math.MaxInt64 - 1, math.MaxInt64, math.MinInt64, math.MinInt64 + 1,
}

func int64s() *rapid.Generator[int64] {
	return rapid.OneOf(
		rapid.Int64Range(-30, 30),
		rapid.SampledFrom(corners),
		rapid.Int64(),
	)
}

// integers of either sign: small, at the limb boundaries, a few limbs, a thousand digits.
func integers() *rapid.Generator[*big.Int] {
	return rapid.OneOf(
		rapid.Map(int64s(), big.NewInt),
		rapid.Custom(func(t *rapid.T) *big.Int {
			n := new(big.Int).Lsh(big.NewInt(1), rapid.UintRange(60, 200).Draw(t, "bits"))
			n.Add(n, big.NewInt(rapid.Int64Range(-2, 2).Draw(t, "off")))
			if rapid.Bool().Draw(t, "negative") {
				n.Neg(n)
			}
			return n
		}),
		rapid.Custom(func(t *rapid.T) *big.Int {
			size := rapid.SampledFrom([]int{9, 17, 40, 420}).Draw(t, "bytes")
			seed := rapid.Uint64().Draw(t, "seed")
			n := stretch(seed, size)
			if rapid.Bool().Draw(t, "negative") {
				n.Neg(n)
			}
			return n
		}),
	)
}

// stretch makes an integer of the given number of bytes from a seed.
func stretch(seed uint64, size int) *big.Int {
	buf := make([]byte, size)
	for i := range buf {
		seed = seed*6364136223846793005 + 1442695040888963407
		buf[i] = byte(seed >> 56)
	}
	buf[0] |= 1
	return new(big.Int).SetBytes(buf)
}

// slopes of every size and sign, base slopes and fans among them.
func slopes() *rapid.Generator[farey.Slope] {
	return rapid.OneOf(
		smallSlopes(),
		rapid.Custom(func(t *rapid.T) farey.Slope {
			p, q := integers().Draw(t, "p"), integers().Draw(t, "q")
			s, err := farey.New(p, q)
			if err != nil {
				return farey.Slope{}
			}
			return s
		}),
		rapid.Map(paths(), func(p farey.Path) farey.Slope {
			s, _ := p.Slope()
			return s
		}),
	)
}

// smallSlopes have terms of at most 40, so that brute force is affordable.
func smallSlopes() *rapid.Generator[farey.Slope] {
	return rapid.Custom(func(t *rapid.T) farey.Slope {
		p, q := rapid.Int64Range(-40, 40).Draw(t, "p"), rapid.Int64Range(0, 40).Draw(t, "q")
		s, err := farey.FromInts(p, q)
		if err != nil {
			return farey.Slope{}
		}
		return s
	})
}

func classes() *rapid.Generator[farey.Class] {
	return rapid.SampledFrom([]farey.Class{farey.Zero, farey.Infinity, farey.One})
}

func symmetries() *rapid.Generator[farey.Symmetry] {
	all := farey.Symmetries()
	return rapid.SampledFrom(all[:])
}

// words of letters and runs, some runs huge.
func words() *rapid.Generator[contfrac.Word] {
	return rapid.Custom(func(t *rapid.T) contfrac.Word {
		var b contfrac.WordBuilder
		for range rapid.IntRange(0, 12).Draw(t, "runs") {
			l := rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R}).Draw(t, "letter")
			n := rapid.OneOf(
				rapid.Map(rapid.Int64Range(0, 4), big.NewInt),
				rapid.Map(integers(), func(n *big.Int) *big.Int { return n.Abs(n) }),
			).Draw(t, "length")
			if err := b.AppendBig(l, n); err != nil {
				t.Fatal(err)
			}
		}
		return b.Word()
	})
}

// paths, the one that stays at the base triangle among them.
func paths() *rapid.Generator[farey.Path] {
	return rapid.OneOf(
		rapid.Just(farey.Path{}),
		rapid.Custom(func(t *rapid.T) farey.Path {
			return farey.NewPath(classes().Draw(t, "first"), words().Draw(t, "moves"))
		}),
	)
}

func triangles() *rapid.Generator[farey.Triangle] {
	return rapid.Map(paths(), farey.Path.Triangle)
}
