//go:build purebig

package contfrac

import "math/big"

// transformProduct returns xy by math/big alone.
func transformProduct(x, y *big.Int) *big.Int { return new(big.Int).Mul(x, y) }
