package linear_test

import (
	"context"
	"fmt"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold/linear"
)

// rats draws rational numbers: zero, units, small, large.
func rats() *rapid.Generator[*big.Rat] {
	return rapid.Custom(func(t *rapid.T) *big.Rat {
		num := rapid.OneOf(rapid.Int64Range(-2, 2), rapid.Int64Range(-20, 20), rapid.Int64()).Draw(t, "numerator")
		den := rapid.OneOf(rapid.Just(int64(1)), rapid.Int64Range(1, 9), rapid.Int64Range(1, 1<<62)).Draw(t, "denominator")
		return big.NewRat(num, den)
	})
}

func polynomials(degree int) *rapid.Generator[linear.Polynomial] {
	return rapid.Custom(func(t *rapid.T) linear.Polynomial {
		return linear.NewPolynomial(rapid.SliceOfN(rats(), 0, degree+1).Draw(t, "coefficients")...)
	})
}

func TestEvaluationIsMultiplicative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := polynomials(5).Draw(t, "p"), polynomials(5).Draw(t, "q")
		x := rats().Draw(t, "x")
		product := p.Mul(q)
		assert.Zero(t, product.Eval(x).Cmp(new(big.Rat).Mul(p.Eval(x), q.Eval(x))))
		if p.Degree() >= 0 && q.Degree() >= 0 {
			assert.Equal(t, p.Degree()+q.Degree(), product.Degree())
		} else {
			assert.Equal(t, -1, product.Degree())
		}
		assert.True(t, product.Equal(q.Mul(p)))
	})
}

// TestFactorsMultiplyBack: the factors, with their multiplicities, make the
// polynomial up to its leading coefficient.
func TestFactorsMultiplyBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := linear.PolynomialOf(1)
		for _, q := range rapid.SliceOfN(polynomials(2), 1, 3).Draw(t, "parts") {
			if q.Degree() >= 0 {
				p = p.Mul(q)
			}
			if q.Degree() >= 0 && rapid.Bool().Draw(t, "twice") {
				p = p.Mul(q)
			}
		}
		for range rapid.IntRange(0, 2).Draw(t, "ones") {
			p = p.Mul(linear.PolynomialOf(-1, 1))
		}
		product := linear.PolynomialOf(1)
		for _, f := range p.Factors() {
			assert.Positive(t, f.Polynomial.Degree())
			assert.Equal(t, "1/1", f.Polynomial.Coefficient(f.Polynomial.Degree()).String(), "monic")
			for range f.Multiplicity {
				product = product.Mul(f.Polynomial)
			}
		}
		lead := linear.NewPolynomial(p.Coefficient(p.Degree()))
		assert.True(t, p.Equal(product.Mul(lead)), "%v from %v", p, p.Factors())
	})
}

func TestFactorsOfKnownPolynomials(t *testing.T) {
	for _, x := range []struct {
		p    linear.Polynomial
		want string
	}{
		{linear.Polynomial{}, "[]"},
		{linear.PolynomialOf(7), "[]"},
		{linear.PolynomialOf(0, 0, 2), "[{x 2 true}]"},
		{linear.PolynomialOf(-1, 0, 1), "[{x − 1 1 true} {x + 1 1 true}]"},
		{linear.PolynomialOf(1, -3, 1), "[{x² − 3x + 1 1 true}]"},
		{linear.PolynomialOf(6, -5, 1), "[{x − 3 1 true} {x − 2 1 true}]"},
		{linear.PolynomialOf(1, 0, 2, 0, 1), "[{x² + 1 2 true}]"},
		{linear.PolynomialOf(-2, 0, 0, 1), "[{x³ − 2 1 false}]"},
		{linear.PolynomialOf(-1, 4), "[{x − 1/4 1 true}]"},
	} {
		assert.Equal(t, x.want, fmt.Sprint(x.p.Factors()), "%v", x.p)
	}
}

func TestPolynomialTexts(t *testing.T) {
	p := linear.NewPolynomial(big.NewRat(-1, 2), nil, big.NewRat(3, 4), big.NewRat(-1, 1), big.NewRat(1, 1))
	assert.Equal(t, "x⁴ − x³ + 3/4·x² − 1/2", p.String())
	assert.Equal(t, "z⁴ − z³ + 3/4·z² − 1/2", p.Text("z"))
	assert.Equal(t, "0", linear.Polynomial{}.String())
	assert.Equal(t, "−x", linear.PolynomialOf(0, -1, 0).String())
	assert.False(t, p.IsIntegral())
	assert.True(t, linear.PolynomialOf(1, 2).IsIntegral())
	assert.Equal(t, "-1/2", p.Eval(nil).RatString())
	assert.Equal(t, "0", p.Coefficient(-1).RatString())
	assert.Equal(t, "0", p.Coefficient(5).RatString())
	huge := linear.NewPolynomial(new(big.Rat).SetInt(new(big.Int).Exp(big.NewInt(10), big.NewInt(60), nil)))
	assert.Contains(t, fmt.Sprintf("%v", huge), "digits")
	assert.Len(t, fmt.Sprintf("%s", huge), 61)
	assert.False(t, p.Equal(huge))
	assert.False(t, p.Equal(linear.PolynomialOf(0, 0, 0, 0, 2)))
}

// TestRecurrenceTermsCheck: the terms that a recurrence gives are accepted, and no
// longer when one is changed.
func TestRecurrenceTermsCheck(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := rapid.IntRange(1, 4).Draw(t, "order")
		coefficients := rapid.SliceOfN(rapid.Int64Range(-5, 5), d, d).Draw(t, "coefficients")
		p := linear.PolynomialOf(append(coefficients, 1)...)
		initial := make([]*big.Int, d)
		for i := range initial {
			initial[i] = big.NewInt(rapid.Int64().Draw(t, "term"))
		}
		r := must(linear.NewRecurrence(p, initial...))(t)
		var terms []*big.Int
		for a := range r.Terms() {
			terms = append(terms, new(big.Int).Set(a.Num()))
			if len(terms) == 15 {
				break
			}
		}
		require.NoError(t, r.Check(terms))
		i := rapid.IntRange(0, 14).Draw(t, "changed")
		terms[i].Add(terms[i], big.NewInt(1))
		assert.ErrorIs(t, r.Check(terms), linear.ErrNotRecurrent)
		// The generating function: numerator = denominator times the series.
		g := r.GeneratingFunction()
		terms[i].Sub(terms[i], big.NewInt(1))
		series := make([]*big.Rat, len(terms))
		for j, a := range terms {
			series[j] = new(big.Rat).SetInt(a)
		}
		product := g.Denominator().Mul(linear.NewPolynomial(series...))
		for j := range 15 {
			assert.Zero(t, g.Numerator().Coefficient(j).Cmp(product.Coefficient(j)), "coefficient %d of %v", j, g)
		}
		assert.Equal(t, "1", g.Denominator().Coefficient(0).RatString())
	})
}

func TestRecurrenceTexts(t *testing.T) {
	r := must(linear.NewRecurrence(linear.PolynomialOf(-1, 6, -6, 1), big.NewInt(1), big.NewInt(1), big.NewInt(3)))(t)
	assert.Equal(t, "a(n) = 6·a(n−1) − 6·a(n−2) + a(n−3)", r.String())
	assert.Equal(t, r.String(), fmt.Sprintf("%v", r))
	assert.Equal(t, r.String(), fmt.Sprintf("%s", r))
	g := r.GeneratingFunction()
	assert.Equal(t, "(1 − 5x + 3x²)/(1 − 6x + 6x² − x³)", g.String())
	assert.Equal(t, g.String(), fmt.Sprintf("%s", g))
	assert.Equal(t, g.String(), fmt.Sprintf("%v", g))
	half := must(linear.NewRecurrence(linear.PolynomialOf(-1, 2), big.NewInt(8)))(t)
	assert.Equal(t, "a(n) = 1/2·a(n−1)", half.String())
	assert.NoError(t, half.Check([]*big.Int{big.NewInt(8), big.NewInt(4), big.NewInt(2)}))
	ended, cancel := context.WithCancel(t.Context())
	cancel()
	assert.ErrorIs(t, half.CheckContext(ended, []*big.Int{big.NewInt(8)}), context.Canceled)
	assert.Error(t, half.Check([]*big.Int{big.NewInt(8), big.NewInt(4), big.NewInt(3)}))
	// A recurrence that is not minimal has its generating function in lowest terms.
	long := must(linear.NewRecurrence(linear.PolynomialOf(1, -3, 1).Mul(linear.PolynomialOf(-2, 1)), big.NewInt(1), big.NewInt(1), big.NewInt(2)))(t)
	short := must(linear.NewRecurrence(linear.PolynomialOf(1, -3, 1), big.NewInt(1), big.NewInt(1)))(t)
	assert.True(t, short.GeneratingFunction().Equal(long.GeneratingFunction()))
}

func TestZeroRecurrence(t *testing.T) {
	var r linear.Recurrence
	assert.Equal(t, "a(n) = 0", r.String())
	assert.Equal(t, 0, r.Order())
	assert.Equal(t, "1", r.Characteristic().String())
	assert.Equal(t, "0", r.GeneratingFunction().String())
	assert.NoError(t, r.Check([]*big.Int{new(big.Int), new(big.Int)}))
	assert.ErrorIs(t, r.Check([]*big.Int{new(big.Int), big.NewInt(1)}), linear.ErrNotRecurrent)
	assert.ErrorIs(t, r.Check([]*big.Int{nil}), linear.ErrNotRecurrent)
	n := 0
	for a := range r.Terms() {
		assert.Zero(t, a.Sign())
		if n++; n == 5 {
			break
		}
	}
	var g linear.RationalFunction
	assert.Equal(t, "0", g.String())
	assert.True(t, g.Equal(r.GeneratingFunction()))
}

func TestNewRecurrenceErrors(t *testing.T) {
	_, err := linear.NewRecurrence(linear.Polynomial{})
	assert.ErrorIs(t, err, linear.ErrRecurrence)
	_, err = linear.NewRecurrence(linear.PolynomialOf(1, 1))
	assert.ErrorIs(t, err, linear.ErrRecurrence)
	_, err = linear.NewRecurrence(linear.PolynomialOf(1, 1), nil)
	assert.ErrorIs(t, err, linear.ErrRecurrence)
}

// TestArgumentsAreCopied changes what polynomials and recurrences were made of.
func TestArgumentsAreCopied(t *testing.T) {
	c, first := big.NewRat(5, 3), big.NewInt(4)
	p := linear.NewPolynomial(c, big.NewRat(1, 1))
	q := must(linear.NewRecurrence(p, first))(t)
	text := fmt.Sprint(p, q, q.Initial())
	c.SetInt64(-99)
	first.SetInt64(-99)
	assert.Equal(t, text, fmt.Sprint(p, q, q.Initial()))
}

// TestResultsAreFresh spoils what polynomials, recurrences and rational
// functions hand out.
func TestResultsAreFresh(t *testing.T) {
	r := must(linear.NewRecurrence(linear.PolynomialOf(1, -3, 1), big.NewInt(1), big.NewInt(2)))(t)
	g := r.GeneratingFunction()
	want := fmt.Sprint(r, r.Initial(), g)
	bad := big.NewRat(-99, 7)
	for _, p := range []linear.Polynomial{r.Characteristic(), g.Numerator(), g.Denominator()} {
		p.Coefficient(0).Set(bad)
		p.Eval(bad).Set(bad)
		for _, c := range p.Coefficients() {
			c.Set(bad)
		}
	}
	for _, a := range r.Initial() {
		a.SetInt64(-99)
	}
	for a := range r.Terms() {
		a.Set(bad)
		break
	}
	assert.Equal(t, want, fmt.Sprint(r, r.Initial(), g))
}

// must unwraps a result whose error would end the test.
func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}
