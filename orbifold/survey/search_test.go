package survey

import (
	"context"
	"encoding/json"
	"math/big"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// A search finds what a filter of the plain enumeration finds, in increasing
// order, with certificates that hold.
func TestSearchIsAFilter(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		r := regions(f, 20).Draw(t, "region")
		m := rapid.Uint64Range(1, 9).Draw(t, "modulus")
		var want []string
		for _, x := range brute(r) {
			if new(big.Int).Mod(x.number, new(big.Int).SetUint64(m)).Uint64() == 1%m {
				want = append(want, x.slope.String())
			}
		}
		hits, err := Search(context.Background(), r, func(v *Visit) bool {
			n, err := v.Number()
			return err == nil && new(big.Int).Mod(n, new(big.Int).SetUint64(m)).Uint64() == 1%m
		}, Options{Workers: 2})
		require.NoError(t, err)
		var got []string
		for i, h := range hits {
			got = append(got, h.Slope.String())
			assert.True(t, h.Certificate.Slope().Equal(h.Slope))
			if i > 0 {
				assert.Negative(t, hits[i-1].Slope.Cmp(h.Slope))
			}
			if i < 3 {
				require.NoError(t, h.Certificate.Verify())
			}
		}
		assert.ElementsMatch(t, want, got)
	})
}

// Odd Markov numbers are ≡ 1 mod 4: OEIS A002559, comments. A counterexample would be a hit.
func TestOddMarkovNumbersAre1Modulo4(t *testing.T) {
	hits, err := Search(context.Background(), Up(orbifold.Family{}, PowerOfTen(far(1500))), func(v *Visit) bool {
		return v.Mod64()%2 == 1 && v.Mod64()%4 != 1
	}, Options{})
	require.NoError(t, err)
	assert.Empty(t, hits)
}

// The fan about 0/1 of the classical family carries the Fibonacci numbers F(2n+1): OEIS A001519.
func TestFanOfZeroIsTheFibonacciBranch(t *testing.T) {
	r := Region{Box: &Box{1, 60}, Fans: []farey.Slope{{}}, Among: &Interval{farey.MustParse("0/1"), farey.MustParse("1/2")}}
	hits, err := Search(context.Background(), r, func(*Visit) bool { return true }, Options{})
	require.NoError(t, err)
	require.Len(t, hits, 59)
	for i, h := range hits {
		n := int64(60 - i)
		assert.Equal(t, fibonacci(2*n-1).String(), h.Certificate.Number().String(), "slope %v", h.Slope)
	}
}

func TestSearchRefuses(t *testing.T) {
	ctx := context.Background()
	r := Up(orbifold.Family{}, PowerOfTen(100))
	all := func(*Visit) bool { return true }
	_, err := Search(ctx, r, nil, Options{})
	require.ErrorIs(t, err, ErrOptions)
	_, err = Search(ctx, r, all, Options{Workers: -1})
	require.ErrorIs(t, err, ErrOptions)
	_, err = Search(ctx, Region{}, all, Options{})
	require.ErrorIs(t, err, ErrRegion)
	_, err = Search(ctx, r, all, Options{Results: 100})
	require.ErrorIs(t, err, ErrTooMany)
	file := filepath.Join(t.TempDir(), "checkpoint")
	hits, err := Search(ctx, Up(orbifold.Family{}, PowerOfTen(10)), all, Options{Checkpoint: file})
	require.NoError(t, err)
	_, err = Search(ctx, Up(orbifold.Family{}, PowerOfTen(10)), all, Options{Checkpoint: file, Results: len(hits) - 1})
	require.ErrorIs(t, err, ErrTooMany)
	done, cancel := context.WithCancel(ctx)
	cancel()
	_, err = Search(done, r, all, Options{})
	require.ErrorIs(t, err, context.Canceled)
	// A number too long for a certificate: the hit says so by the zero value.
	far := farey.MustParse("1/2000000")
	hits, err = Search(ctx, Region{Box: &Box{1, 2_000_000}, Among: &Interval{far, far}}, all, Options{})
	require.NoError(t, err)
	require.Len(t, hits, 1)
	require.Error(t, hits[0].Certificate.Verify())
	_, err = json.Marshal(hits)
	require.NoError(t, err)
}
