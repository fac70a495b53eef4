package recognize

import (
	"math"
	"math/big"

	"example.com/onecusp/orbifold"
)

// rarityBound is the bound up to which the numbers of a family are counted to
// estimate how dense they are: the more, the better the estimate and the longer
// it takes. Numbers of a family up to n grow in count like (ln n)².
var rarityBound = big.NewInt(1_000_000_000_000)

// density returns C so that the family has about C·(ln n)² numbers up to n,
// one for each symmetry class, from the exact count at rarityBound.
func density(f orbifold.Family) float64 {
	count := 0
	for range f.Within(rarityBound) {
		count++
	}
	ln := math.Log(float64(rarityBound.Int64()))
	return float64(count) / float64(len(f.Symmetries())) / (ln * ln)
}

// rarity returns −log₁₀ of the share of integers about n that the family
// carries, by the density c: 2·c·ln n/n; at least 0.
func rarity(c float64, n *big.Int) float64 {
	lo, _, err := orbifold.LogInteger(n, 64)
	if err != nil {
		return 0
	}
	ln, _ := lo.Float64()
	if ln == 0 {
		return 0 // 1 is carried by every family
	}
	return max(0, ln/math.Ln10-math.Log10(2*c*ln))
}
