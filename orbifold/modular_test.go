package orbifold_test

import (
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

func TestNumberModIsTheNumberReduced(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s, m := families().Draw(t, "family"), farSlopes().Draw(t, "slope"), moduli().Draw(t, "m")
		n := must(f.Number(s))(t)
		assertEqualInt(t, n.Mod(n, m), must(f.NumberMod(s, m))(t), "%v at %v modulo %v", f, s, m)
	})
}

func TestNumberModIsPlainSteppingModulo(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(families(), bigWeights()).Draw(t, "family")
		s := steppedSlopes().Draw(t, "slope")
		m := moduli().Draw(t, "m")
		assertEqualInt(t, plainNumberMod(f, s, m), must(f.NumberMod(s, m))(t), "%v at %v modulo %v", f, s, m)
	})
}

func TestRunsOfAMillionAreSteppingModuloPrimes(t *testing.T) {
	for _, f := range []orbifold.Family{{}, orbifold.MustNew(1, 2, 3)} {
		for _, text := range []string{"1/1000000", "-1000000/1", "1000003/1000002", "3/3000007"} {
			s := farey.MustParse(text)
			n := must(f.Number(s))(t)
			for i, p := range orbifold.Primes() {
				m := new(big.Int).SetUint64(p)
				got := must(f.NumberMod(s, m))(t)
				assertEqualInt(t, new(big.Int).Mod(n, m), got, "exact number of %v at %v modulo %v", f, s, m)
				if i == 0 {
					assertEqualInt(t, plainNumberMod(f, s, m), got, "%v at %v modulo %v", f, s, m)
				}
			}
		}
	}
}

func TestRootModIsTheMatrixReduced(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s, m := families().Draw(t, "family"), slopes().Draw(t, "slope"), moduli().Draw(t, "m")
		n, y, err := f.RootMod(s, m)
		assert.NoError(t, err)
		matrix := must(f.Matrix(s))(t)
		assertEqualInt(t, new(big.Int).Mod(matrix.B(), m), n)
		assertEqualInt(t, new(big.Int).Mod(matrix.A(), m), y)
	})
}

func TestRootModAndNumberModAgreeFarOut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s, m := families().Draw(t, "family"), hugeSlopes().Draw(t, "slope"), moduli().Draw(t, "m")
		n, _, err := f.RootMod(s, m)
		assert.NoError(t, err)
		assertEqualInt(t, must(f.NumberMod(s, m))(t), n)
	})
}

func TestEquationHoldsModuloAPrimeFarOut(t *testing.T) {
	p := new(big.Int).SetUint64(orbifold.Primes()[0])
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), hugeSlopes().Draw(t, "slope")
		triangle := s.Path().Triangle()
		var n [3]*big.Int
		for _, c := range []farey.Class{farey.Zero, farey.Infinity, farey.One} {
			n[c] = must(f.NumberMod(triangle.Vertex(c), p))(t)
		}
		sum := new(big.Int)
		for c := range n {
			v, w := n[(c+1)%3], n[(c+2)%3]
			sum.Add(sum, new(big.Int).Mul(n[c], n[c]))
			vw := new(big.Int).Mul(v, w)
			sum.Add(sum, vw.Mul(vw, big.NewInt(f.Weight(farey.Class(c)))))
		}
		right := new(big.Int).Mul(n[0], n[1])
		right.Mul(right, n[2]).Mul(right, f.K())
		assertEqualInt(t, sum.Mod(sum, p), right.Mod(right, p), "%v at %v", f, s)
	})
}

func TestWeightsTwoTwoTwoGiveSquaresModuloFarOut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, m := hugeSlopes().Draw(t, "slope"), moduli().Draw(t, "m")
		n := must(orbifold.Family{}.NumberMod(s, m))(t)
		assertEqualInt(t, n.Mul(n, n).Mod(n, m), must(orbifold.MustNew(2, 2, 2).NumberMod(s, m))(t))
	})
}

func TestBadModuliAreRefused(t *testing.T) {
	for _, m := range []*big.Int{nil, new(big.Int), big.NewInt(-5)} {
		_, err := orbifold.Family{}.NumberMod(farey.MustParse("3/7"), m)
		assert.ErrorIs(t, err, orbifold.ErrModulus)
		_, _, err = orbifold.Family{}.RootMod(farey.MustParse("3/7"), m)
		assert.ErrorIs(t, err, orbifold.ErrModulus)
	}
}

func TestPrimesArePrime(t *testing.T) {
	for _, p := range orbifold.Primes() {
		assert.True(t, new(big.Int).SetUint64(p).ProbablyPrime(20), "%d", p)
	}
}
