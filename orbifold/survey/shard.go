package survey

import (
	"encoding/json"
	"fmt"
	"strconv"
	"strings"
)

const (
	// Format and Version are what results and checkpoints say of themselves.
	// Version counts up when their form or their meaning changes, the way in which
	// regions split included.
	Format  = "onecusp/survey"
	Version = 1

	// MaxShards is the number of shards that a region may be split into.
	MaxShards = 1 << 14
)

// Shard is a part of the walk over a region: one of the parts that Split makes.
// Its name says which: "top" for the slopes near the base, else the path from
// the base triangle to the first slope of a subtree, such as "infinity: L3 R".
//
// The text form of a shard, "5/64 infinity: L3 R", states its place, the number of
// shards that were asked for and the name, and is all that another machine needs beside
// the region.
type Shard struct {
	region Region
	index  int
	of     int // shards asked for
	made   int // shards there are
	piece  piece
}

// Split splits a region into at most n shards, 1 ≤ n ≤ MaxShards, of about the
// same number of slopes each: by halving the largest again and again as long as
// it is worth it. Each slope of the region lies in exactly one. The shards and their
// names depend on the region and n alone.
//
// Shards are subtrees, which is what sums, searches and tallies want; equal
// numbers may lie in different ones.
func Split(r Region, n int) ([]Shard, error) {
	w, err := newWalker(r)
	if err != nil {
		return nil, err
	}
	return w.shards(r, n)
}

func (w *walker) shards(r Region, n int) ([]Shard, error) {
	if n < 1 || n > MaxShards {
		return nil, fmt.Errorf("survey: %d shards: want 1 … %d: %w", n, MaxShards, ErrOptions)
	}
	r = r.clone()
	pieces := w.pieces(n)
	list := make([]Shard, len(pieces))
	for i, p := range pieces {
		list[i] = Shard{region: r, index: i, of: n, made: len(pieces), piece: p}
	}
	return list, nil
}

// ParseShard returns the shard of a region that has the given text form. The error
// is ErrSyntax for what is no such text and ErrMismatch when Split would
// not give it that name.
func ParseShard(r Region, text string) (Shard, error) {
	refuse := func(err error) (Shard, error) {
		return Shard{}, fmt.Errorf("survey: shard %q: want a text such as \"5/64 infinity: L3 R\": %w", clip(text), err)
	}
	place, name, ok := strings.Cut(text, " ")
	i, n, slash := strings.Cut(place, "/")
	index, err1 := strconv.ParseUint(i, 10, 31)
	of, err2 := strconv.ParseUint(n, 10, 31)
	if !ok || !slash || err1 != nil || err2 != nil || index < 1 || index > of || of > MaxShards {
		return refuse(ErrSyntax)
	}
	shards, err := Split(r, int(of))
	if err != nil {
		return Shard{}, err
	}
	if int(index) > len(shards) || shards[index-1].String() != text || shards[index-1].Name() != name {
		return refuse(ErrMismatch)
	}
	return shards[index-1], nil
}

// Region returns the region that the shard is part of.
func (s Shard) Region() Region { return s.region.clone() }

// Index returns the place of the shard among those of its split, from 0.
func (s Shard) Index() int { return s.index }

// Of returns the number of shards that Split was asked for; it may have made fewer.
func (s Shard) Of() int { return s.of }

// Name returns "top" or the path to the first slope of the shard.
func (s Shard) Name() string {
	if s.of == 0 {
		return ""
	}
	return s.piece.name()
}

// Load returns about how many slopes the shard has.
func (s Shard) Load() float64 { return s.piece.load }

// String returns the text form.
func (s Shard) String() string {
	if s.of == 0 {
		return "no shard"
	}
	return fmt.Sprintf("%d/%d %s", s.index+1, s.of, s.Name())
}

// header says what a result is about; results belong together when their
// headers are the same.
type header struct {
	Format  string `json:"format"`
	Version int    `json:"version"`
	Name    string `json:"name"`
	Region  Region `json:"region"`
	Split   int    `json:"split"`  // shards asked for
	Shards  int    `json:"shards"` // shards there are
}

func newHeader(name string, s Shard) header {
	return header{Format, Version, name, s.region, s.of, s.made}
}

// same refuses a header other than h.
func (h header) same(o header) error {
	a, err := json.Marshal(h)
	if err != nil {
		return err
	}
	b, err := json.Marshal(o)
	if err != nil {
		return err
	}
	if string(a) != string(b) {
		return fmt.Errorf("survey: result of %s: want one of %s: %w", clip(string(b)), clip(string(a)), ErrMismatch)
	}
	return nil
}

// known refuses headers of another format or version.
func (h header) known() error {
	if h.Format != Format || h.Version != Version {
		return fmt.Errorf("survey: result in format %q, version %d: want %q, version %d: %w",
			clip(h.Format), h.Version, Format, Version, ErrMismatch)
	}
	return nil
}
