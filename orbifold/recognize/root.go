package recognize

import (
	"context"
	"math"
	"math/big"
	"slices"

	"example.com/onecusp/orbifold"
)

// sections returns all of them with t ≥ 3 for a trace T ≥ 3, by increasing d.
//
// With Λ = (T + √(T²−4))/2 and λ likewise, T = V_d(t) says Λ = λᵈ. The units
// > 0 of norm 1 with an integer trace, in the field of Λ, are the powers of
// one of them, so the d are the divisors of the largest one, which is found
// prime by prime.
func sections(ctx context.Context, trace *big.Int) ([]section, error) {
	least, largest := trace, int64(1)
	for p := int64(2); ; {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		// V_p(t) ≥ V_p(3) > 2.6^p > 2^(1.378p).
		if float64(least.BitLen()) < 1.378*float64(p) {
			break
		}
		if t, ok := lucasRoot(least, p); ok {
			least, largest = t, largest*p
			continue
		}
		for p++; !prime(p); p++ {
		}
	}
	var list []section
	for d := int64(1); d <= largest/d; d++ {
		if largest%d != 0 {
			continue
		}
		for _, e := range slices.Compact([]int64{d, largest / d}) {
			_, t, err := orbifold.Lucas(uint64(largest/e), least) // at most T
			if err != nil {
				return nil, err
			}
			list = append(list, section{e, t})
		}
	}
	slices.SortFunc(list, func(x, y section) int { return int(x.d - y.d) })
	return list, nil
}

func prime(p int64) bool { return big.NewInt(p).ProbablyPrime(0) }

// lucasRoot returns the t ≥ 3 with V_p(t) = T for a prime p; false if there is
// none. Since (t−1)^p < V_p(t) < t^p, it is the p-th root of T, rounded up.
func lucasRoot(trace *big.Int, p int64) (*big.Int, bool) {
	root := floatRoot(trace, p)
	for _, d := range [...]int64{0, 1, -1} {
		t := new(big.Int).Add(root, big.NewInt(d))
		if t.Cmp(big.NewInt(3)) < 0 || lucasWord(low(t), p) != low(trace) {
			continue
		}
		if _, v, err := orbifold.Lucas(uint64(p), t); err == nil && v.Cmp(trace) == 0 {
			return t, true
		}
	}
	return nil, false
}

// low returns x modulo 2⁶⁴.
func low(x *big.Int) uint64 {
	return new(big.Int).And(x, new(big.Int).SetUint64(math.MaxUint64)).Uint64()
}

// lucasWord returns V_n(t) modulo 2⁶⁴: V_{2i} = V_i² − 2,
// V_{2i+1} = V_i·V_{i+1} − t.
func lucasWord(t uint64, n int64) uint64 {
	v, w := uint64(2), t
	for i := 62; i >= 0; i-- {
		if n>>i&1 == 1 {
			v, w = v*w-t, w*w-2
		} else {
			v, w = v*v-2, v*w-t
		}
	}
	return v
}

// floatRoot returns x^(1/p) for x > 0, rounded to an integer within 1.
func floatRoot(x *big.Int, p int64) *big.Int {
	m := new(big.Float)
	e := m.SetInt(x).MantExp(m)
	f, _ := m.Float64()
	bits := (math.Log2(f) + float64(e)) / float64(p)
	whole := math.Floor(bits)
	prec := uint(whole) + 64 + uint(big.NewInt(p).BitLen())
	y := new(big.Float).SetPrec(prec).SetFloat64(math.Exp2(bits - whole))
	y.SetMantExp(y, int(whole))
	target := new(big.Float).SetPrec(prec).SetInt(x)
	one, n := big.NewFloat(1), new(big.Float).SetInt64(p)
	// Newton: y ← y·(1 + (x/y^p − 1)/p) doubles the digits that are right.
	for range 64 {
		c := new(big.Float).SetPrec(prec).Quo(target, powerOf(y, p))
		c.Sub(c, one).Quo(c, n)
		y.Add(y, new(big.Float).SetPrec(prec).Mul(y, c))
		if c.Sign() == 0 || c.MantExp(nil) < -int(whole)-8 {
			break
		}
	}
	r, _ := y.Add(y, big.NewFloat(0.5)).Int(nil)
	return r
}

// powerOf returns yᵖ, p ≥ 1, in the precision of y.
func powerOf(y *big.Float, p int64) *big.Float {
	z := new(big.Float).Copy(y)
	for i := big.NewInt(p).BitLen() - 2; i >= 0; i-- {
		z.Mul(z, z)
		if p>>i&1 == 1 {
			z.Mul(z, y)
		}
	}
	return z
}
