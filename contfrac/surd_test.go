package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestSurdIsInLowestTerms(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		c := x.P()
		c.Mul(c, c).Sub(x.D(), c)
		c, rest := c.QuoRem(c, x.Q(), new(big.Int))
		same(t, new(big.Int), rest, "Q divides D − P²")
		abs := func(n *big.Int) *big.Int { return n.Abs(n) }
		g := new(big.Int).GCD(nil, nil, abs(x.P()), abs(x.Q()))
		same(t, big.NewInt(1), g.GCD(nil, nil, g, c.Abs(c)))
	})
}

func TestSurdHasTheValueAskedFor(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, d := integer(200).Draw(t, "p"), radicand(200).Draw(t, "d")
		q := integer(200).Filter(func(n *big.Int) bool { return n.Sign() != 0 }).Draw(t, "q")
		x := surdOf(t, p, d, q)
		float := func(n *big.Int) *big.Float { return new(big.Float).SetPrec(2000).SetInt(n) }
		want := float(d)
		want.Sqrt(want).Add(want, float(p)).Quo(want, float(q))
		near(t, want, real(x))
	})
}

func TestSurdDoesNotDependOnACommonFactor(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		k := natural(100).Filter(func(n *big.Int) bool { return n.Sign() != 0 }).Draw(t, "k")
		d := x.D()
		y := surdOf(t, new(big.Int).Mul(x.P(), k), d.Mul(d, k).Mul(d, k), new(big.Int).Mul(x.Q(), k))
		assert.True(t, x.Equal(y))
		assert.Equal(t, x.String(), y.String())
		assert.Zero(t, x.Cmp(y))
	})
}

func TestSurdRefuses(t *testing.T) {
	for _, c := range []struct {
		p, d, q int64
		want    error
	}{
		{1, 0, 1, contfrac.ErrDiscriminant}, {1, -5, 2, contfrac.ErrDiscriminant}, {1, 1, 1, contfrac.ErrDiscriminant},
		{1, 16, 3, contfrac.ErrDiscriminant}, {0, 3249, 1, contfrac.ErrDiscriminant}, {1, 5, 0, contfrac.ErrInfinite},
	} {
		_, err := contfrac.SurdOf(c.p, c.d, c.q)
		assert.ErrorIs(t, err, c.want, "%v", c)
	}
	one, five := big.NewInt(1), big.NewInt(5)
	for _, c := range [][3]*big.Int{{nil, five, one}, {one, nil, one}, {one, five, nil}} {
		_, err := contfrac.NewSurd(c[0], c[1], c[2])
		assert.ErrorIs(t, err, contfrac.ErrTerm)
	}
}

func TestSquaresAndNoOthersAreSquares(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := natural(300).Draw(t, "n")
		for _, off := range []int64{0, 1, 4} {
			d := new(big.Int).Mul(n, n)
			d.Add(d, big.NewInt(off))
			_, err := contfrac.NewSurd(n, d, big.NewInt(1))
			assert.Equal(t, d.Sign() == 0 || square(d), err != nil, "%s", d)
		}
	})
}

func TestZeroSurdIsTheGoldenRatio(t *testing.T) {
	x, err := contfrac.SurdOf(1, 5, 2)
	require.NoError(t, err)
	assert.True(t, x.Equal(contfrac.Surd{}))
	assert.Equal(t, "(1 + √5)/2", contfrac.Surd{}.String())
	p, err := contfrac.Surd{}.Periodic()
	require.NoError(t, err)
	assert.Equal(t, contfrac.Periodic{}, p)
	assert.True(t, x.Equal(contfrac.Periodic{}.Surd()))
	assert.True(t, x.Form().Equal(contfrac.Form{}))
	root, _ := contfrac.Form{}.Roots()
	assert.True(t, x.Equal(root))
	assert.True(t, x.IsReduced())
}

func TestConjugateHasTheOtherSignOfTheRoot(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		y := x.Conjugate()
		assert.True(t, x.Equal(y.Conjugate()))
		assert.False(t, x.Equal(y))
		q := new(big.Float).SetPrec(2000).SetInt(x.Q())
		sum := real(x)
		sum.Add(sum, real(y)).Mul(sum, q)
		twice := x.P()
		diff := sum.Sub(sum, new(big.Float).SetInt(twice.Lsh(twice, 1)))
		assert.True(t, diff.Sign() == 0 || diff.MantExp(nil) < -500, "(x + x')Q = 2P")
	})
}

func TestCmpIsThatOfTheValues(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x, y := anySurd().Draw(t, "x"), anySurd().Draw(t, "y")
		if rapid.Bool().Draw(t, "near") {
			// A fraction moves y close to x.
			lo, _, err := x.Enclosure(uint(rapid.IntRange(1, 300).Draw(t, "bits")))
			require.NoError(t, err)
			r, _ := lo.Rat(nil)
			m := contfrac.NewMatrix(r.Denom(), r.Num(), nil, r.Denom())
			ten := new(big.Int).Lsh(big.NewInt(1), 100)
			shrunk, err := y.Apply(contfrac.NewMatrix(big.NewInt(1), nil, nil, ten))
			require.NoError(t, err)
			y, err = shrunk.Apply(m)
			require.NoError(t, err)
		}
		want := real(x).Cmp(real(y))
		assert.Equal(t, want, x.Cmp(y))
		assert.Equal(t, -want, y.Cmp(x))
		assert.Equal(t, real(x).Sign(), x.Sign())
		assert.Equal(t, x.Sign(), x.CmpRat(nil))
		r := big.NewRat(rapid.Int64().Draw(t, "numerator"), rapid.Int64Range(1, 1<<40).Draw(t, "denominator"))
		assert.Equal(t, real(x).Cmp(new(big.Float).SetPrec(2000).SetRat(r)), x.CmpRat(r))
	})
}

func TestCmpTellsNearbySurdsApart(t *testing.T) {
	// √(n²+1) − n and 1/2n differ by about 1/8n³.
	rapid.Check(t, func(t *rapid.T) {
		n := sized(200).Filter(func(n *big.Int) bool { return n.BitLen() > 1 }).Draw(t, "n")
		d := new(big.Int).Mul(n, n)
		d.Add(d, big.NewInt(1))
		x := surdOf(t, new(big.Int).Neg(n), d, big.NewInt(1))
		twice := new(big.Int).Lsh(n, 1)
		assert.Equal(t, -1, x.CmpRat(new(big.Rat).SetFrac(big.NewInt(1), twice)))
		d.Lsh(d, 2) // (√(4n²+5) − 2n)/2 is a little less than 5/8n
		y := surdOf(t, new(big.Int).Neg(twice), d.Add(d, big.NewInt(1)), big.NewInt(2))
		assert.Equal(t, -1, x.Cmp(y))
		assert.Equal(t, 1, y.Cmp(x))
		assert.Equal(t, 1, x.Cmp(y.Conjugate()))
	})
}

func TestFloorIsTheLargestIntegerBelow(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		n := x.Floor()
		assert.Equal(t, 1, x.CmpRat(new(big.Rat).SetInt(n)))
		assert.Equal(t, -1, x.CmpRat(new(big.Rat).SetInt(n.Add(n, big.NewInt(1)))))
	})
}

func TestDecimalIsWithinHalfAUnitOfItsLastPlace(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		digits := rapid.IntRange(0, 100).Draw(t, "digits")
		s, err := x.Decimal(digits)
		require.NoError(t, err)
		r, ok := new(big.Rat).SetString(s)
		require.True(t, ok, s)
		assert.Equal(t, r.FloatString(digits), s, "the form of a decimal") // apart from -0.00
		half := new(big.Rat).SetFrac(big.NewInt(1), new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(digits)), nil))
		half.Quo(half, big.NewRat(2, 1))
		assert.Equal(t, 1, x.CmpRat(new(big.Rat).Sub(r, half)))
		assert.Equal(t, -1, x.CmpRat(new(big.Rat).Add(r, half)))
	})
}

func TestDecimalRefuses(t *testing.T) {
	_, err := contfrac.Surd{}.Decimal(-1)
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	_, err = contfrac.Surd{}.Decimal(contfrac.MaxDigits + 1)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
}

// √2 and the golden ratio: OEIS A002193, A001622.
func TestDecimalsOfKnownConstants(t *testing.T) {
	x, err := contfrac.SurdOf(0, 2, 1)
	require.NoError(t, err)
	for digits, want := range map[int]string{0: "1", 1: "1.4", 4: "1.4142", 50: "1.41421356237309504880168872420969807856967187537695"} {
		s, err := x.Decimal(digits)
		require.NoError(t, err)
		assert.Equal(t, want, s)
	}
	s, err := contfrac.Surd{}.Decimal(40)
	require.NoError(t, err)
	assert.Equal(t, "1.6180339887498948482045868343656381177203", s)
	s, err = contfrac.Surd{}.Conjugate().Decimal(3)
	require.NoError(t, err)
	assert.Equal(t, "-0.618", s)
}

func TestEnclosureHoldsTheValueBetweenNeighbours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		prec := uint(rapid.OneOf(rapid.IntRange(1, 70), rapid.IntRange(1, 2000)).Draw(t, "prec"))
		lo, hi, err := x.Enclosure(prec)
		require.NoError(t, err)
		assert.Equal(t, prec, lo.Prec())
		assert.Equal(t, prec, hi.Prec())
		a, _ := lo.Rat(nil)
		b, _ := hi.Rat(nil)
		assert.Equal(t, 1, x.CmpRat(a))
		assert.Equal(t, -1, x.CmpRat(b))
		// (hi − lo)·2^(prec−1) ≤ |x|
		width := new(big.Rat).Sub(b, a)
		width.Mul(width, new(big.Rat).SetInt(new(big.Int).Lsh(big.NewInt(1), prec-1)))
		if x.Sign() < 0 {
			assert.LessOrEqual(t, x.CmpRat(width.Neg(width)), 0)
		} else {
			assert.GreaterOrEqual(t, x.CmpRat(width), 0)
		}
	})
}

func TestEnclosureRefuses(t *testing.T) {
	_, _, err := contfrac.Surd{}.Enclosure(0)
	assert.ErrorIs(t, err, contfrac.ErrTerm)
	_, _, err = contfrac.Surd{}.Enclosure(contfrac.MaxPrecision + 1)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
}

func TestApplyIsTheFractionOfTheMatrix(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		m := rapid.OneOf(matrix(), unimodular()).Draw(t, "m")
		y, err := x.Apply(m)
		if m.Det().Sign() == 0 {
			require.ErrorIs(t, err, contfrac.ErrDeterminant)
			return
		}
		require.NoError(t, err)
		// Back by the adjoint, which undoes m up to a factor.
		neg := func(n *big.Int) *big.Int { return n.Neg(n) }
		back, err := y.Apply(contfrac.NewMatrix(m.D(), neg(m.B()), neg(m.C()), m.A()))
		require.NoError(t, err)
		assert.True(t, x.Equal(back))
		float := func(n *big.Int) *big.Float { return new(big.Float).SetPrec(2000).SetInt(n) }
		num, den := float(m.A()), float(m.C())
		num.Mul(num, real(x)).Add(num, float(m.B()))
		den.Mul(den, real(x)).Add(den, float(m.D()))
		near(t, real(y), num.Quo(num, den))
	})
}

func TestApplyOfAProductIsOneAfterTheOther(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		m, n := unimodular().Draw(t, "m"), unimodular().Draw(t, "n")
		y, err := x.Apply(n)
		require.NoError(t, err)
		y, err = y.Apply(m)
		require.NoError(t, err)
		z, err := x.Apply(m.Mul(n))
		require.NoError(t, err)
		assert.True(t, y.Equal(z))
	})
}

func TestReducedIsAboveOneWithConjugateBetweenMinusOneAndZero(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.OneOf(anySurd(), surd()).Draw(t, "x")
		y := x.Conjugate()
		want := x.CmpRat(big.NewRat(1, 1)) > 0 && y.CmpRat(big.NewRat(-1, 1)) > 0 && y.Sign() < 0
		assert.Equal(t, want, x.IsReduced())
	})
}

func TestApproximationConstantIsQTimesTheError(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := anySurd().Draw(t, "x")
		p := integer(100).Draw(t, "p")
		q := natural(100).Filter(func(n *big.Int) bool { return n.Sign() > 0 }).Draw(t, "q")
		c, err := x.ApproximationConstant(p, q)
		require.NoError(t, err)
		assert.Equal(t, 1, c.Sign())
		float := func(n *big.Int) *big.Float { return new(big.Float).SetPrec(2000).SetInt(n) }
		want := real(x)
		want.Mul(want, float(q)).Sub(want, float(p)).Mul(want, float(q))
		near(t, want.Abs(want), real(c))
	})
	for _, q := range []*big.Int{nil, new(big.Int), big.NewInt(-1)} {
		_, err := contfrac.Surd{}.ApproximationConstant(big.NewInt(1), q)
		assert.ErrorIs(t, err, contfrac.ErrTerm)
	}
	_, err := contfrac.Surd{}.ApproximationConstant(nil, big.NewInt(1))
	assert.ErrorIs(t, err, contfrac.ErrTerm)
}
