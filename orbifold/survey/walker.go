package survey

import (
	"math/big"
	"sync/atomic"
)

// maxDepth bounds the frames of a walk: a frame inside another starts with
// lengths that grow like the Fibonacci numbers, from 2⁻²⁴ of the bound at least.
const maxDepth = 64

// frame is a fan about u that is being walked: the arcs y come in a ring of four.
type frame struct {
	u        vertex
	uLo, uHi int64 // length φ of u, see entry
	y        [4]vertex
}

// walker visits the slopes in front of edges. It belongs to one goroutine; its
// memory does not grow.
type walker struct {
	*scale
	weights
	constraints
	look  bool // constraints have to be asked
	sink  func(*Visit) bool
	cut   func(u, w, o *vertex) // told of every edge where the walk turns back, o behind it; may be nil
	far   func(edge)            // takes settled edges instead of the walk; may be nil
	halt  *atomic.Bool          // set from outside to stop
	over  bool                  // stopped, by sink or halt
	v     Visit
	stack []edge
	frame [maxDepth]frame
}

func newWalker(r Region) (*walker, error) {
	if err := r.check(); err != nil {
		return nil, err
	}
	r = r.clone() // the caller may go on changing its own
	s, err := newScale(r)
	if err != nil {
		return nil, err
	}
	w := &walker{scale: s, weights: newWeights(r.Family), constraints: newConstraints(r), halt: new(atomic.Bool)}
	w.look = !w.anything
	w.v.walk = w
	return w, nil
}

// clone returns a walker for another goroutine over the same region.
func (w *walker) clone() *walker {
	c := &walker{scale: w.scale, weights: w.weights, constraints: w.constraints, look: w.look, halt: w.halt}
	c.v.walk = c
	return c
}

// show hands a visit to the sink.
func (w *walker) show(f *frame, i uint32, base bool) bool {
	w.v.frame, w.v.i, w.v.base = f, i, base
	if !w.sink(&w.v) {
		w.over = true
	}
	return !w.over
}

// start visits the base slopes of the region.
func (w *walker) start() bool {
	arcs, _ := w.base()
	for _, a := range arcs {
		if !w.constraints.has(a.v.at) || w.beyond(a.n) {
			continue
		}
		w.frame[0].y[0] = a.v
		if !w.show(&w.frame[0], 0, true) {
			return false
		}
	}
	return true
}

// beyond tells whether a number is past the bound.
func (w *walker) beyond(n *big.Int) bool { return w.bound != nil && n.Cmp(w.bound) > 0 }

// front visits the arc in front of the edge alone and returns it; nil if it is past
// the bound or nothing in front of the edge is in the region.
func (w *walker) frontOf(e edge) *arc {
	if w.constraints.skip(e.a.v.at, e.b.v.at) {
		return nil
	}
	r := w.scale.front(e)
	if w.beyond(r.n) {
		w.turn(&e.a.v, &e.b.v, &e.c.v)
		return nil
	}
	if w.constraints.has(r.v.at) {
		f := &w.frame[0]
		u, y := e.a, e.b
		if y.n.Cmp(u.n) < 0 {
			u, y = y, u
		}
		f.u, f.uLo, f.uHi = u.v, u.v.lo, u.v.hi
		f.y[0], f.y[1], f.y[2] = e.c.v, y.v, r.v
		if !w.show(f, 2, false) {
			return nil
		}
	}
	return r
}

// turn tells that the walk goes no further at the edge u, v with o behind.
func (w *walker) turn(u, v, o *vertex) {
	if w.cut != nil {
		w.cut(u, v, o)
	}
}

// tree visits everything in front of the edge: the arc in front, then what is in
// front of it and a, then b; behind settled edges fan by fan. False if stopped.
func (w *walker) tree(e edge) bool {
	w.stack = append(w.stack[:0], e)
	for len(w.stack) > 0 {
		e := w.stack[len(w.stack)-1]
		w.stack = w.stack[:len(w.stack)-1]
		if w.scale.settled(e.a.n, e.b.n, e.c.n) {
			if w.far != nil {
				w.far(e)
			} else if !w.deep(e) {
				return false
			}
			continue
		}
		if w.halt.Load() {
			w.over = true
		}
		r := w.frontOf(e)
		if w.over {
			return false
		}
		if r == nil {
			continue
		}
		left, right := e.behind(r)
		w.stack = append(w.stack, right, left)
	}
	return true
}

// deep visits everything in front of a settled edge.
func (w *walker) deep(e edge) bool {
	x := w.enter(e)
	f := &w.frame[0]
	f.u, f.uLo, f.uHi = x.u, x.uLo, x.uHi
	f.y[0], f.y[1] = x.y0, x.y1
	if w.look && w.constraints.skip(x.u.at, x.y1.at) {
		return true
	}
	w.v.base = false
	w.fan(0)
	return !w.over
}

// fan visits everything in front of the edge (u, y₁) of frame d, with y₀ behind:
// the arcs y₂, y₃, … about u, each followed by what is in front of (y_{i−1}, y_i).
// There y_{i−1} is the smaller one and becomes the pivot.
func (w *walker) fan(d int) {
	if w.halt.Load() {
		w.over = true
		return
	}
	f := &w.frame[d]
	p := w.about(&f.u)
	uLo, uHi, uAt := f.u.lo, f.u.hi, f.u.at
	y0, y1 := &f.y[0], &f.y[1]
	c0, c1 := y0.at.class(), y1.at.class()
	s64, t64 := p.s64[c1], p.s64[c0]
	s61, t61 := p.s61[c1], p.s61[c0]
	// The two latest arcs in registers: the one behind, and the end of the edge.
	a64, a61 := y0.r64, y0.r61
	b64, b61, lo, hi, at := y1.r64, y1.r61, y1.lo, y1.hi, y1.at
	most, sure := w.most, w.sure
	for i := uint32(2); ; i++ {
		before := lo
		lo, hi, at = lo+uLo, hi+uHi, at+uAt
		if lo > most || hi > sure && !w.exact.within(at.slope()) {
			w.turn(&f.u, &f.y[(i-1)&3], &f.y[(i-2)&3])
			return
		}
		a64, b64 = b64, p.t64*b64-s64-a64
		a61, b61 = b61, mulSub61(p.t61, b61, s61, a61)
		s64, t64 = t64, s64
		s61, t61 = t61, s61
		y := &f.y[i&3]
		y.r64, y.r61, y.lo, y.hi, y.at = b64, b61, lo, hi, at
		if !w.look || w.constraints.has(at) {
			w.v.frame, w.v.i = f, i
			if !w.sink(&w.v) {
				w.over = true
				return
			}
		}
		if before+lo > most {
			w.turn(&f.y[(i-1)&3], y, &f.u)
		} else if !w.look || !w.constraints.skip(at-uAt, at) {
			g := &w.frame[d+1]
			g.u, g.y[0], g.y[1] = f.y[(i-1)&3], f.u, *y
			g.uLo, g.uHi = g.u.lo, g.u.hi
			g.y[0].lo, g.y[0].hi = f.uLo, f.uHi
			w.fan(d + 1)
			if w.over {
				return
			}
		}
		if w.look && w.constraints.skip(uAt, at) {
			return
		}
	}
}
