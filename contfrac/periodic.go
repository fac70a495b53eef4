package contfrac

import (
	"fmt"
	"iter"
	"math/big"
	"strings"
)

// Periodic is an infinite continued fraction that repeats from some place on,
//
//	[a₀; a₁, …, (b₁, …, bₙ)] = [a₀; a₁, …, b₁, …, bₙ, b₁, …, bₙ, …],
//
// a₀ any integer and the other terms at least 1: the expansion of a quadratic irrational, a
// [Surd]. The period and the terms before it are always the shortest, so that the same number has
// one form, and Periodic values are equal under == when they are the same number. They are
// immutable and take about one byte for each small term. The zero value is [(1)], the golden
// ratio.
type Periodic struct {
	pre    Fraction
	period Fraction // empty for [(1)]
}

// goldenPeriod is the period of the zero value.
var goldenPeriod = Fraction{n: 1, data: "\x01"}

// NewPeriodic returns the continued fraction with the terms of pre followed by those of period
// again and again. The two need not be the shortest. An empty period, or a term under 1 in it,
// gives ErrTerm.
func NewPeriodic(pre, period Fraction) (Periodic, error) {
	if period.n == 0 || period.neg || period.data[0] == 0 {
		return Periodic{}, fmt.Errorf("contfrac: period %v: one term or more, of at least 1, is accepted: %w", period, ErrTerm)
	}
	return shortest(pre, period), nil
}

// shortest makes the canonical form.
func shortest(pre, period Fraction) Periodic {
	period = period.root()
	// Terms before the period that continue it backwards belong to it.
	i, j := len(pre.data), len(period.data)
	turns := 0
	for i > 0 {
		a, b := packedStart(pre.data, i), packedStart(period.data, j)
		if a == 0 && pre.neg || pre.data[a:i] != period.data[b:j] {
			break
		}
		i, turns = a, turns+1
		if j = b; j == 0 {
			j = len(period.data)
		}
	}
	if turns > 0 {
		period.data = period.data[j:] + period.data[:j]
		pre = Fraction{n: pre.n - turns, neg: pre.neg, data: pre.data[:i]}
	}
	if pre.n == 0 && period == goldenPeriod {
		period = Fraction{}
	}
	return Periodic{pre: pre, period: period}
}

// root returns the shortest f' of which f is a repetition.
func (f Fraction) root() Fraction {
	// The first place where f is found in ff after the start. A packed sequence ends where a
	// number ends, so it starts where one does.
	at := 1 + strings.Index((f.data + f.data)[1:], f.data)
	if at == len(f.data) {
		return f
	}
	n := f.n / (len(f.data) / at)
	return Fraction{n: n, data: f.data[:at]}
}

// Pre returns the terms before the period; none if the period begins at once.
func (x Periodic) Pre() Fraction { return x.pre }

// Period returns the period.
func (x Periodic) Period() Fraction {
	if x.period.n == 0 {
		return goldenPeriod
	}
	return x.period
}

// All yields the index and the value of every term, each value fresh. It does not end, takes
// constant memory and can be run again.
func (x Periodic) All() iter.Seq2[int, *big.Int] {
	return func(yield func(int, *big.Int) bool) {
		for i, t := range x.pre.All() {
			if !yield(i, t) {
				return
			}
		}
		for i, period := x.pre.n, x.Period(); ; i += period.n {
			for j, t := range period.All() {
				if !yield(i+j, t) {
					return
				}
			}
		}
	}
}

// Prefix returns the first n terms. An n below 0 gives ErrTerm, one above MaxTerms ErrTooLarge.
func (x Periodic) Prefix(n int) (Fraction, error) {
	if n < 0 {
		return Fraction{}, fmt.Errorf("contfrac: the first %d terms: at least 0 are accepted: %w", n, ErrTerm)
	}
	if n > MaxTerms {
		return Fraction{}, fmt.Errorf("contfrac: the first %d terms: at most %d are accepted: %w", n, MaxTerms, ErrTooLarge)
	}
	var b termBuilder
	if n == 0 {
		return b.fraction(), nil
	}
	for i, t := range x.All() {
		b.push(t)
		if i+1 == n {
			break
		}
	}
	return b.fraction(), nil
}

// Convergents yields numerator and denominator of [a₀], [a₀; a₁], … in order, as fresh integers in
// lowest terms. It does not end and can be run again.
func (x Periodic) Convergents() iter.Seq2[*big.Int, *big.Int] { return convergents(x.All()) }

// Equivalent reports whether x and y agree from some places on: whether y = (ax + b)/(cx + d) for
// integers with ad − bc = ±1. It costs one search for the one period in the other.
func (x Periodic) Equivalent(y Periodic) bool {
	_, ok := x.offset(y)
	return ok
}

// offset returns how many terms of the period of x come before that of y begins in it.
func (x Periodic) offset(y Periodic) (terms int, ok bool) {
	f, g := x.Period(), y.Period()
	if f.n != g.n || len(f.data) != len(g.data) {
		return 0, false
	}
	at := strings.Index(f.data+f.data, g.data)
	if at < 0 {
		return 0, false
	}
	for i := 0; i < at; i = packedEnd(f.data, i) {
		terms++
	}
	return terms, true
}

// Surd returns the number. It costs O(M(n) log n) for terms of n bits in all, and a greatest
// common divisor of numbers of that size.
func (x Periodic) Surd() Surd {
	// y = [(b₁, …)] is fixed by the product [[a, b], [c, d]] of the matrices [[bᵢ, 1], [1, 0]]:
	// cy² + (d − a)y − b = 0.
	m := x.Period().product().full()
	p := new(big.Int).Sub(m.a, m.d)
	d := dot(p, p, new(big.Int).Lsh(m.b, 2), m.c)
	q := new(big.Int).Lsh(m.c, 1)
	y := lowestSurd(p, d, q, new(big.Int).Lsh(m.b, 1))
	if x.pre.n == 0 {
		return y
	}
	return y.apply(x.pre.product().full(), big.NewInt(int64(1-2*(x.pre.n%2))))
}
