package survey

import (
	"context"
	"math"
	"slices"
	"sort"
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
	bucketKeys = 1 << 17 // a bucket has at most that many keys on average, so that it stays in a cache
	maxBuckets = 1 << 14 // of one pass; with more of them the stages leave the cache
)

// bucketBits is the number of leading bits of a key that tell its bucket, for n keys in
// all passes. It depends on n alone, so that passes of any size begin at buckets.
func bucketBits(n float64) uint {
	b := uint(0)
	for b < 40 && math.Ldexp(n, -int(b)) > float64(bucketKeys) {
		b++
	}
	return b
}

// largestSpace bounds the memory of a pass by what numbers of chunks and sizes of slices hold.
const largestSpace = 1 << (30 + 10*(math.MaxInt>>62))

// plan is the division of keys into buckets and passes.
type plan struct {
	bits   uint    // of the number of a bucket
	mean   float64 // keys of a bucket on average
	pass   int     // buckets of one pass
	chunks int     // chunks of one pass
}

// newPlan returns the plan for n keys with as few passes as the memory allows; false if
// it does not hold one bucket.
func newPlan(n float64, workers int, memory int64) (plan, bool) {
	p := plan{bits: bucketBits(n)}
	p.mean = math.Ldexp(n, -int(p.bits))
	memory = min(memory, largestSpace)
	memory -= min(memory/4, 64<<20) // for all the rest of the program
	most := min(1<<p.bits, maxBuckets)
	// The smallest number of passes whose buckets fit.
	fits := sort.Search(most, func(i int) bool { return p.memory(most-i, workers) <= float64(memory) })
	if fits == most {
		return p, false
	}
	p.pass = most - fits
	// Passes of equal size.
	passes := (1<<p.bits + p.pass - 1) / p.pass
	p.pass = (1<<p.bits + passes - 1) / passes
	p.chunks = int(p.need(p.pass, workers))
	return p, true
}

// passes is the number of passes from a bucket on.
func (p plan) passes(from int) int { return (1<<p.bits - from + p.pass - 1) / p.pass }

// memory bounds the bytes that a pass of some buckets takes.
func (p plan) memory(buckets, workers int) float64 {
	filters := math.Ldexp(2, int(filterBits(2*p.mean))-3)
	return p.need(buckets, workers)*(8*chunkKeys+4) + float64(workers)*(float64(buckets)*(8*stageKeys+1+8)+filters)
}

// need is the number of chunks for some buckets: the number of their keys varies like
// a binomial one, and each worker leaves a chunk of each bucket partly empty.
func (p plan) need(buckets, workers int) float64 {
	n := p.mean * float64(buckets)
	return math.Ceil((n+12*math.Sqrt(n)+64)/chunkKeys) + float64(buckets*workers)
}

// keySpace holds the keys of one pass in its buckets. Each worker fills chunks of its own.
type keySpace struct {
	plan
	first   uint64 // bucket
	arena   []uint64
	link    []int32 // by chunk: the chunk of the bucket before it, or −1
	used    atomic.Int64
	full    atomic.Bool // the arena was too small
	workers []*stager
}

// stager is the part of a keySpace that one worker fills.
type stager struct {
	space *keySpace
	first uint64 // bucket of the pass
	shift uint   // of a key to its bucket
	stage []uint64
	count []uint8
	at    []int64 // by bucket: where its next key goes; −1 for no chunk
}

// newKeySpace takes the memory for the passes of a plan.
func newKeySpace(p plan, workers int) *keySpace {
	s := &keySpace{plan: p, arena: make([]uint64, p.chunks*chunkKeys), link: make([]int32, p.chunks)}
	for range workers {
		w := &stager{
			space: s, shift: 64 - p.bits, // a shift by 64 gives 0
			stage: make([]uint64, p.pass*stageKeys), count: make([]uint8, p.pass), at: make([]int64, p.pass),
		}
		s.workers = append(s.workers, w)
	}
	return s
}

// begin empties the space for the pass from a bucket on.
func (s *keySpace) begin(first int) {
	s.first = uint64(first)
	s.used.Store(0)
	s.full.Store(false)
	for _, w := range s.workers {
		w.first = s.first
		clear(w.count)
		for i := range w.at {
			w.at[i] = -1
		}
	}
}

// put takes a key, if it belongs to the pass.
func (w *stager) put(key uint64) {
	b := key>>w.shift - w.first
	if b >= uint64(len(w.count)) {
		return
	}
	c := w.count[b]
	w.stage[b*stageKeys+uint64(c)] = key
	if c++; c == stageKeys {
		w.flush(int(b))
		c = 0
	}
	w.count[b] = c
}

// flush moves the staged keys of a bucket to its chunk.
func (w *stager) flush(b int) {
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
	copy(w.space.arena[at:at+stageKeys], w.stage[b*stageKeys:(b+1)*stageKeys])
	w.at[b] = at + stageKeys
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
	skip, drop := s.bits, 64-size
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
	buckets := min(s.pass, 1<<s.bits-int(s.first))
	found := make([][]uint64, buckets)
	filters := make([]filter, len(s.workers))
	err := pool(ctx, len(s.workers), buckets, func(worker, b int) error {
		found[b] = filters[worker].repeated(s, b, nil)
		return nil
	})
	return slices.Concat(found...), err
}
