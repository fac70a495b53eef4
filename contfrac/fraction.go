package contfrac

import (
	"fmt"
	"iter"
	"math/big"
)

// Fraction is a finite regular continued fraction
//
//	[a₀; a₁, a₂, …] = a₀ + 1/(a₁ + 1/(a₂ + …)),
//
// a₀ any integer, the later terms at least 1. Fractions are immutable and are
// equal under == when their terms are equal; [1; 1] and [2] are therefore
// different, and Canonical tells whether they have the same value. A fraction
// takes about one byte for each small term. The zero value has no terms and
// stands for 1/0.
type Fraction struct {
	n    int
	neg  bool   // the first term is negative
	data string // packed absolute values of the terms
}

// NewFraction returns the fraction with the given terms. A nil term, or a
// term after the first that is less than 1, gives ErrTerm.
func NewFraction(terms ...*big.Int) (Fraction, error) {
	b, err := regular.build(terms)
	return b.fraction(), err
}

// FractionOf is NewFraction for small terms.
func FractionOf(terms ...int64) (Fraction, error) {
	b, err := regular.buildSmall(terms)
	return b.fraction(), err
}

// Len returns the number of terms.
func (f Fraction) Len() int { return f.n }

// Terms returns the terms as fresh integers; the result of the empty fraction is
// empty.
func (f Fraction) Terms() []*big.Int {
	terms := unpack(f.data, f.n)
	if f.neg {
		terms[0].Neg(terms[0])
	}
	return terms
}

// All yields the index and the value of every term, first to last, each value
// fresh. It holds one term at a time and can be run again.
func (f Fraction) All() iter.Seq2[int, *big.Int] {
	return func(yield func(int, *big.Int) bool) {
		for i, at := 0, 0; at < len(f.data); i++ {
			end := packedEnd(f.data, at)
			t := packedBig(f.data[at:end])
			if i == 0 && f.neg {
				t.Neg(t)
			}
			if !yield(i, t) {
				return
			}
			at = end
		}
	}
}

// Numerator returns the numerator in lowest terms, which is the Continuant of
// the terms; 1 for the empty fraction. It costs O(M(n) log n) for a result of n
// bits.
func (f Fraction) Numerator() *big.Int { return f.product().corner() }

// Denominator returns the denominator in lowest terms, at least 1, which is
// the Continuant of the terms after the first; 0 for the empty fraction. It costs as much
// as Numerator; use Ratio when both are wanted.
func (f Fraction) Denominator() *big.Int {
	if f.n == 0 {
		return new(big.Int)
	}
	return f.tail().product().corner()
}

// tail drops the first term of a fraction that has one.
func (f Fraction) tail() Fraction {
	return Fraction{n: f.n - 1, data: f.data[packedEnd(f.data, 0):]}
}

// Ratio returns Numerator and Denominator together, at less cost than one
// after the other.
func (f Fraction) Ratio() (num, den *big.Int) { return f.product().column() }

// Rat returns the value. The empty fraction gives ErrInfinite. No greatest
// common divisor is taken, so it costs no more than Ratio.
func (f Fraction) Rat() (*big.Rat, error) {
	if f.n == 0 {
		return nil, fmt.Errorf("contfrac: the empty fraction is 1/0: a fraction with terms is accepted: %w", ErrInfinite)
	}
	num, den := f.Ratio()
	if den.IsInt64() && den.Int64() == 1 {
		return new(big.Rat).SetInt(num), nil
	}
	// Num and Denom refer into a Rat that has been set, and numerator and
	// denominator are coprime, so they may be put in place as they are.
	r := big.NewRat(1, 2)
	r.Num().Set(num)
	r.Denom().Set(den)
	return r, nil
}

// Convergents yields numerator and denominator of [a₀], [a₀; a₁], … in order,
// as fresh integers in lowest terms, by the recurrence pₖ = aₖpₖ₋₁ + pₖ₋₂: two
// multiplications and two additions for each. It can be run again.
func (f Fraction) Convergents() iter.Seq2[*big.Int, *big.Int] { return convergents(f.All()) }

// convergents is Convergents for a sequence of terms.
func convergents(terms iter.Seq2[int, *big.Int]) iter.Seq2[*big.Int, *big.Int] {
	return func(yield func(*big.Int, *big.Int) bool) {
		p0, q0 := new(big.Int), big.NewInt(1)
		p1, q1 := big.NewInt(1), new(big.Int)
		for _, a := range terms {
			p0.Add(p0, Product(a, p1))
			q0.Add(q0, Product(a, q1))
			p0, p1, q0, q1 = p1, p0, q1, q0
			if !yield(new(big.Int).Set(p1), new(big.Int).Set(q1)) {
				return
			}
		}
	}
}

// Canonical returns the fraction of the same value whose last term is at
// least 2 unless it is the only one: […, a, 1] becomes […, a+1].
func (f Fraction) Canonical() Fraction {
	if f.n < 2 || f.data[len(f.data)-1] != 1 || packedStart(f.data, len(f.data)) != len(f.data)-1 {
		return f
	}
	b := f.builder(f.n - 1)
	last := b.pop()
	b.push(last.Add(last, oneInt))
	return b.fraction()
}

// Split returns the fraction of the same value that ends in 1: […, a] becomes
// […, a−1, 1]. The empty fraction stays.
func (f Fraction) Split() Fraction {
	if f.n == 0 || f.n > 1 && f.Canonical() != f {
		return f
	}
	b := f.builder(f.n)
	last := b.pop()
	b.push(last.Sub(last, oneInt))
	b.push(oneInt)
	return b.fraction()
}

// Reverse returns the fraction with the terms in the opposite order, which has the
// same numerator. A first term under 1 before others gives ErrTerm.
func (f Fraction) Reverse() (Fraction, error) {
	if f.n > 1 && (f.neg || f.data[0] == 0) {
		return Fraction{}, fmt.Errorf("contfrac: reverse of %v: a first term of at least 1 is accepted: %w", f, ErrTerm)
	}
	return Fraction{n: f.n, neg: f.neg, data: reversePacked(f.data)}, nil
}

// Word returns the word whose run lengths are the terms, the first run in R,
// at no cost; take Swap of it for the word that starts with L. A first term
// under 1 gives ErrTerm; the empty fraction gives the empty word.
func (f Fraction) Word() (Word, error) {
	if f.n == 0 {
		return Word{}, nil
	}
	if f.neg || f.data[0] == 0 {
		return Word{}, fmt.Errorf("contfrac: word of %v: terms of at least 1 are accepted: %w", f, ErrTerm)
	}
	return Word{first: R, runs: f.n, data: f.data}, nil
}

// Equal reports whether f and g have the same terms; it is f == g.
func (f Fraction) Equal(g Fraction) bool { return f == g }

// builder returns a builder that holds the first n terms.
func (f Fraction) builder(n int) *termBuilder {
	data := f.data
	for i := f.n; i > n; i-- {
		data = data[:packedStart(data, len(data))]
	}
	return &termBuilder{n: n, neg: f.neg, buf: append(make([]byte, 0, len(data)+10), data...)}
}
