package contfrac

import (
	"fmt"
	"math/big"
	"strings"
)

// String returns "(P + √D)/Q" with the integers in lowest terms, as in "(1 + √5)/2", "(0 + √2)/1",
// "(-3 + √7)/-2".
func (x Surd) String() string {
	return x.text(func(n *big.Int) string { return n.String() })
}

func (x Surd) text(number func(*big.Int) string) string {
	e := x.parts()
	return "(" + number(e.p) + " + √" + number(e.d) + ")/" + number(e.q)
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes the integers in full and %v writes
// long ones shortened.
func (x Surd) Format(f fmt.State, verb rune) {
	format(f, verb, "contfrac.Surd", x.String, func() string { return x.text(Abbreviate) })
}

// ParseSurd reads a quadratic irrational in the form "(P + √D)/Q", not necessarily in lowest
// terms. Texts longer than MaxText and integers of more than MaxDigits digits give ErrTooLarge,
// other forms ErrSyntax; what the integers must be is said at NewSurd.
func ParseSurd(s string) (Surd, error) {
	if err := checkText("surd", len(s)); err != nil {
		return Surd{}, err
	}
	body, opened := strings.CutPrefix(s, "(")
	p, rest, plus := strings.Cut(body, " + √")
	d, q, over := strings.Cut(rest, ")/")
	if !opened || !plus || !over {
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
