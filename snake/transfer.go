package snake

import (
	"math/big"

	"example.com/onecusp/contfrac"
)

// state says what the tiles so far do to the glue edge ahead: they leave both
// its end vertices free, or they cover both. By parity they never cover one.
// The glue edge itself is not counted among them: the next tile decides on it.
type state uint8

const (
	free state = iota
	covered
)

// step is one way for a matching to pass a tile: from the state at its entry
// to the state at its exit, the edges it takes on the way, and whether the
// tile's taken sides are the vertical ones.
type step struct {
	from, to state
	entry    bool    // takes the entry edge
	vertical bool    // the tile is matched vertically, now or once a neighbour is flipped
	sides    [2]Face // the other sides it takes: first n of these
	n        uint8
}

// steps is the transfer matrix of a tile, the one place where counting on
// vertices and edges is written down, by entry and exit direction.
//
// Straight: with both entry vertices free, either the entry edge is taken and
// the exit vertices stay free, or both long sides are taken and cover them;
// with both covered, the exit vertices stay free. Turning: call u the entry
// vertex that the exit edge does not have, z the corner opposite the one it
// shares, y the exit vertex that is not shared. Entry edge and zy, or uz alone,
// or, with the entry covered, zy alone.
var steps = [2][2][3]step{
	Right: {
		Right: {
			{from: free, to: free, entry: true, vertical: true},
			{from: free, to: covered, sides: [2]Face{South, North}, n: 2},
			{from: covered, to: free, vertical: true},
		},
		Up: {
			{from: free, to: covered, entry: true, vertical: true, sides: [2]Face{East}, n: 1},
			{from: free, to: free, sides: [2]Face{South}, n: 1},
			{from: covered, to: covered, vertical: true, sides: [2]Face{East}, n: 1},
		},
	},
	Up: {
		Right: {
			{from: free, to: covered, entry: true, sides: [2]Face{North}, n: 1},
			{from: free, to: free, vertical: true, sides: [2]Face{West}, n: 1},
			{from: covered, to: covered, sides: [2]Face{North}, n: 1},
		},
		Up: {
			{from: free, to: free, entry: true},
			{from: free, to: covered, vertical: true, sides: [2]Face{West, East}, n: 2},
			{from: covered, to: free},
		},
	},
}

// allSteps allows each of the three steps of a tile.
const allSteps = 0b111

// at returns the steps of a tile.
func (s *shape) at(tile int) *[3]step { return &steps[s.dir[tile-1]][s.dir[tile]] }

// after returns the state behind a tile that is or is not flipped; the flip
// decides it, whatever came before. The first two steps of a tile have
// different flips.
func (s *shape) after(tile int, up bool) state {
	t := s.at(tile)
	if flipped(tile, t[0].vertical) == up {
		return t[0].to
	}
	return t[1].to
}

// product is the product of the transfer matrices of tiles first … last,
// with only the steps allowed (nil: all). allow[i−1] is the mask of tile i.
func (s *shape) product(first, last int, allow []uint8) contfrac.Matrix {
	// A product of 64 of these matrices has entries below 2⁶⁴: they are at most
	// Fibonacci numbers.
	const leaf = 64
	if last-first < leaf {
		m := [2][2]uint64{{1, 0}, {0, 1}}
		for i := first; i <= last; i++ {
			var next [2][2]uint64
			for k, t := range s.at(i) {
				if allow != nil && allow[i-1]&(1<<k) == 0 {
					continue
				}
				next[0][t.to] += m[0][t.from]
				next[1][t.to] += m[1][t.from]
			}
			m = next
		}
		var e [4]*big.Int
		for k := range e {
			e[k] = new(big.Int).SetUint64(m[k>>1][k&1])
		}
		return contfrac.NewMatrix(e[0], e[1], e[2], e[3])
	}
	middle := first + (last-first)/2
	return s.product(first, middle, allow).Mul(s.product(middle+1, last, allow))
}

// count is the number of matchings that pass every tile by an allowed step and
// end in an allowed state (bit 1<<state of ends).
func (s *shape) count(allow []uint8, ends uint8) *big.Int {
	m := s.product(1, s.n, allow)
	if s.closed {
		return m.Trace()
	}
	n := new(big.Int)
	if ends&(1<<free) != 0 {
		n.Add(n, m.A())
	}
	if ends&(1<<covered) != 0 {
		n.Add(n, m.B())
	}
	return n
}

// allEnds allows both states at the end of an open chain.
const allEnds = 1<<free | 1<<covered

// Count returns the number of perfect matchings, 1 for the single edge.
//
// A graph in run form is counted by the matrix of its word, in O(runs) big
// multiplications; a graph made by a [Builder] on its vertices and edges, by a
// balanced product of one transfer matrix for each tile. Both cost a small
// multiple of one multiplication of two numbers of half the size of the result,
// times log.
func (g Graph) Count() *big.Int {
	switch g.form {
	case singleEdge:
		return big.NewInt(1)
	case glued:
		return g.s.count(nil, allEnds)
	}
	m := g.run.Matrix()
	n := m.A()
	n.Add(n, m.B())
	n.Add(n, m.C())
	return n.Add(n, m.D())
}
