package main

import (
	"math/big"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

func exhibitAt(t require.TestingT, f orbifold.Family, s string) *exhibit {
	x, err := newExhibit(f, farey.MustParse(s), 1)
	require.NoError(t, err)
	return x
}

// titles are those of the pictures of an exhibit.
func (x *exhibit) titles() string {
	var all []string
	for _, p := range x.Pictures {
		all = append(all, p.Stem)
	}
	return strings.Join(all, " ")
}

func TestFactsOfThePublishedExpansion(t *testing.T) {
	x := exhibitAt(t, orbifold.Family{}, "1/2")
	// u·u' = v² + w² with u at the class of 1/0: the exchange relation itself.
	assert.Equal(t, "x₀²·x∞⁻¹ + x∞⁻¹·x₁²", x.fact("Laurent expansion"))
	assert.Equal(t, "(0, 1, 0)", x.fact("Denominator vector"))
	assert.Equal(t, "(0, −1, 2), (2, −1, 0)", x.fact("Newton polygon"))
	assert.Equal(t, "y∞ + 1", x.fact("F-polynomial"))
	assert.Equal(t, "the empty word", x.fact("Word"))
	assert.Equal(t, "1 + q", x.fact("Rank polynomial"))
	assert.Empty(t, x.fact("no such fact"))
	assert.Empty(t, exhibitAt(t, orbifold.MustNew(1, 0, 0), "1/2").fact("F-polynomial"), "classical only")
	assert.Contains(t, exhibitAt(t, orbifold.Family{}, "1/0").fact("Word"), "none")
}

func TestWhichPicturesHang(t *testing.T) {
	for _, test := range []struct {
		weights [3]int64
		slope   string
		titles  string
	}{
		{[3]int64{}, "0/1", "minimal band"},
		{[3]int64{}, "1/2", "minimal random band lattice"},
		{[3]int64{1, 1, 1}, "1/3", "minimal random hexagons band lattice"},
		{[3]int64{2, 0, 1}, "3/7", "minimal random hexagons band"}, // 961 matchings are no small lattice
		{[3]int64{2, 0, 1}, "2/1", "minimal random band lattice"},  // crosses an edge of weight 2 only
		{[3]int64{0, 40, 0}, "1/2", "minimal random"},              // the band has more tiles than a picture
	} {
		x := exhibitAt(t, orbifold.MustNew(test.weights[0], test.weights[1], test.weights[2]), test.slope)
		assert.Equal(t, test.titles, x.titles(), "%v", test)
	}
}

// TestRandomMatchingIsInBetween: neither minimal nor maximal where there are others; with
// two matchings the maximal one.
func TestRandomMatchingIsInBetween(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.SampledFrom([]string{"1/2", "1/3", "2/3", "-3/4", "3/7"}).Draw(t, "slope")
		k := rapid.Int64Range(0, 2)
		x := exhibitAt(t, orbifold.MustNew(k.Draw(t, "k0"), k.Draw(t, "k∞"), k.Draw(t, "k1")), s)
		m, err := x.random(rand.NewPCG(rapid.Uint64().Draw(t, "seed"), 0))
		require.NoError(t, err)
		require.True(t, x.graph.Contains(m))
		require.Positive(t, m.Height())
		if x.graph.Count().Cmp(big.NewInt(2)) > 0 {
			require.Less(t, m.Height(), m.Tiles())
		}
	})
}

// TestCurveHasTheTrace: the classical curve of 3/7 has 3·169 good matchings (its trace is 3m,
// as for Cohn matrices).
func TestCurveHasTheTrace(t *testing.T) {
	x := exhibitAt(t, orbifold.Family{}, "3/7")
	for _, f := range x.Facts {
		if f.Name == "Closed curve" {
			assert.Contains(t, f.Note, "good matchings 507, trace K·N − k = 507")
		}
	}
	assert.NotEmpty(t, x.fact("Closed curve"))
}

// TestErrorsArePassedOn: what the arguments are checked for, and what nothing but an error of
// the program can bring about, ends in an error and not in a wrong page.
func TestErrorsArePassedOn(t *testing.T) {
	huge := farey.MustParse("1/" + strings.Repeat("9", 40))
	_, err := newExhibit(orbifold.Family{}, huge, 1)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = newExhibit(orbifold.Family{}, farey.MustParse("1/20000"), 1) // too long to draw from
	assert.ErrorIs(t, err, snake.ErrTooLong)
	_, err = newExhibit(orbifold.Family{}, farey.MustParse("1/600"), 1) // too long to expand
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = newGallery(t.Context(), options{families: []orbifold.Family{{}}, slopes: []farey.Slope{huge}})
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)

	x := &exhibit{Slope: huge}
	for _, add := range []func() error{x.addCounts, x.addExpansion, x.addBand} {
		assert.ErrorIs(t, add(), orbifold.ErrTooLarge)
	}
	long := snake.FromWord(must(contfrac.ParseWord("L20000"))(t))
	x = &exhibit{Slope: farey.MustParse("1/2"), graph: long}
	assert.ErrorIs(t, x.addCounts(), snake.ErrTooLong)
	assert.ErrorIs(t, x.hang(picture{}, long, snake.Drawing{}), snake.ErrTooLong)

	x = exhibitAt(t, orbifold.Family{}, "3/7")
	assert.ErrorIs(t, x.addRandom(must(snake.ParseMatching("0101"))(t)), snake.ErrNotMatching)
	x.set = must(must(x.set.WithTile(1, true))(t).WithTile(1, false))(t) // empty
	assert.ErrorIs(t, x.addMinimal(), snake.ErrIndex)
	_, err = x.random(rand.NewPCG(1, 1))
	assert.ErrorIs(t, err, snake.ErrIndex)
}

func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}

func TestPlural(t *testing.T) {
	assert.Equal(t, "1 tile", plural(1, "tile", "tiles"))
	assert.Equal(t, "0 tiles", plural(0, "tile", "tiles"))
}

func TestSignsOfLabels(t *testing.T) {
	assert.Equal(t, "∞", labelSign(orbifold.LabelOf(farey.Infinity)))
	assert.Equal(t, `$\infty$`, labelInLaTeX(orbifold.LabelOf(farey.Infinity)))
	assert.Equal(t, "1", labelInLaTeX(orbifold.LabelOf(farey.One)))
	assert.Empty(t, labelSign(snake.NoLabel))
}
