package spectrum

import (
	"fmt"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
)

// BelowThree returns the lattice slope in [0, 1/2] of a quadratic irrational with Lagrange value
// below 3 from its continued fraction: the value is √(9 − 4/m²) for the Markov number m at the
// slope. A value of 3 or more is ErrNotBelowThree.
//
// The period is that of a Markov number exactly when it is, up to rotation, the Christoffel word
// of some slope b/a with 1, 1 in place of x and 2, 2 in place of y: a pairs of ones and b pairs of
// twos. So counting them gives the only candidate, with Frobenius index b/(a+b) and lattice slope
// b/(a+2b); comparing the periods decides. It costs a few operations for each term. Numbers are
// not computed. Words of more than farey.MaxChristoffelLen pairs are ErrTooLarge.
//
// Source: "An Introduction to Diophantine Approximation", Cambridge 1957, ch. II.
func BelowThree(x contfrac.Periodic) (farey.Slope, error) {
	period := x.Period()
	var count [3]int64
	for _, term := range period.All() {
		if term.BitLen() > 2 || term.Int64() > 2 {
			return farey.Slope{}, notBelowThree(x)
		}
		count[term.Int64()]++
	}
	a, b := count[1], count[2]
	// (1) and (2) stand for 1, 1 and 2, 2.
	if a+b > 1 && (a%2 != 0 || b%2 != 0) {
		return farey.Slope{}, notBelowThree(x)
	}
	if a+b > 1 {
		a, b = a/2, b/2
	}
	s, err := farey.FromInts(b, a)
	if err != nil {
		return farey.Slope{}, err // not reached: there is a term
	}
	want, err := ChristoffelPeriod(s)
	if err != nil {
		return farey.Slope{}, fmt.Errorf("spectrum: slope of %v: %w", x, err)
	}
	if !want.Equivalent(x) {
		return farey.Slope{}, notBelowThree(x)
	}
	return farey.FromInts(b, a+2*b)
}

func notBelowThree(x contfrac.Periodic) error {
	return fmt.Errorf("spectrum: slope of %v: a period made of 1, 1 and 2, 2 in the order of a Christoffel word would be accepted: %w", x, ErrNotBelowThree)
}

// ChristoffelPeriod returns the periodic continued fraction that the Christoffel word of a slope
// b/a ≥ 0 gives with 1, 1 for x and 2, 2 for y: that of the Markov number with index b/(a+b), at
// the lattice slope b/(a+2b). Errors are those of farey.Slope.Christoffel.
func ChristoffelPeriod(s farey.Slope) (contfrac.Periodic, error) {
	word, err := s.Christoffel()
	if err != nil {
		return contfrac.Periodic{}, err
	}
	// The runs of a word are the terms.
	var b contfrac.WordBuilder
	for i := range len(word) {
		n := uint64(1)
		if word[i] == 'y' {
			n = 2
		}
		b.Append(contfrac.R, n)
		b.Append(contfrac.L, n)
	}
	return contfrac.NewPeriodic(contfrac.Fraction{}, b.Word().Fraction())
}
