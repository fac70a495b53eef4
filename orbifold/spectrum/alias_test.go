package spectrum_test

import (
	"math/big"
	"reflect"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/orbifold/spectrum"
)

func TestEveryMethodThatSharesMemoryIsCovered(t *testing.T) {
	covered := []string{"Approximation.Fraction", "Value.Enclosure", "Value.Number", "Value.Radicand", "Value.Trace"}
	var found []string
	for _, typ := range []reflect.Type{reflect.TypeFor[spectrum.Value](), reflect.TypeFor[spectrum.Approximation]()} {
		for i := range typ.NumMethod() {
			m := typ.Method(i)
			if signature := m.Type.String(); strings.Contains(signature, "*big.") || strings.Contains(signature, "[]") {
				found = append(found, typ.Name()+"."+m.Name)
			}
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

func TestNothingIsSharedWithTheCaller(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 4).Draw(t, "slope")
		v := must(spectrum.LagrangeValue(f, s))(t)
		text := v.String()
		lo, hi, err := v.Enclosure(64)
		require.NoError(t, err)
		bounds := lo.String() + hi.String()
		spoil(v.Trace(), v.Number(), v.Radicand(), v.Surd().D(), v.Surd().Q())
		lo.Neg(lo)
		hi.Neg(hi)
		require.Equal(t, text, v.String())
		lo, hi, err = v.Enclosure(64)
		require.NoError(t, err)
		require.Equal(t, bounds, lo.String()+hi.String())
		for a := range must(spectrum.Approximations(f, s))(t) {
			p, q := a.Fraction()
			before := p.String() + "/" + q.String()
			spoil(p, q)
			p, q = a.Fraction()
			require.Equal(t, before, p.String()+"/"+q.String())
			if q.BitLen() > 100 {
				break
			}
		}
		n, y := must(f.Number(s))(t), must(spectrum.Root(f, s))(t)
		before := n.String() + " " + y.String()
		found := texts(must(spectrum.IdentifyRoot(background, f, n, y))(t))
		require.Equal(t, before, n.String()+" "+y.String())
		spoil(y)
		y = must(spectrum.Root(f, s))(t)
		require.Equal(t, before, n.String()+" "+y.String())
		again := must(spectrum.IdentifyRoot(background, f, n, y))(t)
		spoil(n, y)
		require.Equal(t, found, texts(again))
	})
}
