package recognize

import (
	"errors"
	"fmt"

	"example.com/onecusp/contfrac"
	"example.com/onecusp/orbifold"
)

var (
	// ErrEmpty reports a list without integers, or with one missing.
	ErrEmpty = errors.New("no integers given")

	// ErrConstant reports a constant sequence where a fan is asked for: a fan has
	// no value more than twice.
	ErrConstant = errors.New("constant sequence")

	// ErrNotInteger reports a text with a fraction or a decimal number where an
	// integer is needed.
	ErrNotInteger = errors.New("not an integer")

	// ErrOptions reports an option that is out of range.
	ErrOptions = errors.New("option out of range")

	// ErrIndex reports index–value lines whose indices do not go up by one.
	ErrIndex = errors.New("indices out of order")

	// ErrSyntax reports a text that is not of the form asked for. It is the same
	// value as in contfrac.
	ErrSyntax = contfrac.ErrSyntax

	// ErrTooLarge reports an input past a limit of this package, or weights past
	// the int64 of orbifold.New. It is the same value as in orbifold.
	ErrTooLarge = orbifold.ErrTooLarge

	// ErrNotPositive reports an integer below 1, which no slope carries. It is the
	// same value as in orbifold.
	ErrNotPositive = orbifold.ErrNotPositive
)

// clip shortens text of a caller for an error message.
func clip(s string) string {
	if len(s) <= 64 {
		return s
	}
	return s[:48] + fmt.Sprintf("… (%d bytes)", len(s))
}
