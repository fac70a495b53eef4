package survey

import (
	"context"
	"encoding/json"
	"fmt"
	"math"
	"math/big"
	"slices"
	"sync"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
)

// Distinct tells whether any two inequivalent slopes with numbers up to bound
// carry the same number, with proof, and which do.
//
// Every slope is visited and a key of 64 bits made of the residues of its
// number modulo 2⁶⁴ and 2⁶¹ − 1. If no two keys agree, no two numbers do: that is
// a proof. The few keys that agree are settled by both residues and then by the
// numbers themselves. The keys are dealt into buckets by their leading bits, each of a
// size that a processor cache holds, and compared there; equal numbers
// meet in one bucket from whichever subtrees they come. If the keys do not fit
// o.MemoryBytes, the walk is made several times, each for a range of the keys,
// which is cheap beside the comparison. Both the walk and the comparison run on
// o.Workers processors.
//
// With o.Checkpoint, the ranges that are done, the suspicious keys and the audit
// are written after each pass; a later call with the same family and bound goes on
// from there, with any memory budget and number of workers.
//
// A real coincidence is a result, not an error. The report is the same for
// every way of carrying the survey out. ErrAudit means that a pass
// did not visit what it should; ErrTooMany that there are more than o.Results
// suspicious keys; ErrMemory that not even many passes fit the budget.
func Distinct(ctx context.Context, f orbifold.Family, bound *big.Int, o Options) (Report, error) {
	if bound == nil {
		return Report{}, fmt.Errorf("survey: distinct up to nothing: want a bound of at least 1: %w", ErrBound)
	}
	d, err := newProof(ctx, f, bound, o)
	if err != nil {
		return Report{}, err
	}
	defer context.AfterFunc(ctx, func() { d.walk.halt.Store(true) })()
	if err := d.passes(ctx); err != nil {
		return Report{}, fmt.Errorf("survey: distinct: %w", err)
	}
	audit, err := d.state.Account.close(ctx, d.walk)
	if err != nil {
		return Report{}, err
	}
	d.progress.stage("settle")
	coincidences, keys, err := d.settle(ctx)
	if err != nil {
		return Report{}, fmt.Errorf("survey: distinct: %w", err)
	}
	d.progress.end()
	return Report{
		Family: f, Bound: new(big.Int).Set(bound), Slopes: d.count,
		Coincidences: coincidences, Keys: keys, Digest: d.state.Account.Digest, Audit: audit,
	}, nil
}

// proof is a survey of distinctness under way.
type proof struct {
	o        Options
	walk     *walker
	walkers  []*walker
	shards   []Shard
	count    *big.Int
	total    float64
	store    checkpoint
	progress *meter
	state    proofState
}

// proofState is what a checkpoint holds: the keys of the buckets below Next are done.
type proofState struct {
	Format   string   `json:"format"`
	Version  int      `json:"version"`
	Name     string   `json:"name"`
	Region   Region   `json:"region"`
	Moduli   []string `json:"moduli"`
	Next     int      `json:"next"`
	Suspects []uint64 `json:"suspects"` // keys that occur more than once, increasing
	Account  Account  `json:"account"`
}

func newProofState(r Region) proofState {
	return proofState{
		Format: Format, Version: Version, Name: "distinct", Region: r,
		Moduli: []string{"2^64", "2^61-1"}, Suspects: []uint64{},
	}
}

func newProof(ctx context.Context, f orbifold.Family, bound *big.Int, o Options) (*proof, error) {
	o, err := o.normal()
	if err != nil {
		return nil, err
	}
	r := Up(f, bound)
	d := &proof{o: o, store: checkpoint{o.Checkpoint}, state: newProofState(r)}
	if d.walk, err = newWalker(r); err != nil {
		return nil, err
	}
	if d.count, err = Count(ctx, f, bound); err != nil {
		return nil, err
	}
	if d.count.BitLen() > 50 {
		return nil, fmt.Errorf("survey: distinct: %v slopes: want less than 2^50: %w", d.count, ErrTooLarge)
	}
	d.total, _ = new(big.Float).SetInt(d.count).Float64()
	if d.shards, err = d.walk.shards(r, d.walk.chunks()); err != nil {
		return nil, err
	}
	for range o.Workers {
		d.walkers = append(d.walkers, d.walk.clone())
	}
	return d, d.resume()
}

// resume takes over the state of a checkpoint, if there is one.
func (d *proof) resume() error {
	text, err := d.store.read()
	if err != nil || text == nil {
		return err
	}
	refuse := func(err error) error {
		return fmt.Errorf("survey: checkpoint %s: %w", d.store.name, err)
	}
	old := newProofState(Region{})
	if err := strictJSON(text, &old); err != nil {
		return refuse(err)
	}
	want := newProofState(d.state.Region)
	want.Next, want.Suspects, want.Account = old.Next, old.Suspects, old.Account
	a, err := json.Marshal(want)
	if err != nil {
		return refuse(err)
	}
	if b, err := json.Marshal(old); err != nil || string(a) != string(b) {
		return refuse(fmt.Errorf("of another survey, format or version: %w", ErrMismatch))
	}
	if old.Next < 0 || old.Next > 1<<bucketBits(d.total) || !slices.IsSorted(old.Suspects) || old.Account.Den >= mersenne || old.Account.Num >= mersenne {
		return refuse(ErrSyntax)
	}
	d.state = old
	return nil
}

// passes makes the passes that are left.
func (d *proof) passes(ctx context.Context) error {
	p, ok := newPlan(d.total, d.o.Workers, d.o.MemoryBytes)
	if !ok {
		return fmt.Errorf("%v slopes in %d bytes on %d workers: %w", d.count, d.o.MemoryBytes, d.o.Workers, ErrMemory)
	}
	left, number := p.passes(d.state.Next), 0
	done := math.Ldexp(float64(d.state.Next), -int(p.bits))
	all := float64(left) * d.total
	if done < 1 {
		all /= 1 - done
	}
	d.progress = newMeter(d.o, "", all*done, all)
	if left == 0 {
		return nil
	}
	space := newKeySpace(p, d.o.Workers)
	for d.state.Next < 1<<p.bits {
		number++
		d.progress.stage(fmt.Sprintf("pass %d of %d", number, left))
		suspects, total, err := d.pass(ctx, space)
		if err != nil {
			return err
		}
		if d.state.Account.Digest.Slopes == 0 {
			d.state.Account = total
		} else if total.Digest != d.state.Account.Digest {
			return fmt.Errorf("passes visited different slopes, digests %v and %v: %w", d.state.Account.Digest, total.Digest, ErrAudit)
		}
		d.state.Suspects = append(d.state.Suspects, suspects...)
		if len(d.state.Suspects) > d.o.Results {
			return fmt.Errorf("%d keys occur more than once: want at most %d: %w", len(d.state.Suspects), d.o.Results, ErrTooMany)
		}
		d.state.Next = min(d.state.Next+p.pass, 1<<p.bits)
		if d.store.name != "" {
			if err := d.store.write(d.state); err != nil {
				return err
			}
		}
	}
	return nil
}

// pass walks over everything, keeps the keys of one range and returns those that
// occur more than once. The first pass keeps the books of the audit too; the others
// the digest.
func (d *proof) pass(ctx context.Context, space *keySpace) ([]uint64, Account, error) {
	space.begin(d.state.Next)
	audit := d.state.Account.Digest.Slopes == 0
	total, err := d.each(ctx, func(worker int, w *walker) func() Account {
		s := space.workers[worker]
		if audit {
			b := w.keep()
			w.sink = func(v *Visit) bool {
				b.visit(v)
				s.put(v.vertex().key())
				return true
			}
			return b.account
		}
		w.cut = nil
		var a Account
		w.sink = func(v *Visit) bool {
			a.Digest.Add(v)
			s.put(v.vertex().key())
			return true
		}
		return func() Account { return a }
	})
	if err != nil {
		return nil, Account{}, err
	}
	if space.full.Load() {
		return nil, Account{}, fmt.Errorf("keys are not spread evenly: %w", ErrMemory)
	}
	suspects, err := space.repeated(ctx)
	return suspects, total, err
}

// each walks over all shards in parallel; begin prepares a walker for a shard and
// returns what gives its account at the end.
func (d *proof) each(ctx context.Context, begin func(int, *walker) func() Account) (Account, error) {
	var (
		mu    sync.Mutex
		total Account
	)
	err := pool(ctx, d.o.Workers, len(d.shards), func(worker, job int) error {
		w := d.walkers[worker]
		end := begin(worker, w)
		if !w.run(&d.shards[job].piece) {
			return context.Cause(ctx)
		}
		a := end()
		mu.Lock()
		total.merge(a)
		mu.Unlock()
		d.progress.add(float64(a.Digest.Slopes))
		return nil
	})
	if err == nil {
		err = d.walk.failed()
	}
	return total, err
}

// suspect is a slope whose key occurs more than once.
type suspect struct {
	key      uint64
	r64, r61 uint64
	slope    farey.Slope
}

// settle finds the slopes of the suspicious keys and tells real coincidences
// from those of keys alone, whose number it returns too.
func (d *proof) settle(ctx context.Context) ([]Coincidence, int, error) {
	if len(d.state.Suspects) == 0 {
		return nil, 0, nil
	}
	wanted := make(map[uint64]bool, len(d.state.Suspects))
	const mask = 1<<20 - 1
	sieve := make([]uint64, (mask+1)/64)
	for _, k := range d.state.Suspects {
		wanted[k] = true
		i := k * keyFactor >> 32 & mask
		sieve[i/64] |= 1 << (i % 64)
	}
	var (
		mu   sync.Mutex
		list []suspect
	)
	_, err := d.each(ctx, func(_ int, w *walker) func() Account {
		w.cut = nil
		var a Account
		var mine []suspect
		w.sink = func(v *Visit) bool {
			a.Digest.Slopes++
			x := v.vertex()
			k := x.key()
			if i := k * keyFactor >> 32 & mask; sieve[i/64]>>(i%64)&1 != 0 && wanted[k] {
				mine = append(mine, suspect{k, x.r64, x.r61, v.Slope()})
			}
			return true
		}
		return func() Account {
			mu.Lock()
			list = append(list, mine...)
			mu.Unlock()
			return a
		}
	})
	if err != nil {
		return nil, 0, err
	}
	slices.SortFunc(list, func(a, b suspect) int {
		for _, c := range [...][2]uint64{{a.key, b.key}, {a.r64, b.r64}, {a.r61, b.r61}} {
			if c[0] != c[1] {
				if c[0] < c[1] {
					return -1
				}
				return 1
			}
		}
		return a.slope.Cmp(b.slope)
	})
	var found []Coincidence
	keys := 0
	for len(list) > 0 {
		n := 1
		for n < len(list) && list[n].key == list[0].key {
			n++
		}
		groups, err := d.split(ctx, list[:n])
		if err != nil {
			return nil, 0, err
		}
		if len(groups) != 1 || len(groups[0].Slopes) != n {
			keys++
		}
		found = append(found, groups...)
		list = list[n:]
	}
	slices.SortFunc(found, func(a, b Coincidence) int { return a.Number.Cmp(b.Number) })
	return found, keys, nil
}

// split sorts suspects of one key by their numbers, computed where both residues
// agree, and returns the groups of two and more.
func (d *proof) split(ctx context.Context, list []suspect) ([]Coincidence, error) {
	var found []Coincidence
	for len(list) > 0 {
		n := 1
		for n < len(list) && list[n].r64 == list[0].r64 && list[n].r61 == list[0].r61 {
			n++
		}
		if n > 1 {
			var slopes []farey.Slope
			for _, s := range list[:n] {
				slopes = append(slopes, s.slope)
			}
			here, err := Coincidences(ctx, d.walk.family, slopes)
			if err != nil {
				return nil, err
			}
			found = append(found, here...)
		}
		list = list[n:]
	}
	return found, nil
}

// Coincidences computes the numbers at some slopes of a family and returns those that
// two or more of the slopes carry, increasing, each with its slopes in increasing order.
// The slopes are taken as inequivalent. Cost: that of the numbers.
func Coincidences(ctx context.Context, f orbifold.Family, slopes []farey.Slope) ([]Coincidence, error) {
	all := make(map[string]int, len(slopes))
	var groups []Coincidence
	for _, s := range slopes {
		n, err := f.WithLimit(orbifold.DefaultLimit).NumberContext(ctx, s)
		if err != nil {
			return nil, fmt.Errorf("survey: coincidences: %w", err)
		}
		key := string(n.Bytes())
		i, ok := all[key]
		if !ok {
			i = len(groups)
			all[key] = i
			groups = append(groups, Coincidence{Number: n})
		}
		groups[i].Slopes = append(groups[i].Slopes, s)
	}
	groups = slices.DeleteFunc(groups, func(c Coincidence) bool { return len(c.Slopes) < 2 })
	for _, c := range groups {
		slices.SortFunc(c.Slopes, farey.Slope.Cmp)
	}
	slices.SortFunc(groups, func(a, b Coincidence) int { return a.Number.Cmp(b.Number) })
	return groups, nil
}
