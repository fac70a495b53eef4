package linear

import (
	"fmt"
	"math/big"
	"strconv"
	"strings"

	"example.com/onecusp/contfrac"
)

// Polynomial is a polynomial in one variable with rational coefficients: the
// characteristic polynomial of a recurrence, a side of a generating function.
// It is immutable; the zero value is 0.
type Polynomial struct {
	c []*big.Rat // by exponent; the last one is not zero
}

// NewPolynomial returns c₀ + c₁·x + c₂·x² + … for the coefficients in this
// order. A nil coefficient counts as 0.
func NewPolynomial(coefficients ...*big.Rat) Polynomial {
	c := make([]*big.Rat, len(coefficients))
	for i, x := range coefficients {
		if c[i] = new(big.Rat); x != nil {
			c[i].Set(x)
		}
	}
	return trimmed(c)
}

// PolynomialOf is NewPolynomial for machine integers.
func PolynomialOf(coefficients ...int64) Polynomial {
	c := make([]*big.Rat, len(coefficients))
	for i, x := range coefficients {
		c[i] = new(big.Rat).SetInt64(x)
	}
	return trimmed(c)
}

// trimmed takes c over, without zeros at the top.
func trimmed(c []*big.Rat) Polynomial {
	for len(c) > 0 && c[len(c)-1].Sign() == 0 {
		c = c[:len(c)-1]
	}
	return Polynomial{c}
}

// Degree returns the degree; −1 for the polynomial 0.
func (p Polynomial) Degree() int { return len(p.c) - 1 }

// Coefficient returns the coefficient of xⁱ; 0 outside 0 … Degree.
func (p Polynomial) Coefficient(i int) *big.Rat { return new(big.Rat).Set(p.at(i)) }

var noRat = new(big.Rat)

func (p Polynomial) at(i int) *big.Rat {
	if i < 0 || i >= len(p.c) {
		return noRat
	}
	return p.c[i]
}

// Coefficients returns the coefficients by exponent, Degree + 1 of them.
func (p Polynomial) Coefficients() []*big.Rat {
	c := make([]*big.Rat, len(p.c))
	for i := range c {
		c[i] = p.Coefficient(i)
	}
	return c
}

// IsIntegral tells whether all coefficients are integers.
func (p Polynomial) IsIntegral() bool {
	for _, c := range p.c {
		if !c.IsInt() {
			return false
		}
	}
	return true
}

// Equal tells whether two polynomials are the same.
func (p Polynomial) Equal(o Polynomial) bool {
	if len(p.c) != len(o.c) {
		return false
	}
	for i, c := range p.c {
		if c.Cmp(o.c[i]) != 0 {
			return false
		}
	}
	return true
}

// Eval returns the value at x; a nil x counts as 0.
func (p Polynomial) Eval(x *big.Rat) *big.Rat {
	y := new(big.Rat)
	if x == nil {
		return p.Coefficient(0)
	}
	for i := len(p.c) - 1; i >= 0; i-- {
		y.Mul(y, x).Add(y, p.c[i])
	}
	return y
}

// Mul returns the product, by the schoolbook method.
func (p Polynomial) Mul(o Polynomial) Polynomial {
	if len(p.c) == 0 || len(o.c) == 0 {
		return Polynomial{}
	}
	c := make([]*big.Rat, len(p.c)+len(o.c)-1)
	for i := range c {
		c[i] = new(big.Rat)
	}
	term := new(big.Rat)
	for i, a := range p.c {
		for j, b := range o.c {
			c[i+j].Add(c[i+j], term.Mul(a, b))
		}
	}
	return Polynomial{c} // the top is a product of two that are not zero
}

// quoRem returns p = q·d + r with r of lower degree than d, which is not 0.
func (p Polynomial) quoRem(d Polynomial) (q, r Polynomial) {
	rest := p.Coefficients()
	n := len(rest) - len(d.c)
	if n < 0 {
		return Polynomial{}, trimmed(rest)
	}
	c := make([]*big.Rat, n+1)
	lead := new(big.Rat).Inv(d.c[len(d.c)-1])
	term := new(big.Rat)
	for i := n; i >= 0; i-- {
		c[i] = new(big.Rat).Mul(rest[i+len(d.c)-1], lead)
		for j, b := range d.c {
			rest[i+j].Sub(rest[i+j], term.Mul(c[i], b))
		}
	}
	return trimmed(c), trimmed(rest)
}

// monic returns p over its leading coefficient; 0 stays 0.
func (p Polynomial) monic() Polynomial {
	if len(p.c) == 0 {
		return p
	}
	return p.scale(new(big.Rat).Inv(p.c[len(p.c)-1]))
}

// scale returns s·p for s ≠ 0.
func (p Polynomial) scale(s *big.Rat) Polynomial {
	c := make([]*big.Rat, len(p.c))
	for i, x := range p.c {
		c[i] = new(big.Rat).Mul(x, s)
	}
	return Polynomial{c}
}

// derivative returns p′.
func (p Polynomial) derivative() Polynomial {
	if len(p.c) < 2 {
		return Polynomial{}
	}
	c := make([]*big.Rat, len(p.c)-1)
	for i := range c {
		c[i] = new(big.Rat).Mul(p.c[i+1], new(big.Rat).SetInt64(int64(i)+1))
	}
	return Polynomial{c}
}

// reversed returns xⁿ·p(1/x), n ≥ Degree.
func (p Polynomial) reversed(n int) Polynomial {
	c := make([]*big.Rat, n+1)
	for i := range c {
		c[i] = p.Coefficient(n - i)
	}
	return trimmed(c)
}

// gcd returns the monic greatest common divisor, 0 for two zeros. Euclid's
// steps over Q swell, so they are made only when the same steps modulo a word
// prime do not settle that there is no common factor.
func (p Polynomial) gcd(o Polynomial) Polynomial {
	if p.coprimeModulo(o, 1<<61-1) {
		return PolynomialOf(1)
	}
	p, o = p.monic(), o.monic()
	for len(o.c) > 0 {
		_, r := p.quoRem(o)
		p, o = o, r.monic()
	}
	return p
}

// coprimeModulo tells whether p and o, not both 0, have no common factor
// modulo the prime m and keep their degrees there, which shows that they have
// none over Q.
func (p Polynomial) coprimeModulo(o Polynomial, m uint64) bool {
	x, ok1 := p.modulo(m)
	y, ok2 := o.modulo(m)
	if !ok1 || !ok2 {
		return false
	}
	r := field{m}
	for len(y) > 0 {
		inverse := inverseModulo(y[len(y)-1], m)
		for len(x) >= len(y) {
			f := r.mul(x[len(x)-1], inverse)
			shift := len(x) - len(y)
			for i, c := range y {
				x[shift+i] = r.sub(x[shift+i], r.mul(f, c))
			}
			for len(x) > 0 && x[len(x)-1] == 0 {
				x = x[:len(x)-1]
			}
		}
		x, y = y, x
	}
	return len(x) == 1
}

// modulo returns the coefficients modulo the prime m; false when a denominator
// or the leading coefficient vanishes there.
func (p Polynomial) modulo(m uint64) ([]uint64, bool) {
	c := make([]uint64, len(p.c))
	r := field{m}
	for i, x := range p.c {
		d := r.from(x.Denom())
		if d == 0 {
			return nil, false
		}
		c[i] = r.mul(r.from(x.Num()), inverseModulo(d, m))
	}
	return c, len(c) == 0 || c[len(c)-1] != 0
}

// inverseModulo returns 1/x modulo the prime m, for x not 0 there.
func inverseModulo(x, m uint64) uint64 {
	r := field{m}
	y := uint64(1)
	for e := m - 2; e > 0; e >>= 1 {
		if e&1 == 1 {
			y = r.mul(y, x)
		}
		x = r.mul(x, x)
	}
	return y
}

// String writes the polynomial in x, highest power first: "x² − 3x + 1".
func (p Polynomial) String() string { return p.Text("x") }

// Text writes the polynomial in a variable of that name, highest power first.
func (p Polynomial) Text(variable string) string { return p.text(variable, (*big.Int).String, false) }

// Format writes the polynomial whole for %s, and with long coefficients
// shortened for %v.
func (p Polynomial) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, p.text("x", contfrac.Abbreviate, false))
		return
	}
	fmt.Fprint(s, p.String())
}

// text writes the polynomial, lowest power first when rising is set.
func (p Polynomial) text(variable string, integer func(*big.Int) string, rising bool) string {
	var sum sumText
	for i := range p.c {
		e := len(p.c) - 1 - i
		if rising {
			e = i
		}
		sum.add(p.c[e], integer, powerText(variable, e))
	}
	return sum.String()
}

// powerText writes vᵉ; nothing for e = 0.
func powerText(v string, e int) string {
	switch e {
	case 0:
		return ""
	case 1:
		return v
	}
	return v + superscript(e)
}

// sumText writes a sum of multiples of symbols, "2x² − x + 1/2".
type sumText struct{ b strings.Builder }

// add adds c times the symbol; the symbol "" stands for 1.
func (s *sumText) add(c *big.Rat, integer func(*big.Int) string, symbol string) {
	if c.Sign() == 0 {
		return
	}
	switch {
	case s.b.Len() == 0 && c.Sign() < 0:
		s.b.WriteString("−")
	case s.b.Len() > 0 && c.Sign() < 0:
		s.b.WriteString(" − ")
	case s.b.Len() > 0:
		s.b.WriteString(" + ")
	}
	abs := new(big.Rat).Abs(c)
	one := abs.IsInt() && abs.Num().IsInt64() && abs.Num().Int64() == 1
	if !one || symbol == "" {
		s.b.WriteString(integer(abs.Num()))
		if !abs.IsInt() {
			s.b.WriteString("/" + integer(abs.Denom()))
			if symbol != "" {
				s.b.WriteString("·")
			}
		}
	}
	s.b.WriteString(symbol)
}

// String returns the sum; "0" when it has no terms.
func (s *sumText) String() string {
	if s.b.Len() == 0 {
		return "0"
	}
	return s.b.String()
}

// superscript writes an exponent.
func superscript(k int) string {
	digits := []rune("⁰¹²³⁴⁵⁶⁷⁸⁹")
	return strings.Map(func(c rune) rune {
		if c == '-' {
			return '⁻'
		}
		return digits[c-'0']
	}, strconv.Itoa(k))
}
