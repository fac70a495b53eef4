package orbifold_test

import (
	"cmp"
	"context"
	"maps"
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

func TestIdentifyFindsTheSlopeOfANumber(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		s := slopesOn(paths(4, 1, 2, 3)).Draw(t, "slope")
		found, err := f.Identify(context.Background(), must(f.Number(s))(t))
		require.NoError(t, err)
		assert.Contains(t, keys(found), f.Representative(s).Key())
		for i, u := range found {
			assert.True(t, f.Representative(u).Equal(u))
			assert.True(t, i == 0 || found[i-1].Cmp(u) < 0)
		}
	})
}

// TestIdentifyIsComplete compares with every slope in a box that holds all
// numbers up to 10⁶, for all n up to there. Where the box has no slope with n, it is enough
// that Identify returns only slopes that do carry n, which is tested for
// some; every n that occurs is asked for.
func TestIdentifyIsComplete(t *testing.T) {
	const most, box = 1_000_000, 40
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 1, 1), orbifold.MustNew(2, 0, 1), orbifold.MustNew(3, 0, 0), orbifold.MustNew(0, 0, 2)} {
		want := map[int64]map[farey.Key]bool{}
		for s := range must(farey.Box(box, box))(t) {
			if n := must(f.Number(s))(t); n.Cmp(big.NewInt(most)) <= 0 {
				// Numbers grow along every path, and a path that leaves the box has
				// a slope in its outer part, so none outside is small.
				p, q, _ := s.Int64s()
				require.Less(t, max(p, -p, q), int64(box-10))
				if want[n.Int64()] == nil {
					want[n.Int64()] = map[farey.Key]bool{}
				}
				want[n.Int64()][f.Representative(s).Key()] = true
			}
		}
		ask := func(n int64) {
			found, err := f.Identify(context.Background(), big.NewInt(n))
			require.NoError(t, err)
			got := map[farey.Key]bool{}
			for _, s := range found {
				got[s.Key()] = true
			}
			require.Len(t, got, len(found))
			if len(want[n]) == 0 {
				require.Empty(t, got, "%d in %v", n, f)
			} else {
				require.Equal(t, want[n], got, "%d in %v", n, f)
			}
		}
		for n := range want {
			ask(n)
			ask(n + 1)
		}
		for n := int64(1); n <= 1000; n++ {
			ask(n)
		}
	}
}

// TestIdentifyIsTheWalkOfAllSlopes compares with every slope up to a bound, for
// weights up to past the range of float64.
func TestIdentifyIsTheWalkOfAllSlopes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(families(), families(), bigWeights()).Draw(t, "family")
		bound := new(big.Int).Exp(big.NewInt(10), big.NewInt(rapid.Int64Range(1, 25).Draw(t, "digits")), nil)
		want := map[string]map[farey.Key]bool{}
		for n := range f.Within(bound) {
			text := n.Number().String()
			if want[text] == nil {
				want[text] = map[farey.Key]bool{}
			}
			want[text][f.Representative(n.Slope()).Key()] = true
		}
		texts := slices.Sorted(maps.Keys(want))
		for range 5 {
			text := rapid.SampledFrom(texts).Draw(t, "number")
			n := integer(t, text)
			for range 2 { // the number and the one after it
				found := must(f.Identify(context.Background(), n))(t)
				assert.Len(t, found, len(want[n.String()]), "%s in %v", n, f)
				for _, s := range found {
					assert.True(t, want[n.String()][s.Key()], "%s in %v: %v", n, f, s)
				}
				n.Add(n, big.NewInt(1))
				if n.Cmp(bound) > 0 {
					break
				}
			}
		}
	})
}

func TestIdentifyAndNumberUndoEachOtherFarOut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopesOn(paths(4, 1, 2, 3, 5), paths(2, from(1, 20)...), paths(1, 100, 300), paths(8, 1)).Draw(t, "slope")
		if rapid.IntRange(0, 3).Draw(t, "large weights") == 0 {
			f, s = bigWeights().Draw(t, "family"), slopesOn(paths(2, 1, 2), paths(1, 9)).Draw(t, "slope")
		}
		n := must(f.Number(s))(t)
		found := must(f.Identify(context.Background(), n))(t)
		assert.Contains(t, keys(found), f.Representative(s).Key(), "%v at %v", f, s)
		for _, u := range found {
			assertEqualInt(t, n, must(f.Number(u))(t))
		}
		// A miss: n + 1, unless some slope has it.
		n.Add(n, big.NewInt(1))
		for _, u := range must(f.Identify(context.Background(), n))(t) {
			assertEqualInt(t, n, must(f.Number(u))(t))
		}
	})
}

// TestIdentifyFindsBothSidesOfEveryFan goes to slopes whose older parent and the
// parents of that are all too large for machine numbers, the newest vertex on the
// left and on the right of the fan.
func TestIdentifyFindsBothSidesOfEveryFan(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		p, q := rapid.Int64Range(-400, 400).Draw(t, "p"), rapid.Int64Range(100, 400).Draw(t, "q")
		path := must(farey.FromInts(p, q))(t).Path()
		if path.IsBase() {
			return
		}
		for _, side := range []contfrac.Letter{contfrac.L, contfrac.R} {
			// First round the newest vertex, then away from it on one side.
			var moves contfrac.WordBuilder
			moves.AppendWord(path.Moves())
			moves.Append(side.Other(), 1)
			moves.Append(side, uint64(rapid.IntRange(1, 3).Draw(t, "steps")))
			s, _ := farey.NewPath(path.First(), moves.Word()).Slope()
			n := must(f.Number(s))(t)
			if n.BitLen() > 6000 {
				continue
			}
			found := must(f.Identify(context.Background(), n))(t)
			assert.True(t, slices.ContainsFunc(found, f.Representative(s).Equal), "%v in %v: %v", s, f, found)
		}
	})
}

func TestNearestIsTheNeighbourhoodInTheSortedWalk(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		bound := big.NewInt(1_000_000_000_000)
		var all []orbifold.Node
		for n := range f.Within(bound) {
			if f.Representative(n.Slope()).Equal(n.Slope()) {
				all = append(all, n)
			}
		}
		slices.SortFunc(all, func(a, b orbifold.Node) int {
			return cmp.Or(a.Number().Cmp(b.Number()), a.Slope().Cmp(b.Slope()))
		})
		i := rapid.IntRange(0, len(all)/2).Draw(t, "place")
		n := all[i].Number()
		n.Add(n, big.NewInt(rapid.Int64Range(0, 2).Draw(t, "shift")))
		k := rapid.IntRange(0, 5).Draw(t, "k")
		below, above, err := f.Nearest(context.Background(), n, k)
		require.NoError(t, err)
		var lower, upper []orbifold.Node
		for _, x := range all {
			switch x.Number().Cmp(n) {
			case -1:
				lower = append(lower, x)
			case 1:
				upper = append(upper, x)
			}
		}
		slices.SortFunc(lower, func(a, b orbifold.Node) int {
			return cmp.Or(b.Number().Cmp(a.Number()), a.Slope().Cmp(b.Slope()))
		})
		want := func(nodes []orbifold.Node) (texts []string) {
			for _, x := range nodes[:min(k, len(nodes))] {
				texts = append(texts, x.Slope().String())
			}
			return texts
		}
		got := func(slopes []farey.Slope) (texts []string) {
			for _, s := range slopes {
				texts = append(texts, s.String())
			}
			return texts
		}
		assert.Equal(t, want(lower), got(below), "below %v in %v", n, f)
		assert.Equal(t, want(upper), got(above), "above %v in %v", n, f)
	})
	for _, k := range []int{-1, orbifold.MaxNearest + 1} {
		_, _, err := orbifold.Family{}.Nearest(context.Background(), big.NewInt(5), k)
		assert.ErrorIs(t, err, orbifold.ErrCount)
	}
	for _, n := range []*big.Int{nil, new(big.Int), big.NewInt(-7)} {
		_, _, err := orbifold.Family{}.Nearest(context.Background(), n, 1)
		assert.ErrorIs(t, err, orbifold.ErrNotPositive)
	}
}

// TestNearestToSmallNumbersIsAscending asks for many more numbers than there are
// below.
func TestNearestToSmallNumbersIsAscending(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(2, 0, 1), orbifold.MustNew(0, 1<<50, 0)} {
		const k = 300
		below, above, err := f.Nearest(context.Background(), big.NewInt(1), k)
		require.NoError(t, err)
		assert.Empty(t, below)
		require.Len(t, above, k)
		i := 0
		for n := range f.Ascending() {
			if n.Number().IsInt64() && n.Number().Int64() == 1 {
				continue
			}
			require.True(t, n.Slope().Equal(above[i]), "%v: place %d: %v, want %v", f, i, above[i], n)
			if i++; i == k {
				break
			}
		}
	}
}

func TestInequivalentSlopesWithEqualNumbers(t *testing.T) {
	// Found by exhaustive search with a slow model: (3,0,0) has 5 at 2, −1/2 and
	// 1/3; (2,0,1) has 81 at 2/5 and 4/3, 4489 at −4/3 and 6/7.
	for _, fact := range []struct {
		family string
		number int64
		slopes []string
	}{
		{"3,0,0", 5, []string{"2/1", "-1/2", "1/3"}},
		{"2,0,1", 81, []string{"2/5", "4/3"}},
		{"2,0,1", 4489, []string{"-4/3", "6/7"}},
	} {
		f := must(orbifold.Parse(fact.family))(t)
		found, err := f.Identify(context.Background(), big.NewInt(fact.number))
		require.NoError(t, err)
		classes := map[farey.Key]bool{}
		for _, text := range fact.slopes {
			s := farey.MustParse(text)
			assert.Contains(t, keys(found), f.Representative(s).Key(), "%d at %s", fact.number, text)
			classes[f.Representative(s).Key()] = true
			assert.Zero(t, must(f.Compare(s, farey.MustParse(fact.slopes[0])))(t))
		}
		assert.GreaterOrEqual(t, len(classes), 2, "they are inequivalent")
	}
}

func TestIdentifyRefusesWhatIsNoNumber(t *testing.T) {
	for _, n := range []*big.Int{nil, new(big.Int), big.NewInt(-5)} {
		_, err := orbifold.Family{}.Identify(context.Background(), n)
		assert.ErrorIs(t, err, orbifold.ErrNotPositive)
	}
}

func keys(slopes []farey.Slope) (k []farey.Key) {
	for _, s := range slopes {
		k = append(k, s.Key())
	}
	return k
}
