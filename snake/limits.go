package snake

import (
	"errors"
	"fmt"
	"math/big"

	"example.com/onecusp/contfrac"
)

// MaxTiles is the largest number of tiles whose shape is laid out in memory
// (three bytes a tile). A longer graph in run form can still be counted.
const MaxTiles = 1 << 26

// Errors of this package. They arrive wrapped with what was asked for.
var (
	// ErrTooLong reports a graph with more tiles than the operation accepts.
	ErrTooLong = errors.New("graph too long")
	// ErrNoTile reports a tile index outside 1 … Tiles().
	ErrNoTile = errors.New("no such tile")
	// ErrNoSide reports an edge that the graph does not have.
	ErrNoSide = errors.New("no such edge")
	// ErrNotPositive reports a continued fraction that names no snake graph:
	// it has no term, or a term below 1.
	ErrNotPositive = errors.New("terms must be positive")
	// ErrNotMatching reports a set of flipped tiles that is no matching of the
	// graph or set it was used with.
	ErrNotMatching = errors.New("not a matching of this graph")
	// ErrTooMany reports a set with more matchings than the caller is ready to
	// hold; a [TooManyError] in the chain has the exact number.
	ErrTooMany = errors.New("too many matchings")
	// ErrIndex reports an index outside a listing, or any index into an empty
	// one; also the number of a variable, or an exponent, outside its range.
	ErrIndex = errors.New("index out of range")
	// ErrNoSource reports a missing source of random bits.
	ErrNoSource = errors.New("no source of random bits")
	// ErrTooLarge reports a number that would be too large to hold; the same
	// value as in contfrac.
	ErrTooLarge = contfrac.ErrTooLarge
	// ErrNotCrossing reports a common piece of two graphs in which they do not
	// cross.
	ErrNotCrossing = errors.New("not a crossing")
	// ErrModulus reports a modulus below 1.
	ErrModulus = errors.New("modulus must be positive")
)

// TooManyError tells how many matchings there are, where fewer were asked for.
// It wraps [ErrTooMany].
type TooManyError struct {
	Count *big.Int // how many there are, exactly
	Limit int      // how many were accepted
}

// Error returns a sentence with both numbers, the count shortened when it is
// long.
func (e *TooManyError) Error() string {
	return fmt.Sprintf("snake: %s matchings, at most %d are accepted: %v", contfrac.Abbreviate(e.Count), e.Limit, ErrTooMany)
}

// Unwrap returns [ErrTooMany].
func (e *TooManyError) Unwrap() error { return ErrTooMany }

func tooMany(count, limit int) error {
	return &TooManyError{big.NewInt(int64(count)), limit}
}

// within returns the count of a set, or the error when it is above the limit.
func (t Set) within(limit int) (int, error) {
	count := t.Count()
	if count.Cmp(big.NewInt(int64(max(limit, 0)))) > 0 {
		return 0, &TooManyError{count, limit}
	}
	return int(count.Int64()), nil
}

// shorten quotes an offending text, cut when it is long.
func shorten(s string) string {
	const head, tail = 24, 8
	if len(s) <= head+tail+8 {
		return fmt.Sprintf("%q", s)
	}
	return fmt.Sprintf("%q … %q (%d bytes)", s[:head], s[len(s)-tail:], len(s))
}
