package contfrac

import "fmt"

// ParseFraction reads a regular continued fraction in the form "[1; 2, 3]";
// white space is free between the tokens, and "[]" has no terms.
// Texts longer than MaxText and terms of more than MaxDigits digits give
// ErrTooLarge, terms out of range ErrTerm, everything else ErrSyntax.
func ParseFraction(s string) (Fraction, error) {
	b, err := regular.parse(s)
	return b.fraction(), err
}

// String returns the text that ParseFraction reads: "[1; 2, 3]", "[2]", "[]".
func (f Fraction) String() string {
	return string(regular.appendText(nil, f.neg, f.data))
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes all the terms,
// and %v writes the first and last ones and their number when there are many,
// long terms shortened.
func (f Fraction) Format(s fmt.State, verb rune) {
	format(s, verb, "contfrac.Fraction", f.String, func() string {
		return regular.shortened(f.n, f.neg, f.data)
	})
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (f Fraction) MarshalText() ([]byte, error) {
	return regular.appendText(nil, f.neg, f.data), nil
}

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what
// MarshalText writes, within MaxText and MaxDigits.
func (f *Fraction) UnmarshalText(text []byte) error {
	v, err := ParseFraction(string(text))
	if err != nil {
		return err
	}
	if err := sameText(regular.name, text, v.String()); err != nil {
		return err
	}
	*f = v
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
	b, err := regular.parseStrings(text)
	if err != nil {
		return err
	}
	*f = b.fraction()
	return nil
}
