package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// twoLetterWord draws words with both letters.
func twoLetterWord() *rapid.Generator[contfrac.Word] {
	return rapid.Custom(func(t *rapid.T) contfrac.Word {
		w := rapid.OneOf(word(), shortWord()).Draw(t, "word")
		if w.NumRuns() < 2 {
			w = w.Concat(contfrac.WordOf(contfrac.R, contfrac.L))
		}
		if rapid.IntRange(0, 3).Draw(t, "power") == 0 {
			w = w.Concat(w)
		}
		return w
	})
}

// special draws matrices of determinant 1, any signs.
func special() *rapid.Generator[contfrac.Matrix] {
	return rapid.Custom(func(t *rapid.T) contfrac.Matrix {
		m := contfrac.Matrix{}
		turn := contfrac.NewMatrix(new(big.Int), big.NewInt(-1), big.NewInt(1), new(big.Int))
		for range rapid.IntRange(0, 3).Draw(t, "factors") {
			m = m.Mul(rapid.OneOf(word(), shortWord()).Draw(t, "word").Matrix()).Mul(turn)
		}
		return m
	})
}

// rotated returns the rotation of w that starts at letter n.
func rotated(w contfrac.Word, n int) contfrac.Word {
	var head, tail contfrac.WordBuilder
	i := 0
	for l := range w.Letters() {
		if i < n {
			head.Append(l, 1)
		} else {
			tail.Append(l, 1)
		}
		i++
	}
	return tail.Word().Concat(head.Word())
}

func TestLeastRotationIsThatOfEveryRotation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := shortWord().Draw(t, "word")
		n := rapid.IntRange(0, int(w.Len().Int64())).Draw(t, "start")
		least := w.LeastRotation()
		assert.Equal(t, least, rotated(w, n).LeastRotation())
		assert.Equal(t, least, least.LeastRotation())
	})
}

// By trying all rotations.
func TestLeastRotationIsARotationAndNoneIsLess(t *testing.T) {
	terms := func(w contfrac.Word) (s string) {
		for _, n := range w.Runs() {
			s += string(rune(n.Int64()))
		}
		return s
	}
	rapid.Check(t, func(t *rapid.T) {
		w := twoLetterWord().Filter(func(w contfrac.Word) bool {
			return w.Len().IsInt64() && w.Len().Int64() < 200
		}).Draw(t, "word")
		least := w.LeastRotation()
		first, _ := least.First()
		last, _ := least.Last()
		require.Equal(t, contfrac.R, first)
		require.Equal(t, contfrac.L, last)
		found := false
		for i := range int(w.Len().Int64()) {
			v := rotated(w, i)
			found = found || v == least
			first, _ := v.First()
			last, _ := v.Last()
			if first == contfrac.R && last == contfrac.L {
				require.LessOrEqual(t, terms(least), terms(v))
			}
		}
		require.True(t, found)
	})
}

func TestLeastRotationOfOneLetterAloneIsTheWord(t *testing.T) {
	for _, s := range []string{"", "R", "L", "R7", "L99999999999999999999999"} {
		w, err := contfrac.ParseWord(s)
		require.NoError(t, err)
		assert.Equal(t, w, w.LeastRotation())
	}
}

// Run lengths of several bytes, and of some hundred bits, are compared as numbers.
func TestLeastRotationComparesLongRunsAsNumbers(t *testing.T) {
	for given, want := range map[string]string{
		"R200 L R3 L": "R3 L R200 L", "R3 L R200 L": "R3 L R200 L", "R256 L R255 L": "R255 L R256 L",
		"R7 L340282366920938463463374607431768211457 R7 L340282366920938463463374607431768211456": "R7 L340282366920938463463374607431768211456 R7 L340282366920938463463374607431768211457",
	} {
		w, err := contfrac.ParseWord(given)
		require.NoError(t, err)
		assert.Equal(t, want, w.LeastRotation().Compact())
	}
}

func TestCycleOfAPositiveWordIsTheWordUpToRotation(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			w := twoLetterWord().Draw(t, "word")
			c, err := w.Matrix().Cycle()
			require.NoError(t, err)
			assert.Equal(t, w.LeastRotation(), c)
		})
	})
}

func TestCycleIsKeptByConjugation(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			w := twoLetterWord().Draw(t, "word")
			g := special().Draw(t, "g")
			inverse, err := g.Inverse()
			require.NoError(t, err)
			m := g.Mul(w.Matrix()).Mul(inverse)
			c, err := m.Cycle()
			require.NoError(t, err)
			assert.Equal(t, w.LeastRotation(), c)
			same(t, m.Trace(), c.Matrix().Trace())
		})
	})
}

// Inverses have fixed points exchanged: the transpose conjugated by a quarter turn.
func TestCycleOfTheInverseIsTheWordReversedAndExchanged(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := twoLetterWord().Draw(t, "word")
		inverse, err := w.Matrix().Inverse()
		require.NoError(t, err)
		c, err := inverse.Cycle()
		require.NoError(t, err)
		assert.Equal(t, w.Reverse().Swap().LeastRotation(), c)
	})
}

func TestCycleRefuses(t *testing.T) {
	m := func(a, b, c, d int64) contfrac.Matrix {
		return contfrac.NewMatrix(big.NewInt(a), big.NewInt(b), big.NewInt(c), big.NewInt(d))
	}
	for _, c := range []struct {
		m    contfrac.Matrix
		want error
	}{
		{contfrac.Matrix{}, contfrac.ErrTrace},
		{m(1, 5, 0, 1), contfrac.ErrTrace},
		{m(0, -1, 1, 0), contfrac.ErrTrace},
		{m(-2, -1, -1, -1), contfrac.ErrTrace},
		{m(2, 1, 1, 0), contfrac.ErrDeterminant},
		{m(2, 0, 0, 3), contfrac.ErrDeterminant},
		{m(0, 0, 0, 0), contfrac.ErrDeterminant},
	} {
		_, err := c.m.Cycle()
		assert.ErrorIs(t, err, c.want, "%v", c.m)
	}
}
