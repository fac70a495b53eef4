package orbifold_test

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/linear"
)

// fanTerms returns y₀, y_step, y_{2·step}, … .
func fanTerms(t require.TestingT, f orbifold.Fan, step int64, n int) []*big.Int {
	terms := make([]*big.Int, n)
	for i := range terms {
		terms[i] = must(f.Term(big.NewInt(int64(i) * step)))(t)
	}
	return terms
}

func TestFanRecurrenceHolds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		step := rapid.OneOf(rapid.Just(int64(1)), rapid.Int64Range(-5, -1), rapid.Int64Range(1, 5)).Draw(t, "step")
		r := must(f.Recurrence(step))(t)
		assert.NoError(t, r.Check(fanTerms(t, f, step, 12)))
	})
}

// TestFanRecurrenceIsMinimal: the Hankel matrix of as many rows as the order is
// not singular, so that no shorter recurrence holds.
func TestFanRecurrenceIsMinimal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		step := rapid.OneOf(rapid.Just(int64(1)), rapid.Int64Range(-3, -1), rapid.Int64Range(1, 3)).Draw(t, "step")
		d := must(f.Recurrence(step))(t).Order()
		terms := fanTerms(t, f, step, 2*d)
		assert.NotZero(t, hankel(terms, d).Sign(), "%v, step %d, order %d", f, step, d)
	})
}

// hankel returns the determinant of (a_{i+j}), 0 ≤ i, j < d, by permutations.
func hankel(a []*big.Int, d int) *big.Int {
	sum := new(big.Int)
	var place func(row int, used uint, sign int64, product *big.Int)
	place = func(row int, used uint, sign int64, product *big.Int) {
		if row == d {
			sum.Add(sum, new(big.Int).Mul(product, big.NewInt(sign)))
			return
		}
		s := sign
		for col := range d {
			if used>>col&1 == 1 {
				continue
			}
			place(row+1, used|1<<col, s, new(big.Int).Mul(product, a[row+col]))
			s = -s // the column passed stays for a later row: one inversion
		}
	}
	place(0, 0, 1, big.NewInt(1))
	return sum
}

func TestFanRecurrenceOrders(t *testing.T) {
	for _, x := range []struct {
		weights string
		step    int64
		want    string
	}{
		{"0,0,0", 1, "x² − 3x + 1"},
		{"5,0,0", 1, "x² − 3x + 1"}, // the weight of the centre does not count where N = 1
		{"0,1,1", 1, "x³ − 6x² + 6x − 1"},
		{"0,1,0", 1, "x⁴ − 4x³ + 4x − 1"},
		{"0,1,0", 2, "x³ − 15x² + 15x − 1"},
		{"0,1,1", -2, "x³ − 24x² + 24x − 1"},
		{"0,0,0", 3, "x² − 18x + 1"},
	} {
		f := must(must(orbifold.Parse(x.weights))(t).Fan(farey.Slope{}, farey.MustParse("1/0")))(t)
		assert.Equal(t, x.want, must(f.Recurrence(x.step))(t).Characteristic().String(), x.weights)
	}
}

func TestFanCharacteristicPolynomialsFactor(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		p := must(f.Recurrence(rapid.Int64Range(1, 4).Draw(t, "step")))(t).Characteristic()
		product := linear.PolynomialOf(1)
		for _, x := range p.Factors() {
			assert.True(t, x.Irreducible)
			assert.Equal(t, 1, x.Multiplicity)
			product = product.Mul(x.Polynomial)
		}
		assert.Equal(t, p.String(), product.String())
	})
}

// TestClosedFormTwin compares the closed form with the number at the slope.
func TestClosedFormTwin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		form := must(f.ClosedForm())(t)
		n := rapid.OneOf(rapid.Int64Range(-3, 3), rapid.Int64Range(-300, 300)).Draw(t, "n")
		assertEqualInt(t, must(f.Term(big.NewInt(n)))(t), must(form.Term(n))(t), "%v at %d", f, n)
	})
}

func TestClosedFormRestsAtASolution(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		e, o := must(f.ClosedForm())(t).Resting()
		even, odd := f.Weights()
		n := new(big.Rat).SetInt(must(f.Family().Number(f.Centre()))(t))
		trace := new(big.Rat).SetInt(must(f.Trace())(t))
		for _, x := range []struct {
			here, there *big.Rat
			c           int64
		}{{e, o, even}, {o, e, odd}} {
			// 2·there = t·here − c·N
			right := new(big.Rat).Mul(trace, x.here)
			right.Sub(right, new(big.Rat).Mul(n, new(big.Rat).SetInt64(x.c)))
			assert.Zero(t, right.Cmp(new(big.Rat).Add(x.there, x.there)))
		}
	})
}

func TestClosedFormLimits(t *testing.T) {
	var zero orbifold.ClosedForm
	assertEqualInt(t, big.NewInt(34), must(zero.Term(5))(t))
	assert.Equal(t, "α·λⁿ + α′·λ⁻ⁿ with α = 1/2 − 1/10·√5, λ = (3 + √5)/2", zero.String())
	assert.True(t, zero.Unit().Equal(must(contfrac.SurdOf(3, 5, 2))(t)))
	a, b := zero.Alpha()
	assert.Equal(t, "1/2 -1/10", a.String()+" "+b.String())
	for _, n := range []int64{math.MaxInt64, math.MinInt64, 1 << 40} {
		_, err := zero.Term(n)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	}
	small := must(must(orbifold.Family{}.WithLimit(100).Fan(farey.Slope{}, farey.MustParse("1/0")))(t).ClosedForm())(t)
	_, err := small.Term(100)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = must(orbifold.Family{}.WithLimit(100).Fan(farey.Slope{}, farey.MustParse("1/0")))(t).Recurrence(200)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
}

func TestClosedFormTexts(t *testing.T) {
	f := orbifold.MustNew(0, 1, 1)
	assert.Contains(t, must(must(f.Fan(farey.Slope{}, farey.MustParse("1/0")))(t).ClosedForm())(t).String(), ", e = 1/3")
	g := orbifold.MustNew(0, 1, 0)
	form := must(must(g.Fan(farey.Slope{}, farey.MustParse("1/0")))(t).ClosedForm())(t)
	assert.Contains(t, form.String(), "e = 1/3 for even n, 1/6 for odd n")
	far := must(must(g.Fan(farey.MustParse("7/1000"), farey.MustParse("1/143")))(t).ClosedForm())(t)
	assert.Contains(t, fmt.Sprintf("%v", far), "digits")
	assert.Equal(t, far.String(), fmt.Sprintf("%s", far))
}

// TestRatioIsTheLimit: y_{n+1}/y_n comes close to λ far out, in both
// directions, and 1/λ is the conjugate.
func TestRatioIsTheLimit(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		lambda := must(f.Ratio())(t)
		lo, hi, err := lambda.Enclosure(64)
		require.NoError(t, err)
		slack := big.NewFloat(1e-9)
		for _, d := range []int64{1, -1} {
			y0 := new(big.Float).SetInt(must(f.Term(big.NewInt(60 * d)))(t))
			y1 := new(big.Float).SetInt(must(f.Term(big.NewInt(61 * d)))(t))
			q := y1.Quo(y1, y0)
			assert.Negative(t, new(big.Float).Sub(lo, slack).Cmp(q))
			assert.Positive(t, new(big.Float).Add(hi, slack).Cmp(q))
		}
	})
}

// TestLucasAgainstSteps is the slow twin of Lucas.
func TestLucasAgainstSteps(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := big.NewInt(rapid.OneOf(rapid.Int64Range(-4, 4), rapid.Int64()).Draw(t, "t"))
		n := rapid.Uint64Range(0, 60).Draw(t, "n")
		u, v := [2]*big.Int{new(big.Int), big.NewInt(1)}, [2]*big.Int{big.NewInt(2), x}
		for range n {
			u[0], u[1] = u[1], new(big.Int).Sub(new(big.Int).Mul(x, u[1]), u[0])
			v[0], v[1] = v[1], new(big.Int).Sub(new(big.Int).Mul(x, v[1]), v[0])
		}
		gotU, gotV, err := orbifold.Lucas(n, x)
		require.NoError(t, err)
		assertEqualInt(t, u[0], gotU)
		assertEqualInt(t, v[0], gotV)
	})
}

func TestLucasBounds(t *testing.T) {
	_, _, err := orbifold.Lucas(math.MaxUint64, big.NewInt(3))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, _, err = orbifold.Lucas(2, new(big.Int).Lsh(big.NewInt(1), 1<<29))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	u, v, err := orbifold.Lucas(math.MaxUint64, big.NewInt(2))
	require.NoError(t, err)
	assert.Equal(t, "18446744073709551615 2", fmt.Sprint(u, v))
	u, v, err = orbifold.Lucas(3, nil)
	require.NoError(t, err)
	assert.Equal(t, "-1 0", fmt.Sprint(u, v))
}

// TestFanTypesShareNothing spoils what the types round fans hand out and what
// they were made of.
func TestFanTypesShareNothing(t *testing.T) {
	f := fanAt(t, orbifold.MustNew(2, 0, 1), farey.MustParse("2/5"), 3)
	form := must(f.ClosedForm())(t)
	lambda := must(f.Ratio())(t)
	show := func() string {
		return fmt.Sprint(f, form, lambda, form.Unit(), f.Waist(), must(f.Term(big.NewInt(3)))(t))
	}
	want := show()
	bad := big.NewRat(-99, 7)
	a, b := form.Alpha()
	a.Set(bad)
	b.Set(bad)
	e, o := form.Resting()
	e.Set(bad)
	o.Set(bad)
	n := big.NewInt(3)
	for _, x := range []*big.Int{f.Waist(), must(f.Term(n))(t), must(f.Trace())(t), must(form.Term(3))(t), must(f.TermMod(n, big.NewInt(7)))(t)} {
		x.SetInt64(-99)
	}
	i, _ := f.Index(f.Slope(n))
	i.SetInt64(-99)
	assert.Equal(t, "3", n.String(), "an argument was changed")
	assert.Equal(t, want, show())
}

// TestRatioAndAlphaSatisfyTheirEquations: λ² − tλ + 1 = 0, and twice the rational part of
// α is y₀ less the resting part.
func TestRatioAndAlphaSatisfyTheirEquations(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		form, trace := must(f.ClosedForm())(t), must(f.Trace())(t)
		lambda := must(f.Ratio())(t)
		assert.True(t, lambda.Equal(form.Unit()))
		// λ = (P + √D)/Q in lowest terms: its trace 2P/Q is t and its norm 1.
		p, q := lambda.P(), lambda.Q()
		assertEqualInt(t, new(big.Int).Mul(trace, q), new(big.Int).Lsh(p, 1))
		norm := new(big.Int).Mul(p, p)
		assertEqualInt(t, new(big.Int).Mul(q, q), norm.Sub(norm, lambda.D()))
		a, _ := form.Alpha()
		even, _ := form.Resting()
		a.Add(a, a).Add(a, even)
		assert.Zero(t, a.Cmp(new(big.Rat).SetInt(must(f.Term(new(big.Int)))(t))))
	})
}

func TestLucasKeepsItsArgument(t *testing.T) {
	x := big.NewInt(12)
	u, v, err := orbifold.Lucas(1, x)
	require.NoError(t, err)
	u.SetInt64(-99)
	v.SetInt64(-99)
	assert.Equal(t, "12", x.String())
}
