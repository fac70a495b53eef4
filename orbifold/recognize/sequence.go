package recognize

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"math"
	"math/big"
	"strconv"
	"strings"
	"unicode"

	"example.com/onecusp/contfrac"
)

const (
	// MaxTerms bounds the terms of a sequence.
	MaxTerms = 1 << 14
	// MaxBits bounds the bits of all terms of a sequence together.
	MaxBits = 1 << 24
	// MaxDigits bounds the digits of one integer in a text.
	MaxDigits = 1 << 18
	// MaxText bounds, in bytes, the texts that ParseSequence and ReadIndexed read.
	MaxText = 1 << 23
)

// Sequence is a finite list of integer terms a₀, a₁, …. It is immutable; the
// zero value has no terms.
type Sequence struct{ terms []*big.Int }

// NewSequence returns the sequence with these terms. No terms, or a nil one,
// are ErrEmpty; more than MaxTerms terms or MaxBits bits are ErrTooLarge.
func NewSequence(terms ...*big.Int) (Sequence, error) {
	if len(terms) == 0 {
		return Sequence{}, fmt.Errorf("recognize: sequence without terms: want at least one: %w", ErrEmpty)
	}
	if len(terms) > MaxTerms {
		return Sequence{}, fmt.Errorf("recognize: sequence of %d terms: at most %d are accepted: %w", len(terms), MaxTerms, ErrTooLarge)
	}
	bits := 0
	s := Sequence{make([]*big.Int, len(terms))}
	for i, a := range terms {
		if a == nil {
			return Sequence{}, fmt.Errorf("recognize: sequence without term %d: %w", i, ErrEmpty)
		}
		if bits += a.BitLen(); bits > MaxBits {
			return Sequence{}, fmt.Errorf("recognize: sequence of more than %d bits: %w", MaxBits, ErrTooLarge)
		}
		s.terms[i] = new(big.Int).Set(a)
	}
	return s, nil
}

// ParseSequence reads integers with commas or white space between them, such
// as "1, 3, 13, 61" or "1 3 13 61"; a minus may be U+2212. Fractions and decimal
// numbers are ErrNotInteger, anything else ErrSyntax, no terms at all ErrEmpty;
// texts past MaxText bytes, integers past MaxDigits digits and what NewSequence
// refuses are ErrTooLarge.
func ParseSequence(text string) (Sequence, error) {
	if len(text) > MaxText {
		return Sequence{}, fmt.Errorf("recognize: text of %d bytes: at most %d are accepted: %w", len(text), MaxText, ErrTooLarge)
	}
	var terms []*big.Int
	// A comma separates two terms, so that "1,,2" lacks one.
	blank := strings.TrimSpace(text) == ""
	for part := range strings.SplitSeq(text, ",") {
		if strings.TrimSpace(part) == "" && !blank {
			return Sequence{}, fmt.Errorf("recognize: sequence %q: an integer is missing beside a comma: %w", clip(text), ErrSyntax)
		}
		for word := range strings.FieldsSeq(part) {
			a, err := parseInteger(word)
			if err != nil {
				return Sequence{}, err
			}
			if len(terms) == MaxTerms {
				return Sequence{}, fmt.Errorf("recognize: sequence of more than %d terms: %w", MaxTerms, ErrTooLarge)
			}
			terms = append(terms, a)
		}
	}
	return NewSequence(terms...)
}

// parseInteger reads an integer with an optional sign.
func parseInteger(word string) (*big.Int, error) {
	digits := strings.Replace(word, "−", "-", 1)
	if sign := digits; sign != "" && (sign[0] == '-' || sign[0] == '+') {
		digits = digits[1:]
	}
	if len(digits) > MaxDigits {
		return nil, fmt.Errorf("recognize: integer %q: at most %d digits are accepted: %w", clip(word), MaxDigits, ErrTooLarge)
	}
	if digits == "" || strings.Trim(digits, "0123456789") != "" {
		kind := ErrSyntax
		if strings.Trim(word, "0123456789/.eE+-−") == "" && strings.ContainsAny(word, "/.eE") && strings.ContainsFunc(word, unicode.IsDigit) {
			kind = ErrNotInteger
		}
		return nil, fmt.Errorf("recognize: term %q: want an integer in decimal digits: %w", clip(word), kind)
	}
	a, _ := new(big.Int).SetString(digits, 10)
	if strings.HasPrefix(word, "-") || strings.HasPrefix(word, "−") {
		a.Neg(a)
	}
	return a, nil
}

// Len returns the number of terms.
func (s Sequence) Len() int { return len(s.terms) }

// Term returns aᵢ; 0 outside 0 … Len−1.
func (s Sequence) Term(i int) *big.Int {
	if i < 0 || i >= len(s.terms) {
		return new(big.Int)
	}
	return new(big.Int).Set(s.terms[i])
}

// Terms returns all terms.
func (s Sequence) Terms() []*big.Int {
	terms := make([]*big.Int, len(s.terms))
	for i := range terms {
		terms[i] = s.Term(i)
	}
	return terms
}

// constant tells whether there are three terms or more, all equal.
func (s Sequence) constant() bool {
	for _, a := range s.terms {
		if a.Cmp(s.terms[0]) != 0 {
			return false
		}
	}
	return len(s.terms) > 2
}

// String writes the terms whole, "1, 3, 13, 61".
func (s Sequence) String() string { return s.text((*big.Int).String) }

// Format writes the terms whole for %s, and long ones shortened for %v.
func (s Sequence) Format(f fmt.State, verb rune) {
	if verb == 'v' {
		fmt.Fprint(f, s.text(contfrac.Abbreviate))
		return
	}
	fmt.Fprint(f, s.String())
}

func (s Sequence) text(integer func(*big.Int) string) string {
	parts := make([]string, len(s.terms))
	for i, a := range s.terms {
		parts[i] = integer(a)
	}
	return strings.Join(parts, ", ")
}

// WriteIndexed writes the terms as lines of an index and a value with a space
// between them, as public databases of integer sequences take them; first is
// the index of a₀. An index past int64 is ErrTooLarge.
func (s Sequence) WriteIndexed(w io.Writer, first int64) error {
	if first > math.MaxInt64-int64(len(s.terms)) {
		return fmt.Errorf("recognize: lines from the index %d: want at most %d: %w", first, math.MaxInt64-int64(len(s.terms)), ErrTooLarge)
	}
	b := bufio.NewWriter(w)
	for i, a := range s.terms {
		// An error stays in b until Flush.
		_, _ = b.WriteString(strconv.FormatInt(first+int64(i), 10) + " " + a.String() + "\n")
	}
	return b.Flush()
}

// ReadIndexed reads lines of an index and a value, as WriteIndexed writes
// them, and returns the sequence and the index of its first term. Lines that are empty
// or begin with # are passed over. Indices that do not go up by one are ErrIndex;
// the other errors are those of ParseSequence and of the reader.
func ReadIndexed(r io.Reader) (Sequence, int64, error) {
	text, err := io.ReadAll(io.LimitReader(r, MaxText+1))
	if err != nil {
		return Sequence{}, 0, fmt.Errorf("recognize: index–value lines: %w", err)
	}
	if len(text) > MaxText {
		return Sequence{}, 0, fmt.Errorf("recognize: index–value lines of more than %d bytes: %w", MaxText, ErrTooLarge)
	}
	var terms []*big.Int
	first := int64(0)
	number := 0
	for line := range bytes.SplitSeq(text, []byte("\n")) {
		number++
		words := strings.Fields(string(line))
		if len(words) == 0 || strings.HasPrefix(words[0], "#") {
			continue
		}
		if len(words) != 2 {
			return Sequence{}, 0, fmt.Errorf("recognize: line %d, %q: want an index and a value: %w", number, clip(string(line)), ErrSyntax)
		}
		index, err := strconv.ParseInt(words[0], 10, 64)
		if err != nil {
			return Sequence{}, 0, fmt.Errorf("recognize: line %d: index %q: want an integer of at most 64 bits: %w", number, clip(words[0]), ErrSyntax)
		}
		if len(terms) == 0 {
			first = index
		}
		if want := first + int64(len(terms)); index != want || want < first {
			return Sequence{}, 0, fmt.Errorf("recognize: line %d: index %d: want one more than the line before: %w", number, index, ErrIndex)
		}
		a, err := parseInteger(words[1])
		if err != nil {
			return Sequence{}, 0, err
		}
		if len(terms) == MaxTerms {
			return Sequence{}, 0, fmt.Errorf("recognize: more than %d lines: %w", MaxTerms, ErrTooLarge)
		}
		terms = append(terms, a)
	}
	s, err := NewSequence(terms...)
	return s, first, err
}
