package snake

import (
	"fmt"
	"math"
	"math/big"

	"example.com/onecusp/contfrac"
)

// Graph is a snake graph. It is immutable; the zero value is the single edge.
//
// A graph made from a word or a fraction keeps the run form, however long, and
// is laid out tile by tile only when an operation needs it. A graph made by a
// [Builder] keeps its own glues and labels.
type Graph struct {
	run  contfrac.Word // the word, when inRun
	form form
	s    *shape // the layout; nil for the single edge and long run forms
	edge Label  // label of the single edge
}

// form says what a Graph was made from.
type form uint8

const (
	singleEdge form = iota
	inRun           // a word in run form; s is nil when it is long
	glued           // tile by tile; s holds everything
)

// layoutNow is the number of tiles up to which a word is laid out at once
// instead of at every use; past it a graph that is only counted stays small.
// BenchmarkLayout measures both ways.
var layoutNow = 1 << 12

// FromWord returns the snake graph of a word without end letters: n−1 letters
// give n tiles. The shape follows the rule in the package documentation.
// Cost: O(runs), whatever their lengths.
func FromWord(w contfrac.Word) Graph {
	g := Graph{run: w, form: inRun}
	if n := g.Tiles(); n <= layoutNow {
		g.s = newShape(w, n)
	}
	return g
}

// FromFraction returns the snake graph with Σa − 1 tiles whose number of
// matchings is the numerator of the positive continued fraction [a₁; a₂, …].
// The last term may be 1; [1] gives the single edge.
//
// It returns [ErrNotPositive] when the fraction is empty or has a term below 1.
// Source: "Cluster algebras and continued fractions", Compositio Math. 154
// (2018).
func FromFraction(f contfrac.Fraction) (Graph, error) {
	terms := f.Terms()
	if len(terms) == 0 {
		return Graph{}, fmt.Errorf("snake: graph of the empty fraction: at least one term is needed: %w", ErrNotPositive)
	}
	for i, a := range terms {
		if a.Sign() <= 0 {
			return Graph{}, fmt.Errorf("snake: graph of a fraction whose term %d is %s: every term must be at least 1: %w", i, shorten(a.String()), ErrNotPositive)
		}
	}
	// The run lengths spell the word with one free letter at either end.
	one := big.NewInt(1)
	terms[0].Sub(terms[0], one)
	last := terms[len(terms)-1]
	if last.Sign() == 0 { // only [1]
		return Edge(), nil
	}
	last.Sub(last, one)
	var b contfrac.WordBuilder
	letter := contfrac.R
	for _, a := range terms {
		_ = b.AppendBig(letter, a) // not negative
		letter = letter.Other()
	}
	return FromWord(b.Word()), nil
}

// Edge returns the graph without tiles, a single edge: one matching. It is the
// graph of an arc that crosses nothing.
func Edge() Graph { return Graph{} }

// EdgeWithLabel returns the single edge carrying a label.
func EdgeWithLabel(l Label) Graph { return Graph{edge: l} }

// Tiles returns the number of tiles, or [math.MaxInt] when it is larger.
func (g Graph) Tiles() int {
	switch {
	case g.form == singleEdge:
		return 0
	case g.s != nil:
		return g.s.n
	}
	n := g.run.Len()
	if n.Cmp(big.NewInt(math.MaxInt-1)) > 0 {
		return math.MaxInt
	}
	return int(n.Int64()) + 1
}

// Word returns the turn letters of the graph, one fewer than its tiles, and
// false for the single edge, which has no word. Cost: O(1) for a graph in run
// form; for one made by a [Builder] the letters are read back from the shape.
func (g Graph) Word() (contfrac.Word, bool) {
	switch g.form {
	case singleEdge:
		return contfrac.Word{}, false
	case glued:
		return g.s.word(), true
	}
	return g.run, true
}

// Equal reports whether two graphs have the same shape at the same place and
// the same labels. For graphs that differ only in how they lie, compare
// their [Graph.Canonical] words.
func (g Graph) Equal(h Graph) bool {
	if (g.form == singleEdge) != (h.form == singleEdge) || g.edge != h.edge {
		return false
	}
	if g.form == singleEdge {
		return true
	}
	v, _ := g.Word()
	w, _ := h.Word()
	return v == w && g.labels().equal(h.labels())
}

// labels returns the labelling, nil when there is none.
func (g Graph) labels() *labelling {
	if g.s == nil {
		return nil
	}
	return g.s.lab
}

// layout returns the shape of a graph with tiles, laid out.
func (g Graph) layout(what string, limit int) (*shape, error) {
	n := g.Tiles()
	if n > limit {
		return nil, fmt.Errorf("snake: %s of %s: at most %d are accepted: %w", what, tileCount(n), limit, ErrTooLong)
	}
	if g.s != nil || g.form == singleEdge {
		return g.s, nil
	}
	return newShape(g.run, n), nil
}

// tileCount names a number of tiles that may be saturated.
func tileCount(n int) string {
	switch n {
	case 1:
		return "1 tile"
	case math.MaxInt:
		return "too many tiles to number"
	}
	return fmt.Sprintf("%d tiles", n)
}
