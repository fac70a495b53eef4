package main

import (
	"context"
	"math/big"
)

// logPrecision is the precision of the enclosure of the logarithm, in bits, and
// logDigits the decimal digits of it that are shown.
const (
	logPrecision = 96
	logDigits    = 22
)

// sizeSection is how large the number is: bounds on the logarithm and on the bits,
// which are certain and need no number.
func (e *entry) sizeSection(ctx context.Context) (section, error) {
	s := section{Title: "Size"}
	lo, hi, err := e.family.LogBigContext(ctx, e.Slope, logPrecision)
	if err != nil {
		return s, err
	}
	s.add("ln N is at least", "%s", outward(lo, -1))
	s.add("and at most", "%s", outward(hi, +1))
	bitsLo, bitsHi, err := e.family.Bits(e.Slope)
	if err != nil {
		return s, err
	}
	s.add("Bits, foreseen", "%s", between(bitsLo, bitsHi))
	return s, nil
}

// outward writes x ≥ 0 in decimal, rounded down or up by direction −1 or +1: x is moved
// by one unit of the last digit shown, more than rounding to it can take back.
func outward(x *big.Float, direction int64) string {
	if x.Sign() == 0 {
		return "0"
	}
	const guard = 64
	unit := new(big.Float).SetInt(new(big.Int).Exp(big.NewInt(10), big.NewInt(logDigits-1), nil))
	step := new(big.Float).SetPrec(logPrecision+guard).Quo(x, unit)
	step.Mul(step, new(big.Float).SetInt64(direction))
	return step.Add(step, x).Text('g', logDigits)
}

// between writes bounds on an integer.
func between(lo, hi *big.Int) string {
	if lo.Cmp(hi) == 0 {
		return digits(lo)
	}
	return digits(lo) + " to " + digits(hi)
}
