package recognize_test

import (
	"context"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold/linear"
	"example.com/onecusp/orbifold/recognize"
)

// plainLength is the slow twin of the search for recurrences: the least L for
// which a_n + c₁·a_{n−1} + … + c_L·a_{n−L} = 0, L ≤ n < len(a), has a rational solution,
// by elimination.
func plainLength(a []*big.Int) int {
	for length := range len(a) {
		var rows [][]*big.Rat
		for n := length; n < len(a); n++ {
			row := make([]*big.Rat, length+1)
			for i := range row {
				row[i] = new(big.Rat).SetInt(a[n-length+i])
			}
			rows = append(rows, row) // the last column is the right side
		}
		if solvable(rows, length) {
			return length
		}
	}
	return len(a)
}

// solvable tells whether a system of linear equations with n unknowns has a
// solution; the right sides stand last.
func solvable(rows [][]*big.Rat, n int) bool {
	rank := 0
	for col := 0; col <= n && rank < len(rows); col++ {
		pivot := -1
		for i := rank; i < len(rows); i++ {
			if rows[i][col].Sign() != 0 {
				pivot = i
				break
			}
		}
		if pivot < 0 {
			continue
		}
		if col == n {
			return false
		}
		rows[rank], rows[pivot] = rows[pivot], rows[rank]
		for i := rank + 1; i < len(rows); i++ {
			f := new(big.Rat).Quo(rows[i][col], rows[rank][col])
			for j := col; j <= n; j++ {
				rows[i][j] = new(big.Rat).Sub(rows[i][j], new(big.Rat).Mul(f, rows[rank][j]))
			}
		}
		rank++
	}
	return true
}

// recurrentTerms draws sequences with a recurrence, with a start that does not
// follow it, and with none.
func recurrentTerms() *rapid.Generator[[]*big.Int] {
	return rapid.Custom(func(t *rapid.T) []*big.Int {
		n := rapid.IntRange(1, 14).Draw(t, "terms")
		d := rapid.IntRange(0, 4).Draw(t, "order")
		small := rapid.OneOf(rapid.Int64Range(-2, 2), rapid.Int64Range(-1000, 1000), rapid.Int64())
		c := rapid.SliceOfN(rapid.Int64Range(-5, 5), d, d).Draw(t, "coefficients")
		free := d + rapid.SampledFrom([]int{0, 0, 1, 2, n}).Draw(t, "terms before it holds")
		// A constant term makes rational coefficients of a shifted sequence.
		divide := rapid.SampledFrom([]int64{1, 1, 2, 3}).Draw(t, "denominator")
		a := make([]*big.Int, n)
		for i := range a {
			a[i] = new(big.Int)
			if i < free {
				a[i].SetInt64(small.Draw(t, "term"))
				continue
			}
			for j, x := range c {
				a[i].Add(a[i], new(big.Int).Mul(big.NewInt(x), a[i-1-j]))
			}
			if q, r := new(big.Int).QuoRem(a[i], big.NewInt(divide), new(big.Int)); r.Sign() == 0 {
				a[i] = q
			}
		}
		return a
	})
}

func TestRecurrenceTwin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := recurrentTerms().Draw(t, "terms")
		r := must(must(recognize.NewSequence(a...))(t).Recurrence(context.Background()))(t)
		length := plainLength(a)
		if 2*length >= len(a) {
			assert.Equal(t, recognize.Undecided, r.Verdict)
			assert.Zero(t, r.Surplus)
			return
		}
		require.Equal(t, recognize.Found, r.Verdict)
		assert.Equal(t, length, r.Rule.Order())
		assert.Equal(t, len(a)-2*length, r.Surplus)
		assert.NoError(t, r.Rule.Check(a))
	})
}

// TestRecurrenceOfFansIsTheFansOwn compares what the terms tell with what the
// theorem says.
func TestRecurrenceOfFansIsTheFansOwn(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := progressions(4).Draw(t, "progression")
		s := must(recognize.NewSequence(p.terms(t, 9)...))(t)
		r := must(s.Recurrence(context.Background()))(t)
		require.Equal(t, recognize.Found, r.Verdict)
		want := must(p.fan.Recurrence(p.step))(t)
		assert.Equal(t, want.Characteristic().String(), r.Rule.Characteristic().String())
		assert.True(t, want.GeneratingFunction().Equal(r.Rule.GeneratingFunction()))
		assert.Equal(t, 9-2*want.Order(), r.Surplus)
	})
}

// TestRecurrenceWithLargeRationalCoefficients needs many primes.
func TestRecurrenceWithLargeRationalCoefficients(t *testing.T) {
	var never context.Context // nil: it does not end
	rapid.Check(t, func(t *rapid.T) {
		// a(n) = p/q·a(n−1) from a multiple of a power of q.
		digits := rapid.SampledFrom([]uint{1, 30, 62, 100, 400}).Draw(t, "bits")
		q := new(big.Int).Add(new(big.Int).Lsh(big.NewInt(1), digits), big.NewInt(rapid.Int64Range(1, 1000).Draw(t, "q")))
		p := new(big.Int).Add(q, big.NewInt(1))
		var a []*big.Int
		for i := range int64(4) {
			x := new(big.Int).Exp(p, big.NewInt(i), nil)
			a = append(a, x.Mul(x, new(big.Int).Exp(q, big.NewInt(3-i), nil)))
		}
		r := must(must(recognize.NewSequence(a...))(t).Recurrence(never))(t)
		require.Equal(t, recognize.Found, r.Verdict)
		assert.Equal(t, 1, r.Rule.Order())
		assert.Zero(t, r.Rule.Characteristic().Coefficient(0).Cmp(new(big.Rat).SetFrac(new(big.Int).Neg(p), q)))
	})
}

func TestRecurrenceOfKnownSequences(t *testing.T) {
	for _, x := range []struct {
		terms []int64
		want  string
	}{
		{[]int64{0, 0, 0}, "a(n) = 0"},
		{[]int64{7, 7, 7}, "a(n) = a(n−1)"},
		{[]int64{1, 2, 4}, "a(n) = 2·a(n−1)"},
		{[]int64{0, 1, 1, 2, 3}, "a(n) = a(n−1) + a(n−2)"}, // OEIS A000045
		{[]int64{0, 1, 4, 9, 16, 25, 36}, "a(n) = 3·a(n−1) − 3·a(n−2) + a(n−3)"},
		{[]int64{9, 1, 2, 4, 8, 16}, "a(n) = 2·a(n−1)"},           // from n = 2 on: order 2
		{[]int64{1, 1, 2, 5, 13, 34}, "a(n) = 3·a(n−1) − a(n−2)"}, // OEIS A001519
	} {
		r := must(sequenceOf(t, x.terms...).Recurrence(context.Background()))(t)
		require.Equal(t, recognize.Found, r.Verdict, x.want)
		assert.Equal(t, x.want, r.Rule.String())
	}
	// The Markov numbers themselves, OEIS A002559, follow no short recurrence.
	r := must(sequenceOf(t, 1, 2, 5, 13, 29, 34, 89, 169, 194, 233, 433, 610, 985, 1325, 1597, 2897, 4181).Recurrence(context.Background()))(t)
	assert.Equal(t, recognize.Undecided, r.Verdict)
}

func TestRecurrenceStopsAndRefuses(t *testing.T) {
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	_, err := sequenceOf(t, 1, 2, 3, 4).Recurrence(ctx)
	assert.ErrorIs(t, err, context.Canceled)
	_, err = recognize.Sequence{}.Recurrence(t.Context())
	assert.ErrorIs(t, err, recognize.ErrEmpty)
}

// TestFactorsOfAFoundRecurrence: a sum of a fan and a power of two still factors
// as far as its parts go.
func TestFactorsOfAFoundRecurrence(t *testing.T) {
	var a []*big.Int
	f, g := [2]int64{1, 1}, int64(1)
	for range 9 {
		a = append(a, big.NewInt(f[0]+g))
		f, g = [2]int64{f[1], 3*f[1] - f[0]}, 2*g
	}
	r := must(must(recognize.NewSequence(a...))(t).Recurrence(t.Context()))(t)
	require.Equal(t, recognize.Found, r.Verdict)
	factors := r.Rule.Characteristic().Factors()
	require.Len(t, factors, 1)
	assert.False(t, factors[0].Irreducible)
	assert.True(t, factors[0].Polynomial.Equal(linear.PolynomialOf(1, -3, 1).Mul(linear.PolynomialOf(-2, 1))))
}
