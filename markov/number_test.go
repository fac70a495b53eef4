package markov_test

import (
	"context"
	"fmt"
	"math/big"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
	"example.com/onecusp/orbifold"
)

func TestFamilyIsTheClassicalOne(t *testing.T) {
	f := markov.Family()
	require.Equal(t, "(0,0,0)", f.String())
	require.Equal(t, "3", f.K().String())
	require.Equal(t, orbifold.Family{}, f)
}

// plain finds the number at a lattice slope by walking down the Stern–Brocot tree
// one Vieta jump at a time, from the definition.
func plain(s farey.Slope) *big.Int {
	p, q := s.Num(), s.Den()
	if q.Sign() == 0 || p.Sign() == 0 {
		return big.NewInt(1)
	}
	if p.Sign() < 0 { // the symmetry s ↦ 1/(1−s) takes negative slopes into [0, 1]
		p, q = s.Den(), new(big.Int).Sub(q, p)
	}
	target := new(big.Rat).SetFrac(p, q)
	// The numbers at l and r, and at −1/1 behind them.
	a, b, c := big.NewInt(1), big.NewInt(1), big.NewInt(2)
	lp, lq, rp, rq := big.NewInt(0), big.NewInt(1), big.NewInt(1), big.NewInt(0)
	for {
		n := new(big.Int).Mul(a, b)
		n.Mul(n, big.NewInt(3)).Sub(n, c)
		mp, mq := new(big.Int).Add(lp, rp), new(big.Int).Add(lq, rq)
		switch target.Cmp(new(big.Rat).SetFrac(mp, mq)) {
		case 0:
			return n
		case -1:
			b, c, rp, rq = n, b, mp, mq
		default:
			a, c, lp, lq = n, a, mp, mq
		}
	}
}

func TestNumberIsThatOfPlainStepping(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes().Draw(t, "slope")
		require.Equal(t, plain(s).String(), must(markov.Number(s))(t).String())
	})
}

func TestFrobeniusIsNumberAtTOverOnePlusT(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		lattice := must(farey.New(index.Num(), new(big.Int).Add(index.Num(), index.Den())))(t)
		require.Equal(t, plain(lattice).String(), must(markov.Frobenius(index))(t).String())
	})
}

func TestEveryNumberIsFoundAtItsIndex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		n := must(markov.Frobenius(index))(t)
		require.True(t, must(markov.IsNumber(context.Background(), n))(t))
		found := must(markov.Indices(context.Background(), n))(t)
		at := -1
		for i, j := range found {
			require.Equal(t, n.String(), must(markov.Frobenius(j))(t).String())
			if i > 0 {
				require.Negative(t, found[i-1].Cmp(j))
			}
			if j.Equal(index) {
				at = i
			}
		}
		require.GreaterOrEqual(t, at, 0, "%v among %v", index, found)
	})
}

// TestNumbersAreTheMembersOfSolutions compares with a search for solutions that
// knows no tree: for a ≤ b the equation is quadratic in c.
func TestNumbersAreTheMembersOfSolutions(t *testing.T) {
	const bound = 3000
	member := make(map[int64]bool)
	triples := make(map[string]bool)
	for a := int64(1); a <= bound; a++ {
		for b := a; a*b <= bound; b++ { // 3abc ≤ 3c² makes ab ≤ c
			d := 9*a*a*b*b - 4*(a*a+b*b)
			if d < 0 {
				continue
			}
			r := new(big.Int).Sqrt(big.NewInt(d)).Int64()
			if r*r != d || (3*a*b+r)%2 != 0 {
				continue
			}
			for _, c := range []int64{(3*a*b - r) / 2, (3*a*b + r) / 2} {
				if b <= c && c <= bound {
					member[a], member[b], member[c] = true, true, true
					triples[fmt.Sprintf("(%d, %d, %d)", a, b, c)] = true
				}
			}
		}
	}
	for n := int64(-3); n <= bound; n++ {
		require.Equal(t, member[n], must(markov.IsNumber(context.Background(), big.NewInt(n)))(t), "%d", n)
	}
	for _, m := range markov.Within(big.NewInt(bound)) {
		require.True(t, triples[m.String()], "%v", m)
		delete(triples, m.String())
	}
	require.Empty(t, triples)
}

func TestNumbersIncreaseAndMissNone(t *testing.T) {
	bound := new(big.Int).Exp(big.NewInt(10), big.NewInt(40), nil)
	want := make(map[string]string)
	for index, m := range markov.Within(bound) {
		_, _, c := m.Numbers()
		want[index.String()] = c.String()
	}
	last := new(big.Int)
	for index, n := range markov.Numbers() {
		if n.Cmp(bound) > 0 {
			break
		}
		require.LessOrEqual(t, last.Cmp(n), 0)
		last = n
		require.Equal(t, want[index.String()], n.String(), "at %v", index)
		delete(want, index.String())
	}
	require.Empty(t, want)
}

func TestNumbersStartAgain(t *testing.T) {
	seq := markov.Numbers()
	for range 2 {
		for index, n := range seq {
			require.Equal(t, "0/1", index.String())
			require.Equal(t, "1", n.String())
			break
		}
	}
}

func TestNumbersTooLargeAreRefusedAtOnce(t *testing.T) {
	huge := new(big.Int).Lsh(big.NewInt(1), 5000)
	for _, p := range []*big.Int{big.NewInt(1), new(big.Int).Sub(huge, big.NewInt(1)), new(big.Int).Rsh(huge, 1)} {
		s := must(farey.New(p, new(big.Int).Add(huge, big.NewInt(1))))(t)
		began := time.Now()
		_, err := markov.Number(s)
		require.ErrorIs(t, err, markov.ErrTooLarge)
		require.Less(t, len(err.Error()), 1000, "long slopes are shortened")
		_, err = markov.Frobenius(s)
		require.ErrorIs(t, err, markov.ErrTooLarge)
		_, err = markov.TripleAt(s)
		require.ErrorIs(t, err, markov.ErrTooLarge)
		require.Less(t, time.Since(began), 5*time.Second)
	}
}

func TestIntegersBelowOneAreNoNumbers(t *testing.T) {
	ctx := context.Background()
	for _, n := range []*big.Int{new(big.Int), big.NewInt(-5), new(big.Int).Lsh(big.NewInt(-1), 1<<20)} {
		require.False(t, must(markov.IsNumber(ctx, n))(t))
		_, err := markov.Indices(ctx, n)
		require.ErrorIs(t, err, markov.ErrNotPositive)
	}
	_, err := markov.IsNumber(ctx, nil)
	require.ErrorIs(t, err, markov.ErrNotPositive)
	_, err = markov.Indices(ctx, nil)
	require.ErrorIs(t, err, markov.ErrNotPositive)
}

func TestSearchStopsWithItsContext(t *testing.T) {
	n := new(big.Int).Lsh(big.NewInt(1), 1<<16)
	ctx, cancel := context.WithTimeout(context.Background(), 20*time.Millisecond)
	defer cancel()
	began := time.Now()
	yes, err := markov.IsNumber(ctx, n)
	require.ErrorIs(t, err, context.DeadlineExceeded)
	require.False(t, yes)
	found, err := markov.Indices(ctx, n)
	require.ErrorIs(t, err, context.DeadlineExceeded)
	require.Nil(t, found)
	require.Less(t, time.Since(began), 2*time.Second)
}
