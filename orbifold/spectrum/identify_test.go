package spectrum_test

import (
	"context"
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

var (
	background = context.Background()
	noContext  context.Context // nil is as good as one that never ends
)

func TestIdentifyRootUndoesNumberAndRoot(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		s := rapid.OneOf(slopes(6, 6), slopes(12, 2), slopes(2, 60), slopes(1, 500)).Draw(t, "slope")
		n, y := must(f.Number(s))(t), must(spectrum.Root(f, s))(t)
		// Any y of the residue class will do.
		shift := big.NewInt(rapid.Int64Range(-3, 3).Draw(t, "shift"))
		found := must(spectrum.IdentifyRoot(background, f, n, shift.Mul(shift, n).Add(shift, y)))(t)
		assert.Contains(t, texts(found), s.String())
		assert.LessOrEqual(t, len(found), 3)
		for i, r := range found {
			same(t, n, must(f.Number(r))(t))
			same(t, y, must(spectrum.Root(f, r))(t))
			if i > 0 {
				assert.Negative(t, found[i-1].Cmp(r))
			}
		}
	})
}

// All roots of all moduli up to a bound, against the list of all slopes with
// numbers up to it.
func TestIdentifyRootIsComplete(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1), orbifold.MustNew(3, 0, 0), orbifold.MustNew(0, 4, 4)} {
		const bound = 1200
		want := map[[2]int64][]string{}
		for node := range f.Within(big.NewInt(bound)) {
			s := node.Slope()
			key := [2]int64{node.Number().Int64(), must(spectrum.Root(f, s))(t).Int64()}
			want[key] = append(want[key], s.String())
		}
		met := 0
		for n := int64(1); n <= bound; n++ {
			for y := int64(0); y < n; y++ {
				root := false
				for _, c := range []farey.Class{farey.Zero, farey.Infinity, farey.One} {
					root = root || (y*(y+f.Weight(c))+1)%n == 0
				}
				if !root {
					continue
				}
				found := must(spectrum.IdentifyRoot(background, f, big.NewInt(n), big.NewInt(y)))(t)
				require.ElementsMatch(t, want[[2]int64{n, y}], texts(found), "%v %d %d", f, n, y)
				if len(found) > 0 {
					met++
				}
			}
		}
		require.Len(t, want, met)
	}
}

// The slopes of all roots of a number are the slopes of the number.
func TestIdentifyRootAgreesWithIdentify(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1)} {
		for n := int64(1); n <= 500; n++ {
			var orbits []string
			for _, s := range must(f.Identify(background, big.NewInt(n)))(t) {
				orbits = append(orbits, texts(f.Orbit(s))...)
			}
			var found []string
			for y := int64(0); y < n; y++ {
				slopes, err := spectrum.IdentifyRoot(background, f, big.NewInt(n), big.NewInt(y))
				if err != nil {
					require.ErrorIs(t, err, spectrum.ErrNotRoot)
				}
				found = append(found, texts(slopes)...)
			}
			require.ElementsMatch(t, orbits, found, "%v %d", f, n)
		}
	}
}

func TestIdentifyRootFarOut(t *testing.T) {
	for _, c := range []struct {
		f     orbifold.Family
		slope string
	}{{orbifold.Family{}, "10946/28657"}, {orbifold.MustNew(2, 0, 1), "-3/5000"}, {orbifold.MustNew(1, 1, 1), "12345/6789"}} {
		s := farey.MustParse(c.slope)
		n, y := must(c.f.Number(s))(t), must(spectrum.Root(c.f, s))(t)
		found := must(spectrum.IdentifyRoot(background, c.f, n, y))(t)
		assert.Contains(t, texts(found), s.String())
	}
}

func TestIdentifyRootRefuses(t *testing.T) {
	for _, c := range []struct {
		n, y *big.Int
		want error
	}{
		{nil, big.NewInt(1), spectrum.ErrNotPositive}, {big.NewInt(0), big.NewInt(1), spectrum.ErrNotPositive},
		{big.NewInt(-5), big.NewInt(2), spectrum.ErrNotPositive}, {big.NewInt(5), nil, spectrum.ErrNotRoot}, {big.NewInt(5), big.NewInt(1), spectrum.ErrNotRoot},
		{big.NewInt(7), big.NewInt(3), spectrum.ErrNotRoot},
	} {
		_, err := spectrum.IdentifyRoot(background, orbifold.Family{}, c.n, c.y)
		assert.ErrorIs(t, err, c.want)
	}
	ended, cancel := context.WithCancel(background)
	cancel()
	_, err := spectrum.IdentifyRoot(ended, orbifold.Family{}, big.NewInt(5), big.NewInt(2))
	assert.ErrorIs(t, err, context.Canceled)
	found, err := spectrum.IdentifyRoot(noContext, orbifold.Family{}, big.NewInt(5), big.NewInt(2))
	require.NoError(t, err)
	assert.NotEmpty(t, found)
	huge := must(orbifold.Family{}.Number(farey.MustParse("1/1000")))(t)
	y := must(spectrum.Root(orbifold.Family{}, farey.MustParse("1/1000")))(t)
	_, err = spectrum.IdentifyRoot(background, orbifold.Family{}.WithLimit(1000), huge, y)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	// A limit that n keeps is enough.
	found, err = spectrum.IdentifyRoot(background, orbifold.Family{}.WithLimit(4*int64(huge.BitLen())+8), huge, y)
	require.NoError(t, err)
	assert.Contains(t, texts(found), "1/1000")
}

func TestIdentifyFormUndoesForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 4).Draw(t, "slope")
		g := must(must(spectrum.Form(f, s))(t).Apply(special().Draw(t, "m")))(t)
		if rapid.Bool().Draw(t, "primitive") {
			g = g.Primitive()
		}
		found := must(spectrum.IdentifyForm(background, f, g))(t)
		assert.Contains(t, texts(found), s.String())
		for _, r := range found {
			h := must(spectrum.Form(f, r))(t)
			_, ok, err := g.Primitive().Equivalent(h.Primitive())
			require.NoError(t, err)
			assert.True(t, ok)
		}
	})
}

// Against equivalence with every form of a tree.
func TestIdentifyFormIsComplete(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1)} {
		forms := map[string]contfrac.Form{}
		for node := range f.Tree(4) {
			forms[node.Slope().String()] = must(spectrum.Form(f, node.Slope()))(t).Primitive()
		}
		for _, g := range forms {
			for _, g := range []contfrac.Form{g, g.Neg()} {
				var want []string
				for name, h := range forms {
					if _, ok, err := g.Equivalent(h); err == nil && ok {
						want = append(want, name)
					}
				}
				var found []string
				for _, s := range must(spectrum.IdentifyForm(background, f, g))(t) {
					if _, in := forms[s.String()]; in {
						found = append(found, s.String())
					}
				}
				require.ElementsMatch(t, want, found, "%v %v", f, g)
			}
		}
	}
}

func TestIdentifyFormFindsNothingElsewhere(t *testing.T) {
	for _, c := range [][3]int64{{1, 0, -7}, {1, 3, -3}, {3, 1, -5}, {1, 0, -15}} {
		g := must(contfrac.FormOf(c[0], c[1], c[2]))(t)
		found := must(spectrum.IdentifyForm(background, orbifold.Family{}, g))(t)
		assert.Empty(t, found, "%v", g)
	}
}

func TestIdentifySurdFindsTheSlopesOfBothRootsAndTheirMirrorImages(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 3).Draw(t, "slope")
		x, other := must(spectrum.Form(f, s))(t).Roots()
		if rapid.Bool().Draw(t, "second") {
			x = other
		}
		if rapid.Bool().Draw(t, "mirrored") {
			x = must(x.Apply(contfrac.NewMatrix(big.NewInt(-1), nil, nil, big.NewInt(1))))(t)
		}
		x = must(x.Apply(special().Draw(t, "m")))(t)
		found := must(spectrum.IdentifySurd(background, f, x))(t)
		assert.Contains(t, texts(found), s.String())
		p := must(x.Periodic())(t)
		for _, r := range found {
			a, b := must(spectrum.Form(f, r))(t).Roots()
			assert.True(t, must(a.Periodic())(t).Equivalent(p) || must(b.Periodic())(t).Equivalent(p))
		}
	})
}

func TestCyclesPastTheLimitAreRefused(t *testing.T) {
	defer spectrum.SetCycleLimit(spectrum.SetCycleLimit(3))
	g := must(spectrum.Form(orbifold.Family{}, farey.MustParse("3/7")))(t)
	_, err := spectrum.IdentifyForm(background, orbifold.Family{}, g)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	x, _ := g.Roots()
	_, err = spectrum.IdentifySurd(background, orbifold.Family{}, x)
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
	ended, cancel := context.WithCancel(background)
	cancel()
	_, err = spectrum.IdentifyForm(ended, orbifold.Family{}, g)
	assert.ErrorIs(t, err, context.Canceled)
	found, err := spectrum.IdentifyForm(noContext, orbifold.Family{}, contfrac.Form{})
	require.NoError(t, err)
	assert.Equal(t, []string{"0/1", "1/1", "1/0"}, texts(found))
}

func TestBelowThreeUndoesPeriodAndAgreesWithIdentifySurd(t *testing.T) {
	f := orbifold.Family{}
	rapid.Check(t, func(t *rapid.T) {
		s := slopes(5, 4).Draw(t, "slope")
		x := must(spectrum.FixedPoint(f, s))(t)
		got := must(spectrum.BelowThree(must(x.Periodic())(t)))(t)
		assert.Equal(t, f.Representative(s).String(), got.String())
		assert.Equal(t, got.String(), must(spectrum.BelowThree(must(spectrum.Period(f, s))(t)))(t).String())
		assert.Contains(t, texts(must(spectrum.IdentifySurd(background, f, x))(t)), got.String())
	})
}

// All periods in 1 and 2 up to some length, and some terms 3: below three
// exactly when the exact Lagrange value is.
func TestBelowThreeIsDecidedByTheLagrangeValue(t *testing.T) {
	three := big.NewRat(3, 1)
	var try func(terms []int64)
	try = func(terms []int64) {
		if len(terms) > 0 {
			x := must(contfrac.NewPeriodic(contfrac.Fraction{}, must(contfrac.FractionOf(terms...))(t)))(t)
			l := must(x.Surd().Lagrange())(t)
			s, err := spectrum.BelowThree(x)
			require.Equal(t, l.CmpRat(three) < 0, err == nil, "%v", x)
			if err == nil {
				require.True(t, l.Equal(must(spectrum.LagrangeValue(orbifold.Family{}, s))(t).Surd()))
			} else {
				require.ErrorIs(t, err, spectrum.ErrNotBelowThree)
			}
		}
		if len(terms) < 10 {
			for a := int64(1); a <= 2 || len(terms) < 4 && a == 3; a++ {
				try(append(terms, a))
			}
		}
	}
	try(nil)
	x := must(contfrac.ParsePeriodic("[0; (1, 340282366920938463463374607431768211456)]"))(t)
	_, err := spectrum.BelowThree(x)
	assert.ErrorIs(t, err, spectrum.ErrNotBelowThree)
}

func TestChristoffelPeriodRefuses(t *testing.T) {
	_, err := spectrum.ChristoffelPeriod(farey.MustParse("-1/2"))
	assert.ErrorIs(t, err, farey.ErrNegative)
	_, err = spectrum.ChristoffelPeriod(farey.MustParse("1/100000000"))
	assert.ErrorIs(t, err, spectrum.ErrTooLarge)
}
