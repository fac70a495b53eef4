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
// three given numbers solve (E). It is described completely: some weights are
// free, and the others are First + j·Step for 0 ≤ j < Len. The zero value is
// the empty set.
type WeightSet struct {
	free        [3]bool
	first, step [3]*big.Int // 0 for free weights
	count       *big.Int    // of j; nil for 0
}

// Weights returns all weights for which the numbers zero, infinity and one at
// the classes of 0/1, 1/0 and 1/1 solve (E). Numbers below 1 are ErrNotPositive.
//
// In the weights (E) is linear: with x, y, z for the numbers,
//
//	yz(x−1)·k₀ + zx(y−1)·k∞ + xy(z−1)·k₁ = x² + y² + z² − 3xyz.
//
// A weight is free exactly where the number is 1, so infinitely many families
// share a triple if a number is 1 and there is any. The other coefficients are positive, so the
// other weights are finitely many. If two of them are not free they lie on one arithmetic
// progression. If all three numbers are above 1, the right side is negative
// unless one of them, say z, is the largest by far, and then
// 0 ≤ xy·k₁ < z with z | xy·k₁ + x² + y² determine k₁, and the other two weights lie on one
// arithmetic progression again. Cost: a few multiplications, divisions and one
// modular inverse, whatever the number of solutions.
func Weights(zero, infinity, one *big.Int) (WeightSet, error) {
	n := [3]*big.Int{zero, infinity, one}
	var square [3]*big.Int
	for c, x := range n {
		if x == nil || x.Sign() <= 0 {
			return WeightSet{}, fmt.Errorf("recognize: weights for the number %s at class %v: %w", brief(x), farey.Class(c), ErrNotPositive)
		}
		square[c] = contfrac.Product(x, x)
	}
	unit := big.NewInt(1)
	rest := contfrac.Product(contfrac.Product(n[0], n[1]), n[2])
	rest.Mul(rest, big.NewInt(-3))
	var set WeightSet
	var a [3]*big.Int // coefficients
	var bound []int   // the classes with positive coefficient
	for c := range n {
		rest.Add(rest, square[c])
		set.first[c], set.step[c] = new(big.Int), new(big.Int)
		a[c] = contfrac.Product(contfrac.Product(n[(c+1)%3], n[(c+2)%3]), new(big.Int).Sub(n[c], unit))
		if set.free[c] = a[c].Sign() == 0; !set.free[c] {
			bound = append(bound, c)
		}
	}
	if rest.Sign() < 0 {
		return WeightSet{}, nil
	}
	if len(bound) == 3 {
		top := 0
		for c := range n {
			if n[c].Cmp(n[top]) > 0 {
				top = c
			}
		}
		v, w := (top+1)%3, (top+2)%3
		m := new(big.Int).Add(square[v], square[w])
		m.Neg(m).Mod(m, n[top]) // xy·k₁
		k, r := m.QuoRem(m, contfrac.Product(n[v], n[w]), new(big.Int))
		if r.Sign() != 0 {
			return WeightSet{}, nil
		}
		set.first[top].Set(k)
		if rest.Sub(rest, contfrac.Product(a[top], k)); rest.Sign() < 0 {
			return WeightSet{}, nil
		}
		bound = []int{v, w}
	}
	switch len(bound) {
	case 0: // 1, 1, 1, and rest is 0
		set.count = unit
	case 1:
		k, r := new(big.Int).QuoRem(rest, a[bound[0]], new(big.Int))
		if r.Sign() == 0 {
			set.first[bound[0]], set.count = k, unit
		}
	case 2:
		set.line(bound[0], bound[1], a, rest)
	}
	if set.count == nil {
		return WeightSet{}, nil
	}
	return set, nil
}

// line solves a_v·k_v + a_w·k_w = rest in integers ≥ 0.
func (s *WeightSet) line(v, w int, a [3]*big.Int, rest *big.Int) {
	g := new(big.Int).GCD(nil, nil, a[v], a[w])
	r, m := new(big.Int).QuoRem(rest, g, new(big.Int))
	if m.Sign() != 0 {
		return
	}
	av, aw := new(big.Int).Quo(a[v], g), new(big.Int).Quo(a[w], g)
	// The least k_v: a_v·k_v ≡ r modulo a_w. (Modulo 1 it is 0.)
	k := new(big.Int)
	if inverse := new(big.Int).ModInverse(av, aw); inverse != nil {
		k.Mod(k.Mul(r, inverse), aw)
	}
	l := new(big.Int).Sub(r, new(big.Int).Mul(av, k))
	if l.Sign() < 0 {
		return
	}
	l.Quo(l, aw)
	s.first[v], s.first[w] = k, l
	s.count = new(big.Int).Quo(l, av)
	s.count.Add(s.count, big.NewInt(1))
	if s.count.Cmp(big.NewInt(1)) > 0 {
		s.step[v], s.step[w] = aw, av.Neg(av)
	}
}

// Len returns the number of j, that is of solutions up to the free weights; 0
// for the empty set.
func (s WeightSet) Len() *big.Int {
	if s.count == nil {
		return new(big.Int)
	}
	return new(big.Int).Set(s.count)
}

// IsFree tells whether the weight of the class c may be any integer ≥ 0.
func (s WeightSet) IsFree(c farey.Class) bool { return int(c) < len(s.free) && s.free[c] }

// First returns the weight of the class c for j = 0; 0 for free weights.
func (s WeightSet) First(c farey.Class) *big.Int { return entry(s.first, c) }

// Step returns by how much the weight of the class c changes from j to j+1.
func (s WeightSet) Step(c farey.Class) *big.Int { return entry(s.step, c) }

func entry(v [3]*big.Int, c farey.Class) *big.Int {
	if int(c) >= len(v) || v[c] == nil {
		return new(big.Int)
	}
	return new(big.Int).Set(v[c])
}

// Families returns the families of the set with weights up to bound: by
// increasing j, then by increasing free weights, k₀ first. The iterator can be
// used again. Weights past the bound are passed over without being counted
// through.
func (s WeightSet) Families(bound int64) iter.Seq[orbifold.Family] {
	return func(yield func(orbifold.Family) bool) {
		from, to := s.span(big.NewInt(bound))
		for j := from; j.Cmp(to) <= 0; j = new(big.Int).Add(j, big.NewInt(1)) {
			var lo, hi [3]int64
			for c := range lo {
				k := s.first[c]
				k = new(big.Int).Add(k, new(big.Int).Mul(j, s.step[c]))
				if lo[c], hi[c] = k.Int64(), k.Int64(); s.free[c] {
					lo[c], hi[c] = 0, bound
				}
			}
			for zero := lo[0]; zero <= hi[0]; zero++ {
				for infinity := lo[1]; infinity <= hi[1]; infinity++ {
					for one := lo[2]; one <= hi[2]; one++ {
						if !yield(orbifold.MustNew(zero, infinity, one)) {
							return
						}
						if one == hi[2] {
							break // before int64 ends
						}
					}
					if infinity == hi[1] {
						break
					}
				}
				if zero == hi[0] {
					break
				}
			}
		}
	}
}

// span returns the first and the last j for which no weight that is not free
// passes the bound; the last is below the first if there are none.
func (s WeightSet) span(bound *big.Int) (from, to *big.Int) {
	from, to = new(big.Int), new(big.Int).Sub(s.Len(), big.NewInt(1))
	if bound.Sign() < 0 {
		return from, big.NewInt(-1)
	}
	for c := range s.first {
		if s.count == nil || s.free[c] {
			continue
		}
		room := new(big.Int).Sub(bound, s.first[c])
		switch s.step[c].Sign() {
		case 1: // first + j·step ≤ bound
			j := room.Div(room, s.step[c])
			if j.Cmp(to) < 0 {
				to = j
			}
		case 0:
			if room.Sign() < 0 {
				return from, big.NewInt(-1)
			}
		case -1: // j ≥ (first − bound)/|step|, rounded up
			j := room.Div(room, new(big.Int).Neg(s.step[c]))
			if j.Neg(j).Cmp(from) > 0 {
				from = j
			}
		}
	}
	return from, to
}

// Contains tells whether the weights of f are in the set.
func (s WeightSet) Contains(f orbifold.Family) bool {
	if s.count == nil {
		return false
	}
	var j *big.Int
	for c := range s.first {
		k := new(big.Int).Sub(big.NewInt(f.Weight(farey.Class(c))), s.first[c])
		switch {
		case s.free[c]:
		case s.step[c].Sign() == 0:
			if k.Sign() != 0 {
				return false
			}
		default:
			q, r := k.QuoRem(k, s.step[c], new(big.Int))
			if r.Sign() != 0 || j != nil && j.Cmp(q) != 0 {
				return false
			}
			j = q
		}
	}
	return j == nil || j.Sign() >= 0 && j.Cmp(s.count) < 0
}

// String writes the set, for instance "k₀ any, k∞ = 1 + 2j, k₁ = 9 − 3j, j = 0 … 3";
// "none" for the empty set.
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
	if s.count == nil {
		return "none"
	}
	var parts []string
	for c, name := range [3]string{"k₀", "k∞", "k₁"} {
		step := s.step[c]
		switch {
		case s.free[c]:
			parts = append(parts, name+" any")
		case step.Sign() == 0:
			parts = append(parts, name+" = "+integer(s.first[c]))
		default:
			sign, size := " + ", integer(new(big.Int).Abs(step))
			if step.Sign() < 0 {
				sign = " − "
			}
			if size == "1" {
				size = ""
			}
			parts = append(parts, name+" = "+integer(s.first[c])+sign+size+"j")
		}
	}
	if last := new(big.Int).Sub(s.count, big.NewInt(1)); last.Sign() > 0 {
		parts = append(parts, "j = 0 … "+integer(last))
	}
	return strings.Join(parts, ", ")
}
