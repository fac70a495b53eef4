package orbifold

import (
	"math/big"

	"example.com/onecusp/farey"
)

// jumpFrom says from which length on a run of flips about one vertex is
// jumped and not stepped: for the two arcs at its end, and for one arc alone.
type jumpFrom struct{ pair, term uint64 }

// Over the integers a step costs the more the farther out it is; in residue
// rings all steps cost the same. BenchmarkJumpLength shows where the two ways
// meet.
var (
	exactJumps   = jumpFrom{pair: 12, term: 6}
	residueJumps = jumpFrom{pair: 32, term: 24}
)

// fan is the sequence of arcs round a fixed vertex, the pivot, of number N:
// y₀ lies behind the edge (pivot, y₁), and by (X), with t = K·N − k,
//
//	y_{i+1} = t·y_i − c_i·N − y_{i−1},
//
// where c_i is the weight of the class of arc i, so c_i = c_{i+2}.
type fan[T any] struct {
	x     rule[T]
	pivot vertex[T]
	t     T
	y     [2]vertex[T] // arcs 0 and 1
	step  func() bool  // asked between multiplications; false ends the work
}

func (x rule[T]) fan(pivot, y1, y0 vertex[T], step func() bool) fan[T] {
	return fan[T]{x: x, pivot: pivot, t: x.trace(pivot), y: [2]vertex[T]{y0, y1}, step: step}
}

// pair returns the arcs n and n+1, for two multiplications of the size of the
// result at the top.
func (f fan[T]) pair(n *big.Int) (lo, hi vertex[T]) {
	if n.IsUint64() && n.Uint64() < f.x.jumps.pair {
		return f.walk(n.Uint64())
	}
	return f.leap(n, true)
}

// term returns arc n, for one multiplication of the size of the result at the
// top.
func (f fan[T]) term(n *big.Int) vertex[T] {
	if n.IsUint64() && n.Uint64() <= f.x.jumps.term {
		lo, hi := f.walk(max(n.Uint64(), 1) - 1)
		if n.Sign() == 0 {
			return lo
		}
		return hi
	}
	_, hi := f.leap(new(big.Int).Sub(n, big.NewInt(1)), false)
	return hi
}

// walk returns the arcs n and n+1 by n single steps.
func (f fan[T]) walk(n uint64) (lo, hi vertex[T]) {
	lo, hi = f.y[0], f.y[1]
	var drift [2]T // c_i·N for i even and odd
	for i := range n {
		if !f.step() {
			break
		}
		odd := (i + 1) & 1 // hi is arc i+1
		less := lo.number
		if w := f.x.weight[hi.class]; !f.x.IsZero(w) {
			if i < 2 {
				drift[odd] = f.x.Mul(w, f.pivot.number)
			}
			less = f.x.Add(less, drift[odd])
		}
		lo, hi = hi, vertex[T]{f.x.MulSub(f.t, hi.number, less), lo.class}
	}
	return lo, hi
}

// shift is the law that takes arc m to the two arcs at distance j from it,
//
//	y_{m+j} + y_{m−j} = V_j·y_m − N·D_j,
//	D_j = G_j·(t·c_m + 2·c_{m+1}) + [j odd]·c_m,
//
// with V_j = λʲ + λ⁻ʲ, U_j = (λʲ − λ⁻ʲ)/(λ − λ⁻¹) for λ + λ⁻¹ = t and
// G_j = U_⌊j/2⌋·U_⌈j/2⌉ = (V_j − (2 or t))/(t² − 4). It follows from the step of
// the fan: y_i − y*_i solves the homogeneous recurrence when y* is the
// solution of period two. Nothing is divided, so it holds in every ring.
type shift[T any] struct {
	v   T
	g   T // only when a weight of the fan is not zero
	odd bool
}

// jump returns arc m+j from arc m (class of its neighbours: other) and arc m−j.
func (f fan[T]) jump(mid vertex[T], other farey.Class, s shift[T], back vertex[T]) vertex[T] {
	x := f.x
	less := back.number
	c, d := x.weight[mid.class], x.weight[other]
	if !x.IsZero(c) || !x.IsZero(d) {
		w := x.Mul(s.g, x.Add(x.Mul(f.t, c), x.Add(d, d)))
		if s.odd {
			w = x.Add(w, c)
		}
		less = x.Add(less, x.Mul(w, f.pivot.number))
	}
	return vertex[T]{x.MulSub(s.v, mid.number, less), back.class}
}

// weighted tells whether the law of this fan has an inhomogeneous part.
func (f fan[T]) weighted() bool {
	return !f.x.IsZero(f.x.weight[f.y[0].class]) || !f.x.IsZero(f.x.weight[f.y[1].class])
}

// leap returns arc n+1 and, when both is set, arc n, for n ≥ 1. It goes through
// the leading bits i of n and keeps the arcs i, i+1 (or i+1 alone) and the
// shifts i, i+1, so that nothing is computed twice.
func (f fan[T]) leap(n *big.Int, both bool) (lo, hi vertex[T]) {
	x := f.x
	lo, hi = f.y[0], f.y[1]
	two := x.From(big.NewInt(2))
	var zero, one T
	if f.weighted() {
		zero, one = x.Zero(), x.One()
	}
	s0, s1 := shift[T]{v: two, g: zero}, shift[T]{v: f.t, g: zero, odd: true}
	for b := n.BitLen() - 1; b >= 0 && f.step(); b-- {
		class0, class1 := f.y[0].class, f.y[1].class
		if n.Bit(b+1) == 1 { // i is odd
			class0, class1 = class1, class0
		}
		odd := n.Bit(b) == 1
		if odd {
			if both {
				lo = f.jump(hi, class0, s0, f.y[1]) // 2i+1 = (i+1) + i
			}
			hi = f.jump(hi, class0, s1, f.y[0]) // 2i+2 = (i+1) + (i+1)
		} else {
			mid := hi
			hi = f.jump(mid, class0, s0, f.y[1])
			if both {
				lo = f.jump(lo, class1, s0, f.y[0]) // 2i = i + i
			}
		}
		if b == 0 {
			break
		}
		// What the next bit, the last one, does not ask for is not computed.
		need0, need1 := true, true
		if b == 1 {
			need0, need1 = both || n.Bit(0) == 0, n.Bit(0) == 1
		}
		mid := f.between(s0, s1, odd && need0 || !odd && need1, two)
		if odd {
			s0, s1 = mid, f.double(s1, need1, one, two)
		} else {
			s0, s1 = f.double(s0, need0, one, two), mid
		}
	}
	return lo, hi
}

// double returns the shift of 2i: V_{2i} = V_i² − 2, and
// G_{2i} = G_i·(V_i + 2) for even i, (1 + (t−2)·G_i)·(1 + (t+2)·G_i) for odd i.
func (f fan[T]) double(s shift[T], want bool, one, two T) (d shift[T]) {
	if !want {
		return d
	}
	x := f.x
	d.v = x.MulSub(s.v, s.v, two)
	switch {
	case !f.weighted():
	case !s.odd:
		d.g = x.Mul(s.g, x.Add(s.v, two))
	default:
		tg, gg := x.Mul(f.t, s.g), x.Add(s.g, s.g)
		d.g = x.Mul(x.Add(one, x.Sub(tg, gg)), x.Add(one, x.Add(tg, gg)))
	}
	return d
}

// between returns the shift of 2i+1 from those of i and i+1:
// V_{2i+1} = V_i·V_{i+1} − t, and G_{2i+1} = 2·G_o + G_e·V_o where e is the even
// and o the odd one of i, i+1.
func (f fan[T]) between(lo, hi shift[T], want bool, two T) (d shift[T]) {
	if !want {
		return d
	}
	x := f.x
	d.v, d.odd = x.MulSub(lo.v, hi.v, f.t), true
	if f.weighted() {
		even, odd := lo, hi
		if lo.odd {
			even, odd = hi, lo
		}
		d.g = x.Add(x.Mul(two, odd.g), x.Mul(even.g, odd.v))
	}
	return d
}
