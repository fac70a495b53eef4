package contfrac

import "math/big"

// A packed sequence is a string of non-negative integers, seven bits to a
// byte, low bits first, every byte of a number but its last with the top bit
// set; a number has no superfluous zero bytes. So equal sequences are equal
// strings, a number under 128 costs one byte, and the sequence can be read
// from either end.

const (
	packedMore = 0x80
	packedMask = 0x7f
)

// appendPacked appends n to buf.
func appendPacked(buf []byte, n uint64) []byte {
	for n >= packedMore {
		buf = append(buf, byte(n)|packedMore)
		n >>= 7
	}
	return append(buf, byte(n))
}

// appendPackedBig appends |n| to buf.
func appendPackedBig(buf []byte, n *big.Int) []byte {
	var acc uint64
	have := 0
	left := n.BitLen()
	if left == 0 {
		return append(buf, 0)
	}
	for _, w := range n.Bits() {
		// A word is taken in halves of at most 32 bits, so that acc, which
		// holds fewer than 7 bits before, never overflows.
		for part := 0; part < wordBits; part += 32 {
			acc |= (uint64(w) >> part & 0xffffffff) << have
			have += 32
			for have >= 7 {
				if left <= 7 {
					return append(buf, byte(acc&packedMask))
				}
				buf = append(buf, byte(acc&packedMask)|packedMore)
				acc >>= 7
				have -= 7
				left -= 7
			}
		}
	}
	return append(buf, byte(acc&packedMask))
}

// packedEnd returns the index just past the number that starts at s[i].
func packedEnd[S string | []byte](s S, i int) int {
	for s[i] >= packedMore {
		i++
	}
	return i + 1
}

// packedStart returns the index at which the number that ends just before
// s[end] starts.
func packedStart[S string | []byte](s S, end int) int {
	i := end - 1
	for i > 0 && s[i-1] >= packedMore {
		i--
	}
	return i
}

// packedUint returns the number held by all of s, and whether it fits.
func packedUint[S string | []byte](s S) (uint64, bool) {
	if len(s) > 10 || len(s) == 10 && s[9] > 1 {
		return 0, false
	}
	var n uint64
	for i := len(s) - 1; i >= 0; i-- {
		n = n<<7 | uint64(s[i]&packedMask)
	}
	return n, true
}

// packedBig returns the number held by all of s as a fresh integer.
func packedBig[S string | []byte](s S) *big.Int {
	if n, ok := packedUint(s); ok {
		return new(big.Int).SetUint64(n)
	}
	words := make([]big.Word, 0, len(s)*7/wordBits+1)
	var acc, have uint
	for i := 0; i < len(s); i++ {
		v := uint(s[i] & packedMask)
		acc |= v << have
		have += 7
		if have >= wordBits {
			words = append(words, big.Word(acc))
			have -= wordBits
			acc = v >> (7 - have)
		}
	}
	return new(big.Int).SetBits(append(words, big.Word(acc)))
}

// unpack returns the numbers of s, of which there are n, as fresh integers.
func unpack(s string, n int) []*big.Int {
	out := make([]*big.Int, 0, n)
	for i := 0; i < len(s); {
		end := packedEnd(s, i)
		out = append(out, packedBig(s[i:end]))
		i = end
	}
	return out
}

// reversePacked returns the numbers of s in the opposite order.
func reversePacked(s string) string {
	out := make([]byte, len(s))
	for i, to := 0, len(s); i < len(s); {
		end := packedEnd(s, i)
		to -= end - i
		copy(out[to:], s[i:end])
		i = end
	}
	return string(out)
}
