package orbifold_test

import (
	"fmt"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

// shortSlopes draws slopes with expansions of a few hundred monomials.
func shortSlopes() *rapid.Generator[farey.Slope] {
	return slopesOn(paths(4, 1), paths(3, 1, 2), paths(2, 1, 3), paths(1, 9))
}

// lightFamilies draws small weights.
func lightFamilies() *rapid.Generator[orbifold.Family] {
	k := rapid.Int64Range(0, 3)
	return rapid.Custom(func(t *rapid.T) orbifold.Family {
		return orbifold.MustNew(k.Draw(t, "k₀"), k.Draw(t, "k∞"), k.Draw(t, "k₁"))
	})
}

// exchanged is the value at s that exchanging by u·u' = v² + k·v·w + w² gives
// from the lengths x.
func exchanged(f orbifold.Family, s farey.Slope, x [3]*big.Rat) *big.Rat {
	newest := s.Class()
	for u := range s.Path().Flips() {
		v, w := x[(u+1)%3], x[(u+2)%3]
		sum := new(big.Rat).Mul(v, v)
		sum.Add(sum, new(big.Rat).Mul(w, w))
		kvw := new(big.Rat).Mul(v, w)
		sum.Add(sum, kvw.Mul(kvw, new(big.Rat).SetInt64(f.Weight(u))))
		x[u], newest = sum.Quo(sum, x[u]), u
	}
	return x[newest]
}

func TestLaurentExpansionIsTheExchangedValue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := lightFamilies().Draw(t, "family"), shortSlopes().Draw(t, "slope")
		e := must(f.Laurent(s))(t)
		part := rapid.Int64Range(1, 50)
		var x [3]*big.Rat
		for c := range x {
			x[c] = big.NewRat(part.Draw(t, "numerator"), part.Draw(t, "denominator"))
		}
		value := must(e.Eval(x[0], x[1], x[2]))(t)
		assert.Zero(t, exchanged(f, s, x).Cmp(value), "%v at %v", f, s)
		assertEqualInt(t, must(f.Number(s))(t), must(e.Eval(big.NewRat(1, 1), big.NewRat(1, 1), big.NewRat(1, 1)))(t).Num())
	})
}

func TestLaurentExpansionIsPositiveAndHomogeneous(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := lightFamilies().Draw(t, "family"), shortSlopes().Draw(t, "slope")
		e := must(f.Laurent(s))(t)
		terms := 0
		for exponents, c := range e.Sum().Terms() {
			degree := 0
			for _, k := range exponents {
				degree += k
			}
			assert.Equal(t, 1, degree)
			assert.Positive(t, c.Sign())
			terms++
		}
		assert.Equal(t, e.Sum().Len(), terms)
		counts := s.CrossingCounts()
		for c, d := range e.Denominator() {
			want := counts[c]
			if s.IsBase() && farey.Class(c) == s.Class() {
				want = big.NewInt(-1)
			}
			assertEqualInt(t, want, big.NewInt(int64(d)), "denominator of %v in %v", s, f)
		}
		assert.True(t, e.Slope().Equal(s))
	})
}

func TestExpansionModuloIsTheExpansionReduced(t *testing.T) {
	m := new(big.Int).SetUint64(orbifold.Primes()[0])
	rapid.Check(t, func(t *rapid.T) {
		f, s := lightFamilies().Draw(t, "family"), shortSlopes().Draw(t, "slope")
		e := must(f.Laurent(s))(t)
		x := [3]int64{}
		for c := range x {
			x[c] = rapid.Int64Range(1, 1_000_000).Draw(t, "length")
		}
		r := must(e.Eval(big.NewRat(x[0], 1), big.NewRat(x[1], 1), big.NewRat(x[2], 1)))(t)
		want := new(big.Int).ModInverse(r.Denom(), m)
		want.Mul(want, r.Num()).Mod(want, m)
		assertEqualInt(t, want, must(e.EvalMod(big.NewInt(x[0]), big.NewInt(x[1]), big.NewInt(x[2]), m))(t))
	})
	e := must(orbifold.Family{}.Laurent(farey.MustParse("1/2")))(t)
	one := big.NewInt(1)
	for _, bad := range []struct{ x, m *big.Int }{{nil, big.NewInt(7)}, {big.NewInt(7), big.NewInt(7)}, {one, nil}, {one, big.NewInt(-2)}} {
		_, err := e.EvalMod(one, bad.x, one, bad.m)
		assert.ErrorIs(t, err, orbifold.ErrModulus)
	}
	_, err := e.Eval(big.NewRat(1, 1), new(big.Rat), big.NewRat(1, 1))
	assert.Error(t, err)
}

func TestMonomialsOfMatchingsSumToTheExpansion(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := orbifold.MustNew(rapid.Int64Range(0, 1).Draw(t, "k₀"), 0, rapid.Int64Range(0, 2).Draw(t, "k₁"))
		s := slopesOn(paths(2, 1), paths(1, 1, 2)).Draw(t, "slope")
		sum := snake.Laurent{}
		for _, e := range must(f.Monomials(s))(t) {
			sum = sum.Add(must(snake.NewLaurent(big.NewInt(1), e[:]...))(t))
		}
		assert.True(t, sum.Equal(must(f.Laurent(s))(t).Sum()))
	})
}

func TestNewtonPolygonHoldsEveryMonomial(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := lightFamilies().Draw(t, "family"), shortSlopes().Draw(t, "slope")
		e := must(f.Laurent(s))(t)
		corners := e.Newton()
		turn := func(a, b, c [3]int) int { return (b[0]-a[0])*(c[1]-a[1]) - (b[1]-a[1])*(c[0]-a[0]) }
		if e.Sum().Len() < 3 {
			assert.Len(t, corners, e.Sum().Len())
			return
		}
		for i := range corners {
			next := corners[(i+1)%len(corners)]
			for exponents := range e.Sum().Terms() {
				var p [3]int
				copy(p[:], exponents)
				assert.GreaterOrEqual(t, turn(corners[i], next, p), 0)
			}
			if len(corners) > 2 {
				assert.Positive(t, turn(corners[i], next, corners[(i+2)%len(corners)]), "strictly convex")
			}
			assert.Positive(t, e.Sum().Coefficient(corners[i][:]...).Sign())
		}
	})
}

// principal is a seed with principal coefficients of the classical family, in
// numbers: the F-polynomials at given y, c- and g-vectors, by the mutation
// rules of "Cluster algebras IV: coefficients", Compositio Math. 143 (2007)
// (memory). b[i][j] is the number of arrows from i to j.
type principal struct {
	b, c, g [3][3]int // columns of c and g belong to the vertices
	b0      [3][3]int
	f       [3]*big.Rat
}

func newPrincipal() principal {
	p := principal{}
	// Two arrows from 0/1 to 1/0, from 1/0 to 1/1, from 1/1 to 0/1.
	for _, arrow := range [][2]farey.Class{{farey.One, farey.Zero}, {farey.Infinity, farey.One}, {farey.Zero, farey.Infinity}} {
		p.b[arrow[0]][arrow[1]], p.b[arrow[1]][arrow[0]] = 2, -2
	}
	p.b0 = p.b
	for i := range 3 {
		p.c[i][i], p.g[i][i], p.f[i] = 1, 1, big.NewRat(1, 1)
	}
	return p
}

// mutate flips vertex u for the values y.
func (p *principal) mutate(u farey.Class, y [3]*big.Rat) {
	power := func(x *big.Rat, n int) *big.Rat {
		r := big.NewRat(1, 1)
		for range n {
			r.Mul(r, x)
		}
		return r
	}
	plus, minus := big.NewRat(1, 1), big.NewRat(1, 1)
	g := [3]int{}
	for i := range 3 {
		plus.Mul(plus, power(y[i], max(p.c[i][u], 0)))
		plus.Mul(plus, power(p.f[i], max(p.b[i][u], 0)))
		minus.Mul(minus, power(y[i], max(-p.c[i][u], 0)))
		minus.Mul(minus, power(p.f[i], max(-p.b[i][u], 0)))
		for r := range 3 {
			g[r] += max(p.b[i][u], 0)*p.g[r][i] - max(p.c[i][u], 0)*p.b0[r][i]
		}
	}
	for r := range 3 {
		p.g[r][u] = g[r] - p.g[r][u]
	}
	p.f[u] = plus.Add(plus, minus).Quo(plus, p.f[u])
	mutated := func(m [3][3]int) [3][3]int {
		n := m
		for i := range 3 {
			for j := range 3 {
				if j == int(u) {
					n[i][j] = -m[i][j]
				} else {
					n[i][j] = m[i][j] + max(m[i][u], 0)*max(p.b[u][j], 0) - max(-m[i][u], 0)*max(-p.b[u][j], 0)
				}
			}
		}
		return n
	}
	p.c = mutated(p.c)
	next := mutated(p.b)
	next[u] = [3]int{}
	for j := range 3 {
		next[u][j] = -p.b[u][j]
	}
	p.b = next
}

func TestFPolynomialAndGVectorFollowMutation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := shortSlopes().Draw(t, "slope")
		var y [3]*big.Rat
		for c := range y {
			y[c] = big.NewRat(rapid.Int64Range(1, 9).Draw(t, "y"), 1)
		}
		seed, newest := newPrincipal(), s.Class()
		for u := range s.Path().Flips() {
			seed.mutate(u, y)
			newest = u
		}
		f := must(orbifold.FPolynomial(s))(t)
		assert.Equal(t, seed.f[newest].String(), must(f.Eval(y[0], y[1], y[2]))(t).String(), "F at %v", s)
		g := must(orbifold.GVector(s))(t)
		assert.Equal(t, [3]int{seed.g[0][newest], seed.g[1][newest], seed.g[2][newest]}, g, "g at %v", s)

		assertEqualInt(t, big.NewInt(1), f.Coefficient(0, 0, 0), "constant term")
		one := big.NewRat(1, 1)
		assertEqualInt(t, must(orbifold.Family{}.Number(s))(t), must(f.Eval(one, one, one))(t).Num())
	})
}

func TestExpansionsPastTheLimitAreRefused(t *testing.T) {
	s := farey.MustParse("1/100000")
	_, err := orbifold.Family{}.Laurent(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = orbifold.Family{}.Monomials(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = orbifold.FPolynomial(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = orbifold.GVector(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	_, err = orbifold.MustNew(5000, 0, 0).Laurent(farey.MustParse("1/2"))
	assert.NoError(t, err, "no horizontal edge is crossed")
}

func TestZeroExpansionIsThatOfZero(t *testing.T) {
	var e orbifold.Expansion
	assert.Equal(t, "x₀", e.String())
	assert.Equal(t, must(orbifold.Family{}.Laurent(farey.Slope{}))(t).String(), e.String())
	assert.Equal(t, [3]int{-1, 0, 0}, e.Denominator())
	assert.Equal(t, [][3]int{{1, 0, 0}}, e.Newton())
	require.True(t, e.Slope().Equal(farey.Slope{}))
}

func ExampleFamily_Laurent() {
	e, err := orbifold.MustNew(0, 0, 1).Laurent(farey.MustParse("1/2"))
	fmt.Println(e, err)
	e, _ = orbifold.MustNew(0, 0, 1).Laurent(farey.MustParse("2/3"))
	one := big.NewRat(1, 1)
	n, _ := e.Eval(one, one, one)
	fmt.Println("denominator", e.Denominator(), "Newton polygon", e.Newton(), "number", n.Num())
	// Output:
	// x₀²·x∞⁻¹ + x∞⁻¹·x₁² <nil>
	// denominator [1 2 0] Newton polygon [[-1 -2 4] [3 -2 0] [-1 0 2]] number 5
}

func ExampleFPolynomial() {
	s := farey.MustParse("1/3")
	f, _ := orbifold.FPolynomial(s)
	g, _ := orbifold.GVector(s)
	fmt.Println(f.Text("y₀", "y∞", "y₁"), g)
	// Output:
	// y∞²·y₁ + y∞² + 2·y∞ + 1 [0 -2 3]
}

func ExampleFamily_Monomials() {
	monomials, _ := orbifold.Family{}.Monomials(farey.MustParse("1/3"))
	for m, e := range monomials {
		fmt.Println(m, e)
	}
	// Output:
	// 000 [0 -2 3]
	// 001 [2 -2 1]
	// 100 [2 -2 1]
	// 101 [4 -2 -1]
	// 111 [2 0 -1]
}

func ExampleEval_symbolicWeights() {
	// With variables for weights, Eval gives the number as a polynomial in k₀, k∞
	// and k₁.
	var k [3]snake.Laurent
	for i := range k {
		k[i], _ = snake.Variable(i + 1)
	}
	n, _ := orbifold.Eval(snake.Semiring[snake.Laurent](snake.Laurents{}), k, farey.MustParse("1/3"))
	fmt.Println(n.Text("k₀", "k∞", "k₁"))
	v, _ := n.Eval(big.NewRat(2, 1), new(big.Rat).SetInt64(1), big.NewRat(1, 1))
	exact, _ := orbifold.MustNew(2, 1, 1).Number(farey.MustParse("1/3"))
	fmt.Println(v.Num(), exact)
	// Output:
	// k∞² + k∞·k₁ + 4·k∞ + 2·k₁ + 5
	// 13 13
}

func ExampleEval_primeField() {
	field, _ := snake.NewModular(big.NewInt(1_000_003))
	k := [3]*big.Int{big.NewInt(5), big.NewInt(0), big.NewInt(999_999)}
	n, _ := orbifold.Eval(snake.Semiring[*big.Int](field), k, farey.MustParse("34/55"))
	fmt.Println(n)
	// Output:
	// 549449
}

func TestSymbolicNumbersHaveNonnegativeCoefficients(t *testing.T) {
	var k [3]snake.Laurent
	for i := range k {
		k[i] = must(snake.Variable(i + 1))(t)
	}
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), shortSlopes().Draw(t, "slope")
		n := must(orbifold.Eval(snake.Semiring[snake.Laurent](snake.Laurents{}), k, s))(t)
		sum := new(big.Int)
		for e, c := range n.Terms() {
			assert.Positive(t, c.Sign())
			for i, power := range e {
				require.GreaterOrEqual(t, power, 0)
				c.Mul(c, new(big.Int).Exp(big.NewInt(f.Weight(farey.Class(i))), big.NewInt(int64(power)), nil))
			}
			sum.Add(sum, c)
		}
		assertEqualInt(t, must(f.Number(s))(t), sum, "%v at %v", f, s)
	})
}
