package farey_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
)

// height is |p| + q.
func height(s farey.Slope) *big.Int {
	h := s.Num()
	return h.Add(h.Abs(h), s.Den())
}

func TestDetIsTheDeterminant(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, u := slopes().Draw(t, "s"), slopes().Draw(t, "u")
		want := new(big.Int).Mul(s.Num(), u.Den())
		want.Sub(want, new(big.Int).Mul(u.Num(), s.Den()))
		require.Zero(t, want.Cmp(farey.Det(s, u)))
		require.Equal(t, want.CmpAbs(big.NewInt(1)) == 0, farey.Neighbours(s, u))
	})
}

func TestNeighboursModuloAWordAreNotEnough(t *testing.T) {
	// Determinant 2⁶⁴ + 1, which is 1 modulo 2⁶⁴.
	s, err := farey.FromInts(1<<40, 1)
	require.NoError(t, err)
	u, err := farey.FromInts(1<<40-1, 1<<24+1)
	require.NoError(t, err)
	require.Equal(t, "18446744073709551617", farey.Det(s, u).String())
	require.False(t, farey.Neighbours(s, u))
}

func TestMediantCompletesTheTriangle(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := paths().Draw(t, "p")
		a, b, _ := p.Edge()
		m, err := farey.Mediant(a, b)
		require.NoError(t, err)
		isReduced(t, m)
		_, err = farey.NewTriangle(a, b, m)
		require.NoError(t, err)
		other, err := farey.Mediant(b, a)
		require.NoError(t, err)
		require.Equal(t, m, other)
		require.Zero(t, height(m).Cmp(new(big.Int).Add(height(a), height(b))))
		require.Equal(t, a.Class().Third(b.Class()), m.Class())
	})
}

func TestMediantsBesideInfinity(t *testing.T) {
	for _, row := range [][3]string{
		{"0/1", "1/0", "1/1"}, {"1/1", "1/0", "2/1"}, {"5/1", "1/0", "6/1"}, {"-1/1", "1/0", "-2/1"}, {"-5/1", "1/0", "-6/1"},
		{"0/1", "1/1", "1/2"}, {"0/1", "-1/1", "-1/2"},
		{"-100000000000000000000/1", "1/0", "-100000000000000000001/1"},
	} {
		for _, pair := range [][2]string{{row[0], row[1]}, {row[1], row[0]}} {
			m, err := farey.Mediant(farey.MustParse(pair[0]), farey.MustParse(pair[1]))
			require.NoError(t, err)
			require.Equal(t, row[2], m.String(), pair)
		}
	}
}

func TestSlopeIsTheMediantOfItsParents(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		if s.IsBase() || s.Neg().IsBase() {
			return
		}
		a, b, err := s.Parents()
		require.NoError(t, err)
		m, err := farey.Mediant(a, b)
		require.NoError(t, err)
		require.Equal(t, s, m)
	})
}

func TestMediantRefusesOthers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, u := slopes().Draw(t, "s"), slopes().Draw(t, "u")
		_, err := farey.Mediant(s, u)
		if farey.Neighbours(s, u) {
			require.NoError(t, err)
		} else {
			require.ErrorIs(t, err, farey.ErrNotNeighbours)
		}
	})
}

func TestParentsSurround(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "s")
		a, b, err := s.Parents()
		if s.IsBase() {
			require.ErrorIs(t, err, farey.ErrBaseSlope)
			return
		}
		require.NoError(t, err)
		_, err = farey.NewTriangle(a, b, s)
		require.NoError(t, err)
		require.Equal(t, -1, s.Cmp(b))
		if a.IsInfinite() {
			require.Equal(t, -1, s.Sign())
		} else {
			require.Equal(t, 1, s.Cmp(a))
		}
		require.Zero(t, height(s).Cmp(new(big.Int).Add(height(a), height(b))))
	})
}

// TestParentsAreTheSmallNeighbours compares with a search over all smaller slopes: the
// parents are the only neighbours of smaller height.
func TestParentsAreTheSmallNeighbours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := smallSlopes().Draw(t, "s")
		if s.IsBase() {
			return
		}
		a, b, err := s.Parents()
		require.NoError(t, err)
		p, q, _ := s.Int64s()
		found := map[farey.Key]bool{}
		box, err := farey.Box(max(p, -p), q)
		require.NoError(t, err)
		for u := range box {
			if farey.Neighbours(s, u) && height(u).Cmp(height(s)) < 0 {
				found[u.Key()] = true
			}
		}
		require.Equal(t, map[farey.Key]bool{a.Key(): true, b.Key(): true}, found)
	})
}
