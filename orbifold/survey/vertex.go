package survey

import (
	"math/bits"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// mersenne is 2⁶¹ − 1, a prime: the second modulus.
const mersenne = 1<<61 - 1

// vertex is an arc in machine words. The walk deep in the tree knows no more of
// an arc than this, and does not allocate.
type vertex struct {
	r64, r61 uint64 // the number modulo 2⁶⁴ and 2⁶¹ − 1
	lo, hi   int64  // enclosure of its length in units of the walk, see scale
	at       coords
}

// coords is the vector (q, p) of a slope p/q as q + 2³²·p, so that adding
// vectors is adding words. |p| and q stay below 2³¹, see MaxBoundBits.
type coords int64

func pack(p, q int64) coords { return coords(p<<32 + q) }

func (c coords) q() int64 { return int64(int32(c)) }
func (c coords) p() int64 { return (int64(c) - int64(int32(c))) >> 32 }

// class returns the class of the slope, by the parities of p and q.
func (c coords) class() farey.Class {
	switch {
	case c.q()&1 == 0:
		return farey.Infinity
	case c.p()&1 == 0:
		return farey.Zero
	}
	return farey.One
}

// slope returns the slope; −1/0, the vector at which the negative slopes begin,
// is 1/0.
func (c coords) slope() farey.Slope {
	s, _ := farey.FromInts(c.p(), c.q()) // never 0/0
	return s
}

// det returns the determinant p'·q − p·q' of c = p/q and d = p'/q', positive when
// c < d.
func (c coords) det(d coords) int64 { return d.p()*c.q() - c.p()*d.q() }

// fold reduces x < 2⁶⁴ modulo 2⁶¹ − 1.
func fold(x uint64) uint64 {
	x = x&mersenne + x>>61
	if x >= mersenne {
		x -= mersenne
	}
	return x
}

// mul61 returns xy for residues x, y modulo 2⁶¹ − 1.
func mul61(x, y uint64) uint64 {
	hi, lo := bits.Mul64(x, y)
	return fold(lo&mersenne + (hi<<3 | lo>>61))
}

// mulSub61 returns xy − u − v for residues modulo 2⁶¹ − 1.
func mulSub61(x, y, u, v uint64) uint64 {
	hi, lo := bits.Mul64(x, y)
	return fold(lo&mersenne + (hi<<3 | lo>>61) + 2*mersenne - u - v)
}

// inv61 returns 1/x modulo 2⁶¹ − 1, 0 for x = 0.
func inv61(x uint64) uint64 {
	y, base := uint64(1), x
	for e := uint64(mersenne - 2); e != 0; e >>= 1 {
		if e&1 != 0 {
			y = mul61(y, base)
		}
		base = mul61(base, base)
	}
	return y
}

// weights are the constants of (X) in machine words.
type weights struct {
	k64, k61 uint64
	w64, w61 [3]uint64 // by class
}

func newWeights(f orbifold.Family) weights {
	var w weights
	k := f.K()
	w.k64 = low64(k)
	w.k61 = mod61(k)
	for c := range w.w64 {
		w.w64[c] = uint64(f.Weight(farey.Class(c)))
		w.w61[c] = fold(w.w64[c])
	}
	return w
}

// pivot holds what the flips about one arc u have in common: by (X) in its
// second form, the arc in front of the edge (u, v) with o behind it has the number
// t·v − k_v·u − o, wherein t = K·u − k_u is the trace at u.
type pivot struct {
	t64, t61 uint64
	s64, s61 [3]uint64 // k_v·u, by the class of v
}

func (w *weights) about(u *vertex) pivot {
	c := u.at.class()
	p := pivot{
		t64: w.k64*u.r64 - w.w64[c],
		t61: mulSub61(w.k61, u.r61, w.w61[c], 0),
	}
	for c := range p.s64 {
		p.s64[c] = w.w64[c] * u.r64
		p.s61[c] = mul61(w.w61[c], u.r61)
	}
	return p
}
