package orbifold_test

import (
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

var allClasses = []farey.Class{farey.Zero, farey.Infinity, farey.One}

func TestTripleOfATriangleIsThatOfPlainFlips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		tr := must(f.Triple(s.Path().Triangle()))(t)
		want, _ := plainTriple(f, s.Path())
		for _, c := range allClasses {
			assertEqualInt(t, want[c], tr.At(c))
		}
		again := must(f.NewTriple(tr.Numbers()))(t)
		assert.True(t, again.Equal(tr))
		sorted := tr.Sorted()
		assert.True(t, slices.IsSortedFunc(sorted[:], (*big.Int).Cmp))
	})
}

func TestDescentOfASolutionFindsItsPath(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		p := s.Path()
		tr := must(f.NewTriple(must(f.Triple(p.Triangle()))(t).Numbers()))(t)
		assert.Equal(t, p, tr.Path())
		assert.True(t, tr.Triangle().Equal(p.Triangle()))
		parent, ok := tr.Parent()
		assert.Equal(t, !p.IsBase(), ok)
		if newest, has := p.Triangle().Newest(); has {
			largest, _ := tr.Largest()
			assert.Equal(t, newest, largest)
			assert.True(t, parent.Flip(newest).Equal(tr))
		}
	})
}

func TestTriplesThatSolveNothingAreRefused(t *testing.T) {
	f := orbifold.MustNew(2, 0, 1)
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "slope")
		c := rapid.SampledFrom(allClasses).Draw(t, "class")
		n := [3]*big.Int{}
		tr := must(f.Triple(s.Path().Triangle()))(t)
		for _, d := range allClasses {
			n[d] = tr.At(d)
		}
		// For given other two numbers (E) has the two roots u and u'.
		other := tr.Flip(c).At(c)
		n[c].Add(n[c], big.NewInt(rapid.Int64Range(1, 1_000_000).Draw(t, "shift")))
		if n[c].Cmp(other) == 0 {
			return
		}
		_, err := f.NewTriple(n[0], n[1], n[2])
		assert.ErrorIs(t, err, orbifold.ErrNotSolution)
	})
	for _, bad := range []*big.Int{nil, new(big.Int), big.NewInt(-1)} {
		_, err := f.NewTriple(big.NewInt(1), bad, big.NewInt(1))
		assert.ErrorIs(t, err, orbifold.ErrNotPositive)
	}
	// Weights in another order are another equation.
	tr := must(f.Triple(farey.MustParse("3/7").Path().Triangle()))(t)
	_, err := orbifold.MustNew(0, 2, 1).NewTriple(tr.Numbers())
	assert.ErrorIs(t, err, orbifold.ErrNotSolution)
}

func TestTreeVisitsEverySlopeOnce(t *testing.T) {
	f := orbifold.MustNew(1, 0, 2)
	for depth := -1; depth <= 7; depth++ {
		seen := map[farey.Key]bool{}
		for n := range f.Tree(depth) {
			assert.False(t, seen[n.Slope().Key()], "%v twice", n.Slope())
			seen[n.Slope().Key()] = true
			assertEqualInt(t, must(f.Number(n.Slope()))(t), n.Number())
			moves := n.Slope().Path()
			want := 0
			if !moves.IsBase() {
				want = 1 + int(moves.Moves().Len().Int64())
			}
			assert.Equal(t, want, n.Depth())
			assert.True(t, n.Triple().Equal(must(f.Triple(n.Slope().Path().Triangle()))(t)))
			a, b, ok := n.Parents()
			assert.Equal(t, !n.Slope().IsBase(), ok)
			if ok {
				x, y, err := n.Slope().Parents()
				require.NoError(t, err)
				assert.ElementsMatch(t, []farey.Key{x.Key(), y.Key()}, []farey.Key{a.Key(), b.Key()})
			}
		}
		want := 0
		if depth >= 0 {
			want = 3 << depth
		}
		assert.Len(t, seen, want)
	}
}

func TestWithinIsEverySlopeOfABoxUpToTheBound(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		bound := big.NewInt(rapid.Int64Range(-1, 3000).Draw(t, "bound"))
		got := map[farey.Key]bool{}
		for n := range f.Within(bound) {
			assert.False(t, got[n.Slope().Key()])
			got[n.Slope().Key()] = true
		}
		// N ≥ 2^(depth) and more: numbers up to 3000 sit at |p|, q ≤ 12 or are arcs
		// of a fan of a base slope, which grow by 2.6 a step at least.
		want := 0
		for s := range must(farey.Box(12, 12))(t) {
			if must(f.Number(s))(t).Cmp(bound) <= 0 {
				want++
				assert.True(t, got[s.Key()], "%v is missing", s)
			}
		}
		assert.Len(t, got, want)
	})
}

func TestAscendingIsTheSortedWalkOfTheDomain(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		bound := big.NewInt(20_000)
		var want []orbifold.Node
		for n := range f.Within(bound) {
			if f.Representative(n.Slope()).Equal(n.Slope()) {
				want = append(want, n)
			}
		}
		slices.SortFunc(want, func(a, b orbifold.Node) int {
			if c := a.Number().Cmp(b.Number()); c != 0 {
				return c
			}
			return a.Slope().Cmp(b.Slope())
		})
		i := 0
		for n := range f.Ascending() {
			if n.Number().Cmp(bound) > 0 {
				break
			}
			require.Less(t, i, len(want), "%v is too much", n.Slope())
			require.True(t, want[i].Slope().Equal(n.Slope()), "place %d: want %v, got %v", i, want[i].Slope(), n.Slope())
			assertEqualInt(t, want[i].Number(), n.Number())
			i++
		}
		assert.Len(t, want, i)
	})
}
