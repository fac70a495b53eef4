package markov_test

import (
	"context"
	"fmt"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

// triples draws Markov triples by Vieta jumps from (1, 1, 1).
func triples() *rapid.Generator[markov.Triple] {
	return rapid.Custom(func(t *rapid.T) markov.Triple {
		var m markov.Triple
		for _, jump := range rapid.SliceOfN(rapid.IntRange(0, 2), 0, 14).Draw(t, "jumps") {
			m = m.Neighbours()[jump]
		}
		return m
	})
}

func TestTripleSolvesTheEquation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		assertTriple(t, triples().Draw(t, "triple"))
		assertTriple(t, must(markov.TripleAt(indices().Draw(t, "index")))(t))
	})
}

func TestTripleDoesNotDependOnTheOrderGiven(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := triples().Draw(t, "triple")
		a, b, c := m.Numbers()
		n := rapid.Permutation([]*big.Int{a, b, c}).Draw(t, "order")
		u := must(markov.NewTriple(n[0], n[1], n[2]))(t)
		require.True(t, m.Equal(u))
		require.Equal(t, m.String(), u.String())
		require.Equal(t, m.Index().String(), u.Index().String())
	})
}

func TestTripleAtAnIndexHasItAsIndex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		require.Equal(t, index.String(), must(markov.TripleAt(index))(t).Index().String())
		m := triples().Draw(t, "triple")
		require.True(t, m.Equal(must(markov.TripleAt(m.Index()))(t)))
	})
}

// TestTripleHasTheNumbersOfTheFareyParents looks for the parents of an index from
// the definition: 0/1 and 1/1 first, then mediants.
func TestTripleHasTheNumbersOfTheFareyParents(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Filter(func(s farey.Slope) bool { return !s.IsBase() }).Draw(t, "index")
		l, r := farey.MustParse("0/1"), farey.MustParse("1/1")
		for {
			m := must(farey.Mediant(l, r))(t)
			if m.Equal(index) {
				break
			}
			if index.Cmp(m) < 0 {
				r = m
			} else {
				l = m
			}
		}
		want := must(markov.NewTriple(must(markov.Frobenius(l))(t), must(markov.Frobenius(r))(t), must(markov.Frobenius(index))(t)))(t)
		require.True(t, want.Equal(must(markov.TripleAt(index))(t)))
	})
}

func TestVietaJumpGivesTheOtherRoot(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := triples().Draw(t, "triple")
		a, b, c := m.Numbers()
		n := [3]*big.Int{a, b, c}
		for i, u := range m.Neighbours() {
			assertTriple(t, u)
			// The roots of the quadratic in n[i] have the product of v² + w².
			v, w := n[(i+1)%3], n[(i+2)%3]
			other := new(big.Int).Add(new(big.Int).Mul(v, v), new(big.Int).Mul(w, w))
			rest := new(big.Int)
			other.QuoRem(other, n[i], rest)
			require.Zero(t, rest.Sign())
			require.True(t, u.Equal(must(markov.NewTriple(other, v, w))(t)), "jump %d of %v gives %v", i, m, u)
		}
	})
}

func TestVietaJumpUndoesItself(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := triples().Draw(t, "triple")
		for _, u := range m.Neighbours() {
			back := false
			for _, w := range u.Neighbours() {
				back = back || w.Equal(m)
			}
			require.True(t, back, "%v, %v", m, u)
		}
	})
}

func TestParentIsTheOnlySmallerNeighbour(t *testing.T) {
	largest := func(m markov.Triple) *big.Int { _, _, c := m.Numbers(); return c }
	rapid.Check(t, func(t *rapid.T) {
		m := triples().Draw(t, "triple")
		parent, ok := m.Parent()
		require.Equal(t, m.String() != "(1, 1, 1)", ok)
		if !ok {
			require.True(t, parent.Equal(m))
			return
		}
		jumps := m.Neighbours()
		require.True(t, parent.Equal(jumps[2]))
		require.Negative(t, largest(parent).Cmp(largest(m)))
		require.Positive(t, largest(jumps[0]).Cmp(largest(m)))
		require.Positive(t, largest(jumps[1]).Cmp(largest(m)))
	})
}

func TestRootOfTheTree(t *testing.T) {
	var m markov.Triple
	require.Equal(t, "(1, 1, 1)", m.String())
	require.Equal(t, "0/1", m.Index().String())
	assertTriple(t, m)
	for _, u := range m.Neighbours() {
		require.Equal(t, "(1, 1, 2)", u.String())
		require.Equal(t, "1/1", u.Index().String())
		jumps := u.Neighbours()
		require.Equal(t, "[(1, 2, 5) (1, 2, 5) (1, 1, 1)]", fmt.Sprint(jumps[:]))
	}
}

func TestTripleRefusesWhatIsNoSolution(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b, c := triples().Draw(t, "triple").Numbers()
		n := [3]*big.Int{a, b, c}
		i := rapid.IntRange(0, 2).Draw(t, "which")
		by := integers().Filter(func(x *big.Int) bool { return x.Sign() != 0 }).Draw(t, "by")
		// The other root is the only other integer that fits.
		root := new(big.Int).Mul(n[(i+1)%3], n[(i+2)%3])
		root.Mul(root, big.NewInt(3)).Sub(root, n[i])
		n[i] = new(big.Int).Add(n[i], by)
		_, err := markov.NewTriple(n[0], n[1], n[2])
		switch {
		case n[i].Cmp(root) == 0:
			require.NoError(t, err)
		case n[i].Sign() <= 0:
			require.ErrorIs(t, err, markov.ErrNotPositive)
		default:
			require.ErrorIs(t, err, markov.ErrNotSolution)
			require.ErrorContains(t, err, "a² + b² + c² = 3abc")
		}
	})
}

func TestTripleRefusesMissingNumbers(t *testing.T) {
	one := big.NewInt(1)
	for _, n := range [][3]*big.Int{{nil, one, one}, {one, nil, one}, {one, one, nil}, {nil, nil, nil}, {one, new(big.Int), one}} {
		_, err := markov.NewTriple(n[0], n[1], n[2])
		require.ErrorIs(t, err, markov.ErrNotPositive)
	}
}

func TestDescentStopsWithItsContext(t *testing.T) {
	m := must(markov.TripleAt(farey.MustParse("1/20000")))(t)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, err := m.IndexContext(ctx)
	require.ErrorIs(t, err, context.Canceled)
	require.Equal(t, "1/20000", m.Index().String())
}

func TestTriplePrintsWholeAndShortened(t *testing.T) {
	m := must(markov.TripleAt(farey.MustParse("202/301")))(t) // between 51/76 and 151/225
	a, b, c := m.Numbers()
	whole := "(" + a.String() + ", " + b.String() + ", " + c.String() + ")"
	require.Equal(t, whole, m.String())
	require.Equal(t, whole, fmt.Sprintf("%s", m))
	short := fmt.Sprintf("%v", m)
	require.Less(t, len(short), 150)
	require.Equal(t, 3, strings.Count(short, "digits"))
	require.True(t, strings.HasPrefix(short, whole[:13]+"…"), short)
	require.Less(t, len(fmt.Sprint(m.Neighbours())), 450)
}
