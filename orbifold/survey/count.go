package survey

import (
	"context"
	"fmt"
	"math"
	"math/big"
	"slices"
	"sort"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold"
)

// MaxBounds is the number of bounds that one table may have.
const MaxBounds = 1 << 12

// Count returns the exact number of slopes in Q ∪ {∞} whose number is at most
// bound, one for each symmetry class. Bounds have to be at least 1 and at
// most MaxBoundBits bits long (ErrBound).
//
// Not each of them is visited: behind the edges where logarithms add up, the
// slopes are the primitive vectors m·u + n·w in a triangle, counted by Möbius
// inversion, once with each end of the enclosures. Where the two counts
// differ, the slopes between the two lines are decided exactly. Cost: O(x·log x) divisions for bounds of x bits, against x² slopes.
func Count(ctx context.Context, f orbifold.Family, bound *big.Int) (*big.Int, error) {
	if bound == nil {
		return nil, fmt.Errorf("survey: count up to nothing: want a bound of at least 1: %w", ErrBound)
	}
	rows, err := Table(ctx, f, []*big.Int{bound}, Options{})
	if err != nil {
		return nil, err
	}
	return rows[0].Slopes, nil
}

// Row is one line of a table of counts.
type Row struct {
	Bound  *big.Int
	Slopes *big.Int // numbers ≤ Bound, one slope for each symmetry class
	All    *big.Int // the same, all slopes

	// X is about ln(K·Bound), the length up to which Bound reaches: All grows
	// like G·X² with the constant of Growth.
	X float64
}

// String returns the row in words, whole.
func (r Row) String() string { return fmt.Sprintf("%s", r) }

// Format writes the row with its bound whole for %s and shortened for %v.
func (r Row) Format(f fmt.State, verb rune) {
	bound := FormatBound(r.Bound)
	if verb != 's' && len(bound) > 64 {
		bound = contfrac.Abbreviate(r.Bound)
	}
	fmt.Fprintf(f, "up to %s: %s slopes, %s up to symmetry", bound, whole(r.All), whole(r.Slopes))
}

// Ratio returns All/(G·X²), which tends to 1 as the bound grows.
func (r Row) Ratio(g *big.Float) float64 {
	if g == nil || r.All == nil || r.X == 0 {
		return 0
	}
	constant, _ := g.Float64()
	all, _ := new(big.Float).SetInt(r.All).Float64()
	return all / (constant * r.X * r.X)
}

// Table returns the counts of Count at many bounds, at most MaxBounds, in one walk
// near the base. The rows come in the order of the bounds.
func Table(ctx context.Context, f orbifold.Family, bounds []*big.Int, o Options) ([]Row, error) {
	o, err := o.normal()
	if err != nil {
		return nil, err
	}
	if len(bounds) > MaxBounds {
		return nil, fmt.Errorf("survey: table of %d bounds: want at most %d: %w", len(bounds), MaxBounds, ErrOptions)
	}
	var largest *big.Int
	for _, b := range bounds {
		if b == nil {
			b = new(big.Int)
		}
		if err := Up(f, b).check(); err != nil {
			return nil, err
		}
		if largest == nil || b.Cmp(largest) > 0 {
			largest = b
		}
	}
	if largest == nil {
		return nil, nil
	}
	w, err := newWalker(Up(f, largest))
	if err != nil {
		return nil, err
	}
	defer context.AfterFunc(ctx, func() { w.halt.Store(true) })()

	// One column for each bound, from the smallest.
	order := make([]int, len(bounds))
	for i := range order {
		order[i] = i
	}
	sort.SliceStable(order, func(i, j int) bool { return bounds[order[i]].Cmp(bounds[order[j]]) < 0 })
	columns := make([]column, len(bounds))
	for i, j := range order {
		columns[i].scale = w.scale.upTo(bounds[j])
	}
	group := len(f.Symmetries())

	// Near the base every slope is looked at.
	edges := w.near(func(at coords, n *big.Int) {
		i := sort.Search(len(columns), func(i int) bool { return n.Cmp(columns[i].scale.bound) <= 0 })
		if i == len(columns) {
			return // not reached: the walk stops at the largest bound
		}
		columns[i].near++
		p, q := at.p(), at.q()
		if max(p, -p, q) <= 2 {
			columns[i].orbits += int64(len(f.Orbit(at.slope())))
		} else {
			columns[i].orbits += int64(group)
		}
	})
	if w.halt.Load() {
		return nil, fmt.Errorf("survey: count: %w", context.Cause(ctx))
	}

	entries := make([]entry, len(edges))
	reach := int64(0)
	for i, e := range edges {
		entries[i] = w.enter(e)
		reach = max(reach, w.most/(entries[i].u.lo+entries[i].y1.lo))
	}
	mu := moebius(reach)
	far := make([][]int64, o.Workers) // by worker and column; sums of integers in any order
	err = pool(ctx, o.Workers, len(entries), func(worker, job int) error {
		if far[worker] == nil {
			far[worker] = make([]int64, len(columns))
		}
		for i := range columns {
			n, err := w.behindEntry(columns[i].scale, entries[job], mu)
			if err != nil {
				return err
			}
			if w.halt.Load() {
				return context.Cause(ctx)
			}
			far[worker][i] += n
		}
		return nil
	})
	if err != nil {
		return nil, fmt.Errorf("survey: count: %w", err)
	}
	rows := make([]Row, len(bounds))
	var near, orbits int64
	for i, j := range order {
		near, orbits = near+columns[i].near, orbits+columns[i].orbits
		sum := new(big.Int)
		for _, counts := range far {
			if counts != nil {
				sum.Add(sum, big.NewInt(counts[i]))
			}
		}
		all := new(big.Int).Mul(sum, big.NewInt(int64(group)))
		rows[j] = Row{
			Bound:  new(big.Int).Set(bounds[j]),
			Slopes: sum.Add(sum, big.NewInt(near)),
			All:    all.Add(all, big.NewInt(orbits)),
			X:      math.Ldexp(float64(columns[i].scale.sure), -int(w.shift)),
		}
	}
	return rows, nil
}

// column counts the slopes for one bound.
type column struct {
	scale        *scale
	near, orbits int64 // near the base, above the next smaller bound
}

// upTo returns the same units with another bound.
func (s *scale) upTo(bound *big.Int) *scale {
	c := *s
	c.bound = new(big.Int).Set(bound)
	c.sure, c.most = s.log(new(big.Int).Mul(s.k, bound))
	c.exact = &boundary{family: s.family, bound: c.bound}
	return &c
}

// near visits the slopes that are kept exactly and returns the settled edges
// at which the rest begins.
func (w *walker) near(visit func(at coords, n *big.Int)) (edges []edge) {
	arcs, roots := w.base()
	for _, a := range arcs {
		if w.constraints.has(a.v.at) && !w.beyond(a.n) {
			visit(a.v.at, a.n)
		}
	}
	stack := slices.Clone(roots[:])
	for len(stack) > 0 && !w.halt.Load() {
		e := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if w.constraints.skip(e.a.v.at, e.b.v.at) {
			continue
		}
		if w.settled(e.a.n, e.b.n, e.c.n) {
			edges = append(edges, e)
			continue
		}
		r := w.scale.front(e)
		if w.beyond(r.n) {
			continue
		}
		if w.constraints.has(r.v.at) {
			visit(r.v.at, r.n)
		}
		left, right := e.behind(r)
		stack = append(stack, right, left)
	}
	return edges
}

// behindEntry counts the slopes in front of a settled edge whose numbers are within
// the bound of s.
func (w *walker) behindEntry(s *scale, e entry, mu []int8) (int64, error) {
	if e.u.lo+e.y1.lo > s.most {
		return 0, nil
	}
	sure := primitive(e.u.hi, e.y1.hi, s.sure, mu)
	if most := primitive(e.u.lo, e.y1.lo, s.most, mu); most == sure {
		return sure, nil
	}
	// Some slopes lie so near to the bound that logarithms leave it open: those with m
	// between the two lines, for some n.
	count := sure
	for n := int64(1); n*e.y1.lo+e.u.lo <= s.most && !w.halt.Load(); n++ {
		first := max((s.sure-n*e.y1.hi)/e.u.hi, 0) // not before 1, should the quotient be negative
		for m := first + 1; m*e.u.lo+n*e.y1.lo <= s.most; m++ {
			at := coords(m)*e.u.at + coords(n)*e.y1.at
			if gcd(m, n) == 1 && s.exact.within(at.slope()) {
				count++
			}
		}
	}
	s.exact.mu.Lock()
	defer s.exact.mu.Unlock()
	return count, s.exact.err
}
