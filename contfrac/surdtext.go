package contfrac

import (
	"fmt"
	"math/big"
	"strings"
)

// String returns "(P + √D)/Q" with the integers in lowest terms, as in "(1 + √5)/2" and "(-3 + √7)/-2";
// Q = 1 and P = 0 are left out: "3 + √8", "√2", "√221/5".
func (x Surd) String() string {
	return x.text(func(n *big.Int) string { return n.String() })
}

func (x Surd) text(number func(*big.Int) string) string {
	e := x.parts()
	root := "√" + number(e.d)
	switch whole := e.q.CmpAbs(oneInt) == 0 && e.q.Sign() > 0; {
	case whole && e.p.Sign() == 0:
		return root
	case whole:
		return number(e.p) + " + " + root
	case e.p.Sign() == 0:
		return root + "/" + number(e.q)
	}
	return "(" + number(e.p) + " + " + root + ")/" + number(e.q)
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes the integers in full and %v writes
// long ones shortened.
func (x Surd) Format(f fmt.State, verb rune) {
	format(f, verb, "contfrac.Surd", x.String, func() string { return x.text(Abbreviate) })
}

// ParseSurd reads a quadratic irrational in the form "(P + √D)/Q", not necessarily in lowest
// terms; the brackets and Q may be left out for Q = 1, P and the brackets for P = 0. Texts longer
// than MaxText and integers of more than MaxDigits digits give ErrTooLarge, other forms ErrSyntax;
// what the integers must be is said at NewSurd.
func ParseSurd(s string) (Surd, error) {
	if err := checkText("surd", len(s)); err != nil {
		return Surd{}, err
	}
	body, q, ok := s, "1", true
	if inner, bracket := strings.CutPrefix(s, "("); bracket {
		body, q, ok = strings.Cut(inner, ")/")
	}
	p, d, sum := strings.Cut(body, " + √")
	if !sum {
		p = "0"
		d, ok = strings.CutPrefix(body, "√")
		if before, after, over := strings.Cut(d, "/"); over && len(body) == len(s) {
			d, q = before, after
		}
	}
	if !ok {
		return Surd{}, fmt.Errorf("contfrac: surd %s: the form (1 + √5)/2 is accepted: %w", quote(s), ErrSyntax)
	}
	var n [3]*big.Int
	for i, part := range []string{p, d, q} {
		var err error
		if n[i], err = decimal(part); err != nil {
			return Surd{}, fmt.Errorf("contfrac: surd %s, integer %d: %w", quote(s), i+1, err)
		}
	}
	return NewSurd(n[0], n[1], n[2])
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (x Surd) MarshalText() ([]byte, error) { return []byte(x.String()), nil }

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what MarshalText writes,
// within MaxText and MaxDigits: lowest terms only.
func (x *Surd) UnmarshalText(text []byte) error {
	y, err := ParseSurd(string(text))
	if err != nil {
		return err
	}
	if y.String() != string(text) {
		return fmt.Errorf("contfrac: surd %s: lowest terms, %v, are accepted: %w", quote(string(text)), y, ErrSyntax)
	}
	*x = y
	return nil
}
