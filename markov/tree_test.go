package markov_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

// visit is the definition of the tree: the mediant t of l and r, then the two
// intervals beside it.
func visit(t require.TestingT, l, r farey.Slope, depth int, list []string) []string {
	if depth < 0 {
		return list
	}
	m := must(farey.Mediant(l, r))(t)
	triple := must(markov.NewTriple(must(markov.Frobenius(l))(t), must(markov.Frobenius(r))(t), must(markov.Frobenius(m))(t)))(t)
	list = append(list, m.String()+" "+triple.String())
	list = visit(t, l, m, depth-1, list)
	return visit(t, m, r, depth-1, list)
}

func TestTreeIsTheSternBrocotTree(t *testing.T) {
	zero, one := farey.MustParse("0/1"), farey.MustParse("1/1")
	for depth := -2; depth <= 8; depth++ {
		var want, got []string
		if depth >= 0 {
			want = append(want, "0/1 (1, 1, 1)")
		}
		if depth >= 1 {
			want = append(want, "1/1 (1, 1, 2)")
			want = visit(t, zero, one, depth-2, want)
		}
		for index, triple := range markov.Tree(depth) {
			got = append(got, index.String()+" "+triple.String())
		}
		require.Equal(t, want, got)
		if depth >= 1 {
			require.Len(t, got, 1+1<<(depth-1))
		}
	}
}

func TestTreeNamesItsTriplesByTheirIndex(t *testing.T) {
	for index, triple := range markov.Tree(9) {
		require.Equal(t, index.String(), triple.Index().String())
		_, _, c := triple.Numbers()
		require.Equal(t, must(markov.Frobenius(index))(t).String(), c.String())
	}
}

func TestTreeCanBeStoppedAndStartedAgain(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tree, n := markov.Tree(6), rapid.IntRange(1, 33).Draw(t, "n")
		var lists [2][]string
		for i := range lists {
			for index := range tree {
				lists[i] = append(lists[i], index.String())
				if len(lists[i]) == n {
					break
				}
			}
		}
		require.Len(t, lists[0], n)
		require.Equal(t, lists[0], lists[1])
	})
}

func TestWithinTakesWhatTheBoundAllows(t *testing.T) {
	const depth = 8 // the first number that the tree of this depth misses is F(2·8+1) = 1597, at 1/8
	rapid.Check(t, func(t *rapid.T) {
		bound := big.NewInt(rapid.Int64Range(-2, 1596).Draw(t, "bound"))
		var want, got []string
		for index, triple := range markov.Tree(depth) {
			if _, _, c := triple.Numbers(); c.Cmp(bound) <= 0 {
				want = append(want, index.String()+" "+triple.String())
			}
		}
		for index, triple := range markov.Within(bound) {
			got = append(got, index.String()+" "+triple.String())
		}
		require.Equal(t, want, got)
	})
	for range markov.Within(nil) {
		require.Fail(t, "a nil bound gives nothing")
	}
}
