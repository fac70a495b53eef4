package contfrac

import (
	"fmt"
	"strings"
)

// ParsePeriodic reads a periodic continued fraction with its period in brackets, "[9; (1, 2, 3)]",
// "[0; 4, (1)]", "[(2; 1)]": a semicolon comes after the first term of all, and commas come after
// the others. White space is free between the tokens, and neither part need be the shortest. Texts
// longer than MaxText and terms of more than MaxDigits digits give ErrTooLarge, terms out of range
// ErrTerm, everything else ErrSyntax.
func ParsePeriodic(s string) (Periodic, error) {
	if err := checkText("periodic continued fraction", len(s)); err != nil {
		return Periodic{}, err
	}
	bad := func() (Periodic, error) {
		return Periodic{}, fmt.Errorf("contfrac: periodic continued fraction %s: the form [9; (1, 2, 3)] is accepted: %w", quote(s), ErrSyntax)
	}
	text, opened := strings.CutPrefix(strings.TrimSpace(s), "[")
	text, closed := strings.CutSuffix(text, "]")
	head, rest, open := strings.Cut(text, "(")
	body, after, shut := strings.Cut(rest, ")")
	if !opened || !closed || !open || !shut || strings.TrimSpace(after) != "" {
		return bad()
	}
	// The head ends in the separator before the period.
	head = strings.TrimSpace(head)
	var pre Fraction
	if head != "" {
		separator := head[len(head)-1]
		var err error
		if pre, err = ParseFraction("[" + head[:len(head)-1] + "]"); err != nil {
			return Periodic{}, err
		}
		if pre.n == 0 || separator != separatorAfter(pre.n-1) {
			return bad()
		}
		// The first term of all is past, so all separators are commas.
		if strings.Contains(body, ";") {
			return bad()
		}
		body = strings.Replace(body, ",", ";", 1)
	}
	period, err := ParseFraction("[" + body + "]")
	if err != nil {
		return Periodic{}, err
	}
	return NewPeriodic(pre, period)
}

// separatorAfter returns what stands after term i when others follow.
func separatorAfter(i int) byte {
	if i == 0 {
		return ';'
	}
	return ','
}

// String returns the text that ParsePeriodic reads, with the shortest period: "[9; (1, 2, 3)]",
// "[0; 4, (1)]", "[(2; 1)]".
func (x Periodic) String() string {
	return x.text(func(f Fraction) string { return f.String() })
}

func (x Periodic) text(part func(Fraction) string) string {
	inner := func(f Fraction) string {
		s := part(f)
		return s[1 : len(s)-1]
	}
	period := inner(x.Period())
	if x.pre.n == 0 {
		return "[(" + period + ")]"
	}
	return "[" + inner(x.pre) + string(separatorAfter(x.pre.n-1)) + " (" + strings.Replace(period, ";", ",", 1) + ")]"
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes all the terms, and %v writes the
// first and last ones of both parts when there are many, long terms shortened.
func (x Periodic) Format(s fmt.State, verb rune) {
	format(s, verb, "contfrac.Periodic", x.String, func() string {
		return x.text(func(f Fraction) string {
			s := regular.shortened(f.n, f.neg, f.data)
			return s[:strings.LastIndexByte(s, ']')+1] // without the number of terms
		})
	})
}

// MarshalText implements encoding.TextMarshaler with the text of String.
func (x Periodic) MarshalText() ([]byte, error) { return []byte(x.String()), nil }

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what MarshalText writes,
// within MaxText and MaxDigits: the shortest form only.
func (x *Periodic) UnmarshalText(text []byte) error {
	y, err := ParsePeriodic(string(text))
	if err != nil {
		return err
	}
	if y.String() != string(text) {
		return fmt.Errorf("contfrac: periodic continued fraction %s: the shortest form, %v, is accepted: %w", quote(string(text)), y, ErrSyntax)
	}
	*x = y
	return nil
}
