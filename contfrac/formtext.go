package contfrac

import (
	"fmt"
	"math/big"
	"strings"
)

// ParseForm reads a form "(a, b, c)", as String writes it. Texts longer than MaxText and integers
// of more than MaxDigits digits give ErrTooLarge, other forms ErrSyntax; what the coefficients
// must be is said at NewForm.
func ParseForm(s string) (Form, error) {
	if err := checkText("form", len(s)); err != nil {
		return Form{}, err
	}
	body, opened := strings.CutPrefix(s, "(")
	body, closed := strings.CutSuffix(body, ")")
	a, rest, first := strings.Cut(body, ", ")
	b, c, second := strings.Cut(rest, ", ")
	if !opened || !closed || !first || !second {
		return Form{}, fmt.Errorf("contfrac: form %s: the form (1, -1, -1) is accepted: %w", quote(s), ErrSyntax)
	}
	var n [3]*big.Int
	for i, part := range []string{a, b, c} {
		var err error
		if n[i], err = decimal(part); err != nil {
			return Form{}, fmt.Errorf("contfrac: form %s, coefficient %d: %w", quote(s), i+1, err)
		}
	}
	return NewForm(n[0], n[1], n[2])
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (f Form) MarshalText() ([]byte, error) { return []byte(f.String()), nil }

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what MarshalText writes,
// within MaxText and MaxDigits.
func (f *Form) UnmarshalText(text []byte) error {
	g, err := ParseForm(string(text))
	if err != nil {
		return err
	}
	*f = g
	return nil
}
