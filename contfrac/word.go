package contfrac

import (
	"fmt"
	"iter"
	"math/big"
	"strings"
)

// Word is a finite word in the letters L and R, held by its runs: a word of
// a few enormous runs costs a few bytes, and any word costs at most about one
// byte a letter. Words are immutable, and equal words are equal under ==. The
// zero value is the empty word.
type Word struct {
	first Letter
	runs  int
	data  string // packed run lengths, each at least 1
}

// WordOf returns the word of the given letters in the given order, at the
// cost of one step a letter.
func WordOf(letters ...Letter) Word {
	var b WordBuilder
	for _, l := range letters {
		b.Append(l, 1)
	}
	return b.Word()
}

// Len returns the number of letters. It costs one step a run.
func (w Word) Len() *big.Int {
	total := new(big.Int)
	var sum uint64
	for i := 0; i < len(w.data); {
		end := packedEnd(w.data, i)
		n, ok := packedUint(w.data[i:end])
		switch {
		case !ok:
			total.Add(total, packedBig(w.data[i:end]))
		case sum+n < sum:
			total.Add(total, new(big.Int).SetUint64(sum))
			sum = n
		default:
			sum += n
		}
		i = end
	}
	return total.Add(total, new(big.Int).SetUint64(sum))
}

// NumRuns returns the number of maximal blocks of equal letters.
func (w Word) NumRuns() int { return w.runs }

// IsEmpty reports whether w has no letters.
func (w Word) IsEmpty() bool { return w.runs == 0 }

// First returns the first letter, and false for the empty word.
func (w Word) First() (Letter, bool) { return w.first, w.runs > 0 }

// Last returns the last letter, and false for the empty word.
func (w Word) Last() (Letter, bool) { return w.runLetter(w.runs - 1), w.runs > 0 }

// runLetter returns the letter of run i, counted from 0; L if w is empty.
func (w Word) runLetter(i int) Letter {
	if w.runs > 0 && i&1 == 1 {
		return w.first.Other()
	}
	return w.first
}

// Runs yields the letter and the length of every maximal block of equal
// letters, first to last. The lengths are fresh. It can be run again.
func (w Word) Runs() iter.Seq2[Letter, *big.Int] {
	return func(yield func(Letter, *big.Int) bool) {
		l := w.first
		for i := 0; i < len(w.data); l = l.Other() {
			end := packedEnd(w.data, i)
			if !yield(l, packedBig(w.data[i:end])) {
				return
			}
			i = end
		}
	}
}

// Letters yields the letters first to last, one at a time and without
// expanding the word, so that a prefix of an enormous word can be read. It can
// be run again.
func (w Word) Letters() iter.Seq[Letter] {
	return func(yield func(Letter) bool) {
		l := w.first
		for i := 0; i < len(w.data); l = l.Other() {
			end := packedEnd(w.data, i)
			n, ok := packedUint(w.data[i:end])
			if !ok {
				for left := packedBig(w.data[i:end]); !left.IsUint64(); left.Sub(left, oneInt) {
					if !yield(l) {
						return
					}
				}
				n = 1<<64 - 1
			}
			for ; n > 0; n-- {
				if !yield(l) {
					return
				}
			}
			i = end
		}
	}
}

// Reverse returns the letters in the opposite order. It costs one step a run.
func (w Word) Reverse() Word {
	return Word{first: w.runLetter(w.runs - 1), runs: w.runs, data: reversePacked(w.data)}
}

// Swap returns the word with L and R exchanged, at no cost.
func (w Word) Swap() Word {
	if w.runs > 0 {
		w.first = w.first.Other()
	}
	return w
}

// Concat returns w followed by v. It costs one copy of both.
func (w Word) Concat(v Word) Word {
	switch {
	case w.runs == 0:
		return v
	case v.runs == 0:
		return w
	case w.runLetter(w.runs-1) != v.first:
		return Word{first: w.first, runs: w.runs + v.runs, data: w.data + v.data}
	}
	var b WordBuilder
	b.AppendWord(w)
	b.AppendWord(v)
	return b.Word()
}

// WithEnds returns w with one letter put before and one after it.
func (w Word) WithEnds(first, last Letter) Word {
	var b WordBuilder
	b.Append(first, 1)
	b.AppendWord(w)
	b.Append(last, 1)
	return b.Word()
}

// Fraction returns the continued fraction whose terms are the run lengths, at
// no cost; the fraction of the empty word is the empty fraction.
func (w Word) Fraction() Fraction { return Fraction{n: w.runs, data: w.data} }

// Matrix returns the product of the matrices of the letters in order; the
// empty word gives the identity. The sum of its entries is the numerator of
// the fraction of w.WithEnds(x, y), whatever the letters x and y. It costs
// O(M(n) log n) for entries of n bits, however long the runs.
func (w Word) Matrix() Matrix {
	// With J = [[0, 1], [1, 0]], Rⁿ = [[n, 1], [1, 0]]·J and
	// Lⁿ = J·[[n, 1], [1, 0]]. Between runs the J cancel, so the product is that of
	// the continuant, with the rows exchanged when w starts with L and the
	// columns exchanged when it ends in R.
	if w.runs == 0 {
		return Matrix{}
	}
	m := w.Fraction().product().full()
	if w.first == L {
		m.a, m.b, m.c, m.d = m.c, m.d, m.a, m.b
	}
	if w.runLetter(w.runs-1) == R {
		m.a, m.b, m.c, m.d = m.b, m.a, m.d, m.c
	}
	return Matrix{e: &m}
}

// String returns the letters, as in "RLLRR", or the text of Compact if there
// are more than MaxPlainLetters of them.
func (w Word) String() string {
	n := w.Len()
	if !n.IsInt64() || n.Int64() > MaxPlainLetters {
		return w.Compact()
	}
	var b strings.Builder
	b.Grow(int(n.Int64()))
	for l := range w.Letters() {
		b.WriteByte(l.String()[0])
	}
	return b.String()
}

// Compact returns the runs in order, as in "R L2 R2": the letter and, unless
// it is 1, the length. The empty word gives the empty text.
func (w Word) Compact() string { return string(w.appendCompact(nil)) }

func (w Word) appendCompact(buf []byte) []byte {
	l := w.first
	for i := 0; i < len(w.data); l = l.Other() {
		end := packedEnd(w.data, i)
		if i > 0 {
			buf = append(buf, ' ')
		}
		buf = appendRun(buf, l, w.data[i:end])
		i = end
	}
	return buf
}

func appendRun(buf []byte, l Letter, packed string) []byte {
	buf = append(buf, l.String()...)
	if packed == "\x01" {
		return buf
	}
	return appendNumber(buf, packed)
}

// Format implements fmt.Formatter: %s (and %q, quoted) writes the whole word as
// String does, and %v writes it shortened when it is long: its first and last runs, and the
// numbers of runs and letters.
func (w Word) Format(f fmt.State, verb rune) {
	format(f, verb, "contfrac.Word", w.String, w.shortened)
}

func (w Word) shortened() string {
	n := w.Len()
	if n.IsInt64() && n.Int64() <= 64 {
		return w.String()
	}
	shown := elide(w.runs, " ", func(i int, packed string) string {
		if packed == "\x01" {
			return w.runLetter(i).String()
		}
		return w.runLetter(i).String() + Abbreviate(packedBig(packed))
	}, w.data)
	return fmt.Sprintf("%s (%d runs, %s letters)", shown, w.runs, Abbreviate(n))
}
