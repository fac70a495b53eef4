package contfrac

import (
	"fmt"
	"math/big"
	"strings"
)

// String returns the entries by rows, as in "[[1, 2], [3, 5]]".
func (m Matrix) String() string {
	return m.text(func(n *big.Int) string { return n.String() })
}

func (m Matrix) text(number func(*big.Int) string) string {
	e := m.entries()
	return "[[" + number(e.a) + ", " + number(e.b) + "], [" + number(e.c) + ", " + number(e.d) + "]]"
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes the entries in full and %v
// writes long entries shortened.
func (m Matrix) Format(f fmt.State, verb rune) {
	format(f, verb, "contfrac.Matrix", m.String, func() string { return m.text(Abbreviate) })
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (m Matrix) MarshalText() ([]byte, error) { return []byte(m.String()), nil }

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what
// MarshalText writes, within MaxText and MaxDigits.
func (m *Matrix) UnmarshalText(text []byte) error {
	if err := checkText("matrix", len(text)); err != nil {
		return err
	}
	bad := fmt.Errorf("contfrac: matrix %s: the form [[1, 2], [3, 5]] is accepted: %w", quote(string(text)), ErrSyntax)
	body, opened := strings.CutPrefix(string(text), "[[")
	body, closed := strings.CutSuffix(body, "]]")
	upper, lower, middle := strings.Cut(body, "], [")
	a, b, first := strings.Cut(upper, ", ")
	c, d, second := strings.Cut(lower, ", ")
	if !opened || !closed || !middle || !first || !second {
		return bad
	}
	var n [4]*big.Int
	for i, entry := range []string{a, b, c, d} {
		var err error
		if n[i], err = decimal(entry); err != nil {
			return fmt.Errorf("contfrac: matrix %s, entry %d: %w", quote(string(text)), i+1, err)
		}
	}
	*m = Matrix{e: &entries{n[0], n[1], n[2], n[3]}}
	return nil
}

// MarshalJSON implements json.Marshaler: the rows as arrays of decimal
// strings, [["1","2"],["3","5"]].
func (m Matrix) MarshalJSON() ([]byte, error) {
	e := m.entries()
	return fmt.Appendf(nil, `[["%s","%s"],["%s","%s"]]`, e.a, e.b, e.c, e.d), nil
}

// UnmarshalJSON implements json.Unmarshaler. It accepts what MarshalJSON
// writes, with any white space between tokens, within MaxText and MaxDigits.
func (m *Matrix) UnmarshalJSON(text []byte) error {
	if err := checkText("matrix in JSON", len(text)); err != nil {
		return err
	}
	s := jsonScanner{text: text}
	var n [4]*big.Int
	for i, before := range []string{"[[", ",", "],[", ","} {
		good := true
		for _, c := range []byte(before) {
			good = good && s.take(c)
		}
		if !good {
			return badMatrixJSON(text)
		}
		var err error
		if n[i], err = s.integer(); err != nil {
			return fmt.Errorf("contfrac: matrix in JSON, entry %d: %w", i+1, err)
		}
	}
	for range 2 {
		if !s.take(']') {
			return badMatrixJSON(text)
		}
	}
	if !s.atEnd() {
		return badMatrixJSON(text)
	}
	*m = Matrix{e: &entries{n[0], n[1], n[2], n[3]}}
	return nil
}

func badMatrixJSON(text []byte) error {
	return fmt.Errorf(`contfrac: matrix in JSON %s: the form [["1","2"],["3","5"]] is accepted: %w`, quote(string(text)), ErrSyntax)
}
