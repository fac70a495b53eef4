package recognize_test

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

func sequences() *rapid.Generator[recognize.Sequence] {
	return rapid.Custom(func(t *rapid.T) recognize.Sequence {
		a := recurrentTerms().Draw(t, "terms")
		if rapid.Bool().Draw(t, "long") {
			a[0].Lsh(big.NewInt(-3), 500)
		}
		return must(recognize.NewSequence(a...))(t)
	})
}

func TestSequenceTextsReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := sequences().Draw(t, "sequence")
		assert.Equal(t, s.String(), must(recognize.ParseSequence(s.String()))(t).String())
		first := rapid.Int64Range(math.MinInt64, math.MaxInt64-20).Draw(t, "first")
		var b bytes.Buffer
		require.NoError(t, s.WriteIndexed(&b, first))
		back, from, err := recognize.ReadIndexed(&b)
		require.NoError(t, err)
		assert.Equal(t, first, from)
		assert.Equal(t, s.String(), back.String())
	})
}

// TestIndexedLines is the form of the plain tables of public sequence databases:
// an index, a space, the value (common practice).
func TestIndexedLines(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, sequenceOf(t, 1, -3, 13).WriteIndexed(&b, 0))
	assert.Equal(t, "0 1\n1 -3\n2 13\n", b.String())
	s, first, err := recognize.ReadIndexed(strings.NewReader("# a table\n\n 5 1\r\n6   3 \n7 13"))
	require.NoError(t, err)
	assert.Equal(t, "1, 3, 13", s.String())
	assert.Equal(t, int64(5), first)
}

func TestParseSequenceForms(t *testing.T) {
	for text, want := range map[string]string{
		"1,3,13":         "1, 3, 13",
		" 1 3\n13\t61 ":  "1, 3, 13, 61",
		"1, 3 13,61":     "1, 3, 13, 61",
		"-5 −6 +7 007 0": "-5, -6, 7, 7, 0",
	} {
		assert.Equal(t, want, must(recognize.ParseSequence(text))(t).String(), text)
	}
}

func TestParseSequenceRefuses(t *testing.T) {
	for text, want := range map[string]error{
		"":        recognize.ErrEmpty,
		" \n":     recognize.ErrEmpty,
		",":       recognize.ErrSyntax,
		"1,,2":    recognize.ErrSyntax,
		"1,2,":    recognize.ErrSyntax,
		"1 2 x":   recognize.ErrSyntax,
		"1 2 --3": recognize.ErrSyntax,
		"-":       recognize.ErrSyntax,
		"1;2":     recognize.ErrSyntax,
		"1/2 3":   recognize.ErrNotInteger,
		"0.5 1 2": recognize.ErrNotInteger,
		"1e5":     recognize.ErrNotInteger,
		"0x10":    recognize.ErrSyntax,
		"1_000":   recognize.ErrSyntax,
		strings.Repeat("7", recognize.MaxDigits+1): recognize.ErrTooLarge,
		strings.Repeat("7 ", recognize.MaxTerms+1): recognize.ErrTooLarge,
		strings.Repeat(" ", recognize.MaxText+1):   recognize.ErrTooLarge,
	} {
		_, err := recognize.ParseSequence(text)
		assert.ErrorIs(t, err, want, "%.20q", text)
		assert.Less(t, len(err.Error()), 300)
	}
}

func TestReadIndexedRefuses(t *testing.T) {
	for text, want := range map[string]error{
		"":          recognize.ErrEmpty,
		"# nothing": recognize.ErrEmpty,
		"1 2\n3 4":  recognize.ErrIndex,
		"1 2\n1 4":  recognize.ErrIndex,
		"9223372036854775807 1\n-9223372036854775808 2": recognize.ErrIndex,
		"1 2 3":                                  recognize.ErrSyntax,
		"x 2":                                    recognize.ErrSyntax,
		"99999999999999999999 2":                 recognize.ErrSyntax,
		"1 2/3":                                  recognize.ErrNotInteger,
		strings.Repeat(" ", recognize.MaxText+1): recognize.ErrTooLarge,
	} {
		_, _, err := recognize.ReadIndexed(strings.NewReader(text))
		assert.ErrorIs(t, err, want, "%.30q", text)
	}
	var b strings.Builder
	for i := range recognize.MaxTerms + 1 {
		fmt.Fprintln(&b, i, 1)
	}
	_, _, err := recognize.ReadIndexed(strings.NewReader(b.String()))
	assert.ErrorIs(t, err, recognize.ErrTooLarge)
	broken := errors.New("broken")
	_, _, err = recognize.ReadIndexed(failing{broken})
	assert.ErrorIs(t, err, broken)
	assert.ErrorIs(t, sequenceOf(t, 1).WriteIndexed(failing{broken}, 0), broken)
	assert.ErrorIs(t, sequenceOf(t, 1).WriteIndexed(failing{broken}, math.MaxInt64), recognize.ErrTooLarge)
}

type failing struct{ err error }

func (f failing) Read([]byte) (int, error)  { return 0, f.err }
func (f failing) Write([]byte) (int, error) { return 0, f.err }

func TestNewSequenceRefuses(t *testing.T) {
	_, err := recognize.NewSequence()
	assert.ErrorIs(t, err, recognize.ErrEmpty)
	_, err = recognize.NewSequence(big.NewInt(1), nil)
	assert.ErrorIs(t, err, recognize.ErrEmpty)
	_, err = recognize.NewSequence(make([]*big.Int, recognize.MaxTerms+1)...)
	assert.ErrorIs(t, err, recognize.ErrTooLarge)
	_, err = recognize.NewSequence(new(big.Int).Lsh(big.NewInt(1), recognize.MaxBits))
	assert.ErrorIs(t, err, recognize.ErrTooLarge)
}

func TestSequencesShowAndShareNothing(t *testing.T) {
	a := []*big.Int{big.NewInt(1), new(big.Int).Lsh(big.NewInt(1), 200)}
	s := must(recognize.NewSequence(a...))(t)
	want := s.String()
	a[0].SetInt64(-9)
	s.Term(0).SetInt64(-9)
	s.Terms()[1].SetInt64(-9)
	assert.Equal(t, want, s.String())
	assert.Equal(t, want, fmt.Sprintf("%s", s))
	assert.Contains(t, fmt.Sprintf("%v", s), "digits")
	assert.Equal(t, 2, s.Len())
	assert.Zero(t, s.Term(-1).Sign()+s.Term(2).Sign())
	var zero recognize.Sequence
	assert.Equal(t, "", zero.String())
	assert.Zero(t, zero.Len())

	// Arguments are kept, and results are fresh.
	x, y, z := big.NewInt(1), big.NewInt(3), big.NewInt(13)
	set := must(recognize.Weights(x, y, z))(t)
	text := set.String()
	set.Weight(farey.One).SetInt64(-9)
	x.SetInt64(-9)
	y.SetInt64(-9)
	assert.Equal(t, "13", z.String())
	assert.Equal(t, "k₀ any, k∞ = 1, k₁ = 1", text)
	assert.Equal(t, text, set.String())
	numbers := ints(2, 5)
	found := must(recognize.Families(t.Context(), numbers, recognize.Options{Weight: 1}))(t)
	assert.Equal(t, "[2 5]", fmt.Sprint(numbers))
	assert.NotEmpty(t, found)
	fib := sequenceOf(t, 1, 2, 5, 13, 34)
	m := must(fib.Fans(t.Context(), recognize.Options{}))(t).Matches[0]
	must(m.Term(2))(t).SetInt64(-9)
	assert.NoError(t, m.Check(t.Context(), fib))
}

func TestVerdictTexts(t *testing.T) {
	assert.Equal(t, "not enough terms to decide found none Verdict(9)",
		fmt.Sprint(recognize.Undecided, " ", recognize.Found, " ", recognize.None, " ", recognize.Verdict(9)))
	_, err := recognize.Families(t.Context(), []*big.Int{new(big.Int).Neg(new(big.Int).Lsh(big.NewInt(1), 300))}, recognize.Options{})
	assert.ErrorIs(t, err, orbifold.ErrNotPositive)
	assert.Contains(t, err.Error(), "91 digits")
}
