package linear

import (
	"math/big"
	"math/bits"
)

// field is the field of the residues modulo a prime m < 2⁶⁴.
type field struct{ m uint64 }

func (f field) from(x *big.Int) uint64 {
	return new(big.Int).Mod(x, new(big.Int).SetUint64(f.m)).Uint64()
}

func (f field) sub(x, y uint64) uint64 {
	if x < y {
		return x + (f.m - y)
	}
	return x - y
}

func (f field) mul(x, y uint64) uint64 {
	hi, lo := bits.Mul64(x, y)
	_, rem := bits.Div64(hi, lo, f.m)
	return rem
}

// one is the integer 1, never changed.
var one = big.NewInt(1)
