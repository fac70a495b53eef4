package orbifold

import (
	"context"
	"errors"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

var (
	// ErrNotNeighbours reports two slopes that are not Farey neighbours. It is
	// the same value as in farey.
	ErrNotNeighbours = farey.ErrNotNeighbours

	// ErrStep reports a step of 0.
	ErrStep = errors.New("a step is an integer ≠ 0")
)

// Fan is the sequence of arcs round a fixed arc, the centre s: the neighbours
// of s in order, r_n = r₀ + n·s for every integer n, negative ones too. Slopes
// are added as vectors (numerator, denominator), with denominators ≥ 0 for s
// and r₀ and 1/0 as (1, 0); a vector and its negative are the same slope.
//
// By (X) the numbers y_n at r_n satisfy, with N and k the number and the weight
// of the centre and t = K·N − k ≥ 3 its trace,
//
//	y_{n+1} = t·y_n − c_n·N − y_{n−1},
//
// where c_n is the weight of the class of r_n, which depends on the parity of
// n alone. They are strictly convex, y_{n+1} + y_{n−1} > 2·y_n, and have a minimum;
// see Waist.
//
// A Fan is immutable. The zero value is the fan of the classical family about
// 0/1 through 1/0.
type Fan struct {
	family        Family
	centre, start farey.Slope // start equal to centre stands for 1/0
}

// Fan returns the fan about the slope centre with r₀ = through. The two have
// to be neighbours; else the error is ErrNotNeighbours.
func (f Family) Fan(centre, through farey.Slope) (Fan, error) {
	if !farey.Neighbours(centre, through) {
		return Fan{}, fmt.Errorf("orbifold: fan about %v through %v: want two Farey neighbours: %w", centre, through, ErrNotNeighbours)
	}
	return Fan{f, centre, through}, nil
}

// Family returns the family.
func (f Fan) Family() Family { return f.family }

// Centre returns the slope s that the fan goes round.
func (f Fan) Centre() farey.Slope { return f.centre }

// first returns r₀.
func (f Fan) first() farey.Slope {
	if f.start.Equal(f.centre) {
		return farey.Infinity.Slope()
	}
	return f.start
}

// Slope returns r_n; a nil n counts as 0.
func (f Fan) Slope(n *big.Int) farey.Slope {
	r := f.first()
	if n == nil || n.Sign() == 0 {
		return r
	}
	p := contfrac.Product(n, f.centre.Num())
	q := contfrac.Product(n, f.centre.Den())
	s, _ := farey.New(p.Add(p, r.Num()), q.Add(q, r.Den())) // a primitive vector
	return s
}

// Index returns the n with r_n = s; false when s is no neighbour of the
// centre, and for no other slope.
func (f Fan) Index(s farey.Slope) (*big.Int, bool) {
	d := farey.Det(s, f.centre)
	if d.CmpAbs(unit) != 0 {
		return nil, false
	}
	// For the vector s = r₀ + n·centre: det(r₀, s) = n·det(r₀, centre) and
	// det(s, centre) = det(r₀, centre); both change sign with s.
	return d.Mul(d, farey.Det(f.first(), s)), true
}

// Term returns the number at r_n, exact; a nil n counts as 0. Cost, limit and
// errors are those of Family.Number: O(log n) multiplications, no step by step.
func (f Fan) Term(n *big.Int) (*big.Int, error) { return f.family.Number(f.Slope(n)) }

// TermContext is Term that stops when ctx ends, with its error.
func (f Fan) TermContext(ctx context.Context, n *big.Int) (*big.Int, error) {
	return f.family.NumberContext(ctx, f.Slope(n))
}

// TermMod returns the number at r_n modulo m, in 0 … m−1, for n of any size; a
// nil n counts as 0, and a modulus below 1 is ErrModulus.
func (f Fan) TermMod(n, m *big.Int) (*big.Int, error) { return f.family.NumberMod(f.Slope(n), m) }

// Trace returns t = K·N − k of the centre. Errors are those of Family.Number.
func (f Fan) Trace() (*big.Int, error) { return f.family.Trace(f.centre) }

// Weights returns the weights of the classes of r_n for even and for odd n.
func (f Fan) Weights() (even, odd int64) {
	c := f.first().Class()
	return f.family.Weight(c), f.family.Weight(c.Third(f.centre.Class()))
}

// Waist returns the n for which r_n and r_{n+1} appear before all other arcs
// of the fan: the two Farey parents of the centre, or the two other base slopes
// for a base slope. The numbers grow strictly away from there on both sides,
// y_n < y_{n−1} < … and y_{n+1} < y_{n+2} < …, so that the least number of the fan
// is y_n or y_{n+1}.
func (f Fan) Waist() *big.Int {
	class := f.centre.Class()
	a, b := farey.Class((class+1)%3).Slope(), farey.Class((class+2)%3).Slope()
	if !f.centre.IsBase() {
		a, b, _ = f.centre.Parents()
	}
	i, _ := f.Index(a)
	j, _ := f.Index(b)
	if i.Cmp(j) > 0 {
		return j
	}
	return i
}

// Find returns the n with y_n = v, increasing: none, one or two, since the fan
// is strictly convex. A v below 1 is ErrNotPositive. Each side of the waist is
// searched by bounds on the sizes of O(log n) terms, without their values; only
// the few terms that are as long as v are computed.
func (f Fan) Find(v *big.Int) ([]*big.Int, error) {
	return f.FindContext(context.Background(), v)
}

// FindContext is Find that stops when ctx ends, with its error.
func (f Fan) FindContext(ctx context.Context, v *big.Int) ([]*big.Int, error) {
	if v == nil || v.Sign() <= 0 {
		return nil, fmt.Errorf("orbifold: arcs of a fan with number %s: %w", brief(v), ErrNotPositive)
	}
	ctx = contextOf(ctx)
	// Terms as long as v can be held, since v is.
	g := f
	g.family = f.family.WithLimit(max(f.family.Limit(), int64(v.BitLen())+64))
	waist := f.Waist()
	found, err := g.side(ctx, v, waist, big.NewInt(-1))
	if err != nil {
		return nil, err
	}
	right, err := g.side(ctx, v, new(big.Int).Add(waist, unit), unit)
	if err != nil {
		return nil, err
	}
	return append(found, right...), nil
}

// side returns the n = start + j·step, j ≥ 0, with y_n = v: at most one. The
// terms increase strictly with j.
func (f Fan) side(ctx context.Context, v, start, step *big.Int) ([]*big.Int, error) {
	at := func(j *big.Int) *big.Int {
		n := new(big.Int).Mul(j, step)
		return n.Add(n, start)
	}
	want := big.NewInt(int64(v.BitLen()))
	// reaches tells whether term j may be as long as v, passes whether it is
	// longer.
	size := func(j *big.Int) (reaches, passes bool, err error) {
		if err := ctx.Err(); err != nil {
			return false, false, fmt.Errorf("orbifold: arcs of a fan with number %s: %w", brief(v), err)
		}
		lo, hi, err := f.family.Bits(f.Slope(at(j)))
		if err != nil {
			return false, false, err
		}
		return hi.Cmp(want) >= 0, lo.Cmp(want) > 0, nil
	}
	// The term below is shorter than v, the term above may not be.
	below, above := big.NewInt(-1), new(big.Int)
	for {
		reaches, _, err := size(above)
		if err != nil {
			return nil, err
		}
		if reaches {
			break
		}
		below.Set(above)
		above.Add(above.Lsh(above, 1), unit)
	}
	for {
		mid := new(big.Int).Add(below, above)
		mid.Rsh(mid, 1)
		if mid.Cmp(below) == 0 {
			break
		}
		reaches, _, err := size(mid)
		if err != nil {
			return nil, err
		}
		if reaches {
			above = mid
		} else {
			below = mid
		}
	}
	for j := above; ; j = new(big.Int).Add(j, unit) {
		_, passes, err := size(j)
		if err != nil || passes {
			return nil, err
		}
		n := at(j)
		y, err := f.family.NumberContext(ctx, f.Slope(n))
		if err != nil {
			return nil, err
		}
		switch y.Cmp(v) {
		case 0:
			return []*big.Int{n}, nil
		case 1:
			return nil, nil
		}
	}
}

// String returns "fan of (0,0,0) about 0/1 through 1/0".
func (f Fan) String() string {
	return fmt.Sprintf("fan of %s about %s through %s", f.family, f.centre, f.first())
}

// Format writes the slopes whole for %s and shortened for %v.
func (f Fan) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprintf(s, "fan of %v about %v through %v", f.family, f.centre, f.first())
		return
	}
	fmt.Fprint(s, f.String())
}
