package orbifold

import (
	"cmp"
	"context"
	"errors"
	"fmt"
	"math"
	"math/big"
	"slices"
	"sync"

	"example.com/onecusp/farey"
)

// Identify returns the slopes in Q ∪ {∞} that carry the number n, one for each
// symmetry class (the representative of Domain), increasing, 1/0 last; none if
// no slope does. An n below 1 is ErrNotPositive.
//
// With a nil error the list is complete, for equal and unequal weights alike;
// no unproved ordering is used. Every slope but the base slopes lies in the
// fan of the older of its two parents A, where numbers grow, and its number is
// above N_A². So all slopes A with numbers up to √n are visited, some
// G·(ln n)²/4 for a constant G of the family, and in both sides of the fan of each the places
// are found where the logarithm can be that of n, by enclosures whose
// error is bounded. Those few candidates are settled by residues and, when these agree, by the
// exact number. It does not factor n, and it uses all processors.
//
// When ctx ends first, the result is nil and the error that of ctx.
func (f Family) Identify(ctx context.Context, n *big.Int) ([]farey.Slope, error) {
	ctx = contextOf(ctx)
	if n == nil || n.Sign() <= 0 {
		return nil, fmt.Errorf("orbifold: slopes that carry %s: %w", brief(n), ErrNotPositive)
	}
	l := logInt(n, 80, 128)
	candidates, err := f.between(ctx, l.lo, l.hi)
	if err != nil {
		return nil, fmt.Errorf("orbifold: slopes that carry %s: %w", brief(n), err)
	}
	var residues [3]uint64
	for i, p := range Primes() {
		residues[i] = wordResidues{p}.From(n)
	}
	var found []farey.Slope
	for _, s := range candidates {
		if err := ctx.Err(); err != nil {
			return nil, fmt.Errorf("orbifold: slopes that carry %s: %w", brief(n), err)
		}
		p := s.Path()
		same := true
		for i, m := range Primes() {
			same = same && f.numberMod64(p, m) == residues[i]
		}
		if !same {
			continue
		}
		// As long as n, within a bit or so: whoever holds n can hold it.
		x, err := f.WithLimit(int64(n.BitLen())+64).NumberContext(ctx, s)
		switch {
		case errors.Is(err, ErrTooLarge):
		case err != nil:
			return nil, err
		case x.Cmp(n) == 0:
			found = append(found, s)
		}
	}
	return found, nil
}

// between returns the slopes of the domain whose numbers may have logarithms from lo
// to hi, each once, increasing: all that do, and some that are off by a tiny
// part.
func (f Family) between(ctx context.Context, lo, hi *big.Float) ([]farey.Slope, error) {
	var found []farey.Slope
	h, ok := newHunt(f, lo, hi)
	if !ok { // weights past the precision of float64: few slopes, all visited
		least, most := span{lo, hi}.bits()
		bound := new(big.Int).Lsh(unit, uint(most.Uint64()))
		for node := range f.walk(true, atMost(bound)) {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			if least.Cmp(big.NewInt(int64(node.value().BitLen()))) > 0 {
				continue // saves most of the logarithms
			}
			if logInt(node.value(), 80, 128).apart(span{lo, hi}) == 0 {
				found = append(found, node.slope)
			}
		}
	} else {
		var lock sync.Mutex
		err := h.run(ctx, func(s farey.Slope) {
			lock.Lock()
			defer lock.Unlock()
			found = append(found, s)
		})
		if err != nil {
			return nil, err
		}
	}
	slices.SortFunc(found, farey.Slope.Cmp)
	return slices.CompactFunc(found, farey.Slope.Equal), nil
}

// MaxNearest is the largest number of slopes that Nearest returns on each
// side.
const MaxNearest = 1 << 16

// Nearest returns the k slopes with the largest numbers below n and the k slopes
// with the smallest numbers above it, nearest first, one for each symmetry class
// (the representative of Domain); equal numbers at inequivalent slopes come in the order of
// the slopes. The order is exact. There are fewer below when
// the family has no more. Slopes that carry n itself are in neither list. An n
// below 1 is ErrNotPositive, a k outside 0 … MaxNearest ErrCount.
//
// It finds them as Identify does, in a window about ln n that is widened until
// it holds enough; cost as for Identify, and O(k·log k) comparisons.
func (f Family) Nearest(ctx context.Context, n *big.Int, k int) (below, above []farey.Slope, err error) {
	ctx = contextOf(ctx)
	if n == nil || n.Sign() <= 0 {
		return nil, nil, fmt.Errorf("orbifold: slopes near %s: %w", brief(n), ErrNotPositive)
	}
	if k < 0 || k > MaxNearest {
		return nil, nil, fmt.Errorf("orbifold: %d slopes near %s: want 0 to %d: %w", k, brief(n), MaxNearest, ErrCount)
	}
	wrap := func(err error) error { return fmt.Errorf("orbifold: slopes near %s: %w", brief(n), err) }
	if k == 0 {
		return nil, nil, nil
	}
	center := logInt(n, 80, 128)
	// About G·X² slopes lie below X, for a constant of the order of 1, so that
	// either width is enough for some k of them above the center.
	x, _ := center.hi.Float64()
	for width := min(float64(k+1)/(x+1), math.Sqrt(float64(k+1))); ; width *= 2 {
		w := big.NewFloat(width)
		lo, hi := down(128).Sub(center.lo, w), up(128).Add(center.hi, w)
		slopes, err := f.between(ctx, lo, hi)
		if err != nil {
			return nil, nil, wrap(err)
		}
		var under, over []sighting
		decided := true
		for _, s := range slopes {
			x, err := f.sight(ctx, s, n, span{lo, hi})
			switch {
			case err != nil:
				return nil, nil, wrap(err)
			case !x.in:
				decided = decided && x.out
			case x.sign < 0:
				under = append(under, x)
			case x.sign > 0:
				over = append(over, x)
			}
		}
		if !decided || len(under) < k && lo.Sign() >= 0 || len(over) < k {
			continue
		}
		if below, err = f.first(ctx, k, under, -1); err == nil {
			above, err = f.first(ctx, k, over, 1)
		}
		if err != nil {
			return nil, nil, wrap(err)
		}
		return below, above, nil
	}
}

// sighting is a slope in a window about ln n.
type sighting struct {
	slope   farey.Slope
	log     span
	sign    int  // of its number less n
	in, out bool // the logarithm is certainly in the window, or certainly out of it
}

// sight looks at a slope.
func (f Family) sight(ctx context.Context, s farey.Slope, n *big.Int, window span) (x sighting, err error) {
	l, err := f.logSpan(ctx, s, 96)
	if err != nil {
		return x, err
	}
	x = sighting{slope: s, log: l}
	x.in = l.lo.Cmp(window.lo) >= 0 && l.hi.Cmp(window.hi) <= 0
	x.out = l.apart(window) != 0
	if x.sign = l.apart(logInt(n, 80, 128)); x.sign == 0 {
		number, err := f.WithLimit(int64(n.BitLen())+64).NumberContext(ctx, s)
		if err != nil {
			return x, err
		}
		x.sign = number.Cmp(n)
	}
	return x, nil
}

// first returns the first k slopes by number, from the smallest on for sign 1
// and from the largest on for sign −1; by slope where numbers are equal.
func (f Family) first(ctx context.Context, k int, found []sighting, sign int) (slopes []farey.Slope, err error) {
	slices.SortFunc(found, func(a, b sighting) int {
		c := a.log.apart(b.log)
		if c == 0 && err == nil {
			c, err = f.CompareContext(ctx, a.slope, b.slope)
		}
		return cmp.Or(sign*c, a.slope.Cmp(b.slope))
	})
	for _, x := range found[:min(k, len(found))] {
		slopes = append(slopes, x.slope)
	}
	return slopes, err
}
