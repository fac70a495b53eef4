package contfrac_test

import (
	"fmt"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// minusQuotients is the Euclidean algorithm with the quotients rounded up.
func minusQuotients(p, q *big.Int) []*big.Int {
	x, y := new(big.Int).Set(p), new(big.Int).Set(q)
	var terms []*big.Int
	for y.Sign() != 0 {
		t := new(big.Int).Div(new(big.Int).Neg(x), y)
		t.Neg(t)
		terms = append(terms, t)
		x, y = y, new(big.Int).Sub(new(big.Int).Mul(t, y), x)
	}
	return terms
}

// fewTwos draws fractions whose minus form is short enough to be written.
func fewTwos() *rapid.Generator[contfrac.Fraction] {
	return rapid.Custom(func(t *rapid.T) contfrac.Fraction {
		terms := []*big.Int{integer(200).Draw(t, "first")}
		for i := range rapid.IntRange(0, 20).Draw(t, "more") {
			n := big.NewInt(rapid.Int64Range(1, 30).Draw(t, "term"))
			if i%2 == 1 {
				n = positive().Draw(t, "even term")
			}
			terms = append(terms, n)
		}
		f, err := contfrac.NewFraction(terms...)
		if err != nil {
			t.Fatal(err)
		}
		return f
	})
}

func TestMinusIsTheEuclideanAlgorithmRoundedUp(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fewTwos().Draw(t, "fraction")
		m, err := f.Minus()
		require.NoError(t, err)
		want, err := contfrac.NewMinus(minusQuotients(f.Ratio())...)
		require.NoError(t, err)
		require.Equal(t, want, m)
		require.True(t, want.Equal(m))
		require.Len(t, m.Terms(), m.Len())
	})
}

func TestMinusAndFractionAreInverse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fewTwos().Draw(t, "fraction")
		m, err := f.Minus()
		require.NoError(t, err)
		require.Equal(t, f.Canonical(), m.Fraction())
		p, q := f.Ratio()
		p2, q2 := m.Ratio()
		same(t, p, p2)
		same(t, q, q2)
		r, err := m.Rat()
		require.NoError(t, err)
		require.Zero(t, r.Cmp(new(big.Rat).SetFrac(p, q)))
	})
}

func TestMinusTermsAreKept(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		terms := rapid.SliceOfN(rapid.Int64Range(2, 5), 0, 30).Draw(t, "terms")
		if len(terms) > 0 {
			terms[0] -= rapid.Int64Range(0, 10).Draw(t, "less")
		}
		m, err := contfrac.MinusOf(terms...)
		require.NoError(t, err)
		again, err := m.Fraction().Minus()
		require.NoError(t, err)
		require.Equal(t, m, again)
		i := 0
		for _, n := range m.All() {
			require.Equal(t, terms[i], n.Int64())
			i++
		}
		require.Len(t, terms, i)
	})
}

func TestKnownMinusExpansions(t *testing.T) {
	for _, known := range []struct {
		p, q   int64
		text   string
		source string
	}{
		// n/(n−1) is n−1 twos and n/1 is n: the cyclic quotient singularities A and
		// 1/n(1, 1) (common practice).
		{6, 5, "[[2; 2, 2, 2, 2]]", "common practice"},
		{6, 1, "[[6]]", "common practice"},
		{7, 5, "[[2; 2, 3]]", "2 − 1/(2 − 1/3)"},
		{-1, 2, "[[0; 2]]", "0 − 1/2"},
		{-5, 2, "[[-2; 2]]", "−2 − 1/2"},
		{9, 4, "[[3; 2, 2, 2]]", "3 − 3/4"},
	} {
		m, err := contfrac.FromRat(big.NewRat(known.p, known.q)).Minus()
		require.NoError(t, err)
		assert.Equal(t, known.text, m.String(), known.source)
	}
}

func TestMinusRefusesTermsOutOfRange(t *testing.T) {
	for _, terms := range [][]*big.Int{{nil}, ints(1, 1), ints(2, 2, 0), ints(2, 3, -4)} {
		m, err := contfrac.NewMinus(terms...)
		assert.ErrorIs(t, err, contfrac.ErrTerm)
		assert.Zero(t, m)
	}
	_, err := contfrac.MinusOf(2, 1)
	assert.ErrorIs(t, err, contfrac.ErrTerm)
}

func TestMinusRefusesTooManyTerms(t *testing.T) {
	f, err := contfrac.FractionOf(0, contfrac.MaxTerms)
	require.NoError(t, err)
	m, err := f.Minus() // 1 and MaxTerms − 1 twos
	require.NoError(t, err)
	assert.Equal(t, contfrac.MaxTerms, m.Len())
	assert.Equal(t, f, m.Fraction())
	assert.Equal(t, fmt.Sprintf("[[1; 2, 2, 2, 2, 2, …, 2, 2, 2, 2, 2, 2]] (%d terms)", contfrac.MaxTerms), fmt.Sprint(m))
	for _, hostile := range []string{fmt.Sprintf("[0; %d]", contfrac.MaxTerms+1), "[0; 9223372036854775807, 1, 9223372036854775807]", "[0; 1" + fmt.Sprintf("%0200d", 0) + "]"} {
		f, err := contfrac.ParseFraction(hostile)
		require.NoError(t, err)
		_, err = f.Minus()
		assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	}
}

func TestEmptyMinusIsOneOverZero(t *testing.T) {
	var m contfrac.Minus
	assert.Equal(t, contfrac.Fraction{}, m.Fraction())
	again, err := contfrac.Fraction{}.Minus()
	require.NoError(t, err)
	assert.Equal(t, m, again)
	_, err = m.Rat()
	assert.ErrorIs(t, err, contfrac.ErrInfinite)
	assert.Equal(t, "[[]]", fmt.Sprint(m))
}
