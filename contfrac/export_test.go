package contfrac

import "math"

// Thresholds are the sizes at which one algorithm takes over from another.
type Thresholds struct {
	Product, Square, Seven, WordLeaves, Lehmer, FromDigits, LongQuotient int
	Fork                                                                 int64
}

// Minimal sends everything that can go there to the algorithms for large sizes.
var Minimal = Thresholds{0, 0, 0, 1, 0, 1, math.MaxInt, 0}

// Infinite sends everything to the algorithms for small sizes.
var Infinite = Thresholds{math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt64}

// Dividing expands everything by divisions.
var Dividing = Thresholds{math.MaxInt, math.MaxInt, math.MaxInt, math.MaxInt, 0, math.MaxInt, 0, math.MaxInt64}

// SetThresholds sets the thresholds and returns those that it replaces.
func SetThresholds(t Thresholds) Thresholds {
	old := Thresholds{productThreshold, squareThreshold, sevenThreshold, wordLeaves, lehmerBits, fromDigitsSize, longQuotient, forkBits}
	productThreshold, squareThreshold, sevenThreshold, wordLeaves = t.Product, t.Square, t.Seven, t.WordLeaves
	lehmerBits, fromDigitsSize, longQuotient, forkBits = t.Lehmer, t.FromDigits, t.LongQuotient, t.Fork
	return old
}

// FromDigits is fromDigits.
var FromDigits = fromDigits

// SetPowerBits sets the limit of Matrix.Pow and returns the one before.
func SetPowerBits(n int64) int64 {
	old := powerBits
	powerBits = n
	return old
}

// SetWordRootBits sets the size up to which periods are followed in words.
func SetWordRootBits(n int) int {
	old := wordRootBits
	wordRootBits = n
	return old
}

// SetPeriodLimits sets the limits of expansions.
func SetPeriodLimits(terms, bytes int) (int, int) {
	a, b := periodLimit, packedLimit
	periodLimit, packedLimit = terms, bytes
	return a, b
}
