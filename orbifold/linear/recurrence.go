package linear

import (
	"context"
	"errors"
	"fmt"
	"iter"
	"math/big"

	"example.com/onecusp/contfrac"
)

var (
	// ErrRecurrence reports a recurrence without a characteristic polynomial or
	// with another number of first terms than its order.
	ErrRecurrence = errors.New("no such recurrence")

	// ErrNotRecurrent reports terms that a recurrence does not give.
	ErrNotRecurrent = errors.New("the recurrence does not hold")
)

// Recurrence is a linear recurrence with constant rational coefficients,
// together with as many integer first terms as its order says: a sequence
// a(0), a(1), …
//
// With the characteristic polynomial x^d − c₁·x^(d−1) − … − c_d it says
// a(n) = c₁·a(n−1) + … + c_d·a(n−d) for n ≥ d. It is immutable; the zero value
// is the recurrence of order 0, the sequence of zeros.
type Recurrence struct {
	characteristic Polynomial // monic; the polynomial 0 stands for 1
	initial        []*big.Int
}

// NewRecurrence returns the recurrence with that characteristic polynomial,
// which is made monic, and these first terms. The polynomial 0, a number of
// terms other than its degree and a missing term are ErrRecurrence.
func NewRecurrence(characteristic Polynomial, initial ...*big.Int) (Recurrence, error) {
	d := characteristic.Degree()
	if d < 0 {
		return Recurrence{}, fmt.Errorf("linear: recurrence with characteristic polynomial 0: want another polynomial: %w", ErrRecurrence)
	}
	if len(initial) != d {
		return Recurrence{}, fmt.Errorf("linear: recurrence of order %d with %d first terms: want %d: %w", d, len(initial), d, ErrRecurrence)
	}
	first := make([]*big.Int, d)
	for i, a := range initial {
		if a == nil {
			return Recurrence{}, fmt.Errorf("linear: recurrence without the first term %d: %w", i, ErrRecurrence)
		}
		first[i] = new(big.Int).Set(a)
	}
	return Recurrence{characteristic.monic(), first}, nil
}

// Order returns the order d.
func (r Recurrence) Order() int { return len(r.initial) }

// Characteristic returns the characteristic polynomial, monic of degree Order.
func (r Recurrence) Characteristic() Polynomial {
	if r.characteristic.Degree() < 0 {
		return PolynomialOf(1)
	}
	return r.characteristic
}

// Initial returns the first terms a(0) … a(Order−1).
func (r Recurrence) Initial() []*big.Int {
	first := make([]*big.Int, len(r.initial))
	for i, a := range r.initial {
		first[i] = new(big.Int).Set(a)
	}
	return first
}

// Terms returns a(0), a(1), … without end; the caller stops. The iterator can
// be used again. A step costs as many products as the recurrence has
// coefficients, and the terms grow without bound.
func (r Recurrence) Terms() iter.Seq[*big.Rat] {
	return func(yield func(*big.Rat) bool) {
		var last []*big.Rat // the last Order terms
		for _, a := range r.initial {
			x := new(big.Rat).SetInt(a)
			last = append(last, x)
			if !yield(new(big.Rat).Set(x)) {
				return
			}
		}
		term := new(big.Rat)
		for {
			next := new(big.Rat)
			for i, x := range last {
				next.Sub(next, term.Mul(r.characteristic.c[i], x))
			}
			if len(last) > 0 {
				last = append(last[1:], next)
			}
			if !yield(new(big.Rat).Set(next)) {
				return
			}
		}
	}
}

// Check returns nil when terms is the beginning of the sequence, by exact
// integers. Else the error is ErrNotRecurrent and names the first term that
// differs; a nil term is an error too. Cost: as many products as terms times
// coefficients that are not zero.
func (r Recurrence) Check(terms []*big.Int) error {
	return r.CheckContext(context.Background(), terms)
}

// CheckContext is Check that stops when ctx ends, with its error.
func (r Recurrence) CheckContext(ctx context.Context, terms []*big.Int) error {
	if ctx == nil {
		ctx = context.Background()
	}
	d := len(r.initial)
	factors, denominator := r.cleared()
	sum, product := new(big.Int), new(big.Int)
	for n, a := range terms {
		if a == nil {
			return fmt.Errorf("linear: term %d is missing: %w", n, ErrNotRecurrent)
		}
		if err := ctx.Err(); err != nil {
			return fmt.Errorf("linear: check of a recurrence: %w", err)
		}
		same := true
		if n < d {
			same = a.Cmp(r.initial[n]) == 0
		} else {
			sum.Mul(denominator, a)
			for i, f := range factors {
				if f.Sign() != 0 {
					sum.Add(sum, product.Mul(f, terms[n-d+i]))
				}
			}
			same = sum.Sign() == 0
		}
		if !same {
			return fmt.Errorf("linear: term %d is %s, which %v does not give: %w", n, contfrac.Abbreviate(a), r, ErrNotRecurrent)
		}
	}
	return nil
}

// cleared returns the coefficients of the characteristic polynomial below the
// top times their common denominator, and that denominator.
func (r Recurrence) cleared() ([]*big.Int, *big.Int) {
	denominator := big.NewInt(1)
	for _, c := range r.characteristic.c {
		g := new(big.Int).GCD(nil, nil, denominator, c.Denom())
		denominator.Mul(denominator, g.Quo(c.Denom(), g))
	}
	factors := make([]*big.Int, len(r.initial))
	for i := range factors {
		c := r.characteristic.c[i]
		f := new(big.Int).Quo(denominator, c.Denom())
		factors[i] = f.Mul(f, c.Num())
	}
	return factors, denominator
}

// GeneratingFunction returns Σ a(n)·xⁿ as a rational function in lowest terms.
func (r Recurrence) GeneratingFunction() RationalFunction {
	d := len(r.initial)
	den := r.Characteristic().reversed(d)
	c := make([]*big.Rat, d)
	for i, a := range r.initial {
		c[i] = new(big.Rat).SetInt(a)
	}
	num := den.Mul(trimmed(c)).Coefficients()
	return lowestTerms(trimmed(num[:min(d, len(num))]), den)
}

// String writes the rule, "a(n) = 3·a(n−1) − a(n−2)"; the first terms are not
// in it.
func (r Recurrence) String() string { return r.text((*big.Int).String) }

// Format writes the rule whole for %s, and with long coefficients shortened
// for %v.
func (r Recurrence) Format(s fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(s, r.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(s, r.String())
}

func (r Recurrence) text(integer func(*big.Int) string) string {
	var sum sumText
	for i := len(r.initial) - 1; i >= 0; i-- {
		c := new(big.Rat).Neg(r.characteristic.c[i])
		symbol := fmt.Sprintf("a(n−%d)", len(r.initial)-i)
		if c.IsInt() && c.Num().CmpAbs(one) != 0 {
			symbol = "·" + symbol
		}
		sum.add(c, integer, symbol)
	}
	return "a(n) = " + sum.String()
}
