package survey

import (
	"context"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold"
)

func count(t require.TestingT, f orbifold.Family, bound *big.Int) int64 {
	n, err := Count(context.Background(), f, bound)
	require.NoError(t, err)
	return n.Int64()
}

// Count is the number of slopes that plain enumeration finds, and Table counts the
// orbits in full.
func TestCountIsTheNumberOfSlopes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		list := rapid.SliceOfN(bounds(f, 60), 1, 5).Draw(t, "bounds")
		rows, err := Table(context.Background(), f, list, Options{})
		require.NoError(t, err)
		for i, b := range list {
			r := Up(f, b)
			require.Equal(t, int64(len(brute(r))), rows[i].Slopes.Int64(), "bound %v", b)
			r.All = true
			require.Equal(t, int64(len(brute(r))), rows[i].All.Int64(), "bound %v", b)
			require.Equal(t, b.String(), rows[i].Bound.String())
			require.InDelta(t, logOf(b)+logOf(f.K()), rows[i].X, 1e-9)
			require.Equal(t, rows[i].Slopes.Int64(), count(t, f, b))
		}
	})
}

func logOf(n *big.Int) float64 {
	lo, _, _ := orbifold.LogInteger(n, 60)
	x, _ := lo.Float64()
	return x
}

// Farther out, where most slopes are counted and not visited, Count agrees with the walk.
func TestCountIsTheNumberOfVisits(t *testing.T) {
	for _, f := range tenFamilies() {
		for _, d := range []int{far(200), far(500)} {
			q, err := Sweep(context.Background(), Up(f, PowerOfTen(d)), Tally(), Options{})
			require.NoError(t, err)
			assert.Equal(t, int64(q.Slopes), count(t, f, PowerOfTen(d)), "%v to 10^%d", f, d)
		}
	}
}

// A bound that is a number far out counts it, one less does not.
func TestCountIsExactAtTheBound(t *testing.T) {
	f := orbifold.Family{}
	for _, n := range []int64{400, 1501, 3000} {
		x := fibonacci(n)
		assert.Equal(t, boolToInt(n%2 == 1), count(t, f, x)-count(t, f, new(big.Int).Sub(x, big.NewInt(1))), "F(%d)", n)
	}
}

// With lengths made so coarse that many slopes are left open, the count is the same.
func TestCountDecidesWhatLengthsLeaveOpen(t *testing.T) {
	for _, f := range tenFamilies() {
		w, err := newWalker(Up(f, PowerOfTen(60)))
		require.NoError(t, err)
		edges := w.near(func(coords, *big.Int) {})
		mu := moebius(1000)
		for _, e := range edges {
			entry := w.enter(e)
			want, err := w.behindEntry(w.scale, entry, mu)
			require.NoError(t, err)
			entry.u.lo -= entry.u.lo / 50
			entry.y1.hi += entry.y1.hi / 50
			got, err := w.behindEntry(w.scale, entry, mu)
			require.NoError(t, err)
			require.Equal(t, want, got)
		}
	}
}

func boolToInt(b bool) int64 {
	if b {
		return 1
	}
	return 0
}

func fibonacci(n int64) *big.Int {
	a, b := big.NewInt(0), big.NewInt(1)
	for range n {
		a, b = b, a.Add(a, b)
	}
	return a
}

func TestCountsFromOutside(t *testing.T) {
	f := orbifold.Family{}
	one := big.NewInt(1)
	// OEIS A002559, comment of 2009: the Markov numbers smaller than F(5001) are 1,046,858.
	assert.Equal(t, int64(1_046_858), count(t, f, new(big.Int).Sub(fibonacci(5001), one)))
	// OEIS A158384: 93 Markov numbers are ≤ 2·10⁹.
	assert.Equal(t, int64(93), count(t, f, big.NewInt(2_000_000_000)))
	// OEIS A158381: positions of F(1) = 1, F(3) = 2, F(5), … among the Markov numbers.
	positions := []int64{1, 2, 3, 4, 6, 7, 10, 12, 15, 17, 22, 24, 30, 34, 38, 43, 50, 55, 63, 67, 73, 81, 89, 96, 105, 113, 121,
		131, 142, 151, 163, 171, 182, 190, 204, 215, 228, 239, 254, 266, 282, 294, 308, 323, 337, 354, 371, 383, 401, 417, 435,
		451, 469, 482, 502, 519, 542, 562, 583}
	var list []*big.Int
	for i := range positions {
		list = append(list, fibonacci(int64(2*i+1)))
	}
	checkPositions(t, list, positions)
	// OEIS A158384: positions of the Pell numbers 1, 5, 29, ….
	positions = []int64{1, 3, 5, 8, 13, 18, 25, 33, 41, 52, 64, 75, 90, 104, 119, 137, 157, 174, 193, 214, 236, 260, 289, 312, 340, 369,
		396, 426, 458, 487, 523, 560, 596, 631, 671, 708, 751, 794, 835, 879, 924, 968, 1019, 1066, 1116, 1165, 1218, 1269, 1322, 1377,
		1430, 1488, 1551}
	list = nil
	a, b := big.NewInt(1), big.NewInt(5)
	for range positions {
		list = append(list, a)
		a, b = b, new(big.Int).Sub(new(big.Int).Mul(big.NewInt(6), b), a)
	}
	checkPositions(t, list, positions)
}

func checkPositions(t *testing.T, list []*big.Int, positions []int64) {
	rows, err := Table(context.Background(), orbifold.Family{}, list, Options{})
	require.NoError(t, err)
	for i, r := range rows {
		assert.Equal(t, positions[i], r.Slopes.Int64(), "position of %v", list[i])
	}
}

// Slopes with arccosh(t/2) ≤ 300: computed by an independent slow model (section
// "values computed" of the reference values of this project).
func TestSlopesWithLengthUpTo300(t *testing.T) {
	for _, c := range []struct {
		f    orbifold.Family
		want int
	}{
		{orbifold.Family{}, 97_584}, {orbifold.MustNew(1, 1, 1), 37_536},
		{orbifold.MustNew(2, 2, 2), 24_384}, {orbifold.MustNew(1, 2, 3), 24_879},
	} {
		k := logOf(c.f.K())
		r := Up(c.f, PowerOfTen(131))
		r.All = true
		n := 0
		require.NoError(t, Walk(context.Background(), r, func(v *Visit) bool {
			if _, hi := v.Log(); hi+k <= 300 {
				n++
			}
			return true
		}))
		assert.Equal(t, c.want, n, "%v", c.f)
	}
}

// The distinct Markov numbers up to 10^15000 other than 1 and 2, from a one-thread sketch
// of this project's mathematics.
func TestCountFarOut(t *testing.T) {
	assert.Equal(t, int64(215_596_023+2), count(t, orbifold.Family{}, PowerOfTen(15000)))
}

func TestCountRefuses(t *testing.T) {
	ctx := context.Background()
	f := orbifold.Family{}
	for _, b := range []*big.Int{nil, new(big.Int), big.NewInt(-5), PowerOfTen(1 << 30)} {
		_, err := Count(ctx, f, b)
		assert.ErrorIs(t, err, ErrBound)
		_, err = Table(ctx, f, []*big.Int{big.NewInt(1), b}, Options{})
		assert.ErrorIs(t, err, ErrBound)
	}
	_, err := Table(ctx, f, make([]*big.Int, MaxBounds+1), Options{})
	require.ErrorIs(t, err, ErrOptions)
	_, err = Table(ctx, f, nil, Options{Workers: -1})
	require.ErrorIs(t, err, ErrOptions)
	rows, err := Table(ctx, f, nil, Options{})
	require.NoError(t, err)
	assert.Empty(t, rows)
	done, cancel := context.WithCancel(ctx)
	cancel()
	_, err = Count(done, f, PowerOfTen(1000))
	require.ErrorIs(t, err, context.Canceled)
}

// primitive counts what two loops and a greatest common divisor count.
func TestPrimitiveVectorsInATriangle(t *testing.T) {
	mu := moebius(2000)
	rapid.Check(t, func(t *rapid.T) {
		x, y := rapid.Int64Range(1, 60).Draw(t, "x"), rapid.Int64Range(1, 60).Draw(t, "y")
		z := rapid.Int64Range(0, 900).Draw(t, "z")
		all, coprime := int64(0), int64(0)
		for m := int64(1); m*x <= z; m++ {
			for n := int64(1); m*x+n*y <= z; n++ {
				all++
				if gcd(m, n) == 1 {
					coprime++
				}
			}
		}
		assert.Equal(t, all, triangle(x, y, z))
		assert.Equal(t, coprime, primitive(x, y, z, mu))
	})
}

// Σ over d | n of μ(d) is 1 for n = 1 and 0 otherwise.
func TestMoebius(t *testing.T) {
	mu := moebius(500)
	for n := 1; n <= 500; n++ {
		sum := 0
		for d := 1; d <= n; d++ {
			if n%d == 0 {
				sum += int(mu[d])
			}
		}
		assert.Equal(t, int(boolToInt(n == 1)), sum)
	}
	assert.Len(t, moebius(0), 1)
}

// Zagier's constant, G/6 of the classical family: OEIS A261613.
func TestGrowthIsZagiersConstant(t *testing.T) {
	lo, hi, err := Growth(context.Background(), orbifold.Family{})
	require.NoError(t, err)
	checkGrowth(t, lo, hi)
	want, _, err := big.ParseFloat("0.18071710471180647805779264904916762147630562767088273480538889665056", 10, 300, big.ToNearestEven)
	require.NoError(t, err)
	want.Mul(want, big.NewFloat(6))
	assert.LessOrEqual(t, lo.Cmp(want), 0)
	assert.GreaterOrEqual(t, hi.Cmp(want), 0)
}

// checkGrowth asserts that an enclosure gives 30 digits.
func checkGrowth(t *testing.T, lo, hi *big.Float) {
	width := new(big.Float).Sub(hi, lo)
	relative, _ := new(big.Float).Quo(width, lo).Float64()
	assert.Less(t, relative, 1e-31)
	assert.GreaterOrEqual(t, width.Sign(), 0)
}

// Counts far out are G·X² to the accuracy that is known of them, X·log X.
func TestGrowthPredictsCounts(t *testing.T) {
	for _, f := range tenFamilies()[2:7:7] {
		lo, hi, err := Growth(context.Background(), f)
		require.NoError(t, err)
		checkGrowth(t, lo, hi)
		rows, err := Table(context.Background(), f, []*big.Int{PowerOfTen(5000)}, Options{})
		require.NoError(t, err)
		assert.InDelta(t, 1, rows[0].Ratio(lo), 0.03, "%v", f)
	}
	assert.Zero(t, Row{}.Ratio(nil))
}

func TestGrowthStops(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, _, err := Growth(ctx, orbifold.Family{})
	require.ErrorIs(t, err, context.Canceled)
}

func TestPi(t *testing.T) {
	p := pi()
	lo, _ := p.lo.Float64()
	assert.InDelta(t, math.Pi, lo, 1e-15)
	// π to 50 decimals (memory).
	want, _, err := big.ParseFloat("3.14159265358979323846264338327950288419716939937510", 10, 300, big.ToNearestEven)
	require.NoError(t, err)
	width, _ := new(big.Float).Sub(p.hi, p.lo).Float64()
	assert.Less(t, width, 1e-50)
	diff, _ := new(big.Float).Sub(p.lo, want).Float64()
	assert.Less(t, math.Abs(diff), 1e-49)
}
