package markov_test

import (
	"context"
	"math/big"
	"reflect"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/markov"
)

func TestEveryMethodThatSharesMemoryIsCovered(t *testing.T) {
	covered := []string{"Numbers"}
	var shares func(reflect.Type) bool
	shares = func(typ reflect.Type) bool {
		switch typ.Kind() {
		case reflect.Slice:
			return true
		case reflect.Array:
			return shares(typ.Elem())
		default:
			return typ == reflect.TypeFor[*big.Int]()
		}
	}
	var found []string
	typ := reflect.TypeFor[*markov.Triple]()
	for i := range typ.NumMethod() {
		m, yes := typ.Method(i), false
		for j := 1; j < m.Type.NumIn(); j++ {
			yes = yes || shares(m.Type.In(j))
		}
		for j := range m.Type.NumOut() {
			yes = yes || shares(m.Type.Out(j))
		}
		if yes {
			found = append(found, m.Name)
		}
	}
	slices.Sort(found)
	require.Equal(t, covered, found)
}

// spoil changes an integer in place, words and all.
func spoil(numbers ...*big.Int) {
	for _, x := range numbers {
		for i := range x.Bits() {
			x.Bits()[i] ^= 0x55
		}
		x.Add(x, big.NewInt(12345))
	}
}

func TestTriplesKeepNoInputAndGiveNoInternals(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := triples().Draw(t, "triple")
		a, b, c := m.Numbers()
		text := m.String()
		u := must(markov.NewTriple(c, a, b))(t)
		require.Equal(t, text, must(markov.NewTriple(a, b, c))(t).String(), "inputs not modified")
		jumps := u.Neighbours()
		jump := jumps[0].String()
		spoil(a, b, c)
		x, y, z := u.Numbers()
		spoil(x, y, z)
		x, y, z = jumps[0].Numbers()
		spoil(x, y, z)
		require.Equal(t, text, m.String())
		require.Equal(t, text, u.String())
		require.Equal(t, jump, jumps[0].String())
	})
}

func TestFunctionsKeepNoInputAndGiveNoInternals(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		text := index.String()
		n := must(markov.Frobenius(index))(t)
		value := n.String()
		found := must(markov.Indices(context.Background(), n))(t)
		require.True(t, must(markov.IsNumber(context.Background(), n))(t))
		require.Equal(t, value, n.String(), "inputs not modified")
		found[0], _ = markov.FromIndex(found[0])
		spoil(n)
		spoil(must(markov.Number(must(markov.FromIndex(index))(t)))(t))
		require.Equal(t, value, must(markov.Frobenius(index))(t).String())

		q, p, err := markov.Point(index)
		require.NoError(t, err)
		j := must(markov.IndexAt(q, p))(t)
		spoil(q, p)
		require.Equal(t, text, index.String())
		require.Equal(t, text, j.String())
	})
}

func TestIteratorsKeepNoInputAndGiveNoInternals(t *testing.T) {
	bound := big.NewInt(1000)
	within := markov.Within(bound)
	spoil(bound)
	for range 2 {
		var got []string
		for _, triple := range within {
			a, b, c := triple.Numbers()
			got = append(got, c.String())
			spoil(a, b, c)
		}
		require.Equal(t, []string{"1", "2", "5", "13", "34", "89", "233", "610", "194", "29", "433", "169", "985"}, got)
	}
	var got []string
	for _, n := range markov.Numbers() {
		if got = append(got, n.String()); len(got) == 13 {
			break
		}
		spoil(n)
	}
	require.Equal(t, lines(t, "a002559.txt")[:13], got)
}
