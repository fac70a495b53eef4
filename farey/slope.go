package farey

import (
	"cmp"
	"fmt"
	"math"
	"math/big"
	"math/bits"

	"example.com/onecusp/contfrac"
)

// Slope is a rational number p/q in lowest terms with q ≥ 0, or 1/0 (infinity).
// The zero value is 0/1.
//
// Slopes are not comparable with ==, because one with large terms is held by
// reference: use [Slope.Equal], or [Slope.Key] for map keys.
type Slope struct {
	_ [0]func()
	// The slope is p/(below+1) if large is nil. Keeping q−1 makes the zero value
	// 0/1 without a special case.
	p, below int64
	// large holds the terms if one of them is past ±(2⁶³−1), else nil, so that
	// equal slopes have equal representations.
	large *terms
}

// terms are p and q of a large slope; never modified once made.
type terms struct{ p, q *big.Int }

// New returns the slope p/q, reduced, for integers of any sign and size; q = 0 with
// p ≠ 0 gives 1/0. It fails with [ErrIndeterminate] for 0/0 and with [ErrNil] for a
// nil argument. Cost: one greatest common divisor, less than quadratic in the size.
func New(p, q *big.Int) (Slope, error) {
	if p == nil || q == nil {
		return Slope{}, fmt.Errorf("farey: slope of a nil numerator or denominator: two integers would be accepted: %w", ErrNil)
	}
	if fits(p) && fits(q) {
		return FromInts(p.Int64(), q.Int64())
	}
	return fromCoprime(reduce(p, q)), nil
}

// reduceBits is the size in bits of the lesser of two integers from which reduce
// takes their continued fraction rather than their greatest common divisor, which in
// math/big is quadratic; see BenchmarkReduce.
var reduceBits = 50_000

// reduce returns p/q, not 0/0, in lowest terms, of any sign.
func reduce(p, q *big.Int) (num, den *big.Int) {
	if min(p.BitLen(), q.BitLen()) >= reduceBits {
		fraction, _ := contfrac.FromRatio(p, q) // fails for 0/0 only
		return fraction.Ratio()
	}
	g := new(big.Int).GCD(nil, nil, new(big.Int).Abs(p), new(big.Int).Abs(q))
	return new(big.Int).Quo(p, g), new(big.Int).Quo(q, g)
}

// FromInts is [New] for machine integers. It fails with [ErrIndeterminate] for 0/0.
func FromInts(p, q int64) (Slope, error) {
	if p == 0 && q == 0 {
		return Slope{}, fmt.Errorf("farey: slope 0/0: a numerator or denominator other than 0 would be accepted: %w", ErrIndeterminate)
	}
	if p == math.MinInt64 || q == math.MinInt64 {
		return fromCoprime(reduce(big.NewInt(p), big.NewInt(q))), nil
	}
	a, b := abs(p), abs(q)
	for b != 0 {
		a, b = b, a%b
	}
	return fromCoprimeInts(p/a, q/a), nil
}

// fromCoprimeInts makes p/q from coprime terms of any sign, neither −2⁶³.
func fromCoprimeInts(p, q int64) Slope {
	if q < 0 || q == 0 && p < 0 {
		p, q = -p, -q
	}
	return Slope{p: p, below: q - 1}
}

// fromCoprime makes p/q from coprime terms of any sign; it keeps p and q.
func fromCoprime(p, q *big.Int) Slope {
	if fits(p) && fits(q) {
		return fromCoprimeInts(p.Int64(), q.Int64())
	}
	if q.Sign() < 0 {
		p, q = new(big.Int).Neg(p), new(big.Int).Neg(q)
	}
	return Slope{large: &terms{p, q}}
}

// fits reports whether x and −x are int64.
func fits(x *big.Int) bool { return x.IsInt64() && x.Int64() != math.MinInt64 }

func abs(x int64) int64 { return max(x, -x) }

// terms returns p and q for reading only: of a large slope they are its own.
func (s Slope) terms() (p, q *big.Int) {
	if s.large != nil {
		return s.large.p, s.large.q
	}
	return big.NewInt(s.p), big.NewInt(s.below + 1)
}

// Num returns the numerator p; it carries the sign, and is 1 for 1/0.
func (s Slope) Num() *big.Int {
	if s.large == nil {
		return big.NewInt(s.p)
	}
	return new(big.Int).Set(s.large.p)
}

// Den returns the denominator q ≥ 0; it is 0 for 1/0 only.
func (s Slope) Den() *big.Int {
	if s.large == nil {
		return big.NewInt(s.below + 1)
	}
	return new(big.Int).Set(s.large.q)
}

// Int64s returns numerator and denominator as machine integers. If one of them has
// absolute value above 2⁶³−1, ok is false and both are 0.
func (s Slope) Int64s() (p, q int64, ok bool) {
	if s.large != nil {
		return 0, 0, false
	}
	return s.p, s.below + 1, true
}

// Sign returns −1, 0 or 1 as the slope is negative, 0/1 or positive; 1/0 counts as
// positive.
func (s Slope) Sign() int {
	if s.large != nil {
		return s.large.p.Sign()
	}
	return cmp.Compare(s.p, 0)
}

// IsInfinite reports whether the slope is 1/0.
func (s Slope) IsInfinite() bool { return s.large == nil && s.below == -1 }

// IsBase reports whether the slope is a vertex of the base triangle: 0/1, 1/0 or 1/1.
func (s Slope) IsBase() bool {
	return s.large == nil && (s.p == 0 || s.p == 1 && s.below <= 0)
}

// Neg returns −p/q; 1/0 is its own negative.
func (s Slope) Neg() Slope {
	if s.IsInfinite() {
		return s
	}
	return s.linear(-1, 0, 0, 1)
}

// Cmp returns −1, 0 or 1 as s is less than, equal to or greater than t. 1/0 is
// greater than every other slope. Cost: two multiplications.
func (s Slope) Cmp(t Slope) int {
	// p/q < p'/q' exactly when p·q' < p'·q, also where one denominator is 0: that is
	// the sign of the determinant.
	if c := cmp.Compare(s.Sign(), t.Sign()); c != 0 {
		return c
	}
	if s.large == nil && t.large == nil {
		return s.Sign() * cmpProducts(s.p, t.below+1, t.p, s.below+1)
	}
	return Det(s, t).Sign()
}

// cmpProducts compares |a·b| with |c·d|.
func cmpProducts(a, b, c, d int64) int {
	h1, l1 := bits.Mul64(uint64(abs(a)), uint64(abs(b)))
	h2, l2 := bits.Mul64(uint64(abs(c)), uint64(abs(d)))
	return cmp.Or(cmp.Compare(h1, h2), cmp.Compare(l1, l2))
}

// Equal reports whether s and t are the same slope.
func (s Slope) Equal(t Slope) bool {
	if s.large == nil || t.large == nil {
		return s.large == nil && t.large == nil && s.p == t.p && s.below == t.below
	}
	return s.large.p.Cmp(t.large.p) == 0 && s.large.q.Cmp(t.large.q) == 0
}

// linear returns (a·p + b·q)/(c·p + d·q), for coefficients −1, 0, 1 of
// determinant ±1; these keep the terms coprime.
func (s Slope) linear(a, b, c, d int64) Slope {
	if p, q, ok := s.Int64s(); ok && isHalf(p) && isHalf(q) {
		return fromCoprimeInts(a*p+b*q, c*p+d*q)
	}
	p, q := s.terms()
	return fromCoprime(combine(a, p, b, q), combine(c, p, d, q))
}

// addVectors returns the slope of s + sign·t as vectors; s and t are neighbours,
// so that the terms come out coprime; sign is ±1.
func addVectors(s Slope, sign int64, t Slope) Slope {
	p, q, ok := s.Int64s()
	p2, q2, ok2 := t.Int64s()
	if ok && ok2 && isHalf(p) && isHalf(q) && isHalf(p2) && isHalf(q2) {
		return fromCoprimeInts(p+sign*p2, q+sign*q2)
	}
	a, b := s.terms()
	c, d := t.terms()
	return fromCoprime(combine(1, a, sign, c), combine(1, b, sign, d))
}

// isHalf reports whether |x| < 2⁶², so that two such add up without overflow.
func isHalf(x int64) bool { return abs(x) < 1<<62 }

// combine returns a·x + b·y for a, b in {−1, 0, 1}.
func combine(a int64, x *big.Int, b int64, y *big.Int) *big.Int {
	z := new(big.Int)
	for _, term := range []struct {
		sign int64
		of   *big.Int
	}{{a, x}, {b, y}} {
		switch term.sign {
		case 1:
			z.Add(z, term.of)
		case -1:
			z.Sub(z, term.of)
		}
	}
	return z
}
