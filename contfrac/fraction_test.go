package contfrac_test

import (
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// value is the definition: a₀ + 1/(a₁ + 1/(…)), from the end, and false for 1/0.
func value(terms []*big.Int) (*big.Rat, bool) {
	r, finite := new(big.Rat), false
	for i := len(terms) - 1; i >= 0; i-- {
		t := new(big.Rat).SetInt(terms[i])
		if finite {
			t.Add(t, r.Inv(r))
		}
		r, finite = t, true
	}
	return r, finite
}

// quotients is the Euclidean algorithm, one division after the other.
func quotients(p, q *big.Int) []*big.Int {
	x, y := new(big.Int).Set(p), new(big.Int).Set(q)
	var terms []*big.Int
	for y.Sign() != 0 {
		t, r := new(big.Int), new(big.Int)
		t.DivMod(x, y, r)
		terms = append(terms, t)
		x, y = y, r
	}
	return terms
}

func TestRatIsTheValueOfTheTerms(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Draw(t, "fraction")
		r, err := f.Rat()
		want, finite := value(f.Terms())
		if !finite {
			require.ErrorIs(t, err, contfrac.ErrInfinite)
			return
		}
		require.NoError(t, err)
		require.Equal(t, want.String(), r.String())
		// The Rat is as good as one that math/big has put in lowest terms.
		require.Zero(t, r.Cmp(want))
		require.Equal(t, want.IsInt(), r.IsInt())
		require.Zero(t, new(big.Rat).Mul(r, big.NewRat(3, 7)).Cmp(new(big.Rat).Mul(want, big.NewRat(3, 7))))
	})
}

func TestRatioIsNumeratorAndDenominator(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Draw(t, "fraction")
		p, q := f.Ratio()
		same(t, p, f.Numerator())
		same(t, q, f.Denominator())
		same(t, big.NewInt(1), new(big.Int).GCD(nil, nil, new(big.Int).Abs(p), q))
	})
}

func TestFromRatInvertsRat(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Filter(func(f contfrac.Fraction) bool { return f.Len() > 0 }).Draw(t, "fraction")
		r, err := f.Rat()
		require.NoError(t, err)
		require.Equal(t, f.Canonical(), contfrac.FromRat(r))
	})
}

func TestConvergentsEndInTheFraction(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Draw(t, "fraction")
		terms := f.Terms()
		n := 0
		p0, q0 := big.NewInt(1), new(big.Int)
		for p, q := range f.Convergents() {
			n++
			want, _ := value(terms[:n])
			require.Equal(t, want.String(), p.String()+"/"+q.String())
			// pₖqₖ₋₁ − pₖ₋₁qₖ = (−1)^(k−1) (common practice), k = n−1 here.
			det := new(big.Int).Sub(new(big.Int).Mul(p, q0), new(big.Int).Mul(p0, q))
			same(t, big.NewInt(int64(n%2*4-2)/2*-1), det)
			p0, q0 = p, q
		}
		require.Equal(t, f.Len(), n)
		for range f.Convergents() {
			break
		}
		for range f.All() {
			break
		}
	})
}

func TestCanonicalAndSplitKeepTheValue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fraction().Filter(func(f contfrac.Fraction) bool { return f.Len() > 0 }).Draw(t, "fraction")
		c, s := f.Canonical(), f.Split()
		require.True(t, f.Equal(c) || f.Equal(s))
		require.False(t, c.Equal(s))
		require.Equal(t, c.Len()+1, s.Len())
		require.Equal(t, c, s.Canonical())
		require.Equal(t, s, c.Split())
		same(t, big.NewInt(1), s.Terms()[s.Len()-1])
		if terms := c.Terms(); len(terms) > 1 {
			require.Positive(t, terms[len(terms)-1].Cmp(big.NewInt(1)))
		}
		want, _ := value(f.Terms())
		for _, g := range []contfrac.Fraction{c, s} {
			got, _ := value(g.Terms())
			require.Zero(t, want.Cmp(got))
		}
	})
	assert.Equal(t, contfrac.Fraction{}, contfrac.Fraction{}.Canonical())
	assert.Equal(t, contfrac.Fraction{}, contfrac.Fraction{}.Split())
}

func TestReverseKeepsTheNumerator(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := word().Draw(t, "word").Fraction()
		r, err := f.Reverse()
		require.NoError(t, err)
		same(t, f.Numerator(), r.Numerator())
		again, err := r.Reverse()
		require.NoError(t, err)
		require.Equal(t, f, again)
	})
}

func TestReverseRefusesWhatIsNoFraction(t *testing.T) {
	for _, terms := range [][]int64{{0, 2}, {-3, 2, 5}} {
		f, err := contfrac.FractionOf(terms...)
		require.NoError(t, err)
		_, err = f.Reverse()
		assert.ErrorIs(t, err, contfrac.ErrTerm)
		_, err = f.Word()
		assert.ErrorIs(t, err, contfrac.ErrTerm)
	}
	f, err := contfrac.FractionOf(-3)
	require.NoError(t, err)
	r, err := f.Reverse()
	require.NoError(t, err)
	assert.Equal(t, f, r)
}

func TestWordAndFractionAreInverse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := word().Draw(t, "word")
		v, err := w.Fraction().Word()
		require.NoError(t, err)
		if first, ok := w.First(); ok && first == contfrac.L {
			v = v.Swap()
		}
		require.Equal(t, w, v)
		i := 0
		terms := w.Fraction().Terms()
		for _, n := range w.Runs() {
			same(t, n, terms[i])
			i++
		}
		require.Len(t, terms, i)
	})
}

func TestTermsOutOfRangeAreRefused(t *testing.T) {
	for _, terms := range [][]*big.Int{{nil}, {big.NewInt(1), nil}, ints(1, 0), ints(1, -2), ints(1, 2, 0, 4)} {
		f, err := contfrac.NewFraction(terms...)
		assert.ErrorIs(t, err, contfrac.ErrTerm)
		assert.Zero(t, f)
	}
	f, err := contfrac.FractionOf(3, 0)
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	assert.Zero(t, f)
	_, err = contfrac.FractionOf(-3, 1)
	assert.NoError(t, err)
}

func TestEmptyFractionIsOneOverZero(t *testing.T) {
	var f contfrac.Fraction
	assert.Equal(t, "1", f.Numerator().String())
	assert.Equal(t, "0", f.Denominator().String())
	assert.Equal(t, "[]", f.String())
	assert.Empty(t, f.Terms())
	w, err := f.Word()
	require.NoError(t, err)
	assert.True(t, w.IsEmpty())
}

func TestKnownExpansions(t *testing.T) {
	for _, known := range []struct {
		p, q   int64
		text   string
		source string
	}{
		{355, 113, "[3; 7, 16]", "convergent of π, [3; 7, 15, 1] of OEIS A001203"},
		{103993, 33102, "[3; 7, 15, 1, 292]", "OEIS A001203"},
		{1264, 465, "[2; 1, 2, 1, 1, 4, 1, 1, 6]", "OEIS A003417, e"},
		{-7, 3, "[-3; 1, 2]", "common practice: the first quotient is the floor"},
		{0, 1, "[0]", "common practice"},
		{5, 1, "[5]", "common practice"},
		{3, 7, "[0; 2, 3]", "common practice"},
	} {
		f := contfrac.FromRat(big.NewRat(known.p, known.q))
		assert.Equal(t, known.text, f.String(), known.source)
		assert.Equal(t, big.NewRat(known.p, known.q).Num().String(), f.Numerator().String(), known.source)
	}
}

func TestFractionIsShortenedByV(t *testing.T) {
	f, err := contfrac.ParseFraction("[-5; 1, 2]")
	require.NoError(t, err)
	assert.Equal(t, "[-5; 1, 2]", fmt.Sprint(f))
	f, err = contfrac.ParseFraction("[-5; 1" + strings.Repeat(", 2", 99) + ", 1" + strings.Repeat("0", 50) + "]")
	require.NoError(t, err)
	assert.Equal(t, "[-5; 1, 2, 2, 2, 2, …, 2, 2, 2, 2, 2, 100000000000…000000000000 (51 digits)] (102 terms)", fmt.Sprint(f))
	assert.Len(t, fmt.Sprintf("%s", f), 6+99*3+2+51+1)
}
