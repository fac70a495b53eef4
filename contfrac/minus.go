package contfrac

import (
	"fmt"
	"iter"
	"math/big"
)

// Minus is a finite minus (Hirzebruch–Jung) continued fraction
//
//	b₀ − 1/(b₁ − 1/(b₂ − …)),
//
// b₀ any integer, the later terms at least 2. Every rational number has exactly one. Its
// text uses double brackets, "[[b0; b1, b2]]". Values are immutable, equal
// under == when their terms are equal, and take about one byte for each small
// term. The zero value has no terms and stands for 1/0.
type Minus struct {
	n    int
	neg  bool   // the first term is negative
	data string // packed absolute values of the terms
}

// NewMinus returns the minus continued fraction with the given terms. A nil term,
// or a term after the first that is less than 2, gives ErrTerm.
func NewMinus(terms ...*big.Int) (Minus, error) {
	b, err := minus.build(terms)
	return b.minus(), err
}

// MinusOf is NewMinus for small terms.
func MinusOf(terms ...int64) (Minus, error) {
	b, err := minus.buildSmall(terms)
	return b.minus(), err
}

func (b *termBuilder) minus() Minus {
	return Minus{n: b.n, neg: b.neg, data: string(b.buf)}
}

// Len returns the number of terms.
func (m Minus) Len() int { return m.n }

// Terms returns the terms as fresh integers; the result for no terms is
// empty.
func (m Minus) Terms() []*big.Int { return m.packed().Terms() }

// All yields the index and the value of every term, first to last, each value
// fresh. It holds one term at a time and can be run again.
func (m Minus) All() iter.Seq2[int, *big.Int] { return m.packed().All() }

// packed gives access to the terms in the way of a Fraction, whatever the
// value of the latter.
func (m Minus) packed() Fraction { return Fraction(m) }

// Equal reports whether m and n have the same terms; it is m == n.
func (m Minus) Equal(n Minus) bool { return m == n }

// Minus returns the minus continued fraction of the same value. A term a₁, a₃, … of the
// regular fraction becomes a run of a−1 twos, so the result has one term for a₀ and
// each later term of even index, and a₁ + a₃ + … twos less one for each; more than
// MaxTerms terms give ErrTooLarge before any is made. The empty fraction
// gives the empty one.
func (f Fraction) Minus() (Minus, error) {
	// [a₀; a₁, y] = a₀+1 − 1/(2 − 1/(… 2 − 1/(y+1))) with a₁−1 twos, and y+1
	// begins with a₂+1, which the same formula increases again if a₃ follows.
	count := new(big.Int)
	for i, a := range f.All() {
		if i%2 == 0 {
			count.Add(count, oneInt)
		} else {
			count.Add(count, a.Sub(a, oneInt))
		}
	}
	if !count.IsInt64() || count.Int64() > MaxTerms {
		return Minus{}, fmt.Errorf("contfrac: minus continued fraction of %s terms: at most %d are accepted: %w", Abbreviate(count), MaxTerms, ErrTooLarge)
	}
	b := termBuilder{buf: make([]byte, 0, int(count.Int64())+len(f.data)/2)}
	for i, a := range f.All() {
		if i%2 == 1 {
			for range a.Int64() - 1 {
				b.pushUint(2)
			}
			continue
		}
		if i > 0 {
			a.Add(a, oneInt)
		}
		if i < f.n-1 {
			a.Add(a, oneInt)
		}
		b.push(a)
	}
	return b.minus(), nil
}

// Fraction returns the regular continued fraction of the same value, with the last term at
// least 2 unless it is the only one. It costs one step a term.
func (m Minus) Fraction() Fraction {
	var b termBuilder
	var twos uint64
	for i, at := 0, 0; at < len(m.data); i++ {
		end := packedEnd(m.data, at)
		packed := m.data[at:end]
		at = end
		if i > 0 && packed == "\x02" {
			twos++
			continue
		}
		t := packedBig(packed)
		if i == 0 && m.neg {
			t.Neg(t)
		}
		if i > 0 {
			b.pushUint(twos + 1)
			twos = 0
			t.Sub(t, oneInt)
		}
		if i < m.n-1 {
			t.Sub(t, oneInt)
		}
		b.push(t)
	}
	if twos > 0 {
		b.pushUint(twos + 1)
	}
	return b.fraction().Canonical()
}

// Ratio returns numerator and denominator in lowest terms; 1 and 0 if there
// are no terms. It costs as much as Fraction and Fraction.Ratio.
func (m Minus) Ratio() (num, den *big.Int) { return m.Fraction().Ratio() }

// Rat returns the value; no terms give ErrInfinite.
func (m Minus) Rat() (*big.Rat, error) { return m.Fraction().Rat() }
