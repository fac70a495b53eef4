package survey

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math/big"
	"strconv"
	"strings"
)

// MaxText bounds, in bytes, every text that a decoder of this package reads.
const MaxText = 64 << 20

// FormatBound writes a bound in decimal; powers of ten from 10^6 on are written
// "10^d". A nil bound is written as 0.
func FormatBound(n *big.Int) string {
	if n == nil {
		return "0"
	}
	s := n.String()
	if len(s) > 6 && s[0] == '1' && strings.Count(s, "0") == len(s)-1 {
		return "10^" + strconv.Itoa(len(s)-1)
	}
	return s
}

// ParseBound reads what FormatBound writes; "10^3" is accepted too. The result is
// at least 1 and has at most MaxBoundBits bits; ErrBound otherwise, ErrSyntax for
// anything that is no such text.
func ParseBound(s string) (*big.Int, error) {
	if power, ok := strings.CutPrefix(s, "10^"); ok {
		d, err := strconv.ParseUint(power, 10, 31)
		if err != nil || strconv.FormatUint(d, 10) != power {
			return nil, fmt.Errorf("survey: bound %q: want digits or 10^d: %w", clip(s), ErrSyntax)
		}
		if n := PowerOfTen(int(d)); n.BitLen() <= MaxBoundBits {
			return n, nil
		}
		return nil, fmt.Errorf("survey: bound %q: want at most %d bits: %w", clip(s), MaxBoundBits, ErrBound)
	}
	if s == "" || strings.Trim(s, "0123456789") != "" || s[0] == '0' {
		return nil, fmt.Errorf("survey: bound %q: want digits, the first not 0, or 10^d: %w", clip(s), ErrSyntax)
	}
	if len(s) > MaxBoundBits/3 {
		return nil, fmt.Errorf("survey: bound of %d digits: want at most %d bits: %w", len(s), MaxBoundBits, ErrBound)
	}
	n, _ := new(big.Int).SetString(s, 10)
	if n.BitLen() > MaxBoundBits {
		return nil, fmt.Errorf("survey: bound of %d digits: want at most %d bits: %w", len(s), MaxBoundBits, ErrBound)
	}
	return n, nil
}

// strictJSON decodes one JSON value and refuses unknown fields and what follows.
func strictJSON(text []byte, into any) error {
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(into); err != nil {
		return fmt.Errorf("%w: %w", err, ErrSyntax)
	}
	if d.More() {
		return fmt.Errorf("more than one value: %w", ErrSyntax)
	}
	return nil
}

// sameText refuses a text that v would not print itself, up to white space.
func sameText(v json.Marshaler, text []byte) error {
	want, err := v.MarshalJSON()
	if err != nil {
		return err
	}
	var got bytes.Buffer
	if err := json.Compact(&got, text); err != nil {
		return fmt.Errorf("%w: %w", err, ErrSyntax)
	}
	if !bytes.Equal(want, got.Bytes()) {
		return fmt.Errorf("not in the form in which it is written: %w", ErrSyntax)
	}
	return nil
}
