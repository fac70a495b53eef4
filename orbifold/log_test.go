package orbifold_test

import (
	"math"
	"math/big"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// exp is the exponential function by its power series, for tests: relative
// error far below 2^(64−prec) for 0 ≤ x < 2³⁰.
func exp(x *big.Float, prec uint) *big.Float {
	k := max(x.MantExp(nil), 0) + 16
	r := new(big.Float).SetPrec(prec + 128).Set(x)
	r.SetMantExp(r, -k)
	sum, term := big.NewFloat(1).SetPrec(prec+128), big.NewFloat(1).SetPrec(prec+128)
	for i := int64(1); term.Sign() != 0 && term.MantExp(nil) > -int(prec)-128; i++ {
		term.Mul(term, r)
		term.Quo(term, new(big.Float).SetInt64(i))
		sum.Add(sum, term)
	}
	for range k {
		sum.Mul(sum, sum)
	}
	return sum
}

// assertLog checks lo ≤ ln n ≤ hi by the exponential function at a higher
// precision, and that the enclosure is as narrow as promised.
func assertLog(t assert.TestingT, n *big.Int, lo, hi *big.Float, prec uint) {
	work := 2*prec + 256
	exact := new(big.Float).SetPrec(work).SetInt(n)
	slack := new(big.Float).SetMantExp(big.NewFloat(1), -int(2*prec+100))
	below := new(big.Float).SetPrec(work).Mul(exact, new(big.Float).SetPrec(work).Add(big.NewFloat(1), slack))
	above := new(big.Float).SetPrec(work).Mul(exact, new(big.Float).SetPrec(work).Sub(big.NewFloat(1), slack))
	assert.True(t, exp(lo, work).Cmp(below) <= 0, "lower end %v of ln %s", lo, contfrac.Abbreviate(n))
	assert.True(t, exp(hi, work).Cmp(above) >= 0, "upper end %v of ln %s", hi, contfrac.Abbreviate(n))
	width := new(big.Float).Sub(hi, lo)
	assert.True(t, width.Cmp(new(big.Float).SetMantExp(lo, 1-int(prec))) <= 0, "width %v at %v, %d bits", width, lo, prec)
}

func TestLogBigEnclosesTheLogarithm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := rapid.OneOf(families(), bigWeights()).Draw(t, "family"), farSlopes().Draw(t, "slope")
		prec := rapid.SampledFrom([]uint{1, 2, 24, 53, 64, 200, 400}).Draw(t, "prec")
		lo, hi, err := f.LogBig(s, prec)
		require.NoError(t, err)
		assertLog(t, must(f.Number(s))(t), lo, hi, prec)
		assert.LessOrEqual(t, lo.Prec(), prec)
		assert.LessOrEqual(t, hi.Prec(), prec)
	})
}

func TestLogEnclosesTheLogarithm(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), farSlopes().Draw(t, "slope")
		lo, hi, err := f.Log(s)
		require.NoError(t, err)
		n := must(f.Number(s))(t)
		assertLog(t, n, big.NewFloat(lo), big.NewFloat(hi), 50)
		low, high, err := f.Bits(s)
		require.NoError(t, err)
		bits := big.NewInt(int64(n.BitLen()))
		assert.True(t, low.Cmp(bits) <= 0 && bits.Cmp(high) <= 0, "bits %v … %v, are %v", low, high, bits)
		assert.LessOrEqual(t, high.Sub(high, low).Int64(), int64(1))
	})
}

func TestLogarithmsFarOutAgreeAcrossPrecisions(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := rapid.OneOf(families(), bigWeights()).Draw(t, "family"), hugeSlopes().Draw(t, "slope")
		lo, hi, err := f.LogBig(s, 64)
		require.NoError(t, err)
		fine0, fine1, err := f.LogBig(s, 300)
		require.NoError(t, err)
		assert.True(t, lo.Cmp(fine0) <= 0 && fine1.Cmp(hi) <= 0, "%v … %v does not hold %v … %v", lo, hi, fine0, fine1)
	})
}

// TestLogarithmsOfAFanFollowItsStep checks logarithms far past every exact
// number: for arcs y_{n−1}, y_n, y_{n+1} round a slope of trace t, the step of the
// fan says y_{n+1} + y_{n−1} = t·y_n − c·N, so with the logarithms
// e^(ln y_{n+1} − ln y_n) + e^(ln y_{n−1} − ln y_n) = t up to c·N/y_n.
func TestLogarithmsOfAFanFollowItsStep(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		runs := rapid.SliceOfN(rapid.Uint64Range(1, 4), 0, 3).Draw(t, "runs")
		length := rapid.SampledFrom([]uint64{1_000_000, 1 << 40, 1 << 62}).Draw(t, "length")
		at := func(n uint64) farey.Slope {
			var b contfrac.WordBuilder
			letter := contfrac.R
			for _, r := range runs {
				b.Append(letter, r)
				letter = letter.Other()
			}
			b.Append(letter, n)
			s, _ := farey.NewPath(farey.Infinity, b.Word()).Slope()
			return s
		}
		// The fan turns about the end of the edge that the last letter keeps: the mediant before
		// the last run's edge; its slope is the difference of two arcs.
		y0, y1, y2 := at(length-1), at(length), at(length+1)
		pivot, err := farey.New(new(big.Int).Sub(y1.Num(), y0.Num()), new(big.Int).Sub(y1.Den(), y0.Den()))
		require.NoError(t, err)
		const prec = 512
		l0, _, err := f.LogBig(y0, prec)
		require.NoError(t, err)
		l1, _, err := f.LogBig(y1, prec)
		require.NoError(t, err)
		l2, _, err := f.LogBig(y2, prec)
		require.NoError(t, err)
		up := exp(new(big.Float).Sub(l2, l1), 256)
		down := exp(new(big.Float).Sub(l1, l0), 256)
		sum := new(big.Float).SetPrec(256).Quo(big.NewFloat(1).SetPrec(256), down)
		sum.Add(sum, up)
		trace := new(big.Float).SetPrec(256).SetInt(must(f.Trace(pivot))(t))
		sum.Sub(sum, trace)
		assert.True(t, sum.Sign() == 0 || sum.MantExp(nil) < trace.MantExp(nil)-200, "trace %v missed by %v", trace, sum)
	})
}

func TestLogOfBaseSlopesIsZero(t *testing.T) {
	for _, s := range []string{"0/1", "1/0", "1/1"} {
		lo, hi, err := orbifold.MustNew(1, 2, 3).Log(farey.MustParse(s))
		require.NoError(t, err)
		assert.Zero(t, lo)
		assert.Zero(t, hi)
	}
}

func TestLogLeavesFloat64AtThreeHundredDigits(t *testing.T) {
	p, _ := new(big.Int).SetString("1"+zeros(308), 10)
	s, err := farey.New(p, big.NewInt(1))
	require.NoError(t, err)
	_, _, err = orbifold.Family{}.Log(s)
	require.NoError(t, err)
	s, err = farey.New(p.Mul(p, big.NewInt(10)), big.NewInt(1))
	require.NoError(t, err)
	_, _, err = orbifold.Family{}.Log(s)
	assert.ErrorIs(t, err, orbifold.ErrTooLarge)
	lo, hi, err := orbifold.Family{}.LogBig(s, 64)
	require.NoError(t, err)
	// ln F(2n+1) is (2n+1)·ln φ − ln √5 up to a tiny term.
	want, _ := new(big.Float).Mul(big.NewFloat(2*math.Log(math.Phi)), new(big.Float).SetInt(p)).Float64()
	got, _ := lo.Float64()
	assert.Equal(t, math.IsInf(want, 1), math.IsInf(got, 1))
	ratio := new(big.Float).Quo(lo, new(big.Float).SetInt(p))
	r, _ := ratio.Float64()
	assert.InEpsilon(t, 2*math.Log(math.Phi), r, 1e-12)
	assert.True(t, lo.Cmp(hi) <= 0)
}

func TestBadPrecisionsAreRefused(t *testing.T) {
	for _, prec := range []uint{0, orbifold.MaxLogPrecision + 1, math.MaxUint} {
		_, _, err := orbifold.Family{}.LogBig(farey.MustParse("3/7"), prec)
		assert.ErrorIs(t, err, orbifold.ErrPrecision)
	}
	lo, hi, err := orbifold.Family{}.LogBig(farey.MustParse("3/7"), orbifold.MaxLogPrecision/8)
	require.NoError(t, err)
	assertLog(t, big.NewInt(169), lo, hi, orbifold.MaxLogPrecision/8)
}

func TestCompareIsTheOrderOfTheNumbers(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f := families().Draw(t, "family")
		s, u := farSlopes().Draw(t, "s"), farSlopes().Draw(t, "t")
		assert.Equal(t, must(f.Number(s))(t).Cmp(must(f.Number(u))(t)), must(f.Compare(s, u))(t))
		for _, g := range f.Symmetries() {
			assert.Zero(t, must(f.Compare(s, g.Apply(s)))(t))
		}
	})
}

func TestCompareFarOut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), hugeSlopes().Draw(t, "s")
		// The newest vertex of a triangle has its largest number.
		triangle := s.Path().Triangle()
		newest, ok := triangle.Newest()
		for _, c := range []farey.Class{farey.Zero, farey.Infinity, farey.One} {
			if ok && c != newest {
				assert.Equal(t, 1, must(f.Compare(triangle.Vertex(newest), triangle.Vertex(c)))(t))
				assert.Equal(t, -1, must(f.Compare(triangle.Vertex(c), triangle.Vertex(newest)))(t))
			}
		}
		for _, g := range f.Symmetries() {
			assert.Zero(t, must(f.Compare(s, g.Apply(s)))(t))
		}
	})
}

func zeros(n int) string { return strings.Repeat("0", n) }
