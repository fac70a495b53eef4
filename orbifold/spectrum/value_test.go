package spectrum_test

import (
	"fmt"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/orbifold/spectrum"
)

func TestLagrangeValueIsThatOfTheFixedPoint(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(4, 4).Draw(t, "slope")
		v := must(spectrum.LagrangeValue(f, s))(t)
		x := must(spectrum.FixedPoint(f, s))(t)
		assert.True(t, v.Surd().Equal(must(x.Lagrange())(t)))
		assert.True(t, v.Surd().Equal(must(x.Conjugate().Lagrange())(t)))
		same(t, must(f.Number(s))(t), v.Number())
		same(t, must(f.Trace(s))(t), v.Trace())
		one := v.Constant() // L · 1/L
		q := new(big.Int).Mul(v.Constant().Q(), v.Surd().Q())
		product := new(big.Int).Mul(one.D(), v.Surd().D())
		same(t, q.Mul(q, q), product)
	})
}

// √(9 − 4/m²): "An Introduction to Diophantine Approximation", Cambridge 1957,
// ch. II (memory).
func TestFirstValuesOfTheSpectrum(t *testing.T) {
	for slope, want := range map[string]string{"0/1": "√5", "1/2": "√32/2", "1/3": "√221/5", "1/4": "√1517/13", "2/5": "√7565/29"} {
		v := must(spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse(slope)))(t)
		assert.Equal(t, want, v.String())
		assert.Equal(t, want, fmt.Sprint(v))
	}
}

func TestClassicalValuesGrowWithTheNumberAndStayBelowThree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := slopes(5, 5).Draw(t, "a"), slopes(5, 5).Draw(t, "b")
		v, w := must(spectrum.LagrangeValue(orbifold.Family{}, a))(t), must(spectrum.LagrangeValue(orbifold.Family{}, b))(t)
		assert.Equal(t, v.Number().Cmp(w.Number()), v.Cmp(w))
		assert.Equal(t, -1, v.Surd().CmpRat(big.NewRat(3, 1)))
		m := v.Number()
		m.Mul(m, m)
		square := new(big.Rat).SetFrac(v.Radicand(), m)
		assert.Zero(t, square.Cmp(new(big.Rat).Sub(big.NewRat(9, 1), new(big.Rat).SetFrac(big.NewInt(4), m))))
	})
}

func TestCmpIsThatOfTheSurds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		v := must(spectrum.LagrangeValue(families().Draw(t, "f"), slopes(4, 4).Draw(t, "s")))(t)
		w := must(spectrum.LagrangeValue(families().Draw(t, "g"), slopes(4, 4).Draw(t, "t")))(t)
		assert.Equal(t, v.Surd().Cmp(w.Surd()), v.Cmp(w))
		assert.Zero(t, v.Cmp(v))
	})
}

func TestDecimalAndEnclosureAgreeWithTheSquare(t *testing.T) {
	v := must(spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse("1/3")))(t)
	assert.Equal(t, "2.97321374946370110452", must(v.Decimal(20))(t)) // √221/5 (bc -l: sqrt(221)/5)
	lo, hi, err := v.Enclosure(100)
	require.NoError(t, err)
	for _, end := range []struct {
		x    *big.Float
		sign int
	}{{lo, -1}, {hi, 1}} {
		r, _ := end.x.Rat(nil)
		r.Mul(r, r)
		assert.Equal(t, end.sign, r.Cmp(big.NewRat(221, 25)))
	}
	_, err = v.Decimal(-1)
	assert.Error(t, err)
}

func TestZeroValueIsTheRootOfFive(t *testing.T) {
	var v spectrum.Value
	assert.Equal(t, "√5", v.String())
	same(t, big.NewInt(3), v.Trace())
	same(t, big.NewInt(1), v.Number())
	assert.Equal(t, "2.236", must(v.Decimal(3))(t))
	assert.Zero(t, v.Cmp(must(spectrum.LagrangeValue(orbifold.Family{}, farey.Slope{}))(t)))
	v.Trace().SetInt64(7)
	v.Number().SetInt64(7)
	assert.Equal(t, "√5", v.String())
}

func TestHugeValuesAreShortened(t *testing.T) {
	v := must(spectrum.LagrangeValue(orbifold.Family{}, farey.MustParse("1/1000")))(t)
	assert.Less(t, len(fmt.Sprint(v)), 120)
	assert.Greater(t, len(fmt.Sprintf("%s", v)), 1000)
	assert.Equal(t, fmt.Sprintf("%q", v.String()), fmt.Sprintf("%q", v))
	assert.Contains(t, fmt.Sprintf("%d", v), "%!d(spectrum.Value=")
}

func TestApproximationsAreTheConvergentsWithTheirConstants(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(3, 3).Draw(t, "slope")
		x := must(spectrum.FixedPoint(f, s))(t)
		all := must(spectrum.Approximations(f, s))(t)
		i := 0
		for p, q := range must(x.Periodic())(t).Convergents() {
			j := 0
			for a := range all {
				if j++; j <= i {
					continue
				}
				num, den := a.Fraction()
				same(t, p, num)
				same(t, q, den)
				assert.True(t, x.Equal(a.Surd()))
				assert.True(t, must(x.ApproximationConstant(p, q))(t).Equal(a.Constant()))
				assert.Equal(t, -1, a.Constant().CmpRat(big.NewRat(1, 1)))
				num.SetInt64(0)
				den.SetInt64(0)
				again, _ := a.Fraction()
				same(t, p, again)
				break
			}
			if i++; i == 6 {
				break
			}
		}
	})
	p, q := spectrum.Approximation{}.Fraction()
	same(t, big.NewInt(1), p)
	same(t, big.NewInt(1), q)
	assert.Equal(t, "0.618", must(spectrum.Approximation{}.Constant().Decimal(3))(t))
}

// Far out, the best constant in one period is 1/L to many digits, from below
// or above.
func TestConstantsTendToTheInverseOfTheLagrangeValue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		f, s := families().Draw(t, "family"), slopes(3, 2).Draw(t, "slope")
		v := must(spectrum.LagrangeValue(f, s))(t)
		period := must(must(spectrum.FixedPoint(f, s))(t).Periodic())(t)
		start := period.Pre().Len() + 20
		start += period.Period().Len()
		if period.Period().Len() > 60 {
			return
		}
		best := big.NewFloat(1)
		i := 0
		for a := range must(spectrum.Approximations(f, s))(t) {
			if i++; i < start {
				continue
			}
			_, hi, err := a.Constant().Enclosure(60)
			require.NoError(t, err)
			if hi.Cmp(best) < 0 {
				best = hi
			}
			if i > start+period.Period().Len() {
				break
			}
		}
		_, want, err := v.Constant().Enclosure(60)
		require.NoError(t, err)
		ratio, _ := new(big.Float).Quo(best, want).Float64()
		assert.InDelta(t, 1, ratio, 1e-6)
	})
}
