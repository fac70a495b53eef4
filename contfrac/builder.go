package contfrac

import (
	"fmt"
	"math/big"
	"math/bits"
)

// WordBuilder puts a Word together from left to right. The zero value is an
// empty word, ready to use. It must not be copied after its first use, nor used by two goroutines
// at once.
type WordBuilder struct {
	first Letter
	last  Letter
	runs  int      // runs, the open one included
	open  uint64   // length of the open run, less the excess
	over  *big.Int // excess of the open run past what open holds; may be nil
	buf   []byte   // packed lengths of the closed runs
}

// Append puts l at the end n times; n = 0 does nothing. It takes constant time,
// amortised.
func (b *WordBuilder) Append(l Letter, n uint64) {
	if n == 0 {
		return
	}
	b.turn(l.proper())
	sum, carry := bits.Add64(b.open, n, 0)
	if carry != 0 {
		b.spill(new(big.Int).SetUint64(b.open))
		sum = n
	}
	b.open = sum
}

// AppendBig puts l at the end n times; n = 0 does nothing. A negative or nil n
// gives ErrTerm.
func (b *WordBuilder) AppendBig(l Letter, n *big.Int) error {
	if n == nil || n.Sign() < 0 {
		return fmt.Errorf("contfrac: run of length %s: lengths of at least 0 are accepted: %w", Abbreviate(n), ErrTerm)
	}
	b.append(l, n)
	return nil
}

// append is AppendBig for an n known to be at least 0.
func (b *WordBuilder) append(l Letter, n *big.Int) {
	if n.IsUint64() {
		b.Append(l, n.Uint64())
		return
	}
	b.turn(l.proper())
	b.spill(n)
}

// AppendWord puts the letters of w at the end. It costs one copy of w.
func (b *WordBuilder) AppendWord(w Word) {
	if w.runs == 0 {
		return
	}
	// The first run may join the open one and the last run stays open; what
	// lies between is copied.
	end := packedEnd(w.data, 0)
	b.append(w.first, packedBig(w.data[:end]))
	if w.runs == 1 {
		return
	}
	last := packedStart(w.data, len(w.data))
	b.close()
	b.buf = append(b.buf, w.data[end:last]...)
	b.runs += w.runs - 2
	l := w.runLetter(w.runs - 1)
	b.begin(l)
	b.append(l, packedBig(w.data[last:]))
}

// Word returns the word put together so far. The builder can go on
// afterwards. It costs one copy.
func (b *WordBuilder) Word() Word {
	if b.runs == 0 {
		return Word{}
	}
	n := len(b.buf)
	b.buf = b.appendOpen(b.buf)
	w := Word{first: b.first, runs: b.runs, data: string(b.buf)}
	b.buf = b.buf[:n]
	return w
}

// turn makes sure that a run of the letter l is open.
func (b *WordBuilder) turn(l Letter) {
	switch {
	case b.runs == 0:
		b.first = l
		b.begin(l)
	case l != b.last:
		b.close()
		b.begin(l)
	}
}

func (b *WordBuilder) begin(l Letter) {
	b.last, b.open, b.over = l, 0, nil
	b.runs++
}

// close packs the open run; the caller begins another.
func (b *WordBuilder) close() { b.buf = b.appendOpen(b.buf) }

func (b *WordBuilder) appendOpen(buf []byte) []byte {
	if b.over == nil {
		return appendPacked(buf, b.open)
	}
	n := new(big.Int).SetUint64(b.open)
	return appendPackedBig(buf, n.Add(n, b.over))
}

// spill adds n to the excess of the open run.
func (b *WordBuilder) spill(n *big.Int) {
	if b.over == nil {
		b.over = new(big.Int)
	}
	b.over.Add(b.over, n)
}
