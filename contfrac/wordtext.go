package contfrac

import (
	"fmt"
	"math/big"
)

// ParseWord reads a word written in plain letters ("RLLRR"), by runs
// ("R L2 R2") or as any mixture; white space may stand between runs and equal
// neighbouring runs are joined. The empty text is the empty word. A run length
// is a decimal of at least 1. Texts longer than MaxText and run lengths of
// more than MaxDigits digits give ErrTooLarge, everything else ErrSyntax. It
// costs one step a byte, and reads lengths in less than quadratic time.
func ParseWord(s string) (Word, error) {
	if err := checkText("word", len(s)); err != nil {
		return Word{}, err
	}
	var b WordBuilder
	for i := 0; i < len(s); {
		var l Letter
		switch s[i] {
		case ' ', '\t', '\n', '\r':
			i++
			continue
		case 'L':
			l = L
		case 'R':
			l = R
		default:
			return Word{}, fmt.Errorf("contfrac: word %s at byte %d: letters L and R, each with or without a run length, are accepted: %w", quote(s), i, ErrSyntax)
		}
		start := i + 1
		for i = start; i < len(s) && '0' <= s[i] && s[i] <= '9'; i++ {
		}
		if i == start {
			b.Append(l, 1)
			continue
		}
		n, err := decimal(s[start:i])
		if err != nil {
			return Word{}, fmt.Errorf("contfrac: run length in word %s: %w", quote(s), err)
		}
		if n.Sign() == 0 {
			return Word{}, fmt.Errorf("contfrac: run length 0 in word %s: lengths of at least 1 are accepted: %w", quote(s), ErrSyntax)
		}
		b.append(l, n)
	}
	return b.Word(), nil
}

// MarshalText implements encoding.TextMarshaler with the text of Compact.
func (w Word) MarshalText() ([]byte, error) { return w.appendCompact(nil), nil }

// UnmarshalText implements encoding.TextUnmarshaler. It accepts exactly what
// MarshalText writes, within MaxText and MaxDigits.
func (w *Word) UnmarshalText(text []byte) error {
	v, err := ParseWord(string(text))
	if err != nil {
		return err
	}
	if err := sameText("word", text, v.Compact()); err != nil {
		return err
	}
	*w = v
	return nil
}

var oneInt = big.NewInt(1)
