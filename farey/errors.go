package farey

import (
	"errors"

	"example.com/onecusp/contfrac"
)

// Errors of this package. Every error returned wraps one of them, together with
// what was asked and what would be accepted; test with errors.Is.
var (
	// ErrSyntax: a text is not of the form that was asked for; the same error as
	// contfrac's.
	ErrSyntax = contfrac.ErrSyntax
	// ErrTooLarge: an input or a result is past a documented limit; the same error as
	// contfrac's.
	ErrTooLarge = contfrac.ErrTooLarge
	// ErrIndeterminate: 0/0 is no slope.
	ErrIndeterminate = errors.New("0/0 is no slope")
	// ErrNil: a nil *big.Int was given where a number is needed.
	ErrNil = errors.New("nil number")
	// ErrNegative: a negative slope was given where none is meant.
	ErrNegative = errors.New("negative slope")
	// ErrBound: the order of a sequence or the bound of a box is out of range.
	ErrBound = errors.New("bound out of range")
	// ErrNotNeighbours: two slopes that must be Farey neighbours are not.
	ErrNotNeighbours = errors.New("not Farey neighbours")
	// ErrBaseSlope: 0/1, 1/0 and 1/1 have no parents.
	ErrBaseSlope = errors.New("base slope")
	// ErrClass: a value of type Class is none of the three classes.
	ErrClass = errors.New("no such class")
)
