package contfrac

import "math/big"

// The operand sizes, in words of math/big, from which Product multiplies by
// fast Fourier transform: that of the smaller operand, and that of both when
// they are equal. BenchmarkProduct and BenchmarkSquare calibrate them. Slicing the larger of two
// unequal operands into pieces the size of the smaller was measured too, and
// never won.
var (
	productThreshold = 1900
	squareThreshold  = 3900
)

// Product returns xy. It is (*big.Int).Mul for small operands and uses
// multiplication by fast Fourier transform for large ones, from about 120 000 bits
// of the smaller operand: there it is about 1.5 times as fast at 250 000
// bits, 3 times at 1 000 000, 6 times at 5 000 000. Built with the tag purebig, it is
// (*big.Int).Mul always. A nil operand counts as 0.
func Product(x, y *big.Int) *big.Int {
	if x == nil || y == nil {
		return new(big.Int)
	}
	if transforms(x, y) {
		return transformProduct(x, y)
	}
	return new(big.Int).Mul(x, y)
}

// transforms reports whether xy is to be taken by fast Fourier transform.
func transforms(x, y *big.Int) bool {
	words := min(len(x.Bits()), len(y.Bits()))
	return words >= productThreshold && (words >= squareThreshold || x != y && x.CmpAbs(y) != 0)
}
