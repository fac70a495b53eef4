package markov_test

import (
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/markov"
)

func at(t require.TestingT, q, p int64) *big.Int {
	return must(markov.NumberAt(big.NewInt(q), big.NewInt(p)))(t)
}

func TestNumberAtAPrimitivePointIsThatOfTheIndex(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := indices().Draw(t, "index")
		q, p, err := markov.Point(index)
		require.NoError(t, err)
		require.Equal(t, must(markov.Frobenius(index))(t).String(), must(markov.NumberAt(q, p))(t).String())
	})
}

// By stepping.
func TestNumberAtMultiplesGoesOnByTheRecurrence(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		index := smallIndices().Draw(t, "index")
		q, p, err := markov.Point(index)
		require.NoError(t, err)
		m := must(markov.Frobenius(index))(t)
		before, now := new(big.Int), new(big.Int).Set(m)
		for n := int64(1); n <= 12; n++ {
			k := big.NewInt(n)
			got := must(markov.NumberAt(new(big.Int).Mul(k, q), new(big.Int).Mul(k, p)))(t)
			require.Equal(t, now.String(), got.String())
			next := new(big.Int).Mul(m, now)
			next.Mul(next, big.NewInt(3)).Sub(next, before)
			before, now = now, next
		}
	})
}

// "On the Markov numbers: fixed numerator, denominator, and sum conjectures",
// Adv. Appl. Math. 130 (2021): for all points, primitive or not.
func TestNumbersIncreaseAlongFixedNumeratorDenominatorAndSum(t *testing.T) {
	for q := int64(1); q <= 40; q++ {
		for p := int64(0); p <= q; p++ {
			n := at(t, q, p)
			if p < q {
				require.Negative(t, n.Cmp(at(t, q, p+1)), "fixed q = %d, p = %d", q, p)
			}
			require.Negative(t, n.Cmp(at(t, q+1, p)), "fixed p = %d, q = %d", p, q)
			if p > 0 {
				require.Negative(t, n.Cmp(at(t, q+1, p-1)), "fixed p + q, (%d, %d)", q, p)
			}
		}
	}
}

// "On the ordering of the Markov numbers", Adv. Appl. Math. 143 (2023):
// primitive points with 0 < p < q.
func TestNumbersAlongLinesIncreaseOrDecreaseByTheSlope(t *testing.T) {
	const size = 30
	type point struct{ q, p int64 }
	var points []point
	numbers := map[point]*big.Int{}
	for q := int64(2); q <= size; q++ {
		for p := int64(1); p < q; p++ {
			if new(big.Int).GCD(nil, nil, big.NewInt(p), big.NewInt(q)).Int64() == 1 {
				points = append(points, point{q, p})
				numbers[point{q, p}] = at(t, q, p)
			}
		}
	}
	for _, a := range points {
		for _, b := range points {
			if b.q <= a.q {
				continue
			}
			rise, run := b.p-a.p, b.q-a.q
			switch order := numbers[a].Cmp(numbers[b]); {
			case 7*rise >= -8*run: // slope ≥ −8/7
				require.Negative(t, order, "%v %v", a, b)
			case 4*rise <= -5*run: // slope ≤ −5/4
				require.Positive(t, order, "%v %v", a, b)
			}
		}
	}
	// Points on the rays, which are not primitive, break the first law, so that
	// primitive is needed in it.
	broken := false
	for n := int64(2); n < size; n++ {
		for _, b := range points {
			if b.q > n && 7*(b.p-n) >= -8*(b.q-n) {
				broken = broken || at(t, n, n).Cmp(numbers[b]) > 0
			}
		}
	}
	require.True(t, broken)
}

func TestNumberAtRefuses(t *testing.T) {
	n := big.NewInt
	for _, c := range []struct {
		q, p *big.Int
		want error
	}{
		{nil, n(1), markov.ErrIndex}, {n(1), nil, markov.ErrIndex}, {n(1), n(2), markov.ErrIndex}, {n(1), n(-1), markov.ErrIndex},
		{n(-3), n(-5), markov.ErrIndex}, {n(0), n(1), markov.ErrIndex}, {n(1 << 40), n(0), markov.ErrTooLarge}, {n(1 << 40), n(1), markov.ErrTooLarge},
	} {
		_, err := markov.NumberAt(c.q, c.p)
		require.ErrorIs(t, err, c.want)
	}
	huge, _ := new(big.Int).SetString(strings.Repeat("9", 5000), 10)
	_, err := markov.NumberAt(huge, huge)
	require.ErrorIs(t, err, markov.ErrTooLarge)
	require.Equal(t, "0", at(t, 0, 0).String())
	q, p := n(6), n(4)
	spoil(must(markov.NumberAt(q, p))(t))
	require.Equal(t, "6 4", q.String()+" "+p.String())
	require.Equal(t, farey.MustParse("2/3").String(), must(farey.New(p, q))(t).String())
}
