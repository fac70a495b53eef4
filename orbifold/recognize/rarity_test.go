package recognize

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"

	"example.com/onecusp/orbifold"
)

// TestDensityFitsTheCounts: 328 distinct Markov numbers are at most 10¹⁸, and 88 at
// most 10⁹ (a sketch in double precision; the counts are within the tolerance).
func TestDensityFitsTheCounts(t *testing.T) {
	c := density(orbifold.Family{})
	assert.InEpsilon(t, 328, c*math.Pow(18*math.Ln10, 2), 0.1)
	assert.InEpsilon(t, 88, c*math.Pow(9*math.Ln10, 2), 0.1)
	// The limit is known: OEIS A261613 for the logarithm of 3n, which makes C larger
	// for finite n.
	assert.Greater(t, c, 0.18071)
}

// TestRarityIsTheShare compares with the share among the integers up to 10⁶
// and above 10⁵: 40 − 31 Markov numbers.
func TestRarityIsTheShare(t *testing.T) {
	c := density(orbifold.Family{})
	share := math.Pow(10, -rarity(c, big.NewInt(390_000)))
	assert.InEpsilon(t, 9.0/900_000, share, 0.5)
	assert.Zero(t, rarity(c, big.NewInt(1)))
	assert.Zero(t, rarity(c, new(big.Int)))
	n := new(big.Int).Exp(big.NewInt(10), big.NewInt(1000), nil)
	assert.InDelta(t, 997, rarity(c, n), 0.5)
}
