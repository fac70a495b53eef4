package survey

import (
	"context"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold"
)

// checkAudit asserts that an Account balances.
func checkAudit(t require.TestingT, a Audit, d Digest) {
	require.Equal(t, a.Base, a.Telescope)
	require.Equal(t, a.Counted, d.Slopes)
	half, _ := new(big.Rat).SetString("1/2")
	lo, ok := new(big.Rat).SetString(a.SumLo)
	require.True(t, ok)
	hi, ok := new(big.Rat).SetString(a.SumHi)
	require.True(t, ok)
	remainder, ok := new(big.Rat).SetString(a.Remainder)
	require.True(t, ok)
	require.LessOrEqual(t, lo.Cmp(half), 0)
	require.GreaterOrEqual(t, hi.Add(hi, remainder).Cmp(half), 0)
}

// The accounts of a right walk balance, for every family and bound.
func TestAuditBalances(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		a, d, err := Check(context.Background(), f, bounds(f, 25).Draw(t, "bound"), Options{})
		require.NoError(t, err)
		checkAudit(t, a, d)
	})
	for _, f := range tenFamilies() {
		a, d, err := Check(context.Background(), f, PowerOfTen(far(100)), Options{})
		require.NoError(t, err)
		checkAudit(t, a, d)
	}
}

// accountsOf walks over the pieces of a survey and returns the Account of each.
func accountsOf(t require.TestingT, f orbifold.Family, bound *big.Int, n int) ([]Account, *walker) {
	w, err := newWalker(Up(f, bound))
	require.NoError(t, err)
	pieces := w.pieces(n)
	var list []Account
	for i := range pieces {
		c := w.clone()
		b := c.keep()
		c.sink = func(v *Visit) bool { b.visit(v); return true }
		require.True(t, c.run(&pieces[i]))
		list = append(list, b.account())
	}
	return list, w
}

// A subtree that is skipped is caught, wherever it is, and so is one that is
// visited twice, and one that is skipped while another is doubled; not only by the
// counts, but by the telescoping sum alone.
func TestPlantedBugsAreCaught(t *testing.T) {
	for _, f := range tenFamilies() {
		bound := PowerOfTen(60)
		for _, n := range []int{4, 60} {
			list, w := accountsOf(t, f, bound, n)
			s, err := w.series(context.Background())
			require.NoError(t, err)
			counted, err := Count(context.Background(), f, bound)
			require.NoError(t, err)
			// walk merges the accounts with some missing or doubled.
			walk := func(times func(i int) int) (Audit, Account, error) {
				var total Account
				for i, a := range list {
					for range times(i) {
						total.merge(a)
					}
				}
				audit, err := total.balance(w, s, counted)
				return audit, total, err
			}
			_, right, err := walk(func(int) int { return 1 })
			require.NoError(t, err)
			rapid.Check(t, func(t *rapid.T) {
				bad := rapid.IntRange(0, len(list)-1).Draw(t, "piece")
				other := rapid.IntRange(0, len(list)-1).Draw(t, "other piece")
				for kind, times := range []func(i int) int{
					func(i int) int { return 1 - int(boolToInt(i == bad)) },
					func(i int) int { return 1 + int(boolToInt(i == bad)) },
					func(i int) int { return 1 + int(boolToInt(i == bad)) - int(boolToInt(i == other && i != bad)) },
				} {
					audit, wrong, err := walk(times)
					if wrong == right {
						continue // a piece without slopes
					}
					require.ErrorIs(t, err, ErrAudit)
					// The piece at the top has no edges where the walk turns; and subtrees that begin
					// at edges with equal F may stand for each other in the sum, not in the counts.
					if bad != 0 && kind < 2 {
						require.NotEqual(t, audit.Base, audit.Telescope)
					}
				}
			})
		}
	}
}

// An error of arithmetic in one residue is caught by the telescoping sum.
func TestWrongResiduesAreCaught(t *testing.T) {
	w, err := newWalker(Up(orbifold.Family{}, PowerOfTen(120)))
	require.NoError(t, err)
	b := w.keep()
	n, done := 0, false
	w.sink = func(v *Visit) bool {
		n++
		if lo, _ := v.Log(); !done && lo > 200 { // far from the exact part
			done = true
			// The slope is kept in the frame, where later flips look at it.
			v.frame.y[v.i&3].r61 ^= 1
		}
		b.visit(v)
		return true
	}
	_, edges := w.base()
	require.True(t, w.start())
	for _, e := range edges {
		require.True(t, w.tree(e))
	}
	require.True(t, done)
	_, err = b.account().close(context.Background(), w)
	require.ErrorIs(t, err, ErrAudit)
}

// The Account of a part that has no slopes changes nothing.
func TestEmptyAccountIsNeutral(t *testing.T) {
	list, w := accountsOf(t, orbifold.MustNew(1, 2, 3), PowerOfTen(30), 1)
	a := list[0]
	b := a
	b.merge(Account{})
	assert.Equal(t, a, b)
	var c Account
	c.merge(a)
	assert.Equal(t, a, c)
	for _, spoil := range []func(*Account){
		func(a *Account) { a.Den = 0 }, func(a *Account) { a.Turns++ }, func(a *Account) { a.Digest.Slopes++ }, func(a *Account) { a.Num ^= 1 },
	} {
		b := a
		spoil(&b)
		_, err := b.close(context.Background(), w)
		require.ErrorIs(t, err, ErrAudit)
	}
	done, cancel := context.WithCancel(context.Background())
	cancel()
	_, err := a.close(done, w)
	require.ErrorIs(t, err, context.Canceled)
}

func TestCheckRefuses(t *testing.T) {
	_, _, err := Check(context.Background(), orbifold.Family{}, nil, Options{})
	require.Error(t, err)
	_, _, err = Check(context.Background(), orbifold.Family{}, new(big.Int), Options{})
	require.ErrorIs(t, err, ErrBound)
	_, err = AuditShards(context.Background(), nil, Options{})
	require.ErrorIs(t, err, ErrOptions)
	shards, err := Split(Region{Bound: PowerOfTen(30), Box: &Box{9, 9}}, 2)
	require.NoError(t, err)
	_, err = AuditShards(context.Background(), shards, Options{})
	require.ErrorIs(t, err, ErrRegion)
	shards, err = Split(Up(orbifold.Family{}, PowerOfTen(30)), 20)
	require.NoError(t, err)
	part, err := AuditShards(context.Background(), shards[1:], Options{})
	require.NoError(t, err)
	_, _, err = Balance(context.Background(), part)
	require.ErrorIs(t, err, ErrMismatch)
	_, _, err = Check(context.Background(), orbifold.Family{}, big.NewInt(5), Options{Workers: -1})
	require.ErrorIs(t, err, ErrOptions)
}

// Outside sums: terms of (S) over the first slopes add up to less than 1/2, and the
// remainder that the audit states is no smaller than what later terms add. The terms
// are computed in floating point here.
func TestSeriesAgreesWithFloatingPoint(t *testing.T) {
	for _, f := range tenFamilies()[:9] {
		w, err := newWalker(Up(f, PowerOfTen(12)))
		require.NoError(t, err)
		s, err := w.series(context.Background())
		require.NoError(t, err)
		require.True(t, s.holds())
		sum := 0.0
		r := Up(f, PowerOfTen(12))
		r.All = true
		k, _ := new(big.Float).SetInt(f.K()).Float64()
		for _, x := range brute(r) {
			n, _ := new(big.Float).SetInt(x.number).Float64()
			weight := float64(f.Weight(x.slope.Class()))
			tr := k*n - weight
			// 1/E = 2/(t + √(t²−4)).
			e := 2 / (tr + sqrt(tr*tr-4))
			sum += (e + weight/2) / (k * n)
		}
		hi, _ := s.hi.Float64()
		lo, _ := s.lo.Float64()
		rest, _ := s.remainder.Float64()
		assert.InDelta(t, sum, hi, 1e-9)
		assert.LessOrEqual(t, lo, sum+1e-12)
		assert.GreaterOrEqual(t, sum+rest, 0.5-1e-12)
		assert.Greater(t, rest, 0.0)
	}
}

func sqrt(x float64) float64 {
	r, _ := new(big.Float).Sqrt(big.NewFloat(x)).Float64()
	return r
}
