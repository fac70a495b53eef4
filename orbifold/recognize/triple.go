package recognize

import (
	"fmt"
	"iter"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// WeightSet is the set of all weights (k₀, k∞, k₁), integers ≥ 0, for which
// three given numbers solve (E). Unless it is empty, each weight is free, any
// integer ≥ 0, or has one value. The zero value is the empty set.
type WeightSet struct {
	some   bool
	free   [3]bool
	weight [3]*big.Int // 0 for free weights
}

// Weights returns all weights for which the numbers zero, infinity and one at
// the classes of 0/1, 1/0 and 1/1 solve (E). Numbers below 1 are ErrNotPositive.
//
// In the weights (E) is linear: with x, y, z for the numbers,
//
//	yz(x−1)·k₀ + zx(y−1)·k∞ + xy(z−1)·k₁ = x² + y² + z² − 3xyz.
//
// So a weight is free exactly where the number is 1. The others have one value or
// there is no solution at all. Proof, for 1 < x < y < z (two equal numbers above 1
// make the right side negative): modulo z it says z | xy·k₁ + x² + y², and xy·k₁ <
// z, which determines k₁. Two pairs k₀, k∞ would differ by a multiple of the least
// common multiple of their coefficients. Over z that is at least y(y−1), since the
// greatest common divisor of y(x−1) and x(y−1) divides y − x and hence x(x−1); but
// what is left of the right side over z is at most x² + y² + 1 − 3xy < y(y−1). The
// same for x = 1 < y < z with z(z−1).
//
// Cost: a few multiplications and divisions and one modular inverse.
func Weights(zero, infinity, one *big.Int) (WeightSet, error) {
	n := [3]*big.Int{zero, infinity, one}
	var square [3]*big.Int
	for c, x := range n {
		if x == nil || x.Sign() <= 0 {
			return WeightSet{}, fmt.Errorf("recognize: weights for the number %s at class %v: %w", contfrac.Abbreviate(x), farey.Class(c), ErrNotPositive)
		}
		square[c] = contfrac.Product(x, x)
	}
	rest := contfrac.Product(contfrac.Product(n[0], n[1]), n[2])
	rest.Mul(rest, big.NewInt(-3))
	set := WeightSet{some: true}
	var a [3]*big.Int // coefficients
	var bound []int   // the classes with positive coefficient
	top := 0
	for c := range n {
		rest.Add(rest, square[c])
		set.weight[c] = new(big.Int)
		a[c] = contfrac.Product(contfrac.Product(n[(c+1)%3], n[(c+2)%3]), new(big.Int).Sub(n[c], big.NewInt(1)))
		if set.free[c] = a[c].Sign() == 0; !set.free[c] {
			bound = append(bound, c)
		}
		if n[c].Cmp(n[top]) > 0 {
			top = c
		}
	}
	if len(bound) == 3 {
		v, w := (top+1)%3, (top+2)%3
		m := new(big.Int).Add(square[v], square[w])
		m.Neg(m).Mod(m, n[top]) // xy·k₁
		k, r := m.QuoRem(m, contfrac.Product(n[v], n[w]), new(big.Int))
		if r.Sign() != 0 {
			return WeightSet{}, nil
		}
		set.weight[top] = k
		rest.Sub(rest, contfrac.Product(a[top], k))
		bound = []int{v, w}
	}
	if rest.Sign() < 0 {
		return WeightSet{}, nil
	}
	ok := true // without a bound weight the numbers are 1, 1, 1, and rest is 0
	switch len(bound) {
	case 1:
		set.weight[bound[0]], ok = exact(rest, a[bound[0]])
	case 2:
		v, w := bound[0], bound[1]
		set.weight[v], set.weight[w], ok = split(a[v], a[w], rest)
	}
	if !ok {
		return WeightSet{}, nil
	}
	return set, nil
}

// split solves a·k + b·l = r, with a, b > 0, in integers k, l ≥ 0, with the least k.
func split(a, b, r *big.Int) (k, l *big.Int, ok bool) {
	g := new(big.Int).GCD(nil, nil, a, b)
	r, ok = exact(r, g)
	if !ok {
		return nil, nil, false
	}
	a, b = new(big.Int).Quo(a, g), new(big.Int).Quo(b, g)
	// k ≡ r/a modulo b, where everything is 0 modulo 1.
	k = new(big.Int)
	if inverse := new(big.Int).ModInverse(a, b); inverse != nil {
		k.Mod(k.Mul(r, inverse), b)
	}
	l, ok = exact(new(big.Int).Sub(r, new(big.Int).Mul(a, k)), b)
	return k, l, ok
}

// IsEmpty tells whether no weights solve (E).
func (s WeightSet) IsEmpty() bool { return !s.some }

// IsFree tells whether the weight of the class c may be any integer ≥ 0.
func (s WeightSet) IsFree(c farey.Class) bool { return int(c) < len(s.free) && s.some && s.free[c] }

// Weight returns the weight of the class c; 0 for free weights and for the
// empty set.
func (s WeightSet) Weight(c farey.Class) *big.Int {
	if int(c) >= len(s.weight) || s.weight[c] == nil {
		return new(big.Int)
	}
	return new(big.Int).Set(s.weight[c])
}

// Families returns the families of the set with weights up to bound, k₀ rising
// first, then k∞, then k₁. The iterator can be used again.
func (s WeightSet) Families(bound int64) iter.Seq[orbifold.Family] {
	return func(yield func(orbifold.Family) bool) {
		var lo, hi [3]int64
		for c := range lo {
			switch {
			case !s.some || bound < 0:
				return
			case s.free[c]:
				hi[c] = bound
			case s.weight[c].Cmp(big.NewInt(bound)) > 0:
				return
			default:
				lo[c] = s.weight[c].Int64()
				hi[c] = lo[c]
			}
		}
		for k := lo; ; {
			if !yield(orbifold.MustNew(k[0], k[1], k[2])) {
				return
			}
			c := 0
			for ; c < 3 && k[c] == hi[c]; c++ {
				k[c] = lo[c]
			}
			if c == 3 {
				return
			}
			k[c]++
		}
	}
}

// Contains tells whether the weights of f are in the set.
func (s WeightSet) Contains(f orbifold.Family) bool {
	for c := range s.weight {
		if !s.some || !s.free[c] && s.weight[c].Cmp(big.NewInt(f.Weight(farey.Class(c)))) != 0 {
			return false
		}
	}
	return true
}

// String writes the set, for instance "k₀ any, k∞ = 1, k₁ = 9"; "none" for the
// empty set.
func (s WeightSet) String() string { return s.text((*big.Int).String) }

// Format writes the set whole for %s, and long integers shortened for %v.
func (s WeightSet) Format(f fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(f, s.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(f, s.String())
}

func (s WeightSet) text(integer func(*big.Int) string) string {
	if !s.some {
		return "none"
	}
	var parts [3]string
	for c, name := range [3]string{"k₀", "k∞", "k₁"} {
		parts[c] = name + " any"
		if !s.free[c] {
			parts[c] = name + " = " + integer(s.weight[c])
		}
	}
	return strings.Join(parts[:], ", ")
}
