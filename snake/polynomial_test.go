package snake_test

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// integers draws integers biased to 0, ±1 and limb boundaries.
func integers() *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		n := new(big.Int).Lsh(big.NewInt(1), rapid.SampledFrom([]uint{0, 1, 31, 32, 63, 64, 128}).Draw(t, "bits"))
		n.Add(n, big.NewInt(rapid.Int64Range(-2, 2).Draw(t, "offset")))
		if rapid.Bool().Draw(t, "negative") {
			n.Neg(n)
		}
		return n
	})
}

func polynomials() *rapid.Generator[snake.Polynomial] {
	return rapid.Custom(func(t *rapid.T) snake.Polynomial {
		return snake.NewPolynomial(rapid.SliceOfN(rapid.OneOf(integers(), rapid.Just(new(big.Int))), 0, 6).Draw(t, "coefficients")...)
	})
}

func laurents() *rapid.Generator[snake.Laurent] {
	return rapid.Custom(func(t *rapid.T) snake.Laurent {
		var p snake.Laurent
		for range rapid.IntRange(0, 4).Draw(t, "terms") {
			m, err := snake.NewLaurent(integers().Draw(t, "coefficient"), rapid.SliceOfN(rapid.IntRange(-2, 2), 0, 3).Draw(t, "exponents")...)
			require.NoError(t, err)
			p = p.Add(m)
		}
		return p
	})
}

// semiringLaws is the suite that every semiring must pass.
func semiringLaws[T any](t *testing.T, name string, r snake.Semiring[T], elements *rapid.Generator[T], equal func(a, b T) bool) {
	t.Run(name, rapid.MakeCheck(func(t *rapid.T) {
		a, b, c := elements.Draw(t, "a"), elements.Draw(t, "b"), elements.Draw(t, "c")
		same := func(law string, x, y T) { require.True(t, equal(x, y), "%s: %v and %v", law, x, y) }
		same("addition commutes", r.Add(a, b), r.Add(b, a))
		same("addition associates", r.Add(r.Add(a, b), c), r.Add(a, r.Add(b, c)))
		same("zero", r.Add(a, r.Zero()), a)
		same("multiplication commutes", r.Mul(a, b), r.Mul(b, a))
		same("multiplication associates", r.Mul(r.Mul(a, b), c), r.Mul(a, r.Mul(b, c)))
		same("one", r.Mul(a, r.One()), a)
		same("distributes", r.Mul(a, r.Add(b, c)), r.Add(r.Mul(a, b), r.Mul(a, c)))
		same("zero annihilates", r.Mul(a, r.Zero()), r.Zero())
	}))
}

func TestSemiringLaws(t *testing.T) {
	semiringLaws(t, "integers", snake.Integers{}, integers(), sameInt)
	for _, m := range []int64{1, 2, 12, math.MaxInt64} {
		r, err := snake.NewModular(big.NewInt(m))
		require.NoError(t, err)
		residues := rapid.Map(integers(), func(a *big.Int) *big.Int { return new(big.Int).Mod(a, big.NewInt(m)) })
		semiringLaws(t, fmt.Sprint("modulo ", m), r, residues, sameInt)
	}
	semiringLaws(t, "zero modulus", snake.Modular{}, rapid.Just(new(big.Int)), sameInt)
	small := rapid.Map(rapid.IntRange(-50, 50), func(x int) float64 { return float64(x) }) // exact in float64
	semiringLaws(t, "floats", snake.Floats{}, small, func(a, b float64) bool { return a == b })
	semiringLaws(t, "max plus", snake.MaxPlus{}, rapid.OneOf(small, rapid.Just(math.Inf(-1))), func(a, b float64) bool { return a == b })
	semiringLaws(t, "booleans", snake.Booleans{}, rapid.Bool(), func(a, b bool) bool { return a == b })
	semiringLaws(t, "polynomials", snake.Polynomials{}, polynomials(), snake.Polynomial.Equal)
	semiringLaws(t, "laurent polynomials", snake.Laurents{}, laurents(), snake.Laurent.Equal)
}

func TestModularRefuses(t *testing.T) {
	for _, m := range []*big.Int{nil, new(big.Int), big.NewInt(-3)} {
		_, err := snake.NewModular(m)
		assert.ErrorIs(t, err, snake.ErrModulus)
	}
	assert.Equal(t, big.NewInt(1), snake.Modular{}.Modulus())
	r, err := snake.NewModular(big.NewInt(7))
	require.NoError(t, err)
	assert.Equal(t, big.NewInt(7), r.Modulus())
	assert.Equal(t, big.NewInt(5), r.Add(big.NewInt(-2), nil))
	assert.Zero(t, snake.Integers{}.Mul(nil, big.NewInt(3)).Sign())
}

// Evaluation is a homomorphism, whichever way the product is made.
func TestPolynomialEvaluationIsMultiplicative(t *testing.T) {
	for _, limit := range []int{0, 1 << 24, math.MaxInt} {
		restore := snake.SetPackedLimit(limit)
		rapid.Check(t, func(t *rapid.T) {
			p, o, q := polynomials().Draw(t, "p"), polynomials().Draw(t, "o"), integers().Draw(t, "q")
			require.Equal(t, new(big.Int).Mul(p.Eval(q), o.Eval(q)).String(), p.Mul(o).Eval(q).String())
			require.Equal(t, new(big.Int).Add(p.Eval(q), o.Eval(q)).String(), p.Add(o).Eval(q).String())
			require.Equal(t, p.Degree() >= 0 && o.Degree() >= 0, p.Mul(o).Degree() == p.Degree()+o.Degree() && p.Mul(o).Degree() >= 0)
		})
		restore()
	}
}

// The product coefficient by coefficient.
func TestPolynomialProductIsConvolution(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, o := polynomials().Draw(t, "p"), polynomials().Draw(t, "o")
		product := p.Mul(o)
		for k := -1; k <= 13; k++ {
			want := new(big.Int)
			for i := range 14 {
				want.Add(want, new(big.Int).Mul(p.Coefficient(i), o.Coefficient(k-i)))
			}
			require.Equal(t, want.String(), product.Coefficient(k).String())
		}
		require.True(t, snake.NewPolynomial(product.Coefficients()...).Equal(product))
		one := snake.Polynomials{}.One()
		require.False(t, product.Add(one).Equal(product))
	})
}

// A few enormous coefficients among many zeros must not be packed.
func TestPolynomialProductTakesLittleMemory(t *testing.T) {
	c := make([]*big.Int, 1<<15)
	c[0] = new(big.Int).Lsh(big.NewInt(1), 1<<20)
	c[len(c)-1] = big.NewInt(-1)
	p := snake.NewPolynomial(c...) // packed: 2¹⁵ fields of 2²¹ bits, 8 GiB
	square := p.Mul(p)
	assert.Equal(t, 2*(len(c)-1), square.Degree())
	assert.Equal(t, 1<<21+1, square.Coefficient(0).BitLen())
	assert.Equal(t, -1, square.Coefficient(len(c)-1).Sign())
}

func TestPolynomialText(t *testing.T) {
	n := func(x ...int64) []*big.Int {
		c := make([]*big.Int, len(x))
		for i := range x {
			c[i] = big.NewInt(x[i])
		}
		return c
	}
	for want, c := range map[string][]*big.Int{
		"0":               nil,
		"1":               n(1, 0),
		"-1":              n(-1),
		"q":               n(0, 1),
		"-q + q^2":        n(0, -1, 1),
		"1 + 2q - 3q^2":   n(1, 2, -3),
		"-5 + q^3":        n(-5, 0, 0, 1),
		"-5 - q + 10q^10": n(-5, -1, 0, 0, 0, 0, 0, 0, 0, 0, 10),
	} {
		p := snake.NewPolynomial(c...)
		assert.Equal(t, want, p.String())
		assert.Equal(t, want, fmt.Sprintf("%v", p))
		assert.Equal(t, fmt.Sprintf("%q", want), fmt.Sprintf("%q", p))
	}
	long := make([]*big.Int, 40)
	for i := range long {
		long[i] = new(big.Int).Lsh(big.NewInt(1), 4000)
	}
	p := snake.NewPolynomial(long...)
	assert.Greater(t, len(p.String()), 40*1200)
	assert.Less(t, len(fmt.Sprintf("%v", p)), 1500)
	assert.Contains(t, fmt.Sprintf("%v", p), "…")
}

func TestPower(t *testing.T) {
	p, err := snake.Power(3)
	require.NoError(t, err)
	assert.Equal(t, "q^3", p.String())
	for _, e := range []int{-1, snake.MaxDegree + 1, math.MaxInt} {
		_, err = snake.Power(e)
		assert.ErrorIs(t, err, snake.ErrIndex)
	}
}

// Evaluation of Laurent polynomials is a homomorphism.
func TestLaurentEvaluationIsMultiplicative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, o := laurents().Draw(t, "p"), laurents().Draw(t, "o")
		x := make([]*big.Rat, 3)
		for i := range x {
			x[i] = big.NewRat(rapid.Int64Range(1, 9).Draw(t, "numerator")*2-9, rapid.Int64Range(1, 9).Draw(t, "denominator"))
		}
		value := func(p snake.Laurent) *big.Rat {
			v, err := p.Eval(x...)
			require.NoError(t, err)
			return v
		}
		require.Equal(t, new(big.Rat).Mul(value(p), value(o)).String(), value(p.Mul(o)).String())
		require.Equal(t, new(big.Rat).Add(value(p), value(o)).String(), value(p.Add(o)).String())
	})
}

// At x1 = 0 a sum without negative exponents of x1 has the value of the monomials
// that x1 does not occur in.
func TestLaurentValueAtZeroDropsTheVariable(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var p, rest snake.Laurent
		for range rapid.IntRange(0, 8).Draw(t, "monomials") {
			e := []int{rapid.IntRange(0, 2).Draw(t, "e1"), rapid.IntRange(-3, 3).Draw(t, "e2")}
			m, err := snake.NewLaurent(big.NewInt(rapid.Int64Range(-9, 9).Draw(t, "c")), e...)
			require.NoError(t, err)
			p = p.Add(m)
			if e[0] == 0 {
				rest = rest.Add(m)
			}
		}
		x := big.NewRat(rapid.Int64Range(1, 9).Draw(t, "x2"), 7)
		got, err := p.Eval(new(big.Rat), x)
		require.NoError(t, err)
		want, err := rest.Eval(nil, x)
		require.NoError(t, err)
		require.Equal(t, want.String(), got.String())
	})
}

// The terms are the coefficients, in falling order, none of them 0.
func TestLaurentTerms(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := laurents().Draw(t, "p").Mul(laurents().Draw(t, "o"))
		var sum snake.Laurent
		n := 0
		for e, c := range p.Terms() {
			require.NotZero(t, c.Sign())
			require.Equal(t, c, p.Coefficient(e...))
			m, err := snake.NewLaurent(c, e...)
			require.NoError(t, err)
			sum = sum.Add(m)
			n++
		}
		require.Equal(t, p.Len(), n)
		require.True(t, sum.Equal(p))
		minus, err := snake.NewLaurent(big.NewInt(-1))
		require.NoError(t, err)
		require.Zero(t, p.Add(p.Mul(minus)).Len())
		require.Zero(t, p.Coefficient(50, 50).Sign())
	})
}

func TestLaurentText(t *testing.T) {
	m := func(c int64, e ...int) snake.Laurent {
		p, err := snake.NewLaurent(big.NewInt(c), e...)
		require.NoError(t, err)
		return p
	}
	assert.Equal(t, "0", snake.Laurent{}.String())
	assert.Equal(t, "1", m(1).String())
	assert.Equal(t, "x1^2*x2^-1 + 2*x2 - 3", m(1, 2, -1).Add(m(2, 0, 1)).Add(m(-3)).String())
	assert.Equal(t, "-x3", m(-1, 0, 0, 1).String())
	assert.Equal(t, `"x1"`, fmt.Sprintf("%q", m(1, 1, 0)))
	x, err := snake.Variable(3)
	require.NoError(t, err)
	assert.True(t, m(1, 0, 0, 1).Equal(x))
	long := snake.Laurent{}
	for i := range 40 {
		long = long.Add(m(7, i))
	}
	assert.Contains(t, fmt.Sprintf("%v", long), "…")
	assert.Less(t, len(fmt.Sprintf("%v", long)), len(long.String()))
}

func TestLaurentRefuses(t *testing.T) {
	for _, n := range []int{-1, 0, snake.MaxVariables + 1, math.MaxInt} {
		_, err := snake.Variable(n)
		assert.ErrorIs(t, err, snake.ErrIndex)
	}
	_, err := snake.NewLaurent(big.NewInt(1), make([]int, snake.MaxVariables+1)...)
	assert.ErrorIs(t, err, snake.ErrIndex)
	none, err := snake.NewLaurent(nil, 1, 2)
	require.NoError(t, err)
	assert.Zero(t, none.Len())

	p, err := snake.NewLaurent(big.NewInt(1), 0, math.MaxInt)
	require.NoError(t, err)
	for _, values := range [][]*big.Rat{{big.NewRat(1, 1)}, {nil, nil}} {
		_, err = p.Eval(values...)
		assert.ErrorIs(t, err, snake.ErrIndex)
	}
	_, err = p.Eval(nil, big.NewRat(3, 2))
	assert.ErrorIs(t, err, snake.ErrTooLarge)
	v, err := p.Eval(nil, new(big.Rat)) // 0 to any positive power is 0
	require.NoError(t, err)
	assert.Zero(t, v.Sign())
	inverse, err := snake.NewLaurent(big.NewInt(1), -1)
	require.NoError(t, err)
	_, err = inverse.Eval(new(big.Rat))
	assert.ErrorIs(t, err, snake.ErrIndex)
	least, err := snake.NewLaurent(big.NewInt(1), math.MinInt)
	require.NoError(t, err)
	_, err = least.Eval(big.NewRat(3, 2))
	assert.ErrorIs(t, err, snake.ErrTooLarge)
}

func TestTextNamesTheVariables(t *testing.T) {
	p, err := snake.NewLaurent(big.NewInt(-3), 2, -10, 1, 7)
	require.NoError(t, err)
	q, err := snake.NewLaurent(big.NewInt(1), 0, 1)
	require.NoError(t, err)
	assert.Equal(t, "-3·a²·b⁻¹⁰·x3·x4⁷ + b", p.Add(q).Text("a", "b"))
	assert.Equal(t, "0", snake.Laurent{}.Text("a"))
	assert.Equal(t, "1", snake.Laurents{}.One().Text())
}
