package spectrum_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/spectrum"
)

func TestFormHasDiscriminantOfTheTraceAndTheNumberAsValue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(6, 6).Draw(t, "slope")
		g := must(spectrum.Form(f, s))(t)
		d := must(f.Trace(s))(t)
		d.Mul(d, d).Sub(d, big.NewInt(4))
		same(t, d, g.Discriminant())
		same(t, must(f.Number(s))(t), g.A())
	})
}

func TestMinimumOfTheFormIsTheNumber(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 4).Draw(t, "slope")
		g := must(spectrum.Form(f, s))(t)
		same(t, must(f.Number(s))(t), must(g.Minimum())(t))
	})
}

// By all values in a box, for forms with small numbers.
func TestMinimumOfTheFormIsTheNumberInABox(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1), orbifold.MustNew(5, 3, 0)} {
		for node := range f.Tree(3) {
			g, _ := must(spectrum.Form(f, node.Slope()))(t).Reduced()
			for x := int64(-20); x <= 20; x++ {
				for y := int64(0); y <= 20; y++ {
					if x != 0 || y != 0 {
						require.GreaterOrEqual(t, g.Eval(big.NewInt(x), big.NewInt(y)).CmpAbs(node.Number()), 0, "%v %v", f, node.Slope())
					}
				}
			}
		}
	}
}

func TestAutomorphKeepsTheForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(6, 6).Draw(t, "slope")
		g := must(spectrum.Form(f, s))(t)
		m := must(spectrum.Automorph(f, s))(t)
		assert.True(t, g.Equal(must(g.Apply(m))(t)))
		same(t, big.NewInt(1), m.Det())
		same(t, must(f.Trace(s))(t), m.Trace())
		// −P⁻¹·M with rows and columns exchanged.
		p := contfrac.NewMatrix(big.NewInt(-1), nil, f.K(), big.NewInt(-1))
		h := must(p.Inverse())(t).Mul(must(f.Matrix(s))(t)).Neg()
		swap := contfrac.NewMatrix(nil, big.NewInt(1), big.NewInt(1), nil)
		assert.True(t, swap.Mul(h).Mul(swap).Equal(m))
	})
}

func TestAutomorphIsAPowerOfTheSmallest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(3, 3).Draw(t, "slope")
		least := must(must(spectrum.Form(f, s))(t).Automorph())(t)
		m := must(spectrum.Automorph(f, s))(t)
		for power := least; !power.Equal(m); power = power.Mul(least) {
			require.Negative(t, power.Trace().Cmp(m.Trace()))
		}
	})
}

func TestRootSolvesTheCongruence(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(6, 6).Draw(t, "slope")
		n, y := must(f.Number(s))(t), must(spectrum.Root(f, s))(t)
		assert.GreaterOrEqual(t, y.Sign(), 0)
		assert.Negative(t, y.Cmp(n))
		v := new(big.Int).Add(y, big.NewInt(f.Weight(s.Class())))
		v.Mul(v, y).Add(v, big.NewInt(1))
		same(t, new(big.Int), v.Mod(v, n))
		_, mod, err := f.RootMod(s, n)
		require.NoError(t, err)
		same(t, mod, y)
	})
}

// Of the six symmetries the three of order 2 exchange the roots.
func TestSymmetriesKeepOrExchangeTheRoots(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(6, 6).Draw(t, "slope")
		n, y := must(f.Number(s))(t), must(spectrum.Root(f, s))(t)
		other := new(big.Int).Add(y, big.NewInt(f.Weight(s.Class())))
		other.Mod(other.Neg(other), n)
		for _, g := range f.Symmetries() {
			want := y
			if g != (farey.Symmetry{}) && g.Then(g) == (farey.Symmetry{}) {
				want = other
			}
			same(t, want, must(spectrum.Root(f, g.Apply(s)))(t), "%v", g)
		}
	})
}

func TestPeriodIsThatOfTheFixedPoint(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 4).Draw(t, "slope")
		x := must(must(spectrum.FixedPoint(f, s))(t).Periodic())(t)
		p := must(spectrum.Period(f, s))(t)
		assert.True(t, x.Equivalent(p), "%v %v", x, p)
		assert.Zero(t, p.Pre().Len())
	})
}

// For a number of some 10⁵ bits the period comes from the conjugacy class.
func TestPeriodFarOut(t *testing.T) {
	s := farey.MustParse("28657/75025")
	p := must(spectrum.Period(orbifold.Family{}, s))(t)
	assert.Equal(t, s.String(), must(spectrum.BelowThree(p))(t).String())
}

func TestNumbersPastTheLimitAreRefused(t *testing.T) {
	f, s := orbifold.Family{}.WithLimit(1000), farey.MustParse("1/1000")
	_, err := spectrum.Form(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.Automorph(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.Root(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.FixedPoint(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.Period(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.LagrangeValue(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.Approximations(f, s)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	_, err = spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse("1/100000000000"))
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
}
