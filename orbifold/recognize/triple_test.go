package recognize_test

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

// triples draws three numbers: of a triangle of a family, small, equal.
func triples() *rapid.Generator[[3]*big.Int] {
	return rapid.Custom(func(t *rapid.T) (n [3]*big.Int) {
		if rapid.Bool().Draw(t, "of a family") {
			tr := must(families().Draw(t, "family").Triple(slopes(2).Draw(t, "slope").Path().Triangle()))(t)
			n[0], n[1], n[2] = tr.Numbers()
			return n
		}
		small := rapid.OneOf(rapid.Int64Range(1, 3), rapid.Int64Range(1, 200))
		for c := range n {
			n[c] = big.NewInt(small.Draw(t, "number"))
		}
		return n
	})
}

// TestWeightsAgainstTheList tries all weights up to 12.
func TestWeightsAgainstTheList(t *testing.T) {
	const bound = 12
	rapid.Check(t, func(t *rapid.T) {
		n := triples().Draw(t, "numbers")
		set := must(recognize.Weights(n[0], n[1], n[2]))(t)
		want, got := map[orbifold.Family]bool{}, map[orbifold.Family]bool{}
		for i := range int64((bound + 1) * (bound + 1) * (bound + 1)) {
			f := orbifold.MustNew(i%(bound+1), i/(bound+1)%(bound+1), i/(bound+1)/(bound+1))
			if f.Solves(n[0], n[1], n[2]) == nil {
				want[f] = true
			}
			assert.Equal(t, want[f], set.Contains(f), "%v in %v", f, set)
		}
		for f := range set.Families(bound) {
			assert.False(t, got[f], "%v twice", f)
			got[f] = true
		}
		assert.Equal(t, want, got, "%v of %v", set, n)
	})
}

// TestWeightsOfTriplesHoldTheFamily has weights past the bound of the list too.
func TestWeightsOfTriplesHoldTheFamily(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		x, y, z := must(f.Triple(slopes(4).Draw(t, "slope").Path().Triangle()))(t).Numbers()
		set := must(recognize.Weights(x, y, z))(t)
		assert.True(t, set.Contains(f), "%v in %v", f, set)
		// Any value of a free weight solves (E), and no other value of another one.
		for c := farey.Zero; c <= farey.One; c++ {
			assertEqualInt(t, map[bool]*big.Int{true: new(big.Int), false: big.NewInt(f.Weight(c))}[set.IsFree(c)], set.Weight(c))
			k := [3]int64{f.Weight(farey.Zero), f.Weight(farey.Infinity), f.Weight(farey.One)}
			k[c] += rapid.Int64Range(1, 1000).Draw(t, "more")
			assert.Equal(t, set.IsFree(c), orbifold.MustNew(k[0], k[1], k[2]).Solves(x, y, z) == nil)
		}
	})
}

func TestWeightsOfKnownTriples(t *testing.T) {
	for _, x := range []struct {
		n    [3]int64
		want string
	}{
		{[3]int64{1, 1, 1}, "k₀ any, k∞ any, k₁ any"},
		{[3]int64{1, 2, 1}, "k₀ any, k∞ = 0, k₁ any"},
		{[3]int64{1, 9, 1}, "k₀ any, k∞ = 7, k₁ any"},
		{[3]int64{1, 13, 3}, "k₀ any, k∞ = 1, k₁ = 1"},   // OEIS A351372: (1, 3, 13) for weights (1,1,1)
		{[3]int64{5, 13, 194}, "k₀ = 0, k∞ = 0, k₁ = 0"}, // OEIS A253809
		{[3]int64{2, 3, 4}, "none"},
		{[3]int64{5, 5, 5}, "none"},
		{[3]int64{2, 2, 1_000_000}, "none"},
	} {
		set := must(recognize.Weights(big.NewInt(x.n[0]), big.NewInt(x.n[1]), big.NewInt(x.n[2])))(t)
		assert.Equal(t, x.want, set.String(), "%v", x.n)
		assert.Equal(t, set.String(), fmt.Sprintf("%v", set))
	}
}

// TestLongWeights: numbers and weights past int64.
func TestLongWeights(t *testing.T) {
	e := new(big.Int).Exp(big.NewInt(10), big.NewInt(100), nil)
	set := must(recognize.Weights(big.NewInt(1), big.NewInt(1), e))(t)
	assertEqualInt(t, new(big.Int).Sub(e, big.NewInt(2)), set.Weight(farey.One))
	assert.Contains(t, fmt.Sprintf("%v", set), "digits")
	assert.Contains(t, fmt.Sprintf("%s", set), "99998")
	assert.False(t, set.Contains(orbifold.Family{}))
	for range set.Families(math.MaxInt64) {
		assert.Fail(t, "the weight is past int64")
	}
	f := orbifold.MustNew(math.MaxInt64, math.MaxInt64-1, 1)
	x, y, z := must(f.Triple(farey.MustParse("3/5").Path().Triangle()))(t).Numbers()
	set = must(recognize.Weights(x, y, z))(t)
	assert.True(t, set.Contains(f))
	for g := range set.Families(math.MaxInt64) {
		assert.True(t, set.Contains(g))
		break
	}
}

func TestEmptyWeightSet(t *testing.T) {
	var set recognize.WeightSet
	assert.Equal(t, "none", set.String())
	assert.True(t, set.IsEmpty())
	assert.False(t, set.IsFree(farey.Zero))
	assert.False(t, set.Contains(orbifold.Family{}))
	for range set.Families(10) {
		assert.Fail(t, "no families")
	}
	assert.Zero(t, set.Weight(farey.One).Sign()+set.Weight(farey.Class(9)).Sign())
	assert.False(t, set.IsFree(farey.Class(9)))
}

func TestWeightsErrorsAndStops(t *testing.T) {
	for i := range 3 {
		for _, bad := range []*big.Int{nil, new(big.Int), big.NewInt(-4)} {
			n := [3]*big.Int{big.NewInt(1), big.NewInt(2), big.NewInt(5)}
			n[i] = bad
			_, err := recognize.Weights(n[0], n[1], n[2])
			assert.ErrorIs(t, err, recognize.ErrNotPositive)
		}
	}
	one := big.NewInt(1)
	set := must(recognize.Weights(one, one, one))(t)
	n := 0
	for range set.Families(math.MaxInt64) {
		if n++; n == 1000 {
			break
		}
	}
	assert.Equal(t, 1000, n)
	for range set.Families(-1) {
		assert.Fail(t, "no families below 0")
	}
}
