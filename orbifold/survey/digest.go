package survey

import (
	"fmt"
	"strconv"
	"strings"
)

// Digest is a sum over slopes that does not depend on their order: their number,
// and the sums of their numbers modulo 2⁶⁴ and modulo the prime 2⁶¹ − 1. Another
// run, of any program, has to reproduce it. The zero value is that of no slopes.
type Digest struct {
	Slopes uint64
	Mod64  uint64
	Mod61  uint64
}

// Add adds the slope of a visit.
func (d *Digest) Add(v *Visit) {
	x := v.vertex()
	d.Slopes++
	d.Mod64 += x.r64
	d.Mod61 = fold(d.Mod61 + x.r61)
}

// Merge adds another digest.
func (d *Digest) Merge(o Digest) {
	d.Slopes += o.Slopes
	d.Mod64 += o.Mod64
	d.Mod61 = fold(d.Mod61 + fold(o.Mod61))
}

// String returns the digest as "slopes:mod64:mod61", the number of slopes in
// decimal and the sums as sixteen hexadecimal digits each.
func (d Digest) String() string { return fmt.Sprintf("%d:%016x:%016x", d.Slopes, d.Mod64, d.Mod61) }

// MarshalText returns the form of String.
func (d Digest) MarshalText() ([]byte, error) { return []byte(d.String()), nil }

// UnmarshalText reads the form of String and nothing else.
func (d *Digest) UnmarshalText(text []byte) error {
	var out Digest
	part := strings.Split(string(text[:min(len(text), 64)]), ":")
	if len(part) == 3 {
		out.Slopes, _ = strconv.ParseUint(part[0], 10, 64)
		out.Mod64, _ = strconv.ParseUint(part[1], 16, 64)
		out.Mod61, _ = strconv.ParseUint(part[2], 16, 64)
	}
	if out.String() != string(text) || out.Mod61 >= mersenne {
		return fmt.Errorf("survey: digest %q: want slopes:mod64:mod61: %w", clip(string(text)), ErrSyntax)
	}
	*d = out
	return nil
}

// Tally is the question for the digest of a region: how many slopes, and which, as
// far as residues tell.
func Tally() Question[Digest] {
	return Question[Digest]{Name: "tally", Visit: (*Digest).Add, Merge: (*Digest).Merge}
}
