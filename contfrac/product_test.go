package contfrac_test

import (
	"math/big"
	"math/bits"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/contfrac"
)

func TestProductIsMul(t *testing.T) {
	atThresholds(t, func(t *testing.T) {
		rapid.Check(t, func(t *rapid.T) {
			x, y := integer(2000).Draw(t, "x"), integer(2000).Draw(t, "y")
			same(t, new(big.Int).Mul(x, y), contfrac.Product(x, y))
			same(t, new(big.Int).Mul(x, x), contfrac.Product(x, x))
		})
	})
}

// largeOperands are integers of the given number of words: dense, sparse and
// all ones, which makes the carries of a transform as long as they get.
func largeOperands(words int) []*big.Int {
	n := uint(words * bits.UintSize)
	one := big.NewInt(1)
	power := new(big.Int).Lsh(one, n-1)
	ones := new(big.Int).Lsh(one, n)
	return []*big.Int{
		pseudorandom(int(n), uint64(words)),
		ones.Sub(ones, one),
		power,
		new(big.Int).Add(power, one),
		new(big.Int).Neg(pseudorandom(int(n)-5, uint64(words)+1)),
	}
}

func TestProductOfLargeOperandsIsMul(t *testing.T) {
	// From just under the sizes where transforms begin to far past them,
	// balanced and not.
	for _, sizes := range [][2]int{{1799, 1799}, {1801, 1801}, {1899, 1900}, {1900, 1900}, {3899, 3901}, {1900, 2500}, {1950, 6000}, {1900, 40000}, {9000, 9001}} {
		for _, x := range largeOperands(sizes[0]) {
			for _, y := range largeOperands(sizes[1]) {
				x0, y0 := new(big.Int).Set(x), new(big.Int).Set(y)
				require.Zero(t, new(big.Int).Mul(x, y).Cmp(contfrac.Product(x, y)), "sizes %v", sizes)
				require.Zero(t, x0.Cmp(x))
				require.Zero(t, y0.Cmp(y))
			}
			square := new(big.Int).Set(x)
			require.Zero(t, new(big.Int).Mul(x, x).Cmp(contfrac.Product(x, square)))
			require.Zero(t, new(big.Int).Mul(x, x).Cmp(contfrac.Product(x, x)))
		}
	}
}

func TestProductTakesNilForZero(t *testing.T) {
	assert.Zero(t, contfrac.Product(nil, big.NewInt(3)).Sign())
	assert.Zero(t, contfrac.Product(big.NewInt(3), nil).Sign())
}
