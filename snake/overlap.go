package snake

import (
	"fmt"
	"iter"
	"slices"
	"strings"

	"example.com/onecusp/contfrac"
)

// Overlap is a common piece of two snake graphs: Tiles tiles, from tile First
// of the one and from tile Second of the other on, with the same letters
// between them.
type Overlap struct{ First, Second, Tiles int }

// MaxOverlapTiles is the largest number of tiles of graphs whose overlaps are
// looked for, since all pairs of tiles are compared.
const MaxOverlapTiles = 1 << 13

// Overlaps yields the overlaps in which two graphs cross, those that [Resolve]
// accepts: maximal common pieces at whose two ends the letters differ in
// opposite senses, where the end of a graph counts as whichever letter is
// needed. Order: by first tile in g, then in h. It returns [ErrTooLong] past
// [MaxOverlapTiles] tiles. The iterator can be run again.
func Overlaps(g, h Graph) (iter.Seq[Overlap], error) {
	u, v, err := overlapWords(g, h)
	if err != nil {
		return nil, err
	}
	n, m := g.Tiles(), h.Tiles()
	return func(yield func(Overlap) bool) {
		for i := 1; i <= n; i++ {
			for j := 1; j <= m; j++ {
				if i > 1 && j > 1 && u[i-2] == v[j-2] {
					continue // not the start of a maximal piece
				}
				k := 1
				for i+k <= n && j+k <= m && u[i+k-2] == v[j+k-2] {
					k++
				}
				if o := (Overlap{i, j, k}); crosses(u, v, o) && !yield(o) {
					return
				}
			}
		}
	}, nil
}

// overlapWords returns the words of two graphs with tiles, letter by letter.
func overlapWords(g, h Graph) (u, v string, err error) {
	var words [2]string
	for k, x := range [2]Graph{g, h} {
		n := x.Tiles()
		if n > MaxOverlapTiles {
			return "", "", fmt.Errorf("snake: overlaps of a graph of %s: at most %d are accepted: %w", tileCount(n), MaxOverlapTiles, ErrTooLong)
		}
		var b strings.Builder
		w, _ := x.Word()
		for l := range w.Letters() {
			b.WriteString(l.String())
		}
		words[k] = b.String()
	}
	return words[0], words[1], nil
}

// crosses reports whether a maximal overlap is a crossing: with the letters x,
// x′ before and y, y′ behind it, x and y differ.
func crosses(u, v string, o Overlap) bool {
	before, behind := endLetter(u, v, o.First-2, o.Second-2), endLetter(u, v, o.First+o.Tiles-2, o.Second+o.Tiles-2)
	return before != 0 && behind != 0 && before != behind
}

// endLetter is the letter of the first graph next to an overlap; where it has
// none, the other one than the second graph's; 0 where neither has one.
func endLetter(u, v string, i, j int) byte {
	switch {
	case i >= 0 && i < len(u):
		return u[i]
	case j < 0 || j >= len(v):
		return 0
	}
	return 'L' + 'R' - v[j]
}

// Resolve smooths the crossing of two snake graphs in an overlap and returns
// the identity
//
//	g · h = g′ · h′ + e · f
//
// First holds the two graphs that change over at the overlap: g up to its end
// and h from there on, and the other way round. Second joins the two starts,
// and the two ends, without the overlap. Labels are dropped.
//
// It returns [ErrNoTile] when a graph does not have the tiles, [ErrNotCrossing]
// when the overlap is not common, not maximal, or no crossing, and [ErrTooLong]
// past [MaxOverlapTiles] tiles.
// Source: "Snake graph calculus and cluster algebras from surfaces", J. Algebra
// 382 (2013) (memory); derived anew for words of letters.
func Resolve(g, h Graph, o Overlap) (Relation, error) {
	u, v, err := overlapWords(g, h)
	if err != nil {
		return Relation{}, err
	}
	n, m := g.Tiles(), h.Tiles()
	if o.First < 1 || o.Second < 1 || o.Tiles < 1 || o.Tiles > min(n, m) || o.First > n-o.Tiles+1 || o.Second > m-o.Tiles+1 {
		return Relation{}, fmt.Errorf("snake: overlap of %d tiles from tiles %d of %d and %d of %d: %w", o.Tiles, o.First, n, o.Second, m, ErrNoTile)
	}
	i, j, k := o.First-1, o.Second-1, o.Tiles-1 // letters before, and inside
	a, inside, b := u[:i], u[i:i+k], u[i+k:]
	c, d := v[:j], v[j+k:]
	maximal := (a == "" || c == "" || a[i-1] != c[j-1]) && (b == "" || d == "" || b[0] != d[0])
	if inside != v[j:j+k] || !maximal || !crosses(u, v, o) {
		return Relation{}, fmt.Errorf("snake: overlap of %d tiles from tile %d and tile %d: the letters must agree inside, differ at both ends, and cross: %w", o.Tiles, o.First, o.Second, ErrNotCrossing)
	}
	return Relation{
		Product: [2]Graph{letters(u), letters(v)},
		First:   [2]Graph{letters(a + inside + d), letters(c + inside + b)},
		Second:  [2]Graph{joined(backwards(a), backwards(c)).turnedRound(), joined(b, d)},
	}, nil
}

// joined is the graph that joins two ends b and d which begin with different
// letters: b turned round, with its first letter in the middle, and d without
// its own; where one of them is empty, what the other one's first letter leaves
// unforced.
//
// In matrices: N(aOb)·N(cOd) − N(aOd)·N(cOb) = det(a, c)·det(b, d), with the
// rows a, c and the columns b, d that the ends contribute; each of the two
// determinants is, up to sign, the number of matchings of a joined graph.
func joined(b, d string) Graph {
	switch {
	case b == "":
		return forced(word(d[1:]), letter(d[0]).Other())
	case d == "":
		return forced(word(b[1:]), letter(b[0]).Other())
	}
	return FromWord(word(backwards(b[1:])).Swap().Concat(word(b[:1] + d[1:])))
}

func letter(c byte) contfrac.Letter {
	if c == 'R' {
		return contfrac.R
	}
	return contfrac.L
}

func word(s string) contfrac.Word {
	var b contfrac.WordBuilder
	for i := range len(s) {
		b.Append(letter(s[i]), 1)
	}
	return b.Word()
}

func letters(s string) Graph { return FromWord(word(s)) }

func backwards(s string) string {
	b := []byte(s)
	slices.Reverse(b)
	return string(b)
}
