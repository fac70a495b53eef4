package contfrac

import "math/big"

// Product returns xy as a fresh integer.
func Product(x, y *big.Int) *big.Int {
	if x == nil || y == nil {
		return new(big.Int)
	}
	return new(big.Int).Mul(x, y)
}
