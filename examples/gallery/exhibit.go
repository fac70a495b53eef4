package main

import (
	"errors"
	"fmt"
	"html/template"
	"iter"
	"math/big"
	"math/rand/v2"
	"strings"

	"example.com/onecusp/farey"
	"example.com/onecusp/orbifold"
	"example.com/onecusp/snake"
)

const (
	maxLattice = 32 // a lattice of matchings is drawn up to this many
	maxText    = 30 // and a graph with characters up to this many tiles
	leastTile  = 40 // pixels of a tile's side, at least
)

// exhibit is one slope in one family.
type exhibit struct {
	Slope    farey.Slope
	Family   orbifold.Family
	Facts    []fact
	Pictures []picture

	graph    snake.Graph
	set      snake.Set // its perfect matchings
	hexagons int
}

// newExhibit draws the snake graph of the slope s in the family f. The random matching
// depends on nothing but them and the seed.
func newExhibit(f orbifold.Family, s farey.Slope, seed uint64) (*exhibit, error) {
	x := &exhibit{Slope: s, Family: f}
	var err error
	if x.graph, err = f.Snake(s); err != nil {
		return nil, err
	}
	if x.set, err = x.graph.Set(); err != nil {
		return nil, err
	}
	for range x.graph.Hexagons() {
		x.hexagons++
	}
	random, err := x.random(rand.NewPCG(seed, uint64(x.graph.Tiles())))
	if err != nil {
		return nil, err
	}
	for _, add := range []func() error{
		x.addCounts, x.addExpansion,
		x.addMinimal, func() error { return x.addRandom(random) }, x.addBand, x.addLattice,
	} {
		if err := add(); err != nil {
			return nil, err
		}
	}
	return x, nil
}

// random draws a matching other than the minimal and the maximal one, each with the same
// probability; where there are no others, the maximal one.
func (x *exhibit) random(source rand.Source) (snake.Matching, error) {
	n := x.graph.Tiles()
	if x.graph.Count().Cmp(big.NewInt(2)) <= 0 {
		return x.set.Maximal()
	}
	for {
		m, err := x.set.Sample(source)
		if err != nil || m.Height() > 0 && m.Height() < n {
			return m, err
		}
	}
}

// state appends a fact.
func (x *exhibit) state(name, format string, a ...any) {
	x.Facts = append(x.Facts, fact{Name: name, Value: fmt.Sprintf(format, a...)})
}

// Number is the number at the slope: the matchings of the graph, counted.
func (x *exhibit) Number() string { return digits(x.graph.Count()) }

// addCounts states what is counted: tiles, matchings, matchings by height.
func (x *exhibit) addCounts() error {
	x.state("Perfect matchings", "%s", x.Number())
	tiles := plural(x.graph.Tiles(), "tile", "tiles")
	if x.hexagons > 0 {
		tiles += ", of which " + plural(x.hexagons, "pair makes a hexagon", "pairs make hexagons")
	}
	x.state("Tiles", "%s", tiles)
	switch w, err := x.Family.Word(x.Slope); {
	case errors.Is(err, orbifold.ErrNoCrossing):
		x.state("Word", "none: the arc crosses nothing")
	case err != nil:
		return err
	case w.IsEmpty():
		x.state("Word", "the empty word")
	default:
		x.state("Word", "%s", w)
	}
	a, err := x.Family.Fraction(x.Slope)
	if err != nil {
		return err
	}
	x.state("Continued fraction", "%v", a)
	rank, err := x.graph.RankPolynomial()
	if err != nil {
		return err
	}
	x.state("Rank polynomial", "%v", rank)
	x.Facts[len(x.Facts)-1].Whole = rank.String()
	return nil
}

// addExpansion states the Laurent expansion; in the classical family the F-polynomial
// and the g-vector too.
func (x *exhibit) addExpansion() error {
	e, err := x.Family.Laurent(x.Slope)
	if err != nil {
		return err
	}
	x.Facts = append(x.Facts, fact{Name: "Laurent expansion", Value: fmt.Sprintf("%v", e), Whole: e.String()})
	x.state("Denominator vector", "%s", vector(e.Denominator()))
	var corners []string
	for _, v := range e.Newton() {
		corners = append(corners, vector(v))
	}
	x.state("Newton polygon", "%s", strings.Join(corners, ", "))
	if x.Family != (orbifold.Family{}) {
		return nil
	}
	p, err := orbifold.FPolynomial(x.Slope)
	g, errG := orbifold.GVector(x.Slope)
	if err := errors.Join(err, errG); err != nil {
		return err
	}
	x.state("F-polynomial", "%s", p.Text("y₀", "y∞", "y₁"))
	x.state("g-vector", "%s", vector(g))
	return nil
}

// vector writes exponents of x₀, x∞, x₁.
func vector(v [3]int) string {
	return strings.ReplaceAll(fmt.Sprintf("(%d, %d, %d)", v[0], v[1], v[2]), "-", "−")
}

// addMinimal shows the graph with the labels of tiles and edges and its minimal matching.
func (x *exhibit) addMinimal() error {
	m, err := x.set.Minimal()
	if err != nil {
		return err
	}
	p := picture{
		Title: "Minimal matching", Stem: "minimal",
		Caption: "Tiles and edges carry their classes; the minimal matching, thick, lies on the boundary",
	}
	if x.graph.Tiles() == 0 {
		p.Caption = "The single edge, the graph of an arc that crosses nothing, with its one matching"
	}
	return x.hang(p, x.graph, snake.Drawing{Matching: &m, Name: labelSign, EdgeNames: true})
}

// addRandom shows a matching drawn at random, with numbered tiles; and once more with
// hexagons where a loop of weight 1 is crossed.
func (x *exhibit) addRandom(m snake.Matching) error {
	if m.Tiles() == 0 {
		return nil // the single edge has no other
	}
	rank, err := x.set.Rank(m)
	if err != nil {
		return err
	}
	p := picture{
		Title: "A matching at random", Stem: "random",
		Caption: fmt.Sprintf("Number %v of 0 … %v in lexicographic order, with %s, hatched; numbers are those of the tiles",
			rank, new(big.Int).Sub(x.graph.Count(), big.NewInt(1)), plural(m.Height(), "flipped tile", "flipped tiles")),
	}
	if err := x.hang(p, x.graph, snake.Drawing{Matching: &m, Numbers: true}); err != nil || x.hexagons == 0 {
		return err
	}
	p = picture{
		Title: "The same with hexagons", Stem: "hexagons",
		Caption: "The two tiles from one crossing of an edge of weight 1 form a hexagon; its chord stays an edge, so the matchings are the same",
	}
	return x.hang(p, x.graph, snake.Drawing{Matching: &m, Name: labelSign, Hexagons: true})
}

// addBand states and shows the closed curve round the arc.
func (x *exhibit) addBand() error {
	b, err := x.Family.Band(x.Slope)
	trace, errTrace := x.Family.Trace(x.Slope)
	if err := errors.Join(err, errTrace); err != nil {
		return err
	}
	x.Facts = append(x.Facts, fact{
		Name: "Closed curve", Value: fmt.Sprintf("%v", b.Word()),
		Note: fmt.Sprintf("cyclic word of its band, with %s; good matchings %s, trace K·N − k = %s",
			plural(b.Tiles(), "tile", "tiles"), digits(b.Count()), digits(trace)),
	})
	if b.Tiles() > maxTiles {
		return nil
	}
	set, err := b.Set()
	if err != nil {
		return err
	}
	m, err := set.Minimal()
	if err != nil {
		return err
	}
	p := picture{
		Title: "The band of the closed curve", Stem: "band",
		Caption: "The band of the closed curve round the arc, cut open: the two edges with arrows are one; thick, its minimal good matching",
	}
	return x.hang(p, b, snake.Drawing{Matching: &m, Numbers: true})
}

// addLattice shows all matchings in their order, when they are few.
func (x *exhibit) addLattice() error {
	h, err := x.set.Hasse(maxLattice)
	if errors.Is(err, snake.ErrTooMany) {
		return nil
	}
	if err != nil {
		return err
	}
	if x.graph.Tiles() == 0 {
		return nil
	}
	svg, err := h.SVG(snake.Drawing{})
	if err != nil {
		return err
	}
	x.Pictures = append(x.Pictures, picture{
		Title: "The lattice of matchings", Stem: "lattice",
		Caption: "From the minimal matching, below, to the maximal one, above; a line is the flip of the tile with the number beside it",
		SVG:     template.HTML(svg), DOT: h.DOT(), Wide: true,
	})
	return nil
}

// drawable is a graph or a band.
type drawable interface {
	SVG(snake.Drawing) (string, error)
	TikZ(snake.Drawing) (string, error)
	Text(snake.Drawing) (string, error)
	AllTiles() iter.Seq[snake.Tile]
	Tiles() int
}

// hang draws a picture of g in all its forms and appends it.
func (x *exhibit) hang(p picture, g drawable, d snake.Drawing) error {
	inLaTeX := d
	if d.Name != nil {
		inLaTeX.Name = labelInLaTeX
	}
	svg, errSVG := g.SVG(d)
	tikz, errTikZ := g.TikZ(inLaTeX)
	text, errText := g.Text(d)
	if err := errors.Join(errSVG, errTikZ, errText); err != nil {
		return err
	}
	p.SVG, p.TikZ, p.Least = template.HTML(svg), tikz, leastTile*columns(g)
	if g.Tiles() <= maxText && !d.Hexagons { // hexagons are not drawn with characters
		p.Text = text
	}
	x.Pictures = append(x.Pictures, p)
	return nil
}

// columns is the width of a graph, in tiles.
func columns(g drawable) int {
	last := 0
	for t := range g.AllTiles() {
		last = t.At.X + 1
	}
	return last
}

// labelSign is the sign of the class that a label of the graph stands for.
func labelSign(l snake.Label) string {
	if c, ok := orbifold.ClassOf(l); ok {
		return sign(c)
	}
	return ""
}

func labelInLaTeX(l snake.Label) string { return strings.ReplaceAll(labelSign(l), "∞", `$\infty$`) }
