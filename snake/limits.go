package snake

import (
	"errors"
	"fmt"
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
	// ErrIndex reports an index outside a listing, or any index into an empty one.
	ErrIndex = errors.New("index out of range")
)

// shorten quotes an offending text, cut when it is long.
func shorten(s string) string {
	const head, tail = 24, 8
	if len(s) <= head+tail+8 {
		return fmt.Sprintf("%q", s)
	}
	return fmt.Sprintf("%q … %q (%d bytes)", s[:head], s[len(s)-tail:], len(s))
}
