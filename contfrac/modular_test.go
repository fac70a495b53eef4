package contfrac_test

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestNumeratorModIsTheNumeratorReduced(t *testing.T) {
	moduli := []*big.Int{
		big.NewInt(1), big.NewInt(2), big.NewInt(97), big.NewInt(math.MaxInt64),
		new(big.Int).SetUint64(math.MaxUint64), new(big.Int).Lsh(big.NewInt(1), 64), new(big.Int).Lsh(big.NewInt(3), 200),
	}
	rapid.Check(t, func(t *rapid.T) {
		first := rapid.Int64().Draw(t, "first term")
		terms := []*big.Int{big.NewInt(first)}
		for _, x := range rapid.SliceOfN(rapid.Uint64Min(1), 0, 12).Draw(t, "terms") {
			term := new(big.Int).SetUint64(x)
			terms = append(terms, term.Lsh(term, uint(rapid.SampledFrom([]int{0, 0, 70}).Draw(t, "shift"))))
		}
		f, err := contfrac.NewFraction(terms...)
		require.NoError(t, err)
		for _, m := range moduli {
			got, err := f.NumeratorMod(m)
			require.NoError(t, err)
			want := f.Numerator()
			assert.Zero(t, want.Mod(want, m).Cmp(got), "modulo %s", m)
		}
	})
}

func TestNumeratorModRefusesBadModuli(t *testing.T) {
	f := contfrac.FromRat(big.NewRat(22, 7))
	for _, m := range []*big.Int{nil, new(big.Int), big.NewInt(-3)} {
		_, err := f.NumeratorMod(m)
		assert.ErrorIs(t, err, contfrac.ErrTerm)
	}
}
