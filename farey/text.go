package farey

import (
	"fmt"
	"math/big"
	"strconv"
	"strings"

	"example.com/onecusp/contfrac"
)

// MaxTextLen is the greatest length in bytes of a text that [Parse] and
// [Slope.UnmarshalText] read.
const MaxTextLen = 1 << 20

// minusSign is U+2212, which [Parse] takes for a hyphen-minus.
const minusSign = "−"

// Parse reads a slope from an optional sign (+, - or the minus sign U+2212), decimal
// digits and, optionally, a slash and more digits: "3/7", "-3/4", "1/0", "5". The
// fraction is reduced and leading zeros are dropped: "2/4" is 1/2, and "-1/0" is 1/0,
// which has no sign. It fails with
// [ErrTooLarge] past [MaxTextLen] bytes, with [ErrIndeterminate] for 0/0 and with
// [ErrSyntax] for anything else. Cost: less than quadratic in the length.
func Parse(s string) (Slope, error) {
	if len(s) > MaxTextLen {
		return Slope{}, fmt.Errorf("farey: slope %s of %d bytes: up to %d would be accepted: %w", quote(s), len(s), MaxTextLen, ErrTooLarge)
	}
	rest, negative := s, false
	if r, ok := strings.CutPrefix(rest, minusSign); ok {
		rest, negative = r, true
	} else if r, ok := strings.CutPrefix(rest, "-"); ok {
		rest, negative = r, true
	} else {
		rest = strings.TrimPrefix(rest, "+")
	}
	num, den, ok := strings.Cut(rest, "/")
	if !ok {
		den = "1"
	}
	if !isDigits(num) || !isDigits(den) {
		return Slope{}, fmt.Errorf(`farey: slope %s: an integer or a fraction like "3/7", "-3/4" or "1/0" would be accepted: %w`, quote(s), ErrSyntax)
	}
	p, err1 := strconv.ParseInt(num, 10, 64)
	q, err2 := strconv.ParseInt(den, 10, 64)
	if err1 == nil && err2 == nil {
		if negative {
			p = -p
		}
		return FromInts(p, q)
	}
	a, b := integer(num), integer(den)
	if negative {
		a.Neg(a)
	}
	return New(a, b)
}

// MustParse is [Parse] for constants in a program; it panics on an error.
func MustParse(s string) Slope {
	slope, err := Parse(s)
	if err != nil {
		panic(err)
	}
	return slope
}

func isDigits(s string) bool {
	for i := range len(s) {
		if s[i] < '0' || s[i] > '9' {
			return false
		}
	}
	return s != ""
}

// integer returns the value of at most MaxTextLen decimal digits. The text reader of
// contfrac does it in less than quadratic time, unlike that of math/big.
func integer(digits string) *big.Int {
	digits = strings.TrimLeft(digits, "0")
	if digits == "" {
		return new(big.Int)
	}
	fraction, _ := contfrac.ParseFraction("[" + digits + "]") // reads that many digits
	return fraction.Numerator()
}

// String returns the slope whole, as "3/7", "-3/4", "5/1" or "1/0".
func (s Slope) String() string {
	if s.large != nil {
		return s.large.p.String() + "/" + s.large.q.String()
	}
	return strconv.FormatInt(s.p, 10) + "/" + strconv.FormatInt(s.below+1, 10)
}

// Format implements [fmt.Formatter]: %s prints the slope whole and %v shortens long
// terms as [contfrac.Abbreviate] does; %q quotes the whole text. Width and the flag '-' work as
// for strings.
func (s Slope) Format(f fmt.State, verb rune) {
	formatText(f, verb, "farey.Slope", s.String, s.short)
}

// short returns the text of the slope with long terms shortened.
func (s Slope) short() string {
	if s.large == nil {
		return s.String()
	}
	return contfrac.Abbreviate(s.large.p) + "/" + contfrac.Abbreviate(s.large.q)
}

// formatText is the fmt.Formatter of a type with a whole and a shortened text.
func formatText(f fmt.State, verb rune, typeName string, whole, short func() string) {
	switch verb {
	case 's', 'q':
		fmt.Fprintf(f, fmt.FormatString(layout{f}, verb), whole())
	case 'v':
		fmt.Fprintf(f, fmt.FormatString(layout{f}, 's'), short())
	default:
		fmt.Fprintf(f, "%%!%c(%s=%s)", verb, typeName, short())
	}
}

// layout hides the flags that mean nothing for a text, such as that of %+v.
type layout struct{ fmt.State }

// Flag reports whether the flag is set and is about layout.
func (l layout) Flag(c int) bool { return c == '-' && l.State.Flag(c) }

// quote quotes a text for an error, shortened when long.
func quote(s string) string {
	const most, ends = 60, 20
	if len(s) <= most {
		return strconv.Quote(s)
	}
	return strconv.Quote(s[:ends]) + "…" + strconv.Quote(s[len(s)-ends:])
}

// MarshalText returns the text of [Slope.String].
func (s Slope) MarshalText() ([]byte, error) { return []byte(s.String()), nil }

// UnmarshalText accepts exactly what [Slope.String] prints, up to [MaxTextLen] bytes:
// reduced, with a denominator, without plus sign or leading zeros. It fails as
// [Parse] does, with [ErrSyntax] for other spellings, and then leaves s alone.
func (s *Slope) UnmarshalText(text []byte) error {
	slope, err := Parse(string(text))
	if err != nil {
		return err
	}
	if slope.String() != string(text) {
		return fmt.Errorf("farey: slope %s: lowest terms in plain digits, here %s, would be accepted: %w", quote(string(text)), quote(slope.String()), ErrSyntax)
	}
	*s = slope
	return nil
}
