package spectrum

import (
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Value is a Lagrange value √(t² − 4)/N, exact. For weights (0,0,0) it is a point of the Lagrange
// and Markov spectra below 3. Values are immutable; compare them with Cmp. The zero value is √5,
// that of the golden ratio.
type Value struct {
	t, n *big.Int // nil for 3 and 1
}

// LagrangeValue returns the Lagrange value of the slope s: √(t² − 4)/N for its number N and trace
// t = K·N − k. It is the Lagrange value of both roots x of Form(f, s), the upper limit of
// 1/(q·|q·x − p|) over all fractions p/q, as N is the least value of the form: see there how far
// that is proved.
//
// Cost is that of f.Number. When four times the bits of N pass the limit of the family, the error
// is ErrTooLarge.
func LagrangeValue(f orbifold.Family, s farey.Slope) (Value, error) {
	lo, _, err := f.Bits(s)
	if err != nil {
		return Value{}, fmt.Errorf("spectrum: Lagrange value at %v: %w", s, err)
	}
	if lo.Lsh(lo, 2).Cmp(big.NewInt(f.Limit())) > 0 {
		return Value{}, fmt.Errorf("spectrum: Lagrange value at %v of %s bits: up to %d would be accepted: %w", s, short(lo), f.Limit(), ErrTooLarge)
	}
	n, err := f.Number(s)
	if err != nil {
		return Value{}, fmt.Errorf("spectrum: Lagrange value at %v: %w", s, err)
	}
	return Value{t: trace(f.K(), n, weight(f, s)), n: n}, nil
}

func (v Value) parts() (t, n *big.Int) {
	if v.n == nil {
		return big.NewInt(3), big.NewInt(1)
	}
	return v.t, v.n
}

// Trace returns t.
func (v Value) Trace() *big.Int {
	t, _ := v.parts()
	return new(big.Int).Set(t)
}

// Number returns N.
func (v Value) Number() *big.Int {
	_, n := v.parts()
	return new(big.Int).Set(n)
}

// Radicand returns t² − 4.
func (v Value) Radicand() *big.Int {
	t, _ := v.parts()
	d := contfrac.Product(t, t)
	return d.Sub(d, big.NewInt(4))
}

// Surd returns the value as a surd, in the lowest terms of type Surd.
func (v Value) Surd() contfrac.Surd {
	_, n := v.parts()
	x, _ := contfrac.NewSurd(new(big.Int), v.Radicand(), n) // t ≥ 3, so t² − 4 is positive and no square
	return x
}

// Constant returns 1/L = N/√(t² − 4), the approximation constant: the lower limit of q·|q·x − p|
// over all fractions p/q, for the irrationals x of the slope.
func (v Value) Constant() contfrac.Surd {
	_, n := v.parts()
	d := v.Radicand()
	x, _ := contfrac.NewSurd(new(big.Int), contfrac.Product(d, contfrac.Product(n, n)), d)
	return x
}

// Decimal returns the value in decimal with the given number of digits after the point, correctly
// rounded; limits and errors are those of contfrac.Surd.Decimal.
func (v Value) Decimal(digits int) (string, error) { return v.Surd().Decimal(digits) }

// Enclosure returns lo < L < hi, neighbours among the numbers of prec bits; limits and errors are
// those of contfrac.Surd.Enclosure.
func (v Value) Enclosure(prec uint) (lo, hi *big.Float, err error) { return v.Surd().Enclosure(prec) }

// Cmp returns −1, 0 or 1 as v is less than, equal to or greater than w. It is exact, by a few
// multiplications.
func (v Value) Cmp(w Value) int {
	_, m := v.parts()
	_, n := w.parts()
	square := func(x *big.Int) *big.Int { return contfrac.Product(x, x) }
	return contfrac.Product(v.Radicand(), square(n)).Cmp(contfrac.Product(w.Radicand(), square(m)))
}

// String returns "√(t²−4)/N" with the integers worked out, as "√221/5", and "√5" when N is 1.
func (v Value) String() string { return v.text((*big.Int).String) }

func (v Value) text(number func(*big.Int) string) string {
	_, n := v.parts()
	s := "√" + number(v.Radicand())
	if n.BitLen() == 1 {
		return s
	}
	return s + "/" + number(n)
}

// Format implements fmt.Formatter: %s writes the integers whole and %v writes long ones shortened;
// %q quotes the whole text.
func (v Value) Format(s fmt.State, verb rune) {
	switch verb {
	case 's':
		fmt.Fprint(s, v.String())
	case 'q':
		fmt.Fprintf(s, "%q", v.String())
	case 'v':
		fmt.Fprint(s, v.text(short))
	default:
		fmt.Fprintf(s, "%%!%c(spectrum.Value=%s)", verb, v.text(short))
	}
}
