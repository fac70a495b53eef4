package survey

import (
	"context"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// exactly is the plain model of an ordering: all numbers in a map.
func exactly(o Ordering) map[farey.Point]*big.Int {
	out := make(map[farey.Point]*big.Int)
	for q := int64(0); q <= o.Den; q++ {
		for p := -o.Num; p <= o.Num; p++ {
			g := gcd(q, p)
			switch {
			case g == 0, o.Norm != 0 && p*p+q*q > o.Norm*o.Norm:
				continue
			case q == 0 && p < 0:
				continue
			case !o.Multiples && g != 1, o.Index && (p < 0 || p > q):
				continue
			case o.Index && !o.Multiples && (p == 0 || p == q):
				continue
			}
			s, _ := farey.FromInts(p/g, q/g)
			if o.Index {
				s, _ = farey.FromInts(p/g, (q+p)/g)
			}
			m, _ := o.Family.Number(s)
			before, n := new(big.Int), m
			for range g - 1 {
				next := new(big.Int).Mul(big.NewInt(3), m)
				next.Mul(next, n).Sub(next, before)
				before, n = n, next
			}
			out[farey.Point{X: q, Y: p}] = n
		}
	}
	return out
}

// Trends are those of exact numbers compared one by one.
func TestTrendsAreExact(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		o := Ordering{
			Index: rapid.Bool().Draw(t, "index"), Multiples: rapid.Bool().Draw(t, "multiples"),
			Num: rapid.Int64Range(0, 12).Draw(t, "p"), Den: rapid.Int64Range(1, 12).Draw(t, "q"),
		}
		if rapid.Bool().Draw(t, "disc") {
			o.Norm = rapid.Int64Range(1, 12).Draw(t, "norm")
		}
		if !o.Multiples {
			o.Family = families().Draw(t, "family")
		}
		numbers := exactly(o)
		directions := Directions(4)
		e, err := o.Compare(context.Background(), directions, Options{Workers: 2})
		require.NoError(t, err)
		trends := make(map[farey.Point]Trend)
		for _, x := range e.Trends {
			trends[x.Direction] = x
		}
		for _, d := range directions {
			var want Trend
			var steps [3][]Step // by order + 1
			for x := int64(0); x <= o.Den; x++ {
				for y := -o.Num; y <= o.Num; y++ {
					a := farey.Point{X: x, Y: y}
					if numbers[a] == nil {
						continue
					}
					for k := int64(1); k < 40; k++ {
						b := farey.Point{X: x + k*d.X, Y: y + k*d.Y}
						if numbers[b] == nil {
							continue
						}
						c := numbers[b].Cmp(numbers[a])
						steps[c+1] = append(steps[c+1], Step{a, b, c})
						break
					}
				}
			}
			want.Falls, want.Ties, want.Rises = int64(len(steps[0])), int64(len(steps[1])), int64(len(steps[2]))
			got := trends[d]
			require.Equal(t, [3]int64{want.Rises, want.Ties, want.Falls}, [3]int64{got.Rises, got.Ties, got.Falls}, "direction %v", d)
			rare := steps[0]
			if want.Rises < want.Falls {
				rare = steps[2]
			}
			require.ElementsMatch(t, append(rare, steps[1]...), got.Exceptions)
			require.Equal(t, want.Rises > 0 && want.Falls+want.Ties == 0, got.Rising())
			require.Equal(t, want.Falls > 0 && want.Rises+want.Ties == 0, got.Falling())
		}
	})
}

// "On the ordering of the Markov numbers", Adv. Appl. Math. 143 (2023): by index and primitive
// points with 0 < p < q, numbers increase with q along lines of slope ≥ −8/7, decrease along
// those of slope ≤ −5/4. In a box that is large enough nothing between is monotone.
func TestExtremeDirectionsOfMarkovNumbers(t *testing.T) {
	e, err := Ordering{Index: true, Num: 100, Den: 100}.Compare(context.Background(), Directions(12), Options{})
	require.NoError(t, err)
	require.True(t, e.AnyRising && e.AnyFalling)
	assert.Equal(t, farey.Point{X: 7, Y: -8}, e.Rising)
	assert.Equal(t, farey.Point{X: 4, Y: -5}, e.Falling)
	for _, x := range e.Trends {
		steep := 4*x.Direction.Y <= -5*x.Direction.X
		flat := 7*x.Direction.Y >= -8*x.Direction.X
		assert.Equal(t, flat, x.Rising(), "%v", x.Direction)
		assert.Equal(t, steep, x.Falling(), "%v", x.Direction)
	}
}

// "On the Markov numbers: fixed numerator, denominator, and sum conjectures", Adv. Appl.
// Math. 130 (2021): with fixed q, fixed p and fixed p + q, non-primitive vectors too.
func TestFixedNumeratorDenominatorAndSum(t *testing.T) {
	directions := []farey.Point{{X: 0, Y: 1}, {X: 1, Y: 0}, {X: 1, Y: -1}}
	e, err := Ordering{Index: true, Multiples: true, Num: 60, Den: 60}.Compare(context.Background(), directions, Options{})
	require.NoError(t, err)
	require.Len(t, e.Trends, 3)
	for _, x := range e.Trends {
		assert.True(t, x.Rising(), "%v", x.Direction)
	}
	// "Orderings of k-Markov numbers", arXiv 2512.04026: the same for weights (k,k,k), primitive vectors.
	for k := int64(1); k < 4; k++ {
		e, err := Ordering{Family: orbifold.MustNew(k, k, k), Index: true, Num: 40, Den: 40}.Compare(context.Background(), directions, Options{})
		require.NoError(t, err)
		for _, x := range e.Trends {
			assert.True(t, x.Rising(), "%v", x.Direction)
		}
	}
}

// With enclosures that decide nothing, exact numbers give the same trends.
func TestNearTiesAreDecidedExactly(t *testing.T) {
	for _, o := range []Ordering{{Index: true, Multiples: true, Num: 9, Den: 9}, {Family: orbifold.MustNew(3, 0, 0), Num: 5, Den: 6}} {
		v, err := o.table(context.Background())
		require.NoError(t, err)
		for _, d := range Directions(3) {
			want, err := v.along(context.Background(), d, 1000)
			require.NoError(t, err)
			wide := &values{Ordering: o, exact: make(map[farey.Point]*big.Int)}
			for i := range v.lo {
				wide.lo, wide.hi = append(wide.lo, v.lo[i]-1e6), append(wide.hi, v.hi[i]+1e6)
			}
			got, err := wide.along(context.Background(), d, 1000)
			require.NoError(t, err)
			require.Equal(t, want, got)
		}
	}
}

func TestOrderingRefuses(t *testing.T) {
	ctx := context.Background()
	one := []farey.Point{{X: 1, Y: 0}}
	for _, o := range []Ordering{
		{}, {Num: -1, Den: 3}, {Num: 1 << 20, Den: 1 << 20}, {Num: 1, Den: 1 << 60}, {Num: 3, Den: 3, Norm: -1}, {Num: 3, Den: 3, Norm: 1 << 40},
		{Family: orbifold.MustNew(1, 0, 0), Multiples: true, Num: 3, Den: 3},
	} {
		_, err := o.Compare(ctx, one, Options{})
		assert.ErrorIs(t, err, ErrRegion, "%+v", o)
	}
	o := Ordering{Num: 9, Den: 9}
	for _, d := range []farey.Point{{}, {X: 1 << 40, Y: 1}} {
		_, err := o.Compare(ctx, []farey.Point{d}, Options{})
		assert.ErrorIs(t, err, ErrOptions)
	}
	_, err := o.Compare(ctx, one, Options{Workers: -1})
	require.ErrorIs(t, err, ErrOptions)
	_, err = o.Compare(ctx, one, Options{Results: 1})
	require.ErrorIs(t, err, ErrTooMany)
	done, cancel := context.WithCancel(ctx)
	cancel()
	_, err = Ordering{Num: 300, Den: 300}.Compare(done, one, Options{})
	require.ErrorIs(t, err, context.Canceled)
	e, err := o.Compare(ctx, []farey.Point{{X: -1, Y: 0}, {X: 1, Y: 0}, {X: 0, Y: -1}}, Options{})
	require.NoError(t, err)
	assert.Len(t, e.Trends, 2)
	assert.Empty(t, Directions(0))
	assert.Empty(t, Directions(1<<20))
	assert.Len(t, Directions(1), 4)
}
