package snake

import (
	"encoding/binary"
	"fmt"
	"math/big"
	"math/rand/v2"
	"sync"
)

// MaxRankedTiles is the largest number of tiles whose matchings are ranked,
// unranked and sampled: the table behind it holds 4n numbers of up to 0.7n bits.
const MaxRankedTiles = 1 << 14

// completions counts, for either flip of the first tile, the ways to finish a
// matching behind tile i with flip a: ways[v][i−1][a].
type completions struct {
	once  sync.Once
	links [2]links
	ways  [2][][2]*big.Int
	total [2]*big.Int
}

// ranking returns the table of completions, worked out at the first use of the
// set.
func (t Set) ranking(what string) (*completions, error) {
	if n := t.s.n; n > MaxRankedTiles {
		return nil, fmt.Errorf("snake: %s among the matchings of %s: at most %d are accepted: %w", what, tileCount(n), MaxRankedTiles, ErrTooLong)
	}
	c := t.table
	c.once.Do(func() {
		n := t.s.n
		for v := range c.links {
			c.total[v] = new(big.Int)
			l := t.linksFor(v == 1)
			if !l.possible {
				continue
			}
			ways := make([][2]*big.Int, n)
			// At the last tile every flip that a link leads to may end the chain.
			ways[n-1] = [2]*big.Int{big.NewInt(1), big.NewInt(1)}
			for i := n - 1; i >= 1; i-- {
				for a := range 2 {
					sum := new(big.Int)
					for b := range 2 {
						if l.can[i]&(1<<(2*a+b)) != 0 {
							sum.Add(sum, ways[i][b])
						}
					}
					ways[i-1][a] = sum
				}
			}
			c.links[v], c.ways[v] = l, ways
			c.total[v].Set(ways[0][v])
		}
	})
	return c, nil
}

// Rank returns the position of a matching in the order of [Set.All], counted
// from 0. It returns [ErrNotMatching] when the matching does not belong to the
// set and [ErrTooLong] past [MaxRankedTiles] tiles. Cost: O(tiles) additions,
// and as many again the first time.
func (t Set) Rank(m Matching) (*big.Int, error) {
	if !t.Contains(m) {
		return nil, notIn("rank", m, t)
	}
	rank := new(big.Int)
	if t.s == nil {
		return rank, nil
	}
	c, err := t.ranking("rank")
	if err != nil {
		return nil, err
	}
	first := bit(m.Flipped(1))
	if first == 1 {
		rank.Set(c.total[0])
	}
	can, ways := c.links[first].can, c.ways[first]
	before := first
	for i := 2; i <= t.s.n; i++ {
		b := bit(m.Flipped(i))
		if b == 1 && can[i-1]&(1<<(2*before)) != 0 {
			rank.Add(rank, ways[i-1][0])
		}
		before = b
	}
	return rank, nil
}

// Unrank returns the matching at a position in the order of [Set.All], counted
// from 0: the inverse of [Set.Rank]. It returns [ErrIndex] unless 0 ≤ rank <
// Count (nil counts as 0) and [ErrTooLong] past [MaxRankedTiles] tiles.
func (t Set) Unrank(rank *big.Int) (Matching, error) {
	if rank == nil {
		rank = new(big.Int)
	}
	if count := t.small(); count != nil {
		if rank.Sign() < 0 || rank.Cmp(count) >= 0 {
			return Matching{}, noIndex(rank, count)
		}
		return Matching{}, nil
	}
	c, err := t.ranking("index")
	if err != nil {
		return Matching{}, err
	}
	rest := new(big.Int).Set(rank)
	first := 0
	if rest.Cmp(c.total[0]) >= 0 {
		rest.Sub(rest, c.total[0])
		first = 1
	}
	if rank.Sign() < 0 || rest.Cmp(c.total[first]) >= 0 {
		return Matching{}, noIndex(rank, new(big.Int).Add(c.total[0], c.total[1]))
	}
	can, ways := c.links[first].can, c.ways[first]
	before := first
	return makeMatching(t.s.n, func(i int) bool {
		if i == 1 {
			return first == 1
		}
		zero, one := can[i-1]&(1<<(2*before)) != 0, can[i-1]&(2<<(2*before)) != 0
		before = 0
		if !zero || one && rest.Cmp(ways[i-1][0]) >= 0 {
			if zero {
				rest.Sub(rest, ways[i-1][0])
			}
			before = 1
		}
		return before == 1
	}), nil
}

// small is the number of matchings of a set that needs no table: on a single
// edge, or emptied for good; nil for all others.
func (t Set) small() *big.Int {
	switch {
	case t.none:
		return new(big.Int)
	case t.s == nil:
		return big.NewInt(1)
	}
	return nil
}

func noIndex(rank, count *big.Int) error {
	if count.Sign() == 0 {
		return fmt.Errorf("snake: index %s into an empty set of matchings: %w", shorten(rank.String()), ErrIndex)
	}
	return fmt.Errorf("snake: index %s into %s matchings, counted from 0: %w", shorten(rank.String()), shorten(count.String()), ErrIndex)
}

func notIn(what string, m Matching, t Set) error {
	return fmt.Errorf("snake: %s of %s on %s: it is not in the set: %w", what, shorten(m.String()), tileCount(t.Tiles()), ErrNotMatching)
}

// Sample returns a matching of the set, each with exactly the same probability,
// provided the source's bits are uniform and independent. Any source of
// math/rand/v2 will do, a *rand.Rand as well. It returns [ErrIndex] when the
// set is empty, [ErrNoSource] for a nil source and [ErrTooLong] past
// [MaxRankedTiles] tiles.
//
// It draws a uniform index by rejection, fewer than two tries on average, and
// unranks it.
func (t Set) Sample(source rand.Source) (Matching, error) {
	if source == nil {
		return Matching{}, fmt.Errorf("snake: sample without a source of random bits: %w", ErrNoSource)
	}
	count := t.small()
	if count == nil {
		c, err := t.ranking("sample")
		if err != nil {
			return Matching{}, err
		}
		count = new(big.Int).Add(c.total[0], c.total[1])
	}
	if count.Sign() == 0 {
		return Matching{}, fmt.Errorf("snake: sample from an empty set of matchings: %w", ErrIndex)
	}
	return t.Unrank(uniform(source, count))
}

// uniform draws an integer from 0 to n − 1.
func uniform(source rand.Source, n *big.Int) *big.Int {
	top := new(big.Int).Sub(n, big.NewInt(1))
	size := top.BitLen()
	buf := make([]byte, (size+63)/64*8)
	for {
		for i := 0; i < len(buf); i += 8 {
			x := source.Uint64()
			if i == 0 {
				x >>= uint(len(buf)*8 - size)
			}
			binary.BigEndian.PutUint64(buf[i:], x)
		}
		if r := new(big.Int).SetBytes(buf); r.Cmp(top) <= 0 {
			return r
		}
	}
}
