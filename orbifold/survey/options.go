package survey

import (
	"fmt"
	"runtime"
)

// DefaultMemory is the memory budget of a survey whose options set none: 2 GiB.
const DefaultMemory = int64(2) << 30

// MinMemory is the smallest memory budget that is accepted: 16 MiB.
const MinMemory = int64(16) << 20

// DefaultResults is the number of hits, coincidences or exceptions that are kept
// when the options set none.
const DefaultResults = 1 << 16

// Options says how a survey is carried out. Results never depend on it, with the
// one exception of Results. The zero value works.
type Options struct {
	// Workers is the number of goroutines; 0 for as many as there are processors.
	Workers int

	// MemoryBytes bounds the memory of Distinct for the keys it sorts, together with
	// its tables; 0 for DefaultMemory. It is not asked elsewhere: nothing else
	// needs memory that grows with the region.
	MemoryBytes int64

	// Checkpoint is the name of a file to which finished work is written, and from
	// which the same survey goes on if the file is there; empty for none. The file
	// is replaced in one step, never half written, and removed by nobody.
	Checkpoint string

	// Progress is called about four times a second and once at the end, by one goroutine at a
	// time; nil for never.
	Progress func(Progress)

	// Results is the number of hits, coincidences or exceptions that are kept before the
	// survey gives up with ErrTooMany; 0 for DefaultResults.
	Results int
}

// normal returns the options with zero values filled in.
func (o Options) normal() (Options, error) {
	if o.Workers < 0 || o.MemoryBytes < 0 || o.Results < 0 {
		return o, fmt.Errorf("survey: options: %d workers, %d bytes, %d results: want 0 or more: %w",
			o.Workers, o.MemoryBytes, o.Results, ErrOptions)
	}
	if o.MemoryBytes == 0 {
		o.MemoryBytes = DefaultMemory
	}
	if o.MemoryBytes < MinMemory {
		return o, fmt.Errorf("survey: options: memory of %d bytes: want at least %d: %w", o.MemoryBytes, MinMemory, ErrMemory)
	}
	if o.Workers == 0 {
		o.Workers = runtime.GOMAXPROCS(0)
	}
	o.Workers = min(o.Workers, 256)
	if o.Results == 0 {
		o.Results = DefaultResults
	}
	return o, nil
}
