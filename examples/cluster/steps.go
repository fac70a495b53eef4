package main

import (
	"context"
	"encoding/binary"
	"encoding/json"
	"math/big"
	"slices"
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold/survey"
)

// shard returns the shard that a task names.
func (t Task) shard() (survey.Shard, error) {
	var r survey.Region
	if err := json.Unmarshal([]byte(t.Region), &r); err != nil {
		return survey.Shard{}, err
	}
	return survey.ParseShard(r, t.Shard)
}

// one processor for each task: the runner has tasks for the others.
var one = survey.Options{Workers: 1}

// audit walks over a shard and emits its account, a part as JSON.
func audit(ctx context.Context, t Task, emit func(string)) error {
	s, err := t.shard()
	if err != nil {
		return err
	}
	part, err := survey.AuditShards(ctx, []survey.Shard{s}, one)
	if err != nil {
		return err
	}
	text, err := json.Marshal(part)
	if err != nil {
		return err
	}
	emit(string(text))
	return nil
}

// batch is the number of keys that travel together.
const batch = 1 << 13

// deal walks over a shard and emits the keys of its slopes, many at a time, under the number
// of their bucket. Equal numbers have equal keys and meet in one bucket.
func deal(ctx context.Context, t Task, emit func(int, []byte)) error {
	s, err := t.shard()
	if err != nil {
		return err
	}
	held := make([][]byte, t.Buckets)
	_, err = survey.SweepShards(ctx, []survey.Shard{s}, survey.Question[int]{
		Name: "keys",
		Visit: func(_ *int, v *survey.Visit) {
			k := v.Key()
			b := int(k >> 32 * uint64(t.Buckets) >> 32)
			held[b] = binary.BigEndian.AppendUint64(held[b], k)
			if len(held[b]) == 8*batch {
				emit(b, held[b])
				held[b] = nil // the runner may keep what it was given
			}
		},
		Merge: func(*int, int) {},
	}, one)
	if err != nil {
		return err
	}
	for b, keys := range held {
		if len(keys) > 0 {
			emit(b, keys)
		}
	}
	return nil
}

// repeated emits the keys of a bucket that occur more than once.
func repeated(_ int, lists func(*[]byte) bool, emit func(uint64)) error {
	var keys []uint64
	for list := []byte(nil); lists(&list); {
		for ; len(list) >= 8; list = list[8:] {
			keys = append(keys, binary.BigEndian.Uint64(list))
		}
	}
	slices.Sort(keys)
	for i := 1; i < len(keys); i++ {
		if keys[i] == keys[i-1] && (i == 1 || keys[i] != keys[i-2]) {
			emit(keys[i])
		}
	}
	return nil
}

// locate walks over a shard again and emits the slopes that have repeated keys.
func locate(ctx context.Context, t Task, doubles func(*uint64) bool, emit func(uint64, string)) error {
	wanted := make(map[uint64]bool)
	for k := uint64(0); doubles(&k); {
		wanted[k] = true
	}
	if len(wanted) == 0 {
		return nil
	}
	s, err := t.shard()
	if err != nil {
		return err
	}
	_, err = survey.SweepShards(ctx, []survey.Shard{s}, survey.Question[int]{
		Name: "locate",
		Visit: func(_ *int, v *survey.Visit) {
			if k := v.Key(); wanted[k] {
				emit(k, v.Slope().String())
			}
		},
		Merge: func(*int, int) {},
	}, one)
	return err
}

// settled is what came of one repeated key.
type settled struct {
	Shared       bool // by different numbers
	Coincidences []survey.Coincidence
}

// settle computes the numbers at the slopes of one key and says which of them agree.
func settle(ctx context.Context, _ uint64, texts func(*string) bool, region string, emit func(string)) error {
	var r survey.Region
	if err := json.Unmarshal([]byte(region), &r); err != nil {
		return err
	}
	var slopes []farey.Slope
	for text := ""; texts(&text); {
		var s farey.Slope
		if err := s.UnmarshalText([]byte(strings.Clone(text))); err != nil {
			return err
		}
		slopes = append(slopes, s)
	}
	found, err := survey.Coincidences(ctx, r.Family, slopes)
	if err != nil {
		return err
	}
	shared := len(found) != 1 || len(found[0].Slopes) != len(slopes)
	text, err := json.Marshal(settled{shared, found})
	if err != nil {
		return err
	}
	emit(string(text))
	return nil
}

// mergeParts merges parts that come as JSON, in any order.
func mergeParts[S any](parts func(*string) bool) (survey.Part[S], error) {
	var whole survey.Part[S]
	for text := ""; parts(&text); {
		var part survey.Part[S]
		err := json.Unmarshal([]byte(text), &part)
		if err == nil {
			whole, err = whole.Merge(part)
		}
		if err != nil {
			return whole, err
		}
	}
	return whole, nil
}

// conclude makes the report, the same as that of one machine to the byte. It
// fails when a shard is missing or doubled and when the audit does not balance.
func conclude(ctx context.Context, region string, audits, list func(*string) bool, emit func(string)) error {
	var r survey.Region
	if err := json.Unmarshal([]byte(region), &r); err != nil {
		return err
	}
	whole, err := mergeParts[survey.Account](audits)
	if err != nil {
		return err
	}
	audit, digest, err := survey.Balance(ctx, whole)
	if err != nil {
		return err
	}
	report := survey.Report{
		Family: r.Family, Bound: r.Bound, Slopes: new(big.Int).SetUint64(digest.Slopes), Digest: digest, Audit: audit,
	}
	for text := ""; list(&text); {
		var s settled
		if err := json.Unmarshal([]byte(text), &s); err != nil {
			return err
		}
		if s.Shared {
			report.Keys++
		}
		report.Coincidences = append(report.Coincidences, s.Coincidences...)
	}
	slices.SortFunc(report.Coincidences, func(a, b survey.Coincidence) int { return a.Number.Cmp(b.Number) })
	text, err := json.Marshal(report)
	if err != nil {
		return err
	}
	emit(string(text))
	return nil
}
