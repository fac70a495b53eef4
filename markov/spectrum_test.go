package markov_test

import (
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
	"example.com/onecusp/orbifold/spectrum"
)

// parents returns the neighbours of an index in (0, 1) of which it is the
// mediant, the smaller first.
func parents(t require.TestingT, index farey.Slope) (a, b farey.Slope) {
	a, b, err := index.Parents()
	require.NoError(t, err)
	return a, b
}

func isInner(index farey.Slope) bool { return !index.IsBase() }

func TestCohnMatrixIsTheProductOfThoseOfTheParents(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Filter(isInner).Draw(t, "index")
		a := rapid.OneOf(rapid.Int64Range(-3, 5), rapid.Int64()).Draw(t, "a")
		left, right := parents(t, index)
		product := must(markov.Cohn(left, a))(t).Mul(must(markov.Cohn(right, a))(t))
		require.True(t, product.Equal(must(markov.Cohn(index, a))(t)))
	})
}

func TestCohnMatrixHasTheNumberAndThreeTimesItAsTrace(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		c := must(markov.Cohn(index, rapid.Int64().Draw(t, "a")))(t)
		m := must(markov.Frobenius(index))(t)
		require.Equal(t, m.String(), c.B().String())
		require.Equal(t, m.Mul(m, big.NewInt(3)).String(), c.Trace().String())
		require.Equal(t, "1", c.Det().String())
	})
}

func TestCohnMatrixForTwoIsTheProductOverThePeriod(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		var terms []int64
		for _, letter := range must(markov.Christoffel(index))(t) {
			n := map[rune]int64{'x': 1, 'y': 2}[letter]
			terms = append(terms, n, n)
		}
		f := must(contfrac.FractionOf(terms...))(t)
		num, den := f.Ratio()
		c := must(markov.Cohn(index, 2))(t)
		require.Equal(t, num.String(), c.A().String())
		require.Equal(t, den.String(), c.C().String())
	})
}

// "Markov's Theorem and 100 Years of the Uniqueness Conjecture", 2013 (memory),
// for a = 1 and 2.
func TestFirstCohnMatrices(t *testing.T) {
	for _, c := range []struct {
		index string
		a     int64
		want  string
	}{
		{"0/1", 1, "[[1, 1], [1, 2]]"}, {"1/1", 1, "[[3, 2], [4, 3]]"}, {"1/2", 1, "[[7, 5], [11, 8]]"},
		{"0/1", 2, "[[2, 1], [1, 1]]"}, {"1/1", 2, "[[5, 2], [2, 1]]"}, {"1/2", 2, "[[12, 5], [7, 3]]"},
	} {
		require.Equal(t, c.want, must(markov.Cohn(farey.MustParse(c.index), c.a))(t).String())
	}
}

func TestChristoffelWordIsThatOfTheParentsTogether(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Filter(isInner).Draw(t, "index")
		left, right := parents(t, index)
		require.Equal(t, must(markov.Christoffel(left))(t)+must(markov.Christoffel(right))(t), must(markov.Christoffel(index))(t))
	})
	require.Equal(t, "x", must(markov.Christoffel(farey.MustParse("0/1")))(t))
	require.Equal(t, "y", must(markov.Christoffel(farey.MustParse("1/1")))(t))
}

func TestPeriodIsThatOfTheMarkovForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		f := must(markov.Form(index))(t)
		x, y := f.Roots()
		p := must(markov.Period(index))(t)
		require.True(t, p.Equivalent(must(x.Periodic())(t)))
		require.True(t, p.Equivalent(must(y.Periodic())(t)))
		require.Equal(t, index.String(), must(markov.IndexOf(must(x.Periodic())(t)))(t).String())
		l := must(p.Surd().Lagrange())(t)
		require.True(t, l.Equal(must(markov.LagrangeValue(index))(t).Surd()))
	})
}

func TestMarkovFormHasTheNumberAsMinimum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		f := must(markov.Form(index))(t)
		m := must(markov.Frobenius(index))(t)
		require.Equal(t, m.String(), f.A().String())
		require.Equal(t, m.String(), must(f.Minimum())(t).String())
		d := m.Mul(m, m).Mul(m, big.NewInt(9))
		require.Equal(t, d.Sub(d, big.NewInt(4)).String(), f.Discriminant().String())
	})
}

func TestMarkovFormIsThatOfTheSlopeUpToAReflection(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		f := must(markov.Form(index))(t)
		g := must(spectrum.Form(markov.Family(), must(markov.FromIndex(index))(t)))(t)
		mirror := must(g.Apply(contfrac.NewMatrix(big.NewInt(1), nil, nil, big.NewInt(-1))))(t)
		_, same, err := f.Equivalent(g)
		require.NoError(t, err)
		_, reflected, err := f.Equivalent(mirror)
		require.NoError(t, err)
		require.True(t, same || reflected)
	})
}

// "An Introduction to Diophantine Approximation", Cambridge 1957, ch. II (memory).
func TestFirstMarkovForms(t *testing.T) {
	for index, want := range map[string]string{
		"0/1": "(1, 3, 1)", "1/1": "(2, 4, -2)", "1/2": "(5, 11, -5)", "1/3": "(13, 29, -13)", "2/3": "(29, 63, -31)",
	} {
		require.Equal(t, want, must(markov.Form(farey.MustParse(index)))(t).String())
	}
}

func TestRootIsTheSmallerRootOfMinusOne(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		m, u := must(markov.Frobenius(index))(t), must(markov.Root(index))(t)
		require.GreaterOrEqual(t, u.Sign(), 0)
		require.LessOrEqual(t, new(big.Int).Lsh(u, 1).Cmp(m), 0)
		v := new(big.Int).Mul(u, u)
		require.Zero(t, v.Add(v, big.NewInt(1)).Mod(v, m).Sign())
	})
}

// √(9 − 4/m²) over OEIS A002559.
func TestSpectrumIncreasesWithTheMarkovNumbers(t *testing.T) {
	numbers := lines(t, "a002559.txt")
	i := 0
	var last spectrum.Value
	for index, v := range markov.Spectrum() {
		require.Equal(t, numbers[i], v.Number().String())
		require.Equal(t, numbers[i], must(markov.Frobenius(index))(t).String())
		if i > 0 {
			require.Equal(t, 1, v.Cmp(last))
		}
		last = v
		if i++; i == len(numbers) {
			break
		}
	}
	require.Equal(t, len(numbers), i)
	require.Equal(t, -1, last.Surd().CmpRat(big.NewRat(3, 1)))
}

func TestApproximationsOfAMarkovFormHaveTheConstantAsLimit(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		x, _ := must(markov.Form(index))(t).Roots()
		limit := must(markov.LagrangeValue(index))(t).Constant()
		period := must(x.Periodic())(t)
		// From some convergent on, no constant is below the limit by more than
		// a little, and each period has one as good.
		skip := period.Pre().Len() + period.Period().Len() + 12
		best := 1.0
		i := 0
		for a := range must(markov.Approximations(index))(t) {
			require.True(t, x.Equal(a.Surd()))
			if i++; i <= skip {
				continue
			}
			lo, _, err := a.Constant().Enclosure(53)
			require.NoError(t, err)
			c, _ := lo.Float64()
			best = min(best, c)
			if i > skip+period.Period().Len() {
				break
			}
		}
		lo, _, err := limit.Enclosure(53)
		require.NoError(t, err)
		want, _ := lo.Float64()
		require.InDelta(t, want, best, 1e-6)
	})
}

func TestIndexOfRefusesValuesFromThreeOn(t *testing.T) {
	for _, text := range []string{"[(3)]", "[(1; 2)]", "[0; (1, 1, 2)]", "[(2; 2, 2, 2, 1, 1, 1, 1)]"} {
		_, err := markov.IndexOf(must(contfrac.ParsePeriodic(text))(t))
		require.ErrorIs(t, err, spectrum.ErrNotBelowThree, text)
	}
}

func TestSpectrumOfABadIndexIsRefused(t *testing.T) {
	for text, want := range map[string]error{"2/1": markov.ErrIndex, "-1/2": markov.ErrIndex, "1/0": markov.ErrIndex, "1/100000000000": markov.ErrTooLarge} {
		index := farey.MustParse(text)
		_, err := markov.Cohn(index, 1)
		require.ErrorIs(t, err, want)
		_, err = markov.Christoffel(index)
		require.ErrorIs(t, err, want)
		_, err = markov.Period(index)
		require.ErrorIs(t, err, want)
		_, err = markov.Root(index)
		require.ErrorIs(t, err, want)
		_, err = markov.Form(index)
		require.ErrorIs(t, err, want)
		_, err = markov.LagrangeValue(index)
		require.ErrorIs(t, err, want)
		_, err = markov.Approximations(index)
		require.ErrorIs(t, err, want)
	}
	huge := "1/" + strings.Repeat("9", 3000)
	_, err := markov.Cohn(farey.MustParse(huge), 1)
	require.ErrorIs(t, err, markov.ErrTooLarge)
}

// With squares: a huge run is taken by a power.
func TestCohnMatrixFarOut(t *testing.T) {
	for _, text := range []string{"1/5000", "4999/5000", "987/1597", "5000/9999"} {
		index := farey.MustParse(text)
		require.Equal(t, must(markov.Frobenius(index))(t).String(), must(markov.Cohn(index, 2))(t).B().String())
	}
}

func TestSpectrumGivesNoInternals(t *testing.T) {
	index := farey.MustParse("2/5")
	u := must(markov.Root(index))(t)
	text := u.String()
	spoil(u)
	require.Equal(t, text, must(markov.Root(index))(t).String())
	f := must(markov.Form(index))(t)
	text = f.String()
	spoil(f.A(), f.B(), f.C())
	require.Equal(t, text, f.String())
	assert.Equal(t, text, must(markov.Form(index))(t).String())
}
