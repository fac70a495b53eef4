package markov

import (
	"errors"

	"example.com/onecusp/orbifold"
)

// Errors of this package. Every error returned wraps one of them or the error of a
// context; test with errors.Is.
var (
	// ErrIndex: a slope outside [0, 1] was given as an index, or a point that has
	// none.
	ErrIndex = errors.New("a Frobenius index lies in [0, 1]")
	// ErrNoIndex: a lattice slope outside [0, 1/2] has no index of its own.
	ErrNoIndex = errors.New("a lattice slope with an index lies in [0, 1/2]")
	// ErrNotPrimitive: a lattice point with coordinates that have a common factor.
	ErrNotPrimitive = errors.New("not a primitive lattice point")
	// ErrNotSolution: three integers that are no Markov triple; the same error as
	// orbifold's.
	ErrNotSolution = orbifold.ErrNotSolution
	// ErrNotPositive: an integer that has to be at least 1; the same error as
	// orbifold's.
	ErrNotPositive = orbifold.ErrNotPositive
	// ErrTooLarge: a result with more bits than orbifold.DefaultLimit; the same
	// error as orbifold's.
	ErrTooLarge = orbifold.ErrTooLarge
)
