package recognize

import (
	"context"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold"
)

// TestSectionsTwin compares with a walk through all d and a search by halving.
func TestSectionsTwin(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		base := big.NewInt(rapid.OneOf(rapid.Int64Range(3, 30), rapid.Int64Range(3, 1<<40)).Draw(t, "t"))
		d := rapid.Uint64Range(1, 48).Draw(t, "d")
		_, trace, err := orbifold.Lucas(d, base)
		require.NoError(t, err)
		if rapid.IntRange(0, 4).Draw(t, "change") == 0 {
			trace.Add(trace, big.NewInt(1))
		}
		got, err := sections(context.Background(), trace)
		require.NoError(t, err)
		var want []section
		for d := int64(1); float64(d)*1.3 < float64(trace.BitLen()); d++ {
			if x, ok := plainRoot(trace, uint64(d)); ok {
				want = append(want, section{d, x})
			}
		}
		require.Len(t, got, len(want))
		for i := range want {
			assert.Equal(t, want[i].d, got[i].d)
			assert.Zero(t, want[i].t.Cmp(got[i].t))
		}
	})
}

// plainRoot returns the t ≥ 3 with V_d(t) = T by halving an interval.
func plainRoot(trace *big.Int, d uint64) (*big.Int, bool) {
	// V_d(hi) > (hi−1)^d > T.
	lo, hi := big.NewInt(3), new(big.Int).Lsh(big.NewInt(1), uint(trace.BitLen())/uint(d)+2)
	for {
		mid := new(big.Int).Add(lo, hi)
		mid.Rsh(mid, 1)
		_, v, err := orbifold.Lucas(d, mid)
		if err != nil {
			return nil, false
		}
		switch c := v.Cmp(trace); {
		case c == 0:
			return mid, true
		case mid.Cmp(lo) == 0:
			return nil, false
		case c < 0:
			lo = mid
		default:
			hi = mid
		}
	}
}

func TestLucasRootsOfLargeTraces(t *testing.T) {
	base := new(big.Int).Lsh(big.NewInt(7), 3000)
	for _, p := range []int64{2, 3, 101} {
		_, trace, err := orbifold.Lucas(uint64(p), base)
		require.NoError(t, err)
		x, ok := lucasRoot(trace, p)
		require.True(t, ok)
		assert.Zero(t, base.Cmp(x))
		_, ok = lucasRoot(trace.Add(trace, big.NewInt(2)), p)
		assert.False(t, ok)
	}
	_, trace, err := orbifold.Lucas(10007, big.NewInt(3))
	require.NoError(t, err)
	x, ok := lucasRoot(trace, 10007)
	require.True(t, ok)
	assert.Equal(t, "3", x.String())
}

// TestRationalReconstruction: n/d modulo m comes back when m > 2·max(n, d)².
func TestRationalReconstruction(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := big.NewInt(rapid.Int64Range(-1<<50, 1<<50).Draw(t, "n"))
		d := big.NewInt(rapid.Int64Range(1, 1<<50).Draw(t, "d"))
		m := new(big.Int).SetUint64(1<<61 - 1)
		m.Mul(m, m)
		want := new(big.Rat).SetFrac(n, d)
		inverse := new(big.Int).ModInverse(d, m)
		x := inverse.Mul(inverse, n)
		got, ok := rational(x.Mod(x, m), m)
		require.True(t, ok)
		assert.Zero(t, want.Cmp(got))
	})
}

// TestLyingPrimes: a denominator divisible by the first prime of the search does
// not mislead it.
func TestLyingPrimes(t *testing.T) {
	var p *big.Int
	for x := range primes {
		p = new(big.Int).SetUint64(x)
		break
	}
	// a(n) = (p+1)/p·a(n−1): order 1, and modulo p the terms are 0, 0, 0, 1, ….
	var terms []*big.Int
	for i := range int64(4) {
		x := new(big.Int).Exp(new(big.Int).Add(p, big.NewInt(1)), big.NewInt(i), nil)
		terms = append(terms, x.Mul(x, new(big.Int).Exp(p, big.NewInt(3-i), nil)))
	}
	s, err := NewSequence(terms...)
	require.NoError(t, err)
	r, err := s.Recurrence(context.Background())
	require.NoError(t, err)
	assert.Equal(t, Found, r.Verdict)
	assert.Equal(t, 1, r.Rule.Order())
	// Multiples of p vanish modulo p, which makes the length 0 there.
	for i := range terms {
		terms[i] = new(big.Int).Mul(p, big.NewInt([]int64{1, 2, 5, 13}[i]))
	}
	s, err = NewSequence(append(terms, new(big.Int).Mul(p, big.NewInt(34)))...)
	require.NoError(t, err)
	r, err = s.Recurrence(context.Background())
	require.NoError(t, err)
	assert.Equal(t, Found, r.Verdict)
	assert.Equal(t, 2, r.Rule.Order())
}
