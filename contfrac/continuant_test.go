package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// continuant is the definition, term by term.
func continuant(terms []*big.Int) *big.Int {
	before, k := new(big.Int), big.NewInt(1)
	for _, t := range terms {
		before, k = k, before.Add(before, new(big.Int).Mul(k, t))
	}
	return k
}

// fibonacci doubles: F(2n) = F(n)(2F(n+1) − F(n)), F(2n+1) = F(n)² + F(n+1)².
func fibonacci(n int) (f, next *big.Int) {
	if n == 0 {
		return new(big.Int), big.NewInt(1)
	}
	a, b := fibonacci(n / 2)
	c := new(big.Int).Lsh(b, 1)
	c.Mul(c.Sub(c, a), a)
	d := new(big.Int).Add(new(big.Int).Mul(a, a), new(big.Int).Mul(b, b))
	if n%2 == 0 {
		return c, d
	}
	return d, c.Add(c, d)
}

func TestContinuantFollowsItsRecurrence(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			terms := list(rapid.OneOf(positive(), integer(100)), 0, 150).Draw(t, "terms")
			same(t, continuant(terms), contfrac.Continuant(terms))
		})
	})
}

func TestContinuantIsSymmetric(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		terms := list(integer(70), 0, 40).Draw(t, "terms")
		back := make([]*big.Int, len(terms))
		for i, n := range terms {
			back[len(terms)-1-i] = n
		}
		same(t, contfrac.Continuant(terms), contfrac.Continuant(back))
	})
}

func TestContinuantSplits(t *testing.T) {
	// K(u v) = K(u)K(v) + K(u without its last)K(v without its first) (common
	// practice; "Concrete Mathematics", 1994, section 6.7).
	rapid.Check(t, func(t *rapid.T) {
		terms := list(integer(70), 2, 40).Draw(t, "terms")
		m := rapid.IntRange(1, len(terms)-1).Draw(t, "cut")
		k := contfrac.Continuant
		want := new(big.Int).Mul(k(terms[:m]), k(terms[m:]))
		want.Add(want, new(big.Int).Mul(k(terms[:m-1]), k(terms[m+1:])))
		same(t, want, k(terms))
	})
}

func TestContinuantOfOnesIsFibonacci(t *testing.T) {
	ones := make([]*big.Int, 30000)
	for i := range ones {
		ones[i] = big.NewInt(1)
	}
	// OEIS A000045 (memory): F(10) = 55, F(50) = 12586269025, F(100).
	for n, known := range map[int]string{9: "55", 49: "12586269025", 99: "354224848179261915075"} {
		assert.Equal(t, known, contfrac.Continuant(ones[:n]).String())
	}
	atThresholds(t, func(t *testing.T) {
		for _, n := range []int{0, 1, 2, 3, 89, 90, 91, 92, 93, 94, 1000, 1500, 30000} {
			_, next := fibonacci(n)
			same(t, next, contfrac.Continuant(ones[:n]))
		}
	})
}

func TestContinuantTakesNilForZero(t *testing.T) {
	same(t, big.NewInt(7+5), contfrac.Continuant([]*big.Int{big.NewInt(7), nil, big.NewInt(5)}))
	same(t, new(big.Int), contfrac.Continuant([]*big.Int{nil}))
	same(t, big.NewInt(1), contfrac.Continuant(nil))
}

func TestFractionsOfLargeTermsAreContinuants(t *testing.T) {
	// Terms about the size of a word, of a leaf, and far past both.
	var terms []*big.Int
	for i := range 400 {
		n := pseudorandom(1+i%70, uint64(i))
		if i%50 == 7 {
			n = pseudorandom(3000, uint64(i))
		}
		terms = append(terms, n)
	}
	f, err := contfrac.NewFraction(terms...)
	require.NoError(t, err)
	atThresholds(t, func(t *testing.T) {
		same(t, continuant(terms), f.Numerator())
		p, q := f.Ratio()
		same(t, continuant(terms), p)
		same(t, continuant(terms[1:]), q)
	})
}
