package orbifold_test

import (
	"context"
	"errors"
	"fmt"
	"math"
	"math/big"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

func TestNegativeWeightsAreRefused(t *testing.T) {
	for _, k := range [][3]int64{{-1, 0, 0}, {0, -2, 0}, {0, 0, math.MinInt64}} {
		_, err := orbifold.New(k[0], k[1], k[2])
		assert.ErrorIs(t, err, orbifold.ErrWeight)
		assert.ErrorContains(t, err, fmt.Sprint(min(k[0], k[1], k[2])))
		assert.Panics(t, func() { orbifold.MustNew(k[0], k[1], k[2]) })
	}
}

func TestFamilyTextRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := rapid.OneOf(families(), bigWeights()).Draw(t, "family")
		text := must(f.MarshalText())(t)
		var g orbifold.Family
		require.NoError(t, g.UnmarshalText(text))
		assert.Equal(t, f, g)
		assert.Equal(t, f, must(orbifold.Parse(" "+strings.ReplaceAll(strings.Trim(string(text), "()"), ",", " , ")))(t))
	})
}

func TestBadFamilyTextsAreRefused(t *testing.T) {
	for _, text := range []string{"", "1,2", "1,2,3,4", "a,b,c", "1,2,-3", "9223372036854775808,0,0", "(1,2,3", strings.Repeat("1", 1000)} {
		_, err := orbifold.Parse(text)
		assert.ErrorIs(t, err, orbifold.ErrWeight, text)
		var f orbifold.Family
		assert.ErrorIs(t, f.UnmarshalText([]byte(text)), orbifold.ErrWeight, text)
	}
	var f orbifold.Family
	for _, lenient := range []string{"1,2,3", "(1, 2, 3)", "(01,2,3)", "(+1,2,3)"} {
		assert.ErrorIs(t, f.UnmarshalText([]byte(lenient)), orbifold.ErrWeight, lenient)
	}
}

func TestZeroFamilyIsTheClassicalOne(t *testing.T) {
	assert.Equal(t, orbifold.MustNew(0, 0, 0), orbifold.Family{})
	assertEqualInt(t, big.NewInt(3), orbifold.Family{}.K())
	assert.Equal(t, orbifold.DefaultLimit, orbifold.Family{}.Limit())
	assert.Zero(t, orbifold.Family{}.Weight(farey.Class(77)))
	assert.Equal(t, "(1, 1, 1)", orbifold.Triple{}.String())
	assert.True(t, orbifold.Triple{}.Equal(must(orbifold.Family{}.NewTriple(big.NewInt(1), big.NewInt(1), big.NewInt(1)))(t)))
	assert.Equal(t, "(2, 1, 1)", orbifold.Triple{}.Flip(farey.Class(77)).String())
	assertEqualInt(t, big.NewInt(1), orbifold.Triple{}.At(farey.Class(77)))
	assertEqualInt(t, big.NewInt(1), orbifold.Node{}.Number())
}

func TestNumbersPastTheLimitAreRefusedBeforeTheyAreComputed(t *testing.T) {
	huge := farey.MustParse("1/1" + zeros(2000))
	far := farey.MustParse("1/100000000000")
	start := time.Now()
	for _, s := range []farey.Slope{huge, far} {
		f := orbifold.MustNew(1, 0, 2)
		_, err := f.Number(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		assert.ErrorContains(t, err, "bits")
		assert.ErrorContains(t, err, fmt.Sprint(orbifold.DefaultLimit))
		_, err = f.Trace(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Matrix(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Certify(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Triple(s.Path().Triangle())
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Word(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Fraction(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = f.Snake(s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		_, err = orbifold.Eval(snake.Semiring[*big.Int](integerRing{}), [3]*big.Int{}, s)
		assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	}
	assert.Less(t, time.Since(start), 5*time.Second)
}

func TestLimitIsSharp(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes().Draw(t, "slope")
		n := must(f.Number(s))(t)
		// Bits may be one above the true length.
		again, err := f.WithLimit(int64(n.BitLen()) + 1).Number(s)
		require.NoError(t, err)
		assertEqualInt(t, n, again)
		if n.BitLen() > 1 {
			_, err = f.WithLimit(int64(n.BitLen()) - 1).Number(s)
			assert.ErrorIs(t, err, orbifold.ErrTooLarge)
		}
	})
	assert.Equal(t, orbifold.DefaultLimit, orbifold.Family{}.WithLimit(-3).Limit())
	assert.Equal(t, int64(77), orbifold.Family{}.WithLimit(77).Limit())
}

func TestGraphsOfHugeWeightsAreRefusedButRunFormWorks(t *testing.T) {
	f := orbifold.MustNew(math.MaxInt64, math.MaxInt64, math.MaxInt64)
	s := farey.MustParse("-8/5")
	_, err := f.Snake(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	w := must(f.Word(s))(t)
	assertEqualInt(t, f.Tiles(s), new(big.Int).Add(w.Len(), big.NewInt(1)))
	assertEqualInt(t, must(f.Number(s))(t), must(f.Fraction(s))(t).Numerator())
}

func TestEvalWantsASemiring(t *testing.T) {
	_, err := orbifold.Eval[int](nil, [3]int{}, farey.MustParse("1/2"))
	assert.ErrorIs(t, err, orbifold.ErrNoSemiring)
}

func TestLabelsAndClassesMatch(t *testing.T) {
	for _, c := range allClasses {
		back, ok := orbifold.ClassOf(orbifold.LabelOf(c))
		assert.True(t, ok)
		assert.Equal(t, c, back)
	}
	for _, l := range []snake.Label{snake.NoLabel, 4, 255} {
		_, ok := orbifold.ClassOf(l)
		assert.False(t, ok)
	}
}

// TestCancelledWorkStops checks that every long call returns within 100 ms of
// the end of its context, with its error and no result.
func TestCancelledWorkStops(t *testing.T) {
	f := orbifold.MustNew(1, 0, 2)
	far := farey.MustParse("1346269/2178309")
	huge := new(big.Int).Exp(big.NewInt(10), big.NewInt(5000), nil)
	long := farey.MustParse("1/100000000") // 2·10⁸ crossings
	for name, call := range map[string]func(context.Context) error{
		"Number":   func(ctx context.Context) error { n, err := f.NumberContext(ctx, far); assert.Nil(t, n); return err },
		"Matrix":   func(ctx context.Context) error { _, err := f.MatrixContext(ctx, far); return err },
		"Identify": func(ctx context.Context) error { n, err := f.Identify(ctx, huge); assert.Nil(t, n); return err },
		"Certify": func(ctx context.Context) error {
			_, err := f.CertifyContext(ctx, farey.MustParse("1/200000"))
			return err
		},
		"LogBig": func(ctx context.Context) error {
			_, _, err := f.LogBigContext(ctx, far, orbifold.MaxLogPrecision)
			return err
		},
		"Compare": func(ctx context.Context) error {
			// Nearly equal: the two neighbours differ by one part in 10^1000.
			big := "1" + zeros(1000)
			_, err := f.CompareContext(ctx, farey.MustParse("1/"+big), farey.MustParse(big+"/1"))
			return err
		},
		"Path": func(ctx context.Context) error {
			tr, err := f.Triple(farey.MustParse("1/30000").Path().Triangle())
			require.NoError(t, err)
			_, err = tr.PathContext(ctx)
			return err
		},
	} {
		ctx, cancel := context.WithCancel(context.Background())
		cancel()
		err := call(ctx)
		assert.ErrorIs(t, err, context.Canceled, name)
	}
	for name, call := range map[string]func(context.Context) error{
		"Number":   func(ctx context.Context) error { _, err := f.NumberContext(ctx, far); return err },
		"Identify": func(ctx context.Context) error { _, err := f.Identify(ctx, huge); return err },
		"Word":     func(ctx context.Context) error { _, err := f.WordContext(ctx, long); return err },
		"Fraction": func(ctx context.Context) error { _, err := f.FractionContext(ctx, long); return err },
		"Snake": func(ctx context.Context) error {
			_, err := f.SnakeContext(ctx, farey.MustParse("1/8000000"))
			return err
		},
		"Eval": func(ctx context.Context) error {
			_, err := orbifold.EvalContext(ctx, snake.Semiring[float64](snake.Floats{}), [3]float64{1, 0, 2}, long)
			return err
		},
		"Certify": func(ctx context.Context) error {
			_, err := orbifold.Family{}.CertifyContext(ctx, farey.MustParse("1/1500000"))
			return err
		},
	} {
		ctx, cancel := context.WithTimeout(context.Background(), 20*time.Millisecond)
		err := call(ctx)
		late := time.Since(deadline(ctx))
		cancel()
		if err != nil { // a fast machine may finish
			assert.ErrorIs(t, err, context.DeadlineExceeded, name)
		}
		assert.Less(t, late, 100*time.Millisecond+slack, name)
	}
}

// slack allows for a machine that is shared, and for the race detector.
const slack = 400 * time.Millisecond

func deadline(ctx context.Context) time.Time {
	d, _ := ctx.Deadline()
	return d
}

func TestNilContextNeverEnds(t *testing.T) {
	f, s := orbifold.Family{}, farey.MustParse("3/7")
	var none context.Context
	assertEqualInt(t, big.NewInt(169), must(f.NumberContext(none, s))(t))
	must(f.MatrixContext(none, s))(t)
	must(f.Identify(none, big.NewInt(5)))(t)
	must(f.CompareContext(none, s, farey.MustParse("2/7")))(t)
	_, _, err := f.LogBigContext(none, s, 64)
	require.NoError(t, err)
	require.NoError(t, must(f.CertifyContext(none, s))(t).VerifyContext(none))
	must(must(f.Triple(s.Path().Triangle()))(t).PathContext(none))(t)
}

func TestEquationAsText(t *testing.T) {
	assert.Equal(t, "x² + y² + z² = 3xyz", orbifold.Family{}.Equation())
	assert.Equal(t, "x² + y² + z² + yz + zx + xy = 6xyz", orbifold.MustNew(1, 1, 1).Equation())
	assert.Equal(t, "x² + y² + z² + 2yz + xy = 6xyz", orbifold.MustNew(2, 0, 1).Equation())
}

func TestErrorsAreNotNested(t *testing.T) {
	all := []error{
		orbifold.ErrWeight, orbifold.ErrTooLarge, orbifold.ErrNoCrossing, orbifold.ErrNotSolution, orbifold.ErrNotPositive,
		orbifold.ErrModulus, orbifold.ErrPrecision, orbifold.ErrNoSemiring, orbifold.ErrCertificate, orbifold.ErrCount, orbifold.ErrCosine, orbifold.ErrStep, orbifold.ErrNotNeighbours,
	}
	for i, a := range all {
		for j, b := range all {
			assert.Equal(t, i == j, errors.Is(a, b))
		}
	}
}
