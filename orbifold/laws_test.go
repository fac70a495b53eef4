package orbifold_test

import (
	"fmt"
	"math/big"
	"math/rand"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

// must unwraps a result whose error would end the test.
func must[T any](v T, err error) func(require.TestingT) T {
	return func(t require.TestingT) T {
		require.NoError(t, err)
		return v
	}
}

func assertEqualInt(t assert.TestingT, want, got *big.Int, what ...any) {
	if want.Cmp(got) != 0 {
		assert.Fail(t, fmt.Sprintf("want %s, got %s", contfrac.Abbreviate(want), contfrac.Abbreviate(got)), what...)
	}
}

// assertFourRoutes is the law that the whole library rests on: descent,
// continuant, matchings and matrix give one number. It returns it.
func assertFourRoutes(t require.TestingT, f orbifold.Family, s farey.Slope) *big.Int {
	n := must(f.Number(s))(t)
	fraction := must(f.Fraction(s))(t)
	assertEqualInt(t, n, fraction.Numerator(), "continuant at %v in %v", s, f)
	g := must(f.Snake(s))(t)
	assertEqualInt(t, n, g.Count(), "matchings at %v in %v", s, f)
	m := must(f.Matrix(s))(t)
	assertMatrix(t, f, s, m, n)
	return n
}

// assertMatrix is the law of section "matrices": determinant 1, trace −k, upper
// right entry N, and hence N | y² + k·y + 1.
func assertMatrix(t require.TestingT, f orbifold.Family, s farey.Slope, m contfrac.Matrix, n *big.Int) {
	k := big.NewInt(f.Weight(s.Class()))
	assertEqualInt(t, big.NewInt(1), m.Det(), "determinant at %v in %v", s, f)
	assertEqualInt(t, new(big.Int).Neg(k), m.Trace(), "trace at %v in %v", s, f)
	assertEqualInt(t, n, m.B(), "matrix at %v in %v", s, f)
	y := m.A()
	r := new(big.Int).Mul(y, new(big.Int).Add(y, k))
	assertEqualInt(t, new(big.Int), r.Add(r, big.NewInt(1)).Mod(r, n), "root at %v in %v", s, f)
}

// assertEquation is (E), written out once more on its own.
func assertEquation(t assert.TestingT, f orbifold.Family, tr orbifold.Triple) {
	x, y, z := tr.Numbers()
	mul := func(a ...*big.Int) *big.Int {
		p := big.NewInt(1)
		for _, b := range a {
			p.Mul(p, b)
		}
		return p
	}
	left := new(big.Int)
	for _, term := range []*big.Int{
		mul(x, x), mul(y, y), mul(z, z),
		mul(big.NewInt(f.Weight(farey.Zero)), y, z),
		mul(big.NewInt(f.Weight(farey.Infinity)), z, x),
		mul(big.NewInt(f.Weight(farey.One)), x, y),
	} {
		left.Add(left, term)
	}
	assertEqualInt(t, left, mul(f.K(), x, y, z), "equation (E) for %v in %v", tr, f)
}

func TestFourRoutesAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		n := assertFourRoutes(t, f, s)
		assertEqualInt(t, plainNumber(f, s), n, "plain descent at %v in %v", s, f)
	})
}

func TestFourRoutesAgreeOnTenThousandPairs(t *testing.T) {
	seed := time.Now().UnixNano()
	t.Logf("seed %d", seed)
	r := rand.New(rand.NewSource(seed))
	for i := range scaled(10_000) {
		f := orbifold.MustNew(r.Int63n(5), r.Int63n(5), r.Int63n(5))
		p, q := r.Int63n(81)-40, r.Int63n(41)
		if i%50 == 0 {
			p, q = r.Int63n(801)-400, r.Int63n(401)
		}
		s, err := farey.FromInts(p, q)
		if err != nil {
			continue // 0/0
		}
		assertFourRoutes(t, f, s)
		if t.Failed() {
			t.Fatalf("pair %d of seed %d: %v at %v", i, seed, f, s)
		}
	}
}

func TestRoutesAgreeForHugeWeightsInRunForm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := bigWeights().Draw(t, "family")
		s := slopesOn(paths(4, from(1, 4)...)).Draw(t, "slope")
		n := must(f.Number(s))(t)
		assertEqualInt(t, n, must(f.Fraction(s))(t).Numerator())
		assertMatrix(t, f, s, must(f.Matrix(s))(t), n)
		assertEqualInt(t, plainNumber(f, s), n)
	})
}

func TestEquationHoldsInEveryTriangle(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), farSlopes().Draw(t, "slope")
		triangle := s.Path().Triangle()
		tr := must(f.Triple(triangle))(t)
		assertEquation(t, f, tr)
		for _, c := range []farey.Class{farey.Zero, farey.Infinity, farey.One} {
			assertEqualInt(t, must(f.Number(triangle.Vertex(c)))(t), tr.At(c), "vertex of class %v", c)
		}
	})
}

func TestExchangeRuleInBothForms(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		c := rapid.SampledFrom([]farey.Class{farey.Zero, farey.Infinity, farey.One}).Draw(t, "class")
		triangle := s.Path().Triangle()
		tr, flipped := must(f.Triple(triangle))(t), must(f.Triple(triangle.Flip(c)))(t)
		u, v, w := tr.At(c), tr.At((c+1)%3), tr.At((c+2)%3)
		assertEqualInt(t, v, flipped.At((c+1)%3))
		assertEqualInt(t, w, flipped.At((c+2)%3))

		product := new(big.Int).Mul(v, v)
		product.Add(product, new(big.Int).Mul(w, w))
		vw := new(big.Int).Mul(v, w)
		product.Add(product, new(big.Int).Mul(vw, big.NewInt(f.Weight(c))))
		assertEqualInt(t, product, new(big.Int).Mul(u, flipped.At(c)), "product form")

		sum := new(big.Int).Mul(f.K(), vw)
		sum.Sub(sum, new(big.Int).Mul(w, big.NewInt(f.Weight((c+1)%3))))
		sum.Sub(sum, new(big.Int).Mul(v, big.NewInt(f.Weight((c+2)%3))))
		assertEqualInt(t, sum, new(big.Int).Add(u, flipped.At(c)), "sum form")

		assert.True(t, tr.Flip(c).Equal(flipped), "Triple.Flip")
		assert.True(t, tr.Flip(c).Flip(c).Equal(tr), "flipping twice")
	})
}

func TestNumberIsTheNumberOfPlainDescent(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), farSlopes().Draw(t, "slope")
		assertEqualInt(t, plainNumber(f, s), must(f.Number(s))(t), "%v at %v", f, s)
	})
}

func TestSymmetriesKeepNumbers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), farSlopes().Draw(t, "slope")
		for _, g := range farey.Symmetries() {
			assertEqualInt(t, must(f.Under(g).Number(s))(t), must(f.Number(g.Apply(s)))(t), "%v of %v in %v", g, s, f)
		}
		n := must(f.Number(s))(t)
		orbit := f.Orbit(s)
		inDomain := 0
		lo, hi, all := f.Domain()
		for i, o := range orbit {
			assertEqualInt(t, n, must(f.Number(o))(t), "orbit of %v", s)
			assert.True(t, f.Representative(o).Equal(f.Representative(s)))
			assert.True(t, f.Equivalent(o, s))
			assert.True(t, i == 0 || orbit[i-1].Cmp(o) < 0, "the orbit increases")
			if all || lo.Cmp(o) <= 0 && o.Cmp(hi) <= 0 {
				inDomain++
				assert.True(t, f.Representative(s).Equal(o))
			}
		}
		assert.Equal(t, 1, inDomain, "slopes of the orbit of %v in the domain", s)
		assert.Zero(t, len(f.Symmetries())%len(orbit))
	})
}

func TestWeightsTwoTwoTwoGiveSquares(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := farSlopes().Draw(t, "slope")
		n := must(orbifold.Family{}.Number(s))(t)
		assertEqualInt(t, n.Mul(n, n), must(orbifold.MustNew(2, 2, 2).Number(s))(t))
	})
}

func TestWeightsKTwoTwoGiveSquaresOfTwoClasses(t *testing.T) {
	// "Generalization of Markov Diophantine equation via generalized cluster
	// algebra", Electron. J. Combin. 30 (2023): for weights (k,2,2) the numbers of the
	// classes of 1/0 and 1/1 are squares, and with their roots y, z
	// x² + y⁴ + z⁴ + 2xy² + k·y²z² + 2xz² = (7+k)·xy²z².
	rapid.Check(t, func(t *rapid.T) {
		k := rapid.Int64Range(0, 12).Draw(t, "k")
		f := orbifold.MustNew(k, 2, 2)
		tr := must(f.Triple(farSlopes().Draw(t, "slope").Path().Triangle()))(t)
		x, y2, z2 := tr.Numbers()
		for _, square := range []*big.Int{y2, z2} {
			root := new(big.Int).Sqrt(square)
			assertEqualInt(t, square, root.Mul(root, root))
		}
		left := new(big.Int).Mul(x, x)
		left.Add(left, new(big.Int).Mul(y2, y2)).Add(left, new(big.Int).Mul(z2, z2))
		cross := new(big.Int).Add(y2, z2)
		left.Add(left, cross.Mul(cross, x).Lsh(cross, 1))
		yz := new(big.Int).Mul(y2, z2)
		left.Add(left, new(big.Int).Mul(yz, big.NewInt(k)))
		assertEqualInt(t, left, yz.Mul(yz, x).Mul(yz, big.NewInt(7+k)))
	})
}

func TestTraceIsKTimesNumberLessWeight(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		want := must(f.Number(s))(t)
		want.Mul(want, f.K()).Sub(want, big.NewInt(f.Weight(s.Class())))
		got := must(f.Trace(s))(t)
		assertEqualInt(t, want, got)
		// It is the trace of −P·M⁻¹ (and −P⁻¹·M has upper right entry N).
		p := contfrac.NewMatrix(big.NewInt(-1), new(big.Int), f.K(), big.NewInt(-1))
		m := must(f.Matrix(s))(t)
		assertEqualInt(t, got, p.Neg().Mul(must(m.Inverse())(t)).Trace())
		assertEqualInt(t, must(f.Number(s))(t), must(p.Inverse())(t).Neg().Mul(m).B())
	})
}

func TestWordFollowsTheDefinition(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		w, err := f.Word(s)
		if s.IsBase() {
			require.ErrorIs(t, err, orbifold.ErrNoCrossing)
			assert.Equal(t, "[1]", must(f.Fraction(s))(t).String())
			assert.Zero(t, must(f.Snake(s))(t).Tiles())
			return
		}
		require.NoError(t, err)
		assert.Equal(t, plainWord(f, s, contfrac.L), w)
		// The middle letter and the two end letters are free.
		n := must(f.Number(s))(t)
		for _, middle := range []contfrac.Letter{contfrac.L, contfrac.R} {
			for _, first := range []contfrac.Letter{contfrac.L, contfrac.R} {
				for _, last := range []contfrac.Letter{contfrac.L, contfrac.R} {
					assertEqualInt(t, n, plainWord(f, s, middle).WithEnds(first, last).Fraction().Numerator())
				}
			}
		}
		// One tile more than letters, and the graph's own word is this word.
		g := must(f.Snake(s))(t)
		assertEqualInt(t, f.Tiles(s), big.NewInt(int64(g.Tiles())))
		assertEqualInt(t, f.Tiles(s), new(big.Int).Add(w.Len(), big.NewInt(1)))
		own, ok := g.Word()
		assert.True(t, ok)
		assert.True(t, w == own || w == own.Swap(), "the graph of %v has the word %v, want %v", s, own, w)
	})
}

// integerRing is a semiring of a test's own.
type integerRing struct{}

func (integerRing) Zero() *big.Int             { return new(big.Int) }
func (integerRing) One() *big.Int              { return big.NewInt(1) }
func (integerRing) Add(a, b *big.Int) *big.Int { return new(big.Int).Add(a, b) }
func (integerRing) Mul(a, b *big.Int) *big.Int { return new(big.Int).Mul(a, b) }

func TestEvalOverTheIntegersIsNumber(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		var k [3]*big.Int
		for c := range k {
			k[c] = big.NewInt(f.Weight(farey.Class(c)))
		}
		got := must(orbifold.Eval(snake.Semiring[*big.Int](integerRing{}), k, s))(t)
		assertEqualInt(t, must(f.Number(s))(t), got)
	})
}
