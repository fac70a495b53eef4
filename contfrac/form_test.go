package contfrac_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestFormRefuses(t *testing.T) {
	for _, c := range [][3]int64{{0, 0, 0}, {1, 0, 1}, {1, 2, 1}, {0, 1, 1}, {1, 3, 2}, {1, 1, 0}} {
		_, err := contfrac.FormOf(c[0], c[1], c[2])
		assert.ErrorIs(t, err, contfrac.ErrDiscriminant, "%v", c)
	}
	one := big.NewInt(1)
	for _, c := range [][3]*big.Int{{nil, one, one}, {one, nil, one}, {one, one, nil}} {
		_, err := contfrac.NewForm(c[0], c[1], c[2])
		assert.ErrorIs(t, err, contfrac.ErrTerm)
	}
	_, err := contfrac.Form{}.Apply(contfrac.NewMatrix(one, one, one, one))
	assert.ErrorIs(t, err, contfrac.ErrDeterminant)
}

func TestDiscriminantIsMultipliedByTheSquareOfTheDeterminant(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, m := quadratic().Draw(t, "f"), matrix().Draw(t, "m")
		g, err := f.Apply(m)
		det := m.Det()
		if det.Sign() == 0 {
			require.ErrorIs(t, err, contfrac.ErrDeterminant)
			return
		}
		require.NoError(t, err)
		want := f.Discriminant()
		same(t, want.Mul(want, det).Mul(want, det), g.Discriminant())
	})
}

func TestApplySubstitutes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, m := quadratic().Draw(t, "f"), unimodular().Draw(t, "m")
		g, err := f.Apply(m)
		require.NoError(t, err)
		x, y := integer(70).Draw(t, "x"), integer(70).Draw(t, "y")
		u := new(big.Int).Mul(m.A(), x)
		u.Add(u, new(big.Int).Mul(m.B(), y))
		v := new(big.Int).Mul(m.C(), x)
		v.Add(v, new(big.Int).Mul(m.D(), y))
		same(t, f.Eval(u, v), g.Eval(x, y))
	})
	same(t, new(big.Int), contfrac.Form{}.Eval(nil, nil))
	same(t, big.NewInt(4), contfrac.Form{}.Eval(big.NewInt(2), nil))
	same(t, big.NewInt(-9), contfrac.Form{}.Eval(nil, big.NewInt(3)))
}

func TestRootsAreRootsAndGoByTheInverseOfTheMatrix(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := quadratic().Draw(t, "f")
		x, y := f.Roots()
		assert.Equal(t, f.A().Sign(), x.Cmp(y), "the first is the greater one if a > 0")
		assert.True(t, f.Primitive().Equal(x.Form()))
		assert.True(t, f.Neg().Primitive().Equal(y.Form()))
		m := unimodular().Filter(func(m contfrac.Matrix) bool { return m.Det().Sign() > 0 }).Draw(t, "m")
		g, err := f.Apply(m)
		require.NoError(t, err)
		z, _ := g.Roots()
		z, err = z.Apply(m)
		require.NoError(t, err)
		assert.True(t, x.Equal(z))
	})
}

func TestContentTimesPrimitiveIsTheForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(quadratic(), smallForm()).Draw(t, "f")
		g, n := f.Primitive(), f.Content()
		same(t, big.NewInt(1), g.Content())
		for i, c := range []*big.Int{g.A(), g.B(), g.C()} {
			same(t, []*big.Int{f.A(), f.B(), f.C()}[i], c.Mul(c, n))
		}
	})
}

func TestReducedIsReducedAndProperlyEquivalent(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(quadratic(), smallForm()).Draw(t, "f")
		g, m := f.Reduced()
		assert.True(t, g.IsReduced())
		same(t, big.NewInt(1), m.Det())
		h, err := f.Apply(m)
		require.NoError(t, err)
		assert.True(t, g.Equal(h), "%v %v %v", f, g, m)
		if f.IsReduced() {
			assert.True(t, f.Equal(g))
		}
	})
}

// The definition |√Δ − 2|a|| < b < √Δ, on floats.
func TestIsReducedIsTheDefinition(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(quadratic(), smallForm()).Draw(t, "f")
		if rapid.Bool().Draw(t, "reduced") {
			f, _ = f.Reduced()
		}
		float := func(n *big.Int) *big.Float { return new(big.Float).SetPrec(2000).SetInt(n) }
		root := float(f.Discriminant())
		root.Sqrt(root)
		a := f.A()
		gap := new(big.Float).Sub(root, float(a.Lsh(a.Abs(a), 1)))
		want := gap.Abs(gap).Cmp(float(f.B())) < 0 && float(f.B()).Cmp(root) < 0
		assert.Equal(t, want, f.IsReduced())
	})
}

// reducedForms lists the reduced forms of discriminant d by trying all.
func reducedForms(t require.TestingT, d int64) map[string]contfrac.Form {
	all := map[string]contfrac.Form{}
	for b := int64(1); b*b < d; b++ {
		if (d-b*b)%4 != 0 {
			continue
		}
		ac := (b*b - d) / 4
		for a := int64(1); a <= -ac; a++ {
			if ac%a != 0 {
				continue
			}
			for _, sign := range []int64{1, -1} {
				f, err := contfrac.FormOf(sign*a, b, ac/(sign*a))
				require.NoError(t, err)
				if f.IsReduced() {
					all[f.String()] = f
				}
			}
		}
	}
	return all
}

// The cycles of all forms of small discriminants part the reduced forms, and
// equivalence, with a matrix to show for it, is the same cycle.
func TestCyclesPartTheReducedForms(t *testing.T) {
	for d := int64(5); d < 130; d++ {
		if d%4 > 1 || square(big.NewInt(d)) {
			continue
		}
		all := reducedForms(t, d)
		cycle := map[string]string{}
		for name, f := range all {
			if cycle[name] != "" {
				continue
			}
			n := 0
			sign := -f.A().Sign()
			for g := range f.Cycle() {
				require.True(t, g.IsReduced())
				require.Contains(t, all, g.String())
				require.Empty(t, cycle[g.String()])
				require.Equal(t, -sign, g.A().Sign(), "the signs alternate")
				sign = -sign
				cycle[g.String()] = name
				n++
			}
			require.Zero(t, n%2)
			for range f.Cycle() { // it can be stopped and run again
				break
			}
		}
		for a, f := range all {
			for b, g := range all {
				m, ok, err := f.Equivalent(g)
				require.NoError(t, err)
				require.Equal(t, cycle[a] == cycle[b], ok, "%v %v", f, g)
				if ok {
					h, err := f.Apply(m)
					require.NoError(t, err)
					require.True(t, g.Equal(h))
					same(t, big.NewInt(1), m.Det())
				}
			}
		}
	}
}

func TestEquivalentFindsAMatrix(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(quadratic(), smallForm()).Draw(t, "f")
		u := unimodular().Filter(func(m contfrac.Matrix) bool { return m.Det().Sign() > 0 }).Draw(t, "m")
		g, err := f.Apply(u)
		require.NoError(t, err)
		m, ok, err := f.Equivalent(g)
		require.NoError(t, err)
		require.True(t, ok)
		h, err := f.Apply(m)
		require.NoError(t, err)
		assert.True(t, g.Equal(h))
		same(t, big.NewInt(1), m.Det())
		_, ok, err = f.Equivalent(quadratic().Filter(func(h contfrac.Form) bool {
			return h.Discriminant().Cmp(f.Discriminant()) != 0
		}).Draw(t, "other"))
		require.NoError(t, err)
		assert.False(t, ok)
	})
}

// Over a box, which holds a minimum when the form is reduced: the first
// coefficients of the cycle are values at small places.
func TestMinimumIsTheLeastValueInABox(t *testing.T) {
	for _, bits := range []int{61, 0} {
		defer contfrac.SetWordRootBits(contfrac.SetWordRootBits(bits))
		rapid.Check(t, func(t *rapid.T) {
			f := smallForm().Draw(t, "f")
			n, err := f.Minimum()
			require.NoError(t, err)
			square := new(big.Int).Mul(n, n)
			square.Mul(square, big.NewInt(5))
			assert.LessOrEqual(t, square.Cmp(f.Discriminant()), 0, "n ≤ √(Δ/5)")
			found := false
			for g := range f.Cycle() {
				require.LessOrEqual(t, n.CmpAbs(g.A()), 0)
				found = found || n.CmpAbs(g.A()) == 0
			}
			assert.True(t, found)
			g, _ := f.Reduced()
			for x := int64(-25); x <= 25; x++ {
				for y := int64(0); y <= 25; y++ {
					if x != 0 || y != 0 {
						require.GreaterOrEqual(t, g.Eval(big.NewInt(x), big.NewInt(y)).CmpAbs(n), 0)
					}
				}
			}
		})
	}
}

func TestLagrangeIsTheRootOfTheDiscriminantOverTheMinimum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := quadratic().Draw(t, "f")
		n, err := f.Minimum()
		require.NoError(t, err)
		x, _ := f.Roots()
		l, err := x.Lagrange()
		require.NoError(t, err)
		assert.True(t, l.Equal(surdOf(t, new(big.Int), f.Discriminant(), n)))
	})
}

func TestAutomorphKeepsTheFormAndItsRoots(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := quadratic().Draw(t, "f")
		m, err := f.Automorph()
		require.NoError(t, err)
		g, err := f.Apply(m)
		require.NoError(t, err)
		assert.True(t, f.Equal(g))
		same(t, big.NewInt(1), m.Det())
		assert.Positive(t, m.Trace().Cmp(big.NewInt(2)))
		x, y := f.Roots()
		for _, r := range []contfrac.Surd{x, y} {
			image, err := r.Apply(m)
			require.NoError(t, err)
			assert.True(t, r.Equal(image))
		}
		// The first root attracts: c and a have the same sign.
		assert.Equal(t, f.A().Sign(), m.C().Sign())
	})
}

// t² − Δu² = 4 by trying u = 1, 2, ….
func TestAutomorphIsTheSmallest(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := smallForm().Draw(t, "f").Primitive()
		m, err := f.Automorph()
		require.NoError(t, err)
		c := m.C()
		u := c.Quo(c, f.A())
		if !u.IsInt64() || u.Int64() > 2000 {
			return
		}
		d := f.Discriminant()
		for v := int64(1); ; v++ {
			n := big.NewInt(v * v)
			if square(n.Mul(n, d).Add(n, big.NewInt(4))) {
				same(t, big.NewInt(v), u)
				return
			}
		}
	})
}

// The automorph of a form is hyperbolic, and its cycle has the period of the
// root as run lengths.
func TestCycleOfTheAutomorphIsThePeriod(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := quadratic().Draw(t, "f")
		m, err := f.Automorph()
		require.NoError(t, err)
		w, err := m.Cycle()
		require.NoError(t, err)
		x, _ := f.Roots()
		p, err := x.Periodic()
		require.NoError(t, err)
		runs, err := contfrac.NewPeriodic(contfrac.Fraction{}, w.Fraction())
		require.NoError(t, err)
		assert.True(t, runs.Equivalent(p))
		n := p.Period().Len()
		assert.Equal(t, n*(1+n%2), w.NumRuns())
	})
}
