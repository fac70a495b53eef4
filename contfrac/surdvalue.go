package contfrac

import (
	"fmt"
	"math/big"
	"strings"
)

// MaxPrecision bounds the precision, in bits, of the enclosures of a Surd.
const MaxPrecision = 1 << 22

// Decimal returns x in decimal with the given number of digits after the point, correctly rounded
// to the nearest; ties do not exist. Fewer than 0 digits give ErrTerm, more than MaxDigits
// ErrTooLarge. It costs one square root of twice as many digits.
func (x Surd) Decimal(digits int) (string, error) {
	if digits < 0 {
		return "", fmt.Errorf("contfrac: decimal with %d digits: at least 0 are accepted: %w", digits, ErrTerm)
	}
	if digits > MaxDigits {
		return "", fmt.Errorf("contfrac: decimal with %d digits: at most %d are accepted: %w", digits, MaxDigits, ErrTooLarge)
	}
	// ⌊10ⁿx + 1/2⌋ = ⌊(2·10ⁿP + Q + √(4·10²ⁿD))/2Q⌋.
	e := x.parts()
	scale := powerOfTen(digits)
	scale.Lsh(scale, 1)
	p := Product(scale, e.p)
	p.Add(p, e.q)
	root := new(big.Int).Sqrt(Product(Product(scale, scale), e.d))
	n := floorRoot(p, new(big.Int).Lsh(e.q, 1), root)
	sign := ""
	if n.Sign() < 0 {
		sign = "-"
		n.Neg(n)
	}
	s := n.String()
	if digits == 0 {
		return sign + s, nil
	}
	if len(s) <= digits {
		s = strings.Repeat("0", digits+1-len(s)) + s
	}
	return sign + s[:len(s)-digits] + "." + s[len(s)-digits:], nil
}

// Enclosure returns lo < x < hi with hi − lo ≤ 2^(1−prec)·|x|. The ends are neighbours among the
// numbers of prec bits, 1 … MaxPrecision: 0 gives ErrTerm and more ErrTooLarge. It costs one
// square root of about 2·prec bits, or of the size of D.
func (x Surd) Enclosure(prec uint) (lo, hi *big.Float, err error) {
	if prec == 0 {
		return nil, nil, fmt.Errorf("contfrac: enclosure of 0 bits: 1 … %d are accepted: %w", MaxPrecision, ErrTerm)
	}
	if prec > MaxPrecision {
		return nil, nil, fmt.Errorf("contfrac: enclosure of %d bits: at most %d are accepted: %w", prec, MaxPrecision, ErrTooLarge)
	}
	if x.Sign() < 0 {
		lo, hi = x.neg().enclosure(prec)
		return hi.Neg(hi), lo.Neg(lo), nil
	}
	lo, hi = x.enclosure(prec)
	return lo, hi, nil
}

// enclosure is Enclosure for x > 0.
func (x Surd) enclosure(prec uint) (lo, hi *big.Float) {
	// n = ⌊2ᵏx⌋ with a few bits more than asked for, and then with as many.
	k := int(prec) + 4 - x.exponent()
	n := x.floorShifted(k)
	drop := n.BitLen() - int(prec)
	n.Rsh(n, uint(drop))
	k -= drop
	end := func(n *big.Int) *big.Float {
		f := new(big.Float).SetPrec(prec).SetInt(n)
		return f.SetMantExp(f, -k)
	}
	lo = end(n)
	return lo, end(n.Add(n, oneInt))
}

// neg returns −x.
func (x Surd) neg() Surd {
	e := x.parts()
	return Surd{e: &surd{p: e.p, d: e.d, q: new(big.Int).Neg(e.q), root: e.root}}
}

// exponent returns an e with 2^(e−3) < |x| < 2^(e+3).
func (x Surd) exponent() int {
	e := x.parts()
	sum := new(big.Int).Abs(e.p)
	sum.Add(sum, e.root)
	if e.p.Sign() >= 0 {
		return sum.BitLen() - e.q.BitLen()
	}
	// P + √D = (D − P²)/(√D − P).
	return e.cofactor().BitLen() - sum.BitLen()
}

// floorShifted returns ⌊2ᵏx⌋ for any k.
func (x Surd) floorShifted(k int) *big.Int {
	e := x.parts()
	if k < 0 {
		n := x.Floor()
		return n.Rsh(n, uint(-k))
	}
	root := new(big.Int).Lsh(e.d, 2*uint(k))
	return floorRoot(new(big.Int).Lsh(e.p, uint(k)), e.q, root.Sqrt(root))
}

// ApproximationConstant returns q·|q·x − p|, which tells how well p/q approximates x: the smaller
// the better for its size. It is below 1/√5 for infinitely many p/q, and the lower limit over all
// of them is 1/L for the Lagrange value L of x. A q under 1, or nil, gives ErrTerm.
func (x Surd) ApproximationConstant(p, q *big.Int) (Surd, error) {
	if p == nil || q == nil || q.Sign() <= 0 {
		return Surd{}, fmt.Errorf("contfrac: approximation with denominator %s: at least 1 is accepted: %w", Abbreviate(q), ErrTerm)
	}
	qq := Product(q, q)
	pq := Product(p, q)
	y := x.apply(entries{qq, pq.Neg(pq), new(big.Int), oneInt}, qq)
	if y.Sign() < 0 {
		y = y.neg()
	}
	return y, nil
}
