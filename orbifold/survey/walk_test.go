package survey

import (
	"context"
	"errors"
	"math/big"
	"slices"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// checkArc asserts what an arc says of the number n.
func checkArc(t require.TestingT, a Arc, n *big.Int) {
	require.Equal(t, low64(n), a.Mod64)
	require.Equal(t, mod61(n), a.Mod61)
	lo, hi, err := orbifold.LogInteger(n, 100)
	require.NoError(t, err)
	require.LessOrEqual(t, big.NewFloat(a.LogLo).Cmp(lo), 0, "lower end %v of ln %v", a.LogLo, n)
	require.GreaterOrEqual(t, big.NewFloat(a.LogHi).Cmp(hi), 0, "upper end %v of ln %v", a.LogHi, n)
	require.LessOrEqual(t, a.LogHi-a.LogLo, 1e-10*(1+a.LogHi))
}

// The walk meets exactly the slopes of the region, each once, with their
// residues, logarithms, classes and parents, as the plain enumeration has them.
func TestWalkIsTheRegion(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		r := regions(f, 60).Draw(t, "region")
		want := make(map[farey.Key]found)
		for _, x := range brute(r) {
			want[x.slope.Key()] = x
		}
		err := Walk(context.Background(), r, func(v *Visit) bool {
			x, ok := want[v.Slope().Key()]
			require.True(t, ok, "slope %v", v.Slope())
			delete(want, v.Slope().Key())
			checkArc(t, v.Arc(), x.number)
			assert.Equal(t, f, v.Family())
			lo, hi := v.Log()
			assert.Equal(t, [2]float64{v.Arc().LogLo, v.Arc().LogHi}, [2]float64{lo, hi})
			assert.Equal(t, x.slope.Class(), v.Class())
			assert.Equal(t, v.Arc().Slope().Key(), x.slope.Key())
			a, b, ok := x.node.Parents()
			u, w, behind, has := v.Parents()
			require.Equal(t, ok, has)
			if !ok {
				return true
			}
			if !u.Slope().Equal(a) {
				a, b = b, a
			}
			require.True(t, u.Slope().Equal(a) && w.Slope().Equal(b), "parents %v %v of %v", u.Slope(), w.Slope(), x.slope)
			un, _ := f.Number(a)
			wn, _ := f.Number(b)
			on, _ := f.Number(behind.Slope())
			assert.LessOrEqual(t, un.Cmp(wn), 0)
			checkArc(t, u, un)
			checkArc(t, w, wn)
			checkArc(t, behind, on)
			n, err := v.Number()
			require.NoError(t, err)
			assert.Equal(t, x.number.String(), n.String())
			return true
		})
		require.NoError(t, err)
		require.Empty(t, want, "slopes that were not visited")
	})
}

// Enclosures far out contain the logarithm that LogBig has, and are narrow.
func TestLogarithmsOfTheWalkAreEnclosures(t *testing.T) {
	for _, f := range tenFamilies() {
		r := Up(f, PowerOfTen(far(1200)))
		next := 1
		i := 0
		require.NoError(t, Walk(context.Background(), r, func(v *Visit) bool {
			if i++; i < next {
				return true
			}
			next += 1 + i/scaled(12)
			lo, hi := v.Log()
			l, h, err := f.LogBig(v.Slope(), 90)
			require.NoError(t, err)
			require.LessOrEqual(t, big.NewFloat(lo).Cmp(l), 0, "family %v slope %v", f, v.Slope())
			require.GreaterOrEqual(t, big.NewFloat(hi).Cmp(h), 0, "family %v slope %v", f, v.Slope())
			require.Less(t, hi-lo, 1e-9, "family %v slope %v", f, v.Slope())
			n, err := f.NumberMod(v.Slope(), new(big.Int).SetUint64(mersenne))
			require.NoError(t, err)
			require.Equal(t, n.Uint64(), v.Mod61())
			return true
		}))
	}
}

// A bound that is itself a number of the family keeps that number, and one less
// loses it and those equal to it: the decision is exact far out too.
func TestBoundIsExact(t *testing.T) {
	for _, f := range tenFamilies() {
		for _, s := range []string{"1/300", "123/457", "-77/30", "200/1", "97/98"} {
			slope := f.Representative(farey.MustParse(s))
			n, err := f.Number(slope)
			require.NoError(t, err)
			has := func(bound *big.Int) bool {
				found := false
				r := Up(f, bound)
				r.Among = &Interval{slope, slope}
				require.NoError(t, Walk(context.Background(), r, func(v *Visit) bool {
					found = v.Slope().Equal(slope)
					return true
				}))
				return found
			}
			assert.True(t, has(n), "%v at %v", f, slope)
			assert.False(t, has(new(big.Int).Sub(n, big.NewInt(1))), "%v at %v", f, slope)
		}
	}
}

// Slopes are enumerated in a box alone as farey.Box does.
func TestWalkOfABox(t *testing.T) {
	for _, f := range tenFamilies() {
		r := Region{Family: f, Box: &Box{Num: 23, Den: 31}, All: true}
		var got []farey.Slope
		require.NoError(t, Walk(context.Background(), r, func(v *Visit) bool {
			got = append(got, v.Slope())
			n, err := v.Number()
			require.NoError(t, err)
			a := v.Arc()
			assert.Equal(t, low64(n), a.Mod64)
			return true
		}))
		slices.SortFunc(got, farey.Slope.Cmp)
		all, err := farey.Box(23, 31)
		require.NoError(t, err)
		i := 0
		for s := range all {
			require.True(t, i < len(got) && got[i].Equal(s), "slope %d", i)
			i++
		}
		require.Len(t, got, i)
	}
}

// A bound far past everything in the box bounds nothing.
func TestBoundPastTheBox(t *testing.T) {
	far := PowerOfTen(MaxBoundBits / 4)
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(2, 0, 1), orbifold.MustNew(1<<62, 1<<40, 3)} {
		n := 0
		r := Region{Family: f, Bound: far, Box: &Box{Num: 1, Den: 400}, All: true}
		require.NoError(t, Walk(context.Background(), r, func(v *Visit) bool {
			n++
			x, err := v.Number()
			require.NoError(t, err)
			checkArc(t, v.Arc(), x)
			return true
		}))
		assert.Equal(t, 802, n) // 0, 1/0, ±1, ±1/2, … ±1/400
	}
}

func TestWalkDoesNotAllocate(t *testing.T) {
	w, err := newWalker(Up(orbifold.MustNew(2, 0, 1), PowerOfTen(400)))
	require.NoError(t, err)
	n := 0
	w.sink = func(v *Visit) bool { n++; lo, _ := v.Log(); return lo >= 0 }
	_, edges := w.base()
	var deep []edge
	w.far = func(e edge) { deep = append(deep, e) }
	for _, e := range edges {
		w.tree(e)
	}
	w.far = nil
	require.NotEmpty(t, deep)
	entry := w.enter(deep[len(deep)/2])
	allocated := testing.AllocsPerRun(10, func() {
		f := &w.frame[0]
		f.u, f.uLo, f.uHi = entry.u, entry.uLo, entry.uHi
		f.y[0], f.y[1] = entry.y0, entry.y1
		w.fan(0)
	})
	assert.Zero(t, allocated)
	assert.Positive(t, n)
}

func TestWalkStops(t *testing.T) {
	n := 0
	r := Up(orbifold.Family{}, PowerOfTen(2000))
	require.NoError(t, Walk(context.Background(), r, func(*Visit) bool { n++; return n < 1000 }))
	assert.Equal(t, 1000, n)
	for _, stop := range []int{1, 2, 3, 40} {
		n = 0
		require.NoError(t, Walk(context.Background(), r, func(*Visit) bool { n++; return n < stop }))
		assert.Equal(t, stop, n)
	}

	ctx, cancel := context.WithCancel(context.Background())
	var since time.Time
	err := Walk(ctx, Up(orbifold.Family{}, PowerOfTen(200_000)), func(*Visit) bool {
		if n++; n == 100_000 {
			since = time.Now()
			cancel()
		}
		return true
	})
	require.ErrorIs(t, err, context.Canceled)
	assert.Less(t, time.Since(since), time.Second) // 100 ms on a machine with nothing else to do
}

func TestRegionsAreRefused(t *testing.T) {
	one := big.NewInt(1)
	huge, err := farey.FromInts(1, 1<<40)
	require.NoError(t, err)
	for name, c := range map[string]struct {
		r    Region
		want error
	}{
		"endless":        {Region{}, ErrRegion},
		"bound 0":        {Region{Bound: new(big.Int)}, ErrBound},
		"bound too long": {Up(orbifold.Family{}, PowerOfTen(1<<30)), ErrBound},
		"box below 0":    {Region{Box: &Box{-1, 3}}, ErrRegion},
		"box too large":  {Region{Box: &Box{3, MaxBox + 1}}, ErrRegion},
		"interval":       {Region{Bound: one, Among: &Interval{huge, huge}}, ErrRegion},
		"fan":            {Region{Bound: one, Fans: []farey.Slope{huge}}, ErrRegion},
		"too many fans":  {Region{Bound: one, Fans: make([]farey.Slope, MaxConstraints+1)}, ErrRegion},
		"line":           {Region{Bound: one, Lines: []Line{{1 << 31, 0, 0}}}, ErrRegion},
		"no direction":   {Region{Bound: one, Lines: []Line{{0, 0, 1}}}, ErrRegion},
		"too many lines": {Region{Bound: one, Lines: make([]Line, MaxConstraints+1)}, ErrRegion},
	} {
		err := Walk(context.Background(), c.r, func(*Visit) bool { return true })
		assert.ErrorIs(t, err, c.want, name)
	}
	assert.False(t, errors.Is(ErrBound, ErrRegion))
}

// The intersection of two regions has the slopes that both have.
func TestAndIsIntersection(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		a, b := regions(f, 30).Draw(t, "a"), regions(f, 30).Draw(t, "b")
		a.All = b.All
		both, err := a.And(b)
		require.NoError(t, err)
		in := make(map[farey.Key]int)
		for _, r := range []Region{a, b} {
			for _, x := range brute(r) {
				in[x.slope.Key()]++
			}
		}
		n := 0
		for _, c := range in {
			if c == 2 {
				n++
			}
		}
		got := 0
		require.NoError(t, Walk(context.Background(), both, func(v *Visit) bool {
			require.Equal(t, 2, in[v.Slope().Key()])
			got++
			return true
		}))
		require.Equal(t, n, got)
	})
	_, err := Up(orbifold.Family{}, big.NewInt(1)).And(Up(orbifold.MustNew(1, 1, 1), big.NewInt(1)))
	require.ErrorIs(t, err, ErrMismatch)
	none, err := Region{}.And(Up(orbifold.Family{}, big.NewInt(7)))
	require.NoError(t, err)
	assert.Equal(t, "7", none.Bound.String())
}
