package contfrac_test

import (
	"math/big"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

// radicand draws positive integers that are no squares, among them the
// neighbours of squares.
func radicand(bits int) *rapid.Generator[*big.Int] {
	return rapid.Custom(func(t *rapid.T) *big.Int {
		d := natural(bits).Draw(t, "d")
		if rapid.Bool().Draw(t, "near a square") {
			d.Mul(d, d).Add(d, big.NewInt(rapid.Int64Range(1, 4).Draw(t, "excess")))
		}
		for d.Sign() == 0 || square(d) {
			d.Add(d, big.NewInt(1))
		}
		return d
	})
}

func square(n *big.Int) bool {
	r := new(big.Int).Sqrt(n)
	return r.Mul(r, r).Cmp(n) == 0
}

// anySurd draws surds of any size, whose periods may be too long to follow.
func anySurd() *rapid.Generator[contfrac.Surd] {
	return rapid.Custom(func(t *rapid.T) contfrac.Surd {
		if rapid.IntRange(0, 19).Draw(t, "kind") == 0 {
			return contfrac.Surd{}
		}
		bits := rapid.SampledFrom([]int{8, 64, 200}).Draw(t, "bits")
		q := integer(bits).Filter(func(n *big.Int) bool { return n.Sign() != 0 }).Draw(t, "q")
		return surdOf(t, integer(bits).Draw(t, "p"), radicand(bits).Draw(t, "d"), q)
	})
}

func surdOf(t require.TestingT, p, d, q *big.Int) contfrac.Surd {
	x, err := contfrac.NewSurd(p, d, q)
	require.NoError(t, err)
	return x
}

// surd draws surds with short periods: of small radicands, or of drawn terms.
func surd() *rapid.Generator[contfrac.Surd] {
	return rapid.OneOf(
		rapid.Custom(func(t *rapid.T) contfrac.Surd {
			q := rapid.Int64Range(-30, 30).Filter(func(n int64) bool { return n != 0 }).Draw(t, "q")
			return surdOf(t, big.NewInt(rapid.Int64Range(-60, 60).Draw(t, "p")), radicand(9).Draw(t, "d"), big.NewInt(q))
		}),
		rapid.Map(periodic(), func(x contfrac.Periodic) contfrac.Surd { return x.Surd() }),
	)
}

// periodic draws periodic continued fractions, the parts of which need not be
// the shortest.
func periodic() *rapid.Generator[contfrac.Periodic] {
	return rapid.Custom(func(t *rapid.T) contfrac.Periodic {
		x, err := contfrac.NewPeriodic(parts().Draw(t, "parts").parts())
		require.NoError(t, err)
		return x
	})
}

// twoParts are a pre-period and a period.
type twoParts struct{ pre, period contfrac.Fraction }

func (p twoParts) parts() (pre, period contfrac.Fraction) { return p.pre, p.period }

func parts() *rapid.Generator[twoParts] {
	return rapid.Custom(func(t *rapid.T) twoParts {
		terms := list(positive(), 1, 20).Draw(t, "period")
		for rapid.IntRange(0, 3).Draw(t, "again") == 0 {
			terms = append(terms, terms...)
		}
		pre := fraction().Draw(t, "pre").Terms()
		if rapid.Bool().Draw(t, "end as the period does") {
			pre = append(pre, terms[rapid.IntRange(0, len(terms)-1).Draw(t, "from"):]...)
		}
		f, err := contfrac.NewFraction(pre...)
		require.NoError(t, err)
		g, err := contfrac.NewFraction(terms...)
		require.NoError(t, err)
		return twoParts{f, g}
	})
}

// quadratic draws forms whose roots have short periods, primitive or not.
func quadratic() *rapid.Generator[contfrac.Form] {
	return rapid.Custom(func(t *rapid.T) contfrac.Form {
		if rapid.IntRange(0, 19).Draw(t, "kind") == 0 {
			return contfrac.Form{}
		}
		f := surd().Draw(t, "root").Form()
		k := big.NewInt(rapid.SampledFrom([]int64{1, 1, 1, 2, 3, 12}).Draw(t, "content"))
		mul := func(n *big.Int) *big.Int { return n.Mul(n, k) }
		g, err := contfrac.NewForm(mul(f.A()), mul(f.B()), mul(f.C()))
		require.NoError(t, err)
		return g
	})
}

// smallForm draws forms with small coefficients.
func smallForm() *rapid.Generator[contfrac.Form] {
	return rapid.Custom(func(t *rapid.T) contfrac.Form {
		for n := rapid.Int64Range(-12, 12); ; {
			f, err := contfrac.FormOf(n.Draw(t, "a"), n.Draw(t, "b"), n.Draw(t, "c"))
			if err == nil {
				return f
			}
		}
	})
}

// real returns x as a float of 2000 bits, straight from the integers.
func real(x contfrac.Surd) *big.Float {
	float := func(n *big.Int) *big.Float { return new(big.Float).SetPrec(2000).SetInt(n) }
	v := float(x.D())
	v.Sqrt(v).Add(v, float(x.P()))
	return v.Quo(v, float(x.Q()))
}

// near checks that two floats agree to some 500 bits.
func near(t require.TestingT, want, got *big.Float) {
	d := new(big.Float).Sub(want, got)
	if d.Sign() == 0 {
		return
	}
	require.Less(t, d.MantExp(nil), want.MantExp(nil)-500, "%g is not %g", got, want)
}
