package snake

import (
	"iter"
	"math/bits"
)

// links describes a set as walks on bits: may a tile's flip a be followed by
// the next tile's flip b, so that the walk can still be finished? Once the first
// tile's flip v is chosen, links[v] is such a description of tiles 2 … n.
type links struct {
	possible bool
	// can[i−1], for tile i ≥ 2, has bit 2a+b set when tile i−1 at a allows tile
	// i at b. can[0] is unused.
	can []uint8
}

// linksFor works out the links behind the first tile's flip.
func (t Set) linksFor(first bool) links {
	s := t.s
	starts := uint8(0) // the states the first tile may be entered in
	for k, st := range s.at(1) {
		if t.mask(1)&(1<<k) != 0 && flipped(1, st.vertical) == first && (s.closed || st.from == free) {
			starts |= 1 << st.from
		}
	}
	ends := t.ends()
	if s.closed {
		ends = starts // the chain must come back in a state it may have started in
	}
	if starts == 0 {
		return links{}
	}
	l := links{can: make([]uint8, s.n)}
	var alive [2]bool // by flip of tile i: the rest can be finished
	for b := range alive {
		alive[b] = ends&(1<<s.after(s.n, b == 1)) != 0
	}
	for i := s.n; i >= 2; i-- {
		var before [2]bool
		for a := range before {
			from := s.after(i-1, a == 1)
			for k, st := range s.at(i) {
				if st.from != from || t.mask(i)&(1<<k) == 0 {
					continue
				}
				if b := bit(flipped(i, st.vertical)); alive[b] {
					l.can[i-1] |= 1 << (2*a + b)
					before[a] = true
				}
			}
		}
		alive = before
	}
	l.possible = alive[bit(first)]
	return l
}

func bit(b bool) int {
	if b {
		return 1
	}
	return 0
}

// All yields the matchings of the set in increasing lexicographic order of
// their 0/1 strings. It can be run again. Up to 64 tiles a step costs a few
// machine instructions and allocates nothing; past that, one string a step.
func (t Set) All() iter.Seq[Matching] {
	return func(yield func(Matching) bool) {
		if t.none {
			return
		}
		if t.s == nil {
			yield(Matching{})
			return
		}
		for _, first := range [2]bool{false, true} {
			l := t.linksFor(first)
			if !l.possible {
				continue
			}
			if t.s.n <= headTiles {
				if !l.listShort(t.s.n, first, yield) {
					return
				}
			} else if !l.listLong(t.s.n, first, yield) {
				return
			}
		}
	}
}

// least completes bits from tile i+1 on with the smallest possible flips.
func (l links) least(i int, at bool, set func(tile int, up bool)) {
	for i++; i <= len(l.can); i++ {
		at = l.can[i-1]&(1<<(2*bit(at))) == 0
		set(i, at)
	}
}

// listShort lists with all flips in one machine word. The next string raises
// the last 0 that may be a 1 after the bit before it, and is least behind it;
// all tiles are asked at once.
func (l links) listShort(n int, first bool, yield func(Matching) bool) bool {
	var after0, after1 uint64    // tiles that may be 1 after a 0, after a 1
	var least0, least1 uint64    // least completion behind tile i
	var behind [headTiles]uint64 // of a 1, by bit number
	for i := n; i >= 1; i-- {
		b := headBit(i)
		behind[headTiles-i] = least1
		if i == 1 {
			break
		}
		c := l.can[i-1]
		if c&0b0010 != 0 {
			after0 |= b
		}
		if c&0b1000 != 0 {
			after1 |= b
		}
		zero, one := least0, b|least1
		least0, least1 = zero, zero
		if c&0b0001 == 0 {
			least0 = one
		}
		if c&0b0100 == 0 {
			least1 = one
		}
	}
	m := least0
	if first {
		m = headBit(1) | least1
	}
	for {
		if !yield(Matching{n: n, head: m}) {
			return false
		}
		before := m >> 1
		raise := ^m & (after0&^before | after1&before)
		if raise == 0 {
			return true
		}
		k := bits.TrailingZeros64(raise)
		m = m>>k<<k | 1<<k | behind[k]
	}
}

// listLong does the same on a slice of flips.
func (l links) listLong(n int, first bool, yield func(Matching) bool) bool {
	up := make([]bool, n+1)
	set := func(tile int, b bool) { up[tile] = b }
	up[1] = first
	l.least(1, first, set)
	for {
		if !yield(makeMatching(n, func(tile int) bool { return up[tile] })) {
			return false
		}
		i := n
		for ; i >= 2; i-- {
			if !up[i] && l.can[i-1]&(0b10<<(2*bit(up[i-1]))) != 0 {
				break
			}
		}
		if i < 2 {
			return true
		}
		up[i] = true
		l.least(i, true, set)
	}
}

// Matchings yields the perfect matchings, each once, in increasing
// lexicographic order of their 0/1 strings, from the minimal matching to the
// maximal one. It can be run again. Up to 64 tiles a step costs a few machine
// instructions and allocates nothing. A graph of more than [MaxTiles] tiles
// yields nothing; [Graph.Set] reports that as an error.
func (g Graph) Matchings() iter.Seq[Matching] {
	t, err := g.Set()
	if err != nil {
		return func(func(Matching) bool) {}
	}
	return t.All()
}
