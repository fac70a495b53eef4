package survey

import (
	"errors"
	"fmt"

	"example.com/onecusp/orbifold"
)

var (
	// ErrBound reports a bound that is missing, below 1 or past MaxBoundBits.
	ErrBound = errors.New("bound out of range")

	// ErrRegion reports a region that is not finite, contradicts itself or is of
	// a kind that the work asked for does not know.
	ErrRegion = errors.New("region out of range")

	// ErrOptions reports an option that is out of range.
	ErrOptions = errors.New("option out of range")

	// ErrMemory reports a memory budget that is too small for the work.
	ErrMemory = errors.New("memory budget too small")

	// ErrTooMany reports more coincidences or hits than are kept.
	ErrTooMany = errors.New("too many results")

	// ErrAudit reports a walk whose accounts do not balance: arcs were missed or
	// visited twice, or the arithmetic failed.
	ErrAudit = errors.New("audit failed")

	// ErrMismatch reports results, shards or checkpoints that do not belong
	// together: of other families, regions, formats or versions, doubled or
	// missing shards.
	ErrMismatch = errors.New("results do not belong together")

	// ErrSyntax reports a text that is not of the form asked for.
	ErrSyntax = errors.New("malformed text")

	// ErrTooLarge is the same value as in orbifold.
	ErrTooLarge = orbifold.ErrTooLarge
)

// clip shortens text of a caller for an error message.
func clip(s string) string {
	if len(s) <= 64 {
		return s
	}
	return s[:48] + fmt.Sprintf("… (%d bytes)", len(s))
}
