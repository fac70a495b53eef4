package survey

import (
	"context"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// The keys that occur more than once are those that a map finds, for all sizes of buckets.
func TestRepeatedKeysAreFound(t *testing.T) {
	for _, size := range []struct{ keys, buckets int }{{1, 1 << 10}, {1 << 30, 1}, {50, 3}, {7, 1 << 14}, {bucketKeys, maxBuckets}} {
		tune(t, size.keys, size.buckets)
		rapid.Check(t, func(t *rapid.T) {
			key := rapid.OneOf(rapid.Uint64(), rapid.Uint64Range(0, 50), rapid.Just(uint64(1<<64-1)), rapid.Custom(func(t *rapid.T) uint64 {
				return rapid.Uint64().Draw(t, "spread") * keyFactor
			}))
			keys := rapid.SliceOfN(key, 0, 400).Draw(t, "keys")
			count := make(map[uint64]int)
			for _, k := range keys {
				count[k]++
			}
			var want []uint64
			for k, n := range count {
				if n > 1 {
					want = append(want, k)
				}
			}
			slices.Sort(want)
			workers := rapid.IntRange(1, 3).Draw(t, "workers")
			p, ok := newPlan(float64(len(keys)), workers, 1<<30)
			require.True(t, ok)
			p.chunks += 100 + len(keys) // drawn keys are not spread evenly
			space := newKeySpace(p, workers)
			var got []uint64
			for from := 0; from < 1<<p.bits; from += p.pass {
				space.begin(from)
				for i, k := range keys {
					space.workers[i%workers].put(k)
				}
				require.False(t, space.full.Load())
				list, err := space.repeated(context.Background())
				require.NoError(t, err)
				got = append(got, list...)
			}
			require.Equal(t, want, got)
		})
	}
}

// A space that keys overflow says so and does not write past its end.
func TestFullSpaceIsNoticed(t *testing.T) {
	p, ok := newPlan(10, 1, MinMemory)
	require.True(t, ok)
	space := newKeySpace(p, 1)
	space.begin(0)
	for range uint64(100_000) {
		space.workers[0].put(7)
	}
	assert.True(t, space.full.Load())
}

// Equal numbers have equal keys, and different residues modulo 2⁶⁴ alone different ones.
func TestKeyIsAFunctionOfTheNumber(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a := vertex{r64: rapid.Uint64().Draw(t, "r64"), r61: rapid.Uint64Range(0, mersenne-1).Draw(t, "r61")}
		b := a
		assert.Equal(t, a.key(), b.key())
		b.r64 ^= rapid.Uint64Min(1).Draw(t, "difference")
		assert.NotEqual(t, a.key(), b.key())
	})
}

// Residues modulo 2⁶¹ − 1 are those of math/big.
func TestArithmeticModuloMersenne(t *testing.T) {
	residue := rapid.OneOf(rapid.Uint64Range(0, mersenne-1), rapid.SampledFrom([]uint64{0, 1, mersenne - 1}))
	rapid.Check(t, func(t *rapid.T) {
		x, y, u, v := residue.Draw(t, "x"), residue.Draw(t, "y"), residue.Draw(t, "u"), residue.Draw(t, "v")
		mod := func(z uint64) uint64 { return z % mersenne }
		any64 := rapid.Uint64().Draw(t, "any")
		assert.Equal(t, mod(any64), fold(any64))
		product := bigMod(x, y)
		assert.Equal(t, product, mul61(x, y))
		assert.Equal(t, mod(mod(product+mersenne-u)+mersenne-v), mulSub61(x, y, u, v))
		if x != 0 {
			assert.Equal(t, uint64(1), mul61(x, inv61(x)))
		}
	})
	assert.Zero(t, inv61(0))
}
