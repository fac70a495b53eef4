package snake

import (
	"slices"

	"example.com/onecusp/contfrac"
)

// Builder glues a labelled snake graph tile by tile, the way an arc passes
// through a triangulated surface: one tile for each crossing, with the crossed
// edge as its diagonal.
//
// It needs to know only what one sees while walking along the arc. The two
// triangles on either side of a crossed edge are the two halves of its tile:
// the south-west half comes first. Of that half, one side is glued to the tile
// before and carries the label of the glue, the other carries the label of the
// diagonal of the tile before; the north-east half likewise with the tile
// after.
//
// The zero value starts with a first tile without labels. A Builder must not be
// copied once used, nor used from several goroutines at once. The graphs it
// returns are independent of it.
type Builder struct {
	dir []Direction
	lab labelling
}

// NewBuilder starts with the first tile: the label of its diagonal (the first
// crossed edge) and of the two sides from the start of the arc to the left and
// to the right end of that edge.
//
// On tile 1, and on every odd tile, the right end is the north-west corner and
// the left end the south-east one; on even tiles it is the other way round.
func NewBuilder(diagonal, left, right Label) *Builder {
	b := new(Builder)
	b.begin()
	b.lab.diagonal[0], b.lab.start = diagonal, [2]Label{right, left}
	return b
}

// begin makes sure that there is a first tile.
func (b *Builder) begin() {
	if len(b.dir) == 0 {
		b.dir, b.lab.diagonal = []Direction{Right}, []Label{NoLabel}
	}
}

// Glue appends a tile: the turn letter from the last tile to it, the label of
// the edge they are glued along (the third side of the triangle passed), and
// the label of the new tile's diagonal. Consecutive equal letters make a
// zigzag, different ones a straight piece. It returns the builder.
func (b *Builder) Glue(turn contfrac.Letter, glue, diagonal Label) *Builder {
	return b.glue(turn, glue, diagonal, false)
}

// GlueOwn appends a tile for one more letter of the same crossing: the turn
// letter is the crossing's own letter, and the glue and the new diagonal carry
// the label of the last diagonal. Two tiles from one crossing form a [Hexagon].
// It returns the builder.
func (b *Builder) GlueOwn(own contfrac.Letter) *Builder {
	b.begin()
	d := b.lab.diagonal[len(b.lab.diagonal)-1]
	return b.glue(own, d, d, true)
}

func (b *Builder) glue(turn contfrac.Letter, glue, diagonal Label, own bool) *Builder {
	b.begin()
	b.dir = append(b.dir, glueDirection(len(b.dir), turn))
	b.lab.glue = append(b.lab.glue, glue)
	b.lab.diagonal = append(b.lab.diagonal, diagonal)
	b.lab.own = append(b.lab.own, own)
	return b
}

// Tiles returns the number of tiles so far, at least 1.
func (b *Builder) Tiles() int { return max(1, len(b.lab.diagonal)) }

// Graph returns the graph built so far, its last tile closed with the labels of
// the two sides from the left and from the right end of the last crossed edge to
// the end of the arc. The builder may go on afterwards.
func (b *Builder) Graph(left, right Label) Graph {
	b.begin()
	n := len(b.lab.diagonal)
	s := &shape{
		n:   n,
		dir: append(slices.Clone(b.dir), Right),
		lab: &labelling{
			diagonal: slices.Clone(b.lab.diagonal),
			glue:     slices.Clone(b.lab.glue),
			own:      slices.Clone(b.lab.own),
			start:    b.lab.start,
			end:      [2]Label{left, right}, // odd last tile: the left end is its south-east corner
		},
	}
	if n&1 == 0 {
		s.lab.end = [2]Label{right, left}
	}
	s.seal()
	return Graph{form: glued, s: s}
}

// equal reports whether two labellings mark everything alike; nil marks nothing.
func (l *labelling) equal(m *labelling) bool {
	if l == nil || m == nil {
		return l.blank() && m.blank()
	}
	return l.start == m.start && l.end == m.end && slices.Equal(l.diagonal, m.diagonal) &&
		slices.Equal(l.glue, m.glue) && slices.Equal(l.own, m.own)
}

// blank reports whether nothing is marked.
func (l *labelling) blank() bool {
	if l == nil {
		return true
	}
	marked := func(x Label) bool { return x != NoLabel }
	return l.start == [2]Label{} && l.end == [2]Label{} &&
		!slices.ContainsFunc(l.diagonal, marked) && !slices.ContainsFunc(l.glue, marked) && !slices.Contains(l.own, true)
}
