package contfrac_test

import (
	"context"
	"math/big"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// naiveTerms returns the first n terms of x by floors and reciprocals.
func naiveTerms(t require.TestingT, x contfrac.Surd, n int) []string {
	var terms []string
	for range n {
		a := x.Floor()
		terms = append(terms, a.String())
		var err error
		x, err = x.Apply(contfrac.NewMatrix(nil, big.NewInt(1), big.NewInt(1), a.Neg(a))) // 1/(x − a)
		require.NoError(t, err)
	}
	return terms
}

func firstTerms(x contfrac.Periodic, n int) []string {
	var terms []string
	for i, a := range x.All() {
		if i == n {
			break
		}
		terms = append(terms, a.String())
	}
	return terms
}

func TestExpansionIsThatByFloorsAndReciprocals(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := surd().Draw(t, "x")
		p, err := x.Periodic()
		require.NoError(t, err)
		n := min(60, p.Pre().Len()+2*p.Period().Len())
		assert.Equal(t, naiveTerms(t, x, n), firstTerms(p, n))
		prefix, err := p.Prefix(n)
		require.NoError(t, err)
		for i, a := range prefix.All() {
			assert.Equal(t, firstTerms(p, n)[i], a.String())
		}
		assert.Equal(t, n, prefix.Len())
	})
}

func TestExpansionAndBackIsTheSurd(t *testing.T) {
	for _, bits := range []int{61, 0} {
		defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
		rapid.Check(t, func(t *rapid.T) {
			x := surd().Draw(t, "x")
			p, err := x.Periodic()
			require.NoError(t, err)
			assert.True(t, x.Equal(p.Surd()), "%v %v", p, p.Surd())
		})
	}
}

func TestSurdAndBackIsThePeriodicFraction(t *testing.T) {
	for _, bits := range []int{61, 0} {
		defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
		rapid.Check(t, func(t *rapid.T) {
			x := periodic().Draw(t, "x")
			y, err := x.Surd().Periodic()
			require.NoError(t, err)
			assert.Equal(t, x, y)
		})
	}
}

func TestPeriodicIsTheSequenceOfItsParts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		given := parts().Draw(t, "parts")
		x, err := contfrac.NewPeriodic(given.parts())
		require.NoError(t, err)
		var want []string
		for _, a := range given.pre.Terms() {
			want = append(want, a.String())
		}
		for len(want) < 150 {
			for _, a := range given.period.Terms() {
				want = append(want, a.String())
			}
		}
		assert.Equal(t, want, firstTerms(x, len(want)))
	})
}

// By trying all shorter parts.
func TestPeriodicPartsAreTheShortest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := periodic().Draw(t, "x")
		pre, period := x.Pre().Len(), x.Period().Len()
		n := pre + 3*period
		terms := firstTerms(x, n)
		repeats := func(from, length int) bool {
			for i := from; i+length < n; i++ {
				if terms[i] != terms[i+length] {
					return false
				}
			}
			return true
		}
		require.True(t, repeats(pre, period))
		for length := 1; length < period; length++ {
			require.False(t, repeats(pre, length))
		}
		if pre > 0 {
			require.False(t, repeats(pre-1, period))
		}
	})
}

func TestPeriodicConvergentsAreThoseOfThePrefixes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := periodic().Draw(t, "x")
		n := rapid.IntRange(1, 60).Draw(t, "n")
		prefix, err := x.Prefix(n)
		require.NoError(t, err)
		i := 0
		for p, q := range x.Convergents() {
			if i++; i == n {
				wantP, wantQ := prefix.Ratio()
				same(t, wantP, p)
				same(t, wantQ, q)
				break
			}
			p.SetInt64(17) // the iterator keeps nothing that it hands out
			q.SetInt64(18)
		}
		for i, a := range x.All() {
			if i == 40 {
				break
			}
			a.SetInt64(19)
		}
		again, err := x.Prefix(n)
		require.NoError(t, err)
		assert.Equal(t, prefix, again)
	})
}

// "Démonstration d'un théorème sur les fractions continues périodiques",
// Annales de Mathématiques 19 (1828).
func TestReducedIsWithoutPreperiodAndTheConjugateRunsBackwards(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := surd().Draw(t, "x")
		p, err := x.Periodic()
		require.NoError(t, err)
		require.Equal(t, x.IsReduced(), p.Pre().Len() == 0)
		pure, err := contfrac.NewPeriodic(contfrac.Fraction{}, p.Period())
		require.NoError(t, err)
		back, err := pure.Surd().Conjugate().Apply(contfrac.NewMatrix(nil, big.NewInt(-1), big.NewInt(1), nil))
		require.NoError(t, err)
		q, err := back.Periodic()
		require.NoError(t, err)
		reversed, err := p.Period().Reverse()
		require.NoError(t, err)
		assert.Equal(t, reversed, q.Period())
		assert.Zero(t, q.Pre().Len())
	})
}

func TestEquivalentIsUnderMatricesOfDeterminantOneOrMinusOne(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := surd().Draw(t, "x")
		y, err := x.Apply(unimodular().Draw(t, "m"))
		require.NoError(t, err)
		p, err := x.Periodic()
		require.NoError(t, err)
		q, err := y.Periodic()
		require.NoError(t, err)
		assert.True(t, p.Equivalent(q))
		assert.True(t, q.Equivalent(p))
		// Another period is another class.
		other := periodic().Draw(t, "other")
		rotations := map[contfrac.Periodic]bool{}
		terms := other.Period().Terms()
		for i := range terms {
			f, err := contfrac.NewFraction(append(append([]*big.Int{}, terms[i:]...), terms[:i]...)...)
			require.NoError(t, err)
			r, err := contfrac.NewPeriodic(contfrac.Fraction{}, f)
			require.NoError(t, err)
			rotations[r] = true
		}
		pure, err := contfrac.NewPeriodic(contfrac.Fraction{}, p.Period())
		require.NoError(t, err)
		assert.Equal(t, rotations[pure], p.Equivalent(other))
	})
}

// The period of √n, n ≤ 100, by a second method: the common terms of two
// rational numbers with √n between them, up to the first term 2⌊√n⌋.
func TestPeriodsOfSquareRootsUpTo100(t *testing.T) {
	scale := new(big.Int).Lsh(big.NewInt(1), 400)
	for n := int64(2); n <= 100; n++ {
		lo := new(big.Int).Lsh(big.NewInt(n), 800)
		lo.Sqrt(lo)
		if square(big.NewInt(n)) {
			continue
		}
		f, err := contfrac.FromRatio(lo, scale)
		require.NoError(t, err)
		g, err := contfrac.FromRatio(new(big.Int).Add(lo, big.NewInt(1)), scale)
		require.NoError(t, err)
		var period []*big.Int
		a, b := f.Terms(), g.Terms()
		for i := 1; ; i++ {
			require.Zero(t, a[i].Cmp(b[i]), "enough digits")
			period = append(period, a[i])
			if a[i].Cmp(new(big.Int).Lsh(a[0], 1)) == 0 {
				break
			}
		}
		want, err := contfrac.NewFraction(period...)
		require.NoError(t, err)
		x, err := contfrac.SurdOf(0, n, 1)
		require.NoError(t, err)
		p, err := x.Periodic()
		require.NoError(t, err)
		assert.Equal(t, want, p.Period(), "√%d", n)
		same(t, a[0], p.Pre().Terms()[0])
	}
}

// Any number theory handbook (memory).
func TestPeriodOfTheRootOf94(t *testing.T) {
	x, err := contfrac.SurdOf(0, 94, 1)
	require.NoError(t, err)
	p, err := x.Periodic()
	require.NoError(t, err)
	assert.Equal(t, "[9; (1, 2, 3, 1, 1, 5, 1, 8, 1, 5, 1, 1, 3, 2, 1, 18)]", p.String())
}

func TestLagrangeIsTheGreatestSumOfTailsForwardsAndBackwards(t *testing.T) {
	for _, bits := range []int{61, 0} {
		defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
		rapid.Check(t, func(t *rapid.T) {
			x := surd().Draw(t, "x")
			p, err := x.Periodic()
			require.NoError(t, err)
			terms := p.Period().Terms()
			n := len(terms)
			if n > 40 {
				return
			}
			var most *big.Float
			for i := range n {
				tail := func(start, step int) *big.Float { // [b; b', …] along the circle
					var around []*big.Int
					for j := range n {
						around = append(around, terms[((start+step*j)%n+n)%n])
					}
					f, err := contfrac.NewFraction(around...)
					require.NoError(t, err)
					y, err := contfrac.NewPeriodic(contfrac.Fraction{}, f)
					require.NoError(t, err)
					return real(y.Surd())
				}
				sum := tail(i, 1)
				back := tail(i-1+n, -1)
				sum.Add(sum, back.Quo(big.NewFloat(1).SetPrec(2000), back))
				if most == nil || sum.Cmp(most) > 0 {
					most = sum
				}
			}
			l, err := x.Lagrange()
			require.NoError(t, err)
			near(t, most, real(l))
		})
	}
}

// "An Introduction to Diophantine Approximation", Cambridge 1957, ch. II: the
// first Lagrange values √5, √8, √221/5, √1517/13 (memory).
func TestLagrangeOfTheFirstMarkovForms(t *testing.T) {
	for text, want := range map[string][2]int64{
		"[(1)]": {5, 1}, "[(2)]": {8, 1}, "[(2; 2, 1, 1)]": {221, 5}, "[(2; 2, 1, 1, 1, 1)]": {1517, 13},
	} {
		p, err := contfrac.ParsePeriodic(text)
		require.NoError(t, err)
		l, err := p.Surd().Lagrange()
		require.NoError(t, err)
		w, err := contfrac.SurdOf(0, want[0], want[1])
		require.NoError(t, err)
		assert.True(t, w.Equal(l), "%s: %v", text, l)
	}
}

func TestPeriodicRefuses(t *testing.T) {
	one, err := contfrac.FractionOf(1)
	require.NoError(t, err)
	for _, bad := range []string{"[]", "[0]", "[-1; 2]", "[0; 1]"} {
		f, err := contfrac.ParseFraction(bad)
		require.NoError(t, err)
		_, err = contfrac.NewPeriodic(one, f)
		assert.ErrorIs(t, err, contfrac.ErrTerm, bad)
	}
	_, err = contfrac.Periodic{}.Prefix(-1)
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	_, err = contfrac.Periodic{}.Prefix(contfrac.MaxTerms + 1)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	none, err := contfrac.Periodic{}.Prefix(0)
	require.NoError(t, err)
	assert.Zero(t, none.Len())
}

func TestLongPeriodsAreRefused(t *testing.T) {
	x := surdOf(t, new(big.Int), pseudorandom(100, 1), big.NewInt(1))
	y := surdOf(t, new(big.Int), pseudorandom(300, 1), big.NewInt(1))
	ended, cancel := context.WithCancel(context.Background())
	cancel()
	check := func(want error, ctx context.Context) {
		for _, x := range []contfrac.Surd{x, y} {
			_, err := x.PeriodicContext(ctx)
			assert.ErrorIs(t, err, want)
			_, err = x.LagrangeContext(ctx)
			assert.ErrorIs(t, err, want)
			_, err = x.Form().MinimumContext(ctx)
			assert.ErrorIs(t, err, want)
			_, err = x.Form().AutomorphContext(ctx)
			assert.ErrorIs(t, err, want)
			_, _, err = x.Form().EquivalentContext(ctx, x.Conjugate().Form())
			assert.ErrorIs(t, err, want)
		}
	}
	check(context.Canceled, ended)
	terms, bytes := contfrac.SetPeriodLimits(1000, contfrac.MaxBits)
	check(contfrac.ErrTooLarge, context.Background())
	check(contfrac.ErrTooLarge, nil)
	contfrac.SetPeriodLimits(terms, 1000)
	_, err := y.Periodic()
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	_, err = x.Periodic()
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	contfrac.SetPeriodLimits(terms, bytes)

	soon, cancel := context.WithTimeout(context.Background(), 20*time.Millisecond)
	defer cancel()
	start := time.Now()
	_, err = x.LagrangeContext(soon)
	assert.ErrorIs(t, err, context.DeadlineExceeded)
	_, err = y.LagrangeContext(soon)
	assert.ErrorIs(t, err, context.DeadlineExceeded)
	assert.Less(t, time.Since(start), time.Second)
}

func TestPeriodAtTheLimitIsFollowed(t *testing.T) {
	x, err := contfrac.SurdOf(0, 94, 1) // 1 term and a period of 16
	require.NoError(t, err)
	for _, bits := range []int{61, 0} {
		defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
		terms, bytes := contfrac.SetPeriodLimits(17, contfrac.MaxBits)
		_, err = x.Periodic()
		assert.NoError(t, err)
		contfrac.SetPeriodLimits(16, bytes)
		_, err = x.Periodic()
		assert.ErrorIs(t, err, contfrac.ErrTooLarge)
		contfrac.SetPeriodLimits(terms, bytes)
	}
}
