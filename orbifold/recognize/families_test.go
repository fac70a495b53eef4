package recognize_test

import (
	"context"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/recognize"
)

func ints(list ...int64) []*big.Int {
	n := make([]*big.Int, len(list))
	for i, x := range list {
		n[i] = big.NewInt(x)
	}
	return n
}

// TestFamiliesOfNumbersHoldTheirOwn: the numbers of a family lead back to it and
// to their slopes.
func TestFamiliesOfNumbersHoldTheirOwn(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		k := sortedWeights(orbifold.MustNew(rapid.Int64Range(0, 2).Draw(t, "k₀"), rapid.Int64Range(0, 2).Draw(t, "k∞"), rapid.Int64Range(0, 2).Draw(t, "k₁")))
		f := orbifold.MustNew(k[0], k[1], k[2])
		var numbers []*big.Int
		var want []farey.Slope
		for range rapid.IntRange(1, 3).Draw(t, "numbers") {
			s := slopes(2).Draw(t, "slope")
			want = append(want, f.Representative(s))
			numbers = append(numbers, must(f.Number(s))(t))
		}
		found := must(recognize.Families(context.Background(), numbers, recognize.Options{Weight: 2}))(t)
		require.NotEmpty(t, found)
		assert.Equal(t, len(numbers), found[0].Carried)
		seen := false
		for i, m := range found {
			if i > 0 {
				assert.LessOrEqual(t, m.Carried, found[i-1].Carried)
			}
			for j, list := range m.Slopes {
				for _, s := range list {
					assertEqualInt(t, numbers[j], must(m.Family.Number(s))(t))
				}
			}
			if m.Family != f {
				continue
			}
			seen = true
			for j, s := range want {
				texts := []string{}
				for _, s := range m.Slopes[j] {
					texts = append(texts, s.String())
				}
				assert.Contains(t, texts, s.String())
			}
		}
		assert.True(t, seen)
	})
}

// TestFamiliesStandTogether: 5, 13, 194 is a Markov triple (OEIS A253809), and
// 5, 13, 169 is none.
func TestFamiliesStandTogether(t *testing.T) {
	for _, x := range []struct {
		numbers []int64
		want    bool
	}{
		{[]int64{5, 13, 194}, true}, {[]int64{194, 5}, true}, {[]int64{5, 13, 169}, false}, {[]int64{5, 5}, false}, {[]int64{5}, false},
		{[]int64{1, 2, 5, 13}, false},
	} {
		found := must(recognize.Families(t.Context(), ints(x.numbers...), recognize.Options{Weight: 1}))(t)
		require.NotEmpty(t, found)
		var classical recognize.FamilyMatch
		for _, m := range found {
			if m.Family == (orbifold.Family{}) {
				classical = m
			}
		}
		assert.Equal(t, len(x.numbers), classical.Carried)
		assert.Equal(t, x.want, classical.Together, "%v", x.numbers)
	}
}

// TestFamiliesRankEvidence: 3, 13, 61, 217 are numbers of the weights (1,1,1) (OEIS
// A357749), and only 13 is a Markov number.
func TestFamiliesRankEvidence(t *testing.T) {
	found := must(recognize.Families(t.Context(), ints(3, 13, 61, 217), recognize.Options{}))(t)
	require.NotEmpty(t, found)
	assert.Equal(t, orbifold.MustNew(1, 1, 1), found[0].Family)
	assert.Equal(t, 4, found[0].Carried)
	for _, m := range found[1:] {
		assert.Less(t, m.Carried, 4)
	}
}

// TestFamiliesKnowCoincidences: in the family (3,0,0) the number 5
// stands at inequivalent slopes, such as 2 and −1/2.
func TestFamiliesKnowCoincidences(t *testing.T) {
	found := must(recognize.Families(t.Context(), ints(5), recognize.Options{Weight: 3}))(t)
	for _, m := range found {
		if m.Family == orbifold.MustNew(3, 0, 0) {
			assert.Greater(t, len(m.Slopes[0]), 1)
			return
		}
	}
	assert.Fail(t, "the weights (3,0,0) carry 5")
}

func TestFamiliesErrors(t *testing.T) {
	_, err := recognize.Families(t.Context(), nil, recognize.Options{})
	assert.ErrorIs(t, err, recognize.ErrEmpty)
	for _, bad := range []*big.Int{nil, new(big.Int), big.NewInt(-1)} {
		_, err = recognize.Families(t.Context(), []*big.Int{big.NewInt(2), bad}, recognize.Options{})
		assert.ErrorIs(t, err, recognize.ErrNotPositive)
	}
	_, err = recognize.Families(t.Context(), ints(2), recognize.Options{Weight: -3})
	assert.ErrorIs(t, err, recognize.ErrOptions)
	_, err = recognize.Families(t.Context(), ints(make([]int64, recognize.MaxNumbers+1)...), recognize.Options{})
	assert.ErrorIs(t, err, recognize.ErrTooLarge)
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	_, err = recognize.Families(ctx, ints(1_000_003), recognize.Options{})
	assert.ErrorIs(t, err, context.Canceled)
	var never context.Context // nil: it does not end
	found, err := recognize.Families(never, ints(2), recognize.Options{Weight: 1})
	require.NoError(t, err)
	assert.NotEmpty(t, found)
}
