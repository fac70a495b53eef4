package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// natural draws integers from 0 up to a number of bits, biased to 0, 1 and
// the neighbours of powers of two, among them the word boundaries.
func natural(bits int) *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		one := big.NewInt(1)
		switch rapid.IntRange(0, 5).Draw(t, "kind") {
		case 0:
			return big.NewInt(rapid.Int64Range(0, 3).Draw(t, "small"))
		case 1:
			k := rapid.SampledFrom([]int{7, 14, 31, 32, 63, 64, 127, 128, bits - 1}).Draw(t, "power")
			n := new(big.Int).Lsh(one, uint(min(k, bits-1)))
			return n.Add(n, big.NewInt(rapid.Int64Range(-1, 1).Draw(t, "offset")))
		case 2:
			return big.NewInt(rapid.Int64Range(0, 1000).Draw(t, "medium"))
		}
		return sized(bits).Draw(t, "large")
	})
}

// sized draws integers of any bits, as often long as short.
func sized(bits int) *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		size := max(1, bits*rapid.SampledFrom([]int{16, 15, 12, 8, 4, 2, 1}).Draw(t, "sixteenths")/16-rapid.IntRange(0, 64).Draw(t, "less"))
		return pseudorandom(size, rapid.Uint64().Draw(t, "seed"))
	})
}

// list draws slices of up to most elements, as often long as short.
func list[T any](of *rapid.Generator[T], least, most int) *rapid.Generator[[]T] {
	return rapid.Custom(func(t *rapid.T) []T {
		n := max(least, most*rapid.SampledFrom([]int{0, 1, 2, 4, 8, 12, 16}).Draw(t, "sixteenths")/16-rapid.IntRange(0, 3).Draw(t, "less"))
		return rapid.SliceOfN(of, n, n).Draw(t, "list")
	})
}

// integer is natural with a sign.
func integer(bits int) *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		n := natural(bits).Draw(t, "size")
		if rapid.Bool().Draw(t, "negative") {
			n.Neg(n)
		}
		return n
	})
}

// positive draws terms and run lengths: mostly small, now and then enormous.
func positive() *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		if rapid.IntRange(0, 9).Draw(t, "kind") > 0 {
			return big.NewInt(rapid.Int64Range(1, 4).Draw(t, "small"))
		}
		n := natural(300).Draw(t, "large")
		return n.Add(n, big.NewInt(1))
	})
}

// fraction draws regular continued fractions, the empty one among them.
func fraction() *rapid.Generator[contfrac.Fraction] {
	return rapid.Custom(func(t *rapid.T) contfrac.Fraction {
		terms := list(positive(), 0, 40).Draw(t, "terms")
		if len(terms) > 0 && rapid.Bool().Draw(t, "any first term") {
			terms[0] = integer(100).Draw(t, "first")
		}
		f, err := contfrac.NewFraction(terms...)
		if err != nil {
			t.Fatal(err)
		}
		return f
	})
}

// word draws words by their runs.
func word() *rapid.Generator[contfrac.Word] {
	return rapid.Custom(func(t *rapid.T) contfrac.Word {
		l := letter().Draw(t, "first letter")
		var b contfrac.WordBuilder
		for _, n := range list(positive(), 0, 30).Draw(t, "runs") {
			if err := b.AppendBig(l, n); err != nil {
				t.Fatal(err)
			}
			l = l.Other()
		}
		return b.Word()
	})
}

// shortWord draws words of few letters, letter by letter.
func shortWord() *rapid.Generator[contfrac.Word] {
	return rapid.Map(list(letter(), 0, 60), func(letters []contfrac.Letter) contfrac.Word {
		return contfrac.WordOf(letters...)
	})
}

func letter() *rapid.Generator[contfrac.Letter] {
	return rapid.SampledFrom([]contfrac.Letter{contfrac.L, contfrac.R})
}

// matrix draws matrices of any determinant, the zero value among them.
func matrix() *rapid.Generator[contfrac.Matrix] {
	return rapid.Custom(func(t *rapid.T) contfrac.Matrix {
		if rapid.IntRange(0, 9).Draw(t, "kind") == 0 {
			return contfrac.Matrix{}
		}
		n := integer(200)
		return contfrac.NewMatrix(n.Draw(t, "a"), n.Draw(t, "b"), n.Draw(t, "c"), n.Draw(t, "d"))
	})
}

// unimodular draws matrices of determinant 1 or −1.
func unimodular() *rapid.Generator[contfrac.Matrix] {
	return rapid.Custom(func(t *rapid.T) contfrac.Matrix {
		m := word().Draw(t, "word").Matrix()
		if rapid.Bool().Draw(t, "negated") {
			m = m.Neg()
		}
		if rapid.Bool().Draw(t, "inverted") {
			m = contfrac.NewMatrix(m.D(), new(big.Int).Neg(m.B()), new(big.Int).Neg(m.C()), m.A())
		}
		if rapid.Bool().Draw(t, "reflected") {
			m = contfrac.NewMatrix(m.C(), m.D(), m.A(), m.B())
		}
		return m
	})
}

// atThresholds runs a test with the thresholds as they are, with all at their
// least, with all at infinity, and with those of the expansions so that only
// divisions are made.
func atThresholds(t *testing.T, test func(t *testing.T)) {
	t.Run("default", test)
	t.Run("minimal", func(t *testing.T) {
		defer contfrac.SetThresholds(contfrac.SetThresholds(contfrac.Minimal))
		test(t)
	})
	t.Run("infinite", func(t *testing.T) {
		defer contfrac.SetThresholds(contfrac.SetThresholds(contfrac.Infinite))
		test(t)
	})
	t.Run("dividing", func(t *testing.T) {
		defer contfrac.SetThresholds(contfrac.SetThresholds(contfrac.Dividing))
		test(t)
	})
}

// ints turns small integers into big ones.
func ints(ns ...int64) []*big.Int {
	out := make([]*big.Int, len(ns))
	for i, n := range ns {
		out[i] = big.NewInt(n)
	}
	return out
}

// same checks that two integers are equal.
func same(t require.TestingT, want, got *big.Int, about ...any) {
	require.Equal(t, want.String(), got.String(), about...)
}

// pseudorandom returns a fixed integer of exactly the given number of bits.
func pseudorandom(bits int, seed uint64) *big.Int {
	n := new(big.Int)
	x := seed*0x9e3779b97f4a7c15 + 1
	words := make([]byte, 0, bits/8+8)
	for len(words)*8 < bits {
		x ^= x << 13
		x ^= x >> 7
		x ^= x << 17
		words = append(words, byte(x), byte(x>>8), byte(x>>16), byte(x>>24))
	}
	n.SetBytes(words)
	n.Rsh(n, uint(n.BitLen()-min(bits, n.BitLen())))
	return n.SetBit(n, bits-1, 1)
}
