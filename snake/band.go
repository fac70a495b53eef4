package snake

import (
	"errors"
	"fmt"
	"iter"
	"math"
	"math/big"

	"example.com/onecusp/contfrac"
)

// ErrOneLetter reports a cyclic word without both letters; it names no band.
var ErrOneLetter = errors.New("a band needs both letters")

// Band is a band graph: a snake graph of n tiles whose last tile is glued to
// its first one. It carries a cyclic word of n letters, the last of them
// between tile n and tile 1. Its good matchings are the perfect matchings that
// come from a matching of the cut snake which uses a copy of the cut edge, one
// copy removed; equivalently, those in which the two ends of every glue edge
// are covered from one side or by the edge itself.
//
// A good matching is a [Matching] with n digits like any other, and the good
// matchings are the order ideals of the ring-shaped [Fence].
//
// A Band is immutable. The zero value has no tiles and no good matching.
// Source: "Bases for cluster algebras from surfaces", Compositio Math. 149
// (2013) (memory).
type Band struct {
	run contfrac.Word
	s   *shape // the layout; nil when it is long, and for the zero value
}

// BandFromWord returns the band of a cyclic word, cut between its last and its
// first letter. It returns [ErrOneLetter] unless both letters occur.
// Cost: O(runs).
func BandFromWord(w contfrac.Word) (Band, error) {
	if w.NumRuns() < 2 {
		return Band{}, fmt.Errorf("snake: band of the cyclic word %s: %w", shorten(fmt.Sprintf("%v", w)), ErrOneLetter)
	}
	b := Band{run: w}
	if n := b.Tiles(); n <= layoutNow {
		b.s = closedShape(w, n)
	}
	return b, nil
}

// closedShape lays out the closed chain of a cyclic word.
func closedShape(w contfrac.Word, n int) *shape {
	s := &shape{n: n, closed: true, dir: make([]Direction, n+1)}
	i := 1
	for l := range w.Letters() {
		s.dir[i] = glueDirection(i, l)
		i++
	}
	last, _ := w.Last()
	s.dir[0] = glueDirection(0, last)
	return s
}

// Band closes the chain built so far: the turn letter from the last tile to the
// first one and the label of the edge they are glued along. The labels that
// [NewBuilder] got for the start of an arc are not used: the side in question
// now carries the label of the last diagonal. It returns [ErrOneLetter] unless
// both letters occur.
func (b *Builder) Band(turn contfrac.Letter, glue Label) (Band, error) {
	open := b.Graph(NoLabel, NoLabel)
	var w contfrac.WordBuilder
	w.AppendWord(open.s.word())
	w.Append(turn, 1)
	band, err := BandFromWord(w.Word())
	if err != nil {
		return Band{}, err
	}
	s := closedShape(band.run, open.s.n)
	s.lab = open.s.lab
	s.lab.glue = append(s.lab.glue, glue)
	s.lab.own = append(s.lab.own, false)
	s.lab.start = [2]Label{}
	band.s = s
	return band, nil
}

// Tiles returns the number of tiles, or [math.MaxInt] when it is larger.
func (b Band) Tiles() int {
	if b.s != nil {
		return b.s.n
	}
	if n := b.run.Len(); n.IsInt64() && n.Int64() <= math.MaxInt {
		return int(n.Int64())
	}
	return math.MaxInt
}

// Word returns the cyclic word, from the letter between tiles 1 and 2 to the
// one between the last tile and tile 1.
func (b Band) Word() contfrac.Word { return b.run }

// Count returns the number of good matchings. For a band in run form it is the
// trace of the matrix of the word, in O(runs) big multiplications; for a band
// made by a [Builder] the trace of the balanced product of the transfer
// matrices of its tiles.
func (b Band) Count() *big.Int {
	switch {
	case b.run.IsEmpty():
		return new(big.Int)
	case b.s != nil && b.s.lab != nil:
		return b.s.count(nil, allEnds)
	}
	return b.run.Matrix().Trace()
}

// layout returns the shape laid out, nil for the zero value.
func (b Band) layout(what string, limit int) (*shape, error) {
	n := b.Tiles()
	if n > limit {
		return nil, fmt.Errorf("snake: %s of a band of %s: at most %d are accepted: %w", what, tileCount(n), limit, ErrTooLong)
	}
	if b.s != nil || n == 0 {
		return b.s, nil
	}
	return closedShape(b.run, n), nil
}

// Set returns the set of all good matchings. It returns [ErrTooLong] past
// [MaxTiles] tiles.
func (b Band) Set() (Set, error) {
	s, err := b.layout("matchings", MaxTiles)
	if err != nil {
		return Set{}, err
	}
	return Set{s: s, none: s == nil, table: new(completions)}, nil
}

// Matchings yields the good matchings, each once, in increasing lexicographic
// order of their 0/1 strings. It can be run again, and costs what
// [Graph.Matchings] costs. A band of more than [MaxTiles] tiles yields nothing;
// [Band.Set] reports that as an error.
func (b Band) Matchings() iter.Seq[Matching] {
	t, err := b.Set()
	if err != nil {
		return func(func(Matching) bool) {}
	}
	return t.All()
}

// Fence returns the ring-shaped poset on the tiles. It returns [ErrTooLong]
// past [MaxTiles] tiles.
func (b Band) Fence() (Fence, error) {
	s, err := b.layout("fence", MaxTiles)
	return Fence{s}, err
}

// String describes the band in one line, with its whole cyclic word.
// The verb %v shortens long words.
func (b Band) String() string { return b.describe("%s") }

// Format implements fmt.Formatter: %s writes what String returns, %q quotes it,
// %v and every other verb shorten a long word.
func (b Band) Format(f fmt.State, verb rune) { formatAs(f, verb, b.describe) }

func (b Band) describe(verb string) string {
	if b.run.IsEmpty() {
		return "band graph, empty"
	}
	return fmt.Sprintf("band graph, %s tiles: "+verb, contfrac.Abbreviate(b.run.Len()), b.run)
}
