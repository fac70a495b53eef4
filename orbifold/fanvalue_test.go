package orbifold_test

import (
	"context"
	"fmt"
	"math"
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// fans draws fans about slopes with short paths: through a parent, or some way
// from it.
func fans() *rapid.Generator[orbifold.Fan] {
	centres := slopesOn(paths(3, from(1, 4)...), paths(1, 0+1, 7, 20))
	return rapid.Custom(func(t *rapid.T) orbifold.Fan {
		return fanAt(t, families().Draw(t, "family"), centres.Draw(t, "centre"), rapid.Int64Range(-6, 6).Draw(t, "shift"))
	})
}

// fanAt returns the fan about the centre that starts shift arcs past one of
// the arcs first met.
func fanAt(t require.TestingT, f orbifold.Family, centre farey.Slope, shift int64) orbifold.Fan {
	through := farey.Class((centre.Class() + 1) % 3).Slope()
	if !centre.IsBase() {
		through = must2(centre.Parents())(t)
	}
	fan := must(f.Fan(centre, through))(t)
	return must(f.Fan(centre, fan.Slope(big.NewInt(shift))))(t)
}

// must2 is must for a result with one more that is not wanted.
func must2[T any](v, _ T, err error) func(require.TestingT) T { return must(v, err) }

// stepped returns y₀ … y_{n−1}, or y₀, y₋₁, … for direction −1, by single steps of
// (X) with exact division.
func stepped(t require.TestingT, f orbifold.Fan, n int, direction int64) []*big.Int {
	fam := f.Family()
	k := big.NewInt(fam.Weight(f.Centre().Class()))
	y := []*big.Int{plainNumber(fam, f.Slope(nil)), plainNumber(fam, f.Slope(big.NewInt(direction)))}
	centre := plainNumber(fam, f.Centre())
	// The classes of the arcs take turns, and with them the weights.
	even, odd := f.Weights()
	c := [2]*big.Int{big.NewInt(even), big.NewInt(odd)}
	for len(y) < n {
		// u·u' = v² + c·v·w + w² for the centre v and its arc w = y_{i+1}; k
		// belongs to the centre's own flips.
		u, w := y[len(y)-2], y[len(y)-1]
		sum := new(big.Int).Mul(centre, centre)
		vw := new(big.Int).Mul(centre, w)
		sum.Add(sum, vw.Mul(vw, c[len(y)%2])).Add(sum, new(big.Int).Mul(w, w))
		q, r := sum.QuoRem(sum, u, new(big.Int))
		require.Zero(t, r.Sign(), "%v, k = %v", f, k)
		y = append(y, q)
	}
	return y[:n]
}

func TestFanTermsAreThoseOfSingleSteps(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		for _, direction := range []int64{1, -1} {
			for i, want := range stepped(t, f, 12, direction) {
				n := big.NewInt(int64(i) * direction)
				assertEqualInt(t, want, must(f.Term(n))(t), "%v at %v", f, n)
				m := big.NewInt(1_000_003)
				assertEqualInt(t, new(big.Int).Mod(want, m), must(f.TermMod(n, m))(t))
			}
		}
	})
}

// TestFanStepLaw is y_{n+1} = t·y_n − c_n·N − y_{n−1}.
func TestFanStepLaw(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		n := rapid.Int64Range(-40, 40).Draw(t, "n")
		even, odd := f.Weights()
		c := big.NewInt(even)
		if n%2 != 0 {
			c.SetInt64(odd)
		}
		want := new(big.Int).Mul(must(f.Trace())(t), must(f.Term(big.NewInt(n)))(t))
		want.Sub(want, c.Mul(c, must(f.Family().Number(f.Centre()))(t)))
		want.Sub(want, must(f.Term(big.NewInt(n-1)))(t))
		assertEqualInt(t, want, must(f.Term(big.NewInt(n+1)))(t))
	})
}

func TestFanSlopesAreNeighboursInOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		n := big.NewInt(rapid.Int64().Draw(t, "n"))
		s, next := f.Slope(n), f.Slope(new(big.Int).Add(n, big.NewInt(1)))
		assert.True(t, farey.Neighbours(s, f.Centre()))
		assert.True(t, farey.Neighbours(s, next))
		i, ok := f.Index(s)
		require.True(t, ok)
		assertEqualInt(t, n, i)
		even, odd := f.Weights()
		if n.Bit(0) == 1 {
			even = odd
		}
		assert.Equal(t, f.Family().Weight(s.Class()), even)
	})
}

func TestFanIndexRefusesOtherSlopes(t *testing.T) {
	f := must(orbifold.Family{}.Fan(farey.MustParse("1/2"), farey.MustParse("0/1")))(t)
	for _, s := range []string{"1/2", "2/1", "-1/1", "2/7"} {
		_, ok := f.Index(farey.MustParse(s))
		assert.False(t, ok, s)
	}
}

func TestFansAreStrictlyConvexAndGrowFromTheWaist(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		w := f.Waist()
		at := func(j int64) *big.Int { return must(f.Term(new(big.Int).Add(w, big.NewInt(j))))(t) }
		for j := int64(-4); j <= 4; j++ {
			sum := new(big.Int).Add(at(j-1), at(j+1))
			assert.Positive(t, sum.Cmp(new(big.Int).Lsh(at(j), 1)))
		}
		for j := int64(0); j < 4; j++ {
			assert.Positive(t, at(-j-1).Cmp(at(-j)), "left of the waist of %v", f)
			assert.Positive(t, at(j+2).Cmp(at(j+1)), "right of the waist of %v", f)
		}
	})
}

func TestFindIsTheInverseOfTerm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		n := big.NewInt(rapid.OneOf(rapid.Int64Range(-12, 12), rapid.Int64Range(-2000, 2000)).Draw(t, "n"))
		y := must(f.Term(n))(t)
		found := must(f.Find(y))(t)
		assert.True(t, slices.ContainsFunc(found, func(i *big.Int) bool { return i.Cmp(n) == 0 }), "%v in %v", n, found)
		assert.LessOrEqual(t, len(found), 2)
		for _, i := range found {
			assertEqualInt(t, y, must(f.Term(i))(t))
		}
	})
}

// TestFindAgainstTheList compares with the list of all terms up to a bound.
func TestFindAgainstTheList(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := fans().Draw(t, "fan")
		v := rapid.Int64Range(1, 3000).Draw(t, "v")
		want := map[string]bool{}
		for _, direction := range []int64{1, -1} {
			for i := range int64(40) { // at most 12 away, and the terms more than double
				n := big.NewInt(i * direction)
				if must(f.Term(n))(t).Cmp(big.NewInt(v)) == 0 {
					want[n.String()] = true
				}
			}
		}
		got := map[string]bool{}
		for _, n := range must(f.Find(big.NewInt(v)))(t) {
			got[n.String()] = true
		}
		assert.Equal(t, want, got, "%v, value %d", f, v)
	})
}

func TestFindHoldsValuesPastTheLimit(t *testing.T) {
	f := must(orbifold.Family{}.WithLimit(64).Fan(farey.Slope{}, farey.MustParse("1/0")))(t)
	y := must(orbifold.Family{}.Number(farey.MustParse("1/1000")))(t)
	_, err := f.Term(big.NewInt(1000))
	require.ErrorIs(t, err, orbifold.ErrTooLarge)
	found := must(f.Find(y))(t)
	require.Len(t, found, 2)
	assert.Equal(t, "[-999 1000]", fmt.Sprint(found))
	assert.Empty(t, must(f.Find(y.Add(y, big.NewInt(1))))(t))
}

func TestZeroFanIsTheFibonacciBranch(t *testing.T) {
	var f orbifold.Fan
	assert.Equal(t, "fan of (0,0,0) about 0/1 through 1/0", f.String())
	assert.Equal(t, "1/7", f.Slope(big.NewInt(7)).String())
	// OEIS A001519: 1, 1, 2, 5, 13, 34, 89, 233, 610.
	for n, want := range []int64{1, 1, 2, 5, 13, 34, 89, 233, 610} {
		assertEqualInt(t, big.NewInt(want), must(f.Term(big.NewInt(int64(n))))(t))
	}
	_, ok := f.Index(farey.MustParse("1/0"))
	assert.True(t, ok)
	assertEqualInt(t, new(big.Int), f.Waist())
}

// TestPellBranch has lattice slopes n/(2n+1), of Frobenius index n/(n+1): OEIS A001653.
func TestPellBranch(t *testing.T) {
	f := must(orbifold.Family{}.Fan(farey.MustParse("1/2"), farey.MustParse("0/1")))(t)
	for n, want := range []int64{1, 5, 29, 169, 985, 5741, 33461} {
		assert.Equal(t, fmt.Sprintf("%d/%d", n, 2*n+1), f.Slope(big.NewInt(int64(n))).String())
		assertEqualInt(t, big.NewInt(want), must(f.Term(big.NewInt(int64(n))))(t))
	}
}

func TestFanErrors(t *testing.T) {
	f := orbifold.MustNew(2, 0, 1)
	for _, pair := range [][2]string{{"0/1", "2/1"}, {"1/2", "1/2"}, {"0/1", "0/1"}} {
		_, err := f.Fan(farey.MustParse(pair[0]), farey.MustParse(pair[1]))
		assert.ErrorIs(t, err, orbifold.ErrNotNeighbours, "%v", pair)
	}
	fan := must(f.Fan(farey.MustParse("1/2"), farey.MustParse("0/1")))(t)
	_, err := fan.Term(new(big.Int).Lsh(big.NewInt(1), 80))
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = fan.TermMod(nil, nil)
	assert.ErrorIs(t, err, orbifold.ErrModulus)
	for _, v := range []*big.Int{nil, new(big.Int), big.NewInt(-5)} {
		_, err = fan.Find(v)
		assert.ErrorIs(t, err, orbifold.ErrNotPositive)
	}
	_, err = fan.Recurrence(0)
	assert.ErrorIs(t, err, orbifold.ErrStep)
	_, err = fan.Recurrence(math.MinInt64)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	cancelled, cancel := context.WithCancel(t.Context())
	cancel()
	_, err = fan.FindContext(cancelled, big.NewInt(3))
	assert.ErrorIs(t, err, context.Canceled)
	_, err = fan.TermContext(cancelled, big.NewInt(3))
	assert.ErrorIs(t, err, context.Canceled)

	far := must(f.Fan(farey.MustParse("1/1000000000000"), farey.MustParse("0/1")))(t)
	_, err = far.Trace()
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = far.Recurrence(1)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = far.Ratio()
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = far.ClosedForm()
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	// A fan about a huge number has one small value: that of 0/1, r₀.
	found, err := far.Find(big.NewInt(1))
	require.NoError(t, err)
	assert.Equal(t, "[0]", fmt.Sprint(found))
	// A first term that is too large, about a small centre.
	away := must(f.Fan(farey.Slope{}, farey.MustParse("1/1000000000000")))(t)
	_, err = away.Recurrence(1)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = away.ClosedForm()
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = away.Find(big.NewInt(1))
	assert.NoError(t, err)
}

func TestHugeFansPrintWholeAndShort(t *testing.T) {
	p := new(big.Int).Exp(big.NewInt(10), big.NewInt(60), nil)
	f := must(orbifold.Family{}.Fan(must(farey.New(big.NewInt(1), p))(t), farey.Slope{}))(t)
	assert.Contains(t, fmt.Sprintf("%s", f), p.String())
	assert.Contains(t, fmt.Sprintf("%v", f), "digits")
	assert.Equal(t, f.String(), fmt.Sprintf("%s", f))
}

// TestFanTermFarOut: the terms of negative and huge index are those of the
// slopes, by residues.
func TestFanTermFarOut(t *testing.T) {
	f := must(orbifold.MustNew(1, 2, 3).Fan(farey.MustParse("2/5"), farey.MustParse("1/2")))(t)
	n := new(big.Int).Neg(new(big.Int).Exp(big.NewInt(10), big.NewInt(50), nil))
	m := big.NewInt(1_000_003)
	assertEqualInt(t, must(f.Family().NumberMod(f.Slope(n), m))(t), must(f.TermMod(n, m))(t))
	assert.Equal(t, contfrac.Abbreviate(n), "-"+contfrac.Abbreviate(new(big.Int).Neg(n)))
}
