package farey

import "fmt"

// MaxChristoffelLen is the greatest length p + q of a word that [Slope.Christoffel]
// returns.
const MaxChristoffelLen = 1 << 24

// Christoffel returns the lower Christoffel word of the slope p/q ≥ 0: the steps x
// (right) and y (up) of the highest lattice path from (0, 0) to (q, p) that stays on
// or below the straight segment. It has q letters x and p letters y: "x" for 0/1, "y"
// for 1/0, "xy" for 1/1, "xxy" for 1/2. Read backwards it is the upper word.
//
// It fails with [ErrNegative] for a negative slope, and with [ErrTooLarge] if p + q is
// past [MaxChristoffelLen].
func (s Slope) Christoffel() (string, error) {
	if s.Sign() < 0 {
		return "", fmt.Errorf("farey: Christoffel word of slope %v: slopes from 0/1 to 1/0 would be accepted: %w", s, ErrNegative)
	}
	p, q, ok := s.Int64s()
	if !ok || p > MaxChristoffelLen || q > MaxChristoffelLen || p+q > MaxChristoffelLen {
		return "", fmt.Errorf("farey: Christoffel word of slope %v: up to %d letters, numerator and denominator together, would be accepted: %w", s, MaxChristoffelLen, ErrTooLarge)
	}
	word := make([]byte, p+q)
	// below = p·x − q·y at the point reached: how far it is under the segment. A step
	// up costs q of it and is taken as soon as it is there.
	var below int64
	for i := range word {
		if below < q {
			word[i] = 'x'
			below += p
		} else {
			word[i] = 'y'
			below -= q
		}
	}
	return string(word), nil
}
