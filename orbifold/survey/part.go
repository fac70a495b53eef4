package survey

import (
	"encoding/json"
	"fmt"
	"slices"
	"sort"
)

// Part is the result of some of the shards of a sweep. Parts merge in any order
// and any grouping into the same whole. The JSON form is small if the summaries are.
type Part[S any] struct {
	header header
	sums   []sum[S] // by shard
}

type sum[S any] struct {
	Shard string `json:"shard"`
	index int
	Sum   S `json:"sum"`
}

// Shards returns the texts of the shards that the part has, in their order.
func (p Part[S]) Shards() []string {
	var names []string
	for _, s := range p.sums {
		names = append(names, s.Shard)
	}
	return names
}

// Missing returns the number of shards that the part lacks.
func (p Part[S]) Missing() int { return p.header.Shards - len(p.sums) }

// Merge returns the part that has the shards of both. It refuses with ErrMismatch
// parts of other surveys, versions or splits, and shards that both have.
func (p Part[S]) Merge(o Part[S]) (Part[S], error) {
	switch {
	case len(p.sums) == 0 && p.header.Format == "":
		return o, nil
	case len(o.sums) == 0 && o.header.Format == "":
		return p, nil
	}
	if err := p.header.same(o.header); err != nil {
		return Part[S]{}, err
	}
	all := slices.Concat(p.sums, o.sums)
	sort.SliceStable(all, func(i, j int) bool { return all[i].index < all[j].index })
	for i := 1; i < len(all); i++ {
		if all[i].index == all[i-1].index {
			return Part[S]{}, fmt.Errorf("survey: merge: shard %q is in both: %w", all[i].Shard, ErrMismatch)
		}
	}
	return Part[S]{p.header, all}, nil
}

// Result merges the summaries in the order of the shards. It refuses with
// ErrMismatch when a shard is missing or the question has another name.
func (p Part[S]) Result(q Question[S]) (S, error) {
	var total S
	if p.header.Format == "" || p.Missing() != 0 {
		return total, fmt.Errorf("survey: result: %d of %d shards are missing: %w", p.Missing(), p.header.Shards, ErrMismatch)
	}
	if q.Merge == nil || q.Name != p.header.Name {
		return total, fmt.Errorf("survey: result of %q: asked with question %q: %w", clip(p.header.Name), clip(q.Name), ErrMismatch)
	}
	for _, s := range p.sums {
		q.Merge(&total, s.Sum)
	}
	return total, nil
}

type partText[S any] struct {
	header
	Sums []sum[S] `json:"sums"`
}

// MarshalJSON writes an object with the fields format, version, name, region, split
// and shards (the number of shards asked for and made) and sums (shard and sum, in the
// order of the shards).
func (p Part[S]) MarshalJSON() ([]byte, error) {
	if p.header.Format == "" {
		return []byte("null"), nil
	}
	sums := p.sums
	if sums == nil {
		sums = []sum[S]{}
	}
	return json.Marshal(partText[S]{p.header, sums})
}

// UnmarshalJSON reads what MarshalJSON writes, up to white space, refuses everything
// else and checks that each shard is one of the region, none twice. Errors wrap ErrSyntax
// or ErrMismatch, or are those of regions and summaries.
func (p *Part[S]) UnmarshalJSON(text []byte) error {
	if len(text) > MaxText {
		return fmt.Errorf("survey: part of %d bytes: want at most %d: %w", len(text), MaxText, ErrTooLarge)
	}
	if string(text) == "null" { // of the zero value
		*p = Part[S]{}
		return nil
	}
	var t partText[S]
	if err := strictJSON(text, &t); err != nil {
		return fmt.Errorf("survey: part: %w", err)
	}
	if err := t.known(); err != nil {
		return err
	}
	shards, err := Split(t.Region, t.Split)
	if err != nil {
		return err
	}
	if len(shards) != t.header.Shards {
		return fmt.Errorf("survey: part of %d shards: the region splits into %d: %w", t.header.Shards, len(shards), ErrMismatch)
	}
	places := make(map[string]int, len(shards))
	for i, s := range shards {
		places[s.String()] = i
	}
	last := -1
	for i := range t.Sums {
		place, ok := places[t.Sums[i].Shard]
		if !ok || place <= last {
			return fmt.Errorf("survey: part: shard %q is unknown, doubled or out of order: %w", clip(t.Sums[i].Shard), ErrMismatch)
		}
		t.Sums[i].index, last = place, place
	}
	out := Part[S]{t.header, t.Sums}
	if err := sameText(out, text); err != nil {
		return fmt.Errorf("survey: part: %w", err)
	}
	*p = out
	return nil
}
