package survey

import (
	"fmt"
	"math"
	"math/big"
	"sync"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// scale fixes the unit in which a walk keeps logarithms: lengths are integers
// in units of 2^−shift, so that sums are exact and only entries are rounded.
//
// # Why sums of integers enclose the logarithms
//
// Put φ = ln(K·N) for the number N of an arc, and f = ln λ for the unit λ of its
// trace. Section by section of the tree:
//
// Large arcs. For an edge (u, w) with both numbers at least 2^(shift+2),
// (X) gives φ_r = φ_u + φ_w + ln(1 − x) for the arc r in front,
// x = k_u/(K·N_u) + k_w/(K·N_w) + N_o/(K·N_u·N_w). The arc o behind has a number of
// at most the larger of the two, so 0 < x < 1/min(N_u, N_w), and φ_r lies below
// φ_u + φ_w by less than half a unit. Therefore, if a lower end keeps a distance
// of one unit or more, lo ≤ φ − 1, then lo_u + lo_w ≤ φ_r − 1 again; and hi ≥ φ gives
// hi_u + hi_w ≥ φ_r. Nothing is lost however deep the walk goes: the
// relative width of the enclosures stays that of the entries.
//
// Fans of small arcs. Let y₀, y₁, … be the fan about an arc u of any size,
// r_i = y_{i+1}/y_i, c_i the weight of y_i. Then r_i = t − c_i·N_u/y_i − 1/r_{i−1} and
// λ = t − 1/λ, so |r_i − λ| ≤ c_i·N_u/y_i + |r_{i−1} − λ|/(λ·r_{i−1}), and (E)
// says |r₀ − λ| ≤ (N_u² + N_u·(c₀·y₁ + c₁·y₀))/y₀². With r ≥ 2 all |ln(r_i/λ)|, i ≥ 1,
// sum up to less than |r₀ − λ| + 3·max(c)·N_u/y₁. Once y₀ ≥ (K·N_u)²·2^(shift+10)
// that is less than one unit, and from y₁ on the fan grows by f_u at each flip up to one
// unit in all. So an entry takes φ − 2 and φ + 1, rounded outward, for an arc
// that will be one of the y or large, and the enclosure of f_u for a small arc u in the
// middle: then f takes the place of φ in every sum. For large arcs they
// are the same up to far less than a unit.
//
// Edges of neither kind have small numbers, of some hundred bits; there the walk
// keeps the numbers exactly.
type scale struct {
	family orbifold.Family
	k      *big.Int
	shift  uint
	kLo    int64 // ln K
	kHi    int64
	sure   int64 // an arc with hi ≤ sure is within the bound
	most   int64 // an arc with lo > most is not
	bound  *big.Int
	exact  *boundary
}

// maxShift is the finest unit. A finer one makes the exact part of the walk
// larger, and nothing needs it.
const maxShift = 48

// unbounded stands for a bound that no length reaches: sums of two stay in range.
const unbounded = math.MaxInt64 / 2

func newScale(r Region) (*scale, error) {
	s := &scale{family: r.Family, k: r.Family.K(), sure: unbounded, most: unbounded}
	// An upper bound of all lengths in bits: φ is subadditive, so at p/q it is at
	// most (|p| + q)·ln K.
	limit := math.Inf(1)
	if r.Bound != nil {
		limit = float64(r.Bound.BitLen() + s.k.BitLen())
	}
	if b := r.Box; b != nil {
		limit = min(limit, float64((b.Num+b.Den+1)*int64(s.k.BitLen())))
	}
	// Twice the limit stays below 2⁶¹ units.
	s.shift = min(maxShift, uint(59-math.Ilogb(limit+1)))
	s.kLo, s.kHi = s.log(s.k)
	if r.Bound != nil {
		s.bound = new(big.Int).Set(r.Bound)
		s.sure, s.most = s.log(new(big.Int).Mul(s.k, s.bound))
		s.exact = &boundary{family: r.Family, bound: s.bound}
	}
	return s, nil
}

// log encloses ln n, in units.
func (s *scale) log(n *big.Int) (lo, hi int64) {
	l, h, err := orbifold.LogInteger(n, s.shift+4)
	if err != nil {
		return 0, unbounded // not reached: n ≥ 1
	}
	return s.units(l, h)
}

// unit encloses f = ln λ for the arc with number n and weight k, in units.
func (s *scale) unit(n *big.Int, k int64) (lo, hi int64) {
	t := new(big.Int).Mul(s.k, n)
	l, h, err := orbifold.LogUnit(t.Sub(t, big.NewInt(k)), s.shift+4)
	if err != nil {
		return 0, unbounded // not reached: t ≥ 3
	}
	return s.units(l, h)
}

// units rounds lo ≤ hi outward to integers of units; both are ≥ 0.
func (s *scale) units(lo, hi *big.Float) (int64, int64) {
	a, _ := new(big.Float).SetMantExp(lo, int(s.shift)).Int64()
	b, accuracy := new(big.Float).SetMantExp(hi, int(s.shift)).Int64()
	if accuracy != big.Exact && b < unbounded {
		b++
	}
	// A bound that a box keeps out of reach may be past all units.
	return min(a, unbounded), min(b, unbounded)
}

// nats converts the enclosure of a length φ to one of ln N = φ − ln K, outward.
func (s *scale) nats(lo, hi int64) (float64, float64) {
	l := math.Ldexp(math.Nextafter(float64(lo-s.kHi), math.Inf(-1)), -int(s.shift))
	h := math.Ldexp(math.Nextafter(float64(hi-s.kLo), math.Inf(1)), -int(s.shift))
	return max(l, 0), h
}

// settled tells whether in front of the edge u, w with o behind all lengths add up,
// as told above.
func (s *scale) settled(u, w, o *big.Int) bool {
	if u.Cmp(w) > 0 {
		u, w = w, u
	}
	if u.BitLen() >= int(s.shift)+3 {
		return true
	}
	return o.BitLen() >= 2*(u.BitLen()+s.k.BitLen())+int(s.shift)+11
}

// boundary decides the few cases that enclosures leave open.
type boundary struct {
	family orbifold.Family
	bound  *big.Int

	mu     sync.Mutex
	lo, hi [len(precisions)]*big.Float // of ln bound
	err    error                       // the first question that could not be decided
}

// precisions of logarithms to try before the number itself is computed.
var precisions = [...]uint{96, 192}

// within tells whether the number at the slope is at most the bound. It is
// safe for concurrent use.
func (b *boundary) within(s farey.Slope) bool {
	for i, bits := range precisions {
		b.mu.Lock()
		if b.lo[i] == nil {
			b.lo[i], b.hi[i], _ = orbifold.LogInteger(b.bound, bits) // bound ≥ 1
		}
		blo, bhi := b.lo[i], b.hi[i]
		b.mu.Unlock()
		lo, hi, err := b.family.LogBig(s, bits)
		if err != nil {
			break // not reached: the slope has 31-bit terms
		}
		switch {
		case hi.Cmp(blo) <= 0:
			return true
		case lo.Cmp(bhi) > 0:
			return false
		}
	}
	// The number has about as many bits as the bound, far below the limit of
	// any family that was not set lower on purpose.
	n, err := b.family.WithLimit(orbifold.DefaultLimit).Number(s)
	if err != nil {
		b.mu.Lock()
		b.err = fmt.Errorf("survey: number at %v near the bound: %w", s, err)
		b.mu.Unlock()
		return false
	}
	return n.Cmp(b.bound) <= 0
}

func low64(n *big.Int) uint64 {
	return new(big.Int).And(n, new(big.Int).SetUint64(math.MaxUint64)).Uint64()
}

func mod61(n *big.Int) uint64 {
	return new(big.Int).Mod(n, big.NewInt(mersenne)).Uint64()
}
