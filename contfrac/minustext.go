package contfrac

import "fmt"

// ParseMinus reads a minus continued fraction in the form "[[2; 3, 4]]";
// white space is free between the tokens, and "[[]]" has no terms.
// Texts longer than MaxText and terms of more than MaxDigits digits give
// ErrTooLarge, terms out of range ErrTerm, everything else ErrSyntax.
func ParseMinus(s string) (Minus, error) {
	b, err := minus.parse(s)
	return b.minus(), err
}

// String returns the text that ParseMinus reads: "[[2; 3, 4]]", "[[2]]", "[[]]".
func (m Minus) String() string {
	return string(minus.appendText(nil, m.neg, m.data))
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes all the terms,
// and %v writes the first and last ones and their number when there are many,
// long terms shortened.
func (m Minus) Format(s fmt.State, verb rune) {
	format(s, verb, "contfrac.Minus", m.String, func() string {
		return minus.shortened(m.n, m.neg, m.data)
	})
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (m Minus) MarshalText() ([]byte, error) {
	return minus.appendText(nil, m.neg, m.data), nil
}

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what
// MarshalText writes, within MaxText and MaxDigits.
func (m *Minus) UnmarshalText(text []byte) error {
	v, err := ParseMinus(string(text))
	if err != nil {
		return err
	}
	if err := sameText(minus.name, text, v.String()); err != nil {
		return err
	}
	*m = v
	return nil
}

// MarshalJSON implements json.Marshaler: the array of the terms as decimal
// strings, ["2","3","4"].
func (m Minus) MarshalJSON() ([]byte, error) {
	return appendStrings(nil, m.neg, m.data), nil
}

// UnmarshalJSON implements json.Unmarshaler. It accepts what MarshalJSON
// writes, with any white space between tokens, within MaxText and MaxDigits.
func (m *Minus) UnmarshalJSON(text []byte) error {
	b, err := minus.parseStrings(text)
	if err != nil {
		return err
	}
	*m = b.minus()
	return nil
}
