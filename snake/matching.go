package snake

import (
	"fmt"
	"math/bits"
	"strings"
)

// Matching is a perfect matching of a snake or band graph, given by the tiles
// that are flipped in it compared with the minimal matching. It is a comparable
// value that knows its number of tiles but not its graph; up to 64 tiles it
// needs no memory beyond itself. The zero value is the matching of the single
// edge.
type Matching struct {
	n    int
	head uint64 // tiles 1 … 64, tile 1 the highest bit
	rest string // tiles 65 …, eight to a byte, the first the highest bit
}

// headTiles is the number of tiles held inline.
const headTiles = 64

// ParseMatching returns the matching with the given 0/1 string, one digit for
// each tile, 1 for flipped: what [Matching.String] prints. Whether it is a
// matching of a graph is for [Graph.Contains] to say. It returns
// [ErrNotMatching] for other characters and [ErrTooLong] past [MaxTiles]
// digits.
func ParseMatching(s string) (Matching, error) {
	if len(s) > MaxTiles {
		return Matching{}, fmt.Errorf("snake: matching %s: at most %d tiles are accepted: %w", shorten(s), MaxTiles, ErrTooLong)
	}
	if i := strings.IndexFunc(s, func(r rune) bool { return r != '0' && r != '1' }); i >= 0 {
		return Matching{}, fmt.Errorf("snake: matching %s: character %d is neither 0 nor 1: %w", shorten(s), i+1, ErrNotMatching)
	}
	return makeMatching(len(s), func(tile int) bool { return s[tile-1] == '1' }), nil
}

// makeMatching collects the flipped tiles.
func makeMatching(n int, up func(tile int) bool) Matching {
	m := Matching{n: n}
	for i := 1; i <= min(n, headTiles); i++ {
		if up(i) {
			m.head |= headBit(i)
		}
	}
	if n > headTiles {
		rest := make([]byte, (n-headTiles+7)/8)
		for i := headTiles + 1; i <= n; i++ {
			if up(i) {
				k := i - headTiles - 1
				rest[k/8] |= 0x80 >> (k % 8)
			}
		}
		m.rest = string(rest)
	}
	return m
}

// headBit is the bit of a tile up to 64.
func headBit(tile int) uint64 { return 1 << (headTiles - tile) }

// Tiles returns the number of tiles of the graph it is a matching of.
func (m Matching) Tiles() int { return m.n }

// Flipped reports whether a tile is flipped; false outside 1 … Tiles().
func (m Matching) Flipped(tile int) bool {
	switch {
	case tile < 1 || tile > m.n:
		return false
	case tile <= headTiles:
		return m.head&headBit(tile) != 0
	}
	k := tile - headTiles - 1
	return m.rest[k/8]&(0x80>>(k%8)) != 0
}

// Height returns the number of flipped tiles: the rank of the matching in the
// lattice, and its distance in flips from the minimal one.
func (m Matching) Height() int {
	h := bits.OnesCount64(m.head)
	for i := 0; i < len(m.rest); i++ {
		h += bits.OnesCount8(m.rest[i])
	}
	return h
}

// String returns one digit for each tile, 1 for flipped.
func (m Matching) String() string {
	var b strings.Builder
	b.Grow(m.n)
	for i := 1; i <= m.n; i++ {
		if m.Flipped(i) {
			b.WriteByte('1')
		} else {
			b.WriteByte('0')
		}
	}
	return b.String()
}

// Compare orders matchings of one graph as they are listed: −1, 0 or +1, by the
// lexicographic order of their strings. A proper prefix comes first.
func (m Matching) Compare(o Matching) int {
	switch {
	case m.head < o.head:
		return -1
	case m.head > o.head:
		return 1
	}
	// Padding bits are zero, so bytes decide unless one is the start of the
	// other.
	if c := strings.Compare(m.rest, o.rest); c != 0 {
		return c
	}
	switch {
	case m.n < o.n:
		return -1
	case m.n > o.n:
		return 1
	}
	return 0
}

// MarshalText returns what String returns.
func (m Matching) MarshalText() ([]byte, error) { return []byte(m.String()), nil }

// UnmarshalText accepts what [ParseMatching] accepts.
func (m *Matching) UnmarshalText(text []byte) error {
	if len(text) > MaxTiles {
		return fmt.Errorf("snake: matching of %d digits: at most %d are accepted: %w", len(text), MaxTiles, ErrTooLong)
	}
	p, err := ParseMatching(string(text))
	if err != nil {
		return err
	}
	*m = p
	return nil
}
