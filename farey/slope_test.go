package farey_test

import (
	"math"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// isReduced is the law of slopes: lowest terms, q ≥ 0, machine integers exactly when
// both terms have absolute value below 2⁶³.
func isReduced(t require.TestingT, s farey.Slope) {
	p, q := s.Num(), s.Den()
	require.True(t, q.Sign() >= 0)
	gcd := new(big.Int).GCD(nil, nil, new(big.Int).Abs(p), q)
	require.Zero(t, gcd.Cmp(big.NewInt(1)))
	limit := new(big.Int).Lsh(big.NewInt(1), 63)
	x, y, ok := s.Int64s()
	require.Equal(t, p.CmpAbs(limit) < 0 && q.Cmp(limit) < 0, ok)
	if ok {
		require.Zero(t, p.Cmp(big.NewInt(x)))
		require.Zero(t, q.Cmp(big.NewInt(y)))
	} else {
		require.Zero(t, x)
		require.Zero(t, y)
	}
	require.Equal(t, s.IsInfinite(), q.Sign() == 0)
	if s.IsInfinite() {
		require.Zero(t, p.Cmp(big.NewInt(1)))
	}
	require.Equal(t, p.Sign(), s.Sign())
}

// rat is the value of a finite slope.
func rat(s farey.Slope) *big.Rat { return new(big.Rat).SetFrac(s.Num(), s.Den()) }

func TestFromIntsIsNewUpToTheEndsOfTheRange(t *testing.T) {
	corners := []int64{0, 1, -1, 2, 3, -3, 1 << 62, -1 << 62, math.MaxInt64, -math.MaxInt64, math.MinInt64, math.MinInt64 + 2}
	for _, p := range corners {
		for _, q := range corners {
			if p == 0 && q == 0 {
				continue
			}
			s, err := farey.FromInts(p, q)
			require.NoError(t, err)
			isReduced(t, s)
			require.Zero(t, new(big.Int).Mul(s.Num(), big.NewInt(q)).Cmp(new(big.Int).Mul(s.Den(), big.NewInt(p))), "%d/%d", p, q)
			u, err := farey.New(big.NewInt(p), big.NewInt(q))
			require.NoError(t, err)
			require.True(t, s.Equal(u), "%d/%d", p, q)
		}
	}
}

func TestNewIsTheQuotient(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := integers().Draw(t, "p"), integers().Draw(t, "q")
		s, err := farey.New(p, q)
		switch {
		case p.Sign() == 0 && q.Sign() == 0:
			require.ErrorIs(t, err, farey.ErrIndeterminate)
			return
		case q.Sign() == 0:
			require.True(t, s.IsInfinite())
		default:
			require.Zero(t, new(big.Rat).SetFrac(p, q).Cmp(rat(s)))
		}
		require.NoError(t, err)
		isReduced(t, s)
	})
}

func TestNewDropsCommonFactors(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, k := slopes().Draw(t, "s"), integers().Draw(t, "k")
		if k.Sign() == 0 {
			k.SetInt64(-3)
		}
		got, err := farey.New(new(big.Int).Mul(k, s.Num()), new(big.Int).Mul(k, s.Den()))
		require.NoError(t, err)
		equalSlopes(t, s, got)
	})
}

func TestFromIntsIsNew(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p, q := int64s().Draw(t, "p"), int64s().Draw(t, "q")
		want, err1 := farey.New(big.NewInt(p), big.NewInt(q))
		got, err2 := farey.FromInts(p, q)
		require.Equal(t, err1, err2)
		require.Equal(t, want, got) // deep: one representation only
		if err2 == nil {
			isReduced(t, got)
		}
	})
}

func TestSlopeRefusals(t *testing.T) {
	one := big.NewInt(1)
	for _, args := range [][2]*big.Int{{nil, one}, {one, nil}, {nil, nil}} {
		_, err := farey.New(args[0], args[1])
		require.ErrorIs(t, err, farey.ErrNil)
	}
	_, err := farey.New(new(big.Int), new(big.Int))
	require.ErrorIs(t, err, farey.ErrIndeterminate)
	_, err = farey.FromInts(0, 0)
	require.ErrorIs(t, err, farey.ErrIndeterminate)
}

func TestZeroSlopeIsZeroOverOne(t *testing.T) {
	var s farey.Slope
	isReduced(t, s)
	require.Equal(t, "0/1", s.String())
	require.Equal(t, farey.MustParse("0"), s)
	require.Equal(t, farey.Key{}, s.Key())
	equalSlopes(t, s, farey.Key{}.Slope())
}

func TestCmpIsTheOrderOfRationals(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, u := slopes().Draw(t, "s"), slopes().Draw(t, "u")
		if rapid.Bool().Draw(t, "close") { // the hard case: consecutive, sharing leading digits
			s, u, _ = s.Path().Edge()
		}
		var want int
		switch {
		case s.IsInfinite() && u.IsInfinite():
		case s.IsInfinite():
			want = 1
		case u.IsInfinite():
			want = -1
		default:
			want = rat(s).Cmp(rat(u))
		}
		require.Equal(t, want, s.Cmp(u))
		require.Equal(t, -want, u.Cmp(s))
		require.Equal(t, want, farey.Det(s, u).Sign())
		require.Equal(t, want == 0, s.Equal(u))
		require.Equal(t, want == 0, s.Key() == u.Key())
	})
}

func TestCmpOfMachineIntegersIsExact(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		big63 := rapid.OneOf(rapid.Int64Range(1, math.MaxInt64), rapid.Int64Range(math.MaxInt64-50, math.MaxInt64))
		sign := rapid.SampledFrom([]int64{1, -1}).Draw(t, "sign")
		s, err := farey.FromInts(sign*big63.Draw(t, "p"), big63.Draw(t, "q"))
		require.NoError(t, err)
		u, err := farey.FromInts(sign*big63.Draw(t, "p2"), big63.Draw(t, "q2"))
		require.NoError(t, err)
		require.Equal(t, rat(s).Cmp(rat(u)), s.Cmp(u))
	})
}

func TestKeyGivesTheSlopeBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		require.Equal(t, s, s.Key().Slope())
		require.True(t, s.Equal(s.Key().Slope()))
	})
}

func TestNegIsTheOpposite(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		n := s.Neg()
		isReduced(t, n)
		require.Equal(t, s, n.Neg())
		if s.IsInfinite() {
			require.Equal(t, s, n)
			return
		}
		require.Zero(t, new(big.Rat).Neg(rat(s)).Cmp(rat(n)))
	})
}

func TestClassIsTheParity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		want := map[[2]uint]farey.Class{{0, 1}: farey.Zero, {1, 0}: farey.Infinity, {1, 1}: farey.One}
		require.Equal(t, want[[2]uint{s.Num().Bit(0), s.Den().Bit(0)}], s.Class())
	})
}

func TestIsBaseHoldsForTheThreeBaseSlopes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		require.Equal(t, strings.Contains(" 0/1 1/0 1/1 ", " "+s.String()+" "), s.IsBase())
	})
}
