package contfrac

import (
	"fmt"
	"math/big"
)

// rule tells the two kinds of continued fractions apart.
type rule struct {
	name       string
	least      *big.Int // of the terms after the first
	open, shut string   // brackets of the text form
}

var (
	regular = rule{"fraction", big.NewInt(1), "[", "]"}
	minus   = rule{"minus continued fraction", big.NewInt(2), "[[", "]]"}
)

// build returns a builder that holds the terms; on error, an empty one.
func (r rule) build(terms []*big.Int) (termBuilder, error) {
	var b termBuilder
	for _, t := range terms {
		if err := r.add(&b, t); err != nil {
			return termBuilder{}, fmt.Errorf("contfrac: term %d: %w", b.n, err)
		}
	}
	return b, nil
}

// buildSmall is build for small terms.
func (r rule) buildSmall(terms []int64) (termBuilder, error) {
	var b termBuilder
	for _, t := range terms {
		if err := r.add(&b, big.NewInt(t)); err != nil {
			return termBuilder{}, fmt.Errorf("contfrac: term %d: %w", b.n, err)
		}
	}
	return b, nil
}

// add appends t if the rule allows it.
func (r rule) add(b *termBuilder, t *big.Int) error {
	if t == nil || b.n > 0 && t.Cmp(r.least) < 0 {
		return fmt.Errorf("%s in a %s: any integer first and then integers of at least %s are accepted: %w", Abbreviate(t), r.name, r.least, ErrTerm)
	}
	b.push(t)
	return nil
}

// termBuilder is a stack of terms, of which the first alone may be negative.
type termBuilder struct {
	n   int
	neg bool
	buf []byte
}

func (b *termBuilder) push(t *big.Int) {
	if b.n == 0 {
		b.neg = t.Sign() < 0
	}
	b.buf = appendPackedBig(b.buf, t)
	b.n++
}

func (b *termBuilder) pushUint(t uint64) {
	b.buf = appendPacked(b.buf, t)
	b.n++
}

// pop removes the last term, of which there must be one, and returns it.
func (b *termBuilder) pop() *big.Int {
	at := packedStart(b.buf, len(b.buf))
	t := packedBig(b.buf[at:])
	b.buf = b.buf[:at]
	b.n--
	if b.n == 0 && b.neg {
		b.neg = false
		t.Neg(t)
	}
	return t
}

// drop removes the last term.
func (b *termBuilder) drop() {
	b.buf = b.buf[:packedStart(b.buf, len(b.buf))]
	b.n--
}

func (b *termBuilder) fraction() Fraction {
	return Fraction{n: b.n, neg: b.neg, data: string(b.buf)}
}
