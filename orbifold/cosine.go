package orbifold

import (
	"errors"
	"fmt"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
)

// MaxCosineOrder is the largest order of a CosineRing.
const MaxCosineOrder = 1000

// MaxDecimals is the largest number of decimals of Cosine.Decimal.
const MaxDecimals = 100_000

// ErrCosine reports an order out of range, or the undefined element, which
// comes from mixing elements of different rings.
var ErrCosine = errors.New("not in the cosine ring")

// CosineRing is the ring Z[c] of real numbers with c = 2cos(π/n), exact. It
// holds the weights of orbifold points of order n and of every order that
// divides n, so that Eval gives the exact numbers of surfaces with such points.
// Orders 2 and 3 give the integers, with weights 0 and 1.
//
// It is a snake.Semiring of Cosine. The zero value is the ring of the integers
// (order 2).
type CosineRing struct{ r *cosines }

// cosines is what the elements of a ring share.
type cosines struct {
	n       int
	minimal []*big.Int // minimal polynomial of c without its leading 1, constant first
}

var cosinesOfOrderTwo = &cosines{2, []*big.Int{new(big.Int)}} // c = 0

// Cosine is an element of a CosineRing, a polynomial in c = 2cos(π/n) of degree
// below that of the ring. It is immutable; the zero value is 0, in any ring. An
// operation of a ring on elements of another gives the undefined
// element, on which everything else is undefined or an error.
type Cosine struct {
	r    *cosines   // nil for the zero value
	c    []*big.Int // coefficients, constant first, no zero at the end
	none bool       // undefined
}

// NewCosineRing returns the ring of 2cos(π/n), 2 ≤ n ≤ MaxCosineOrder; other
// orders are ErrCosine. Its degree over the integers is φ(2n)/2. Cost: O(n²) for
// each divisor of 2n.
//
// The minimal polynomials ψ_d of 2cos(2π/d) satisfy
// ∏_{d | 2n} ψ_d = C_{n+1} − C_{n−1} with C_k(x + 1/x) = x^k + x^−k, and likewise
// C_{s+1} − C_s for odd 2s + 1. Source: "The minimal polynomial of cos(2π/n)",
// Amer. Math. Monthly 100 (1993) (memory).
func NewCosineRing(n int) (CosineRing, error) {
	if n < 2 || n > MaxCosineOrder {
		return CosineRing{}, fmt.Errorf("orbifold: ring of 2cos(π/%d): want an order from 2 to %d: %w", n, MaxCosineOrder, ErrCosine)
	}
	p := minimalCosine(2*n, map[int][]*big.Int{})
	return CosineRing{&cosines{n, p[:len(p)-1]}}, nil
}

// minimalCosine returns the minimal polynomial of 2cos(2π/d), constant first.
func minimalCosine(d int, known map[int][]*big.Int) []*big.Int {
	if p, ok := known[d]; ok {
		return p
	}
	low := (d+1)/2 - 1 // s − 1 for d = 2s, s for d = 2s + 1
	p := chebyshev(d/2 + 1)
	for i, x := range chebyshev(low) {
		p[i].Sub(p[i], x)
	}
	for e := 1; e < d; e++ {
		if d%e == 0 {
			p = quotient(p, minimalCosine(e, known))
		}
	}
	known[d] = p
	return p
}

// chebyshev returns C_k with C_k(x + 1/x) = x^k + x^−k, k ≥ 0, constant first.
func chebyshev(k int) []*big.Int {
	a, b := []*big.Int{big.NewInt(2)}, []*big.Int{new(big.Int), big.NewInt(1)}
	for range k { // C_{i+1} = x·C_i − C_{i−1}
		next := make([]*big.Int, len(b)+1)
		for i := range next {
			next[i] = new(big.Int)
			if i > 0 {
				next[i].Set(b[i-1])
			}
			if i < len(a) {
				next[i].Sub(next[i], a[i])
			}
		}
		a, b = b, next
	}
	return a
}

// quotient divides p by a monic polynomial that divides it. It overwrites p.
func quotient(p, by []*big.Int) []*big.Int {
	d := len(by) - 1
	for i := len(p) - 1; i >= d; i-- {
		for j, x := range by[:d] {
			p[i-d+j].Sub(p[i-d+j], new(big.Int).Mul(p[i], x))
		}
	}
	return p[d:]
}

func (q CosineRing) ring() *cosines {
	if q.r == nil {
		return cosinesOfOrderTwo
	}
	return q.r
}

// Order returns n.
func (q CosineRing) Order() int { return q.ring().n }

// Degree returns the number of integer coordinates of an element, φ(2n)/2.
func (q CosineRing) Degree() int { return len(q.ring().minimal) }

// Zero returns 0.
func (q CosineRing) Zero() Cosine { return Cosine{r: q.ring()} }

// One returns 1.
func (q CosineRing) One() Cosine { return q.Integer(unit) }

// Integer returns the integer x as an element; nil counts as 0.
func (q CosineRing) Integer(x *big.Int) Cosine {
	if x == nil {
		return q.Zero()
	}
	return q.ring().element([]*big.Int{new(big.Int).Set(x)})
}

// Weight returns 2cos(π/order), the weight of an orbifold point of that order,
// for an order ≥ 2 that divides the order of the ring, or 2 or 3, whose weights
// are 0 and 1; else the error is ErrCosine.
func (q CosineRing) Weight(order int) (Cosine, error) {
	n := q.Order()
	switch {
	case order == 2:
		return q.Zero(), nil
	case order == 3:
		return q.One(), nil
	case order < 2 || n%order != 0:
		return Cosine{}, fmt.Errorf("orbifold: weight of order %d in the ring of 2cos(π/%d): want 2, 3 or a divisor of %d above 1: %w", order, n, n, ErrCosine)
	}
	return q.ring().element(chebyshev(n / order)), nil
}

// element reduces a polynomial in c, which it takes over.
func (r *cosines) element(p []*big.Int) Cosine {
	d := len(r.minimal)
	for i := len(p) - 1; i >= d; i-- {
		if p[i].Sign() != 0 {
			for j, x := range r.minimal {
				p[i-d+j].Sub(p[i-d+j], new(big.Int).Mul(p[i], x))
			}
		}
	}
	p = p[:min(len(p), d)]
	for len(p) > 0 && p[len(p)-1].Sign() == 0 {
		p = p[:len(p)-1]
	}
	return Cosine{r: r, c: p}
}

// both tells whether an operation on a and b is defined in the ring.
func (q CosineRing) both(a, b Cosine) bool {
	fits := func(x Cosine) bool { return !x.none && (x.r == nil || x.r.n == q.Order()) }
	return fits(a) && fits(b)
}

// Add returns a + b.
func (q CosineRing) Add(a, b Cosine) Cosine { return q.combine(a, b, (*big.Int).Add) }

// Sub returns a − b.
func (q CosineRing) Sub(a, b Cosine) Cosine { return q.combine(a, b, (*big.Int).Sub) }

func (q CosineRing) combine(a, b Cosine, op func(z, x, y *big.Int) *big.Int) Cosine {
	if !q.both(a, b) {
		return Cosine{none: true}
	}
	sum := make([]*big.Int, max(len(a.c), len(b.c)))
	for i := range sum {
		sum[i] = op(new(big.Int), a.at(i), b.at(i))
	}
	return q.ring().element(sum)
}

// Mul returns a·b.
func (q CosineRing) Mul(a, b Cosine) Cosine {
	if !q.both(a, b) {
		return Cosine{none: true}
	}
	if len(a.c) == 0 || len(b.c) == 0 {
		return q.Zero()
	}
	product := make([]*big.Int, len(a.c)+len(b.c)-1)
	for i := range product {
		product[i] = new(big.Int)
	}
	for i, x := range a.c {
		for j, y := range b.c {
			product[i+j].Add(product[i+j], contfrac.Product(x, y))
		}
	}
	return q.ring().element(product)
}

func (x Cosine) at(i int) *big.Int {
	if i < len(x.c) {
		return x.c[i]
	}
	return new(big.Int)
}

// Defined tells whether x is an element of a ring; false for the undefined
// element.
func (x Cosine) Defined() bool { return !x.none }

// Equal tells whether x and y are the same element of the same ring. Elements
// of different rings are equal only when both are the same integer.
func (x Cosine) Equal(y Cosine) bool {
	if x.none || y.none || len(x.c) != len(y.c) {
		return false
	}
	for i := range x.c {
		if x.c[i].Cmp(y.c[i]) != 0 {
			return false
		}
	}
	return len(x.c) <= 1 || x.r.n == y.r.n
}

// Coordinates returns the coefficients of 1, c, c², …, without zeros at the end.
func (x Cosine) Coordinates() []*big.Int {
	c := make([]*big.Int, len(x.c))
	for i := range c {
		c[i] = new(big.Int).Set(x.c[i])
	}
	return c
}

// Sign returns −1, 0 or +1, certain: 0 exactly when all coordinates are, else by
// enclosures of increasing precision. The undefined element is ErrCosine.
func (x Cosine) Sign() (int, error) {
	if x.none {
		return 0, x.undefined("sign")
	}
	if len(x.c) == 0 {
		return 0, nil
	}
	for prec := uint(64); ; prec *= 2 {
		if v, e := x.fixed(prec); v.CmpAbs(e) > 0 {
			return v.Sign(), nil
		}
	}
}

// Cmp compares two elements of one ring as real numbers. Elements of different
// rings and the undefined one are ErrCosine.
func (x Cosine) Cmp(y Cosine) (int, error) {
	r := x.r
	if r == nil {
		r = y.r
	}
	return CosineRing{r}.Sub(x, y).Sign()
}

// Decimal returns the value with the given number of decimals, 0 … MaxDecimals,
// correctly rounded, halves (which only integers over 2 could be, so none)
// never. Other numbers of decimals and the undefined element are ErrCosine.
func (x Cosine) Decimal(decimals int) (string, error) {
	if x.none {
		return "", x.undefined("decimals")
	}
	if decimals < 0 || decimals > MaxDecimals {
		return "", fmt.Errorf("orbifold: %d decimals: want 0 to %d: %w", decimals, MaxDecimals, ErrCosine)
	}
	scale := new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(decimals)), nil)
	for prec := uint(64 + scale.BitLen()); ; prec *= 2 {
		v, e := x.fixed(prec)
		lo := rounded(new(big.Int).Sub(v, e), scale, prec)
		if lo.Cmp(rounded(new(big.Int).Add(v, e), scale, prec)) == 0 {
			return new(big.Rat).SetFrac(lo, scale).FloatString(decimals), nil
		}
	}
}

// rounded returns v·scale/2^prec rounded to the nearest integer.
func rounded(v, scale *big.Int, prec uint) *big.Int {
	v.Mul(v, scale)
	v.Add(v, new(big.Int).Lsh(unit, prec-1))
	return v.Rsh(v, prec)
}

func (x Cosine) undefined(what string) error {
	return fmt.Errorf("orbifold: %s of the undefined element, which comes from mixing rings: %w", what, ErrCosine)
}

// fixed returns v and e with |x − v/2^prec| ≤ e/2^prec, by Horner's rule at an
// enclosure of c. With |c| ≤ 2 known to a unit, one step v ← v·c + a turns an
// error e into at most |v|/2^prec + 1 + 2e, and rounding adds 1.
func (x Cosine) fixed(prec uint) (v, e *big.Int) {
	v, e = new(big.Int), new(big.Int)
	if len(x.c) <= 1 {
		return v.Lsh(x.at(0), prec), e
	}
	c := cosineFixed(x.r.n, prec)
	size, three := new(big.Int), big.NewInt(3)
	for i := len(x.c) - 1; i >= 0; i-- {
		size.Abs(v).Rsh(size, prec)
		e.Lsh(e, 1).Add(e, size).Add(e, three)
		v.Mul(v, c).Rsh(v, prec)
		v.Add(v, new(big.Int).Lsh(x.c[i], prec))
	}
	return v, e
}

// cosineFixed returns an integer within 1 of 2^prec·2cos(π/n), n ≥ 2, by the
// power series of the cosine. With g extra bits each of fewer than prec + g
// terms is off by less than 4 units, the angle by 2 and its effect on the cosine by no more.
func cosineFixed(n int, prec uint) *big.Int {
	w := prec + 8 + uint(big.NewInt(int64(prec)+64).BitLen())
	x := piFixed(w)
	x.Quo(x, big.NewInt(int64(n)))
	square := new(big.Int).Mul(x, x)
	square.Rsh(square, w)
	term := new(big.Int).Lsh(unit, w)
	sum := new(big.Int).Set(term)
	for k := int64(1); term.Sign() != 0; k += 2 {
		term.Mul(term, square).Rsh(term, w)
		term.Quo(term, big.NewInt(k*(k+1)))
		if k&2 == 0 {
			sum.Sub(sum, term)
		} else {
			sum.Add(sum, term)
		}
	}
	return roundShift(sum, w-prec-1)
}

// piFixed returns an integer within 1 of 2^w·π, by π = 16·arctan(1/5) −
// 4·arctan(1/239).
func piFixed(w uint) *big.Int {
	v := w + 8 + uint(big.NewInt(int64(w)+64).BitLen())
	sum := new(big.Int)
	for _, s := range [...]struct{ c, q int64 }{{16, 5}, {-4, 239}} {
		power := new(big.Int).Lsh(big.NewInt(s.c), v)
		power.Quo(power, big.NewInt(s.q))
		square, part := big.NewInt(s.q*s.q), new(big.Int)
		for k := int64(1); power.Sign() != 0; k += 2 {
			part.Quo(power, big.NewInt(k))
			if k&2 == 0 {
				sum.Add(sum, part)
			} else {
				sum.Sub(sum, part)
			}
			power.Quo(power, square)
		}
	}
	return roundShift(sum, v-w)
}

// String writes the element as a polynomial in c = 2cos(π/n), constant first:
// "5 + 4c + c^2". The undefined element is "undefined".
func (x Cosine) String() string { return x.text((*big.Int).String) }

// Format writes the element whole for %s, and its coordinates shortened for %v.
func (x Cosine) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, x.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(s, x.String())
}

func (x Cosine) text(number func(*big.Int) string) string {
	if x.none {
		return "undefined"
	}
	var b strings.Builder
	for i, c := range x.c {
		if c.Sign() == 0 {
			continue
		}
		switch {
		case b.Len() == 0 && c.Sign() < 0:
			b.WriteString("-")
		case b.Len() > 0 && c.Sign() < 0:
			b.WriteString(" - ")
		case b.Len() > 0:
			b.WriteString(" + ")
		}
		if size := new(big.Int).Abs(c); i == 0 || size.Cmp(unit) != 0 {
			b.WriteString(number(size))
		}
		if i > 0 {
			b.WriteString("c")
		}
		if i > 1 {
			fmt.Fprintf(&b, "^%d", i)
		}
	}
	if b.Len() == 0 {
		return "0"
	}
	return b.String()
}
