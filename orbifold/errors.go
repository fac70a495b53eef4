package orbifold

import (
	"errors"
	"fmt"
	"math/big"

	"example.com/onecusp/farey"
)

var (
	// ErrWeight reports a weight below zero.
	ErrWeight = errors.New("weights are integers ≥ 0")

	// ErrTooLarge reports a result that would not fit: a number with more bits
	// than the family's limit, a word or a graph longer than this package
	// builds, a logarithm that leaves the range of float64. It is the same
	// value in contfrac, farey and here.
	ErrTooLarge = farey.ErrTooLarge

	// ErrNoCrossing reports a question about the word of an arc that crosses
	// nothing: the arcs at 0/1, 1/0 and 1/1 are edges of the triangulation and
	// have no word. (The empty word is something else: one tile, number 2.)
	ErrNoCrossing = errors.New("the arc crosses no edge")

	// ErrNotSolution reports three integers that do not solve (E).
	ErrNotSolution = errors.New("not a solution of the equation")

	// ErrNotPositive reports an integer that has to be at least 1.
	ErrNotPositive = errors.New("not a positive integer")

	// ErrModulus reports a modulus below 1.
	ErrModulus = errors.New("a modulus is an integer ≥ 1")

	// ErrCount reports a number of results to be returned that is out of range.
	ErrCount = errors.New("count out of range")

	// ErrPrecision reports a precision outside 1 … MaxLogPrecision.
	ErrPrecision = errors.New("precision out of range")

	// ErrNoSemiring reports a missing semiring.
	ErrNoSemiring = errors.New("no semiring given")

	// ErrCertificate reports a certificate with a field that is wrong.
	ErrCertificate = errors.New("certificate does not hold")
)

// brief writes an integer for an error message: whole when short, else its
// first digits and its length.
func brief(x *big.Int) string {
	if x == nil {
		return "nothing"
	}
	if x.BitLen() <= 128 {
		return x.String()
	}
	if x.BitLen() > 1<<16 {
		return fmt.Sprintf("an integer of %d bits", x.BitLen())
	}
	s := x.String()
	return fmt.Sprintf("%s… (%d characters)", s[:20], len(s))
}
