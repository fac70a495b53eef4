package snake_test

import (
	"encoding/xml"
	"errors"
	"flag"
	"io"
	"math"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"example.com/onecusp/snake"
)

var update = flag.Bool("update", false, "write the golden pictures anew")

// golden compares a picture with the file that pins it.
func golden(t *testing.T, name, got string) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		require.NoError(t, os.WriteFile(path, []byte(got), 0o644))
	}
	want, err := os.ReadFile(path)
	require.NoError(t, err)
	require.Equal(t, string(want), got, "run with -update if the change is meant")
}

func className(l snake.Label) string { return []string{"", "0", "∞", "1"}[l%4] }

// countElements reads an SVG image as XML and counts its elements by name.
func countElements(t require.TestingT, svg string) map[string]int {
	d := xml.NewDecoder(strings.NewReader(svg))
	count := map[string]int{}
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return count
		}
		require.NoError(t, err)
		if e, ok := token.(xml.StartElement); ok {
			count[e.Name.Local]++
		}
	}
}

// An SVG picture is well-formed and has as many elements as the graph has
// parts; a matching hatches its flipped tiles; hexagons join tiles and change
// nothing else.
func TestSVGShowsEveryPart(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := slopes(9).Draw(t, "slope")
		weights := [3]int{rapid.IntRange(0, 2).Draw(t, "k0"), rapid.IntRange(0, 2).Draw(t, "k∞"), rapid.IntRange(0, 2).Draw(t, "k1")}
		g := arcGraph(s[0], s[1], weights)
		n := g.Tiles()
		set, err := g.Set()
		require.NoError(t, err)
		m, err := set.Sample(source{t})
		require.NoError(t, err)
		hexagons := 0
		for range g.Hexagons() {
			hexagons++
		}
		d := snake.Drawing{Name: className, EdgeNames: rapid.Bool().Draw(t, "edges")}
		texts := n
		if d.EdgeNames {
			texts += 3*n + 1
		}
		flipped := 0
		if rapid.Bool().Draw(t, "matching") {
			d.Matching, flipped = &m, m.Height()
		}
		check := func(tiles, texts int) {
			svg, err := g.SVG(d)
			require.NoError(t, err)
			count := countElements(t, svg)
			require.Equal(t, tiles, count["polygon"])
			require.Equal(t, flipped, count["path"]) // hatching
			require.Equal(t, n+3*n+1, count["line"]) // diagonals and edges
			require.NotContains(t, svg, " id=")
			require.Equal(t, 2*n+2, count["circle"])
			require.Equal(t, texts, count["text"])
			heavy := strings.Count(svg, `stroke-linecap="round"`)
			require.Equal(t, d.Matching != nil, heavy > 0)
			if d.Matching != nil {
				require.Equal(t, n+1, heavy)
			}
			tikz, err := g.TikZ(d)
			require.NoError(t, err)
			require.Equal(t, texts, strings.Count(tikz, `\node`))
			require.Equal(t, n+3*n+1, strings.Count(tikz, `\draw`))
			require.Equal(t, tiles+flipped+2*n+2, strings.Count(tikz, `\fill`))
		}
		check(n, texts)
		d.Hexagons = true
		check(n-hexagons, texts-hexagons)
		d.Numbers = true
		check(n-hexagons, texts)
	})
}

// A plain text picture has every vertex once and, in heavy strokes, the matched
// edges.
func TestTextShowsEveryPart(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		g := snake.FromWord(mustWord(words(30).Draw(t, "word")))
		set, err := g.Set()
		require.NoError(t, err)
		m, err := set.Sample(source{t})
		require.NoError(t, err)
		s, err := g.Text(snake.Drawing{Matching: &m})
		require.NoError(t, err)
		n := g.Tiles()
		require.Equal(t, 2*n+2, strings.Count(s, "●"))
		require.Equal(t, n+1, strings.Count(s, "━━━")+strings.Count(s, "┃"))
		require.Equal(t, 2*n, strings.Count(s, "───")+strings.Count(s, "│"))
		require.Equal(t, 2*m.Height(), strings.Count(s, "░"))
	})
}

func TestBandPicturesShowTheCutTwice(t *testing.T) {
	b := bandBuilt("RRLRL")
	set, err := b.Set()
	require.NoError(t, err)
	for m := range b.Matchings() {
		d := snake.Drawing{Matching: &m, Name: className, EdgeNames: true}
		svg, err := b.SVG(d)
		require.NoError(t, err)
		count := countElements(t, svg)
		assert.Equal(t, 5+2, count["polygon"])
		assert.Equal(t, m.Height(), count["path"])
		assert.Equal(t, 5+16, count["line"])
		assert.Equal(t, 5+16, count["text"])
		edges, err := set.EdgesOf(m)
		require.NoError(t, err)
		cut := strings.Count(svg, "stroke-dasharray=\"3 4\"")
		for _, e := range edges {
			if e.Tile == 5 && e.Face == snake.North { // the last letter, L after an odd tile, glues upwards
				assert.Zero(t, cut)
				cut = 2
			}
		}
		assert.Equal(t, 2, cut)
		text, err := b.Text(d)
		require.NoError(t, err)
		assert.Equal(t, 12, strings.Count(text, "●"))
		tikz, err := b.TikZ(d)
		require.NoError(t, err)
		assert.Equal(t, 5+16, strings.Count(tikz, `\draw`))
	}
	text, err := b.Text(snake.Drawing{})
	require.NoError(t, err)
	assert.Equal(t, 2, strings.Count(text, "┆")+strings.Count(text, "┄┄┄"))
}

func TestPicturesOfTheSingleEdge(t *testing.T) {
	g := snake.EdgeWithLabel(2)
	m := snake.Matching{}
	d := snake.Drawing{Name: className, EdgeNames: true, Matching: &m}
	svg, err := g.SVG(d)
	require.NoError(t, err)
	assert.Equal(t, 1, countElements(t, svg)["text"])
	text, err := g.Text(d)
	require.NoError(t, err)
	assert.Equal(t, "●\n┃\n●\n", text)
	tikz, err := g.TikZ(d)
	require.NoError(t, err)
	assert.Equal(t, 1, strings.Count(tikz, `\draw`))
}

// Names are the caller's; whatever they hold, the picture stays well-formed.
func TestNamesAreMadeSafe(t *testing.T) {
	for _, name := range []string{"<b>&\"'", "a\x00\x1b]0;\xff\uFFFE", "\t\n", "\u009b31m\x7f", "long name"} {
		g := arcGraph(3, 7, [3]int{})
		d := snake.Drawing{Name: func(snake.Label) string { return name }, EdgeNames: true}
		svg, err := g.SVG(d)
		require.NoError(t, err)
		countElements(t, svg)
		text, err := g.Text(d)
		require.NoError(t, err)
		for _, r := range text {
			require.True(t, r == '\n' || !unicode.IsControl(r))
		}
	}
}

func TestPicturesRefuse(t *testing.T) {
	other := snake.Matching{}
	small, long := snake.FromWord(mustWord("RL")), snake.FromWord(mustWord("L600"))
	for _, draw := range []func(snake.Graph, snake.Drawing) (string, error){snake.Graph.SVG, snake.Graph.TikZ, snake.Graph.Text} {
		_, err := draw(small, snake.Drawing{Matching: &other})
		assert.ErrorIs(t, err, snake.ErrNotMatching)
		_, err = draw(long, snake.Drawing{})
		assert.ErrorIs(t, err, snake.ErrTooLong)
		_, err = draw(hugeGraph(), snake.Drawing{})
		assert.ErrorIs(t, err, snake.ErrTooLong)
	}
	b := bandBuilt("RRLRL")
	for _, draw := range []func(snake.Band, snake.Drawing) (string, error){snake.Band.SVG, snake.Band.TikZ, snake.Band.Text} {
		_, err := draw(b, snake.Drawing{Matching: &other})
		assert.ErrorIs(t, err, snake.ErrNotMatching)
	}
}

func TestHassePictures(t *testing.T) {
	set, err := snake.FromWord(mustWord("RLLR")).Set()
	require.NoError(t, err)
	h, err := set.Hasse(100)
	require.NoError(t, err)
	svg, err := h.SVG(snake.Drawing{Name: className})
	require.NoError(t, err)
	nodes, arcs := len(h.Nodes()), len(h.Arcs())
	count := countElements(t, svg)
	assert.Equal(t, nodes+1, count["rect"])
	assert.Equal(t, arcs, count["text"])
	assert.Equal(t, nodes*(5+16)+arcs, count["line"])

	many, err := snake.FromWord(mustWord("LRLRLRLRLRLRL")).Set()
	require.NoError(t, err)
	h, err = many.Hasse(1000)
	require.NoError(t, err)
	_, err = h.SVG(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooMany)

	wide, err := snake.FromWord(mustWord("L600")).Set()
	require.NoError(t, err)
	for i := range 600 { // leaves one flip free: the last tile
		wide, err = wide.WithTile(601-i, false)
		require.NoError(t, err)
	}
	h, err = wide.Hasse(2)
	require.NoError(t, err)
	_, err = h.SVG(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooLong)

	narrow, err := snake.FromWord(mustWord("L300")).Set()
	require.NoError(t, err)
	h, err = narrow.Hasse(400)
	require.NoError(t, err)
	_, err = h.SVG(snake.Drawing{})
	assert.ErrorIs(t, err, snake.ErrTooLong)

	var zero snake.Hasse
	_, err = zero.SVG(snake.Drawing{})
	assert.NoError(t, err)
	assert.Contains(t, zero.DOT(), "digraph")
	assert.Empty(t, zero.Nodes())
	assert.Empty(t, zero.Arcs())
}

// attributes reads the numbers of an attribute from every element of a name.
func attributes(t *testing.T, svg, element, name string) []float64 {
	d := xml.NewDecoder(strings.NewReader(svg))
	var all []float64
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return all
		}
		require.NoError(t, err)
		if e, ok := token.(xml.StartElement); ok && e.Name.Local == element {
			for _, a := range e.Attr {
				if a.Name.Local == name {
					v, err := strconv.ParseFloat(a.Value, 64)
					require.NoError(t, err)
					all = append(all, v)
				}
			}
		}
	}
}

// The numbers at the lines of a lattice can be read: none lies on another.
func TestHasseNumbersKeepApart(t *testing.T) {
	for _, word := range []string{"RLLRRL", "RRRRRR", "RLRLRL", "LLRRLLRR"} {
		set, err := snake.FromWord(mustWord(word)).Set()
		require.NoError(t, err)
		h, err := set.Hasse(100)
		require.NoError(t, err)
		svg, err := h.SVG(snake.Drawing{})
		require.NoError(t, err)
		x, y := attributes(t, svg, "text", "x"), attributes(t, svg, "text", "y")
		require.Len(t, x, len(h.Arcs()))
		for i := range x {
			for j := range i {
				assert.Greater(t, math.Hypot(x[i]-x[j], y[i]-y[j]), 10.0, "%s, numbers %d and %d", word, j, i)
			}
		}
	}
}

// The hatching of a tile is a set of whole slanted lines that reach across it, also where a
// hexagon has moved its corners.
func TestHatchingFillsItsTile(t *testing.T) {
	g := arcGraph(3, 7, [3]int{1, 1, 1})
	m, err := g.Maximal()
	require.NoError(t, err)
	for _, hexagons := range []bool{false, true} {
		svg, err := g.SVG(snake.Drawing{Matching: &m, Hexagons: hexagons})
		require.NoError(t, err)
		width, height := attributes(t, svg, "svg", "width")[0], attributes(t, svg, "svg", "height")[0]
		paths := regexp.MustCompile(`<path d="([^"]*)"`).FindAllStringSubmatch(svg, -1)
		require.Len(t, paths, g.Tiles())
		for _, p := range paths {
			lines := regexp.MustCompile(`M([\d.]+) ([\d.]+)L([\d.]+) ([\d.]+)`).FindAllStringSubmatch(p[1], -1)
			require.GreaterOrEqual(t, len(lines), 10)
			total := 0
			longest := 0.0
			for _, l := range lines {
				total += len(l[0])
				var v [4]float64
				for i := range v {
					v[i], err = strconv.ParseFloat(l[i+1], 64)
					require.NoError(t, err)
				}
				require.InDelta(t, v[2]-v[0], v[1]-v[3], .03, "lines rise at 45°")
				require.LessOrEqual(t, max(v[0], v[2]), width)
				require.LessOrEqual(t, max(v[1], v[3]), height)
				longest = max(longest, math.Hypot(v[2]-v[0], v[3]-v[1]))
			}
			require.Len(t, p[1], total, "nothing but whole lines")
			require.Greater(t, longest, 64.0, "nearly the diagonal of a tile 64 pixels wide")
			require.Less(t, longest, 130.0)
		}
	}
}

// Every drawn form is pinned by a file: the slope 2/3 with weights (1, 0, 1),
// one flip below the maximal matching.
func TestGoldenPictures(t *testing.T) {
	g := arcGraph(2, 3, [3]int{1, 0, 1})
	set, err := g.Set()
	require.NoError(t, err)
	m, err := set.Maximal()
	require.NoError(t, err)
	flips, err := set.Flips(m)
	require.NoError(t, err)
	m, err = set.Flip(m, flips[0])
	require.NoError(t, err)
	d := snake.Drawing{Name: className, EdgeNames: true, Matching: &m, Hexagons: true}
	svg, err := g.SVG(d)
	require.NoError(t, err)
	golden(t, "arc.svg", svg)
	inLaTeX := d
	inLaTeX.Name = func(l snake.Label) string { return []string{"", "0", `$\infty$`, "1"}[l%4] }
	tikz, err := g.TikZ(inLaTeX)
	require.NoError(t, err)
	golden(t, "arc.tikz", tikz)
	text, err := g.Text(d)
	require.NoError(t, err)
	golden(t, "arc.txt", text)
	lists, err := g.AdjacencyText()
	require.NoError(t, err)
	golden(t, "arc.adjacency", lists)
	h, err := set.Hasse(50)
	require.NoError(t, err)
	svg, err = h.SVG(snake.Drawing{})
	require.NoError(t, err)
	golden(t, "lattice.svg", svg)
	golden(t, "lattice.dot", h.DOT())
	svg, err = bandBuilt("RRLRL").SVG(snake.Drawing{Name: className})
	require.NoError(t, err)
	golden(t, "band.svg", svg)
}
