package farey

import "math/big"

// Key is a comparable stand-in for a slope: keys are equal with == exactly when the
// slopes are, so it serves in maps. The zero value is the key of 0/1.
type Key struct {
	// a, b are the fields p, below of a small slope; of a large one the sign of p
	// and the number of bytes of |p|.
	a, b int64
	// large holds the bytes of |p| and q of a large slope, else nothing.
	large string
}

// Key returns the slope's key. Cost: linear in the size of its terms.
func (s Slope) Key() Key {
	if s.large == nil {
		return Key{a: s.p, b: s.below}
	}
	p := s.large.p.Bytes()
	return Key{a: int64(s.large.p.Sign()), b: int64(len(p)), large: string(append(p, s.large.q.Bytes()...))}
}

// Slope returns the slope that has the key.
func (k Key) Slope() Slope {
	if k.large == "" {
		return Slope{p: k.a, below: k.b}
	}
	p := new(big.Int).SetBytes([]byte(k.large[:k.b]))
	if k.a < 0 {
		p.Neg(p)
	}
	return fromCoprime(p, new(big.Int).SetBytes([]byte(k.large[k.b:])))
}
