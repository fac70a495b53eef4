package contfrac

import (
	"math/big"
	"math/bits"
)

// two is a number of two words, modulo the square of the word size.
type two struct{ hi, lo uint }

// leadingTwo returns the two words of w from the top one after a shift to the left by
// less than a word.
func leadingTwo(w []big.Word, shift int) two {
	at := func(i int) uint {
		if i < 0 {
			return 0
		}
		return uint(w[i])
	}
	n := len(w)
	a, b, c := at(n-1), at(n-2), at(n-3)
	return two{a<<shift | b>>(wordBits-shift), b<<shift | c>>(wordBits-shift)}
}

// shiftHigh returns the high word after a shift to the left by less than a word.
func (x two) shiftHigh(shift int) uint {
	return x.hi<<shift | x.lo>>(wordBits-shift)
}

func (x two) mul(n uint) two {
	hi, lo := bits.Mul(x.lo, n)
	return two{hi + x.hi*n, lo}
}

func (x two) add(y two) two {
	lo, k := bits.Add(x.lo, y.lo, 0)
	return two{x.hi + y.hi + k, lo}
}

func (x two) sub(y two) two {
	lo, k := bits.Sub(x.lo, y.lo, 0)
	return two{x.hi - y.hi - k, lo}
}

func (x two) less(y two) bool {
	return x.hi < y.hi || x.hi == y.hi && x.lo < y.lo
}
