package contfrac

import (
	"encoding/json"
	"fmt"
	"math/big"
	"strings"
)

// ParseFraction reads a regular continued fraction in the form "[1; 2, 3]";
// white space is free between the tokens, and "[]" is the empty fraction.
// Texts longer than MaxText and terms of more than MaxDigits digits give
// ErrTooLarge, terms out of range ErrTerm, everything else ErrSyntax.
func ParseFraction(s string) (Fraction, error) {
	terms, err := parseTerms("fraction", s, "[", "]")
	if err != nil {
		return Fraction{}, err
	}
	return NewFraction(terms...)
}

// String returns the text that ParseFraction reads: "[1; 2, 3]", "[2]", "[]".
func (f Fraction) String() string {
	return string(appendTerms(nil, f.neg, f.data, "[", "]"))
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes all the terms, and %v writes
// the first and last ones and their number when there are many, long terms shortened.
func (f Fraction) Format(s fmt.State, verb rune) {
	format(s, verb, "contfrac.Fraction", f.String, func() string {
		return shortenTerms(f.n, f.neg, f.data, "[", "]")
	})
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (f Fraction) MarshalText() ([]byte, error) {
	return appendTerms(nil, f.neg, f.data, "[", "]"), nil
}

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what
// MarshalText writes, within MaxText and MaxDigits.
func (f *Fraction) UnmarshalText(text []byte) error {
	g, err := ParseFraction(string(text))
	if err != nil {
		return err
	}
	if err := sameText("fraction", text, g.String()); err != nil {
		return err
	}
	*f = g
	return nil
}

// MarshalJSON implements json.Marshaler: the array of the terms as decimal
// strings, ["1","2","3"].
func (f Fraction) MarshalJSON() ([]byte, error) {
	return appendStrings(nil, f.neg, f.data), nil
}

// UnmarshalJSON implements json.Unmarshaler. It accepts what MarshalJSON
// writes, with any white space between tokens, within MaxText and MaxDigits.
func (f *Fraction) UnmarshalJSON(text []byte) error {
	terms, err := unmarshalTerms("fraction", text)
	if err != nil {
		return err
	}
	g, err := NewFraction(terms...)
	if err != nil {
		return err
	}
	*f = g
	return nil
}

// parseTerms reads terms between the given brackets.
func parseTerms(what, s, open, shut string) ([]*big.Int, error) {
	if err := checkText(what, len(s)); err != nil {
		return nil, err
	}
	body, opened := strings.CutPrefix(strings.TrimSpace(s), open)
	body, closed := strings.CutSuffix(body, shut)
	if !opened || !closed {
		return nil, fmt.Errorf("contfrac: %s %s: the form %s1; 2, 3%s is accepted: %w", what, quote(s), open, shut, ErrSyntax)
	}
	if strings.TrimSpace(body) == "" {
		return nil, nil
	}
	var terms []*big.Int
	separator := ";"
	for more := true; more; {
		var item string
		item, body, more = strings.Cut(body, separator)
		separator = ","
		t, err := decimal(strings.TrimSpace(item))
		if err != nil {
			return nil, fmt.Errorf("contfrac: %s %s, term %d: %w", what, quote(s), len(terms), err)
		}
		terms = append(terms, t)
	}
	return terms, nil
}

// appendTerms appends the terms in the form that parseTerms reads.
func appendTerms(buf []byte, neg bool, data, open, shut string) []byte {
	buf = append(buf, open...)
	if neg {
		buf = append(buf, '-')
	}
	first := 0
	if data != "" {
		first = packedEnd(data, 0)
	}
	for i := 0; i < len(data); {
		end := packedEnd(data, i)
		switch i {
		case 0:
		case first:
			buf = append(buf, "; "...)
		default:
			buf = append(buf, ", "...)
		}
		buf = appendNumber(buf, data[i:end])
		i = end
	}
	return append(buf, shut...)
}

// shortenTerms is appendTerms with the middle left out.
func shortenTerms(n int, neg bool, data, open, shut string) string {
	s := elide(n, ", ", func(i int, packed string) string {
		t := packedBig(packed)
		if i == 0 && neg {
			t.Neg(t)
		}
		return Abbreviate(t)
	}, data)
	s = open + strings.Replace(s, ",", ";", 1) + shut
	if n > 2*elideKeep {
		s += fmt.Sprintf(" (%d terms)", n)
	}
	return s
}

// appendStrings appends the terms as a JSON array of decimal strings.
func appendStrings(buf []byte, neg bool, data string) []byte {
	buf = append(buf, '[')
	for i := 0; i < len(data); {
		end := packedEnd(data, i)
		if i > 0 {
			buf = append(buf, ',')
		}
		buf = append(buf, '"')
		if i == 0 && neg {
			buf = append(buf, '-')
		}
		buf = append(appendNumber(buf, data[i:end]), '"')
		i = end
	}
	return append(buf, ']')
}

// unmarshalTerms reads a JSON array of decimal strings.
func unmarshalTerms(what string, text []byte) ([]*big.Int, error) {
	if err := checkText(what+" in JSON", len(text)); err != nil {
		return nil, err
	}
	var items []string
	if err := json.Unmarshal(text, &items); err != nil || items == nil {
		return nil, fmt.Errorf("contfrac: %s in JSON %s: an array of decimal strings is accepted: %w", what, quote(string(text)), ErrSyntax)
	}
	terms := make([]*big.Int, len(items))
	for i, item := range items {
		t, err := decimal(item)
		if err != nil {
			return nil, fmt.Errorf("contfrac: %s in JSON, term %d: %w", what, i, err)
		}
		terms[i] = t
	}
	return terms, nil
}

// sameText refuses a text that does not read as it would be written.
func sameText(what string, text []byte, written string) error {
	if string(text) != written {
		return fmt.Errorf("contfrac: %s %s is not as it would be written: %s is accepted: %w", what, quote(string(text)), quote(written), ErrSyntax)
	}
	return nil
}
