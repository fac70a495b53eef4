package spectrum

import (
	"errors"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold"
)

// Errors of this package. Every error returned wraps one of them, one of package contfrac or the
// error of a context; test with errors.Is.
var (
	// ErrTooLarge: numbers past the limit of the family, or a period past contfrac.MaxPeriod; the
	// same error as orbifold's.
	ErrTooLarge = orbifold.ErrTooLarge
	// ErrNotPositive: an integer that has to be at least 1; the same error as orbifold's.
	ErrNotPositive = orbifold.ErrNotPositive
	// ErrNotRoot: N divides y² + k·y + 1 for no weight k of the family.
	ErrNotRoot = errors.New("not a root of y² + k·y + 1")
	// ErrNotBelowThree: the Lagrange value is 3 or more.
	ErrNotBelowThree = errors.New("the Lagrange value is not below 3")
)

// short writes an integer for an error message.
var short = contfrac.Abbreviate
