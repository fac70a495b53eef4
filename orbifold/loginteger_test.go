package orbifold_test

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold"
)

// checkEnclosure asserts lo ≤ hi and hi − lo ≤ 2^(1−bits).
func checkEnclosure(t require.TestingT, lo, hi *big.Float, bits uint) {
	width := new(big.Float).SetPrec(1000).Sub(hi, lo)
	require.GreaterOrEqual(t, width.Sign(), 0)
	limit := new(big.Float).SetMantExp(big.NewFloat(1), 1-int(bits))
	require.LessOrEqual(t, width.Cmp(limit), 0, "width %v for %d bits", width, bits)
}

// The logarithm of a product is the sum of those of its factors.
func TestLogIntegerIsAdditive(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		bits := uint(rapid.IntRange(1, 300).Draw(t, "bits"))
		draw := func(name string) *big.Int {
			n := new(big.Int).SetUint64(rapid.Uint64Min(1).Draw(t, name))
			return n.Lsh(n, uint(rapid.SampledFrom([]int{0, 1, 63, 1000}).Draw(t, name+" shift")))
		}
		x, y := draw("x"), draw("y")
		xlo, xhi, err := orbifold.LogInteger(x, bits)
		require.NoError(t, err)
		ylo, yhi, err := orbifold.LogInteger(y, bits)
		require.NoError(t, err)
		lo, hi, err := orbifold.LogInteger(new(big.Int).Mul(x, y), bits)
		require.NoError(t, err)
		checkEnclosure(t, lo, hi, bits)
		wide := func() *big.Float { return new(big.Float).SetPrec(1000) }
		assert.LessOrEqual(t, lo.Cmp(wide().Add(xhi, yhi)), 0)
		assert.GreaterOrEqual(t, hi.Cmp(wide().Add(xlo, ylo)), 0)
	})
}

// math.Log, documented to be near the last place, lies within the enclosure up to
// that much.
func TestLogIntegerAgreesWithFloatingPoint(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.Int64Min(1).Draw(t, "n")
		lo, hi, err := orbifold.LogInteger(big.NewInt(n), 80)
		require.NoError(t, err)
		l, _ := lo.Float64()
		h, _ := hi.Float64()
		assert.InDelta(t, math.Log(float64(n)), l, 1e-13)
		assert.InDelta(t, l, h, 1e-14)
	})
}

// λ + 1/λ = t: the enclosure of ln λ lies between ln(t−1) and ln t, and
// 2·ln λ is the logarithm of the unit of trace t² − 2.
func TestLogUnitDoublesWithTheTrace(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		bits := uint(rapid.IntRange(1, 200).Draw(t, "bits"))
		tr := new(big.Int).SetUint64(rapid.Uint64Min(3).Draw(t, "t"))
		lo, hi, err := orbifold.LogUnit(tr, bits)
		require.NoError(t, err)
		checkEnclosure(t, lo, hi, bits)
		square := new(big.Int).Mul(tr, tr)
		lo2, hi2, err := orbifold.LogUnit(square.Sub(square, big.NewInt(2)), bits)
		require.NoError(t, err)
		twice := func(x *big.Float) *big.Float { return new(big.Float).SetPrec(1000).Add(x, x) }
		assert.LessOrEqual(t, lo2.Cmp(twice(hi)), 0)
		assert.GreaterOrEqual(t, hi2.Cmp(twice(lo)), 0)
		below, _, err := orbifold.LogInteger(new(big.Int).Sub(tr, big.NewInt(1)), bits)
		require.NoError(t, err)
		_, above, err := orbifold.LogInteger(tr, bits)
		require.NoError(t, err)
		assert.GreaterOrEqual(t, hi.Cmp(below), 0)
		assert.LessOrEqual(t, lo.Cmp(above), 0)
	})
}

func TestLogarithmsOfIntegersRefuse(t *testing.T) {
	for _, n := range []*big.Int{nil, new(big.Int), big.NewInt(-1)} {
		_, _, err := orbifold.LogInteger(n, 64)
		require.ErrorIs(t, err, orbifold.ErrNotPositive)
		_, _, err = orbifold.LogUnit(n, 64)
		require.ErrorIs(t, err, orbifold.ErrNotPositive)
	}
	_, _, err := orbifold.LogUnit(big.NewInt(2), 64)
	require.ErrorIs(t, err, orbifold.ErrNotPositive)
	for _, bits := range []uint{0, orbifold.MaxLogPrecision + 1} {
		_, _, err := orbifold.LogInteger(big.NewInt(5), bits)
		require.ErrorIs(t, err, orbifold.ErrPrecision)
		_, _, err = orbifold.LogUnit(big.NewInt(5), bits)
		require.ErrorIs(t, err, orbifold.ErrPrecision)
	}
}

func BenchmarkLogInteger(b *testing.B) {
	n := new(big.Int).Exp(big.NewInt(7), big.NewInt(50), nil)
	for b.Loop() {
		_, _, _ = orbifold.LogInteger(n, 52)
	}
}
