package linear

import "math/big"

// Factor is a factor of a polynomial over Q.
type Factor struct {
	Polynomial   Polynomial // monic
	Multiplicity int        // ≥ 1
	Irreducible  bool       // known to be irreducible over Q; false means not examined
}

// Factors returns the polynomial, up to its leading coefficient, as a product
// of monic factors, as far as fans need it: x, x − 1 and x + 1 are split off,
// what is left is made square-free, and its parts of degree 2 are split when
// their discriminant is a square. A square-free part of degree 3 or more is
// left whole, with Irreducible false. The characteristic polynomials of fans
// and of every d-th term of one factor completely. The polynomials 0 and
// constants have no factors.
func (p Polynomial) Factors() []Factor {
	if p.Degree() < 1 {
		return nil
	}
	var factors []Factor
	rest := p.monic()
	for _, linear := range [...]Polynomial{PolynomialOf(0, 1), PolynomialOf(-1, 1), PolynomialOf(1, 1)} {
		n := 0
		for {
			q, r := rest.quoRem(linear)
			if r.Degree() >= 0 || rest.Degree() < 1 {
				break
			}
			rest, n = q, n+1
		}
		if n > 0 {
			factors = append(factors, Factor{linear, n, true})
		}
	}
	// The square-free parts: w is the product of the prime factors of
	// multiplicity n and more, c holds them n times less.
	c := rest.gcd(rest.derivative())
	w, _ := rest.quoRem(c)
	for n := 1; w.Degree() > 0; n++ {
		y := w.gcd(c)
		part, _ := w.quoRem(y)
		factors = append(factors, part.quadraticFactors(n)...)
		w = y
		c, _ = c.quoRem(y)
	}
	return factors
}

// quadraticFactors splits a monic square-free polynomial of degree at most 2.
func (p Polynomial) quadraticFactors(multiplicity int) []Factor {
	switch p.Degree() {
	case 0:
		return nil
	case 1:
		return []Factor{{p, multiplicity, true}}
	case 2:
		// x² + b·x + c, discriminant b² − 4c.
		b, c := p.at(1), p.at(0)
		d := new(big.Rat).Mul(b, b)
		d.Sub(d, new(big.Rat).Mul(big.NewRat(4, 1), c))
		root, ok := rationalRoot(d)
		if !ok {
			return []Factor{{p, multiplicity, true}}
		}
		half := big.NewRat(1, 2)
		lo := new(big.Rat).Sub(b, root)
		hi := new(big.Rat).Add(b, root)
		return []Factor{
			{NewPolynomial(lo.Mul(lo, half), big.NewRat(1, 1)), multiplicity, true},
			{NewPolynomial(hi.Mul(hi, half), big.NewRat(1, 1)), multiplicity, true},
		}
	}
	return []Factor{{p, multiplicity, false}}
}

// rationalRoot returns √x; false when it is not rational.
func rationalRoot(x *big.Rat) (*big.Rat, bool) {
	num, ok1 := integerRoot(x.Num())
	den, ok2 := integerRoot(x.Denom())
	if !ok1 || !ok2 {
		return nil, false
	}
	return new(big.Rat).SetFrac(num, den), true
}

// integerRoot returns √x; false when it is no integer.
func integerRoot(x *big.Int) (*big.Int, bool) {
	if x.Sign() < 0 {
		return nil, false
	}
	r := new(big.Int).Sqrt(x)
	return r, new(big.Int).Mul(r, r).Cmp(x) == 0
}
