package farey_test

import (
	"math/big"
	"reflect"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// sharesMemory reports whether a type lets its holder reach a big integer or the
// elements of a slice.
func sharesMemory(typ reflect.Type) bool {
	switch typ.Kind() {
	case reflect.Slice:
		return true
	case reflect.Array:
		return sharesMemory(typ.Elem())
	default:
		return typ == reflect.TypeFor[*big.Int]()
	}
}

// TestEveryMethodThatSharesMemoryIsCovered fails when an exported method that takes or
// returns such a type is not in the list of those tested below.
func TestEveryMethodThatSharesMemoryIsCovered(t *testing.T) {
	covered := []string{
		"Class.MarshalText", "Class.UnmarshalText", "Path.MarshalText", "Path.UnmarshalText",
		"Slope.CrossingCounts", "Slope.Den", "Slope.MarshalText", "Slope.Num", "Slope.UnmarshalText",
	}
	var found []string
	for _, value := range []any{
		new(farey.Class), new(farey.Crossing), new(farey.Key), new(farey.Path), new(farey.Point),
		new(farey.Side), new(farey.Slope), new(farey.Symmetry), new(farey.Triangle),
	} {
		typ := reflect.TypeOf(value)
		for i := range typ.NumMethod() {
			method := typ.Method(i)
			shares := false
			for j := 1; j < method.Type.NumIn(); j++ {
				shares = shares || sharesMemory(method.Type.In(j))
			}
			for j := range method.Type.NumOut() {
				shares = shares || sharesMemory(method.Type.Out(j))
			}
			if shares {
				found = append(found, typ.Elem().Name()+"."+method.Name)
			}
		}
	}
	slices.Sort(found)
	require.Equal(t, covered, found)
}

func TestSlopesKeepNoInputAndGiveNoInternals(t *testing.T) {
	spoil := func(x *big.Int) {
		for i := range x.Bits() {
			x.Bits()[i] ^= 0x55
		}
		x.Add(x, big.NewInt(12345))
	}
	rapid.Check(t, func(t *rapid.T) {
		p, q := integers().Draw(t, "p"), integers().Draw(t, "q")
		p0, q0 := p.String(), q.String()
		s, err := farey.New(p, q)
		require.Equal(t, p0+"/"+q0, p.String()+"/"+q.String(), "inputs not modified")
		if err != nil {
			return
		}
		whole := s.String()
		other := slopes().Draw(t, "other")
		before := other.String()
		spoil(p)
		spoil(q)
		spoil(s.Num())
		spoil(s.Den())
		spoil(s.Neg().Num())
		spoil(farey.Det(s, other))
		spoil(farey.Det(other, s))
		for _, n := range s.CrossingCounts() {
			spoil(n)
		}
		text, err := s.MarshalText()
		require.NoError(t, err)
		for i := range text {
			text[i] = 'x'
		}
		path, err := s.Path().MarshalText()
		require.NoError(t, err)
		for i := range path {
			path[i] = 'x'
		}
		require.Equal(t, whole, s.String())
		require.Equal(t, before, other.String())
		require.Equal(t, s, s.Key().Slope())
	})
}

func TestDecodersKeepNoInput(t *testing.T) {
	text := []byte("123456789012345678901234567891/7")
	var s farey.Slope
	require.NoError(t, s.UnmarshalText(text))
	clear(text)
	require.Equal(t, "123456789012345678901234567891/7", s.String())

	text = []byte("one: L3 R99999999999999999999999")
	var p farey.Path
	require.NoError(t, p.UnmarshalText(text))
	clear(text)
	require.Equal(t, "one: L3 R99999999999999999999999", p.String())

	text = []byte("one")
	var c farey.Class
	require.NoError(t, c.UnmarshalText(text))
	clear(text)
	require.Equal(t, farey.One, c)
	name, err := c.MarshalText()
	require.NoError(t, err)
	clear(name)
	require.Equal(t, "one", c.String())
}
