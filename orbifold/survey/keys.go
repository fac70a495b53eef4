package survey

import (
	"context"
	"math"
	"math/bits"
	"slices"
	"sync/atomic"
)

// A key is 64 bits made of both residues of a number, so that equal numbers have
// equal keys; the factor is odd, so unequal residues modulo 2⁶⁴ alone give unequal keys.
func (v *vertex) key() uint64 { return v.r64 + v.r61*keyFactor }

// keyFactor is 2⁶⁴ divided by the golden ratio, made odd.
const keyFactor = 0x9E3779B97F4A7C15

const (
	chunkKeys = 128 // keys in a chunk, the unit in which buckets take memory
	stageKeys = 8   // keys that a worker collects for a bucket before it touches memory: one cache line
)

// Tuning of the buckets, by BenchmarkKeys; tests set other values.
var (
	bucketKeys = 1 << 16 // a bucket has about that many keys, so that it stays in a cache
	maxBuckets = 1 << 13 // more of them, and the stages leave the cache
)

// keySpace holds the keys of one pass, whose leading bits agree, in buckets by the
// bits that follow. Each worker fills chunks of its own.
type keySpace struct {
	lead    uint // bits that all keys of the pass share
	bits    uint // of the number of the bucket
	arena   []uint64
	link    []int32 // by chunk: the chunk of the bucket before it, or −1
	used    atomic.Int64
	full    atomic.Bool // the arena was too small
	workers []*stager
}

// stager is the part of a keySpace that one worker fills.
type stager struct {
	space *keySpace
	first uint64 // leading bits of the pass
	shift uint   // of a key to its leading bits
	stage []uint64
	count []uint8
	at    []int64 // by bucket: where its next key goes; −1 for no chunk
}

// bucketBits is the number of bits for buckets of a pass of n keys.
func bucketBits(n float64) uint {
	b := uint(0)
	for 1<<b < maxBuckets && n/float64(uint(1)<<b) > float64(bucketKeys) {
		b++
	}
	return b
}

// passMemory bounds the bytes that a pass of n keys takes.
func passMemory(n float64, workers int) float64 {
	buckets := math.Ldexp(1, int(bucketBits(n)))
	chunks := passChunks(n, workers)
	seen := 2 * math.Ldexp(1, int(filterBits(n/buckets))-3)
	return chunks*(8*chunkKeys+4) + float64(workers)*(buckets*(8*stageKeys+1+8)+seen)
}

// passChunks is the number of chunks for n keys on average: the number of keys
// whose leading bits agree varies like a binomial one, and each worker
// leaves a chunk of each bucket partly empty.
func passChunks(n float64, workers int) float64 {
	buckets := math.Ldexp(1, int(bucketBits(n)))
	return math.Ceil((n+12*math.Sqrt(n)+64)/chunkKeys) + buckets*float64(workers)
}

// newKeySpace takes the memory for a pass of about n keys.
func newKeySpace(n float64, lead uint, workers int) *keySpace {
	chunks := int(passChunks(n, workers))
	s := &keySpace{
		lead: lead, bits: bucketBits(n),
		arena: make([]uint64, chunks*chunkKeys), link: make([]int32, chunks),
	}
	buckets := 1 << s.bits
	for range workers {
		w := &stager{space: s, stage: make([]uint64, buckets*stageKeys), count: make([]uint8, buckets), at: make([]int64, buckets)}
		s.workers = append(s.workers, w)
	}
	return s
}

// begin empties the space for the pass of the keys that begin with first.
func (s *keySpace) begin(first uint64) {
	s.used.Store(0)
	s.full.Store(false)
	for _, w := range s.workers {
		w.first, w.shift = first, 64-s.lead // a shift by 64 gives 0
		clear(w.count)
		for i := range w.at {
			w.at[i] = -1
		}
	}
}

// put takes a key, if it belongs to the pass.
func (w *stager) put(key uint64) {
	if key>>w.shift != w.first {
		return
	}
	b := int(key << w.space.lead >> 1 >> (63 - w.space.bits))
	c := w.count[b]
	w.stage[b*stageKeys+int(c)] = key
	if c++; c == stageKeys {
		w.flush(b, stageKeys)
		c = 0
	}
	w.count[b] = c
}

// flush moves n staged keys of a bucket to its chunk.
func (w *stager) flush(b, n int) {
	at := w.at[b]
	if at < 0 || at%chunkKeys == 0 {
		chunk := w.space.used.Add(1) - 1
		if chunk >= int64(len(w.space.link)) {
			w.space.full.Store(true)
			return
		}
		w.space.link[chunk] = -1
		if at > 0 {
			w.space.link[chunk] = int32(at/chunkKeys) - 1
		}
		at = chunk * chunkKeys
	}
	copy(w.space.arena[at:at+stageKeys], w.stage[b*stageKeys:b*stageKeys+n])
	w.at[b] = at + int64(n)
}

// each calls f with the keys of a bucket, a chunk at a time.
func (s *keySpace) each(b int, f func([]uint64)) {
	for _, w := range s.workers {
		f(w.stage[b*stageKeys : b*stageKeys+int(w.count[b])])
		at := w.at[b]
		if at < 0 {
			continue
		}
		chunk := int32((at - 1) / chunkKeys)
		end := at - int64(chunk)*chunkKeys
		for chunk >= 0 {
			start := int64(chunk) * chunkKeys
			f(s.arena[start : start+end])
			chunk, end = s.link[chunk], chunkKeys
		}
	}
}

// filter finds keys that occur twice in a bucket: two bitmaps by the bits after
// the bucket's tell which keys may, and only those are sorted. The space is used again.
type filter struct {
	once, twice []uint64
	suspects    []uint64
}

// filterBits is the size of a bitmap for n keys: some 32 bits for each, so that about
// one key in 16 is sorted in vain.
func filterBits(n float64) uint {
	return uint(max(6, math.Ilogb(max(n, 1))+6))
}

// repeated appends to list the keys of the bucket that occur more than once,
// increasing, once each.
func (f *filter) repeated(s *keySpace, b int, list []uint64) []uint64 {
	n := 0
	s.each(b, func(keys []uint64) { n += len(keys) })
	if n < 2 {
		return list
	}
	size := filterBits(float64(n))
	words := 1 << (size - 6)
	if len(f.once) < words {
		f.once, f.twice = make([]uint64, words), make([]uint64, words)
	}
	once, twice := f.once[:words], f.twice[:words]
	clear(once)
	clear(twice)
	skip, drop := s.lead+s.bits, 64-size
	if skip > 64-size {
		skip = 64 - size
	}
	s.each(b, func(keys []uint64) {
		for _, k := range keys {
			i := k << skip >> drop
			bit := uint64(1) << (i & 63)
			old := once[i>>6&uint64(len(once)-1)]
			once[i>>6&uint64(len(once)-1)] = old | bit
			if old&bit != 0 {
				twice[i>>6&uint64(len(twice)-1)] |= bit
			}
		}
	})
	f.suspects = f.suspects[:0]
	s.each(b, func(keys []uint64) {
		for _, k := range keys {
			i := k << skip >> drop
			if twice[i>>6&uint64(len(twice)-1)]>>(i&63)&1 != 0 {
				f.suspects = append(f.suspects, k)
			}
		}
	})
	slices.Sort(f.suspects)
	for i := 1; i < len(f.suspects); i++ {
		k := f.suspects[i]
		if k == f.suspects[i-1] && (len(list) == 0 || list[len(list)-1] != k) {
			list = append(list, k)
		}
	}
	return list
}

// repeated returns the keys of the pass that occur more than once, increasing.
func (s *keySpace) repeated(ctx context.Context) ([]uint64, error) {
	buckets := 1 << s.bits
	found := make([][]uint64, buckets)
	filters := make([]filter, len(s.workers))
	err := pool(ctx, len(s.workers), buckets, func(worker, b int) error {
		found[b] = filters[worker].repeated(s, b, nil)
		return nil
	})
	return slices.Concat(found...), err
}

// leads returns the number of leading bits by which passes have to be told apart so
// that one of them fits the memory.
func leads(n float64, workers int, memory int64) (uint, bool) {
	for lead := uint(0); lead <= 40; lead++ {
		if passMemory(math.Ldexp(n, -int(lead)), workers) <= float64(memory) {
			return lead, true
		}
	}
	return 0, false
}

// aligned tells whether a pass of the given number of leading bits can begin at a key.
func aligned(key uint64, lead uint) bool {
	return lead >= 64 || bits.TrailingZeros64(key) >= int(64-lead)
}
