package survey

import (
	"math/big"

	"example.com/onecusp/farey"
)

// arc is an arc near the base, with its number.
type arc struct {
	n *big.Int
	v vertex // with its length φ, not rounded any wider
	f int64  // its length f, 0 until it is asked for
}

// edge is an edge of a triangle with a below b and the third vertex c on the side
// of the base. Through the negative slopes a may be −1/0.
type edge struct{ a, b, c *arc }

func (s *scale) arc(n *big.Int, at coords) *arc {
	x := &arc{n: n, v: vertex{r64: low64(n), r61: mod61(n), at: at}}
	x.v.lo, x.v.hi = s.log(new(big.Int).Mul(s.k, n))
	return x
}

// front returns the arc in front of the edge.
func (s *scale) front(e edge) *arc { return s.arc(s.frontNumber(e), e.a.v.at+e.b.v.at) }

// frontNumber returns the number of the arc in front of the edge, by (X).
func (s *scale) frontNumber(e edge) *big.Int {
	n := new(big.Int).Mul(s.k, e.a.n)
	n.Mul(n, e.b.n)
	for _, x := range [...]struct{ v, w *arc }{{e.a, e.b}, {e.b, e.a}} {
		if k := s.family.Weight(x.v.v.at.class()); k != 0 {
			kw := big.NewInt(k)
			n.Sub(n, kw.Mul(kw, x.w.n))
		}
	}
	return n.Sub(n, e.c.n)
}

// behind returns the two edges of the triangle of e and its front that lie
// before the front, towards smaller slopes first.
func (e edge) behind(front *arc) (left, right edge) {
	return edge{e.a, front, e.b}, edge{front, e.b, e.a}
}

// base returns the base arcs by class, and the edges of the base triangle in the
// order in which a walk takes them.
func (s *scale) base() (arcs [3]*arc, edges [3]edge) {
	one := big.NewInt(1) // shared, never changed
	zero := s.arc(one, pack(0, 1))
	infinity := s.arc(one, pack(1, 0))
	diagonal := s.arc(one, pack(1, 1))
	minus := s.arc(one, pack(-1, 0)) // the same arc as infinity, as the vector −1/0
	return [3]*arc{farey.Zero: zero, farey.Infinity: infinity, farey.One: diagonal}, [3]edge{
		{zero, diagonal, infinity},
		{diagonal, infinity, zero},
		{minus, zero, diagonal},
	}
}

// entry is an edge in front of which all lengths add up, in machine words.
type entry struct {
	u        vertex // the pivot: the arc with the smaller number
	uLo, uHi int64  // its length φ; u itself has f in its place if it is small
	y0, y1   vertex // the vertex behind, and the other end
}

// enter turns a settled edge into an entry.
func (s *scale) enter(e edge) entry {
	x := entry{u: e.a.v, y1: e.b.v, y0: e.c.v}
	u := e.a
	if e.b.n.Cmp(e.a.n) < 0 {
		x.u, x.y1 = e.b.v, e.a.v
		u = e.b
	}
	x.uLo, x.uHi = x.u.lo, x.u.hi
	x.y1.lo, x.y1.hi = x.y1.lo-2, x.y1.hi+1
	if u.n.BitLen() >= int(s.shift)+3 {
		x.u.lo, x.u.hi = x.u.lo-2, x.u.hi+1
		x.uLo, x.uHi = x.u.lo, x.u.hi
	} else {
		x.u.lo, x.u.hi = s.unit(u.n, s.family.Weight(u.v.at.class()))
	}
	return x
}
