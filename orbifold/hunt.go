package orbifold

import (
	"context"
	"math"
	"math/big"
	"runtime"
	"sync"
	"sync/atomic"

	"example.com/onecusp/farey"
)

// hunt looks for the slopes with logarithms of their numbers in a window,
// without visiting all slopes below it.
//
// Every slope r that is not a base slope has an older and a newer parent; it
// lies in the fan of the older one, A, past the two arcs with which A was made:
// r = L + i·A or R + i·A with i ≥ 2, L and R the parents of A (for a base slope
// A the other two base slopes). Only the slopes in front of the base triangle
// have i = 1; they are looked at by themselves. Along these two sides of a fan
// numbers grow, so the places where a side passes through the window are found
// by a division. And N_r > N_A²: r is y_{i+1} = t·y_i − c·N_A − y_{i−1} with y_i
// above N_A and y_{i−1}, and t − c ≥ 3·N_A. So only slopes A with N_A up to the
// square root of the window's end are visited, a quarter of all.
//
// Logarithms are integers in units of u = 2^−shift. A number is exact when
// K·N_a·N_b < 2⁵³ for its parents a and b, and its logarithm is off by at most
// 2⁻⁴⁶ and rounding to u. Else its logarithm comes from those of its parents by
// ln N_r = ln K + ln N_a + ln N_b + ln f, f = 1 − k_a/(K·N_a) − k_b/(K·N_b) − N_c/(K·N_a·N_b),
// where a number that is not exact drops out of f. Such a number is at least
// 2⁵⁴/K, as f ≥ 2/K; and as K·f ≥ 2 + k_b·(1 − 1/N_b), what drops out is at most
// K·2⁻⁵² of f. The float64 value of f is off by less than 2⁻⁴⁹. So a flip adds an
// error of at most e = 3u + 2⁻⁴⁶ + K·2⁻⁴⁸ to those of the parents, and the
// logarithm of r is off by less than (|p| + q)·e. Slopes in the window widened by
// that are candidates; which of them count is decided by exact means.
type hunt struct {
	f      Family
	shift  uint
	k      float64    // K
	weight [3]float64 // by class
	logK   int64
	error  float64 // e, in units
	lo, hi int64   // the window, in units
	most   int64   // |p| + q to be expected at the most; past it only visit is used
	reach  int64   // the slack there
}

// huntK is the K up to which float64 is precise enough for a hunt.
const huntK = 1 << 40

// exactBelow bounds K·N_a·N_b for the numbers that a hunt holds exactly.
const exactBelow = 1 << 53

// prey is a vertex: its number when that is exact, else 0; its logarithm; its
// vector, with −1/0 for 1/0 below negative slopes.
type prey struct {
	number float64
	log    int64
	class  farey.Class
	p, q   int64
}

// trail is an oriented edge (a, b) with c behind it. f is that of the flip that
// made the newer of a and b.
type trail struct {
	a, b, c prey
	f       float64
	inside  bool // all slopes in front of it are in the domain
}

// newHunt prepares a window lo ≤ ln N ≤ hi; false when float64 does not do.
func newHunt(f Family, lo, hi *big.Float) (*hunt, bool) {
	k, _ := new(big.Float).SetInt(f.K()).Float64()
	top, _ := hi.Float64()
	if k > huntK || top > 1e12 {
		return nil, false
	}
	// Units so small that twice the end of the window stays below 2⁶².
	h := &hunt{f: f, k: k, shift: uint(54 - max(math.Ilogb(math.Max(top, 1)), 0))}
	for c, w := range f.weights {
		h.weight[c] = float64(w)
	}
	h.logK = fixedLog(f.K(), h.shift).Int64()
	h.error = 3 + math.Ldexp(math.Ldexp(1, -46)+math.Ldexp(k, -48), int(h.shift))
	units := func(x *big.Float) int64 {
		n, _ := new(big.Float).SetMantExp(x, int(h.shift)).Int64() // towards 0
		return n
	}
	h.lo, h.hi = units(lo)-1, units(hi)+2
	h.most = 4*int64(top) + 1000
	h.reach = h.slack(0, h.most)
	return h, true
}

// scaled returns ln x in units.
func (h *hunt) scaled(x float64) int64 {
	return int64(math.Round(math.Ldexp(math.Log(x), int(h.shift))))
}

// flip returns the vertex in front of an edge and f.
func (h *hunt) flip(e *trail) (v prey, f float64) {
	v = prey{class: e.c.class, p: e.a.p + e.b.p, q: e.a.q + e.b.q}
	f = 1
	a, b := e.a.number, e.b.number
	switch {
	case a != 0 && b != 0: // then c is exact too
		ka, kb := h.weight[e.a.class], h.weight[e.b.class]
		if h.k*a*b < exactBelow {
			v.number = h.k*a*b - ka*b - kb*a - e.c.number
			v.log = h.scaled(v.number)
			return v, v.number / (h.k * a * b)
		}
		f = 1 - ka/(h.k*a) - kb/(h.k*b) - e.c.number/(h.k*a*b)
	case a != 0:
		alpha := 1 / (h.k * a)
		f = 1 - h.weight[e.a.class]*alpha - alpha*alpha/e.f
	case b != 0:
		beta := 1 / (h.k * b)
		f = 1 - h.weight[e.b.class]*beta - beta*beta/e.f
	}
	v.log = h.logK + e.a.log + e.b.log
	if f != 1 {
		v.log += h.scaled(f)
	}
	return v, f
}

// slack bounds the error of the logarithm at a vector, in units.
func (h *hunt) slack(p, q int64) int64 {
	return int64(math.Min((math.Abs(float64(p))+float64(q))*h.error+1, 1<<58))
}

// run calls found for the candidates; found is called from several goroutines
// at once and a slope may be found more than once.
func (h *hunt) run(ctx context.Context, found func(farey.Slope)) error {
	var base [3]prey
	for _, c := range classes {
		p, q, _ := c.Slope().Int64s()
		base[c] = prey{1, 0, c, p, q}
		if h.f.inDomain(c.Slope()) && h.lo <= 0 {
			found(c.Slope())
		}
	}
	var queue []trail
	for _, c := range classes {
		a, b := firstEdge(c)
		e := trail{a: base[a], b: base[b], c: base[c]}
		if c == farey.One { // through the negative slopes
			e.a.p = -1
		}
		e.inside = h.f.within(&e)
		queue = append(queue, e)
		front, _ := h.flip(&e)
		h.report(front.p, front.q, front.log, found)
		// The fan of a base slope, on both sides of an edge of the base triangle.
		h.side(&e, e.a, e.b, found)
		h.side(&e, e.b, e.a, found)
	}
	// The top of the tree is walked here, breadth first; what lies below is
	// split among the processors.
	const pieces = 256
	for len(queue) > 0 && len(queue) < pieces {
		e := queue[0]
		queue = h.visit(queue[1:], &e, found)
	}
	var next atomic.Int64
	var workers sync.WaitGroup
	for range runtime.GOMAXPROCS(0) {
		workers.Go(func() {
			w := worker{hunt: h, ctx: ctx, found: found}
			for i := next.Add(1) - 1; i < int64(len(queue)) && !w.stopped; i = next.Add(1) - 1 {
				w.walk(queue[i])
			}
		})
	}
	workers.Wait()
	return ctx.Err()
}

// worker walks pieces of a hunt until its context ends.
type worker struct {
	*hunt
	ctx     context.Context
	found   func(farey.Slope)
	steps   uint
	stopped bool
}

// goOn asks the context now and then.
func (w *worker) goOn() bool {
	if w.steps++; w.steps&4095 == 0 && w.ctx.Err() != nil {
		w.stopped = true
	}
	return !w.stopped
}

// walk visits all that lies in front of an edge.
func (w *worker) walk(e trail) {
	stack := []trail{e}
	for len(stack) > 0 && w.goOn() {
		e := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if e.a.number == 0 && e.b.number == 0 && e.inside {
			w.deep(e.a.log, e.b.log, e.a.p, e.a.q, e.b.p, e.b.q)
			continue
		}
		stack = w.visit(stack, &e, w.found)
	}
}

// deep does what walk does, for an edge with no exact number: all f are 1 from
// here on, and the logarithms on a side of a fan are an arithmetic progression.
// It calls itself for the edge with the larger numbers of the two in front, so
// that it is as deep as the logarithm of the window and no deeper.
func (w *worker) deep(la, lb, pa, qa, pb, qb int64) {
	for w.goOn() {
		h := w.hunt
		l, p, q := h.logK+la+lb, pa+pb, qa+qb
		if 2*(l-h.reach) > h.hi {
			return
		}
		d := h.logK + l
		w.along(la+d, d, pa+p, qa+q, p, q)
		w.along(lb+d, d, pb+p, qb+q, p, q)
		if la < lb {
			w.deep(l, lb, p, q, pb, qb)
			lb, pb, qb = l, p, q
		} else {
			w.deep(la, l, pa, qa, p, q)
			la, pa, qa = l, p, q
		}
	}
}

// along looks at the vectors (p, q) + m·(dp, dq), m ≥ 1, with logarithms l + m·d.
func (w *worker) along(l, d, p, q, dp, dq int64) {
	h := w.hunt
	room := h.hi + h.reach - l
	if room < d {
		return
	}
	m := room / d
	if abs(p)+q+m*(abs(dp)+dq) > h.most {
		// Not to be expected: slacks may be larger than reach.
		h.progression(prey{log: l + d, p: p + dp, q: q + dq}, prey{p: dp, q: dq}, d, w.found)
		return
	}
	for at := l + m*d; m > 0 && at >= h.lo-h.reach; m, at = m-1, at-d {
		h.report(p+m*dp, q+m*dq, at, w.found)
	}
}

// visit takes the vertex in front of an edge for A, looks along the two sides of
// its fan, and pushes the two edges behind it, that with the larger numbers
// last: its part of the tree is much the smaller one, so a stack taken from the
// end stays short.
func (h *hunt) visit(stack []trail, e *trail, found func(farey.Slope)) []trail {
	if !e.inside {
		if e.inside = h.f.within(e); !e.inside && !h.f.touches(e) {
			return stack
		}
	}
	v, f := h.flip(e)
	if 2*(v.log-h.slack(v.p, v.q)) > h.hi {
		return stack
	}
	left := trail{e.a, v, e.b, f, e.inside}
	right := trail{v, e.b, e.a, f, e.inside}
	h.side(&left, v, e.a, found)
	h.side(&right, v, e.b, found)
	if e.a.log < e.b.log {
		return append(stack, left, right)
	}
	return append(stack, right, left)
}

// side looks along the fan of the pivot from the edge e = {pivot, y₀} on, with
// y₁ in front of it: at y₂, y₃, …
func (h *hunt) side(e *trail, pivot, y0 prey, found func(farey.Slope)) {
	cur, f := h.flip(e)
	edge := trail{a: pivot, b: cur, c: y0, f: f}
	for {
		if cur.log-h.slack(cur.p, cur.q) > h.hi {
			return
		}
		next, g := h.flip(&edge)
		if cur.number == 0 && math.Abs(g-edge.f) <= 0x1p-51 {
			h.progression(next, pivot, next.log-cur.log, found)
			return
		}
		h.report(next.p, next.q, next.log, found)
		edge = trail{a: pivot, b: next, c: cur, f: g}
		cur = next
	}
}

// progression looks at v, v + pivot, v + 2·pivot, … whose logarithms differ by d.
func (h *hunt) progression(v, pivot prey, d int64, found func(farey.Slope)) {
	i := int64(0)
	if below := h.lo - h.slack(v.p, v.q) - v.log; below > 0 {
		// No further than the first whose slack reaches the window.
		i = max(below/(d+int64(h.error)*(abs(pivot.p)+pivot.q)+1)-1, 0)
	}
	for ; ; i++ {
		p, q, at := v.p+i*pivot.p, v.q+i*pivot.q, v.log+i*d
		if at-h.slack(p, q) > h.hi {
			return
		}
		h.report(p, q, at, found)
	}
}

func abs(x int64) int64 { return max(x, -x) }

// report passes a slope on when its logarithm may lie in the window.
func (h *hunt) report(p, q, log int64, found func(farey.Slope)) {
	if s := h.slack(p, q); log+s < h.lo || log-s > h.hi {
		return
	}
	if s, err := farey.FromInts(p, q); err == nil && h.f.inDomain(s) {
		found(s)
	}
}

// ends returns the slopes at the ends of what lies in front of an edge; low is
// true when it reaches down to −1/0.
func (e *trail) ends() (a, b farey.Slope, low bool) {
	a, _ = farey.FromInts(e.a.p, e.a.q)
	b, _ = farey.FromInts(e.b.p, e.b.q)
	return a, b, e.a.q == 0
}

// within tells whether all slopes in front of an edge lie in the domain.
func (f Family) within(e *trail) bool {
	lo, hi, all := f.Domain()
	a, b, low := e.ends()
	return all || !low && lo.Cmp(a) <= 0 && b.Cmp(hi) <= 0
}

// touches tells whether some slopes in front of an edge lie in the domain.
func (f Family) touches(e *trail) bool {
	lo, hi, all := f.Domain()
	a, b, low := e.ends()
	return all || b.Cmp(lo) > 0 && (low || a.Cmp(hi) < 0)
}
