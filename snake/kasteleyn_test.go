package snake_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

// kasteleyn returns |det| of the signed, weighted adjacency matrix between the
// even and the odd vertices: vertical edges in odd columns are negative, so
// that the signs round every tile multiply to −1. "Dimer statistics and phase
// transitions", J. Math. Phys. 4 (1963).
func kasteleyn(g snake.Graph, weight func(snake.Side) *big.Rat) *big.Rat {
	vertices, err := g.Vertices()
	if err != nil {
		panic(err)
	}
	number := map[snake.Point]int{}
	var size [2]int
	for _, v := range vertices {
		side := (v.X + v.Y) % 2
		number[v] = size[side]
		size[side]++
	}
	m := make([][]*big.Rat, size[0])
	for i := range m {
		m[i] = make([]*big.Rat, size[1])
		for j := range m[i] {
			m[i][j] = new(big.Rat)
		}
	}
	var sides []snake.Side
	for e := range g.Edges() {
		sides = append(sides, e)
	}
	for k, e := range asLattice(g, sides) {
		w := new(big.Rat).Set(weight(sides[k]))
		if e.from.X == e.to.X && e.from.X%2 == 1 {
			w.Neg(w)
		}
		a, b := e.from, e.to
		if (a.X+a.Y)%2 == 1 {
			a, b = b, a
		}
		m[number[a]][number[b]] = w
	}
	det := big.NewRat(1, 1)
	for c := range m {
		p := c
		for p < len(m) && m[p][c].Sign() == 0 {
			p++
		}
		if p == len(m) {
			return new(big.Rat)
		}
		m[c], m[p] = m[p], m[c]
		det.Mul(det, m[c][c])
		for r := c + 1; r < len(m); r++ {
			if m[r][c].Sign() == 0 {
				continue
			}
			f := new(big.Rat).Quo(m[r][c], m[c][c])
			for k := c; k < len(m); k++ {
				m[r][k] = new(big.Rat).Sub(m[r][k], new(big.Rat).Mul(f, m[c][k]))
			}
		}
	}
	return det.Abs(det)
}

func TestKasteleynDeterminantIsTheWeight(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		word := words(14).Draw(t, "word")
		g := snake.FromWord(mustWord(word))
		weights := map[snake.Side]*big.Rat{}
		for e := range g.Edges() {
			weights[e] = big.NewRat(rapid.Int64Range(0, 7).Draw(t, "weight"), 1)
		}
		weight := func(e snake.Side) *big.Rat { return weights[e] }
		got, err := snake.Weigh(rationals{}, g, snake.Weights[*big.Rat]{Edge: weight})
		require.NoError(t, err)
		require.Equal(t, kasteleyn(g, weight).RatString(), got.RatString())
		one := func(snake.Side) *big.Rat { return big.NewRat(1, 1) }
		require.Equal(t, kasteleyn(g, one).RatString(), g.Count().String())
	})
}
