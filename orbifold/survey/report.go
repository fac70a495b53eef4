package survey

import (
	"encoding/json"
	"fmt"
	"io"
	"math/big"
	"strings"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Coincidence is a number that inequivalent slopes carry.
type Coincidence struct {
	Number *big.Int
	Slopes []farey.Slope // representatives of two or more symmetry classes, increasing
}

// String returns the number and the slopes, "81 at 2/5 4/3", whole.
func (c Coincidence) String() string { return fmt.Sprintf("%s", c) }

// Format writes the number whole for %s and shortened for %v.
func (c Coincidence) Format(f fmt.State, verb rune) {
	number := contfrac.Abbreviate
	if verb == 's' {
		number = whole
	}
	io.WriteString(f, c.text(number))
}

func (c Coincidence) text(number func(*big.Int) string) string {
	text := number(c.Number) + " at"
	for _, s := range c.Slopes {
		text += " " + s.String()
	}
	return text
}

type coincidenceText struct {
	Number string        `json:"number"`
	Slopes []farey.Slope `json:"slopes"`
}

// MarshalJSON writes an object with the fields number, a decimal string, and slopes.
func (c Coincidence) MarshalJSON() ([]byte, error) {
	return json.Marshal(coincidenceText{whole(c.Number), c.Slopes})
}

// UnmarshalJSON reads what MarshalJSON writes and refuses everything else with
// ErrSyntax or the errors of slopes.
func (c *Coincidence) UnmarshalJSON(text []byte) error {
	if len(text) > MaxText {
		return fmt.Errorf("survey: coincidence of %d bytes: want at most %d: %w", len(text), MaxText, ErrTooLarge)
	}
	var t coincidenceText
	if err := strictJSON(text, &t); err != nil {
		return fmt.Errorf("survey: coincidence: %w", err)
	}
	var out Coincidence
	if t.Number != "0" || t.Slopes != nil {
		n, err := ParseBound(t.Number)
		if err != nil {
			return fmt.Errorf("survey: coincidence: %w", err)
		}
		out = Coincidence{n, t.Slopes}
	}
	if err := sameText(out, text); err != nil {
		return fmt.Errorf("survey: coincidence %q: %w", clip(string(text)), err)
	}
	*c = out
	return nil
}

// Report is the result of Distinct. It depends on the family and the bound alone,
// to the last byte of its text and JSON forms.
type Report struct {
	Family       orbifold.Family
	Bound        *big.Int
	Slopes       *big.Int // numbers ≤ Bound, one slope for each symmetry class
	Coincidences []Coincidence

	// Keys is the number of 64-bit keys that slopes with different numbers share. They
	// were settled by their residues and, when these agreed, exactly.
	Keys   int
	Digest Digest
	Audit  Audit
}

// Distinct tells whether inequivalent slopes carry different numbers throughout.
func (r Report) Distinct() bool { return r.Slopes != nil && len(r.Coincidences) == 0 }

// MarshalJSON writes an object with the fields format, version, weights, bound,
// slopes, distinct, coincidences, keys, digest and audit.
func (r Report) MarshalJSON() ([]byte, error) {
	list := r.Coincidences
	if list == nil {
		list = []Coincidence{}
	}
	return json.Marshal(struct {
		Format       string        `json:"format"`
		Version      int           `json:"version"`
		Weights      string        `json:"weights"`
		Bound        string        `json:"bound"`
		Slopes       string        `json:"slopes"`
		Distinct     bool          `json:"distinct"`
		Coincidences []Coincidence `json:"coincidences"`
		Keys         int           `json:"keys"`
		Digest       Digest        `json:"digest"`
		Audit        Audit         `json:"audit"`
	}{
		Format, Version, r.Family.String(), FormatBound(r.Bound), whole(r.Slopes),
		r.Distinct(), list, r.Keys, r.Digest, r.Audit,
	})
}

func whole(n *big.Int) string {
	if n == nil {
		return "0"
	}
	return n.String()
}

// listed is the number of coincidences that String and %v write.
const listed = 20

// String writes the report for readers, numbers of coincidences whole.
func (r Report) String() string {
	var b strings.Builder
	r.write(&b, whole, len(r.Coincidences))
	return b.String()
}

// Format writes the report whole for %s, and with long numbers shortened and at most
// twenty coincidences for %v.
func (r Report) Format(f fmt.State, verb rune) {
	if verb == 's' {
		io.WriteString(f, r.String())
		return
	}
	r.write(f, contfrac.Abbreviate, listed)
}

func (r Report) write(w io.Writer, number func(*big.Int) string, most int) {
	bound := FormatBound(r.Bound)
	if len(bound) > 64 {
		bound = number(r.Bound)
	}
	fmt.Fprintf(w, "family        %v\n", r.Family)
	fmt.Fprintf(w, "numbers up to %s\n", bound)
	fmt.Fprintf(w, "slopes        %s, one of each symmetry class\n", whole(r.Slopes))
	switch n := len(r.Coincidences); {
	case r.Distinct():
		fmt.Fprintf(w, "distinct      yes: no two of them carry the same number\n")
	default:
		fmt.Fprintf(w, "distinct      no: %d numbers are carried by more than one\n", n)
	}
	for i, c := range r.Coincidences {
		if i == most {
			fmt.Fprintf(w, "  … and %d more\n", len(r.Coincidences)-most)
			break
		}
		fmt.Fprintf(w, "  %s\n", c.text(number))
	}
	fmt.Fprintf(w, "keys shared   %d by different numbers, settled\n", r.Keys)
	fmt.Fprintf(w, "digest        %v\n", r.Digest)
	fmt.Fprintf(w, "audit         %d slopes counted without a walk; %d turns\n", r.Audit.Counted, r.Audit.Turns)
	fmt.Fprintf(w, "  telescoping sum modulo 2^61 − 1: %d, to be %d\n", r.Audit.Telescope, r.Audit.Base)
	fmt.Fprintf(w, "  sum (S) in [%s, %s], to be 1/2 up to at most %s more\n", r.Audit.SumLo, r.Audit.SumHi, r.Audit.Remainder)
}
