package contfrac

import "errors"

// The errors of this package, to be tested for with errors.Is. Every error it
// returns wraps one of them.
var (
	// ErrSyntax: a text is not of the form asked for.
	ErrSyntax = errors.New("malformed text")
	// ErrTooLarge: an input or a result passes a stated limit.
	ErrTooLarge = errors.New("too large")
	// ErrTerm: a term, run length or argument is missing or out of range.
	ErrTerm = errors.New("term out of range")
	// ErrInfinite: the value is 1/0, or 0/0 was asked for.
	ErrInfinite = errors.New("no finite value")
	// ErrDeterminant: a matrix has the wrong determinant for the operation.
	ErrDeterminant = errors.New("determinant out of range")
	// ErrNegativeEntry: a matrix has a negative entry where none may be.
	ErrNegativeEntry = errors.New("negative matrix entry")
	// ErrTrace: a matrix that is not hyperbolic, or has a negative trace.
	ErrTrace = errors.New("trace out of range")
	// ErrDiscriminant: a number under a root is not positive, or is a square.
	ErrDiscriminant = errors.New("discriminant out of range")
)

// Limits on what is read, and on what is made out of something much shorter.
const (
	// MaxText bounds, in bytes, every text that a parser or decoder accepts.
	MaxText = 64 << 20
	// MaxDigits bounds the decimal digits of one integer in such a text.
	MaxDigits = 1 << 20
	// MaxPlainLetters is the length up to which Word.String writes letter by
	// letter.
	MaxPlainLetters = 1 << 20
	// MaxTerms bounds the terms of a minus continued fraction made from a
	// regular one, where one large term becomes many.
	MaxTerms = 1 << 24
	// MaxBits bounds the entries of a matrix power, in bits.
	MaxBits = 1 << 30
)
