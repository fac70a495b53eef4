package markov_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

func TestLatticeSlopeOfIndexIsTOverOnePlusT(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		lattice := must(markov.FromIndex(index))(t)
		r := new(big.Rat).SetFrac(index.Num(), index.Den())
		r.Quo(r, new(big.Rat).Add(r, big.NewRat(1, 1)))
		require.Equal(t, r.String(), lattice.String())
	})
}

func TestIndexUndoesFromIndex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		require.Equal(t, index.String(), must(markov.Index(must(markov.FromIndex(index))(t)))(t).String())
	})
}

func TestFromIndexUndoesIndexInItsDomain(t *testing.T) {
	half := farey.MustParse("1/2")
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "slope")
		index, err := markov.Index(s)
		if s.Sign() < 0 || s.Cmp(half) > 0 {
			require.ErrorIs(t, err, markov.ErrNoIndex)
			s = markov.Family().Representative(s)
			require.ErrorContains(t, err, s.String(), "the error names the lattice slope to ask for")
			index, err = markov.Index(s)
		}
		require.NoError(t, err)
		require.Equal(t, s.String(), must(markov.FromIndex(index))(t).String())
	})
}

func TestFromIndexKeepsOrderAndNeighbours(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		i, j := indices().Draw(t, "i"), indices().Draw(t, "j")
		s, u := must(markov.FromIndex(i))(t), must(markov.FromIndex(j))(t)
		require.Equal(t, i.Cmp(j), s.Cmp(u))
		require.Equal(t, farey.Det(i, j).String(), farey.Det(s, u).String())
	})
}

func TestIndexAtUndoesPoint(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		q, p, err := markov.Point(index)
		require.NoError(t, err)
		require.Equal(t, index.String(), p.String()+"/"+q.String())
		require.Equal(t, index.String(), must(markov.IndexAt(q, p))(t).String())
	})
}

func TestPointHasIndexWhenCoprimeAndBelowTheDiagonal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q, p := integers().Draw(t, "q"), integers().Draw(t, "p")
		index, err := markov.IndexAt(q, p)
		switch {
		case new(big.Int).GCD(nil, nil, new(big.Int).Abs(p), new(big.Int).Abs(q)).Cmp(big.NewInt(1)) != 0:
			require.ErrorIs(t, err, markov.ErrNotPrimitive)
		case q.Sign() <= 0 || p.Sign() < 0 || p.Cmp(q) > 0:
			require.ErrorIs(t, err, markov.ErrIndex)
		default:
			require.NoError(t, err)
			require.Equal(t, p.String()+"/"+q.String(), index.String())
		}
	})
}

func TestSlopesOutsideTheUnitIntervalAreNoIndex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Filter(func(s farey.Slope) bool {
			return s.Sign() < 0 || s.Cmp(farey.One.Slope()) > 0
		}).Draw(t, "slope")
		_, err := markov.FromIndex(s)
		require.ErrorIs(t, err, markov.ErrIndex)
		require.ErrorContains(t, err, s.String())
		_, _, err = markov.Point(s)
		require.ErrorIs(t, err, markov.ErrIndex)
		_, err = markov.Frobenius(s)
		require.ErrorIs(t, err, markov.ErrIndex)
		_, err = markov.TripleAt(s)
		require.ErrorIs(t, err, markov.ErrIndex)
	})
}

func TestPointsWithoutIndex(t *testing.T) {
	for _, bad := range []struct {
		q, p *big.Int
		want error
	}{
		{nil, big.NewInt(1), markov.ErrIndex},
		{big.NewInt(1), nil, markov.ErrIndex},
		{nil, nil, markov.ErrIndex},
		{big.NewInt(0), big.NewInt(0), markov.ErrNotPrimitive},
		{big.NewInt(3), big.NewInt(0), markov.ErrNotPrimitive},
		{big.NewInt(4), big.NewInt(2), markov.ErrNotPrimitive},
		{big.NewInt(0), big.NewInt(1), markov.ErrIndex},
		{big.NewInt(2), big.NewInt(3), markov.ErrIndex},
		{big.NewInt(3), big.NewInt(-2), markov.ErrIndex},
		{big.NewInt(-3), big.NewInt(-2), markov.ErrIndex},
		{big.NewInt(-1), big.NewInt(0), markov.ErrIndex},
	} {
		_, err := markov.IndexAt(bad.q, bad.p)
		require.ErrorIs(t, err, bad.want, "(%v, %v)", bad.q, bad.p)
	}
}
