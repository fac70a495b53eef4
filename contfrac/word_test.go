package contfrac_test

import (
	"fmt"
	"math/big"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func parse(t require.TestingT, s string) contfrac.Word {
	w, err := contfrac.ParseWord(s)
	require.NoError(t, err)
	return w
}

// reversed is the text model of Reverse.
func reversed(s string) string {
	b := []byte(s)
	slices.Reverse(b)
	return string(b)
}

func TestPlainTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.StringOfN(rapid.RuneFrom([]rune("LR")), 0, 60, -1).Draw(t, "letters")
		w := parse(t, s)
		require.Equal(t, s, w.String())
		require.Equal(t, int64(len(s)), w.Len().Int64())
	})
}

func TestCompactTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := word().Draw(t, "word")
		require.Equal(t, w, parse(t, w.Compact()))
		require.Equal(t, w, parse(t, w.String()))
		text, err := w.MarshalText()
		require.NoError(t, err)
		var v contfrac.Word
		require.NoError(t, v.UnmarshalText(text))
		require.Equal(t, w, v)
	})
}

func TestEqualWordsAreIdentical(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := word().Draw(t, "word")
		// The same word, put together run by run in pieces.
		var b contfrac.WordBuilder
		for l, n := range w.Runs() {
			part := natural(300).Draw(t, "part")
			part.Mod(part, new(big.Int).Add(n, big.NewInt(1)))
			require.NoError(t, b.AppendBig(l, part))
			require.NoError(t, b.AppendBig(l, n.Sub(n, part)))
		}
		require.True(t, w == b.Word())
	})
}

func TestLettersAreTheRunsExpanded(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := shortWord().Draw(t, "word")
		var runs, letters strings.Builder
		count := 0
		for l, n := range w.Runs() {
			runs.WriteString(strings.Repeat(l.String(), int(n.Int64())))
			count++
		}
		for l := range w.Letters() {
			letters.WriteString(l.String())
		}
		require.Equal(t, runs.String(), letters.String())
		require.Equal(t, w.String(), letters.String())
		require.Equal(t, count, w.NumRuns())
		require.Equal(t, count == 0, w.IsEmpty())
	})
}

func TestLengthIsAdditive(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v, w := word().Draw(t, "v"), word().Draw(t, "w")
		same(t, new(big.Int).Add(v.Len(), w.Len()), v.Concat(w).Len())
	})
}

func TestConcatJoinsTexts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v, w := shortWord().Draw(t, "v"), shortWord().Draw(t, "w")
		require.Equal(t, v.String()+w.String(), v.Concat(w).String())
	})
}

func TestConcatIsAssociative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		u, v, w := word().Draw(t, "u"), word().Draw(t, "v"), word().Draw(t, "w")
		require.Equal(t, u.Concat(v).Concat(w), u.Concat(v.Concat(w)))
		require.Equal(t, u, u.Concat(contfrac.Word{}))
		require.Equal(t, u, contfrac.Word{}.Concat(u))
	})
}

func TestReverseReversesTexts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := shortWord().Draw(t, "word")
		require.Equal(t, reversed(w.String()), w.Reverse().String())
	})
}

func TestReverseIsAnAntiautomorphism(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v, w := word().Draw(t, "v"), word().Draw(t, "w")
		require.Equal(t, w.Reverse().Concat(v.Reverse()), v.Concat(w).Reverse())
		require.Equal(t, v, v.Reverse().Reverse())
	})
}

func TestSwapIsAnAutomorphism(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v, w := word().Draw(t, "v"), word().Draw(t, "w")
		require.Equal(t, v.Swap().Concat(w.Swap()), v.Concat(w).Swap())
		require.Equal(t, v, v.Swap().Swap())
		require.Equal(t, strings.NewReplacer("L", "R", "R", "L").Replace(v.Compact()), v.Swap().Compact())
	})
}

func TestFirstAndLastAreTheEnds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w, x, y := word().Draw(t, "word"), letter().Draw(t, "x"), letter().Draw(t, "y")
		v := w.WithEnds(x, y)
		first, ok := v.First()
		require.True(t, ok)
		last, ok := v.Last()
		require.True(t, ok)
		require.Equal(t, [2]contfrac.Letter{x, y}, [2]contfrac.Letter{first, last})
		require.Equal(t, contfrac.WordOf(x).Concat(w).Concat(contfrac.WordOf(y)), v)
	})
	_, ok := contfrac.Word{}.First()
	assert.False(t, ok)
	_, ok = contfrac.Word{}.Last()
	assert.False(t, ok)
}

func TestBuilderGrowsLikeText(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var b contfrac.WordBuilder
		model := ""
		t.Repeat(map[string]func(*rapid.T){
			"Append": func(t *rapid.T) {
				l, n := letter().Draw(t, "letter"), rapid.IntRange(0, 5).Draw(t, "n")
				b.Append(l, uint64(n))
				model += strings.Repeat(l.String(), n)
			},
			"AppendBig": func(t *rapid.T) {
				l, n := letter().Draw(t, "letter"), rapid.IntRange(0, 5).Draw(t, "n")
				require.NoError(t, b.AppendBig(l, big.NewInt(int64(n))))
				model += strings.Repeat(l.String(), n)
			},
			"AppendWord": func(t *rapid.T) {
				w := shortWord().Draw(t, "word")
				b.AppendWord(w)
				model += w.String()
			},
			"": func(t *rapid.T) { require.Equal(t, model, b.Word().String()) },
		})
	})
}

func TestBuilderAddsRunsPastTheWord(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var b contfrac.WordBuilder
		want := new(big.Int)
		for i := range rapid.IntRange(1, 6).Draw(t, "pieces") {
			n := rapid.Uint64Range(1<<63, 1<<64-1).Draw(t, "n")
			if i%2 == 0 {
				b.Append(contfrac.R, n)
			} else {
				require.NoError(t, b.AppendBig(contfrac.R, new(big.Int).SetUint64(n)))
			}
			want.Add(want, new(big.Int).SetUint64(n))
		}
		same(t, want, b.Word().Len())
		require.Equal(t, 1, b.Word().NumRuns())
	})
}

func TestBuilderRefusesNegativeRuns(t *testing.T) {
	var b contfrac.WordBuilder
	assert.ErrorIs(t, b.AppendBig(contfrac.L, big.NewInt(-1)), contfrac.ErrTerm)
	assert.ErrorIs(t, b.AppendBig(contfrac.L, nil), contfrac.ErrTerm)
	assert.True(t, b.Word().IsEmpty())
}

func TestLettersOfAnEnormousWordAreLazy(t *testing.T) {
	w := parse(t, "R2 L1000000000000000000000000000000000000 R")
	var head []byte
	for l := range w.Letters() {
		if head = append(head, l.String()...); len(head) == 5 {
			break
		}
	}
	assert.Equal(t, "RRLLL", string(head))
	for l, n := range w.Runs() {
		assert.Equal(t, contfrac.R, l)
		assert.Equal(t, int64(2), n.Int64())
		break
	}
	// A run longer than a machine word counts is begun in another way.
	for _, read := range []int{1, 3} {
		n := 0
		for l := range parse(t, "L18446744073709551617 R").Letters() {
			assert.Equal(t, contfrac.L, l)
			if n++; n == read {
				break
			}
		}
	}
}

func TestLengthPastTheWord(t *testing.T) {
	assert.Equal(t, "36893488147419103231", parse(t, "L18446744073709551615 R18446744073709551615 L").Len().String())
}

func TestLongWordsAreWrittenByRuns(t *testing.T) {
	plain := parse(t, fmt.Sprintf("R%d", contfrac.MaxPlainLetters))
	assert.Len(t, plain.String(), contfrac.MaxPlainLetters)
	compact := parse(t, fmt.Sprintf("R%d", contfrac.MaxPlainLetters+1))
	assert.Equal(t, fmt.Sprintf("R%d", contfrac.MaxPlainLetters+1), compact.String())
	huge := parse(t, "R100000000000000000000 L")
	assert.Equal(t, "R100000000000000000000 L", huge.String())
}

func TestWordIsShortenedByV(t *testing.T) {
	assert.Equal(t, "RLLRR", fmt.Sprintf("%v", parse(t, "R L2 R2")))
	assert.Equal(t, `"RLLRR"`, fmt.Sprintf("%q", parse(t, "R L2 R2")))
	assert.Equal(t, "  RL|RL  ", fmt.Sprintf("%4s|%-4s", parse(t, "RL"), parse(t, "RL")))
	assert.Equal(t, "%!d(contfrac.Word=RL)", fmt.Sprintf("%d", parse(t, "RL")))
	w := parse(t, strings.Repeat("RLL", 100)+"R1"+strings.Repeat("0", 60))
	assert.Equal(t, "R L2 R L2 R L2 … L2 R L2 R L2 R100000000000…000000000000 (61 digits)"+
		" (201 runs, 100000000000…000000000300 (61 digits) letters)", fmt.Sprint(w))
	assert.Equal(t, w.Compact(), fmt.Sprintf("%s", w))
}

func TestTenMillionLettersFitInMemory(t *testing.T) {
	var b contfrac.WordBuilder
	for i := range 10_000_000 {
		b.Append(contfrac.Letter(i%2), 1)
	}
	w := b.Word()
	require.Equal(t, "10000000", w.Len().String())
	f := w.Fraction()
	require.Equal(t, 10_000_000, f.Len())
	v, err := f.Word()
	require.NoError(t, err)
	require.Equal(t, w, v.Swap())
}

func TestLetters(t *testing.T) {
	assert.Equal(t, "L R R", fmt.Sprint(contfrac.L, contfrac.R, contfrac.Letter(7)))
	assert.Equal(t, contfrac.R, contfrac.L.Other())
	assert.Equal(t, contfrac.L, contfrac.R.Other())
	assert.Equal(t, contfrac.L, contfrac.Letter(7).Other())
	assert.Equal(t, "RR", contfrac.WordOf(contfrac.Letter(9), contfrac.R).String())
}
