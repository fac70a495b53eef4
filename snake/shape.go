package snake

import "example.com/onecusp/contfrac"

// shape is a chain of tiles laid out: the directions of its glues and its
// labels. It is never changed once a Graph or Band holds it.
type shape struct {
	n      int         // tiles, at least 1
	closed bool        // the last tile is glued to the first
	dir    []Direction // dir[i]: glue between tiles i and i+1; dir[0] and dir[n] where the chain is cut
	lab    *labelling  // nil when nothing is labelled
}

// labelling holds the labels of a shape.
type labelling struct {
	diagonal []Label  // diagonal[i−1] of tile i
	glue     []Label  // glue[i−1] of the edge between tiles i and i+1
	own      []bool   // own[i−1]: tiles i and i+1 come from one crossing
	start    [2]Label // west and south of tile 1
	end      [2]Label // east and north of tile n
}

// glueDirection is the shape rule: R goes right after an odd tile and up after
// an even one, L the other way.
func glueDirection(i int, w contfrac.Letter) Direction {
	if (w == contfrac.R) == (i&1 == 1) {
		return Right
	}
	return Up
}

// letter is the inverse of glueDirection.
func (s *shape) letter(i int) contfrac.Letter {
	if (s.dir[i] == Right) == (i&1 == 1) {
		return contfrac.R
	}
	return contfrac.L
}

// seal chooses the cut directions of an open chain: straight on at both ends.
func (s *shape) seal() {
	s.dir[0], s.dir[s.n] = Right, Right
	if s.n > 1 {
		s.dir[0], s.dir[s.n] = s.dir[1], s.dir[s.n-1]
	}
}

// newShape lays out the open chain of a word with n−1 letters.
func newShape(w contfrac.Word, n int) *shape {
	s := &shape{n: n, dir: make([]Direction, n+1)}
	i := 1
	for l := range w.Letters() {
		s.dir[i] = glueDirection(i, l)
		i++
	}
	s.seal()
	return s
}

// word reads the turn letters of an open chain back from its glues.
func (s *shape) word() contfrac.Word {
	var b contfrac.WordBuilder
	for i := 1; i < s.n; i++ {
		b.Append(s.letter(i), 1)
	}
	return b.Word()
}

// flipped reports whether a tile is flipped when its matched sides are vertical.
func flipped(tile int, vertical bool) bool { return vertical == (tile&1 == 1) }

// side names an edge the way the graph does and gives its label.
func (s *shape) side(tile int, f Face) Side {
	switch {
	case tile > 1 && f == West && s.dir[tile-1] == Right:
		tile, f = tile-1, East
	case tile > 1 && f == South && s.dir[tile-1] == Up:
		tile, f = tile-1, North
	case tile == 1 && s.closed && f == s.dir[0].entry():
		tile, f = s.n, s.dir[s.n].exit()
	}
	return Side{tile, f, s.label(tile, f)}
}

// label is the label of a side in the graph's own naming. The side of a tile
// that is not glued closes a triangle with the glue and the neighbour's
// diagonal, so it carries that diagonal's label.
func (s *shape) label(tile int, f Face) Label {
	l := s.lab
	if l == nil {
		return NoLabel
	}
	open := !s.closed
	switch {
	case f == West || f == South:
		if tile > 1 {
			return l.diagonal[tile-2]
		}
		if open {
			return l.start[f&1^1]
		}
		return l.diagonal[s.n-1]
	case tile == s.n && open:
		return l.end[f>>1]
	case f == s.dir[tile].exit():
		return l.glue[tile-1]
	}
	return l.diagonal[tile%s.n]
}

// diagonal is the label of the diagonal of a tile.
func (s *shape) diagonal(tile int) Label {
	if s.lab == nil {
		return NoLabel
	}
	return s.lab.diagonal[tile-1]
}
