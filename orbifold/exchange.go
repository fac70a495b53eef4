package orbifold

import (
	"fmt"
	"math/big"
	"math/bits"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/snake"
)

// ring is the arithmetic that the exchange rule needs. The rule is the same
// over the integers, modulo m and modulo a machine word; only the ring differs.
// Elements are never changed in place.
type ring[T any] interface {
	snake.Semiring[T]
	Sub(x, y T) T
	MulSub(x, y, z T) T // x·y − z
	From(x *big.Int) T
	IsZero(x T) bool
}

// vertex is an arc of a triangle: its number and its class.
type vertex[T any] struct {
	number T
	class  farey.Class
}

// rule is the exchange rule (X) of a family over a ring.
type rule[T any] struct {
	ring[T]
	family Family
	k      T    // K
	weight [3]T // by class
	jumps  jumpFrom
}

func newRule[T any](f Family, r ring[T], jumps jumpFrom) rule[T] {
	x := rule[T]{ring: r, family: f, k: r.From(f.K()), jumps: jumps}
	for _, c := range classes {
		x.weight[c] = r.From(big.NewInt(f.weights[c]))
	}
	return x
}

// base returns the base triangle, number 1 at each vertex.
func (x rule[T]) base() (b [3]vertex[T]) {
	for _, c := range classes {
		b[c] = vertex[T]{x.One(), c}
	}
	return b
}

// trace returns t = K·N − k for the arc v.
func (x rule[T]) trace(v vertex[T]) T {
	return x.MulSub(x.k, v.number, x.weight[v.class])
}

// flip returns the arc that replaces c in the triangle a, b, c, by the second
// form of (X): c' = K·a·b − k_a·b − k_b·a − c, wherein K·a − k_a is the trace
// at a.
func (x rule[T]) flip(a, b, c vertex[T]) vertex[T] {
	less := c.number
	if w := x.weight[b.class]; !x.IsZero(w) {
		less = x.Add(less, x.Mul(w, a.number))
	}
	return vertex[T]{x.MulSub(x.trace(a), b.number, less), c.class}
}

// integers is the ring Z.
type integers struct{}

func (integers) Zero() *big.Int             { return new(big.Int) }
func (integers) One() *big.Int              { return big.NewInt(1) }
func (integers) From(x *big.Int) *big.Int   { return x }
func (integers) Add(x, y *big.Int) *big.Int { return new(big.Int).Add(x, y) }
func (integers) Sub(x, y *big.Int) *big.Int { return new(big.Int).Sub(x, y) }
func (integers) Mul(x, y *big.Int) *big.Int { return contfrac.Product(x, y) }
func (integers) MulSub(x, y, z *big.Int) *big.Int {
	p := contfrac.Product(x, y) // fresh
	return p.Sub(p, z)
}

func (integers) IsZero(x *big.Int) bool { return x.Sign() == 0 }

// residues is the ring Z/m, with representatives 0 … m−1. It keeps scratch
// space for products, so one descent has one of its own.
type residues struct {
	m                 *big.Int
	product, quotient *big.Int
}

func newResidues(m *big.Int) *residues {
	return &residues{new(big.Int).Set(m), new(big.Int), new(big.Int)}
}

func (r *residues) From(x *big.Int) *big.Int { return new(big.Int).Mod(x, r.m) }
func (r *residues) Zero() *big.Int           { return new(big.Int) }
func (r *residues) One() *big.Int            { return r.From(big.NewInt(1)) }

func (r *residues) Add(x, y *big.Int) *big.Int {
	z := new(big.Int).Add(x, y)
	if z.Cmp(r.m) >= 0 {
		z.Sub(z, r.m)
	}
	return z
}

func (r *residues) Sub(x, y *big.Int) *big.Int {
	z := new(big.Int).Sub(x, y)
	if z.Sign() < 0 {
		z.Add(z, r.m)
	}
	return z
}

func (r *residues) Mul(x, y *big.Int) *big.Int { return r.MulSub(x, y, nil) }

func (r *residues) MulSub(x, y, z *big.Int) *big.Int {
	p := r.product
	if len(r.m.Bits()) > scratchWords {
		p = contfrac.Product(x, y)
	} else {
		p.Mul(x, y)
	}
	if z != nil && p.Sub(p, z).Sign() < 0 {
		return new(big.Int).Add(p, r.m) // z < m
	}
	rem := new(big.Int)
	r.quotient.QuoRem(p, r.m, rem)
	return rem
}

// scratchWords is the size of a modulus, in words, past which contfrac.Product
// is asked and the space for a product is not worth keeping.
const scratchWords = 256

func (*residues) IsZero(x *big.Int) bool { return x.Sign() == 0 }

// wordResidues is the ring Z/m for a modulus that fits a machine word.
type wordResidues struct{ m uint64 }

func (wordResidues) Zero() uint64  { return 0 }
func (r wordResidues) One() uint64 { return 1 % r.m }

func (r wordResidues) From(x *big.Int) uint64 {
	return new(big.Int).Mod(x, new(big.Int).SetUint64(r.m)).Uint64()
}

func (r wordResidues) Add(x, y uint64) uint64 {
	z, carry := bits.Add64(x, y, 0)
	if carry != 0 || z >= r.m {
		z -= r.m
	}
	return z
}

func (r wordResidues) Sub(x, y uint64) uint64 {
	z, borrow := bits.Sub64(x, y, 0)
	if borrow != 0 {
		z += r.m
	}
	return z
}

func (r wordResidues) Mul(x, y uint64) uint64 {
	hi, lo := bits.Mul64(x, y)
	_, rem := bits.Div64(hi, lo, r.m) // hi < m, since both factors are < m
	return rem
}

func (r wordResidues) MulSub(x, y, z uint64) uint64 { return r.Sub(r.Mul(x, y), z) }

func (wordResidues) IsZero(x uint64) bool { return x == 0 }

// Solves returns nil when x, y, z at the classes of 0/1, 1/0 and 1/1 solve
//
//	x² + y² + z² + k₀·yz + k∞·zx + k₁·xy = K·xyz                  (E)
//
// in positive integers. Else the error is ErrNotPositive or ErrNotSolution and
// states both sides. Cost: a few multiplications. Source: "Generalization of
// Markov Diophantine equation via generalized cluster algebra", Electron. J.
// Combin. 30 (2023).
func (f Family) Solves(x, y, z *big.Int) error {
	n := [3]*big.Int{x, y, z}
	for i, v := range n {
		if v == nil || v.Sign() <= 0 {
			return fmt.Errorf("orbifold: number %s at class %v: %w", brief(v), classes[i], ErrNotPositive)
		}
	}
	if left, right := f.sides(n); left.Cmp(right) != 0 {
		return fmt.Errorf("orbifold: (%s, %s, %s) in family %v: left side of (E) is %s, right side %s: %w",
			brief(x), brief(y), brief(z), f, brief(left), brief(right), ErrNotSolution)
	}
	return nil
}

// sides returns the two sides of (E).
func (f Family) sides(n [3]*big.Int) (left, right *big.Int) {
	left = new(big.Int)
	for _, c := range classes {
		v, w := n[(c+1)%3], n[(c+2)%3]
		left.Add(left, contfrac.Product(n[c], n[c]))
		if k := f.weights[c]; k != 0 {
			vw := contfrac.Product(v, w)
			left.Add(left, vw.Mul(vw, big.NewInt(k)))
		}
	}
	right = contfrac.Product(contfrac.Product(n[0], n[1]), n[2])
	return left, right.Mul(right, f.K())
}
