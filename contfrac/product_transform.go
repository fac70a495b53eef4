//go:build !purebig

package contfrac

import (
	"math/big"

	"github.com/remyoudompheng/bigfft"
)

// transformProduct returns xy by fast Fourier transform.
func transformProduct(x, y *big.Int) *big.Int { return bigfft.Mul(x, y) }
