package snake

import (
	"fmt"
	"math"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Integers is the ring of integers of any size. A nil element counts as 0.
type Integers struct{}

// Zero returns 0.
func (Integers) Zero() *big.Int { return new(big.Int) }

// One returns 1.
func (Integers) One() *big.Int { return big.NewInt(1) }

// Add returns a + b.
func (Integers) Add(a, b *big.Int) *big.Int { return new(big.Int).Add(orZero(a), orZero(b)) }

// Mul returns ab, by [contfrac.Product].
func (Integers) Mul(a, b *big.Int) *big.Int { return contfrac.Product(a, b) }

var zeroInt = new(big.Int)

func orZero(a *big.Int) *big.Int {
	if a == nil {
		return zeroInt
	}
	return a
}

// Modular is the ring of integers modulo a positive integer, its elements from
// 0 to m − 1. Arguments outside are reduced; a nil element counts as 0. The
// zero value is the ring modulo 1, in which everything is 0.
type Modular struct{ m *big.Int }

// NewModular returns the ring of integers modulo m. It returns [ErrModulus]
// unless m ≥ 1.
func NewModular(m *big.Int) (Modular, error) {
	if m == nil || m.Sign() <= 0 {
		return Modular{}, fmt.Errorf("snake: integers modulo %s: the modulus must be at least 1: %w", shorten(fmt.Sprint(m)), ErrModulus)
	}
	return Modular{new(big.Int).Set(m)}, nil
}

// Modulus returns the modulus.
func (r Modular) Modulus() *big.Int {
	if r.m == nil {
		return big.NewInt(1)
	}
	return new(big.Int).Set(r.m)
}

func (r Modular) reduce(a *big.Int) *big.Int {
	if r.m == nil {
		return new(big.Int)
	}
	return a.Mod(a, r.m)
}

// Zero returns 0.
func (r Modular) Zero() *big.Int { return new(big.Int) }

// One returns 1 modulo m.
func (r Modular) One() *big.Int { return r.reduce(big.NewInt(1)) }

// Add returns a + b modulo m.
func (r Modular) Add(a, b *big.Int) *big.Int { return r.reduce(Integers{}.Add(a, b)) }

// Mul returns ab modulo m.
func (r Modular) Mul(a, b *big.Int) *big.Int { return r.reduce(Integers{}.Mul(a, b)) }

// Floats is the field of real numbers in float64, rounded at every operation.
type Floats struct{}

// Zero returns 0.
func (Floats) Zero() float64 { return 0 }

// One returns 1.
func (Floats) One() float64 { return 1 }

// Add returns a + b.
func (Floats) Add(a, b float64) float64 { return a + b }

// Mul returns ab.
func (Floats) Mul(a, b float64) float64 { return a * b }

// MaxPlus is the semiring of real numbers and −∞ under maximum and addition, in
// float64: the weight of a graph in it is the weight of a heaviest matching,
// and the tropical value of its Laurent expansion. The element +∞ is not
// accepted, as −∞ + ∞ has no value.
type MaxPlus struct{}

// Zero returns −∞.
func (MaxPlus) Zero() float64 { return math.Inf(-1) }

// One returns 0.
func (MaxPlus) One() float64 { return 0 }

// Add returns the larger of a and b.
func (MaxPlus) Add(a, b float64) float64 { return max(a, b) }

// Mul returns a + b.
func (MaxPlus) Mul(a, b float64) float64 { return a + b }

// Booleans is the semiring of truth values under or and and: the weight of a
// graph in it says whether some matching has only edges and flips of weight true.
type Booleans struct{}

// Zero returns false.
func (Booleans) Zero() bool { return false }

// One returns true.
func (Booleans) One() bool { return true }

// Add returns a or b.
func (Booleans) Add(a, b bool) bool { return a || b }

// Mul returns a and b.
func (Booleans) Mul(a, b bool) bool { return a && b }
