package linear

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// RationalFunction is a quotient of two polynomials in lowest terms, with a
// denominator of value 1 at 0: the generating function of a sequence with a
// linear recurrence. It is immutable; the zero value is 0.
type RationalFunction struct{ num, den Polynomial }

// lowestTerms returns num/den for den(0) ≠ 0.
func lowestTerms(num, den Polynomial) RationalFunction {
	g := num.gcd(den)
	num, _ = num.quoRem(g)
	den, _ = den.quoRem(g)
	s := new(big.Rat).Inv(den.at(0))
	return RationalFunction{num.scale(s), den.scale(s)}
}

// Numerator returns the numerator.
func (f RationalFunction) Numerator() Polynomial { return f.num }

// Denominator returns the denominator, of value 1 at 0.
func (f RationalFunction) Denominator() Polynomial {
	if f.den.Degree() < 0 {
		return PolynomialOf(1)
	}
	return f.den
}

// Equal tells whether two rational functions are the same.
func (f RationalFunction) Equal(g RationalFunction) bool {
	return f.num.Equal(g.num) && f.Denominator().Equal(g.Denominator())
}

// String writes both sides in x, lowest power first: "(1 − x)/(1 − 3x + x²)".
func (f RationalFunction) String() string { return f.text((*big.Int).String) }

// Format writes the function whole for %s, and with long coefficients
// shortened for %v.
func (f RationalFunction) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, f.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(s, f.String())
}

func (f RationalFunction) text(integer func(*big.Int) string) string {
	num := f.num.text("x", integer, true)
	if f.den.Degree() < 1 {
		return num
	}
	return "(" + num + ")/(" + f.den.text("x", integer, true) + ")"
}
