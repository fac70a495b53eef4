package contfrac_test

import (
	"encoding/json"
	"fmt"
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// equal checks that two matrices are equal.
func equal(t require.TestingT, want, got contfrac.Matrix) {
	require.True(t, want.Equal(got), "want %v, got %v", want, got)
}

// product is the definition of the matrix product.
func product(m, n contfrac.Matrix) contfrac.Matrix {
	dot := func(a, b, c, d *big.Int) *big.Int {
		s := new(big.Int).Mul(a, b)
		return s.Add(s, new(big.Int).Mul(c, d))
	}
	return contfrac.NewMatrix(
		dot(m.A(), n.A(), m.B(), n.C()), dot(m.A(), n.B(), m.B(), n.D()),
		dot(m.C(), n.A(), m.D(), n.C()), dot(m.C(), n.B(), m.D(), n.D()))
}

func TestMulIsTheMatrixProduct(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			m, n := matrix().Draw(t, "m"), matrix().Draw(t, "n")
			equal(t, product(m, n), m.Mul(n))
		})
	})
}

func TestMulOfLargeMatrices(t *testing.T) {
	for _, size := range []int{1000, 1536, 1600, 5000, 130_000} {
		n := func(seed uint64) *big.Int { return pseudorandom(size+int(seed), seed) }
		x := contfrac.NewMatrix(n(1), n(2), new(big.Int).Neg(n(3)), n(4))
		y := contfrac.NewMatrix(n(5), new(big.Int).Neg(n(6)), n(7), n(8))
		equal(t, product(x, y), x.Mul(y))
	}
}

func TestDeterminantIsMultiplicative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, n := matrix().Draw(t, "m"), matrix().Draw(t, "n")
		same(t, new(big.Int).Mul(m.Det(), n.Det()), m.Mul(n).Det())
	})
}

func TestTraceOfAProductIsSymmetric(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, n := matrix().Draw(t, "m"), matrix().Draw(t, "n")
		same(t, m.Mul(n).Trace(), n.Mul(m).Trace())
		same(t, new(big.Int).Add(m.A(), m.D()), m.Trace())
	})
}

func TestTransposeReversesProducts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m, n := matrix().Draw(t, "m"), matrix().Draw(t, "n")
		equal(t, n.Transpose().Mul(m.Transpose()), m.Mul(n).Transpose())
		same(t, m.B(), m.Transpose().C())
	})
}

func TestNegIsMinusOneTimes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := matrix().Draw(t, "m")
		equal(t, m.Mul(contfrac.Matrix{}.Neg()), m.Neg())
	})
}

func TestInverseIsInverse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := unimodular().Draw(t, "m")
		inverse, err := m.Inverse()
		require.NoError(t, err)
		equal(t, contfrac.Matrix{}, m.Mul(inverse))
		equal(t, contfrac.Matrix{}, inverse.Mul(m))
	})
}

func TestInverseRefusesOtherDeterminants(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := matrix().Draw(t, "m")
		_, err := m.Inverse()
		if m.Det().CmpAbs(big.NewInt(1)) == 0 {
			require.NoError(t, err)
			return
		}
		require.ErrorIs(t, err, contfrac.ErrDeterminant)
		_, err = m.Pow(-2)
		require.ErrorIs(t, err, contfrac.ErrDeterminant)
	})
}

func TestPowIsRepeatedProduct(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := unimodular().Draw(t, "m")
		n := rapid.Int64Range(0, 9).Draw(t, "n")
		want := contfrac.Matrix{}
		for range n {
			want = want.Mul(m)
		}
		got, err := m.Pow(n)
		require.NoError(t, err)
		equal(t, want, got)
		inverse, err := m.Pow(-n)
		require.NoError(t, err)
		equal(t, contfrac.Matrix{}, got.Mul(inverse))
	})
}

func TestPowOfALetterIsOneRun(t *testing.T) {
	for _, n := range []int64{0, 1, 5, math.MaxInt64} {
		m, err := contfrac.R.Matrix().Pow(n)
		require.NoError(t, err)
		same(t, big.NewInt(n), m.B())
	}
	m, err := contfrac.L.Matrix().Pow(math.MinInt64)
	require.NoError(t, err)
	same(t, big.NewInt(math.MinInt64), m.C())
}

func TestPowRefusesWhatIsTooLarge(t *testing.T) {
	m := contfrac.WordOf(contfrac.L, contfrac.R).Matrix()
	for _, n := range []int64{math.MaxInt64, math.MinInt64, 1 << 62, 1<<40 + 1} {
		_, err := m.Pow(n)
		assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	}
	// With less room, and no trace to tell: the squaring is too much, or the
	// last factor alone, m³ having about 3 times the bits of m.
	defer contfrac.SetPowerBits(contfrac.SetPowerBits(250))
	n := pseudorandom(100, 1)
	traceless := contfrac.NewMatrix(n, n, n, new(big.Int).Neg(n))
	_, err := traceless.Pow(2)
	assert.NoError(t, err)
	_, err = traceless.Pow(3)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
	contfrac.SetPowerBits(150)
	_, err = traceless.Pow(2)
	assert.ErrorIs(t, err, contfrac.ErrTooLarge)
}

func TestMatrixOfWordIsTheProductOfItsLetters(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			w := shortWord().Draw(t, "word")
			want := contfrac.Matrix{}
			for l := range w.Letters() {
				want = product(want, l.Matrix())
			}
			equal(t, want, w.Matrix())
		})
	})
}

func TestMatrixOfWordIsMultiplicative(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v, w := word().Draw(t, "v"), word().Draw(t, "w")
		m := v.Concat(w).Matrix()
		equal(t, v.Matrix().Mul(w.Matrix()), m)
		same(t, big.NewInt(1), m.Det())
	})
}

func TestEntriesSumToTheNumeratorWithEnds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		w := word().Draw(t, "word")
		m := w.Matrix()
		sum := new(big.Int).Add(m.A(), m.B())
		sum.Add(sum, m.C()).Add(sum, m.D())
		same(t, sum, w.WithEnds(letter().Draw(t, "before"), letter().Draw(t, "after")).Fraction().Numerator())
	})
}

func TestFactorInvertsMatrix(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			w := word().Draw(t, "word")
			v, err := w.Matrix().Factor()
			require.NoError(t, err)
			require.Equal(t, w, v)
		})
	})
}

func TestFactorRefusesOtherMatrices(t *testing.T) {
	of := func(a, b, c, d int64) contfrac.Matrix {
		n := ints(a, b, c, d)
		return contfrac.NewMatrix(n[0], n[1], n[2], n[3])
	}
	for _, m := range []contfrac.Matrix{of(1, -1, 0, 1), of(-1, 0, 0, -1), contfrac.R.Matrix().Neg()} {
		_, err := m.Factor()
		assert.ErrorIs(t, err, contfrac.ErrNegativeEntry)
	}
	for _, m := range []contfrac.Matrix{of(0, 1, 1, 0), of(2, 0, 0, 1), of(0, 0, 0, 0), of(3, 5, 1, 1)} {
		_, err := m.Factor()
		assert.ErrorIs(t, err, contfrac.ErrDeterminant)
	}
}

func TestZeroMatrixValueIsTheIdentity(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := matrix().Draw(t, "m")
		equal(t, m, m.Mul(contfrac.Matrix{}))
		equal(t, m, contfrac.Matrix{}.Mul(m))
	})
	assert.Equal(t, "[[1, 0], [0, 1]]", contfrac.Matrix{}.String())
	w, err := contfrac.Matrix{}.Factor()
	require.NoError(t, err)
	assert.True(t, w.IsEmpty())
	equal(t, contfrac.Matrix{}, contfrac.Word{}.Matrix())
	equal(t, contfrac.Matrix{}, contfrac.NewMatrix(big.NewInt(1), nil, nil, big.NewInt(1)))
}

func TestMatrixTextRoundTrips(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := matrix().Draw(t, "m")
		text, err := m.MarshalText()
		require.NoError(t, err)
		var n contfrac.Matrix
		require.NoError(t, n.UnmarshalText(text))
		equal(t, m, n)
		text, err = json.Marshal(m)
		require.NoError(t, err)
		n = contfrac.Matrix{}
		require.NoError(t, json.Unmarshal(text, &n))
		equal(t, m, n)
	})
}

func TestMatrixIsWrittenByRows(t *testing.T) {
	m := contfrac.NewMatrix(big.NewInt(1), big.NewInt(2), big.NewInt(-3), big.NewInt(5))
	assert.Equal(t, "[[1, 2], [-3, 5]]", fmt.Sprintf("%s", m))
	text, err := json.Marshal(m)
	require.NoError(t, err)
	assert.Equal(t, `[["1","2"],["-3","5"]]`, string(text))
	m = contfrac.NewMatrix(new(big.Int).Exp(big.NewInt(10), big.NewInt(99), nil), nil, nil, nil)
	assert.Equal(t, "[[100000000000…000000000000 (100 digits), 0], [0, 0]]", fmt.Sprintf("%v", m))
}
