package markov

import (
	"fmt"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold/spectrum"
)

// Christoffel returns the lower Christoffel word of the index p/q in [0, 1], in the letters x, for
// 0/1, and y, for 1/1: that of slope p/(q−p), with q−p letters x and p letters y. It is x at 0/1,
// y at 1/1, xy at 1/2, and the word at a mediant is that at the smaller neighbour followed by that
// at the greater one.
//
// An index outside [0, 1] is ErrIndex; a q past farey.MaxChristoffelLen is ErrTooLarge.
func Christoffel(index farey.Slope) (string, error) {
	s, err := wordSlope(index)
	if err != nil {
		return "", err
	}
	word, err := s.Christoffel()
	if err != nil {
		return "", fmt.Errorf("markov: Christoffel word of index %v: %w", index, err)
	}
	return word, nil
}

// Period returns the periodic continued fraction whose period is the Christoffel word of the index
// with 1, 1 for x and 2, 2 for y: [(1)] at 0/1, [(2)] at 1/1 and [(1; 1, 2, 2)] at 1/2. It is
// equivalent to the roots of the Markov form, and its Lagrange value is √(9 − 4/m²). Errors are
// those of Christoffel.
func Period(index farey.Slope) (contfrac.Periodic, error) {
	s, err := wordSlope(index)
	if err != nil {
		return contfrac.Periodic{}, err
	}
	x, err := spectrum.ChristoffelPeriod(s)
	if err != nil {
		return contfrac.Periodic{}, fmt.Errorf("markov: period at index %v: %w", index, err)
	}
	return x, nil
}

// IndexOf returns the index of a quadratic irrational, given by its continued fraction, whose
// Lagrange value is below 3, with √(9 − 4/m²) as that value; otherwise the error is
// spectrum.ErrNotBelowThree. It undoes Period, for all irrationals equivalent to it. Cost and
// other errors are those of spectrum.BelowThree, which has the proof.
func IndexOf(x contfrac.Periodic) (index farey.Slope, err error) {
	lattice, err := spectrum.BelowThree(x)
	if err != nil {
		return farey.Slope{}, fmt.Errorf("markov: index of %v: %w", x, err)
	}
	return Index(lattice)
}

// wordSlope returns p/(q−p) for the index p/q.
func wordSlope(index farey.Slope) (farey.Slope, error) {
	q, p, err := Point(index)
	if err != nil {
		return farey.Slope{}, err
	}
	return farey.New(p, q.Sub(q, p))
}
