package orbifold_test

import (
	"fmt"
	"math"
	"math/big"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

func ring(t require.TestingT, n int) orbifold.CosineRing {
	return must(orbifold.NewCosineRing(n))(t)
}

// float is the value of an element from its coordinates, in float64.
func float(x orbifold.Cosine, n int) float64 {
	c, power, sum := 2*math.Cos(math.Pi/float64(n)), 1.0, 0.0
	for _, k := range x.Coordinates() {
		f, _ := new(big.Float).SetInt(k).Float64()
		sum += f * power
		power *= c
	}
	return sum
}

// elements draws small elements of a ring.
func elements(q orbifold.CosineRing) *rapid.Generator[orbifold.Cosine] {
	return rapid.Custom(func(t *rapid.T) orbifold.Cosine {
		c := must(q.Weight(q.Order()))(t)
		x := q.Zero()
		for range q.Degree() {
			k := q.Integer(big.NewInt(rapid.Int64Range(-50, 50).Draw(t, "coordinate")))
			x = q.Add(q.Mul(x, c), k)
		}
		return x
	})
}

func TestCosineRingIsACommutativeRing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q := ring(t, rapid.IntRange(2, 40).Draw(t, "n"))
		x, y, z := elements(q).Draw(t, "x"), elements(q).Draw(t, "y"), elements(q).Draw(t, "z")
		assert.True(t, q.Add(x, y).Equal(q.Add(y, x)))
		assert.True(t, q.Mul(x, y).Equal(q.Mul(y, x)))
		assert.True(t, q.Mul(q.Mul(x, y), z).Equal(q.Mul(x, q.Mul(y, z))))
		assert.True(t, q.Mul(x, q.Add(y, z)).Equal(q.Add(q.Mul(x, y), q.Mul(x, z))))
		assert.True(t, q.Add(q.Sub(x, y), y).Equal(x))
		assert.True(t, q.Mul(q.One(), x).Equal(x))
		assert.True(t, q.Add(q.Zero(), x).Equal(x))
		assert.True(t, q.Add(orbifold.Cosine{}, x).Equal(x))
		assert.InDelta(t, float(x, q.Order())*float(y, q.Order()), float(q.Mul(x, y), q.Order()), 1e-3*(1+math.Abs(float(x, q.Order())*float(y, q.Order()))))
	})
}

func TestGeneratorIsACosineOfTheRightDegree(t *testing.T) {
	for n := 2; n <= 64; n++ {
		q := ring(t, n)
		phi := 0
		for k := 1; k <= 2*n; k++ {
			if new(big.Int).GCD(nil, nil, big.NewInt(int64(k)), big.NewInt(int64(2*n))).Int64() == 1 {
				phi++
			}
		}
		assert.Equal(t, phi/2, q.Degree(), "n = %d", n)
		for d := 2; d <= n; d++ {
			if n%d != 0 {
				continue
			}
			w := must(q.Weight(d))(t)
			text := must(w.Decimal(12))(t)
			value, err := strconv.ParseFloat(text, 64)
			require.NoError(t, err)
			assert.InDelta(t, 2*math.Cos(math.Pi/float64(d)), value, 1e-11, "order %d in ring %d", d, n)
			// x^d + x^−d = −2 for x + 1/x = 2cos(π/d): C_d(w) = −2.
			a, b := q.Integer(big.NewInt(2)), w
			for range d - 1 {
				a, b = b, q.Sub(q.Mul(w, b), a)
			}
			assert.True(t, b.Equal(q.Integer(big.NewInt(-2))), "order %d in ring %d", d, n)
		}
	}
}

func TestOrdersFourFiveSixHaveTheKnownWeights(t *testing.T) {
	// 2cos(π/4) = √2, 2cos(π/5) = (1 + √5)/2, 2cos(π/6) = √3 (common practice).
	for n, square := range map[int][2]int64{4: {2, 0}, 5: {1, 1}, 6: {3, 0}} {
		q := ring(t, n)
		c := must(q.Weight(n))(t)
		want := q.Add(q.Integer(big.NewInt(square[0])), q.Mul(q.Integer(big.NewInt(square[1])), c))
		assert.True(t, q.Mul(c, c).Equal(want), "n = %d", n)
	}
	assert.Equal(t, "1.6180339887498948482045868343656381177203", must(must(ring(t, 5).Weight(5))(t).Decimal(40))(t)) // golden ratio, OEIS A001622
	assert.Equal(t, "1.4142135623730950488016887242096980785697", must(must(ring(t, 4).Weight(4))(t).Decimal(40))(t)) // √2, OEIS A002193
}

func TestSignAndOrderAreThoseOfTheRealNumbers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q := ring(t, rapid.IntRange(2, 30).Draw(t, "n"))
		x, y := elements(q).Draw(t, "x"), elements(q).Draw(t, "y")
		difference := float(x, q.Order()) - float(y, q.Order())
		c := must(x.Cmp(y))(t)
		if math.Abs(difference) > 1e-3 {
			assert.Equal(t, difference > 0, c > 0)
		}
		assert.Equal(t, x.Equal(y), c == 0)
		assert.Equal(t, -c, must(y.Cmp(x))(t))
		square := q.Mul(x, x)
		assert.GreaterOrEqual(t, must(square.Sign())(t), 0)
	})
	// A unit to a high power is tiny and not zero: (√2 − 1)^400 < 10^−150.
	q := ring(t, 4)
	x, p := q.Sub(must(q.Weight(4))(t), q.One()), q.One()
	for range 400 {
		p = q.Mul(p, x)
	}
	assert.Equal(t, 1, must(p.Sign())(t))
	assert.Equal(t, "0."+zeros(150), must(p.Decimal(150))(t))
	assert.NotEqual(t, "0."+zeros(160), must(p.Decimal(160))(t))
}

// cosineWeights draws a ring with three weights of orders that divide its order.
func cosineWeights(t *rapid.T) (orbifold.CosineRing, [3]orbifold.Cosine) {
	n := rapid.SampledFrom([]int{4, 5, 6, 7, 12, 20, 30}).Draw(t, "n")
	q := ring(t, n)
	var orders []int
	for d := 2; d <= n; d++ {
		if n%d == 0 {
			orders = append(orders, d)
		}
	}
	var k [3]orbifold.Cosine
	for c := range k {
		k[c] = must(q.Weight(rapid.SampledFrom(orders).Draw(t, "order")))(t)
	}
	return q, k
}

func TestEquationAndExchangeRuleHoldInCosineRings(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q, k := cosineWeights(t)
		s := shortSlopes().Draw(t, "slope")
		triangle := s.Path().Triangle()
		at := func(s farey.Slope) orbifold.Cosine {
			return must(orbifold.Eval(snake.Semiring[orbifold.Cosine](q), k, s))(t)
		}
		mul := func(x orbifold.Cosine, ys ...orbifold.Cosine) orbifold.Cosine {
			for _, y := range ys {
				x = q.Mul(x, y)
			}
			return x
		}
		bigK := q.Add(q.Add(q.Integer(big.NewInt(3)), k[0]), q.Add(k[1], k[2]))
		var n [3]orbifold.Cosine
		for _, c := range allClasses {
			n[c] = at(triangle.Vertex(c))
		}
		left := q.Zero()
		for c := range n {
			left = q.Add(left, q.Add(mul(n[c], n[c]), mul(k[c], n[(c+1)%3], n[(c+2)%3])))
		}
		assert.True(t, left.Equal(mul(bigK, n[0], n[1], n[2])), "equation (E)")

		u := rapid.SampledFrom(allClasses).Draw(t, "u")
		v, w := n[(u+1)%3], n[(u+2)%3]
		flipped := at(triangle.Flip(u).Vertex(u))
		assert.True(t, mul(n[u], flipped).Equal(q.Add(q.Add(mul(v, v), mul(w, w)), mul(k[u], v, w))), "exchange rule (X)")
		assert.Equal(t, 1, must(flipped.Sign())(t))
	})
}

func TestOrdersTwoAndThreeGiveTheIntegerFamilies(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		q := ring(t, 6)
		s := slopes().Draw(t, "slope")
		var k [3]orbifold.Cosine
		var weights [3]int64
		for c := range k {
			weights[c] = rapid.Int64Range(0, 1).Draw(t, "k")
			k[c] = must(q.Weight(int(weights[c]) + 2))(t)
		}
		n := must(orbifold.Eval(snake.Semiring[orbifold.Cosine](q), k, s))(t)
		f := orbifold.MustNew(weights[0], weights[1], weights[2])
		assert.True(t, n.Equal(q.Integer(must(f.Number(s))(t))))
	})
}

func TestMixingRingsIsUndefined(t *testing.T) {
	four, five := ring(t, 4), ring(t, 5)
	x, y := must(four.Weight(4))(t), must(five.Weight(5))(t)
	for _, z := range []orbifold.Cosine{four.Add(x, y), five.Mul(x, y), four.Sub(y, x), four.Mul(four.Add(x, y), x)} {
		assert.False(t, z.Defined())
		assert.Equal(t, "undefined", z.String())
		_, err := z.Sign()
		assert.ErrorIs(t, err, orbifold.ErrCosine)
		_, err = z.Decimal(3)
		assert.ErrorIs(t, err, orbifold.ErrCosine)
		assert.False(t, z.Equal(z))
	}
	_, err := x.Cmp(y)
	assert.ErrorIs(t, err, orbifold.ErrCosine)
	assert.False(t, x.Equal(y))
	assert.True(t, four.One().Equal(five.One()))
}

func TestBadCosineOrdersAreRefused(t *testing.T) {
	for _, n := range []int{-4, 0, 1, orbifold.MaxCosineOrder + 1, math.MaxInt} {
		_, err := orbifold.NewCosineRing(n)
		assert.ErrorIs(t, err, orbifold.ErrCosine)
	}
	q := ring(t, 12)
	for _, d := range []int{-3, 0, 1, 5, 24} {
		_, err := q.Weight(d)
		assert.ErrorIs(t, err, orbifold.ErrCosine)
	}
	for _, d := range []int{-1, orbifold.MaxDecimals + 1} {
		_, err := q.One().Decimal(d)
		assert.ErrorIs(t, err, orbifold.ErrCosine)
	}
	assert.Equal(t, 2, orbifold.CosineRing{}.Order())
	assert.Equal(t, "0", orbifold.Cosine{}.String())
	assert.Equal(t, "-3", q.Integer(big.NewInt(-3)).String())
	assert.Equal(t, "0", q.Integer(nil).String())
	assert.Equal(t, "-2.000", must(orbifold.CosineRing{}.Integer(big.NewInt(-2)).Decimal(3))(t))
}

func ExampleCosineRing() {
	// A sphere with a cusp and orbifold points of orders 4, 6 and 2.
	q, _ := orbifold.NewCosineRing(12)
	k0, _ := q.Weight(4)
	k1, _ := q.Weight(6)
	k2, _ := q.Weight(2)
	n, err := orbifold.Eval(snake.Semiring[orbifold.Cosine](q), [3]orbifold.Cosine{k0, k1, k2}, farey.MustParse("2/3"))
	d, _ := n.Decimal(20)
	fmt.Println(n, "=", d, err)
	// Output:
	// -c + 4c^2 + c^3 = 20.20612009780487736991 <nil>
}
