package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// checkExpansion compares FromRatio with one division after the other.
func checkExpansion(t require.TestingT, p, q *big.Int) {
	f, err := contfrac.FromRatio(p, q)
	require.NoError(t, err)
	want, err := contfrac.NewFraction(quotients(p, q)...)
	require.NoError(t, err)
	require.True(t, want == f, "%v / %v: want %v, got %v", contfrac.Abbreviate(p), contfrac.Abbreviate(q), want, f)
}

func TestFromRatioIsTheEuclideanAlgorithm(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			p := integer(3000).Draw(t, "p")
			q := natural(3000).Filter(func(n *big.Int) bool { return n.Sign() > 0 }).Draw(t, "q")
			checkExpansion(t, p, q)
		})
	})
}

// term draws quotients of all shapes: ones, small ones, and some around the
// word, half word and window sizes or of thousands of bits.
func term() *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		switch rapid.IntRange(0, 20).Draw(t, "kind") {
		case 0:
			return pseudorandom(rapid.IntRange(1, 3000).Draw(t, "bits"), rapid.Uint64().Draw(t, "seed"))
		case 1:
			return pseudorandom(rapid.SampledFrom([]int{30, 31, 32, 33, 61, 62, 63, 64, 65, 128}).Draw(t, "bits"), rapid.Uint64().Draw(t, "seed"))
		case 2, 3, 4, 5:
			return big.NewInt(rapid.Int64Range(1, 50).Draw(t, "small"))
		}
		return big.NewInt(1)
	})
}

func TestExpansionsOfBuiltRatiosReturnTheirTerms(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			f, err := contfrac.NewFraction(list(term(), 1, 400).Draw(t, "terms")...)
			require.NoError(t, err)
			// A common factor must change nothing.
			g := pseudorandom(rapid.IntRange(1, 300).Draw(t, "bits"), rapid.Uint64().Draw(t, "seed"))
			p, q := f.Ratio()
			got, err := contfrac.FromRatio(p.Mul(p, g), q.Mul(q, g))
			require.NoError(t, err)
			require.True(t, f.Canonical() == got, "want %v, got %v", f.Canonical(), got)
		})
	})
}

func TestLargeExpansions(t *testing.T) {
	// Past all sizes at which the algorithm changes, with the thresholds as
	// they are: random, nearly equal, Fibonacci, powers of two and huge quotients.
	f, next := fibonacci(40_000)
	one := big.NewInt(1)
	power := func(n uint) *big.Int { return new(big.Int).Lsh(one, n) }
	r := pseudorandom(20_000, 1)
	for _, ratio := range [][2]*big.Int{
		{pseudorandom(30_000, 2), pseudorandom(30_000, 3)},
		{pseudorandom(30_000, 4), pseudorandom(17_000, 5)},
		{pseudorandom(3_000, 4), pseudorandom(30_000, 5)},
		{next, f},
		{f, next},
		{r, new(big.Int).Sub(r, one)},
		{r, new(big.Int).Add(r, one)},
		{r, r},
		{power(30_000), new(big.Int).Sub(power(15_000), one)},
		{power(30_000), new(big.Int).Add(power(29_000), one)},
		{new(big.Int).Mul(r, r), new(big.Int).Add(new(big.Int).Mul(r, pseudorandom(10_000, 6)), one)},
		{new(big.Int).Neg(r), pseudorandom(15_000, 7)},
	} {
		checkExpansion(t, ratio[0], ratio[1])
	}
	// Quotients of a third of the numbers defeat the halving.
	third, err := contfrac.NewFraction(pseudorandom(9_000, 8), pseudorandom(9_000, 9), pseudorandom(9_000, 10))
	require.NoError(t, err)
	checkExpansion(t, third.Numerator(), third.Denominator())
}

func TestFromRatioInLowestTermsOrNot(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := integer(200).Draw(t, "p"), integer(200).Draw(t, "q")
		f, err := contfrac.FromRatio(p, q)
		switch {
		case q.Sign() == 0 && p.Sign() == 0:
			require.ErrorIs(t, err, contfrac.ErrInfinite)
		case q.Sign() == 0:
			require.NoError(t, err)
			require.Equal(t, contfrac.Fraction{}, f)
		default:
			require.NoError(t, err)
			require.Equal(t, contfrac.FromRat(new(big.Rat).SetFrac(p, q)), f)
			require.Equal(t, f.Canonical(), f)
		}
	})
}

func TestFromRatioTakesNilForZero(t *testing.T) {
	_, err := contfrac.FromRatio(nil, nil)
	assert.ErrorIs(t, err, contfrac.ErrInfinite)
	f, err := contfrac.FromRatio(nil, big.NewInt(3))
	require.NoError(t, err)
	assert.Equal(t, "[0]", f.String())
	f, err = contfrac.FromRatio(big.NewInt(3), nil)
	require.NoError(t, err)
	assert.Equal(t, "[]", f.String())
	assert.Equal(t, "[0]", contfrac.FromRat(nil).String())
	assert.Equal(t, "[0]", contfrac.FromRat(new(big.Rat)).String())
}

func TestFromRatTakesARatThatIsNotNormal(t *testing.T) {
	r := big.NewRat(1, 2)
	r.Num().SetInt64(-12)
	r.Denom().SetInt64(8)
	assert.Equal(t, "[-2; 2]", contfrac.FromRat(r).String())
}
