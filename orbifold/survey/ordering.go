package survey

import (
	"cmp"
	"context"
	"fmt"
	"math"
	"math/big"
	"slices"
	"sync"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// MaxPoints is the number of lattice points that an Ordering may have.
const MaxPoints = 1 << 24

// Ordering is a set of lattice vectors (q, p) with numbers at them, whose order
// is to be compared with directions in the lattice.
//
// By default the vectors are the primitive (q, p) with q > 0 and (0, 1), and the
// number is that of the slope p/q. With Index set they are those with 0 < p < q and the number is
// that of Frobenius index p/q, at the slope p/(p+q).
//
// With Multiples set, all multiples n·v, n ≥ 1, of primitive ones belong, with Index
// those with 0 ≤ p ≤ q: m_{n·v} follows from m_v by m_0 = 0, m_{(n+1)·v} = 3·m_v·m_{n·v} − m_{(n−1)·v}
// ("On the Markov numbers: fixed numerator, denominator, and sum conjectures", Adv. Appl.
// Math. 130 (2021)); that is for weights (0,0,0) only, else ErrRegion.
type Ordering struct {
	Family    orbifold.Family
	Index     bool
	Multiples bool
	Num, Den  int64 // |p| ≤ Num and q ≤ Den
	Norm      int64 // p² + q² ≤ Norm², if not 0
}

// Step is a pair of vectors of an ordering, the second one the next in some direction.
type Step struct {
	From, To farey.Point // X is q, Y is p
	Order    int         // +1 if the number grows, 0 if it stays, −1 if it falls
}

// Trend is what happens along one direction: on every line that has it, each vector
// is compared with the next one that belongs to the ordering.
type Trend struct {
	Direction   farey.Point
	Rises, Ties int64
	Falls       int64
	Exceptions  []Step // the rarer of rises and falls, and all ties, by X, then Y of From
}

// Rising tells whether the number grows at every step, and there is one.
func (t Trend) Rising() bool { return t.Rises > 0 && t.Falls == 0 && t.Ties == 0 }

// Falling tells whether the number falls at every step, and there is one.
func (t Trend) Falling() bool { return t.Falls > 0 && t.Rises == 0 && t.Ties == 0 }

// Extremes says how far monotone directions reach. Directions are compared by
// slope Y/X, (0, 1) as the largest.
type Extremes struct {
	Trends []Trend // by increasing slope, directions without any step left out

	// Rising is the first direction from which on all numbers rise; Falling the last one up to
	// which all fall; each false when there is none.
	Rising, Falling       farey.Point
	AnyRising, AnyFalling bool
}

// Directions returns the primitive vectors (X, Y) with 0 ≤ X ≤ max and |Y| ≤ max,
// Y = 1 for X = 0, by increasing slope; none for max < 1, and at most MaxPoints.
func Directions(max int64) []farey.Point {
	if max < 1 || max > 2048 {
		return nil
	}
	slopes, err := farey.Box(max, max)
	if err != nil {
		return nil
	}
	var list []farey.Point
	for s := range slopes {
		p, q, _ := s.Int64s()
		list = append(list, farey.Point{X: q, Y: p})
	}
	return list
}

// values are the points of an ordering with enclosures of their logarithms.
type values struct {
	Ordering
	lo, hi []float64 // by q, then p; NaN outside

	mu    sync.Mutex
	exact map[farey.Point]*big.Int
}

func (o Ordering) check() error {
	refuse := func(what string) error {
		return fmt.Errorf("survey: ordering of %v: %s: %w", o.Family, what, ErrRegion)
	}
	if o.Num < 0 || o.Den < 1 || o.Num > MaxBox/2 || o.Den > MaxBox/2 || (2*o.Num+1)*(o.Den+1) > MaxPoints {
		return refuse(fmt.Sprintf("box of %d by %d: want a q of at least 1 and at most %d points", o.Num, o.Den, MaxPoints))
	}
	if o.Norm < 0 || o.Norm > MaxBox {
		return refuse(fmt.Sprintf("norm %d: want 0 … %d", o.Norm, MaxBox))
	}
	if o.Multiples && [3]int64{o.Family.Weight(0), o.Family.Weight(1), o.Family.Weight(2)} != [3]int64{} {
		return refuse("vectors that are not primitive have numbers for weights (0,0,0) only")
	}
	return nil
}

// place is the index of a point in the table, −1 for points outside the box.
func (o Ordering) place(v farey.Point) int {
	if v.X < 0 || v.X > o.Den || v.Y > o.Num || v.Y < -o.Num || o.Index && (v.Y < 0 || v.Y > v.X) {
		return -1
	}
	if n := o.Norm; n != 0 && v.X*v.X+v.Y*v.Y > n*n {
		return -1
	}
	return int(v.X*(2*o.Num+1) + v.Y + o.Num)
}

// slope returns the slope at whose number a primitive point has.
func (o Ordering) slope(v farey.Point) farey.Slope {
	if o.Index {
		v.X += v.Y
	}
	return pack(v.Y, v.X).slope()
}

// table fills in the values.
func (o Ordering) table(ctx context.Context) (*values, error) {
	if err := o.check(); err != nil {
		return nil, err
	}
	v := &values{Ordering: o, exact: make(map[farey.Point]*big.Int)}
	size := (2*o.Num + 1) * (o.Den + 1)
	v.lo, v.hi = make([]float64, size), make([]float64, size)
	for i := range v.lo {
		v.lo[i], v.hi[i] = math.NaN(), math.NaN()
	}
	r := Region{Family: o.Family, Box: &Box{Num: max(o.Num, 1), Den: o.Den}, All: true}
	if o.Index {
		r.Box.Den += o.Num
		r.Among = &Interval{Lo: farey.Slope{}, Hi: farey.MustParse("1/2")}
	}
	var failure error
	err := Walk(ctx, r, func(visit *Visit) bool {
		u := farey.Point{X: visit.Den(), Y: visit.Num()}
		if o.Index {
			u.X -= u.Y
		}
		lo, hi := visit.Log()
		failure = v.ray(u, lo, hi)
		return failure == nil
	})
	if err == nil {
		err = failure
	}
	return v, err
}

// ray fills in the values at a primitive point and its multiples.
func (v *values) ray(u farey.Point, lo, hi float64) error {
	boundary := v.Index && (u.Y == 0 || u.Y == u.X)
	if i := v.place(u); i >= 0 && (v.Multiples || !boundary) {
		v.lo[i], v.hi[i] = lo, hi
	}
	if !v.Multiples {
		return nil
	}
	// m_{n·u} = m·U_n for U_n = (λⁿ − λ⁻ⁿ)/(λ − λ⁻¹) = λ^(n−1)·(1 + λ⁻² + … + λ^(2−2n)).
	// Past m = 2⁶⁰, ln λ = ln 3m and the bracket is 1 to double precision.
	flo, fhi := lo+math.Log(3), hi+math.Log(3)
	if hi < 41 {
		m, err := v.Family.Number(v.slope(u))
		if err != nil {
			return err
		}
		l, h, err := orbifold.LogUnit(m.Mul(m, big.NewInt(3)), 60)
		if err != nil {
			return err
		}
		flo, _ = l.Float64()
		fhi, _ = h.Float64()
	}
	bracket, power := 1.0, 1.0
	for n := int64(2); n*u.X <= v.Den && max(n*u.Y, -n*u.Y) <= v.Num; n++ {
		power *= math.Exp(-2 * flo)
		bracket += power
		// Each of the few operations is off by some units of the last place, and
		// math.Exp and math.Log by less than ten.
		x := float64(n-1)*flo + math.Log(bracket) + lo
		y := float64(n-1)*fhi + math.Log(bracket) + hi
		if i := v.place(farey.Point{X: n * u.X, Y: n * u.Y}); i >= 0 {
			v.lo[i], v.hi[i] = x-1e-12-x*1e-14, y+1e-12+y*1e-14
		}
	}
	return nil
}

// number computes the number at a point.
func (v *values) number(u farey.Point) (*big.Int, error) {
	v.mu.Lock()
	n := v.exact[u]
	v.mu.Unlock()
	if n != nil {
		return n, nil
	}
	g := gcd(u.X, u.Y)
	m, err := v.Family.Number(v.slope(farey.Point{X: u.X / g, Y: u.Y / g}))
	if err != nil {
		return nil, err
	}
	before, n := new(big.Int), new(big.Int).Set(m)
	for range g - 1 {
		next := new(big.Int).Mul(m, n)
		next.Mul(next, big.NewInt(3)).Sub(next, before)
		before, n = n, next
	}
	v.mu.Lock()
	defer v.mu.Unlock()
	if len(v.exact) < 1<<12 {
		v.exact[u] = n
	}
	return n, nil
}

func gcd(a, b int64) int64 {
	for b != 0 {
		a, b = b, a%b
	}
	return max(a, -a)
}

// compare compares the numbers at two points, exactly where logarithms leave it open.
func (v *values) compare(a, b farey.Point) (int, error) {
	i, j := v.place(a), v.place(b)
	switch {
	case v.hi[i] < v.lo[j]:
		return 1, nil
	case v.hi[j] < v.lo[i]:
		return -1, nil
	}
	if gcd(a.X, a.Y) == 1 && gcd(b.X, b.Y) == 1 {
		return v.Family.Compare(v.slope(b), v.slope(a))
	}
	m, err := v.number(a)
	if err != nil {
		return 0, err
	}
	n, err := v.number(b)
	if err != nil {
		return 0, err
	}
	return n.Cmp(m), nil
}

// along compares along one direction.
func (v *values) along(ctx context.Context, d farey.Point, most int) (Trend, error) {
	t := Trend{Direction: d}
	var rises, falls []Step
	for x := int64(0); x <= v.Den; x++ {
		if err := context.Cause(ctx); err != nil {
			return t, err
		}
		for y := -v.Num; y <= v.Num; y++ {
			a := farey.Point{X: x, Y: y}
			if i := v.place(a); i < 0 || math.IsNaN(v.lo[i]) {
				continue
			}
			b := a.Add(d)
			for {
				j := v.place(b)
				if j < 0 && (b.X > v.Den || b.Y > v.Num || b.Y < -v.Num) {
					break // past the box; a line may leave the cone or the disc and come back
				}
				if j >= 0 && !math.IsNaN(v.lo[j]) {
					order, err := v.compare(a, b)
					if err != nil {
						return t, err
					}
					s := Step{a, b, order}
					switch order {
					case 1:
						t.Rises++
						rises = keep(rises, s, most)
					case -1:
						t.Falls++
						falls = keep(falls, s, most)
					default:
						t.Ties++
						rises, falls = keep(rises, s, most), keep(falls, s, most)
					}
					break
				}
				b = b.Add(d)
			}
		}
	}
	if t.Rises >= t.Falls {
		t.Exceptions = falls
	} else {
		t.Exceptions = rises
	}
	if exceptions := min(t.Rises, t.Falls) + t.Ties; int64(len(t.Exceptions)) < exceptions {
		return t, fmt.Errorf("%d exceptions along (%d, %d): want at most %d: %w", exceptions, d.X, d.Y, most, ErrTooMany)
	}
	return t, nil
}

func keep(list []Step, s Step, most int) []Step {
	if len(list) < most {
		list = append(list, s)
	}
	return list
}

// Compare tells what happens along each of the directions, which have to be
// nonzero with terms below MaxBox; a direction and its opposite are the same, with X > 0 or Y > 0.
// Logarithms decide where they can, exact numbers elsewhere, ties included. More
// exceptions than o.Results along one direction are ErrTooMany.
func (r Ordering) Compare(ctx context.Context, directions []farey.Point, o Options) (Extremes, error) {
	o, err := o.normal()
	if err != nil {
		return Extremes{}, err
	}
	list := slices.Clone(directions)
	for i, d := range list {
		if d == (farey.Point{}) || max(d.X, -d.X, d.Y, -d.Y) > MaxBox {
			return Extremes{}, fmt.Errorf("survey: direction (%d, %d): want one other than 0 with terms up to %d: %w", d.X, d.Y, MaxBox, ErrOptions)
		}
		if d.X < 0 || d.X == 0 && d.Y < 0 {
			list[i] = farey.Point{X: -d.X, Y: -d.Y}
		}
	}
	slices.SortStableFunc(list, func(a, b farey.Point) int {
		if c := cmp.Compare(a.Y*b.X, b.Y*a.X); c != 0 {
			return c
		}
		return cmp.Compare(a.X+a.Y, b.X+b.Y)
	})
	list = slices.Compact(list)
	v, err := r.table(ctx)
	if err != nil {
		return Extremes{}, err
	}
	trends := make([]Trend, len(list))
	err = pool(ctx, o.Workers, len(list), func(_, job int) error {
		var err error
		trends[job], err = v.along(ctx, list[job], o.Results)
		return err
	})
	if err != nil {
		return Extremes{}, fmt.Errorf("survey: ordering: %w", err)
	}
	var e Extremes
	for _, t := range trends {
		if t.Rises+t.Falls+t.Ties > 0 {
			e.Trends = append(e.Trends, t)
		}
	}
	for i := len(e.Trends) - 1; i >= 0 && e.Trends[i].Rising(); i-- {
		e.Rising, e.AnyRising = e.Trends[i].Direction, true
	}
	for i := 0; i < len(e.Trends) && e.Trends[i].Falling(); i++ {
		e.Falling, e.AnyFalling = e.Trends[i].Direction, true
	}
	return e, nil
}
